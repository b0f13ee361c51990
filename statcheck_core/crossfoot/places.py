r"""Where an offset stands: lines and columns from 1, columns in Unicode code points.

A line ends at ``\n``, ``\r\n`` or ``\r`` and nowhere else: form feeds, ``U+0085`` and
``U+2028`` are ordinary characters, as they are for the editors and compilers that read the same
files.
"""

from __future__ import annotations

from bisect import bisect_right
from functools import lru_cache
from itertools import accumulate
from re import finditer
from typing import NamedTuple

from crossfoot.model import Document, Span


class Position(NamedTuple):
    """A line and a column, both from 1."""

    line: int
    column: int


class Where(NamedTuple):
    """A span as a person looks it up.

    ``page`` counts from 1 and is None in a document without pages; where there are pages, lines
    count from the top of the page on which the span starts, for both its ends.
    """

    page: int | None
    start: Position
    end: Position


class LineIndex:
    """The lines of one text, built once, for look-ups in logarithmic time.

    Parameters
    ----------
    text
        The text; it is looked at once and not kept.
    """

    __slots__ = ("_length", "_starts")

    def __init__(self, text: str) -> None:
        self._length = len(text)
        if "\r" in text:
            self._starts = [0, *(found.end() for found in finditer(r"\r\n?|\n", text))]
        else:
            lengths = (len(line) + 1 for line in text.split("\n")[:-1])
            self._starts = list(accumulate(lengths, initial=0))

    @property
    def count(self) -> int:
        """The number of lines, at least 1; a final line break opens one more, empty line."""
        return len(self._starts)

    def start(self, line: int) -> int:
        """Return the offset at which a line, from 1, starts; lines outside are clamped."""
        return self._starts[min(max(line, 1), len(self._starts)) - 1]

    def position(self, offset: int) -> Position:
        """Return the place of an offset; offsets outside the text are clamped."""
        offset = min(max(offset, 0), self._length)
        line = bisect_right(self._starts, offset)
        return Position(line, offset - self._starts[line - 1] + 1)

    def offset(self, line: int, column: int) -> int:
        """Return the offset of a place, the inverse of :meth:`position`.

        A column beyond the next line's start, and a line beyond the last, are clamped.
        """
        if line > len(self._starts):
            return self._length
        stop = self._starts[line] - 1 if 1 <= line < len(self._starts) else self._length
        start = self.start(line)
        return start if line < 1 else min(start + max(column, 1) - 1, max(stop, start))


@lru_cache(maxsize=4)  # it keeps the texts alive, so only a few
def line_index(text: str) -> LineIndex:
    """Return the index of a text, built the first time it is asked for."""
    return LineIndex(text)


def where(document: Document, span: Span) -> Where:
    """Return the page, the lines and the columns of a span of a document's text."""
    index = line_index(document.text)
    start, end = index.position(span.start), index.position(max(span.start, span.end))
    if not document.pages:
        return Where(None, start, end)
    page = max(1, bisect_right(document.pages, span.start))
    top = index.position(document.pages[page - 1] if page > 1 else 0)
    return Where(page, _from(top, start), _from(top, end))


def _from(top: Position, position: Position) -> Position:
    """Count a position from the top of its page, which may stand in the middle of a line."""
    line = position.line - top.line + 1
    return Position(line, position.column - top.column + 1 if line == 1 else position.column)
