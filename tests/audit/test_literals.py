"""Numerals taken apart and written again in the same hand."""

from __future__ import annotations

import math

import pytest
from hypothesis import given
from hypothesis import strategies as st

from audit.notation import reading
from crossfoot.audit.literals import Numeral, numeral, numerals, written
from crossfoot.model import Reading, Span


def taken(literal: str, quantity: str = "b", relation: str = "=") -> Numeral:
    found = numeral(reading(quantity, relation, literal))
    assert found is not None
    return found


@pytest.mark.parametrize(
    ("literal", "value", "unit"),
    [
        (".026", 0.026, 0.001),
        ("10,85", 10.85, 0.01),
        ("6.8%", 0.068, 0.001),
        ("6,8 %", 0.068, 0.001),
        ("1,237.76", 1237.76, 0.01),
        ("-0.45", -0.45, 0.01),
        ("−0.45", -0.45, 0.01),
        ("60", 60, 1),
        ("3.7e-04", 3.7e-4, 1e-5),
        ("1.6 × 10^{-5}", 1.6e-5, 1e-6),
        (".000", 0, 0.001),
        ("2.5e3", 2500, 100),
    ],
)
def test_a_numeral_is_what_the_reading_says(literal: str, value: float, unit: float) -> None:
    found = taken(literal)
    assert found.value == pytest.approx(value, rel=1e-12)
    assert found.unit == pytest.approx(unit, rel=1e-12)
    assert found.text == literal


def test_the_interval_settles_what_a_comma_is() -> None:
    thousands = Reading("n", "=", "1,237", 1237.0, 1237.0, Span(0, 5))
    decimals = Reading("b", "=", "1,237", 1.2365, 1.2375, Span(0, 5))
    assert numeral(thousands) == Numeral("", "1237", "", "", "", 0, ",", 0.0)
    assert numeral(decimals) == Numeral("", "1", ",", "237", "", 0, "", 0.5)


def test_other_thousands_marks() -> None:
    for literal in ("1'237", "1 237", "1.237"):
        found = numeral(Reading("n", "=", literal, 1237.0, 1237.0, Span(0, 5)))
        assert found is not None
        assert (found.value, found.text) == (1237.0, literal)


def test_a_percentage_may_be_said_in_words() -> None:
    found = numeral(Reading("R2", "=", "6.8", 0.0675, 0.0685, Span(0, 3)))
    assert found is not None
    assert (found.value, found.text) == (pytest.approx(0.068), "6.8")


@pytest.mark.parametrize(
    "literal", ["***", "", "1.2.3.4", "1.2,3·4", "three", "4" * 41, "10^{-6}", "7 apples"]
)
def test_what_is_no_plain_numeral_is_left_alone(literal: str) -> None:
    assert numeral(Reading("p", "<", literal, -math.inf, 1e-6, Span(0, 1))) is None


@pytest.mark.parametrize("literal", ["1e-400", "1e400", "3.7e-320"])
def test_what_no_float_can_hold_is_left_alone(literal: str) -> None:
    assert numeral(Reading("F", "=", literal, 0.0, math.inf, Span(0, 1))) is None


def test_a_numeral_that_its_interval_contradicts_is_left_alone() -> None:
    assert numeral(Reading("p", "=", ".05", 0.2, 0.3, Span(0, 3))) is None
    assert numeral(Reading("p", "=", ".05", 0.0, 0.1, Span(0, 3))) is None


@pytest.mark.parametrize(
    ("relation", "low", "high"), [("<", 0, 0.05), ("≤", 0, 0.05), (">", 0.05, math.inf)]
)
def test_a_bound_is_a_half_line(relation: str, low: float, high: float) -> None:
    interval = taken(".05", "p", relation).interval(relation, 0.0)
    assert tuple(interval) == (low, high)


def test_an_approximation_keeps_its_width() -> None:
    low, high = taken(".03", "p", "≈").interval("≈")
    assert (low, high) == (pytest.approx(0.02), pytest.approx(0.04))


def test_nothing_lies_below_the_least_value() -> None:
    assert taken(".00", "p").interval("=", 0.0).low == 0


@pytest.mark.parametrize(
    ("like", "number", "text"),
    [
        (".026", 0.0123, ".012"),
        (".026", 1.5, "1.500"),
        ("0.026", 0.0123, "0.012"),
        ("10,85", 0.5, "0,50"),
        ("6.8%", 0.0712, "7.1%"),
        ("1,237.76", 98765.4321, "98,765.43"),
        ("−0.45", -0.1, "−0.10"),
        ("0.45", -0.1, "-0.10"),
        ("0.45", -0.0001, "0.00"),
        ("60", 57, "57"),
        ("3.7e-04", 0.0123, "1.2e-02"),
        ("3.7e-04", 120.0, "1.2e02"),
        ("1.6 × 10^{-5}", 2.5e-7, "2.5 × 10^{-7}"),
        ("3.7e-04", 0.0, "0.0e-04"),
        ("1.0e-310", 0.0, "0.0e-310"),
        ("5", 0.25, "0"),
    ],
)
def test_another_number_in_the_same_hand(like: str, number: float, text: str) -> None:
    assert written(number, taken(like)).text == text


def test_other_decimals_and_another_minus() -> None:
    assert written(-0.12345, taken("0.45"), 4, "–").text == "–0.1235"
    assert written(0.25, taken("5"), 2).text == "0.25"


def test_a_share_above_one_follows_its_neighbours() -> None:
    bare = numerals([reading("p", "=", "8.39"), reading("R2", "=", ".21")])
    zero = numerals([reading("p", "=", "8.39"), reading("R2", "=", "0.21")])
    other = numerals([reading("F", "=", "8.39"), reading("R2", "=", ".21")])
    lost = numerals([Reading("p", "=", "*", 0.0, 0.05, Span(0, 1)), reading("R2", "=", ".21")])
    assert [written(0.5, n[0]).text for n in (bare, zero, other) if n[0]] == [
        ".50",
        "0.50",
        "0.50",
    ]
    assert lost[0] is None


@given(
    st.decimals(-10000, 10000, places=3),
    st.sampled_from(["{}", "{}%", "{}e-3"]),
    st.booleans(),
)
def test_taking_apart_and_writing_is_the_identity(number, form: str, bare: bool) -> None:
    literal = form.format(number)
    if bare and literal.lstrip("-").startswith("0."):
        literal = literal.replace("0.", ".", 1)
    found = taken(literal)
    printed = reading("b", "=", literal)
    assert found.text == literal
    low, high = found.interval("=")
    assert low == pytest.approx(printed.low, abs=found.unit * 1e-6)
    assert high == pytest.approx(printed.high, abs=found.unit * 1e-6)
