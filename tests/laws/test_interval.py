"""Intervals and their arithmetic, against exact fractions."""

from __future__ import annotations

import math
from fractions import Fraction

import pytest
from hypothesis import assume, given
from hypothesis import strategies as st

from crossfoot.laws import arithmetic as a
from crossfoot.laws.interval import EVERYTHING, Interval, image, meet, outward

numbers = st.one_of(
    st.sampled_from((0.0, 1.0, -1.0, 0.5, 1e-100, 1e100)),
    st.floats(-1e6, 1e6, allow_nan=False).filter(lambda x: x == 0 or abs(x) > 1e-100),
)


@st.composite
def intervals(draw, low=-1e6):
    first, second = sorted((draw(numbers), draw(numbers)))
    assume(first >= low)
    return Interval(first, second)


@st.composite
def members(draw, low=-1e6):
    """An interval with an exact number inside it."""
    interval = draw(intervals(low))
    share = Fraction(draw(st.integers(0, 64)), 64)
    at = Fraction(interval.low) + share * (Fraction(interval.high) - Fraction(interval.low))
    return interval, at


def holds(interval: Interval, value: Fraction) -> bool:
    below = interval.low == -math.inf or Fraction(interval.low) <= value
    above = interval.high == math.inf or value <= Fraction(interval.high)
    return below and above


@given(members(), members())
def test_sums_products_and_quotients_hold_what_they_should(first, second):
    (x, inx), (y, iny) = first, second
    assert holds(a.add(x, y), inx + iny)
    assert holds(a.subtract(x, y), inx - iny)
    assert holds(a.multiply(x, y), inx * iny)
    assert holds(a.square(x), inx * inx)
    assert holds(a.complement(x), 1 - inx)
    assert holds(a.magnitude(x), abs(inx))
    assert holds(a.negative(x), -inx)
    assert holds(a.middle(x, y), (inx + iny) / 2)
    assert holds(a.half_width(x, y), abs(inx - iny) / 2)
    if iny:
        assert holds(a.divide(x, y), inx / iny)


@given(members(low=0))
def test_functions_of_positive_numbers(pair):
    x, inside = pair
    assert holds(a.share(x), inside / (1 + inside))
    low, high = a.root(x)
    assert Fraction(low) ** 2 <= inside <= Fraction(high) ** 2
    if inside < 1 and x.high <= 1:
        assert holds(a.odds(x), inside / (1 - inside))


@given(intervals(), intervals())
def test_hull_and_meet(x, y):
    hull = a.hull(x, y)
    assert meet(hull, x) == x
    assert meet(hull, y) == y
    common = meet(x, y)
    assert common == meet(y, x)
    if common is None:
        assert x.high < y.low or y.high < x.low
    else:
        assert meet(common, x) == common


def test_exponential_and_logarithm_undo_each_other():
    there = a.exponential(Interval(-2.0, 3.0))
    back = a.logarithm(there)
    assert back.low == pytest.approx(-2.0)
    assert back.low <= -2.0
    assert back.high == pytest.approx(3.0)
    assert back.high >= 3.0
    assert a.exponential(Interval(-math.inf, 1e4)) == Interval(0.0, math.inf)
    assert a.logarithm(Interval(0.0, math.inf)) == EVERYTHING
    assert a.logarithm(Interval(1.0, 1.0)).low < 0 < a.logarithm(Interval(1.0, 1.0)).high


@pytest.mark.parametrize(
    ("found", "expected"),
    [
        (a.divide(Interval(1.0, 2.0), Interval(0.0, 4.0)), Interval(0.25, math.inf)),
        (a.divide(Interval(-2.0, -1.0), Interval(0.0, 4.0)), Interval(-math.inf, -0.25)),
        (a.divide(Interval(1.0, 2.0), Interval(-4.0, 0.0)), Interval(-math.inf, -0.25)),
        (a.divide(Interval(1.0, 2.0), Interval(-4.0, 1.0)), EVERYTHING),
        (a.divide(Interval(-1.0, 2.0), Interval(0.0, 4.0)), EVERYTHING),
        (a.divide(Interval(0.0, 2.0), Interval(0.0, 0.0)), Interval(0.0, math.inf)),
        (a.divide(Interval(0.0, math.inf), Interval(1.0, math.inf)), Interval(0.0, math.inf)),
        (a.multiply(Interval(0.0, 1.0), Interval(2.0, math.inf)), Interval(0.0, math.inf)),
        (a.multiply(Interval(0.0, 0.0), EVERYTHING), Interval(0.0, 0.0)),
        (a.add(Interval(0.0, math.inf), Interval(-math.inf, 1.0)), EVERYTHING),
        (a.add(Interval(math.inf, math.inf), Interval(-math.inf, -math.inf)), EVERYTHING),
        (a.add(Interval(math.inf, math.inf), Interval(1.0, 1.0)), Interval(math.inf, math.inf)),
        (a.odds(Interval(0.0, 1.0)), Interval(0.0, math.inf)),
        (a.share(Interval(0.0, math.inf)), Interval(0.0, 1.0)),
        (a.root(Interval(-3.0, 4.0)), Interval(0.0, 2.0)),
        (a.square(Interval(-3.0, 2.0)), Interval(0.0, 9.0)),
        (a.square(Interval(-3.0, -2.0)), Interval(4.0, 9.0)),
        (a.magnitude(Interval(-3.0, 2.0)), Interval(0.0, 3.0)),
        (a.reciprocal(Interval(0.0, 0.5)), Interval(2.0, math.inf)),
        (a.at_least(Interval(2.0, 3.0)), Interval(2.0, math.inf)),
        (a.at_most(Interval(2.0, 3.0)), Interval(-math.inf, 3.0)),
        (a.between(Interval(1.0, 2.0), Interval(3.0, 4.0)), Interval(1.0, 4.0)),
        (a.between(Interval(3.0, 4.0), Interval(1.0, 2.0)), EVERYTHING),
        (outward(math.nan, math.nan), EVERYTHING),
        (outward(math.inf, -math.inf), Interval(math.inf, -math.inf)),
        (outward(1.0, 2.0, 0.5), Interval(0.5, 3.0)),
        (outward(-1.0, -2.0, 0.5), Interval(-1.5, -1.0)),
        (
            image(lambda x, y: x - y, "+-", Interval(1.0, 2.0), Interval(3.0, 5.0), slack=0.0),
            Interval(-4.0, -1.0),
        ),
    ],
)
def test_edges(found, expected):
    assert found.low == pytest.approx(expected.low, rel=1e-13)
    assert found.high == pytest.approx(expected.high, rel=1e-13)


def test_image_needs_a_sign_for_each_argument():
    with pytest.raises(ValueError, match="zip"):
        image(lambda x, y: x + y, "+", Interval(0.0, 1.0), Interval(0.0, 1.0))
