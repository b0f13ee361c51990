"""A numeral that can be read two ways is held against nothing if one of them agrees."""

from __future__ import annotations

import pytest

import crossfoot


def _loud(text: str) -> list[str]:
    findings = crossfoot.scan_text(text, "plain").findings
    return [f["identity"] for f in findings if f["severity"] in {"conflict", "reversal"}]


@pytest.mark.parametrize(
    "text",
    [
        "F(1, 310) = 6,278, p = .013",
        "F(1, 310) = 6.278, p = 0,013",
        "F(1, 24) = 7,123, p = .013, ηp² = .229",
        "b = 1,234, SE = 0.411, t = 3.00, p = .004",
        "b = 1.234, SE = 0.411, t = 3,00, p = 0,004",
        "b = 1.234,5; SE = 411,5; t = 3,00; p = 0,004",
        "b = -1,250; SE = 417; t = -3,00; p = 0,004",
        "Rent fell by 1,250 per km (SE = 417; t(58) = -3,00; p = 0,004).",
        "t(1,236) = 2,11; p = 0,035",
        "t(1.236) = 2,11; p = 0,035",
        "t(49,373) = 2,13; p = 0,038",
        "N = 1,236; R² = 0,010; F(1, 1,234) = 12,5; p < 0,001",
        "F(1, 2398) = 1.238; R² = 0,340; p < 0,001",
    ],
)
def test_agrees_one_way(text: str) -> None:
    assert _loud(text) == []


@pytest.mark.parametrize(
    "text",
    [
        "F(1, 310) = 6,278, p = .130",
        "F(1, 310) = 6.278, p = .130",
        "F(1, 310) = 6,278; p < 0,001",  # in thousands it would fit, but commas are decimal here
        "F(1, 310) = 6.278, p < .001",
        "b = 1,234, SE = 0.411, t = 9.00, p < .001",
        "t(1,236) = 2,11; p = 0,350",
        "t(51.337) = 2.38, p = .032",
    ],
)
def test_agrees_neither_way(text: str) -> None:
    assert _loud(text)


def test_is_shown_as_it_agrees() -> None:
    (claim,) = crossfoot.scan_text("F(1, 310) = 6,278, p = .013", "plain").claims
    (value,) = (r for r in claim["readings"] if r["quantity"] == "F")
    assert value["literal"] == "6,278"
    assert (value["low"], value["high"]) == pytest.approx((6.2775, 6.2785))
    assert value["where"]["start"] == {"line": 1, "column": 13}
