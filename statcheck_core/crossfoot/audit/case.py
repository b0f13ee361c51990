"""A claim made ready: its plan, the box of its readings, and whether all of them agree."""

from __future__ import annotations

from collections.abc import Iterable
from typing import NamedTuple

from crossfoot.audit.drafts import Shape
from crossfoot.audit.literals import numeral
from crossfoot.audit.narrow import narrow
from crossfoot.audit.plan import Plan, plan_for
from crossfoot.laws.interval import Interval, meet
from crossfoot.laws.quantities import QUANTITIES
from crossfoot.model import Check, Claim, Reading

#: A bound on p below this is a printed zero.
NOTHING = 1e-300

_FREEDOM = frozenset({"df", "df1", "df2"})


class Case(NamedTuple):
    """A claim with its plan.

    Attributes
    ----------
    claim, shape, plan
        What is audited, and how.
    readings
        The claim's own, then those that are given elsewhere.
    at
        For each reading the index of its cell.
    box
        An interval for each cell of the plan: what is printed, or what is known without that.
    """

    claim: Claim
    shape: Shape
    plan: Plan
    readings: tuple[Reading, ...]
    at: tuple[int, ...]
    box: tuple[Interval, ...]

    def reading_at(self, cell: int) -> int | None:
        """Return the index of the reading that is printed in a cell, if one is."""
        return self.at.index(cell) if cell < self.plan.printed else None

    def own_reading_at(self, cell: int) -> int | None:
        """Return the index of the claim's own reading in a cell, if there is one."""
        place = self.reading_at(cell)
        return place if place is not None and place < len(self.claim.readings) else None

    def readings_at(self, cells: Iterable[int]) -> tuple[int, ...]:
        """Return the readings that are printed in some cells, in printed order."""
        return tuple(sorted(self.at.index(cell) for cell in set(cells) if cell < self.plan.printed))


def shape_of(claim: Claim) -> Shape:
    """Return what decides which identities speak of a claim."""
    readings = (*claim.readings, *claim.given)
    cells = dict.fromkeys([(reading.quantity, reading.term) for reading in readings])
    fractional = False
    for reading in readings:
        if reading.low != reading.high and reading.quantity in _FREEDOM:
            fractional = fractional or reading.relation == "="
    return Shape(claim.kind, tuple(cells), claim.context, fractional)


def make_case(claim: Claim, shape: Shape, pruned: bool = True) -> Case:
    """Return a claim with the plan for a shape of it; see :func:`plan_for`.

    What is given elsewhere counts where the claim itself prints nothing.
    """
    plan = plan_for(shape, pruned)
    box = list(plan.domains)
    readings = (*claim.readings, *claim.given)
    if len(readings) == plan.printed:
        at = plan.order
    else:
        index = {cell: place for place, cell in enumerate(shape.cells)}
        at = tuple([index[reading.quantity, reading.term] for reading in readings])
    filled: set[int] = set()
    own = len(claim.readings)
    for place, (cell, reading) in enumerate(zip(at, readings, strict=True)):
        printed = _stands_for(reading)
        if cell not in filled:
            filled.add(cell)
            box[cell] = meet(box[cell], printed) or printed
        elif place < own:
            # Printed twice: both hold, or it is not known which does and nothing is concluded.
            box[cell] = meet(box[cell], printed) or QUANTITIES[reading.quantity].domain
    return Case(claim, shape, plan, readings, at, tuple(box))


def _stands_for(reading: Reading) -> Interval:
    """Return the values of a reading; a p printed as below zero is below one unit of its place."""
    if reading.high < NOTHING and reading.quantity == "p" and reading.relation in "<≤":
        literal = numeral(reading)
        return Interval(0.0, literal.unit if literal is not None else 1.0)
    return Interval(reading.low, reading.high)


def misplaced(case: Case) -> bool:
    """Say whether some reading lies outside all that its quantity can be."""
    return any(
        interval.low > domain.high or interval.high < domain.low
        for interval, domain in zip(case.box, case.plan.domains, strict=True)
    )


def spoken(case: Case) -> int | None:
    """Return the bits of the steps that spoke if everything agrees; None where it does not."""
    if misplaced(case):
        return None
    plan = case.plan
    box = list(case.box)
    strict = plan.brief & plan.strict
    outcome = narrow(plan.steps, box, strict)
    if outcome.failed is not None:
        return None
    spoke = outcome.spoke
    if plan.brief != strict:
        outcome = narrow(plan.steps, box, plan.brief ^ strict, plan.brief)
        if outcome.failed is not None:
            return None
        spoke |= outcome.spoke
    return spoke


def agreed(case: Case, spoke: int) -> tuple[Check, ...]:
    """Return the checks of a claim without findings; steps that excluded nothing check nothing."""
    plan = case.plan
    mute = {b.identity.slug for b in plan.bindings if b.brief and not b.brief & spoke}
    if not mute:
        return plan.checks
    mute -= {b.identity.slug for b in plan.bindings if b.brief & spoke}
    return tuple(
        check._replace(outcome="not-applicable", reason="It says nothing about these numbers.")
        if check.identity in mute and check.outcome == "agrees"
        else check
        for check in plan.checks
    )


def fits(case: Case, changes: Iterable[tuple[int, Interval]], skip: int = 0) -> tuple[bool, int]:
    """Say whether everything agrees once some cells hold other intervals, and by how many steps.

    ``skip`` has the bits of steps to leave out.
    """
    box = list(case.box)
    for cell, interval in changes:
        within = meet(interval, case.plan.domains[cell])
        if within is None:
            return False, 0
        box[cell] = within
    outcome = narrow(case.plan.steps, box, case.plan.brief & ~skip)
    return outcome.failed is None, outcome.taken
