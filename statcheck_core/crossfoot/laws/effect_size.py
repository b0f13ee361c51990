"""Effect sizes of analyses of variance."""

from __future__ import annotations

import math

from crossfoot.laws.arithmetic import (
    ONE,
    add,
    at_least,
    at_most,
    complement,
    divide,
    multiply,
    odds,
    share,
)
from crossfoot.laws.declare import form, identity
from crossfoot.laws.interval import Interval, outward

_KINDS = "effect overall-model mean-comparison anova-table"
_TABLE = "anova-table"
_ONE_WAY = "one-way"


def _partial(F: Interval, df1: Interval, df2: Interval) -> Interval:
    return share(divide(multiply(F, df1), df2))


def _f(eta2: Interval, df1: Interval, df2: Interval) -> Interval:
    return multiply(odds(eta2), divide(df2, df1))


def _df1(eta2: Interval, F: Interval, df2: Interval) -> Interval:
    return divide(multiply(odds(eta2), df2), F)


def _df2(eta2: Interval, F: Interval, df1: Interval) -> Interval:
    return divide(multiply(F, df1), odds(eta2))


def _at_most_partial(F: Interval, df1: Interval, df2: Interval) -> Interval:
    return at_most(_partial(F, df1, df2))


def _at_least_f(eta2: Interval, df1: Interval, df2: Interval) -> Interval:
    return at_least(_f(eta2, df1, df2))


def _share_of_two(ss_effect: Interval, ss_error: Interval) -> Interval:
    return share(divide(ss_effect, ss_error))


def _effect_of_error(eta2: Interval, ss_error: Interval) -> Interval:
    return multiply(odds(eta2), ss_error)


def _error_of_effect(eta2: Interval, ss_effect: Interval) -> Interval:
    return divide(ss_effect, odds(eta2))


def _total_of_effect(eta2: Interval, ss_effect: Interval) -> Interval:
    return divide(ss_effect, eta2)


ETA2_PARTIAL = identity(
    "eta2-partial",
    "partial eta squared from F",
    "ηp² = df1·F/(df1·F + df2)",
    "eta2_partial F df1 df2 eta2 ss_effect ss_error ss_total",
    (
        form("eta2_partial", "ηp² = df1·F/(df1·F + df2)", "F df1 df2", _partial),
        form("F", "F = (ηp²/df1)/((1 − ηp²)/df2)", "eta2_partial df1 df2", _f),
        form("df1", "df1 = ηp²·df2/((1 − ηp²)·F)", "eta2_partial F df2", _df1),
        form("df2", "df2 = F·df1·(1 − ηp²)/ηp²", "eta2_partial F df1", _df2),
        form("eta2", "η² ≤ df1·F/(df1·F + df2)", "F df1 df2", _at_most_partial),
        form("F", "F ≥ (η²/df1)/((1 − η²)/df2)", "eta2 df1 df2", _at_least_f),
        form("eta2", "η² ≤ ηp²", "eta2_partial", at_most),
        form("eta2_partial", "ηp² ≥ η²", "eta2", at_least),
        form("eta2", "η² = df1·F/(df1·F + df2)", "F df1 df2", _partial, assumed=_ONE_WAY),
        form("F", "F = (η²/df1)/((1 − η²)/df2)", "eta2 df1 df2", _f, assumed=_ONE_WAY),
        form(
            "eta2_partial",
            "ηp² = SS effect/(SS effect + SS error)",
            "ss_effect ss_error",
            _share_of_two,
            kinds=_TABLE,
        ),
        form(
            "ss_effect",
            "SS effect = SS error·ηp²/(1 − ηp²)",
            "eta2_partial ss_error",
            _effect_of_error,
            kinds=_TABLE,
        ),
        form(
            "ss_error",
            "SS error = SS effect·(1 − ηp²)/ηp²",
            "eta2_partial ss_effect",
            _error_of_effect,
            kinds=_TABLE,
        ),
        form("eta2", "η² = SS effect/SS total", "ss_effect ss_total", divide, kinds=_TABLE),
        form("ss_effect", "SS effect = η²·SS total", "eta2 ss_total", multiply, kinds=_TABLE),
        form(
            "ss_total", "SS total = SS effect/η²", "eta2 ss_effect", _total_of_effect, kinds=_TABLE
        ),
    ),
    needs="fixed-effects proportional-df",
    assumption="F is the ratio of the effect's mean square to the error's; η² equals ηp² where "
    "the effect is the only one, and is smaller otherwise.",
    source="Cohen 1973, Educational and Psychological Measurement 33, 107–112",
    explanation="Partial eta squared is the effect's share of its own and the error's sum of "
    "squares, so that it follows from F and its degrees of freedom; eta squared takes the total "
    "instead and can't be larger. A larger η² may be a ηp² under another name, misprinted.",
    kinds=_KINDS,
)


def _omega(F: float, ratio: float) -> float:
    """Return ω² from F and (df2 + 1)/df1."""
    if math.isinf(F):
        return 1.0
    return (F - 1) / (F + ratio) if F + ratio else -math.inf


def _omegas(F: Interval, df1: Interval, df2: Interval) -> Interval:
    ratio = divide(add(df2, ONE), df1)
    # It falls with the ratio where F > 1 and rises below; below, many print zero.
    low = _omega(F.low, ratio.high if F.low > 1 else ratio.low)
    high = _omega(F.high, ratio.low if F.high > 1 else ratio.high)
    # F − 1 is as uncertain as F itself.
    return outward(low - 1e-14, max(high + 1e-14, 0.0))


def _f_of_omega(omega2: Interval, df1: Interval, df2: Interval) -> Interval:
    ratio = divide(add(df2, ONE), df1)
    low, high = divide(add(ONE, multiply(omega2, ratio)), complement(omega2))
    return Interval(low if omega2.low > 0 else 0.0, high if omega2.high > 0 else 1.0)


OMEGA2 = identity(
    "omega2",
    "omega squared from F",
    "ω² = df1(F − 1)/(df1·F + df2 + 1)",
    "omega2 F df1 df2",
    (
        form(
            "omega2",
            "ω² = df1(F − 1)/(df1·F + df2 + 1)",
            "F df1 df2",
            _omegas,
            assumed=_ONE_WAY,
        ),
        form(
            "F",
            "F = (df1 + (df2 + 1)ω²)/(df1(1 − ω²))",
            "omega2 df1 df2",
            _f_of_omega,
            assumed=_ONE_WAY,
        ),
    ),
    needs="fixed-effects unadjusted-df",
    assumption="The effect is the only one in the design, so that n = df1 + df2 + 1.",
    source="Hays 1963, Statistics for Psychologists, chapter 12",
    explanation="Omega squared estimates the share of the variance in the population that the "
    "effect accounts for; in a one-way design it follows from F and the degrees of freedom. "
    "Where it does not, there may be other effects, or a number is misprinted.",
    kinds=_KINDS,
)

IDENTITIES = (ETA2_PARTIAL, OMEGA2)
