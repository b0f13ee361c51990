"""What stands behind the numbers of a row: words of a last column, or a further heading."""

from __future__ import annotations

import re
from collections.abc import Sequence

from crossfoot.reading.aligned.lines import Line, Token, Word, is_value, values_of, words_of
from crossfoot.reading.aligned.placing import Columns, Row, placed
from crossfoot.reading.tables.headings import parse

#: The heading of p under the column of F, behind the numbers of a row.
HEAD_BEHIND = re.compile(r"\d\s{2,60}(Prob\s?>\s?F|P-?[vV]alue)\s{0,9}$")


def with_heading_below(
    text: str,
    lines: Sequence[Line],
    raw: Sequence[tuple[int, list[Word], list[Word]]],
    columns: Columns,
    first: int,
    below: tuple[int, Word] | None,
) -> tuple[list[Row], Columns]:
    """Return rows and columns; a heading behind a row makes a column of the number beneath it.

    That number belongs to the first row, whose statistic stands in the column above.
    """
    if below is None:
        return placed(text, lines, raw, columns, first), columns
    number, word = below
    beneath = next(((n, v) for n, (at, _, v) in enumerate(raw) if at > number and v), None)
    if beneath is None:
        return placed(text, lines, raw, columns, first), columns
    place, values = beneath
    at, label, _ = raw[place]
    shorter = [*raw[:place], (at, label, values[:-1]), *raw[place + 1 :]]
    rows = placed(text, lines, shorter, columns, first)
    rows = [
        row._replace(cells=(*row.cells, values[-1] if n == 0 else None))
        for n, row in enumerate(rows)
    ]
    token = Token(word.text, word.start, word.end, parse(word.text))
    start = word.start - lines[number].start
    wider = columns._replace(
        heads=(*columns.heads, token), spans=(*columns.spans, (start, start + len(word.text)))
    )
    return rows, wider


def with_words_behind(text: str, line: Line, columns: Columns) -> tuple[list[Word], list[Word]]:
    """Return label and values of a row whose last columns hold words: the name of a method."""
    words = values_of(text, words_of(text, line.start, line.end))
    wanted = len(columns.heads)
    while wanted and not columns.heads[wanted - 1].heading.roles:
        wanted -= 1
    last = len(words)
    while last and not is_value(words[last - 1].text):
        last -= 1
    first = last
    while first and is_value(words[first - 1].text):
        first -= 1
    if last - first == wanted + 1 and words[first].text.isdigit():
        first += 1  # the number of the row
    if last - first != wanted or wanted < 2 or last == len(words):
        return words, []
    behind = Word(text[words[last].start : words[-1].end], words[last].start, words[-1].end)
    return words[:first], [*words[first:last], behind]
