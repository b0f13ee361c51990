"""Mentions: the claims of a document that speak of one and the same model or test."""

from __future__ import annotations

from collections import Counter

from crossfoot.model import Claim, Placed, Reading, Report

#: Two claims without one of these in common speak of different things.
_STATISTICS = frozenset({"F", "F_change", "t", "z", "chi2", "r", "R2", "b"})

#: Numbers that both must share, the statistic among them, to be about the same.
_SHARED = 2


def mentions(report: Report, placed: Placed) -> list[Placed]:
    """Return the claims that speak of what a claim speaks of, itself among them, in order.

    Two claims do if a finding sets one against the other, or if they share a statistic and
    another number at least, and no number that both print is printed differently.
    """
    pointed = _pointed_at(report, placed)
    return [
        other
        for other in report.claims
        if other.id == placed.id
        or other.id in pointed
        or placed.id in _pointed_at(report, other)
        or alike(placed.audited.claim, other.audited.claim)
    ]


def fullest(group: list[Placed]) -> Placed:
    """Return the mention that says most; of several the first."""
    return max(group, key=lambda item: len(item.audited.claim.readings))


def alike(first: Claim, second: Claim) -> bool:
    """Say whether two claims print the same statistic and nothing that differs."""
    here, there = single(first), single(second)
    common = here.keys() & there.keys()
    if len(common) < _SHARED or not common & _STATISTICS:
        return False
    return all(_meet(here[key], there[key]) for key in common)


def single(claim: Claim) -> dict[str, Reading]:
    """Return the readings of which there is one of their quantity."""
    found = {reading.quantity: reading for reading in claim.readings}
    if len(found) == len(claim.readings):
        return found
    times = Counter(reading.quantity for reading in claim.readings)
    return {key: reading for key, reading in found.items() if times[key] == 1}


def _meet(first: Reading, second: Reading) -> bool:
    return first.low <= second.high and second.low <= first.high


def _pointed_at(report: Report, placed: Placed) -> set[str]:
    """Return the claims in which the places lie that the findings about a claim refer to."""
    places = [span for finding in placed.audited.findings for span in finding.elsewhere]
    if not places:
        return set()
    return {
        other.id
        for other in report.claims
        for span in places
        if other.base + other.audited.claim.span.start <= span.start
        and span.end <= other.base + other.audited.claim.span.end
    }
