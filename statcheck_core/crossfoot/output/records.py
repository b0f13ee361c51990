"""Reports as plain dictionaries: the one shape behind JSON, JSONL, the library and its frames.

The keys are a contract; they are added to, never renamed. Places are looked up here, so that
whoever receives a record needs no document.
"""

from __future__ import annotations

import math
from typing import TypedDict

from crossfoot.model import Check, Document, Finding, Placed, Reading, Remedy, Report, Span
from crossfoot.places import Position, where

#: Changes when a key changes its meaning or goes away.
SCHEMA = 1


class PositionRecord(TypedDict):
    """A line and a column, from 1, in code points."""

    line: int
    column: int


class WhereRecord(TypedDict):
    """A place; ``page`` is None in a document without pages."""

    page: int | None
    start: PositionRecord
    end: PositionRecord


class ReadingRecord(TypedDict):
    """One number as printed; an infinite bound is None."""

    quantity: str
    term: str | None
    relation: str
    literal: str
    low: float | None
    high: float | None
    where: WhereRecord


class CheckRecord(TypedDict):
    """What became of one identity on a claim."""

    identity: str
    outcome: str
    reason: str


class ClaimRecord(TypedDict):
    """The readings that describe one model, test or table row."""

    id: str
    kind: str
    label: str
    text: str
    where: WhereRecord
    readings: list[ReadingRecord]
    context: list[str]
    checks: list[CheckRecord]


class IntervalRecord(TypedDict):
    """An interval; an infinite bound is None."""

    low: float | None
    high: float | None


class RemedyRecord(TypedDict):
    """One change to one reading that makes the whole claim agree."""

    quantity: str
    literal: str
    reason: str


class FindingRecord(TypedDict):
    """A finding about one claim, at the reading it points at."""

    identity: str
    severity: str
    claim: str
    message: str
    where: WhereRecord
    quantity: str
    literal: str
    recomputed: IntervalRecord | None
    remedies: list[RemedyRecord]
    related: list[WhereRecord]
    working: list[str]
    settled: str | None


class DocumentRecord(TypedDict):
    """All that was found in one document.

    ``problem`` says why an ``unreadable`` document could not be read; on a document that was
    read it says what in it could not be.
    """

    path: str
    status: str
    problem: str | None
    claims: list[ClaimRecord]
    findings: list[FindingRecord]


class ScanRecord(TypedDict):
    """The whole of ``--format json``."""

    crossfoot: str
    schema: int
    documents: list[DocumentRecord]


def document_record(report: Report) -> DocumentRecord:
    """Return what was found in one document as plain dictionaries."""
    document = report.document
    return {
        "path": document.path,
        "status": "read" if report.problem is None else "unreadable",
        "problem": problem_of(report),
        "claims": [claim_record(document, placed) for placed in report.claims],
        "findings": [
            finding_record(document, placed, finding)
            for placed in report.claims
            for finding in placed.audited.findings
        ],
    }


def problem_of(report: Report) -> str | None:
    """Return what could not be read, as one sentence or several, or None."""
    if report.problem is not None:
        return report.problem
    return " ".join(problem.message for problem in report.document.problems) or None


def claim_record(document: Document, placed: Placed) -> ClaimRecord:
    """Return a claim with its readings and what became of each identity."""
    claim = placed.audited.claim
    return {
        "id": placed.id,
        "kind": claim.kind,
        "label": claim.label,
        "text": claim.text,
        "where": where_record(document, placed.base, claim.span),
        "readings": [reading_record(document, placed.base, item) for item in claim.readings],
        "context": list(claim.context),
        "checks": [check_record(check) for check in placed.audited.checks],
    }


def reading_record(document: Document, base: int, reading: Reading) -> ReadingRecord:
    """Return a reading of a claim that stands ``base`` code points into the document."""
    return {
        "quantity": reading.quantity,
        "term": reading.term,
        "relation": reading.relation,
        "literal": reading.literal,
        "low": finite(reading.low),
        "high": finite(reading.high),
        "where": where_record(document, base, reading.span),
    }


def check_record(check: Check) -> CheckRecord:
    """Return what became of one identity."""
    return {"identity": check.identity, "outcome": check.outcome, "reason": check.reason}


def finding_record(document: Document, placed: Placed, finding: Finding) -> FindingRecord:
    """Return a finding about a claim."""
    claim = placed.audited.claim
    readings = (*claim.readings, *claim.given)
    subject = readings[finding.reading]
    spans = [(placed.base, readings[index].span) for index in finding.related]
    spans += [(0, span) for span in finding.elsewhere]
    return {
        "identity": finding.identity,
        "severity": finding.severity,
        "claim": placed.id,
        "message": finding.message,
        "where": where_record(document, placed.base, subject.span),
        "quantity": subject.quantity,
        "literal": subject.literal,
        "recomputed": interval_record(finding.recomputed),
        "remedies": [remedy_record(remedy) for remedy in finding.remedies],
        "related": [where_record(document, base, span) for base, span in spans],
        "working": list(finding.working),
        "settled": finding.settled,
    }


def remedy_record(remedy: Remedy) -> RemedyRecord:
    """Return one change that makes a claim agree."""
    return {"quantity": remedy.quantity, "literal": remedy.literal, "reason": remedy.reason}


def interval_record(interval: tuple[float, float] | None) -> IntervalRecord | None:
    """Return an interval, or None where there is none."""
    if interval is None:
        return None
    return {"low": finite(interval[0]), "high": finite(interval[1])}


def where_record(document: Document, base: int, span: Span) -> WhereRecord:
    """Return the place of a span that counts from ``base``."""
    place = where(document, Span(span.start + base, span.end + base))
    return {
        "page": place.page,
        "start": _position_record(place.start),
        "end": _position_record(place.end),
    }


def _position_record(position: Position) -> PositionRecord:
    return {"line": position.line, "column": position.column}


def finite(value: float) -> float | None:
    """Return a bound, or None for an infinite one: JSON has no infinity."""
    return value if math.isfinite(value) else None
