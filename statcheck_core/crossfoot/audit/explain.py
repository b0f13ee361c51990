"""Conventions of testing that explain a p which does not follow as it stands.

A one-sided test halves p, a correction for several comparisons multiplies it, an adjustment of
the degrees of freedom lowers them. Where the text states one of these the identities know; here
they are recognised where the text is silent. An explained disagreement is a doubt, not a conflict.
"""

from __future__ import annotations

from collections.abc import Collection, Sequence
from typing import NamedTuple

from crossfoot.audit.case import Case, make_case
from crossfoot.audit.faults import Fault, boxed, implied
from crossfoot.audit.narrow import Step, chosen, evaluate, narrow
from crossfoot.laws import ONE_SIDED
from crossfoot.laws.assumptions import CONTEXTS
from crossfoot.laws.interval import EVERYTHING, Interval, meet

#: The most comparisons that a multiplied p is taken to be corrected for. Ten times is not among
#: them: it can't be told from a decimal point that moved.
MOST = 9

#: A p is precise enough to be recognised as a multiple if its interval is no wider than this
#: share of it; a coarser one is a multiple of anything.
PRECISE = 0.02

#: How many times as large as that of its test an adjusted p is at most taken to be.
_LARGEST = 10.0
_SINGLE = Interval(1.0, 1.0)
_HALVED = (
    "The printed p fits a one-sided test {}; the text does not say that the test is one-sided."
)
_CORRECTED = "the document speaks of such corrections"
_UNSIGNED = ("F", "F_change", "chi2")


#: What explains much where a document speaks of it, though not beside the claim; in this order.
_ELSEWHERE = (
    "adjusted-p",
    "resampled",
    "robust",
    "weighted",
    "instrumental",
    "mixed",
    "survey",
    "imputed",
    "no-intercept",
)


class Explanation(NamedTuple):
    """What would explain that p does not follow.

    Attributes
    ----------
    text
        A sentence or two.
    factor
        How many times the two-sided, uncorrected p the printed one is; None where it is no
        multiple of it.
    told
        Whether the document tells it, so that nothing is left to ask.
    """

    text: str
    factor: float | None
    told: bool = False


def explanations(
    case: Case, faults: Sequence[Fault], elsewhere: Collection[str] = ()
) -> list[Explanation | None]:
    """Return for each fault what would explain it, if something does.

    Once p is explained by itself, what else rests on it is judged by the p so explained.
    """
    found = [_explained(case, fault, elsewhere) for fault in faults]
    known = [explanation for explanation in found if explanation and explanation.factor]
    return [
        explanation or next((k for k in known if _fits_factor(case, fault, k)), None)
        for explanation, fault in zip(found, faults, strict=True)
    ]


def _explained(case: Case, fault: Fault, elsewhere: Collection[str]) -> Explanation | None:
    return _by_itself(case, fault, elsewhere) or _by_elsewhere(case, fault, elsewhere)


def _by_itself(case: Case, fault: Fault, elsewhere: Collection[str]) -> Explanation | None:
    step = _test(case, fault)
    if step is None:
        halved = Explanation(_HALVED.format("in the direction found"), 0.5)
        silent = "two-sided" not in case.shape.context and not _follows(case, fault)
        return halved if silent and _fits_factor(case, fault, halved) else None
    return (
        _one_sided(case, fault)
        or _two_sided(case, fault)
        or _multiplied(case, fault, step, "adjusted-p" in elsewhere)
        or _lowered(case, step, "scaled-df" in elsewhere)
    )


def _by_elsewhere(case: Case, fault: Fault, elsewhere: Collection[str]) -> Explanation | None:
    """Say which context, of which the document speaks elsewhere, would make a fault none."""
    step = _test(case, fault)
    if step is not None and "adjusted-comparisons" in elsewhere and _is_enlarged(case, step):
        return Explanation(
            "The document says that p values of comparisons are adjusted.", None, True
        )
    for context in _ELSEWHERE:
        if context in elsewhere and _vanishes(case, fault, context):
            said = CONTEXTS[context]
            said = said[0].lower() + said[1:-1]
            text = (
                f"Elsewhere the document says: {said}; that would explain it if it holds here, too."
            )
            return Explanation(text, None)
    return None


def _is_enlarged(case: Case, step: Step) -> bool:
    """Say whether p is larger than that of the test alone, as corrections make it."""
    printed, recomputed = case.box[step.target], evaluate(step, case.box)
    single = step.form.takes[0] not in _UNSIGNED or case.box[step.inputs[1]] == _SINGLE
    return single and recomputed.high < printed.low <= _LARGEST * recomputed.high


def _vanishes(case: Case, fault: Fault, context: str) -> bool:
    """Say whether the readings of a fault agree in a context; a p is only made larger by some."""
    step = _test(case, fault)
    if context == "adjusted-p" and step is not None:
        printed, recomputed = case.box[step.target], evaluate(step, case.box)
        single = step.form.takes[0] not in _UNSIGNED or case.box[step.inputs[1]] == _SINGLE
        if not single or printed.low <= recomputed.high:
            return False
    told = tuple(sorted({*case.shape.context, context}))
    other = make_case(case.claim, case.shape._replace(context=told))
    plan = other.plan
    mask = plan.strict | plan.doubtful if fault.unstated else plan.strict
    return narrow(plan.steps, boxed(other, fault.cells), mask).failed is None


def _test(case: Case, fault: Fault) -> Step | None:
    """Return the step of a fault that gives the printed p from a statistic, if it has one."""
    bindings = case.plan.bindings
    for step in chosen(case.plan.steps, fault.used):
        test = step.form.gives == "p" and bindings[step.binding].identity.slug in ONE_SIDED
        if test and step.target in fault.cells:
            return step
    return None


def _follows(case: Case, fault: Fault) -> bool:
    """Say whether p follows from a printed statistic as two-sided, and not as one-sided."""
    plan = case.plan
    for step in plan.steps:
        slug = plan.bindings[step.binding].identity.slug
        if step.form.gives == "p" and slug in ONE_SIDED and step.target in fault.cells:
            low, high = evaluate(step, case.box)
            printed = case.box[step.target]
            halved = Interval(low / 2, high / 2)
            if meet(printed, Interval(low, high)) and meet(printed, halved) is None:
                return True
    return False


def _one_sided(case: Case, fault: Fault) -> Explanation | None:
    if "two-sided" in case.shape.context:
        return None
    for side, words, factor in (
        (1, "in the direction found", 0.5),
        (2, "in the other direction", None),
    ):
        if fits_side(case, fault, side):
            return Explanation(_HALVED.format(words), factor)
    return None


def _two_sided(case: Case, fault: Fault) -> Explanation | None:
    if "one-sided" not in case.shape.context or not fits_side(case, fault, 0):
        return None
    return Explanation(
        "The printed p is that of a two-sided test, while the text speaks of a one-sided one.", None
    )


def fits_side(case: Case, fault: Fault, side: int) -> bool:
    """Say whether the readings of a fault agree if the test is taken as one- or two-sided."""
    context = {*case.shape.context} - {"one-sided", "two-sided"} | (
        {"one-sided"} if side else set()
    )
    other = make_case(case.claim, case.shape._replace(context=tuple(sorted(context)), side=side))
    plan = other.plan
    step = _test(other, fault._replace(used=plan.strict | plan.doubtful))
    if step is None or evaluate(step, boxed(other, fault.cells)) == EVERYTHING:
        return False
    mask = plan.strict | plan.doubtful if fault.unstated else plan.strict
    return narrow(plan.steps, boxed(other, fault.cells), mask).failed is None


def factors(printed: Interval, recomputed: Interval) -> list[int]:
    """Return the small whole numbers that turn a recomputed p into the printed one."""
    low, high = recomputed
    return [
        factor
        for factor in range(2, MOST + 1)
        if meet(printed, Interval(min(1.0, factor * low), min(1.0, factor * high)))
    ]


def _multiplied(case: Case, fault: Fault, step: Step, told: bool) -> Explanation | None:
    printed = case.box[step.target]
    precise = 0 < printed.low <= printed.high <= printed.low * (1 + PRECISE)
    if not (precise or (told and printed.low > 0)):
        return None
    if step.form.takes[0] in _UNSIGNED and case.box[step.inputs[1]] != _SINGLE:
        return None
    recomputed = implied(case, step.target, fault.used, fault.cells)
    found = factors(printed, recomputed) if recomputed is not None else []
    if not found:
        return None
    return Explanation(
        f"The printed p is {found[0]} times as large, as a correction for {found[0]} comparisons "
        f"would make it; {_CORRECTED if told else 'the text mentions none'}.",
        float(found[0]),
        told,
    )


def _lowered(case: Case, step: Step, told: bool) -> Explanation | None:
    """Recognise p of degrees of freedom that are lowered, though printed without that.

    The factor of Greenhouse and Geisser lies between 1/df1 and 1.
    """
    if step.form.takes[0] != "F" or not (told or "repeated-measures" in case.shape.context):
        return None
    df1, df2 = (case.box[cell] for cell in step.inputs[1:])
    if not 1 < df1.low == df1.high:
        return None
    lowest = Interval(df2.low / df1.high, df2.high / df1.low)
    most = step.value(case.box[step.inputs[0]], _SINGLE, lowest)
    least = evaluate(step, case.box)
    if meet(case.box[step.target], Interval(least.low, most.high)) is None:
        return None
    return Explanation(
        "The printed p fits degrees of freedom that are lowered for unequal variances of the "
        "differences between measurements; "
        + ("the document speaks of that." if told else "the text does not say that they are."),
        None,
        told,
    )


def _fits_factor(case: Case, fault: Fault, known: Explanation) -> bool:
    """Say whether a fault goes away if p is taken as explained."""
    assert known.factor is not None
    for cell in fault.cells:
        if case.plan.cells[cell].quantity == "p":
            box = boxed(case, fault.cells)
            low, high = box[cell]
            box[cell] = Interval(low / known.factor, min(1.0, high / known.factor))
            return narrow(case.plan.steps, box, fault.used).failed is None
    return False
