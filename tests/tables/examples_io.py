"""Read the hand-written tables: a text, what must be read from it, and what must be said of it.

``@@`` starts a table and its name; its text follows, then after ``@@ read`` a claim a line, and
after ``@@ said`` a finding a line. Where these are left out there must be none. The suffix of the
file names the format.
"""

from __future__ import annotations

from collections.abc import Iterator
from pathlib import Path
from typing import NamedTuple

from crossfoot.model import Claim, Finding
from reading.examples_io import told

FOLDER = Path(__file__).parent / "examples"


class Example(NamedTuple):
    """A table with what must be read and said, as lines."""

    name: str
    language: str
    text: str
    read: tuple[str, ...]
    said: tuple[str, ...]


def examples() -> list[Example]:
    """Return every example of every file."""
    return [example for path in sorted(FOLDER.iterdir()) for example in _examples(path)]


def _examples(path: Path) -> Iterator[Example]:
    language = path.suffix[1:]
    found: list[dict[str, str]] = []
    for part in path.read_text("utf-8").split("@@ ")[1:]:
        title, _, body = part.partition("\n")
        if title in {"read", "said"}:
            found[-1][title] = body
        else:
            found.append({"name": title, "text": body, "read": "", "said": ""})
    for one in found:
        lines = [tuple(filter(None, one[key].split("\n"))) for key in ("read", "said")]
        yield Example(f"{language}: {one['name']}", language, one["text"].rstrip("\n"), *lines)


def read_line(claim: Claim) -> str:
    """Write a claim the way the example files do, with what it takes from elsewhere."""
    given = ", ".join(f"{r.quantity} = {r.literal}" for r in claim.given)
    return f"{claim.label} | {told(claim)}" + (f" (given {given})" if given else "")


def said_line(claim: Claim, finding: Finding) -> str:
    """Write a finding the way the example files do: how strong, which, where."""
    reading = claim.readings[finding.reading]
    row = claim.row or reading.term or ""
    place = f"{row}, {reading.quantity}" if row else reading.quantity
    return f"{finding.severity} {finding.identity}: {place} {reading.relation} {reading.literal}"
