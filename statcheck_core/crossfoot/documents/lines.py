"""The lines of a text, for formats whose structure lies in lines and their indentation."""

from __future__ import annotations

from collections.abc import Callable

from crossfoot.model import Block


class Lines:
    """A text's lines, with the blocks that were made of them so far."""

    def __init__(self, text: str) -> None:
        self.text = text
        self.lines = text.split("\n")
        self.starts: list[int] = []
        start = 0
        for line in self.lines:
            self.starts.append(start)
            start += len(line) + 1
        self.blocks: list[Block] = []

    def walk(self, handle: Callable[[int], int]) -> tuple[Block, ...]:
        """Return the blocks that ``handle`` makes of all lines.

        It handles what starts at a line, and returns the next line to handle.
        """
        number = 0
        while number < len(self.lines):
            number = handle(number)
        return tuple(self.blocks)

    def add(self, kind: str, first: int, last: int, level: int = 0, offset: int = 0) -> int:
        """Make a block of the lines from ``first`` up to, not including, ``last``.

        Returns ``last``. ``offset`` characters of the first line are left out.
        """
        while first < last and self.blank(first):
            first += 1
        end = last
        while end > first and self.blank(end - 1):
            end -= 1
        if first < end:
            start = self.starts[first] + offset
            stop = self.starts[end - 1] + len(self.lines[end - 1])
            if start < stop:
                self.blocks.append(Block(kind, start, self.text[start:stop], level))
        return last

    def blank(self, number: int) -> bool:
        """Tell whether a line shows nothing."""
        line = self.lines[number]
        return not line or line.isspace()

    def indent(self, number: int) -> int:
        """Return by how many characters a line is indented."""
        line = self.lines[number]
        return len(line) - len(line.lstrip())

    def paragraph(self, number: int) -> int:
        """Return the line after the paragraph that starts at a line."""
        while number < len(self.lines) and not self.blank(number):
            number += 1
        return number

    def indented(self, number: int, indent: int) -> int:
        """Return the line after those that are indented by more than ``indent``."""
        last = number
        while number < len(self.lines):
            if not self.blank(number):
                if self.indent(number) <= indent:
                    break
                last = number + 1
            number += 1
        return last
