"""The way back from visible text to the source, through one step and through several."""

from __future__ import annotations

from hypothesis import given
from hypothesis import strategies as st

from crossfoot.documents.newlines import Places, feeds_only, joined_lines
from crossfoot.documents.visible import (
    Builder,
    Piece,
    Visible,
    compose,
    flat,
    place,
    verbatim,
)
from crossfoot.model import Block, Span
from documents.support import check_visible


def built(*parts: tuple[str, int, int]) -> Visible:
    out = Builder()
    for text, start, end in parts:
        out.put(text, start, end)
    return out.build()


def test_kept_text_maps_to_itself_and_joins() -> None:
    out = Builder()
    out.keep("abcdef", 1, 3)
    out.keep("abcdef", 3, 3)
    out.keep("abcdef", 3, 5)
    assert out.build() == Visible("bcde", (Piece(0, 1, 5),))


def test_text_as_long_as_its_span_by_chance_maps_to_the_whole_of_it() -> None:
    visible = built(("12", 4, 6))
    assert [place(visible, at, at + 1) for at in (0, 1)] == [Span(4, 6), Span(4, 6)]


def test_an_empty_place_is_a_point() -> None:
    visible = built(("x", 4, 6), ("yz", 6, 9))
    assert place(visible, 1, 1) == Span(6, 6)
    assert place(Visible("", ()), 0, 0) == Span(0, 0)


def test_text_beyond_the_end_maps_to_the_end() -> None:
    assert place(verbatim("abc"), 2, 9) == Span(2, 3)


def test_a_point_within_a_stretch_stands_for_the_stretch() -> None:
    macro = built(("R^2", 3, 7))  # \Rsq in the source
    raised = built(("R", 0, 1), ("^{", 1, 2), ("2", 2, 3), ("}", 2, 2))
    assert {place(compose(macro, raised), at, at + 1) for at in range(5)} == {Span(3, 7)}


@st.composite
def visibles(draw: st.DrawFn, source: str) -> Visible:
    """Show a source by keeping, replacing and dropping stretches of it."""
    out = Builder()
    position = 0
    while position < len(source):
        end = min(len(source), position + draw(st.integers(1, 4)))
        match draw(st.sampled_from("kpd")):
            case "k":
                out.keep(source, position, end)
            case "p":
                out.put(draw(st.text("xyz", max_size=3)), position, end)
        position = end
    return out.build()


SOURCES = st.text("abc123 \n", max_size=30)


@given(st.data())
def test_two_steps_lead_to_where_they_lead_one_by_one(data: st.DataObject) -> None:
    source = data.draw(SOURCES)
    first = data.draw(visibles(source))
    second = data.draw(visibles(first.text))
    both = compose(first, second)
    assert both.text == second.text
    check_visible(both, source)
    for at in range(len(both.text)):
        assert place(both, at, at + 1) == place(first, *place(second, at, at + 1))


@given(st.data())
def test_flat_text_is_on_one_line_and_keeps_its_places(data: st.DataObject) -> None:
    source = data.draw(SOURCES)
    visible = data.draw(visibles(source))
    line = flat(visible)
    assert line.text == " ".join(visible.text.split())
    check_visible(line, source)


LINES = st.text(st.sampled_from("ab\r\n\f\u2028"), max_size=20)


@given(LINES, st.integers(0, 20), st.integers(0, 20))
def test_line_ends_keep_their_places(text: str, one: int, other: int) -> None:
    plain = feeds_only(text)
    visible = joined_lines(text)
    assert visible.text == plain
    check_visible(visible, text)
    start, end = sorted((min(one, len(plain)), min(other, len(plain))))
    block = Places(text).block(Block("prose", start, plain[start:end]), text)
    assert text[block.start : block.start + len(block.source)] == block.source
    assert feeds_only(block.source) == plain[start:end]
