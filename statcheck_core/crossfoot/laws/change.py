"""A larger model against a smaller one."""

from __future__ import annotations

from crossfoot.laws.arithmetic import (
    ONE,
    add,
    at_least,
    at_most,
    complement,
    divide,
    multiply,
    subtract,
)
from crossfoot.laws.declare import form, identity
from crossfoot.laws.interval import Interval

_KINDS = "model-change"


def _f_change(change: Interval, R2: Interval, df1: Interval, df2: Interval) -> Interval:
    return multiply(divide(change, complement(R2)), divide(df2, df1))


def _change(F: Interval, R2: Interval, df1: Interval, df2: Interval) -> Interval:
    return multiply(multiply(F, complement(R2)), divide(df1, df2))


def _r2(F: Interval, change: Interval, df1: Interval, df2: Interval) -> Interval:
    return complement(divide(multiply(change, df2), multiply(F, df1)))


def _df1(F: Interval, change: Interval, R2: Interval, df2: Interval) -> Interval:
    return divide(multiply(divide(change, complement(R2)), df2), F)


def _df2(F: Interval, change: Interval, R2: Interval, df1: Interval) -> Interval:
    return divide(multiply(multiply(F, df1), complement(R2)), change)


F_CHANGE = identity(
    "f-change",
    "F of a change from ΔR²",
    "ΔF = (ΔR²/df1)/((1 − R²)/df2)",
    "F_change R2_change R2 df1 df2",
    (
        form("F_change", "ΔF = (ΔR²/df1)/((1 − R²)/df2)", "R2_change R2 df1 df2", _f_change),
        form("R2_change", "ΔR² = ΔF·(1 − R²)·df1/df2", "F_change R2 df1 df2", _change),
        form("R2", "R² = 1 − ΔR²·df2/(ΔF·df1)", "F_change R2_change df1 df2", _r2),
        form("df1", "df1 = ΔR²·df2/(ΔF·(1 − R²))", "F_change R2_change R2 df2", _df1),
        form("df2", "df2 = ΔF·df1·(1 − R²)/ΔR²", "F_change R2_change R2 df1", _df2),
    ),
    needs="least-squares within-sample classical-errors nested-models unadjusted-df",
    assumption="Both models are least-squares fits to the same cases, the smaller one nested in "
    "the larger, whose R² and df2 these are.",
    source="Kutner, Nachtsheim, Neter and Li 2005, Applied Linear Statistical Models, 5th "
    "edition, chapter 7; Cohen 1988, chapter 9",
    explanation="The F of added predictors is what they add to R², for each of them, over what the "
    "larger model leaves, for each of its degrees of freedom. Where it is not, one of the numbers "
    "is misprinted or R² is that of the smaller model.",
    kinds=_KINDS,
)

R2_CHANGE = identity(
    "r2-change",
    "change of R²",
    "ΔR² = R² full − R² reduced",
    "R2_change R2_full R2_reduced R2",
    (
        form("R2_change", "ΔR² = R² full − R² reduced", "R2_full R2_reduced", subtract),
        form("R2_full", "R² full = R² reduced + ΔR²", "R2_reduced R2_change", add),
        form("R2_reduced", "R² reduced = R² full − ΔR²", "R2_full R2_change", subtract),
        form("R2_change", "ΔR² ≤ R²", "R2", at_most),
        form("R2", "R² ≥ ΔR²", "R2_change", at_least),
    ),
    needs="within-sample nested-models",
    assumption="Both models are fitted to the same cases, and R² without a subscript is that of "
    "the larger one.",
    source="Cohen 1988, Statistical Power Analysis for the Behavioral Sciences, 2nd edition, "
    "chapter 9",
    explanation="What a step adds to R² is the difference between the R² of the two models. Where "
    "it is not, one of the three is misprinted or a step is missing.",
    kinds=f"{_KINDS} model-summary",
)


def _gain(reduced: Interval, full: Interval) -> Interval:
    """Return reduced/full − 1, which is not below zero."""
    low, high = subtract(divide(reduced, full), ONE)
    return Interval(max(low, 0.0), high) if high >= 0 else Interval(low, high)


def _f(ssr: Interval, ssf: Interval, dfr: Interval, dff: Interval) -> Interval:
    return divide(_gain(ssr, ssf), _gain(dfr, dff))


def _growth(F: Interval, dfr: Interval, dff: Interval) -> Interval:
    """Return SSE reduced over SSE full."""
    return add(ONE, multiply(F, _gain(dfr, dff)))


def _ss_reduced(F: Interval, ssf: Interval, dfr: Interval, dff: Interval) -> Interval:
    return multiply(ssf, _growth(F, dfr, dff))


def _ss_full(F: Interval, ssr: Interval, dfr: Interval, dff: Interval) -> Interval:
    return divide(ssr, _growth(F, dfr, dff))


def _df_growth(F: Interval, ssr: Interval, ssf: Interval) -> Interval:
    """Return df reduced over df full."""
    return add(ONE, divide(_gain(ssr, ssf), F))


def _df_reduced(F: Interval, ssr: Interval, ssf: Interval, dff: Interval) -> Interval:
    return multiply(dff, _df_growth(F, ssr, ssf))


def _df_full(F: Interval, ssr: Interval, ssf: Interval, dfr: Interval) -> Interval:
    return divide(dfr, _df_growth(F, ssr, ssf))


GENERAL_LINEAR_TEST = identity(
    "general-linear-test",
    "F of a change from sums of squares",
    "F = ((SSE reduced − SSE full)/(df reduced − df full))/(SSE full/df full)",
    "F ss_reduced ss_full df_reduced df_full",
    (
        form(
            "F",
            "F = ((SSE reduced − SSE full)/(df reduced − df full))/(SSE full/df full)",
            "ss_reduced ss_full df_reduced df_full",
            _f,
        ),
        form(
            "ss_reduced",
            "SSE reduced = SSE full·(1 + F·(df reduced/df full − 1))",
            "F ss_full df_reduced df_full",
            _ss_reduced,
        ),
        form(
            "ss_full",
            "SSE full = SSE reduced/(1 + F·(df reduced/df full − 1))",
            "F ss_reduced df_reduced df_full",
            _ss_full,
        ),
        form(
            "df_reduced",
            "df reduced = df full·(1 + (SSE reduced/SSE full − 1)/F)",
            "F ss_reduced ss_full df_full",
            _df_reduced,
        ),
        form(
            "df_full",
            "df full = df reduced/(1 + (SSE reduced/SSE full − 1)/F)",
            "F ss_reduced ss_full df_reduced",
            _df_full,
        ),
    ),
    needs="least-squares classical-errors nested-models unadjusted-df",
    assumption="Both models are least-squares fits to the same cases, the smaller one nested in "
    "the larger.",
    source="Kutner, Nachtsheim, Neter and Li 2005, Applied Linear Statistical Models, 5th "
    "edition, section 2.8",
    explanation="Dropping predictors raises the error's sum of squares; F is that rise, for each "
    "degree of freedom, over the larger model's mean square. Where it is not, one of the numbers "
    "is misprinted or the two models are not nested.",
    kinds=f"{_KINDS} anova-table model-summary",
)

IDENTITIES = (F_CHANGE, R2_CHANGE, GENERAL_LINEAR_TEST)
