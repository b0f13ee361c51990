"""Intervals and readings in words."""

from __future__ import annotations

import doctest
import math
import re

import pytest
from hypothesis import given
from hypothesis import strategies as st

from audit.notation import claim, reading
from crossfoot.audit import audit_claim, wording
from crossfoot.audit.literals import numeral
from crossfoot.audit.wording import (
    PLAIN,
    between,
    listed,
    named,
    phrase,
    plural,
    printed,
    subjects,
)
from crossfoot.laws.interval import Interval
from crossfoot.scan import claims_of


def said(low: float, high: float, like: str = "", apart: tuple[float, float] | None = None) -> str:
    hand = numeral(reading("b", "=", like)) if like else PLAIN
    assert hand is not None
    return between(Interval(low, high), hand, Interval(*apart) if apart else None)


@pytest.mark.parametrize(
    ("low", "high", "like", "words"),
    [
        (0.001382, 0.001394, ".002", "between .0013 and .0014"),
        (0.001382, 0.001394, "0.002", "between 0.0013 and 0.0014"),
        (0.001382, 0.001394, "0,002", "between 0,0013 and 0,0014"),
        (7.4049, 7.4151, "7.4", "between 7.40 and 7.42"),
        (0.2099, 0.2102, "45.8%", "between 20.99% and 21.02%"),
        (-3.25, -3.1, "3.1", "between −3.25 and −3.10"),
        (-0.001, 0.002, "3.1", "between −0.0010 and 0.0020"),
        (60.0, 60.0, "57", "= 60"),
        (59.9999999999, 60.0000000001, "57", "= 60"),
        (60, math.inf, "57", "at least 60"),
        (-math.inf, 0.0123, ".05", "at most .013"),
        (-math.inf, 5e-5, ".05", "at most .00005"),
        (-math.inf, 0.0, ".05", "at most 0"),
        (1e-9, 0.003, ".05", "at most .003"),
        (1.21e-9, 1.33e-9, ".05", "between 1.2e-9 and 1.4e-9"),
        (-1.21e-9, 0.0, "0.05", "between −1.3e-9 and 0"),
        (0, 1, "1.2", "between 0 and 1"),
        (5e-324, math.inf, "57", "at least 0"),
        (58, 61, "57", "between 58 and 61"),
        (math.inf, math.inf, "1.2", "beyond all bounds"),
        (-math.inf, math.inf, "1.2", "of any value"),
        (-math.inf, -math.inf, "1.2", "beyond all bounds"),
        (0.0485, 0.0491, "", "between 0.0485 and 0.0491"),
        (3.335, 3.3739, "", "between 3.335 and 3.374"),
        (120.0, 340.5, "", "between 120 and 341"),
        (3.7e-05, 4.1e-05, "3.7e-04", "between 3.7e-5 and 4.1e-5"),
        (0.000371, 0.00042, "3.7e-04", "between 0.00037 and 0.00042"),
    ],
)
def test_intervals(low: float, high: float, like: str, words: str) -> None:
    assert said(low, high, like) == words


def test_enough_digits_to_be_told_apart() -> None:
    assert said(0.00149, 0.00149999, ".002") == "between .0014 and .0015"
    assert said(0.00149, 0.00149999, ".002", (0.0015, 0.0025)) == "between .00149000 and .00149999"
    assert said(-math.inf, 0.01499, ".02", (0.015, 0.025)) == "at most .01499"
    assert said(0.02501, math.inf, ".02", (0.015, 0.025)) == "at least .02501"
    assert said(0.2099, 0.2149999, "22%", (0.215, 0.225)) == "between 20.99000% and 21.49999%"


def test_intervals_that_cannot_be_told_apart_stop_somewhere() -> None:
    assert len(said(0.1, 0.2, ".2", (0.15, 0.25))) < 50


@given(
    st.floats(-1e6, 1e6).filter(lambda x: x == 0 or abs(x) > 1e-200),
    st.floats(1e-12, 1e4),
    st.sampled_from(["0.12", "7.1", ".05", "57", ""]),
)
def test_what_is_shown_never_says_more_than_is_known(low: float, width: float, like: str) -> None:
    high = low + width
    words = said(low, high, like)
    numbers = [float(x.replace("−", "-")) for x in re.findall(r"−?\d*\.?\d+(?:e-?\d+)?", words)]
    slack = 2e-9 * max(abs(low), abs(high), 1e-300)
    if words.startswith("between"):
        assert numbers[0] <= low + slack
        assert numbers[1] >= high - slack
    elif words.startswith("at most"):
        assert numbers[0] >= high - slack
    else:
        assert words.startswith("= ")


@pytest.mark.parametrize(
    ("text", "words"),
    [
        ("effect: F(2,57)=7.41 p<.001", "F(2, 57) = 7.41 and p < .001"),
        ("effect: p=.03 df1=2 df2=57", "p = .03 with 2 and 57 degrees of freedom"),
        ("effect: df1=2 df2=57", "2 and 57 degrees of freedom"),
        ("effect: R2=.2 F=3.1 df2=57", "R2 = .2, F = 3.1 and df2 = 57"),
        ("frequency: chi2(1)=8.47 n=120", "χ²(1) = 8.47 and n = 120"),
        ("correlation: p=.03 df=43", "p = .03 with 43 degrees of freedom"),
        ("mean-comparison: t(58)=2.1 F(1,58)=4.4", "t(58) = 2.1 and F(1, 58) = 4.4"),
        ("model-change: F_change(1,96)=9.58", "ΔF(1, 96) = 9.58"),
        ("anova-table: F:x=3.1 df1:x=2 p:x=.05", "F (x) = 3.1, df (x) = 2 and p (x) = .05"),
    ],
)  # fmt: skip
def test_readings_as_one_would_write_them(text: str, words: str) -> None:
    assert phrase(claim(text).readings) == words.replace("R2 =", "R² =")


def test_one_statistic_is_one_thing() -> None:
    assert not plural(claim("effect: F(2,57)=7.41").readings)
    assert not plural(claim("effect: p=.03 df1=2 df2=57").readings)
    assert plural(claim("effect: F(2,57)=7.41 n=60").readings)


def test_degrees_of_freedom_are_named_together_and_last() -> None:
    readings = claim("effect: df1=2 F=3.1 df2=57 p=.03").readings
    assert subjects(readings) == ["F", "p", "the degrees of freedom"]


def test_a_reading_of_a_table_names_its_row() -> None:
    made = claim("anova-table: ss:model=3.1 p:stars<.05").readings
    other = made[1]._replace(term="Year: rain: stars")
    assert [named(r) for r in (*made, other)] == [
        "SS (model)",
        "p by its marks",
        "p (Year: rain) by its marks",
    ]


def test_lists() -> None:
    assert [listed([]), listed(["p"]), listed(["p", "F"], "or")] == ["", "p", "p or F"]


def test_examples() -> None:
    assert doctest.testmod(wording).failed == 0


def test_a_bound_in_words_has_no_relation() -> None:
    (made,) = claims_of("The plots differed, t(40) = 2.20, p = n.s.")
    assert printed(made.readings[-1]) == "p n.s."
    message = audit_claim(made, 0.05).findings[0].message
    assert message.startswith("p is printed as n.s., but t(40) = 2.20 gives p between 0.033")
