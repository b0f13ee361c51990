"""Texts: columns in every encoding, line ends, empty files, edits of every kind."""

from __future__ import annotations

import pytest
from lsprotocol import types

from serving.editor import Editor, pulling, session

pytestmark = pytest.mark.asyncio(loop_scope="session")

SIZES = {"utf-8": 1, "utf-16": 2, "utf-32": 4}


def column(text: str, encoding: str) -> int:
    return (
        len(text.encode(f"{encoding}-le" if encoding != "utf-8" else encoding)) // SIZES[encoding]
    )


@pytest.mark.parametrize("encoding", SIZES)
async def test_columns_are_counted_as_was_agreed(encoding: str) -> None:
    before = "Flächen 𝐹 und 🌿 e\u0301: F(2, 57) = 4.31, p = "
    async with session(pulling(encoding)) as editor:
        assert editor._server is not None
        uri = editor.open(f"{before}.052.")
        [found] = (await editor.diagnostics_of(uri)).items
        start = column(before, encoding)
        assert found.range == types.Range(types.Position(0, start), types.Position(0, start + 4))
        # An edit before the finding, after wide characters, moves it by as much.
        at = types.Position(0, column("Flächen 𝐹 und 🌿", encoding))
        editor.edit(uri, 2, (types.Range(at, at), " 🌊🌊"))
        [moved] = (await editor.diagnostics_of(uri)).items
        assert moved.range.start.character == start + column(" 🌊🌊", encoding)


@pytest.mark.parametrize("feed", ["\n", "\r\n", "\r"])
async def test_every_line_end_counts_and_nothing_else_does(editor: Editor, feed: str) -> None:
    text = f"One.\u2028 \x0c\x85 More.{feed}{feed}Two.{feed}{feed}So F(2, 57) = 4.31, p = .052."
    uri = editor.open(text)
    [found] = (await editor.diagnostics_of(uri)).items
    assert found.range.start == types.Position(4, 24)


async def test_a_line_end_that_is_made_or_broken_by_an_edit_counts_too(editor: Editor) -> None:
    uri = editor.open("One.\r\rSo F(2, 57) = 4.31, p = .052.")
    at = types.Position(1, 0)
    editor.edit(uri, 2, (types.Range(at, at), "\n"))  # "\r\n\r"
    [found] = (await editor.diagnostics_of(uri)).items
    assert found.range.start.line == 2
    editor.edit(uri, 3, (types.Range(types.Position(0, 4), types.Position(1, 0)), "\r\r\r"))
    [found] = (await editor.diagnostics_of(uri)).items
    assert found.range.start.line == 4


async def test_a_file_that_starts_empty_fills_up(editor: Editor) -> None:
    uri = editor.open("")
    assert (await editor.diagnostics_of(uri)).items == ()
    typed = "So F(2, 57) = 4.31, p = .052."
    for version, character in enumerate(typed, 2):
        at = types.Position(0, version - 2)
        editor.edit(uri, version, (types.Range(at, at), character))
    assert len((await editor.diagnostics_of(uri)).items) == 1
    whole = types.Range(types.Position(0, 0), types.Position(9, 0))
    editor.edit(uri, 100, (whole, ""))
    assert (await editor.diagnostics_of(uri)).items == ()


async def test_several_changes_of_one_edit_are_made_in_turn(editor: Editor) -> None:
    uri = editor.open("ab")
    start = types.Position(0, 0)
    editor.edit(
        uri,
        2,
        (types.Range(start, types.Position(0, 2)), "So F(2, 57) = 4.31, p = .05."),
        (types.Range(types.Position(0, 27), types.Position(0, 27)), "2"),
        (types.Range(start, start), "\n\n"),
    )
    [found] = (await editor.diagnostics_of(uri)).items
    assert found.range == types.Range(types.Position(2, 24), types.Position(2, 28))


async def test_positions_outside_the_text_are_moved_to_its_nearest_place(editor: Editor) -> None:
    uri = editor.open("So F(2, 57) = 4.31,\np = .052")
    far = types.Position(10_000, 10_000)
    beyond = types.Position(0, 10_000)
    for position in (far, beyond):
        params = types.HoverParams(types.TextDocumentIdentifier(uri), position)
        await editor.text_document_hover_async(params)
    editor.edit(uri, 2, (types.Range(beyond, far), "\np = .018."))
    assert (await editor.diagnostics_of(uri)).items == ()
    editor.edit(uri, 3, (types.Range(types.Position(1, 8), types.Position(0, 19)), "\np = .052"))
    [found] = (await editor.diagnostics_of(uri)).items
    assert found.range.start == types.Position(1, 4)


@pytest.mark.parametrize(
    ("language", "name", "text"),
    [
        ("markdown", "a.md", "*F*(2, 57) = 4.31, *p* = .052"),
        ("quarto", "a.qmd", "---\ntitle: x\n---\n\n*F*(2, 57) = 4.31, *p* = .052"),
        ("rmd", "a.Rmd", "*F*(2, 57) = 4.31, *p* = .052"),
        ("latex", "a.tex", "$F(2, 57) = 4.31$, $p = .052$"),
        ("tex", "a.tex", "$F(2, 57) = 4.31$, $p = .052$"),
        ("html", "a.html", "<p><i>F</i>(2, 57) = 4.31, <i>p</i> = .052</p>"),
        ("xml", "a.xml", "<p><italic>F</italic>(2, 57) = 4.31, <italic>p</italic> = .052</p>"),
        ("restructuredtext", "a.rst", "*F*\\ (2, 57) = 4.31, *p* = .052"),
        ("org", "a.org", "/F/(2, 57) = 4.31, /p/ = .052"),
        ("plaintext", "a.txt", "F(2, 57) = 4.31, p = .052"),
        ("plaintext", "a.qmd", "*F*(2, 57) = 4.31, *p* = .052"),
        ("", "a.tex", "$F(2, 57) = 4.31$, $p = .052$"),
        ("what is this", "a", "F(2, 57) = 4.31, p = .052"),
    ],
)
async def test_the_format_is_told_by_the_language_or_the_name(
    editor: Editor, language: str, name: str, text: str
) -> None:
    uri = editor.open(text, name, language)
    assert [item.code for item in (await editor.diagnostics_of(uri)).items] == ["p-from-f"]


async def test_a_text_without_a_file_is_read_too(editor: Editor) -> None:
    item = types.TextDocumentItem("untitled:Untitled-1", "markdown", 1, "F(2, 57) = 4.31, p = .052")
    editor.text_document_did_open(types.DidOpenTextDocumentParams(item))
    assert len((await editor.diagnostics_of("untitled:Untitled-1")).items) == 1
    editor.shut("untitled:Untitled-1")


async def test_a_notebook_that_is_opened_as_text_is_left_alone(editor: Editor) -> None:
    uri = editor.open('{"cells": [{"source": "F(2, 57) = 4.31, p = .052"}]}', "a.ipynb", "json")
    assert (await editor.diagnostics_of(uri)).items == ()


async def test_a_text_can_be_closed_and_opened_again(editor: Editor) -> None:
    uri = editor.open("F(2, 57) = 4.31, p = .052", folder="/nowhere/again")
    assert len((await editor.diagnostics_of(uri)).items) == 1
    editor.shut(uri)
    assert (await editor.diagnostics_of(uri)).items == ()
    editor.open("F(2, 57) = 4.31, p = .018", folder="/nowhere/again")
    assert (await editor.diagnostics_of(uri)).items == ()
