"""Going on where the author stops typing: the number that must follow a name just written.

Behind ``F(2, 57) = 4.31, p`` stands a claim and the beginning of one more reading. The claim is
read from what stands before that name, and what follows from it is proposed in its style.
"""

from __future__ import annotations

import re
from collections.abc import Sequence
from typing import NamedTuple

from crossfoot.amend.change import block_at, claims_in
from crossfoot.amend.complete import missing_of, nearest
from crossfoot.amend.signs import in_mathematics, written_sign
from crossfoot.audit import Derived, derive
from crossfoot.documents import show
from crossfoot.documents.visible import place
from crossfoot.expressions import expression
from crossfoot.laws.quantities import symbol
from crossfoot.model import Block, Claim, Document, Report, Span
from crossfoot.reading.fold import fold
from crossfoot.reading.names import names

#: Visible characters before the cursor in which a name is looked for.
_REACH = 60

#: Visible characters that may stand between a claim and what goes on with it.
_GAP = 40

_REST = expression(
    r"(?P<brackets>\s?(?:_\{[^{}]{0,20}\}|\([^()]{0,30}\)))?"
    r"(?P<open>\s?[=:]?\s?(?:\[|\())?"
    r"\s?(?P<sign>[=<>≤≥≈])?\s?(?P<number>[-−–]?[\d.,]{0,20})\$?\Z"
)
_ADJUSTED = expression(r"adj|corr", re.IGNORECASE)
_SENTENCE = expression(r"[.!?]\s+[A-ZÀ-Þ]|\n\s*\n")

#: The notation's names for what is decided later, as the quantities that they mostly turn out as.
_MEANT = {"β": "beta"}


class Proposal(NamedTuple):
    """A number to go on with.

    Attributes
    ----------
    span
        What is replaced: from the name to the cursor.
    text
        What is written there.
    title
        What that is, as a person reads it.
    claim
        What it follows from.
    derived
        How it follows.
    """

    span: Span
    text: str
    title: str
    claim: Claim
    derived: tuple[Derived, ...]


class _Begun(NamedTuple):
    """A reading of which the start is typed: quantity, place of its name, what follows that."""

    quantity: str
    start: int
    end: int
    rest: re.Match[str]


def proposals(report: Report, offset: int) -> list[Proposal]:
    """Return what an author at a place of a document may want to write next.

    Parameters
    ----------
    report
        The report on the document as it stands.
    offset
        Where the cursor is.
    """
    document = report.document
    block = _block(document, offset)
    if block is None or block.kind not in ("prose", "verbatim"):
        return []
    prefix = document.text[block.start : offset]
    for ending in _endings(prefix):
        visible = show(document.language, block.kind, ending, document.definitions)
        begun = _begun(fold(visible.text))
        if begun is not None:
            break
    else:
        return []
    start = place(visible, begun.start, begun.start + 1).start
    claim = _claim_before(document, block, prefix[:start])
    if claim is None:
        return []
    name_end = place(visible, begun.end - 1, begun.end).end
    found = []
    for derived in _wanted(claim, begun):
        lead = _lead(prefix, start, name_end, begun)
        proposal = _proposal(report, block, claim, derived, begun, (start, len(prefix), lead))
        if proposal is not None:
            found.append(proposal)
    return found


def _block(document: Document, offset: int) -> Block | None:
    """Return the block that is being written at a place; blanks behind its end belong to it."""
    block = block_at(document, offset)
    if block is not None:
        return block
    text = document.text
    at = offset
    while at > 0 and text[at - 1] in " \t":
        at -= 1
    return block_at(document, at)


def _endings(prefix: str) -> list[str]:
    """Return what is typed, and the same with the mathematics closed that is still open."""
    if not in_mathematics(prefix, len(prefix)):
        return [prefix]
    return [prefix, f"{prefix.rstrip()}$"]


def _begun(folded: str) -> _Begun | None:
    """Return the reading whose start ends a text."""
    low = max(0, len(folded) - _REACH)
    # A name is known by what follows it too; here that is the cursor.
    for name in reversed(list(names(f"{folded} ", low, len(folded) + 1))):
        rest = _REST.match(folded, name.match.end())
        if rest is None:
            continue
        quantity = _MEANT.get(name.notation.quantity, name.notation.quantity)
        if quantity == "R2" and _ADJUSTED.search(
            folded,
            max(0, name.match.start() - 12),
            rest.start("sign") if rest["sign"] else len(folded),
        ):
            quantity = "R2_adj"
        return _Begun(quantity, name.match.start(), name.match.end(), rest)
    return None


def _claim_before(document: Document, block: Block, source: str) -> Claim | None:
    """Return the claim that ends a source, if one does."""
    for ending in reversed(_endings(source)):
        claims = claims_in(document, block, ending)
        if claims:
            last = max(reading.span.end for reading in claims[-1].readings)
            between = source[last:]
            near = len(between) <= _GAP and _SENTENCE.search(between) is None
            return claims[-1] if near else None
    return None


def _wanted(claim: Claim, begun: _Begun) -> Sequence[tuple[Derived, ...]]:
    """Return what follows from a claim of the quantity that is begun."""
    derived = {item.quantity: item for item in derive(claim).derived}
    if begun.quantity == "ci":
        pair = tuple(derived[key] for key in ("ci_low", "ci_high") if key in derived)
        return [pair] if len(pair) == 2 and begun.rest["open"] and not begun.rest["number"] else []
    if begun.rest["open"]:
        return []
    keys = [begun.quantity, *(("df2", "df1") if begun.quantity == "df" else ())]
    return [(derived[key],) for key in keys if key in derived][:1]


def _lead(prefix: str, start: int, name_end: int, begun: _Begun) -> str:
    """Return what stays of what is typed: the name with its brackets, as it stands."""
    typed = prefix[start:]
    sign, number = begun.rest["sign"], begun.rest["number"]
    kept = typed
    if number and kept.rstrip("$").endswith(number):
        kept = kept.rstrip("$")[: -len(number)]
    if sign:
        at = max(kept.rfind(mark) for mark in (sign, "&lt;", "&gt;", "\\le", "\\ge"))
        kept = kept[:at] if at >= name_end - start else kept[: name_end - start]
    return kept


def _proposal(
    report: Report,
    block: Block,
    claim: Claim,
    derived: tuple[Derived, ...],
    begun: _Begun,
    typed: tuple[int, int, str],
) -> Proposal | None:
    start, end, lead = typed
    others = [
        other.audited.claim
        for other in nearest(report, block.start)
        if other.base != block.start or other.audited.claim.span.end < start
    ]
    missing = missing_of(derived, claim, others)
    if missing is None:
        return None
    span = Span(block.start + start, block.start + end)
    if len(missing.words) == 2:
        low, high = (literal for _, literal in missing.words)
        return Proposal(span, f"{lead}{low}, {high}", f"[{low}, {high}]", claim, derived)
    relation, literal = missing.words[0]
    source = report.document.text[block.start : span.end]
    sign = (
        written_sign(relation, report.document.language, source, end)
        if begun.rest["sign"] or (report.document.language in ("html", "jats"))
        else relation
    )
    tight = begun.rest["sign"] is not None and not lead.endswith((" ", "\t", "~"))
    between = "" if lead.endswith((" ", "\t", "~")) or tight else " "
    behind = "" if tight else " "
    text = f"{lead}{between}{sign}{behind}{literal}"
    title = f"{symbol(derived[0].quantity)} {relation} {literal}"
    return Proposal(span, text, title, claim, derived)
