"""Markdown and its relatives: CommonMark, GitHub's, Pandoc's, Quarto's, R Markdown's and MyST's.

A text is cut at blank lines, and each chunk is analysed on its own, remembered by its content:
while a document is edited all but one of its chunks are look-ups. What runs on past a blank line
(fenced code, a comment, an HTML table) is followed to its end from the chunk that opens it.
"""

from __future__ import annotations

import re

from crossfoot.documents.format import Definitions, Reader
from crossfoot.documents.markdown_blocks import Chunk, Opening
from crossfoot.documents.markdown_chunk import analyse
from crossfoot.documents.table import Table
from crossfoot.documents.tags import angle_comments
from crossfoot.documents.visible import Visible
from crossfoot.expressions import expression
from crossfoot.memo import remembered
from crossfoot.model import Block

_FRONT = expression(r"(---|\+\+\+)[ \t]*\n")
_FRONT_END = {
    "---": expression(r"^(?:---|\.\.\.)[ \t]*$", re.M),
    "+++": expression(r"^\+\+\+[ \t]*$", re.M),
}
_ABSTRACT = expression(
    r"^abstract:[ \t]*(?:[|>][+-]?[ \t]*\n)?((?:[^\n]*)(?:\n(?:[ \t][^\n]*)?)*+)", re.M
)

#: Most times that the rest of a chunk is looked at after something in it was followed to its end.
_MOST_ROUNDS = 100

#: Longest chunk that is remembered, in code points.
_REMEMBERED = 4000

_remembered = remembered(analyse)


def split(text: str) -> tuple[Block, ...]:
    """Split into paragraphs, tight lists, headings, code and tables."""
    return _Splitter(text).run()


class _Splitter:
    """Goes through the chunks of a text."""

    def __init__(self, text: str) -> None:
        self.text = text
        self.blocks: list[Block] = []
        self.code: tuple[int, int] | None = None  # a run of indented code, not yet a block
        self.last_comment = text.rfind("-->")
        self.unclosed: set[str] = set()  # what nothing closes in the rest of the text

    def run(self) -> tuple[Block, ...]:
        """Return the blocks."""
        add, new = self.blocks.append, tuple.__new__  # half the cost of calling Block
        resume = _front_matter(self.text, self.blocks)
        listed = False
        position = 0
        for source in self.text.split("\n\n"):
            start, position = position, position + len(source) + 2
            if start < resume:
                source = source[resume - start :]
                start = resume
            if not source:
                continue
            within = listed and source[0] in " \t\n"
            if within:
                chunk = analyse(source, listed=True)
            else:
                chunk = _remembered(source) if len(source) <= _REMEMBERED else analyse(source)
            blocks, opening, listed, code = chunk
            if opening or code or self.code:
                resume = self.rare(source, start, within, chunk)
                continue
            for kind, offset, found, level in blocks:
                add(new(Block, (kind, start + offset, found, level)))
        self.flush()
        return tuple(self.blocks)

    def rare(self, source: str, start: int, within: bool, chunk: Chunk) -> int:
        """Add the blocks of a chunk that is not closed in itself; return where to go on."""
        for _ in range(_MOST_ROUNDS):
            resume = self.once(source, start, within, chunk)
            source = source[resume - start :] if resume > start else ""
            if not source or source.isspace():
                return resume
            # What follows on the line that closes it, or on the next ones.
            start = resume
            chunk = analyse(source, within)
        self.blocks.append(Block("prose", start, source))
        return start

    def once(self, source: str, start: int, within: bool, chunk: Chunk) -> int:
        """Add the blocks of a chunk, and what its last one leaves open; return where to go on."""
        opening = chunk.opening
        if opening and opening.close == "-->" and start + opening.start > self.last_comment:
            chunk = analyse(source, within, comment=False)
            opening = chunk.opening
        if chunk.code:
            first = self.code[0] if self.code else start + chunk.code[0]
            self.code = (first, start + chunk.code[1])
        elif chunk.blocks or opening:
            self.flush()
        for kind, offset, found, level in chunk.blocks:
            self.blocks.append(Block(kind, start + offset, found, level))
        return self.follow(start, opening) if opening else 0

    def flush(self) -> None:
        """Add the indented code that was collected."""
        if self.code:
            self.blocks.append(Block("verbatim", self.code[0], self.text[slice(*self.code)]))
            self.code = None

    def follow(self, base: int, opening: Opening) -> int:
        """Follow what the chunk at ``base`` left open to its end; return where to go on."""
        text = self.text
        start = base + opening.start
        found = None
        if opening.close not in self.unclosed:
            found = re.compile(opening.close, re.M | re.I).search(text, base + opening.inner)
        if found:
            stop, after = found.start() if opening.exclusive else found.end(), found.end()
        else:
            self.unclosed.add(opening.close)
            stop = text.find("\n\n", start) if opening.bounded else len(text)
            stop = after = len(text) if stop < 0 else stop
        source = text[start:stop].rstrip("\n")
        if opening.kind and source.strip():
            self.blocks.append(Block(opening.kind, start, source))
        return after


def _front_matter(text: str, blocks: list[Block]) -> int:
    """Pass over front matter; an abstract that stands in it is a block."""
    opening = _FRONT.match(text)
    if not opening:
        return 0
    closing = _FRONT_END[opening[1]].search(text, opening.end())
    if not closing:
        return 0
    abstract = _ABSTRACT.search(text, opening.end(), closing.start())
    if abstract and abstract[1].strip():
        source = abstract[1].rstrip()
        blocks.append(Block("prose", abstract.start(1), source))
    return closing.end()


def show(kind: str, source: str) -> Visible:
    """Show a block."""
    from crossfoot.documents import markdown_shown  # most blocks are never shown

    return markdown_shown.show(kind, source)


def table(source: str) -> Table:
    """Read a table, which may be raw HTML or LaTeX."""
    from crossfoot.documents import markdown_shown

    return markdown_shown.table(source)


_DEFINED = expression(r"\\(?:(?:re)?newcommand|providecommand|def(?=\s?\\)|DeclareMathOperator)")


def define(text: str) -> Definitions:
    """Return the macros that a text defines for its formulas."""
    if "\\" not in text or not _DEFINED.search(text):
        return ()
    from crossfoot.documents import latex_macros  # few texts define any

    return latex_macros.define(text)


def expand(source: str, definitions: Definitions) -> Visible:
    """Return a source with its macros expanded."""
    from crossfoot.documents import latex_macros

    return latex_macros.expand(source, definitions, comments=False)


READER = Reader(split, show, angle_comments, define, table=table, expand=expand)
