"""What a slip is, and what undoing it proposes in the place of a reading."""

from __future__ import annotations

import math
from collections.abc import Callable, Iterable, Iterator, Sequence
from typing import NamedTuple

from crossfoot.audit.literals import Numeral, written
from crossfoot.laws.interval import Interval, meet
from crossfoot.laws.quantities import domain
from crossfoot.model import Reading

#: More literals than this fit what is implied, and none of them follows.
FEW = 3

_MOST_STEPS = 1e12


class Printed(NamedTuple):
    """One reading that may be wrong, beside the others.

    Attributes
    ----------
    readings, numerals
        All of the claim, and their literals taken apart (None where that can't be done).
    place
        Index of the reading that may be wrong.
    implied
        What the others imply for it.
    minus
        The minus sign that the author uses.
    """

    readings: Sequence[Reading]
    numerals: Sequence[Numeral | None]
    place: int
    implied: Interval
    minus: str

    @property
    def reading(self) -> Reading:
        """The reading that may be wrong."""
        return self.readings[self.place]

    @property
    def numeral(self) -> Numeral:
        """Its literal, taken apart."""
        found = self.numerals[self.place]
        assert found is not None  # nothing is undone on a literal that can't be taken apart
        return found

    def find(self, *quantities: str) -> Iterator[int]:
        """Return the other readings of some quantities in the same row."""
        for index, reading in enumerate(self.readings):
            same = reading.term == self.reading.term and self.numerals[index] is not None
            if index != self.place and same and reading.quantity in quantities:
                yield index


class Proposal(NamedTuple):
    """What could have stood there: a numeral after a relation.

    ``also`` has changes that the same slip made to other readings.
    """

    numeral: Numeral
    share: float
    relation: str = ""
    also: tuple[tuple[int, Numeral], ...] = ()


class Slip(NamedTuple):
    """A way to go wrong.

    Attributes
    ----------
    name
        A word for tests and tables.
    weight
        How often it happens, beside the others.
    reason
        What went wrong, in words that follow a proposed literal.
    undo
        Returns what could have stood there.
    """

    name: str
    weight: float
    reason: str
    undo: Callable[[Printed], Iterable[Proposal]]


def span(reading: Reading) -> Interval:
    """Return the values that a reading stands for."""
    return Interval(reading.low, reading.high)


def fitting(printed: Printed, share: float, among: Interval | None = None) -> Iterator[Proposal]:
    """Return the literals that fit what the rest implies, if they are few.

    Parameters
    ----------
    printed
        The reading that may be wrong.
    share
        The chance that the slip gives what is printed.
    among
        A part of what is implied that they are limited to.
    """
    numeral = printed.numeral
    implied = meet(printed.implied, domain(printed.reading.quantity))
    if implied is not None and among is not None:
        implied = meet(implied, among)
    if implied is None or math.isinf(implied.low) or math.isinf(implied.high):
        return
    decimals = _decimals_to_fit(printed, implied)
    if decimals is None:
        return
    if decimals < len(numeral.fraction):
        share /= 4
    unit = written(0.0, numeral, decimals).unit
    for steps in range(round(implied.low / unit), round(implied.high / unit) + 1):
        if steps == 0 and 0 < implied.high < unit:
            if printed.reading.quantity == "p":
                yield Proposal(written(unit, numeral, decimals), share, "<")
        else:
            found = written(steps * unit, numeral, decimals, printed.minus)
            yield Proposal(found, share * _part(found, implied))


def _part(found: Numeral, implied: Interval) -> float:
    """Return how much of what is implied prints so."""
    common, width = meet(found.interval("="), implied), implied.high - implied.low
    return (common.high - common.low) / width if common is not None and width else 1.0


def _decimals_to_fit(printed: Printed, implied: Interval) -> int | None:
    """Return the most decimals with which few literals fit, no more than are printed."""
    numeral = printed.numeral
    share = domain(printed.reading.quantity).high <= 1
    least = 2 if share else 1 if implied.high < 10 else 0
    most = len(numeral.fraction)
    for decimals in range(most, min(most, least) - 1, -1):
        unit = written(0.0, numeral, decimals).unit
        first, last = implied.low / unit, implied.high / unit
        if max(abs(first), abs(last)) < _MOST_STEPS and round(last) - round(first) < FEW:
            return decimals
    return None
