"""A document's results in a line, and in a few."""

from __future__ import annotations

from crossfoot.model import SEVERITIES, Report
from crossfoot.output.tally import EMPTY, FATES, add, counted
from crossfoot_lsp.lookup import span_of
from crossfoot_lsp.snapshot import Snapshot


def headline(report: Report) -> str:
    """Return how many results a document has and what became of them."""
    tally = add(EMPTY, report)
    fates = [f"{count} {FATES[name][count != 1]}" for name, count in tally.claims.items() if count]
    return f"Crossfoot: {counted(tally.results, 'result')}" + (
        f": {', '.join(fates)}" * bool(fates)
    )


def summary(snapshot: Snapshot, report: Report) -> str:
    """Return the headline and a line for each finding, the strongest first."""
    lines = []
    for placed in report.claims:
        for finding in placed.audited.findings:
            if finding.settled is None:
                span = span_of(placed, finding.reading)
                part = snapshot.part_at(span.start)
                line = part.range(span).start.line + 1
                lines.append((SEVERITIES.index(finding.severity), span.start, line, finding))
    lines.sort(key=lambda item: item[:2])
    words = [f"Line {line}, {f.severity} ({f.identity}): {f.message}" for _, _, line, f in lines]
    return "\n".join([headline(report), *words])
