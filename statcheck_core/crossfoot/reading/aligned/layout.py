"""From lines to tables: which lines are a table's, which are left to prose."""

from __future__ import annotations

import re
from collections.abc import Iterable, Sequence
from typing import NamedTuple

from crossfoot.documents.table import Cell, Table
from crossfoot.documents.visible import Visible
from crossfoot.model import Span
from crossfoot.reading.aligned import fitted, headed, listed, pairs
from crossfoot.reading.aligned.lines import (
    NOTE,
    Line,
    Token,
    Word,
    fields_in,
    headish,
    lines_of,
)
from crossfoot.reading.aligned.placing import Columns, Row
from crossfoot.reading.aligned.wrapped import with_panels
from crossfoot.reading.fold import fold

_LONGEST = 20_000
#: A part of what could be a table, so that other text is passed over at once.
_HOPE = re.compile(
    r"(?i:\bdf\b|\bddof|sum[\s_]?(?:of|sq)|mean[\s_]sq|std\.? ?err|standard error"
    r"|estimate|coef|r-?sq|observations|prob|pr\(|p>|sig\.|[fgt]l\b|corrected)"
    r"|\b(?:[FtzRNpPBb]2?|OR|CI|SE)\b|\b1\.0{2,}\b|R²|R\^|η|β|\bSS\b|\bMS\b|model\b|regression\b|between\b|treatment"
)


_RELATED = re.compile(r"[=<>≤≥≈]|\bp-value\b")
_CASES = re.compile(r"\(?\b[Nn]\s?=\s?[\d,]+\)?")


class Layout(NamedTuple):
    """What aligned text holds.

    Attributes
    ----------
    tables
        Its tables, with places in the text.
    rest
        Where the lines stand that are no table's, in runs.
    """

    tables: tuple[Table, ...]
    rest: tuple[tuple[int, int], ...]


def layout(visible: Visible) -> Layout:
    """Return the tables of aligned text, and the stretches that are none."""
    text = "\t".join(fold(part) for part in visible.text.split("\t"))
    lines = lines_of(text)
    if len(lines) > _LONGEST or ("\t" not in text and _HOPE.search(text) is None):
        return Layout((), ((0, len(text)),))
    return _Finder(visible, text, lines).run()


class _Finder:
    """Goes through the lines, the surest kinds of table first."""

    def __init__(self, visible: Visible, text: str, lines: Sequence[Line]) -> None:
        self.visible = visible
        self.text = text
        self.lines = list(lines)
        self.free = [not line.blank for line in lines]
        #: Lines that may start a table without known headings: wide gaps, none in the line before.
        self.wide = [_is_wide(line) for line in lines]
        #: Lines whose right end was parted from them.
        self.cut: set[int] = set()
        self.tables: list[tuple[int, Table]] = []

    def run(self) -> Layout:
        """Return the layout."""
        self.side_blocks()
        number = 0
        while number < len(self.lines):
            number = self.headed(number) if self.free[number] else number + 1
        self.fields()
        for number in range(len(self.lines)):
            if self.free[number]:
                self.unheaded(number)
        tables = [table for _, table in sorted(self.tables, key=lambda pair: pair[0])]
        return Layout(tuple(tables), tuple(self.rest()))

    def rest(self) -> Iterable[tuple[int, int]]:
        """Yield the stretches of lines that no table has taken."""
        start = end = -1
        for number, line in enumerate(self.lines):
            if self.free[number]:
                start = line.start if start < 0 else start
                end = line.end
            if start >= 0 and (number in self.cut or not (self.free[number] or line.blank)):
                yield start, end
                start = -1
        if start >= 0:
            yield start, end

    def take(self, first: int, last: int, table: Table) -> None:
        """Add a table that stands on some lines, with the line that names it."""
        title = self.title(first)
        if title is not None:
            line = self.lines[title]
            table = table._replace(caption=Span(line.start, line.end))
            self.free[title] = False
        self.tables.append((self.lines[first].start, table))
        for number in range(first, last + 1):
            self.free[number] = False

    def title(self, first: int) -> int | None:
        """Return the line that names the table below it: one of words, without a result."""
        above = first - 1
        while (
            above >= 0 and first - above < 4 and (self.lines[above].rule or self.lines[above].blank)
        ):
            above -= 1
        if above < 0 or not self.free[above] or above in self.cut:
            return None
        text = self.lines[above].text
        if self.lines[above].blank or self.lines[above].rule or len(text) > 200:
            return None
        if pairs.in_fields(self.lines[above], above):
            return None
        stated = _RELATED.search(_CASES.sub("", text)) is not None
        return None if stated or text.count("  ") > 4 or ">" in text[:3] else above

    def side_blocks(self) -> None:
        """Part labels with values, at the right ends of lines, from what stands to their left."""
        run: list[pairs.Pair] = []
        for number, line in enumerate([*self.lines, Line(0, 0, "")]):
            found = pairs.beside(line, number) if number < len(self.lines) else None
            if found is not None:
                run.append(found)
            elif not line.text.strip(" -+|") and number < len(self.lines):
                continue
            else:
                if len({self.text[slice(*pair.label)] for pair in run}) >= 3:
                    self.side_block(run)
                run = []

    def side_block(self, run: Sequence[pairs.Pair]) -> None:
        rows = [(pair.label, pair.value) for pair in run]
        self.tables.append((run[0].label[0], self.table((), rows)))
        for pair in run:
            line = self.lines[pair.line]
            end = pair.label[0]
            self.lines[pair.line] = Line(line.start, end, self.text[line.start : end])
            self.free[pair.line] = bool(self.lines[pair.line].text.strip())
            self.cut.add(pair.line)

    def headed(self, number: int) -> int:
        """Take the table whose headings stand on a line; return where to go on."""
        listing = (
            listed.separated(self.lines, number)
            or listed.named(self.lines, number)
            or listed.records(self.lines, number)
        )
        if listing is not None:
            rows = [tuple(row) for row in listing.rows]
            header = (listing.header,) if listing.header[1:] else ()
            self.take(listing.first, listing.last, self.table(header, rows, after=listing.last + 1))
            return listing.last + 1
        columns = headed.headings_in(
            self.text, self.lines[number], self.lines[number + 1 : number + 5]
        )
        if columns is None and self.wide[number]:
            columns = headed.matrix_in(self.text, self.lines, number)
        if columns is None:
            return number + 1
        rows_found, columns, end = headed.rows_below(self.text, self.lines, number + 1, columns)
        if not rows_found:
            return number + 1
        rows_found, columns, end = with_panels(self.text, self.lines, rows_found, columns, end)
        heads = self.headers(number, columns)
        rows = [(_place(row.label), *(_place(cell) for cell in row.cells)) for row in rows_found]
        cut = _second_labels(self.text, self.lines, rows_found)
        if cut is not None:
            heads = [(head[0], None, *head[1:]) for head in heads]
            rows = [
                (*_parted_at(self.text, self.lines[found.line], found.label, cut), *row[1:])
                for found, row in zip(rows_found, rows, strict=True)
            ]
        first = number - len(heads) + 1
        self.take(first, end - 1, self.table(heads, rows, after=end))
        return end

    def headers(self, number: int, columns: Columns) -> list[tuple[tuple[int, int] | None, ...]]:
        """Return the rows of the header: the line of headings, and one above that completes it."""
        label = columns.labels[0] if columns.labels else None
        own = (_place(label), *((t.start, t.end) for t in columns.heads))
        above = self.lines[number - 1] if number else None
        if (
            above is None
            or not self.free[number - 1]
            or above.rule
            or (not headish(above.text) and not _completes(above))
        ):
            return [own]
        fields = [
            (above.start + found.start(), above.start + found.end())
            for found in fields_in(above.text)
        ]
        upper: list[tuple[int, int] | None] = [None]
        for head in columns.heads:
            match = next((f for f in fields if _over(f, head, above, self.lines[number])), None)
            upper.append(match)
        if len(fields) == 1 and not any(
            m and not head.heading.roles for m, head in zip(upper[1:], columns.heads, strict=True)
        ):
            return [own]  # a title
        used = len(set(upper) - {None})
        return [tuple(upper), own] if used >= len(fields) - 1 and used else [own]

    def fields(self) -> None:
        """Take runs of lines that hold labels with values, wide apart."""
        run: list[list[pairs.Pair]] = []
        #: Runs that are too short to be a summary, but may be part of one further down.
        waiting: list[tuple[int, int, list[list[pairs.Pair]]]] = []
        first = 0
        for number, line in enumerate([*self.lines, Line(0, 0, "")]):
            free = number < len(self.lines) and self.free[number]
            found = pairs.in_fields(line, number) if free else None
            if found is not None:
                first = first if run else number
                run.append(found)
                continue
            count = len([pair for item in run for pair in item])
            labels = [self.text[slice(*pair.label)] for item in run for pair in item]
            enough = count >= 3 or (count == 2 and pairs.tells_test(labels))
            if count > 0 and not enough:
                waiting.append((first, number - 1, run))
            if enough and not (run and self.under_brackets(first)):
                for begin, end, item in waiting:
                    run = [*item, *run]
                    for passed in range(begin, end + 1):
                        self.free[passed] = False
                waiting = []
                rows = [
                    tuple(p for pair in item for p in (pair.label, pair.value))
                    for item in run
                    if item
                ]
                width = max(len(row) for row in rows)
                padded = [(*row, *(None,) * (width - len(row))) for row in rows]
                self.take(first, number - 1, self.table((), padded))
            run = []

    def under_brackets(self, first: int) -> bool:
        """Say whether numbers in brackets stand above a line, as errors of coefficients do."""
        above = first - 1
        while above >= 0 and self.lines[above].rule:
            above -= 1
        return above >= 0 and self.free[above] and self.lines[above].text.lstrip()[:1] == "("

    def unheaded(self, number: int) -> None:
        """Take a table without headings that has a row on this line."""
        bare = fitted.models_around(self.text, self.lines, number, self.free)
        if bare is None:
            bare = fitted.bare_anova(self.text, self.lines, number)
        if bare is None:
            return
        rows = [tuple(_place(word) for word in row) for row in bare.rows]
        self.take(bare.first, bare.last, self.table((), rows, after=bare.last + 1))

    def table(
        self,
        heads: Sequence[Sequence[tuple[int, int] | None]],
        rows: Sequence[Sequence[tuple[int, int] | None]],
        after: int | None = None,
    ) -> Table:
        """Return a table from the places of its cells; ``after`` is the line that follows it."""
        cells: list[Cell] = []
        for row, places in enumerate((*heads, *rows)):
            for column, place in enumerate(places):
                if row < len(heads) and place and column and places[column - 1] == place:
                    cells[-1] = cells[-1]._replace(columns=cells[-1].columns + 1)
                    continue
                start, end = place or (0, 0)
                cells.append(Cell(start, end, row, column, head=row < len(heads)))
        notes = self.notes(after) if after is not None else ()
        return Table(self.visible, tuple(cells), len(heads), None, notes)

    def notes(self, number: int) -> tuple[Span, ...]:
        """Return the lines after a table that explain it."""
        found: list[Span] = []
        for line in self.lines[number : number + 8]:
            if line.blank or line.rule:
                continue
            if NOTE.match(line.text) is None:
                break
            found.append(Span(line.start, line.end))
            self.free[self.lines.index(line, number)] = False
        return tuple(found)


def _place(word: Word | Token | None) -> tuple[int, int] | None:
    return (word.start, word.end) if word is not None else None


def _second_labels(text: str, lines: Sequence[Line], rows: Sequence[Row]) -> int | None:
    """Return where a second column of labels starts, if some rows have two labels, wide apart."""
    starts: list[int] = []
    for row in rows:
        if row.label is not None:
            gap = text[row.label.start : row.label.end].find("  ")
            if gap > 0:
                second = text[row.label.start + gap : row.label.end].lstrip()
                starts.append(row.label.end - len(second) - lines[row.line].start)
    if len(starts) < 2 or len(set(starts)) > 1:
        return None
    return starts[0]


def _parted_at(
    text: str, line: Line, label: Word | None, cut: int
) -> tuple[tuple[int, int] | None, tuple[int, int] | None]:
    """Return the two labels of a row, of which either may be missing."""
    if label is None:
        return None, None
    if label.start - line.start >= cut:
        return None, _place(label)
    first = text[label.start : min(label.end, line.start + cut)].rstrip()
    end = label.start + len(first)
    rest = (line.start + cut, label.end) if label.end > line.start + cut else None
    return (label.start, end), rest


def _is_wide(line: Line) -> bool:
    """Say whether a line has three fields, wide apart."""
    return len(line.text) <= 300 and len(line.text.strip().replace("\t", "  ").split("  ", 3)) > 2


def _completes(line: Line) -> bool:
    """Say whether a line can be the upper half of headings: words and no numbers."""
    words = line.text.strip()
    alone = line.text[:1].isspace() and " " not in words  # one word, over one heading
    return not any(char.isdigit() for char in words) and ("  " in words or alone)


def _over(field: tuple[int, int], head: Token, above: Line, below: Line) -> bool:
    """Say whether words of the line above stand over a heading."""
    start, end = field[0] - above.start, field[1] - above.start
    return start < head.end - below.start and head.start - below.start < end
