"""Text for people: each finding as an entry that can be pasted into a report as it stands.

An entry says where, how strongly, what is printed, what follows from the rest, and what would
explain it. The words around the reading are quoted with the reading between « and ».
"""

from __future__ import annotations

from collections.abc import Iterable, Iterator

from crossfoot.model import Finding, Placed, Report
from crossfoot.output.output import Look, Output
from crossfoot.output.tally import EMPTY, add, closing
from crossfoot.output.wrapping import wrapped

CAUTION = (
    "A disagreement is a question to the authors, not a verdict on anyone. Where it matters, "
    "put it to a qualified statistician."
)


def write(reports: Iterable[Report], look: Look) -> Iterator[str]:
    """Write an entry for each finding, then the counts and the caution."""
    tally = EMPTY
    number = 0
    for report in reports:
        tally = add(tally, report)
        for placed in report.claims:
            for findings in _together(placed, look):
                from crossfoot.output.entry import entry  # not for what finds nothing

                number += 1
                yield entry(report.document, placed, findings, number, look) + "\n"
    yield "\n".join(wrapped(closing(tally), look.width)) + "\n"
    if number:
        yield "\n".join(wrapped(CAUTION, look.width)) + "\n"


def _together(placed: Placed, look: Look) -> list[list[Finding]]:
    """Return the findings to list, those of one severity about one reading together."""
    groups: dict[tuple[int, str, str | None], list[Finding]] = {}
    for finding in placed.audited.findings:
        if finding.settled is None or look.explain:
            key = (finding.reading, finding.severity, finding.settled)
            groups.setdefault(key, []).append(finding)
    return list(groups.values())


OUTPUT = Output("text", "entries for people to read or to paste into a report", write)
