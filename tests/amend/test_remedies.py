"""Remedies as changes: exactly the number, in whatever way the source spells it."""

from __future__ import annotations

import pytest

from amend.amending import remedied, scanned
from crossfoot.amend import Change
from crossfoot.amend.change import applied, block_at, reread
from crossfoot.amend.remedies import mended
from crossfoot.amend.safe import safe_rewrites
from crossfoot.amend.signs import in_mathematics, sign_before, written_sign
from crossfoot.model import Remedy, Span


@pytest.mark.parametrize(
    ("language", "text", "literal", "result"),
    [
        ("markdown", "F(2, 57) = 4.31, p = .081", ".018", "F(2, 57) = 4.31, p = .018"),
        ("markdown", "t(40) = 9.2, p=.000", "< .001", "t(40) = 9.2, p<.001"),
        ("markdown", "t(57) = &minus;13.1, p = .003", "−3.1", "t(57) = &minus;3.1, p = .003"),
        ("latex", "$t(40)=9.2$, $p=.000$", "< .001", "$t(40)=9.2$, $p<.001$"),
        ("latex", "t(40) = 9.2, p = .000", "< .001", "t(40) = 9.2, p $<$ .001"),
        ("html", "<p>t(40) = 9.2, p = 0,000", "< 0,001", "<p>t(40) = 9.2, p &lt; 0,001"),
        ("jats", "<p>t(40) = 9.2, p = .000</p>", "< .001", "<p>t(40) = 9.2, p &lt; .001</p>"),
        ("plain", "t(40) = 9.2, p of .000", "< .001", None),
    ],
)
def test_a_remedy_is_written_as_the_source_is(
    language: str, text: str, literal: str, result: str | None
) -> None:
    assert remedied(text, literal, language) in ([result], [])
    if result is not None:
        assert remedied(text, literal, language) == [result]


def test_what_a_slip_changed_in_two_places_is_changed_back_in_both() -> None:
    text = "The fit, R² = .13, F(57, 2) = 4.31, p = .018"
    assert remedied(text, "2") == ["The fit, R² = .13, F(2, 57) = 4.31, p = .018"]


def test_in_a_table_a_relation_is_written_before_its_number() -> None:
    head = "| Term | b | SE | t | df | p |\n|--|--|--|--|--|--|\n"
    text = f"{head}| x | 4.2 | 0.1 | 42.0 | 40 | .000 |\n"
    found = remedied(text, "< .001")
    assert found == [text.replace(".000", "< .001")]


def test_a_remedy_that_does_not_read_as_it_should_is_not_carried_out() -> None:
    report = scanned("F(2, 57) = 4.31, p = .081")
    [placed] = report.claims
    for literal in ("x", "", ".018, p = .2", "≈ .018 .3"):
        assert mended(report.document, placed, Remedy(3, "p", literal, "")) is None
    assert mended(report.document, placed, Remedy(9, "p", ".018", "")) is None


def test_only_what_is_surely_right_is_rewritten_at_once() -> None:
    text = "t(40) = 9.2, p = .000; t(41) = 2.2, p = .000. And F(2, 57) = 4.31, p = .081."
    amendment = safe_rewrites(scanned(text))
    assert amendment is not None
    assert applied(text, amendment.changes) == text.replace(".2, p = .000; t", ".2, p < .001; t")
    assert safe_rewrites(scanned("t(40) = 2.2, p = .034")) is None


@pytest.mark.parametrize(
    ("source", "sign"),
    [
        ("p = .05", "="),
        ("p &lt; .05", "&lt;"),
        (r"p \textless{} .05", r"\textless{}"),
        ("p&nbsp;=&nbsp;.05", "="),
        ("p .05", None),
        (r"$p \leq .05", r"\leq"),
        ("p = $.05", "="),
    ],
)
def test_a_sign_is_found_before_its_number(source: str, sign: str | None) -> None:
    found = sign_before(source, source.index(".05"))
    assert (found.printed if found else None) == sign
    if found is not None:
        assert source[slice(*found.span)] == sign


@pytest.mark.parametrize(
    ("language", "source", "relation", "written"),
    [
        ("html", "", "<", "&lt;"),
        ("html", "", "≤", "≤"),
        ("markdown", "", "<", "<"),
        ("latex", "$", "<", "<"),
        ("latex", "", "<", "$<$"),
        ("latex", "$", "≤", r"\le "),
        ("latex", "", "≤", r"$\le$"),
        ("latex", "", "=", "="),
        ("latex", r"\(", "<", "<"),
        ("latex", r"\$", "<", "$<$"),
    ],
)
def test_a_sign_is_written_as_its_place_wants_it(
    language: str, source: str, relation: str, written: str
) -> None:
    assert written_sign(relation, language, source, len(source)) == written
    assert in_mathematics("a $b$ c", 6) is False


def test_a_change_that_makes_other_claims_is_not_one() -> None:
    report = scanned("F(2, 57) = 4.31, p = .081. Then t(40) = 2.2, p = .034.")
    first, second = report.claims
    end = first.audited.claim.span.end
    assert reread(report.document, first, [Change(Span(end, end), "9")]) is not None
    assert reread(report.document, first, [Change(second.audited.claim.span, "none")]) is None
    assert block_at(report.document, -1) is None
    assert reread(report.document, first._replace(base=10_000), []) is None
