"""Tables of an analysis of variance."""

from __future__ import annotations

import itertools
import re
from collections import Counter
from collections.abc import Sequence

from crossfoot.model import Claim, Reading
from crossfoot.reading.tables.analysis import MOST, claims_of
from crossfoot.reading.tables.columns import labels_of, roles_in, side_by_side
from crossfoot.reading.tables.contents import NONE, content_of, fitting
from crossfoot.reading.tables.grid import Box
from crossfoot.reading.tables.making import (
    Column,
    Found,
    Sheet,
    head_df,
    marked,
    reading,
)
from crossfoot.reading.tables.ratios import Line, is_mean, is_ratio
from crossfoot.reading.tables.rows import correction_of, is_by_subjects, kind_of, label_of

#: Roles that a column of such a table may have, and the quantity that each is.
_QUANTITIES = {
    "ss": "ss",
    "ms": "ms",
    "df": "df",
    "df1": "df1",
    "df2": "df2",
    "F": "F",
    "statistic": "F",
    "p": "p",
    "eta2": "eta2",
    "eta2_partial": "eta2_partial",
    "omega2": "omega2",
}
#: Without these a table of sums and means is none of variance.
_TESTS = frozenset({"F", "df", "df1", "df2", "p"})
_SQUARES = re.compile(r"\b(?:(?P<mean>mean\s)|sums?\sof\s)squares?\b", re.IGNORECASE)
_UNLABELLED = frozenset({"ss", "ms", "df"})


def anova(sheet: Sheet) -> Found | None:
    """Return the claims of a table with sums of squares, or None where it is none."""
    sheet = _with_squares(sheet)
    roles = roles_in(sheet.columns)
    if roles & {"rss", "df_residual", "b", "odds_ratio", "R2_change"} or not roles & {"ss", "ms"}:
        return None
    if len(roles & {"ss", "ms", "df", "df1", "F"}) < 2 or not roles & {"df", "df1", "F"}:
        return None
    claims: list[Claim] = []
    rows: set[int] = set()
    for columns in side_by_side(sheet.columns, _QUANTITIES):
        lines = _lines(sheet, columns)
        if not any(line.kind in {"effect", "model", "part"} for line in lines):
            continue
        if not any(line.cells.keys() & _TESTS for line in lines):
            continue
        for stratum in _strata(lines):
            claims += claims_of(sheet, stratum, columns)
        rows |= {line.number for line in lines}
    return Found(tuple(claims), frozenset(rows)) if claims else None


def _with_squares(sheet: Sheet) -> Sheet:
    """Name the columns of a table whose caption says that they are mean squares.

    Each is headed by what is analysed; degrees of freedom stand beside them all, and one row is
    the error.
    """
    said = _SQUARES.search(sheet.words)
    if said is None or roles_in(sheet.columns) - {"label"} != {"df"}:
        return sheet
    labels = labels_of(sheet.panel, sheet.columns)
    names = (row[c.number].text for row in sheet.panel.rows for c in labels)
    if not any(kind_of(name) == "error" for name in names):
        return sheet
    role = "ms" if said["mean"] else "ss"
    columns = tuple(
        c._replace(heading=c.heading._replace(roles=(role,)), group=label_of(c.box.text))
        if not c.heading.roles and c not in labels and c.box.text
        else c
        for c in sheet.columns
    )
    return sheet._replace(columns=columns)


def _lines(sheet: Sheet, columns: Sequence[Column]) -> list[Line]:
    has_p = any(column.heading.roles == ("p",) for column in columns)
    over, labels = _sections(sheet, labels_of(sheet.panel, sheet.columns))
    section = label = ""
    lines: list[Line] = []
    for index, row in enumerate(sheet.panel.rows):
        named = [row[c.number] for c in over if row[c.number].text]
        words = [row[c.number] for c in labels if row[c.number].text] or named
        section = label_of(" ".join(box.text for box in named)) if named else section
        correction = next((c for box in words if (c := correction_of(box.text))), "")
        named = [box for box in words if not correction_of(box.text)]
        if named or not correction:
            label = label_of(" ".join(box.text for box in named))
        cells: dict[str, Reading] = {}
        contexts: list[str] = [correction] if correction else []
        boxes = [row[c.number] for c in columns]
        for column in columns:
            _read(sheet, column, row[column.number], cells, contexts, has_p=has_p)
        if cells:
            kind = kind_of(label)
            if kind == "effect" and is_by_subjects(label) and not {"F", "p"} & cells.keys():
                kind = "error"
            own = section if over else ""
            lines.append(Line(index, label, kind, cells, (*words, *boxes), tuple(contexts), own))
    return _settled(lines)


def _sections(sheet: Sheet, labels: Sequence[Column]) -> tuple[Sequence[Column], Sequence[Column]]:
    """Tell the columns that name what is analysed from those that name sources of variation.

    The latter start with the column that names the error.
    """
    for number, column in enumerate(labels):
        if any(kind_of(row[column.number].text) == "error" for row in sheet.panel.rows):
            return labels[:number], labels[number:]
    return (), labels


def _read(
    sheet: Sheet,
    column: Column,
    box: Box,
    cells: dict[str, Reading],
    contexts: list[str],
    *,
    has_p: bool,
) -> None:
    """Read one cell of a row."""
    content = content_of(box.text, box.start) or NONE
    roles = column.heading.roles
    numbers = content.numbers
    for role, number in zip(roles, fitting(roles, content), strict=False):
        quantity = _QUANTITIES.get(role)
        if quantity is None:
            continue
        found = reading(sheet, number, quantity, percent=column.heading.percent)
        if found is not None:
            cells.setdefault(quantity, found)
    if content.df or (roles == ("F", "df") and len(numbers) == 3):
        pair = content.df or numbers[1:]
        for quantity, number in zip(("df1", "df2"), pair, strict=False):
            found = reading(sheet, number, quantity)
            if found is not None:
                cells[quantity] = found
        cells.pop("df", None)
    if numbers and roles[:1] == ("F",):
        for found in head_df(sheet, column, ("df1", "df2")):
            cells.setdefault(found.quantity, found)
    mark, default = marked(sheet, content, beside_p=has_p)
    if mark is not None and roles[:1] in {("F",), ("p",), ("ms",)}:
        cells.setdefault("stars", mark)
        contexts += ["default-stars"] if default else []
    contexts += column.heading.contexts


def _settled(lines: list[Line]) -> list[Line]:
    """Tell what the labels leave open: a row without a label, several totals."""
    if any(line.kind == "corrected" for line in lines):
        lines = [line for line in lines if line.kind != "total"]
    lines = [
        line._replace(kind="total") if line.kind == "corrected" else line
        for line in lines
        if line.kind not in {"uncorrected", "intercept"}
    ]
    lines = _within(lines)
    if not any(line.kind == "error" for line in lines):
        for number, line in enumerate(lines):
            tested = any("F" in other.cells for other in lines[:number])
            if line.kind == "blank" and set(line.cells) <= _UNLABELLED and tested:
                lines[number] = line._replace(kind="error")
                break
    return [line._replace(kind="effect") if line.kind == "blank" else line for line in lines]


def _within(lines: list[Line]) -> list[Line]:
    """Tell the error of ``Between instruments`` and ``Within instruments``, whatever they are."""
    names = [line.label.lower().partition(" ") for line in lines]
    pairs = {name for word, _, name in names if name and word == "between"}
    pairs &= {name for word, _, name in names if word == "within"}
    if not pairs or any(line.kind == "error" for line in lines):
        return lines
    return [
        line._replace(kind="error") if word == "within" and name in pairs else line
        for line, (word, _, name) in zip(lines, names, strict=True)
    ]


def _strata(lines: list[Line]) -> list[list[Line]]:
    """Split where effects are followed by the error that they are tested against."""
    errors = [line for line in lines if line.kind == "error"]
    if len(errors) < 2:
        return [lines]
    corrections = [next((c for c in line.contexts if correction_of(c)), "") for line in lines]
    if any(corrections):
        keys = dict.fromkeys(corrections)
        return [
            stratum
            for key in keys
            for stratum in _strata_in_order(
                [line for line, c in zip(lines, corrections, strict=True) if c == key]
            )
        ]
    sections = [list(group) for _, group in itertools.groupby(lines, lambda line: line.section)]
    if all(any(line.kind == "error" for line in section) for section in sections):
        return [stratum for section in sections for stratum in _strata_in_order(section)]
    return _strata_in_order(lines)


def _strata_in_order(lines: list[Line]) -> list[list[Line]]:
    kinds = Counter(line.kind for line in lines)
    own_totals = kinds["total"] == kinds["error"]
    strata: list[list[Line]] = [[]]
    for line in lines:
        if line.kind == "total":
            # One for all strata is not the sum of any; each may have its own.
            if own_totals and len(strata) > 1 and not strata[-1]:
                strata[-2].append(line)
            continue
        strata[-1].append(line)
        if line.kind == "error":
            strata.append([])
    return [
        stratum
        for stratum in strata
        if any(line.kind == "effect" or line.kind == "model" for line in stratum)
    ]


def bare(sheet: Sheet) -> Found | None:
    """Return the claim of an analysis printed without headings, told by its arithmetic.

    Of SS/df = MS, for the effect and for the error, and MS/MSE = F, two at least must hold.
    """
    if roles_in(sheet.columns) or not 2 <= len(sheet.panel.rows) <= MOST or sheet.panel.heads:
        return None
    for order in (("ss", "df", "ms", "F", "p"), ("df", "ss", "ms", "F", "p")):
        columns = tuple(
            c._replace(heading=c.heading._replace(roles=(order[c.number - 1],)))
            if 1 <= c.number <= len(order)
            else c
            for c in sheet.columns
        )
        own = sheet._replace(columns=columns)
        lines = _lines(own, columns[1:6])
        error = next((line for line in lines if line.kind == "error"), None)
        tested = [line for line in lines if line.kind in {"effect", "model"} and "F" in line.cells]
        if error is None or not tested:
            continue
        holds = [is_mean(tested[0]), is_mean(error), is_ratio(tested[0], error) is True]
        if sum(holds) >= 2:
            return anova(own)
    return None
