"""Hover: what a number is, what it must be, the working, the formula and its source."""

from __future__ import annotations

import pytest
from lsprotocol import types

from serving.editor import Editor, at, ranges, session

pytestmark = pytest.mark.asyncio(loop_scope="session")


async def hover(editor: Editor, uri: str, range_: types.Range) -> types.Hover | None:
    return await editor.text_document_hover_async(types.HoverParams(**at(range_, uri)))


def words(found: types.Hover | None) -> str:
    assert found is not None
    assert isinstance(found.contents, types.MarkupContent)
    return found.contents.value.replace("\\", "")


async def test_a_wrong_p_is_set_against_what_follows(editor: Editor) -> None:
    text, [mark] = ranges("The plots differed, F(2, 57) = 4.31, p = ‹.052›.")
    found = await hover(editor, editor.open(text), mark)
    assert found is not None
    assert found.range == mark
    assert isinstance(found.contents, types.MarkupContent)
    assert found.contents.kind == types.MarkupKind.Markdown
    said = words(found)
    assert said.startswith("**p = .052**")
    assert "P value. The probability, under the null hypothesis" in said
    assert "it stands for a value between .0515 and .0525" in said
    assert "Given F(2, 57) = 4.31, it must be between .0179 and .0182: not as printed." in said
    assert "p = P(F(df1, df2) > F); with F between 4.305 and 4.315" in said  # the working
    assert "Reversal (p-from-f)" in said
    assert "p-from-f, disagrees: p = P(F(df1, df2) > F)" in said  # the formula
    assert "Source: NIST/SEMATECH e-Handbook" in said


async def test_a_number_that_agrees_says_so(editor: Editor) -> None:
    text, [f, p] = ranges("The plots differed, F(2, 57) = ‹4.31›, p = ‹.018›.")
    uri = editor.open(text)
    said = words(await hover(editor, uri, p))
    assert "it must be between .0179 and .0182: as printed." in said
    assert "bounds" not in said  # that p is between 0 and 1 is worth no words
    said = words(await hover(editor, uri, f))
    assert "Given p = .018 with 2 and 57 degrees of freedom, it must be between" in said


async def test_what_the_editor_shows_beside_a_hover_is_not_said_again() -> None:
    text, [f, p] = ranges("The plots differed, F(2, 57) = ‹4.31›, p = ‹.081›.")
    async with session(options={"marksInHover": True}) as editor:
        uri = editor.open(text)
        said = words(await hover(editor, uri, p))
        assert "p is printed as .081, but" not in said
        assert "Reversal (p-from-f)" in said
        assert "It would agree with p = .018" in said
        assert "p is printed as .081, but" in words(await hover(editor, uri, f))


async def test_its_remedies_and_its_allowance_are_named(editor: Editor) -> None:
    text, [mark] = ranges(
        "<!-- crossfoot: allow p-from-f because two plots were left out -->\n\n"
        "The plots differed, F(2, 57) = 4.31, p = ‹.081›."
    )
    said = words(await hover(editor, editor.open(text), mark))
    assert "settled: two plots were left out" in said
    assert "It would agree with p = .018 (two digits swapped)" in said


async def test_between_two_numbers_the_whole_result_is_described(editor: Editor) -> None:
    text, [mark] = ranges("The model fits, R² = .30, F(2, 57) ‹=› 4.31, p = .018.")
    found = await hover(editor, editor.open(text), mark)
    said = words(found)
    assert said.startswith("**F(2, 57)**")
    assert "Conflict (f-from-r2)" in said
    assert "p-from-f, agrees" in said


async def test_elsewhere_there_is_nothing_to_say(editor: Editor) -> None:
    text, [mark] = ranges("The ‹plots› differed, F(2, 57) = 4.31, p = .018.")
    assert await hover(editor, editor.open(text), mark) is None


async def test_markup_in_a_document_stays_text(editor: Editor) -> None:
    text, [mark] = ranges(
        "| Term | b | SE | t | p |\n|---|---|---|---|---|\n"
        "| [x](http://h) `<b>` | 0.42 | 0.11 | ‹3.92› | .001 |\n"
    )
    found = await hover(editor, editor.open(text), mark)
    if found is not None:
        assert isinstance(found.contents, types.MarkupContent)
        assert "](http" not in found.contents.value
        assert "<b>" not in found.contents.value.replace("\\<", "")


async def test_a_simple_editor_is_told_in_plain_text(simple: Editor) -> None:
    text, [mark] = ranges("The plots differed, F(2, 57) = 4.31, p = ‹.052›.")
    found = await hover(simple, simple.open(text), mark)
    assert found is not None
    assert isinstance(found.contents, types.MarkupContent)
    assert found.contents.kind == types.MarkupKind.PlainText
    assert "**" not in found.contents.value
    assert found.contents.value.startswith("p = .052\n")
