"""A remedy as a change of the text: exactly the number it speaks of, and nothing around it."""

from __future__ import annotations

from collections.abc import Iterator, Sequence

from crossfoot.amend.change import Change, block_at, printed_literals, reread
from crossfoot.amend.signs import sign_before, written_sign
from crossfoot.model import RELATIONS, Block, Document, Placed, Remedy, Span


def mended(document: Document, placed: Placed, remedy: Remedy) -> tuple[Change, ...] | None:
    """Return the changes that carry out a remedy, or None where they can't be made safely.

    Parameters
    ----------
    document
        The document.
    placed
        The claim.
    remedy
        One of the remedies of its findings.
    """
    block = block_at(document, placed.base)
    readings = placed.audited.claim.readings
    wanted = printed_literals(placed.audited.claim)
    ways: list[Sequence[tuple[Change, ...]]] = []
    for index, words in ((remedy.reading, remedy.literal), *remedy.also):
        if index >= len(readings) or block is None:
            return None
        relation, literal = _parted(words)
        quantity, old, _ = wanted[index]
        wanted[index] = (quantity, relation or old, literal)
        ways.append(list(_ways(document, block, placed, index, relation, literal)))
    for changes in _combined(ways):
        claim = reread(document, placed, changes)
        if claim is not None and printed_literals(claim) == wanted:
            return changes
    return None


def _parted(words: str) -> tuple[str | None, str]:
    """Return the relation with which a remedy's literal starts, if it does, and the rest."""
    if words[:1] in RELATIONS:
        return words[0], words[1:].strip()
    return None, words


def _combined(ways: Sequence[Sequence[tuple[Change, ...]]]) -> Iterator[tuple[Change, ...]]:
    """Yield the changes of each reading together, the first way of each, then the second."""
    for number in range(max(map(len, ways), default=0)):
        chosen = [options[min(number, len(options) - 1)] for options in ways if options]
        if len(chosen) == len(ways):
            yield tuple(sorted(change for changes in chosen for change in changes))


def _ways(
    document: Document,
    block: Block,
    placed: Placed,
    index: int,
    relation: str | None,
    literal: str,
) -> Iterator[tuple[Change, ...]]:
    """Yield the ways to write another literal, and another relation, at a reading."""
    reading = placed.audited.claim.readings[index]
    start, end = reading.span
    source = block.source
    lead: tuple[Change, ...] = ()
    if relation is not None and relation != reading.relation:
        sign = sign_before(source, start)
        if sign is not None:
            new = written_sign(relation, document.language, source, sign.span.start)
            lead = (Change(_moved(sign.span, placed.base), new),)
        elif block.kind == "table":
            new = written_sign(relation, document.language, source, start)
            lead = (Change(_moved(Span(start, start), placed.base), f"{new} "),)
        else:
            return
    for span, text in _spellings(source, Span(start, end), reading.literal, literal):
        yield (*lead, Change(_moved(span, placed.base), text))


def _spellings(source: str, span: Span, old: str, new: str) -> Iterator[tuple[Span, str]]:
    """Yield where and how to write a literal, given how the old one is written in the source.

    The source may spell it otherwise than a reader sees it: ``1{,}234``, ``&minus;.35``. Then as
    much as both literals share at their start is left as it stands.
    """
    written = source[span.start : span.end]
    if written == old:
        yield span, new
        return
    shared = 0
    while shared < min(len(old), len(new)) and old[shared] == new[shared]:
        shared += 1
    for keep in range(shared, -1, -1):
        rest = old[keep:]
        if rest and written.endswith(rest):
            yield Span(span.end - len(rest), span.end), new[keep:]
    yield span, new


def _moved(span: Span, base: int) -> Span:
    return Span(span.start + base, span.end + base)
