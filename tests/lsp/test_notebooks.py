"""Notebooks: their cells are read as one document, and shown each by itself."""

from __future__ import annotations

import pytest
from lsprotocol import types

from serving.editor import Editor

pytestmark = pytest.mark.asyncio(loop_scope="session")

CODE, WORDS = types.NotebookCellKind.Code, types.NotebookCellKind.Markup


def open_notebook(
    editor: Editor, name: str, *cells: tuple[types.NotebookCellKind, str]
) -> list[str]:
    """Open a notebook and return the names of its cells."""
    uris = [f"vscode-notebook-cell:/nowhere/{name}#{number}" for number in range(len(cells))]
    notebook = types.NotebookDocument(
        f"file:///nowhere/{name}",
        "jupyter-notebook",
        1,
        [types.NotebookCell(kind, uri) for (kind, _), uri in zip(cells, uris, strict=True)],
    )
    texts = [
        types.TextDocumentItem(uri, "python" if kind is CODE else "markdown", 1, text)
        for (kind, text), uri in zip(cells, uris, strict=True)
    ]
    editor.notebook_document_did_open(types.DidOpenNotebookDocumentParams(notebook, texts))
    return uris


async def codes(editor: Editor, uri: str) -> list[object]:
    return [item.code for item in (await editor.diagnostics_of(uri)).items]


async def test_each_cell_has_its_own_findings(editor: Editor) -> None:
    first, second, code = open_notebook(
        editor,
        "own.ipynb",
        (WORDS, "# Results\n\nSo F(2, 57) = 4.31, p = .052."),
        (WORDS, "So t(40) = 2.20, p = .533."),
        (CODE, "# So F(2, 57) = 4.31, p = .052."),
    )
    report = await editor.diagnostics_of(first)
    assert report.items[0].range.start == types.Position(2, 24)
    report = await editor.diagnostics_of(second)
    assert report.items[0].range.start == types.Position(0, 21)
    assert await codes(editor, code) == []


async def test_what_one_cell_states_holds_for_the_next(editor: Editor) -> None:
    _, second = open_notebook(
        editor,
        "states.ipynb",
        (WORDS, "# Methods\n\nAll tests are one-sided."),
        (WORDS, "So t(40) = 2.20, p = .017."),
    )
    assert await codes(editor, second) == []


async def test_cells_can_be_edited_added_moved_and_removed(editor: Editor) -> None:
    uri = "file:///nowhere/moves.ipynb"
    [first] = open_notebook(editor, "moves.ipynb", (WORDS, "So F(2, 57) = 4.31, p = .018."))
    assert await codes(editor, first) == []
    _change(editor, uri, 2, text_content=[_edit(first, 2, "So F(2, 57) = 4.31, p = .052.")])
    assert await codes(editor, first) == ["p-from-f"]
    new = "vscode-notebook-cell:/nowhere/moves.ipynb#new"
    item = types.TextDocumentItem(new, "markdown", 1, "So t(40) = 2.20, p = .533.")
    array = types.NotebookCellArrayChange(0, 0, [types.NotebookCell(WORDS, new)])
    _change(editor, uri, 3, structure=types.NotebookDocumentCellChangeStructure(array, [item]))
    assert await codes(editor, new) == ["p-from-t"]
    assert await codes(editor, first) == ["p-from-f"]
    swapped = types.NotebookCellArrayChange(
        0, 2, [types.NotebookCell(WORDS, first), types.NotebookCell(WORDS, new)]
    )
    _change(editor, uri, 4, structure=types.NotebookDocumentCellChangeStructure(swapped))
    assert await codes(editor, new) == ["p-from-t"]
    gone = types.NotebookCellArrayChange(0, 1)
    closed = [types.TextDocumentIdentifier(first)]
    structure = types.NotebookDocumentCellChangeStructure(gone, None, closed)
    _change(editor, uri, 5, structure=structure)
    assert await codes(editor, first) == []
    assert await codes(editor, new) == ["p-from-t"]
    as_code = types.NotebookCell(CODE, new)
    _change(editor, uri, 6, data=[as_code])
    editor.notebook_document_did_close(
        types.DidCloseNotebookDocumentParams(
            types.NotebookDocumentIdentifier(uri), [types.TextDocumentIdentifier(new)]
        )
    )
    assert await codes(editor, new) == []


async def test_a_fix_is_made_in_its_cell(editor: Editor) -> None:
    _, second = open_notebook(
        editor, "fix.ipynb", (WORDS, "# Results 🌿"), (WORDS, "So F(2, 57) = 4.31, p = .081.")
    )
    start = types.Position(0, 24)
    found = await editor.text_document_code_action_async(
        types.CodeActionParams(
            types.TextDocumentIdentifier(second),
            types.Range(start, start),
            types.CodeActionContext([], [types.CodeActionKind.QuickFix]),
        )
    )
    action = next(iter(found or ()))
    assert isinstance(action, types.CodeAction)
    assert action.edit is not None
    [change] = action.edit.document_changes or ()
    assert isinstance(change, types.TextDocumentEdit)
    assert change.text_document.uri == second
    assert change.edits[0].range == types.Range(start, types.Position(0, 28))


async def test_changes_of_unknown_notebooks_are_passed_over(editor: Editor) -> None:
    _change(editor, "file:///nowhere/unknown.ipynb", 2, data=[])
    editor.notebook_document_did_close(
        types.DidCloseNotebookDocumentParams(
            types.NotebookDocumentIdentifier("file:///nowhere/unknown.ipynb"), []
        )
    )
    assert await codes(editor, "file:///nowhere/unknown.ipynb") == []


def _change(editor: Editor, uri: str, version: int, **cells: object) -> None:
    event = types.NotebookDocumentChangeEvent(
        cells=types.NotebookDocumentCellChanges(**cells)  # type: ignore[arg-type]  # of several types
    )
    identifier = types.VersionedNotebookDocumentIdentifier(version, uri)
    editor.notebook_document_did_change(types.DidChangeNotebookDocumentParams(identifier, event))


def _edit(uri: str, version: int, text: str) -> types.NotebookDocumentCellContentChanges:
    return types.NotebookDocumentCellContentChanges(
        types.VersionedTextDocumentIdentifier(version, uri),
        [types.TextDocumentContentChangeWholeDocument(text)],
    )
