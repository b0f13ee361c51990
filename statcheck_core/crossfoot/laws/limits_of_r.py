"""The confidence interval of a correlation."""

from __future__ import annotations

import math

from crossfoot.laws.arithmetic import (
    ONE,
    add,
    at_least,
    at_most,
    between,
    divide,
    half_width,
    middle,
    negative,
    rising,
    root,
    square,
    subtract,
)
from crossfoot.laws.declare import form, identity
from crossfoot.laws.interval import EVERYTHING, Interval
from crossfoot.laws.limits import z_critical


def _transform(r: float) -> float:
    return math.atanh(r) if abs(r) < 1 else math.copysign(math.inf, r)


def _transformed(r: Interval) -> Interval:
    # The distance of r from ±1 is as uncertain as r itself, not relatively so.
    return rising(_transform, Interval(max(r.low - 1e-15, -1.0), min(r.high + 1e-15, 1.0)))


def _fisher(r: Interval, df: Interval, level: Interval, *, upper: bool) -> Interval:
    """Return a limit of r; its transform has the variance 1/(n − 3) = 1/(df − 1)."""
    room = subtract(df, ONE)
    if room.high <= 0:
        return EVERYTHING
    width = divide(z_critical(level), root(Interval(max(room.low, 0.0), room.high)))
    shift = width if upper else negative(width)
    return rising(math.tanh, add(_transformed(r), shift))


def _fisher_low(r: Interval, df: Interval, level: Interval) -> Interval:
    return _fisher(r, df, level, upper=False)


def _fisher_high(r: Interval, df: Interval, level: Interval) -> Interval:
    return _fisher(r, df, level, upper=True)


def _fisher_middle(low: Interval, high: Interval) -> Interval:
    return rising(math.tanh, middle(_transformed(low), _transformed(high)))


def _fisher_df(low: Interval, high: Interval, level: Interval) -> Interval:
    half = half_width(_transformed(low), _transformed(high))
    return add(square(divide(z_critical(level), half)), ONE)


CI_FROM_R = identity(
    "ci-from-r",
    "interval of a correlation",
    "limits = tanh(artanh r ± z*/√(df − 1))",
    "r ci_low ci_high df ci_level",
    (
        form("r", "lower limit ≤ r ≤ upper limit", "ci_low ci_high", between),
        form("ci_low", "lower limit ≤ r", "r", at_most),
        form("ci_high", "upper limit ≥ r", "r", at_least),
        form(
            "ci_low",
            "lower limit = tanh(artanh r − z*/√(df − 1))",
            "r df ci_level",
            _fisher_low,
            assumed="fisher-limits",
        ),
        form(
            "ci_high",
            "upper limit = tanh(artanh r + z*/√(df − 1))",
            "r df ci_level",
            _fisher_high,
            assumed="fisher-limits",
        ),
        form(
            "r",
            "r = tanh((artanh lower limit + artanh upper limit)/2)",
            "ci_low ci_high",
            _fisher_middle,
            assumed="fisher-limits",
        ),
        form(
            "df",
            "df = 1 + (2z*/(artanh upper limit − artanh lower limit))²",
            "ci_low ci_high ci_level",
            _fisher_df,
            assumed="fisher-limits",
        ),
    ),
    needs="single-interval",
    assumption="The interval is that of the correlation; its limits are Fisher's, with n = df + 2.",
    source="Fisher 1921, Metron 1, 3–32",
    explanation="A correlation lies inside its interval. Fisher's limits lie at equal distances "
    "from it once all three are turned into inverse hyperbolic tangents; where they do not, a "
    "number is misprinted or the limits were found in another way.",
    kinds="correlation",
)

IDENTITIES = (CI_FROM_R,)
