"""Words that change what may be concluded, and a stated significance level."""

from __future__ import annotations

import pytest

from crossfoot.reading.contexts import cues_in
from crossfoot.reading.cues import CUES
from crossfoot.scan import claims_of

RESULT = "F(2, 57) = 3.90, p = .026"


@pytest.mark.parametrize(
    ("words", "context"),
    [
        ("In a one-tailed test,", "one-sided"),
        ("Im einseitigen Test:", "one-sided"),
        ("In a two-sided test,", "two-sided"),
        ("With robust standard errors,", "robust"),
        ("With heteroskedasticity-consistent errors,", "robust"),
        ("With HC3 errors,", "robust"),
        ("With errors clustered by village,", "robust"),
        ("By weighted least squares,", "weighted"),
        ("By 2SLS,", "instrumental"),
        ("In a linear mixed-effects model,", "mixed"),
        ("In a random-intercept model,", "mixed"),
        ("With survey weights,", "survey"),
        ("In a logistic regression,", "generalised"),
        ("In a regression through the origin,", "no-intercept"),
        ("By Welch's test,", "adjusted-df"),
        ("With the Greenhouse–Geisser correction,", "adjusted-df"),
        ("After Bonferroni correction,", "adjusted-p"),
        ("In a post hoc comparison,", "adjusted-p"),
        ("Levene's test was", "assumption-test"),
        ("In a repeated-measures design,", "repeated-measures"),
        ("After multiple imputation,", "imputed"),
        ("By permutation,", "resampled"),
        ("With Yates' correction,", "corrected-statistic"),
    ],
)
def test_context(words: str, context: str) -> None:
    (claim,) = claims_of(f"{words} {RESULT}.")
    assert context in claim.context


@pytest.mark.parametrize(
    "words",
    [
        "The finding is robust:",  # robust to what was tried, not robust errors
        "The cluster analysis showed",
        "Hazardous plots differed:",
        "A coxswain's boat:",
        "The mixed hedges differed:",
    ],
)
def test_words_that_only_look_like_a_cue(words: str) -> None:
    (claim,) = claims_of(f"{words} {RESULT}.")
    assert claim.context == ()


def test_a_citation_in_the_same_brackets_says_quoted() -> None:
    (claim,) = claims_of(f"A gain was found (Okafor & Lind, 2019, p. 412; {RESULT}).")
    assert "quoted" in claim.context
    (own,) = claims_of(f"Unlike Okafor (2019), we found a gain ({RESULT}).")
    assert "quoted" not in own.context


def test_a_cue_of_the_sentence_does_not_reach_the_next_one() -> None:
    first, second = claims_of(f"Levene's test gave {RESULT}. Yield differed, F(2, 57) = 9.20.")
    assert "assumption-test" in first.context
    assert "assumption-test" not in second.context


@pytest.mark.parametrize(
    ("words", "alpha"),
    [
        ("Alpha was set at .01.", 0.01),
        ("We used α = .10.", 0.10),
        ("The significance level was set at 1%.", 0.01),
        ("A significance threshold of p < .005 was used.", 0.005),
        ("Results with p < .01 were considered statistically significant.", 0.01),
        ("alpha = 0,01", 0.01),
        ("Cronbach's alpha = .84", None),
        ("This was significant.", None),
        ("Nothing of that kind.", None),
    ],
)
def test_alpha(words: str, alpha: float | None) -> None:
    assert cues_in(words).alpha == alpha


def test_every_stem_is_lower_case_and_long_enough_to_mean_something() -> None:
    stems = [(stem, cue) for cue in CUES for stem in cue.stems]
    assert all(stem == stem.lower() and len(stem) >= 2 for stem, _ in stems)
    assert all(len(stem) >= 3 for stem, cue in stems if stem.isascii() and not cue.confirm)


def test_every_stem_is_found_where_it_stands() -> None:
    for cue in CUES:
        if not cue.confirm:
            for stem in cue.stems:
                assert cue.context in cues_in(f"x {stem} x").contexts, stem


def test_a_correction_concerns_comparisons_unless_the_sentence_says_it_of_the_test() -> None:
    text = (
        "Plots differed, F(2, 57) = 7.41, p = .001. Tukey's test separated two of them, "
        "t(57) = 3.80, p = .001."
    )
    omnibus, comparison = claims_of(text, "markdown")
    assert omnibus.context == ()
    assert comparison.context == ("adjusted-p",)
    (corrected,) = claims_of("F(2, 57) = 7.41, p = .003 (Bonferroni-corrected).", "markdown")
    assert corrected.context == ("adjusted-p",)
