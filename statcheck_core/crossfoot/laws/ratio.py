"""Odds ratios, and the Wald tests of the coefficients that they are powers of."""

from __future__ import annotations

import math

from crossfoot.laws.arithmetic import (
    add,
    at_least,
    at_most,
    between,
    divide,
    exponential,
    logarithm,
    multiply,
    negative,
    root,
    scale,
    square,
    subtract,
)
from crossfoot.laws.declare import COEFFICIENT, form, identity
from crossfoot.laws.interval import EVERYTHING, Interval
from crossfoot.laws.limits import z_critical

_SINGLE = Interval(1.0, 1.0)
_RATIO = "wald-limits limits-of-ratio"
_ERROR = "error-of-coefficient"  # beside an odds ratio SE may be that of the ratio
_WALD = f"{_RATIO} {_ERROR}"  # without one the limits are those of b


def _reach(se: Interval, level: Interval) -> Interval:
    return multiply(z_critical(level), se)


def _low(b: Interval, se: Interval, level: Interval) -> Interval:
    return exponential(add(b, negative(_reach(se, level))))


def _high(b: Interval, se: Interval, level: Interval) -> Interval:
    return exponential(add(b, _reach(se, level)))


def _middle(low: Interval, high: Interval) -> Interval:
    return exponential(scale(add(logarithm(low), logarithm(high)), 0.5))


def _other_limit(ratio: Interval, limit: Interval) -> Interval:
    return exponential(subtract(scale(logarithm(ratio), 2.0), logarithm(limit)))


def _error(z: Interval, b: Interval) -> Interval:
    return divide(b, z)


def _z_of_ratio(ratio: Interval, se: Interval) -> Interval:
    """Return z where SE may be that of the coefficient or that of the ratio.

    To first order the ratio's is the ratio times the coefficient's (the delta method), so that z
    lies between ln x/SE and x·ln x/SE. The former is the smaller one and rises with x; the latter
    is convex, so that it is largest at an end.
    """
    low = logarithm(ratio).low
    high = max(
        multiply(Interval(x, x), logarithm(Interval(x, x))).high for x in (ratio.low, ratio.high)
    )
    return divide(Interval(low, max(low, high)), se)


def _wald(b: Interval, se: Interval, df: Interval) -> Interval:
    return square(divide(b, se)) if df == _SINGLE else EVERYTHING


def _wald_error(chi2: Interval, b: Interval, df: Interval) -> Interval:
    # Any magnitude of b/√χ², b's sign aside.
    if df != _SINGLE:
        return EVERYTHING
    return root(divide(square(b), chi2))


def _wald_b(chi2: Interval, se: Interval, df: Interval) -> Interval:
    return multiply(root(chi2), se) if df == _SINGLE else EVERYTHING


def _side(ratio: Interval) -> Interval:
    if ratio.low > 1:
        return Interval(0.0, math.inf)
    return Interval(-math.inf, 0.0) if ratio.high < 1 else EVERYTHING


def _ratio_side(z: Interval) -> Interval:
    if z.low > 0:
        return Interval(1.0, math.inf)
    return Interval(-math.inf, 1.0) if z.high < 0 else EVERYTHING


ODDS_RATIO = identity(
    "odds-ratio",
    "odds ratio, its interval and its Wald test",
    "OR = exp(b), z = b/SE, limits = exp(b ± z*·SE)",
    "odds_ratio b z se ci_low ci_high ci_level chi2 df",
    (
        form("odds_ratio", "OR = exp(b)", "b", exponential),
        form("b", "b = ln OR", "odds_ratio", logarithm),
        form("z", "z has the sign of ln OR", "odds_ratio", _side),
        form("odds_ratio", "OR > 1 where z > 0", "z", _ratio_side),
        form("z", "z = b/SE", "b se", divide, unless="odds_ratio"),
        form("b", "b = z·SE", "z se", multiply, unless="odds_ratio"),
        form("se", "SE = b/z", "z b", _error, unless="odds_ratio"),
        form("z", "z = b/SE", "b se", divide, assumed=_ERROR, beside="odds_ratio"),
        form("b", "b = z·SE", "z se", multiply, assumed=_ERROR, beside="odds_ratio"),
        form("se", "SE = b/z", "z b", _error, assumed=_ERROR, beside="odds_ratio"),
        form(
            "z",
            "z between ln OR/SE (SE of b) and OR·ln OR/SE (SE of OR)",
            "odds_ratio se",
            _z_of_ratio,
            unless="b",
        ),
        form(
            "chi2",
            "χ² = (b/SE)², df = 1",
            "b se df",
            _wald,
            assumed="wald-statistic error-of-coefficient",
        ),
        form(
            "se",
            "SE = abs(b)/√χ², df = 1",
            "chi2 b df",
            _wald_error,
            assumed="wald-statistic error-of-coefficient",
        ),
        form(
            "b",
            "b = ±√χ²·SE, df = 1",
            "chi2 se df",
            _wald_b,
            assumed="wald-statistic error-of-coefficient",
            mirrored=True,
        ),
        form("odds_ratio", "lower limit ≤ OR ≤ upper limit", "ci_low ci_high", between, unless="b"),
        form("ci_low", "lower limit ≤ OR", "odds_ratio", at_most, unless="b"),
        form("ci_high", "upper limit ≥ OR", "odds_ratio", at_least, unless="b"),
        form(
            "ci_low",
            "lower limit = exp(b − z*·SE)",
            "b se ci_level",
            _low,
            assumed=_WALD,
            beside="odds_ratio",
        ),
        form(
            "ci_high",
            "upper limit = exp(b + z*·SE)",
            "b se ci_level",
            _high,
            assumed=_WALD,
            beside="odds_ratio",
        ),
        form(
            "odds_ratio",
            "OR = √(lower limit·upper limit)",
            "ci_low ci_high",
            _middle,
            assumed=_RATIO,
        ),
        form(
            "ci_low",
            "lower limit = OR²/upper limit",
            "odds_ratio ci_high",
            _other_limit,
            assumed=_RATIO,
        ),
        form(
            "ci_high",
            "upper limit = OR²/lower limit",
            "odds_ratio ci_low",
            _other_limit,
            assumed=_RATIO,
        ),
    ),
    needs="zero-null",
    assumption="b is the coefficient of a logistic model, z or χ² its Wald test, and the interval "
    "that of the ratio, symmetric in logarithms.",
    source="Hosmer, Lemeshow and Sturdivant 2013, Applied Logistic Regression, 3rd edition, "
    "chapters 1 and 3",
    explanation="An odds ratio is e raised to the coefficient, and its limits are e raised to the "
    "limits of the coefficient, so that the ratio is their geometric mean. Where it is not, a "
    "number is misprinted, or the interval is a profile or bootstrap one or that of b.",
    kinds=COEFFICIENT,
)

IDENTITIES = (ODDS_RATIO,)
