"""AsciiDoc."""

from __future__ import annotations

import re

from crossfoot.documents.asciidoc_inline import show_inline, show_stem
from crossfoot.documents.edits import Edit
from crossfoot.documents.format import Comment, Reader
from crossfoot.documents.lines import Lines
from crossfoot.documents.names import Naming, plain_meaning
from crossfoot.documents.printout import show_printout
from crossfoot.documents.table import Table, TableBuilder
from crossfoot.documents.visible import Builder, Visible
from crossfoot.expressions import expression
from crossfoot.model import Block, Span

_HEADING = expression(r"(={1,6}|#{1,6})[ \t]+(?=\S)")
_DELIMITER = expression(
    r"(-{4,}|\.{4,}|\+{4,}|/{4,}|={4,}|\*{4,}|_{4,}|--|`{3,})[ \t]*(?:\w{1,20}[ \t]*)?"
)
_TABLE = expression(r"[|!,:]={3,}[ \t]*")
_ATTRIBUTE = expression(r":!?[\w-]{1,60}!?:(?:[ \t]|$)")
_BLOCK_ATTRIBUTES = expression(r"\[[^\n]{0,500}\][ \t]*")
_TITLE = expression(r"\.(?=[^\s.])")
_COMMENT = expression(r"//(?!/)")
_MACRO = expression(r"(?:image|include|video|audio|toc|ifdef|ifndef|endif|ifeval)::[^\n]*")
_BULLET = expression(r"[ \t]*([*-]{1,5}|\.{1,5})[ \t]+(?=(\S))")
_STEM = expression(r"\[(?:stem|latexmath|asciimath)\b")
_VERBATIM = frozenset("-.`")


def split(text: str) -> tuple[Block, ...]:
    """Split into paragraphs, headings, listings and tables."""
    splitter = _Splitter(text)
    return splitter.lines.walk(splitter.line)


class _Splitter:
    """Goes through the lines of a text."""

    def __init__(self, text: str) -> None:
        self.lines = Lines(text)
        self.attributes = ""  # of the block that follows
        self.unclosed: set[str] = set()

    def line(self, number: int) -> int:
        """Handle what starts at a line and return the next line to handle."""
        lines = self.lines
        line = lines.lines[number]
        if not line or line.isspace():
            return number + 1
        if heading := _HEADING.match(line):
            self.attributes = ""
            return lines.add("heading", number, number + 1, len(heading[1]))
        if _TABLE.fullmatch(line):
            return self.table(number, line.strip())
        if delimiter := _DELIMITER.fullmatch(line):
            return self.delimited(number, delimiter[1])
        if _BLOCK_ATTRIBUTES.fullmatch(line):
            self.attributes = line
            return number + 1
        if _TITLE.match(line):
            return lines.add("prose", number, number + 1, offset=1)
        if _COMMENT.match(line) or _ATTRIBUTE.match(line) or _MACRO.fullmatch(line):
            return number + 1
        return self.paragraph(number)

    def closing(self, number: int, mark: str) -> int | None:
        """Return the line that closes what opens at ``number``."""
        if mark not in self.unclosed:
            for last in range(number + 1, len(self.lines.lines)):
                if self.lines.lines[last].rstrip() == mark:
                    return last
            self.unclosed.add(mark)
        return None

    def delimited(self, number: int, mark: str) -> int:
        """Handle a block between two lines of marks."""
        attributes, self.attributes = self.attributes, ""
        if mark[0] in "=*_" or mark == "--":
            return number + 1  # an example, a sidebar, a quotation: its lines are blocks
        last = self.closing(number, mark)
        if last is None:
            return number + 1
        if mark[0] in _VERBATIM:
            self.lines.add("verbatim", number + 1, last)
        elif mark[0] == "+" and _STEM.match(attributes):
            self.lines.add("prose", number, last + 1)
        return last + 1

    def table(self, number: int, mark: str) -> int:
        """Handle a table; its block starts with its attributes, which tell its columns."""
        last = self.closing(number, mark)
        attributes, self.attributes = self.attributes, ""
        if last is None:
            return number + 1
        first = number
        while first > 0 and attributes and self.lines.lines[first - 1] == attributes:
            first -= 1
            attributes = ""
        return self.lines.add("table", first, last + 1)

    def paragraph(self, number: int) -> int:
        """Handle a paragraph, or lines that are indented and so stand as they are."""
        self.attributes = ""
        lines = self.lines
        last = number + 1
        while last < len(lines.lines) and not lines.blank(last):
            line = lines.lines[last]
            if line[0] in "-.+/=*_`[|" and (
                (_DELIMITER.fullmatch(line) and line.strip() != "--")
                or _TABLE.fullmatch(line)
                or _BLOCK_ATTRIBUTES.fullmatch(line)
            ):
                break
            last += 1
        line = lines.lines[number]
        literal = line[0] in " \t" and not _BULLET.match(line)
        return lines.add("verbatim" if literal else "prose", number, last)


def show(kind: str, source: str) -> Visible:
    """Show a block."""
    if kind == "verbatim":
        return show_printout(source)
    if kind == "table":
        return table(source).visible
    out = Builder()
    if source.startswith("++++"):
        start = source.find("\n") + 1
        show_stem(out, source, start, max(start, source.rfind("\n")))
        return out.build()
    heading = _HEADING.match(source) if kind == "heading" else None
    start = heading.end() if heading else 0
    show_inline(out, source, start, len(source), [] if heading else _line_edits(source))
    return out.build()


def _line_edits(source: str) -> list[Edit]:
    """Show the marks of a list's items as bullets; comments and lone pluses go."""
    edits: list[Edit] = []
    listed = _BULLET.match(source) is not None
    position = 0
    for line in source.split("\n"):
        end = position + len(line)
        bullet = _BULLET.match(source, position, end) if listed else None
        if bullet:
            edits.append(Edit(*bullet.span(1), "•"))
        elif line.rstrip() == "+" or (_COMMENT.match(line) and position):
            edits.append(Edit(position, end))
        position = end + 1
    return edits


_COLUMNS = expression(r"\bcols=(?:\"([^\"\n]{1,300})\"|'([^'\n]{1,300})'|(\d{1,3}))")
_CELL = expression(
    r"(?:(?<![\w+])(\d{1,2})?(?:\.(\d{1,2}))?\+)?[<^>]?(?:\.[<^>])?[adehlms]?(?<!\\)\|"
)

_BLANK_AFTER = expression(r"\n[ \t]*\n[ \t\n]*$")

#: Most columns a cell may span.
_WIDEST = 50


def table(source: str) -> Table:
    """Read a table: its cells in order, as many a row as it has columns."""
    head = re.compile(r"^[|!,:]={3,}[ \t]*$", re.M).search(source)
    start = head.end() if head else 0
    end = max(start, source.rfind("\n"))
    marks = list(_CELL.finditer(source, start, end))
    columns = _columns(source, start, marks)
    found = TableBuilder()
    taken = [0] * columns  # how many rows a cell still reaches into each column
    number = columns
    stops = [*(mark.start() for mark in marks[1:]), end]
    for mark, stop in zip(marks, stops, strict=False):
        number = _next_free(number, taken)
        if number >= columns:
            found.row(mark.end())
            number = _next_free(0, taken)
        out = Builder()
        show_inline(out, source, mark.end(), stop)
        wide = max(1, min(int(mark[1] or 1), columns - number, _WIDEST))
        deep = max(1, min(int(mark[2] or 1), _WIDEST))
        found.cell(out.build(), mark.end(), stop, rows=deep, columns=wide)
        taken[number : number + wide] = [deep - 1] * wide
        number += wide
        if found.height == 1 and number >= columns and _header(source, start, mark.end(), stop):
            found.head()
    return found.build()


def _next_free(number: int, taken: list[int]) -> int:
    """Pass over the columns that a cell above reaches into."""
    while number < len(taken) and taken[number]:
        taken[number] -= 1
        number += 1
    return number


def _header(source: str, table: int, cell: int, stop: int) -> bool:
    """Say whether the first row is a header: the attributes say so, or an empty line follows."""
    blank = _BLANK_AFTER.search(source, max(cell, stop - 80), stop)
    return "header" in source[:table] or blank is not None


def _columns(source: str, start: int, marks: list[re.Match[str]]) -> int:
    """Return how many columns a table has: as its attributes say, or as its first row has."""
    declared = _COLUMNS.search(source, 0, start)
    if declared:
        listed = declared[1] or declared[2]
        if declared[3] or not listed:
            return max(1, int(declared[3] or 1))
        return max(1, sum(_repeated(part) for part in re.split("[,;]", listed)))
    if not marks:
        return 1
    line_end = source.find("\n", marks[0].end())
    return max(1, sum(int(mark[1] or 1) for mark in marks if mark.start() < line_end))


def _repeated(column: str) -> int:
    """Return how many columns alike an entry such as ``2*^.>`` declares."""
    count, star, _ = column.strip().partition("*")
    return int(count) if star and count.isdecimal() and len(count) < 4 else 1


def comments(text: str) -> tuple[Comment, ...]:
    """Return the comments after ``//`` and between lines of ``////``."""
    found: list[Comment] = []
    lines = Lines(text)
    number = 0
    while number < len(lines.lines):
        line = lines.lines[number]
        start = lines.starts[number]
        number += 1
        if _COMMENT.match(line):
            found.append(Comment(Span(start, start + len(line)), line[2:].strip()))
        elif line.startswith("////") and not line.strip("/ \t"):
            last = number
            while last < len(lines.lines) and lines.lines[last].rstrip() != line.rstrip():
                last += 1
            if last < len(lines.lines):
                end = lines.starts[last] + len(lines.lines[last])
                inner = text[lines.starts[number] : lines.starts[last]]
                found.append(Comment(Span(start, end), inner.strip()))
                number = last + 1
    return tuple(found)


_NAMES = Naming(
    hint=":",
    definition=expression(r"^:(?P<name>[\w-]{1,60}):[ \t]+(?P<body>[^\n]+)", re.M),
    meaning=plain_meaning,
    sign="{",
    call=expression(r"(?<!\\)\{(?P<name>[\w-]{1,60})\}"),
)

READER = Reader(split, show, comments, _NAMES.define, table=table, expand=_NAMES.expand)
