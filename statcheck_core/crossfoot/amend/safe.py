"""Rewrites that are right whatever the author meant: those may be made all at once."""

from __future__ import annotations

from crossfoot.amend.change import Amendment, Change
from crossfoot.amend.remedies import mended
from crossfoot.model import Finding, Remedy, Report


def safe_remedy(finding: Finding) -> Remedy | None:
    """Return the one way to write what a finding speaks of, where there is only one.

    A p that is printed as zero lies below half a unit of its last place, so that ``p < .001``
    says no more than ``p = .000`` did.
    """
    if finding.severity != "note" or finding.settled is not None or len(finding.remedies) != 1:
        return None
    remedy = finding.remedies[0]
    return remedy if remedy.quantity == "p" and remedy.literal.startswith("<") else None


def safe_rewrites(report: Report) -> Amendment | None:
    """Return all safe rewrites of a document as one amendment, or None where there are none."""
    changes: list[Change] = []
    for placed in report.claims:
        findings = placed.audited.findings
        if any(f.severity != "note" and f.settled is None for f in findings):
            continue  # p itself may be what is wrong
        for finding in findings:
            remedy = safe_remedy(finding)
            if remedy is not None:
                changes += mended(report.document, placed, remedy) or ()
    if not changes:
        return None
    return Amendment("Rewrite every p that is printed as zero", tuple(sorted(set(changes))))
