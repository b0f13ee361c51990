"""Tables of coefficients whose headings say what each column holds."""

from __future__ import annotations

import itertools
import math
import re
from collections.abc import Sequence
from typing import NamedTuple

from crossfoot.model import Claim, Reading
from crossfoot.reading.tables import fits
from crossfoot.reading.tables.brackets import Sample, may_be_error, told_apart
from crossfoot.reading.tables.columns import labels_of, side_by_side
from crossfoot.reading.tables.contents import NONE, Content, Number, content_of, fitting, in_order
from crossfoot.reading.tables.grid import Box
from crossfoot.reading.tables.making import (
    Column,
    Found,
    Sheet,
    claim,
    head_df,
    level,
    marked,
    reading,
    value,
)
from crossfoot.reading.tables.rows import is_intercept, label_of

_ESTIMATES = frozenset({"b", "β", "beta", "odds_ratio"})
_BESIDE = frozenset(
    {"se", "t", "z", "wald", "statistic", "p", "ci_low", "ci_high", "vif", "tolerance"}
)
#: What a role is as a quantity, where its name differs.
_AS = {"wald": "chi2", "statistic": "t"}
_OTHERS = frozenset({"p_adjusted", "df2", "df"})
_HYPOTHESES = re.compile(r"test\sfor\sconstraints|linear\shypothes", re.IGNORECASE)
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


def coefficients(sheet: Sheet) -> Found | None:
    """Return the claims of a table of coefficients, or None where it is none."""
    if _HYPOTHESES.search(sheet.words):
        return None  # t may test other values than zero
    groups = side_by_side(sheet.columns, _ESTIMATES | _BESIDE | _OTHERS)
    groups = [group for group in groups if _is_model(sheet, group)]
    if not groups:
        return None
    claims: list[Claim] = []
    rows: set[int] = set()
    names = [next((c.group for c in group if c.group), "") for group in groups]
    if len(groups) == 1:
        names = [""]
    for group, name in zip(groups, names, strict=True):
        lines = _settled(sheet, _lines(sheet, group))
        if not _plausible(lines):
            continue
        steps = fits.steps_in(sheet)
        for line in lines:
            step = next((label for n, label in reversed(steps) if n < line.number), "")
            found = _claim(sheet, line, ", ".join(part for part in (step, name) if part))
            claims += [found] if found is not None else []
            rows.add(line.number)
    if not claims:
        return None
    summary = fits.fit_rows(sheet, groups, names)
    beside = fits.fit_columns(sheet, beside_coefficients=True)
    everything = (*claims, *summary.claims, *beside.claims)
    return Found(everything, frozenset(rows | summary.rows | beside.rows))


def _is_model(sheet: Sheet, columns: Sequence[Column]) -> bool:
    """Say whether columns hold an estimate and something that goes with one."""
    roles = [role for column in columns for role in column.heading.roles]
    if _ESTIMATES & set(roles):
        return bool(_BESIDE & set(roles)) or _has_marks(sheet, columns)
    return bool({"se", "vif", "tolerance"} & set(roles)) and bool(
        {"t", "z", "tolerance"} & set(roles)
    )


def _has_marks(sheet: Sheet, columns: Sequence[Column]) -> bool:
    if not sheet.legend.marks:
        return False
    return any(
        (content := content_of(row[column.number].text)) is not None and content.marks is not None
        for row in sheet.panel.rows[:60]
        for column in columns
    )


def _lines(sheet: Sheet, columns: Sequence[Column]) -> list[Line]:
    labels = labels_of(sheet.panel, sheet.columns)
    has_p = any("p" in column.heading.roles for column in columns)
    # Degrees of freedom before the estimate count parameters; after it they are the test's.
    order = [role for column in columns for role in column.heading.roles]
    of_test = "df" in order and order[0] != "df"
    of_ratio = _limits_of_ratio(order)
    lines: list[Line] = []
    for index, row in enumerate(sheet.panel.rows):
        words = tuple(row[c.number] for c in labels if row[c.number].text)
        label = label_of(", ".join(box.text for box in words))
        if fits.is_fit(label) and not is_intercept(label):
            continue
        cells: dict[str, Reading] = {}
        given: list[Reading] = []
        contexts: list[str] = []
        enclosed: Number | None = None
        for column in columns:
            content = content_of(row[column.number].text, row[column.number].start) or NONE
            loose = _read(
                sheet, column, content, cells, given, contexts, has_p=has_p, of_test=of_test
            )
            enclosed = enclosed or loose
        if of_ratio and "ci_low" in cells:
            contexts.append("of-ratio")
        if cells:
            boxes = (*words, *(row[c.number] for c in columns))
            lines.append(Line(index, label, cells, boxes, tuple(given), tuple(contexts), enclosed))
    return lines


def _limits_of_ratio(roles: Sequence[str]) -> bool:
    """Say whether the limits stand right after an odds ratio."""
    return any(a == "odds_ratio" and b == "ci_low" for a, b in itertools.pairwise(roles))


def _read(
    sheet: Sheet,
    column: Column,
    content: Content,
    cells: dict[str, Reading],
    given: list[Reading],
    contexts: list[str],
    *,
    has_p: bool,
    of_test: bool,
) -> Number | None:
    """Read a cell; return a number in brackets that the heading says nothing of."""
    roles = column.heading.roles
    numbers = content.numbers
    if "ci_low" in roles and "ci_high" in roles and len(numbers) >= 2:
        numbers = (*numbers[:-2], *in_order(numbers[-2:], sheet.comma))
    if numbers and not fitting(roles, content):
        return None
    if len(numbers) < len(roles) and len(roles) > 1 and len(content.plain) != 1:
        return None
    for role, number in zip(roles, numbers, strict=False):
        quantity = _AS.get(role, role)
        if quantity == "chi2" and number.literal.startswith("-"):
            quantity = "z"
        if quantity == "p_adjusted" or (quantity == "df" and not of_test):
            continue
        found = reading(sheet, number, quantity)
        if found is not None:
            cells.setdefault(quantity, found)
    loose = numbers[1] if len(roles) == 1 and len(numbers) == 2 and numbers[1].bracket else None
    if roles == ("t",) and numbers:
        given += head_df(sheet, column, ("df",))
    if "ci_low" in roles and numbers:
        given += level(sheet, column)
    if numbers or content.marks:
        mark, default = marked(sheet, content, beside_p=has_p)
        if mark is not None:
            cells.setdefault("stars", mark)
            contexts += ["default-stars"] if default else []
        contexts += column.heading.contexts
    return loose


def _settled(sheet: Sheet, lines: list[Line]) -> list[Line]:
    """Tell what β, brackets and marks are, from all rows together."""
    return _symbols(sheet, _distributions(_with_enclosed(sheet, lines)))


def _distributions(lines: list[Line]) -> list[Line]:
    """Take z for t where the p values are not the normal distribution's but wider."""
    wider = [fit for line in lines if (fit := _is_wider(line)) is not None]
    if len(wider) < 3 or 2 * sum(wider) < len(wider):
        return lines
    return [line._replace(cells=_as_t(line.cells)) for line in lines]


def _as_t(cells: dict[str, Reading]) -> dict[str, Reading]:
    return {
        ("t" if key == "z" else key): found._replace(quantity="t") if key == "z" else found
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
        if kind is None and may_be_error(samples):
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


def _sample(sheet: Sheet, line: Line) -> Sample | None:
    assert line.enclosed is not None
    found = reading(sheet, line.enclosed, "se")
    estimate = next((line.cells[key] for key in ("b", "β", "beta") if key in line.cells), None)
    first, second = value(estimate), value(found)
    if first is None or second is None:
        return None
    marks = line.cells.get("stars")
    return Sample(first, second, (marks.low, marks.high) if marks is not None else None)


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


def _plausible(lines: Sequence[Line]) -> bool:
    """Say whether the numbers can be what the headings call them."""
    p = [line.cells["p"] for line in lines if "p" in line.cells]
    se = [line.cells["se"] for line in lines if "se" in line.cells]
    possible = sum(1 for found in p if found.high >= -0.001 and found.low <= 1.0)
    positive = sum(1 for found in se if found.high >= 0)
    return 2 * possible >= len(p) and 2 * positive >= len(se) and bool(lines)


def _claim(sheet: Sheet, line: Line, name: str) -> Claim | None:
    cells = line.cells
    if len(cells) < 2 or set(cells) <= {"p", "stars", "df2"}:
        return None
    row = ", ".join(part for part in (line.label, name) if part)
    given = tuple({(g.quantity, g.span): g for g in line.given}.values())
    return claim(
        sheet,
        "coefficient",
        row or "coefficient",
        cells.values(),
        line.boxes,
        row=row,
        contexts=line.contexts,
        given=given,
    )
