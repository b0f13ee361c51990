"""Comparisons of nested models, a row a model: what each adds to the one above it.

The difference between two models is an effect, the residual of the largest model its error, and
the residual of the smallest one the total: the table is an analysis of variance.
"""

from __future__ import annotations

from crossfoot.model import Reading
from crossfoot.reading.tables.columns import labels_of, roles_in
from crossfoot.reading.tables.contents import content_of
from crossfoot.reading.tables.grid import Box
from crossfoot.reading.tables.making import Column, Found, Sheet, claim, reading

_NEEDED = frozenset({"df_residual", "rss", "F"})


def comparisons(sheet: Sheet) -> Found | None:
    """Return the claim of a comparison of models, or None where there is none."""
    if not roles_in(sheet.columns) >= _NEEDED or len(sheet.panel.rows) < 2:
        return None
    columns = {c.heading.roles[0]: c for c in sheet.columns if len(c.heading.roles) == 1}
    rows = sheet.panel.rows
    single = len(rows) == 2
    readings: list[Reading] = []
    for row in rows[1:]:
        name = None if single else _label(sheet, row)
        for role, quantity in (("df", "df1"), ("ss", "ss"), ("F", "F"), ("p", "p")):
            found = _cell(sheet, columns.get(role), row, quantity)
            if found is not None:
                term = name or ("model" if quantity == "ss" else None)
                readings.append(found._replace(term=term))
    for row, df, term in ((rows[-1], ("df2", None), "error"), (rows[0], ("df", "total"), "total")):
        found = _cell(sheet, columns["rss"], row, "ss")
        readings += [found._replace(term=term)] if found is not None else []
        found = _cell(sheet, columns["df_residual"], row, df[0])
        readings += [found._replace(term=df[1])] if found is not None else []
    if not any(found.quantity == "F" for found in readings):
        return None
    by_key = {(found.quantity, found.term): found for found in readings}
    for whole, part in ((("ss", "total"), ("ss", "error")), (("df", "total"), ("df2", None))):
        if whole in by_key and part in by_key and by_key[whole].high < by_key[part].low:
            return None  # the models do not grow from row to row
    boxes = [box for row in rows for box in row]
    label = "Comparison of models"
    made = claim(sheet, "anova-table", label, readings, boxes)
    return Found((made,), frozenset(range(len(rows))))


def _label(sheet: Sheet, row: tuple[Box, ...]) -> str:
    words = [row[c.number].text for c in labels_of(sheet.panel, sheet.columns)]
    return f"Model {row[0].row}" if not any(words) else " ".join(filter(None, words))


def _cell(
    sheet: Sheet, column: Column | None, row: tuple[Box, ...], quantity: str
) -> Reading | None:
    if column is None:
        return None
    content = content_of(row[column.number].text, row[column.number].start)
    if content is None or not content.numbers:
        return None
    return reading(sheet, content.numbers[0], quantity)
