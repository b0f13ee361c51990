"""Tables without alignment: values between commas, rows that name each value."""

from __future__ import annotations

import re
from collections.abc import Sequence
from typing import NamedTuple

from crossfoot.reading.aligned.lines import Line
from crossfoot.reading.numerals import NUMERAL
from crossfoot.reading.tables import headings

_WEAK = frozenset({"label", "n", "mean", "sd", "r", "R"})
_NAMED = re.compile(
    rf"(?P<name>[A-Za-z][\w .²^-]{{0,24}}?)\s?=\s?"
    rf"(?P<value>[<>]?\s?{NUMERAL}\*{{0,3}})(?=\s*(?:[,;]|$))"
)
_RECORDED = re.compile(
    r'"(?P<name>[\w .>|()-]{1,24})"\s?:\s?'
    r'(?:(?P<number>-?[\d.]{1,20}(?:[eE][-+]?\d{1,3})?)(?![\w.])|"(?P<word>[^"]{1,40})")'
)
_ROW = re.compile(r"\s*(?P<label>[A-Za-z][\w ×*().-]{0,40}?)\s?:\s+(?=[A-Za-z])")

Place = tuple[int, int]


class Listing(NamedTuple):
    """Rows of cells: the lines they stand on, the header first where there is one."""

    first: int
    last: int
    header: tuple[Place | None, ...]
    rows: tuple[tuple[Place | None, ...], ...]


def separated(lines: Sequence[Line], number: int) -> Listing | None:
    """Return the table whose cells are parted by tabs, bars, semicolons or commas.

    Tabs and bars part nothing else; commas and semicolons need a line of names before the rows.
    """
    line = lines[number]
    for mark in ("\t", "|", ";", ","):
        header = _cells(line, mark)
        if len(header) < (2 if mark == "\t" else 3):
            continue
        if mark in ";," and not _names(line, header):
            continue
        rows: list[tuple[Place | None, ...]] = []
        last = number
        for index in range(number + 1, len(lines)):
            below = lines[index]
            if below.rule or (mark == "\t" and mark in below.text and below.blank):
                continue
            cells = _cells(below, mark)
            alone = mark == "\t" and not cells and len(below.text) <= 60
            if below.blank or not (alone or 2 <= len(cells) <= len(header) + 1):
                break
            if alone:
                cells = [(below.start, below.end)]
            rows.append(tuple(cells))
            last = index
        if any(len(row) > 1 for row in rows):
            width = max(len(header), *(len(row) for row in rows))
            padded = tuple(_padded(row, width) for row in rows)
            return Listing(number, last, _padded(header, width), padded)
    return None


def _names(line: Line, header: Sequence[Place]) -> bool:
    """Say whether most cells of a line name what a column holds."""
    texts = [line.text[a - line.start : b - line.start].strip('"') for a, b in header]
    roles = [headings.parse(text).roles for text in texts]
    strong = [r for r in roles if r and r[0] not in _WEAK]
    return len(strong) >= 2 and 2 * len([r for r in roles if r]) >= len(roles)


_PARTS = {
    "\t": re.compile(r"\t"),
    "|": re.compile(r"(?:^|(?<=\s))\|(?=\s|$)"),
    ";": re.compile(r";"),
    ",": re.compile(r","),
}


def _cells(line: Line, mark: str) -> list[Place]:
    """Return the cells of a line between marks; those at its ends enclose nothing."""
    text = line.text
    if mark not in text or len(text) > 2000:
        return []
    edges = [found.span() for found in _PARTS[mark].finditer(text)]
    starts = [0, *(end for _, end in edges)]
    stops = [*(start for start, _ in edges), len(text)]
    places: list[Place] = []
    for start, stop in zip(starts, stops, strict=True):
        part = text[start:stop]
        first = start + len(part) - len(part.lstrip(' "'))
        last = start + len(part.rstrip(' "'))
        places.append((line.start + first, line.start + max(first, last)))
    if mark == "|":
        places = places[1:] if text.lstrip().startswith("|") else places
        places = places[:-1] if text.rstrip().endswith("|") else places
    return places


def _padded(cells: Sequence[Place | None], width: int) -> tuple[Place | None, ...]:
    return (*cells, *(None,) * (width - len(cells)))


def records(lines: Sequence[Line], number: int) -> Listing | None:
    """Return the table of records in braces, a line each: ``{"term": "a", "df1": 2, "F": 3.9}``."""
    header: dict[str, int] = {}
    places: list[Place | None] = [None]
    rows: list[list[Place | None]] = []
    last = number
    for index in range(number, len(lines)):
        line = lines[index]
        text = line.text.strip(" ,[]")
        if not (text.startswith("{") and text.endswith("}")) or len(text) > 400:
            break
        cells: list[Place | None] = [None] * len(places)
        for match in _RECORDED.finditer(line.text):
            group = "number" if match["number"] else "word"
            place = (line.start + match.start(group), line.start + match.end(group))
            if match["word"]:
                cells[0] = cells[0] or place
                continue
            if match["name"] not in header:
                header[match["name"]] = len(places)
                places.append((line.start + match.start("name"), line.start + match.end("name")))
                cells.append(None)
            cells[header[match["name"]]] = place
        rows.append(cells)
        last = index
    roles = {role for name in header for role in headings.parse(name).roles}
    if not rows or len(roles - _WEAK) < 3:
        return None
    width = len(places)
    return Listing(number, last, tuple(places), tuple(_padded(row, width) for row in rows))


def named(lines: Sequence[Line], number: int) -> Listing | None:
    """Return the table whose rows name each value: ``Within: SS = 12.1, df = 27``."""
    header: dict[tuple[str, ...], int] = {}
    places: list[Place | None] = [None]
    rows: list[list[Place | None]] = []
    last = number
    for index in range(number, len(lines)):
        line = lines[index]
        label = _ROW.match(line.text)
        if label is None:
            break
        found = [
            (roles, match)
            for match in _NAMED.finditer(line.text, label.end())
            if (roles := headings.parse(match["name"].strip()).roles)
        ]
        if len(found) < 2 and not (rows and found):
            break
        row: dict[int, Place] = {}
        for roles, match in found:
            if roles not in header:
                header[roles] = len(places)
                places.append((line.start + match.start("name"), line.start + match.end("name")))
            row[header[roles]] = (
                line.start + match.start("value"),
                line.start + match.end("value"),
            )
        cells: list[Place | None] = [
            (line.start + label.start("label"), line.start + label.end("label"))
        ]
        cells += [row.get(column) for column in range(1, len(places))]
        rows.append(cells)
        last = index
    if len(rows) < 2 or ("ss",) not in header:
        return None
    width = len(places)
    return Listing(number, last, tuple(places), tuple(_padded(row, width) for row in rows))
