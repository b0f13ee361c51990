"""The inline markup of reStructuredText to visible text."""

from __future__ import annotations

import re
from collections.abc import Iterable

from crossfoot.documents.edits import MOST_MARKS, Edit, Marks, Pairs, apply_edits
from crossfoot.documents.mathtext import show_math
from crossfoot.documents.visible import OPAQUE, Builder
from crossfoot.expressions import expression

_MARK = Marks(
    "\\`:*[|_",
    r"(?P<escape>\\[\s\S])|``(?P<literal>[^`\n](?:[^`]|`(?!`)){0,2000}?)``"
    r"|(?::(?P<role>[a-zA-Z][\w:.+-]{0,40}):)?`(?P<text>(?:[^`\\]|\\[\s\S]){1,2000})`"
    r"(?::(?P<suffix>[a-zA-Z][\w.+-]{0,40}):)?(?P<link>__?(?!\w))?"
    r"|(?P<stars>\*\*?)|(?P<note>\[(?:\#[\w-]{0,40}|\*|\d{1,4}|[A-Za-z][\w-]{0,40})\]_(?!\w))"
    r"|(?P<bar>\|[^|\s](?:[^|\n]{0,60}[^|\s])?\|_{0,2})|(?P<ref>(?<=[A-Za-z0-9])__?(?![\w]))",
)
_TARGET = expression(r"\s*<[^<>]*>$")
_RAISED = frozenset(("sup", "superscript"))
_LOWERED = frozenset(("sub", "subscript"))


def show_inline(
    out: Builder, source: str, start: int, end: int, line_edits: Iterable[Edit] = ()
) -> None:
    """Show ``source[start:end]``, with edits that the lines call for."""
    pairs = Pairs(source, start, end)
    pairs.edits.extend(line_edits)
    position = start
    left = MOST_MARKS
    while left and (found := _MARK.next(source, position, end)):
        left -= 1
        position = found.end()
        _handle(pairs, found)
    apply_edits(out, source, start, end, pairs.edits)


def _handle(pairs: Pairs, found: re.Match[str]) -> None:
    """Write down what a mark does."""
    edits = pairs.edits
    if found["escape"]:
        space = found["escape"][1].isspace()
        edits.append(Edit(found.start(), found.end() if space else found.start() + 1))
    elif found["literal"] is not None:
        _around(edits, found, "literal")
    elif found["text"] is not None:
        _interpreted(edits, found)
    elif found["stars"]:
        pairs.mark(found["stars"], *found.span())
    elif found["note"]:
        edits.append(Edit(*found.span()))
    elif found["bar"]:
        edits.append(Edit(*found.span(), OPAQUE))
    elif found["ref"]:
        edits.append(Edit(*found.span()))


def _around(edits: list[Edit], found: re.Match[str], group: str) -> None:
    """Drop what stands around a group."""
    edits.append(Edit(found.start(), found.start(group)))
    edits.append(Edit(found.end(group), found.end()))


def _interpreted(edits: list[Edit], found: re.Match[str]) -> None:
    """Show interpreted text: a formula, raised or lowered text, a link."""
    role = found["role"] or found["suffix"] or ""
    inner, stop = found.span("text")
    if role == "math":
        out = Builder()
        show_math(out, found.string, inner, stop)
        edits.append(Edit(*found.span(), out.build()))
    elif role in _RAISED or role in _LOWERED:
        stars = role in _RAISED and set(found["text"]) <= set("*†‡")
        edits.append(Edit(found.start(), inner, "" if stars else "^{" if role in _RAISED else "_{"))
        edits.append(Edit(stop, found.end(), "" if stars else "}"))
    elif role in ("cite", "citep", "citet", "cite:p", "cite:t", "raw"):
        edits.append(Edit(*found.span(), OPAQUE))
    else:
        target = _TARGET.search(found["text"]) if found["link"] or role else None
        edits.append(Edit(found.start(), inner))
        edits.append(Edit(inner + target.start() if target else stop, found.end()))
