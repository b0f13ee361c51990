"""Reports made by hand, so that an output is tested on exactly what it is given.

The study is invented: watering plans on the terraces of a valley that does not exist.
"""

import math

import pytest

from crossfoot.documents import open_document
from crossfoot.model import Audited, Check, Claim, Finding, Placed, Reading, Remedy, Report, Span

TERRACES = """\
Results

The three watering plans differed in yield, F(2, 57) = 4.31, p = .052, R² = .131. The slope of
rainfall was steep, b = 1,92, t(57) = 2.10, p = ,040 (two-sided). Plots were lost to frost.

Variance was homogeneous, F = 1.02, p = .000, and 13.1% of it was explained.
"""


class Builder:
    """Finds literals in the blocks of a document, in order, and makes claims of them."""

    def __init__(self, path, text, language="plain"):
        self.document = open_document(path, text.encode("utf-8", "surrogatepass"), language)
        self.claims = []

    def claim(self, block, readings, checks=(), findings=(), **more):
        source = self.document.blocks[block].source
        position = source.index(more.pop("after")) if "after" in more else 0
        made = []
        for quantity, relation, literal, low, high in readings:
            start = source.index(literal, position)
            position = start + len(literal)
            made.append(Reading(quantity, relation, literal, low, high, Span(start, position)))
        span = Span(made[0].span.start, made[-1].span.end)
        more = {"kind": "effect", "label": "F(2, 57)", **more}
        claim = Claim(text=source[span.start : span.end], span=span, readings=tuple(made), **more)
        audited = Audited(claim, tuple(checks), tuple(findings))
        base = self.document.blocks[block].start
        self.claims.append(Placed(f"c{len(self.claims) + 1}", base, audited))
        return self

    def report(self, problem=None):
        return Report(self.document, tuple(self.claims), problem)


@pytest.fixture
def builder():
    return Builder


@pytest.fixture
def terraces():
    """A reversal with remedies, a doubt, a note without anything recomputed, and agreement."""
    builder = Builder("drafts/terraces.txt", TERRACES)
    builder.claim(
        1,
        [
            ("df1", "=", "2", 2, 2),
            ("df2", "=", "57", 57, 57),
            ("F", "=", "4.31", 4.305, 4.315),
            ("p", "=", ".052", 0.0515, 0.0525),
            ("R2", "=", ".131", 0.1305, 0.1315),
        ],
        after="F(2, 57)",
        checks=[
            Check("p-from-f", "conflict"),
            Check("f-from-r2", "agrees"),
            Check("n-from-df", "not-applicable", "no sample size is printed"),
        ],
        findings=[
            Finding(
                "p-from-f",
                "reversal",
                "p is printed as .052, but F(2, 57) = 4.31 gives p between .0179 and .0182. "
                "Look at p, F or the degrees of freedom.",
                3,
                (0.017952, 0.018105),
                (
                    Remedy(3, "p", ".018", "the p of F(2, 57) = 4.31"),
                    Remedy(2, "F", "3.11", "two digits wrong"),
                ),
                (0, 1, 2),
                (
                    "p = P(F(df1, df2) ≥ F)",
                    "F from 4.305 to 4.315 gives p from .017952 to .018105",
                    "source: NIST/SEMATECH e-Handbook 1.3.6.6",
                ),
            )
        ],
        kind="overall-model",
    )
    builder.claim(
        1,
        [
            ("b", "=", "1,92", 1.915, 1.925),
            ("df", "=", "57", 57, 57),
            ("t", "=", "2.10", 2.095, 2.105),
            ("p", "=", ",040", 0.0395, 0.0405),
        ],
        after="b = 1,92",
        checks=[Check("p-from-t", "doubt", "the text does not say one-sided")],
        findings=[
            Finding(
                "p-from-t",
                "doubt",
                "The printed p fits only if it is corrected for several tests.",
                3,
                (0.0397, 0.0406),
                (Remedy(3, "p", "< ,05", "a bound printed as a value"),),
            )
        ],
        kind="coefficient",
        label="rainfall",
        context=("two-sided",),
        alpha=0.05,
    )
    builder.claim(
        2,
        [("F", "=", "1.02", 1.015, 1.025), ("p", "=", ".000", 0, 0.0005)],
        checks=[Check("p-from-f", "not-applicable", "the degrees of freedom are not printed")],
        findings=[Finding("bounds", "note", "A p of exactly zero cannot be; it is < .0005.", 1)],
        label="F",
    )
    builder.claim(
        2,
        [("R2", "=", "13.1%", 0.1305, 0.1315)],
        checks=[Check("bounds", "agrees")],
        findings=[],
        label="R²",
    )
    return builder.report()


@pytest.fixture
def settled(builder):
    """A conflict that a person has accepted."""
    finding = Finding(
        "p-from-f",
        "conflict",
        "The printed p is not the one that F has.",
        1,
        (0.0001, 0.0002),
        settled="the table prints p of the corrected test",
    )
    return (
        builder("settled.txt", "The plans differed, F = 9.99, p = .020.\n")
        .claim(
            0,
            [("F", "=", "9.99", 9.985, 9.995), ("p", "=", ".020", 0.0195, 0.0205)],
            checks=[Check("p-from-f", "conflict")],
            findings=[finding],
        )
        .report()
    )


@pytest.fixture
def paged(builder):
    """A finding on the second page, whose line counts from the top of that page."""
    text = "A title\fon a page.\n\nMore.\n\nThe plans differed, F = 9.99, p < .30.\n"
    made = builder("scan.pdf", text).claim(
        2,
        [("F", "=", "9.99", 9.985, 9.995), ("p", "<", ".30", -math.inf, 0.3)],
        findings=[Finding("p-from-f", "conflict", "No p.", 1, (0.4, math.inf))],
    )
    page = text.index("More")
    earlier = Span(text.index("title"), text.index("title") + 5)
    report = made.report()
    placed = report.claims[0]
    (finding,) = placed.audited.findings
    audited = placed.audited._replace(findings=(finding._replace(elsewhere=(earlier,)),))
    return report._replace(
        document=report.document._replace(pages=(0, page)),
        claims=(placed._replace(audited=audited),),
    )


@pytest.fixture
def hostile(builder):
    """A document and a path that try to steer the terminal."""
    text = "A \x1b[2Jtrick \u202e.05 = p\u202c \x9b31m, F = 9.99, p = .020\x07.\n"
    return (
        builder("\x1b]0;owned\x07.txt", text)
        .claim(
            0,
            [("F", "=", "9.99", 9.985, 9.995), ("p", "=", ".020", 0.0195, 0.0205)],
            findings=[
                Finding(
                    "p-from-f",
                    "conflict",
                    "Bad \x1b[31m \u2066message.",
                    1,
                    None,
                    (Remedy(0, "F", "\x1b9", "a \x07 slip"),),
                    (),
                    ("work\x1b[0m",),
                )
            ],
            label="\x1b[1m",
        )
        .report()
    )
