"""The recomputation written out, a line a step, and the sentence that says what came of it."""

from __future__ import annotations

import math
from collections.abc import Iterable

from crossfoot.audit.case import Case
from crossfoot.audit.faults import Fault
from crossfoot.audit.literals import Numeral, numeral
from crossfoot.audit.narrow import Step, Taken, evaluate
from crossfoot.audit.wording import (
    PLAIN,
    are_marks,
    between,
    inside,
    is_word,
    listed,
    literal_of,
    named,
    phrase,
    plural,
    printed,
    subjects,
)
from crossfoot.laws.identity import mirror
from crossfoot.laws.interval import Interval, meet
from crossfoot.laws.quantities import domain, symbol


def hand(case: Case, cell: int) -> Numeral:
    """Return the numeral whose style numbers of a cell follow."""
    index = case.reading_at(cell)
    found = numeral(case.readings[index]) if index is not None else None
    return found if found is not None else PLAIN


def name(case: Case, cell: int) -> str:
    """Return a cell as it is called in a sentence."""
    index = case.reading_at(cell)
    if index is not None:
        return named(case.readings[index])
    quantity, term = case.plan.cells[cell]
    return symbol(quantity) + (f" ({term})" if term else "")


def words(case: Case, cell: int, interval: Interval, apart: Interval | None = None) -> str:
    """Return what a cell can be: its name and an interval."""
    return f"{name(case, cell)} {between(_opened(case, cell, interval), hand(case, cell), apart)}"


def _opened(case: Case, cell: int, interval: Interval) -> Interval:
    """Leave out a bound that says nothing: one at which the quantity ends anyway."""
    least, most = domain(case.plan.cells[cell].quantity)
    low = -math.inf if interval.low <= least else interval.low
    high = math.inf if interval.high >= most else interval.high
    return Interval(low, high) if low > -math.inf or high < math.inf else interval


def conclusion(case: Case, cell: int, result: Interval, takes: Iterable[int]) -> str:
    """Return the sentence that sets what is printed against what follows from the rest.

    Parameters
    ----------
    case
        The claim.
    cell
        The cell of which too little is left.
    result
        What the rest says of it.
    takes
        The cells that this rests on.
    """
    index = case.reading_at(cell)
    assert index is not None  # a finding points at a reading
    reading = case.readings[index]
    bare = reading.relation == "=" or is_word(reading)
    relation = "" if bare else f"{reading.relation} "
    marks = are_marks(reading.quantity, reading.term)
    lead = f"{named(reading)} is {'' if marks else 'printed as '}{relation}{literal_of(reading)}"
    shown = between(_opened(case, cell, result), hand(case, cell), case.box[cell])
    readings = case.readings_at(takes)
    if not readings:
        return f"{lead}, but it can only be {shown.removeprefix('= ')}."
    others = [case.readings[i] for i in readings]
    give = "give" if plural(others) else "gives"
    preposition = "of " if shown.startswith("at ") else ""
    given = symbol(reading.quantity) if marks else named(reading)
    return f"{lead}, but {phrase(others)} {give} {given} {preposition}{shown}."


def pointer(case: Case, cells: Iterable[int], first: int) -> str:
    """Return the sentence that says where to look."""
    index = case.reading_at(first)
    places = sorted(case.readings_at(cells), key=lambda place: place != index)
    names = subjects([case.readings[place] for place in places])
    return f"Look at {listed(names, 'or')}." if len(names) > 1 else ""


def direct_working(case: Case, fault: Fault, step: Step) -> tuple[str, ...]:
    """Return the recomputation of an identity that fails by itself."""
    result = evaluate(step, case.box)
    return (
        *(_given(case, cell) for cell in dict.fromkeys((step.target, *step.inputs))),
        f"Formula: {step.form.formula}",
        _given_result(case, step, result, step.target),
        _apart(case, step.target),
        *_assumed(step.unstated),
        f"Source: {fault.identity.source}",
    )


def chain_working(case: Case, fault: Fault) -> tuple[str, ...]:
    """Return the steps through which readings contradict each other."""
    lines = [_given(case, cell) for cell in sorted(fault.cells)]
    for taken in fault.history:
        identity = case.plan.bindings[taken.step.binding].identity
        lines.append(f"{identity.slug}: {taken_words(case, taken)}")
    last = fault.history[-1].step.target
    lines.append(f"Nothing is left that {name(case, last)} could be.")
    lines += _assumed(fault.unstated)
    sources = dict.fromkeys(
        case.plan.bindings[taken.step.binding].identity.source for taken in fault.history
    )
    return (*lines, f"Sources: {'; '.join(sources)}")


def taken_words(case: Case, taken: Taken) -> str:
    """Return a step with the numbers that went in and came out."""
    step = taken.step
    given = [
        words(case, cell, interval)
        for cell, interval in zip(step.inputs, taken.given, strict=True)
        if interval != domain(case.plan.cells[cell].quantity)
    ]
    lead = f"with {listed(given)}, " if given else ""
    return f"{step.form.formula}; {lead}{_given_result(case, step, taken.result, step.target)}"


def _given(case: Case, cell: int) -> str:
    index = case.reading_at(cell)
    if index is None:
        known = case.box[cell] != domain(case.plan.cells[cell].quantity)
        return f"Not printed: {words(case, cell, case.box[cell]) if known else name(case, cell)}"
    reading = case.readings[index]
    where = "Printed" if index < len(case.claim.readings) else "Printed elsewhere"
    if reading.low == reading.high:
        return f"{where}: {printed(reading)}"
    shown = between(case.box[cell], hand(case, cell))
    return f"{where}: {printed(reading)}, so {named(reading)} is {shown}"


def _given_result(case: Case, step: Step, result: Interval, cell: int) -> str:
    apart = case.box[cell] if meet(result, case.box[cell]) is None else None
    shown = words(case, cell, result, apart)
    if step.form.mirrored:
        shown += f" or {between(mirror(result), hand(case, cell))}"
    if step.whole:
        shown += ", as a whole number"
    return f"gives {shown}"


def _apart(case: Case, cell: int) -> str:
    return f"No value of {name(case, cell)} fits both what is printed and what follows."


def _assumed(unstated: Iterable[str]) -> list[str]:
    return [f"Assumed, not stated in the text: {text}" for text in unstated]


def taken_for_granted(unstated: Iterable[str]) -> str:
    """Return the sentence that says what a doubt rests on."""
    return f"This is sure only if {', and if '.join(inside(text) for text in unstated)}."
