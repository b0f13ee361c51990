"""What β, brackets and marks of a table of coefficients are, told from all its rows together."""

from __future__ import annotations

import math
import re
from collections.abc import Sequence
from typing import NamedTuple

from crossfoot.model import Reading
from crossfoot.reading.tables.brackets import Sample, may_be_error, told_apart
from crossfoot.reading.tables.contents import Number
from crossfoot.reading.tables.grid import Box
from crossfoot.reading.tables.making import Sheet, reading, value

_STANDARD = re.compile(r"(?<!un)(?<!un-)standardi[sz]ed", re.IGNORECASE)
_PLAIN = re.compile(r"\bun-?standardi[sz]ed", re.IGNORECASE)


class Line(NamedTuple):
    """A row of one model: what is printed of its coefficient."""

    number: int
    label: str
    cells: dict[str, Reading]
    boxes: tuple[Box, ...]
    given: tuple[Reading, ...]
    contexts: tuple[str, ...]
    enclosed: Number | None = None


def settled(sheet: Sheet, lines: list[Line]) -> list[Line]:
    """Tell what β, brackets and marks are, from all rows together."""
    return _symbols(sheet, _distributions(_with_enclosed(sheet, _walds(lines))))


def _walds(lines: list[Line]) -> list[Line]:
    """Take all Wald statistics for z where some have a sign, which no χ² has."""
    named = {key for line in lines for key in line.cells}
    if not {"z", "chi2"} <= named:
        return lines
    return [line._replace(cells=_renamed(line.cells, "chi2", "z")) for line in lines]


def _distributions(lines: list[Line]) -> list[Line]:
    """Take z for t where the p values are not the normal distribution's but wider."""
    wider = [fit for line in lines if (fit := _is_wider(line)) is not None]
    if len(wider) < 3 or 2 * sum(wider) < len(wider):
        return lines
    return [line._replace(cells=_renamed(line.cells, "z", "t")) for line in lines]


def _renamed(cells: dict[str, Reading], old: str, new: str) -> dict[str, Reading]:
    return {
        (new if key == old else key): found._replace(quantity=new) if key == old else found
        for key, found in cells.items()
    }


def _is_wider(line: Line) -> bool | None:
    """Say whether p exceeds both normal tails beyond z; None where one is not printed."""
    z, p = line.cells.get("z"), line.cells.get("p")
    if z is None or p is None or z.relation != "=" or p.relation != "=":
        return None
    nearest = 0.0 if z.low < 0 < z.high else min(abs(z.low), abs(z.high))
    return p.low > math.erfc(nearest / math.sqrt(2)) * (1 + 1e-9)


def _with_enclosed(sheet: Sheet, lines: list[Line]) -> list[Line]:
    loose = [line for line in lines if line.enclosed is not None]
    if not loose:
        return lines
    kind = sheet.legend.enclosed
    if kind is None:
        samples = [s for line in loose if (s := _sample(sheet, line)) is not None]
        kind = told_apart(samples) if samples else None
        if kind is None and may_be_error(samples) and not _tested(lines):
            kind = "se?"
    if kind not in {"se", "t", "z", "p", "se?"}:
        return lines
    settled = []
    for line in lines:
        if line.enclosed is not None:
            quantity = kind.rstrip("?")
            found = reading(sheet, line.enclosed, quantity)
            cells = dict(line.cells)
            if kind == "se?":
                cells.pop("stars", None)
            if found is not None:
                cells.setdefault(quantity, found)
            line = line._replace(cells=cells)
        settled.append(line)
    return settled


def _tested(lines: Sequence[Line]) -> bool:
    """Say whether something is printed that a standard error could be held against."""
    return any({"t", "z", "p", "chi2", "ci_low"} & line.cells.keys() for line in lines)


def _sample(sheet: Sheet, line: Line) -> Sample | None:
    assert line.enclosed is not None
    found = reading(sheet, line.enclosed, "se")
    estimate = next((line.cells[key] for key in ("b", "β", "beta") if key in line.cells), None)
    first, second = value(estimate), value(found)
    if first is None or second is None:
        return None
    p = line.cells.get("p") or line.cells.get("stars")
    return Sample(first, second, (p.low, p.high) if p is not None else None)


def _symbols(sheet: Sheet, lines: list[Line]) -> list[Line]:
    """Tell whether β is a standardised coefficient, and leave out errors that are not b's."""
    named = {key for line in lines for key in line.cells}
    settled = []
    quantity = _meaning_of_beta(sheet, lines, named)
    foreign = _foreign_error(lines, "b" if "b" in named else "β")
    for line in lines:
        cells = {
            (quantity if key == "β" else key): (
                found._replace(quantity=quantity) if key == "β" else found
            )
            for key, found in line.cells.items()
        }
        if foreign or _is_error_of_ratio(line):
            cells.pop("se", None)
        settled.append(line._replace(cells=cells))
    return settled


def _meaning_of_beta(sheet: Sheet, lines: list[Line], named: set[str]) -> str:
    if named & {"b", "odds_ratio"} or "β" not in named:
        return "beta"
    if _PLAIN.search(sheet.words):
        return "b"
    if _STANDARD.search(sheet.words):
        return "beta"
    if not named & {"se", "ci_low"}:
        return "beta"
    checked = [fit for line in lines if (fit := _is_ratio_of(line, "β")) is not None]
    return "b" if not checked or 2 * sum(checked) >= len(checked) else "beta"


def _foreign_error(lines: list[Line], estimate: str) -> bool:
    """Say whether the standard errors are of something else: most t are not b/SE."""
    checked = [fit for line in lines if (fit := _is_ratio_of(line, estimate)) is not None]
    return len(checked) >= 3 and 2 * sum(checked) < len(checked)


def _is_error_of_ratio(line: Line) -> bool:
    """Say whether the standard error is the odds ratio's own: z is ln OR over SE/OR."""
    ratio, se, z = (line.cells.get(key) for key in ("odds_ratio", "se", "z"))
    if ratio is None or se is None or z is None or "b" in line.cells:
        return False
    if ratio.low <= 0 or se.low <= 0:
        return False
    ends = [math.log(r) * r / s for r in (ratio.low, ratio.high) for s in (se.low, se.high)]
    return min(ends) <= z.high and z.low <= max(ends)


def _is_ratio_of(line: Line, estimate: str) -> bool | None:
    """Say whether t (or z) is the estimate over its error; None where they aren't printed."""
    b, se = line.cells.get(estimate), line.cells.get("se")
    t = line.cells.get("t") or line.cells.get("z")
    if b is None or se is None or t is None or se.high <= 0:
        return None
    ends = [top / max(bottom, 1e-300) for top in (b.low, b.high) for bottom in (se.low, se.high)]
    return min(ends) <= t.high and t.low <= max(ends) if se.low > 0 else t.low <= max(ends)


def plausible(lines: Sequence[Line]) -> bool:
    """Say whether the numbers can be what the headings call them."""
    p = [line.cells["p"] for line in lines if "p" in line.cells]
    se = [line.cells["se"] for line in lines if "se" in line.cells]
    possible = sum(1 for found in p if found.high >= -0.001 and found.low <= 1.0)
    positive = sum(1 for found in se if found.high >= 0)
    return 2 * possible >= len(p) and 2 * positive >= len(se) and bool(lines)
