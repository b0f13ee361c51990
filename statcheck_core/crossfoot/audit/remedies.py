"""Single changes that make a whole claim agree, the likeliest slip first.

For each reading the others imply what it can be. What a slip could have made of something in that
range is proposed, put in the place of the reading, and kept if the whole claim then agrees. A
proposal's weight is that of the slips that explain it, each times the chance that it gives just
what is printed.
"""

from __future__ import annotations

import math
from collections.abc import Iterator, Sequence, Set
from typing import NamedTuple

from crossfoot.audit.case import Case, fits
from crossfoot.audit.faults import implied
from crossfoot.audit.habits import customary, usual
from crossfoot.audit.literals import Numeral, numerals
from crossfoot.audit.proposals import Printed, Proposal, Slip, span
from crossfoot.audit.slips import CROSSING, PLAIN, SIGNS, SLIPS
from crossfoot.audit.wording import are_marks
from crossfoot.laws.identity import mirror
from crossfoot.laws.interval import Interval, meet
from crossfoot.laws.quantities import domain, symbol
from crossfoot.model import Reading, Remedy

#: Remedies listed for a finding.
MOST = 5

#: Proposals are tried on the whole claim, the likeliest first, until so many are kept, or so many
#: steps of narrowing are taken; in a large table, as many as so many passes over it.
KEPT = 12
EFFORT = 1200
PASSES = 20

#: What is implied is wide if it holds more literals than this.
WIDE = 20

#: How likely a quantity is to be wrong, beside those that are not listed (common practice, no
#: source): counts have few digits, and everyone looks at them.
QUANTITY_WEIGHTS = {"n": 0.8, "df1": 0.6, "df2": 0.8, "df": 0.8, "k": 0.6, "ci_level": 0.2}


class Weighted(NamedTuple):
    """A remedy with its weight; ``plain`` is what follows from the rest, by no slip."""

    remedy: Remedy
    weight: float
    plain: bool


class _Candidate(NamedTuple):
    reading: int
    relation: str
    numeral: Numeral
    also: tuple[tuple[int, Numeral], ...]
    weight: float
    reason: str


def remedies(case: Case, cells: Set[int], skip: int = 0) -> list[Weighted]:
    """Return the single changes after which everything agrees, the likeliest first.

    Parameters
    ----------
    case
        The claim.
    cells
        Those of which one must change.
    skip
        Bits of steps that need not agree: those that fail for another reason.
    """
    found = sorted(_proposed(case, cells, skip), key=lambda candidate: -candidate.weight)
    kept = _agreeing(case, found, skip, [])
    # What follows from the rest is worth a try, however many slips come before it.
    plain = [candidate for candidate in found if candidate.reason == PLAIN.reason]
    kept += _agreeing(case, plain, skip, kept)
    return [
        Weighted(_remedy(case, candidate), candidate.weight, candidate.reason == PLAIN.reason)
        for candidate in kept
    ]


def _agreeing(
    case: Case, found: Sequence[_Candidate], skip: int, known: Sequence[_Candidate]
) -> list[_Candidate]:
    """Return the first candidates with which everything agrees, but for those that are known."""
    kept: list[_Candidate] = []
    effort = max(EFFORT, PASSES * case.plan.brief.bit_count())
    for candidate in found:
        if any(_same(candidate, other) for other in (*known, *kept)):
            continue
        agrees, taken = _tried(case, candidate, skip)
        effort -= taken
        if agrees:
            kept.append(candidate)
        if effort <= 0 or len(kept) == KEPT:
            break
    return kept


def _proposed(case: Case, cells: Set[int], skip: int) -> Iterator[_Candidate]:
    """Return what slips could have made into the readings of some cells."""
    literals = numerals(case.readings)
    minus = _minus(literals)
    used = (case.plan.strict | case.plan.doubtful) & ~skip
    every = frozenset(range(case.plan.printed))
    for index, (reading, literal) in enumerate(zip(case.claim.readings, literals, strict=False)):
        marks = are_marks(reading.quantity, reading.term)
        if case.at[index] not in cells or literal is None or marks:
            continue
        alone = False
        for order, side in enumerate(_sides(reading, literal)):
            possible = implied(case, case.at[index], used, every, side)
            printed = Printed(case.readings, literals, index, possible or side, minus)
            own = order == 0 or literal.value == 0
            slips = SLIPS if own else SIGNS if alone or _mirrored(printed) else CROSSING
            yield from _candidates(printed, slips, possible is not None)
            alone = alone or possible is not None


def _mirrored(printed: Printed) -> bool:
    """Say whether nothing but the sign of what is printed need be wrong."""
    return meet(mirror(span(printed.reading)), printed.implied) is not None


def _same(one: _Candidate, other: _Candidate) -> bool:
    """Say whether a candidate gives the number of another, if with other decimals by one slip."""
    if (one.reading, one.relation) != (other.reading, other.relation):
        return False
    apart = abs(one.numeral.value - other.numeral.value)
    coarser = max(one.numeral.unit, other.numeral.unit)
    alike = one.reason in (other.reason, PLAIN.reason)
    rounded = alike and one.numeral.unit != other.numeral.unit
    return apart <= coarser * (0.5 if rounded else 0) + 1e-12


def shortlist(changes: Sequence[Weighted], place: int) -> list[Weighted]:
    """Return the changes to show beside a finding that points at a reading.

    They are the likeliest; the last gives way to what follows for that reading, where that is
    determined and no slip explains it better.
    """
    shown = list(changes[:MOST])
    plain = [c for c in changes if c.plain and c.remedy.reading == place]
    if plain and not any(c.remedy.reading == place for c in shown):
        shown[-1] = plain[0]
    return shown


def _sides(reading: Reading, literal: Numeral) -> list[Interval]:
    """Return the sides of zero on which a quantity can lie, that of the literal first."""
    low, high = domain(reading.quantity)
    if low >= 0:
        return [Interval(low, high)]
    sides = [Interval(0.0, high), Interval(low, 0.0)]
    return sides[::-1] if literal.value < 0 else sides


def _minus(literals: Sequence[Numeral | None]) -> str:
    """Return the minus sign that the author uses."""
    signs = [n.sign for n in literals if n is not None and n.sign not in ("", "+")]
    return signs[0] if signs else "-"


def _candidates(printed: Printed, slips: Sequence[Slip], alone: bool) -> Iterator[_Candidate]:
    """Return what slips could have made into one reading.

    ``alone`` says whether a change of this reading alone can help.
    """
    merged: dict[tuple[object, ...], _Candidate] = {}
    best: dict[tuple[object, ...], float] = {}
    reading = printed.reading
    for slip in slips:
        for proposal in slip.undo(printed):
            if not proposal.also and not (alone and _possible(printed, proposal)):
                continue
            if not customary(printed, proposal):
                continue
            relation = proposal.relation or reading.relation
            key = (relation, proposal.numeral.text, proposal.also)
            weight = slip.weight * proposal.share * QUANTITY_WEIGHTS.get(reading.quantity, 1.0)
            weight *= _plausible(printed, proposal) * usual(printed, proposal)
            old = merged.get(key)
            total = weight + (old.weight if old else 0.0)
            reason = old.reason if old and best[key] >= weight else slip.reason
            best[key] = max(weight, best.get(key, 0.0))
            merged[key] = _Candidate(
                printed.place, relation, proposal.numeral, proposal.also, total, reason
            )
    same = (reading.relation, printed.numeral.text, ())
    return (candidate for key, candidate in merged.items() if key != same)


def _possible(printed: Printed, proposal: Proposal) -> bool:
    """Say whether a proposal meets what is implied, which no part of what is printed does."""
    one = _interval(printed, proposal)
    low, high = span(printed.reading)
    return meet(one, printed.implied) is not None and not (low <= one.low and one.high <= high)


def _interval(printed: Printed, proposal: Proposal) -> Interval:
    relation = proposal.relation or printed.reading.relation
    return proposal.numeral.interval(relation, domain(printed.reading.quantity).low)


def _plausible(printed: Printed, proposal: Proposal) -> float:
    """Return how likely the rest makes a proposal, beside others of its kind.

    It is the part of what is implied that would print so; where that is wide, the smaller of two
    numbers is likelier, as it is where nothing is known of their order of magnitude.
    """
    if proposal.also:
        return 1.0
    one, other = _interval(printed, proposal), printed.implied
    common = meet(one, other)
    unit = printed.numeral.unit * 2 * printed.numeral.half
    narrower = min(unit, other.high - other.low)
    size, old = abs(proposal.numeral.value), abs(printed.numeral.value)
    wide = other.high - other.low > WIDE * unit and 0 < old < size
    order = old / size if wide else 1.0
    exact = one.low == one.high
    if common is None or exact or not 0 < narrower < math.inf or proposal.relation:
        return order
    part = max((common.high - common.low) / narrower, 0.02)
    return order * (min(1.0, part) if proposal.rounded else part)


def _tried(case: Case, candidate: _Candidate, skip: int) -> tuple[bool, int]:
    """Return whether everything agrees with a candidate in place, and how many steps it took."""
    reading = case.readings[candidate.reading]
    changes = [
        (
            case.at[candidate.reading],
            candidate.numeral.interval(candidate.relation, domain(reading.quantity).low),
        ),
        *((case.at[index], other.interval("=")) for index, other in candidate.also),
    ]
    return fits(case, changes, skip)


def _remedy(case: Case, candidate: _Candidate) -> Remedy:
    reading = case.readings[candidate.reading]
    literal = candidate.numeral.text
    if candidate.relation != reading.relation:
        literal = f"{candidate.relation} {literal}"
    also = tuple((index, other.text) for index, other in candidate.also)
    reason = candidate.reason
    for index, text in also:
        reason += f", so that {symbol(case.readings[index].quantity)} = {text}"
    return Remedy(candidate.reading, reading.quantity, literal, reason, also)
