"""Published results, printed as manuscripts print them, and with a digit wrong.

What must be found is decided here by exact arithmetic on the intervals that rounding leaves, not
by Crossfoot: an alarm wherever two of the printed figures cannot both be true, none elsewhere.
"""

from __future__ import annotations

import re
from collections.abc import Iterator
from fractions import Fraction

import pytest
from mpmath import mp, mpf

from published.exact import Refit, p_from_f, p_from_t, to_mpf
from published.figures import bounds, fixed, p_clause, significant
from published.saying import alarms, findings, read
from published.sources import ANALYSES, CLASSICS, HANDBOOK, REGRESSIONS, analysis, regression

#: With an intercept and an error: those that have an overall F.
FITTED = [
    name
    for name, data in REGRESSIONS.items()
    if data.get("intercept", True) and data.get("F") != "Infinity"
]
ORIGIN = [name for name, data in REGRESSIONS.items() if not data.get("intercept", True)]


def variants(literal: str) -> Iterator[str]:
    """The literal with each digit in turn one higher, 0 for 9, as long as it stays a numeral."""
    for place, char in enumerate(literal):
        if char.isdigit():
            varied = literal[:place] + str((int(char) + 1) % 10) + literal[place + 1 :]
            if not re.match(r"-?0\d", varied):
                yield varied


def apart(a: tuple[mpf, mpf], b: tuple[mpf, mpf]) -> bool:
    """Whether two closed intervals have no point in common."""
    return bool(a[1] < b[0] or b[1] < a[0])


def clash(fit: Refit, R2: str, F: str, p: str) -> tuple[bool, bool]:
    """Whether R² and F cannot both be true, and whether p cannot be true with one of them."""
    low, high = bounds(R2)
    if low > 1:
        return True, True

    def implied(share: Fraction) -> mpf:
        share = max(share, Fraction(0))
        if share >= 1:
            return mp.inf
        return to_mpf((share / fit.df1) / ((1 - share) / fit.df2))

    def tail(value: mpf) -> mpf:
        return mpf(0) if value == mp.inf else p_from_f(value, fit.df1, fit.df2)

    by_share = implied(low), implied(high)
    printed = tuple(to_mpf(max(bound, Fraction(0))) for bound in bounds(F))
    relation, literal = p.split()
    p_low, p_high = bounds(literal)
    allowed = (mpf(0), to_mpf(literal)) if relation == "<" else (to_mpf(p_low), to_mpf(p_high))
    with_p = [(tail(span[1]), tail(span[0])) for span in (by_share, printed)]
    return apart(by_share, printed), any(apart(span, allowed) for span in with_p)


def overall(fit: Refit, R2: str, F: str, p: str) -> str:
    return f"The fit was as follows, R² = {R2}, F({fit.df1}, {fit.df2}) = {F}, p {p}, N = {fit.n}."


@pytest.mark.parametrize("decimals", [2, 3, 4, 6])
@pytest.mark.parametrize("name", FITTED)
def test_an_overall_fit_is_accepted(name: str, decimals: int) -> None:
    fit = regression(name)
    R2, F = fixed(fit.R2, decimals), fixed(fit.F, decimals)
    text = overall(fit, R2, F, p_clause(fit.p))
    assert alarms(text) == []
    literals = read(text)
    assert (literals["R2"], literals["F"], literals["n"]) == ([R2], [F], [str(fit.n)])
    assert (literals["df1"], literals["df2"]) == ([str(fit.df1)], [str(fit.df2)])


@pytest.mark.parametrize("decimals", [2, 4, 6])
@pytest.mark.parametrize("name", FITTED)
def test_a_wrong_digit_is_reported_exactly_where_it_shows(name: str, decimals: int) -> None:
    fit = regression(name)
    right = fixed(fit.R2, decimals), fixed(fit.F, 2)
    p = p_clause(fit.p)
    wrong = [(R2, right[1]) for R2 in variants(right[0])]
    wrong += [(right[0], F) for F in variants(right[1])]
    for R2, F in wrong:
        fit_apart, p_apart = clash(fit, R2, F, p)
        text = overall(fit, R2, F, p)
        if fit_apart:
            assert alarms(text), text
        elif p_apart:
            # With one numerator df a halved p is a doubt, so any finding will do.
            assert findings(text), text
        else:
            assert alarms(text) == [], text


@pytest.mark.parametrize("decimals", [3, 4, 6])
@pytest.mark.parametrize("name", FITTED)
def test_an_adjusted_share_is_accepted(name: str, decimals: int) -> None:
    fit = regression(name)
    share, adjusted = fixed(fit.R2, decimals), fixed(fit.R2_adj, decimals)
    text = (
        f"The model explained most (R² = {share}, adjusted R² = {adjusted}, "
        f"F({fit.df1}, {fit.df2}) = {fixed(fit.F, 2)}, p {p_clause(fit.p)})."
    )
    assert alarms(text) == []
    assert read(text)["R2_adj"] == [adjusted]


@pytest.mark.parametrize("name", ["Longley", "stackloss", "cars", "mtcars", "anscombe-I"])
def test_another_adjusted_share_is_reported(name: str) -> None:
    fit = regression(name)
    wrong = fixed(fit.R2_adj - Fraction(3, 100), 3)
    text = (
        f"The model explained most (R² = {fixed(fit.R2, 3)}, adjusted R² = {wrong}, "
        f"F({fit.df1}, {fit.df2}) = {fixed(fit.F, 2)}, p {p_clause(fit.p)})."
    )
    assert "r2-adjusted" in {identity for identity, _ in alarms(text)}


def margin(df: int) -> mpf:
    """The 97.5 % point of Student's t."""
    return mp.findroot(
        lambda t: p_from_t(t, df) - mpf("0.05"), (mpf(1), mpf(13)), solver="anderson"
    )


def slopes(name: str) -> list[int]:
    fit = regression(name)
    return [j for j in range(len(fit.b)) if fit.b[j]]


@pytest.mark.parametrize("digits", [3, 4, 6])
@pytest.mark.parametrize("name", [*FITTED, *ORIGIN])
def test_coefficients_are_accepted(name: str, digits: int) -> None:
    fit = regression(name)
    reach = margin(fit.df2)
    origin = "" if name not in ORIGIN else " (regression through the origin)"
    for j in slopes(name):
        b, se, t = to_mpf(fit.b[j]), fit.se[j], fit.t(j)
        interval = f"[{significant(b - reach * se, digits)}, {significant(b + reach * se, digits)}]"
        text = (
            f"The coefficient{origin} was b = {significant(b, digits)}, "
            f"SE = {significant(se, digits)}, t({fit.df2}) = {fixed(t, 2)}, "
            f"p {p_clause(p_from_t(t, fit.df2))}, 95% CI {interval}."
        )
        assert alarms(text) == [], text
        assert read(text)["t"] == [fixed(t, 2)]


@pytest.mark.parametrize("name", [*FITTED, *ORIGIN])
def test_another_t_is_reported(name: str) -> None:
    fit = regression(name)
    for j in slopes(name):
        b, se, t = to_mpf(fit.b[j]), fit.se[j], fit.t(j)
        printed = f"b = {significant(b, 4)}, SE = {significant(se, 4)}"
        quotient = abs(b / se)
        for wrong in variants(fixed(t, 2)):
            low, high = (abs(to_mpf(bound)) for bound in bounds(wrong))
            # Four digits leave b/SE open by less than 1 in 500.
            if abs(quotient / max(low, high) - 1) > 0.02 and abs(quotient - max(low, high)) > 0.02:
                assert alarms(f"For this term {printed}, t({fit.df2}) = {wrong}."), wrong


@pytest.mark.parametrize("name", FITTED)
def test_a_lost_sign_is_reported(name: str) -> None:
    fit = regression(name)
    for j in slopes(name):
        b = significant(-to_mpf(fit.b[j]), 4)
        text = (
            f"For this term b = {b}, SE = {significant(fit.se[j], 4)}, "
            f"t({fit.df2}) = {fixed(fit.t(j), 2)}."
        )
        if abs(fit.t(j)) > 0.1:
            assert alarms(text), text


@pytest.mark.parametrize("name", ORIGIN)
def test_a_fit_through_the_origin_raises_nothing(name: str) -> None:
    """NoInt1 and NoInt2: without an intercept n is df1 + df2, and R² is about zero."""
    fit = regression(name)
    text = (
        f"In a regression through the origin, R² = {fixed(fit.R2, 5)}, "
        f"F({fit.df1}, {fit.df2}) = {fixed(fit.F, 1)}, p {p_clause(fit.p)}, n = {fit.n}."
    )
    assert findings(text) == []
    assert read(text)["F"] == [fixed(fit.F, 1)]


@pytest.mark.parametrize("name", ORIGIN)
def test_a_fit_through_the_origin_that_does_not_say_so_is_a_doubt(name: str) -> None:
    fit = regression(name)
    text = (
        f"The model fitted well, R² = {fixed(fit.R2, 5)}, "
        f"F({fit.df1}, {fit.df2}) = {fixed(fit.F, 1)}, p {p_clause(fit.p)}, n = {fit.n}."
    )
    assert findings(text) == [("n-from-df", "doubt")]


@pytest.mark.parametrize("name", list(ANALYSES))
def test_one_way_analyses_are_accepted(name: str) -> None:
    fit = analysis(name)
    for decimals in (2, 3, 4):
        F, eta2 = fixed(fit.F, decimals), fixed(fit.R2, decimals)
        text = (
            f"In a one-way analysis of variance the groups were compared, "
            f"F({fit.df1}, {fit.df2}) = {F}, p {p_clause(fit.p)}, η² = {eta2}."
        )
        assert findings(text) == []
        assert (read(text)["F"], read(text)["eta2"]) == ([F], [eta2])


@pytest.mark.parametrize("name", list(ANALYSES))
def test_a_one_way_analysis_with_another_p_is_reported(name: str) -> None:
    fit = analysis(name)
    p = "= .470" if fit.p < mpf("0.05") else "= .012"
    text = f"The groups were compared, F({fit.df1}, {fit.df2}) = {fixed(fit.F, 2)}, p {p}."
    assert alarms(text)[0][0] == "p-from-f"


@pytest.mark.parametrize("data", CLASSICS["regressions"], ids=lambda data: data["name"])
def test_figures_as_r_prints_them_are_accepted(data: dict[str, object]) -> None:
    fit = regression(str(data["name"]))
    p = data["p"] if str(data["p"]).startswith("<") else f"= {data['p']}"
    text = (
        f"R² = {data['R2']}, adjusted R² = {data['R2_adj']}, "
        f"F({fit.df1}, {fit.df2}) = {data['F']}, p {p}."
    )
    assert alarms(text) == []
    assert read(text)["F"] == [data["F"]]
    for row in data["coefficients"]:
        p = row["p"] if row["p"].startswith("<") else f"= {row['p']}"
        text = f"b = {row['b']}, SE = {row['se']}, t({fit.df2}) = {row['t']}, p {p}."
        assert alarms(text) == [], text
        assert read(text)["t"] == [row["t"]]


@pytest.mark.parametrize("table", HANDBOOK["critical_values"], ids=lambda table: table["statistic"])
def test_critical_values_go_with_their_level_only(table: dict[str, object]) -> None:
    symbol = {"t": "t", "F": "F", "chi2": "χ²"}[table["statistic"]]
    for *df, value, level in table["rows"]:
        head = f"The difference was tested, {symbol}({', '.join(df)}) = {value}"
        # A tabled value to three decimals gives its level to three decimals at least.
        assert alarms(f"{head}, p = {level}0.") == []
        # A fourfold or fifth of the level is no halved or multiplied p that someone may mean.
        assert alarms(f"{head}, two-tailed p = {float(level) * 0.37:.3f}.") != []


def test_the_handbook_examples_are_accepted() -> None:
    two, one, equal = (HANDBOOK[key] for key in ("two_samples", "one_factor", "equal_variances"))
    (_, df1, _, _, F), (_, df2, *_), _ = one["rows"]
    p = fixed(p_from_f(F, df1, df2), 3)
    levene = fixed(p_from_f(equal["F"], equal["df1"], equal["df2"]), 3)
    text = (
        f"Cars differed by make, t({two['df']}) = {two['t']}, p < .001; by Welch's test, "
        f"t({two['welch_df']}) = {two['welch_t']}, p < .001. Gears differed by batch, "
        f"F({df1}, {df2}) = {F}, p = {p}. Their variances did not (Levene's test: "
        f"F({equal['df1']}, {equal['df2']}) = {equal['F']}, p = {levene})."
    )
    assert alarms(text) == []
    assert read(text)["t"] == [two["t"], two["welch_t"]]
    assert read(text)["F"] == [F, equal["F"]]


def test_a_wrong_digit_in_a_handbook_example_reverses_it() -> None:
    (_, df1, _, _, F), (_, df2, *_), _ = HANDBOOK["one_factor"]["rows"]
    p = fixed(p_from_f(F, df1, df2), 3)
    text = f"Gears differed by batch, F({df1}, {df2}) = 1{F[1:]}, p = {p}."
    assert findings(text) == [("p-from-f", "reversal")]
