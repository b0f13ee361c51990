"""The pipeline: contexts that reach further than a paragraph, remarks, memory, bad documents."""

from __future__ import annotations

import pytest

from crossfoot.documents import open_document
from crossfoot.model import Finding, Report
from crossfoot.scan import claims_of, scan_document, scan_text

WRONG = "Yield differed, *F*(2, 57) = 7.41, *p* = .020."
RIGHT = "Yield differed, *F*(2, 57) = 7.41, *p* = .001."
FIT = "The model fit, R² = .41, *F*(3, 96) = 8.74, *p* < .001."


def findings(report: Report) -> list[Finding]:
    return [finding for placed in report.claims for finding in placed.audited.findings]


def identities(text: str, language: str = "markdown") -> list[str]:
    return [finding.identity for finding in findings(scan_text(text, language))]


def contexts(text: str) -> list[tuple[str, ...]]:
    return [placed.audited.claim.context for placed in scan_text(text).claims]


def test_claims_are_numbered_and_placed() -> None:
    text = f"# Results\n\n{RIGHT}\n\n{WRONG}\n"
    report = scan_text(text)
    assert [placed.id for placed in report.claims] == ["c1", "c2"]
    for placed in report.claims:
        for reading in placed.audited.claim.readings:
            start = placed.base + reading.span.start
            assert text[start : placed.base + reading.span.end] == reading.literal


def test_what_agrees_gives_nothing_and_what_does_not_is_found() -> None:
    assert identities(RIGHT) == []
    assert identities(WRONG) == ["p-from-f"]


class TestWordsThatReachFurther:
    def test_robust_errors_in_the_methods_hold_for_the_document(self) -> None:
        text = f"# Methods\n\nWe used robust standard errors.\n\n# Results\n\n{FIT}\n"
        assert contexts(text) == [("robust",)]
        assert identities(text) == []

    def test_elsewhere_they_hold_for_their_section(self) -> None:
        text = f"# Yield\n\nWe used robust standard errors.\n\n{FIT}\n\n# Height\n\n{FIT}\n"
        assert contexts(text) == [("robust",), ()]

    def test_subsections_of_the_methods_count_as_methods(self) -> None:
        text = f"# Methods\n\n## Plots\n\nWe used robust standard errors.\n\n# Results\n\n{FIT}\n"
        assert contexts(text) == [("robust",)]

    def test_one_sided_tests_must_be_told_of_all_tests(self) -> None:
        test = "Plots differed, *t*(58) = 1.92, *p* = .030."
        told = f"All tests were one-tailed.\n\n{test}\n"
        hinted = f"A directional hypothesis guided the design.\n\n{test}\n"
        assert contexts(told) == [("one-sided",)]
        assert contexts(hinted) == [("either-sided",)]

    def test_a_result_that_says_otherwise_is_believed(self) -> None:
        result = "Plots differed, *t*(58) = 2.05, *p* = .045 (two-tailed)."
        text = f"All tests were one-tailed.\n\n{result}\n"
        assert contexts(text) == [("two-sided",)]

    def test_a_stated_level_holds_from_there_on(self) -> None:
        text = f"Alpha was set at .01.\n\n{RIGHT}\n"
        assert scan_text(text).claims[0].audited.claim.alpha == 0.01

    def test_a_paragraph_with_a_result_speaks_for_itself_alone(self) -> None:
        text = f"With robust standard errors, {FIT}\n\n{FIT}\n"
        assert contexts(text) == [("robust",), ()]

    def test_a_heading_says_of_which_models_its_section_speaks(self) -> None:
        row = "b = −0.30, SE = 0.08, z = −3.75, p < .001, 95% CI [0.63, 0.87]"
        text = f"# Logistic regression\n\nDamp mattered.\n\nShade: {row}.\n"
        assert contexts(text) == [("generalised",)]
        assert identities(text) == []

    @pytest.mark.parametrize(
        ("line", "context"),
        [
            ("Logistic regression.", ("generalised",)),
            ("Tests against isometry (slope = 1).", ("other-null",)),
            (
                "Poisson regression, incidence rate ratios",
                ("generalised", "other-null", "ratio-scale"),
            ),
            ("Predictors of yield.", ()),
        ],
    )
    def test_a_line_above_a_table_is_as_good_as_its_caption(
        self, line: str, context: tuple[str, ...]
    ) -> None:
        table = (
            "| | Estimate | SE | t | p |\n|---|---|---|---|---|\n| A | 0.90 | 0.30 | 3.00 | .004 |"
        )
        assert contexts(f"{line}\n\n{table}\n") == [context]

    def test_of_a_paragraph_above_a_table_only_the_kind_of_model_holds_for_it(self) -> None:
        prose = "We fitted a logistic regression. " + "The plots lay along the dike. " * 8
        prose += "A rate ratio of two would be large."
        table = "| | b | SE | t | p |\n|---|---|---|---|---|\n| A | 0.90 | 0.30 | 3.00 | .004 |"
        assert contexts(f"{prose}\n\n{table}\n") == [("generalised",)]

    def test_the_prose_after_a_printout_quotes_its_adjusted_p_values(self) -> None:
        printout = (
            "```\ncontrast estimate     SE  df z.ratio p.value\n"
            "shade     0.07831 0.0222 Inf   3.525  0.0030\n\n{}\n```\n"
        )
        quoted = "Shade told, *z* = 3.53, *p* = .003.\n"
        told = printout.format("P value adjustment: holm method for 8 tests")
        assert contexts(f"{told}\n{quoted}") == [("adjusted-p",), ("adjusted-p",)]
        assert identities(f"{told}\n{quoted}") == []
        # Neither where nothing is adjusted, nor in another section.
        plain = printout.format("Results are on the log scale")
        assert identities(f"{plain}\n{quoted}") == ["p-from-z", "p-from-z"]
        assert contexts(f"{told}\n# Another study\n\n{quoted}") == [("adjusted-p",), ()]


class TestRemarks:
    def test_allow_settles_the_claim_before_it_on_its_line(self) -> None:
        report = scan_text(f"{WRONG} <!-- crossfoot: allow p-from-f because it is quoted -->\n")
        assert [finding.settled for finding in findings(report)] == ["it is quoted"]

    def test_allow_on_a_line_of_its_own_settles_the_next_claim_only(self) -> None:
        text = f"<!-- crossfoot: allow p-from-f because it is quoted -->\n\n{WRONG}\n\n{WRONG}\n"
        assert [f.settled for f in findings(scan_text(text))] == ["it is quoted", None]

    def test_allow_names_the_identity(self) -> None:
        report = scan_text(f"{WRONG} <!-- crossfoot: allow signs because it is quoted -->\n")
        assert [finding.settled for finding in findings(report)] == [None]

    def test_allow_all_settles_the_block(self) -> None:
        remark = "<!-- crossfoot: allow all because both are quoted -->"
        text = f"{WRONG}\n{WRONG} {remark}\n\n{WRONG}\n"
        reasons = [finding.settled for finding in findings(scan_text(text))]
        assert reasons == ["both are quoted", "both are quoted", None]

    def test_allow_all_between_blocks_settles_the_next_one(self) -> None:
        text = f"{WRONG}\n\n<!-- crossfoot: allow all because quoted -->\n\n{WRONG}\n"
        assert [f.settled for f in findings(scan_text(text))] == [None, "quoted"]

    def test_a_remark_after_everything_settles_nothing(self) -> None:
        for what in ("all", "p-from-f"):
            text = f"{WRONG}\n\n<!-- crossfoot: allow {what} because late -->\n"
            assert [f.settled for f in findings(scan_text(text))] == [None]

    def test_assume_holds_to_the_end_of_its_section(self) -> None:
        text = f"# Yield\n\n<!-- crossfoot: assume robust -->\n\n{FIT}\n\n# Height\n\n{FIT}\n"
        assert contexts(text) == [("robust",), ()]

    def test_assume_alpha(self) -> None:
        text = f"# A\n\n<!-- crossfoot: assume alpha .01 -->\n\n{RIGHT}\n\n# B\n\n{RIGHT}\n"
        alphas = [placed.audited.claim.alpha for placed in scan_text(text).claims]
        assert alphas == [0.01, None]

    def test_a_remark_that_is_not_understood_is_a_problem_with_a_place(self) -> None:
        text = f"{RIGHT} <!-- crossfoot: allow p-from-f -->\n"
        (problem,) = scan_text(text).document.problems
        assert problem.span is not None
        assert "crossfoot: allow p-from-f" in text[problem.span.start : problem.span.end]

    @pytest.mark.parametrize(
        ("language", "comment"),
        [("latex", "% {}"), ("html", "<!-- {} -->"), ("markdown", "<!-- {} -->"), ("rst", ".. {}")],
    )
    def test_each_format_has_its_own_comments(self, language: str, comment: str) -> None:
        remark = comment.format("crossfoot: allow all because quoted")
        text = f"{remark}\n\nYield differed, F(2, 57) = 7.41, p = .020.\n"
        assert [f.settled for f in findings(scan_text(text, language))] == ["quoted"]


def test_an_unreadable_document_is_a_report_with_a_problem() -> None:
    report = scan_document(open_document("x.md", b"\x00\x01\x02binary\x00"))
    assert report.problem
    assert report.claims == ()


def test_editing_one_paragraph_reads_one_paragraph() -> None:
    from crossfoot.reading import read_block

    paragraphs = [f"Plot {n} differed, *F*(2, 57) = {n}.41, *p* < .05." for n in range(1, 200)]
    scan_text("\n\n".join(paragraphs))
    before = read_block.cache_info().misses
    paragraphs[100] = "Plot 100 did not differ, *F*(2, 57) = 0.41, *p* = .666."
    scan_text("\n\n".join(paragraphs))
    assert read_block.cache_info().misses == before + 1


def test_claims_of_a_text() -> None:
    (claim,) = claims_of("F(2, 57) = 4.31, n = 60")
    assert [reading.quantity for reading in claim.readings] == ["df1", "df2", "F", "n"]


def test_half_of_a_surrogate_pair_is_a_character_like_any_other() -> None:
    half = "\ud83d"
    claims = scan_text(f"{half} {RIGHT} {half}").claims
    assert [placed.audited.claim.span for placed in claims] == [
        placed.audited.claim.span._replace(
            start=placed.audited.claim.span.start + 2, end=placed.audited.claim.span.end + 2
        )
        for placed in scan_text(RIGHT).claims
    ]
    assert len(claims_of(f"{half} {RIGHT}", "markdown")) == 1
