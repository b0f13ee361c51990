"""How far what is read and found agrees with the labels."""

from __future__ import annotations

import re
from collections.abc import Iterable, Sequence
from functools import cache
from typing import NamedTuple

import crossfoot
from crossfoot.model import Claim, Finding, Placed
from forms.corpus import Entry, entries
from forms.matching import Match, matches

# Human readers take the row of the intercept or leave it.
_INTERCEPT = re.compile(r"\W?(?:intercept|constant|_?cons|const|C)\b(?! \w)", re.IGNORECASE)
_LOUD = ("reversal", "conflict")
_HEARD = ("reversal", "conflict", "doubt")


class Outcome(NamedTuple):
    """What became of one entry.

    Attributes
    ----------
    matches
        One for each claim a human reader takes.
    extra
        Claims read that no human reader takes, intercepts aside.
    alarms
        Conflicts and reversals about numbers that can all be true, and doubts too where the text
        leaves none.
    caught
        For a planted error: the severity of the strongest finding about its claim, or "".
    unseen
        Contexts that the text states and no matched claim carries.
    """

    entry: Entry
    matches: tuple[Match, ...]
    extra: tuple[str, ...]
    alarms: tuple[str, ...]
    caught: str
    unseen: frozenset[str]

    @property
    def phantom(self) -> bool:
        return self.entry.holds_nothing and bool(self.extra)

    @property
    def missed(self) -> bool:
        """Whether anything is not as a human reader would have it."""
        return (
            self.phantom
            or bool(self.alarms)
            or not all(match.whole for match in self.matches)
            or (self.entry.wrong is not None and not self.caught)
        )


def outcomes() -> tuple[Outcome, ...]:
    """Scan every entry."""
    return tuple(outcome(entry) for entry in entries())


@cache
def outcome(entry: Entry) -> Outcome:
    """Scan one entry and compare; remembered."""
    placed = crossfoot.scan_text(entry.text, entry.language).reports[0].claims
    claims = [item.audited.claim for item in placed]
    found = matches(entry, claims)
    used = {match.claim for match in found}
    left = [c for i, c in enumerate(claims) if i not in used and not _INTERCEPT.match(c.text)]
    left = left if entry.labelled else []
    wrong = None if entry.wrong is None else found[entry.wrong].claim
    context = {name for index in used if index is not None for name in claims[index].context}
    return Outcome(
        entry,
        tuple(found),
        tuple(f"{claim.kind} {claim.text}" for claim in left),
        tuple(_alarms(entry, placed, wrong)),
        _strongest(placed[wrong].audited.findings) if wrong is not None else "",
        entry.context - context,
    )


def _alarms(entry: Entry, placed: Sequence[Placed], wrong: int | None) -> Iterable[str]:
    """Name the findings about claims that the planted error, if any, does not touch.

    Where a planted error's claim was not read, nothing is known about the others.
    """
    if not entry.consistent and wrong is None:
        return
    heard = _LOUD if entry.labelled else _HEARD
    for index, item in enumerate(placed):
        if index == wrong or _touched(entry, item.audited.claim):
            continue
        for finding in item.audited.findings:
            if finding.severity in heard:
                yield f"{finding.identity}: {finding.message}"


def _touched(entry: Entry, claim: Claim) -> bool:
    """Tell whether a claim leans on the planted error, which stands elsewhere."""
    planted = entry.planted
    return planted is not None and any(r.literal == planted.literal for r in claim.given)


def _strongest(findings: Iterable[Finding]) -> str:
    heard = {finding.severity for finding in findings}
    return next((severity for severity in _HEARD if severity in heard), "")


class Tally(NamedTuple):
    """Sums over several outcomes."""

    entries: int
    claims: int
    whole: int
    readings: int
    read: int
    lookalikes: int
    phantoms: int
    extra: int
    alarms: int
    planted: int
    caught: int
    loud: int

    @property
    def wholes(self) -> float:
        return self.whole / self.claims if self.claims else 1.0

    @property
    def catches(self) -> float:
        return self.caught / self.planted if self.planted else 1.0


def tally(chosen: Iterable[Outcome]) -> Tally:
    """Add up outcomes."""
    chosen = list(chosen)
    taken = [match for o in chosen for match in o.matches]
    wanted = sum(len(claim) for o in chosen for claim in o.entry.claims)
    planted = [o for o in chosen if o.entry.wrong is not None]
    return Tally(
        entries=len(chosen),
        claims=len(taken),
        whole=sum(match.whole for match in taken),
        readings=wanted,
        read=wanted - sum(len(match.missed) for match in taken),
        lookalikes=sum(o.entry.holds_nothing for o in chosen),
        phantoms=sum(o.phantom for o in chosen),
        extra=sum(len(o.extra) for o in chosen if not o.entry.holds_nothing),
        alarms=sum(len(o.alarms) for o in chosen),
        planted=len(planted),
        caught=sum(bool(o.caught) for o in planted),
        loud=sum(o.caught in _LOUD for o in planted),
    )
