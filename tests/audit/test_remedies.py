"""Slips undone, and the changes that make a claim agree."""

from __future__ import annotations

import math

import pytest

from audit.notation import claim, reading
from crossfoot.audit import audit_claim
from crossfoot.audit.case import make_case, shape_of
from crossfoot.audit.habits import usual
from crossfoot.audit.literals import numerals
from crossfoot.audit.proposals import Printed, Proposal
from crossfoot.audit.remedies import EFFORT, KEPT, MOST, Weighted, remedies, shortlist
from crossfoot.audit.slips import SLIPS
from crossfoot.laws.interval import Interval
from crossfoot.laws.quantities import domain
from crossfoot.model import Claim, Remedy

UNDO = {slip.name: slip.undo for slip in SLIPS}


def changes(made: Claim) -> list[Weighted]:
    """All single changes, whichever reading they are of."""
    case = make_case(made, shape_of(made))
    return remedies(case, frozenset(range(case.plan.printed)))


def undone(slip: str, text: str, low: float = -math.inf, high: float = math.inf) -> list[str]:
    """What a slip could have made the first reading from, if the rest implies low to high."""
    made = claim(f"effect: {text}")
    implied = Interval(low, high)
    printed = Printed(made.readings, numerals(made.readings), 0, implied, "−")
    return [f"{p.relation}{p.numeral.text}" for p in UNDO[slip](printed)]


@pytest.mark.parametrize(
    ("slip", "text", "low", "high", "expected"),
    [
        ("digits swapped", "F=7.41", 0, 99, ["4.71", "7.14"]),
        ("digits swapped", "p=.012", 0, 1, [".102", ".021"]),
        ("digits swapped", "n=10", 0, 99, []),
        ("digits swapped", "F=33", 0, 99, []),
        ("digit doubled", "F=77.441", 0, 99, ["7.441", "77.41"]),
        ("digit doubled", "p=.003", 0, 1, [".03"]),
        ("digit doubled", "p=0.033", 0, 1, ["0.03"]),
        ("point moved", "F=7.41", 0, 999, ["0.0741", "0.741", "74.1", "741"]),
        ("point moved", "p=.190", 0, 1, [".00190", ".0190", ".019", "1.90", "19.0"]),
        ("point moved", "p=.5", 0, 1, [".005", ".05", "5"]),
        ("point moved", "n=50", 0, 999, []),
        ("sign lost", "t=2.10", -9, 9, ["−2.10"]),
        ("sign lost", "t=-2.10", -9, 9, ["2.10"]),
        ("sign lost", "F=2.10", 0, 9, []),
        ("sign lost", "F=-2.10", 0, 9, ["2.10"]),
        ("sign lost", "t=0.00", -9, 9, []),
        ("cut off", "p=.012", 0.0126, 0.0128, [".013"]),
        ("cut off", "p=.012", 0.0131, 0.0133, []),
        ("cut off", "t=-1.2", -1.28, -1.27, ["-1.3"]),
        ("cut off", "df=57", 57, 58, []),
        ("rounded up", "p=.012", 0.0112, 0.0114, [".011"]),
        ("rounded up", "p<.012", 0.0112, 0.0114, []),
        ("rounded up", "p=.000", 0, 0.0001, []),
        ("df swapped", "df1=57 df2=2", 0, 99, ["2"]),
        ("df swapped", "df2=57 df1=2", 0, 99, []),
        ("n for df", "df2=60 df1=2", 0, 99, ["57", "59", "58"]),
        ("n for df", "df2=60", 0, 99, ["59", "58"]),
        ("n for df", "df=60", 0, 99, ["58", "59"]),
        ("n for df", "df=1", 0, 99, []),
        ("n for df", "F=60", 0, 99, []),
        ("df for n", "n=57 df2=57", 60, 60, ["60"]),
        ("df for n", "n=57 df2=50", 60, 60, []),
        ("df for n", "df2=57 n=57", 60, 60, []),
        ("root for square", "R2=.458", 0.2099, 0.2101, [".210"]),
        ("root for square", "R2=.458", 0.3, 0.4, []),
        ("root for square", "R2_adj=-.1", -1, 1, []),
        ("square for root", "R=.210", 0.4581, 0.4584, [".458"]),
        ("square for root", "F=.210", 0, 1, []),
        ("square for root", "r=.210", -0.4584, -0.4581, ["−.458"]),
        ("adjusted for plain", "R2=.185 df1=3 df2=96", 0.2099, 0.2101, [".210"]),
        ("adjusted for plain", "R2=.185 df1=3 df2=96", 0.3, 0.31, []),
        ("adjusted for plain", "R2=.185 df1=3", 0.2099, 0.2101, []),
        ("adjusted for plain", "R2=.185 R2_adj=.18", 0.2099, 0.2101, [".210"]),
        ("adjusted for plain", "R2_adj=.185 df1=3 df2=96", 0.2099, 0.2101, []),
        ("plain for adjusted", "R2_adj=.21 R2=.208", 0.18, 0.184, [".18"]),
        ("plain for adjusted", "R2_adj=.21 R2=.308", 0.18, 0.184, []),
        ("plain for adjusted", "R2=.21", 0.18, 0.184, []),
        ("one-sided", "p=.030", 0.0591, 0.0605, [".059", ".060"]),
        ("one-sided", "p=.030", 0.08, 0.09, []),
        ("one-sided", "p<.030", 0.0591, 0.0605, []),
        ("one-sided", "F=.030", 0.0591, 0.0605, []),
        ("doubled p", "p=.060", 0.0291, 0.0305, [".030"]),
        ("multiplied by 3", "p=.06", 0.0198, 0.0202, [".02"]),
        ("multiplied by 3", "p=1.6", 0.4, 0.6, []),
        ("value for bound", "p=.001", 0, 0.0004, ["<.001"]),
        ("value for bound", "p=.001", 0, 0.04, []),
        ("value for bound", "p=.003", 0, 0.0004, []),
        ("value for bound", "p<.001", 0, 0.0004, []),
        ("bound for value", "p<.05", 0, 1, ["=.05", ">.05"]),
        ("bound for value", "p>.05", 0, 1, ["=.05", "<.05"]),
        ("bound for value", "p<.001", 0, 1, ["=.001"]),
        ("bound for value", "F<1", 0, 1, ["=1", ">1"]),
        ("bound for value", "p=.05", 0, 1, []),
        ("another bound", "p<.001", 0.002, 0.003, [".005"]),
        ("another bound", "p<.001", 0.2, 0.3, []),
        ("another bound", "p=.001", 0.002, 0.003, []),
        ("copied", "p=.21 R2=.21", 0.0311, 0.0313, [".031", ".03"]),
        ("copied", "R2=.45 p=.45", 0.211, 0.213, [".21"]),
        ("copied", "t=2.10 df=2.10", -2.611, -2.609, ["−2.61"]),
        ("copied", "se=0.659 b=0.659", 1.2, 1.3, []),
        ("copied", "n=57 df=57", 60, 60, ["60"]),
        ("copied", "p=.21 R2=.22", 0.0311, 0.0313, []),
        ("copied", "p=.5 R2=.5", 0.0311, 0.0313, []),
        ("other", "p=.21", 0.0311, 0.0313, [".03"]),
        ("other", "p=.021", 0.0001, 0.0003, ["<.001"]),
        ("other", "F=.021", 0.0001, 0.0003, []),
        ("other", "R2=.2101", 0.3012, 0.3098, [".30", ".31"]),
        ("other", "F=2.101", 7.41, 7.62, ["7.4", "7.5", "7.6"]),
        ("other", "F=21.01", 74.1, 76.2, ["74", "75", "76"]),
        ("other", "F=21.01", 74.1, 86.2, []),
        ("other", "F=21.01", 1e14, 1e14 + 1, []),
        ("other", "F=21.01", 1, math.inf, []),
        ("other", "p=.21", 1.2, 1.3, []),
        ("other", "n=57", 60, 60, ["60"]),
    ],
)
def test_what_a_slip_could_have_been_made_from(
    slip: str, text: str, low: float, high: float, expected: list[str]
) -> None:
    assert sorted(undone(slip, text, low, high)) == sorted(expected)


def test_a_digit_wrong_or_left_out() -> None:
    assert len(undone("digit wrong", "F=7.41")) == 27
    assert {"7.31", "0.41", "7.49"} <= set(undone("digit wrong", "F=7.41"))
    assert len(undone("digit wrong", "n=57")) == 18 - 1  # 07 is no number
    dropped = undone("digit dropped", "F=7.41")
    assert {"17.41", "7.411", "7.041", "72.41"} <= set(dropped)
    assert "07.41" not in dropped
    assert {"17", "71"} <= set(undone("digit dropped", "n=7"))
    assert not any("." in literal for literal in undone("digit dropped", "n=7"))


def test_a_zero_before_the_point_is_no_number_by_itself() -> None:
    """Beside ``.21`` a share is written without its zero, and nothing would be left of ``0``."""
    assert "" not in undone("digit wrong", "p=5 R2=.21")
    assert "" not in undone("digit dropped", "p=5 R2=.21")
    assert len(undone("digit wrong", "p=5 R2=.21")) == 8


def test_every_proposal_is_written_as_a_number_is() -> None:
    for text in ("F=7.41", "p=.002", "n=57", "R2=45.8%", "t=−0.50", "p=3.7e-04"):
        made = claim(f"effect: {text}")
        whole = domain(made.readings[0].quantity)
        printed = Printed(made.readings, numerals(made.readings), 0, whole, "−")
        for slip in SLIPS:
            for proposal in slip.undo(printed):
                again = reading(made.readings[0].quantity, "=", proposal.numeral.text)
                middle = (again.low + again.high) / 2
                assert middle == pytest.approx(proposal.numeral.value, abs=1e-12)
                assert 0 < proposal.share <= 1


def test_the_weights_are_declared_once_each() -> None:
    names = [slip.name for slip in SLIPS]
    assert len(names) == len(set(names))
    assert all(slip.weight > 0 and slip.reason for slip in SLIPS)


def first(text: str) -> str:
    remedy = audit_claim(claim(text), 0.05).findings[0].remedies[0]
    return f"{remedy.quantity} {remedy.literal} ({remedy.reason})"


@pytest.mark.parametrize(
    ("text", "remedy"),
    [
        ("overall-model: R2=.21 F(3,96)=5.81 p<.001", "F 8.51 (two digits swapped)"),
        ("overall-model: R2=.458 F(3,96)=8.51 p<.001", "R2 .210 (R for R²)"),
        ("overall-model: R2=.185 F(3,96)=8.51 p<.001", "R2 .210 (adjusted R² for R²)"),
        ("overall-model: R2=2.1 F(3,96)=8.51 p<.001", "R2 .21 (the decimal point moved)"),
        ("effect: F(1,40)=4.76 p=.05", "p < .05 (= for <)"),
        ("effect: F(1,58)=3.69 p=.030", "p .060 (a one-sided p)"),
        ("overall-model: R2=.21 F(3,100)=8.51 n=100", "df2 96 (the number of cases for df)"),
        ("mean-comparison: t(58)=2.26 p=.28", "p .028 (a digit left out)"),
        ("effect: F(1,500)=60.2 p=.20", "p < .01 (what the other numbers give)"),
    ],
)
def test_the_likeliest_change(text: str, remedy: str) -> None:
    assert first(text) == remedy


def test_swapped_degrees_of_freedom_are_one_change_of_two_readings() -> None:
    found = audit_claim(claim("overall-model: F(57,2)=7.41 p=.001 R2=.21"), 0.05)
    remedy = found.findings[0].remedies[0]
    assert (remedy.literal, remedy.also) == ("2", ((1, "57"),))
    assert remedy.reason == "degrees of freedom swapped, so that df2 = 57"


def changed(made: Claim, remedy: Remedy) -> Claim:
    """A claim with a remedy carried out."""
    readings = list(made.readings)
    relation, _, literal = remedy.literal.rpartition(" ")
    for place, text in ((remedy.reading, literal), *remedy.also):
        old = readings[place]
        sign = relation if place == remedy.reading and relation else old.relation
        readings[place] = reading(old.quantity, sign, text, old.term)
    return made._replace(readings=tuple(readings))


@pytest.mark.parametrize(
    "text",
    [
        "effect: F(2,57)=7.41 p=.002",
        "effect: F(2,57)=4.22 p=.190",
        "overall-model: R2=.31 R2_adj=.17 F(4,79)=8.70 p<.001 n=84",
        "overall-model: R2_adj=.025 F(3,196)=3.37 p=.020",
        "overall-model: R2=45.8% F(3,96)=8.51 p<.001",
        "overall-model: F(57,2)=7.41 p=.001 R2=.21",
        "coefficient: b=0.84 se=0.13 t=−6.46 p<.001",
        "coefficient: b=-1.05 se=0.23 t(71)=-6.27 p<.001",
        "model-change: R2=.36 R2_change=.06 F_change(2,145)=3.62 p=.002",
        "mean-comparison: t(58)=1.92 p=.030",
        "correlation: r=.30 n=45 p=.003",
        "frequency: chi2(1)=8.47 p=.04",
        "overall-model: R2=.21 F(3,96)=8.51 p<.001 n=106",
    ],
)
def test_each_remedy_makes_the_whole_claim_agree(text: str) -> None:
    made = claim(text)
    findings = audit_claim(made, 0.05).findings
    assert findings[0].remedies
    for remedy in findings[0].remedies:
        after = audit_claim(changed(made, remedy), 0.05)
        assert [f for f in after.findings if f.severity != "note"] == [], remedy


def test_where_two_things_are_wrong_each_has_its_own_remedies() -> None:
    found = audit_claim(claim("overall-model: R2=.21 R2_adj=.285 F(3,96)=8.51 p=.030"), 0.05)
    assert {f.identity: f.remedies[0].quantity for f in found.findings} == {
        "p-from-f": "p",
        "r2-adjusted": "R2_adj",
        "bounds": "R2_adj",
    }


def test_what_is_given_elsewhere_is_not_changed() -> None:
    found = changes(claim("coefficient: b=0.5 t=1.0 p=.006 | df=3"))
    assert found
    assert {change.remedy.reading for change in found} <= {0, 1, 2}


def test_marks_are_not_changed() -> None:
    made = claim("effect: F(2,57)=4.22 p=.190 p:stars<.05")
    unreadable = made.readings[-2]._replace(literal="?")
    found = changes(claim("effect: F(2,57)=4.22 p=.190 p:stars<.05"))
    assert {change.remedy.literal for change in found if change.remedy.quantity == "p"} == {
        ".019",
        ".020",
    }
    lost = made._replace(readings=(*made.readings[:-2], unreadable, made.readings[-1]))
    assert all(c.remedy.quantity != "p" for c in changes(lost))


def test_one_number_is_proposed_once() -> None:
    found = changes(claim("mean-comparison: t(32)=-2.45 p=.200"))
    assert [c.remedy.literal for c in found if c.remedy.quantity == "p"] == [".020"]


def test_one_number_by_one_slip_is_proposed_once_whatever_its_decimals() -> None:
    found = changes(claim("coefficient: odds_ratio=2.460 ci_low=2.460 ci_high=4.07 ci_level=95%"))
    limits = [c.remedy.literal for c in found if c.remedy.quantity == "ci_low"]
    assert limits[0] == "1.49"
    assert not {"1.487", "1.488"} & set(limits)


def test_no_part_of_what_is_printed_is_proposed() -> None:
    """More decimals of the same number can't agree where the number does not."""
    found = changes(claim("overall-model: R2=0.2040 R2_adj=0.204 n=7"))
    assert "0.2040" not in [c.remedy.literal for c in found]


@pytest.mark.parametrize(
    ("text", "expected"),
    [
        # A number that was copied from elsewhere says nothing of the sign.
        ("correlation: r=.568 df=6 ci_low=.568 ci_high=0.909 ci_level=95%", "ci_low -.228"),
        ("overall-model: R2=.16 R2_adj=.1647 F=0.329 df1=3 df2=5 p=.806", "R2_adj -.336"),
        # Where the sign alone can be wrong, nothing else is.
        ("coefficient: b=0.84 se=0.13 t=−6.46 p<.001", "t 6.46, b −0.84"),
        # A rounded zero has no side.
        ("coefficient: b=-0.0 se=0.12 z=-0.441 p=.6592 odds_ratio=0.95", "b -0.05"),
    ],
)
def test_the_other_side_of_zero(text: str, expected: str) -> None:
    made = [f"{c.remedy.quantity} {c.remedy.literal}" for c in changes(claim(text))]
    assert set(expected.split(", ")) <= set(made)
    if ", " in expected:
        assert expected == ", ".join(made)


@pytest.mark.parametrize(
    ("text", "before", "rarer"),
    [
        ("F=7.41", "7.4", True),
        ("F=7.4", "7.41", False),
        ("F=7.41 t=2.7", "7.4", False),
        ("p=.02", ".021", False),
        ("R2=.458", ".46", False),
        ("R2=45.8%", "46%", False),
    ],
)
def test_decimals_that_are_seldom_printed_are_seldom_proposed(
    text: str, before: str, rarer: bool
) -> None:
    made = claim(f"effect: {text}")
    one = made.readings[0]
    printed = Printed(made.readings, numerals(made.readings), 0, domain(one.quantity), "−")
    old = numerals((reading(one.quantity, "=", before),))[0]
    assert old is not None
    share = usual(printed, Proposal(old, 1.0))
    assert share < 1 if rarer else share > 1
    assert usual(printed, Proposal(printed.numeral, 1.0)) == 1


def test_no_p_with_more_decimals_than_people_print() -> None:
    found = audit_claim(claim("coefficient: t(32)=4.89 p=.003"), 0.05).findings[0].remedies
    assert [remedy.literal for remedy in found if remedy.quantity == "p"] == ["< .001"]


def test_what_follows_is_listed_however_many_slips_come_before_it() -> None:
    found = audit_claim(claim("effect: F(2,57)=4.31 p=0.000"), 0.05).findings[0]
    assert found.remedies[-1].literal == "0.018"
    assert found.remedies[-1].reason == "what the other numbers give"


def test_the_search_is_bounded() -> None:
    found = changes(claim("effect: F(2,57)=7.41 p=.002"))
    assert len([change for change in found if not change.plain]) <= KEPT
    assert len(found) <= 2 * KEPT
    assert EFFORT < 5000


def weighted(place: int, literal: str, plain: bool) -> Weighted:
    return Weighted(Remedy(place, "p", literal, "a slip"), 1.0, plain)


def test_what_follows_has_a_place_on_the_short_list() -> None:
    slips = [weighted(0, f".{i}", False) for i in range(MOST + 1)]
    plain = weighted(1, ".9", True)
    assert shortlist([*slips, plain], 1) == [*slips[: MOST - 1], plain]
    assert shortlist([*slips, plain], 0) == slips[:MOST]
    assert shortlist(slips, 1) == slips[:MOST]
    assert shortlist([], 1) == []


def test_the_best_remedy_says_where_to_look() -> None:
    swapped = audit_claim(claim("overall-model: R2=.21 F(3,96)=5.81 p<.001"), 0.05)
    assert swapped.claim.readings[swapped.findings[0].reading].quantity == "F"
