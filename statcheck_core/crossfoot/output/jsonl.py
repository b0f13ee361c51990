"""JSON lines: a document a line, each as soon as it is done."""

from __future__ import annotations

from collections.abc import Iterable, Iterator

from crossfoot.model import Report
from crossfoot.output.json_ import line
from crossfoot.output.output import Look, Output


def write(reports: Iterable[Report], look: Look) -> Iterator[str]:
    """Write the object of each document, with a line feed after it."""
    for report in reports:
        yield line(report) + "\n"


OUTPUT = Output("jsonl", "a JSON object a line for each document, as they are done", write)
