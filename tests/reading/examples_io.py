"""Read the example files: a text, and what must be read from it.

A line that starts with ``|`` is text, one that starts with ``>`` a claim (or ``nothing``), one
with ``#`` a comment; a blank line ends an example. The suffix of the file names the format.
"""

from __future__ import annotations

from collections.abc import Iterator
from pathlib import Path
from typing import NamedTuple

from crossfoot.model import Claim

FOLDER = Path(__file__).parent / "examples"


class Example(NamedTuple):
    """A text and its claims, as lines."""

    name: str
    language: str
    text: str
    claims: tuple[str, ...]


def examples() -> list[Example]:
    """Return every example of every file."""
    return [example for path in sorted(FOLDER.iterdir()) for example in _examples(path)]


def _examples(path: Path) -> Iterator[Example]:
    lines: list[str] = []
    claims: list[str] = []
    start = 0
    for number, line in enumerate([*path.read_text("utf-8").splitlines(), ""], 1):
        if line.startswith("|"):
            start = start if lines else number
            lines.append(line[2:])
        elif line.startswith(">"):
            claims.append(line[2:])
        elif not line and lines:
            yield Example(f"{path.name}:{start}", path.suffix[1:], "\n".join(lines), tuple(claims))
            lines, claims = [], []


def told(claim: Claim) -> str:
    """Write a claim the way the example files do."""
    readings = "; ".join(
        f"{r.term + ' ' if r.term else ''}{r.quantity} {r.relation} {r.literal}"
        for r in claim.readings
    )
    context = f" [{', '.join(claim.context)}]" if claim.context else ""
    return f"{claim.kind}: {readings}{context}"
