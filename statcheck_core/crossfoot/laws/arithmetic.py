"""Arithmetic on intervals, outward rounded; it never raises.

Each operation is exact but for the slack, and so is a formula in which no interval stands twice;
the identities are written that way. An infinite bound stands for arbitrarily large values, so
that zero times an infinite bound is zero. What falls below the range of doubles, 1e-308, is taken
for zero.
"""

from __future__ import annotations

import math
from collections.abc import Callable

from crossfoot.laws.interval import EVERYTHING, Interval, outward

#: Relative error granted to one operation: some units in the last place, for the operation and
#: for the bounds it is given.
SLACK = 4e-15

ONE = Interval(1.0, 1.0)
_LARGEST_EXPONENT = 709.0


def negative(a: Interval) -> Interval:
    """Return −a."""
    return Interval(-a.high, -a.low)


def add(*terms: Interval) -> Interval:
    """Return the sum of the terms; its slack grows with their sizes, for they may cancel."""
    low = high = low_size = high_size = 0.0
    for term in terms:
        low += term.low
        high += term.high
        low_size += abs(term.low)
        high_size += abs(term.high)
    # An infinite or undefined bound leaves its side open.
    return Interval(
        low - low_size * SLACK if low_size < math.inf else _open(low, -math.inf),
        high + high_size * SLACK if high_size < math.inf else _open(high, math.inf),
    )


def _open(bound: float, side: float) -> float:
    return bound if bound == bound else side


def subtract(a: Interval, b: Interval) -> Interval:
    """Return a − b."""
    return add(a, Interval(-b.high, -b.low))


def multiply(a: Interval, b: Interval) -> Interval:
    """Return a · b."""
    if a.low >= 0 and b.low >= 0:
        return outward(_product(a.low, b.low), _product(a.high, b.high), SLACK)
    corners = [_product(x, y) for x in a for y in b]
    return outward(min(corners), max(corners), SLACK)


def _product(x: float, y: float) -> float:
    return x * y if x and y else 0.0


def divide(a: Interval, b: Interval) -> Interval:
    """Return a / b, the hull of the quotients by all that b can be but zero itself."""
    if b.low < 0:
        return EVERYTHING if b.high > 0 else divide(negative(a), negative(b))
    least = b.high if a.low >= 0 else b.low
    most = b.low if a.high >= 0 else b.high
    return outward(_quotient(a.low, least), _quotient(a.high, most), SLACK)


def _quotient(x: float, y: float) -> float:
    if y:
        return x / y
    return math.copysign(math.inf, x) if x else 0.0


def reciprocal(a: Interval) -> Interval:
    """Return 1 / a."""
    return divide(ONE, a)


def complement(a: Interval) -> Interval:
    """Return 1 − a."""
    return subtract(ONE, a)


def odds(a: Interval) -> Interval:
    """Return a/(1 − a) of a share."""
    # The distance from one is as uncertain as the bound itself, not relatively so.
    room = 1 - a.high - SLACK
    return outward(a.low / (1 - a.low + SLACK), a.high / room if room > 0 else math.inf, SLACK)


def share(a: Interval) -> Interval:
    """Return a/(1 + a), the share whose odds are a ≥ 0."""
    return rising(_share, a)


def _share(x: float) -> float:
    return x / (1 + x) if x < math.inf else 1.0


def scale(a: Interval, factor: float) -> Interval:
    """Return a · factor, for a positive finite factor."""
    return outward(a.low * factor, a.high * factor, SLACK)


def square(a: Interval) -> Interval:
    """Return a²."""
    low, high = a.low * a.low, a.high * a.high
    if a.low < 0 < a.high:
        return outward(0.0, max(low, high), SLACK)
    return outward(min(low, high), max(low, high), SLACK)


def root(a: Interval) -> Interval:
    """Return √a; what is below zero is left out."""
    return outward(math.sqrt(max(a.low, 0.0)), math.sqrt(max(a.high, 0.0)), SLACK)


def exponential(a: Interval) -> Interval:
    """Return eᵃ."""
    return rising(_exp, a)


def logarithm(a: Interval) -> Interval:
    """Return the natural logarithm of a; what is below zero is left out."""
    # Near one the logarithm is small while the error of its argument is not.
    low, high = _log(a.low * (1 - SLACK)), _log(a.high * (1 + SLACK))
    return outward(low, high, SLACK)


def _exp(x: float) -> float:
    return math.exp(x) if x < _LARGEST_EXPONENT else math.inf


def _log(x: float) -> float:
    return math.log(x) if x > 0 else -math.inf


def rising(function: Callable[[float], float], a: Interval, slack: float = SLACK) -> Interval:
    """Return the range of a function that rises throughout."""
    return outward(function(a.low), function(a.high), slack)


def magnitude(a: Interval) -> Interval:
    """Return abs(a)."""
    if a.low >= 0:
        return a
    if a.high <= 0:
        return negative(a)
    return Interval(0.0, max(-a.low, a.high))


def hull(a: Interval, b: Interval) -> Interval:
    """Return the smallest interval that holds both."""
    return Interval(min(a.low, b.low), max(a.high, b.high))


def at_least(a: Interval) -> Interval:
    """Return all that is at least as large as something in ``a``."""
    return Interval(a.low, math.inf)


def at_most(a: Interval) -> Interval:
    """Return all that is at most as large as something in ``a``."""
    return Interval(-math.inf, a.high)


def between(low: Interval, high: Interval) -> Interval:
    """Return all that can lie between two limits; limits that cross say nothing."""
    return Interval(low.low, high.high) if low.low <= high.high else EVERYTHING


def half_width(low: Interval, high: Interval) -> Interval:
    """Return half the width of an interval; its limits are not taken to be in order."""
    return scale(magnitude(subtract(high, low)), 0.5)


def middle(low: Interval, high: Interval) -> Interval:
    """Return the middle of an interval of uncertain limits."""
    return scale(add(low, high), 0.5)
