"""Numerals: what a literal stands for, and that rounding always stays inside."""

from __future__ import annotations

from decimal import ROUND_HALF_EVEN, ROUND_HALF_UP, Decimal
from fractions import Fraction

import pytest
from hypothesis import given
from hypothesis import strategies as st

from crossfoot.reading.fold import fold
from crossfoot.reading.numerals import bounds, parse, writes_decimal_comma


@pytest.mark.parametrize(
    ("literal", "value"),
    [
        ("3.90", 3.9),
        (".026", 0.026),
        ("-.57", -0.57),
        ("− 2.20", -2.2),
        ("–2.20", -2.2),
        ("10,85", 10.85),
        ("0,026", 0.026),
        (",026", 0.026),
        ("0·03", 0.03),
        ("1,237.76", 1237.76),
        ("1,234,567", 1234567.0),
        ("1.237,76", 1237.76),
        ("1\u202f237", 1237.0),
        ("1\u202f237,5", 1237.5),
        ("1'234.5", 1234.5),
        ("6.8%", 0.068),
        ("6.8 %", 0.068),
        ("18 per cent", 0.18),
        ("18 percent", 0.18),
        ("3.7e-04", 3.7e-4),
        ("2.2E-16", 2.2e-16),
        ("1.6 × 10–5", 1.6e-5),
        ("1.6 x 10-5", 1.6e-5),
        ("7.9×10^{-6}", 7.9e-6),
        ("4.1 × 10⁻¹³", 4.1e-13),
        ("4.1*10^-12", 4.1e-12),
        ("3 × 10(-4)", 3e-4),
        ("10–5", 1e-5),
        ("10^{-4}", 1e-4),
        ("10⁻⁶", 1e-6),
        ("+2.5", 2.5),
    ],
)
def test_value(literal: str, value: float) -> None:
    numeral = parse(fold(literal))
    assert numeral is not None
    assert numeral.value == pytest.approx(value, rel=1e-15)


def test_a_comma_before_three_digits_is_a_thousands_mark_unless_the_text_says_otherwise() -> None:
    thousands, decimal = parse("6,278"), parse("6,278", decimal_comma=True)
    assert thousands is not None
    assert decimal is not None
    assert (thousands.value, decimal.value) == (6278.0, 6.278)


def test_a_point_before_three_digits_groups_where_the_comma_is_decimal() -> None:
    grouped = parse("1.234", decimal_comma=True)
    assert grouped is not None
    assert grouped.value == 1234.0


def test_a_leading_zero_is_never_the_first_group_of_thousands() -> None:
    numeral = parse("0,001")
    assert numeral is not None
    assert numeral.value == 0.001


@pytest.mark.parametrize("text", ["", "x", "1.2.3", "00019", "0123", "1e999", "9" * 41])
def test_what_is_no_numeral(text: str) -> None:
    assert parse(text) is None


def test_counts_are_exact_until_they_have_decimals() -> None:
    count, rounded = parse("57", whole=True), parse("57.0", whole=True)
    assert count is not None
    assert rounded is not None
    assert (count.low, count.high) == (57.0, 57.0)
    assert rounded.low < 57.0 < rounded.high


@pytest.mark.parametrize(
    ("relation", "low", "high"),
    [
        ("=", 0.0255, 0.0265),
        ("<", float("-inf"), 0.026),
        ("≤", float("-inf"), 0.026),
        (">", 0.026, float("inf")),
        ("≥", 0.026, float("inf")),
        ("≈", 0.025, 0.027),
    ],
)
def test_relations(relation: str, low: float, high: float) -> None:
    numeral = parse(".026")
    assert numeral is not None
    assert bounds(relation, numeral) == pytest.approx((low, high), rel=1e-12)


def test_a_whole_number_that_is_about_right_may_be_one_off() -> None:
    numeral = parse("60", whole=True)
    assert numeral is not None
    assert bounds("≈", numeral) == (59.0, 61.0)


@given(
    st.fractions(min_value=-(10**6), max_value=10**6, max_denominator=10**12),
    st.integers(0, 8),
    st.sampled_from([ROUND_HALF_UP, ROUND_HALF_EVEN]),
)
def test_a_rounded_number_stands_for_what_was_rounded(
    true: Fraction, decimals: int, rounding: str
) -> None:
    exact = Decimal(true.numerator) / Decimal(true.denominator)
    literal = str(exact.quantize(Decimal(1).scaleb(-decimals), rounding=rounding))
    if "E" in literal:
        literal = f"{Decimal(literal):f}"
    numeral = parse(literal)
    assert numeral is not None
    assert Fraction(numeral.low) <= true <= Fraction(numeral.high)


@given(st.text(alphabet="0123456789.,' \u00a0+-eE×x*10^{}⁻⁵%·", max_size=24))
def test_any_characters_of_numerals(text: str) -> None:
    numeral = parse(text)
    assert numeral is None or numeral.low <= numeral.value <= numeral.high


@pytest.mark.parametrize(
    ("text", "comma"),
    [
        ("F(1, 10) = 6,278, p = ,031", True),
        ("F(3, 96) = 10,85", True),
        ("t = -2,05", True),
        ("F(1,496) = 118", False),
        ("F(1, 2398) = 1,237.76", False),
        ("N = 1,234", False),
    ],
)
def test_decimal_comma(text: str, comma: bool) -> None:
    assert writes_decimal_comma(text) is comma


@given(st.text())
def test_folding_never_moves_a_place(text: str) -> None:
    assert len(fold(text)) == len(text)


@pytest.mark.parametrize(("literal", "value"), [("1e350", float("inf")), ("-1e350", -float("inf"))])
def test_what_no_float_holds_is_infinite(literal: str, value: float) -> None:
    numeral = parse(literal)
    assert numeral is not None
    assert numeral.value == value
