"""Comparisons across a document: restated results, and the sample they rest on."""

from __future__ import annotations

import pytest

from crossfoot import scan_text

RESULT = "Tillage mattered, F(2, 57) = 3.90, p = .026, ω² = .088."


def doubts(*paragraphs: str) -> list[tuple[str, str, int]]:
    """Return the comparisons that fail: identity, printed literal, and places elsewhere."""
    text = "\n\n".join(paragraphs)
    return [
        (
            finding.identity,
            placed.audited.claim.readings[finding.reading].literal,
            len(finding.elsewhere),
        )
        for placed in scan_text(text).reports[0].claims
        for finding in placed.audited.findings
        if finding.identity in {"restatement", "sample-flow"}
    ]


def checks(*paragraphs: str) -> list[str]:
    return [
        check.outcome
        for placed in scan_text("\n\n".join(paragraphs)).reports[0].claims
        for check in placed.audited.checks
        if check.identity == "restatement"
    ]


def test_a_result_mentioned_again_with_another_number_is_in_doubt() -> None:
    here = "Load mattered, b = 0.427, SE = 0.112, β = .36."
    there = "Again, load mattered, b = 0.427, SE = 0.112, β = .63."
    assert doubts(here, there) == [("restatement", ".63", 1)]


def test_the_mention_that_stands_alone_is_in_doubt() -> None:
    right = "Load mattered, b = 0.427, SE = 0.112, β = .36."
    wrong = "So load mattered (b = 0.427, SE = 0.112, β = .63)."
    assert doubts(wrong, right, "As said: " + right) == [("restatement", ".63", 1)]


def test_mentions_that_agree_say_so() -> None:
    assert doubts(RESULT, "Again: " + RESULT) == []
    assert checks(RESULT, "Again: " + RESULT) == ["agrees", "agrees"]


def test_rounding_is_no_difference() -> None:
    assert (
        doubts(
            "Load mattered, b = 0.427, SE = 0.112, β = .36.",
            "Load mattered, b = 0.427, SE = 0.112, β = .364.",
        )
        == []
    )


@pytest.mark.parametrize(
    "other",
    [
        "Slope mattered, b = 0.427, SE = 0.131, β = .63.",  # only b is alike
        "Slope mattered, F(2, 57) = 5.11, p = .009.",
        "After correction, b = 0.427, SE = 0.112, β = .63, all p's < .05 by Holm's method.",
    ],
)
def test_results_that_share_little_are_different_ones(other: str) -> None:
    assert doubts("Load mattered, b = 0.427, SE = 0.112, β = .36.", other)[1:] == []


def test_an_adjusted_p_is_not_the_p_of_the_test() -> None:
    assert (
        doubts(
            "A and B differed, b = 3.427, SE = 1.558, t(57) = 2.20, p = .032.",
            "A and B differed, b = 3.427, SE = 1.558, t(57) = 2.20, Bonferroni-adjusted p = .096.",
        )
        == []
    )


def test_few_digits_are_alike_by_chance() -> None:
    here = "Load mattered, b = 0.42, SE = 0.11, β = .36."
    assert doubts(here, "Age mattered, b = 0.42, SE = 0.11, β = .63.") == []


def test_p_follows_from_its_test_and_so_tells_no_more() -> None:
    """Two t tests of many cases that share t share p as well, whatever their df are."""
    here = "Load mattered, t(132) = -0.374, p = .709."
    assert doubts(here, "Age did not, t(177) = -0.374, p = .709.") == []


def test_what_one_expression_says_of_several_results_is_no_mention() -> None:
    here = "Load mattered, b = 0.427, SE = 0.112, β = .36."
    there = "All slopes were b = 0.427, SE = 0.112, β = .63, both ts(58) > 3.1, all ps < .01."
    assert doubts(here, there)[1:] == []


def test_intervals_of_other_levels_differ_in_their_level() -> None:
    assert (
        doubts(
            "Load mattered, b = 0.427, SE = 0.112, 95% CI [0.203, 0.651].",
            "Load mattered, b = 0.427, SE = 0.112, 90% CI [0.203, 0.651].",
        )
        == []
    )


def test_what_the_result_itself_shows_is_not_said_twice() -> None:
    right = "Tillage mattered, F(2, 57) = 3.90, p = .026, ηp² = .12."
    wrong = "Tillage mattered, F(2, 57) = 3.90, p = .026, ηp² = .21."
    assert doubts(right, wrong) == []


def test_degrees_of_freedom_beyond_the_sample_are_in_doubt() -> None:
    assert doubts("We asked *N* = 50 riders.", RESULT) == [("sample-flow", "57", 1)]
    assert doubts("We asked *N* = 50 riders.", "They correlated, r(58) = .41, p = .001.") == [
        ("sample-flow", "58", 1)
    ]


@pytest.mark.parametrize(
    "methods",
    [
        "We asked N = 60 riders.",
        "We asked N = 50 riders in each of several sessions.",
        "We asked N = 50 riders and N = 40 drivers.",
        "We asked riders.",
    ],
)
def test_a_sample_that_is_large_enough_or_not_the_only_one_is_none(methods: str) -> None:
    assert doubts(methods, RESULT) == []


def test_the_cases_of_one_test_are_no_sample() -> None:
    assert doubts("Sites differed, χ²(2, N = 40) = 3.10, p = .212.", RESULT) == []


def test_a_result_with_its_own_sample_is_left_to_it() -> None:
    assert doubts("We asked N = 50 riders.", "Load and rut: r = .41, n = 90, p < .001.") == []


def test_adjusted_degrees_of_freedom_are_no_counts() -> None:
    assert doubts("We asked N = 20 riders.", "Welch's t(21.4) = -1.93, p = .067.") == []
