"""From a claim to an audited claim: which identities agree, and what is found."""

from __future__ import annotations

from collections.abc import Sequence

from crossfoot.audit.case import Case, agreed, make_case, shape_of, spoken
from crossfoot.audit.notes import notes
from crossfoot.laws import ONE_SIDED
from crossfoot.model import SEVERITIES, Audited, Claim, Finding

#: Longest name of a row that is written out in a message.
_LONGEST_ROW = 60


def judge(claim: Claim, alpha: float, elsewhere: frozenset[str] = frozenset()) -> Audited:
    """Return what became of every identity that concerns a claim.

    Parameters
    ----------
    claim
        What is printed.
    alpha
        The significance level that a reversal is judged by, unless the claim states its own.
    elsewhere
        Contexts of which the document speaks elsewhere.
    """
    level = claim.alpha if claim.alpha is not None else alpha
    case, agreeing = _as_stated(claim)
    if agreeing is not None:
        return Audited(claim, agreed(case, agreeing), _in_row(claim, notes(claim)))
    from crossfoot.audit.failing import failures  # most claims agree
    from crossfoot.audit.twofold import otherwise

    for other in otherwise(claim):
        case_of_other, agreeing = _as_stated(other)
        if agreeing is not None:
            return Audited(other, agreed(case_of_other, agreeing), _in_row(other, notes(other)))
    checks, found = failures(case, level, elsewhere)
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
    anyway, so that their usual p is as good; and so it is where the text may speak of another test.
    """
    shape = shape_of(claim)
    cases = [make_case(claim, shape)]
    if "one-sided" in claim.context or "either-sided" in claim.context:
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
