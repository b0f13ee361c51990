"""Tables as every format hands them on: cells with their text and place.

A table shows itself like any other block: its caption, a row a line with its cells between bars,
then its notes. Cells, caption and notes are spans of that one visible text, so that whatever is
read in them finds its way back to the source as it does in prose.
"""

from __future__ import annotations

from collections.abc import Sequence
from typing import NamedTuple

from crossfoot.documents.visible import Builder, Visible, flat
from crossfoot.model import Span

#: Stands between two cells of a row; rows stand on lines of their own.
CELL = " | "

#: Cells beyond these are not kept: no printed table is so wide, and spans may claim anything.
WIDEST = 200


class Cell(NamedTuple):
    """A cell of a table.

    Attributes
    ----------
    start, end
        Place of its text in the visible text of the table; an empty cell is an empty span.
    row, column
        Where it starts, from 0.
    rows, columns
        How many it spans.
    head
        Whether the markup calls it a header.
    """

    start: int
    end: int
    row: int
    column: int
    rows: int = 1
    columns: int = 1
    head: bool = False


class Table(NamedTuple):
    """A table, whatever it was written in.

    Attributes
    ----------
    visible
        What a reader sees of its block, caption and notes included.
    cells
        By row, then by column.
    heads
        How many of the first rows the markup sets off as its header; 0 where it does not say.
    caption
        Place of the caption in the visible text.
    notes
        Places of the notes.
    """

    visible: Visible
    cells: tuple[Cell, ...]
    heads: int = 0
    caption: Span | None = None
    notes: tuple[Span, ...] = ()

    def text(self, cell: Cell) -> str:
        """Return what a reader sees in a cell."""
        return self.visible.text[cell.start : cell.end]


class TableBuilder:
    """Collects a table in the order of its source."""

    def __init__(self) -> None:
        self._out = Builder()
        self._length = 0
        self._at = 0  # where the source of the last part ends
        self._cells: list[Cell] = []
        self._row = -1
        self._column = 0
        self._first = True  # whether the row has no cell yet
        self._heads = 0
        self._caption: Span | None = None
        self._notes: list[Span] = []
        #: For each column the row up to which a cell from above reaches.
        self._taken: dict[int, int] = {}

    @property
    def height(self) -> int:
        """How many rows there are."""
        return self._row + 1

    def row(self, at: int, *, head: bool = False) -> None:
        """Start a row at ``at`` in the source; ``head`` says that it belongs to the header."""
        self._line(at)
        self._row += 1
        self._column = 0
        self._first = True
        if head and self._heads == self._row:
            self._heads += 1

    def cell(
        self,
        visible: Visible,
        start: int,
        end: int,
        *,
        rows: int = 1,
        columns: int = 1,
        head: bool = False,
        overlaid: bool = False,
    ) -> None:
        """Add a cell whose source spans ``start`` to ``end``; its text is put on one line.

        Where it spans columns, or a cell above reaches into its row, empty cells are shown.
        ``overlaid`` says that the rows it reaches into have empty cells of their own there.
        """
        while self._taken.get(self._column, -1) >= self._row:
            self._next(start)
        self._bar(start)
        span = self._add(flat(visible), end)
        columns = max(1, min(columns, WIDEST - self._column))
        if self._column < WIDEST:
            rows = max(1, rows)
            self._cells.append(Cell(*span, self._row, self._column, rows, columns, head))
            reach = 1 if overlaid else rows
            for column in range(self._column, self._column + columns):
                self._taken[column] = self._row + reach - 1
        self._column += 1
        for _ in range(columns - 1):
            self._next(end)

    def skip(self, at: int) -> None:
        """Leave a column of the row without a cell."""
        self._next(at)

    def head(self) -> None:
        """Say that all rows so far are the header."""
        self._heads = self._row + 1

    def _next(self, at: int) -> None:
        """Show an empty cell."""
        self._bar(at)
        self._column += 1
        self._at = max(self._at, at)

    def _bar(self, at: int) -> None:
        """Part a cell from the one before it."""
        if not self._first:
            self._put(CELL, min(self._at, at), at)
        self._first = False

    def caption(self, visible: Visible, start: int, end: int) -> None:
        """Add the caption, on a line of its own."""
        self._line(start)
        span = self._add(flat(visible), end)
        self._caption = span if self._caption is None else Span(self._caption.start, span.end)

    def note(self, visible: Visible, start: int, end: int) -> None:
        """Add a note, on a line of its own."""
        self._line(start)
        self._notes.append(self._add(flat(visible), end))

    def build(self) -> Table:
        """Return the table."""
        visible = self._out.build()
        return Table(visible, tuple(self._cells), self._heads, self._caption, tuple(self._notes))

    def _line(self, at: int) -> None:
        if self._length:
            self._put("\n", min(self._at, at), at)
        self._at = at

    def _put(self, text: str, start: int, end: int) -> None:
        self._out.put(text, start, end)
        self._length += len(text)

    def _add(self, visible: Visible, end: int) -> Span:
        start = self._length
        self._out.add(visible)
        self._length += len(visible.text)
        self._at = end
        return Span(start, self._length)


def shown_table(visible: Visible) -> Table:
    """Return the table that visible text shows: a row a line, cells between bars."""
    cells: list[Cell] = []
    at = 0
    for row, line in enumerate(visible.text.split("\n")):
        for column, text in enumerate(line.split(CELL)):
            if column < WIDEST:
                cells.append(Cell(at, at + len(text), row, column))
            at += len(text) + len(CELL)
        at += 1 - len(CELL)
    return Table(visible, tuple(cells))


def surrounded(
    before: Sequence[tuple[Visible, int]],
    table: Table,
    start: int,
    after: Sequence[tuple[Visible, int]],
) -> Table:
    """Return a table with what stands around it, each with the place where its source starts."""
    out = Builder()
    length = 0
    at = 0
    spans: list[Span] = []
    shift = 0
    for shown, offset in (*before, (table.visible, start), *after):
        inner = shown is table.visible
        text = shown if inner else flat(shown)
        if length:
            out.put("\n", min(at, offset), offset)
            length += 1
        if inner:
            shift = length
        spans.append(Span(length, length + len(text.text)))
        out.add(text, offset)
        length += len(text.text)
        at = offset + (text.pieces[-1].end if text.pieces else 0)
    caption = _moved(table.caption, shift)
    if before:
        caption = Span(spans[0].start, spans[len(before) - 1].end)
    return Table(
        out.build(),
        tuple(
            cell._replace(start=cell.start + shift, end=cell.end + shift) for cell in table.cells
        ),
        table.heads,
        caption,
        (*(Span(a + shift, b + shift) for a, b in table.notes), *spans[len(before) + 1 :]),
    )


def _moved(span: Span | None, by: int) -> Span | None:
    return None if span is None else Span(span.start + by, span.end + by)
