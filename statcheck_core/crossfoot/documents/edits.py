"""Edits: what inline markup does to its source, written down first and carried out in order."""

from __future__ import annotations

import re
from abc import ABC, abstractmethod
from collections.abc import Iterable
from typing import NamedTuple

from crossfoot.documents.visible import Builder, Visible
from crossfoot.expressions import expression

#: Most marks that are followed in one stretch: far beyond any prose.
MOST_MARKS = 40_000


class Edit(NamedTuple):
    """What stands in place of a stretch of the source."""

    start: int
    end: int
    shown: str | Visible = ""


def apply_edits(out: Builder, source: str, start: int, end: int, edits: Iterable[Edit]) -> None:
    """Show ``source[start:end]`` with ``edits``; of two that overlap the outer one counts."""
    position = start
    for edit in sorted(edits, key=_order):
        if edit.start < position:
            continue
        out.keep(source, position, edit.start)
        if isinstance(edit.shown, Visible):
            out.add(edit.shown)
        elif source.startswith(edit.shown, edit.start) and len(edit.shown) == edit.end - edit.start:
            out.keep(source, edit.start, edit.end)
        else:
            out.put(edit.shown, edit.start, edit.end)
        position = edit.end
    out.keep(source, position, end)


def _order(edit: Edit) -> tuple[int, int]:
    return edit.start, -edit.end


class Marks:
    """Finds the marks of a format: by the characters they start with first, then by pattern."""

    def __init__(self, characters: str, pattern: str, flags: re.RegexFlag = re.NOFLAG) -> None:
        self._start = expression(f"[{re.escape(characters)}]")
        self._pattern = expression(pattern, flags)

    def next(self, source: str, start: int, end: int) -> re.Match[str] | None:
        """Return the first mark in ``source[start:end]``."""
        while candidate := self._start.search(source, start, end):
            found = self._pattern.match(source, candidate.start(), end)
            if found:
                return found
            start = candidate.end()
        return None


def show_marked(
    out: Builder, span: tuple[int, int], marks: Marks, walk: Walk, line_edits: Iterable[Edit]
) -> None:
    """Show a stretch of source, with what its marks do and with edits that its lines call for."""
    position, end = span
    walk.edits.extend(line_edits)
    left = MOST_MARKS
    while left and (found := marks.next(walk.source, position, end)):
        left -= 1
        position = walk.mark(found)
    apply_edits(out, walk.source, *span, walk.edits)


class Closings:
    """Looks up where the next of a mark stands; no stretch is searched twice for the same mark."""

    def __init__(self, source: str, end: int) -> None:
        self._source = source
        self._end = end
        self._next: dict[str, int] = {}

    def after(self, mark: str, at: int) -> int:
        """Return the first place from ``at`` on, or -1."""
        known = self._next.get(mark, -2)
        if known == -1 or known >= at:
            return known
        found = self._source.find(mark, at, self._end)
        self._next[mark] = found
        return found


class Pairs:
    """Matches marks that come in pairs, each with the nearest one before it that is open."""

    def __init__(self, source: str, start: int, end: int) -> None:
        self.source = source
        self.start = start
        self.end = end
        self.edits: list[Edit] = []
        self._open: dict[str, tuple[int, int]] = {}

    def before(self, at: int) -> str:
        """Return the character before ``at``, a space at the start."""
        return self.source[at - 1] if at > self.start else " "

    def after(self, at: int) -> str:
        """Return the character at ``at``, a space at the end."""
        return self.source[at] if at < self.end else " "

    def mark(
        self, key: str, at: int, after: int, around: tuple[str, str] = ("", ""), tight: bool = True
    ) -> None:
        """Take note of a mark from ``at`` to ``after``.

        A tight mark opens only after what is no word and before what is no space, and closes only
        the other way round; others do so within words as well.
        """
        left, right = self.before(at), self.after(after)
        opens = not right.isspace() and not (tight and left.isalnum())
        closes = not left.isspace() and not (tight and right.isalnum())
        if closes and key in self._open:
            begin, inner = self._open.pop(key)
            self.edits.append(Edit(begin, inner, around[0]))
            self.edits.append(Edit(at, after, around[1]))
        elif opens:
            self._open[key] = (at, after)

    def struck(self, key: str, at: int, after: int) -> None:
        """Take note of a mark of struck-out text, which is not shown."""
        left, right = self.before(at), self.after(after)
        if not left.isspace() and not right.isalnum() and key in self._open:
            begin, _ = self._open.pop(key)
            self.edits.append(Edit(begin, after))
        elif not right.isspace() and not left.isalnum():
            self._open[key] = (at, after)


class Walk(ABC):
    """Writes down what each mark of a stretch of source does; a format says how."""

    def __init__(self, source: str, start: int, end: int) -> None:
        self.source = source
        self.end = end
        self.pairs = Pairs(source, start, end)
        self.edits = self.pairs.edits

    @abstractmethod
    def mark(self, found: re.Match[str]) -> int:
        """Handle a mark and return where to go on."""

    def replace(self, found: re.Match[str], shown: str | Visible = "") -> None:
        """Show something in place of a mark."""
        self.edits.append(Edit(*found.span(), shown))

    def around(self, found: re.Match[str], group: str, shown: tuple[str, str] = ("", "")) -> None:
        """Show something in place of what stands around a group."""
        self.edits.append(Edit(found.start(), found.start(group), shown[0]))
        self.edits.append(Edit(found.end(group), found.end(), shown[1]))
