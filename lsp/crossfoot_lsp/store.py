"""What lies open in the editor: the newest snapshot of each text, and its report.

Everything here runs on the main loop; only :meth:`Snapshot.read` runs on a worker's thread.
"""

from __future__ import annotations

import asyncio
from collections.abc import Callable, Iterable, Iterator, Sequence
from concurrent.futures import Executor
from typing import NamedTuple

from lsprotocol import types

from crossfoot.model import Report
from crossfoot_lsp.configuration import Configuration
from crossfoot_lsp.languages import NOTEBOOK, format_of, is_text
from crossfoot_lsp.names import path_of
from crossfoot_lsp.snapshot import Part, Snapshot, in_a_row
from crossfoot_lsp.text import Text

#: An edit this long makes much of a document new.
_LARGE = 50_000

#: A text longer than this is always read on a thread of its own.
_LONG = 2_000_000


class View(NamedTuple):
    """A text of the editor with the report on its newest version."""

    snapshot: Snapshot
    part: Part
    report: Report


class Entry:
    """A text or a notebook that lies open.

    Attributes
    ----------
    language_id
        What the editor calls its language.
    snapshot
        Its newest version.
    """

    def __init__(self, language_id: str, snapshot: Snapshot) -> None:
        self.language_id = language_id
        self.snapshot = snapshot
        self._cold = True
        self._reading: asyncio.Future[Report | None] | None = None
        self._known: tuple[Snapshot, Report] | None = None

    def replace(self, snapshot: Snapshot, cold: bool) -> None:
        """Go on to a newer version."""
        self.snapshot.superseded = True
        self.snapshot = snapshot
        self._cold = self._cold or cold
        self._reading = None

    async def report(self, workers: Executor) -> Report | None:
        """Return the report on the newest version; whoever asks shares one reading of it.

        None means that it was superseded meanwhile.
        """
        snapshot = self.snapshot
        if self._known is not None and self._known[0] is snapshot:
            return self._known[1]
        if self._cold or snapshot.size > _LONG:
            if self._reading is None:
                loop = asyncio.get_running_loop()
                self._reading = loop.run_in_executor(workers, snapshot.read, self._cold)
            report = await asyncio.shield(self._reading)
        else:
            # All but a little is remembered: it is read before a thread would have woken up. But
            # what has come in goes first, or a burst of edits would be read one by one.
            await asyncio.sleep(0)
            report = self._known_or_read(snapshot)
        if report is None or self.snapshot is not snapshot:
            return None
        self._known = (snapshot, report)
        self._cold = False
        return report

    def _known_or_read(self, snapshot: Snapshot) -> Report | None:
        """Return the report on a version that somebody else may have read meanwhile."""
        if self._known is not None and self._known[0] is snapshot:
            return self._known[1]
        return snapshot.read(False)


class Store:
    """All that lies open.

    Parameters
    ----------
    workers
        Threads for what takes longer to read.
    configuration
        What is set for each file.
    encoding
        What the editor counts columns in.
    changed
        Told, with its name, of each text or notebook that is new, has changed or was closed.
    """

    def __init__(
        self,
        workers: Executor,
        configuration: Configuration,
        encoding: str,
        changed: Callable[[str], object],
    ) -> None:
        self._encoding = encoding
        self._workers = workers
        self._configuration = configuration
        self._changed = changed
        self._entries: dict[str, Entry] = {}
        self._owners: dict[str, str] = {}  # of cells: the notebook

    def __iter__(self) -> Iterator[Entry]:
        return iter(tuple(self._entries.values()))

    def entry(self, uri: str) -> Entry | None:
        """Return what lies open under a name: a text, a notebook, or that of a cell."""
        return self._entries.get(self._owners.get(uri, uri))

    def open_text(self, uri: str) -> Part | None:
        """Return the text that lies open under a name: a document, or a cell of a notebook."""
        entry = self.entry(uri)
        return None if entry is None else entry.snapshot.part(uri)

    def is_open(self, path: str) -> bool:
        """Say whether a file lies open."""
        return any(entry.snapshot.path == path for entry in self._entries.values())

    async def view(self, uri: str) -> View | None:
        """Return a text with the report on its newest version; None if it does not lie open.

        An edit that comes in meanwhile is waited for too: nobody is answered from an old text.
        """
        while (entry := self.entry(uri)) is not None:
            report = await entry.report(self._workers)
            if report is not None:
                part = entry.snapshot.part(uri) or entry.snapshot.parts[0]
                return View(entry.snapshot, part, report)
        return None

    # Texts

    def open(self, item: types.TextDocumentItem) -> None:
        """Take in a text."""
        part = Part(item.uri, item.version, Text(item.text, self._encoding))
        self._put(item.uri, item.language_id, [part])

    def change(
        self,
        document: types.VersionedTextDocumentIdentifier,
        changes: Sequence[types.TextDocumentContentChangeEvent],
    ) -> None:
        """Take in edits, each to the text that the one before it left."""
        entry, part = self.entry(document.uri), self.open_text(document.uri)
        if entry is None or part is None:
            return
        text = part.text
        for change in changes:
            text = text.edited(change)
        new = part._replace(text=text, version=document.version)
        cold = sum(len(change.text) for change in changes) > _LARGE
        parts = [new if other is part else other for other in entry.snapshot.parts]
        self._renew(entry, parts, cold)

    def close(self, uri: str) -> None:
        """Forget a text or a notebook."""
        entry = self._entries.pop(uri, None)
        if entry is not None:
            entry.snapshot.superseded = True
            self._changed(uri)

    # Notebooks

    def open_notebook(
        self, notebook: types.NotebookDocument, cells: Sequence[types.TextDocumentItem]
    ) -> None:
        """Take in a notebook with its cells, in the notebook's order."""
        self._put(notebook.uri, NOTEBOOK, _cells(notebook.cells, cells, self._encoding))
        self._own(notebook.uri)

    def change_notebook(
        self,
        notebook: types.VersionedNotebookDocumentIdentifier,
        change: types.NotebookDocumentChangeEvent,
    ) -> None:
        """Take in a change of a notebook: its cells, their order, their texts."""
        entry = self._entries.get(notebook.uri)
        if entry is None or change.cells is None:
            return
        parts = list(entry.snapshot.parts)
        structure = change.cells.structure
        if structure is not None:
            array = structure.array
            new = _cells(array.cells or (), structure.did_open or (), self._encoding, parts)
            parts[array.start : array.start + array.delete_count] = new
        for edit in change.cells.text_content or ():
            parts = [_edited(part, edit) for part in parts]
        for data in change.cells.data or ():
            code = data.kind is types.NotebookCellKind.Code
            parts = [p._replace(code=code) if p.uri == data.document else p for p in parts]
        for part in entry.snapshot.parts:
            self._owners.pop(part.uri, None)
        self._renew(entry, parts, structure is not None)
        self._own(notebook.uri)

    def close_notebook(self, uri: str) -> None:
        """Forget a notebook."""
        for cell in [cell for cell, owner in self._owners.items() if owner == uri]:
            del self._owners[cell]
        self.close(uri)

    def _own(self, uri: str) -> None:
        for part in self._entries[uri].snapshot.parts:
            self._owners[part.uri] = uri

    # Both

    def reconsider(self, uris: Iterable[str] | None = None) -> None:
        """Look at texts, or at all, anew: settings have changed."""
        for uri in tuple(self._entries) if uris is None else uris:
            entry = self._entries.get(uri)
            if entry is not None:
                self._renew(entry, entry.snapshot.parts, True)

    def give_up(self) -> None:
        """Have the workers drop what they are at."""
        for entry in self._entries.values():
            entry.snapshot.superseded = True

    def _put(self, uri: str, language_id: str, parts: Sequence[Part]) -> None:
        old = self._entries.get(uri)
        if old is not None:
            old.snapshot.superseded = True
        self._entries[uri] = Entry(language_id, self._snapshot(uri, language_id, parts))
        self._changed(uri)

    def _renew(self, entry: Entry, parts: Sequence[Part], cold: bool) -> None:
        snapshot = self._snapshot(entry.snapshot.uri, entry.language_id, parts)
        entry.replace(snapshot, cold)
        self._changed(snapshot.uri)

    def _snapshot(self, uri: str, language_id: str, parts: Sequence[Part]) -> Snapshot:
        path = path_of(uri) or uri
        settings = self._configuration.settings(path)
        excluded = self._configuration.excludes(path)
        if language_id == NOTEBOOK:
            return Snapshot(uri, path, NOTEBOOK, in_a_row(parts), settings, excluded)
        language = format_of(language_id, path, settings.language)
        excluded = excluded or not is_text(language)
        return Snapshot(uri, path, language, parts, settings, excluded)


def _cells(
    order: Sequence[types.NotebookCell],
    texts: Sequence[types.TextDocumentItem],
    encoding: str,
    known: Sequence[Part] = (),
) -> list[Part]:
    """Return the parts for cells, from their texts or as they were known before."""
    parts = {part.uri: part for part in known}
    for item in texts:
        parts[item.uri] = Part(item.uri, item.version, Text(item.text, encoding))
    return [
        parts[cell.document]._replace(code=cell.kind is types.NotebookCellKind.Code)
        for cell in order
        if cell.document in parts
    ]


def _edited(part: Part, edit: types.NotebookDocumentCellContentChanges) -> Part:
    if part.uri != edit.document.uri:
        return part
    text = part.text
    for change in edit.changes:
        text = text.edited(change)
    return part._replace(text=text, version=edit.document.version)
