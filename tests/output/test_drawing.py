"""The rows of a table that a finding rests on, drawn beside each other."""

from __future__ import annotations

import pytest

from crossfoot import scan_text
from crossfoot.output.entry import entry
from crossfoot.output.output import Look

PIPE = """\
| Source | SS | df | MS | F | p |
|---|---|---|---|---|---|
| Surface | 42.10 | 2 | 21.05 | 8.14 | .004 |
| Residual | 205.80 | 60 | 3.43 | | |
| Total | 247.90 | 62 | | | |
"""
PRINTED = """\
          Df Sum Sq Mean Sq F value
surface    2  42.10   21.05    8.14
Residuals 60 205.80    3.43
"""
TABS = """\
Source\tSS\tdf\tMS\tF
Surface\t42.10\t2\t21.05\t8.14
Residual\t205.80\t60\t3.43\t
"""
MODELS = """\
| | Model 1 | Model 2 |
|---|---|---|
| Load | 0.52** | 0.45* |
| | (0.18) | (0.35) |
| R² | .12 | .24 |

Standard errors in parentheses. \\* p < .05, \\*\\* p < .01
"""


def drawn(text: str, language: str, width: int = 80) -> list[str]:
    """The first entry, without its place, up to its message."""
    report = scan_text(text, language).reports[0]
    placed = next(placed for placed in report.claims if placed.audited.findings)
    lines = entry(
        report.document, placed, placed.audited.findings[:1], 1, Look(width=width)
    ).splitlines()
    stop = next(n for n, line in enumerate(lines) if " is " in line)
    return [line.removeprefix("   ") for line in lines[1:stop]]


@pytest.mark.parametrize(
    ("text", "language", "rows"),
    [
        (
            PIPE,
            "markdown",
            [
                "Surface  |  42.10 |  2 | 21.05 | «8.14» | .004",
                "Residual | 205.80 | 60 |  3.43",
            ],
        ),
        (
            PRINTED,
            "plain",
            ["surface    2  42.10   21.05   «8.14»", "Residuals 60 205.80    3.43"],
        ),
        (
            TABS,
            "plain",
            ["Surface  |  42.10 |  2 | 21.05 | «8.14»", "Residual | 205.80 | 60 |  3.43"],
        ),
        (MODELS, "markdown", ["Load | 0.52** | 0.45«*»", "     | (0.18) |  (0.35)"]),
    ],
)
def test_rows_stand_under_each_other(text: str, language: str, rows: list[str]) -> None:
    assert drawn(text, language) == rows


def test_rows_too_wide_are_wrapped() -> None:
    assert drawn(PIPE, "markdown", 30) == [
        "Surface | 42.10 | 2 | 21.05",
        "| «8.14» | .004",
        "Residual | 205.80 | 60 |",
        "3.43 | |",
    ]
