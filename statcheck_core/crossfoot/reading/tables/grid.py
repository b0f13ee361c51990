"""A table as a grid: folded boxes, headers told from data, one panel a header."""

from __future__ import annotations

import itertools
from typing import NamedTuple

from crossfoot.documents.table import Table
from crossfoot.reading.tables import headings
from crossfoot.reading.tables.contents import content_of, is_blank

#: Other ways to write a star, each one character.
_STARS = str.maketrans("∗⁎﹡＊⋆★", "******")
#: Words of a header that are no role: names of models, of what is explained.
_MOST_HEADS = 6
#: The highest number in brackets that may stand for a model.
_MOST_MODELS = 20


class Box(NamedTuple):
    """A cell in a grid: its folded text and place, and where it starts in the grid."""

    text: str
    start: int
    end: int
    row: int
    column: int
    columns: int = 1
    head: bool = False


EMPTY = Box("", 0, 0, -1, -1)


class Panel(NamedTuple):
    """A stretch of a table under one header.

    Attributes
    ----------
    heads
        The rows of the header; a cell that spans columns stands in each of them.
    rows
        The rows below, equally long; a cell that spans rows stands in each of them, one that
        spans columns only in the first.
    """

    heads: tuple[tuple[Box, ...], ...]
    rows: tuple[tuple[Box, ...], ...]

    @property
    def width(self) -> int:
        """How many columns there are."""
        return len((self.rows or self.heads)[0]) if self.rows or self.heads else 0


def panels_of(table: Table, folded: str) -> tuple[Panel, ...]:
    """Return the panels of a table.

    Parameters
    ----------
    table
        The table.
    folded
        Its visible text, folded; as long as the text itself.
    """
    matrix = _matrix(table, folded.translate(_STARS))
    panels: list[Panel] = []
    position = 0
    declared = table.heads
    while position < len(matrix):
        heads = _heads(matrix, position, declared)
        stop = heads
        while stop < len(matrix) and not (stop > heads and _is_header(matrix[stop])):
            stop += 1
        header = _shifted(matrix[position:heads], matrix[heads:stop])
        panels.append(Panel(tuple(header), tuple(_unspread(row) for row in matrix[heads:stop])))
        position = max(stop, position + 1)
        declared = 0
    return tuple(panels)


#: Quantities of which each row of a table of tests or sources of variation prints some.
_ACROSS = frozenset({"ss", "ms", "df", "df1", "df2", "F", "t", "p", "b", "se"})


def transposed(panel: Panel) -> Panel | None:
    """Return a panel whose rows are quantities with rows and columns exchanged, or None.

    Each of its columns is what other tables print as a row: a source of variation, a coefficient.
    """
    if len(panel.heads) != 1 or not 2 <= panel.width <= 40 or not 3 <= len(panel.rows) <= 12:
        return None
    labels = [headings.parse_label(row[0].text).roles for row in panel.rows]
    named = [roles[0] for roles in labels if roles and roles[0] in _ACROSS]
    if len(named) < max(3, len(labels) - 1) or len(set(named)) != len(named):
        return None
    if not {"ss", "ms"} & set(named) and not {"b", "se"} <= set(named):
        return None
    if any(headings.parse(box.text).roles for box in panel.heads[0][1:]):
        return None
    turned = [
        tuple(
            box._replace(row=column, column=row, columns=1) if box.text else EMPTY
            for row, box in enumerate(boxes)
        )
        for column, boxes in enumerate(zip(panel.heads[0], *panel.rows, strict=True))
    ]
    return Panel((turned[0],), tuple(turned[1:]))


def _matrix(table: Table, folded: str) -> list[tuple[Box, ...]]:
    """Return the cells in rows and columns; what spans several stands in each."""
    cells = table.cells
    if not cells:
        return []
    width = max(cell.column + cell.columns for cell in cells)
    height = max(cell.row for cell in cells) + 1
    grid = [[EMPTY] * width for _ in range(height)]
    budget = 4 * (len(cells) + height * 2) + 64  # what spans claim is not worth more than that
    for cell in cells:
        raw = folded[cell.start : cell.end]
        text = raw.strip()
        start = cell.start + len(raw) - len(raw.lstrip())
        box = Box(text, start, start + len(text), cell.row, cell.column, cell.columns, cell.head)
        if not text and grid[cell.row][cell.column].text:
            continue  # the empty cell under one that reaches down
        for row in range(cell.row, min(cell.row + cell.rows, height)):
            for column in range(cell.column, cell.column + cell.columns):
                if budget > 0 or (row == cell.row and column == cell.column):
                    grid[row][column] = box
                    budget -= row != cell.row or column != cell.column
    return [tuple(row) for row in grid]


def _unspread(row: tuple[Box, ...]) -> tuple[Box, ...]:
    """Leave a cell that spans columns in the first of them."""
    return tuple(
        EMPTY if box.columns > 1 and box.column != column else box for column, box in enumerate(row)
    )


def is_number(text: str) -> bool:
    """Say whether a cell holds numbers or marks and nothing else."""
    return not is_blank(text) and content_of(text) is not None


def _is_datum(text: str) -> bool:
    """Say whether a cell holds numbers that are no heading, as ``2.5 %`` is."""
    return is_number(text) and not headings.parse(text).roles


def _heads(matrix: list[tuple[Box, ...]], position: int, declared: int) -> int:
    """Return the index of the first row below the header that starts at ``position``."""
    row = position
    while row < position + declared and not _holds_data(matrix[row]):
        row += 1  # a rule may stand anywhere: rows with numbers are no header
    while (
        row < len(matrix)
        and row - position < _MOST_HEADS
        and _may_be_head(matrix[row], row > position)
    ):
        row += 1
    return row if row < len(matrix) or declared or position else position


def _holds_data(row: tuple[Box, ...]) -> bool:
    """Say whether a row that the markup calls a header holds numbers beside its label."""
    filled = [box for box in row if not is_blank(box.text)]
    if _counts_columns([box.text for box in filled]):
        return False
    beside = [box for box in filled if box.column > 0]
    return any(is_number(box.text) for box in beside) and not _names(beside)


def _may_be_head(row: tuple[Box, ...], follows: bool) -> bool:
    """Say whether a row reads like a header: words, symbols or numbers of columns, no data."""
    filled = [box for box in row if not is_blank(box.text)]
    if not filled or (
        all(box.column == 0 for box in filled) and (follows or filled[0].columns == 1)
    ):
        return False
    if _counts_columns([box.text for box in filled]):
        return True
    if any(_is_datum(box.text) for box in filled if box.column > 0):
        return False
    if not follows:
        return True
    return _names(filled) > 0


def _counts_columns(texts: list[str]) -> bool:
    """Say whether cells number the columns: 1 2 3, or (1) (2) (4) where some are left out."""
    counts = [text.strip("()[]. ") for text in texts if text.strip("()[]. ").isdigit()]
    if len(counts) < 2 or int(counts[0]) > 2:
        return False
    others = [text for text in texts if not text.strip("()[]. ").isdigit()]
    numbers = [int(count) for count in counts]
    steps = {b - a for a, b in itertools.pairwise(numbers)}
    enclosed = all(text[0] in "([" for text in texts if text.strip("()[]. ").isdigit())
    return not any(map(is_number, others)) and (
        steps == {1} or (enclosed and min(steps) > 0 and numbers[-1] <= _MOST_MODELS)
    )


def _names(filled: list[Box]) -> int:
    """Return how many cells of a row name a role, labels aside."""
    roles = [headings.parse(box.text).roles for box in filled]
    return sum(1 for role in roles if role and role != ("label",))


def _is_header(row: tuple[Box, ...]) -> bool:
    """Say whether a row among the data is a header again."""
    filled = [box for box in row if not is_blank(box.text)]
    if len(filled) < 3 or any(is_number(box.text) for box in filled):
        return False
    return _names(filled) >= 2 and 2 * _names(filled) >= len(filled)


def _shifted(heads: list[tuple[Box, ...]], rows: list[tuple[Box, ...]]) -> list[tuple[Box, ...]]:
    """Move a header that is one cell short to the columns it heads.

    Its first cell names a quantity while the first column holds the names of rows, and its last
    column has data without a heading.
    """
    if not heads or not rows:
        return heads
    last = heads[-1]
    if len(last) < 3 or last[-1].text or not last[0].text:
        return heads
    first = headings.parse(last[0].text).roles
    if not first or first == ("label",):
        return heads
    words = [row[0].text for row in rows if row[0].text]
    if not words or any(is_number(word) for word in words) or not any(row[-1].text for row in rows):
        return heads
    return [*heads[:-1], (EMPTY, *last[:-1])]
