"""The sides of a distribution that a p value counts."""

from __future__ import annotations

from collections.abc import Callable
from typing import NamedTuple

from crossfoot.laws.arithmetic import complement, scale
from crossfoot.laws.interval import Interval


class Side(NamedTuple):
    """How a p value relates to the area on both sides.

    Attributes
    ----------
    key
        A word for it.
    words
        The area in a formula, with the area on both sides for ``{}``.
    area
        p from the area on both sides.
    both
        The area on both sides from p; None where there is none.
    """

    key: str
    words: str
    area: Callable[[Interval], Interval]
    both: Callable[[Interval], Interval | None]


def _same(p: Interval) -> Interval:
    return p


def _half(area: Interval) -> Interval:
    return scale(area, 0.5)


def _twice(p: Interval) -> Interval | None:
    low, high = scale(p, 2.0)
    return Interval(low, min(high, 1.0)) if low <= 1 else None


def _rest(area: Interval) -> Interval:
    return complement(scale(area, 0.5))


def _twice_rest(p: Interval) -> Interval | None:
    low, high = complement(p)
    return _twice(Interval(max(low, 0.0), high))


#: Both sides, or the upper side of a statistic that has no sign.
TWO = Side("two", "{}", _same, _same)
#: The side on which the statistic lies: it points as it was expected to.
FOUND = Side("found", "½ {}", _half, _twice)
#: The other side: it points the other way.
AGAINST = Side("against", "1 − ½ {}", _rest, _twice_rest)
