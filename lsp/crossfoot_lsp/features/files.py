"""Files on disk: what is saved, changed by others, renamed or deleted."""

from __future__ import annotations

import os
from typing import TYPE_CHECKING

from lsprotocol import types

from crossfoot.project import FILES
from crossfoot_lsp.features import workspace_diagnostics
from crossfoot_lsp.features.lifecycle import reconsider
from crossfoot_lsp.names import path_of
from crossfoot_lsp.raw import NOTHING

if TYPE_CHECKING:
    from crossfoot_lsp.server import Server


def saved(server: Server, params: types.DidSaveTextDocumentParams) -> None:
    """Take note of a file that was saved."""
    _changed(server, [params.text_document.uri])


def changed(server: Server, params: types.DidChangeWatchedFilesParams) -> None:
    """Take note of files that others changed."""
    _changed(server, [change.uri for change in params.changes])


def renamed(server: Server, params: types.RenameFilesParams) -> None:
    """Take back what is shown under old names."""
    _gone(server, [file.old_uri for file in params.files])


def deleted(server: Server, params: types.DeleteFilesParams) -> None:
    """Take back what is shown of files that are gone."""
    _gone(server, [file.uri for file in params.files])


def created(server: Server, params: types.CreateFilesParams) -> None:
    """Take note of new files."""
    _changed(server, [file.uri for file in params.files])


def _changed(server: Server, uris: list[str]) -> None:
    """Take note of files with new content; those of projects change how all others are read."""
    if any(os.path.basename(path_of(uri) or "") in FILES for uri in uris):
        server.configuration.forget_projects()
        reconsider(server)
    workspace_diagnostics.news(server)


def _gone(server: Server, uris: list[str]) -> None:
    """Take back what is shown of files, and of what lies in folders, that are there no more."""
    if not server.client.pulls:
        for uri in uris:
            inside = [name for name in server.sent if name == uri or name.startswith(f"{uri}/")]
            for name in inside:
                if server.store.entry(name) is None:
                    server.send_diagnostics(name, NOTHING, None)
    _changed(server, uris)
