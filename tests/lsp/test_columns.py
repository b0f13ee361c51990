"""Columns and lines, against what Python's own codecs say."""

from __future__ import annotations

import re

from hypothesis import given
from hypothesis import strategies as st
from lsprotocol import types

from crossfoot_lsp.columns import UTF8, UTF16, UTF32, columns
from crossfoot_lsp.text import Text

CODECS = {UTF8: ("utf-8", 1), UTF16: ("utf-16-le", 2), UTF32: ("utf-32-le", 4)}
LETTERS = st.sampled_from("ab\n\ré🌿\x0c\u2028\u0085𝐹")
TEXTS = st.lists(LETTERS, max_size=30).map("".join)


@given(st.sampled_from(sorted(CODECS)), TEXTS)
def test_columns_are_those_of_the_encoding(encoding: str, text: str) -> None:
    line = re.sub(r"[\r\n]", "", text)
    codec, width = CODECS[encoding]
    found = columns(line, encoding)
    for column in range(len(line) + 1):
        units = len(line[:column].encode(codec)) // width
        assert found.units(column) == units
        assert found.points(units) == column
    data = line.encode(codec)
    for units in range(len(data) // width + 1):
        whole = data[: units * width].decode(codec, "ignore")
        assert found.points(units) == len(whole)


@given(TEXTS, st.floats(0, 1), st.floats(0, 1), TEXTS)
def test_lines_are_kept_up_from_edit_to_edit(
    text: str, start: float, length: float, new: str
) -> None:
    first = round(start * len(text))
    last = first + round(length * (len(text) - first))
    edited = Text(text).replaced(first, last, new)
    fresh = Text(text[:first] + new + text[last:])
    assert edited.content == fresh.content
    assert list(edited.starts) == list(fresh.starts)


@given(TEXTS)
def test_a_position_leads_back_to_its_offset(text: str) -> None:
    index = Text(text)
    for offset in range(len(text) + 1):
        position = index.position(offset)
        back = index.offset(position)
        # Between "\r" and "\n" there is no place: the end of the line is before both.
        assert back == (offset - 1 if text[offset - 1 : offset + 1] == "\r\n" else offset)


def test_what_lies_outside_is_moved_inside() -> None:
    text = Text("ab\ncd")
    far = 10**6
    assert text.offset(types.Position(far, far)) == 5
    assert text.offset(types.Position(0, far)) == 2
    assert text.position(-3) == types.Position(0, 0)
    assert text.position(far) == types.Position(1, 2)
    backwards = types.Range(types.Position(1, 1), types.Position(0, 1))
    assert text.span(backwards) == (1, 4)
    whole = types.TextDocumentContentChangeWholeDocument("x")
    assert text.edited(whole).content == "x"
