"""What an output is: one declaration that the command, its help and the docs are made from."""

from __future__ import annotations

from collections.abc import Callable, Iterable, Iterator
from typing import NamedTuple

from crossfoot.model import Report


class Look(NamedTuple):
    """How an output for people should look; outputs for programs pay it no heed.

    Attributes
    ----------
    width
        Columns of text to a line.
    colour
        Whether escape sequences for colours may be written. Colour is never the only sign.
    explain
        Whether the working of each finding is written out, and settled findings are listed.
    """

    width: int = 80
    colour: bool = False
    explain: bool = False


class Output(NamedTuple):
    """A way to write reports down.

    Attributes
    ----------
    name
        Its name on the command line.
    title
        What it is for, in a few words.
    write
        Turns reports into pieces of text, document by document as far as the form allows.
    """

    name: str
    title: str
    write: Callable[[Iterable[Report], Look], Iterator[str]]
