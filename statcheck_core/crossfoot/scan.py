"""From a document to its report: read each block, audit each claim, apply the remarks."""

from __future__ import annotations

from collections.abc import Callable, Iterable, Iterator, Sequence
from typing import TYPE_CHECKING

from crossfoot import documents
from crossfoot.model import Audited, Block, Claim, Document, Placed, Report
from crossfoot.reading import read_block
from crossfoot.reading.contexts import above, is_methods, spreading, titled
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


#: What holds for a printout and for the prose that retells it.
_RETOLD = frozenset({"adjusted-p"})

#: A note below a printout is no longer than this.
_LONGEST_NOTE = 240


class _Scope:
    """The contexts that earlier paragraphs and remarks state for what follows them."""

    def __init__(self, assumed: Sequence[Assume]) -> None:
        self.document: frozenset[str] = frozenset()
        self.section: frozenset[str] = frozenset()
        #: What the last printout of the section says of its p values, and so of their retelling.
        self.printed: frozenset[str] = frozenset()
        self.alpha: float | None = None
        self.section_alpha: float | None = None
        self.methods = False
        self._level = 0
        self._waiting = list(assumed)

    def heading(self, block: Block) -> None:
        self.section = frozenset()
        self.printed = frozenset()
        self.section_alpha = None
        if block.level <= self._level or not self.methods:
            self._level = block.level
            self.methods = is_methods(block.source)

    def reach(self, end: int) -> None:
        """Take up the remarks that stand before ``end``."""
        while self._waiting and self._waiting[0].span.start < end:
            remark = self._waiting.pop(0)
            if remark.context is not None:
                self.section |= {remark.context}
            else:
                self.section_alpha = remark.alpha

    def spread(self, contexts: frozenset[str], alpha: float | None) -> None:
        if self.methods:
            self.document |= contexts
        else:
            self.section |= contexts
        if alpha is not None:
            self.alpha = alpha

    def apply(self, claim: Claim, noted: frozenset[str]) -> Claim:
        alpha = claim.alpha or self.section_alpha or self.alpha
        inherited = self.document or self.section or self.printed or noted
        if inherited:
            retold = self.printed if not _several_df(claim) else frozenset()
            inherited = (self.document | self.section | retold | noted) - _opposed(claim.context)
        if not inherited and alpha == claim.alpha:
            return claim
        return claim._replace(context=tuple(sorted({*claim.context, *inherited})), alpha=alpha)


def _several_df(claim: Claim) -> bool:
    """Say whether a test is of several degrees of freedom at once, so that it is no comparison."""
    return any(reading.quantity == "df1" and reading.low > 1 for reading in claim.readings)


def _opposed(context: Iterable[str]) -> set[str]:
    """Return what a claim's own words rule out of what earlier paragraphs say."""
    sides = {"one-sided": "two-sided", "two-sided": "one-sided"}
    return {sides[key] for key in context if key in sides}


def _audited(document: Document, assumed: Sequence[Assume], settings: Settings) -> Iterator[Placed]:
    scope = _Scope(assumed)
    number = 0
    audit: Callable[[Claim, float], Audited] | None = None
    language, definitions, level = document.language, document.definitions, settings.alpha
    for index, block in enumerate(document.blocks):
        kind, start, source, _ = block
        if assumed:
            scope.reach(start)
        if kind == "heading":
            scope.heading(block)
        reading = read_block(language, kind, source, definitions)
        if reading.claims:
            audit = audit or _auditor()
            noted = _beside(document, index)
            for claim in reading.claims:
                number += 1
                yield Placed(f"c{number}", start, audit(scope.apply(claim, noted), level))
            if kind == "verbatim":
                scope.printed = frozenset(
                    _RETOLD.intersection(*(c.context for c in reading.claims))
                )
        elif reading.cues.contexts or reading.cues.alpha:
            said = titled(source) if kind == "heading" else spreading(source)
            scope.spread(said, reading.cues.alpha)


def _auditor() -> Callable[[Claim, float], Audited]:
    """Import what audits, with the first claim: a document without a result pays for nothing."""
    from crossfoot.audit import audit_claim

    return audit_claim


def _beside(document: Document, index: int) -> frozenset[str]:
    """Return what the paragraphs right above and below a table or printout say of it."""
    found = _note_below(document, index)
    if document.blocks[index].kind in {"table", "verbatim"} and index > 0:
        before = document.blocks[index - 1]
        if before.kind in {"prose", "heading"}:
            found |= above(before.source)
    return found


def _note_below(document: Document, index: int) -> frozenset[str]:
    """Return what a line below a printout says of it: how its p values are adjusted."""
    if index + 1 == len(document.blocks):
        return frozenset()
    following = document.blocks[index + 1].source
    if len(following) > _LONGEST_NOTE or "djust" not in following:
        return frozenset()
    return spreading(following) & {"adjusted-p"}
