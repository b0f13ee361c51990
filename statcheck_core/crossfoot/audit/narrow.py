"""Narrowing: what every quantity of a claim can be, given all of them.

A box holds an interval for each cell of a plan. Each step of the plan computes one cell from
others and keeps what both leave; a step that has narrowed its cell wakes the steps that take it,
until nothing gains or a step leaves nothing, which proves that not all readings are true.
Nothing is ever lost: every step encloses all that the published formula allows.
"""

from __future__ import annotations

import math
from collections.abc import Callable, Iterable, Iterator, Sequence
from typing import NamedTuple

from crossfoot.laws.identity import Form, confine
from crossfoot.laws.interval import Interval

#: A step wakes others only if it took at least this share of its cell's width.
GAIN = 0.1

#: Steps taken before narrowing stops, for each step of the plan; what is left by then is kept.
ROUNDS = 8

_INFINITY = math.inf
_WHOLE_BELOW = 1e15


class Step(NamedTuple):
    """One form of an identity, bound to the cells of a claim.

    Attributes
    ----------
    form
        The form.
    binding
        Index in the plan of the binding that it belongs to.
    target
        Index of the cell that it gives.
    inputs
        Indices of the cells that it takes.
    value
        The form's function.
    unstated
        Assumptions, as sentences, without which a failure proves nothing; a failure of the step
        is a doubt where there are any.
    whole
        Whether the cell counts something, so that a fraction can be cut off.
    siblings
        Bits of the other steps that solve the same equation.
    wakes
        Bits of the steps to take again once this one has narrowed its cell.
    """

    form: Form
    binding: int
    target: int
    inputs: tuple[int, ...]
    value: Callable[..., Interval]
    unstated: tuple[str, ...]
    whole: bool
    siblings: int = 0
    wakes: int = 0


class Taken(NamedTuple):
    """A step that narrowed its cell, or left nothing of it: what it was given and what it gave."""

    step: Step
    given: tuple[Interval, ...]
    result: Interval


class Outcome(NamedTuple):
    """How narrowing ended.

    Attributes
    ----------
    failed
        The step that left nothing, if one did.
    spoke
        Bits of the steps whose result excluded something, were it not known before.
    taken
        How many steps were taken.
    """

    failed: Step | None
    spoke: int
    taken: int


def narrow(
    steps: Sequence[Step],
    box: list[Interval],
    pending: int,
    allowed: int | None = None,
    history: list[Taken] | None = None,
) -> Outcome:
    """Narrow a box in place.

    Parameters
    ----------
    steps
        All steps of the plan.
    box
        An interval for each cell.
    pending
        Bits of the steps to take, each at least once.
    allowed
        Bits of the steps that may be woken; the pending ones where it is None.
    history
        Where to write down the steps that narrowed something, the failing one last.
    """
    if allowed is None:
        allowed = pending
    spoke = taken = 0
    most = ROUNDS * len(steps)
    while pending and taken < most:
        taken += 1
        lowest = pending & -pending
        pending ^= lowest
        step = steps[lowest.bit_length() - 1]
        before = box[step.target]
        result = evaluate(step, box)
        if result.low == -_INFINITY and result.high == _INFINITY:
            continue
        spoke |= lowest
        after = confine(step.form, result, before)
        if after == before:
            continue
        if history is not None:
            history.append(Taken(step, tuple(box[cell] for cell in step.inputs), result))
        if after is None:
            return Outcome(step, spoke, taken)
        box[step.target] = after
        wakes = step.wakes & allowed
        if after == result:
            # Whatever the inputs are, the cell allows it: solved for them the equation says
            # nothing.
            pending &= ~step.siblings
            wakes &= ~step.siblings
        if wakes and after.high - after.low <= (before.high - before.low) * (1 - GAIN):
            pending |= wakes
    return Outcome(None, spoke, taken)


def evaluate(step: Step, box: Sequence[Interval]) -> Interval:
    """Return what a step says of its cell, whatever that can be by itself."""
    result = step.value(*[box[cell] for cell in step.inputs])
    return Interval(_up(result.low), -_up(-result.high)) if step.whole else result


def _up(bound: float) -> float:
    """Return the least whole number that is not below a bound, but for its rounding error."""
    if not abs(bound) < _WHOLE_BELOW:
        return bound
    return float(math.ceil(bound - 1e-9 * max(1.0, abs(bound))))


def misses(step: Step, box: Sequence[Interval]) -> bool:
    """Say whether a step leaves nothing of its cell in a box that is not narrowed."""
    return confine(step.form, evaluate(step, box), box[step.target]) is None


def bits(indices: Iterable[int]) -> int:
    """Return a number with these bits set."""
    total = 0
    for index in indices:
        total |= 1 << index
    return total


def chosen(steps: Sequence[Step], mask: int) -> Iterator[Step]:
    """Return the steps whose bits are set."""
    for place, step in enumerate(steps):
        if mask >> place & 1:
            yield step
