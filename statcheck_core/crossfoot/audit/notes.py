"""Notes: what can't be so as printed though nothing disagrees, or says less than it should."""

from __future__ import annotations

from collections.abc import Iterator

from crossfoot.audit.case import NOTHING
from crossfoot.audit.literals import Numeral, numeral
from crossfoot.audit.wording import between, listed, named, printed
from crossfoot.laws import IDENTITIES
from crossfoot.laws.interval import Interval
from crossfoot.laws.quantities import symbol
from crossfoot.model import Claim, Finding, Reading, Remedy

#: For each kind its statistic, the identity that gives p from it, and what that needs, each with
#: its alternatives. The degrees of freedom of a coefficient stand with its model.
_NEEDS: dict[str, tuple[str, str, tuple[tuple[str, ...], ...]]] = {
    "overall-model": ("F", "p-from-f", (("df1",), ("df2",))),
    "effect": ("F", "p-from-f", (("df1",), ("df2",))),
    "model-change": ("F_change", "p-from-f", (("df1",), ("df2",))),
    "mean-comparison": ("t", "p-from-t", (("df", "n"),)),
    "correlation": ("r", "p-from-r", (("df", "n"),)),
    "frequency": ("chi2", "p-from-chi2", (("df",),)),
}
_SILENT = ("joint", "resampled", "quoted")


def notes(claim: Claim) -> list[Finding]:
    """Return the notes on a claim; each is sure, whatever the other numbers are."""
    return [*_zero_p(claim), *_without_freedom(claim)]


def _zero_p(claim: Claim) -> Iterator[Finding]:
    for index, reading in enumerate(claim.readings):
        literal = numeral(reading) if _may_be_zero(reading) else None
        if literal is None or literal.value != 0 or reading.relation in ">≥":
            continue
        name = named(reading)
        if reading.relation in "<≤":
            message = f"{name} is printed as {reading.relation} {reading.literal}, but no p value "
            working = (f"Printed: {printed(reading)}", "Formula: 0 ≤ p ≤ 1")
            yield Finding("bounds", "note", message + "lies below zero.", index, working=working)
        else:
            most = between(Interval(0.0, reading.high), literal)
            message = (
                f"{name} is printed as {reading.literal}, but no p value is zero; rounded so, "
            )
            yield Finding(
                "bounds",
                "note",
                f"{message}it is {most}.",
                index,
                (0.0, reading.high),
                _threshold(index, literal),
                working=(f"Printed: {name} = {reading.literal}, which stands for {name} {most}",),
            )


def _may_be_zero(reading: Reading) -> bool:
    """Say, without taking its literal apart, whether a reading can be a p of zero."""
    if reading.quantity != "p" or reading.low > 0:
        return False
    return reading.relation not in "<≤" or reading.high < NOTHING


def _threshold(index: int, literal: Numeral) -> tuple[Remedy, ...]:
    """Return the way to print a p that rounds to zero."""
    if not literal.fraction:
        return ()
    text = literal._replace(sign="", fraction=literal.fraction[:-1] + "1").text
    return (Remedy(index, "p", f"< {text}", "a p that rounds to zero"),)


def _without_freedom(claim: Claim) -> Iterator[Finding]:
    if claim.kind not in _NEEDS or any(key in claim.context for key in _SILENT):
        return
    statistic, slug, needed = _NEEDS[claim.kind]
    present = {reading.quantity for reading in (*claim.readings, *claim.given)}
    missing = [symbol(names[0]) for names in needed if present.isdisjoint(names)]
    for index, reading in enumerate(claim.readings):
        known = reading.quantity == statistic and reading.relation == "=" and "p" in present
        if known and missing:
            message = (
                f"{printed(reading)} is printed without {listed(missing)}, so that p can't be "
                "recomputed from it."
            )
            working = (
                f"Printed: {printed(reading)}",
                f"Not printed: {listed(missing)}",
                f"Formula: {IDENTITIES[slug].formula}",
            )
            yield Finding(slug, "note", message, index, working=working)
