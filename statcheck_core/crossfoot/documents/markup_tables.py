"""The tables of HTML and JATS; a cell that spans several has empty ones beside and below it."""

from __future__ import annotations

import re

from crossfoot.documents.markup import Scanner, Words
from crossfoot.documents.markup_text import Dialect, show_element
from crossfoot.documents.table import Table, TableBuilder
from crossfoot.documents.tags import Tag
from crossfoot.expressions import expression

_SPAN = expression(r"\b(col|row)span\s{0,9}=\s{0,9}[\"']?\s{0,9}(\d{1,4})", re.I)

#: Most rows or columns a cell may span.
_WIDEST = 100


def read_table(source: str, dialect: Dialect) -> Table:
    """Read a table."""
    return _Table(source, dialect).run()


class _Table:
    """Walks over the cells of a table."""

    def __init__(self, source: str, dialect: Dialect) -> None:
        self.source = source
        self.dialect = dialect
        self.table = TableBuilder()
        self.in_row = False
        self.in_head = False
        self.cell: Tag | None = None
        self.caption: Tag | None = None
        self.depth = 0  # of tables within a cell

    def run(self) -> Table:
        """Return the table."""
        for token in Scanner(self.source, 0, len(self.source)):
            if not isinstance(token, Words):
                self.tag(token)
        self.close(len(self.source))
        return self.table.build()

    def tag(self, tag: Tag) -> None:
        """Follow the structure of the table."""
        if tag.name == "table" and self.cell:
            self.depth = max(0, self.depth + (-1 if tag.closing else 1))
        elif self.depth:
            return
        elif tag.name == "tr":
            self.close(tag.start)
            self.in_row = False
        elif tag.name in ("td", "th"):
            self.close(tag.start)
            if not tag.closing:
                self.open(tag)
            if tag.empty:
                self.close(tag.end)
        elif tag.name in ("tbody", "thead", "tfoot", "table"):
            self.close(tag.start)
            self.in_row = False
            self.in_head = tag.name == "thead" and not tag.closing
        elif tag.name == "caption":
            self.title(tag)

    def title(self, tag: Tag) -> None:
        """Start or end the caption."""
        if not tag.closing:
            self.caption = tag
        elif self.caption:
            start = self.caption.end
            shown = show_element(self.source, start, tag.start, self.dialect, breaks=" ")
            self.table.caption(shown, start, tag.start)
            self.caption = None

    def open(self, tag: Tag) -> None:
        """Start a cell, and a row if it is the first."""
        if not self.in_row:
            self.table.row(tag.start, head=self.in_head)
            self.in_row = True
        self.cell = tag

    def close(self, end: int) -> None:
        """End the cell that is open."""
        tag, self.cell = self.cell, None
        if tag is None:
            return
        start = min(tag.end, end)
        shown = show_element(self.source, start, end, self.dialect, breaks=" ")
        spans = {found[1].lower(): int(found[2]) for found in _SPAN.finditer(tag.inside)}
        self.table.cell(
            shown,
            start,
            end,
            rows=min(spans.get("row", 1), _WIDEST),
            columns=min(spans.get("col", 1), _WIDEST),
            head=tag.name == "th",
        )
