"""What every test of a format may count on."""

from __future__ import annotations

import json
from pathlib import Path

from crossfoot import documents
from crossfoot.documents.visible import Visible, place
from crossfoot.model import Document, Span

KINDS = ("prose", "heading", "verbatim", "code", "table")

#: What each format's markup is made of, nasty ends included.
FRAGMENTS: dict[str, list[str]] = json.loads(
    (Path(__file__).parent / "fragments.json").read_text(encoding="utf-8")
)
COMMON = FRAGMENTS.pop("common")
FRAGMENTS["notebook"] = FRAGMENTS["markdown"]


def blocks_shown(language: str, text: str) -> list[str]:
    """Return each block of a text as its kind and what a reader sees, on one line."""
    document = documents.open_document("x", text.encode(), language)
    lines = []
    for block in document.blocks:
        shown = documents.show_block(document, block)
        level = f" {block.level}" if block.kind == "heading" else ""
        lines.append(f"{block.kind}{level}: {shown.text}".replace("\n", "⏎"))
    return lines


def check_document(document: Document) -> None:
    """Assert what holds of every document, whatever its text."""
    position = 0
    for block in document.blocks:
        assert block.kind in KINDS
        assert (block.level > 0) == (block.kind == "heading")
        assert block.start >= position
        position = block.start + len(block.source)
        assert document.text[block.start : position] == block.source
        shown = documents.show_block(document, block)
        # A cell drawn on several lines lies in part behind the next cell.
        check_visible(shown, block.source, in_order=block.kind != "table")
    assert position <= len(document.text)


def check_visible(visible: Visible, source: str, *, in_order: bool = True) -> None:
    """Assert that the pieces cover the visible text and lie in the source, in order."""
    shown, start, end = 0, 0, 0
    for number, piece in enumerate(visible.pieces):
        assert number == 0 or piece.shown > shown
        assert 0 <= piece.start <= piece.end <= len(source)
        assert not in_order or (start <= piece.start and end <= piece.end)
        shown, start, end = piece
    assert bool(visible.pieces) == bool(visible.text)
    assert not visible.pieces or (visible.pieces[0].shown == 0 and shown < len(visible.text))
    if visible.pieces:
        check_verbatim(visible, source)
    for at in range(0, len(visible.text), 1 + len(visible.text) // 50):
        place_of_one = place(visible, at, at + 1)
        assert 0 <= place_of_one.start <= place_of_one.end <= len(source)


def check_verbatim(visible: Visible, source: str) -> None:
    """Assert that a digit in a piece as long as its source is that digit in the source."""
    stops = [piece.shown for piece in visible.pieces[1:]] + [len(visible.text)]
    for piece, stop in zip(visible.pieces, stops, strict=True):
        text = visible.text[piece.shown : stop]
        if len(text) == piece.end - piece.start:
            for one, other in zip(text, source[piece.start : piece.end], strict=True):
                assert one == other or not one.isdigit()


def check_comments(language: str, text: str) -> None:
    """Assert that comments lie in the text, in order, and hold its words."""
    position = 0
    for comment in documents.comments(language, text):
        assert position <= comment.span.start < comment.span.end <= len(text)
        position = comment.span.end


def marked(text: str) -> tuple[str, list[Span]]:
    """Take the marks ⟦ and ⟧ out of a text; return what they enclosed, as spans."""
    plain = ""
    starts: list[int] = []
    spans: list[Span] = []
    for char in text:
        if char == "⟦":
            starts.append(len(plain))
        elif char == "⟧":
            spans.append(Span(starts.pop(), len(plain)))
        else:
            plain += char
    return plain, spans
