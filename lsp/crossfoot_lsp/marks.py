"""Findings as the protocol's diagnostics."""

from __future__ import annotations

import json
import re
from collections.abc import Mapping, Sequence
from typing import Any, NamedTuple

from lsprotocol import types

from crossfoot.laws.quantities import symbol
from crossfoot.model import Audited, Finding, Placed, Report
from crossfoot_lsp.client import Manner
from crossfoot_lsp.lookup import all_readings, span_of
from crossfoot_lsp.raw import Raw
from crossfoot_lsp.snapshot import Part, Snapshot

#: What stands behind each of our severities in an editor.
SEVERITIES: Mapping[str, types.DiagnosticSeverity] = {
    "reversal": types.DiagnosticSeverity.Error,
    "conflict": types.DiagnosticSeverity.Error,
    "doubt": types.DiagnosticSeverity.Warning,
    "note": types.DiagnosticSeverity.Information,
}

SOURCE = "crossfoot"

#: The code of a remark that could not be understood.
REMARK = "remark"


def diagnostics_of(
    snapshot: Snapshot, part: Part, report: Report, shown: frozenset[str], manner: Manner
) -> list[types.Diagnostic]:
    """Return what is to be shown in one text.

    Parameters
    ----------
    snapshot, part
        The version, and the text of it.
    report
        The report on it.
    shown
        The severities to show.
    manner
        How the editor shows them.
    """
    marks = []
    for placed in report.claims:
        for finding in _visible(part, placed, shown):
            marks.append(_mark(snapshot, part, placed, finding, manner))
    return [*marks, *_remarks(part, report)]


def _visible(part: Part, placed: Placed, shown: frozenset[str]) -> list[Finding]:
    """Return the findings about a claim that are to be shown in a text."""
    return [
        finding
        for finding in placed.audited.findings
        if finding.settled is None
        and finding.severity in shown
        and part.start <= span_of(placed, finding.reading).start <= part.end
    ]


def _remarks(part: Part, report: Report) -> list[types.Diagnostic]:
    """Return what is wrong with remarks in a text."""
    return [
        types.Diagnostic(
            part.range(problem.span),
            problem.message,
            types.DiagnosticSeverity.Warning,
            code=REMARK,
            source=SOURCE,
        )
        for problem in report.document.problems
        if problem.span is not None and part.start <= problem.span.start <= part.end
    ]


def _mark(
    snapshot: Snapshot, part: Part, placed: Placed, finding: Finding, manner: Manner
) -> types.Diagnostic:
    return types.Diagnostic(
        part.range(span_of(placed, finding.reading)),
        finding.message,
        SEVERITIES[finding.severity],
        code=finding.identity,
        code_description=_described(finding.identity) if manner.linked else None,
        source=SOURCE,
        related_information=_related(snapshot, placed, finding) if manner.related else None,
    )


def _described(slug: str) -> types.CodeDescription | None:
    from crossfoot_lsp.reference import link  # it needs all identities; most texts agree

    address = link(slug)
    return None if address is None else types.CodeDescription(address)


def _related(
    snapshot: Snapshot, placed: Placed, finding: Finding
) -> list[types.DiagnosticRelatedInformation] | None:
    readings = all_readings(placed.audited.claim)
    places = []
    for index in finding.related:
        reading = readings[index]
        words = f"{symbol(reading.quantity)} {reading.relation} {reading.literal}"
        location = snapshot.location(span_of(placed, index))
        places.append(types.DiagnosticRelatedInformation(location, words))
    for span in finding.elsewhere:
        words = "printed here"
        places.append(types.DiagnosticRelatedInformation(snapshot.location(span), words))
    return places or None


class _Written(NamedTuple):
    """The diagnostics of one claim as JSON, whatever line the claim's block starts in.

    Attributes
    ----------
    audited
        The claim; kept, so that nothing else can have its identity.
    column
        The column in which its block starts.
    pieces
        Text, and between its pieces the numbers of lines, counted from the block's first.
    """

    audited: Audited
    column: int
    pieces: tuple[str | int, ...]


_LINE = re.compile('"@(-?[0-9]+)@"')


class Marker:
    """Writes the diagnostics of texts, and remembers how those of a claim are written.

    Most of the time between an edit and its diagnostics would else go into turning hundreds of
    unchanged ones into JSON again; a claim that an edit moved only has other lines.

    Parameters
    ----------
    converter
        Turns the protocol's types into plain dictionaries.
    """

    def __init__(self, converter: Any) -> None:
        self._converter = converter
        self._known: dict[str, tuple[frozenset[str], dict[int, _Written]]] = {}

    def forget(self, uri: str) -> None:
        """Forget a text."""
        self._known.pop(uri, None)

    def written(
        self, snapshot: Snapshot, part: Part, report: Report, shown: frozenset[str], manner: Manner
    ) -> Raw:
        """Return the same as :func:`diagnostics_of`, as JSON."""
        before, old = self._known.get(part.uri, (shown, {}))
        if before != shown:
            old = {}
        new: dict[int, _Written] = {}
        items: list[str] = []
        for placed in report.claims:
            audited = placed.audited
            if not audited.findings:
                continue
            line, column = part.text.place(placed.base - part.start)
            known = old.get(id(audited))
            if known is None or known.audited is not audited or known.column != column:
                findings = _visible(part, placed, shown)
                marks = [_mark(snapshot, part, placed, f, manner) for f in findings]
                known = _Written(audited, column, self._pieces(marks, line))
                if any(finding.elsewhere for finding in findings):
                    items.append(_joined(known.pieces, line))
                    continue  # it speaks of other places, which move by themselves
            new[id(audited)] = known
            items.append(_joined(known.pieces, line))
        self._known[part.uri] = (shown, new)
        items.append(_joined(self._pieces(_remarks(part, report), 0), 0))
        return Raw(f"[{','.join(filter(None, items))}]")

    def plain(self, marks: Sequence[types.Diagnostic]) -> Raw:
        """Return diagnostics as JSON."""
        return Raw(json.dumps(self._converter.unstructure(list(marks)), separators=(",", ":")))

    def _pieces(self, marks: list[types.Diagnostic], line: int) -> tuple[str | int, ...]:
        plain = [_counted(self._converter.unstructure(mark), line) for mark in marks]
        parts = _LINE.split(json.dumps(plain, separators=(",", ":"))[1:-1])
        return tuple(int(part) if number % 2 else part for number, part in enumerate(parts))


def _counted(value: Any, line: int) -> Any:
    """Return JSON in which each line is a mark with its distance from another line."""
    if isinstance(value, dict):
        return {
            key: f"@{inner - line}@" if key == "line" else _counted(inner, line)
            for key, inner in value.items()
        }
    return [_counted(inner, line) for inner in value] if isinstance(value, list) else value


def _joined(pieces: tuple[str | int, ...], line: int) -> str:
    return "".join([str(p + line) if isinstance(p, int) else p for p in pieces])
