"""How well a model fits: R², its relatives, the overall F, and the number of cases."""

from __future__ import annotations

from crossfoot.laws.arithmetic import (
    ONE,
    add,
    at_least,
    at_most,
    complement,
    divide,
    multiply,
    odds,
    root,
    share,
    square,
    subtract,
)
from crossfoot.laws.declare import COEFFICIENT, MODEL, form, identity
from crossfoot.laws.interval import Interval

_TWO = Interval(2.0, 2.0)


_ALONE = "one-way"


def _f(R2: Interval, df1: Interval, df2: Interval) -> Interval:
    return multiply(odds(R2), divide(df2, df1))


def _r2(F: Interval, df1: Interval, df2: Interval) -> Interval:
    return share(divide(multiply(F, df1), df2))


def _df1(F: Interval, R2: Interval, df2: Interval) -> Interval:
    return divide(multiply(odds(R2), df2), F)


def _df2(F: Interval, R2: Interval, df1: Interval) -> Interval:
    return divide(multiply(F, df1), odds(R2))


F_FROM_R2 = identity(
    "f-from-r2",
    "F from R²",
    "F = (R²/df1)/((1 − R²)/df2)",
    "F R2 df1 df2",
    (
        form("F", "F = (R²/df1)/((1 − R²)/df2)", "R2 df1 df2", _f, kinds=MODEL),
        form("R2", "R² = df1·F/(df1·F + df2)", "F df1 df2", _r2, kinds=MODEL),
        form("df1", "df1 = R²·df2/((1 − R²)·F)", "F R2 df2", _df1, kinds=MODEL),
        form("df2", "df2 = F·df1·(1 − R²)/R²", "F R2 df1", _df2, kinds=MODEL),
        form("R2", "R² = df1·F/(df1·F + df2)", "F df1 df2", _r2, assumed=_ALONE, kinds="effect"),
        form("F", "F = (R²/df1)/((1 − R²)/df2)", "R2 df1 df2", _f, assumed=_ALONE, kinds="effect"),
    ),
    needs="least-squares intercept overall classical-errors unadjusted-df",
    assumption="F is the overall F of an ordinary least-squares fit with an intercept and "
    "classical standard errors, and R² is the R² of that fit.",
    source="Draper and Smith 1998, Applied Regression Analysis, 3rd edition, chapter 6",
    explanation="The overall F of a regression is the explained share of the sum of squares, for "
    "each of its degrees of freedom, over the unexplained share for each of its own. Where they "
    "disagree, F, R² or a df is misprinted, R² is the adjusted one, or F is not the overall F.",
    kinds=f"{MODEL} effect",
)


def _adjusted(R2: Interval, df1: Interval, df2: Interval) -> Interval:
    return complement(multiply(complement(R2), add(ONE, divide(df1, df2))))


def _unadjusted(R2_adj: Interval, df1: Interval, df2: Interval) -> Interval:
    return complement(divide(complement(R2_adj), add(ONE, divide(df1, df2))))


def _df1_over_df2(R2: Interval, R2_adj: Interval) -> Interval:
    """Return (1 − adjusted R²)/(1 − R²) − 1, which is df1/df2 and not below zero."""
    low, high = subtract(divide(complement(R2_adj), complement(R2)), ONE)
    return Interval(max(low, 0.0), high) if high >= 0 else Interval(low, high)


def _adjusting_df1(R2: Interval, R2_adj: Interval, df2: Interval) -> Interval:
    return multiply(df2, _df1_over_df2(R2, R2_adj))


def _adjusting_df2(R2: Interval, R2_adj: Interval, df1: Interval) -> Interval:
    return divide(df1, _df1_over_df2(R2, R2_adj))


R2_ADJUSTED = identity(
    "r2-adjusted",
    "adjusted R² from R²",
    "adjusted R² = 1 − (1 − R²)(df1 + df2)/df2",
    "R2_adj R2 df1 df2",
    (
        form(
            "R2_adj",
            "adjusted R² = 1 − (1 − R²)(df1 + df2)/df2",
            "R2 df1 df2",
            _adjusted,
        ),
        form(
            "R2",
            "R² = 1 − (1 − adjusted R²)·df2/(df1 + df2)",
            "R2_adj df1 df2",
            _unadjusted,
        ),
        form(
            "df1",
            "df1 = df2·((1 − adjusted R²)/(1 − R²) − 1)",
            "R2 R2_adj df2",
            _adjusting_df1,
        ),
        form(
            "df2",
            "df2 = df1/((1 − adjusted R²)/(1 − R²) − 1)",
            "R2 R2_adj df1",
            _adjusting_df2,
        ),
    ),
    needs="least-squares intercept overall unadjusted-df",
    assumption="R² is that of a least-squares fit with an intercept, so that df1 + df2 = n − 1, "
    "adjusted by the usual formula.",
    source="Ezekiel 1930, Methods of Correlation Analysis; Wherry 1931, Annals of Mathematical "
    "Statistics 2, 440–457",
    explanation="Adjusted R² takes away what R² gains by predictors that explain nothing: with n "
    "cases and k predictors it is 1 − (1 − R²)(n − 1)/(n − k − 1). Where it does not follow, one "
    "of the two is misprinted or they belong to different models.",
    kinds=MODEL,
)


def _n(df1: Interval, df2: Interval) -> Interval:
    return add(df1, df2, ONE)


def _other_df(n: Interval, df: Interval) -> Interval:
    return subtract(n, add(df, ONE))


def _same(value: Interval) -> Interval:
    return value


def _bound_on_n(df1: Interval, df2: Interval) -> Interval:
    return at_least(add(df1, df2))


def _bound_on_df(n: Interval, df: Interval) -> Interval:
    return at_most(subtract(n, df))


def _n_of_pairs(df: Interval) -> Interval:
    return add(df, _TWO)


def _df_of_pairs(n: Interval) -> Interval:
    return subtract(n, _TWO)


_CASES = "no-missing-cases intercept"
_SLOPES = "counted-predictors"
_ROWS = f"{_CASES} {_SLOPES}"
_PAIRS = "no-missing-cases"
_RESIDUAL = "residual-df"
_ALONE_TWO = "two-variables"
_PAIRED = "correlation"

N_FROM_DF = identity(
    "n-from-df",
    "n from the degrees of freedom",
    "n = df1 + df2 + 1",
    "n df1 df2 k df",
    (
        form("n", "n ≥ df1 + df2", "df1 df2", _bound_on_n, kinds=MODEL),
        form("df1", "df1 ≤ n − df2", "n df2", _bound_on_df, kinds=MODEL),
        form("df2", "df2 ≤ n − df1", "n df1", _bound_on_df, kinds=MODEL),
        *(
            form(gives, formula, takes, value, needs=_RESIDUAL, assumed=_CASES, kinds=MODEL)
            for gives, formula, takes, value in (
                ("n", "n = df1 + df2 + 1", "df1 df2", _n),
                ("df1", "df1 = n − df2 − 1", "n df2", _other_df),
                ("df2", "df2 = n − df1 − 1", "n df1", _other_df),
            )
        ),
        form("k", "k = df1", "df1", _same, assumed=_SLOPES, kinds=MODEL),
        form("df1", "df1 = k", "k", _same, assumed=_SLOPES, kinds=MODEL),
        form("n", "n = df + 2", "df", _n_of_pairs, needs=_ALONE_TWO, assumed=_PAIRS, kinds=_PAIRED),
        form(
            "df", "df = n − 2", "n", _df_of_pairs, needs=_ALONE_TWO, assumed=_PAIRS, kinds=_PAIRED
        ),
        *(
            form(gives, formula, takes, value, needs=_RESIDUAL, assumed=_ROWS, kinds=COEFFICIENT)
            for gives, formula, takes, value in (
                ("n", "n = df + k + 1", "df k", _n),
                ("df", "df = n − k − 1", "n k", _other_df),
                ("k", "k = n − df − 1", "n df", _other_df),
            )
        ),
    ),
    needs="least-squares overall unadjusted-df independent-cases",
    assumption="F is the overall F of a fit with an intercept to all of the n cases. Fewer cases "
    "than degrees of freedom are impossible; more may be cases with missing values.",
    source="Draper and Smith 1998, Applied Regression Analysis, 3rd edition, chapter 6",
    explanation="A regression of n cases on df1 predictors leaves n − df1 − 1 degrees of freedom "
    "for the error. A larger n than that may count cases that the fit left out; a smaller one "
    "can't be.",
    kinds=f"{MODEL} {COEFFICIENT} correlation",
)

R2_FROM_MULTIPLE_R = identity(
    "r2-from-multiple-r",
    "R² from the multiple correlation",
    "R² = R·R",
    "R2 R",
    (
        form("R2", "R² = R·R", "R", square),
        form("R", "R = √R²", "R2", root),
    ),
    needs="within-sample",
    assumption="R and R² are of the same fit with an intercept.",
    source="Draper and Smith 1998, Applied Regression Analysis, 3rd edition, chapter 6",
    explanation="R² is the square of the multiple correlation R. Where it is not, one of them is "
    "misprinted or the adjusted R² stands for R².",
    kinds=MODEL,
)

F2_FROM_R2 = identity(
    "f2-from-r2",
    "Cohen's f² from R²",
    "f² = R²/(1 − R²)",
    "f2 R2 R2_change",
    (
        form("f2", "f² = R²/(1 − R²)", "R2", odds, kinds=MODEL),
        form("R2", "R² = f²/(1 + f²)", "f2", share, kinds=MODEL),
        form(
            "f2",
            "f² = ΔR²/(1 − R²)",
            "R2_change R2",
            lambda change, R2: divide(change, complement(R2)),
            kinds="model-change",
        ),
        form(
            "R2_change",
            "ΔR² = f²(1 − R²)",
            "f2 R2",
            lambda f2, R2: multiply(f2, complement(R2)),
            kinds="model-change",
        ),
        form(
            "R2",
            "R² = 1 − ΔR²/f²",
            "f2 R2_change",
            lambda f2, change: complement(divide(change, f2)),
            kinds="model-change",
        ),
    ),
    needs="within-sample overall",
    assumption="f² is of the whole model, or of the change that ΔR² is of, and R² is not adjusted.",
    source="Cohen 1988, Statistical Power Analysis for the Behavioral Sciences, 2nd edition, "
    "chapter 9",
    explanation="Cohen's f² is the explained share of the variance over the unexplained one. "
    "Where they disagree, one is misprinted or f² is of a single predictor.",
    kinds=f"{MODEL} model-change",
)

IDENTITIES = (F_FROM_R2, R2_ADJUSTED, N_FROM_DF, R2_FROM_MULTIPLE_R, F2_FROM_R2)
