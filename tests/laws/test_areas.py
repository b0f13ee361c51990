"""Areas of intervals, above all those with intervals of degrees of freedom."""

from __future__ import annotations

import math
from random import Random

import pytest
from hypothesis import given, settings
from hypothesis import strategies as st

from crossfoot.laws import areas, tails
from crossfoot.laws.interval import EVERYTHING, Interval


def point(value: float) -> Interval:
    return Interval(value, value)


def rounded(value: float, decimals: int) -> Interval:
    half = 0.5 * 10**-decimals
    return Interval(round(value, decimals) - half, round(value, decimals) + half)


def inside(interval: Interval, rng: Random) -> float:
    return rng.choice((interval.low, interval.high, rng.uniform(*interval)))


@given(seed=st.integers(0, 2**32))
@settings(max_examples=300, deadline=None)
def test_holds_every_f_of_adjusted_degrees(seed):
    rng = Random(seed)
    df1 = rng.choice(
        (
            point(rng.randint(1, 4)),
            rounded(rng.uniform(1.1, 9), rng.randint(1, 2)),
            Interval(1.0, 1.0 + rng.random()),
        )
    )
    df2 = rng.choice((point(rng.uniform(2, 90)), rounded(rng.uniform(2, 90), rng.randint(0, 2))))
    f = rounded(rng.choice((rng.uniform(0.2, 2), rng.uniform(1, 30))), 2)
    area = areas.of_f(f, df1, df2)
    for _ in range(20):
        p = tails.f_tail(inside(f, rng), inside(df1, rng), inside(df2, rng))
        assert area.low <= p <= area.high
    level = Interval(*sorted((rng.random() ** 6, rng.random() ** 6)))
    found = areas.to_f(level, df1, df2)
    for _ in range(20):
        value = tails.f_at(inside(level, rng), inside(df1, rng), inside(df2, rng))
        assert found.low <= value * (1 + 1e-9)
        assert value * (1 - 1e-9) <= found.high


def test_slices_cost_little_precision():
    area = areas.of_f(rounded(6.77, 2), rounded(1.62, 2), rounded(47.10, 2))
    corners = [
        tails.f_tail(f, a, b)
        for f in (6.765, 6.775)
        for a in (1.615, 1.625)
        for b in (47.095, 47.105)
    ]
    assert area.low >= min(corners) * 0.997
    assert area.high <= max(corners) * 1.003


@pytest.mark.parametrize(
    ("df1", "df2"),
    [
        (Interval(3.0, 3.0), Interval(0.0, math.inf)),
        (Interval(1.0, 3.0), Interval(57.0, 57.0)),
        (Interval(0.0, 0.0), Interval(57.0, 58.0)),
        (Interval(3.0, 4.0), Interval(1e18, 1e18)),
    ],
)
def test_unknown_degrees_say_nothing(df1, df2):
    assert areas.of_f(Interval(2.0, 3.0), df1, df2) == Interval(0.0, 1.0)
    assert areas.to_f(Interval(0.01, 0.02), df1, df2) == EVERYTHING


def test_a_vast_f_has_no_area():
    area = areas.of_f(Interval(2.0, math.inf), Interval(2.9, 3.1), Interval(9.0, 9.0))
    assert area.low == 0.0
    assert area.high < 0.2


def test_one_degree_above_is_exact_for_any_degrees_below():
    area = areas.of_f(Interval(4.0, 4.0), point(1.0), Interval(10.0, math.inf))
    assert area.low == pytest.approx(tails.z_tails(2.0), rel=1e-9)
    assert area.high == pytest.approx(tails.t_tails(2.0, 10.0), rel=1e-9)


@given(seed=st.integers(0, 2**32))
@settings(max_examples=200, deadline=None)
def test_monotone_in_degrees(seed):
    """Ghosh 1973: areas fall with the error's df for t, r and F(1, ·), F(2, ·), rise for χ²."""
    rng = Random(seed)
    few, more = sorted(10 ** rng.uniform(-0.5, 6) for _ in range(2))
    x, r, tiny = 10 ** rng.uniform(-4, 1.5), rng.random(), 1 + 1e-11
    assert tails.t_tails(x, few) * tiny >= tails.t_tails(x, more)
    assert tails.r_tails(r, few) * tiny >= tails.r_tails(r, more)
    assert tails.f_tail(x, 2.0, few) * tiny >= tails.f_tail(x, 2.0, more)
    assert tails.chi2_tail(x, few) <= tails.chi2_tail(x, more) * tiny


def test_critical_values_of_unknown_degrees():
    found = areas.critical(point(0.95), Interval(0.0, math.inf))
    assert found.low == pytest.approx(1.959963984540054, rel=1e-9)
    assert found.high == math.inf
