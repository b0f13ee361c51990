"""Closed intervals of real numbers, outward rounded."""

from __future__ import annotations

import math
from collections.abc import Callable
from typing import NamedTuple


class Interval(NamedTuple):
    """All real numbers from ``low`` to ``high``; an infinite bound leaves that side open."""

    low: float
    high: float


EVERYTHING = Interval(-math.inf, math.inf)


def meet(first: Interval, second: Interval) -> Interval | None:
    """Return the common part of two intervals, or None where they are disjoint."""
    low, high = first
    least, most = second
    if low <= least and most <= high:
        return second
    low = low if low > least else least
    high = high if high < most else most
    return Interval(low, high) if low <= high else None


def outward(low: float, high: float, slack: float = 1e-11) -> Interval:
    """Widen bounds by a relative ``slack`` that covers the error of their computation.

    Not-a-number bounds become infinite: what could not be computed excludes nothing.
    """
    if low < math.inf:
        low -= abs(low) * slack
    elif low != low:
        low = -math.inf
    if high > -math.inf:
        high += abs(high) * slack
    elif high != high:
        high = math.inf
    return Interval(low, high)


def image(
    function: Callable[..., float], signs: str, *arguments: Interval, slack: float = 1e-11
) -> Interval:
    """Return the range of a monotone function over a box.

    Parameters
    ----------
    function
        Monotone in each argument over the box.
    signs
        A character an argument: ``+`` where the function rises with it, ``-`` where it falls.
    arguments
        The box.
    slack
        Relative error that the function may have.

    Returns
    -------
    Interval
        From the value at the lowest corner to the value at the highest, outward rounded.
    """
    least = [a.low if s == "+" else a.high for s, a in zip(signs, arguments, strict=True)]
    most = [a.high if s == "+" else a.low for s, a in zip(signs, arguments, strict=True)]
    return outward(function(*least), function(*most), slack)
