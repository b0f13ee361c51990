"""One version of what lies open: never changed, read once, on a thread of its own.

A notebook is read as one document, so that a method stated in one cell holds for the next; its
cells are the parts of it. A text has one part, itself.
"""

from __future__ import annotations

import gc
import logging
from collections.abc import Callable, Sequence
from functools import cached_property
from itertools import count
from typing import NamedTuple

from lsprotocol import types

from crossfoot.documents import FORMATS, split
from crossfoot.documents.newlines import feeds_only
from crossfoot.model import Block, Document, Report, Span
from crossfoot.settings import Settings
from crossfoot_lsp.languages import NOTEBOOK
from crossfoot_lsp.text import Text

#: Between the cells of a notebook.
_GAP = "\n\n"

_numbers = count(1)

_LOG = logging.getLogger("crossfoot_lsp")


class Part(NamedTuple):
    """One text as the editor has it.

    Attributes
    ----------
    uri, version
        Its name and version.
    text
        The text.
    start
        Where it starts in the document that is read.
    code
        Whether it is a cell of code.
    """

    uri: str
    version: int | None
    text: Text
    start: int = 0
    code: bool = False

    @property
    def end(self) -> int:
        """Where it ends in the document that is read."""
        return self.start + len(self.text.content)

    def offset(self, position: types.Position) -> int:
        """Return where a position is in the document."""
        return self.start + self.text.offset(position)

    def range(self, span: Span) -> types.Range:
        """Return the range of a span of the document."""
        return self.text.range(span.start - self.start, span.end - self.start)


class Snapshot:
    """A version of a text or a notebook.

    Parameters
    ----------
    uri, path
        Its name, and where it lies if it is a file.
    language
        Its format.
    parts
        Its texts, in order.
    settings
        How it is scanned.
    excluded
        Whether nothing is read in it: the settings leave it out, or its format is no text.

    Attributes
    ----------
    superseded
        Set once there is a newer version: work on this one is given up.
    number
        Tells snapshots apart; rises with time.
    """

    def __init__(
        self,
        uri: str,
        path: str,
        language: str,
        parts: Sequence[Part],
        settings: Settings,
        excluded: bool = False,
    ) -> None:
        self.uri = uri
        self.path = path
        self.language = language
        self.parts = tuple(parts)
        self.settings = settings
        self.excluded = excluded
        self.superseded = False
        self.number = next(_numbers)

    @property
    def size(self) -> int:
        """How long its texts are together."""
        return sum(len(part.text.content) for part in self.parts)

    def part(self, uri: str) -> Part | None:
        """Return the part with a name."""
        return next((part for part in self.parts if part.uri == uri), None)

    def part_at(self, offset: int) -> Part:
        """Return the part in which an offset lies."""
        return next((part for part in self.parts if offset <= part.end), self.parts[-1])

    def location(self, span: Span) -> types.Location:
        """Return where a span of the document is in the editor."""
        part = self.part_at(span.start)
        return types.Location(part.uri, part.range(span))

    @cached_property
    def document(self) -> Document:
        """The document that is read; without blocks if it is excluded."""
        if self.language == NOTEBOOK and not self.excluded:
            return _notebook(self.path, self.parts)
        text = self.parts[0].text.content
        if self.excluded:
            return Document(self.path, self.language, text, ())
        reader = FORMATS[self.language].reader
        return Document(
            self.path,
            self.language,
            text,
            split(self.language, text),
            definitions=reader.define(feeds_only(text)),
        )

    def read(self, cold: bool) -> Report | None:
        """Scan, unless this version is superseded before it is done.

        Parameters
        ----------
        cold
            Whether much of it was never read before, so that it is worth to look often at
            whether the result is still wanted.
        """
        from crossfoot.scan import scan_document

        if self.superseded:
            return None
        try:
            document = self.document
            if cold and not _warmed(document, self.settings, lambda: self.superseded):
                return None
            report = scan_document(document, self.settings)
        except Exception:
            # A fault of ours in one document must not cost the editor its server.
            _LOG.exception("%s could not be read", self.path)
            return Report(Document(self.path, self.language, "", ()))
        if cold:
            gc.freeze()  # what is remembered now stays for long, and is not worth looking at again
        return report


def _warmed(document: Document, settings: Settings, stop: Callable[[], bool]) -> bool:
    """Read each block, so that the scan finds it remembered; False if told to stop before."""
    from crossfoot.audit import audit_claim
    from crossfoot.reading import read_block

    for block in document.blocks:
        if stop():
            return False
        reading = read_block(document.language, block.kind, block.source, document.definitions)
        for claim in reading.claims:
            audit_claim(claim, settings.alpha)
    return not stop()


def _notebook(path: str, parts: Sequence[Part]) -> Document:
    """Return the cells of a notebook as one document; each starts a page."""
    blocks: list[Block] = []
    for part in parts:
        content = part.text.content
        if part.code:
            if content.strip():
                blocks.append(Block("code", part.start, content))
            continue
        blocks += [
            block._replace(start=part.start + block.start) for block in split("markdown", content)
        ]
    text = _GAP.join(part.text.content for part in parts)
    return Document(path, NOTEBOOK, text, tuple(blocks), tuple(part.start for part in parts))


def in_a_row(parts: Sequence[Part]) -> list[Part]:
    """Return the cells of a notebook with the places at which they start in the document."""
    placed = []
    start = 0
    for part in parts:
        placed.append(part._replace(start=start))
        start += len(part.text.content) + len(_GAP)
    return placed
