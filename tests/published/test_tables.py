"""Published analyses of variance and coefficient tables, as tables, and with a digit wrong."""

from __future__ import annotations

import warnings
from fractions import Fraction
from typing import Any

import pytest
import statsmodels.api as sm
from mpmath import mpf
from statsmodels.formula.api import ols

from published.exact import Refit, p_from_t
from published.figures import decimal, fixed, p_clause, significant
from published.saying import alarms, scanned
from published.sources import ANALYSES, REGRESSIONS, analysis, regression

#: All fits with an intercept and an error.
FITS = {
    **{
        name: regression
        for name, data in REGRESSIONS.items()
        if data.get("intercept", True) and data.get("F") != "Infinity"
    },
    **dict.fromkeys(ANALYSES, analysis),
}
CELLS = ("ss_model", "ss_error", "ss_total", "ms_model", "ms_error", "F")


def cell(value: Fraction | mpf) -> str:
    """Six significant digits, with a power of ten for what is very small."""
    exact = decimal(value)
    return f"{exact:.5e}" if exact < decimal("0.001") else significant(value, 6)


def cells(fit: Refit) -> dict[str, str]:
    """The numbers of an analysis of variance, as printed."""
    ms_model, ms_error = fit.ss_model / fit.df1, fit.ss_error / fit.df2
    exact = (fit.ss_model, fit.ss_error, fit.ss_total, ms_model, ms_error, fit.F)
    return dict(zip(CELLS, map(cell, exact), strict=True))


def rows(fit: Refit, printed: dict[str, str]) -> list[list[str]]:
    """The analysis of variance as a manuscript sets it."""
    p = p_clause(fit.p).removeprefix("= ")
    ms_model, ms_error = printed["ms_model"], printed["ms_error"]
    return [
        ["Source", "SS", "df", "MS", "F", "p"],
        ["Regression", printed["ss_model"], str(fit.df1), ms_model, printed["F"], p],
        ["Residual", printed["ss_error"], str(fit.df2), ms_error, "", ""],
        ["Total", printed["ss_total"], str(fit.df1 + fit.df2), "", "", ""],
    ]


def markdown(table: list[list[str]]) -> str:
    lines = ["| " + " | ".join(row) + " |" for row in table]
    return "\n".join(["Analysis of variance:", "", lines[0], "|---" * 6 + "|", *lines[1:], ""])


def latex(table: list[list[str]]) -> str:
    lines = [" & ".join(row).replace("< ", "$<$ ") + r" \\" for row in table]
    head, body = lines[0] + "\n\\midrule\n", "\n".join(lines[1:])
    inside = f"\\toprule\n{head}{body}\n\\bottomrule"
    return f"\\begin{{tabular}}{{lrrrrr}}\n{inside}\n\\end{{tabular}}\n"


def html(table: list[list[str]]) -> str:
    lines = ["".join(f"<td>{text.replace('<', '&lt;')}</td>" for text in row) for row in table]
    return "<table>" + "\n".join(f"<tr>{line}</tr>" for line in lines) + "</table>\n"


FORMS = {"markdown": markdown, "latex": latex, "html": html}


@pytest.mark.parametrize("language", FORMS)
@pytest.mark.parametrize("name", FITS)
def test_an_analysis_of_variance_is_accepted(name: str, language: str) -> None:
    fit = FITS[name](name)
    printed = cells(fit)
    text = FORMS[language](rows(fit, printed))
    assert alarms(text, language) == []
    (claim,) = scanned(text, language)["claims"]
    assert claim["kind"] == "anova-table"
    literals = {reading["literal"] for reading in claim["readings"]}
    assert literals >= {*printed.values(), str(fit.df1), str(fit.df2), str(fit.df1 + fit.df2)}
    outcomes = {check["identity"]: check["outcome"] for check in claim["checks"]}
    for identity in ("anova-sums", "anova-df", "ms-from-ss", "f-from-ms", "p-from-f"):
        assert outcomes[identity] == "agrees"


@pytest.mark.parametrize("wrong", CELLS)
@pytest.mark.parametrize("name", FITS)
def test_a_wrong_leading_digit_is_reported(name: str, wrong: str) -> None:
    fit = FITS[name](name)
    printed = cells(fit)
    first = next(digit for digit in printed[wrong] if digit in "123456789")
    other = "2" if first == "9" else str(int(first) + 1)
    text = markdown(rows(fit, printed | {wrong: printed[wrong].replace(first, other, 1)}))
    assert alarms(text), text


@pytest.mark.parametrize("name", FITS)
def test_degrees_of_freedom_that_do_not_add_up_are_reported(name: str) -> None:
    fit = FITS[name](name)
    table = rows(fit, cells(fit))
    table[3][2] = str(fit.df1 + fit.df2 + 1)
    assert "anova-df" in {identity for identity, _ in alarms(markdown(table))}


def coefficient_table(name: str, digits: int) -> list[list[str]]:
    """The coefficients of a fit as a manuscript sets them."""
    fit = regression(name)
    table = [["Predictor", "b", "SE", "t", "p"]]
    for j, row in enumerate(REGRESSIONS[name]["coefficients"]):
        p = p_clause(p_from_t(fit.t(j), fit.df2)).removeprefix("= ")
        b, se = significant(fit.b[j], digits), significant(fit.se[j], digits)
        table.append([row["name"], b, se, fixed(fit.t(j), 2), p])
    return table


@pytest.mark.parametrize("digits", [3, 5])
@pytest.mark.parametrize("name", ["Longley", "Filip", "stackloss", "cars", "mtcars", "women"])
def test_a_coefficient_table_is_accepted(name: str, digits: int) -> None:
    table = coefficient_table(name, digits)
    text = markdown(table).replace("|---" * 6, "|---" * 5)
    assert alarms(text) == []
    assert len(scanned(text)["claims"]) >= len(table) - 2


@pytest.mark.parametrize("name", ["Longley", "stackloss", "cars", "mtcars"])
def test_a_wrong_t_in_a_coefficient_table_is_reported(name: str) -> None:
    table = coefficient_table(name, 4)
    table[-1][3] = f"{float(table[-1][3]) * 2 + 5:.2f}"
    assert alarms(markdown(table).replace("|---" * 6, "|---" * 5))


#: Data set of statsmodels and the formula of a model.
FORMULAS = {
    "statecrime": "murder ~ urban + poverty + single",
    "stackloss": "STACKLOSS ~ AIRFLOW + WATERTEMP",
    "fair": "affairs ~ C(educ) + religious",
}


@pytest.mark.parametrize("typ", [1, 2, 3])
@pytest.mark.parametrize("name", FORMULAS)
def test_the_analyses_of_variance_that_statsmodels_prints_are_accepted(name: str, typ: int) -> None:
    """Type II and III sums of squares do not add up to a total, and need not."""
    data = getattr(sm.datasets, name).load_pandas().data
    with warnings.catch_warnings():
        warnings.simplefilter("ignore")
        printed: Any = sm.stats.anova_lm(ols(FORMULAS[name], data).fit(), typ=typ)
    text = f"```\n{printed.to_string()}\n```\n"
    assert alarms(text) == []
    assert scanned(text)["claims"]
