"""One coefficient: its ratio to its standard error, its signs, and the slope of one predictor."""

from __future__ import annotations

import math

from crossfoot.laws.arithmetic import divide, multiply, root, square
from crossfoot.laws.declare import COEFFICIENT, MODEL, form, identity
from crossfoot.laws.identity import Form
from crossfoot.laws.interval import EVERYTHING, Interval
from crossfoot.laws.quantities import symbol

_SINGLE = Interval(1.0, 1.0)
_POSITIVE = Interval(0.0, math.inf)
_NEGATIVE = Interval(-math.inf, 0.0)


def _error(t: Interval, estimate: Interval) -> Interval:
    return divide(estimate, t)


T_FROM_B_SE = identity(
    "t-from-b-se",
    "t from a coefficient and its standard error",
    "t = b/SE",
    "t b se beta",
    (
        form("t", "t = b/SE", "b se", divide),
        form("b", "b = t·SE", "t se", multiply),
        form("se", "SE = b/t", "t b", _error),
        form("t", "t = β/SE", "beta se", divide, assumed="error-of-beta", unless="b"),
        form("beta", "β = t·SE", "t se", multiply, assumed="error-of-beta", unless="b"),
        form("se", "SE = β/t", "t beta", _error, assumed="error-of-beta", unless="b"),
    ),
    needs="zero-null",
    assumption="t tests that the coefficient is zero, and SE is its standard error.",
    source="Draper and Smith 1998, Applied Regression Analysis, 3rd edition, chapter 1",
    explanation="The t of a coefficient is the coefficient over its standard error. Where it is "
    "not, one of the three is misprinted, a sign is lost, or SE is that of another scale.",
    kinds=f"{COEFFICIENT} mean-comparison",
)


def _f(t: Interval, df1: Interval) -> Interval:
    return square(t) if df1 == _SINGLE else EVERYTHING


def _t(F: Interval, df1: Interval) -> Interval:
    return root(F) if df1 == _SINGLE else EVERYTHING


F_FROM_T = identity(
    "f-from-t",
    "F from t",
    "F = t², df1 = 1",
    "F t df1",
    (
        form("F", "F = t², df1 = 1", "t df1", _f),
        form("t", "t = ±√F, df1 = 1", "F df1", _t, mirrored=True),
    ),
    needs="classical-errors unadjusted-df",
    assumption="F has one degree of freedom above and tests the same hypothesis as t.",
    source="Draper and Smith 1998, Applied Regression Analysis, 3rd edition, chapter 1",
    explanation="With one degree of freedom F is the square of t, and their p values are equal. "
    "Where it is not, one of the two is misprinted or they are of different tests.",
    kinds=f"{COEFFICIENT} effect mean-comparison overall-model",
)


def _side(other: Interval) -> Interval:
    if other.low > 0:
        return _POSITIVE
    return _NEGATIVE if other.high < 0 else EVERYTHING


def _side_of_interval(low: Interval, high: Interval) -> Interval:
    if low.low > 0:
        return _POSITIVE
    return _NEGATIVE if high.high < 0 else EVERYTHING


def _same_side(first: str, second: str) -> tuple[Form, Form]:
    one, two = symbol(first), symbol(second)
    return (
        form(first, f"{one} has the sign of {two}", second, _side),
        form(second, f"{two} has the sign of {one}", first, _side),
    )


def _side_of_limits(name: str) -> tuple[Form, Form]:
    text = f"{symbol(name)} has the sign of both limits"
    return (
        form(
            name,
            text,
            "ci_low ci_high",
            _side_of_interval,
            needs="limits-of-coefficient",
            beside="b",
            unless="odds_ratio",
        ),
        form(
            name,
            text,
            "ci_low ci_high",
            _side_of_interval,
            assumed="limits-of-estimate",
            unless="b odds_ratio",
        ),
    )


SIGNS = identity(
    "signs",
    "signs agree",
    "b, β and t have one sign",
    "t b beta z ci_low ci_high",
    (
        *_same_side("b", "t"),
        *_same_side("b", "beta"),
        *_same_side("beta", "t"),
        *_same_side("b", "z"),
        *_same_side("beta", "z"),
        *_side_of_limits("t"),
        *_side_of_limits("z"),
    ),
    needs="zero-null",
    assumption="They are of one coefficient, and t or z tests that it is zero.",
    source="Draper and Smith 1998, Applied Regression Analysis, 3rd edition, chapter 1",
    explanation="A coefficient, its standardised form and its t lie on one side of zero, and so "
    "does an interval that excludes zero. Where they do not, a minus sign is lost or was added.",
    kinds=COEFFICIENT,
)


def _alone(value: Interval, df1: Interval) -> Interval:
    return value if df1 == _SINGLE else EVERYTHING


def _square_alone(value: Interval, df1: Interval) -> Interval:
    return square(value) if df1 == _SINGLE else EVERYTHING


def _root_alone(value: Interval, df1: Interval) -> Interval:
    return root(value) if df1 == _SINGLE else EVERYTHING


_SLOPE_KINDS = MODEL

R_FROM_SLOPE = identity(
    "r-from-slope",
    "correlation from the slope of one predictor",
    "β = r, R² = r², one predictor",
    "r beta R2 df1",
    (
        form("r", "r = β, df1 = 1", "beta df1", _alone, kinds=_SLOPE_KINDS),
        form("beta", "β = r, df1 = 1", "r df1", _alone, kinds=_SLOPE_KINDS),
        form("R2", "R² = r², df1 = 1", "r df1", _square_alone, kinds=_SLOPE_KINDS),
        form("r", "r = ±√R², df1 = 1", "R2 df1", _root_alone, kinds=_SLOPE_KINDS, mirrored=True),
        form("R2", "R² = β², df1 = 1", "beta df1", _square_alone, kinds=_SLOPE_KINDS),
        form("beta", "β = ±√R², df1 = 1", "R2 df1", _root_alone, kinds=_SLOPE_KINDS, mirrored=True),
        form(
            "R2",
            "R² = β², one predictor",
            "beta df1",
            _square_alone,
            kinds=COEFFICIENT,
            assumed="only-predictor",
        ),
        form(
            "beta",
            "β = ±√R², one predictor",
            "R2 df1",
            _root_alone,
            kinds=COEFFICIENT,
            assumed="only-predictor",
            mirrored=True,
        ),
        form("R2", "R² = r²", "r", square, kinds="correlation"),
        form("r", "r = ±√R²", "R2", root, kinds="correlation", mirrored=True),
    ),
    needs="least-squares intercept overall product-moment",
    assumption="The model has one predictor and an intercept and is fitted by least squares.",
    source="Draper and Smith 1998, Applied Regression Analysis, 3rd edition, chapter 1",
    explanation="With one predictor the standardised slope is the correlation, and R² its square. "
    "Where they differ, one is misprinted or the model has more predictors.",
    kinds=f"{_SLOPE_KINDS} {COEFFICIENT} correlation",
)

IDENTITIES = (T_FROM_B_SE, F_FROM_T, SIGNS, R_FROM_SLOPE)
