"""reStructuredText."""

from __future__ import annotations

import re

from crossfoot.documents.drawn_tables import DASHES, GRID, read_table
from crossfoot.documents.edits import Edit
from crossfoot.documents.format import Comment, Reader
from crossfoot.documents.lines import Lines
from crossfoot.documents.mathtext import show_math
from crossfoot.documents.printout import show_printout
from crossfoot.documents.rst_inline import show_inline
from crossfoot.documents.rst_names import NAMES
from crossfoot.documents.table import Table, TableBuilder
from crossfoot.documents.visible import Builder, Visible
from crossfoot.documents.words import words
from crossfoot.expressions import expression
from crossfoot.model import Block, Span

_EXPLICIT = expression(r"[ \t]*\.\.(?:[ \t]+|$)")
_DIRECTIVE = expression(
    r"[ \t]*\.\.[ \t]+(?:\|[^|\n]{1,60}\|[ \t]+)?([A-Za-z][\w:.+-]{0,40}?)[ \t]?::"
    r"(?:[ \t]+|(?=\n)|$)"
)
_FOOTNOTE = expression(r"[ \t]*\.\.[ \t]+\[[^\[\]\n]{1,60}\](?:[ \t]+|(?=\n)|$)")
_HIDDEN = expression(r"[ \t]*\.\.[ \t]+(?:_[^\n]*:|\|[^|\n]{1,60}\|[ \t]+[a-z]+::|__)")
_OPTION = expression(r"[ \t]+:[A-Za-z][\w -]{0,40}:(?:[ \t]|$)")
_ADORNMENT = expression(r"([!-/:-@\[-`{-~])\1{2,}[ \t]*")
_BULLET = expression(r"[ \t]*([-*+•])[ \t]+(?=(\S))")

_LISTINGS = words(
    "code code-block sourcecode parsed-literal highlight literalinclude prompt ipython "
    "productionlist doctest testcode testoutput jupyter-execute code-cell"
)
_UNSEEN = words(
    "raw image include contents toctree index meta role default-role bibliography only-html "
    "plot sectnum header footer currentmodule module automodule autoclass autofunction"
)
_ADMONITIONS = words(
    "note warning tip important hint caution danger error attention seealso rubric centered "
    "topic sidebar admonition epigraph abstract"
)


def split(text: str) -> tuple[Block, ...]:
    """Split into paragraphs, headings, literal blocks and tables."""
    splitter = _Splitter(text)
    return splitter.lines.walk(splitter.line)


class _Splitter:
    """Goes through the lines of a text."""

    def __init__(self, text: str) -> None:
        self.lines = Lines(text)
        self.styles: list[str] = []  # adornments of headings, outermost first

    def line(self, number: int) -> int:
        """Handle what starts at a line and return the next line to handle."""
        lines = self.lines
        line = lines.lines[number]
        if not line or line.isspace():
            return number + 1
        if _EXPLICIT.match(line):
            return self.explicit(number)
        if GRID.fullmatch(line):
            return lines.add("table", number, lines.paragraph(number))
        if "==" in line and DASHES.fullmatch(line):
            return self.simple_table(number)
        return self.heading(number) or self.paragraph(number)

    def explicit(self, number: int) -> int:
        """Handle a directive, a footnote, a comment."""
        lines = self.lines
        line = lines.lines[number]
        after = lines.indented(number + 1, lines.indent(number))
        if _FOOTNOTE.match(line):
            return lines.add("prose", number, min(lines.paragraph(number), max(after, number + 1)))
        directive = _DIRECTIVE.match(line)
        if not directive or _HIDDEN.match(line):
            return after
        name = directive[1].rpartition(":")[2]
        if name == "math":
            return lines.add("prose", number, after)
        if name in ("list-table", "csv-table", "flat-table"):
            return lines.add("table", number, after)
        body = number + 1
        while body < after and _OPTION.match(lines.lines[body]):
            body += 1
        if name in _LISTINGS:
            return lines.add("verbatim", body, after)
        if name in _UNSEEN:
            return after
        titled = name in _ADMONITIONS or name == "table"
        if titled and line[directive.end() :].strip():
            end = lines.paragraph(number) if body == number + 1 else number + 1
            lines.add("prose", number, min(end, after), offset=directive.end())
            body = max(body, min(end, after))
        return body

    def simple_table(self, number: int) -> int:
        """Handle a table ruled with ``=``: it ends at a rule before an empty line."""
        lines = self.lines.lines
        for last in range(number + 1, len(lines)):
            if DASHES.fullmatch(lines[last]) and "==" in lines[last]:
                closed = last + 1 == len(lines) or not lines[last + 1].strip()
                if closed:
                    return self.lines.add("table", number, last + 1)
            elif not lines[last].strip() and last > number + 1 and not lines[last - 1].strip():
                break  # two empty lines: no table after all
        return self.lines.add("prose", number, self.lines.paragraph(number))

    def heading(self, number: int) -> int:
        """Handle a heading, with or without a line over it."""
        lines = self.lines.lines
        over = _ADORNMENT.fullmatch(lines[number])
        if over:
            under = _ADORNMENT.fullmatch(lines[number + 2]) if number + 2 < len(lines) else None
            if under and under[1] == over[1] and lines[number + 1].strip():
                level = self.level("=" + over[1])
                return self.lines.add("heading", number, number + 3, level)
            return number + 1
        under = _ADORNMENT.fullmatch(lines[number + 1]) if number + 1 < len(lines) else None
        if not under or lines[number][:1].isspace():
            return 0
        return self.lines.add("heading", number, number + 2, self.level(under[1]))

    def level(self, style: str) -> int:
        """Return the level of a style of headings: that at which it was first met."""
        if style not in self.styles:
            self.styles.append(style)
        return self.styles.index(style) + 1

    def paragraph(self, number: int) -> int:
        """Handle a paragraph and the literal block it may announce."""
        lines = self.lines
        last = lines.paragraph(number)
        if lines.lines[number].lstrip().startswith(">>> "):
            return lines.add("verbatim", number, last)
        if lines.lines[last - 1].strip() != "::":
            lines.add("prose", number, last)
        elif last - 1 > number:
            lines.add("prose", number, last - 1)
        if lines.lines[last - 1].rstrip().endswith("::"):
            after = lines.indented(last, lines.indent(number))
            if after > last:
                return lines.add("verbatim", last, after)
        return last


def show(kind: str, source: str) -> Visible:
    """Show a block."""
    if kind == "verbatim":
        return show_printout(source)
    if kind == "table":
        return table(source).visible
    out = Builder()
    start, end = 0, len(source)
    if kind == "heading":
        lines = source.split("\n")
        if _ADORNMENT.fullmatch(lines[0]) and len(lines) == 3:
            start = len(lines[0]) + 1
        end -= len(lines[-1]) + 1
        show_inline(out, source, start, max(start, end))
    elif directive := _DIRECTIVE.match(source):
        _show_math(out, source, directive.end())
    else:
        footnote = _FOOTNOTE.match(source)
        start = footnote.end() if footnote else 0
        end -= 1 if source.endswith("::") else 0
        show_inline(out, source, start, end, _bullets(source, start, end))
    return out.build()


def _show_math(out: Builder, source: str, start: int) -> None:
    """Show a formula on lines of its own, without its options."""
    position = start
    for line in source[start:].split("\n"):
        if not _OPTION.match(line):
            show_math(out, source, position, min(position + len(line) + 1, len(source)))
        position += len(line) + 1


def _bullets(source: str, start: int, end: int) -> list[Edit]:
    """Show the marks of a list's items as bullets."""
    if not _BULLET.match(source, start, end):
        return []
    edits: list[Edit] = []
    position = start
    while 0 <= position < end:
        bullet = _BULLET.match(source, position, end)
        if bullet:
            edits.append(Edit(*bullet.span(1), "•"))
        position = source.find("\n", position, end) + 1 or end
    return edits


_HEADER_ROWS = expression(r"^[ \t]*:header-rows:[ \t]*(\d{1,2})", re.M)
_ROW = expression(r"[ \t]*\*[ \t]+-(?:[ \t]|$)")
_CELL = expression(r"[ \t]*-(?:[ \t]|$)")
_FIELD = expression(r'[ \t]*("(?:[^"]|"")*"|[^,]*)[ \t]*(?:,|$)')


def table(source: str) -> Table:
    """Read a table."""
    directive = _DIRECTIVE.match(source)
    if not directive:
        return read_table(source, show_inline)
    cells = _fields(source) if directive[1] == "csv-table" else _listed(source)
    heads = _HEADER_ROWS.search(source)
    found = TableBuilder()
    line = source.find("\n", directive.end())
    title = Span(directive.end(), line if line >= 0 else len(source))
    if source[title.start : title.end].strip():
        out = Builder()
        show_inline(out, source, *title)
        found.caption(out.build(), *title)
    for first, cell in cells:
        if first:
            found.row(cell.start, head=heads is not None and found.height < int(heads[1]))
        out = Builder()
        show_inline(out, source, *cell)
        found.cell(out.build(), *cell)
    return found.build()


def _listed(source: str) -> list[tuple[bool, Span]]:
    """Return the cells of a table written as a list of lists, and which start a row."""
    cells: list[tuple[bool, Span]] = []
    position = 0
    for line in source.split("\n"):
        row = _ROW.match(line)
        mark = row or (_CELL.match(line) if cells else None)
        end = position + len(line)
        if mark:
            cells.append((row is not None, Span(position + mark.end(), end)))
        elif cells:
            first, cell = cells[-1]
            cells[-1] = (first, Span(cell.start, end))
        position = end + 1
    return cells


def _fields(source: str) -> list[tuple[bool, Span]]:
    """Return the cells of a table written with commas, and which start a row."""
    cells: list[tuple[bool, Span]] = []
    position = 0
    for number, line in enumerate(source.split("\n")):
        start = 0
        option = _OPTION.match(line)
        if option:
            start = option.end() if option[0].strip() == ":header:" else len(line)
        first = True
        while number and start < len(line) and line[start:].strip():
            field = _FIELD.match(line, start)
            if not field or field.end() == start:
                break
            quoted = field[1][:1] == '"' and len(field[1]) > 1
            left, right = field.span(1)
            cells.append((first, Span(position + left + quoted, position + right - quoted)))
            first = False
            start = field.end()
        position += len(line) + 1
    return cells


def comments(text: str) -> tuple[Comment, ...]:
    """Return the comments: what stands behind ``..`` and is nothing else."""
    lines = Lines(text)
    found: list[Comment] = []
    number = 0
    while number < len(lines.lines):
        line = lines.lines[number]
        mark = _EXPLICIT.match(line)
        number += 1
        if mark and not (_FOOTNOTE.match(line) or _HIDDEN.match(line) or _DIRECTIVE.match(line)):
            last = lines.indented(number, lines.indent(number - 1))
            start = lines.starts[number - 1]
            end = lines.starts[last - 1] + len(lines.lines[last - 1])
            found.append(Comment(Span(start, end), text[start + mark.end() : end].strip()))
            number = last
    return tuple(found)


READER = Reader(split, show, comments, NAMES.define, table=table, expand=NAMES.expand)
