"""Confidence intervals of coefficients: their limits and their centre."""

from __future__ import annotations

from crossfoot.laws.arithmetic import (
    add,
    at_least,
    at_most,
    between,
    complement,
    divide,
    half_width,
    hull,
    magnitude,
    middle,
    multiply,
    scale,
    subtract,
)
from crossfoot.laws.declare import COEFFICIENT, Solution, form, identity
from crossfoot.laws.identity import Form
from crossfoot.laws.interval import Interval
from crossfoot.laws.quantities import symbol


def _t_critical(level: Interval, df: Interval) -> Interval:
    from crossfoot.laws import areas  # imports SciPy

    return areas.critical(level, df)


def _any_critical(level: Interval, df: Interval) -> Interval:
    """Return all from the normal critical value to that of t."""
    return hull(z_critical(level), _t_critical(level, df))


def z_critical(level: Interval) -> Interval:
    """Return the normal critical value of a confidence level."""
    from crossfoot.laws import areas  # imports SciPy

    return areas.critical(level, areas.NORMAL)


def _t_level(multiple: Interval, df: Interval) -> Interval:
    from crossfoot.laws import areas  # imports SciPy

    return complement(areas.of_t(multiple, df))


def _any_level(multiple: Interval, df: Interval) -> Interval:
    from crossfoot.laws import areas  # imports SciPy

    return hull(_t_level(multiple, df), complement(areas.of_z(multiple)))


def _other_limit(b: Interval, limit: Interval) -> Interval:
    return subtract(scale(b, 2.0), limit)


def _from_error(
    critical: Solution, level: Solution, symbol: str, remark: str, assumed: str
) -> tuple[Form, ...]:
    """Return the forms of b ± critical value times SE, for one way to take the critical value."""

    def low(b: Interval, se: Interval, df: Interval, ci_level: Interval) -> Interval:
        return subtract(b, multiply(critical(ci_level, df), se))

    def high(b: Interval, se: Interval, df: Interval, ci_level: Interval) -> Interval:
        return add(b, multiply(critical(ci_level, df), se))

    def error(low: Interval, high: Interval, df: Interval, ci_level: Interval) -> Interval:
        return divide(half_width(low, high), critical(ci_level, df))

    def level_of(low: Interval, high: Interval, se: Interval, df: Interval) -> Interval:
        return level(magnitude(divide(half_width(low, high), se)), df)

    def make(gives: str, formula: str, takes: str, value: Solution, unnamed: bool = False) -> Form:
        text = formula.replace("c", symbol, 1) + remark
        if unnamed:
            sure = f"{assumed} limits-of-estimate"
            return form(gives, text, takes, value, assumed=sure, unless="b odds_ratio")
        needs = "limits-of-coefficient"
        return form(
            gives, text, takes, value, assumed=assumed, needs=needs, beside="b", unless="odds_ratio"
        )

    error_text = "SE = (upper limit − lower limit)/2c"
    level_text = "level = P(abs(T(df)) < c), c = (upper limit − lower limit)/2SE"
    return (
        make("ci_low", "lower limit = b − c·SE", "b se df ci_level", low),
        make("ci_high", "upper limit = b + c·SE", "b se df ci_level", high),
        make("se", error_text, "ci_low ci_high df ci_level", error),
        make("se", error_text, "ci_low ci_high df ci_level", error, unnamed=True),
        make("b", "b = upper limit − c·SE", "ci_high se df ci_level", low),
        make("b", "b = lower limit + c·SE", "ci_low se df ci_level", high),
        make("ci_level", level_text, "ci_low ci_high se df", level_of),
        make("ci_level", level_text, "ci_low ci_high se df", level_of, unnamed=True),
    )


CI_FROM_SE = identity(
    "ci-from-se",
    "interval from the standard error",
    "limits = b ± t*·SE",
    "ci_low ci_high b se df ci_level",
    (
        *_from_error(_any_critical, _any_level, "c", ", c from z* to t*", ""),
        *_from_error(_t_critical, _t_level, "t*", "", "t-limits"),
    ),
    needs="symmetric-limits single-interval df-as-used",
    assumption="The limits are the estimate plus or minus a critical value times its standard "
    "error: that of t with the printed degrees of freedom or, in large samples, the normal one.",
    source="NIST/SEMATECH e-Handbook of Statistical Methods, section 1.3.5.2; Draper and Smith "
    "1998, Applied Regression Analysis, 3rd edition, chapter 1",
    explanation="A confidence interval reaches a critical value times the standard error to each "
    "side of the estimate. Where it does not, a limit, the estimate or SE is misprinted, the "
    "level is another, or the interval was found in another way.",
    kinds=f"{COEFFICIENT} mean-comparison",
)


_SYMMETRIC = "symmetric-limits"


def _centred(
    name: str, *, unless: str, needs: str = "", assumed: str = "", beside: str = ""
) -> list[Form]:
    """Return the centre from both limits, and each limit from the centre and the other."""
    it = symbol(name)
    solved = (
        (name, f"{it} = (lower limit + upper limit)/2", "ci_low ci_high", middle),
        ("ci_low", f"lower limit = 2{it} − upper limit", f"{name} ci_high", _other_limit),
        ("ci_high", f"upper limit = 2{it} − lower limit", f"{name} ci_low", _other_limit),
    )
    return [
        form(*each, needs=needs, assumed=assumed, beside=beside, unless=unless) for each in solved
    ]


CI_CENTRE = identity(
    "ci-centre",
    "estimate at the centre of its interval",
    "b = (lower limit + upper limit)/2",
    "b ci_low ci_high beta",
    (
        form("b", "lower limit ≤ b ≤ upper limit", "ci_low ci_high", between, unless="odds_ratio"),
        form("ci_low", "lower limit ≤ b", "b", at_most, unless="odds_ratio"),
        form("ci_high", "upper limit ≥ b", "b", at_least, unless="odds_ratio"),
        # Beside an error or a test of the estimate the interval is the one that goes with them.
        *_centred("b", needs=_SYMMETRIC, beside="se", unless="odds_ratio"),
        *_centred("b", needs=_SYMMETRIC, beside="t", unless="se odds_ratio"),
        *_centred("b", needs=_SYMMETRIC, beside="z", unless="se t odds_ratio"),
        *_centred("b", assumed=_SYMMETRIC, unless="se t z odds_ratio"),
        *_centred("beta", assumed=f"{_SYMMETRIC} limits-of-beta", unless="b odds_ratio"),
    ),
    needs="limits-of-coefficient",
    assumption="The interval is that of the estimate printed beside it, and its limits lie at "
    "equal distances from it.",
    source="NIST/SEMATECH e-Handbook of Statistical Methods, section 1.3.5.2",
    explanation="An interval that is the estimate plus or minus something has the estimate at its "
    "centre. Where it does not, one of the three is misprinted, a sign is lost, or the interval "
    "comes from resampling.",
    kinds=f"{COEFFICIENT} mean-comparison",
)


IDENTITIES = (CI_FROM_SE, CI_CENTRE)
