"""The published figures, with the fit that each set of data gives."""

from __future__ import annotations

import json
from fractions import Fraction
from functools import cache
from pathlib import Path
from typing import Any

from published.exact import Refit, least_squares, one_way

DATA = Path(__file__).parent / "data"


def _load(name: str) -> dict[str, Any]:
    loaded: dict[str, Any] = json.loads((DATA / name).read_text(encoding="utf-8"))
    return loaded


#: NIST Statistical Reference Datasets: certified results of 11 regressions, 3 analyses of variance.
STRD = _load("strd.json")
#: Figures as R prints them for data of old textbooks, and Anscombe's quartet.
CLASSICS = _load("classics.json")
#: Worked examples and tables of critical values of the NIST/SEMATECH e-Handbook.
HANDBOOK = _load("handbook.json")

REGRESSIONS: dict[str, dict[str, Any]] = {
    data["name"]: data for data in (*STRD["regressions"], *CLASSICS["regressions"])
}
ANALYSES: dict[str, dict[str, Any]] = {
    data["name"]: data for data in (*STRD["analyses"], *CLASSICS["analyses"])
}


@cache
def regression(name: str) -> Refit:
    """Fit the data of a regression exactly."""
    data = REGRESSIONS[name]
    powers = range(1, data.get("degree", 1) + 1)
    rows = [[Fraction(value) ** power for value in row for power in powers] for row in data["x"]]
    return least_squares(data["y"], rows, data.get("intercept", True))


@cache
def analysis(name: str) -> Refit:
    """Fit the data of a one-way analysis of variance exactly."""
    return one_way(ANALYSES[name]["groups"])
