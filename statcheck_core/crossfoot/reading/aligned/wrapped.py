"""Tables too wide for the page, whose further columns are printed beneath the first ones."""

from __future__ import annotations

from collections.abc import Sequence

from crossfoot.reading.aligned.lines import (
    Line,
    is_value,
    label_in,
    starts_panel,
    tokens_of,
    words_of,
)
from crossfoot.reading.aligned.placing import Columns, Row, assigned


def with_panels(
    text: str, lines: Sequence[Line], rows: Sequence[Row], columns: Columns, end: int
) -> tuple[list[Row], Columns, int]:
    """Return rows and columns with those of the panels beneath, and the line after them all."""
    rows = list(rows)
    while end + len(rows) < len(lines) and starts_panel(lines, end, lines[rows[0].line]):
        heads = tokens_of(text, words_of(text, lines[end].start, lines[end].end))
        spans = [(t.start - lines[end].start, t.end - lines[end].start) for t in heads]
        wider: list[Row] = []
        for row, line in zip(rows, lines[end + 1 : end + 1 + len(rows)], strict=True):
            label = label_in(line)
            if label is None or label != label_in(lines[row.line]):
                return rows, columns, end
            values = words_of(text, line.start + line.text.index(label) + len(label), line.end)
            if len(values) > len(heads) or not any(is_value(value.text) for value in values):
                return rows, columns, end
            cells = assigned(values, spans, line.start, loose=False)
            wider.append(row._replace(cells=(*row.cells, *cells)))
        columns = columns._replace(heads=(*columns.heads, *heads), spans=(*columns.spans, *spans))
        rows, end = wider, end + 1 + len(rows)
    return rows, columns, end
