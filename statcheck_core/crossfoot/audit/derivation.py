"""All that follows from a claim: every quantity of its kind that is not printed."""

from __future__ import annotations

import math
from collections.abc import Mapping, Sequence
from functools import lru_cache
from typing import NamedTuple

from crossfoot.audit.binding import CUSTOMARY
from crossfoot.audit.case import Case, make_case, misplaced, shape_of
from crossfoot.audit.narrow import Step, Taken, evaluate, narrow
from crossfoot.audit.working import taken_words
from crossfoot.laws.interval import Interval
from crossfoot.model import Claim


class Derived(NamedTuple):
    """A quantity that follows from a claim.

    Attributes
    ----------
    quantity
        Its key.
    low, high
        The bounds of what it can be; infinite where that side is open.
    working
        The recomputation, a line a step.
    assumed
        What is assumed beyond what the text says, as sentences.
    """

    quantity: str
    low: float
    high: float
    working: tuple[str, ...]
    assumed: tuple[str, ...] = ()


class Derivation(NamedTuple):
    """What follows from a claim; nothing where its readings contradict each other."""

    claim: Claim
    derived: tuple[Derived, ...]


@lru_cache(maxsize=4096)
def derive(claim: Claim) -> Derivation:
    """Return every quantity that follows from the readings of a claim.

    What rests on assumptions that the text does not state (no missing cases, an intercept) has
    them beside it.
    """
    case = make_case(claim, shape_of(claim), pruned=False)
    plan = case.plan
    box = list(case.box)
    everything = plan.strict | plan.doubtful
    if misplaced(case) or narrow(plan.steps, box, everything).failed is not None:
        return Derivation(claim, ())
    paths: dict[int, tuple[Step, ...]] = {}
    while True:
        found = _next(case, box, paths)
        if found is None:
            break
        paths[found.target] = _path(found, paths)
    return Derivation(
        claim,
        tuple(
            _derived(case, box, cell, paths[cell])
            for cell in range(plan.printed, len(plan.cells))
            if cell in paths
        ),
    )


def _next(case: Case, box: Sequence[Interval], paths: Mapping[int, object]) -> Step | None:
    """Return the step that gives, most narrowly, a quantity that no step before it gave."""
    best: tuple[float, int] | None = None
    chosen: Step | None = None
    for step in case.plan.steps:
        ready = all(_ground(case, cell) or cell in paths for cell in step.inputs)
        if _ground(case, step.target) or step.target in paths or not ready or step.form.mirrored:
            continue
        low, high = evaluate(step, box)
        if math.isinf(low) and math.isinf(high):
            continue
        rank = (high - low, len(step.unstated))
        if best is None or rank < best:
            best, chosen = rank, step
    return chosen


def _ground(case: Case, cell: int) -> bool:
    """Say whether a cell is printed, or customary where it is not."""
    known = CUSTOMARY.get(case.plan.cells[cell].quantity)
    return cell < case.plan.printed or (known is not None and bool(known.assumption))


def _path(step: Step, paths: Mapping[int, tuple[Step, ...]]) -> tuple[Step, ...]:
    """Return the steps that lead to a quantity, each once."""
    before = [earlier for cell in step.inputs for earlier in paths.get(cell, ())]
    return (*dict.fromkeys(before), step)


def _derived(case: Case, box: Sequence[Interval], cell: int, path: Sequence[Step]) -> Derived:
    working = tuple(
        taken_words(case, Taken(step, tuple(box[c] for c in step.inputs), evaluate(step, box)))
        for step in path
    )
    assumed = dict.fromkeys(text for step in path for text in step.unstated)
    quantity = case.plan.cells[cell].quantity
    return Derived(quantity, *box[cell], working, tuple(assumed))
