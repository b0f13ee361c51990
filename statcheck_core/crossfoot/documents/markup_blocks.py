"""HTML and XML to blocks: what lies between two tags of elements that stand on their own."""

from __future__ import annotations

import re

from crossfoot.documents.markup import Scanner, Words
from crossfoot.documents.markup_text import Dialect, hides
from crossfoot.documents.tags import Tag, attribute_span
from crossfoot.expressions import expression
from crossfoot.model import Block

_ROWS, _CELLS = expression(r"\s*<tr[\s>]", re.I), expression(r"\s*<t[dh][\s>]", re.I)
#: What goes on a table that stands without its element, after a row or a cell.
_MORE = {"tr": _ROWS, "td": _CELLS, "th": _CELLS}
_VERBATIM = frozenset(("pre", "code-block", "preformat", "listing", "xmp"))

#: Deepest nesting of sections that counts.
_DEEPEST = 20


def split_markup(text: str, dialect: Dialect) -> tuple[Block, ...]:
    """Split into blocks."""
    return _Splitter(text, dialect).run()


class _Splitter:
    """Walks over the tags of a text."""

    def __init__(self, text: str, dialect: Dialect) -> None:
        self.text = text
        self.dialect = dialect
        self.scanner = Scanner(text, 0, len(text))
        self.blocks: list[Block] = []
        self.start = 0  # of the current run
        self.seen = False  # whether it shows anything
        self.level = 0  # of the heading it is, or 0
        self.lists = 0
        self.sections = 0
        self.captions = 0

    def run(self) -> tuple[Block, ...]:
        """Return the blocks."""
        for token in self.scanner:
            if isinstance(token, Words):
                if not self.seen and not self.text[token.start : token.end].isspace():
                    self.seen = token.start < token.end
            else:
                self.tag(token)
        self.flush(len(self.text), len(self.text))
        return tuple(self.blocks)

    def tag(self, tag: Tag) -> None:
        """Handle a tag."""
        name, dialect = tag.name, self.dialect
        if not tag.closing and hides(tag, dialect):
            self.hide(tag)
        elif name == "table" and not tag.closing:
            self.table(tag)
        elif name in _MORE and not tag.closing:
            self.fragment(tag)
        elif name in _VERBATIM and not tag.closing:
            self.verbatim(tag)
        elif name in ("math", "script", "tex-math"):
            self.seen = True
            inside = self.scanner.inside(tag)
            self.scanner.position = self.scanner.after(inside) if inside else tag.end
        elif name == "img":
            span = attribute_span(tag, "alt")
            self.seen = self.seen or bool(span and span.start < span.end)
        elif name in dialect.lists:
            self.list(tag)
        elif name in dialect.blocks:
            self.block(tag)

    def block(self, tag: Tag) -> None:
        """Handle an element that stands on its own."""
        name, dialect = tag.name, self.dialect
        if self.lists and name in dialect.within_items:
            return
        self.flush(tag.start, tag.end)
        step = -1 if tag.closing else 1
        if name in dialect.sections and not tag.empty:
            self.sections = min(max(0, self.sections + step), _DEEPEST)
        elif name == "caption":
            self.captions = max(0, self.captions + step)
        if name in dialect.headings and not tag.closing and not self.captions:
            self.level = dialect.headings[name] or max(1, self.sections)

    def list(self, tag: Tag) -> None:
        """Handle a list: lists within it are part of it."""
        if not tag.closing:
            if not self.lists:
                self.flush(tag.start, tag.end)
            self.lists += 1
        elif self.lists:
            self.lists -= 1
            if not self.lists:
                self.flush(tag.start, tag.end)

    def hide(self, tag: Tag) -> None:
        """Pass over an element that is not shown; one within a line does not part it."""
        inside = self.scanner.inside(tag)
        if inside is None:
            return
        after = self.scanner.after(inside)
        self.scanner.position = after
        amid = tag.name in self.dialect.amid
        if tag.name in self.dialect.blocks or (tag.name in self.dialect.hidden and not amid):
            self.flush(tag.start, after)

    def table(self, tag: Tag) -> None:
        """Handle a table; its caption is part of it."""
        inside = self.scanner.inside(tag)
        if inside is None:
            return
        after = self.scanner.after(inside)
        self.flush(tag.start, after)
        self.add("table", tag.start, after)
        self.scanner.position = after

    def fragment(self, tag: Tag) -> None:
        """Handle rows that stand without their table, or cells without their row."""
        self.flush(tag.start, tag.end)
        after = tag.start
        row: Tag | None = tag
        while row:
            inside = self.scanner.inside(row)
            if inside is None:
                break
            after = self.scanner.after(inside)
            row = None
            if _MORE[tag.name].match(self.text, after):
                row = self._next_tag(after)
        if after > tag.start:
            self.add("table", tag.start, after)
            self.start = self.scanner.position = after

    def _next_tag(self, position: int) -> Tag | None:
        from crossfoot.documents.tags import tag_at

        return tag_at(self.text, self.text.find("<", position), len(self.text))

    def verbatim(self, tag: Tag) -> None:
        """Handle preformatted text."""
        inside = self.scanner.inside(tag)
        if inside is None:
            return
        after = self.scanner.after(inside)
        self.flush(tag.start, after)
        self.add("verbatim", inside.start, inside.end)
        self.scanner.position = after

    def flush(self, end: int, start: int) -> None:
        """End the current run at ``end`` and let the next start at ``start``."""
        if self.seen:
            kind = "heading" if self.level else "prose"
            self.add(kind, self.start, end, self.level)
        self.level = 0
        self.seen = False
        self.start = start

    def add(self, kind: str, start: int, end: int, level: int = 0) -> None:
        """Add a block without the white space around it."""
        source = self.text[start:end]
        if kind == "verbatim":
            source = source.rstrip()
        else:
            start += len(source) - len(source.lstrip())
            source = source.strip()
        if source:
            self.blocks.append(Block(kind, start, source, level))
