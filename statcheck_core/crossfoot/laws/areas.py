"""Tail areas of intervals of statistics, with intervals of degrees of freedom, and the reverse.

Imported where a form first needs an area, for it imports SciPy.

The areas fall with the statistic. Those of t and r, and of F with one or two degrees of freedom
above, fall with the degrees of freedom of the error, and that of χ² rises with its own (Ghosh
1973, Journal of the Royal Statistical Society B 35, 480–492), so that corners are exact. The
other areas of F turn, and there the two parameters of I_y(a, b), which falls with a and rises
with b and y, are bounded apart, on slices narrow enough for it not to matter.
"""

from __future__ import annotations

import math
from collections.abc import Callable, Iterator
from functools import lru_cache

from crossfoot.laws import tails
from crossfoot.laws.interval import EVERYTHING, Interval, outward

#: Relative slack of areas: above :data:`crossfoot.laws.tails.ERROR`.
SLACK = 1e-10

#: Areas below this are close to underflow, where a relative error says nothing.
_LEAST = 1e-300

_SHARE = Interval(0.0, 1.0)
_SLICES = 16


def _area(low: float, high: float) -> Interval:
    """Return an interval of areas from its computed bounds."""
    low = low if low >= _LEAST else 0.0
    high = max(high, _LEAST) if high == high else 1.0
    return outward(low, high, SLACK)


def of_f(f: Interval, df1: Interval, df2: Interval) -> Interval:
    """Return the areas of F beyond ``f``."""
    if df1.low == df1.high and (df2.low == df2.high or df1.low in (1.0, 2.0)):
        return _area(tails.f_tail(f.high, df1.low, df2.high), tails.f_tail(f.low, df1.low, df2.low))
    if not _sliceable(df1, df2):
        return _SHARE
    low, high = 1.0, 0.0
    for one, two in _slices(df1, df2):
        low = min(low, _beta_area(two.high, one.low, one.high * f.high, two.low))
        high = max(high, _beta_area(two.low, one.high, one.low * f.low, two.high))
    return _area(low, high)


def _beta_area(twice_a: float, twice_b: float, above: float, below: float) -> float:
    """Return I_y(a, b) for y = below/(below + above)."""
    ratio = above / below
    if ratio == math.inf:
        return 0.0
    y = 1 / (1 + ratio)
    return tails.beta_area(twice_a / 2, twice_b / 2, y, ratio * y)


def _sliceable(*dfs: Interval) -> bool:
    """Whether degrees of freedom are known well enough for slices to say anything."""
    return all(tails.NONE < df.low <= df.high <= min(2 * df.low, tails.ENDLESS / 2) for df in dfs)


def _slices(df1: Interval, df2: Interval) -> Iterator[tuple[Interval, Interval]]:
    both = df1.low < df1.high and df2.low < df2.high
    number = _SLICES // 2 if both else _SLICES
    seconds = list(_cut(df2, number))
    for one in _cut(df1, number):
        for two in seconds:
            yield one, two


def _cut(df: Interval, number: int) -> Iterator[Interval]:
    if df.low == df.high:
        yield df
        return
    edges = [df.low + (df.high - df.low) * i / number for i in range(number)] + [df.high]
    for i in range(number):
        yield Interval(edges[i], edges[i + 1])


def of_t(t: Interval, df: Interval) -> Interval:
    """Return the areas of t beyond ``t`` on both sides."""
    near, far = _sizes(t)
    return _area(tails.t_tails(far, df.high), tails.t_tails(near, df.low))


def of_r(r: Interval, df: Interval) -> Interval:
    """Return the areas of a correlation beyond ``r`` on both sides."""
    near, far = _sizes(r)
    return _area(tails.r_tails(far, df.high), tails.r_tails(near, df.low))


def of_z(z: Interval) -> Interval:
    """Return the areas of the normal distribution beyond ``z`` on both sides."""
    near, far = _sizes(z)
    return _area(tails.z_tails(far), tails.z_tails(near))


def of_chi2(chi2: Interval, df: Interval) -> Interval:
    """Return the areas of χ² beyond ``chi2``."""
    return _area(tails.chi2_tail(chi2.high, df.low), tails.chi2_tail(chi2.low, df.high))


def _sizes(a: Interval) -> tuple[float, float]:
    """Return the least and the largest magnitude."""
    near = 0.0 if a.low < 0 < a.high else min(abs(a.low), abs(a.high))
    return near, max(abs(a.low), abs(a.high))


def to_f(p: Interval, df1: Interval, df2: Interval) -> Interval:
    """Return the F beyond which the areas are ``p``."""
    if df1.low == df1.high and (df2.low == df2.high or df1.low in (1.0, 2.0)):
        return _statistics(
            p,
            lambda f, df: tails.f_tail(f, df1.low, df),
            lambda area, df: tails.f_at(area, df1.low, df),
            df2,
        )
    if not _sliceable(df1, df2):
        return EVERYTHING
    low, high = math.inf, 0.0
    for one, two in _slices(df1, df2):
        # With z = df1·F/df2, the area falls with z and df2 and rises with df1.
        least = _to_ratio(p.high, one.low, two.high, tails.below)
        most = _to_ratio(p.low, one.high, two.low, tails.above)
        low = min(low, least * two.low / one.high)
        high = max(high, most * two.high / one.low)
    return outward(low, high, SLACK)


def _to_ratio(
    p: float,
    df1: float,
    df2: float,
    bound: Callable[[Callable[[float], float], float, float], float],
) -> float:
    """Return a bound on df1·F/df2 at the area ``p``."""
    return bound(lambda f: tails.f_tail(f, df1, df2), tails.f_at(p, df1, df2), p) * df1 / df2


def to_t(p: Interval, df: Interval) -> Interval:
    """Return the magnitudes of t beyond which, on both sides, the areas are ``p``."""
    return _statistics(p, tails.t_tails, tails.t_at, df)


def to_r(p: Interval, df: Interval) -> Interval:
    """Return the magnitudes of a correlation beyond which, on both sides, the areas are ``p``."""
    found = _statistics(p, lambda r, d: tails.r_tails(min(r, 1.0), d), tails.r_at, df)
    return Interval(found.low, min(found.high, 1.0))


def to_z(p: Interval) -> Interval:
    """Return the magnitudes of z beyond which, on both sides, the areas are ``p``."""
    return _statistics(
        p, lambda z, _: tails.z_tails(z), lambda area, _: tails.z_at(area), Interval(1.0, 1.0)
    )


def to_chi2(p: Interval, df: Interval) -> Interval:
    """Return the χ² beyond which the areas are ``p``."""
    return _statistics(p, tails.chi2_tail, tails.chi2_at, Interval(df.high, df.low))


def _statistics(
    p: Interval,
    tail: Callable[[float, float], float],
    at: Callable[[float, float], float],
    df: Interval,
) -> Interval:
    """Return the statistics whose areas are ``p``, where the areas fall from df.low to df.high."""
    low = tails.below(lambda x: tail(x, df.high), at(p.high, df.high), p.high)
    high = tails.above(lambda x: tail(x, df.low), at(p.low, df.low), p.low)
    return Interval(low, high)


#: Degrees of freedom at which t is normal.
NORMAL = Interval(math.inf, math.inf)


@lru_cache(maxsize=4096)
def critical(level: Interval, df: Interval) -> Interval:
    """Return the t that an interval of confidence ``level`` takes on each side."""
    return to_t(Interval(1 - level.high, 1 - level.low), df)
