"""Completing a result: the numbers that follow from it and are not printed, set beside it.

How the author writes such a number (what stands between it and the one before it, its markup)
is learnt from the other results of the document; where there is none to learn from, each format
has a plain way. Whatever is tried, the block is read again with it: it is offered only if
exactly that number is then read there.
"""

from __future__ import annotations

from collections.abc import Iterator, Mapping, Sequence
from itertools import pairwise
from typing import NamedTuple

from crossfoot.amend.change import Amendment, Change, block_at, printed_literals, reread
from crossfoot.amend.signs import in_mathematics, sign_before, written_sign
from crossfoot.amend.values import hand_of, value_words
from crossfoot.audit import Derived, derive
from crossfoot.audit.literals import Numeral, numeral
from crossfoot.audit.wording import between
from crossfoot.expressions import expression
from crossfoot.laws.interval import Interval
from crossfoot.laws.quantities import symbol
from crossfoot.model import Block, Claim, Document, Placed, Report, Span

#: What a result may be completed with, in the order of the menu. A pair is written as one.
COMPLETIONS: tuple[tuple[str, ...], ...] = (
    ("p",),
    ("R2",),
    ("R2_adj",),
    ("f2",),
    ("eta2_partial",),
    ("ci_low", "ci_high"),
)

#: Marks that close what the last number stands in; a number in plain text goes after them.
_CLOSING = expression(r"(?:\$|\*{1,3}|\\\)|</[A-Za-z]{1,12}>|\}(?=\$|\\\)))*")

#: Learnt from the claims nearest to this one.
_LOOKED_AT = 40

#: ``{}`` is the relation with the number.
_PLAIN = {
    "p": ", p {}",
    "R2": ", R² {}",
    "R2_adj": ", adjusted R² {}",
    "f2": ", f² {}",
    "eta2_partial": ", ηp² {}",
    "ci_low": ", 95% CI [{}, {}]",
}
_IN_MATHEMATICS = {
    "p": ", p {}",
    "R2": ", R^2 {}",
    "R2_adj": r", R^2_{{\text{{adj}}}} {}",
    "f2": ", f^2 {}",
    "eta2_partial": ", \\eta_p^2 {}",
}
_LATEX = {
    "p": ", $p {}$",
    "R2": ", $R^2 {}$",
    "R2_adj": r", $R^2_{{\text{{adj}}}} {}$",
    "f2": ", $f^2 {}$",
    "eta2_partial": ", $\\eta_p^2 {}$",
    "ci_low": r", 95\% CI $[{}, {}]$",
}
_MARKDOWN = {
    **_PLAIN,
    "p": ", *p* {}",
    "R2": ", *R*² {}",
    "R2_adj": ", adjusted *R*² {}",
    "f2": ", *f*² {}",
}
_TAGGED = {
    **_PLAIN,
    "p": ", <{0}>p</{0}> {{}}",
    "R2": ", <{0}>R</{0}><sup>2</sup> {{}}",
    "R2_adj": ", adjusted <{0}>R</{0}><sup>2</sup> {{}}",
    "f2": ", <{0}>f</{0}><sup>2</sup> {{}}",
    "eta2_partial": ", <{0}>η</{0}><sub>p</sub><sup>2</sup> {{}}",
}
_HTML = {key: way.format("i") if "{0}" in way else way for key, way in _TAGGED.items()}
_JATS = {key: way.format("italic") if "{0}" in way else way for key, way in _TAGGED.items()}

#: The plain way of each format to write a number in running text.
WAYS: Mapping[str, Mapping[str, str]] = {
    "markdown": _MARKDOWN,
    "notebook": _MARKDOWN,
    "latex": _LATEX,
    "html": _HTML,
    "jats": _JATS,
}


class Missing(NamedTuple):
    """Numbers that follow from a claim and would be written as one.

    Attributes
    ----------
    derived
        What follows.
    words
        For each a relation and a literal.
    like
        The numeral in whose style the first is written.
    """

    derived: tuple[Derived, ...]
    words: tuple[tuple[str, str], ...]
    like: Numeral

    @property
    def title(self) -> str:
        """What would be printed, as a person reads it, and between what it lies."""
        first = self.derived[0]
        if len(self.derived) == 2:
            return f"95% CI [{self.words[0][1]}, {self.words[1][1]}]"
        relation, literal = self.words[0]
        shown = f"{symbol(first.quantity)} {relation} {literal}"
        if relation == "=" and first.high > first.low:
            shown += f" ({between(Interval(first.low, first.high), self.like)})"
        return shown


def _middle(item: Derived, claim: Claim) -> float:
    """Return what follows from the printed numerals as they stand, without their margins."""
    numerals = [(reading, numeral(reading)) for reading in claim.readings]
    exact = tuple(
        reading._replace(low=found.value, high=found.value)
        if found is not None and reading.relation == "="
        else reading
        for reading, found in numerals
    )
    for other in derive(claim._replace(readings=exact)).derived:
        if other.quantity == item.quantity:
            return min(max((other.low + other.high) / 2, item.low), item.high)
    return (item.low + item.high) / 2


def completions(report: Report, placed: Placed) -> list[Amendment]:
    """Return an amendment for each number that would complete a claim."""
    block = block_at(report.document, placed.base)
    if block is None or block.kind in ("table", "verbatim"):
        return []
    found = []
    for missing in missing_numbers(report, placed.audited.claim, placed.base):
        change = _change(report, placed, block, missing)
        if change is not None:
            found.append(Amendment(f"Add {missing.title}", (change,)))
    return found


def missing_numbers(report: Report, claim: Claim, base: int) -> list[Missing]:
    """Return the numbers that would complete a claim that stands ``base`` into the document."""
    derived = {item.quantity: item for item in derive(claim).derived}
    others = [other.audited.claim for other in nearest(report, base)]
    found = []
    for keys in COMPLETIONS:
        if not all(key in derived for key in keys) or _foreign(keys[0], claim):
            continue
        missing = missing_of([derived[key] for key in keys], claim, others)
        if missing is not None:
            found.append(missing)
    return found


def _foreign(quantity: str, claim: Claim) -> bool:
    """Say whether nobody prints a quantity with such a result, though it follows."""
    return quantity in ("R2", "R2_adj", "f2") and claim.kind not in (
        "overall-model",
        "model-summary",
    )


def missing_of(derived: Sequence[Derived], claim: Claim, others: Sequence[Claim]) -> Missing | None:
    """Return what follows from a claim in the author's style; None where it can't be written."""
    words = []
    hands = []
    for item in derived:
        hands.append(hand_of(item.quantity, claim, others))
        middle = _middle(item, claim)
        word = value_words(item.quantity, Interval(item.low, item.high), hands[-1], middle)
        if word is None:
            return None
        words.append(word)
    return Missing(tuple(derived), tuple(words), hands[0])


def nearest(report: Report, base: int) -> list[Placed]:
    """Return the claims nearest to a place, the nearest first."""
    placed = sorted(report.claims, key=lambda item: abs(item.base - base))
    return placed[:_LOOKED_AT]


def _change(report: Report, placed: Placed, block: Block, missing: Missing) -> Change | None:
    """Return the first way to write numbers behind a claim that reads as it should."""
    claim = placed.audited.claim
    wanted = sorted(
        [
            *printed_literals(claim),
            *((d.quantity, *word) for d, word in zip(missing.derived, missing.words, strict=True)),
        ]
    )
    if len(missing.words) == 2:
        level = next((item for item in printed_literals(claim) if item[0] == "ci_level"), None)
        wanted += [] if level else [("ci_level", "=", "95")]
    for change in _ways(report, placed, block, missing):
        read = reread(report.document, placed, (change,))
        if read is not None and _alike(sorted(printed_literals(read)), sorted(wanted)):
            return change
    return None


def _alike(read: list[tuple[str, str, str]], wanted: list[tuple[str, str, str]]) -> bool:
    """Compare readings; a level may be printed with its percent sign or without."""
    return [(q, r, text.rstrip("%")) for q, r, text in read] == [
        (q, r, text.rstrip("%")) for q, r, text in wanted
    ]


def _ways(report: Report, placed: Placed, block: Block, missing: Missing) -> Iterator[Change]:
    document, source = report.document, block.source
    last = max(reading.span.end for reading in placed.audited.claim.readings)
    inside = in_mathematics(source, last)
    quantity = missing.derived[0].quantity
    if len(missing.words) == 1:
        for lead, trail in _learnt(report, placed, quantity, inside):
            text = f"{_with_sign(lead, missing.words[0], document)}{trail}"
            yield _insertion(placed.base, last, text)
    if inside and quantity in _IN_MATHEMATICS:
        yield _insertion(
            placed.base, last, _filled(_IN_MATHEMATICS[quantity], missing, document, source, last)
        )
    closed = _CLOSING.match(source, last)
    after = closed.end() if closed is not None else last
    ways = WAYS.get(document.language, _PLAIN)
    if quantity in ways:
        yield _insertion(
            placed.base, after, _filled(ways[quantity], missing, document, source, after)
        )
    yield _insertion(
        placed.base, after, _filled(_PLAIN[quantity], missing, document, source, after)
    )


def _insertion(base: int, at: int, text: str) -> Change:
    return Change(Span(base + at, base + at), text)


def _filled(way: str, missing: Missing, document: Document, source: str, at: int) -> str:
    if len(missing.words) == 2:
        return way.format(*(literal for _, literal in missing.words))
    relation, literal = missing.words[0]
    sign = relation
    if document.language in ("html", "jats"):
        sign = written_sign(relation, document.language, source, at)
    return way.format(f"{sign} {literal}")


def _learnt(
    report: Report, placed: Placed, quantity: str, inside: bool
) -> Iterator[tuple[str, str]]:
    """Yield what other claims have before such a number and just behind it."""
    seen: set[tuple[str, str]] = set()
    for other in nearest(report, placed.base):
        if other.id == placed.id:
            continue
        block = block_at(report.document, other.base)
        readings = other.audited.claim.readings
        for before, reading in pairwise(readings):
            if block is None or reading.quantity != quantity:
                continue
            source = block.source
            start, end = before.span.end, reading.span.start
            if not 0 < end - start <= 60 or in_mathematics(source, start) != inside:
                continue
            lead = source[start:end]
            trail = _balance(lead, source[reading.span.end : reading.span.end + 3])
            if trail is not None and "\n" not in lead and (lead, trail) not in seen:
                seen.add((lead, trail))
                yield lead, trail


def _balance(lead: str, after: str) -> str | None:
    """Return what must follow a number so that what its lead opens is closed; None if it can't."""
    for mark in ("$", "**", "*", "_"):
        if lead.count(mark) % 2:
            if not after.startswith(mark):
                return None
            return mark
    return "" if lead.count("(") == lead.count(")") else None


def _with_sign(lead: str, word: tuple[str, str], document: Document) -> str:
    """Return a lead that ends in a relation, with the relation that is needed, and the literal."""
    relation, literal = word
    sign = sign_before(lead, len(lead))
    if sign is None:
        return lead + literal
    new = written_sign(relation, document.language, lead, sign.span.start)
    if document.language == "latex" and "$" in new and not sign.printed.startswith("$"):
        new = relation if in_mathematics(f"${lead}", sign.span.start + 1) else new
    return f"{lead[: sign.span.start]}{new}{lead[sign.span.end :]}{literal}"
