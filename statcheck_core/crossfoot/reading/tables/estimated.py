"""What an estimate is that stands beside a nameless statistic, as data frames of results print.

``estimate std.error statistic p.value conf.low conf.high`` heads the rows of a linear model, of a
generalised one whose limits are of its likelihood, of ratios beside errors of their logarithms,
and, without the error, of tests of means, of correlations and of ratios.
"""

from __future__ import annotations

import math
import re

from crossfoot.model import Reading
from crossfoot.reading.nameless import named_test
from crossfoot.reading.tables.making import Sheet
from crossfoot.reading.tables.meanings import Line
from crossfoot.reading.tables.tested import method_of

#: Methods whose estimate is a mean or a difference of means.
_OF_MEANS = re.compile(r"\bt[\s-]?test|mean", re.IGNORECASE)
_LIMITS = frozenset({"ci_low", "ci_high"})
_ESTIMATE = _LIMITS | {"b"}
_Cells = dict[str, Reading]


def told_apart(sheet: Sheet, lines: list[Line]) -> list[Line]:
    """Tell what the estimates are that stand with a nameless statistic or a method."""
    nameless = any(c.heading.roles == ("statistic",) for c in sheet.columns)
    if not nameless and not any(method_of(sheet, line.number) for line in lines):
        return lines
    if not any("se" in line.cells for line in lines):
        return [_of_test(line, method_of(sheet, line.number)) for line in lines]
    if _are_ratios(lines):
        lines = [_as_ratio(line) for line in lines]
    if _are_normal(lines):
        lines = [_as_normal(line) for line in lines]
    return lines


def _of_test(line: Line, method: str) -> Line:
    cells = dict(line.cells)
    if "b" not in cells:
        return line
    if not method:
        if _is_correlation(cells):
            return line._replace(cells=_as_correlation(cells))
        # A ratio, or a shift of ranks: its limits need not lie around it.
        return line if _is_centred(cells) else line._replace(cells=_without(cells, _ESTIMATE))
    kind = named_test(method)
    if kind == "r":
        return line._replace(cells=_as_correlation(cells))
    if kind == "rank":
        cells = _as_correlation(_without(cells, frozenset({"t"})))
        return line._replace(cells=cells, contexts=(*line.contexts, "rank-correlation"))
    if _OF_MEANS.search(method):
        return line
    return line._replace(cells=_without(cells, _ESTIMATE | {"t"}))


def _without(cells: _Cells, keys: frozenset[str]) -> _Cells:
    return {key: found for key, found in cells.items() if key not in keys}


def _renamed(cells: _Cells, old: str, new: str) -> _Cells:
    return {
        (new if key == old else key): found._replace(quantity=new) if key == old else found
        for key, found in cells.items()
    }


def _as_correlation(cells: _Cells) -> _Cells:
    return _renamed(cells, "b", "r")


def _is_correlation(cells: _Cells) -> bool:
    """Say whether t is that of a correlation of this size with these degrees of freedom."""
    r, t, df = (cells.get(key) for key in ("b", "t", "df"))
    if r is None or t is None or df is None or r.low <= -1 or r.high >= 1 or df.low <= 0:
        return False
    least, most = (share * math.sqrt(df.low / (1 - share * share)) for share in (r.low, r.high))
    return least <= t.high and t.low <= most


def _is_centred(cells: _Cells) -> bool:
    b, low, high = (cells.get(key) for key in ("b", "ci_low", "ci_high"))
    if b is None or low is None or high is None:
        return True
    return low.low + high.low <= 2 * b.high and 2 * b.low <= low.high + high.high


def _are_ratios(lines: list[Line]) -> bool:
    """Say whether the statistics are logarithms of the estimates over their errors."""
    tried = [
        (_over(b.low, b.high, se, t), _over(math.log(b.low), math.log(b.high), se, t))
        for line in lines
        if (b := line.cells.get("b")) is not None
        and b.low > 0
        and (se := line.cells.get("se")) is not None
        and (t := line.cells.get("t")) is not None
    ]
    signs = any(
        line.cells["b"].low > 0 > line.cells["t"].high
        for line in lines
        if line.cells.keys() >= {"b", "t"}
    )
    logged = sum(log for _, log in tried)
    return logged * 2 > len(tried) and (signs or logged > sum(plain for plain, _ in tried))


def _over(low: float, high: float, se: Reading, t: Reading) -> bool:
    if se.low <= 0:
        return False
    ends = [end / error for end in (low, high) for error in (se.low, se.high)]
    return min(ends) <= t.high and t.low <= max(ends)


def _as_ratio(line: Line) -> Line:
    """Take an estimate for a ratio, and leave out the error, which is of its logarithm."""
    cells = _renamed(_without(line.cells, frozenset({"se"})), "b", "odds_ratio")
    contexts = (*line.contexts, "of-ratio") if "ci_low" in cells else line.contexts
    return line._replace(cells=cells, contexts=contexts)


def _are_normal(lines: list[Line]) -> bool:
    """Say whether all p are tail areas of the normal distribution beyond the statistics."""
    pairs = [
        (line.cells["t"], line.cells["p"]) for line in lines if line.cells.keys() >= {"t", "p"}
    ]
    exact = [(t, p) for t, p in pairs if t.relation == p.relation == "="]
    return len(exact) > 1 and all(_is_tail(t, p) for t, p in exact)


def _is_tail(z: Reading, p: Reading) -> bool:
    near = 0.0 if z.low <= 0 <= z.high else min(abs(z.low), abs(z.high))
    far = max(abs(z.low), abs(z.high))
    least, most = (math.erfc(end / math.sqrt(2)) for end in (far, near))
    return least <= p.high and p.low <= most


def _as_normal(line: Line) -> Line:
    """Take t for z, and leave out limits that are not around the estimate: of a likelihood."""
    cells = line.cells if _is_centred(line.cells) else _without(line.cells, _LIMITS)
    return line._replace(cells=_renamed(cells, "t", "z"))
