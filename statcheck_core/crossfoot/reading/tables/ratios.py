"""Rows of an analysis of variance, and which of them are each other's ratio."""

from __future__ import annotations

from collections.abc import Sequence
from typing import NamedTuple

from crossfoot.model import Reading
from crossfoot.reading.tables.grid import Box
from crossfoot.reading.tables.making import value


class Line(NamedTuple):
    """A row of the analysis: ``cells`` holds what is printed for each quantity."""

    number: int
    label: str
    kind: str
    cells: dict[str, Reading]
    boxes: tuple[Box, ...]
    contexts: tuple[str, ...] = ()
    section: str = ""


def number_of(line: Line | None, quantity: str) -> float | None:
    """Return what a row prints of a quantity; its degrees of freedom may stand under df1."""
    if line is None:
        return None
    found = line.cells.get(quantity) or (line.cells.get("df1") if quantity == "df" else None)
    return value(found)


def tested_otherwise(line: Line, effects: Sequence[Line], error: Line | None) -> bool:
    """Say whether F is not against the error but does fit another row of a nested design."""
    if len(effects) < 2 or error is None or is_ratio(line, error) is not False:
        return False
    return denominator(line, effects) is not None


def denominator(line: Line, effects: Sequence[Line]) -> Line | None:
    """Return the one other row that F is tested against, if its digits leave no doubt."""
    fitting = [other for other in effects if other is not line and is_ratio(line, other)]
    return fitting[0] if len(fitting) == 1 and _sharp(line) and _sharp(fitting[0]) else None


def _sharp(line: Line) -> bool:
    """Say whether a row prints its mean square to two digits at least."""
    square = _ms(line)
    return square is not None and square[1] - square[0] <= 0.05 * square[1]


def is_ratio(line: Line, other: Line) -> bool | None:
    """Say whether F is the ratio of two rows' mean squares; None where they aren't printed."""
    f, top, bottom = line.cells.get("F"), _ms(line), _ms(other)
    if f is None or top is None or bottom is None or bottom[0] <= 0 or top[0] <= 0:
        return None
    return f.low <= top[1] / bottom[0] and top[0] / bottom[1] <= f.high


def _ms(line: Line) -> tuple[float, float] | None:
    found = line.cells.get("ms")
    if found is not None:
        return found.low, found.high
    ss, df = line.cells.get("ss"), number_of(line, "df")
    return (ss.low / df, ss.high / df) if ss is not None and df else None


def is_mean(line: Line) -> bool:
    """Say whether a row's mean square is its sum of squares over its degrees of freedom."""
    ss, ms, df = line.cells.get("ss"), line.cells.get("ms"), number_of(line, "df")
    if ss is None or ms is None or not df:
        return False
    return ss.low / df <= ms.high and ms.low <= ss.high / df
