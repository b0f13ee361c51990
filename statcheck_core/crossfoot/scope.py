"""How far the words of a paragraph reach: to its section, to the document, or to what is beside."""

from __future__ import annotations

import re
from collections.abc import Iterable, Sequence
from typing import TYPE_CHECKING, NamedTuple

from crossfoot.expressions import expression
from crossfoot.model import Block, Claim, Document
from crossfoot.reading import read_block
from crossfoot.reading.contexts import (
    COMPARISONS,
    above,
    aside,
    concerning,
    is_methods,
    spreading,
    titled,
)

if TYPE_CHECKING:
    from crossfoot.reading import BlockReading
    from crossfoot.reading.remarks import Assume

_NONE: frozenset[str] = frozenset()
#: What holds for a printout and for the prose that retells it.
_RETOLD = frozenset({"adjusted-p"})
#: A note below a printout is no longer than this.
_LONGEST_NOTE = 240
#: A heading under which one of several studies is told, with methods of its own.
_STUDY = expression(
    r"(?:experiment|stud(?:y|ie)|étude|estudio|sample)\s*(?:\d|[IVX]{1,4}\b)", re.IGNORECASE
)
_SIDES = frozenset({"one-sided", "two-sided", "either-sided"})
#: What p values are of where they need not follow from their statistic.
_EXACT = expression(r"permut|permanova|randomi[sz]ation|exact|monte", re.IGNORECASE)


class Held(NamedTuple):
    """What earlier paragraphs and remarks say of the results of a block.

    Attributes
    ----------
    contexts
        What holds for them.
    printed
        What the last printout of the section says of its p values, and so of their retelling.
    alpha
        The significance level.
    early
        Whether no methods have been told yet.
    """

    contexts: frozenset[str]
    printed: frozenset[str]
    alpha: float | None
    early: bool


class Whole(NamedTuple):
    """What is known of a document at its end.

    Attributes
    ----------
    methods
        What its methods say.
    several
        Whether it tells of several studies, each with methods of its own.
    spoken
        All that it speaks of anywhere.
    alpha
        The significance level that it states, if it states one.
    """

    methods: frozenset[str]
    several: bool
    spoken: frozenset[str]
    alpha: float | None


class Scope:
    """Gathers, block by block, what holds for the results of a document."""

    def __init__(self, document: Document, assumed: Sequence[Assume]) -> None:
        self._document = document
        self._methods = _NONE
        self._section = _NONE
        self._printed = _NONE
        self._spoken = _NONE
        self._alpha: float | None = None
        self._section_alpha: float | None = None
        self._in_methods = self._told = self._several = False
        self._level = 0
        self._waiting = list(assumed)

    def enter(self, block: Block) -> None:
        """Take up a heading, and the remarks that stand before a block."""
        while self._waiting and self._waiting[0].span.start < block.start:
            remark = self._waiting.pop(0)
            if remark.context is not None:
                self._section |= {remark.context}
            else:
                self._section_alpha = remark.alpha
        if block.kind == "heading":
            self._heading(block)

    def _heading(self, block: Block) -> None:
        self._section = self._printed = _NONE
        self._section_alpha = None
        if block.level <= self._level or not self._in_methods:
            self._level = block.level
            self._in_methods = is_methods(block.source)
            self._told = self._told or self._in_methods
        if _STUDY.search(block.source) is not None:
            self._several = True
            self._methods = _loosened(self._methods)

    def held(self, index: int) -> Held:
        """Return what holds for the results of a block, which is entered."""
        contexts = self._methods | self._section | _beside(self._document, index)
        alpha = self._section_alpha or self._alpha
        return Held(contexts, self._printed, alpha, not self._told)

    def leave(self, block: Block, reading: BlockReading) -> None:
        """Take up what a block says for those that follow it."""
        claims, (contexts, alpha) = reading
        self._spoken |= contexts
        if claims and block.kind == "verbatim":
            self._printed = _RETOLD.intersection(*(claim.context for claim in claims))
        if claims:
            said = aside(block.source, claims) if contexts and block.kind == "prose" else _NONE
            alpha = None
        else:
            said = titled(block.source) if block.kind == "heading" else spreading(block.source)
        if self._in_methods:
            self._methods |= said
        else:
            self._section |= said
        if alpha is not None:
            self._alpha = alpha

    def whole(self) -> Whole:
        """Return what is known once every block has been left."""
        spoken = self._spoken
        if "resampled" in spoken and _EXACT.search(self._document.text) is None:
            spoken -= {"resampled"}  # the bootstrap gives intervals more often than p values
        return Whole(self._methods, self._several, spoken, self._alpha)


def in_scope(claim: Claim, held: Held, whole: Whole) -> tuple[Claim, frozenset[str]]:
    """Return a claim with the contexts and the level that hold where it stands.

    With it what the document speaks of elsewhere.
    """
    alpha = claim.alpha or held.alpha or (None if whole.several else whole.alpha)
    contexts = held.contexts
    if not whole.several:
        contexts |= whole.methods
    elif held.early:  # an abstract speaks of all studies
        contexts |= _loosened(whole.methods)
    if held.printed and not _several_df(claim):
        contexts |= held.printed
    elsewhere = whole.spoken
    if COMPARISONS in contexts:
        contexts -= {COMPARISONS}
        if claim.kind == "mean-comparison":
            elsewhere |= {COMPARISONS}
    if contexts:
        quantities = [reading.quantity for reading in claim.readings]
        contexts = concerning(claim.kind, contexts - _opposed(claim.context), quantities)
        if claim.kind == "anova-table" and not _has_several_effects(claim):
            contexts -= {"partial-sums"}  # what one effect adds is what it has
    if contexts or alpha != claim.alpha:
        claim = claim._replace(context=tuple(sorted({*claim.context, *contexts})), alpha=alpha)
    return claim, elsewhere.difference(claim.context) if elsewhere else _NONE


def _loosened(contexts: frozenset[str]) -> frozenset[str]:
    """Return contexts of one study as they bear on another: its tests may have other sides."""
    if "one-sided" in contexts:
        return contexts - {"one-sided", "two-sided"} | {"either-sided"}
    return contexts - {"two-sided"}


def _several_df(claim: Claim) -> bool:
    """Say whether a test is of several degrees of freedom at once, so that it is no comparison."""
    return any(reading.quantity == "df1" and reading.low > 1 for reading in claim.readings)


def _has_several_effects(claim: Claim) -> bool:
    """Say whether a table tells its effects apart by their names."""
    terms = {reading.term for reading in claim.readings if reading.quantity == "ss"}
    return bool(terms - {None, "model", "error", "total"})


def _opposed(context: Iterable[str]) -> frozenset[str]:
    """Return what a claim's own words rule out of what other paragraphs say."""
    stated = _SIDES.intersection(context)
    return _SIDES - stated if stated & {"one-sided", "two-sided"} else _NONE


def _beside(document: Document, index: int) -> frozenset[str]:
    """Return what the paragraphs right above and below a table or printout say of it."""
    if document.blocks[index].kind not in {"table", "verbatim"}:
        return _NONE
    found = _note_below(document, index)
    if index > 0:
        before = document.blocks[index - 1]
        if before.kind in {"prose", "heading"}:
            found |= above(before.source, caption=not _holds_results(document, before))
    return found


def _holds_results(document: Document, block: Block) -> bool:
    """Say whether a paragraph reports results of its own, and so is no caption."""
    return bool(
        read_block(document.language, block.kind, block.source, document.definitions).claims
    )


def _note_below(document: Document, index: int) -> frozenset[str]:
    """Return what a line below a printout says of it: how its p values are adjusted."""
    if index + 1 == len(document.blocks):
        return _NONE
    following = document.blocks[index + 1].source
    if len(following) > _LONGEST_NOTE or "djust" not in following:
        return _NONE
    return spreading(following) & {"adjusted-p", COMPARISONS}
