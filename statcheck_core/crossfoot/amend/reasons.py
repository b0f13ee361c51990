"""Reasons to offer for an allowance: what would explain a finding, each tried on the claim."""

from __future__ import annotations

from collections.abc import Mapping

from crossfoot.audit import audit_claim
from crossfoot.model import Finding, Placed
from crossfoot.settings import Settings

#: What a context is as a reason, in the order of the menu.
REASONS: Mapping[str, str] = {
    "one-sided": "the test is one-sided",
    "adjusted-p": "p is corrected for several comparisons",
    "adjusted-df": "the degrees of freedom are adjusted",
    "robust": "the standard errors are robust",
    "weighted": "the fit is weighted",
    "mixed": "the model is mixed",
    "survey": "the estimates allow for the survey design",
    "imputed": "the results are pooled over imputed data",
    "generalised": "the model is a generalised linear one",
    "resampled": "p is from resampling",
    "no-intercept": "the model has no intercept",
}

#: Where nothing else fits, and always last.
CHECKED = "checked against the original output"

#: Most that are offered beside the last.
MOST = 4


def reasons(placed: Placed, finding: Finding, settings: Settings) -> list[str]:
    """Return reasons that would explain a finding, and the one that always may be given."""
    claim = placed.audited.claim
    found = []
    for context, reason in REASONS.items():
        if context in claim.context:
            continue
        told = claim._replace(context=tuple(sorted({*claim.context, context})))
        audited = audit_claim.__wrapped__(told, settings.alpha)
        if all(other.identity != finding.identity for other in audited.findings):
            found.append(reason)
    return [*found[:MOST], CHECKED]
