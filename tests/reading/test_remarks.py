"""What an author may tell Crossfoot in a comment."""

from __future__ import annotations

import pytest

from crossfoot.model import Problem, Span
from crossfoot.reading.remarks import ASSUMABLE, Allow, Assume, parse

HERE = Span(3, 9)


def test_a_comment_that_speaks_to_nobody() -> None:
    assert parse("just a comment", HERE) is None
    assert parse("see crossfoot: its manual", HERE) is None


@pytest.mark.parametrize(
    ("words", "slugs", "reason"),
    [
        ("crossfoot: allow p-from-f because the p is exact", ("p-from-f",), "the p is exact"),
        (" Crossfoot: allow all because quoted as printed ", ("all",), "quoted as printed"),
        (
            "crossfoot: allow signs, stars because of\n the scale",
            ("signs", "stars"),
            "of the scale",
        ),
    ],
)
def test_allow(words: str, slugs: tuple[str, ...], reason: str) -> None:
    assert parse(words, HERE) == Allow(HERE, slugs, reason)


@pytest.mark.parametrize(
    "words",
    [
        "crossfoot: allow p-from-f",
        "crossfoot: allow because I say so",
        "crossfoot: allow p-from-f because",
    ],
)
def test_allow_needs_an_identity_and_a_reason(words: str) -> None:
    problem = parse(words, HERE)
    assert isinstance(problem, Problem)
    assert problem.span == HERE
    assert "reason" in problem.message


@pytest.mark.parametrize("context", ASSUMABLE)
def test_assume_a_context(context: str) -> None:
    assert parse(f"crossfoot: assume {context}", HERE) == Assume(HERE, context, None)


@pytest.mark.parametrize(
    ("words", "alpha"),
    [("alpha .01", 0.01), ("alpha = 0.10", 0.1), ("alpha 0,05 because of the design", 0.05)],
)
def test_assume_alpha(words: str, alpha: float) -> None:
    assert parse(f"crossfoot: assume {words}", HERE) == Assume(HERE, None, alpha)


@pytest.mark.parametrize("words", ["assume", "assume magic", "assume alpha 0.0", "ignore p-from-f"])
def test_what_is_not_understood_is_said(words: str) -> None:
    problem = parse(f"crossfoot: {words}", HERE)
    assert isinstance(problem, Problem)
    assert "not understood" in problem.message
