"""Lines, columns and pages, against a slow and obvious way to count them."""

import re

import pytest
from hypothesis import given
from hypothesis import strategies as st

from crossfoot.model import Document, Span
from crossfoot.places import LineIndex, Position, line_index, where

TEXTS = st.text(st.sampled_from("ab\n\r\x0b\x0c\x85\u2028é𝐹"), max_size=30)


def counted(text, offset):
    """Count by looking at every character."""
    line, column = 1, 1
    for index in range(offset):
        ends = text[index] == "\n" or (text[index] == "\r" and text[index + 1 : index + 2] != "\n")
        line, column = (line + 1, 1) if ends else (line, column + 1)
    return line, column


@given(TEXTS)
def test_positions_are_those_counted_by_hand(text):
    index = LineIndex(text)
    for offset in range(len(text) + 1):
        assert index.position(offset) == counted(text, offset)


@given(TEXTS)
def test_offset_is_the_way_back(text):
    index = LineIndex(text)
    for offset in range(len(text) + 1):
        assert index.offset(*index.position(offset)) == offset


@given(TEXTS, st.integers(-3, 40), st.integers(-3, 40))
def test_places_outside_the_text_are_moved_into_it(text, line, column):
    index = LineIndex(text)
    offset = index.offset(line, column)
    assert 0 <= offset <= len(text)
    if 1 <= line <= index.count:
        assert index.position(offset).line == line
    assert index.position(column) == index.position(min(max(column, 0), len(text)))


@given(TEXTS)
def test_lines_are_counted_as_split_by_line_ends_alone(text):
    lines = re.split("\r\n|\n|\r", text)
    index = LineIndex(text)
    assert index.count == len(lines)
    for number, line in enumerate(lines, 1):
        assert text[index.start(number) :].startswith(line)


@pytest.mark.parametrize(
    ("text", "offset", "line", "column"),
    [
        ("F = 1", 4, 1, 5),
        ("a\nF", 2, 2, 1),
        ("a\r\nF", 3, 2, 1),
        ("a\rF", 2, 2, 1),
        ("a\x0cF", 2, 1, 3),  # a form feed is no line end
        ("a\u2028F", 2, 1, 3),  # nor is a line separator
        ("a\x85F", 2, 1, 3),  # nor is a next-line control
        ("𝐹 = 1", 4, 1, 5),  # one code point, though two units in UTF-16 and four bytes in UTF-8
        ("", 0, 1, 1),
    ],
)
def test_lines_break_where_editors_break_them(text, offset, line, column):
    assert LineIndex(text).position(offset) == Position(line, column)


def document(text, *pages):
    return Document("a.txt", "plain", text, (), pages)


def test_without_pages_there_is_no_page():
    assert where(document("ab\ncd"), Span(1, 4)) == (None, (1, 2), (2, 2))


def test_lines_count_from_the_top_of_the_page():
    text = "one\ntwo\nthree\nfour\n"
    paged = document(text, 0, text.index("three"))
    assert where(paged, Span(4, 7)) == (1, (2, 1), (2, 4))
    assert where(paged, Span(text.index("four"), len(text) - 1)) == (2, (2, 1), (2, 5))


def test_a_page_may_start_in_the_middle_of_a_line():
    text = "end of one start of two\nnext"
    paged = document(text, 0, text.index("start"))
    assert where(paged, Span(text.index("of two"), len(text))) == (2, (1, 7), (2, 5))


def test_a_span_over_a_page_break_counts_from_the_page_it_starts_on():
    assert where(document("one\ntwo\n", 0, 4), Span(2, 6)) == (1, (1, 3), (2, 3))


def test_what_stands_before_the_first_page_is_on_it():
    paged = document("title\ntext", 6, 8)
    assert where(paged, Span(0, 5)) == (1, (1, 1), (1, 6))
    assert where(paged, Span(6, 8)) == (1, (2, 1), (2, 3))


def test_an_index_is_built_once_for_a_text():
    text = "a long text\n" * 10
    assert line_index(text) is line_index("".join(text))
