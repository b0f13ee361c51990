"""What follows from a result, as records and as text."""

from __future__ import annotations

from collections.abc import Iterator
from typing import TypedDict

from crossfoot.audit import Derived, derive
from crossfoot.audit.wording import between
from crossfoot.laws.interval import Interval
from crossfoot.laws.quantities import symbol
from crossfoot.model import Placed, Report
from crossfoot.output.entry import entry
from crossfoot.output.output import Look
from crossfoot.output.records import (
    SCHEMA,
    ClaimRecord,
    FindingRecord,
    claim_record,
    finding_record,
    finite,
)
from crossfoot.output.safe import one_line
from crossfoot.output.wrapping import wrapped
from crossfoot.version import __version__

NOTHING = "No result was recognised. Write one as a report would, such as “F(2, 57) = 4.31”."


class DerivedRecord(TypedDict):
    """A quantity that follows; an infinite bound is None.

    ``assumed`` holds what is assumed beyond what the text says, as sentences.
    """

    quantity: str
    low: float | None
    high: float | None
    working: list[str]
    assumed: list[str]


class ResultRecord(ClaimRecord):
    """A claim with what follows from it, and what in it disagrees."""

    derived: list[DerivedRecord]
    findings: list[FindingRecord]


class DerivationRecord(TypedDict):
    """The whole of ``derive --format json``."""

    crossfoot: str
    schema: int
    results: list[ResultRecord]


def derivation_record(report: Report) -> DerivationRecord:
    """Return what follows from each claim of a report, as the whole of the JSON output."""
    return {"crossfoot": __version__, "schema": SCHEMA, "results": result_records(report)}


def result_records(report: Report) -> list[ResultRecord]:
    """Return what follows from each claim of a report as plain dictionaries."""
    return [_result_record(report, placed) for placed in report.claims]


def _result_record(report: Report, placed: Placed) -> ResultRecord:
    audited = placed.audited
    return {
        **claim_record(report.document, placed),
        "derived": [_derived_record(item) for item in derive(audited.claim).derived],
        "findings": [finding_record(report.document, placed, item) for item in audited.findings],
    }


def _derived_record(item: Derived) -> DerivedRecord:
    return {
        "quantity": item.quantity,
        "low": finite(item.low),
        "high": finite(item.high),
        "working": list(item.working),
        "assumed": list(item.assumed),
    }


def write(report: Report, look: Look) -> Iterator[str]:
    """Write what follows from each claim, with the working, for people."""
    if not report.claims:
        yield "\n".join(wrapped(NOTHING, look.width)) + "\n"
    for number, placed in enumerate(report.claims):
        yield "\n" * (number > 0) + "\n".join(_lines(report, placed, look)) + "\n"


def _lines(report: Report, placed: Placed, look: Look) -> Iterator[str]:
    claim = placed.audited.claim
    findings = placed.audited.findings
    yield from wrapped(f"From {one_line(claim.text)}", look.width)
    for number, finding in enumerate(findings, 1):
        yield from ("", *entry(report.document, placed, [finding], number, look).splitlines())
    items = derive(claim).derived
    if not items and not findings:
        yield "  nothing else follows."
    for item in items:
        yield ""
        words = between(Interval(item.low, item.high))
        yield from wrapped(f"{symbol(item.quantity)} {words}", look.width, "  ", "    ")
        steps = [*item.working, *(f"Assumed, not stated: {text}" for text in item.assumed)]
        for step in steps:
            yield from wrapped(one_line(step), look.width, "    ", "      ")
