"""Which test a table's statistic is of, where a column or the labels of its rows name the test."""

from __future__ import annotations

import re
from collections.abc import Sequence

from crossfoot.reading.nameless import named_test
from crossfoot.reading.tables.contents import content_of, is_blank
from crossfoot.reading.tables.headings import NOTHING, Heading
from crossfoot.reading.tables.making import Column, Sheet

_METHOD = frozenset({"method", "test"})
_STATISTIC = frozenset({"value", "test statistic", "statistic"})
_TESTS = frozenset({"F", "t", "z", "chi2"})
#: What the statistic of a test is; that of a correlation stands beside r.
_STATISTICS = {"F": "F", "t": "t", "z": "z", "chi2": "chi2", "r": "t"}
_ERRORS = frozenset({("se",), ("t",), ("z",)})
_FRACTION = re.compile(r"\d+\.\d*[1-9]")


def by_statistic(sheet: Sheet) -> list[tuple[Sheet, frozenset[int]]]:
    """Return a sheet for each test that one column's statistics are of, and the rows of it.

    The column then has the role that its rows, or their method, name.
    """
    everything = frozenset(range(len(sheet.panel.rows)))
    place = next((n for n, c in enumerate(sheet.columns) if _is_statistic(sheet, c)), None)
    if place is None or any(
        c.heading.roles[:1] and c.heading.roles[0] in _TESTS for c in sheet.columns
    ):
        return [(sheet, everything)]
    kinds: dict[str, set[int]] = {}
    for row in everything:
        kind = _kind(sheet, row, sheet.columns[place])
        if kind in _STATISTICS:
            kinds.setdefault(_STATISTICS[kind], set()).add(row)
    found = []
    for kind, rows in kinds.items():
        columns = list(sheet.columns)
        columns[place] = columns[place]._replace(heading=NOTHING._replace(roles=(kind,)))
        found.append((sheet._replace(columns=tuple(columns)), frozenset(rows)))
    return found or [(sheet, everything)]


def _is_statistic(sheet: Sheet, column: Column) -> bool:
    texts = [row[column.number].text for row in sheet.panel.rows]
    if not any(not is_blank(text) and content_of(text) is not None for text in texts):
        return False
    named = column.box.text.lower() in _STATISTIC and not column.heading.roles
    return named or column.heading.roles == ("statistic",)


def _kind(sheet: Sheet, row: int, statistic: Column) -> str:
    """Return the statistic of a row with p, by its method, its label or its numbers."""
    cells = sheet.panel.rows[row]
    roles = {c.heading.roles: c.number for c in sheet.columns}
    if ("p",) not in roles or is_blank(cells[roles["p",]].text):
        return ""
    said = method_of(sheet, row)
    if not said:
        said = " ".join(box.text for box in cells[:2] if content_of(box.text) is None)
    kind = named_test(said)
    if kind is not None:
        return kind
    if {("df1",), ("df2",)} <= roles.keys():
        return "F"
    df = cells[roles["df",]].text if ("df",) in roles else ""
    signed = cells[statistic.number].text.startswith("-")
    return "t" if df and (signed or _FRACTION.fullmatch(df)) else ""


def method_of(sheet: Sheet, row: int) -> str:
    """Return what a column calls the method of a row; empty where there is none."""
    place = next((c.number for c in sheet.columns if c.box.text.lower() in _METHOD), None)
    return "" if place is None else sheet.panel.rows[row][place].text


def named_beside(columns: Sequence[Column], numeric: Sequence[bool]) -> list[Column]:
    """Tell what their neighbours make of columns called ``parameter`` and ``Value``.

    Beside a statistic the first is its degrees of freedom; beside an error the second is what the
    error is of.
    """
    roles = {column.heading.roles for column in columns}
    told = list(columns)
    for place, (column, numbers) in enumerate(zip(columns, numeric, strict=True)):
        name = column.box.text.lower()
        if name == "parameter" and ("statistic",) in roles and numbers and place:
            told[place] = column._replace(heading=Heading(("df",)))
        elif name == "value" and not column.heading.roles and len(roles & _ERRORS) > 1:
            told[place] = column._replace(heading=Heading(("b",)))
    return told


def with_own_p(columns: Sequence[Column]) -> tuple[Column, ...]:
    """Leave out each p that follows an F or χ², where another follows t or z."""
    test = ""
    own: dict[str, list[int]] = {"t": [], "F": []}
    for place, column in enumerate(columns):
        role = column.heading.roles[:1]
        if role and role[0] in _TESTS:
            test = "t" if role[0] in {"t", "z"} else "F"
        elif role == ("p",) and test:
            own[test].append(place)
    if not own["t"] or not own["F"]:
        return tuple(columns)
    return tuple(
        column._replace(heading=NOTHING) if place in own["F"] else column
        for place, column in enumerate(columns)
    )


def each_test(columns: Sequence[Column]) -> list[tuple[Column, ...]]:
    """Part the columns of several tests, each of which has a p of its own behind it."""
    places = [
        n for n, c in enumerate(columns) if c.heading.roles[:1] and c.heading.roles[0] in _TESTS
    ]
    tests = {columns[n].heading.roles for n in places}
    ends = [*places[1:], len(columns)]
    parts = [tuple(columns[a:b]) for a, b in zip(places, ends, strict=True)]
    whole = all(any(c.heading.roles == ("p",) for c in part) for part in parts)
    if len(tests) < 2 or len(tests) != len(places) or not whole:
        return [tuple(columns)]
    return [(*columns[: places[0]], *part) for part in parts]
