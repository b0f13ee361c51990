"""Each identity is documented, and each of its forms encloses the truth, tightly."""

from __future__ import annotations

import itertools
import math
import sys
from random import Random

import mpmath
import pytest
from hypothesis import given, settings
from hypothesis import strategies as st

from crossfoot.laws import IDENTITIES, ONE_SIDED, narrow, sum_of_parts, warm
from crossfoot.laws.assumptions import ASSUMPTIONS, CONTEXTS
from crossfoot.laws.identity import Form, Identity, confine
from crossfoot.laws.interval import EVERYTHING, Interval
from crossfoot.laws.quantities import FORMAL, QUANTITIES, domain, symbol
from crossfoot.model import KINDS
from laws.truths import DIGITS, SCENARIOS, Scenario, Values, chi2_area, f_area, parts

#: Declared for their documentation; the audit compares claims with each other.
ACROSS_CLAIMS = {"restatement", "sample-flow"}

ALL = [
    *IDENTITIES.values(),
    *itertools.chain.from_iterable(ONE_SIDED.values()),
    sum_of_parts("anova-sums", 3),
    sum_of_parts("anova-df", 1),
]
PAIRS = [(IDENTITIES[slug], scene) for slug in SCENARIOS for scene in SCENARIOS[slug]]
PAIRS += [
    (sum_of_parts("anova-sums", n), Scenario("parts", "anova-table", parts(n))) for n in (1, 3, 7)
]
PAIRS += [
    (sum_of_parts("anova-df", n), Scenario("parts", "anova-table", parts(n, whole=True)))
    for n in (1, 3, 7)
]


def names(pairs):
    return [f"{identity.slug}: {scene.name} {len(identity.forms)}" for identity, scene in pairs]


# Documentation.


@pytest.mark.parametrize("identity", ALL, ids=lambda i: i.slug)
def test_is_documented(identity: Identity):
    for field in ("title", "formula", "assumption", "source", "explanation"):
        assert getattr(identity, field).strip(), field
    assert identity.title[0] != identity.title[0].upper() or identity.title[0] in "FnpRCt"
    assert identity.explanation.endswith(".")
    assert identity.assumption.endswith(".")
    assert 1 <= identity.explanation.count(". ") + 1 <= 4
    assert identity.kinds
    assert bool(identity.forms) == (identity.slug not in ACROSS_CLAIMS)


@pytest.mark.parametrize("identity", ALL, ids=lambda i: i.slug)
def test_names_what_is_known(identity: Identity):
    for name in identity.quantities:
        domain(name)
    assert len(set(identity.quantities)) == len(identity.quantities)
    assert set(identity.needs) <= set(ASSUMPTIONS)
    assert set(identity.kinds) <= set(KINDS)
    assert len(set(identity.kinds)) == len(identity.kinds)
    for form in identity.forms:
        assert form.formula
        assert form.gives in identity.quantities
        assert form.gives not in form.takes
        assert set(form.takes) <= set(identity.quantities)
        assert {*form.assumed, *form.needs} <= set(ASSUMPTIONS)
        assert set(form.kinds) <= set(identity.kinds)
        assert {*form.beside, *form.unless} <= set(QUANTITIES)


@pytest.mark.parametrize("identity", ALL, ids=lambda i: i.slug)
def test_every_quantity_has_a_form(identity: Identity):
    used = {name for form in identity.forms for name in (form.gives, *form.takes)}
    if identity.forms:
        assert used == set(identity.quantities)


def test_slugs_are_those_of_the_records():
    assert all(slug == identity.slug for slug, identity in IDENTITIES.items())
    assert all({i.slug for i in pair} == {slug} for slug, pair in ONE_SIDED.items())


def test_only_equations_are_free_of_inequality_signs():
    # A one-sided form is recognised by the sign in its formula.
    for identity in ALL:
        for form in identity.forms:
            if form.takes and ("≤" in form.formula or "≥" in form.formula):
                result = form.value(*[domain(name) for name in form.takes])
                assert math.inf in (result.high, -result.low), form.formula


def test_contexts_and_assumptions_are_used():
    used = {key for i in ALL for form in i.forms for key in (*i.needs, *form.needs, *form.assumed)}
    used |= {key for identity in ALL for key in identity.needs}
    assert used == set(ASSUMPTIONS)
    for key, assumption in ASSUMPTIONS.items():
        assert key == assumption.key
        assert assumption.text.endswith(".")
        assert assumption.broken_by | assumption.stated_by <= set(CONTEXTS)
        assert all({first, second} <= set(CONTEXTS) for first, second in assumption.spared_by)
    assert all(text.endswith(".") for text in CONTEXTS.values())


def test_quantities_are_documented():
    for key, quantity in QUANTITIES.items():
        assert key == quantity.key
        assert quantity.symbol
        assert quantity.name
        assert quantity.description.endswith(".")
        assert quantity.domain.low < quantity.domain.high
    for name, formal in FORMAL.items():
        assert name == formal.name
        assert name not in QUANTITIES
        assert formal.quantity in QUANTITIES
        assert formal.symbol
        assert formal.role


# Soundness.


def speaks(identity: Identity, form: Form, scene: Scenario, values: Values) -> bool:
    return (
        scene.kind in (form.kinds or identity.kinds)
        and {form.gives, *form.takes} <= set(values)
        and set(form.beside) <= set(values)
        and not set(form.unless) & set(values)
        and not {*identity.needs, *form.needs, *form.assumed} & scene.broken
    )


def printed(value: mpmath.mpf, rng: Random, whole: bool) -> Interval:
    """An interval that holds a true value, as its print would leave it."""
    if whole:
        return Interval(float(value), float(value))
    style = rng.random()
    if style < 0.1:
        return Interval(_down(value), _up(value))
    decimals = rng.randint(0, 6)
    half = mpmath.mpf(10) ** -decimals / 2
    near = mpmath.nint(value / half / 2) * half * 2
    if style < 0.2:
        return Interval(-math.inf, _up(near + half))
    if style < 0.3:
        return Interval(_down(near - half), math.inf)
    return Interval(_down(near - half), _up(near + half))


def _down(value: mpmath.mpf) -> float:
    nearest = float(value)
    return nearest if nearest <= value else math.nextafter(nearest, -math.inf)


def _up(value: mpmath.mpf) -> float:
    nearest = float(value)
    return nearest if nearest >= value else math.nextafter(nearest, math.inf)


@pytest.mark.parametrize(("identity", "scene"), PAIRS, ids=names(PAIRS))
@given(seed=st.integers(0, 2**32))
@settings(max_examples=40, deadline=None)
def test_encloses_the_truth(identity: Identity, scene: Scenario, seed: int):
    rng = Random(seed)
    with mpmath.workdps(DIGITS):
        values = scene.draw(rng)
        box = {name: printed(v, rng, name in scene.counts) for name, v in values.items()}
        for form in identity.forms:
            if not speaks(identity, form, scene, values):
                continue
            result = form.value(*[box[name] for name in form.takes])
            truth = values[form.gives]
            if form.mirrored:
                truth = abs(truth)
            assert result.low <= truth <= result.high, (form.formula, box, values)
            assert confine(form, result, box[form.gives]) is not None


def test_every_form_is_tried():
    for identity, scenes in [(IDENTITIES[slug], SCENARIOS[slug]) for slug in IDENTITIES]:
        with mpmath.workdps(DIGITS):
            drawn = [(scene, scene.draw(Random(1))) for scene in scenes]
        for form in identity.forms:
            assert any(speaks(identity, form, *pair) for pair in drawn), (
                identity.slug,
                form.formula,
            )


def one_degree(rng: Random) -> Values:
    z = 10 ** mpmath.mpf(rng.uniform(-2, 0.7))
    df2 = mpmath.mpf(rng.randint(1, 90))
    return {"F": z, "df1": mpmath.mpf(1), "df2": df2, "p": f_area(z, mpmath.mpf(1), df2)}


def one_degree_of_chi2(rng: Random) -> Values:
    chi2 = 10 ** mpmath.mpf(rng.uniform(-2, 1.5))
    return {"chi2": chi2, "df": mpmath.mpf(1), "p": chi2_area(chi2, mpmath.mpf(1))}


DIRECTED = {
    "p-from-f": Scenario("one degree", "effect", one_degree),
    "p-from-t": SCENARIOS["p-from-t"][0],
    "p-from-r": SCENARIOS["p-from-r"][0],
    "p-from-chi2": Scenario("one degree", "frequency", one_degree_of_chi2),
    "p-from-z": SCENARIOS["p-from-z"][0],
}


@pytest.mark.parametrize("slug", ONE_SIDED)
@given(seed=st.integers(0, 2**32))
@settings(max_examples=40, deadline=None)
def test_one_side_encloses_the_truth(slug: str, seed: int):
    scene = DIRECTED[slug]
    for side, identity in enumerate(ONE_SIDED[slug]):
        rng = Random(seed)
        with mpmath.workdps(DIGITS):
            values = scene.draw(rng)
            half = values["p"] / 2
            values["p"] = 1 - half if side else half
            box = {name: printed(v, rng, name in scene.counts) for name, v in values.items()}
            for form in identity.forms:
                if not speaks(identity, form, scene, values):
                    continue
                result = form.value(*[box[name] for name in form.takes])
                truth = abs(values[form.gives]) if form.mirrored else values[form.gives]
                assert result.low <= truth <= result.high, (form.formula, box, values)


def test_one_side_is_half():
    t, df = Interval(2.0, 2.0), Interval(57.0, 57.0)
    both = IDENTITIES["p-from-t"].forms[0].value(t, df)
    found, against = (identity.forms[0].value(t, df) for identity in ONE_SIDED["p-from-t"])
    assert found.low == pytest.approx(both.low / 2)
    assert against.high == pytest.approx(1 - both.low / 2)


@pytest.mark.parametrize("slug", ["p-from-f", "p-from-chi2"])
def test_several_degrees_have_no_side(slug):
    for identity in ONE_SIDED[slug]:
        for form in identity.forms:
            three = [Interval(0.1, 0.2)] + [Interval(3.0, 3.0)] * (len(form.takes) - 1)
            assert form.value(*three) == EVERYTHING


# How a form narrows.


def test_narrow_meets_what_is_printed():
    form = IDENTITIES["t-from-b-se"].forms[0]
    values = {"b": Interval(-0.845, -0.835), "se": Interval(0.125, 0.135)}
    assert narrow(form, values, Interval(-6.4, -6.35)) == Interval(-6.4, -6.35)
    assert narrow(form, values, Interval(6.35, 6.4)) is None
    left = narrow(form, values, EVERYTHING)
    assert left is not None
    assert left.low == pytest.approx(-6.76)


def test_a_mirrored_form_narrows_each_side():
    form = next(form for form in IDENTITIES["p-from-t"].forms if form.mirrored)
    magnitude = Interval(2.0, 3.0)
    assert confine(form, magnitude, EVERYTHING) == Interval(-3.0, 3.0)
    assert confine(form, magnitude, Interval(-2.5, 0.0)) == Interval(-2.5, -2.0)
    assert confine(form, magnitude, Interval(0.0, 2.5)) == Interval(2.0, 2.5)
    assert confine(form, magnitude, Interval(-1.0, 1.0)) is None


def test_sums_are_kept():
    assert sum_of_parts("anova-df", 4) is sum_of_parts("anova-df", 4)
    assert sum_of_parts("anova-sums", 2) is IDENTITIES["anova-sums"]
    assert not any(form.assumed for form in sum_of_parts("anova-df", 4).forms)
    assumed = {form.assumed for form in sum_of_parts("anova-sums", 4).forms}
    assert assumed == {("orthogonal-effects",)}


def test_names_have_domains_and_symbols():
    assert domain("R2") == domain("R2_full") == Interval(0.0, 1.0)
    assert domain("part12") == Interval(0.0, math.inf)
    assert symbol("R2") == "R²"
    assert symbol("ss_error") == "SS error"
    assert symbol("part12") == "part 12"
    with pytest.raises(KeyError):
        domain("part0")
    with pytest.raises(KeyError):
        domain("nothing")


# Completeness: a box gives no more than its corners do.

#: Steps from one side to the other, which corners don't show.
STEPS = {"signs", "ci-against-p"}

#: Pairs whose difference is divided by: where they overlap, a box holds a pole between its corners.
POLES = (("ci_low", "ci_high"), ("R2_adj", "R2"), ("ss_full", "ss_reduced"))


def holds_pole(form: Form, box: dict[str, Interval]) -> bool:
    return any(
        {low, high} <= set(form.takes) and box[low].high >= box[high].low for low, high in POLES
    )


@pytest.mark.parametrize(("identity", "scene"), PAIRS, ids=names(PAIRS))
@given(seed=st.integers(0, 2**32))
@settings(max_examples=25, deadline=None)
def test_is_as_narrow_as_its_corners(identity: Identity, scene: Scenario, seed: int):
    rng = Random(seed)
    with mpmath.workdps(DIGITS):
        values = scene.draw(rng)
    box = {name: around(v, rng, name in scene.counts) for name, v in values.items()}
    for form in identity.forms:
        if not speaks(identity, form, scene, values) or identity.slug in STEPS:
            continue
        if holds_pole(form, box):
            continue
        arguments = [box[name] for name in form.takes]
        result = form.value(*arguments)
        corners = [
            form.value(*[Interval(x, x) for x in corner])
            for corner in itertools.product(*arguments)
        ]
        low, high = min(c.low for c in corners), max(c.high for c in corners)
        size = max((abs(x) for x in (low, high, *itertools.chain(*arguments))), default=1)
        # Wide slices of degrees of freedom leave a little more than corners would.
        slack = 1e-8 if all(n in scene.counts or "df" not in n for n in form.takes) else 0.05
        assert result.low >= low - slack * min(size, abs(low) + 1e-3), (form.formula, arguments)
        assert result.high <= high + slack * min(size, abs(high) + 1e-3), (form.formula, arguments)


def around(value: mpmath.mpf, rng: Random, whole: bool) -> Interval:
    """A narrow interval around a value, on its side of zero and of one."""
    centre = float(value)
    if whole or not centre:
        return Interval(centre, centre)
    room = min(abs(centre), abs(1 - centre) or 1.0) * rng.uniform(1e-6, 0.02)
    return Interval(centre - room, centre + room)


# Hostile arguments.

EDGES = (
    -math.inf,
    -1e308,
    -2,
    -1,
    -1e-300,
    0.0,
    5e-324,
    0.5,
    1 - 1e-16,
    1,
    2,
    57,
    1e9,
    1e18,
    1e308,
)
INTERVALS = [Interval(a, b) for a in EDGES for b in (*EDGES, math.inf) if a <= b]
FORMS = [(identity, form) for identity in ALL for form in identity.forms]


@given(st.data())
@settings(max_examples=1000, deadline=None)
def test_never_raises(data):
    identity, form = data.draw(st.sampled_from(FORMS))
    arguments = [data.draw(st.sampled_from(INTERVALS)) for _ in form.takes]
    result = form.value(*arguments)
    assert result.low <= result.high, (identity.slug, form.formula, arguments)


@given(st.data())
def test_not_a_number_excludes_nothing_wrongly(data):
    _, form = data.draw(st.sampled_from(FORMS))
    result = form.value(*[Interval(math.nan, math.nan) for _ in form.takes])
    assert not math.isnan(result.low)
    assert not math.isnan(result.high)


def test_impossible_arguments_say_nothing():
    form = IDENTITIES["f-from-r2"].forms[0]
    one = Interval(1.0, 1.0)
    assert form.value(Interval(1.15, 1.25), one, one) == EVERYTHING


def test_import_is_cheap(subprocess_modules):
    assert not {"scipy", "numpy", "dataclasses"} & subprocess_modules("import crossfoot.laws")


def test_warm_imports_the_tails(subprocess_modules):
    warm()
    assert "scipy.special" in subprocess_modules("import crossfoot.laws as laws; laws.warm()")


@pytest.fixture
def subprocess_modules():
    import subprocess

    def run(code: str) -> set[str]:
        command = [
            sys.executable,
            "-c",
            f"import sys; sys.path[:] = {sys.path!r}\n{code}\nprint(*sys.modules)",
        ]
        done = subprocess.run(command, capture_output=True, text=True, check=True)
        return set(done.stdout.split())

    return run


def test_too_few_pairs_have_no_fisher_limits():
    # Their variance is 1/(n − 3), which less than one degree of freedom does not have.
    form = next(f for f in IDENTITIES["ci-from-r"].forms if f.takes == ("r", "df", "ci_level"))
    level = Interval(0.95, 0.95)
    assert form.value(Interval(0.3, 0.4), Interval(0.5, 0.9), level) == EVERYTHING
