"""How far words reach in a document: forward, back from methods told last, and not too far."""

from __future__ import annotations

from crossfoot.scan import scan_text

#: p is three times that of the test, half of it, or of fewer degrees of freedom.
TRIPLED = "Plots differed, *t*(58) = 2.61, *p* = .035."
HALVED = "Plots differed, *t*(58) = 1.92, *p* = .030."
LOWERED = "Blocks differed, *F*(2, 58) = 4.17, *p* = .033."
TUKEY = "Plots differed, *t*(57) = 2.91, *p* = .014."
FIT = "The model fit, R² = .41, *F*(3, 96) = 8.74, *p* < .001."
FALSE = "Plots differed, *t*(58) = 2.61, *p* = .210."


def found(*paragraphs: str) -> list[tuple[str, str]]:
    claims = scan_text("\n\n".join(paragraphs)).claims
    return [(f.severity, f.identity) for placed in claims for f in placed.audited.findings]


def contexts(*paragraphs: str) -> list[tuple[str, ...]]:
    return [placed.audited.claim.context for placed in scan_text("\n\n".join(paragraphs)).claims]


class TestMethodsToldLast:
    def test_they_hold_for_the_results_before_them(self) -> None:
        holm = "All pairwise *p* values were adjusted by Holm's method."
        assert found("# Results", TRIPLED) == [("conflict", "p-from-t")]
        assert found("# Results", TRIPLED, "# Methods", holm) == []
        assert found("# Results", TRIPLED.replace("35", "01"), "# Methods", holm) != []
        robust = "We used robust standard errors."
        assert contexts("# Results", FIT, "# Methods", robust) == [("robust",)]

    def test_a_level_does_as_well(self) -> None:
        text = "\n\n".join(["# Results", FIT, "# Methods", "Alpha was set at .01."])
        assert scan_text(text).claims[0].audited.claim.alpha == 0.01

    def test_those_of_one_study_do_not_hold_for_the_one_before(self) -> None:
        told = ["## Methods", "All tests were one-tailed."]
        first, second = ["# Study 1", HALVED], ["# Study 2", *told, HALVED]
        assert contexts(*second) == [("one-sided",)]
        assert contexts(*first, "# Study 2", *told, HALVED) == [("either-sided",), ("one-sided",)]
        third = ["# Study 3", "## Methods", "Plots were dug.", "## Results", HALVED]
        assert contexts(*second, *third) == [("one-sided",), ("either-sided",)]


class TestWhatIsSpokenOfElsewhere:
    def test_a_multiple_of_p_is_explained_by_corrections(self) -> None:
        told = "Effects were followed up with Bonferroni-corrected comparisons."
        assert found(told, TRIPLED) == []
        assert found(told, FALSE) == [("doubt", "p-from-t")]
        assert found(told, TRIPLED.replace(".035", ".001")) == [("conflict", "p-from-t")]

    def test_any_larger_p_may_be_a_corrected_one_and_none_that_is_smaller(self) -> None:
        told = "Tukey's HSD followed."
        assert found(told, TUKEY) == [("doubt", "p-from-t")]
        smaller = TUKEY.replace(".014", ".001")
        assert found(told, smaller) == [("conflict", "p-from-t")]

    def test_lowered_degrees_of_freedom(self) -> None:
        told = "Where sphericity was violated, the Greenhouse–Geisser correction was applied."
        assert found(told, LOWERED) == []
        assert found(told, LOWERED.replace(".033", ".330")) == [("reversal", "p-from-f")]

    def test_another_kind_of_standard_errors(self) -> None:
        told = "Table 3 has cluster-robust standard errors.\n\n# Discussion"
        assert found(FIT) == [("conflict", "f-from-r2")]
        assert found(told, FIT) == [("doubt", "f-from-r2")]

    def test_permutations_but_not_the_bootstrap(self) -> None:
        wrong = "Sites differed, *F*(2, 27) = 2.14, *p* = .008."
        permuted = "Sites were compared by PERMANOVA (999 permutations, *N* = 30)."
        assert found(permuted, "# Results", wrong) == [("doubt", "p-from-f")]
        booted = "Indirect effects have bootstrapped intervals."
        assert found(booted, "# Results", wrong) == [("reversal", "p-from-f")]


class TestASentenceAmongResults:
    def test_it_speaks_for_the_section_if_it_speaks_of_all(self) -> None:
        said = f"{FIT} All *p* values were Bonferroni-corrected."
        assert contexts(said, TRIPLED)[1] == ("adjusted-p",)
        assert contexts(said, "# Another", TRIPLED)[1] == ()

    def test_of_comparisons_alone_it_explains_what_is_larger(self) -> None:
        said = f"{FIT.replace('8.74', '22.24')} Comparisons were Tukey-adjusted."
        assert found(said, TUKEY) == []
        assert found(said, "# Another", TUKEY) == [("doubt", "p-from-t")]

    def test_one_test_of_several_in_a_sentence_may_be_one_sided(self) -> None:
        both = (
            "Plots differed, *t*(58) = 1.92, *p* = .030, one-tailed, but rows did not, "
            "*t*(58) = 0.31, *p* = .758."
        )
        assert found(both) == []
        assert contexts(both) == [("either-sided",)] * 2

    def test_what_a_neighbouring_sentence_says_may_hold(self) -> None:
        assert found(f"{HALVED} This test was one-tailed.") == []
        assert found(f"{HALVED.replace('.030', '.300')} This test was one-tailed.") != []

    def test_operations_are_unilateral_and_winds_directional(self) -> None:
        for words in ("After unilateral repair", "In directional wind"):
            assert contexts(f"{words} plots differed, *t*(58) = 1.92, *p* = .060.") == [()]
        assert contexts("En un contraste unilateral, *t*(58) = 1,92, *p* = .030.") == [
            ("one-sided",)
        ]


class TestPartialCorrelations:
    def test_their_degrees_of_freedom_do_not_tell_n(self) -> None:
        result = "depth and catch were related, *r*(54) = .34, *p* = .010, *n* = 58."
        assert found(f"Over all plots, {result}") == [("doubt", "n-from-df")]
        assert found(f"Controlling for age and size, {result}") == []
        assert found("Partial correlations are reported.", f"Over all plots, {result}") == []


class TestTheBootstrap:
    MEDIATED = "We tested mediation with bootstrapped confidence intervals (5,000 draws)."

    def test_its_intervals_say_nothing_of_p(self) -> None:
        assert found("# Methods", self.MEDIATED, "# Results", FALSE) == [("reversal", "p-from-t")]

    def test_its_intervals_need_not_be_even(self) -> None:
        slope = "The slope was *b* = 0.84, *SE* = 0.31, 95% CI [0.31, 1.62]."
        assert found("# Results", slope) != []
        assert found("# Methods", self.MEDIATED, "# Results", slope) == []

    def test_its_p_values_need_not_follow(self) -> None:
        told = "All *p* values were obtained with the bootstrap."
        assert found("# Methods", told, "# Results", FALSE) == []


class TestAboveATable:
    TABLE = "| Source | SS | df | MS | F | p |\n|---|---|---|---|---|---|\n"
    ROWS = "| Depth | 12.4 | 1 | 12.4 | 11.8 | .300 |\n| Error | 96.7 | 92 | 1.05 | | |"

    def test_a_line_is_its_caption(self) -> None:
        line = "Welch's analysis of variance."
        assert "adjusted-df" in contexts(line, self.TABLE + self.ROWS)[0]

    def test_a_line_with_results_is_none(self) -> None:
        line = "Boats differed, Welch's *F*(4, 31.2) = 3.05, *p* = .031."
        assert "adjusted-df" not in contexts(line, self.TABLE + self.ROWS)[1]
        assert ("reversal", "p-from-f") in found(line, self.TABLE + self.ROWS)
