"""Mentions: which results of a document are one and the same."""

from __future__ import annotations

import pytest

from crossfoot.mentions import alike, fullest, mentions
from crossfoot.model import Claim, Finding, Span
from crossfoot.scan import claims_of, scan_text


def claim(text: str) -> Claim:
    [found] = claims_of(text)
    return found


@pytest.mark.parametrize(
    ("first", "second", "same"),
    [
        ("F(2, 57) = 4.31", "F(2, 57) = 4.31, p = .018", True),
        ("F(2, 57) = 4.31", "F(2, 57) = 4.3", True),
        ("F(2, 57) = 4.31", "F(2, 58) = 4.31", False),
        ("F(2, 57) = 4.31, p = .018", "F(2, 57) = 4.31, p = .2", False),
        ("t(40) = 2.20", "t(40) = 2.20, p = .034", True),
        ("t(40) = 2.20, p = .034", "r(40) = .31, p = .034", False),
    ],
)
def test_results_are_the_same_if_nothing_they_share_differs(
    first: str, second: str, same: bool
) -> None:
    assert alike(claim(first), claim(second)) is same
    assert alike(claim(second), claim(first)) is same


def test_mentions_stand_in_order_with_the_result_itself_among_them() -> None:
    report = scan_text("A t(40) = 2.20.\n\nB t(40) = 2.20, p = .034.\n\nC t(41) = 2.20.\n")
    first, second, third = report.claims
    assert [m.id for m in mentions(report, second)] == [first.id, second.id]
    assert fullest(mentions(report, first)) is second
    assert [m.id for m in mentions(report, third)] == [third.id]


def test_what_a_finding_sets_against_each_other_is_one_result() -> None:
    report = scan_text("A t(40) = 2.20.\n\nB t(40) = 2.90, p = .006.\n")
    first, second = report.claims
    span = second.audited.claim.span
    place = Span(span.start + second.base, span.end + second.base)
    finding = Finding("restatement", "conflict", "", 0, elsewhere=(place,))
    audited = first.audited._replace(findings=(*first.audited.findings, finding))
    report = report._replace(claims=(first._replace(audited=audited), second))
    for placed in report.claims:
        assert len(mentions(report, placed)) == 2
