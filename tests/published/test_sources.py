"""The published figures against exact refits: a typing error cannot survive here."""

from __future__ import annotations

from fractions import Fraction

import pytest
from mpmath import mp, mpf

from published.exact import p_from_chi2, p_from_f, p_from_t, to_mpf
from published.figures import prints_as
from published.sources import ANALYSES, CLASSICS, HANDBOOK, REGRESSIONS, STRD, analysis, regression


def close(exact: Fraction | mpf, certified: str) -> bool:
    """Agreement to the 15 digits that NIST certifies (14 where the last may be rounded)."""
    value, wanted = (to_mpf(exact) if isinstance(exact, Fraction) else exact), mpf(certified)
    return bool(abs(value - wanted) <= mpf("5e-15") * abs(wanted))


def name(data: dict[str, object]) -> str:
    return str(data["name"])


@pytest.mark.parametrize("data", STRD["regressions"], ids=name)
def test_certified_regressions_follow_from_their_data(data: dict[str, object]) -> None:
    fit = regression(name(data))
    assert (fit.df1, fit.df2) == (data["df1"], data["df2"])
    for coefficient, b, se in zip(data["coefficients"], fit.b, fit.se, strict=True):
        assert close(b, coefficient["estimate"])
        assert close(se, coefficient["sd"])
    assert close(fit.R2, data["R2"])
    assert close(fit.s, data["residual_sd"])
    assert close(fit.ss_model, data["ss_regression"])
    assert close(fit.ss_error, data["ss_residual"])
    assert close(fit.ss_model / fit.df1, data["ms_regression"])
    assert close(fit.ss_error / fit.df2, data["ms_residual"])
    if fit.ss_error:
        assert close(fit.F, data["F"])
    else:
        assert data["F"] == "Infinity"


@pytest.mark.parametrize("data", STRD["analyses"], ids=name)
def test_certified_analyses_follow_from_their_data(data: dict[str, object]) -> None:
    fit = analysis(name(data))
    assert (fit.df1, fit.df2) == (data["df1"], data["df2"])
    assert close(fit.R2, data["R2"])
    assert close(fit.s, data["residual_sd"])
    assert close(fit.ss_model, data["ss_between"])
    assert close(fit.ss_error, data["ss_within"])
    assert close(fit.ss_model / fit.df1, data["ms_between"])
    assert close(fit.ss_error / fit.df2, data["ms_within"])
    assert close(fit.F, data["F"])


def prints_t_as(exact: mpf, literal: str) -> bool:
    """R rounds t to three decimals before it prints four digits: 37.8553, 37.855, 37.85."""
    decimals = len(literal.partition(".")[2])
    return bool(abs(exact - mpf(literal)) <= mpf(10) ** -decimals / 2 + mpf("0.0005"))


@pytest.mark.parametrize("data", CLASSICS["regressions"], ids=name)
def test_printed_regressions_follow_from_their_data(data: dict[str, object]) -> None:
    fit = regression(name(data))
    assert prints_as(fit.R2, data["R2"])
    assert prints_as(fit.R2_adj, data["R2_adj"])
    assert prints_as(fit.F, data["F"])
    assert prints_as(fit.p, data["p"])
    assert prints_as(fit.s, data["residual_sd"])
    for j, row in enumerate(data["coefficients"]):
        assert prints_as(fit.b[j], row["b"])
        assert prints_as(fit.se[j], row["se"])
        assert prints_t_as(fit.t(j), row["t"])
        assert prints_as(p_from_t(fit.t(j), fit.df2), row["p"])


@pytest.mark.parametrize("data", CLASSICS["analyses"], ids=name)
def test_printed_analyses_follow_from_their_data(data: dict[str, object]) -> None:
    fit = analysis(name(data))
    for exact, literal in zip((fit.ss_model, fit.ss_error), data["ss"], strict=True):
        assert prints_as(exact, literal)
    means = (fit.ss_model / fit.df1, fit.ss_error / fit.df2)
    for exact, literal in zip(means, data["ms"], strict=True):
        assert prints_as(exact, literal)
    assert prints_as(fit.F, data["F"])
    assert prints_as(fit.p, data["p"])


@pytest.mark.parametrize("table", HANDBOOK["critical_values"], ids=lambda table: table["statistic"])
def test_critical_values_are_where_their_tail_is(table: dict[str, object]) -> None:
    """The tabled value is the level's quantile, to half a unit of its last place."""
    tail = {"t": p_from_t, "F": p_from_f, "chi2": p_from_chi2}[table["statistic"]]
    for *df, literal, level in table["rows"]:
        half = mpf(10) ** -3 / 2
        low, high = mpf(literal) - half, mpf(literal) + half
        assert tail(high, *df) <= mpf(level) <= tail(low, *df)


def test_the_handbook_examples_follow_from_what_they_print() -> None:
    two = HANDBOOK["two_samples"]
    n1, n2 = two["n"]
    m1, m2 = map(mpf, two["mean"])
    v1, v2 = (mpf(sd) ** 2 for sd in two["sd"])
    s = mp.sqrt(((n1 - 1) * v1 + (n2 - 1) * v2) / (n1 + n2 - 2))
    assert prints_as(s, two["pooled_sd"])
    assert two["df"] == str(n1 + n2 - 2)
    # Its means and deviations are printed to five decimals, which reaches the fifth of t.
    assert abs((m1 - m2) / (s * mp.sqrt(mpf(1) / n1 + mpf(1) / n2)) - mpf(two["t"])) < 1e-5
    w1, w2 = v1 / n1, v2 / n2
    assert abs((m1 - m2) / mp.sqrt(w1 + w2) - mpf(two["welch_t"])) < 1e-5
    assert prints_as((w1 + w2) ** 2 / (w1**2 / (n1 - 1) + w2**2 / (n2 - 1)), two["welch_df"])
    (_, df1, ss1, ms1, F), (_, df2, ss2, ms2, _), (_, df, ss, _, _) = HANDBOOK["one_factor"]["rows"]
    assert (int(df1) + int(df2), mpf(ss1) + mpf(ss2)) == (int(df), mpf(ss))
    assert prints_as(mpf(ss1) / int(df1), ms1)
    assert prints_as(mpf(ss2) / int(df2), ms2)
    assert abs((mpf(ss1) / int(df1)) / (mpf(ss2) / int(df2)) - mpf(F)) < 2e-4


def test_every_figure_names_its_source() -> None:
    for data in (*REGRESSIONS.values(), *ANALYSES.values(), *HANDBOOK["critical_values"]):
        assert data["source"]
    assert all(HANDBOOK[key]["source"] for key in HANDBOOK if key != "critical_values")
