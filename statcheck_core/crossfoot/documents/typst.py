"""Typst."""

from __future__ import annotations

import re

from crossfoot.documents.edits import Edit
from crossfoot.documents.format import Comment, Reader
from crossfoot.documents.lines import Lines
from crossfoot.documents.printout import show_printout
from crossfoot.documents.table import Table, TableBuilder
from crossfoot.documents.typst_inline import show_inline
from crossfoot.documents.typst_names import NAMES
from crossfoot.documents.visible import Builder, Visible
from crossfoot.expressions import expression
from crossfoot.model import Block, Span

_HEADING = expression(r"[ \t]*(=+)[ \t]+")
_FENCE = expression(r"[ \t]*(`{3,})")
_COMMENT = expression(r"[ \t]*(?://|/\*)")
_STATEMENT = expression(
    r"[ \t]*#(?:set|show|let|import|include|pagebreak|colbreak|v|h|bibliography|outline|counter"
    r"|state|metadata|line|image|lorem)\b"
)
_CALL = expression(r"[ \t]*#(figure|table|align|block|box|grid|rect)[ \t]*\(")
_FLOAT = expression(r"[ \t]*#(?:figure|table)[ \t]*\(")
_TABLE = expression(r"\btable[ \t]*\(")
_CAPTION = expression(r"\bcaption:[ \t\n]*(?:figure\.caption\([^()\n]{0,200}\))?\[")
_BALANCE = expression(r'"(?:[^"\\\n]|\\.){0,2000}"|[()\[\]{}]')
_BULLET = expression(r"[ \t]*([-+])[ \t]+(?=(\S))")
_COMMENTS = expression(
    r'"(?:[^"\\\n]|\\.){0,2000}"|(?<!:)//([^\n]*)|/\*((?:[^*]|\*(?!/)){0,5000})\*/'
)


def split(text: str) -> tuple[Block, ...]:
    """Split into paragraphs, headings, raw text and tables."""
    splitter = _Splitter(text)
    return splitter.lines.walk(splitter.line)


class _Splitter:
    """Goes through the lines of a text."""

    def __init__(self, text: str) -> None:
        self.text = text
        self.lines = Lines(text)
        self.unbalanced = False  # whether brackets were found that nothing closes

    def line(self, number: int) -> int:
        """Handle what starts at a line and return the next line to handle."""
        lines = self.lines
        line = lines.lines[number]
        if not line or line.isspace():
            return number + 1
        if heading := _HEADING.match(line):
            return lines.add("heading", number, number + 1, len(heading[1]))
        if fence := _FENCE.match(line):
            return self.fenced(number, fence[1])
        if _COMMENT.match(line):
            return self.comment(number)
        if _STATEMENT.match(line):
            return max(number + 1, self.after(self.balanced(lines.starts[number], number)))
        if call := _CALL.match(line):
            return self.call(number, call)
        return self.paragraph(number)

    def fenced(self, number: int, mark: str) -> int:
        """Handle raw text."""
        last = number + 1
        while last < len(self.lines.lines) and mark not in self.lines.lines[last]:
            last += 1
        self.lines.add("verbatim", number + 1, last)
        return last + 1

    def comment(self, number: int) -> int:
        """Pass over comments."""
        line = self.lines.lines[number]
        if line.lstrip().startswith("/*"):
            stop = self.text.find("*/", self.lines.starts[number])
            if stop >= 0:
                return max(number + 1, self.after(stop))
        return number + 1

    def after(self, offset: int) -> int:
        """Return the line after the one that holds ``offset``."""
        from bisect import bisect_right

        return bisect_right(self.lines.starts, offset)

    def balanced(self, start: int, number: int) -> int:
        """Return where the brackets that open on a line are closed, or its end."""
        end = self.lines.starts[number] + len(self.lines.lines[number])
        if self.unbalanced:
            return end
        close = _closing(self.text, start, end)
        if close is None:
            self.unbalanced = True
            return end
        return close

    def call(self, number: int, call: re.Match[str]) -> int:
        """Handle a figure or table: one with rows is a table, its caption included."""
        start = self.lines.starts[number]
        stop = self.balanced(start, number)
        table = _TABLE.search(self.text, start, stop)
        caption = _CAPTION.search(self.text, start, stop)
        if table:
            first, last = table.start(), _closing(self.text, table.start(), table.end()) or stop
            if caption and not first <= caption.start() < last:
                first, last = call.start(1) - 1 + start, stop
            source = self.text[first : min(last, stop) + 1]
            self.lines.blocks.append(Block("table", first, source))
        elif caption:
            end = _closing(self.text, caption.end() - 1, caption.end()) or stop
            inside = self.text[caption.end() : min(end, stop)]
            at = caption.end() + len(inside) - len(inside.lstrip())
            if inside.strip():
                self.lines.blocks.append(Block("prose", at, inside.strip()))
        else:
            return self.paragraph(number)
        return max(number + 1, self.after(stop))

    def paragraph(self, number: int) -> int:
        """Handle a paragraph."""
        last = number + 1
        while last < len(self.lines.lines) and not self.lines.blank(last):
            line = self.lines.lines[last]
            if _HEADING.match(line) or _FENCE.match(line) or _FLOAT.match(line):
                break
            last += 1
        return self.lines.add("prose", number, last)


def _closing(text: str, start: int, soonest: int) -> int | None:
    """Return where the brackets opened from ``start`` on are all closed.

    Brackets are followed from ``start``; the place returned lies not before ``soonest``.
    """
    depth = 0
    for found in _BALANCE.finditer(text, start):
        if found.start() >= soonest and depth == 0:
            break
        if found[0] in "([{":
            depth += 1
        elif found[0] in ")]}":
            depth = max(0, depth - 1)
            if depth == 0 and found.start() >= soonest:
                return found.start()
    return soonest if depth == 0 else None


def show(kind: str, source: str) -> Visible:
    """Show a block."""
    if kind == "verbatim":
        return show_printout(source)
    if kind == "table":
        return table(source).visible
    out = Builder()
    heading = _HEADING.match(source) if kind == "heading" else None
    start = heading.end() if heading else 0
    show_inline(out, source, start, len(source), [] if heading else _bullets(source))
    return out.build()


def _bullets(source: str) -> list[Edit]:
    """Show the marks of a list's items as bullets."""
    if not _BULLET.match(source):
        return []
    edits: list[Edit] = []
    position = 0
    for line in source.split("\n"):
        bullet = _BULLET.match(source, position)
        if bullet:
            edits.append(Edit(*bullet.span(1), "•"))
        position += len(line) + 1
    return edits


_COUNT = expression(r"columns:\s{0,9}(?:(\d{1,3})|\(([^()]{0,500})\))")
_CELL = expression(
    r'(?P<open>\[)|(?P<string>"(?:[^"\\\n]|\\.){0,2000}")|(?P<math>\$(?:[^$\\]|\\[\s\S]){1,2000}\$)'
    r"|(?P<named>\b(?!table)[a-z]{1,20}:\s{0,9}(?:\"[^\"\n]{0,200}\"|\[[^\[\]\n]{0,500}\]|\([^()\n]{0,500}\)|[^,()\[\]\n]{1,200}))"
    r"|(?P<wide>colspan:\s{0,9}(\d{1,2}))|(?P<number>(?<![\w.])[-−]?\d[\d.]{0,20}(?=\s{0,9}[,)]))"
)

#: Most columns a cell may span.
_WIDEST = 50


def table(source: str) -> Table:
    """Read a table: its cells in order, as many a row as it has columns."""
    count = _COUNT.search(source)
    columns = 1
    if count:
        listed = [part for part in (count[2] or "").split(",") if part.strip()]
        columns = int(count[1]) if count[1] else max(1, len(listed))
    found = TableBuilder()
    opening = _TABLE.search(source)
    position = opening.end() if opening else 0
    stop = (_closing(source, opening.start(), position) if opening else None) or len(source)
    caption = _CAPTION.search(source)
    if caption and caption.start() < position:
        _add_caption(found, source, caption.end())
    number = columns
    wide = 1
    header = source.find("table.header", position)
    header_end = source.find(")", header) if header >= 0 else -1
    while cell := _CELL.search(source, position, stop):
        position = cell.end()
        if cell["named"] or cell["wide"]:
            span = re.match(r"colspan:\s*(\d{1,2})", cell[0])
            wide = int(span[1]) if span else wide
            continue
        start, end = cell.span()
        if cell["open"]:
            start, end = end, _cell_end(source, end)
            position = end + 1
        if number >= columns:
            found.row(start, head=start < header_end)
            number = 0
        out = Builder()
        if cell["string"]:
            out.keep(source, start + 1, end - 1)
        else:
            show_inline(out, source, start, end)
        wide = max(1, min(wide, _WIDEST, columns - number))
        found.cell(out.build(), start, end, columns=wide)
        number += wide
        wide = 1
    if caption and caption.start() > stop:
        _add_caption(found, source, caption.end())
    return found.build()


def _add_caption(found: TableBuilder, source: str, start: int) -> None:
    end = _cell_end(source, start)
    out = Builder()
    show_inline(out, source, start, end)
    found.caption(out.build(), start, end)


def _cell_end(source: str, start: int) -> int:
    """Return where the content that starts at ``start`` ends."""
    depth = 1
    for found in re.compile(r"\\.|[\[\]]").finditer(source, start):
        depth += {"[": 1, "]": -1}.get(found[0], 0)
        if depth == 0:
            return found.start()
    return len(source)


def comments(text: str) -> tuple[Comment, ...]:
    """Return the comments after ``//`` and between ``/*`` and ``*/``."""
    return tuple(
        Comment(Span(*found.span()), (found[1] or found[2] or "").strip())
        for found in _COMMENTS.finditer(text)
        if found[1] is not None or found[2] is not None
    )


READER = Reader(split, show, comments, NAMES.define, table=table, expand=NAMES.expand)
