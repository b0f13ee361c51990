"""What one claim costs to audit.

    python -m pytest tests/benchmarks/test_audit_speed.py

The bounds are ten times what an idle machine takes, so that a busy one does not fail.
"""

from __future__ import annotations

from typing import Any

import pytest

from audit.notation import claim
from crossfoot.audit.verdict import judge

AGREEING = {
    "p from F": "effect: F(2,57)=7.41 p=.001",
    "p from t": "mean-comparison: t(58)=-2.26 p=.028",
    "model": "overall-model: R2=.21 F(3,96)=8.51 p<.001 n=100",
    "model with adjusted R²": "overall-model: R2=.21 R2_adj=.185 F(3,96)=8.51 p<.001 n=100",
    "coefficient": "coefficient: b=-0.84 se=0.13 t=-6.46 p<.001 | df=87",
}
FAILING = {
    "p from F": "effect: F(2,57)=7.41 p=.002",
    "model": "overall-model: R2=.30 R2_adj=.185 F(3,96)=8.51 p<.001 n=100",
    "chain": "overall-model: R2_adj=.025 F(3,196)=3.37 p=.020",
    "coefficient": "coefficient: b=0.84 se=0.13 t=-6.46 p<.001 ci_low=-1.10 ci_high=-.58 | df=87",
}


@pytest.mark.parametrize("name", AGREEING)
def test_a_claim_that_agrees(name: str, benchmark: Any) -> None:
    made = claim(AGREEING[name])
    assert benchmark(judge, made, 0.05).findings == ()
    assert benchmark.stats.stats.min < 1.5e-3


@pytest.mark.parametrize("name", FAILING)
def test_a_claim_with_remedies(name: str, benchmark: Any) -> None:
    made = claim(FAILING[name])
    assert benchmark(judge, made, 0.05).findings[0].remedies
    assert benchmark.stats.stats.min < 0.15
