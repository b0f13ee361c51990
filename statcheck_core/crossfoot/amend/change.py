"""What a change is, and what would be read after it."""

from __future__ import annotations

from bisect import bisect_right
from collections.abc import Iterable
from typing import NamedTuple

from crossfoot.model import Block, Claim, Document, Placed, Span


class Change(NamedTuple):
    """A replacement in the text of a document; at an empty span it is an insertion."""

    span: Span
    text: str


class Amendment(NamedTuple):
    """Changes that belong together, with a title for a menu."""

    title: str
    changes: tuple[Change, ...]


def applied(text: str, changes: Iterable[Change], base: int = 0) -> str:
    """Return a text after changes that do not overlap.

    ``base`` is where the text starts in the document that the changes speak of.
    """
    parts = []
    done = 0
    for span, new in sorted(changes):
        parts += [text[done : span.start - base], new]
        done = span.end - base
    return "".join([*parts, text[done:]])


def block_at(document: Document, offset: int) -> Block | None:
    """Return the block of a document in which, or at whose end, an offset lies."""
    blocks = document.blocks
    number = bisect_right(blocks, offset, key=lambda block: block.start) - 1
    if number < 0 or offset > blocks[number].start + len(blocks[number].source):
        return None
    return blocks[number]


def claims_in(document: Document, block: Block, source: str | None = None) -> tuple[Claim, ...]:
    """Return the claims that a block makes, or would make with another source.

    What is only tried is not remembered.
    """
    from crossfoot.reading import read_block

    if source is None:
        return read_block(document.language, block.kind, block.source, document.definitions).claims
    once = read_block.__wrapped__
    return once(document.language, block.kind, source, document.definitions).claims


def reread(document: Document, placed: Placed, changes: Iterable[Change]) -> Claim | None:
    """Return a claim as it would be read after changes in its block.

    None where the block would then make other claims than before.
    """
    block = block_at(document, placed.base)
    if block is None:
        return None
    before = claims_in(document, block)
    after = claims_in(document, block, applied(block.source, changes, block.start))
    span = placed.audited.claim.span
    number = next((i for i, claim in enumerate(before) if claim.span == span), None)
    if number is None or len(after) != len(before):
        return None
    for old, new in zip(
        before[:number] + before[number + 1 :], after[:number] + after[number + 1 :], strict=True
    ):
        if _printed(old) != _printed(new):
            return None
    return after[number]


def _printed(claim: Claim) -> list[tuple[str, str, str]]:
    return [(r.quantity, r.relation, r.literal) for r in claim.readings]


def printed_literals(claim: Claim) -> list[tuple[str, str, str]]:
    """Return the quantity, relation and literal of each reading of a claim."""
    return _printed(claim)
