"""What a reader sees of a document, format by format.

A case is a source, and below the arrow its blocks: kind, level of a heading, and the visible text
on one line. What is enclosed in ⟦ and ⟧ below must have the place of what is enclosed above.
"""

from __future__ import annotations

from pathlib import Path
from typing import NamedTuple

import pytest

from crossfoot import documents
from crossfoot.documents.visible import place
from crossfoot.model import Span
from documents.support import blocks_shown, marked


class Case(NamedTuple):
    language: str
    title: str
    source: str
    shown: str


def cases() -> list[Case]:
    found = []
    for path in sorted((Path(__file__).parent / "cases").glob("*.txt")):
        for part in path.read_text(encoding="utf-8").split("\n§ ")[1:]:
            title, _, rest = part.partition("\n")
            source, _, shown = rest.partition("\n⇒\n")
            found.append(Case(path.stem, title, source, shown.strip("\n")))
    return found


CASES = cases()


@pytest.mark.parametrize("case", CASES, ids=lambda case: f"{case.language}: {case.title}")
def test_visible_text(case: Case) -> None:
    source, places = marked(case.source)
    expected, shown_places = marked(case.shown.replace("␣", "\N{NO-BREAK SPACE}"))
    assert "\n".join(blocks_shown(case.language, source)) == expected
    document = documents.open_document("x", source.encode(), case.language)
    for where, shown_where in zip(places, shown_places, strict=True):
        assert source_of(document, expected, shown_where) == where


def source_of(document: documents.Document, expected: str, where: Span) -> Span:
    """Return the place in the source of a stretch of the expected lines."""
    number = expected.count("\n", 0, where.start)
    line_start = expected.rfind("\n", 0, where.start) + 1
    text_start = expected.index(": ", line_start) + 2
    block = document.blocks[number]
    visible = documents.show_block(document, block)
    span = place(visible, where.start - text_start, where.end - text_start)
    return Span(block.start + span.start, block.start + span.end)


def test_every_format_has_cases() -> None:
    assert {case.language for case in CASES} == set(documents.FORMATS) - {"notebook"}
