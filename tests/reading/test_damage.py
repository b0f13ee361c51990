"""Relations and numbers that a converter damaged, and what must stay unread."""

from __future__ import annotations

import pytest

from crossfoot.documents.visible import place, verbatim
from crossfoot.reading.damage import grouped, is_damaged, mended, rejoined


@pytest.mark.parametrize(
    ("text", "wanted"),
    [
        ("F(2, 57) 5 4.36, p 5 .017", "F(2, 57) = 4.36, p = .017"),
        ("F(2, 57) 5 4.36, p , .05", "F(2, 57) = 4.36, p < .05"),
        ("b 5 0.84, t(86) 5 2.71, F(1, 86) 5 24.1", "b = 0.84, t(86) = 2.71, F(1, 86) = 24.1"),
        ("b 5 20.84, SE 5 0.31, t(86) 5 22.71", "b 5 20.84, SE = 0.31, t(86) 5 22.71"),
        ("r(98) 5 2.41, p 5 .001", "r(98) 5 2.41, p = .001"),
        ("t(58)Z2.41, pZ0.019", "t(58)=2.41, p=0.019"),
        ("t(58)Z4.41, p!0.001", "t(58)=4.41, p<0.001"),
        ("t(58) \ufffd 2.41, p \ufffd 0.019", "t(58) = 2.41, p \ufffd 0.019"),
        ("r \x01 0.44, n \x01 45, p \x01 0.002", "r = 0.44, n = 45, p = 0.002"),
        ("rZ0.46, nZ40, pZ0.003", "r=0.46, n=40, p=0.003"),
        ("R2 ¼ .25, F3,96 ¼ 10.67", "R2 = .25, F3,96 = 10.67"),
        ("t(58) \ue5fb 2.41, d \ue5fb 0.63", "t(58) = 2.41, d = 0.63"),
    ],
)
def test_mended(text: str, wanted: str) -> None:
    assert is_damaged(text)
    assert mended(text) == wanted


@pytest.mark.parametrize(
    "text",
    [
        "Tanks F 5 and p 5 were closed; valve t 5 stayed at 5 2.4 bar.",
        "p \x01 0.05",
        "p \x01 0.05 and p \x01 0.01",
        "t \ufffd 2.41, p \ufffd 0.019",
        "the plots (2, 57) 5 4.36 m apart",
        "K(2, 57)Z4.36",
        "rZ0.46 and tZ2, pZ and nZ40 are bolts",
        "¼ of the plots",
    ],
)
def test_left_alone(text: str) -> None:
    assert mended(text) == text


@pytest.mark.parametrize(
    ("text", "wanted"),
    [
        ("p = 0.\n045 for", "p = 0.045 for"),
        ("F(3, 96) = 10.\n85, p = 0,\n  001", "F(3, 96) = 10.85, p = 0,001"),
        ("p = 0. 045)", "p = 0.045)"),
        ("t(58) = 2. 41, p = 0. 019)", "t(58) = 2.41, p = 0.019)"),
        ("F = 5,\n00; p = 0,010", "F = 5,00; p = 0,010"),
        ("p = 0.0\u00ad19 for dif\u00adferent", "p = 0.019 for different"),
    ],
)
def test_rejoined(text: str, wanted: str) -> None:
    shown = rejoined(verbatim(text))
    assert shown.text == wanted
    assert text[slice(*place(shown, 0, len(wanted)))] == text


@pytest.mark.parametrize(
    "text", ["F(3, 96) = 10. 85 plots were", "x = 0. The p", "F(1, 58) = 4, 21 and", "n = 12. 5, 6"]
)
def test_not_rejoined(text: str) -> None:
    shown = verbatim(text)
    assert rejoined(shown) is shown


def test_spaces_within_a_number_become_hard() -> None:
    assert (
        grouped("F(1, 98) = 2 212,02; n = 12 480)") == "F(1, 98) = 2\u00a0212,02; n = 12\u00a0480)"
    )
    assert grouped("b = 4 12 and n = 12 4800") == "b = 4 12 and n = 12 4800"
