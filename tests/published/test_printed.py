"""Certified tables of the NIST Statistical Reference Datasets in the layout of their pages.

The figures are those of ``data/strd.json``, which :mod:`published.test_sources` holds against exact
refits; the layout is from memory.
"""

from __future__ import annotations

from typing import Any

import pytest

from published.saying import alarms, scanned
from published.sources import STRD

REGRESSIONS = {
    data["name"]: data for data in STRD["regressions"] if data["F"] != "Infinity"
}  # the exact fits have no test
ANALYSES = {data["name"]: data for data in STRD["analyses"]}


def analysis(data: dict[str, Any]) -> str:
    """A table of an analysis of variance, with R² and the standard deviation below."""
    between, within = "Between Instrument", "Within Instrument"
    return f"""\
Certified Values:

Source of                  Sums of               Mean
Variation          df      Squares              Squares             F Statistic

{between} {data["df1"]:>2} {data["ss_between"]} {data["ms_between"]} {data["F"]}
{within} {data["df2"]:>3} {data["ss_within"]} {data["ms_within"]}

               Certified R-Squared {data["R2"]}

               Certified Residual
               Standard Deviation  {data["residual_sd"]}
"""


def regression(data: dict[str, Any]) -> str:
    """A table of parameters, the fit, and its analysis of variance."""
    parameters = "\n".join(
        f"        {row['name']}        {row['estimate']:<20} {row['sd']:<22}"
        for row in data["coefficients"]
    )
    return f"""\
               Certified Regression Statistics

                                          Standard Deviation
     Parameter          Estimate             of Estimate

{parameters}

     Residual
     Standard Deviation   {data["residual_sd"]}

     R-Squared            {data["R2"]}

               Certified Analysis of Variance Table

Source of  Degrees of    Sums of             Mean
Variation   Freedom      Squares            Squares           F Statistic

Regression {data["df1"]:>4}     {data["ss_regression"]:<18} {data["ms_regression"]:<18} {data["F"]}
Residual   {data["df2"]:>4}     {data["ss_residual"]:<18} {data["ms_residual"]}
"""


TABLES = {name: analysis(data) for name, data in ANALYSES.items()} | {
    name: regression(data) for name, data in REGRESSIONS.items()
}
FORMS = {"plain": "{}", "markdown": "```\n{}```\n", "html": "<pre>\n{}</pre>\n"}


def wanted(name: str) -> set[tuple[str, str | None, str]]:
    """What a reader takes from the table of variance."""
    data = (ANALYSES | REGRESSIONS)[name]
    one, two = ("between", "within") if name in ANALYSES else ("regression", "residual")
    return {
        ("ss", "model", data[f"ss_{one}"]),
        ("ms", "model", data[f"ms_{one}"]),
        ("ss", "error", data[f"ss_{two}"]),
        ("ms", "error", data[f"ms_{two}"].removesuffix(".")),
        ("df1", None, str(data["df1"])),
        ("df2", None, str(data["df2"])),
        ("F", None, data["F"]),
    }


@pytest.mark.parametrize("language", FORMS)
@pytest.mark.parametrize("name", TABLES)
def test_a_certified_table_is_read_and_accepted(name: str, language: str) -> None:
    text = FORMS[language].format(TABLES[name])
    assert alarms(text, language) == []
    (claim,) = [c for c in scanned(text, language)["claims"] if c["kind"] == "anova-table"]
    read = {(r["quantity"], r["term"], r["literal"]) for r in claim["readings"]}
    assert read >= wanted(name)
    outcomes = {check["identity"]: check["outcome"] for check in claim["checks"]}
    assert outcomes["ms-from-ss"] == outcomes["f-from-ms"] == "agrees"


@pytest.mark.parametrize("quantity", ["ms", "F"])
@pytest.mark.parametrize("name", TABLES)
def test_a_wrong_digit_in_a_certified_table_is_reported(name: str, quantity: str) -> None:
    literal = next(text for key, term, text in wanted(name) if key == quantity and term != "error")
    at = next(place for place, digit in enumerate(literal) if digit in "123456789")
    other = literal[:at] + str(int(literal[at]) % 9 + 1) + literal[at + 1 :]
    head, _, tail = TABLES[name].rpartition(f" {literal}")
    found = alarms(f"{head} {other}{tail}", "plain")
    assert {"f-from-ms", "ms-from-ss"} & {identity for identity, _ in found}
