"""Results with any numbers: nothing fails, whatever is done with what was found."""

from __future__ import annotations

import json

import pytest
from hypothesis import given, settings
from hypothesis import strategies as st

import crossfoot

#: Symbols as they are printed, each with the brackets that it takes.
_SYMBOLS = (
    "F({0}, {1})", "t({0})", "r({0})", "χ²({0})", "ΔF({0}, {1})", "z", "p", "R²", "adjusted R²",
    "R", "ΔR²", "n", "N", "b", "β", "SE", "OR", "η²", "ηp²", "ω²", "f²", "VIF", "tolerance", "k",
    "df", "M", "SD", "s",
)  # fmt: skip

_DIGITS = st.text("0123456789", min_size=1, max_size=8)
_SIGNS = st.sampled_from(("", "-", "−", "+"))
_TAILS = st.sampled_from(
    ("", "%", " percent", "e-5", "e+3", "e-320", "e-400", "E400", " × 10^-7", " × 10⁻⁷", "*", "***")
)


@st.composite
def numerals(draw: st.DrawFn) -> str:
    whole, fraction = draw(_DIGITS | st.just("")), draw(_DIGITS | st.just(""))
    mark = draw(st.sampled_from((".", ",", "·"))) if fraction else ""
    return f"{draw(_SIGNS)}{whole}{mark}{fraction}{draw(_TAILS)}" if whole + fraction else "0"


@st.composite
def results(draw: st.DrawFn) -> str:
    parts = []
    for symbol in draw(st.lists(st.sampled_from(_SYMBOLS), min_size=1, max_size=7)):
        relation = draw(st.sampled_from("=<>≤≥≈"))
        head = symbol.format(draw(numerals()), draw(numerals()))
        parts.append(f"{head} {relation} {draw(numerals())}")
    if draw(st.booleans()):
        parts.append(f"95% CI [{draw(numerals())}, {draw(numerals())}]")
    said = draw(st.sampled_from(("", "One-sided: ", "With robust standard errors, ", "OLS: ")))
    return f"{said}{', '.join(parts)}."


@settings(max_examples=150, deadline=None)
@given(results())
def test_any_numbers_are_judged_and_written(text: str) -> None:
    scan = crossfoot.scan_text(text)
    again = json.loads(json.dumps(scan.to_dict(), allow_nan=False))
    assert again["documents"][0]["status"] == "read"
    assert str(scan)
    for finding in scan.findings:
        assert finding["working"]
        assert text[finding["where"]["start"]["column"] - 1 :].startswith(finding["literal"][:1])


@settings(max_examples=60, deadline=None)
@given(results())
def test_what_follows_from_any_numbers_is_written(text: str) -> None:
    derivation = crossfoot.derive(text)
    json.dumps(derivation.to_dict(), allow_nan=False)
    str(derivation)
    for result in derivation.results:
        for item in result["derived"]:
            low, high = item["low"], item["high"]
            assert low is None or high is None or low <= high


@pytest.mark.parametrize(
    "text",
    [
        "R² = 1e-400, F(2, 57) = 1e400",
        "t(38) = 2.31\0, p = .206",
        "t(38) = 2.31, p = .206 \ud800",
        "F(2, 57) = 4.31, p = ." + "9" * 5000,
        "t(" + "9" * 4000 + ") = 2.31, p = .3",
    ],
)
def test_numbers_that_no_float_can_hold(text: str) -> None:
    scan = crossfoot.scan_text(text)
    json.dumps(scan.to_dict(), allow_nan=False).encode()
    str(scan).encode()
    assert len(scan.frame("readings")) == sum(len(claim["readings"]) for claim in scan.claims)
