"""What the server can do, as its answer to the first message of an editor."""

from __future__ import annotations

from typing import Any

from crossfoot.version import __version__
from crossfoot_lsp.client import Client

#: What is typed just before a number, or ends the name of one.
TRIGGERS = ("=", "<", " ", "[", "p", "²", "^", "}", "*", "_", "f")

#: Kinds of code actions, beside quick fixes.
FIX_ALL = "source.fixAll.crossfoot"
COMPLETE = "refactor.rewrite.crossfoot.complete"

#: Commands.
SUMMARY = "crossfoot.summary"
ALLOW = "crossfoot.allow"
SCAN = "crossfoot.scanWorkspace"
ORIGIN = "crossfoot.settingsOrigin"
COMMANDS = (SUMMARY, ALLOW, SCAN, ORIGIN)

#: Tells our diagnostics from those of other servers for the same text.
IDENTIFIER = "crossfoot"

_NOTEBOOKS = {
    "notebookSelector": [
        {
            "notebook": {"notebookType": "jupyter-notebook"},
            "cells": [{"language": name} for name in ("markdown", "python", "r", "julia", "raw")],
        }
    ]
}

_INCREMENTAL = 2


def capabilities(client: Client) -> dict[str, Any]:
    """Return the answer to ``initialize``, as JSON, to an editor with some abilities."""
    files = {"filters": [{"pattern": {"glob": "**/*"}}]}
    able: dict[str, Any] = {
        "positionEncoding": client.encoding,
        "textDocumentSync": {
            "openClose": True,
            "change": _INCREMENTAL,
            "save": {"includeText": False},
        },
        "hoverProvider": True,
        "completionProvider": {"triggerCharacters": list(TRIGGERS)},
        "definitionProvider": True,
        "referencesProvider": True,
        "documentHighlightProvider": True,
        "documentSymbolProvider": True,
        "workspaceSymbolProvider": {"workDoneProgress": True},
        "codeActionProvider": {
            "codeActionKinds": ["quickfix", COMPLETE, FIX_ALL],
            "resolveProvider": True,
        },
        "codeLensProvider": {"resolveProvider": False},
        "inlayHintProvider": {"resolveProvider": False},
        "executeCommandProvider": {"commands": list(COMMANDS)},
        "workspace": {
            "workspaceFolders": {"supported": True, "changeNotifications": True},
            "fileOperations": {"didCreate": files, "didRename": files, "didDelete": files},
        },
    }
    if client.notebooks:
        able["notebookDocumentSync"] = _NOTEBOOKS
    if client.pulls:
        able["diagnosticProvider"] = {
            "identifier": IDENTIFIER,
            "interFileDependencies": False,
            "workspaceDiagnostics": True,
            "workDoneProgress": True,
        }
    return {
        "capabilities": able,
        "serverInfo": {"name": "crossfoot", "version": __version__},
    }
