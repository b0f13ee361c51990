"""The words of findings, as they stand in a report."""

from __future__ import annotations

from collections.abc import Iterator

import pytest
from syrupy.assertion import SnapshotAssertion

from audit.notation import claim
from crossfoot.audit import audit_claim
from crossfoot.model import Finding

CLAIMS = {
    "digits swapped": "effect: F(2,57)=7.41 p=.002",
    "reversal": "effect: F(2,57)=4.22 p=.190",
    "reversal with a decimal comma": "effect: F(2,57)=4,22 p=0,190",
    "threshold": "effect: F(2,57)=7.41 p<.001",
    "percent": "overall-model: R2=45.8% F(3,96)=8.51 p<.001",
    "adjusted for plain": "overall-model: R2=.185 F(3,96)=8.51 p<.001",
    "degrees of freedom swapped": "overall-model: F(57,2)=7.41 p=.001 R2=.21",
    "degrees of freedom below the line": "effect: F(₂,₅₇)=7.41 p=.002",
    "chain": "overall-model: R2_adj=.025 F(3,196)=3.37 p=.020",
    "chain through counts": "overall-model: n=142 R2=.433 R2_adj=.413 F=34.061",
    "missing cases": "overall-model: R2=.21 F(3,96)=8.51 n=106",
    "one-sided": "mean-comparison: t(58)=1.92 p=.030",
    "two-sided in a one-sided text": "mean-comparison: t(58)=1.92 p=.060 [one-sided]",
    "multiplied": "mean-comparison: t(58)=2.40 p=.0589",
    "lowered": "effect: F(2,114)=3.40 p=.049 [repeated-measures]",
    "sign lost": "coefficient: b=0.84 se=0.13 t=−6.46 p<.001",
    "negative": "mean-comparison: t(58)=−2.62 p=.028",
    "impossible": "overall-model: R2=1.21",
    "level not printed": "coefficient: b=2.0 se=0.5 df=50 ci_low=0.5 ci_high=3.5",
    "without degrees of freedom": "coefficient: b=2.19 t=1.50 p=.020",
    "degrees of freedom given elsewhere": "coefficient: b=0.5 t=1.0 p=.006 | df=3",
    "solved for what stands elsewhere": "effect: df2=58 | F=9.41 df1=1 eta2=.20",
    "tiny p": "effect: F(1,500)=60.2 p=.001",
    "two things wrong": "overall-model: R2=.21 R2_adj=.285 F(3,96)=8.51 p=.030",
    "rounded to zero": "effect: F(3,71)=59.62 p=.000",
    "below zero": "effect: F(3,71)=59.62 p<.000",
    "without df": "effect: F=59.62 df1=3 p<.001",
}


def lines(finding: Finding) -> Iterator[str]:
    yield f"{finding.severity} {finding.identity}: {finding.message}"
    low, high = finding.recomputed or (None, None)
    if low is not None:
        yield f"  recomputed {low:.6g} to {high:.6g}"
    for remedy in finding.remedies:
        yield f"  remedy {remedy.quantity} {remedy.literal} ({remedy.reason})"
    yield from (f"  {line}" for line in finding.working)


@pytest.mark.parametrize("name", CLAIMS)
def test_words(name: str, snapshot: SnapshotAssertion) -> None:
    findings = audit_claim(claim(CLAIMS[name]), 0.05).findings
    assert findings
    assert [line for finding in findings for line in lines(finding)] == snapshot


def test_no_word_accuses() -> None:
    words = " ".join(
        line
        for text in CLAIMS.values()
        for finding in audit_claim(claim(text), 0.05).findings
        for line in lines(finding)
    )
    assert not {"error", "mistake", "fraud", "incorrect", "false"} & set(words.lower().split())


def test_no_number_is_shown_as_zero_that_is_not() -> None:
    findings = audit_claim(claim("effect: F(1,500)=60.2 p=.001"), 0.05).findings
    assert "between 4.7e-14 and 5.0e-14" in findings[0].message
