"""Notes, derivations, and what is said of anything at all."""

from __future__ import annotations

import math

import pytest
from hypothesis import given, settings
from hypothesis import strategies as st

from audit.notation import claim
from crossfoot.audit import audit_claim, derive
from crossfoot.audit.explain import factors
from crossfoot.laws.assumptions import CONTEXTS
from crossfoot.laws.interval import Interval
from crossfoot.laws.quantities import QUANTITIES
from crossfoot.model import KINDS, SEVERITIES, Claim, Reading, Span

OVERALL = "overall-model: F(2,57)=4.31"
COMMON = ["F", "df1", "df2", "df", "p", "R2", "R2_adj", "n", "t", "b", "se", "r"]


def derived(text: str) -> dict[str, tuple[float, float]]:
    return {d.quantity: (d.low, d.high) for d in derive(claim(text)).derived}


class TestDerivation:
    def test_all_that_follows_from_an_overall_f(self) -> None:
        found = derived(OVERALL)
        assert set(found) == {"p", "R2", "R2_adj", "n", "k", "R", "f2"}
        low, high = found["p"]
        assert low <= 0.018068 <= high
        assert high - low < 2e-4
        assert found["n"] == (pytest.approx(60), pytest.approx(60))

    def test_what_is_printed_does_not_follow(self) -> None:
        assert "n" not in derived("overall-model: F(2,57)=4.31 n=60")

    def test_readings_sharpen_each_other(self) -> None:
        alone = derived("overall-model: df1=3 df2=96 R2=.21")["F"]
        both = derived("overall-model: df1=3 df2=96 R2=.21 R2_adj=.1872")["F"]
        assert alone[0] < both[0] < both[1] < alone[1]

    def test_assumptions_stand_beside(self) -> None:
        found = {d.quantity: d.assumed for d in derive(claim(OVERALL)).derived}
        assert found["R2"] == ()
        assert found["n"] == (
            "The number of cases printed is that of the cases in the fit.",
            "The model has an intercept.",
        )

    def test_the_working_leads_from_what_is_printed(self) -> None:
        found = {d.quantity: d.working for d in derive(claim(OVERALL)).derived}
        assert found["R2_adj"] == (
            "R² = df1·F/(df1·F + df2); with F between 4.305 and 4.315, df1 = 2 and df2 = 57, gives "
            "R² between 0.13122 and 0.13150",
            "adjusted R² = 1 − (1 − R²)(df1 + df2)/df2; with R² between 0.13122 and 0.13150, "
            "df1 = 2 and df2 = 57, gives adjusted R² between 0.10074 and 0.10103",
        )

    def test_a_coefficient(self) -> None:
        found = derived("coefficient: b=2.10 se=0.50 df=60")
        assert set(found) == {"t", "p", "ci_low", "ci_high"}
        assert found["t"][0] <= 4.2 <= found["t"][1]

    def test_an_effect(self) -> None:
        assert set(derived("effect: F(1,58)=9.41")) == {"p", "eta2_partial", "omega2"}

    def test_nothing_follows_from_a_contradiction(self) -> None:
        assert derived("overall-model: R2=.30 F(3,96)=8.51") == {}
        assert derived("overall-model: R2=1.30 F(3,96)=8.51") == {}

    def test_nothing_follows_from_nothing(self) -> None:
        assert derived("mean-comparison: mean=3.1 sd=1.2") == {}

    def test_an_identity_that_says_nothing_derives_nothing(self) -> None:
        """R² = β² holds for one predictor; here are two."""
        assert "R2" in derived("overall-model: beta=.30 df1=1")
        assert "R2" not in derived("overall-model: beta=.30 df1=2")

    def test_unknown_degrees_of_freedom_derive_nothing(self) -> None:
        assert "p" not in derived("mean-comparison: t=2.1")


class TestNotes:
    def test_a_zero_p_has_a_remedy_in_the_same_hand(self) -> None:
        for text, literal in (("p=.000", "< .001"), ("p=0,0000", "< 0,0001"), ("p=0.0%", "< 0.1%")):
            note = audit_claim(claim(f"effect: F(1,400)=99.1 {text}"), 0.05).findings[-1]
            assert note.severity == "note"
            assert note.remedies[0].literal == literal

    def test_a_whole_zero_has_none(self) -> None:
        note = audit_claim(claim("effect: F(1,400)=99.1 p=0"), 0.05).findings[-1]
        assert (note.identity, note.remedies) == ("bounds", ())

    def test_that_p_exceeds_zero_is_no_news(self) -> None:
        assert audit_claim(claim("effect: F(1,400)=1.1 p>.000"), 0.05).findings == ()

    def test_marks_are_no_zero(self) -> None:
        made = claim("effect: F(1,400)=99.1 p<.05")
        marks = made.readings[-1]._replace(literal="***", high=0.001)
        assert audit_claim(made._replace(readings=(*made.readings[:-1], marks))).findings == ()

    def test_degrees_of_freedom_given_elsewhere_are_not_missed(self) -> None:
        assert audit_claim(claim("mean-comparison: t=2.1 p=.04 | df=60"), 0.05).findings == ()

    def test_p_alone_misses_nothing(self) -> None:
        assert audit_claim(claim("effect: F=2.1 eta2_partial=.04"), 0.05).findings == ()


def test_multiples_stop_at_one() -> None:
    assert factors(Interval(0.9995, 1.0005), Interval(0.2, 0.21)) == [5, 6, 7, 8, 9]
    assert factors(Interval(0.0595, 0.0605), Interval(0.0199, 0.0201)) == [3]
    assert factors(Interval(0.0595, 0.0605), Interval(0.01, 0.0101)) == [6]
    assert factors(Interval(0.5, 0.51), Interval(0.01, 0.0101)) == []


def test_a_level_stated_by_the_claim_goes_first() -> None:
    made = claim("effect: F(2,57)=4.22 p=.190 alpha=.01")
    assert audit_claim(made, 0.05).findings[0].severity == "conflict"
    assert audit_claim(made._replace(alpha=None), 0.05).findings[0].severity == "reversal"


numbers = st.one_of(
    st.floats(-10, 1000),
    st.floats(0, 1),
    st.integers(-2, 500).map(float),
    st.sampled_from([0.0, 1.0, math.inf, -math.inf, 1e-320, 1e300]),
)
literals = st.sampled_from(["1.2", ".05", "*", "", "60", "3.7e-4", "6.8%", "1,237", "−2", "."])


@st.composite
def any_reading(draw: st.DrawFn) -> Reading:
    relation = draw(st.sampled_from("=<>≤≥≈"))
    low, high = sorted((draw(numbers), draw(numbers)))
    if draw(st.booleans()):
        high = low
    term = draw(st.sampled_from([None, None, None, "model", "error", "total", "stars", "x"]))
    quantity = draw(st.sampled_from(sorted(QUANTITIES)))
    return Reading(quantity, relation, draw(literals), low, high, Span(0, 1), term)


@st.composite
def printed_reading(draw: st.DrawFn) -> Reading:
    """A reading whose literal and interval belong together."""
    quantity = draw(st.sampled_from(COMMON))
    sign = draw(st.sampled_from(["", "", "-"])) if quantity in "tbr" else ""
    whole = quantity in ("df1", "df2", "df", "n")
    decimals = 0 if whole else draw(st.integers(1, 4))
    share = quantity in ("p", "R2", "R2_adj", "r")
    number = draw(st.integers(0, 10**decimals if share else 400 * 10**decimals))
    literal = f"{sign}{number / 10**decimals:.{decimals}f}"
    value, half = float(literal), 0 if whole else 0.5 * 10**-decimals
    relation = draw(st.sampled_from("=====<>")) if quantity == "p" else "="
    low = -math.inf if relation == "<" else value if relation == ">" else value - half
    high = math.inf if relation == ">" else value if relation == "<" else value + half
    return Reading(quantity, relation, literal, low, high, Span(0, 1))


@st.composite
def any_claim(draw: st.DrawFn) -> Claim:
    readings = st.one_of(any_reading(), printed_reading())
    own = draw(st.lists(readings, min_size=1, max_size=8))
    given_ = draw(st.lists(readings, max_size=2))
    context = draw(st.sets(st.sampled_from(sorted(CONTEXTS)), max_size=2))
    kind = draw(st.sampled_from(KINDS))
    alpha = draw(st.sampled_from([None, 0.01, 0.05]))
    return Claim(kind, "", "", Span(0, 1), tuple(own), tuple(sorted(context)), alpha, tuple(given_))


@settings(max_examples=400, deadline=None)
@given(any_claim())
def test_anything_can_be_audited(made: Claim) -> None:
    audited = audit_claim(made, 0.05)
    slugs = [check.identity for check in audited.checks]
    assert len(slugs) == len(set(slugs))
    ranks = [SEVERITIES.index(finding.severity) for finding in audited.findings]
    assert ranks == sorted(ranks)
    everything = range(len(made.readings) + len(made.given))
    for finding in audited.findings:
        assert finding.reading in range(len(made.readings))
        assert all(place in everything for place in finding.related)
        assert all(remedy.reading in range(len(made.readings)) for remedy in finding.remedies)
        assert finding.severity == "note" or finding.working
        assert "\n" not in finding.message
    derive(made)


@settings(max_examples=150, deadline=None)
@given(any_claim())
def test_an_audit_is_the_same_each_time(made: Claim) -> None:
    from crossfoot.audit.verdict import judge

    assert judge(made, 0.05) == judge(made, 0.05)
