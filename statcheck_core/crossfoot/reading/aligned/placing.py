"""From the values of lines to the cells of rows: by order, or by where they stand."""

from __future__ import annotations

import itertools
from collections.abc import Sequence
from typing import NamedTuple

from crossfoot.reading.aligned.lines import MARKS, Line, Token, Word


class Columns(NamedTuple):
    """The columns of a table: the headings, and from where to where each reaches."""

    labels: tuple[Token, ...]
    heads: tuple[Token, ...]
    spans: tuple[tuple[int, int], ...]


class Row(NamedTuple):
    """A row: its label and, for each column, what stands in it."""

    line: int
    label: Word | None
    cells: tuple[Word | None, ...]


def placed(
    text: str,
    lines: Sequence[Line],
    raw: Sequence[tuple[int, list[Word], list[Word]]],
    columns: Columns,
    first: int,
) -> list[Row]:
    """Assign values to columns: in order where there is one for each, else by their place."""
    width = len(columns.heads)
    spans = list(columns.spans)
    loose = _collapsed(text, lines, raw)
    prepared: list[tuple[int, list[Word], list[Word]]] = []
    for number, label, values in raw:
        values = with_marks(text, values)
        extra = len(values) - width
        if extra > 0 and all(word.text.strip("()") != "" for word in values[:extra]):
            label, values = [*label, *values[:extra]], values[extra:]
        prepared.append((number, label, values))
        if len(values) == width and not loose:
            offset = lines[number].start
            spans = [
                (min(a, word.start - offset), max(b, word.end - offset))
                for (a, b), word in zip(spans, values, strict=True)
            ]
    rows: list[Row] = []
    named = columns.labels[0].start - lines[first - 1].start if columns.labels else 0
    for number, label, values in prepared:
        offset = lines[number].start
        left = spans[0][0]
        if len(label) > 1 and label[0].end - offset < named and label[0].text.isdigit():
            label = label[1:]  # the number of the row, before its name
        while (
            len(values) > 0 and len(values) < width and not loose and values[0].end - offset <= left
        ):
            label, values = [*label, values[0]], values[1:]
        cells = assigned(values, spans, offset, loose)
        name = (
            Word(text[label[0].start : label[-1].end], label[0].start, label[-1].end)
            if label
            else None
        )
        rows.append(Row(number, name, tuple(cells)))
    return rows


def with_marks(text: str, values: Sequence[Word]) -> list[Word]:
    """Join marks that stand after a number, as a column without heading, to the number."""
    joined: list[Word] = []
    for word in values:
        if joined and MARKS.fullmatch(word.text) and word is values[-1] and len(values) > 1:
            if word.text != ".":
                last = joined[-1]
                joined[-1] = Word(text[last.start : word.end], last.start, word.end)
        else:
            joined.append(word)
    return joined


def _collapsed(
    text: str, lines: Sequence[Line], raw: Sequence[tuple[int, list[Word], list[Word]]]
) -> bool:
    """Say whether alignment is lost: all values of all rows are one space apart."""
    rows = [values for _, _, values in raw if len(values) > 1]
    return (
        len(rows) > 0
        and all(b.start - a.end == 1 for values in rows for a, b in itertools.pairwise(values))
        and len({len(lines[number].text) for number, _, _ in raw}) > 1
    )


def assigned(
    values: Sequence[Word], spans: Sequence[tuple[int, int]], offset: int, loose: bool
) -> list[Word | None]:
    """Give each value of a row its column: in order where alignment is lost, else by place."""
    cells: list[Word | None] = [None] * len(spans)
    if len(values) == len(spans) or loose:
        for index, word in enumerate(values[: len(spans)]):
            cells[index] = word
        return cells
    least = 0
    for index, word in enumerate(values):
        most = len(spans) - (len(values) - index)
        choice = max(
            range(least, most + 1), key=lambda c: _nearness(word, spans[c], offset), default=least
        )
        if choice < len(cells):
            cells[choice] = word
        least = choice + 1
    return cells


def _nearness(word: Word, span: tuple[int, int], offset: int) -> tuple[int, int]:
    start, end = word.start - offset, word.end - offset
    overlap = min(end, span[1]) - max(start, span[0])
    return min(overlap, 1), -min(abs(end - span[1]), abs(start - span[0]))
