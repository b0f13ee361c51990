"""From files to reports: the one place that reads documents from disk.

A file that can't be read is a report that says so; nothing here raises for a bad file.
"""

from __future__ import annotations

import os
import sys
from collections.abc import Callable, Iterable, Iterator

from crossfoot.batch.policy import Policy
from crossfoot.batch.walk import STANDARD_INPUT, Found, find
from crossfoot.errors import reason
from crossfoot.model import Document, Report
from crossfoot.settings import DEFAULTS, Settings


def unreadable(path: str, problem: str) -> Report:
    """Return the report of a document that could not be read."""
    return Report(Document(path, "", "", ()), (), problem)


def scan_bytes(path: str, data: bytes, settings: Settings = DEFAULTS) -> Report:
    """Scan a document that has been read already; ``path`` tells its format."""
    from crossfoot.documents import open_document
    from crossfoot.scan import scan_document

    try:
        return scan_document(open_document(path, data, settings.language), settings)
    except Exception as error:
        # A fault of ours in one document must not cost the reports on all the others.
        return unreadable(path, f"Crossfoot itself failed on it ({type(error).__name__}: {error}).")


def scan_file(path: str, settings: Settings = DEFAULTS) -> Report:
    """Read and scan one file, or standard input where the path is ``-``."""
    data = read_bytes(path, settings.max_bytes)
    return unreadable(path, data) if isinstance(data, str) else scan_bytes(path, data, settings)


def files(paths: Iterable[str], policy: Policy) -> list[Found]:
    """Return the files to read for these paths, by the names of every format."""
    from crossfoot.documents import FORMATS

    suffixes = {suffix.lower() for form in FORMATS.values() for suffix in form.suffixes}
    return find(paths, sorted(suffixes), policy.rules)


def scan_paths(
    paths: Iterable[str],
    policy: Policy,
    warn: Callable[[str, str], None] = lambda path, problem: None,
    watch: Callable[[Iterator[Report], int], Iterator[Report]] = lambda reports, total: reports,
) -> Iterator[Report]:
    """Scan files and folders, and return a report a document as they are done.

    Parameters
    ----------
    paths
        Files, folders, or ``-`` for standard input.
    policy
        Says which settings hold for which document.
    warn
        Told of each path that leads to no document, with the reason.
    watch
        Wraps the reports as they come, with their number, to show how far the scan is.
    """
    documents = []
    for item in files(paths, policy):
        if item.scanned:
            documents.append(item)
        else:
            warn(item.path, item.problem or "")
    return watch((_report(item, policy) for item in documents), len(documents))


def _report(item: Found, policy: Policy) -> Report:
    if item.problem is not None:
        return unreadable(item.path, item.problem)
    return scan_file(item.path, policy.settings(item.path))


def read_bytes(path: str, limit: int) -> bytes | str:
    """Return the bytes of a file, or a sentence that says why they can't be had."""
    try:
        if path == STANDARD_INPUT:
            data = sys.stdin.buffer.read(limit + 1)
        elif os.path.isdir(path):
            return "It is a folder."
        else:
            with open(path, "rb") as file:
                data = file.read(limit + 1)
    except OSError as error:
        return f"It can't be read: {reason(error)}."
    except ValueError as error:  # a path with a null character
        return f"It can't be read: {error}."
    if len(data) > limit:
        return f"It is larger than {limit:,} bytes, the most that is read."
    return data
