"""What identities assume, and the contexts in a text that break or state an assumption."""

from __future__ import annotations

from collections.abc import Collection, Mapping
from typing import NamedTuple

#: What may be recognised around a claim, each with what it says.
CONTEXTS: Mapping[str, str] = {
    "one-sided": "The text says that the test or the interval is one-sided.",
    "two-sided": "The text says that the test is two-sided.",
    "either-sided": "The text speaks of one-sided tests, and does not say that this is one.",
    "robust": "Standard errors are robust to unequal variances or to clusters.",
    "weighted": "The fit weights its cases.",
    "instrumental": "The fit uses instruments, as two-stage least squares does.",
    "mixed": "The model has random effects, or is fitted to clusters by estimating equations.",
    "survey": "Estimates account for the design of a survey.",
    "generalised": "The model is a generalised linear one, or is fitted by maximum likelihood.",
    "no-intercept": "The model has no intercept.",
    "adjusted-df": "Degrees of freedom are adjusted, as Welch, Satterthwaite or "
    "Greenhouse and Geisser do.",
    "scaled-df": "Both degrees of freedom are multiplied by one number, as Greenhouse and Geisser "
    "do.",
    "limiting-df": "Degrees of freedom are infinite: p is of the limit of t or F.",
    "adjusted-p": "p values are adjusted for the number of comparisons.",
    "pseudo-r2": "What is called R² is an analogue of it or is not taken within the sample of "
    "the fit.",
    "quoted": "The result is quoted from another work.",
    "assumption-test": "The test is of an assumption of the model, not of the model.",
    "repeated-measures": "The same cases are measured more than once.",
    "by-subject": "The analysis takes the means of subjects.",
    "by-item": "The analysis takes the means of items.",
    "imputed": "Missing values are imputed and the results pooled.",
    "rank-correlation": "The correlation is one of ranks.",
    "several-effects": "Other effects of the design are tested against the same error.",
    "own-limits": "The interval is from a profile of the likelihood, a penalty, a posterior or the "
    "bootstrap.",
    "rank-test": "The test is one of ranks.",
    "missing-cases": "The text tells of cases that are missing.",
    "normal-limits": "The limits are taken from the normal distribution.",
    "own-distribution": "The statistic has a distribution of its own, whatever its letter.",
    "partialled": "Other variables are held constant.",
    "resampled": "p values or intervals come from permutations or the bootstrap.",
    "corrected-statistic": "The statistic, or its p value alone, carries a correction.",
    "variance-ratio": "F compares two variances, so that its p takes both tails.",
    "ratio-scale": "The text speaks of a ratio or an area, whose null value is not zero.",
    "named-adjustment": "The table names the adjustment of p for the number of tests.",
    "only-predictor": "The table shows no other predictor of the model.",
    "other-null": "The tests are against another value than zero.",
    "partial-sums": "Each sum of squares is what its effect adds to all others (type II or III), "
    "so that they need not add up.",
    "ratio-limits": "The table says that the interval is that of the odds ratio.",
    "default-stars": "Marks of significance have no legend and are taken for the usual levels.",
    "told-cases": "The number of cases is that of the table's caption or notes.",
    "counted-rows": "Degrees of freedom are counted from the rows of the table and its cases.",
    "joint": "One expression speaks of several results together.",
}


class Assumption(NamedTuple):
    """Something that must hold for an identity to hold.

    Attributes
    ----------
    key
        Its name.
    text
        What is assumed, as a sentence.
    broken_by
        Contexts under any of which it does not hold, or is not sure enough.
    stated_by
        Contexts under any of which the text states that it holds.
    spared_by
        Pairs of a context that breaks it and one beside which that does not.
    """

    key: str
    text: str
    broken_by: frozenset[str] = frozenset()
    stated_by: frozenset[str] = frozenset()
    spared_by: frozenset[tuple[str, str]] = frozenset()

    def breach(self, contexts: Collection[str]) -> str | None:
        """Return a context that breaks it, if one does."""
        for context in contexts:
            if context in self.broken_by and not any(
                (context, other) in self.spared_by for other in contexts
            ):
                return context
        return None


def _assumption(
    key: str,
    text: str,
    broken_by: str = "",
    stated_by: str = "",
    spared_by: tuple[tuple[str, str], ...] = (),
) -> Assumption:
    broken, stated = frozenset(broken_by.split()), frozenset(stated_by.split())
    return Assumption(key, text, broken, stated, frozenset(spared_by))


_ASSUMPTIONS = (
    _assumption(
        "one-result",
        "The numbers describe one and the same result.",
        "joint",
    ),
    _assumption(
        "least-squares",
        "The model is linear and fitted by ordinary least squares.",
        "weighted instrumental mixed survey generalised pseudo-r2 imputed",
    ),
    _assumption(
        "intercept",
        "The model has an intercept.",
        "no-intercept",
    ),
    _assumption(
        "overall",
        "F tests all slopes of the model together, and R² is of the same model.",
        "assumption-test other-null",
    ),
    _assumption(
        "classical-errors",
        "Standard errors are the classical ones, of errors with equal variances.",
        "robust survey resampled",
    ),
    _assumption(
        "within-sample",
        "R² is the share of the sum of squares that a fit with an intercept accounts for, taken "
        "in the sample of the fit.",
        "no-intercept instrumental pseudo-r2",
    ),
    _assumption(
        "two-sided",
        "The test is two-sided.",
        "one-sided",
        "two-sided",
    ),
    _assumption(
        "two-sided-interval",
        "The test is two-sided, as the interval is.",
        "one-sided either-sided",
        "two-sided",
    ),
    _assumption(
        "directed",
        "The test is one-sided.",
        "two-sided",
        "one-sided either-sided",
    ),
    _assumption(
        "reference-distribution",
        "The p value is the tail area of the distribution that the statistic is named after.",
        "resampled own-distribution",
    ),
    _assumption(
        "upper-tail",
        "p is the upper tail area of F.",
        "variance-ratio",
    ),
    _assumption(
        "zero-null",
        "The test asks whether the coefficient is zero.",
        "other-null rank-test",
    ),
    _assumption(
        "product-moment",
        "The correlation is Pearson's.",
        "rank-correlation",
    ),
    _assumption(
        "two-variables",
        "The correlation is of two variables, with no other held constant.",
        "partialled",
    ),
    _assumption(
        "uncorrected-statistic",
        "The p value belongs to the statistic as printed, not to a corrected one.",
        "corrected-statistic",
    ),
    _assumption(
        "plain-chi2",
        "χ² is Pearson's, without a continuity correction.",
        "corrected-statistic survey resampled",
    ),
    _assumption(
        "unadjusted-p",
        "The p value is not adjusted for the number of comparisons.",
        "adjusted-p",
    ),
    _assumption(
        "df-as-used",
        "The degrees of freedom as printed are those of the reference distribution.",
        "adjusted-df imputed",
    ),
    _assumption(
        "unadjusted-df",
        "The degrees of freedom are the counts of the design, without adjustment.",
        "adjusted-df limiting-df imputed mixed survey",
    ),
    _assumption(
        "proportional-df",
        "The degrees of freedom are the counts of the design, or both are one share of them.",
        "adjusted-df imputed mixed survey",
        spared_by=(("adjusted-df", "scaled-df"),),
    ),
    _assumption(
        "no-missing-cases",
        "The number of cases printed is that of the cases in the fit.",
        "imputed missing-cases",
    ),
    _assumption(
        "independent-cases",
        "Each case is one row of the analysis.",
        "repeated-measures by-item mixed",
    ),
    _assumption(
        "counted-predictors",
        "The number of predictors counts slopes, so that a factor counts once for each level but "
        "one.",
    ),
    _assumption(
        "fixed-effects",
        "The effects are fixed and F is the ratio of the effect's mean square to the error's.",
        "mixed survey generalised robust instrumental imputed resampled",
    ),
    _assumption(
        "one-way",
        "The effect is the only one in the design.",
        "repeated-measures mixed several-effects",
    ),
    _assumption(
        "orthogonal-effects",
        "Sums of squares are sequential, or the design is balanced, so that they add up.",
        "partial-sums",
    ),
    _assumption(
        "nested-models",
        "The smaller model is the larger one without some predictors, fitted to the same cases.",
    ),
    _assumption(
        "no-smaller-p",
        "The adjustment of p is one for the number of tests.",
        stated_by="named-adjustment",
    ),
    _assumption(
        "only-predictor",
        "R² is that of a model with this predictor alone.",
        stated_by="only-predictor",
    ),
    _assumption(
        "symmetric-limits",
        "The limits lie at equal distances from the estimate.",
        "resampled generalised mixed own-limits rank-test",
    ),
    _assumption(
        "t-limits",
        "The limits are taken from the t distribution rather than from the normal one.",
        "resampled generalised mixed survey instrumental imputed normal-limits own-limits "
        "rank-test",
    ),
    _assumption(
        "wald-limits",
        "The limits of the ratio are those of the coefficient, its estimate plus or minus a "
        "multiple of its standard error, raised to powers of e.",
        "resampled own-limits",
    ),
    _assumption(
        "limits-of-ratio",
        "The interval is that of the odds ratio, not of the coefficient.",
        stated_by="ratio-limits",
    ),
    _assumption(
        "fisher-limits",
        "The limits are Fisher's, of the inverse hyperbolic tangent of r.",
        "resampled rank-correlation",
    ),
    _assumption(
        "single-interval",
        "The interval covers one estimate at its level, not several estimates together.",
        "adjusted-p",
    ),
    _assumption(
        "limits-of-beta",
        "The interval is that of the standardised coefficient.",
    ),
    _assumption(
        "limits-of-coefficient",
        "The interval is that of the coefficient, and not of its exponential or of another number.",
        "ratio-scale generalised",
    ),
    _assumption(
        "limits-of-estimate",
        "The interval is that of the estimate that is tested.",
        "ratio-scale generalised",
    ),
    _assumption(
        "residual-df",
        "The degrees of freedom are those of the residuals, and not of clusters.",
        "robust",
    ),
    _assumption(
        "error-of-coefficient",
        "The standard error is that of the coefficient, not of the odds ratio.",
    ),
    _assumption(
        "wald-statistic",
        "χ² is the square of the coefficient over its standard error.",
    ),
    _assumption(
        "error-of-beta",
        "The standard error is that of the standardised coefficient.",
    ),
)

#: Every assumption by its key.
ASSUMPTIONS: Mapping[str, Assumption] = {item.key: item for item in _ASSUMPTIONS}
