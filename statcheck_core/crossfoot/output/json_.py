"""JSON: one object for the whole scan, a document a line.

Everything outside ASCII is written as an escape, so that the text is the same in any encoding
and no character of a document reaches a terminal.
"""

from __future__ import annotations

import json
from collections.abc import Iterable, Iterator

from crossfoot.model import Report
from crossfoot.output.output import Look, Output
from crossfoot.output.records import SCHEMA, document_record
from crossfoot.version import __version__


def write(reports: Iterable[Report], look: Look) -> Iterator[str]:
    """Write the object piece by piece, so that many documents need no memory at once."""
    head = json.dumps({"crossfoot": __version__, "schema": SCHEMA})[:-1]
    yield head + ', "documents": ['
    separator = "\n"
    for report in reports:
        yield separator + line(report)
        separator = ",\n"
    yield "\n]}\n"


def line(report: Report) -> str:
    """Return the object of one document, on one line."""
    return json.dumps(document_record(report), allow_nan=False)


OUTPUT = Output("json", "one JSON object with all documents, for programs", write)
