"""From a document to its report: read each block, audit each claim, apply the remarks."""

from __future__ import annotations

from bisect import bisect_right
from collections.abc import Callable, Iterable, Iterator, Sequence
from typing import NamedTuple

from crossfoot import documents
from crossfoot.model import Audited, Block, Claim, Document, Placed, Problem, Report
from crossfoot.reading import read_block
from crossfoot.reading.cues import is_methods, spreading
from crossfoot.reading.remarks import Allow, Assume, parse
from crossfoot.settings import DEFAULTS, Settings


def scan_text(
    text: str, language: str = "markdown", *, path: str = "-", settings: Settings = DEFAULTS
) -> Report:
    """Scan a text in one of the formats of :data:`crossfoot.documents.FORMATS`."""
    return scan_document(documents.open_document(path, text.encode(), language), settings)


def scan_document(document: Document, settings: Settings = DEFAULTS) -> Report:
    """Return all that is claimed in a document, and what became of it.

    Blocks and claims are remembered by content, so that scanning a document again after an edit
    reads and audits only what the edit changed.
    """
    problem = documents.unreadable(document)
    if problem is not None:
        return Report(document, problem=problem)
    remarks, problems = _remarks(document)
    placed = list(_audited(document, [r for r in remarks if isinstance(r, Assume)], settings))
    placed = _settled(document, placed, [r for r in remarks if isinstance(r, Allow)])
    if problems:
        document = document._replace(problems=(*document.problems, *problems))
    return Report(document, tuple(placed))


def claims_of(text: str, language: str = "plain") -> tuple[Claim, ...]:
    """Return the claims of a text, not audited."""
    document = documents.open_document("-", text.encode(), language)
    return tuple(
        claim
        for block in document.blocks
        for claim in read_block(language, block.kind, block.source, document.definitions).claims
    )


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
            noted = _note_below(document, index)
            for claim in reading.claims:
                number += 1
                yield Placed(f"c{number}", start, audit(scope.apply(claim, noted), level))
            if kind == "verbatim":
                scope.printed = frozenset(
                    _RETOLD.intersection(*(c.context for c in reading.claims))
                )
        elif reading.cues.contexts or reading.cues.alpha:
            scope.spread(spreading(block.source), reading.cues.alpha)


def _auditor() -> Callable[[Claim, float], Audited]:
    """Import what audits, with the first claim: a document without a result pays for nothing."""
    from crossfoot.audit import audit_claim

    return audit_claim


def _note_below(document: Document, index: int) -> frozenset[str]:
    """Return what a line below a printout says of it: how its p values are adjusted."""
    if index + 1 == len(document.blocks):
        return frozenset()
    following = document.blocks[index + 1].source
    if len(following) > _LONGEST_NOTE or "djust" not in following:
        return frozenset()
    return spreading(following) & {"adjusted-p"}


def _remarks(document: Document) -> tuple[list[Allow | Assume], list[Problem]]:
    if "rossfoot" not in document.text:
        return [], []
    remarks: list[Allow | Assume] = []
    problems: list[Problem] = []
    for comment in documents.comments(document.language, document.text):
        remark = parse(comment.text, comment.span)
        if isinstance(remark, Problem):
            problems.append(remark)
        elif remark is not None:
            remarks.append(remark)
    return remarks, problems


def _settled(document: Document, placed: list[Placed], allowed: Sequence[Allow]) -> list[Placed]:
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
