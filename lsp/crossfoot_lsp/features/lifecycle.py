"""Start and end: what the editor can do, which folders it works in, what is set."""

from __future__ import annotations

from typing import TYPE_CHECKING, Any

from lsprotocol import types

from crossfoot.documents import FORMATS
from crossfoot.project import FILES
from crossfoot_lsp.features import warm, workspace_diagnostics

if TYPE_CHECKING:
    from crossfoot_lsp.server import Server

#: Name of our part of the editor's settings.
SECTION = "crossfoot"


async def initialized(server: Server, params: types.InitializedParams) -> None:
    """Ask for what the first message did not tell, and get ready for the first document."""
    server.workers.submit(warm)
    _ask_to_be_told(server)
    await read_settings(server)


async def settings_changed(server: Server, params: types.DidChangeConfigurationParams) -> None:
    """Take in settings that have changed, or ask for them."""
    if server.client.configuration:
        await read_settings(server)
    elif isinstance(params.settings, dict):
        server.configuration.choose(params.settings.get(SECTION, params.settings))
        reconsider(server)


async def read_settings(server: Server) -> None:
    """Ask the editor for its settings, in general and for each folder."""
    if not server.client.configuration:
        return
    folders = list(server.folders)
    items = [types.ConfigurationItem(section=SECTION)]
    items += [types.ConfigurationItem(scope_uri=folder, section=SECTION) for folder in folders]
    answer: Any = await server.workspace_configuration_async(types.ConfigurationParams(items))
    if not isinstance(answer, (list, tuple)) or len(answer) != len(items):
        return
    paths = [server.folders[folder] for folder in folders if folder in server.folders]
    server.configuration.choose(
        _plain(answer[0]), dict(zip(paths, map(_plain, answer[1:]), strict=False))
    )
    reconsider(server)


def reconsider(server: Server) -> None:
    """Look at everything anew after settings have changed."""
    server.store.reconsider()
    workspace_diagnostics.news(server)
    if server.client.refreshes_diagnostics and server.client.pulls:
        server.workspace_diagnostic_refresh(None)
    if server.client.refreshes_hints:
        server.workspace_inlay_hint_refresh(None)
    if server.client.refreshes_lenses:
        server.workspace_code_lens_refresh(None)


def _plain(value: Any) -> Any:
    """Return a value of the editor's settings as dictionaries and lists."""
    if isinstance(value, tuple) and hasattr(value, "_asdict"):
        return {name: _plain(inner) for name, inner in value._asdict().items()}
    return value


def _ask_to_be_told(server: Server) -> None:
    """Ask for news of files and settings, as far as the editor gives them."""
    wanted = []
    if server.client.announces:
        options = types.DidChangeConfigurationRegistrationOptions(section=SECTION)
        wanted.append(
            types.Registration("settings", types.WORKSPACE_DID_CHANGE_CONFIGURATION, options)
        )
    if server.client.watches:
        suffixes = sorted({s.lstrip(".") for form in FORMATS.values() for s in form.suffixes})
        patterns = [f"**/{name}" for name in FILES] + [f"**/*.{{{','.join(suffixes)}}}"]
        watchers = types.DidChangeWatchedFilesRegistrationOptions(
            [types.FileSystemWatcher(pattern) for pattern in patterns]
        )
        wanted.append(
            types.Registration("files", types.WORKSPACE_DID_CHANGE_WATCHED_FILES, watchers)
        )
    if wanted:
        server.client_register_capability(types.RegistrationParams(wanted))
