r"""The text of an open document with its lines, kept up from edit to edit.

A line ends at ``\n``, ``\r\n`` or ``\r`` and nowhere else, as the protocol says. A text never
changes: an edit makes a new one, which takes over what it can of the index of the old one, so
that work on an older version goes on undisturbed.
"""

from __future__ import annotations

import re
from bisect import bisect_right
from collections.abc import Sequence

from lsprotocol import types

from crossfoot_lsp.columns import UTF16, Columns, columns

_BREAK = re.compile(r"\r\n?|\n")


class Text:
    """One version of a text.

    Parameters
    ----------
    content
        The text.
    encoding
        What the editor counts columns in.
    starts
        Offsets at which the lines start, where they are known.
    """

    __slots__ = ("_columns", "content", "encoding", "starts")

    def __init__(
        self, content: str, encoding: str = UTF16, starts: Sequence[int] | None = None
    ) -> None:
        self.content = content
        self.encoding = encoding
        self.starts = _line_starts(content) if starts is None else starts
        self._columns: dict[int, Columns] = {}

    def line_span(self, line: int) -> tuple[int, int]:
        """Return where a line, from 0, starts and where it ends before its line break."""
        start = self.starts[line]
        if line + 1 == len(self.starts):
            return start, len(self.content)
        end = self.starts[line + 1]
        return start, end - (2 if self.content[end - 2 : end] == "\r\n" else 1)

    def offset(self, position: types.Position) -> int:
        """Return the offset of a position; one outside the text is moved to its nearest place."""
        if position.line < 0:
            return 0
        if position.line >= len(self.starts):
            return len(self.content)
        start, end = self.line_span(position.line)
        column = self._line(position.line).points(max(position.character, 0))
        return min(start + column, end)

    def position(self, offset: int) -> types.Position:
        """Return the position of an offset; one outside the text is moved to its nearest end."""
        return types.Position(*self.place(offset))

    def place(self, offset: int) -> tuple[int, int]:
        """Return the line and the column of a position, as plain numbers."""
        offset = min(max(offset, 0), len(self.content))
        line = bisect_right(self.starts, offset) - 1
        return line, self._line(line).units(offset - self.starts[line])

    def range(self, start: int, end: int) -> types.Range:
        """Return the range of two offsets."""
        return types.Range(self.position(start), self.position(end))

    def span(self, range_: types.Range) -> tuple[int, int]:
        """Return the offsets of a range, in order."""
        start, end = self.offset(range_.start), self.offset(range_.end)
        return min(start, end), max(start, end)

    def edited(self, change: types.TextDocumentContentChangeEvent) -> Text:
        """Return the text after a change."""
        if isinstance(change, types.TextDocumentContentChangeWholeDocument):
            return Text(change.text, self.encoding)
        return self.replaced(*self.span(change.range), change.text)

    def replaced(self, start: int, end: int, new: str) -> Text:
        """Return the text with ``new`` between two offsets; only lines it touches are looked at."""
        old = self.content
        content = f"{old[:start]}{new}{old[end:]}"
        # From the line before the change, whose "\r" may meet a "\n", to the line after it.
        first = max(0, bisect_right(self.starts, start) - 2)
        last = bisect_right(self.starts, min(end + 1, len(old)))
        shift = len(new) - (end - start)
        begin = self.starts[first]
        stop = self.starts[last] + shift if last < len(self.starts) else len(content)
        between = [begin + at for at in _line_starts(content[begin:stop])]
        tail = self.starts[last:]
        if tail and between[-1] == stop:
            between.pop()
        moved = [at + shift for at in tail] if shift else tail
        return Text(content, self.encoding, [*self.starts[:first], *between, *moved])

    def _line(self, line: int) -> Columns:
        found = self._columns.get(line)
        if found is None:
            content = self.content[slice(*self.line_span(line))]
            found = self._columns[line] = columns(content, self.encoding)
        return found


def _line_starts(text: str) -> list[int]:
    return [0, *(found.end() for found in _BREAK.finditer(text))]
