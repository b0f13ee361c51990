"""The printed words around a reading, as a reader sees them, with the reading marked.

The place of the reading in those words is found by the same pieces that led from the words to
the source, backwards; the words are never searched.
"""

from __future__ import annotations

import re
from bisect import bisect_right
from collections.abc import Callable, Iterable, Iterator

from crossfoot.documents.table import CELL
from crossfoot.documents.visible import OPAQUE, Visible, verbatim
from crossfoot.expressions import expression
from crossfoot.model import Block, Document, Placed, Span
from crossfoot.output.safe import one_line, safe
from crossfoot.reading.sentences import ABBREVIATION

#: Stand before and after the reading; ``safe`` leaves none in a document's own words.
MARK, UNMARK = "\ufdd0", "\ufdd1"

#: Code points shown before and after the reading, at most.
_BEFORE, _AFTER = 160, 120

#: Rows of a table shown for one reading, at most.
_MOST_ROWS = 6

#: No abbreviation is longer.
_ABBREVIATED = 12

#: A word this long is no word, and may be cut.
_LONG_WORD = 30

#: Where a sentence or an item of a list ends and another begins.
_END = expression(
    r"[.!?][\"”’»)]{0,2}\s+(?=[A-ZÀ-ÞΑ-ΩА-Я“\"«(])|\n[ \t]{0,20}(?=(?:•|\d{1,3}[.)])[ \t])"
)
_RAISED = expression(r"\^\{([^{}]{0,40})\}")
_LOWERED = expression(r"_\{([^{}]{0,40})\}")
_HIGH = str.maketrans("0123456789+-−()n", "⁰¹²³⁴⁵⁶⁷⁸⁹⁺⁻⁻⁽⁾ⁿ")
_LOW = str.maketrans("0123456789+-−()", "₀₁₂₃₄₅₆₇₈₉₊₋₋₍₎")


def excerpt(document: Document, placed: Placed, span: Span) -> str:
    """Return the sentence, or the row of a table, that a reading stands in.

    Parameters
    ----------
    document
        The document.
    placed
        The claim.
    span
        The place of the reading, counted like those of the claim.

    Returns
    -------
    str
        One line, safe to print, with :data:`MARK` and :data:`UNMARK` around the reading and an
        ellipsis where something was cut.
    """
    return quotation(document, placed, span, ())[0]


def quotation(
    document: Document, placed: Placed, span: Span, others: Iterable[Span]
) -> tuple[str, ...]:
    """Return the excerpt of a reading with the other rows of its table that it is seen beside.

    Parameters
    ----------
    document, placed, span
        As for :func:`excerpt`.
    others
        The places of the readings that the finding rests on.
    """
    block, visible = _block(document, placed.base)
    shift = placed.base - block.start
    text = visible.text
    start, end = shown(visible, Span(span.start + shift, span.end + shift))
    prose = block.kind == "prose"
    starts = [text.rfind("\n", 0, start) + 1]
    for other in () if prose else others:
        place, _ = shown(visible, Span(other.start + shift, other.end + shift))
        row = text.rfind("\n", 0, place) + 1
        if row not in starts and len(starts) < _MOST_ROWS:
            starts.append(row)
    clean = _aligned if block.kind == "verbatim" and len(starts) > 1 else _clean
    rows = {row: _after(text, row, prose, clean) for row in starts[1:]}
    rows[starts[0]] = (
        f"{_before(text, start, prose, clean)}{MARK}{_clean(text[start:end]).strip()}{UNMARK}"
        f"{_after(text, end, prose, clean)}"
    )
    return tuple(_plain(rows[row]) for row in sorted(rows))


def shown(visible: Visible, span: Span) -> tuple[int, int]:
    """Return where the source between two offsets is shown: the way back of ``place``."""
    start = _index(visible, span.start, False)
    return start, max(start, _index(visible, max(span.start, span.end - 1), True))


def _index(visible: Visible, offset: int, after: bool) -> int:
    """Return the visible index of a source offset, or the one just after it."""
    pieces = visible.pieces
    if not pieces:
        return 0
    number = max(0, bisect_right(pieces, offset, key=lambda piece: piece.start) - 1)
    piece = pieces[number]
    stop = pieces[number + 1].shown if number + 1 < len(pieces) else len(visible.text)
    if offset >= piece.end:
        return stop
    if stop - piece.shown == piece.end - piece.start:
        return piece.shown + max(0, offset - piece.start) + after
    return stop if after else piece.shown


def _block(document: Document, base: int) -> tuple[Block, Visible]:
    """Return the block that a claim stands in, and what a reader sees of it."""
    number = bisect_right(document.blocks, base, key=lambda block: block.start) - 1
    if number < 0:
        return Block("prose", 0, document.text), verbatim(document.text)
    block = document.blocks[number]
    return block, _show(document, block)


def _show(document: Document, block: Block) -> Visible:
    """Return what a reader sees of a block; the source itself where its format is not known."""
    from crossfoot.documents import FORMATS, show_block  # only a finding needs them here

    return show_block(document, block) if document.language in FORMATS else verbatim(block.source)


def _before(text: str, start: int, prose: bool, clean: Callable[[str], str]) -> str:
    """Return what to show before an index: from the start of its sentence, item or line."""
    reach = max(0, start - _BEFORE)
    if prose:
        begins = [found.end() for found in _ends(text, reach, start)]
    else:
        begins = [found for found in [text.rfind("\n", reach, start) + 1] if found]
    if begins or not reach:
        shown = clean(text[begins[-1] if begins else 0 : start])
        return shown.lstrip() if clean is _clean else shown
    part = clean(text[reach:start])
    head, _, rest = part.partition(" ")
    return f"… {rest if len(head) < _LONG_WORD else part}"


def _after(text: str, end: int, prose: bool, clean: Callable[[str], str]) -> str:
    """Return what to show after an index: up to the end of its sentence, item or line."""
    reach = min(len(text), end + _AFTER)
    if prose:
        stop = next((found.end() for found in _ends(text, end, reach)), -1)
    else:
        stop = text.find("\n", end, reach)
    if stop >= 0 or reach == len(text):
        return clean(text[end : stop if stop >= 0 else reach]).rstrip()
    part = clean(text[end:reach])
    rest, _, tail = part.rpartition(" ")
    return f"{rest if len(tail) < _LONG_WORD else part} …"


def _ends(text: str, start: int, end: int) -> Iterator[re.Match[str]]:
    """Yield where sentences and items end in ``text[start:end]``."""
    for found in _END.finditer(text, start, end):
        if ABBREVIATION.search(text, max(0, found.start() - _ABBREVIATED), found.end()) is None:
            yield found


def _clean(text: str) -> str:
    """Return a part of the words, safe, with blanks kept at its ends."""
    body = one_line(text.replace(OPAQUE, "…"))
    return " " * text[:1].isspace() + body + " " * (text[-1:].isspace() and bool(body))


def _aligned(text: str) -> str:
    """Return a part of a line, safe, with its spaces as they are; tabs part cells."""
    return safe(text.replace(OPAQUE, "…").replace("\t", CELL).strip("\n"))


def _plain(text: str) -> str:
    """Return words in which raised and lowered text is written as a person types it."""
    text = _RAISED.sub(lambda found: _script("^", found[1], _HIGH), text)
    return _LOWERED.sub(lambda found: _script("_", found[1], _LOW), text)


def _script(sign: str, inner: str, table: dict[int, int]) -> str:
    changed = inner.translate(table)
    if inner and not any(character in inner for character in changed):
        return changed
    return f"{sign}({inner})" if " " in inner else f"{sign}{inner}"
