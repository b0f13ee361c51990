"""Line ends: the readers see line feeds alone, places stay those of the source.

A line ends at a line feed, a carriage return, or the two together, and at nothing else.
"""

from __future__ import annotations

import re
from bisect import bisect_left

from crossfoot.documents.visible import Builder, Visible
from crossfoot.expressions import expression
from crossfoot.model import Block, Span

_RETURN = expression(r"\r\n?")


def feeds_only(text: str) -> str:
    """Return ``text`` with every line end as a line feed."""
    return text.replace("\r\n", "\n").replace("\r", "\n")


class Places:
    """The way back from a text with line feeds alone to the text it was made from."""

    def __init__(self, text: str) -> None:
        # Offsets, after the change, of the line feeds that were two characters.
        self._pairs = [
            found.start() - number for number, found in enumerate(re.finditer(r"\r\n", text))
        ]

    def back(self, offset: int) -> int:
        """Return the offset in the original text."""
        return offset + bisect_left(self._pairs, offset)

    def span(self, span: Span) -> Span:
        """Return the span in the original text."""
        return Span(self.back(span.start), self.back(span.end))

    def block(self, block: Block, text: str) -> Block:
        """Return the block in the original text."""
        start = self.back(block.start)
        end = self.back(block.start + len(block.source))
        return Block(block.kind, start, text[start:end], block.level)


def joined_lines(text: str) -> Visible:
    """Show ``text`` with every line end as a line feed."""
    out = Builder()
    position = 0
    for found in _RETURN.finditer(text):
        out.keep(text, position, found.start())
        out.put("\n", *found.span())
        position = found.end()
    out.keep(text, position, len(text))
    return out.build()
