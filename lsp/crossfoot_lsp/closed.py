"""Files of the editor's folders that are not open: read from disk, again only if they changed."""

from __future__ import annotations

import logging
import os
from collections.abc import Callable, Iterable
from typing import NamedTuple

from lsprotocol import types
from pygls.uris import from_fs_path

from crossfoot.batch.files import read_bytes
from crossfoot.batch.walk import find
from crossfoot.documents import FORMATS, open_document, unreadable
from crossfoot.documents.decoding import decode
from crossfoot.model import Document, Problem, Report
from crossfoot.patterns import Rules
from crossfoot.scan import scan_document
from crossfoot.settings import Settings
from crossfoot_lsp.client import Manner
from crossfoot_lsp.languages import NOTEBOOK, format_of, is_text
from crossfoot_lsp.lookup import claim_span
from crossfoot_lsp.marks import diagnostics_of
from crossfoot_lsp.notebooks import NotebookText
from crossfoot_lsp.snapshot import Part, Snapshot
from crossfoot_lsp.text import Text
from crossfoot_lsp.words import claim_name

_LOG = logging.getLogger("crossfoot_lsp")


class Entry(NamedTuple):
    """What a file holds.

    Attributes
    ----------
    stamp
        Tells whether it has changed since.
    number
        Tells this reading of it from every other.
    path, uri
        Where it lies, and its name.
    marks
        Its diagnostics, of every severity.
    symbols
        Its results: name, range.
    """

    stamp: tuple[object, ...]
    number: str
    path: str
    uri: str
    marks: tuple[tuple[str, types.Diagnostic], ...]
    symbols: tuple[tuple[str, types.Range], ...]


class ClosedFiles:
    """What is known of files that are not open.

    Its methods are called from a worker's thread, one at a time.
    """

    def __init__(self) -> None:
        self._known: dict[str, Entry] = {}

    def find(self, folders: Iterable[str], rules: Callable[[str], tuple[Rules, ...]]) -> list[str]:
        """Return the paths of the documents in folders, as ``crossfoot scan`` finds them.

        ``rules`` says what is left out of a folder.
        """
        existing = [folder for folder in folders if os.path.isdir(folder)]
        suffixes = sorted({suffix for form in FORMATS.values() for suffix in form.suffixes})
        items = find(existing, suffixes, rules)
        found = [os.path.abspath(item.path) for item in items if item.problem is None]
        for path in self._known.keys() - set(found):
            del self._known[path]
        return found

    def read(self, path: str, settings: Settings, encoding: str, manner: Manner) -> Entry | None:
        """Return what a file holds; None where it can't be read, or not shown as text."""
        stamp = _stamp(path, settings, encoding, manner)
        known = self._known.get(path)
        if known is not None and known.stamp == stamp:
            return known
        self._known.pop(path, None)
        language = format_of("", path, settings.language)
        if stamp is None or not (is_text(language) or language == NOTEBOOK):
            return None
        data = read_bytes(path, settings.max_bytes)
        if isinstance(data, str):
            return None
        document = open_document(path, data, language)
        if unreadable(document) is not None:
            return None
        uri = from_fs_path(path) or path
        part = Part(uri, None, _text(document, data, encoding))
        snapshot = Snapshot(uri, path, language, [part], settings)
        try:
            report = scan_document(document, settings)
        except Exception:
            # A fault of ours in one file must not cost the others.
            _LOG.exception("%s could not be read", path)
            return None
        entry = Entry(
            stamp,
            f"file-{snapshot.number}",
            path,
            uri,
            tuple(_marks(snapshot, part, report, manner)),
            tuple((claim_name(p), part.range(claim_span(p))) for p in report.claims),
        )
        self._known[path] = entry
        return entry


def _text(document: Document, data: bytes, encoding: str) -> Text:
    """Return the text of a document, with ranges as an editor has them that opens its file."""
    if document.language == NOTEBOOK:
        decoded = decode(data)
        file = "" if isinstance(decoded, Problem) else decoded.text
        return NotebookText(document.text, Text(file, encoding))
    return Text(document.text, encoding)


def _marks(
    snapshot: Snapshot, part: Part, report: Report, manner: Manner
) -> Iterable[tuple[str, types.Diagnostic]]:
    for severity in ("reversal", "conflict", "doubt", "note"):
        for mark in diagnostics_of(snapshot, part, report, frozenset({severity}), manner):
            if mark.code != "remark" or severity == "doubt":  # those are in each of the lists
                yield severity, mark


def _stamp(
    path: str, settings: Settings, encoding: str, manner: Manner
) -> tuple[object, ...] | None:
    try:
        status = os.stat(path)
    except OSError:
        return None
    return (status.st_mtime_ns, status.st_size, status.st_ino, settings, encoding, manner)
