"""What the remarks of a document do: which findings they settle."""

from __future__ import annotations

from bisect import bisect_right
from collections.abc import Sequence
from typing import NamedTuple

from crossfoot import documents
from crossfoot.model import Audited, Block, Document, Placed, Problem
from crossfoot.reading.remarks import Allow, Assume, parse


class Remarks(NamedTuple):
    """The remarks of a document, and what is wrong with them."""

    assumed: tuple[Assume, ...] = ()
    allowed: tuple[Allow, ...] = ()
    problems: tuple[Problem, ...] = ()


def remarks_in(document: Document) -> Remarks:
    """Return the remarks of a document, in order."""
    found = [parse(c.text, c.span) for c in documents.comments(document.language, document.text)]
    return Remarks(
        tuple(remark for remark in found if isinstance(remark, Assume)),
        tuple(remark for remark in found if isinstance(remark, Allow)),
        tuple(remark for remark in found if isinstance(remark, Problem)),
    )


def settled(document: Document, placed: list[Placed], allowed: Sequence[Allow]) -> list[Placed]:
    """Mark the findings that remarks allow; each stays in the report, with the reason."""
    for allow in allowed:
        chosen = _meant(document, placed, allow)
        placed = [
            item._replace(audited=_settle(item.audited, allow)) if item.id in chosen else item
            for item in placed
        ]
    return placed


def _settle(audited: Audited, allow: Allow) -> Audited:
    findings = tuple(
        finding._replace(settled=allow.reason)
        if "all" in allow.slugs or finding.identity in allow.slugs
        else finding
        for finding in audited.findings
    )
    return audited._replace(findings=findings)


class _Extent(NamedTuple):
    id: str
    start: int
    end: int


def _meant(document: Document, placed: Sequence[Placed], allow: Allow) -> set[str]:
    """Return the ids of the claims that a remark speaks of.

    The claim before it on its line, else the one after it on its line, else the next one;
    ``allow all`` speaks of its whole block, or of the next one where it stands between blocks.
    """
    extents = [
        _Extent(p.id, p.base + p.audited.claim.span.start, p.base + p.audited.claim.span.end)
        for p in placed
    ]
    at = allow.span
    if "all" in allow.slugs:
        block = _block_at(document.blocks, at.start, at.end)
        if block is None:
            return set()
        end = block.start + len(block.source)
        return {extent.id for extent in extents if block.start <= extent.start < end}
    line_start = document.text.rfind("\n", 0, at.start) + 1
    line_end = document.text.find("\n", at.end)
    line_end = len(document.text) if line_end < 0 else line_end
    before = [e for e in extents if line_start < e.end <= at.start]
    if before:
        return {before[-1].id}
    after = [e for e in extents if e.start >= at.end]
    return {after[0].id} if after else set()


def _block_at(blocks: Sequence[Block], start: int, end: int) -> Block | None:
    index = bisect_right(blocks, start, key=lambda block: block.start) - 1
    if index >= 0 and start < blocks[index].start + len(blocks[index].source):
        return blocks[index]
    return blocks[index + 1] if index + 1 < len(blocks) else None
