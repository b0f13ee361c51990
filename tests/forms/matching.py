"""Which of the claims read are the claims wanted, reading by reading."""

from __future__ import annotations

import math
import re
from collections.abc import Sequence
from typing import NamedTuple

from crossfoot.model import Claim, Reading
from forms.corpus import Entry, Wanted

_LITERAL = re.compile(r"-?\d*(?:\.(?P<decimals>\d*))?(?:e(?P<exponent>[+-]?\d+))?")

#: Terms that name a role; any other term names an effect.
_ROLES = ("error", "total")


class Match(NamedTuple):
    """What became of one claim that a human reader takes.

    ``claim`` is the index of the claim read that has most of it, or None; ``missed`` the readings
    that claim lacks; ``odd`` its readings that contradict a wanted one.
    """

    claim: int | None
    missed: tuple[Wanted, ...]
    odd: tuple[Reading, ...]

    @property
    def whole(self) -> bool:
        return self.claim is not None and not self.missed and not self.odd


def matches(entry: Entry, claims: Sequence[Claim]) -> list[Match]:
    """Match each wanted claim to the claim that has most of it, the best pairs first.

    A claim is the match of one wanted claim only, except that the table of an analysis of
    variance may hold several tests, told apart by their terms.
    """
    shared = [
        (_shared(wanted, claim), -abs(position - index), position, index)
        for position, wanted in enumerate(entry.claims)
        for index, claim in enumerate(claims)
    ]
    found: dict[int, int] = {}
    for count, _, position, index in sorted(shared, reverse=True):
        taken = index in found.values() and claims[index].kind != "anova-table"
        if count and position not in found and not taken:
            found[position] = index
    return [
        _match(wanted, entry.also[position], found.get(position), claims)
        for position, wanted in enumerate(entry.claims)
    ]


def _shared(wanted: Sequence[Wanted], claim: Claim) -> int:
    return sum(any(fits(want, reading) for reading in _known(claim)) for want in wanted)


def _match(
    wanted: Sequence[Wanted], also: Sequence[Wanted], index: int | None, claims: Sequence[Claim]
) -> Match:
    if index is None:
        return Match(None, tuple(wanted), ())
    claim = claims[index]
    missed = [w for w in wanted if not any(fits(w, reading) for reading in _known(claim))]
    odd = [reading for reading in claim.readings if _odd(reading, wanted, (*wanted, *also))]
    return Match(index, tuple(missed), tuple(odd))


def _known(claim: Claim) -> tuple[Reading, ...]:
    return claim.readings + claim.given


def _odd(reading: Reading, wanted: Sequence[Wanted], allowed: Sequence[Wanted]) -> bool:
    """Tell whether a reading says another thing of a quantity than a human reader does."""
    rivals = [want for want in wanted if want.quantity == reading.quantity]
    return any(_same_term(want.term, reading.term) for want in rivals) and not any(
        fits(want, reading) or _compatible(want, reading) for want in allowed
    )


def _compatible(want: Wanted, reading: Reading) -> bool:
    """Tell whether a bound, such as marks of significance, holds beside what is wanted."""
    return (
        want.quantity == reading.quantity
        and reading.relation in "<>≤≥"
        and reading.low <= float(want.literal) <= reading.high
    )


def fits(want: Wanted, reading: Reading) -> bool:
    """Tell whether a reading is the one wanted: its quantity, relation, term and value."""
    return (
        want.quantity == reading.quantity
        and want.relation == reading.relation
        and _same_term(want.term, reading.term)
        and _same_value(want, reading)
    )


def _same_term(want: str | None, term: str | None) -> bool:
    """Compare terms; ``model`` is any effect, and what has no term may be anything's."""
    # Marks of significance are labelled as the p that they stand for.
    term = None if term == "stars" else term and term.removesuffix(": stars")
    if want is None or term is None:
        return True
    if want in _ROLES or term in _ROLES:
        return want == term
    return "model" in (want.casefold(), term.casefold()) or _plain(want) == _plain(term)


def _plain(term: str) -> str:
    return re.sub(r"[\W_]+", "", term).casefold()


def _same_value(want: Wanted, reading: Reading) -> bool:
    match = _LITERAL.fullmatch(want.literal)
    assert match is not None, want
    value = float(want.literal)
    unit = 10.0 ** (int(match["exponent"] or 0) - len(match["decimals"] or ""))
    if want.relation in "<≤":
        return math.isclose(reading.high, value, rel_tol=1e-9)
    if want.relation in ">≥":
        return math.isclose(reading.low, value, rel_tol=1e-9)
    if want.relation == "≈":
        return reading.low <= value <= reading.high
    slack = 1e-9 * max(unit, abs(value))
    return (
        reading.low - slack <= value <= reading.high + slack
        and reading.high <= value + 0.5 * unit + slack
        and reading.low >= value - 0.5 * unit - slack
    )
