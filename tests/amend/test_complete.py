"""Completed results: the value that follows, where and how its author would write it."""

from __future__ import annotations

import pytest

from amend.amending import completed, continued, scanned
from crossfoot.amend.complete import completions
from crossfoot.amend.values import hand_of, value_words
from crossfoot.audit.literals import Numeral
from crossfoot.laws.interval import Interval

STYLED = Numeral("", "0", ".", "000", "", 0, "", 0.5)


@pytest.mark.parametrize(
    ("language", "text", "lead", "result"),
    [
        ("markdown", "t(40) = 2.20.", "p", "t(40) = 2.20, *p* = .034."),
        ("markdown", "**t(40) = 2.20**.", "p", "**t(40) = 2.20**, *p* = .034."),
        ("markdown", "r(40) = -.31.", "p", "r(40) = -.31, *p* = .046."),
        ("latex", "$t(40) = 2.20$.", "p", "$t(40) = 2.20, p = .034$."),
        ("latex", r"\textit{t}(40) = 2.20.", "p", r"\textit{t}(40) = 2.20, $p = .034$."),
        (
            "html",
            "<p><i>t</i>(40) = 2.20.</p>",
            "p",
            "<p><i>t</i>(40) = 2.20, <i>p</i> = .034.</p>",
        ),
        ("jats", "<p>t(40) = 2.20.</p>", "p", "<p>t(40) = 2.20, <italic>p</italic> = .034.</p>"),
        ("plain", "t(40) = 2,20.", "p", "t(40) = 2,20, p = 0,034."),
        ("plain", "F(2, 57) = 4.31.", "ηp²", "F(2, 57) = 4.31, ηp² = .13."),
        (
            "latex",
            "It rose, $b = 0.42$, $SE = 0.11$, $t(57) = 3.82$.",
            "95% CI",
            r"It rose, $b = 0.42$, $SE = 0.11$, $t(57) = 3.82$, 95\% CI $[0.20, 0.64]$.",
        ),
    ],
)
def test_each_format_has_its_own_way(language: str, text: str, lead: str, result: str) -> None:
    assert completed(text, lead, language) == [result]


@pytest.mark.parametrize(
    ("text", "result"),
    [
        (
            "A t(40) = 2.20, p=0.03. B t(50) = 2.20.",
            "A t(40) = 2.20, p=0.03. B t(50) = 2.20, p=0.03.",
        ),
        (
            "A t(40) = 2.20; _P_ = .034. B t(50) = 2.20.",
            "A t(40) = 2.20; _P_ = .034. B t(50) = 2.20; _P_ = .032.",
        ),
        (
            "A t(40) = 9.20, p < .001. B t(50) = 2.20.",
            "A t(40) = 9.20, p < .001. B t(50) = 2.20, p = .032.",
        ),
        (
            "A $t(40) = 2.20$, $p = .034$. B $t(50) = 2.20$.",
            "A $t(40) = 2.20$, $p = .034$. B $t(50) = 2.20$, $p = .032$.",
        ),
        (
            "A t(40) = 2.20 (p = .034). B t(50) = 2.20.",
            "A t(40) = 2.20 (p = .034). B t(50) = 2.20, *p* = .032.",
        ),
    ],
)
def test_the_authors_own_way_is_learnt_from_the_other_results(text: str, result: str) -> None:
    assert completed(text, "p") == [result]


def test_what_follows_only_within_a_range_is_said_with_the_range() -> None:
    report = scanned("t(40) = 2.2.")
    [placed] = report.claims
    titles = [amendment.title for amendment in completions(report, placed)]
    assert titles == ["Add p = .034 (between .0300 and .0377)"]


def test_nothing_is_added_to_tables_nor_to_what_contradicts_itself() -> None:
    table = "| Term | b | SE | t | df |\n|--|--|--|--|--|\n| x | 4.2 | 0.1 | 42.0 | 40 |\n"
    for text in (table, "F(2, 57) = 4.31, R² = .90, the model."):
        report = scanned(text)
        assert all(completions(report, placed) == [] for placed in report.claims)


@pytest.mark.parametrize(
    ("quantity", "interval", "words"),
    [
        ("p", (0.04589, 0.04591), ("=", "0.046")),
        ("p", (0.0421, 0.0496), ("=", "0.046")),
        ("p", (1e-9, 0.0009), ("<", "0.001")),
        ("p", (0.0, float("inf")), None),
        ("n", (60.0, 60.0), ("=", "60")),
        ("n", (60.0, 61.0), None),
        ("t", (-2.2, -2.2), ("=", "-2.200")),
    ],
)
def test_a_value_is_written_with_the_decimals_of_its_model(
    quantity: str, interval: tuple[float, float], words: tuple[str, str] | None
) -> None:
    middle = 0.0459 if quantity == "p" else interval[0]
    assert value_words(quantity, Interval(*interval), STYLED, middle) == words


@pytest.mark.parametrize(
    ("text", "other", "literal"),
    [
        ("t(40) = 2.20", "", ".000"),
        ("t(40) = 2,20", "", "0,000"),
        ("t(40) = 2.20", "R² = 0.31, f² = .4", "0.000"),
        ("t(40) = 2.20", "t(30) = 2.2, p = 0.04", "0.00"),
    ],
)
def test_a_hand_is_taken_from_what_is_nearest_to_it(text: str, other: str, literal: str) -> None:
    [claim] = [placed.audited.claim for placed in scanned(text).claims]
    others = [placed.audited.claim for placed in scanned(other).claims]
    hand = hand_of("p", claim, others)
    zeros = "0" * len(hand.fraction)
    assert hand._replace(whole=hand.whole and "0", fraction=zeros).text == literal


@pytest.mark.parametrize(
    ("language", "text", "result"),
    [
        ("markdown", "t(40) = 2.20, p|", "t(40) = 2.20, p = .034"),
        ("markdown", "t(40) = 2.20, p=|", "t(40) = 2.20, p=.034"),
        ("markdown", "t(40) = 2.20, *p* <|", "t(40) = 2.20, *p* = .034"),
        ("markdown", "t(40) = 2.20, *p* = .0|", "t(40) = 2.20, *p* = .034"),
        ("markdown", "$t(40) = 2.20, p = |", "$t(40) = 2.20, p = .034"),
        (
            "latex",
            r"\textit{t}(40) = 9.20, \textit{p} |",
            r"\textit{t}(40) = 9.20, \textit{p} < .001",
        ),
        ("html", "<p>t(40) = 9.20, p |</p>", "<p>t(40) = 9.20, p &lt; .001</p>"),
        (
            "markdown",
            "b = 0.42, SE = 0.11, t(57) = 3.82, 95% CI [|",
            "b = 0.42, SE = 0.11, t(57) = 3.82, 95% CI [0.20, 0.64",
        ),
    ],
)
def test_an_author_can_go_on_where_they_stopped(language: str, text: str, result: str) -> None:
    assert continued(text, language) == [result]


@pytest.mark.parametrize(
    "text",
    [
        "|",
        "p|",
        "Some words, p|",
        "t(40) = 2.20. The p|",
        "t(40) = 2.20, q|",
        "t(40) = 2.20, 95% CI|",
        "t(40) = 2.20 and many more words that have nothing to do with it, p|",
        "| Term | t |\n|--|--|\n| x | p|",
    ],
)
def test_elsewhere_nothing_is_proposed(text: str) -> None:
    assert continued(text) == []
