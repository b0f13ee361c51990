"""Models that statsmodels fits to the data it ships, printed as manuscripts print them."""

from __future__ import annotations

import warnings
from typing import Any

import pytest
import statsmodels.api as sm

from published.saying import alarms, findings, read, scanned

#: Data set, response, predictors.
MODELS = {
    "longley": ("TOTEMP", ["GNPDEFL", "GNP", "UNEMP", "ARMED", "POP", "YEAR"]),
    "longley-two": ("TOTEMP", ["GNP", "UNEMP"]),
    "stackloss": ("STACKLOSS", ["AIRFLOW", "WATERTEMP", "ACIDCONC"]),
    "statecrime": ("murder", ["urban", "poverty", "hs_grad", "single"]),
    "ccard": ("AVGEXP", ["AGE", "INCOME", "INCOMESQ", "OWNRENT"]),
    "copper": ("WORLDCONSUMPTION", ["COPPERPRICE", "INCOMEINDEX", "ALUMPRICE", "INVENTORYINDEX"]),
    "engel": ("foodexp", ["income"]),
    "spector": ("GRADE", ["GPA", "TUCE", "PSI"]),
    "macrodata": ("realcons", ["realgdp", "unemp", "tbilrate"]),
}


def fitted(name: str, **options: Any) -> Any:
    """Fit one of the models, with an intercept."""
    response, predictors = MODELS[name]
    data = getattr(sm.datasets, name.removesuffix("-two")).load_pandas().data
    return sm.OLS(data[response], sm.add_constant(data[predictors])).fit(**options)


def p_clause(p: float) -> str:
    return "< .001" if p < 0.001 else f"= {p:.3f}"


def prose(fit: Any, decimals: int) -> str:
    """Describe a fit in the words of a results section."""
    df1, df2 = int(fit.df_model), int(fit.df_resid)
    lines = [
        f"The model was fitted to {int(fit.nobs)} cases (R² = {fit.rsquared:.{decimals}f}, "
        f"adjusted R² = {fit.rsquared_adj:.{decimals}f}, F({df1}, {df2}) = {fit.fvalue:.2f}, "
        f"p {p_clause(fit.f_pvalue)})."
    ]
    for name, (low, high) in fit.conf_int().iterrows():
        lines.append(
            f"For {name.lower()}, b = {fit.params[name]:.{decimals + 1}f}, "
            f"SE = {fit.bse[name]:.{decimals + 1}f}, t({df2}) = {fit.tvalues[name]:.2f}, "
            f"p {p_clause(fit.pvalues[name])}, "
            f"95% CI [{low:.{decimals + 1}f}, {high:.{decimals + 1}f}]."
        )
    return "\n\n".join(lines)


@pytest.mark.parametrize("decimals", [2, 3, 5])
@pytest.mark.parametrize("name", MODELS)
def test_a_results_section_is_accepted(name: str, decimals: int) -> None:
    fit = fitted(name)
    text = prose(fit, decimals)
    assert alarms(text) == []
    literals = read(text)
    assert literals["R2"] == [f"{fit.rsquared:.{decimals}f}"]
    assert len(literals["t"]) == len(fit.params)


@pytest.mark.parametrize("name", MODELS)
def test_a_slip_in_a_results_section_is_reported(name: str) -> None:
    fit = fitted(name)
    right = f"F({int(fit.df_model)}, {int(fit.df_resid)}) = {fit.fvalue:.2f}"
    wrong = f"F({int(fit.df_model)}, {int(fit.df_resid)}) = {fit.fvalue * 1.3:.2f}"
    found = alarms(prose(fit, 4).replace(right, wrong))
    identities = {identity for identity, _ in found}
    # Where p is printed and not only bounded, it speaks up as well.
    assert "f-from-r2" in identities
    assert identities <= {"f-from-r2", "p-from-f"}


@pytest.mark.parametrize("covariance", ["HC0", "HC1", "HC3"])
@pytest.mark.parametrize("name", MODELS)
def test_a_robust_fit_that_says_so_is_accepted(name: str, covariance: str) -> None:
    """The robust F is no function of R²; its p still follows from it."""
    fit = fitted(name, cov_type=covariance, use_t=True)
    plain = fitted(name)
    assert abs(fit.fvalue / plain.fvalue - 1) > 0.01
    df1, df2 = int(fit.df_model), int(fit.df_resid)
    text = (
        f"With heteroskedasticity-robust ({covariance}) standard errors, "
        f"R² = {fit.rsquared:.3f}, F({df1}, {df2}) = {fit.fvalue:.2f}, p {p_clause(fit.f_pvalue)}."
    )
    assert findings(text) == []
    (claim,) = scanned(text)["claims"]
    outcomes = {check["identity"]: check["outcome"] for check in claim["checks"]}
    assert outcomes["f-from-r2"] == "not-applicable"
    assert outcomes["p-from-f"] == "agrees"


def printout(fit: Any) -> str:
    """The console summary, as it stands in a fenced block of a Markdown report."""
    with warnings.catch_warnings():
        # Some of its diagnostics want more cases than the small sets have.
        warnings.simplefilter("ignore")
        return f"```\n{fit.summary()}\n```\n"


def test_an_f_that_ends_in_a_point_is_read() -> None:
    text = printout(fitted("engel"))
    assert "F-statistic:                     1141.\n" in text
    assert read(text)["F"] == ["1141"]


@pytest.mark.parametrize("name", MODELS)
def test_a_printed_summary_is_accepted(name: str) -> None:
    fit = fitted(name)
    text = printout(fit)
    assert alarms(text) == []
    claim = next(c for c in scanned(text)["claims"] if c["kind"] == "overall-model")
    literals = {reading["quantity"]: reading["literal"] for reading in claim["readings"]}
    assert literals["R2"] == f"{fit.rsquared:.3f}"
    assert literals["R2_adj"] == f"{fit.rsquared_adj:.3f}"
    assert (literals["df1"], literals["df2"]) == (f"{fit.df_model:.0f}", f"{fit.df_resid:.0f}")
    assert literals["n"] == f"{fit.nobs:.0f}"
    assert "robust" not in claim["context"]
    outcomes = {check["identity"]: check["outcome"] for check in claim["checks"]}
    assert outcomes["f-from-r2"] == outcomes["n-from-df"] == outcomes["p-from-f"] == "agrees"


@pytest.mark.parametrize("name", MODELS)
def test_a_printed_summary_with_a_slip_is_reported(name: str) -> None:
    fit = fitted(name)
    text = printout(fit)
    wrong = text.replace(f"{fit.rsquared:.3f}", f"{fit.rsquared - 0.1:.3f}", 1)
    assert wrong != text
    assert alarms(wrong)


@pytest.mark.parametrize("name", MODELS)
def test_a_printed_robust_summary_is_accepted(name: str) -> None:
    text = printout(fitted(name, cov_type="HC1", use_t=True))
    assert alarms(text) == []
    for claim in scanned(text)["claims"]:
        assert "robust" in claim["context"]
        outcomes = {check["identity"]: check["outcome"] for check in claim["checks"]}
        assert outcomes.get("f-from-r2", "not-applicable") == "not-applicable"


@pytest.mark.parametrize("name", ["longley", "stackloss", "statecrime"])
def test_a_step_is_accepted(name: str) -> None:
    """The change from the first predictors to all of them, by statsmodels' own F test."""
    response, predictors = MODELS[name]
    data = getattr(sm.datasets, name).load_pandas().data
    small = sm.OLS(data[response], sm.add_constant(data[predictors[:2]])).fit()
    large = fitted(name)
    F, p, df1 = large.compare_f_test(small)
    text = (
        f"The second step explained more, ΔR² = {large.rsquared - small.rsquared:.4f}, "
        f"ΔF({int(df1)}, {int(large.df_resid)}) = {F:.2f}, p {p_clause(p)}, "
        f"total R² = {large.rsquared:.4f}."
    )
    assert alarms(text) == []
    assert read(text)["F_change"] == [f"{F:.2f}"]
    assert alarms(text.replace(f"= {F:.2f}", f"= {F * 1.5:.2f}"))[0][0] in ("f-change", "p-from-f")


@pytest.mark.parametrize("name", MODELS)
def test_correlations_are_accepted(name: str) -> None:
    """One predictor: r, its p and the fit tell one story."""
    response, predictors = MODELS[name]
    data = getattr(sm.datasets, name.removesuffix("-two")).load_pandas().data
    fit = sm.OLS(data[response], sm.add_constant(data[predictors[0]])).fit()
    r = data[response].corr(data[predictors[0]])
    df2 = int(fit.df_resid)
    for decimals in (2, 3):
        text = f"The two went together, r({df2}) = {r:.{decimals}f}, p {p_clause(fit.f_pvalue)}."
        assert alarms(text) == []
        assert read(text)["r"] == [f"{r:.{decimals}f}"]
