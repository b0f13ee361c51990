"""Diagnostics of open texts: asked for by an editor that can ask, sent to one that can't.

Never both, or every finding would be shown twice. An answer is always on the newest version: a
text that changes while it is read is read again before anything is said about it.
"""

from __future__ import annotations

from typing import TYPE_CHECKING

from lsprotocol import types

from crossfoot_lsp.raw import NOTHING, Raw

if TYPE_CHECKING:
    from crossfoot_lsp.server import Server
    from crossfoot_lsp.store import View


def start(server: Server) -> None:
    """Watch texts, so that an editor that can't ask is sent what is found in them."""
    if server.client.pulls:
        server.on_change(server.told.changed)
        server.on_change(server.workspace_files.changed)
    else:
        server.on_change(_Sending(server).changed)


async def answer(server: Server, params: types.DocumentDiagnosticParams) -> Raw:
    """Answer with all diagnostics, or that they are what they were."""
    uri = params.text_document.uri
    view = await server.view(uri)
    if view is None:
        return Raw('{"kind":"full","items":[]}')
    found = marks(server, view)
    number = server.told.number(uri, view.snapshot.number, found)
    if params.previous_result_id == number:
        return Raw(f'{{"kind":"unchanged","resultId":"{number}"}}')
    return Raw(f'{{"kind":"full","resultId":"{number}","items":{found}}}')


def marks(server: Server, view: View) -> Raw:
    """Return what is to be shown in a text, as JSON."""
    shown = server.configuration.editor(view.snapshot.path).shown
    return server.marker.written(view.snapshot, view.part, view.report, shown, server.client.manner)


class Told:
    """What an editor that asks was told last of each text."""

    def __init__(self, server: Server) -> None:
        self._server = server
        self._last: dict[str, tuple[str, Raw]] = {}

    def number(self, uri: str, version: int, found: Raw) -> str:
        """Return the number of an answer; that of the last one, if it is the same."""
        last = self._last.get(uri)
        if last is None or last[1] != found:
            last = self._last[uri] = (str(version), found)
        return last[0]

    def changed(self, uri: str) -> None:
        """Forget a text that is closed."""
        if self._server.store.entry(uri) is None:
            self._last.pop(uri, None)
            self._server.marker.forget(uri)


class _Sending:
    """Sends diagnostics after each change, one text at a time, never of a version that is old."""

    def __init__(self, server: Server) -> None:
        self._server = server
        self._busy: set[str] = set()
        self._parts: dict[str, set[str]] = {}  # of a text or notebook: names of its texts

    def changed(self, uri: str) -> None:
        """Take note that a text changed; whoever is at it already will see that for itself."""
        if uri not in self._busy:
            self._busy.add(uri)
            self._server.begin(self._send(uri))

    async def _send(self, uri: str) -> None:
        try:
            sent = -1
            while (view := await self._server.view(uri)) is not None:
                if view.snapshot.number == sent:
                    return
                sent = view.snapshot.number
                self._publish(uri, view)
            for closed in self._parts.pop(uri, ()):
                self._take_back(closed)
        finally:
            self._busy.discard(uri)

    def _publish(self, uri: str, view: View) -> None:
        parts = view.snapshot.parts
        gone = self._parts.get(uri, set()) - {part.uri for part in parts}
        self._parts[uri] = {part.uri for part in parts}
        for part in parts:
            found = marks(self._server, view._replace(part=part))
            self._server.send_diagnostics(part.uri, found, part.version)
        for closed in gone:
            self._take_back(closed)

    def _take_back(self, uri: str) -> None:
        """Take back what is shown in a text that is there no more."""
        self._server.marker.forget(uri)
        self._server.send_diagnostics(uri, NOTHING, None)
