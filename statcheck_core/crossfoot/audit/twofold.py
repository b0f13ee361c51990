"""Numerals that can be read two ways: ``6,278`` is six and a bit, or some six thousand.

A text says by its other numerals how it writes decimals, but not all texts keep to one way. So
nothing is held against a claim that agrees as soon as such numerals are read the other way.
"""

from __future__ import annotations

from collections.abc import Iterator, Sequence
from itertools import combinations

from crossfoot.expressions import expression
from crossfoot.model import Claim, Reading
from crossfoot.reading import numerals
from crossfoot.reading.fold import fold
from crossfoot.reading.items import WHOLE

_TWOFOLD = expression(r"[-+]?\s?[1-9]\d{0,2}(?P<mark>[.,])\d{3}")
#: Quantities in the units of what was measured.
_SCALED = frozenset({"b", "se", "ci_low", "ci_high", "ss", "ms", "s", "mean", "sd"})
_DECIMAL = expression(r"[-+]?\s?(?:0?[.,]\d+|\d+[.,](?:\d{1,2}|\d{4,}))")


def otherwise(claim: Claim) -> Iterator[Claim]:
    """Yield a claim with some or all of its ambiguous numerals read the other way.

    Counts and statistics are turned apart from each other, and so are points and commas, since
    an author who groups the one may not group the other.
    """
    marks = {
        mark
        for reading in claim.readings
        for mark in ".,"
        if _DECIMAL.fullmatch(fold(reading.literal)) and mark in reading.literal
    }
    turned: dict[tuple[bool, str], dict[int, Reading]] = {}
    for index, reading in enumerate(claim.readings):
        match = _TWOFOLD.fullmatch(fold(reading.literal))
        other = _turned(reading, match["mark"], marks) if match is not None else None
        if match is not None and other is not None:
            kind = (reading.quantity in WHOLE, match["mark"])
            turned.setdefault(kind, {})[index] = other
    for size in range(len(turned), 0, -1):
        for kinds in combinations(turned.values(), size):
            others = {index: reading for kind in kinds for index, reading in kind.items()}
            readings = tuple(others.get(i, reading) for i, reading in enumerate(claim.readings))
            yield claim._replace(readings=readings, context=_context(claim, readings))


def _context(claim: Claim, readings: Sequence[Reading]) -> tuple[str, ...]:
    """Return the contexts of a claim: degrees of freedom without decimals are not adjusted."""
    if all(r.low == r.high for r in readings if r.quantity in {"df", "df1", "df2"}):
        return tuple(context for context in claim.context if context != "adjusted-df")
    return claim.context


def _turned(reading: Reading, mark: str, marks: set[str]) -> Reading | None:
    """Return a reading with its decimals read as a group of digits, or the other way about.

    A test is read in thousands only where another numeral shows that its mark is not the decimal
    mark: any p below a bound goes with one a thousand times as great. A count, and what has a
    unit, may be in thousands unless decimals are set off by points: commas do both for some.
    """
    whole, scaled = reading.quantity in WHOLE, reading.quantity in _SCALED
    pointed = mark == "." and marks == {"."}
    literal = fold(reading.literal)
    decimal = numerals.parse(literal.replace(mark, "."))
    grouped = numerals.parse(literal.replace(mark, ""), whole=whole)
    if decimal is None or grouped is None or reading.quantity == "n":
        return None
    if numerals.bounds(reading.relation, decimal) != (reading.low, reading.high):
        low, high = numerals.bounds(reading.relation, decimal)
    elif ((whole or scaled) and not pointed) or (marks and mark not in marks):
        low, high = numerals.bounds(reading.relation, grouped)
    else:
        return None
    return reading._replace(low=low, high=high)
