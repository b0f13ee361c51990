"""Columns: how far into a line, in the unit that the editor counts in.

Inside, columns count code points; an editor counts bytes of UTF-8, code units of UTF-16 or code
points, as was agreed when it connected. Only this module and :mod:`crossfoot_lsp.text` know.
"""

from __future__ import annotations

import re
from bisect import bisect_left, bisect_right
from typing import NamedTuple

#: Names of the encodings as the protocol has them.
UTF8, UTF16, UTF32 = "utf-8", "utf-16", "utf-32"

ENCODINGS = (UTF8, UTF16, UTF32)

_BEYOND_ASCII = re.compile("[^\x00-\x7f]")
_BEYOND_BMP = re.compile("[\U00010000-\U0010ffff]")


class Columns(NamedTuple):
    """The characters of one line that take more than one unit.

    Attributes
    ----------
    at
        Their columns, in code points.
    extra
        ``extra[i]`` units beyond one a character are taken by the first ``i`` of them.
    """

    at: tuple[int, ...] = ()
    extra: tuple[int, ...] = (0,)

    def units(self, column: int) -> int:
        """Return a column in units."""
        return column + self.extra[bisect_left(self.at, column)]

    def points(self, units: int) -> int:
        """Return a column in code points; within a character it is the one before it."""
        passed = bisect_right(self.at, units, key=self._end) if self.at else 0
        column = units - self.extra[passed]
        return column if passed == len(self.at) else min(column, self.at[passed])

    def _end(self, column: int) -> int:
        """Return the units at which the wide character in a column ends."""
        return column + 1 + self.extra[bisect_left(self.at, column) + 1]


PLAIN = Columns()


def columns(line: str, encoding: str) -> Columns:
    """Return the columns of a line in an encoding."""
    if encoding == UTF32 or line.isascii():
        return PLAIN
    wide = _BEYOND_BMP if encoding == UTF16 else _BEYOND_ASCII
    at: list[int] = []
    extra = [0]
    for found in wide.finditer(line):
        at.append(found.start())
        extra.append(extra[-1] + (1 if encoding == UTF16 else _bytes(found[0]) - 1))
    return Columns(tuple(at), tuple(extra)) if at else PLAIN


def _bytes(character: str) -> int:
    """Return how many bytes UTF-8 takes; half a surrogate pair counts as three, like its peers."""
    code = ord(character)
    return 2 if code < 0x800 else 3 if code < 0x10000 else 4
