"""The fits behind the manuscripts: textbook formulas on simulated numbers.

Nothing here comes from Crossfoot, so that the corpus can judge it. Every result is a small
record of unrounded values; rounding is left to :mod:`making.words`.
"""

from __future__ import annotations

from typing import NamedTuple

import numpy as np
from numpy.typing import NDArray
from scipy import stats

Vector = NDArray[np.float64]


class Coefficient(NamedTuple):
    """One row of a coefficient table."""

    name: str
    b: float
    se: float
    beta: float
    t: float
    p: float
    low: float
    high: float


class Fit(NamedTuple):
    """Least squares with an intercept."""

    n: int
    df1: int
    df2: int
    R: float
    R2: float
    R2_adj: float
    F: float
    p: float
    ss_model: float
    ss_error: float
    ss_total: float
    ms_model: float
    ms_error: float
    s: float
    coefficients: tuple[Coefficient, ...]

    def __getattr__(self, name: str) -> Coefficient:
        # A fit's slopes are reached by the predictor's name: fit.footfall.b
        for row in self.coefficients:
            if row.name == name:
                return row
        raise AttributeError(name)


class Change(NamedTuple):
    """What a step of a hierarchical regression adds."""

    R2_change: float
    F_change: float
    df1: int
    df2: int
    p: float


class Effect(NamedTuple):
    """One line of an analysis of variance."""

    name: str
    ss: float
    df: float
    ms: float
    F: float
    p: float
    eta2_partial: float


class Anova(NamedTuple):
    """An analysis of variance: its effects, the error line and the total line."""

    effects: tuple[Effect, ...]
    ss_error: float
    df_error: float
    ms_error: float
    ss_total: float
    df_total: float


class Test(NamedTuple):
    """A test with one statistic; ``df`` is nan for z."""

    value: float
    df: float
    p: float
    estimate: float = float("nan")
    low: float = float("nan")
    high: float = float("nan")


class Odds(NamedTuple):
    """One row of a logistic regression."""

    name: str
    b: float
    se: float
    z: float
    p: float
    odds_ratio: float
    low: float
    high: float


def least_squares(y: Vector, predictors: dict[str, Vector], level: float = 0.95) -> Fit:
    """Fit y on the predictors and an intercept by least squares."""
    X = np.column_stack([np.ones(len(y)), *predictors.values()])
    n, columns = X.shape
    df1, df2 = columns - 1, n - columns
    inverse = np.linalg.inv(X.T @ X)
    b = inverse @ X.T @ y
    ss_error = float(np.sum((y - X @ b) ** 2))
    ss_total = float(np.sum((y - y.mean()) ** 2))
    ss_model = ss_total - ss_error
    ms_error = ss_error / df2
    R2 = ss_model / ss_total
    F = (ss_model / df1) / ms_error
    se = np.sqrt(ms_error * np.diag(inverse))
    reach = float(stats.t.ppf(0.5 + level / 2, df2))
    rows = []
    for j, name in enumerate(["Intercept", *predictors]):
        t = float(b[j] / se[j])
        beta = float(b[j] * X[:, j].std() / y.std()) if j else float("nan")
        low, high = float(b[j] - reach * se[j]), float(b[j] + reach * se[j])
        p = 2 * float(stats.t.sf(abs(t), df2))
        rows.append(Coefficient(name, float(b[j]), float(se[j]), beta, t, p, low, high))
    return Fit(
        n=n,
        df1=df1,
        df2=df2,
        R=R2**0.5,
        R2=R2,
        R2_adj=1 - (1 - R2) * (n - 1) / df2,
        F=F,
        p=float(stats.f.sf(F, df1, df2)),
        ss_model=ss_model,
        ss_error=ss_error,
        ss_total=ss_total,
        ms_model=ss_model / df1,
        ms_error=ms_error,
        s=ms_error**0.5,
        coefficients=tuple(rows),
    )


def change(smaller: Fit, larger: Fit) -> Change:
    """Compare two nested fits."""
    df1 = larger.df1 - smaller.df1
    gain = larger.R2 - smaller.R2
    F = (gain / df1) / ((1 - larger.R2) / larger.df2)
    return Change(gain, F, df1, larger.df2, float(stats.f.sf(F, df1, larger.df2)))


def robust_wald(y: Vector, predictors: dict[str, Vector]) -> tuple[float, int, int, float]:
    """F, df1, df2 and p of the slopes with the HC1 covariance (White 1980)."""
    X = np.column_stack([np.ones(len(y)), *predictors.values()])
    n, columns = X.shape
    df1, df2 = columns - 1, n - columns
    inverse = np.linalg.inv(X.T @ X)
    b = inverse @ X.T @ y
    e = y - X @ b
    covariance = inverse @ (X.T * e**2) @ X @ inverse * (n / df2)
    slopes = b[1:]
    F = float(slopes @ np.linalg.inv(covariance[1:, 1:]) @ slopes) / df1
    return F, df1, df2, float(stats.f.sf(F, df1, df2))


def anova(groups: dict[str, Vector]) -> Anova:
    """One-way analysis of variance."""
    values = np.concatenate(list(groups.values()))
    grand = values.mean()
    between = float(sum(len(g) * (g.mean() - grand) ** 2 for g in groups.values()))
    total = float(np.sum((values - grand) ** 2))
    return _table({"Group": (between, len(groups) - 1)}, total, len(values) - 1)


def two_way(cells: NDArray[np.float64], names: tuple[str, str]) -> Anova:
    """Balanced two-way analysis of variance of ``cells[a, b, replicate]``."""
    a, b, m = cells.shape
    grand = cells.mean()
    rows, columns, means = cells.mean(axis=(1, 2)), cells.mean(axis=(0, 2)), cells.mean(axis=2)
    ss_a = float(b * m * np.sum((rows - grand) ** 2))
    ss_b = float(a * m * np.sum((columns - grand) ** 2))
    ss_ab = float(m * np.sum((means - rows[:, None] - columns[None, :] + grand) ** 2))
    total = float(np.sum((cells - grand) ** 2))
    parts = {
        names[0]: (ss_a, a - 1),
        names[1]: (ss_b, b - 1),
        f"{names[0]} × {names[1]}": (ss_ab, (a - 1) * (b - 1)),
    }
    return _table(parts, total, a * b * m - 1)


def _table(parts: dict[str, tuple[float, int]], total: float, df_total: int) -> Anova:
    ss_error = total - sum(ss for ss, _ in parts.values())
    df_error = df_total - sum(df for _, df in parts.values())
    ms_error = ss_error / df_error
    effects = []
    for name, (ss, df) in parts.items():
        F = (ss / df) / ms_error
        p = float(stats.f.sf(F, df, df_error))
        effects.append(Effect(name, ss, df, ss / df, F, p, ss / (ss + ss_error)))
    return Anova(tuple(effects), ss_error, df_error, ms_error, total, df_total)


def repeated(scores: NDArray[np.float64]) -> tuple[Effect, float, float]:
    """Repeated measures (rows are subjects): the effect with the Greenhouse–Geisser df.

    Returns the effect, whose df is corrected, the corrected error df and epsilon.
    """
    n, k = scores.shape
    grand = scores.mean()
    ss = float(n * np.sum((scores.mean(axis=0) - grand) ** 2))
    subjects = float(k * np.sum((scores.mean(axis=1) - grand) ** 2))
    ss_error = float(np.sum((scores - grand) ** 2)) - ss - subjects
    S = np.cov(scores.T)
    centred = S - S.mean(axis=0)[None, :] - S.mean(axis=1)[:, None] + S.mean()
    epsilon = float(np.trace(centred) ** 2 / ((k - 1) * np.sum(centred**2)))
    df1, df2 = (k - 1) * epsilon, (k - 1) * (n - 1) * epsilon
    F = (ss / (k - 1)) / (ss_error / ((k - 1) * (n - 1)))
    p = float(stats.f.sf(F, df1, df2))
    return Effect("Time", ss, df1, ss / df1, F, p, ss / (ss + ss_error)), df2, epsilon


def pooled_t(a: Vector, b: Vector) -> Test:
    """Student's t test of two groups; the estimate is Cohen's d."""
    df = len(a) + len(b) - 2
    s = float(np.sqrt(((len(a) - 1) * a.var(ddof=1) + (len(b) - 1) * b.var(ddof=1)) / df))
    gap = float(a.mean() - b.mean())
    se = s * (1 / len(a) + 1 / len(b)) ** 0.5
    reach = float(stats.t.ppf(0.975, df)) * se
    t = gap / se
    return Test(t, df, 2 * float(stats.t.sf(abs(t), df)), gap / s, gap - reach, gap + reach)


def welch_t(a: Vector, b: Vector) -> Test:
    """Welch's t test of two groups (Welch 1947)."""
    va, vb = float(a.var(ddof=1)) / len(a), float(b.var(ddof=1)) / len(b)
    df = (va + vb) ** 2 / (va**2 / (len(a) - 1) + vb**2 / (len(b) - 1))
    t = float(a.mean() - b.mean()) / (va + vb) ** 0.5
    return Test(t, df, 2 * float(stats.t.sf(abs(t), df)), float(a.mean() - b.mean()))


def paired_t(a: Vector, b: Vector) -> Test:
    """Student's t test of paired differences."""
    d = a - b
    se = float(d.std(ddof=1)) / len(d) ** 0.5
    df = len(d) - 1
    reach = float(stats.t.ppf(0.975, df)) * se
    t = float(d.mean()) / se
    p = 2 * float(stats.t.sf(abs(t), df))
    return Test(t, df, p, float(d.mean()), float(d.mean()) - reach, float(d.mean()) + reach)


def correlation(x: Vector, y: Vector) -> Test:
    """Pearson's r with its interval by Fisher's transformation."""
    r = float(np.corrcoef(x, y)[0, 1])
    df = len(x) - 2
    t = r * (df / (1 - r * r)) ** 0.5
    reach = float(stats.norm.ppf(0.975)) / (len(x) - 3) ** 0.5
    low, high = float(np.tanh(np.arctanh(r) - reach)), float(np.tanh(np.arctanh(r) + reach))
    return Test(r, df, 2 * float(stats.t.sf(abs(t), df)), t, low, high)


def contingency(counts: NDArray[np.float64]) -> Test:
    """Pearson's chi-squared without a correction; the estimate is Cramér's V."""
    n = counts.sum()
    expected = counts.sum(axis=1, keepdims=True) * counts.sum(axis=0, keepdims=True) / n
    chi2 = float(np.sum((counts - expected) ** 2 / expected))
    df = (counts.shape[0] - 1) * (counts.shape[1] - 1)
    size = float((chi2 / (n * (min(counts.shape) - 1))) ** 0.5)
    return Test(chi2, df, float(stats.chi2.sf(chi2, df)), size)


def logistic(y: Vector, predictors: dict[str, Vector]) -> tuple[Odds, ...]:
    """Logistic regression by Newton's method, with Wald tests."""
    X = np.column_stack([np.ones(len(y)), *predictors.values()])
    b = np.zeros(X.shape[1])
    for _ in range(60):
        mu = 1 / (1 + np.exp(-X @ b))
        information = (X.T * (mu * (1 - mu))) @ X
        b = b + np.linalg.solve(information, X.T @ (y - mu))
    se = np.sqrt(np.diag(np.linalg.inv(information)))
    reach = float(stats.norm.ppf(0.975))
    rows = []
    for j, name in enumerate(["Intercept", *predictors]):
        z = float(b[j] / se[j])
        low, high = np.exp(b[j] - reach * se[j]), np.exp(b[j] + reach * se[j])
        p = 2 * float(stats.norm.sf(abs(z)))
        ratio = float(np.exp(b[j]))
        rows.append(Odds(name, float(b[j]), float(se[j]), z, p, ratio, float(low), float(high)))
    return tuple(rows)
