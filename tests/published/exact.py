"""Least squares and tail areas in exact and in 50-digit arithmetic.

Slow and obviously right: normal equations over fractions, and tail areas by mpmath's regularised
incomplete beta and gamma functions (Abramowitz & Stegun 1964, chapter 26). A figure that was
mistyped cannot survive the comparison with what its own data give.
"""

from __future__ import annotations

from collections.abc import Sequence
from fractions import Fraction
from typing import NamedTuple

from mpmath import mp, mpf

mp.dps = 50


class Refit(NamedTuple):
    """A least-squares fit; squares stay exact, square roots have 50 digits."""

    n: int
    df1: int
    df2: int
    b: tuple[Fraction, ...]
    se: tuple[mpf, ...]
    ss_model: Fraction
    ss_error: Fraction
    ss_total: Fraction

    @property
    def R2(self) -> Fraction:
        """The share of the sum of squares (about the mean, if there is an intercept)."""
        return self.ss_model / self.ss_total

    @property
    def R2_adj(self) -> Fraction:
        """The adjusted R² of a fit with an intercept."""
        return 1 - (1 - self.R2) * Fraction(self.n - 1, self.df2)

    @property
    def F(self) -> Fraction:
        """The overall F; the error must not vanish."""
        return (self.ss_model / self.df1) / (self.ss_error / self.df2)

    @property
    def p(self) -> mpf:
        """The p of the overall F."""
        return p_from_f(to_mpf(self.F), self.df1, self.df2)

    @property
    def s(self) -> mpf:
        """The residual standard deviation."""
        return mp.sqrt(to_mpf(self.ss_error / self.df2))

    def t(self, j: int) -> mpf:
        """The t of coefficient ``j``."""
        return to_mpf(self.b[j]) / self.se[j]


def to_mpf(value: Fraction | int | str) -> mpf:
    """Return a number with 50 digits."""
    value = Fraction(value)
    return mpf(value.numerator) / value.denominator


def least_squares(
    y: Sequence[str], rows: Sequence[Sequence[str | Fraction]], intercept: bool = True
) -> Refit:
    """Solve the normal equations exactly; ``rows`` holds the predictors, a row a case."""
    target = [Fraction(value) for value in y]
    X = [[Fraction(1)] * intercept + [Fraction(value) for value in row] for row in rows]
    n, k = len(X), len(X[0])
    inverse = _inverse(
        [[_dot([r[i] for r in X], [r[j] for r in X]) for j in range(k)] for i in range(k)]
    )
    moments = [_dot([row[i] for row in X], target) for i in range(k)]
    b = [_dot(row, moments) for row in inverse]
    centre = sum(target, Fraction(0)) / n if intercept else Fraction(0)
    ss_total = sum(((v - centre) ** 2 for v in target), Fraction(0))
    ss_error = sum(((v - _dot(r, b)) ** 2 for r, v in zip(X, target, strict=True)), Fraction(0))
    ms = to_mpf(ss_error / (n - k))
    se = tuple(mp.sqrt(ms * to_mpf(inverse[j][j])) for j in range(k))
    ss_model = ss_total - ss_error
    return Refit(n, k - intercept, n - k, tuple(b), se, ss_model, ss_error, ss_total)


def one_way(groups: Sequence[Sequence[str]]) -> Refit:
    """One-way analysis of variance as a fit on indicators of all groups but the first."""
    y = [value for group in groups for value in group]
    rows = [
        [Fraction(i == j) for j in range(1, len(groups))]
        for i, group in enumerate(groups)
        for _ in group
    ]
    return least_squares(y, rows)


def _dot(a: Sequence[Fraction], b: Sequence[Fraction]) -> Fraction:
    return sum((x * y for x, y in zip(a, b, strict=True)), Fraction(0))


def _inverse(matrix: Sequence[Sequence[Fraction]]) -> list[list[Fraction]]:
    k = len(matrix)
    table = [[*row, *(Fraction(i == j) for j in range(k))] for i, row in enumerate(matrix)]
    for i in range(k):
        pivot = next(j for j in range(i, k) if table[j][i])
        table[i], table[pivot] = table[pivot], table[i]
        table[i] = [value / table[i][i] for value in table[i]]
        for j in range(k):
            if j != i and table[j][i]:
                factor = table[j][i]
                table[j] = [a - factor * c for a, c in zip(table[j], table[i], strict=True)]
    return [row[k:] for row in table]


def p_from_f(F: mpf, df1: mpf, df2: mpf) -> mpf:
    """Upper tail of the F distribution (Abramowitz & Stegun 26.6.2)."""
    F, df1, df2 = mpf(F), mpf(df1), mpf(df2)
    return mp.betainc(df2 / 2, df1 / 2, 0, df2 / (df2 + df1 * F), regularized=True)


def p_from_t(t: mpf, df: mpf) -> mpf:
    """Both tails of Student's t distribution (Abramowitz & Stegun 26.7.1)."""
    t, df = mpf(t), mpf(df)
    return mp.betainc(df / 2, mpf(1) / 2, 0, df / (df + t * t), regularized=True)


def p_from_chi2(chi2: mpf, df: mpf) -> mpf:
    """Upper tail of the chi-squared distribution (Abramowitz & Stegun 26.4.19)."""
    return mp.gammainc(mpf(df) / 2, mpf(chi2) / 2, mp.inf, regularized=True)
