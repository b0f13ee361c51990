"""Models side by side: a column a model, coefficients above, what tells of the fit below."""

from __future__ import annotations

import re
from collections.abc import Sequence
from typing import NamedTuple

from crossfoot.model import Claim, Reading
from crossfoot.reading.tables import fits
from crossfoot.reading.tables.brackets import Sample, may_be_error, told_apart
from crossfoot.reading.tables.columns import labels_of, name_of
from crossfoot.reading.tables.contents import Content, Number, content_of, in_order, is_blank
from crossfoot.reading.tables.grid import Box
from crossfoot.reading.tables.making import Column, Found, Sheet, claim, marked, reading, value

_ESTIMATES = frozenset({"b", "β", "beta"})
_RATIO = re.compile(r"\bodds\sratios?|\bOR\b|exponentiated", re.IGNORECASE)
_STANDARD = re.compile(
    r"(?<!un)(?<!un-)standardi[sz]ed\s(?:coefficients?|betas?|β|estimates?|regression)",
    re.IGNORECASE,
)
_MEANS = re.compile(r"\bmeans?\b|\bM\s?\(SD\)|\bSDs?\b|\bmedians?\b|descriptive", re.IGNORECASE)


class Estimate(NamedTuple):
    """A coefficient of one model: its cell, and a number in brackets that goes with it."""

    label: str
    model: int
    row: int
    number: Number
    content: Content
    enclosed: tuple[Number, ...]
    boxes: tuple[Box, ...]


def side_by_side(sheet: Sheet) -> Found | None:
    """Return the claims of models in columns, or None where there are none."""
    labels = labels_of(sheet.panel, sheet.columns)
    if not labels:
        return None
    models = _models(sheet, {column.number for column in labels})
    if not models:
        return None
    names = [columns[0].text if len(models) > 1 else "" for columns in models]
    summary = fits.fit_rows(sheet, models, names)
    estimates = _estimates(sheet, labels, models)
    estimates = [e for e in estimates if e.row not in summary.rows]
    if not _is_regression(sheet, estimates, summary):
        # A single column of fits is a summary in labels and values.
        return summary if len(models) > 1 and _only_fits(summary) else None
    claims = _claims(sheet, estimates, models, names)
    if not claims and not summary.claims:
        return None
    rows = frozenset(estimate.row for estimate in estimates) | summary.rows
    return Found((*claims, *summary.claims), rows)


def _only_fits(summary: Found) -> bool:
    """Say whether the rows tell of models and of nothing else."""
    strong = [
        c
        for c in summary.claims
        if {r.quantity for r in c.readings} & {"R2_adj", "F", "R2_change", "F_change"}
    ]
    return bool(strong)


def _models(sheet: Sheet, labels: set[int]) -> list[list[Column]]:
    """Return the columns of each model; one that holds only brackets goes with its neighbour."""
    models: list[list[Column]] = []
    for column in sheet.columns:
        if column.number in labels or (
            column.heading.roles and column.heading.roles[0] not in _ESTIMATES
        ):
            if (
                column.number not in labels
                and column.heading.roles
                and column.heading.roles[0] not in fits.FIT | {"p"}
            ):
                return []
            continue
        cells = [row[column.number].text for row in sheet.panel.rows]
        filled = [text for text in cells if not is_blank(text)]
        contents = [content for text in filled if (content := content_of(text)) is not None]
        if not contents:
            continue
        enclosed = [content for content in contents if content.enclosed and not content.plain]
        if models and 2 * len(enclosed) > len(contents) and not _brackets_below(sheet, column):
            models[-1].append(column)
        else:
            models.append([column])
    return models


def _brackets_below(sheet: Sheet, column: Column) -> bool:
    """Say whether a column has its brackets under its numbers."""
    return any(
        (content := content_of(row[column.number].text)) is not None and content.plain
        for row in sheet.panel.rows
    )


def _estimates(
    sheet: Sheet, labels: Sequence[Column], models: Sequence[Sequence[Column]]
) -> list[Estimate]:
    found: list[Estimate] = []
    open_: dict[int, int] = {}  # for each model the estimate that a bracket below belongs to
    for index, row in enumerate(sheet.panel.rows):
        words = tuple(
            row[c.number]
            for c in labels
            if (row[c.number].text and row[c.number].row == row[0].row) or row[c.number].text
        )
        label = name_of(row, labels)
        starts = bool(label) and not _continues(sheet, index, labels)
        if starts:
            open_ = {}
        for number, columns in enumerate(models):
            boxes = [row[c.number] for c in columns if row[c.number].text]
            contents = [c for box in boxes if (c := content_of(box.text, box.start)) is not None]
            plain = [c for c in contents if c.plain]
            enclosed = tuple(n for c in contents for n in c.enclosed)
            if starts and plain and len(plain[0].plain) == 1 and not plain[0].df:
                open_[number] = len(found)
                found.append(
                    Estimate(
                        label,
                        number,
                        index,
                        plain[0].plain[0],
                        plain[0],
                        enclosed,
                        (*words, *boxes),
                    )
                )
            elif not plain and enclosed and number in open_:
                own = found[open_[number]]
                if not own.enclosed:
                    found[open_[number]] = own._replace(
                        enclosed=enclosed, boxes=(*own.boxes, *boxes)
                    )
    return found


def _continues(sheet: Sheet, index: int, labels: Sequence[Column]) -> bool:
    """Say whether a row repeats the label of the row above, because one cell spans both."""
    row = sheet.panel.rows[index]
    return all(row[c.number].row < max(box.row for box in row) for c in labels)


def _is_regression(sheet: Sheet, estimates: Sequence[Estimate], summary: Found) -> bool:
    """Say whether the numbers are coefficients: they have brackets or marks, and a fit below."""
    if not estimates or sheet.legend.enclosed == "sd":
        return False
    quantities = {r.quantity for c in summary.claims for r in c.readings}
    heads = {role for column in sheet.columns for role in column.heading.roles}
    told = sheet.legend.enclosed is not None or bool(heads & _ESTIMATES)
    if not told and (not quantities & {"R2", "R2_adj", "F"} or _MEANS.search(sheet.words)):
        return False
    with_more = [e for e in estimates if e.enclosed or e.content.marks]
    return 2 * len(with_more) >= len(estimates) or (
        bool(quantities & {"R2", "R2_adj", "F"}) and bool(with_more)
    )


def _claims(
    sheet: Sheet,
    estimates: Sequence[Estimate],
    models: Sequence[Sequence[Column]],
    names: Sequence[str],
) -> list[Claim]:
    kind = sheet.legend.enclosed
    if kind is None:
        samples = [s for e in estimates if (s := _sample(sheet, e, estimates)) is not None]
        kind = told_apart(samples) if samples else None
        if kind is None and samples and may_be_error(samples):
            kind = "se?"
    claims: list[Claim] = []
    for estimate in estimates:
        found = _claim(sheet, estimate, kind, models[estimate.model], names[estimate.model])
        claims += [found] if found is not None else []
    return claims


def _sample(sheet: Sheet, estimate: Estimate, estimates: Sequence[Estimate]) -> Sample | None:
    if len(estimate.enclosed) != 1:
        return None
    first = value(reading(sheet, estimate.number, "b"))
    second = value(reading(sheet, estimate.enclosed[0], "se"))
    if first is None or second is None:
        return None
    marked_at_all = any(other.content.marks for other in estimates)
    mark, _ = marked(sheet, estimate.content)
    if mark is not None:
        return Sample(first, second, (mark.low, mark.high))
    levels = [mark.level for mark in sheet.legend.marks.values()] or [0.05]
    return Sample(first, second, (max(levels), 1.0) if marked_at_all else None)


def _quantity(sheet: Sheet, columns: Sequence[Column]) -> str:
    roles = {role for column in columns for role in column.heading.roles}
    words = " ".join((sheet.words, *(column.text for column in columns)))
    if _RATIO.search(words):
        return "odds_ratio"
    if "beta" in roles or ("β" in roles and "b" not in roles) or _STANDARD.search(words):
        return "beta"
    return "b"


def _claim(
    sheet: Sheet, estimate: Estimate, kind: str | None, columns: Sequence[Column], name: str
) -> Claim | None:
    quantity = _quantity(sheet, columns)
    first = reading(sheet, estimate.number, quantity)
    if first is None:
        return None
    readings: list[Reading] = [first]
    mark, default = marked(sheet, estimate.content)
    readings += _enclosed(sheet, estimate, kind, quantity)
    if mark is not None and kind != "se?":
        readings.append(mark)
    if len(readings) < 2 and not (estimate.content.marks is None and sheet.legend.marks):
        return None  # where others have marks, none is what is printed of it
    label = ", ".join(part for part in (estimate.label, name) if part)
    context = ["default-stars"] if default else []
    return claim(sheet, "coefficient", label, readings, estimate.boxes, row=label, contexts=context)


def _enclosed(sheet: Sheet, estimate: Estimate, kind: str | None, quantity: str) -> list[Reading]:
    """Return the readings that the numbers in brackets make."""
    numbers = estimate.enclosed
    if kind == "ci" and len(numbers) == 2:
        low, high = in_order(numbers, sheet.comma)
        pairs = [(low, "ci_low"), (high, "ci_high")]
    elif kind in {"se", "t", "z", "p", "se?"} and len(numbers) == 1:
        if kind.startswith("se") and quantity == "odds_ratio":
            return []
        if kind == "t" and sheet.legend.absolute:
            return []
        pairs = [(numbers[0], kind.rstrip("?"))]
    else:
        return []
    return [found for number, key in pairs if (found := reading(sheet, number, key)) is not None]
