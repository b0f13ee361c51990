"""Tables drawn with characters: piped, ruled in a grid, or aligned under rules."""

from __future__ import annotations

import itertools
import re
from collections.abc import Callable, Iterator

from crossfoot.documents.table import WIDEST, Table, TableBuilder
from crossfoot.documents.visible import Builder
from crossfoot.expressions import expression
from crossfoot.model import Span

#: The line under the header of a pipe table.
DELIMITER = expression(r"[ \t]*+\|?[ \t]*+:?-++:?[ \t]*+(?:[|+][ \t]*+:?-++:?[ \t]*+)*+\|?[ \t]*+")

#: A rule between the rows of a grid table.
GRID = expression(r"[ \t]*\+(?:[-=:]++\+)++[ \t]*")

#: The rules over or under the columns of a simple table.
DASHES = expression(r" *(?:-+(?: +-+)+|=+(?: +=+)+) *")

_FULL = expression(r"[ \t]*-{3,}[ \t]*")
_BAR = expression(r"\\.|`[^`\n]{1,200}`|(\|)")
_QUOTE = expression(r"(?: {0,3}> ?)+")


#: Shows what stands between two places of a source.
Inline = Callable[[Builder, str, int, int], None]


def read_table(source: str, inline: Inline) -> Table:
    """Read a table, its cells by ``inline``."""
    lines = list(_lines(source))
    if any(GRID.fullmatch(source[start:end]) for start, end in lines):
        return _ruled(source, lines, inline)
    table = TableBuilder()
    columns = _columns(source, lines)
    full = [i for i, (a, b) in enumerate(lines) if _FULL.fullmatch(source[a:b])]
    rows: list[tuple[int, list[list[Span]]]] = []
    open_row = False  # in a table of several lines a row, whether one is being collected
    several = columns is not None and len(full) >= 2
    for start, end in lines:
        line = source[start:end]
        if DELIMITER.fullmatch(line) or (DASHES.fullmatch(line) and columns is not None):
            if rows and not table.height:
                _add(table, source, rows, inline, head=True)
                rows = []
            open_row = False
            continue
        if not line.strip() or _FULL.fullmatch(line):
            open_row = False
            continue
        cells = _piped(source, start, end) if columns is None else _aligned(columns, start, end)
        if several and open_row:
            for above, below in zip(rows[-1][1], cells, strict=False):
                above.append(below)
        else:
            rows.append((start, [[cell] for cell in cells]))
        open_row = True
    _add(table, source, rows, inline, head=False)
    return table.build()


def _add(
    table: TableBuilder,
    source: str,
    rows: list[tuple[int, list[list[Span]]]],
    inline: Inline,
    *,
    head: bool,
) -> None:
    """Add rows whose cells are made of stretches on several lines."""
    for start, cells in rows:
        table.row(start, head=head)
        for stretches in cells:
            _cell(table, source, stretches, inline)


def _cell(
    table: TableBuilder, source: str, stretches: list[Span], inline: Inline, columns: int = 1
) -> None:
    out = Builder()
    for number, stretch in enumerate(stretches):
        if number:
            out.put("\n", stretches[number - 1].end, stretch.start)
        inline(out, source, stretch.start, stretch.end)
    table.cell(out.build(), stretches[0].start, stretches[-1].end, columns=columns)


def _ruled(source: str, lines: list[tuple[int, int]], inline: Inline) -> Table:
    """Read a table whose rows lie between rules of dashes and pluses."""
    table = TableBuilder()
    places: set[int] = set()
    for start, end in lines:
        line = source[start:end]
        if len(places) < WIDEST and GRID.fullmatch(line):
            places.update(found.start() for found in re.finditer(r"\+", line))
    edges = sorted(places)[:WIDEST]
    row: list[tuple[int, int]] = []
    for start, end in lines:
        line = source[start:end]
        if not GRID.fullmatch(line):
            row.append((start, end))
            continue
        if row:
            _ruled_row(table, source, row, edges, inline)
        row = []
        if "=" in line and table.height:
            table.head()
    if row:
        _ruled_row(table, source, row, edges, inline)
    return table.build()


def _ruled_row(
    table: TableBuilder,
    source: str,
    lines: list[tuple[int, int]],
    edges: list[int],
    inline: Inline,
) -> None:
    """Add a row; where a bar is missing on its lines a cell spans columns."""
    start = lines[0][0]
    bars = [
        edge for edge in edges if all(a + edge >= b or source[a + edge] in "|+" for a, b in lines)
    ]
    if len(bars) < 2:
        return
    table.row(start)
    for left, right in itertools.pairwise(bars):
        stretches = [
            Span(min(a + left + 1, b), min(a + right, b)) for a, b in lines if a + left + 1 <= b
        ]
        columns = sum(1 for edge in edges if left < edge <= right)
        _cell(table, source, stretches or [Span(start, start)], inline, columns)


def _lines(source: str) -> Iterator[tuple[int, int]]:
    """Yield the lines without the marks of a quotation."""
    quoted = _QUOTE.match(source) is not None
    start = 0
    for line in source.split("\n"):
        mark = _QUOTE.match(line) if quoted else None
        yield start + (mark.end() if mark else 0), start + len(line)
        start += len(line) + 1


def _columns(source: str, lines: list[tuple[int, int]]) -> list[tuple[int, int]] | None:
    """Return the columns of a simple table, or None where bars part the cells."""
    for start, end in lines:
        line = source[start:end]
        if DASHES.fullmatch(line):
            return [found.span() for found in re.finditer(r"[-=]+", line)]
        if "|" in line and (DELIMITER.fullmatch(line) or GRID.fullmatch(line)):
            return None
    return None


def _piped(source: str, start: int, end: int) -> list[Span]:
    """Return the cells between bars; bars that are escaped or in code do not count."""
    while start < end and source[start] in " \t":
        start += 1
    while start < end and source[end - 1] in " \t":
        end -= 1
    bars = [found.start() for found in _BAR.finditer(source, start, end) if found[1] is not None]
    if bars and bars[0] == start:
        start += 1
        bars = bars[1:]
    if bars and bars[-1] == end - 1:
        end = bars.pop()
    edges = [start - 1, *bars[:WIDEST], end]
    return [_stripped(source, left + 1, right) for left, right in itertools.pairwise(edges)]


def _stripped(source: str, start: int, end: int) -> Span:
    """Return a span without the spaces at its ends."""
    text = source[start:end]
    lead = len(text) - len(text.lstrip())
    return Span(start + lead, max(start + lead, start + len(text.rstrip())))


def _aligned(columns: list[tuple[int, int]], start: int, end: int) -> list[Span]:
    """Return the cells of a simple table: text belongs to the column whose dashes it is near."""
    edges = [start]
    for (_, left_end), (right_start, _) in itertools.pairwise(columns):
        edges.append(min(end, start + (left_end + right_start) // 2))
    edges.append(end)
    return [Span(left, right) for left, right in itertools.pairwise(edges)]
