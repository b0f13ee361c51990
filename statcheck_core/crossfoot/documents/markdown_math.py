"""The formulas of Markdown: where they start and end, and what is no formula."""

from __future__ import annotations

from bisect import bisect_left
from typing import NamedTuple

from crossfoot.documents.edits import Edit
from crossfoot.documents.mathtext import show_math
from crossfoot.documents.visible import Builder, Visible
from crossfoot.expressions import expression

_TEX = expression(r"[=<>^_\\]")

#: How far into a formula is looked to tell whether it is one.
_FAR = 400


class Mark(NamedTuple):
    """A mark found in the source, or the rest of one that something else cut short."""

    start: int
    end: int
    text: str


def formula(source: str, start: int, end: int) -> Visible:
    """Show ``source[start:end]``, the inside of a formula."""
    out = Builder()
    show_math(out, source, start, end)
    return out.build()


def first_after(places: list[int], at: int) -> int | None:
    """Return the first of sorted ``places`` from ``at`` on."""
    index = bisect_left(places, at)
    return places[index] if index < len(places) else None


class Formulas:
    """Knows where the formulas of a stretch of source may close, from its marks."""

    def __init__(self, source: str, start: int, end: int, marks: list[Mark]) -> None:
        self._source = source
        self._start = start
        self._end = end
        self._dollars: list[int] = []  # every dollar sign
        self._tight: list[int] = []  # those that may close a formula
        self._loose: list[int] = []  # those after a space
        self._closing: dict[str, list[int]] = {"$$": [], "\\)": [], "\\]": []}
        for mark in marks:
            if mark.text[0] in "$\\":
                self._note(mark)

    def _note(self, mark: Mark) -> None:
        if mark.text in self._closing:
            self._closing[mark.text].append(mark.start)
        if mark.text[0] == "$":
            self._dollars.append(mark.start)
            if mark.text == "$$":
                self._tight.append(mark.start)
            elif mark.text == "$" and self._before(mark).isspace():
                self._loose.append(mark.start)
            elif mark.text == "$" and not self._source[mark.end : mark.end + 1].isdigit():
                self._tight.append(mark.start)

    def _before(self, mark: Mark) -> str:
        return self._source[mark.start - 1] if mark.start > self._start else " "

    def _is_tex(self, start: int, end: int) -> bool:
        return _TEX.search(self._source, start, min(end, start + _FAR)) is not None

    def _edit(self, mark: Mark, close: int, width: int) -> Edit:
        return Edit(mark.start, close + width, formula(self._source, mark.end, close))

    def in_brackets(self, mark: Mark) -> Edit | None:
        r"""Show ``\(p = .03\)``, but not escaped brackets: ``F\(1, 58\)``, ``\[.23, .56\]``."""
        close = first_after(self._closing["\\)" if mark.text[1] == "(" else "\\]"], mark.end)
        before = self._before(mark)
        if close is None or before.isalnum() or before in "*_^~)":
            return None
        return self._edit(mark, close, 2) if self._is_tex(mark.end, close) else None

    def in_dollars(self, mark: Mark, ticks: list[int]) -> Edit | None:
        """Show a formula between dollar signs; money is none. ``ticks`` are single backticks."""
        if mark.text == "$$":
            close = first_after(self._closing["$$"], mark.end)
            return None if close is None else self._edit(mark, close, 2)
        following = self._source[mark.end : mark.end + 1]
        if mark.text != "$" or not following:
            return None
        if following == "`":  # $`…`$
            close = first_after(ticks, mark.end + 1)
            if close is None or not self._source.startswith("`$", close):
                return None
            return self._edit(mark._replace(end=mark.end + 1), close, 2)
        close = first_after(self._loose if following.isspace() else self._tight, mark.end + 1)
        if close is None or close != first_after(self._dollars, mark.end + 1):
            return None
        if following.isspace() and not self._is_tex(mark.end, close):
            return None
        return self._edit(mark, close, 1)
