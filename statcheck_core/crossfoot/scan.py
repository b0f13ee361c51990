"""From a document to its report: read each block, audit each claim, apply the remarks."""

from __future__ import annotations

from collections.abc import Iterator, Sequence
from typing import TYPE_CHECKING

from crossfoot import documents
from crossfoot.model import Claim, Document, Placed, Report
from crossfoot.reading import read_block
from crossfoot.scope import Held, Scope, Whole, in_scope
from crossfoot.settings import DEFAULTS, Settings

if TYPE_CHECKING:
    from crossfoot.reading.remarks import Assume


def scan_text(
    text: str, language: str = "markdown", *, path: str = "-", settings: Settings = DEFAULTS
) -> Report:
    """Scan a text in one of the formats of :data:`crossfoot.documents.FORMATS`."""
    return scan_document(_opened(path, text, language), settings)


def scan_document(document: Document, settings: Settings = DEFAULTS) -> Report:
    """Return all that is claimed in a document, and what became of it.

    Blocks and claims are remembered by content, so that scanning a document again after an edit
    reads and audits only what the edit changed.
    """
    problem = documents.unreadable(document)
    if problem is not None:
        return Report(document, problem=problem)
    if "rossfoot" not in document.text:
        return Report(document, tuple(_compared(document, list(_audited(document, (), settings)))))
    from crossfoot.remarked import remarks_in, settled  # few documents hold a remark

    remarks = remarks_in(document)
    placed = _compared(document, list(_audited(document, remarks.assumed, settings)))
    placed = settled(document, placed, remarks.allowed)
    if remarks.problems:
        document = document._replace(problems=(*document.problems, *remarks.problems))
    return Report(document, tuple(placed))


def _compared(document: Document, placed: list[Placed]) -> list[Placed]:
    """Compare the claims of a document with each other, where there are several."""
    if len(placed) < 2 and "N" not in document.text:
        return placed
    from crossfoot.restated import compared

    return compared(document, placed)


def claims_of(text: str, language: str = "plain") -> tuple[Claim, ...]:
    """Return the claims of a text, not audited."""
    document = _opened("-", text, language)
    return tuple(
        claim
        for block in document.blocks
        for claim in read_block(language, block.kind, block.source, document.definitions).claims
    )


def _opened(path: str, text: str, language: str) -> Document:
    # What is no character (half of a pair of UTF-16) becomes a question mark: no place moves.
    return documents.open_document(path, text.encode("utf-8", "replace"), language)


def _audited(document: Document, assumed: Sequence[Assume], settings: Settings) -> Iterator[Placed]:
    """Yield the claims of a document, audited in the contexts that hold where they stand.

    All blocks are read before any claim is audited, since methods may be told last.
    """
    scope = Scope(document, assumed)
    language, definitions = document.language, document.definitions
    found: list[tuple[int, Sequence[Claim], Held]] = []
    for index, block in enumerate(document.blocks):
        kind, start, source, _ = block
        if assumed or kind == "heading":
            scope.enter(block)
        reading = read_block(language, kind, source, definitions)
        claims, cues = reading
        if claims:
            found.append((start, claims, scope.held(index)))
        if cues.contexts or cues.alpha or (claims and kind == "verbatim"):
            scope.leave(block, reading)
    if found:
        yield from _in_scope(found, scope.whole(), settings.alpha)


def _in_scope(
    found: Sequence[tuple[int, Sequence[Claim], Held]], whole: Whole, level: float
) -> Iterator[Placed]:
    # What audits is imported with the first claim: a document without a result pays for nothing.
    from crossfoot.audit import audit_claim

    number = 0
    for start, claims, held in found:
        for claim in claims:
            number += 1
            claim, elsewhere = in_scope(claim, held, whole)
            yield Placed(f"c{number}", start, audit_claim(claim, level, elsewhere))
