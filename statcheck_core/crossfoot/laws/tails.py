"""Tail areas of the reference distributions, and their inverses.

The only module that imports SciPy; it is imported where a form first needs an area. All take
and give plain floats, accept any degrees of freedom (fractions, infinity), and neither raise nor
warn: what has no value is not-a-number. Relative errors stay below :data:`ERROR`, far out in the
tails too, which is why no area is ever taken as one less another (see
``tests/laws/test_tails.py`` for the comparison with 50-digit arithmetic).

Everything rests on the regularised incomplete beta and gamma functions: the area of F beyond f is
I_y(df2/2, df1/2) with y = df2/(df2 + df1·f), that of t² is the case df1 = 1
(NIST/SEMATECH e-Handbook of Statistical Methods 1.3.6.6; Abramowitz and Stegun 1964, 26.5, 26.6).
"""

from __future__ import annotations

import math
from collections.abc import Callable

from scipy.special import (
    betainc,
    betaincc,
    betainccinv,
    betaincinv,
    gammainc,
    gammaincc,
    gammainccinv,
    ndtr,
    ndtri,
    stdtr,
)

#: Relative error that the areas stay below.
ERROR = 3e-11

#: Areas below this are computed by way of logarithms, for SciPy's underflow on the way.
_DEEP = 1e-200

#: Degrees of freedom that are not above this are not told from none.
NONE = 1e-9

#: Degrees of freedom beyond this differ from infinite ones by less than :data:`ERROR`.
ENDLESS = 1e18

#: Beyond this ratio of sums of squares, the beta variable is next to underflow.
_VAST = 1e280


def beta_area(a: float, b: float, y: float, x: float) -> float:
    """Return the area below ``y`` of the beta distribution with parameters a and b.

    ``x`` is 1 − y; both are passed so that neither loses digits. The parameters are positive and
    finite.
    """
    area = float(betainc(a, b, y)) if y < x else float(betaincc(b, a, x))
    if area > _DEEP or y <= 0 or x <= 0:
        return area
    log_y = math.log1p(-x) if x < y else math.log(y)
    return _deep(a, b, log_y, math.log(x) if x < y else math.log1p(-y))


def _deep(a: float, b: float, log_y: float, log_x: float) -> float:
    """Return the area far below the bulk of a beta distribution, where SciPy's underflows.

    It is yᵃ xᵇ / (a B(a, b)) times a continued fraction (Abramowitz and Stegun 1964, 26.5.8).
    """
    exponent = a * log_y + b * log_x - math.log(a) - math.lgamma(b) + _log_gamma_ratio(a, b)
    if exponent < -800:
        return 0.0
    return math.exp(exponent + math.log(_fraction(a, b, math.exp(log_y))))


def _log_gamma_ratio(a: float, b: float) -> float:
    """Return the logarithm of Γ(a + b)/Γ(a), without loss of digits for large a."""
    if a < 30:
        return math.lgamma(a + b) - math.lgamma(a)
    spread = (a - 0.5) * math.log1p(b / a) + b * math.log(a + b) - b
    return spread + _stirling(a + b) - _stirling(a)


def _stirling(x: float) -> float:
    """Return the remainder of Stirling's formula for x ≥ 30."""
    square = x * x
    return (1 / 12 - (1 / 360 - (1 / 1260 - 1 / 1680 / square) / square) / square) / x


def _fraction(a: float, b: float, y: float) -> float:
    """Return the continued fraction of 26.5.8, by Lentz's method."""
    front = 1.0
    value = back = 1 / (1 - (a + b) * y / (a + 1))
    for m in range(1, 10_000):
        even = m * (b - m) * y / ((a + 2 * m - 1) * (a + 2 * m))
        odd = -(a + m) * (a + b + m) * y / ((a + 2 * m) * (a + 2 * m + 1))
        for term in (even, odd):
            back = 1 / (1 + term * back)
            front = 1 + term / front
            value *= front * back
        if abs(front * back - 1) < 1e-16:
            return value
    return math.nan  # it has not settled


def f_tail(f: float, df1: float, df2: float) -> float:
    """Return the area of F beyond ``f``."""
    if not (df1 > NONE and df2 > NONE and f == f):
        return math.nan
    if f <= 0:
        return 1.0
    if f == math.inf:
        return 0.0
    if df2 >= ENDLESS:
        return chi2_tail(df1 * f, df1) if df1 < ENDLESS else math.nan
    if df1 >= ENDLESS:
        return float(gammainc(df2 / 2, df2 / f / 2))
    ratio = df1 / df2 * f
    if ratio > _VAST:
        return _deep(df2 / 2, df1 / 2, math.log(df2) - math.log(df1) - math.log(f), 0.0)
    y = 1 / (1 + ratio)
    return beta_area(df2 / 2, df1 / 2, y, ratio * y)


def t_tails(t: float, df: float) -> float:
    """Return the area of t beyond ``abs(t)`` on both sides."""
    t = abs(t)
    if not df > NONE or t != t:
        return math.nan
    if t < 1e100:
        return 2 * float(stdtr(df, -t))
    if t == math.inf or df >= ENDLESS:
        return 0.0
    return _deep(df / 2, 0.5, math.log(df) - 2 * math.log(t), 0.0)


def r_tails(r: float, df: float) -> float:
    """Return the area of a correlation beyond ``abs(r)`` on both sides, where none exists.

    It is that of t = r√(df/(1 − r²)).
    """
    r = abs(r)
    if not (df > NONE and r <= 1):
        return math.nan
    if df >= ENDLESS:
        return t_tails(r * math.sqrt(df), df) if df < math.inf else float(r == 0)
    return beta_area(df / 2, 0.5, (1 - r) * (1 + r), r * r)


def chi2_tail(chi2: float, df: float) -> float:
    """Return the area of χ² beyond ``chi2``."""
    if not (df > NONE and chi2 == chi2):
        return math.nan
    if chi2 <= 0:
        return 1.0
    if df == math.inf:
        return float(chi2 < math.inf)
    return float(gammaincc(df / 2, chi2 / 2))


def z_tails(z: float) -> float:
    """Return the area of the normal distribution beyond ``abs(z)`` on both sides."""
    return 2 * float(ndtr(-abs(z)))


def f_at(p: float, df1: float, df2: float) -> float:
    """Return the F beyond which the area is ``p``, nearly; see :func:`below` for a sure bound."""
    if not (0 <= p <= 1 and df1 > NONE and df2 > NONE):
        return math.nan
    if p in (0, 1):
        return 0.0 if p else math.inf
    if df1 >= ENDLESS:
        return math.nan
    if df2 >= ENDLESS:
        return chi2_at(p, df1) / df1
    y = float(betaincinv(df2 / 2, df1 / 2, p))
    x = float(betainccinv(df1 / 2, df2 / 2, p))
    if min(x, y) * _VAST > 1:
        return df2 / df1 * x / y
    return _search(lambda f: f_tail(f, df1, df2), p)


def _search(tail: Callable[[float], float], p: float) -> float:
    """Return the value beyond which the area is ``p``, by halving its exponent.

    SciPy's inverses fail far out here and there, or would underflow.
    """
    low, high = -740.0, 709.0
    while high - low > 1e-13 * max(1.0, abs(low)):
        middle = (low + high) / 2
        if tail(math.exp(middle)) > p:
            low = middle
        else:
            high = middle
    return math.exp(low)


def t_at(p: float, df: float) -> float:
    """Return the t beyond which, on both sides together, the area is ``p``, nearly."""
    return z_at(p) if df >= ENDLESS else math.sqrt(f_at(p, 1.0, df))


def r_at(p: float, df: float) -> float:
    """Return the correlation beyond which, on both sides together, the area is ``p``, nearly."""
    if not (0 <= p <= 1 and NONE < df < ENDLESS):
        return math.nan
    return math.sqrt(float(betainccinv(0.5, df / 2, p)))


def chi2_at(p: float, df: float) -> float:
    """Return the χ² beyond which the area is ``p``, nearly."""
    if not (0 <= p <= 1 and NONE < df < math.inf):
        return math.nan
    return 2 * float(gammainccinv(df / 2, p))


def z_at(p: float) -> float:
    """Return the z beyond which, on both sides together, the area is ``p``, nearly."""
    return -float(ndtri(p / 2)) if 0 <= p <= 1 else math.nan


def below(tail: Callable[[float], float], guess: float, p: float) -> float:
    """Return a value that is surely not above the one beyond which the area is ``p``.

    Parameters
    ----------
    tail
        A falling tail area of values from zero up, with the error :data:`ERROR`.
    guess
        About the value.
    p
        The area.

    Returns
    -------
    float
        A value as close to the true one as the error allows; zero where no other is sure.
    """
    if not guess > 0:
        return 0.0
    enough = p * (1 + ERROR)
    step = 1e-11
    while step < 1:
        value = guess * (1 - step)
        if tail(value) >= enough:
            return value
        step *= 4
    return 0.0


def above(tail: Callable[[float], float], guess: float, p: float) -> float:
    """Return a value that is surely not below the one beyond which the area is ``p``.

    As :func:`below`; infinity where no other value is sure.
    """
    if not guess < math.inf:
        return math.inf
    enough = p * (1 - ERROR)
    step = 1e-11
    while step < 1e12:
        value = guess * (1 + step) if guess > 0 else step
        if tail(value) <= enough:
            return value
        step *= 4
    return math.inf
