"""Where output goes and how it may look there: terminals, pipes and files."""

from __future__ import annotations

import os
import sys
from collections.abc import Mapping
from types import TracebackType
from typing import TextIO

from crossfoot.output.output import Look

_NARROWEST, _WIDEST, _USUAL = 40, 110, 80


def complain(path: str | None, message: str) -> None:
    """Tell the person at the terminal what went wrong, and with which path."""
    from crossfoot.output.safe import safe  # all being well, there is nothing to say

    subject = "" if path is None else f"{safe(path) or repr(path)}: "
    sys.stderr.write(f"crossfoot: {subject}{safe(message)}\n")


def columns(stream: TextIO | None = None, environ: Mapping[str, str] = os.environ) -> int:
    """Return how wide text may be on a stream; 80 columns where it is no terminal."""
    try:
        width = int(environ.get("COLUMNS", ""))
    except ValueError:
        width = 0
    if width <= 0:
        try:
            width = os.get_terminal_size((stream or sys.stdout).fileno()).columns
        except (OSError, ValueError, AttributeError):
            width = _USUAL
    return min(max(width or _USUAL, _NARROWEST), _WIDEST)


def colours(stream: TextIO, environ: Mapping[str, str] = os.environ) -> bool:
    """Tell whether a stream gets colours; ``NO_COLOR`` and ``FORCE_COLOR`` go before the rest."""
    if environ.get("NO_COLOR"):
        return False
    if environ.get("FORCE_COLOR", "0") not in ("", "0"):
        return True
    return stream.isatty() and environ.get("TERM") != "dumb"


class Destination:
    """Standard output, or a file that appears whole or not at all.

    A file is written under another name beside its place and renamed at the end, so that nobody
    finds half of it and an old one survives a failure. What is no regular file (a pipe, a
    device) is written to directly.

    Parameters
    ----------
    path
        The file; None or ``-`` for standard output.
    """

    def __init__(self, path: str | None) -> None:
        self._path = None if path in (None, "-") else os.path.realpath(path)
        self._part: str | None = None
        self._stream: TextIO = sys.stdout

    def __enter__(self) -> TextIO:
        if self._path is not None:
            target = self._path
            if not os.path.exists(target) or os.path.isfile(target):
                folder, name = os.path.split(target)
                self._part = target = os.path.join(folder, f".{name}.{os.getpid()}.part")
            # Closed in __exit__, whatever happens.
            self._stream = open(target, "w", encoding="utf-8", newline="\n")
        return self._stream

    def __exit__(
        self,
        kind: type[BaseException] | None,
        error: BaseException | None,
        trace: TracebackType | None,
    ) -> None:
        if self._path is None:
            if kind is None:
                self._stream.flush()
            return
        try:
            self._stream.close()
            if kind is None and self._part is not None:
                os.replace(self._part, self._path)
                self._part = None
        finally:
            if self._part is not None:
                os.unlink(self._part)

    def look(self, explain: bool) -> Look:
        """Return how output should look there."""
        if self._path is not None:
            return Look(_USUAL, False, explain)
        return Look(columns(sys.stdout), colours(sys.stdout), explain)
