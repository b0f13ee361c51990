"""What stands at a place of a document: the claim, the reading, what was found about it."""

from __future__ import annotations

from collections.abc import Iterator
from typing import NamedTuple

from crossfoot.model import Claim, Finding, Placed, Reading, Report, Span


class Spot(NamedTuple):
    """A reading where it stands; ``number`` is its place in the claim."""

    placed: Placed
    number: int

    @property
    def reading(self) -> Reading:
        """The reading."""
        return self.placed.audited.claim.readings[self.number]

    @property
    def span(self) -> Span:
        """Its place in the document."""
        return moved(self.reading.span, self.placed.base)


def moved(span: Span, base: int) -> Span:
    """Return a span that counts from ``base`` as one of the document."""
    return Span(span.start + base, span.end + base)


def claim_span(placed: Placed) -> Span:
    """Return the place of a claim in the document: from its first reading to its last."""
    return moved(placed.audited.claim.span, placed.base)


def readings_of(placed: Placed) -> Iterator[Spot]:
    """Return the readings of a claim."""
    return (Spot(placed, index) for index in range(len(placed.audited.claim.readings)))


def span_of(placed: Placed, index: int) -> Span:
    """Return the place of a reading, or of one that is given to a claim from elsewhere."""
    return moved(all_readings(placed.audited.claim)[index].span, placed.base)


def all_readings(claim: Claim) -> tuple[Reading, ...]:
    """Return a claim's readings, then those that are given to it."""
    return claim.readings + claim.given


def claims_at(report: Report, start: int, end: int) -> list[Placed]:
    """Return the claims that meet a stretch of the document."""
    return [
        placed
        for placed in report.claims
        if placed.base + placed.audited.claim.span.start <= end
        and start <= placed.base + placed.audited.claim.span.end
    ]


def spot_at(report: Report, offset: int) -> Spot | None:
    """Return the reading at a place; at the seam of two, the one that starts there."""
    found = None
    for placed in claims_at(report, offset, offset):
        for spot in readings_of(placed):
            start, end = spot.span
            if start <= offset < end:
                return spot
            if offset == end:
                found = spot
    return found


def claim_at(report: Report, offset: int) -> Placed | None:
    """Return the claim at a place: that of the reading there, else the narrowest around it."""
    spot = spot_at(report, offset)
    if spot is not None:
        return spot.placed
    around = claims_at(report, offset, offset)
    return min(around, key=_length, default=None)


def _length(placed: Placed) -> int:
    span = placed.audited.claim.span
    return span.end - span.start


def findings_at(spot: Spot) -> list[Finding]:
    """Return the findings that point at a reading or rest on it, those that point there first."""
    findings = spot.placed.audited.findings
    pointing = [finding for finding in findings if finding.reading == spot.number]
    resting = [finding for finding in findings if spot.number in finding.related]
    return pointing + resting
