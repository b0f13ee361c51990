"""One finding: how strong it is, where it points, and what it says."""

from __future__ import annotations

from collections.abc import Sequence
from typing import NamedTuple

from crossfoot.audit.case import Case
from crossfoot.audit.explain import Explanation
from crossfoot.audit.faults import Fault, implied
from crossfoot.audit.narrow import Step, evaluate
from crossfoot.audit.remedies import Weighted, shortlist
from crossfoot.audit.wording import phrase
from crossfoot.audit.working import (
    chain_working,
    conclusion,
    direct_working,
    hand,
    pointer,
    taken_for_granted,
)
from crossfoot.laws.identity import mirror
from crossfoot.laws.interval import Interval, meet
from crossfoot.laws.quantities import domain
from crossfoot.model import Finding

#: A finding points at the reading of its best remedy if that carries this share of all weights.
SURE = 0.6

#: An edge of an interval this close to the significance level lies on it.
_EDGE = 1e-9


def reason_of(fault: Fault, explanation: Explanation | None) -> str:
    """Return why a fault is only a doubt; empty where it is not."""
    if explanation is not None:
        return explanation.text
    return " ".join(fault.unstated)


def finding_of(
    case: Case,
    fault: Fault,
    explanation: Explanation | None,
    changes: Sequence[Weighted],
    level: float,
) -> Finding:
    """Return the finding that a fault makes.

    Parameters
    ----------
    case, fault
        The claim and what can't all be true in it.
    explanation
        What would explain it, if something does.
    changes
        Remedies with their weights, the likeliest first.
    level
        The significance level.
    """
    doubt = reason_of(fault, explanation)
    p = _reversed_p(case, fault, level) if not doubt else None
    if p is not None or explanation is not None:
        favourite = _own_p(case, fault)
    else:
        favourite = _favourite(case, fault, changes)
    said = _direct(case, fault, favourite) if fault.steps else _chained(case, fault, favourite)
    message, working = said.message, said.working
    if p is not None:
        message += f" They lie on different sides of {_level(case, p, level)}."
    if explanation is not None:
        message += f" {explanation.text}"
        working += (explanation.text,)
    elif doubt:
        message += f" {taken_for_granted(fault.unstated)}"
    place = case.own_reading_at(said.cell)
    assert place is not None  # see _direct() and _chained()
    look = pointer(case, {said.cell, *said.takes}, said.cell)
    return Finding(
        fault.identity.slug,
        "doubt" if doubt else "conflict" if p is None else "reversal",
        f"{message} {look}".rstrip(),
        place,
        None if said.result is None else (said.result.low, said.result.high),
        tuple(change.remedy for change in shortlist(changes, place)),
        tuple(other for other in case.readings_at(said.takes) if other != place),
        working,
    )


class _Statement(NamedTuple):
    """What a finding says: of which cell, from which others, and what they give."""

    cell: int
    takes: frozenset[int]
    result: Interval | None
    message: str
    working: tuple[str, ...]


def _direct(case: Case, fault: Fault, favourite: int | None) -> _Statement:
    """Return what to say of an identity that fails by itself."""
    own = [step for step in fault.steps if case.own_reading_at(step.target) is not None]
    chosen = next((step for step in own if step.target == favourite), own[0] if own else None)
    if chosen is None:
        # Only what is given elsewhere can be solved for.
        step = fault.steps[0]
        cell = min(cell for cell in fault.cells if case.own_reading_at(cell) is not None)
        message = _together(case, fault)
        return _Statement(
            cell, fault.cells - {cell}, None, message, direct_working(case, fault, step)
        )
    result = _shown(case, chosen)
    return _Statement(
        chosen.target,
        frozenset(chosen.inputs),
        result,
        conclusion(case, chosen.target, result, chosen.inputs),
        direct_working(case, fault, chosen),
    )


def _chained(case: Case, fault: Fault, favourite: int | None) -> _Statement:
    """Return what to say of readings that contradict each other through several identities."""
    last = fault.history[-1].step.target
    own = [cell for cell in fault.cells if case.own_reading_at(cell) is not None]
    own.sort(key=lambda cell: (cell != favourite, cell != last, cell))
    working = chain_working(case, fault)
    for cell in own:
        result = implied(case, cell, fault.used, fault.cells)
        if result is not None and meet(result, case.box[cell]) is None:
            rest = fault.cells - {cell}
            return _Statement(cell, rest, result, conclusion(case, cell, result, rest), working)
    return _Statement(own[0], fault.cells - {own[0]}, None, _together(case, fault), working)


def _together(case: Case, fault: Fault) -> str:
    readings = [case.readings[place] for place in case.readings_at(fault.cells)]
    return f"{phrase(readings)} can't all be true."


def _favourite(case: Case, fault: Fault, changes: Sequence[Weighted]) -> int | None:
    """Return the cell that is most likely wrong, if one stands out."""
    by_cell: dict[int, float] = {}
    explained = [change for change in changes if not change.plain]
    for change in explained or changes:
        cell = case.at[change.remedy.reading]
        by_cell[cell] = by_cell.get(cell, 0.0) + change.weight
    best = max(by_cell, key=lambda cell: by_cell[cell], default=-1)
    sure = best in fault.cells and by_cell[best] >= SURE * sum(by_cell.values())
    return best if sure else None


def _shown(case: Case, step: Step) -> Interval:
    """Return what a step gives, on the side of zero on which the reading lies."""
    result = evaluate(step, case.box)
    if step.form.mirrored and case.box[step.target].high <= 0:
        result = mirror(result)
    return meet(result, domain(step.form.gives)) or result


def _own_p(case: Case, fault: Fault) -> int | None:
    """Return the cell of the p that is printed in the claim, if the fault rests on it."""
    for cell in sorted(fault.cells):
        if case.plan.cells[cell].quantity == "p" and case.own_reading_at(cell) is not None:
            return cell
    return None


def _reversed_p(case: Case, fault: Fault, level: float) -> int | None:
    """Return the cell of p if p as printed and as recomputed lie on different sides of a level."""
    cell = _own_p(case, fault)
    result = _recomputed_p(case, fault, cell) if cell is not None else None
    if cell is None or result is None:
        return None
    printed, below, above = case.box[cell], level + _EDGE, level - _EDGE
    falls = printed.high <= below and result.low >= above
    rises = printed.low >= above and result.high <= below
    return cell if falls or rises else None


def _recomputed_p(case: Case, fault: Fault, cell: int) -> Interval | None:
    step = next((step for step in fault.steps if step.target == cell), None)
    if step is not None:
        return evaluate(step, case.box)
    return implied(case, cell, fault.used, fault.cells)


def _level(case: Case, cell: int, level: float) -> str:
    """Return a significance level in the hand of the reading."""
    text = f"{level:g}"
    like = hand(case, cell)
    if like.zeroless:
        text = text.removeprefix("0")
    return text.replace(".", ",") if like.mark == "," else text
