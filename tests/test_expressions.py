"""Expressions that are compiled when they are first used."""

from __future__ import annotations

import re

import pytest

from crossfoot.expressions import expression


def test_it_is_used_like_a_compiled_one() -> None:
    number = expression(r"(\d+)x", re.IGNORECASE)
    assert number.pattern == r"(\d+)x"
    assert [match.span(1) for match in number.finditer("12X 3x")] == [(0, 2), (4, 5)]
    assert number.match("12X", 1) is not None
    assert number.fullmatch("12X ") is None
    assert number.sub(r"<\1>", "12X") == "<12>"
    assert expression(rb"a+").search(b"baa") is not None


def test_it_is_compiled_at_its_first_use() -> None:
    wrong = expression("(")
    with pytest.raises(re.error):
        wrong.search("")


def test_it_has_what_an_expression_has_and_no_more() -> None:
    with pytest.raises(AttributeError):
        expression("a").groups_and_more  # type: ignore[attr-defined]  # noqa: B018 - that it fails is the point
