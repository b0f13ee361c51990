"""What a chunk of Markdown between blank lines holds, and what it leaves open."""

from __future__ import annotations

from typing import NamedTuple


class Opening(NamedTuple):
    """Something that runs on past the end of its chunk.

    Attributes
    ----------
    kind
        Of the block it makes; empty where it is not shown.
    start, inner
        Where in the chunk the block starts, and from where its end is looked for.
    close
        Pattern of what closes it.
    exclusive
        Whether what closes it is no part of the block.
    bounded
        Whether it ends with its chunk if nothing closes it.
    """

    kind: str
    start: int
    inner: int
    close: str
    exclusive: bool = False
    bounded: bool = False


class Chunk(NamedTuple):
    """What a chunk holds.

    Attributes
    ----------
    blocks
        Kind, offset, source and level of each block.
    opening
        What it leaves open.
    listed
        Whether a list may go on after it.
    code
        Where it starts and ends, if all of it is indented code.
    """

    blocks: tuple[tuple[str, int, str, int], ...]
    opening: Opening | None
    listed: bool
    code: tuple[int, int] | None = None
