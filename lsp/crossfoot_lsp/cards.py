"""What a hover says: about one number, or about the whole result that it is part of."""

from __future__ import annotations

import re
from collections.abc import Iterable, Iterator
from typing import NamedTuple

from crossfoot.audit import Derived, derive
from crossfoot.audit.literals import numeral
from crossfoot.audit.wording import PLAIN, between, phrase
from crossfoot.laws import IDENTITIES
from crossfoot.laws.assumptions import CONTEXTS
from crossfoot.laws.interval import Interval, meet
from crossfoot.laws.quantities import QUANTITIES, symbol
from crossfoot.model import Audited, Check, Claim, Finding, Placed, Reading
from crossfoot_lsp.lookup import Spot, all_readings, findings_at

_MARKUP = re.compile(r"([\\`*_{}\[\]<>#|~])")

#: What an outcome of a check is called.
_OUTCOMES = {"agrees": "agrees", "conflict": "disagrees", "doubt": "in doubt"}


class Card(NamedTuple):
    """Words about something.

    Attributes
    ----------
    title
        What it is.
    sections
        Pairs of a heading, which may be empty, and lines.
    """

    title: str
    sections: tuple[tuple[str, tuple[str, ...]], ...]

    @property
    def markdown(self) -> str:
        """The card as Markdown; what it quotes can do nothing there."""
        parts = [f"**{_escaped(self.title)}**"]
        for heading, lines in self.sections:
            if heading:
                items = "\n".join(f"- {_escaped(line)}" for line in lines)
                parts.append(f"*{_escaped(heading)}*\n\n{items}")
            else:
                parts += [_escaped(line) for line in lines]
        return "\n\n".join(parts)

    @property
    def plain(self) -> str:
        """The card as plain text."""
        parts = [self.title]
        for heading, lines in self.sections:
            if heading:
                parts += ["", f"{heading}:", *(f"  {line}" for line in lines)]
            else:
                parts += lines
        return "\n".join(parts)


def _escaped(text: str) -> str:
    return _MARKUP.sub(r"\\\1", " ".join(text.split()))


def card_of_reading(spot: Spot, marked: bool = False) -> Card:
    """Return what is to be said about one number.

    Parameters
    ----------
    spot
        The number.
    marked
        Whether what is found about it stands beside the card already.
    """
    reading, claim = spot.reading, spot.placed.audited.claim
    quantity = QUANTITIES[reading.quantity]
    sections: list[tuple[str, tuple[str, ...]]] = []
    derived = implied(claim, spot.number)
    if derived is not None:
        sections.append(("", tuple(_follows(claim, spot.number, derived))))
    for finding in findings_at(spot):
        told = marked and finding.reading == spot.number and finding.settled is None
        words = () if told else (finding.message,)
        sections.append((_verdict(finding), (*words, *_remedies(claim, finding))))
        if derived is None and finding.working:
            sections.append(("Working", finding.working))
    if derived is not None:
        sections.append(("Working", derived.working))
        if derived.assumed:
            sections.append(("Assumed, not stated in the text", derived.assumed))
    sections += list(_checks(spot.placed.audited, reading.quantity))
    about = f"{_capital(quantity.name)}. {quantity.description}"
    sections.append(("About", tuple(filter(None, (about, _stands_for(reading))))))
    return Card(_printed(reading), tuple(sections))


def implied(claim: Claim, index: int) -> Derived | None:
    """Return what the other numbers of a claim say about one of them."""
    quantity = claim.readings[index].quantity
    rest = claim.readings[:index] + claim.readings[index + 1 :]
    if any(other.quantity == quantity for other in rest):
        return None  # printed twice: what follows would follow from itself
    found = [
        item for item in derive(claim._replace(readings=rest)).derived if item.quantity == quantity
    ]
    return found[0] if len(found) == 1 else None


def _follows(claim: Claim, index: int, derived: Derived) -> Iterator[str]:
    """Yield the sentence that sets what is printed against what follows."""
    reading = claim.readings[index]
    others = claim.readings[:index] + claim.readings[index + 1 :]
    like = numeral(reading) or PLAIN
    interval = Interval(derived.low, derived.high)
    printed = Interval(reading.low, reading.high)
    common = meet(interval, printed)
    shown = between(interval, like, printed if common is None else None)
    verdict = "as printed" if common is not None else "not as printed"
    yield f"Given {phrase(others)}, it must be {shown.removeprefix('= ')}: {verdict}."


def _stands_for(reading: Reading) -> str:
    if reading.low >= reading.high or reading.relation != "=":
        return ""
    shown = between(Interval(reading.low, reading.high), numeral(reading) or PLAIN)
    return f"As rounded, it stands for a value {shown}."


def _remedies(claim: Claim, finding: Finding) -> Iterator[str]:
    for remedy in finding.remedies:
        old = claim.readings[remedy.reading]
        relation = "" if remedy.literal[:1] in tuple("=<>≤≥≈") else f"{old.relation} "
        change = f"{symbol(remedy.quantity)} {relation}{remedy.literal}"
        yield f"It would agree with {change} ({remedy.reason})."


def _checks(audited: Audited, quantity: str) -> Iterator[tuple[str, tuple[str, ...]]]:
    lines = []
    for check in audited.checks:
        identity = IDENTITIES[check.identity]
        if _tells(audited.claim, check, quantity):
            source = f" Source: {identity.source}.".replace("..", ".") if identity.source else ""
            outcome = _OUTCOMES[check.outcome]
            lines.append(f"{check.identity}, {outcome}: {identity.formula}.{source}")
    if lines:
        yield "Checked by", tuple(lines)


def _tells(claim: Claim, check: Check, quantity: str | None = None) -> bool:
    """Say whether a check is worth telling of a quantity, or of a claim as a whole.

    That a number is one that its quantity can have at all is not, as long as it is.
    """
    if check.outcome != "agrees":
        return check.outcome in _OUTCOMES and _speaks_of(check.identity, quantity)
    printed = {reading.quantity for reading in all_readings(claim)}
    return any(
        form.takes and {form.gives, *form.takes} <= printed
        for form in IDENTITIES[check.identity].forms
        if quantity is None or quantity in (form.gives, *form.takes)
    )


def _speaks_of(slug: str, quantity: str | None) -> bool:
    identity = IDENTITIES[slug]
    return quantity is None or any(
        quantity in quantities
        for quantities in (
            identity.quantities,
            *((form.gives, *form.takes) for form in identity.forms),
        )
    )


def card_of_claim(placed: Placed) -> Card:
    """Return what is to be said about a result as a whole."""
    audited = placed.audited
    claim = audited.claim
    lines = [f"{_capital(claim.kind.replace('-', ' '))}: {claim.text}"]
    lines += [CONTEXTS[key] for key in claim.context if key in CONTEXTS]
    sections: list[tuple[str, tuple[str, ...]]] = [("", tuple(lines))]
    for finding in audited.findings:
        sections.append((_verdict(finding), (finding.message, *_remedies(claim, finding))))
    spoken = [c for c in audited.checks if _tells(claim, c)]
    if spoken:
        sections.append(
            (
                "Checked by",
                tuple(
                    f"{c.identity}, {_OUTCOMES[c.outcome]}: {IDENTITIES[c.identity].formula}"
                    for c in spoken
                ),
            )
        )
    silent = [c for c in audited.checks if c.outcome not in _OUTCOMES and c.reason]
    if silent:
        sections.append(("Not checked", tuple(f"{c.identity}: {c.reason}" for c in silent)))
    return Card(claim.label, tuple(sections))


def working_card(claim: Claim, title: str, derived: Iterable[Derived]) -> Card:
    """Return how numbers follow from a result."""
    derived = tuple(derived)
    lines = tuple(line for item in derived for line in item.working)
    assumed = tuple(dict.fromkeys(text for item in derived for text in item.assumed))
    sections: list[tuple[str, tuple[str, ...]]] = [
        ("", (f"Follows from {phrase(claim.readings)}.",)),
        ("Working", lines),
    ]
    if assumed:
        sections.append(("Assumed, not stated in the text", assumed))
    return Card(title, tuple(sections))


def _verdict(finding: Finding) -> str:
    words = f"{_capital(finding.severity)} ({finding.identity})"
    return words if finding.settled is None else f"{words}, settled: {finding.settled}"


def _printed(reading: Reading) -> str:
    term = f" ({reading.term})" if reading.term else ""
    return f"{symbol(reading.quantity)}{term} {reading.relation} {reading.literal}"


def _capital(text: str) -> str:
    return text[:1].upper() + text[1:]
