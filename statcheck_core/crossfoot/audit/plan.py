"""Plans: which steps narrow the claims of one shape.

A plan depends only on what is printed and in which context, never on a number, and is kept: most
claims of a document share a few plans.
"""

from __future__ import annotations

from collections import Counter
from collections.abc import Iterable, Iterator, Mapping, Sequence, Set
from functools import lru_cache, partial
from typing import NamedTuple

from crossfoot.audit.binding import CUSTOMARY, TAKEN_FOR_GRANTED, Cell, bind_prose, unprinted
from crossfoot.audit.drafts import Draft, Shape, broken_assumption, connected, grounded, speaks
from crossfoot.audit.narrow import Step, bits
from crossfoot.audit.rows import BINDERS
from crossfoot.audit.silence import why_silent
from crossfoot.audit.wording import are_marks
from crossfoot.laws import IDENTITIES, ONE_SIDED
from crossfoot.laws.assumptions import ASSUMPTIONS
from crossfoot.laws.identity import Identity
from crossfoot.laws.interval import EVERYTHING, Interval, meet
from crossfoot.laws.quantities import QUANTITIES, domain
from crossfoot.model import Check


class Binding(NamedTuple):
    """An identity with its steps in one claim: all of them, and those taken as a rule."""

    identity: Identity
    steps: int
    brief: int


class Plan(NamedTuple):
    """How claims of one shape are narrowed.

    Attributes
    ----------
    cells
        The printed ones first, then those that must follow from them.
    printed
        How many are printed.
    order
        Their indices.
    domains
        What each cell can be before anything is known; for a printed one by what is sure of it.
    bindings
        The identities that speak of these cells.
    steps
        Their forms, the strict ones first.
    strict, doubtful
        Bits of the steps whose failure is a conflict, and of those whose failure is a doubt.
    brief
        Bits of the steps that are enough to tell whether all agree, given that every reading
        meets the domain of its cell.
    checks
        What became of each identity that concerns the claim, if all agree.
    """

    cells: tuple[Cell, ...]
    printed: int
    order: tuple[int, ...]
    domains: tuple[Interval, ...]
    bindings: tuple[Binding, ...]
    steps: tuple[Step, ...]
    strict: int
    doubtful: int
    brief: int
    checks: tuple[Check, ...]


#: Kinds in which counts that are not printed are whole, unless degrees of freedom are adjusted.
_COUNTING = frozenset({"overall-model", "model-summary", "correlation"})
_ADJUSTING = frozenset({"adjusted-df", "imputed", "mixed"})


@lru_cache(maxsize=4096)
def plan_for(shape: Shape, pruned: bool = True) -> Plan:
    """Return how claims of a shape are narrowed.

    Parameters
    ----------
    shape
        What is printed, and in which context.
    pruned
        Whether to leave out cells that nothing printed depends on. Without it the plan computes
        all that follows from what is printed.
    """
    cells = tuple(Cell(*cell) for cell in shape.cells)
    printed, quantities = frozenset(cells), frozenset(cell.quantity for cell in cells)
    drafts: list[Draft] = []
    silent: dict[str, Check] = {}
    breach = partial(broken_assumption, shape=shape)
    bind = BINDERS.get(shape.kind, bind_prose)
    possible = unprinted(shape.kind, derived=not pruned)
    number = 0
    for base in _identities(shape.side):
        for identity, names in bind(base, cells, possible):
            for form in identity.forms:
                if names.keys() >= {form.gives, *form.takes} and breach(identity, form) is None:
                    takes = tuple(names[name] for name in form.takes)
                    draft = Draft(identity, form, takes, names[form.gives], number)
                    drafts += [draft] if speaks(draft, shape.kind, printed, quantities) else []
            reason = why_silent(shape.kind, printed, identity, names, breach)
            if reason:
                silent.setdefault(identity.slug, Check(identity.slug, "not-applicable", reason))
            number += 1
    drafts = connected(drafts, printed, pruned)
    checks = dict(silent)
    for draft in grounded(drafts, printed):
        checks[draft.identity.slug] = Check(draft.identity.slug, "agrees")
    order = [checks[slug] for slug in IDENTITIES if slug in checks]
    return _settled(shape, cells, drafts, tuple(order))


def _identities(side: int) -> Iterator[Identity]:
    for slug, identity in IDENTITIES.items():
        yield ONE_SIDED[slug][side - 1] if side and slug in ONE_SIDED else identity


def _settled(
    shape: Shape, printed: tuple[Cell, ...], drafts: Sequence[Draft], checks: tuple[Check, ...]
) -> Plan:
    """Return the plan, its cells and steps numbered."""
    index = {cell: place for place, cell in enumerate(printed)}
    for draft in drafts:
        for cell in draft.cells:
            index.setdefault(cell, len(index))
    identities = {draft.number: draft.identity for draft in drafts}
    places = {number: place for place, number in enumerate(identities)}
    steps = [_step(draft, shape, index, len(printed), places[draft.number]) for draft in drafts]
    steps.sort(key=lambda step: bool(step.unstated))
    equations = _equations(steps)
    steps = _linked(steps, equations)
    fixed = {
        place
        for place, cell in enumerate(printed)
        if QUANTITIES[cell.quantity].whole and not shape.fractional
    }
    brief = bits(_brief(steps, equations, fixed))
    strict = bits(place for place, step in enumerate(steps) if not step.unstated)
    own = [0] * len(identities)
    for place, step in enumerate(steps):
        own[step.binding] |= 1 << place
    return Plan(
        tuple(index),
        len(printed),
        tuple(range(len(printed))),
        tuple(_domains(index, len(printed), steps)),
        tuple(
            Binding(identity, mask, mask & brief)
            for identity, mask in zip(identities.values(), own, strict=True)
        ),
        tuple(steps),
        strict,
        bits(range(len(steps))) ^ strict,
        brief,
        checks,
    )


def _domains(cells: Iterable[Cell], printed: int, steps: Sequence[Step]) -> Iterator[Interval]:
    """Return what each cell can be at all."""
    constant: dict[int, Interval] = {}
    for step in steps:
        if not step.inputs:
            known = constant.get(step.target, EVERYTHING)
            constant[step.target] = meet(known, step.value()) or known
    for place, cell in enumerate(cells):
        if place < printed:
            yield constant.get(place, EVERYTHING)
        elif cell.quantity in CUSTOMARY:
            yield CUSTOMARY[cell.quantity].interval
        else:
            yield domain(cell.quantity)


def _step(
    draft: Draft, shape: Shape, index: Mapping[Cell, int], printed: int, binding: int
) -> Step:
    unstated = [
        ASSUMPTIONS[key].text
        for key in draft.form.assumed
        if ASSUMPTIONS[key].stated_by.isdisjoint(shape.context)
    ]
    for cell in draft.cells:
        if index[cell] >= printed and cell.quantity in CUSTOMARY:
            unstated += filter(None, [CUSTOMARY[cell.quantity].assumption])
    for context, (quantity, assumption) in TAKEN_FOR_GRANTED.items():
        if context in shape.context and any(_is_taken(cell, quantity) for cell in draft.cells):
            unstated.append(assumption)
    counting = shape.kind in _COUNTING and not shape.fractional
    counted = index[draft.gives] >= printed and QUANTITIES[draft.gives.quantity].whole
    return Step(
        draft.form,
        binding,
        index[draft.gives],
        tuple(index[cell] for cell in draft.takes),
        draft.form.value,
        tuple(unstated),
        counting and counted and _ADJUSTING.isdisjoint(shape.context),
    )


def _is_taken(cell: Cell, quantity: str) -> bool:
    """Say whether what is taken for granted of a quantity bears on a cell: of p, on its marks."""
    return cell.quantity == quantity and (quantity != "p" or are_marks(*cell))


def _linked(steps: Sequence[Step], equations: Sequence[tuple[int, ...]]) -> list[Step]:
    """Return the steps with the others that they wake and that solve the same equation."""
    takers: dict[int, int] = {}
    for place, step in enumerate(steps):
        for cell in step.inputs:
            takers[cell] = takers.get(cell, 0) | 1 << place
    siblings: dict[int, int] = {}
    for places in equations:
        siblings |= dict.fromkeys(places, bits(places))
    return [
        step._replace(
            wakes=takers.get(step.target, 0) & ~(1 << place),
            siblings=siblings[place] & ~(1 << place),
        )
        for place, step in enumerate(steps)
    ]


def _equations(steps: Sequence[Step]) -> list[tuple[int, ...]]:
    """Group the steps that solve one equation for its several cells.

    Forms of one identity over the same cells are one equation, unless they give the same cell.
    """
    equations: dict[tuple[object, ...], list[int]] = {}
    seen: Counter[tuple[object, ...]] = Counter()
    for place, step in enumerate(steps):
        key = (step.binding, frozenset({step.target, *step.inputs}), step.unstated)
        seen[*key, step.target] += 1
        equations.setdefault((*key, seen[*key, step.target]), []).append(place)
    return [tuple(places) for places in equations.values()]


def _brief(
    steps: Sequence[Step], equations: Sequence[tuple[int, ...]], fixed: Set[int]
) -> Iterator[int]:
    """Return the steps that are enough to tell whether all agree.

    Solving an equation once says whether it can hold; solving it for another cell is of use only
    where that cell stands in another equation too, and is not exact already.
    """
    informative = [places for places in equations if steps[places[0]].inputs]
    standing = Counter(
        cell
        for places in informative
        for cell in {steps[places[0]].target, *steps[places[0]].inputs}
    )
    for places in informative:
        for place in places:
            target = steps[place].target
            if place == places[0] or (standing[target] > 1 and target not in fixed):
                yield place
