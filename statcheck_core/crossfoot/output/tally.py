"""How many results agree, in numbers that add up: each claim is counted once."""

from __future__ import annotations

from typing import NamedTuple

from crossfoot.model import SEVERITIES, Audited, Report

#: What can become of a claim, with the words of the closing line for one and for several.
FATES = {
    "agrees": ("agrees", "agree"),
    "disagrees": ("disagrees", "disagree"),
    "doubt": ("is in doubt", "are in doubt"),
    "settled": ("is settled", "are settled"),
    "unchecked": ("could not be checked", "could not be checked"),
}


class Tally(NamedTuple):
    """Counts over documents; ``claims`` has the keys of :data:`FATES`."""

    read: int
    unreadable: int
    claims: dict[str, int]

    @property
    def results(self) -> int:
        """The number of claims of whatever fate."""
        return sum(self.claims.values())


EMPTY = Tally(0, 0, dict.fromkeys(FATES, 0))


def add(tally: Tally, report: Report) -> Tally:
    """Return the counts with those of one more report."""
    if report.problem is not None:
        return tally._replace(unreadable=tally.unreadable + 1)
    claims = dict(tally.claims)
    for placed in report.claims:
        claims[fate(placed.audited)] += 1
    return tally._replace(read=tally.read + 1, claims=claims)


def fate(audited: Audited) -> str:
    """Return what became of a claim, a key of :data:`FATES`.

    The strongest finding that nobody has settled decides; a claim agrees when something was
    checked and nothing but notes came of it.
    """
    severities = {item.severity for item in audited.findings if item.settled is None}
    if severities & {"reversal", "conflict"}:
        return "disagrees"
    if "doubt" in severities:
        return "doubt"
    if any(item.settled is not None and item.severity != "note" for item in audited.findings):
        return "settled"
    return "agrees" if any(check.outcome == "agrees" for check in audited.checks) else "unchecked"


def fails(report: Report, fail_on: str) -> bool:
    """Tell whether an unsettled finding is at or above a severity; never, for ``never``."""
    if fail_on not in SEVERITIES:
        return False
    strong = SEVERITIES[: SEVERITIES.index(fail_on) + 1]
    return any(
        finding.severity in strong and finding.settled is None
        for placed in report.claims
        for finding in placed.audited.findings
    )


def closing(tally: Tally) -> str:
    """Return the counts as sentences.

    >>> closing(Tally(2, 0, {**EMPTY.claims, "agrees": 3, "doubt": 1}))
    '2 documents read, 4 results found: 3 agree, 1 is in doubt.'
    """
    documents = counted(tally.read, "document") + " read"
    if tally.unreadable:
        documents += f", {tally.unreadable} could not be read"
    if not tally.results:
        return f"{documents}, no reported result found."
    fates = [f"{count} {FATES[name][count != 1]}" for name, count in tally.claims.items() if count]
    return f"{documents}, {counted(tally.results, 'result')} found: {', '.join(fates)}."


def counted(number: int, noun: str) -> str:
    """Return a number with its noun in the right number."""
    return f"{number} {noun}{'' if number == 1 else 's'}"
