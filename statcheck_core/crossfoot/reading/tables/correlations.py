"""Matrices of correlations."""

from __future__ import annotations

import re

from crossfoot.model import Claim, Reading
from crossfoot.reading.tables.columns import labels_of
from crossfoot.reading.tables.contents import Content, content_of
from crossfoot.reading.tables.grid import Box
from crossfoot.reading.tables.making import Column, Found, Sheet, claim, marked, reading
from crossfoot.reading.tables.rows import label_of

_NUMBERED = re.compile(r"\(?(?P<number>\d{1,3})[.):]?\s*(?P<name>.*)")
_CORRELATION = re.compile(
    r"correlat|intercorrel|korrelation|corrélation|correlaci|correlaz|相关|상관", re.IGNORECASE
)
_OTHERWISE = re.compile(
    r"partial|controlling|above\sthe\sdiagonal|below\sthe\sdiagonal|upper\striangle|covarianc|disattenuat|loadings",
    re.IGNORECASE,
)
_MATRIX_END = re.compile(r"\D{0,3}[-+]?0?[.,]\d+|[-+]?1(?:[.,]0+)?")


def correlations(sheet: Sheet) -> Found | None:
    """Return the claims of a matrix of correlations, or None where it is none."""
    said = _CORRELATION.search(sheet.words) is not None
    labels = labels_of(sheet.panel, sheet.columns)
    if not labels or len(sheet.panel.rows) < 2:
        return None
    names = _names(sheet, labels)
    columns = _matched(sheet, names)
    if len(columns) < 2 or not _is_matrix(sheet, columns, said):
        return None
    cases = None if _OTHERWISE.search(sheet.words) else sheet.legend.cases
    n = None if cases is None else _n(sheet, cases.start, cases.end, cases.low, cases.high)
    claims: list[Claim] = []
    for index, row in enumerate(sheet.panel.rows):
        for column, name in columns:
            content = content_of(row[column.number].text, row[column.number].start)
            if content is None or len(content.plain) != 1 or names[index] == name:
                continue
            found = _correlation(sheet, row, column, content, (names[index], name), n, labels)
            claims += [found] if found is not None else []
    return Found(tuple(claims), frozenset(range(len(sheet.panel.rows)))) if claims else None


def _names(sheet: Sheet, labels: list[Column]) -> list[str]:
    """Return the names of the rows."""
    return [
        label_of(" ".join(row[c.number].text for c in labels if row[c.number].text))
        for row in sheet.panel.rows
    ]


def _matched(sheet: Sheet, names: list[str]) -> list[tuple[Column, str]]:
    """Return the columns that stand for rows, by number or by name, with the rows' names."""
    numbered = {}
    for order, name in enumerate(names, start=1):
        match = _NUMBERED.fullmatch(name)
        numbered[match["number"] if match else str(order)] = name
    exact = {name.lower(): name for name in names if name}
    exact |= {
        m["name"].lower(): name for name in names if (m := _NUMBERED.fullmatch(name)) and m["name"]
    }
    found: list[tuple[Column, str]] = []
    for column in sheet.columns:
        text = label_of(column.box.text)
        number = text.strip("().")
        if number in numbered and number.isdigit():
            found.append((column, numbered[number]))
        elif text.lower() in exact:
            found.append((column, exact[text.lower()]))
    return found


def _is_matrix(sheet: Sheet, columns: list[tuple[Column, str]], said: bool) -> bool:
    """Say whether the cells of the columns can be correlations, with a triangle left empty."""
    cells = [row[c.number].text for row in sheet.panel.rows for c, _ in columns]
    numbers = [
        text for text in cells if (content := content_of(text)) is not None and content.numbers
    ]
    fitting = [text for text in numbers if _MATRIX_END.match(text)]
    if not numbers or len(fitting) < 0.9 * len(numbers):
        return False
    triangle = len(numbers) <= 0.75 * len(cells) or said
    return triangle and (said or any("*" in text for text in numbers))


def _n(sheet: Sheet, start: int, end: int, low: float, high: float) -> Reading:
    from crossfoot.model import Span

    return Reading("n", "=", sheet.shown[start:end], low, high, Span(start, end))


def _correlation(
    sheet: Sheet,
    row: tuple[Box, ...],
    column: Column,
    content: Content,
    names: tuple[str, str],
    n: Reading | None,
    labels: list[Column],
) -> Claim | None:
    r = reading(sheet, content.plain[0], "r")
    if r is None or not (r.low >= -1.5 and r.high <= 1.5) or r.relation != "=":
        return None
    readings = [r]
    mark, default = marked(sheet, content)
    if len(content.enclosed) == 1 and sheet.legend.enclosed == "p":
        p = reading(sheet, content.enclosed[0], "p")
        readings += [p] if p is not None else []
        if mark is not None and p is not None:
            mark = mark._replace(term="stars")
    readings += [mark] if mark is not None else []
    if n is None and mark is None and len(readings) < 2:
        return None
    boxes = (*(row[c.number] for c in labels), row[column.number])
    label = f"{names[0]} × {names[1]}"
    context = ("default-stars",) if default else ()
    found = claim(sheet, "correlation", label, readings, boxes, contexts=context)
    if n is None:
        return found
    ordered = tuple(sorted((*found.readings, n), key=lambda other: other.span))
    return found._replace(readings=ordered)
