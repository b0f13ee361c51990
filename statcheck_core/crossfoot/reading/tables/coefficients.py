"""Tables of coefficients whose headings say what each column holds."""

from __future__ import annotations

import itertools
import re
from collections.abc import Sequence

from crossfoot.model import Claim, Reading
from crossfoot.reading.tables import fits
from crossfoot.reading.tables.columns import labels_of, name_of, roles_in, side_by_side
from crossfoot.reading.tables.contents import (
    NONE,
    Content,
    Number,
    content_of,
    fitting,
    in_order,
    limits,
)
from crossfoot.reading.tables.estimated import told_apart
from crossfoot.reading.tables.making import (
    Column,
    Found,
    Sheet,
    add_adjusted,
    claim,
    head_df,
    level,
    marked,
    reading,
)
from crossfoot.reading.tables.meanings import Line, plausible, settled
from crossfoot.reading.tables.rows import is_intercept
from crossfoot.reading.tables.tested import with_own_p

_ESTIMATES = frozenset({"b", "β", "beta", "odds_ratio", "ratio"})
_BESIDE = frozenset(
    {"se", "t", "z", "wald", "statistic", "p", "ci_low", "ci_high", "vif", "tolerance"}
)
_LIMITS = frozenset({"ci_low", "ci_high"})
#: What a role is as a quantity, where its name differs.
_AS = {"wald": "chi2", "statistic": "t", "ratio": "b"}
#: What holds of the estimates of a column of ratios.
_OF_RATIOS = ("ratio-scale", "other-null")
_MODEL = re.compile(r"regress|coefficient|predict|model|standardi|estimate", re.IGNORECASE)
_OTHERS = frozenset({"p_adjusted", "df2", "df"})


#: Headings of what a simulation tells of a test or an estimate.
_SIMULATED = re.compile(
    r"\brejection|\bcoverage\b|\btype\sI\serror|\breplications\b", re.IGNORECASE
)


def coefficients(sheet: Sheet) -> Found | None:
    """Return the claims of a table of coefficients, or None where it is none."""
    if _SIMULATED.search(sheet.words):
        return None  # what is set is estimated of nothing
    groups = side_by_side(with_own_p(sheet.columns), _ESTIMATES | _BESIDE | _OTHERS)
    groups = [group for group in groups if _is_model(sheet, group)]
    if not groups:
        return None
    claims: list[Claim] = []
    rows: set[int] = set()
    names = [next((c.group for c in group if c.group), "") for group in groups]
    if len(groups) == 1:
        names = [""]
    for group, name in zip(groups, names, strict=True):
        lines = settled(sheet, told_apart(sheet, _lines(sheet, group)))
        lines = _without_limits_of_beta(lines)
        if not plausible(lines):
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
        beside = _BESIDE & set(roles)
        if beside == {"p"} and "R2" in roles_in(sheet.columns):
            return False  # p is that of the model which each row tells of
        if beside == {"se"} and not {"b", "odds_ratio", "ratio"} & set(roles):
            return _MODEL.search(sheet.words) is not None  # a letter and an error may be anything
        return bool(beside) or _has_marks(sheet, columns)
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
        label = name_of(row, labels)
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
        if "ratio" in order:
            contexts += _OF_RATIOS
            cells.pop("se", None)  # of the ratio, or of its logarithm
        if cells:
            boxes = (*words, *(row[c.number] for c in columns))
            lines.append(Line(index, label, cells, boxes, tuple(given), tuple(contexts), enclosed))
    return lines


def _without_limits_of_beta(lines: list[Line]) -> list[Line]:
    """Drop the limits where those of most rows are of β, though b is printed as well."""
    of_beta = sum(_centred(line, "beta") and not _centred(line, "b") for line in lines)
    if not of_beta or 2 * of_beta <= sum("ci_low" in line.cells for line in lines):
        return lines
    return [
        line._replace(cells={key: cell for key, cell in line.cells.items() if key not in _LIMITS})
        if "b" in line.cells
        else line
        for line in lines
    ]


def _centred(line: Line, quantity: str) -> bool:
    """Say whether an estimate can lie midway between the limits of its row."""
    found, low, high = (line.cells.get(key) for key in (quantity, "ci_low", "ci_high"))
    if found is None or low is None or high is None:
        return False
    return low.low + high.low <= 2 * found.high and 2 * found.low <= low.high + high.high


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
    if roles == ("ci_low", "ci_high"):
        numbers = limits(numbers, sheet.comma)
    elif "ci_low" in roles and "ci_high" in roles and len(numbers) >= 2:
        numbers = (*numbers[:-2], *in_order(numbers[-2:], sheet.comma))
    if numbers and not fitting(roles, content):
        return None
    if len(numbers) < len(roles) and len(roles) > 1 and len(content.plain) != 1:
        return None
    for role, number in zip(roles, numbers, strict=False):
        quantity = _AS.get(role, role)
        if quantity == "chi2" and number.literal.startswith("-"):
            quantity = "z"
        if quantity == "df" and not of_test:
            continue
        if quantity == "p_adjusted":
            add_adjusted(sheet, column, number, cells, contexts, has_p=has_p)
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


def _claim(sheet: Sheet, line: Line, name: str) -> Claim | None:
    cells = line.cells
    if set(cells) <= {"p", "stars", "df2"}:
        return None
    # Where others have marks, none is what is printed of a coefficient.
    if len(cells) < 2 and not (sheet.legend.marks and cells.keys() <= {"b", "beta"}):
        return None
    row = ", ".join(part for part in (line.label, name) if part)
    given = tuple({(g.quantity, g.span): g for g in line.given}.values())
    return claim(
        sheet,
        "correlation" if "r" in cells else "coefficient",
        row or "coefficient",
        cells.values(),
        line.boxes,
        row=row,
        contexts=line.contexts,
        given=given,
    )
