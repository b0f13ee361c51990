"""What a confidence interval says about p."""

from __future__ import annotations

import math

from crossfoot.laws.arithmetic import at_least, at_most, complement
from crossfoot.laws.declare import COEFFICIENT, Solution, form, identity
from crossfoot.laws.identity import Form
from crossfoot.laws.interval import EVERYTHING, Interval


def _p_of_limits(null: float) -> Solution:
    def p(low: Interval, high: Interval, level: Interval) -> Interval:
        if low.low > null or high.high < null:
            return at_most(complement(level))
        if low.high < null < high.low:
            return at_least(complement(level))
        return EVERYTHING

    return p


def _significant(p: Interval, level: Interval) -> bool | None:
    """Whether the test rejects at the level of the interval; None where that is not sure."""
    alpha = complement(level)
    if p.high < alpha.low:
        return True
    return False if p.low > alpha.high else None


def _low_of_p(null: float) -> Solution:
    def low(p: Interval, level: Interval, high: Interval) -> Interval:
        rejects = _significant(p, level)
        if rejects and high.low > null:
            return Interval(null, math.inf)
        return Interval(-math.inf, null) if rejects is False else EVERYTHING

    return low


def _high_of_p(null: float) -> Solution:
    def high(p: Interval, level: Interval, low: Interval) -> Interval:
        rejects = _significant(p, level)
        if rejects and low.high < null:
            return Interval(-math.inf, null)
        return Interval(null, math.inf) if rejects is False else EVERYTHING

    return high


def _level_of_p(null: float) -> Solution:
    def level(low: Interval, high: Interval, p: Interval) -> Interval:
        if low.low > null or high.high < null:
            return at_most(complement(p))
        if low.high < null < high.low:
            return at_least(complement(p))
        return EVERYTHING

    return level


def _against_p(
    null: float,
    *,
    assumed: str = "",
    needs: str = "",
    kinds: str = "",
    beside: str = "",
    unless: str = "",
) -> tuple[Form, ...]:
    """Return the forms for one null value."""

    def make(gives: str, takes: str, value: Solution) -> Form:
        return form(
            gives,
            f"interval excludes {null:g} where p < 1 − level",
            takes,
            value,
            assumed=assumed,
            needs=needs,
            kinds=kinds,
            beside=beside,
            unless=unless,
        )

    return (
        make("p", "ci_low ci_high ci_level", _p_of_limits(null)),
        make("ci_low", "p ci_level ci_high", _low_of_p(null)),
        make("ci_high", "p ci_level ci_low", _high_of_p(null)),
        make("ci_level", "ci_low ci_high p", _level_of_p(null)),
    )


CI_AGAINST_P = identity(
    "ci-against-p",
    "interval against p",
    "interval excludes 0 where p < 1 − level",
    "p ci_low ci_high ci_level",
    (
        *_against_p(
            0.0,
            needs="limits-of-coefficient",
            kinds=COEFFICIENT,
            beside="b",
            unless="odds_ratio",
        ),
        *_against_p(
            0.0,
            assumed="limits-of-estimate",
            unless="b odds_ratio r eta2 eta2_partial omega2",
        ),
        *_against_p(
            1.0,
            assumed="limits-of-ratio wald-limits",
            kinds=COEFFICIENT,
            beside="odds_ratio",
        ),
    ),
    needs="two-sided-interval unadjusted-p t-limits zero-null",
    assumption="p is of the two-sided test of what the interval is an interval of, and both rest "
    "on the same distribution.",
    source="NIST/SEMATECH e-Handbook of Statistical Methods, section 7.1.4",
    explanation="A 95 % interval leaves out the null value exactly where the two-sided p is below "
    ".05. Where they disagree, p, a limit or its sign is misprinted, the level is another, or the "
    "test was one-sided.",
    kinds=f"{COEFFICIENT} mean-comparison",
)


IDENTITIES = (CI_AGAINST_P,)
