"""Where what a notebook shows stands in its file: strings of JSON, with escapes, in lists of lines.

An open notebook comes as the texts of its cells; only of a file that is not open is the JSON at
hand, and what is found in it is shown there.
"""

from __future__ import annotations

import json
import re
from bisect import bisect_right
from collections.abc import Iterator
from functools import cached_property
from typing import Any

from lsprotocol import types

from crossfoot.documents.notebook import GAP, TERMINAL, Part, cells_of, parts_of, strings_of
from crossfoot_lsp.text import Text

_STRING = re.compile(r'"[^"\\]*+(?:\\.[^"\\]*+)*+"', re.DOTALL)
_UNIT = re.compile(r"\\u[0-9a-fA-F]{4}|\\.|.", re.DOTALL)

#: What of a string is shown as one character, or not at all.
_SHOWN = re.compile(rf"\r\n|{TERMINAL.pattern}|.", re.DOTALL)


class _Placed(str):
    """A string of JSON that knows where it starts, after its quotation mark."""

    at: int


class _Pairs(list[tuple[str, Any]]):
    """An object of JSON with its members in order, also those of one name."""


class NotebookText(Text):
    """What a notebook shows, with ranges in its file.

    Parameters
    ----------
    content
        The text that was written out of the notebook.
    file
        The notebook's own text.
    """

    __slots__ = ("__dict__", "file")

    def __init__(self, content: str, file: Text) -> None:
        super().__init__(content, file.encoding)
        self.file = file
        self._places: dict[int, list[tuple[int, int]]] = {}

    @cached_property
    def _parts(self) -> list[tuple[int, Part]]:
        """The parts, each with where it starts in the text that was written out."""
        starts = (found.start() + 1 for found in _STRING.finditer(self.file.content))
        content = _placed(json.loads(self.file.content, object_pairs_hook=_Pairs), starts)
        parts = []
        position = 0
        for cell in cells_of(content) or ():
            for part in parts_of(cell):
                parts.append((position, part))
                position += len(part.text) + len(GAP)
        return parts

    def range(self, start: int, end: int) -> types.Range:
        """Return the range, in the file, of two offsets."""
        first, last = self._place(start)[0], self._place(max(start, end - 1))[1]
        return self.file.range(first, max(first, last))

    def _place(self, offset: int) -> tuple[int, int]:
        """Return where the character at an offset starts and ends in the file."""
        number = bisect_right(self._parts, offset, key=lambda item: item[0]) - 1
        if number < 0:
            return 0, 0
        begin, part = self._parts[number]
        places = self._places.get(number)
        if places is None:
            places = self._places[number] = list(_characters(self.file.content, part))
        if not places:
            return 0, 0
        return places[min(max(offset - begin - part.lead, 0), len(places) - 1)]


def _placed(value: Any, starts: Iterator[int]) -> Any:
    """Return JSON with strings that know where they start."""
    if isinstance(value, _Pairs):
        found = {}
        for key, inner in value:
            next(starts)
            found[key] = _placed(inner, starts)
        return found
    if isinstance(value, list):
        return [_placed(inner, starts) for inner in value]
    if isinstance(value, str):
        value = _Placed(value)
        value.at = next(starts)
    return value


def _characters(file: str, part: Part) -> Iterator[tuple[int, int]]:
    """Yield where each character that a part shows starts and ends in the file."""
    units: list[tuple[int, int]] = []
    strings = list(strings_of(part.value))
    for string in strings:
        assert isinstance(string, _Placed)
        units += _units(file, string)
    for found in _SHOWN.finditer("".join(strings)):
        if not TERMINAL.fullmatch(found[0]):
            yield units[found.start()][0], units[found.end() - 1][1]


def _units(file: str, string: _Placed) -> Iterator[tuple[int, int]]:
    """Yield where each character of a string starts and ends in the file."""
    position = string.at
    for character in string:
        start, position = position, _after(file, position)
        if character > "\uffff" and file[start] == "\\":
            position = _after(file, position)  # it is written as two
        yield start, position


def _after(file: str, position: int) -> int:
    found = _UNIT.match(file, position)
    return found.end() if found else position
