"""True values that satisfy each identity, to test its forms against.

Every identity has scenarios here; a new one without any fails ``test_identities.py``. Values are
computed with :data:`DIGITS` digits, so that what is tested is the rounding of the forms, and a
scenario names the assumptions that its values break.
"""

from __future__ import annotations

from collections.abc import Callable
from random import Random
from typing import NamedTuple

import mpmath

DIGITS = 40
Values = dict[str, mpmath.mpf]


class Scenario(NamedTuple):
    """Values that satisfy an identity, but for the assumptions in ``broken``."""

    name: str
    kind: str
    draw: Callable[[Random], Values]
    broken: frozenset[str] = frozenset()
    counts: frozenset[str] = frozenset(["df1", "df2", "df", "n", "k", "df_full", "df_reduced"])


def mpf(value: float) -> mpmath.mpf:
    return mpmath.mpf(value)


# Reference areas, slow and obviously right.


def f_area(f, df1, df2):
    return mpmath.betainc(df2 / 2, df1 / 2, 0, df2 / (df2 + df1 * f), regularized=True)


def t_area(t, df):
    return mpmath.betainc(df / 2, mpf(1) / 2, 0, df / (df + t * t), regularized=True)


def chi2_area(chi2, df):
    return mpmath.gammainc(df / 2, chi2 / 2, regularized=True)


def z_area(z):
    return mpmath.erfc(abs(z) / mpmath.sqrt(2))


# Draws.


def positive(rng: Random, low: float = -2, high: float = 2) -> mpmath.mpf:
    """A positive number of any order of magnitude."""
    return mpf(10) ** mpf(rng.uniform(low, high))


def signed(rng: Random, low: float = -2, high: float = 2) -> mpmath.mpf:
    return positive(rng, low, high) * rng.choice((-1, 1))


def share(rng: Random) -> mpmath.mpf:
    """A share, often close to an edge."""
    odds = positive(rng, -3, 3)
    return odds / (1 + odds)


def count(rng: Random, high: int = 300) -> mpmath.mpf:
    return mpf(rng.randint(1, rng.choice((3, 20, high))))


def dfs(rng: Random) -> tuple[mpmath.mpf, mpmath.mpf]:
    return count(rng, 12), count(rng)


# Tails.


def p_from_f(rng):
    df1, df2 = dfs(rng)
    F = positive(rng, -2, 1.5)
    return {"F": F, "df1": df1, "df2": df2, "p": f_area(F, df1, df2)}


def p_from_f_adjusted(rng):
    df1, df2 = 1 + positive(rng, -1, 1), 1 + positive(rng, 0, 2)
    F = positive(rng, -2, 1.5)
    return {"F": F, "df1": df1, "df2": df2, "p": f_area(F, df1, df2)}


def p_from_f_change(rng):
    values = p_from_f(rng)
    return {"F_change": values.pop("F"), **values}


def p_from_t(rng):
    t, df = signed(rng, -2, 1.3), count(rng)
    return {"t": t, "df": df, "p": t_area(t, df)}


def p_from_r(rng):
    t, df = signed(rng, -2, 1.3), count(rng)
    return {"r": t / mpmath.sqrt(t * t + df), "t": t, "df": df, "p": t_area(t, df)}


def p_from_chi2(rng):
    chi2, df = positive(rng), count(rng, 40)
    return {"chi2": chi2, "df": df, "p": chi2_area(chi2, df)}


def p_from_z(rng):
    z = signed(rng, -2, 1)
    return {"z": z, "p": z_area(z)}


def counts_of_four(rng):
    chi2, n = positive(rng, -2, 2), count(rng)
    n = max(n, mpmath.ceil(chi2))
    return {"phi": mpmath.sqrt(chi2 / n) * rng.choice((-1, 1)), "chi2": chi2, "n": n, "df": mpf(1)}


def counts_of_any(rng):
    """A table of any shape: m is one less than its lesser side."""
    m, more = rng.randint(1, 4), rng.randint(0, 5)
    chi2, n = positive(rng, -2, 2), count(rng)
    n = max(n, mpmath.ceil(chi2 / m))
    return {
        "cramers_v": mpmath.sqrt(chi2 / (n * m)),
        "chi2": chi2,
        "n": n,
        "df": mpf(m * (m + more)),
    }


# Fit.


def fit(rng):
    df1, df2 = dfs(rng)
    R2 = share(rng)
    return {
        "R2": R2,
        "R": mpmath.sqrt(R2),
        "R2_adj": 1 - (1 - R2) * (df1 + df2) / df2,
        "F": R2 / df1 / ((1 - R2) / df2),
        "df1": df1,
        "df2": df2,
        "f2": R2 / (1 - R2),
        "n": df1 + df2 + 1,
        "k": df1,
    }


def fit_with_missing(rng):
    values = fit(rng)
    return {**values, "n": values["n"] + rng.randint(1, 30)}


def fit_of_factors(rng):
    values = fit(rng)
    return {**values, "k": mpf(rng.randint(1, 5))}


def fit_through_origin(rng):
    values = fit(rng)
    return {**values, "n": values["df1"] + values["df2"]}


def pairs(rng):
    df = count(rng)
    return {"df": df, "n": df + 2}


def rows(rng):
    df, k = count(rng), count(rng, 12)
    return {"df": df, "k": k, "n": df + k + 1}


def change(rng):
    df1, df2 = dfs(rng)
    R2_full = share(rng)
    R2_reduced = R2_full * mpf(rng.random())
    gain = R2_full - R2_reduced
    return {
        "R2": R2_full,
        "R2_full": R2_full,
        "R2_reduced": R2_reduced,
        "R2_change": gain,
        "F_change": gain / df1 / ((1 - R2_full) / df2),
        "df1": df1,
        "df2": df2,
        "f2": gain / (1 - R2_full),
    }


def nested(rng):
    ss_full, df_full = positive(rng), count(rng)
    df_reduced = df_full + count(rng, 9)
    ss_reduced = ss_full * (1 + positive(rng))
    F = (ss_reduced - ss_full) / (df_reduced - df_full) / (ss_full / df_full)
    return {
        "F": F,
        "ss_full": ss_full,
        "ss_reduced": ss_reduced,
        "df_full": df_full,
        "df_reduced": df_reduced,
    }


# Analysis of variance.


def table(rng):
    ss_effect, ss_error = positive(rng), positive(rng)
    df1, df2 = dfs(rng)
    return _table(ss_effect, ss_error, ss_effect + ss_error, df1, df2)


def factorial(rng):
    ss_effect, ss_error = positive(rng), positive(rng)
    df1, df2 = dfs(rng)
    return _table(ss_effect, ss_error, ss_effect + ss_error + positive(rng), df1, df2)


def _table(ss_effect, ss_error, ss_total, df1, df2):
    ms_effect, ms_error = ss_effect / df1, ss_error / df2
    F = ms_effect / ms_error
    return {
        "ss_effect": ss_effect,
        "ss_error": ss_error,
        "ss_total": ss_total,
        "ss_model": ss_total - ss_error,
        "df1": df1,
        "df2": df2,
        "ms_effect": ms_effect,
        "ms_error": ms_error,
        "s": mpmath.sqrt(ms_error),
        "F": F,
        "R2": 1 - ss_error / ss_total,
        "eta2": ss_effect / ss_total,
        "eta2_partial": ss_effect / (ss_effect + ss_error),
        "omega2": df1 * (F - 1) / (df1 * F + df2 + 1),
        "ss": ss_effect,
        "ms": ms_effect,
        "df": df1,
    }


def truncated_omega(rng):
    values = table(rng)
    return {**values, "omega2": max(values["omega2"], mpf(0))}


def parts(number: int, whole: bool = False) -> Callable[[Random], Values]:
    def draw(rng):
        sizes = [count(rng) if whole else positive(rng) for _ in range(number)]
        named = {f"part{i}": size for i, size in enumerate(sizes, 1)}
        return {"total": mpmath.fsum(sizes), **named}

    return draw


# Coefficients.


def coefficient(rng):
    t, se, df = signed(rng, -2, 1.3), positive(rng), count(rng)
    critical = positive(rng, -0.3, 0.7)
    return {
        "b": t * se,
        "beta": t * positive(rng, -3, -1),
        "se": se,
        "t": t,
        "z": t,
        "df": df,
        "p": t_area(t, df),
        "ci_low": t * se - critical * se,
        "ci_high": t * se + critical * se,
        "ci_level": 1 - t_area(critical, df),
    }


def normal_limits(rng):
    values = coefficient(rng)
    critical = (values["ci_high"] - values["b"]) / values["se"]
    return {**values, "ci_level": 1 - z_area(critical)}


def skewed_limits(rng):
    values = coefficient(rng)
    return {**values, "ci_high": values["b"] + positive(rng)}


def limits_of_beta(rng):
    beta, half, se = signed(rng, -2, 0), positive(rng, -2, 0), positive(rng)
    return {
        "beta": beta,
        "ci_low": beta - half,
        "ci_high": beta + half,
        "se": se,
        "t": beta / se,
        "z": beta / se,
    }


def without(values: Callable[[Random], Values], *names: str) -> Callable[[Random], Values]:
    return lambda rng: {k: v for k, v in values(rng).items() if k not in names}


def squared_t(rng):
    t = signed(rng)
    return {"t": t, "F": t * t, "df1": mpf(1)}


def joint_f(rng):
    return {"t": signed(rng), "F": positive(rng), "df1": mpf(rng.randint(2, 5))}


def slope(rng):
    r = mpmath.sqrt(share(rng)) * rng.choice((-1, 1))
    return {"r": r, "beta": r, "R2": r * r, "df1": mpf(1)}


def several_slopes(rng):
    values = slope(rng)
    return {**values, "r": values["r"] * mpf(rng.random()), "df1": mpf(rng.randint(2, 5))}


def correlation_limits(rng):
    transform, df = signed(rng, -2, 0.5), 1 + count(rng)
    critical = positive(rng, -0.3, 0.7)
    half = critical / mpmath.sqrt(df - 1)
    return {
        "r": mpmath.tanh(transform),
        "df": df,
        "ci_low": mpmath.tanh(transform - half),
        "ci_high": mpmath.tanh(transform + half),
        "ci_level": 1 - z_area(critical),
    }


def exact_correlation_limits(rng):
    values = correlation_limits(rng)
    return {**values, "ci_low": values["r"] - (values["r"] + 1) * mpf(rng.random())}


def ratio(rng):
    z, se = signed(rng, -2, 1), positive(rng, -2, 0)
    critical = positive(rng, -0.3, 0.7)
    b = z * se
    return {
        "odds_ratio": mpmath.exp(b),
        "b": b,
        "z": z,
        "se": se,
        "chi2": z * z,
        "df": mpf(1),
        "p": z_area(z),
        "ci_low": mpmath.exp(b - critical * se),
        "ci_high": mpmath.exp(b + critical * se),
        "ci_level": 1 - z_area(critical),
    }


def ratio_with_limits_of_b(rng):
    values = ratio(rng)
    half = positive(rng)
    return {**values, "ci_low": values["b"] - half, "ci_high": values["b"] + half}


def ratio_with_its_own_error(rng):
    values = ratio(rng)
    return {**values, "se": values["se"] * values["odds_ratio"]}


def profile_ratio(rng):
    values = ratio(rng)
    return {**values, "ci_high": values["odds_ratio"] * (1 + positive(rng))}


def many_degrees(rng):
    return {"chi2": positive(rng), "b": signed(rng), "se": positive(rng), "df": mpf(3)}


# Tables and the rest.


def stars(rng):
    p = share(rng)
    return {"p": p, "p_stars": p}


def adjusted_p(rng):
    p = share(rng)
    return {"p": p, "p_adjusted": p + (1 - p) * share(rng)}


def collinear(rng):
    tolerance = share(rng)
    return {"tolerance": tolerance, "vif": 1 / tolerance}


def anything(rng):
    values = {**change(rng), **table(rng), **ratio(rng), **coefficient(rng), **fit(rng)}
    values |= {**collinear(rng), "sd": positive(rng), "alpha": mpf("0.05"), "r": share(rng)}
    values |= {"phi": share(rng), "cramers_v": share(rng)}
    return values


def negative_r2(rng):
    return {"R2": -positive(rng)}


def _one(name: str, kind: str, draw: Callable[[Random], Values], broken: str = "") -> Scenario:
    return Scenario(name, kind, draw, frozenset(broken.split()))


SCENARIOS: dict[str, tuple[Scenario, ...]] = {
    "p-from-f": (
        _one("counts", "effect", p_from_f),
        Scenario("adjusted df", "effect", p_from_f_adjusted, counts=frozenset()),
        _one("change", "model-change", p_from_f_change),
    ),
    "p-from-t": (
        _one("counts", "coefficient", p_from_t),
        Scenario("adjusted df", "mean-comparison", p_from_t, counts=frozenset()),
    ),
    "p-from-r": (_one("pairs", "correlation", p_from_r),),
    "p-from-chi2": (_one("counts", "frequency", p_from_chi2),),
    "association-from-chi2": (
        _one("two by two", "frequency", counts_of_four),
        _one("any table", "frequency", counts_of_any),
    ),
    "p-from-z": (_one("normal", "coefficient", p_from_z),),
    "f-from-r2": (_one("fit", "overall-model", fit), _one("only effect", "effect", fit)),
    "r2-adjusted": (_one("fit", "overall-model", fit),),
    "n-from-df": (
        _one("complete", "overall-model", fit),
        _one("missing cases", "overall-model", fit_with_missing, "no-missing-cases"),
        _one("no intercept", "overall-model", fit_through_origin, "intercept"),
        _one("factors", "overall-model", fit_of_factors, "counted-predictors"),
        _one("pairs", "correlation", pairs),
        _one("rows", "coefficient", rows),
    ),
    "r2-from-multiple-r": (_one("fit", "overall-model", fit),),
    "f2-from-r2": (
        _one("fit", "overall-model", fit),
        _one("change", "model-change", change),
    ),
    "eta2-partial": (
        _one("one-way", "anova-table", table),
        _one("factorial", "anova-table", factorial, "one-way"),
    ),
    "omega2": (
        _one("one-way", "effect", table),
        _one("truncated", "effect", truncated_omega),
    ),
    "anova-sums": (_one("two", "anova-table", parts(2)),),
    "anova-df": (_one("two", "anova-table", parts(2, whole=True)),),
    "ms-from-ss": (_one("row", "anova-table", table),),
    "f-from-ms": (_one("row", "anova-table", table),),
    "r2-from-ss": (_one("factorial", "anova-table", factorial),),
    "s-from-ms": (_one("fit", "anova-table", table),),
    "t-from-b-se": (
        _one("row", "coefficient", coefficient, "error-of-beta"),
        _one("standardised", "coefficient", limits_of_beta),
    ),
    "f-from-t": (
        _one("one degree", "coefficient", squared_t),
        _one("several degrees", "coefficient", joint_f),
    ),
    "signs": (
        _one("row", "coefficient", skewed_limits),
        _one("estimate unnamed", "coefficient", without(skewed_limits, "b")),
    ),
    "r-from-slope": (
        _one("one predictor", "overall-model", slope),
        _one("several predictors", "overall-model", several_slopes),
        _one("row of the only predictor", "coefficient", slope),
        _one("pairs", "correlation", slope),
    ),
    "ci-from-se": (
        _one("t limits", "coefficient", coefficient),
        _one("normal limits", "coefficient", normal_limits, "t-limits"),
        _one("estimate unnamed", "coefficient", without(coefficient, "b")),
    ),
    "ci-centre": (
        _one("row", "coefficient", coefficient),
        _one("row without an error", "coefficient", without(coefficient, "se")),
        _one("normal test", "coefficient", without(coefficient, "se", "t")),
        _one("interval alone", "coefficient", without(coefficient, "se", "t", "z")),
        _one("standardised", "coefficient", limits_of_beta),
        _one("skewed", "coefficient", skewed_limits, "symmetric-limits"),
    ),
    "ci-against-p": (
        _one("row", "coefficient", coefficient),
        _one("difference", "mean-comparison", without(coefficient, "b")),
        _one("ratio", "coefficient", ratio),
    ),
    "ci-from-r": (
        _one("fisher", "correlation", correlation_limits),
        _one("others", "correlation", exact_correlation_limits, "fisher-limits"),
    ),
    "f-change": (_one("step", "model-change", change),),
    "r2-change": (_one("step", "model-change", change),),
    "general-linear-test": (_one("nested", "model-change", nested),),
    "stars": (_one("row", "coefficient", stars),),
    "adjusted-p": (_one("row", "coefficient", adjusted_p),),
    "tolerance-vif": (_one("row", "coefficient", collinear),),
    "odds-ratio": (
        _one("whole row", "coefficient", ratio),
        _one("ratio alone", "coefficient", without(ratio, "b")),
        _one("coefficient alone", "coefficient", without(ratio, "odds_ratio")),
        _one("limits of b", "coefficient", ratio_with_limits_of_b, "limits-of-ratio"),
        _one("error of ratio", "coefficient", ratio_with_its_own_error, "error-of-coefficient"),
        _one(
            "error of ratio alone",
            "coefficient",
            without(ratio_with_its_own_error, "b"),
        ),
        _one("profile", "coefficient", without(profile_ratio, "b"), "wald-limits"),
        _one("many degrees", "coefficient", many_degrees, "wald-statistic"),
    ),
    "bounds": (
        _one("anything", "overall-model", anything),
        _one("outside the sample", "overall-model", negative_r2, "within-sample"),
    ),
    "restatement": (),
    "sample-flow": (),
}
