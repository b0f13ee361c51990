"""Markdown and its relatives: CommonMark, GitHub's, Pandoc's, Quarto's, R Markdown's and MyST's.

A text is cut at blank lines, and each chunk is analysed on its own, remembered by its content:
while a document is edited all but one of its chunks are look-ups. What runs on past a blank line
(fenced code, a comment, an HTML table) is followed to its end from the chunk that opens it.
"""

from __future__ import annotations

import re

from crossfoot.documents.drawn_tables import read_table
from crossfoot.documents.edits import Edit
from crossfoot.documents.format import Definitions, Reader
from crossfoot.documents.markdown_chunk import Chunk, Opening, analyse
from crossfoot.documents.markdown_inline import show_inline
from crossfoot.documents.printout import show_printout
from crossfoot.documents.table import Table
from crossfoot.documents.tags import angle_comments
from crossfoot.documents.visible import Builder, Visible
from crossfoot.memo import remembered
from crossfoot.model import Block

_FRONT = re.compile(r"(---|\+\+\+)[ \t]*\n")
_FRONT_END = {
    "---": re.compile(r"^(?:---|\.\.\.)[ \t]*$", re.M),
    "+++": re.compile(r"^\+\+\+[ \t]*$", re.M),
}
_ABSTRACT = re.compile(
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


_HEADING = re.compile(r"[ \t]*(?:> ?)*[ \t]*(#{1,6})(?:[ \t]+|$)")
_HEADING_END = re.compile(r"(?:[ \t]+#+)?(?:[ \t]*\{[^{}\n]{0,200}\})?[ \t]*$")
_UNDERLINE = re.compile(r"\n[ \t>]*[=-]+[ \t]*$")
_QUOTE = re.compile(r"(?:[ \t]{0,3}> ?)+")
_BULLET = re.compile(r"[ \t]*([-+*])[ \t]+(?=(\S))")
_LABEL = re.compile(r"[ \t]*(?:\[\^[^\s\[\]]{1,60}\]:|:(?!:)|Table:)[ \t]*")


def show(kind: str, source: str, definitions: Definitions) -> Visible:
    """Show a block."""
    if kind in ("verbatim", "code"):
        return show_printout(source)
    if kind == "table":
        return table(source, definitions).visible
    out = Builder()
    start, end = 0, len(source)
    if kind == "heading":
        mark = _HEADING.match(source)
        if mark:
            start = mark.end()
        elif underline := _UNDERLINE.search(source):
            end = underline.start()
        closing = _HEADING_END.search(source, max(start, end - 260), end)
        end = closing.start() if closing else end
    show_inline(out, source, start, end, _line_edits(source, start, end))
    return out.build()


def table(source: str, definitions: Definitions) -> Table:
    """Read a table, which may be raw HTML or LaTeX."""
    head = source.lstrip()[:2]
    if head[:1] == "<":
        from crossfoot.documents import html  # only few documents hold such tables

        return html.table(source, definitions)
    if head[:1] == "\\":
        from crossfoot.documents import latex

        return latex.table(source, definitions)
    return read_table(source, show_inline)


def _line_edits(source: str, start: int, end: int) -> list[Edit]:
    """Return what the starts of lines call for: quote marks go, bullets are shown as such."""
    edits: list[Edit] = []
    quoted = start == 0 and _QUOTE.match(source) is not None
    listed = False
    position = start
    while position <= end:
        line = position
        if quoted and (quote := _QUOTE.match(source, position, end)):
            edits.append(Edit(position, quote.end()))
            line = quote.end()
        if position == start and start == 0 and (label := _LABEL.match(source, line, end)):
            edits.append(Edit(line, label.end()))
            line = label.end()
        if bullet := _BULLET.match(source, line, end):
            # In the middle of a paragraph "- 0.57" is a number that was wrapped, not an item.
            listed = listed or position == start
            if listed or not (bullet[2].isdigit() or bullet[2] in ".=<>"):
                edits.append(Edit(bullet.start(1), bullet.end(1), "•"))
        feed = source.find("\n", position, end)
        if feed < 0:
            break
        position = feed + 1
    return edits


READER = Reader(split, show, angle_comments, table=table)
