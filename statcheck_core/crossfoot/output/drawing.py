"""Rows of a table as they are drawn beside each other: columns under columns."""

from __future__ import annotations

import re
from collections.abc import Sequence

from crossfoot.documents.table import CELL
from crossfoot.output.excerpt import MARK, UNMARK
from crossfoot.output.wrapping import wrapped

_BAR = CELL.strip()
#: Between cells; of empty ones only the bars may be left.
_EDGE = re.compile(r"(?:^|(?<=\s))\|(?=\s|$)")


def drawn(rows: Sequence[str], width: int, indent: str) -> list[str]:
    """Return rows as lines of at most ``width`` columns, aligned where they are narrow enough.

    Parameters
    ----------
    rows
        From :func:`crossfoot.output.excerpt.quotation`.
    width
        Columns to a line, the indent among them.
    indent
        What stands before each line.
    """
    if len(rows) > 1:
        cells = [[part.strip() for part in _EDGE.split(row)] for row in rows]
        if len({len(row) for row in cells}) == 1 and len(cells[0]) > 1:
            lines = _in_columns(cells)
        else:
            lines = _as_printed(rows)
        if all(len(line) + len(indent) <= width for line in lines):
            return [f"{indent}{line}" for line in lines]
    return [line for row in rows for line in wrapped(" ".join(row.split()), width, indent)]


def _in_columns(cells: Sequence[Sequence[str]]) -> list[str]:
    """Set names flush left and numbers flush right."""
    widths = [max(map(len, column)) for column in zip(*cells, strict=True)]
    return [
        CELL.join(
            cell.rjust(width) if number else cell.ljust(width)
            for number, (cell, width) in enumerate(zip(row, widths, strict=True))
        ).rstrip(f"{_BAR} ")
        for row in cells
    ]


def _as_printed(rows: Sequence[str]) -> list[str]:
    """Keep what is aligned by spaces so: the marks around a reading take the place of some."""
    lines = [
        row.replace(f"  {MARK}", f" {MARK}").replace(f"{UNMARK}  ", f"{UNMARK} ") for row in rows
    ]
    common = min(len(line) - len(line.lstrip()) for line in lines)
    return [line[common:].rstrip() for line in lines]
