"""Settings: the editor's and the project's, reloaded on change, what is wrong told once."""

from __future__ import annotations

from pathlib import Path

import pytest
from lsprotocol import types
from pygls.uris import from_fs_path

from serving.editor import Editor, pulling, pushing, session

pytestmark = pytest.mark.asyncio(loop_scope="session")

#: A reversal at .05; at .01 both lie above it, so that it is a conflict.
NEAR = "So F(2, 57) = 4.31, p = .052."


async def message(editor: Editor, uri: str) -> str:
    [found] = (await editor.diagnostics_of(uri)).items
    return str(found.message)


async def told(editor: Editor) -> str:
    params = await editor.take(types.WINDOW_SHOW_MESSAGE)
    assert params.type == types.MessageType.Warning
    return str(params.message)


def changed(editor: Editor, *paths: Path) -> None:
    events = [
        types.FileEvent(from_fs_path(str(path)) or "", types.FileChangeType.Changed)
        for path in paths
    ]
    editor.workspace_did_change_watched_files(types.DidChangeWatchedFilesParams(events))


async def test_the_project_decides_and_its_file_is_read_again_when_it_changes(
    tmp_path: Path,
) -> None:
    file = tmp_path / "crossfoot.toml"
    file.write_text("alpha = 0.01")
    async with session(folders=[tmp_path], settings={"alpha": 0.05}) as editor:
        uri = editor.open(NEAR, folder=str(tmp_path))
        assert "different sides" not in await message(editor, uri)
        file.write_text("alpha = 0.05")
        changed(editor, file)
        assert "They lie on different sides of .05." in await message(editor, uri)
        origin = types.ExecuteCommandParams("crossfoot.settingsOrigin", [uri])
        assert await editor.workspace_execute_command_async(origin) == str(file)
        file.unlink()
        editor.set_configuration({"alpha": 0.01}, section="crossfoot")
        changed(editor, file)
        editor.workspace_did_change_configuration(types.DidChangeConfigurationParams(None))
        while "different sides" in await message(editor, uri):
            pass  # until the editor has been asked
        assert await editor.workspace_execute_command_async(origin) is None


async def test_each_folder_has_its_own_settings(tmp_path: Path) -> None:
    first, second = tmp_path / "first", tmp_path / "second"
    first.mkdir()
    second.mkdir()
    async with session(folders=[first, second]) as editor:
        scope = from_fs_path(str(second)) or ""
        editor.set_configuration({"crossfoot": {"alpha": 0.01}}, scope_uri=scope)
        editor.workspace_did_change_configuration(types.DidChangeConfigurationParams(None))
        here = editor.open(NEAR, folder=str(first))
        there = editor.open(NEAR, folder=str(second))
        while "different sides" in await message(editor, there):
            pass  # until the editor has been asked
        assert "different sides" in await message(editor, here)
        removed = [types.WorkspaceFolder(scope, "second")]
        event = types.WorkspaceFoldersChangeEvent([], removed)
        editor.workspace_did_change_workspace_folders(types.DidChangeWorkspaceFoldersParams(event))
        while "different sides" not in await message(editor, there):
            pass  # until the editor has been asked


async def test_what_is_wrong_in_the_editors_settings_is_told_once() -> None:
    wrong = {"alpha": 7, "inlayHints": "yes", "colour": "red", "show": "all"}
    async with session(settings=wrong) as editor:
        sentences = {await told(editor) for _ in wrong}
        assert sentences == {
            "Crossfoot, the editor's settings: alpha: 7 is not a number between 0 and 1, such as "
            ".05.",
            "Crossfoot, the editor's settings: inlayHints: 'yes' is neither true nor false.",
            "Crossfoot, the editor's settings: there is no setting 'colour'.",
            "Crossfoot, the editor's settings: show: 'all' is not a severity (reversal, conflict, "
            "doubt, note).",
        }
        editor.workspace_did_change_configuration(types.DidChangeConfigurationParams(None))
        assert len((await editor.diagnostics_of(editor.open(NEAR))).items) == 1
        # Nothing more is waiting: the session's end sees to that.


async def test_what_is_wrong_in_a_projects_file_is_told_with_its_name(tmp_path: Path) -> None:
    file = tmp_path / "crossfoot.toml"
    file.write_text("alpha = 7\nshow = 'x'")
    async with session(folders=[tmp_path]) as editor:
        for name in ("a.md", "b.md"):
            uri = editor.open(NEAR, name, folder=str(tmp_path))
            assert "different sides" in await message(editor, uri)
        first, second = sorted([await told(editor), await told(editor)])
        assert first.startswith(f"Crossfoot, {file}: alpha: 7 is not a number")
        assert second.startswith(f"Crossfoot, {file}: there is no setting 'show'")


async def test_settings_may_come_with_the_first_message_or_be_sent_later() -> None:
    async with session(pushing(), options={"settings": {"alpha": 0.01}}) as editor:
        uri = editor.open(NEAR)
        [found] = await editor.shown(uri, 1)
        assert "different sides" not in found.message
        settings = {"crossfoot": {"alpha": 0.05}}
        editor.workspace_did_change_configuration(types.DidChangeConfigurationParams(settings))
        await editor.until(lambda: len(editor.published[uri]) == 2)
        assert "different sides" in editor.published[uri][1].diagnostics[0].message


async def test_what_is_excluded_is_not_read_even_if_it_is_open(tmp_path: Path) -> None:
    (tmp_path / "crossfoot.toml").write_text('exclude = ["old/"]')
    async with session(folders=[tmp_path]) as editor:
        old = editor.open(NEAR, folder=str(tmp_path / "old"))
        new = editor.open(NEAR, folder=str(tmp_path / "new"))
        assert (await editor.diagnostics_of(old)).items == ()
        assert len((await editor.diagnostics_of(new)).items) == 1


async def test_changes_are_watched_where_the_editor_can_do_it(tmp_path: Path) -> None:
    capabilities = pulling()
    assert capabilities.workspace is not None
    capabilities.workspace.did_change_watched_files = types.DidChangeWatchedFilesClientCapabilities(
        dynamic_registration=True
    )
    async with session(capabilities, folders=[tmp_path]) as editor:
        await editor.diagnostics_of(editor.open(NEAR))
        [params] = editor.registered
        by_method = {item.method: item.register_options for item in params.registrations}
        patterns = [
            w["globPattern"]
            for w in by_method[types.WORKSPACE_DID_CHANGE_WATCHED_FILES]["watchers"]
        ]
        assert patterns[:2] == ["**/crossfoot.toml", "**/pyproject.toml"]
        assert "qmd" in patterns[2]
        assert by_method[types.WORKSPACE_DID_CHANGE_CONFIGURATION] == {"section": "crossfoot"}
