"""Allowances: a remark at a place where it speaks of just the one finding."""

from __future__ import annotations

import pytest

from amend.amending import allowed, scanned
from crossfoot.amend.reasons import CHECKED, reasons
from crossfoot.documents import FORMATS
from crossfoot.settings import DEFAULTS

WRONG = "t(40) = 2.20, p = .5"
WORDS = "crossfoot: allow p-from-t because of a reason"


def result(n: int) -> str:
    return WRONG.replace("40", str(n))


@pytest.mark.parametrize(
    ("language", "text", "number", "expected"),
    [
        ("markdown", f"One.\n\n{result(40)}.", 0, f"One.\n\n<!-- {WORDS} -->\n\n{result(40)}."),
        (
            "markdown",
            f"One.\r\n\r\n{result(40)}.",
            0,
            f"One.\r\n\r\n<!-- {WORDS} -->\r\n\r\n{result(40)}.",
        ),
        (
            "markdown",
            f"{result(40)}; {result(50)}.",
            1,
            f"{result(40)}; {result(50)}. <!-- {WORDS} -->",
        ),
        ("latex", f"{result(40)}, {result(50)}.", 0, f"% {WORDS}\n{result(40)}, {result(50)}."),
        (
            "latex",
            f"{result(40)}, {result(50)}, {result(60)}.",
            1,
            f"{result(40)}, {result(50)}, % {WORDS}\n{result(60)}.",
        ),
        (
            "html",
            f"<p>{result(40)}, {result(50)}</p>",
            0,
            f"<p>{result(40)}, <!-- {WORDS} --> {result(50)}</p>",
        ),
        ("plain", f"One.\n{result(40)}.", 0, f"# {WORDS}\nOne.\n{result(40)}."),
        ("rst", f"{result(40)}, {result(50)}.", 1, None),
    ],
)
def test_a_remark_stands_where_it_speaks_of_one_finding(
    language: str, text: str, number: int, expected: str | None
) -> None:
    assert allowed(text, number, language) == expected


@pytest.mark.parametrize("language", [name for name in FORMATS if name != "notebook"])
def test_in_every_format_the_finding_is_settled_and_no_other(language: str) -> None:
    paragraph = {"html": "<p>{}</p>\n", "jats": "<p>{}</p>\n"}.get(language, "{}\n\n")
    text = "".join(paragraph.format(f"On plot {n} it was {result(n)}.") for n in (40, 50, 60))
    for number in range(3):
        changed = allowed(text, number, language)
        if changed is None:
            continue  # where comments can't be told from text
        settled = [f.settled for p in scanned(changed, language).claims for f in p.audited.findings]
        assert settled == ["of a reason" if n == number else None for n in range(3)]


def test_reasons_are_those_that_would_explain_the_finding() -> None:
    report = scanned("t(40) = 2.20, p = .017. But t(40) = 2.20, p = .5.")
    one, other = report.claims
    [finding] = one.audited.findings
    offered = reasons(one, finding, DEFAULTS)
    assert offered[0] == "the test is one-sided"
    assert offered[-1] == CHECKED
    [finding] = other.audited.findings
    assert "the test is one-sided" not in reasons(other, finding, DEFAULTS)
