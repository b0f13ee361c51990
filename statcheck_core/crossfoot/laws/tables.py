"""What the columns of a table of coefficients say about each other."""

from __future__ import annotations

from crossfoot.laws.arithmetic import at_least, at_most, reciprocal
from crossfoot.laws.declare import COEFFICIENT, form, identity
from crossfoot.laws.interval import Interval


def _same(p: Interval) -> Interval:
    return p


STARS = identity(
    "stars",
    "marks of significance against p",
    "p lies where its marks say, by the legend",
    "p_stars p",
    (
        form("p_stars", "marks as the legend gives them for p", "p", _same),
        form("p", "p as the legend explains the marks", "p_stars", _same),
    ),
    needs="unadjusted-p",
    assumption="The marks follow the legend of the table, and both are of one test.",
    source="common practice, no source",
    explanation="A legend such as * p < .05 says which p values each mark stands for. Where p "
    "lies elsewhere, the mark or p is misprinted, or the marks are of another test.",
    kinds=f"{COEFFICIENT} anova-table correlation effect model-summary overall-model "
    "mean-comparison model-change frequency",
)

TOLERANCE_VIF = identity(
    "tolerance-vif",
    "tolerance and variance inflation factor",
    "VIF = 1/tolerance",
    "vif tolerance",
    (
        form("vif", "VIF = 1/tolerance", "tolerance", reciprocal),
        form("tolerance", "tolerance = 1/VIF", "vif", reciprocal),
    ),
    needs="",
    assumption="Both are of one predictor in one model.",
    source="Kutner, Nachtsheim, Neter and Li 2005, Applied Linear Statistical Models, 5th "
    "edition, section 10.5",
    explanation="Tolerance is the share of a predictor's variance that the others leave, and the "
    "variance inflation factor its reciprocal. Where it is not, one of the two is misprinted.",
    kinds=COEFFICIENT,
)

ADJUSTED_P = identity(
    "adjusted-p",
    "p value adjusted for the number of tests",
    "adjusted p ≥ p",
    "p p_adjusted",
    (
        form("p_adjusted", "adjusted p ≥ p", "p", at_least, assumed="no-smaller-p"),
        form("p", "p ≤ adjusted p", "p_adjusted", at_most, assumed="no-smaller-p"),
    ),
    needs="",
    assumption="The adjustment is for the number of tests, and no such adjustment makes a p value "
    "smaller.",
    source="Holm 1979, Scandinavian Journal of Statistics 6, 65–70",
    explanation="Corrections for several tests, from Bonferroni's to the false discovery rate's, "
    "leave a p value as it is or make it larger. Where the adjusted p is the smaller one, the two "
    "have changed places or one is misprinted.",
    kinds=f"{COEFFICIENT} correlation effect mean-comparison frequency",
)

IDENTITIES = (STARS, ADJUSTED_P, TOLERANCE_VIF)
