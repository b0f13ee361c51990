"""Plans, narrowing, chains: the machinery under the findings."""

from __future__ import annotations

from itertools import combinations

import pytest

from audit.notation import claim
from crossfoot.audit.binding import Cell
from crossfoot.audit.case import Case, fits, make_case, misplaced, shape_of, spoken
from crossfoot.audit.drafts import Shape
from crossfoot.audit.faults import chain_fault, direct_faults, implied, smallest
from crossfoot.audit.narrow import Taken, bits, chosen, narrow
from crossfoot.audit.plan import Plan, plan_for
from crossfoot.laws.interval import Interval


def plan(kind: str, quantities: str, *context: str) -> Plan:
    return plan_for(Shape(kind, tuple(Cell(q) for q in quantities.split()), context))


def case(text: str) -> Case:
    made = claim(text)
    return make_case(made, shape_of(made))


def formulas(found: Plan, mask: int) -> list[str]:
    return [step.form.formula for step in chosen(found.steps, mask)]


class TestPlan:
    def test_an_equation_alone_is_solved_once(self) -> None:
        found = plan("effect", "F df1 df2 p")
        assert formulas(found, found.brief) == ["p = P(F(df1, df2) > F)"]

    def test_an_equation_that_shares_a_cell_is_solved_for_it(self) -> None:
        found = plan("overall-model", "F df1 df2 p R2")
        assert formulas(found, found.brief) == [
            "p = P(F(df1, df2) > F)",
            "F such that p = P(F(df1, df2) > F)",
            "F = (R²/df1)/((1 − R²)/df2)",
        ]

    def test_what_is_not_printed_is_there_only_where_two_identities_meet(self) -> None:
        assert plan("overall-model", "F df1 df2 p").cells[4:] == ()
        assert plan("overall-model", "F df1 df2 R2_adj").cells[4:] == (Cell("R2"),)
        assert plan("effect", "df1 df2 p eta2_partial").cells[4:] == (Cell("F"),)

    def test_no_statistic_is_made_up_that_p_might_not_be_of(self) -> None:
        found = plan("coefficient", "b se p ci_low ci_high")
        unprinted = {cell.quantity for cell in found.cells[found.printed :]}
        assert unprinted == {"t", "df", "ci_level"}

    def test_the_plan_of_a_shape_is_kept(self) -> None:
        made = [claim("effect: F(2,57)=7.41 p=.001"), claim("effect: F(1,30)=1.2 p=.3")]
        first, second = (plan_for(shape_of(one)) for one in made)
        assert first is second

    def test_counts_are_whole_in_a_model_and_need_not_be_in_an_effect(self) -> None:
        model = plan("overall-model", "n R2 R2_adj F")
        assert {model.cells[step.target].quantity for step in model.steps if step.whole} == {
            "df1",
            "df2",
        }
        adjusted = plan("overall-model", "n R2 R2_adj F", "adjusted-df")
        assert not any(step.whole for step in adjusted.steps)

    def test_strict_steps_come_first(self) -> None:
        found = plan("coefficient", "b se t df ci_low ci_high")
        doubts = [bool(step.unstated) for step in found.steps]
        assert doubts == sorted(doubts)
        assert found.strict == bits(i for i, doubt in enumerate(doubts) if not doubt)

    def test_a_row_that_two_cells_could_fill_is_not_bound(self) -> None:
        found = plan_for(
            Shape(
                "effect", (Cell("F", "a"), Cell("F", "b"), Cell("df1"), Cell("df2"), Cell("p")), ()
            )
        )
        assert formulas(found, found.brief) == []

    def test_a_stated_assumption_makes_a_step_strict(self) -> None:
        silent = plan("mean-comparison", "t df p")
        told = plan("mean-comparison", "t df p", "two-sided")
        assert silent.strict == told.strict


class TestNarrowing:
    def test_a_box_only_ever_shrinks(self) -> None:
        made = case("overall-model: R2=.21 R2_adj=.185 F(3,96)=8.51 p<.001 n=100")
        box = list(made.box)
        assert narrow(made.plan.steps, box, made.plan.strict | made.plan.doubtful).failed is None
        for before, after in zip(made.box, box, strict=True):
            assert before.low <= after.low <= after.high <= before.high

    def test_the_truth_is_never_lost(self) -> None:
        made = case("overall-model: R2=.2 F(3,96)=8.51 p<.001 R2_adj=.2")
        truth = {"R2": 0.21007, "F": 8.51, "df1": 3, "df2": 96, "R2_adj": 0.18539}
        box = list(made.box)
        narrow(made.plan.steps, box, made.plan.strict)
        for cell, interval in zip(made.plan.cells, box, strict=True):
            if cell.quantity in truth:
                assert interval.low <= truth[cell.quantity] <= interval.high

    def test_what_was_done_is_written_down(self) -> None:
        made = case("overall-model: R2_adj=.025 F(3,196)=3.37 p=.020")
        history: list[Taken] = []
        outcome = narrow(made.plan.steps, list(made.box), made.plan.strict, None, history)
        assert outcome.failed is history[-1].step
        assert outcome.taken >= len(history)

    def test_contradictions_that_only_creep_up_are_left(self) -> None:
        """t(90) and F(1, 92) can't share one p, but it takes a hundred steps to see it."""
        made = case("mean-comparison: t(90)=0.77 p=.442 F(1,92)=0.60")
        assert spoken(made) is not None

    def test_steps_that_exclude_nothing_did_not_speak(self) -> None:
        made = case("mean-comparison: t(58)=2.26 p=.028 F=5.11 df1=2")
        spoke = spoken(made)
        assert spoke is not None
        slugs = {
            made.plan.bindings[step.binding].identity.slug
            for step in chosen(made.plan.steps, spoke)
        }
        assert "p-from-t" in slugs
        assert "f-from-t" not in slugs

    def test_a_change_is_tried_on_the_whole_claim(self) -> None:
        made = case("overall-model: R2=.30 F(3,96)=8.51 p<.001")
        assert fits(made, [(0, Interval(0.205, 0.215))])[0]
        assert not fits(made, [(0, Interval(0.105, 0.115))])[0]
        assert fits(made, [(0, Interval(1.2, 1.3))]) == (False, 0)

    def test_a_reading_outside_its_domain_is_misplaced(self) -> None:
        assert misplaced(case("overall-model: R2=1.21 F(3,96)=8.51"))
        assert not misplaced(case("overall-model: R2=1.00 F(3,96)=8.51"))


class TestChains:
    text = "overall-model: R2_adj=.025 R=.22 F(3,196)=3.37 p=.020"

    def test_the_smallest_set_of_readings_is_found(self) -> None:
        made = case(self.text)
        fault = chain_fault(made, 0, doubtful=False)
        assert fault is not None
        names = [made.readings[place].quantity for place in made.readings_at(fault.cells)]
        assert names == ["R2_adj", "df1", "df2", "F"]

    def test_no_smaller_set_fails(self) -> None:
        made = case(self.text)
        fault = chain_fault(made, 0, doubtful=False)
        assert fault is not None
        for subset in combinations(fault.cells, len(fault.cells) - 1):
            kept = frozenset(subset)
            missing = next(iter(fault.cells - kept))
            assert implied(made, missing, made.plan.strict, kept) is not None

    def test_where_all_agree_there_is_none(self) -> None:
        made = case("overall-model: R2_adj=.035 F(3,196)=3.37 p=.020")
        assert chain_fault(made, 0, doubtful=True) is None

    def test_a_doubtful_chain_needs_its_assumptions(self) -> None:
        made = case("correlation: r=.30 n=45 p=.003")
        assert chain_fault(made, 0, doubtful=False) is None
        fault = chain_fault(made, 0, doubtful=True)
        assert fault is not None
        assert fault.unstated == ("The number of cases printed is that of the cases in the fit.",)

    def test_a_smaller_set_than_dropping_ends_at(self) -> None:
        """Without the first the last four still fail, but with it two do."""

        def fails(cells: frozenset[int]) -> bool:
            return cells >= {1, 2, 3, 4} or cells >= {0, 4}

        assert smallest(range(5), fails) == {0, 4}


class TestImplied:
    def test_contradicting_readings_imply_nothing(self) -> None:
        made = case("overall-model: R2=.30 F(3,96)=8.51 p=.5 n=100")
        every = frozenset(range(made.plan.printed))
        assert implied(made, 5, made.plan.strict, every) is None

    def test_a_side_that_is_no_side(self) -> None:
        made = case("effect: F(2,57)=7.41 p=.002")
        every = frozenset(range(made.plan.printed))
        assert implied(made, 3, made.plan.strict, every, Interval(2.0, 3.0)) is None


class TestDirect:
    def test_what_fails_anyhow_adds_nothing(self) -> None:
        """Adjusted R² can't exceed R², whatever the degrees of freedom are."""
        slugs = [f.identity.slug for f in direct_faults(case("overall-model: R2=.21 R2_adj=.41"))]
        assert slugs == ["bounds"]

    @pytest.mark.parametrize(
        ("text", "subject"),
        [
            ("effect: F(2,57)=4.22 p=.190", "p"),
            ("overall-model: R2=.30 F(3,96)=8.51", "F"),
            ("overall-model: R2=.21 F(3,96)=8.51 n=90", "n"),
        ],
    )
    def test_the_usual_subject_comes_first(self, text: str, subject: str) -> None:
        assert direct_faults(case(text))[0].steps[0].form.gives == subject
