"""What a slip is, and what undoing it proposes in the place of a reading."""

from __future__ import annotations

import math
from collections.abc import Callable, Iterable, Iterator, Sequence
from typing import NamedTuple

from crossfoot.audit.literals import Numeral, written
from crossfoot.laws.interval import EVERYTHING, Interval, meet
from crossfoot.laws.quantities import QUANTITIES, domain
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

    Attributes
    ----------
    numeral, relation
        The numeral, and the relation before it where that changes too.
    share
        The chance that the slip, made on it, gives what is printed.
    also
        Changes that the same slip made to other readings.
    rounded
        Whether it stands for all numbers that round to it: more decimals do not follow.
    """

    numeral: Numeral
    share: float
    relation: str = ""
    also: tuple[tuple[int, Numeral], ...] = ()
    rounded: bool = False


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
    crosses
        Whether the sign of what is printed says nothing of what could have stood there.
    """

    name: str
    weight: float
    reason: str
    undo: Callable[[Printed], Iterable[Proposal]]
    crosses: bool = False


def span(reading: Reading) -> Interval:
    """Return the values that a reading stands for."""
    return Interval(reading.low, reading.high)


def fitting(printed: Printed, share: float, among: Interval = EVERYTHING) -> Iterator[Proposal]:
    """Return the literals that fit what the rest implies, if they are few.

    Parameters
    ----------
    printed
        The reading that may be wrong.
    share
        The chance that the slip gives what is printed, made on a value out of ``among``.
    among
        The values of which it can give what is printed.
    """
    implied = _bounded(printed, among)
    if implied is None:
        return
    most, fewest = len(printed.numeral.fraction), _fewest(printed, implied)
    for decimals in range(max(most, fewest), fewest - 1, -1):
        if _few(written(0.0, printed.numeral, decimals).unit, implied):
            for proposal in _literals(printed, share, decimals, implied):
                yield proposal._replace(rounded=decimals < most)
            return


def _fewest(printed: Printed, implied: Interval) -> int:
    """Return the fewest decimals that a number is printed with: a share has two, a large one none.

    A count has those that it is printed with.
    """
    quantity = printed.reading.quantity
    if QUANTITIES[quantity].whole:
        return len(printed.numeral.fraction)
    if domain(quantity).high <= 1:
        return max(0, 2 + printed.numeral.power)
    return 1 if implied.high < 10 else 0


def fitting_with(printed: Printed, share: float, decimals: int) -> Iterator[Proposal]:
    """Return the literals with so many decimals that fit what the rest implies, if they are few."""
    implied = _bounded(printed, EVERYTHING)
    if implied is not None and _few(written(0.0, printed.numeral, decimals).unit, implied):
        yield from _literals(printed, share, decimals, implied)


def _bounded(printed: Printed, among: Interval) -> Interval | None:
    """Return what is implied among some values, if it is bounded."""
    implied = meet(printed.implied, domain(printed.reading.quantity))
    implied = meet(implied, among) if implied is not None else None
    return implied if implied is not None and math.isfinite(implied.high - implied.low) else None


def _few(unit: float, implied: Interval) -> bool:
    first, last = implied.low / unit, implied.high / unit
    return max(abs(first), abs(last)) < _MOST_STEPS and round(last) - round(first) < FEW


def _literals(
    printed: Printed, share: float, decimals: int, implied: Interval
) -> Iterator[Proposal]:
    numeral = printed.numeral
    unit = written(0.0, numeral, decimals).unit
    for steps in range(round(implied.low / unit), round(implied.high / unit) + 1):
        if steps == 0 and 0 < implied.high < unit:
            if printed.reading.quantity == "p":
                yield Proposal(written(unit, numeral, decimals), share, "<")
        else:
            found = written(steps * unit, numeral, decimals, printed.minus)
            yield Proposal(found, share * _part(found, printed.implied, implied))


def _part(found: Numeral, implied: Interval, among: Interval) -> float:
    """Return how much of the values that print so, and are implied, lies among others."""
    whole = meet(found.interval("="), implied)
    part = meet(whole, among) if whole is not None else None
    if whole is None or part is None or whole.low == whole.high:
        return 1.0
    return (part.high - part.low) / (whole.high - whole.low)
