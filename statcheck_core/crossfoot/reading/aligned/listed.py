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
_ROW = re.compile(r"\s*(?P<label>[A-Za-z][\w ×*().-]{0,40}?)\s?:\s+(?=[A-Za-z])")

Place = tuple[int, int]


class Listing(NamedTuple):
    """Rows of cells: the lines they stand on, the header first where there is one."""

    first: int
    last: int
    header: tuple[Place | None, ...]
    rows: tuple[tuple[Place | None, ...], ...]


def separated(lines: Sequence[Line], number: int) -> Listing | None:
    """Return the table that starts with a line of names between commas, tabs or the like."""
    line = lines[number]
    for mark in ("\t", ";", ",", "|"):
        if line.text.count(mark) < 2:
            continue
        header = _cells(line, mark)
        roles = [
            headings.parse(line.text[a - line.start : b - line.start].strip('"')).roles
            for a, b in header
        ]
        strong = [r for r in roles if r and r[0] not in _WEAK]
        if len(strong) < 2 or 2 * len([r for r in roles if r]) < len(roles):
            continue
        rows: list[tuple[Place | None, ...]] = []
        last = number
        for index in range(number + 1, len(lines)):
            below = lines[index]
            if mark == "|" and below.rule:
                continue
            cells = _cells(below, mark)
            if below.blank or not 2 <= len(cells) <= len(header) + 1:
                break
            rows.append(tuple(cells))
            last = index
        if rows:
            width = max(len(header), *(len(row) for row in rows))
            return Listing(
                number, last, _padded(header, width), tuple(_padded(row, width) for row in rows)
            )
    return None


def _cells(line: Line, mark: str) -> list[Place]:
    text = line.text
    places: list[Place] = []
    at = 0
    parts = text.split(mark)
    for part in parts:
        start = at + len(part) - len(part.lstrip(' "'))
        end = at + len(part.rstrip(' "'))
        places.append((line.start + start, line.start + max(start, end)))
        at += len(part) + 1
    if mark == "|":
        if text.lstrip().startswith("|"):
            places = places[1:]
        if text.rstrip().endswith("|"):
            places = places[:-1]
    return places


def _padded(cells: Sequence[Place | None], width: int) -> tuple[Place | None, ...]:
    return (*cells, *(None,) * (width - len(cells)))


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
