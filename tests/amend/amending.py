"""One helper for all tests of amendments: a text, and what it becomes."""

from __future__ import annotations

from crossfoot.amend import Change, applied
from crossfoot.amend.complete import completions
from crossfoot.amend.remarks import allowance
from crossfoot.amend.remedies import mended
from crossfoot.amend.typed import proposals
from crossfoot.model import Report
from crossfoot.scan import scan_text
from crossfoot.settings import DEFAULTS


def scanned(text: str, language: str = "markdown") -> Report:
    return scan_text(text, language)


def remedied(text: str, literal: str, language: str = "markdown") -> list[str | None]:
    """Return the text after each remedy that has this literal; None for one not carried out."""
    report = scanned(text, language)
    found: list[str | None] = []
    for placed in report.claims:
        for finding in placed.audited.findings:
            for remedy in finding.remedies:
                if remedy.literal == literal:
                    changes = mended(report.document, placed, remedy)
                    found.append(None if changes is None else applied(text, changes))
    return list(dict.fromkeys(found))


def completed(text: str, lead: str, language: str = "markdown") -> list[str]:
    """Return the text after each completion whose title starts with ``Add`` and this."""
    report = scanned(text, language)
    return [
        applied(text, amendment.changes)
        for placed in report.claims
        for amendment in completions(report, placed)
        if amendment.title.startswith(f"Add {lead} ")
    ]


def allowed(text: str, number: int = 0, language: str = "markdown") -> str | None:
    """Return the text with a remark that allows one of its findings."""
    report = scanned(text, language)
    pairs = [(p, finding) for p in report.claims for finding in p.audited.findings]
    placed, finding = pairs[number]
    change: Change | None = allowance(report, placed, finding, "of  a\nreason", DEFAULTS)
    return None if change is None else applied(text, (change,))


def continued(text: str, language: str = "markdown") -> list[str]:
    """Return what is proposed where ``|`` stands in a text, each as the text it makes."""
    before, _, after = text.partition("|")
    found = proposals(scanned(before + after, language), len(before))
    return [applied(before + after, (Change(p.span, p.text),)) for p in found]
