"""Outlines, marks and hints: symbols, highlights, references, inlay hints, the lens."""

from __future__ import annotations

import pytest
from lsprotocol import types

from serving.editor import Editor, at, ranges, session

pytestmark = pytest.mark.asyncio(loop_scope="session")

PAPER = """\
# Bank slope

The overall test was t(40) = 2.20, p = .034.

## Plots

The plots differed, F(2, 57) = 4.31, p = .052.

| Term | b | SE | t | p |
|------|---|----|---|---|
| Rain | 0.42 | 0.11 | 3.82 | < .001 |
| Wind | 0.10 | 0.11 | 0.91 | .367 |

# Discussion

Nothing is reported here.
"""


def tree(symbols: object) -> list[object]:
    """Return the names of symbols as nested lists."""
    found: list[object] = []
    assert isinstance(symbols, (list, tuple))
    for symbol in symbols:
        assert isinstance(symbol, types.DocumentSymbol)
        found.append(symbol.name)
        if symbol.children:
            found.append(tree(symbol.children))
    return found


async def symbols(editor: Editor, text: str) -> object:
    document = types.TextDocumentIdentifier(editor.open(text))
    return await editor.text_document_document_symbol_async(types.DocumentSymbolParams(document))


async def test_results_stand_under_their_sections_and_tables(editor: Editor) -> None:
    found = await symbols(editor, PAPER)
    rows = ["Rain | 0.42 | 0.11 | 3.82 | < .001", "Wind | 0.10 | 0.11 | 0.91 | .367"]
    assert tree(found) == [
        "Bank slope",
        ["t(40) = 2.20, p = .034", "Plots", ["F(2, 57) = 4.31, p = .052", "Table", rows]],
        "Discussion",
    ]
    first = found[0]  # type: ignore[index]  # a list, as was seen above
    assert first.detail is None
    assert first.children[0].detail == "agrees"
    assert first.children[1].children[0].detail == "disagrees (p-from-f)"
    assert first.range.end.line == 11  # reaches over all that stands in it


async def test_a_simple_editor_gets_a_flat_list(simple: Editor) -> None:
    found = await symbols(simple, PAPER)
    assert isinstance(found, (list, tuple))
    assert all(isinstance(symbol, types.SymbolInformation) for symbol in found)
    by_name = {symbol.name: symbol.container_name for symbol in found}  # type: ignore[union-attr]  # looked at just before
    assert by_name["F(2, 57) = 4.31, p = .052"] == "Plots"
    assert by_name["Bank slope"] is None


async def test_all_numbers_of_a_result_are_highlighted(editor: Editor) -> None:
    text, marks = ranges("So F(‹2›, ‹57›) = ‹4.31›, p = ‹.018›, but t(40) = 2.20.")
    uri = editor.open(text)
    for mark in marks:
        params = types.DocumentHighlightParams(**at(mark, uri))
        found = await editor.text_document_document_highlight_async(params)
        assert [item.range for item in found or ()] == marks
    elsewhere = types.DocumentHighlightParams(
        types.TextDocumentIdentifier(uri), types.Position(0, 0)
    )
    assert await editor.text_document_document_highlight_async(elsewhere) is None


async def test_mentions_of_one_result_refer_to_each_other(editor: Editor) -> None:
    text, marks = ranges(
        "# Abstract\n\nThe plots differed, ‹F(2, 57) = 4.31›.\n\n# Results\n\n"
        "The plots differed, ‹F(2, 57) = 4.31, p = .018›, and t(57) = 4.31, p < .001.\n"
    )
    uri = editor.open(text)
    inside = types.Position(marks[0].start.line, marks[0].end.character - 2)
    where = {"text_document": types.TextDocumentIdentifier(uri), "position": inside}
    for declared, expected in ((True, marks), (False, marks[1:])):
        found = await editor.text_document_references_async(
            types.ReferenceParams(**where, context=types.ReferenceContext(declared))  # type: ignore[arg-type]  # of two types
        )
        assert [location.range for location in found or ()] == expected
    fullest = await editor.text_document_definition_async(types.DefinitionParams(**where))  # type: ignore[arg-type]  # of two types
    assert fullest == types.Location(uri, marks[1])
    away = {"text_document": types.TextDocumentIdentifier(uri), "position": types.Position(0, 0)}
    assert await editor.text_document_definition_async(types.DefinitionParams(**away)) is None  # type: ignore[arg-type]  # of two types
    assert (
        await editor.text_document_references_async(
            types.ReferenceParams(**away, context=types.ReferenceContext(True))  # type: ignore[arg-type]  # of two types
        )
        is None
    )


async def hints(editor: Editor, uri: str, range_: types.Range) -> list[types.InlayHint] | None:
    params = types.InlayHintParams(types.TextDocumentIdentifier(uri), range_)
    found = await editor.text_document_inlay_hint_async(params)
    return None if found is None else list(found)


async def test_inlay_hints_are_off_unless_they_are_wanted(editor: Editor) -> None:
    text, [mark] = ranges("‹So F(2, 57) = 4.31, p = .018.›")
    assert await hints(editor, editor.open(text), mark) is None


async def test_inlay_hints_show_the_recomputed_p_in_the_range_asked_for() -> None:
    text, [mark, other] = ranges(
        "‹So F(2, 57) = 4.31, p = .052. It fits, R² = .13, p = .2.›\n‹But t(40) = 2.20, p = .034.›"
    )
    async with session(settings={"inlayHints": True}) as editor:
        uri = editor.open(text)
        await editor.until(lambda: True)
        found = await hints(editor, uri, mark)
        while found is None:  # until the settings have been asked for
            found = await hints(editor, uri, mark)
        [hint] = found
        assert hint.label == "recomputed: between .0179 and .0182"
        assert hint.position == types.Position(0, text.index(".052") + 4)
        assert isinstance(hint.tooltip, str)
        assert "with F between 4.305 and 4.315" in hint.tooltip
        [second] = await hints(editor, uri, other) or []
        assert second.position.line == 1


async def lenses(editor: Editor, uri: str) -> list[types.CodeLens] | None:
    params = types.CodeLensParams(types.TextDocumentIdentifier(uri))
    found = await editor.text_document_code_lens_async(params)
    return None if found is None else list(found)


async def test_a_lens_sums_up_the_document_and_opens_the_summary(editor: Editor) -> None:
    uri = editor.open("So F(2, 57) = 4.31, p = .052. And t(40) = 2.20, p = .034.")
    [lens] = await lenses(editor, uri) or []
    assert lens.range.start == types.Position(0, 0)
    assert lens.command is not None
    assert lens.command.title == "Crossfoot: 2 results: 1 agrees, 1 disagrees"
    words = await editor.workspace_execute_command_async(
        types.ExecuteCommandParams(lens.command.command, lens.command.arguments)
    )
    assert isinstance(words, str)
    assert words.startswith(f"{lens.command.title}\nLine 1, reversal (p-from-f): p is printed as")
    shown = await editor.take(types.WINDOW_SHOW_MESSAGE)
    assert (shown.type, shown.message) == (types.MessageType.Info, words)


async def test_an_editor_may_show_the_summary_itself(editor: Editor) -> None:
    uri = editor.open("So F(2, 57) = 4.31, p = .018.")
    words = await editor.workspace_execute_command_async(
        types.ExecuteCommandParams("crossfoot.summary", [uri, True])
    )
    assert words == "Crossfoot: 1 result: 1 agrees"


async def test_without_a_result_there_is_no_lens(editor: Editor) -> None:
    assert await lenses(editor, editor.open("Words.")) == []


async def test_the_lens_can_be_turned_off() -> None:
    async with session(
        options={"settings": {"codeLens": False}}, settings={"codeLens": False}
    ) as editor:
        assert await lenses(editor, editor.open("So F(2, 57) = 4.31, p = .018.")) is None
