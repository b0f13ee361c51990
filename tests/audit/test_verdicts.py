"""What is found on a claim, as examples: a claim, an arrow, and what must be found on it."""

from __future__ import annotations

import pytest

from audit.notation import claim
from crossfoot.audit import audit_claim

EXAMPLES = """
# p and its statistic
effect: F(2,57)=7.41 p=.001 -> nothing
effect: F(2,57)=7.41 p=.002 -> conflict p-from-f F
effect: F(2,57)=4.22 p=.190 -> reversal p-from-f p
effect: F(2,57)=4.22 p=.190 alpha=.01 -> conflict p-from-f p
effect: F(2,57)=4.22 p<.05 -> nothing
effect: F(2,57)=4.22 p>.05 -> reversal p-from-f p
effect: F(2,57)=7.41 p<.001 -> conflict p-from-f p
effect: F(2,40)=4.76 p≈.02 -> nothing
effect: F(2,40)=4.76 p≈.04 -> conflict p-from-f p
effect: F(1.62,47.10)=6.77 p=.005 [adjusted-df] -> nothing
effect: F(1.62,47.10)=6.77 p=.050 [adjusted-df] -> conflict p-from-f p
effect: F(2,57)=4.22 p=.19 [resampled] -> nothing
mean-comparison: t(58)=-2.26 p=.028 -> nothing
mean-comparison: t(58)=-2.26 p=.280 -> reversal p-from-t p
correlation: r(98)=.41 p<.001 -> nothing
correlation: r(98)=.41 p=.04 -> conflict p-from-r r
correlation: r=.30 n=45 p=.003 -> doubt p-from-r p
correlation: r=.30 n=45 p=.300 -> doubt p-from-r p
frequency: chi2(1)=8.47 p=.004 -> nothing
frequency: chi2(1)=8.47 p=.04 -> conflict p-from-chi2 p
mean-comparison: z=1.96 p=.050 -> nothing
mean-comparison: z=1.98 p=.090 -> reversal p-from-z p

# without degrees of freedom the normal distribution is still a bound
coefficient: b=2.19 t=1.50 p=.020 -> reversal p-from-t p
coefficient: b=2.19 t=1.97 p=.06 -> nothing

# one-sided, corrected and lowered
mean-comparison: t(58)=1.92 p=.030 -> doubt p-from-t p
mean-comparison: t(58)=1.92 p=.030 [one-sided] -> nothing
mean-comparison: t(58)=-1.92 p=.970 [one-sided] -> nothing
mean-comparison: t(58)=-1.92 p=.970 -> doubt p-from-t p
mean-comparison: t(58)=1.92 p=.030 [two-sided] -> reversal p-from-t p
mean-comparison: t(58)=1.92 p=.060 [one-sided] -> doubt p-from-t p
mean-comparison: t(58)=1.92 p=.300 [one-sided] -> reversal p-from-t p
effect: F(1,58)=3.69 p=.030 -> doubt p-from-f p
effect: F(1,58)=3.69 p=.060 [one-sided] -> nothing
effect: F(1,58)=3.69 p=.030 [one-sided] -> nothing
effect: F(2,58)=3.69 p=.0155 -> conflict p-from-f p
mean-comparison: t(58)=2.40 p=.0589 -> doubt p-from-t p
mean-comparison: t(58)=2.40 p=.06 -> reversal p-from-t p
mean-comparison: t(58)=2.40 p=.0589 [adjusted-p] -> nothing
effect: F(3,58)=3.40 p=.0708 -> reversal p-from-f p
effect: F(2,114)=3.40 p=.049 [repeated-measures] -> doubt p-from-f p
effect: F(2,114)=3.40 p=.149 [repeated-measures] -> reversal p-from-f p
effect: F(1,114)=3.40 p=.149 [repeated-measures two-sided] -> conflict p-from-f p
coefficient: b=1.20 p=.040 ci_low=-.10 ci_high=2.50 ci_level=95% -> doubt ci-against-p p
coefficient: b=1.2 p=.040 ci_low=-.1 ci_high=2.5 ci_level=95% [two-sided] -> reversal ci-against-p p
coefficient: b=1.00 se=.50 df=58 p=.025 -> doubt p-from-t p

# the whole model
overall-model: R2=.21 F(3,96)=8.51 p<.001 n=100 -> nothing
overall-model: R2=.21 R2_adj=.185 F(3,96)=8.51 p<.001 n=100 -> nothing
overall-model: R2=.30 F(3,96)=8.51 p<.001 -> conflict f-from-r2 F
overall-model: R2=.30 F(3,96)=8.51 p<.001 [robust] -> nothing
overall-model: R2=.30 F(3,96)=8.51 p<.001 [weighted] -> nothing
overall-model: R2=.31 R2_adj=.17 F(4,79)=8.70 p<.001 -> conflict r2-adjusted R2_adj
overall-model: R=.794 R2=.346 -> conflict r2-from-multiple-r R2
overall-model: R2=.21 F(3,96)=8.51 n=106 -> doubt n-from-df n
overall-model: R2=.21 F(3,96)=8.51 n=99 -> doubt n-from-df df2
overall-model: R2=.21 F(3,96)=8.51 n=90 -> conflict n-from-df n
overall-model: R2=.28 f2=.30 -> conflict f2-from-r2 f2
overall-model: R2=1.21 F(3,96)=8.51 -> conflict f-from-r2 R2; conflict bounds R2
overall-model: R2=.21 R2_adj=.41 -> conflict bounds R2_adj
effect: F(2,57)=7.41 p=1.3 -> reversal p-from-f p; conflict bounds p

# chains: no identity fails by itself
overall-model: R2_adj=.025 F(3,196)=3.37 p=.020 -> conflict r2-adjusted R2_adj
effect: df1=2 df2=57 eta2_partial=.21 p=.03 -> conflict eta2-partial eta2_partial
overall-model: n=142 R2=.433 R2_adj=.413 F=34.061 -> doubt f-from-r2 R2

# effect sizes
effect: F(1,58)=9.41 p=.003 eta2_partial=.14 -> nothing
effect: F(1,58)=9.41 p=.003 eta2_partial=.41 -> conflict eta2-partial eta2_partial
effect: F(1,58)=9.41 p=.003 eta2=.14 -> nothing
effect: F(1,58)=9.41 p=.003 eta2=.08 -> doubt eta2-partial eta2
effect: F(1,58)=9.41 p=.003 eta2=.20 -> conflict eta2-partial eta2
effect: F(1,58)=9.41 p=.003 omega2=.20 -> doubt omega2 omega2

# coefficients
coefficient: b=-0.84 se=0.13 t=-6.46 p<.001 -> nothing
coefficient: b=-0.84 se=0.13 t=6.46 p<.001 -> conflict t-from-b-se t; conflict signs t
coefficient: b=0.5 ci_low=0.1 ci_high=0.9 -> nothing
coefficient: b=0.7 ci_low=0.1 ci_high=0.9 -> doubt ci-centre ci_low
coefficient: b=2.0 se=0.5 df=50 ci_low=1.0 ci_high=3.0 -> nothing
coefficient: b=2.0 se=0.5 df=50 ci_low=0.5 ci_high=3.5 -> doubt ci-from-se se
coefficient: b=2.0 se=0.5 df=50 ci_low=0.5 ci_high=3.5 ci_level=95% -> conflict ci-from-se se
coefficient: b=2.0 se=0.5 t=4.0 p<.001 | df=50 -> nothing
coefficient: b=0.5 se=0.5 t=1.0 p=.006 | df=3 -> reversal p-from-t p
coefficient: b=0.5 p=.002 | t=1.0 df=3 -> reversal p-from-t p
coefficient: b=0.5 | t=1.0 df=3 p=.001 -> nothing
coefficient: b=0.5 t=1.0 | t=4.0 -> nothing

# changes
model-change: R2=.36 R2_change=.06 F_change(2,145)=6.80 p=.001 -> nothing
model-change: R2=.36 R2_change=.06 F_change(2,145)=3.62 -> conflict f-change F_change

# what is printed twice, and together with others
effect: F(2,57)=7.41 F=7.4 p=.002 -> conflict p-from-f F
effect: F(2,57)=7.41 F=3.2 p=.002 -> nothing
effect: F(1,58)=4.30 p<.01 [joint] -> nothing

# notes
effect: F(3,71)=59.62 p=.000 -> note bounds p
effect: F(3,71)=59.62 p<.000 -> note bounds p
effect: F(3,71)=59.62 p<0 -> note bounds p
effect: F(3,71)=59.62 p=0 -> note bounds p
effect: F=59.62 p<.001 -> note p-from-f F
effect: F=59.62 df1=3 p<.001 -> note p-from-f F
effect: F=59.62 p<.001 [quoted] -> nothing
effect: F<1 p>.05 -> nothing
mean-comparison: t=2.12 p=.04 -> note p-from-t t
correlation: r=.44 n=45 p=.002 -> nothing
coefficient: b=.44 t=2.12 p=.04 -> nothing
overall-model: F=8.72 R2=.21 p<.01 n=100 -> note p-from-f F
effect: F(2,57)=4.22 p=.000 -> conflict p-from-f p; note bounds p
"""


def examples() -> list[tuple[str, str]]:
    lines = [line for line in EXAMPLES.splitlines() if line and not line.startswith("#")]
    return [(text.strip(), found.strip()) for text, _, found in (x.partition("->") for x in lines)]


@pytest.mark.parametrize(("text", "expected"), examples())
def test_what_is_found(text: str, expected: str) -> None:
    made = claim(text)
    found = [
        f"{finding.severity} {finding.identity} {made.readings[finding.reading].quantity}"
        for finding in audit_claim(made, 0.05).findings
    ]
    assert ("; ".join(found) or "nothing") == expected
