"""Commands: the summary of a document, an allowance with a reason, a look at all files."""

from __future__ import annotations

from collections.abc import Callable, Mapping
from typing import TYPE_CHECKING, Any

from lsprotocol import types

from crossfoot_lsp.capabilities import ALLOW, ORIGIN, SCAN, SUMMARY
from crossfoot_lsp.features import workspace_diagnostics
from crossfoot_lsp.features.code_actions import allow
from crossfoot_lsp.summary import summary

if TYPE_CHECKING:
    from crossfoot_lsp.server import Server

Arguments = tuple[Any, ...]


async def show_summary(server: Server, arguments: Arguments) -> str | None:
    """Show the summary of a text, and return it too for editors that show it themselves."""
    view = await server.view(_text(arguments, 0))
    if view is None:
        return None
    words = summary(view.snapshot, view.report)
    quiet = len(arguments) > 1 and arguments[1] is True
    if not quiet:
        server.window_show_message(types.ShowMessageParams(types.MessageType.Info, words))
    return words


async def allow_here(server: Server, arguments: Arguments) -> bool:
    """Allow a finding with the reason that a person gave: name, claim, identity, reason."""
    view = await server.view(_text(arguments, 0))
    if view is None:
        return False
    claim, identity, reason = (_text(arguments, number) for number in (1, 2, 3))
    edit = allow(server, view, claim, identity, reason)
    if edit is None:
        return False
    params = types.ApplyWorkspaceEditParams(edit, f"Allow {identity}")
    result = await server.workspace_apply_edit_async(params)
    return bool(result.applied)


async def scan(server: Server, arguments: Arguments) -> int:
    """Scan every file of the folders that is not open; return how many were."""
    return await workspace_diagnostics.scan_all(server)


async def origin(server: Server, arguments: Arguments) -> str | None:
    """Return the file that a text's project settings come from, if there is one."""
    entry = server.store.entry(_text(arguments, 0))
    return None if entry is None else server.configuration.project(entry.snapshot.path).path


FUNCTIONS: Mapping[str, Callable[[Server, Arguments], Any]] = {
    SUMMARY: show_summary,
    ALLOW: allow_here,
    SCAN: scan,
    ORIGIN: origin,
}


def _text(arguments: Arguments, number: int) -> str:
    """Return an argument that should be text, or nothing."""
    value = arguments[number] if number < len(arguments) else ""
    return value if isinstance(value, str) else ""
