"""From a claim to an audited claim: which identities agree, and what is found."""

from __future__ import annotations

from collections.abc import Sequence

from crossfoot.audit.case import Case, make_case, shape_of, spoken
from crossfoot.audit.explain import Explanation, explanations
from crossfoot.audit.faults import Fault, chain_fault, direct_faults, suspects
from crossfoot.audit.findings import finding_of, reason_of
from crossfoot.audit.narrow import evaluate
from crossfoot.audit.notes import notes
from crossfoot.audit.remedies import Weighted, remedies
from crossfoot.laws import IDENTITIES, ONE_SIDED
from crossfoot.laws.interval import EVERYTHING
from crossfoot.model import SEVERITIES, Audited, Check, Claim, Finding

#: Longest name of a row that is written out in a message.
_LONGEST_ROW = 60


def judge(claim: Claim, alpha: float) -> Audited:
    """Return what became of every identity that concerns a claim.

    Parameters
    ----------
    claim
        What is printed.
    alpha
        The significance level that a reversal is judged by, unless the claim states its own.
    """
    level = claim.alpha if claim.alpha is not None else alpha
    case, agreeing = _as_stated(claim)
    if agreeing is not None:
        return Audited(claim, _agreed(case, agreeing), _in_row(claim, notes(claim)))
    faults = _faults(case)
    reasons = explanations(case, faults)
    found = [
        finding_of(case, fault, reason, changes, level)
        for fault, reason, changes in zip(faults, reasons, _remedies(case, faults), strict=True)
    ]
    checks = _failed(case, faults, reasons)
    order = sorted([*found, *notes(claim)], key=lambda f: SEVERITIES.index(f.severity))
    return Audited(claim, checks, _in_row(claim, order))


def _in_row(claim: Claim, found: Sequence[Finding]) -> tuple[Finding, ...]:
    """Let findings about the row of a table name it."""
    if not claim.row:
        return tuple(found)
    row = claim.row if len(claim.row) <= _LONGEST_ROW else f"{claim.row[: _LONGEST_ROW - 1]}…"
    return tuple(finding._replace(message=f"{row}: {finding.message}") for finding in found)


def _as_stated(claim: Claim) -> tuple[Case, int | None]:
    """Return the claim as its text says it was tested, and the steps that spoke if all agree.

    Where the text says one-sided the effect may lie on either side. F and χ² have one tail
    anyway, so that their usual p is as good.
    """
    shape = shape_of(claim)
    cases = [make_case(claim, shape)]
    if "one-sided" in claim.context:
        sided = [make_case(claim, shape._replace(side=side)) for side in (1, 2)]
        cases = cases + sided if _tests(cases[0]) or not _tests(sided[0]) else sided
    for case in cases:
        spoke = spoken(case)
        if spoke is not None:
            return case, spoke
    return cases[0], None


def _tests(case: Case) -> bool:
    """Say whether some p is recomputed from its statistic."""
    return any(binding.identity.slug in ONE_SIDED for binding in case.plan.bindings)


def _agreed(case: Case, spoke: int) -> tuple[Check, ...]:
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


def _failed(
    case: Case, faults: list[Fault], reasons: list[Explanation | None]
) -> tuple[Check, ...]:
    """Return the checks of a claim in which something fails."""
    plan = case.plan
    spoke = 0
    for place, step in enumerate(plan.steps):
        if evaluate(step, case.box) != EVERYTHING:
            spoke |= 1 << place
    checks = {check.identity: check for check in _agreed(case, spoke)}
    for fault, reason in reversed(list(zip(faults, reasons, strict=True))):
        slug = fault.identity.slug
        text = reason_of(fault, reason)
        checks[slug] = Check(slug, "doubt" if text else "conflict", text)
    return tuple(checks[slug] for slug in IDENTITIES if slug in checks)
