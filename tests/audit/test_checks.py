"""What became of each identity: checked, not applicable and why, or silent."""

from __future__ import annotations

import pytest

from audit.notation import claim
from crossfoot.audit import audit_claim


def checks(text: str) -> dict[str, str]:
    """Outcome and reason of each identity but the bounds."""
    return {
        check.identity: f"{check.outcome}: {check.reason}".removesuffix(": ")
        for check in audit_claim(claim(text), 0.05).checks
        if check.identity != "bounds"
    }


def test_all_that_concerns_a_model_is_checked() -> None:
    assert checks("overall-model: R2=.21 R2_adj=.185 F(3,96)=8.51 p<.001 n=100") == {
        "p-from-f": "agrees",
        "f-from-r2": "agrees",
        "r2-adjusted": "agrees",
        "n-from-df": "agrees",
    }


def test_an_identity_that_nothing_is_printed_for_is_not_mentioned() -> None:
    assert checks("effect: F(2,57)=7.41 p=.001") == {"p-from-f": "agrees"}


@pytest.mark.parametrize(
    ("context", "reason"),
    [
        ("robust", "Standard errors are robust"),
        ("weighted", "The fit weights its cases."),
        ("no-intercept", "The model has no intercept."),
        ("pseudo-r2", "What is called R² is an analogue of it"),
    ],
)
def test_a_context_that_breaks_an_assumption_is_the_reason(context: str, reason: str) -> None:
    found = checks(f"overall-model: R2=.30 F(3,96)=8.51 p<.001 [{context}]")
    assert found["p-from-f"] == "agrees"
    assert found["f-from-r2"].startswith(f"not-applicable: {reason}")
    assert "It holds only if " in found["f-from-r2"]


def test_what_is_not_printed_is_the_reason() -> None:
    assert checks("effect: F=7.41 p=.001")["p-from-f"] == (
        "not-applicable: Not printed: df1 and df2."
    )
    assert checks("coefficient: b=2.1 t=4.20 p<.001")["p-from-t"] == (
        "not-applicable: Not printed: df."
    )


def test_an_identity_of_other_results_says_so() -> None:
    assert checks("effect: F(1,58)=9.41 p=.003 R2=.40 R2_adj=.39")["r2-adjusted"] == (
        "not-applicable: It speaks of the F of a whole model or the summary of a model only."
    )


def test_an_identity_that_excludes_nothing_checks_nothing() -> None:
    """F = t² says something only where df1 is 1."""
    said = checks("mean-comparison: t(58)=2.26 p=.028 F(1,58)=5.11")
    unsaid = checks("mean-comparison: t(58)=2.26 p=.028 F=5.11 df1=2")
    assert said["f-from-t"] == "agrees"
    assert unsaid["f-from-t"] == "not-applicable: It says nothing about these numbers."


def test_a_failure_is_told_from_what_agrees() -> None:
    found = checks("overall-model: R2=.30 F(3,96)=8.51 p<.001 n=106")
    assert found["p-from-f"] == "agrees"
    assert found["f-from-r2"] == "conflict"
    assert found["n-from-df"].startswith("doubt: The number of cases printed is that")


def test_a_doubt_says_what_would_explain_it() -> None:
    assert checks("mean-comparison: t(58)=1.92 p=.030")["p-from-t"] == (
        "doubt: The printed p fits a one-sided test in the direction found; the text does not say "
        "that the test is one-sided."
    )


def test_degrees_of_freedom_that_follow_take_part() -> None:
    found = checks("correlation: r=.30 n=45 p=.045")
    assert found["p-from-r"] == "agrees"


def test_decimal_degrees_of_freedom_are_those_of_the_test() -> None:
    adjusted = checks("effect: F(2,57)=7.41 p=.001 [adjusted-df]")
    printed = checks("effect: F(1.62,47.10)=6.77 p=.005 [adjusted-df]")
    assert adjusted["p-from-f"].startswith("not-applicable: Degrees of freedom are adjusted")
    assert printed["p-from-f"] == "agrees"


def test_a_one_sided_text_is_taken_at_its_word() -> None:
    assert checks("mean-comparison: t(58)=1.92 p=.030 [one-sided]")["p-from-t"] == "agrees"
    assert checks("mean-comparison: mean=1.92 sd=.030 [one-sided]") == {}
    bad = checks("mean-comparison: t(58)=1.92 p=.300 [one-sided]")
    assert bad["p-from-t"] == "conflict"


def test_the_same_identity_bound_twice_speaks_if_one_does() -> None:
    found = checks("anova-table: F:size=4.00 df1:size=2 p:size=.029 F:kind=1.00 df1:kind=1 df2=30")
    assert found["p-from-f"] == "agrees"


@pytest.mark.parametrize(
    "text",
    [
        "coefficient: b=-0.56 se=0.21 chi2(1)=7.11 p=.008",
        "coefficient: b=-0.56 se=0.21 chi2(1)=7.11 p=.008 ci_low=-0.97 ci_high=-0.15",
        "coefficient: b=-0.56 se=0.21 z=-2.67 df=40 p=.0077",
        "coefficient: b=0.94 se=0.08 t(40)=-0.75 p=.46 ci_low=0.78 ci_high=1.10 [other-null]",
        "coefficient: b=-0.30 se=0.08 z=-3.75 p<.001 ci_low=0.63 ci_high=0.87 [generalised]",
        "coefficient: se=0.31 z=1.52 p=.13 ci_low=0.90 ci_high=2.20 [ratio-scale]",
    ],
)
def test_what_is_of_another_test_or_number_is_no_conflict(text: str) -> None:
    assert not any("conflict" in outcome or "doubt" in outcome for outcome in checks(text).values())


def test_an_interval_of_an_estimate_that_is_not_printed_makes_a_doubt() -> None:
    found = checks("coefficient: se=0.5 t(38)=1.1 p=.28 ci_low=2.4 ci_high=4.4 ci_level=95%")
    assert found["ci-against-p"] == "doubt: The interval is that of the estimate that is tested."


TABLE = (
    "anova-table: ss:model=30.0 df1:model=3 ss:soil=20.0 df1:soil=2 ss:shade=10.0 df1:shade=1 "
    "ss:error=60.0 df2=50 ss:total=90.0 df:total=53"
)


def test_the_effects_of_a_table_add_up_to_its_model() -> None:
    assert checks(TABLE) == {"anova-sums": "agrees", "anova-df": "agrees"}
    single = TABLE.replace(" ss:shade=10.0 df1:shade=1", "").replace("soil=20.0", "soil=30.0")
    assert checks(single.replace("soil=2 ", "soil=3 ")) == {
        "anova-sums": "agrees",
        "anova-df": "agrees",
    }
    found = checks(TABLE.replace("df1:shade=1", "df1:shade=2"))
    assert found == {"anova-sums": "agrees", "anova-df": "conflict"}
    # Sums of squares of effects that overlap add up to less than the model's.
    doubt = checks(TABLE.replace("ss:shade=10.0", "ss:shade=15.0"))["anova-sums"]
    assert doubt.startswith("doubt: Sums of squares are sequential")


def test_degrees_of_freedom_in_several_rows_are_named() -> None:
    made = audit_claim(claim(TABLE.replace("df1:shade=1", "df1:shade=2")), 0.05)
    assert made.findings[0].message == (
        "df (model) is printed as 3, but df (soil) = 2 and df (shade) = 2 give df (model) = 4. "
        "Look at df (model), df (soil) or df (shade)."
    )


def test_the_step_before_is_that_of_a_change() -> None:
    assert checks("model-change: R2=.36 R2:reduced=.30 R2_change=.06")["r2-change"] == "agrees"
    assert checks("model-change: R2=.36 R2:reduced=.25 R2_change=.06")["r2-change"] == "conflict"
