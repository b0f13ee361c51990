"""What a generated table is: cells whose numbers can be exchanged, and what they say.

Texts hold a number as ``\\x00k\\x00``, its place in :attr:`Drawn.numbers`; and they may hold the
tags ``<i>``, ``<sup>`` and ``<sub>``, which every format writes in its own way.
"""

from __future__ import annotations

import re
from typing import NamedTuple

SLOT = re.compile("\x00(\\d+)\x00")


class Cell(NamedTuple):
    """A cell; ``columns`` says how many it spans."""

    text: str
    columns: int = 1


class Said(NamedTuple):
    """A claim that a careful reader takes from a table.

    ``readings`` gives, for quantity and term, the number's place; ``checked`` those of them that
    an identity ties to other printed numbers, so that a gross slip must be found.
    """

    kind: str
    readings: dict[tuple[str, str | None], int]
    checked: tuple[tuple[str, str | None], ...] = ()


class Drawn(NamedTuple):
    """A table before it is written in a format."""

    kind: str
    caption: str
    rows: list[list[Cell]]
    heads: int
    notes: list[str]
    numbers: list[str]
    said: list[Said]
    printout: bool = False


def filled(text: str, numbers: list[str]) -> str:
    """The text with its numbers."""
    return SLOT.sub(lambda found: numbers[int(found[1])], text)


class Numbers:
    """Collects numbers and gives out their slots."""

    def __init__(self) -> None:
        self.printed: list[str] = []

    def put(self, literal: str) -> tuple[str, int]:
        self.printed.append(literal)
        place = len(self.printed) - 1
        return f"\x00{place}\x00", place
