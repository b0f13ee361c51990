"""Diagnostics of files that are not open: asked for, or sent on command."""

from __future__ import annotations

import asyncio
from collections.abc import AsyncIterator
from typing import TYPE_CHECKING
from uuid import uuid4

from lsprotocol import types

from crossfoot_lsp.closed import ClosedFiles, Entry

if TYPE_CHECKING:
    from crossfoot_lsp.server import Server

#: Seconds that a question is kept open while there is nothing new, where changes are reported.
_HOLD = 20.0

#: Files between two reports of how far the work is.
_STEP = 10

TITLE = "Crossfoot: scanning files"


class Workspace:
    """The files of the editor's folders, and what the editor was told of them."""

    def __init__(self, server: Server) -> None:
        self._server = server
        self.files = ClosedFiles()
        self.news = asyncio.Event()  # set when files or settings have changed
        self.answered = False
        self._turn = asyncio.Lock()
        self._open: set[str] = set()

    def changed(self, uri: str) -> None:
        """Take note of what is opened, and so left to the editor's other questions, or closed."""
        is_open = self._server.store.entry(uri) is not None
        if is_open != (uri in self._open):
            (self._open.add if is_open else self._open.discard)(uri)
            self.news.set()

    async def entries(self, token: types.ProgressToken | None) -> AsyncIterator[Entry]:
        """Yield what each file that is not open holds, with progress, until it is cancelled."""
        server = self._server
        loop = asyncio.get_running_loop()
        async with self._turn, _Progress(server, token) as progress:
            folders = [path for path in server.folders.values() if path]
            paths = await loop.run_in_executor(
                server.workers, self.files.find, folders, server.configuration.rules
            )
            for number, path in enumerate(paths):
                if progress.cancelled:
                    return
                if number % _STEP == 0:
                    progress.report(number, len(paths))
                if server.store.is_open(path) or server.configuration.excludes(path):
                    continue
                entry = await loop.run_in_executor(
                    server.workers,
                    self.files.read,
                    path,
                    server.configuration.settings(path),
                    server.client.encoding,
                    server.client.manner,
                )
                if entry is not None and not server.store.is_open(path):
                    yield entry

    def shown(self, entry: Entry) -> list[types.Diagnostic]:
        """Return the diagnostics of a file that are to be shown."""
        shown = self._server.configuration.editor(entry.path).shown
        return [mark for severity, mark in entry.marks if severity in shown]


class _Progress:
    """Progress of work, shown where there is a token for it."""

    def __init__(self, server: Server, token: types.ProgressToken | None) -> None:
        self._progress = server.work_done_progress
        self._token = token

    async def __aenter__(self) -> _Progress:
        if self._token is not None:
            begin = types.WorkDoneProgressBegin(TITLE, cancellable=True, percentage=0)
            self._progress.begin(self._token, begin)
        return self

    async def __aexit__(self, *error: object) -> None:
        if self._token is not None:
            self._progress.end(self._token, types.WorkDoneProgressEnd())
            self._progress.tokens.pop(self._token, None)

    @property
    def cancelled(self) -> bool:
        """Whether a person has had enough of it."""
        if self._token is None:
            return False
        future = self._progress.tokens.get(self._token)
        return future is not None and future.cancelled()

    def report(self, done: int, total: int) -> None:
        """Show how far the work is."""
        if self._token is not None:
            percentage = 100 * done // max(total, 1)
            words = f"{done} of {total} files"
            report = types.WorkDoneProgressReport(message=words, percentage=percentage)
            self._progress.report(self._token, report)


def news(server: Server) -> None:
    """Take note that files or settings have changed."""
    server.workspace_files.news.set()


async def answer(
    server: Server, params: types.WorkspaceDiagnosticParams
) -> types.WorkspaceDiagnosticReport:
    """Answer with what has changed since the editor was told last."""
    workspace = server.workspace_files
    if workspace.answered and server.client.watches:
        await _patiently(workspace.news)
    workspace.news.clear()
    items = []
    if server.configuration.editor("").workspace_diagnostics:
        items = [item async for item in _reports(server, params)]
    workspace.answered = True
    return types.WorkspaceDiagnosticReport(items)


async def _reports(
    server: Server, params: types.WorkspaceDiagnosticParams
) -> AsyncIterator[types.WorkspaceDocumentDiagnosticReport]:
    """Yield the reports that go into the answer; none where they are sent bit by bit."""
    told = {item.uri: item.value for item in params.previous_result_ids}
    partial = params.partial_result_token
    async for entry in server.workspace_files.entries(params.work_done_token):
        report = _report(server.workspace_files, entry, told.pop(entry.uri, None))
        if report is None:
            continue
        if partial is None:
            yield report
        else:
            value = types.WorkspaceDiagnosticReportPartialResult([report])
            server.progress(types.ProgressParams(partial, value))
    for uri in told:
        # An open text is asked about by itself, an open notebook by its cells.
        if server.store.open_text(uri) is None:
            yield types.WorkspaceFullDocumentDiagnosticReport(uri=uri, items=[])


def _report(
    workspace: Workspace, entry: Entry, told: str | None
) -> types.WorkspaceDocumentDiagnosticReport | None:
    marks = workspace.shown(entry)
    number = f"{entry.number}-{len(marks)}"
    if told == number:
        return types.WorkspaceUnchangedDocumentDiagnosticReport(uri=entry.uri, result_id=number)
    if not marks and told is None:
        return None  # nothing to say about it, and nothing to take back
    return types.WorkspaceFullDocumentDiagnosticReport(uri=entry.uri, items=marks, result_id=number)


async def _patiently(event: asyncio.Event) -> None:
    try:
        await asyncio.wait_for(event.wait(), _HOLD)
    except TimeoutError:
        return


async def scan_all(server: Server) -> int:
    """Scan all files now; send what is found to an editor that does not ask itself."""
    workspace = server.workspace_files
    token: str | None = None
    if server.client.progress:
        token = str(uuid4())
        await server.work_done_progress.create_async(token)
    count = 0
    async for entry in workspace.entries(token):
        count += 1
        if not server.client.pulls:
            marks = workspace.shown(entry)
            server.send_diagnostics(entry.uri, server.marker.plain(marks), None)
    workspace.news.set()
    if server.client.pulls and server.client.refreshes_diagnostics:
        server.workspace_diagnostic_refresh(None)
    return count
