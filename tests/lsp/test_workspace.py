"""Files that are not open: diagnostics with progress and cancellation, symbols, changes on disk."""

from __future__ import annotations

import asyncio
import json
from pathlib import Path

import pytest
from lsprotocol import types
from pygls.uris import from_fs_path

from serving.editor import Editor, pulling, pushing, session

pytestmark = pytest.mark.asyncio(loop_scope="session")

WRONG = "So F(2, 57) = 4.31, p = .052."
RIGHT = "So F(2, 57) = 4.31, p = .018."


def uri_of(path: Path) -> str:
    return from_fs_path(str(path)) or ""


@pytest.fixture
def folder(tmp_path: Path) -> Path:
    (tmp_path / "wrong.md").write_text(f"# Results 🌿\n\n{WRONG}")
    (tmp_path / "right.md").write_text(RIGHT)
    (tmp_path / "deep").mkdir()
    (tmp_path / "deep" / "wrong.tex").write_text("So $F(2, 57) = 4.31$, $p = .052$.")
    (tmp_path / "node_modules").mkdir()
    (tmp_path / "node_modules" / "other.md").write_text(WRONG)
    (tmp_path / "data.csv").write_text(WRONG)
    (tmp_path / "broken.ipynb").write_text("{")
    return tmp_path


async def ask(
    editor: Editor,
    told: dict[str, str] | None = None,
    work: str | None = None,
    partial: str | None = None,
) -> dict[str, types.WorkspaceDocumentDiagnosticReport]:
    previous = [types.PreviousResultId(uri, value) for uri, value in (told or {}).items()]
    params = types.WorkspaceDiagnosticParams(
        previous, "crossfoot", work_done_token=work, partial_result_token=partial
    )
    report = await editor.workspace_diagnostic_async(params)
    return {item.uri: item for item in report.items}


async def test_files_that_are_not_open_are_reported_too(folder: Path) -> None:
    async with session(folders=[folder]) as editor:
        found = await ask(editor)
        assert set(found) == {uri_of(folder / "wrong.md"), uri_of(folder / "deep" / "wrong.tex")}
        report = found[uri_of(folder / "wrong.md")]
        assert isinstance(report, types.WorkspaceFullDocumentDiagnosticReport)
        assert report.version is None
        [mark] = report.items
        assert (mark.code, mark.range.start) == ("p-from-f", types.Position(2, 24))


async def test_a_notebook_is_reported_at_places_in_its_file(folder: Path) -> None:
    file = folder / "draft.ipynb"
    lines = ['# Results 🌿 "of all"\r\n', "\n", f"{WRONG} So"]
    printed = "\x1b[31mé\x1b[0m t(40) = 2.20, p = .533"
    output = {"output_type": "stream", "text": [printed]}
    cells = [
        {"cell_type": "markdown", "source": lines},
        {"cell_type": "code", "source": f"# {WRONG}", "outputs": [output]},
    ]
    content = {"metadata": {"source": "no cell"}, "cells": cells}
    for form in ({}, {"indent": 1}, {"indent": 2, "ensure_ascii": False}):
        file.write_text(json.dumps(content, **form))  # type: ignore[arg-type]  # of several types
        async with session(pulling("utf-32"), folders=[folder]) as editor:
            report = (await ask(editor))[uri_of(file)]
            assert isinstance(report, types.WorkspaceFullDocumentDiagnosticReport)
            marked = file.read_text().split("\n")
            assert [
                marked[item.range.start.line][item.range.start.character : item.range.end.character]
                for item in report.items
            ] == [".052", ".533"]
            assert [item.range.start.line == item.range.end.line for item in report.items]
            # Once it is open, its cells are asked about by themselves.
            cell = types.NotebookCell(types.NotebookCellKind.Markup, "cell:0")
            notebook = types.NotebookDocument(uri_of(file), "jupyter-notebook", 1, [cell])
            text = types.TextDocumentItem("cell:0", "markdown", 1, "".join(lines))
            editor.notebook_document_did_open(types.DidOpenNotebookDocumentParams(notebook, [text]))
            again = (await ask(editor, {uri_of(file): report.result_id or ""}))[uri_of(file)]
            assert isinstance(again, types.WorkspaceFullDocumentDiagnosticReport)
            assert again.items == ()
            [found] = (await editor.diagnostics_of("cell:0")).items
            assert (found.code, found.range.start) == ("p-from-f", types.Position(2, 24))


async def test_each_folder_shows_what_is_set_for_it(folder: Path) -> None:
    for name in ("strict", "quiet"):
        (folder / name).mkdir()
        (folder / name / "note.md").write_text("So t(40) = 9.20, p = .000.")
    roots = [folder / "strict", folder / "quiet"]
    async with session(folders=roots) as editor:
        settings = {"crossfoot": {"show": "conflict"}}
        editor.set_configuration(settings, scope_uri=uri_of(roots[1]))
        editor.workspace_did_change_configuration(types.DidChangeConfigurationParams(None))
        while uri_of(roots[1] / "note.md") in (found := await ask(editor)):
            pass  # until the editor has been asked
        assert uri_of(roots[0] / "note.md") in found


async def test_only_what_has_changed_is_reported_again(folder: Path) -> None:
    async with session(folders=[folder]) as editor:
        first = await ask(editor)
        told = {uri: report.result_id or "" for uri, report in first.items()}
        again = await ask(editor, told)
        assert {report.kind for report in again.values()} == {"unchanged"}
        (folder / "wrong.md").write_text(RIGHT)
        (folder / "deep" / "wrong.tex").unlink()
        (folder / "right.md").write_text(WRONG)
        changed = await ask(editor, told)
        counts = {uri: len(report.items) for uri, report in changed.items()}  # type: ignore[union-attr]  # all of them are full
        assert counts == {
            uri_of(folder / "wrong.md"): 0,
            uri_of(folder / "deep" / "wrong.tex"): 0,
            uri_of(folder / "right.md"): 1,
        }


async def test_a_file_that_is_open_is_left_to_the_editor(folder: Path) -> None:
    async with session(folders=[folder]) as editor:
        uri = editor.open(RIGHT, "wrong.md", folder=str(folder))
        assert uri not in await ask(editor)
        assert (await editor.diagnostics_of(uri)).items == ()
        editor.shut(uri)
        assert uri in await ask(editor)


async def test_progress_is_reported_and_results_come_bit_by_bit(folder: Path) -> None:
    for number in range(40):
        (folder / f"more-{number}.md").write_text(WRONG)
    async with session(folders=[folder]) as editor:
        editor.progress_reports.update({"work": [], "bits": []})
        found = await ask(editor, work="work", partial="bits")
        assert found == {}
        values = [p.value for p in editor.progressed if p.token == "work"]
        kinds = [value["kind"] for value in values]
        assert kinds[0] == "begin"
        assert kinds[-1] == "end"
        assert "report" in kinds
        assert values[0]["cancellable"] is True
        bits = [p.value["items"] for p in editor.progressed if p.token == "bits"]
        assert sum(map(len, bits)) == 42


async def test_the_work_can_be_given_up(folder: Path) -> None:
    for number in range(300):
        (folder / f"more-{number}.md").write_text(WRONG + " Words." * 1000 + str(number))
    async with session(folders=[folder]) as editor:
        editor.progress_reports["work"] = []
        question = asyncio.ensure_future(ask(editor, work="work"))
        await editor.until(lambda: editor.progressed)
        editor.window_work_done_progress_cancel(types.WorkDoneProgressCancelParams("work"))
        assert len(await question) < 302
        again = types.WorkspaceDiagnosticParams([], "crossfoot")
        given_up = asyncio.ensure_future(
            editor.protocol.send_request_async(types.WORKSPACE_DIAGNOSTIC, again, msg_id="up")
        )
        await asyncio.sleep(0.02)
        editor.cancel_request(types.CancelParams("up"))
        with pytest.raises(Exception, match="cancel"):
            await given_up
        assert len(await ask(editor)) == 302


async def test_it_can_be_turned_off(folder: Path) -> None:
    settings = {"workspaceDiagnostics": False}
    async with session(folders=[folder], options={"settings": settings}, settings=settings) as e:
        assert await ask(e) == {}


async def test_excluded_and_ignored_files_are_left_out(folder: Path) -> None:
    (folder / "crossfoot.toml").write_text('exclude = ["/wrong.md"]')
    (folder / ".git").mkdir()
    (folder / ".gitignore").write_text("deep/")
    async with session(folders=[folder]) as editor:
        assert await ask(editor) == {}


async def test_a_question_waits_for_news_where_files_are_watched(folder: Path) -> None:
    capabilities = pulling()
    assert capabilities.workspace is not None
    capabilities.workspace.did_change_watched_files = types.DidChangeWatchedFilesClientCapabilities(
        dynamic_registration=True
    )
    capabilities.workspace.configuration = False  # settings that arrive are news too
    async with session(capabilities, folders=[folder]) as editor:
        assert len(await ask(editor)) == 2
        waiting = asyncio.ensure_future(ask(editor))
        done, _ = await asyncio.wait([waiting], timeout=0.3)
        assert not done
        event = types.FileEvent(uri_of(folder / "right.md"), types.FileChangeType.Changed)
        editor.workspace_did_change_watched_files(types.DidChangeWatchedFilesParams([event]))
        assert len(await waiting) == 2
        # What is opened is left to other questions, what is closed comes back.
        waiting = asyncio.ensure_future(ask(editor))
        uri = editor.open(WRONG, "wrong.md", folder=str(folder))
        assert len(await waiting) == 1
        waiting = asyncio.ensure_future(ask(editor))
        editor.shut(uri)
        assert len(await waiting) == 2


async def scan(editor: Editor) -> object:
    return await editor.workspace_execute_command_async(
        types.ExecuteCommandParams("crossfoot.scanWorkspace")
    )


async def test_an_editor_that_asks_is_told_to_ask_after_a_scan(folder: Path) -> None:
    async with session(folders=[folder]) as editor:
        before = editor.diagnostic_refresh_count
        assert await scan(editor) == 3
        await editor.until(lambda: editor.diagnostic_refresh_count > before)
        assert any(p.value["kind"] == "end" for p in editor.progressed)


async def test_a_simple_editor_is_sent_what_a_scan_finds(folder: Path) -> None:
    async with session(pushing(), folders=[folder]) as editor:
        assert await scan(editor) == 3
        wrong = uri_of(folder / "wrong.md")
        assert len(editor.published[wrong][0].diagnostics) == 1
        assert uri_of(folder / "right.md") not in editor.published
        # Renamed and deleted files lose what is shown of them.
        (folder / "wrong.md").rename(folder / "new.md")
        moved = types.FileRename(wrong, uri_of(folder / "new.md"))
        editor.workspace_did_rename_files(types.RenameFilesParams([moved]))
        await editor.until(lambda: len(editor.published[wrong]) == 2)
        assert editor.published[wrong][1].diagnostics == ()
        deep = uri_of(folder / "deep" / "wrong.tex")
        gone = types.FileDelete(uri_of(folder / "deep"))
        editor.workspace_did_delete_files(types.DeleteFilesParams([gone]))
        await editor.until(lambda: len(editor.published[deep]) == 2)
        created = types.FileCreate(uri_of(folder / "new.md"))
        editor.workspace_did_create_files(types.CreateFilesParams([created]))
        uri = editor.open(WRONG, folder=str(folder))
        editor.text_document_did_save(
            types.DidSaveTextDocumentParams(types.TextDocumentIdentifier(uri))
        )
        assert len(await editor.shown(uri, 1)) == 1


async def names(editor: Editor, query: str) -> list[str]:
    found = await editor.workspace_symbol_async(types.WorkspaceSymbolParams(query))
    return sorted(f"{item.location.uri.rpartition('/')[2]}: {item.name}" for item in found or ())


async def test_results_are_found_by_their_words_in_all_files(folder: Path) -> None:
    async with session(folders=[folder]) as editor:
        editor.open("So t(40) = 2.20, p = .034.", "open.md", folder=str(folder))
        assert await names(editor, "f(2,57)") == [
            "right.md: F(2, 57) = 4.31, p = .018",
            "wrong.md: F(2, 57) = 4.31, p = .052",
            "wrong.tex: F(2, 57) = 4.31, p = .052",
        ]
        assert await names(editor, "t(40") == ["open.md: t(40) = 2.20, p = .034"]
        assert len(await names(editor, "")) == 4
        assert await names(editor, "nothing of that") == []
