"""Comparisons across a document, declared here for their documentation; the audit makes them."""

from __future__ import annotations

from crossfoot.laws.declare import identity
from crossfoot.laws.quantities import QUANTITIES

_KINDS = (
    "overall-model effect model-change coefficient correlation mean-comparison frequency "
    "anova-table coefficient-table model-summary"
)

RESTATEMENT = identity(
    "restatement",
    "one model, mentioned twice",
    "two mentions of one model print the same values",
    " ".join(key for key in QUANTITIES if key != "alpha"),
    (),
    needs="",
    assumption="Both mentions are of one model or test, as most of their numbers say.",
    source="common practice, no source",
    explanation="What the abstract says of a model is what the tables say, but for rounding. "
    "Where two mentions differ in one number and agree in the rest, one of them was not updated.",
    kinds=_KINDS,
)

SAMPLE_FLOW = identity(
    "sample-flow",
    "the sample against the degrees of freedom",
    "df1 + df2 ≤ n of the sample",
    "n df1 df2 df",
    (),
    needs="unadjusted-df independent-cases",
    assumption="Each case of the sample gives one row to the analysis.",
    source="common practice, no source",
    explanation="An analysis can't use more cases than the sample has. Where its degrees of "
    "freedom need more, n or a df is misprinted, or cases were measured more than once.",
    kinds=_KINDS,
)

IDENTITIES = (RESTATEMENT, SAMPLE_FLOW)
