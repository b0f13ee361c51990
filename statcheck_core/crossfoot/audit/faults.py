"""What can't all be true: identities that fail by themselves, and chains of them that do."""

from __future__ import annotations

from collections.abc import Callable, Sequence
from itertools import combinations, islice
from typing import NamedTuple

from crossfoot.audit.binding import CUSTOMARY
from crossfoot.audit.case import Case
from crossfoot.audit.narrow import Step, Taken, chosen, misses, narrow
from crossfoot.laws.identity import Identity
from crossfoot.laws.interval import EVERYTHING, Interval, meet

#: Sets of readings tried in search of the smallest that can't all be true.
SEARCH = 40


class Fault(NamedTuple):
    """Readings of a claim that can't all be true.

    Attributes
    ----------
    identity
        The identity that fails; of a chain, the one at which nothing is left.
    cells
        The printed cells that the failure rests on.
    steps
        The steps that fail by themselves on what is printed, the usual subject's first; empty
        for a chain.
    used
        Bits of the steps that the failure may rest on.
    unstated
        Assumptions, as sentences, without which nothing is proved: with any, it is a doubt.
    history
        Of a chain, how the contradiction is reached.
    """

    identity: Identity
    cells: frozenset[int]
    steps: tuple[Step, ...]
    used: int
    unstated: tuple[str, ...]
    history: tuple[Taken, ...] = ()


def direct_faults(case: Case) -> list[Fault]:
    """Return the identities that what is printed contradicts, each by itself."""
    found: list[tuple[Fault, bool]] = []
    for binding in case.plan.bindings:
        failing = [step for step in chosen(case.plan.steps, binding.steps) if _fails(step, case)]
        strict = [step for step in failing if not step.unstated]
        steps = strict or failing
        if steps:
            steps.sort(key=lambda step: _rank(step, case, binding.identity))
            involved = {steps[0].target, *steps[0].inputs}
            cells = _printed(case, involved)
            unstated = steps[0].unstated
            fault = Fault(binding.identity, cells, tuple(steps), binding.steps, unstated)
            found.append((fault, len(cells) < len(involved)))
    # What fails whatever is not printed adds nothing to what fails by what is.
    sure = [fault.cells for fault, open_ in found if not open_]
    return [f for f, open_ in found if not (open_ and any(cells <= f.cells for cells in sure))]


def _fails(step: Step, case: Case) -> bool:
    """Say whether a step fails on what is printed, with what is customary for the rest."""
    plan = case.plan
    known = all(
        cell < plan.printed or plan.cells[cell].quantity in CUSTOMARY
        for cell in (step.target, *step.inputs)
    )
    return known and step.target < plan.printed and misses(step, case.box)


def _rank(step: Step, case: Case, identity: Identity) -> tuple[int, int]:
    """Order steps by what they rest on, the fewest first, then by the identity's subject."""
    return (
        sum(cell >= case.plan.printed for cell in step.inputs),
        identity.quantities.index(step.form.gives),
    )


def _printed(case: Case, cells: set[int]) -> frozenset[int]:
    return frozenset(cell for cell in cells if cell < case.plan.printed)


def chain_fault(case: Case, skip: int, doubtful: bool) -> Fault | None:
    """Return the smallest set of readings that can't all be true, if there is one.

    Parameters
    ----------
    case
        The claim.
    skip
        Bits of steps to leave out: those of identities that fail by themselves.
    doubtful
        Whether to take the steps whose failure is only a doubt, too.
    """
    plan = case.plan
    mask = (plan.brief if doubtful else plan.brief & plan.strict) & ~skip
    history: list[Taken] = []
    if narrow(plan.steps, list(case.box), mask, None, history).failed is None:
        return None
    sources = _printed(case, _sources(history))
    cells = smallest(
        # A proof that does without p, which says least, is the plainest.
        sorted(sources, key=lambda cell: (plan.cells[cell].quantity != "p", cell)),
        lambda some: narrow(plan.steps, boxed(case, some), mask).failed is not None,
    )
    history = []
    narrow(plan.steps, boxed(case, cells), mask, None, history)
    steps = _contributing(history)
    unstated = dict.fromkeys(text for taken in steps for text in taken.step.unstated)
    return Fault(
        plan.bindings[history[-1].step.binding].identity,
        cells,
        (),
        (plan.strict | plan.doubtful if doubtful else plan.strict) & ~skip,
        tuple(unstated),
        tuple(steps),
    )


def boxed(case: Case, cells: frozenset[int]) -> list[Interval]:
    """Return a box in which only these of the printed cells are known."""
    return [
        interval if cell in cells or cell >= case.plan.printed else case.plan.domains[cell]
        for cell, interval in enumerate(case.box)
    ]


def _sources(history: Sequence[Taken]) -> set[int]:
    """Return the cells that a failure rests on, whatever they were derived through."""
    rests: dict[int, set[int]] = {}
    for taken in history:
        cells = (taken.step.target, *taken.step.inputs)
        rests[taken.step.target] = {c for cell in cells for c in rests.get(cell, {cell})}
    return rests[history[-1].step.target]


def smallest(order: Sequence[int], fails: Callable[[frozenset[int]], bool]) -> frozenset[int]:
    """Return the smallest set of some cells that still fails.

    Cells are dropped one by one, which ends at a set of which every part matters; then smaller
    sets are tried, by size, as long as there are not too many.

    Parameters
    ----------
    order
        The cells, those first that are best done without.
    fails
        Whether a set of them fails; all of them do, and with a set each that holds it.
    """
    kept = frozenset(order)
    for cell in order:
        if fails(kept - {cell}):
            kept -= {cell}
    smaller = (
        frozenset(subset)
        for size in range(1, len(kept))
        for subset in combinations(reversed(order), size)
    )
    return next((subset for subset in islice(smaller, SEARCH) if fails(subset)), kept)


def _contributing(history: Sequence[Taken]) -> list[Taken]:
    """Return the steps of a history that lead to its end."""
    kept = [history[-1]]
    wanted = {history[-1].step.target, *history[-1].step.inputs}
    for taken in reversed(history[:-1]):
        if taken.step.target in wanted:
            kept.append(taken)
            wanted.update(taken.step.inputs)
    return kept[::-1]


def suspects(case: Case, faults: Sequence[Fault]) -> frozenset[int]:
    """Return the cells of which one must change for all faults to go away.

    What fails by itself fails as long as none of its own cells changes.
    """
    found = frozenset(range(case.plan.printed))
    for fault in faults:
        found &= (
            fault.cells
            if not fault.steps
            else frozenset.intersection(
                *(_printed(case, {step.target, *step.inputs}) for step in fault.steps)
            )
        )
    return found


def implied(
    case: Case,
    cell: int,
    used: int,
    cells: frozenset[int],
    within: Interval = EVERYTHING,
) -> Interval | None:
    """Return what some readings imply for another cell; None where they contradict each other.

    Parameters
    ----------
    case
        The claim.
    cell
        What is asked for; what is printed there is left out.
    used
        Bits of the steps to take.
    cells
        The printed cells that are taken as true.
    within
        What is known of the cell beforehand, its sign for instance.
    """
    box = boxed(case, cells - {cell})
    known = meet(box[cell], within)
    if known is None:
        return None
    box[cell] = known
    if narrow(case.plan.steps, box, used).failed is not None:
        return None
    return box[cell]
