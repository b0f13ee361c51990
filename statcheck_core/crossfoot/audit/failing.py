"""From a claim that does not agree to what is found: faults, what explains and mends them."""

from __future__ import annotations

from crossfoot.audit.case import Case, agreed
from crossfoot.audit.explain import Explanation, explanations
from crossfoot.audit.faults import Fault, chain_fault, direct_faults, suspects
from crossfoot.audit.findings import finding_of, reason_of
from crossfoot.audit.narrow import evaluate
from crossfoot.audit.remedies import Weighted, remedies
from crossfoot.laws import IDENTITIES
from crossfoot.laws.interval import EVERYTHING
from crossfoot.model import Check, Finding


def failures(
    case: Case, level: float, elsewhere: frozenset[str] = frozenset()
) -> tuple[tuple[Check, ...], list[Finding]]:
    """Return what became of every identity on a claim in which something fails, and the findings.

    Parameters
    ----------
    case
        The claim.
    level
        The significance level that a reversal is judged by.
    elsewhere
        Contexts of which the document speaks elsewhere.
    """
    faults = _faults(case)
    reasons = explanations(case, faults, elsewhere)
    found = [
        finding_of(case, fault, reason, changes, level)
        for fault, reason, changes in zip(faults, reasons, _remedies(case, faults), strict=True)
        if reason is None or not reason.told
    ]
    return _checks(case, faults, reasons), found


def _faults(case: Case) -> list[Fault]:
    """Return what fails by itself, and a chain that does where nothing in it fails by itself."""
    direct = direct_faults(case)
    plan = case.plan
    skip = 0
    for fault in direct:
        skip |= fault.used & plan.doubtful if fault.unstated else fault.used
    chain = chain_fault(case, skip, doubtful=False)
    rivals = [fault for fault in direct if not fault.unstated]
    if chain is None:
        chain = chain_fault(case, skip, doubtful=True)
        rivals = direct
    if chain is not None and not any(fault.cells <= chain.cells for fault in rivals):
        direct.append(chain)
    # Nothing is said here of what is given elsewhere.
    return [
        fault for fault in direct if any(case.own_reading_at(c) is not None for c in fault.cells)
    ]


def _remedies(case: Case, faults: list[Fault]) -> list[list[Weighted]]:
    """Return for each fault the changes that make the whole claim agree.

    Where no single change does, two things are wrong: then those that mend this fault, whatever
    else fails.
    """
    whole = remedies(case, suspects(case, faults))
    if whole:
        return [whole] * len(faults)
    found = []
    for fault in faults:
        others = 0
        for other in faults:
            others |= other.used if other is not fault else 0
        found.append(
            remedies(case, suspects(case, [fault]), others & ~fault.used) if others else []
        )
    return found


def _checks(
    case: Case, faults: list[Fault], reasons: list[Explanation | None]
) -> tuple[Check, ...]:
    """Return the checks of a claim in which something fails."""
    plan = case.plan
    spoke = 0
    for place, step in enumerate(plan.steps):
        if evaluate(step, case.box) != EVERYTHING:
            spoke |= 1 << place
    checks = {check.identity: check for check in agreed(case, spoke)}
    for fault, reason in reversed(list(zip(faults, reasons, strict=True))):
        slug = fault.identity.slug
        text = reason_of(fault, reason)
        told = reason is not None and reason.told
        outcome = "not-applicable" if told else "doubt" if text else "conflict"
        checks[slug] = Check(slug, outcome, text)
    return tuple(checks[slug] for slug in IDENTITIES if slug in checks)
