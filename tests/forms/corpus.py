"""Read the labelled forms: a text, and what a careful human reader takes from it.

An entry is a line of JSON with the keys

``id``, ``format`` (a suffix), ``lang`` (of the prose), ``text``
    ``notation`` or ``lookalike`` says in words what kind of form it is.
``claims``
    A list of claims, each a list of readings: ``quantity``, ``relation``, ``literal`` in ASCII
    (point for the decimal mark, leading zero, percent as a fraction), ``printed`` where that
    differs, ``term`` in tables. Empty for a look-alike, which holds no result; null for a text
    that is true throughout and of which only that is labelled: nothing is to be found in it, not
    even a doubt.
``consistent``
    Whether all that is printed can be true. If not, ``wrong`` says which reading was planted:
    ``claim``, ``quantity``, ``true`` and how far it is off (``gross``, ``subtle``, ``swap``).
``also``
    For each claim, readings that may be taken with it but need not be.
``context``
    What the text says that changes what may be concluded.
``note``
    Why a label is as it is, where that may be asked.
"""

from __future__ import annotations

import json
from collections.abc import Mapping
from functools import cache
from pathlib import Path
from typing import Any, NamedTuple

FOLDER = Path(__file__).parent

#: Files of the corpus, in the order they are scored. One more file is found by itself.
FILES = tuple(sorted(path.name for path in FOLDER.glob("*.jsonl")))

#: Name of the format in Crossfoot, by the suffix an entry names.
LANGUAGES: Mapping[str, str] = {
    "md": "markdown",
    "qmd": "markdown",
    "tex": "latex",
    "html": "html",
    "xml": "jats",
    "ipynb": "notebook",
    "rst": "rst",
    "org": "org",
    "typ": "typst",
    "adoc": "asciidoc",
    "txt": "plain",
}


class Wanted(NamedTuple):
    """A reading that a human reader takes."""

    quantity: str
    relation: str
    literal: str
    term: str | None = None


class Entry(NamedTuple):
    """A labelled text."""

    id: str
    file: str
    format: str
    text: str
    name: str
    claims: tuple[tuple[Wanted, ...], ...]
    also: tuple[tuple[Wanted, ...], ...]
    context: frozenset[str]
    consistent: bool
    wrong: int | None
    planted: Wanted | None
    labelled: bool = True

    @property
    def language(self) -> str:
        return LANGUAGES[self.format]

    @property
    def holds_nothing(self) -> bool:
        return self.labelled and not self.claims


@cache
def entries() -> tuple[Entry, ...]:
    """Return every entry of every file."""
    return tuple(
        _entry(name, json.loads(line))
        for name in FILES
        for line in (FOLDER / name).read_text(encoding="utf-8").splitlines()
    )


def _entry(file: str, row: dict[str, Any]) -> Entry:
    claims = _claims(row["claims"] or [])
    return Entry(
        id=row["id"],
        file=file,
        format=row["format"],
        text=row["text"],
        name=row.get("notation") or row["lookalike"],
        claims=claims,
        also=_claims(row.get("also", [[] for _ in claims])),
        context=frozenset(row.get("context", ())),
        consistent=row["consistent"],
        wrong=row["wrong"]["claim"] if "wrong" in row else None,
        planted=_planted(claims, row["wrong"]) if "wrong" in row else None,
        labelled=row["claims"] is not None,
    )


def _planted(claims: tuple[tuple[Wanted, ...], ...], wrong: dict[str, Any]) -> Wanted | None:
    """Return the reading that is wrong; None where its quantity is not one that is read."""
    return next(
        (
            reading
            for reading in claims[wrong["claim"]]
            if reading.quantity == wrong["quantity"] and wrong.get("term") in (None, reading.term)
        ),
        None,
    )


def _claims(claims: list[list[dict[str, str]]]) -> tuple[tuple[Wanted, ...], ...]:
    return tuple(
        tuple(Wanted(r["quantity"], r["relation"], r["literal"], r.get("term")) for r in claim)
        for claim in claims
    )
