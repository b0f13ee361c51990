"""The promise, by simulation.

Sound: a correctly rounded, correctly stated result never gives a conflict or a reversal, and a
doubt only where it leaves an assumption unsaid that does not hold. Complete: wherever the intervals
of an identity are disjoint, something is reported. A hundred thousand results as a rule; a million:

    CROSSFOOT_SIMULATE=1000000 python -m pytest tests/simulation
"""

from __future__ import annotations

import math
import os
from collections.abc import Iterator, Mapping
from random import Random

import pytest
from scipy import special

from crossfoot.audit import audit_claim
from crossfoot.audit.verdict import judge
from crossfoot.laws import IDENTITIES, ONE_SIDED, Form, Identity, confine
from crossfoot.laws.assumptions import ASSUMPTIONS
from crossfoot.laws.interval import Interval
from crossfoot.model import Claim
from crossfoot.scan import scan_text
from simulation.errors import RULES, Spoilt
from simulation.prose import paragraphs
from simulation.results import FAMILIES, Family, claims

RESULTS = int(os.environ.get("CROSSFOOT_SIMULATE", "100000"))
SPOILT = RESULTS // 50

_SHARES = sum(family.share for family in FAMILIES)
_CHUNK = 20_000


def results(family: Family, many: int) -> Iterator[Claim]:
    """So many results of a family."""
    for seed, start in enumerate(range(0, many, _CHUNK)):
        for claim, _ in claims(family, min(_CHUNK, many - start), seed):
            yield claim


@pytest.mark.parametrize("family", FAMILIES, ids=lambda family: family.name)
def test_a_correct_result_is_never_called_wrong(family: Family) -> None:
    many = 0
    for claim in results(family, math.ceil(RESULTS * family.share / _SHARES)):
        many += 1
        for finding in judge(claim, 0.05).findings:
            said = [(r.quantity, r.relation, r.literal) for r in claim.readings]
            assert finding.severity in ("doubt", "note"), (finding.message, said)
            assert family.doubtful or finding.severity == "note", (finding.message, said)
    assert many > 0.9 * RESULTS * family.share / _SHARES


SURE = [family for family in FAMILIES if not family.doubtful]


@pytest.mark.parametrize("family", SURE, ids=lambda family: family.name)
def test_whatever_is_printed_of_a_correct_result_none_of_it_is_called_wrong(family: Family) -> None:
    """No customary set of quantities: what is left out must not be put together wrongly."""
    for claim, _ in claims(family, max(300, RESULTS // 100), 90, any_of_it=True):
        for finding in judge(claim, 0.05).findings:
            said = [(r.quantity, r.relation, r.literal) for r in claim.readings]
            assert finding.severity in ("doubt", "note"), (finding.message, said)


@pytest.mark.parametrize("language", ["markdown", "plain"])
def test_results_side_by_side_are_kept_apart(language: str) -> None:
    """From drawn prose every result is read, none is put together of two, and all agree."""
    for text, count in paragraphs(RESULTS // 200, 60):
        shown = text if language == "markdown" else text.replace("*", "")
        found = scan_text(shown, language).claims
        assert len(found) == count, shown
        for placed in found:
            said = [f.message for f in placed.audited.findings if f.severity != "note"]
            assert not said, (shown, said)


@pytest.mark.parametrize("name", ["missing", "factorial", "unmarked one-sided", "normal limits"])
def test_what_is_left_unsaid_is_doubted(name: str) -> None:
    family = next(family for family in FAMILIES if family.name == name)
    found = [judge(claim, 0.05).findings for claim in results(family, 60)]
    assert any(f.severity == "doubt" for findings in found for f in findings)


def spoilt() -> Iterator[Spoilt]:
    """Results with a slip in them, of every kind and family in turn."""
    rng = Random(50)
    each = math.ceil(SPOILT / len(RULES) / len(SURE))
    for family in SURE:
        for claim, true in claims(family, each * 3, 50):
            for rule in RULES.values():
                made = rule(claim, true, rng)
                if made is not None and rng.random() < 0.5:
                    yield made


def test_whatever_is_disjoint_is_reported() -> None:
    many = failing = 0
    for made in spoilt():
        many += 1
        slugs = set(disjoint(made.claim))
        if slugs:
            failing += 1
            found = audit_claim(made.claim, 0.05).findings
            said = [(r.quantity, r.relation, r.literal) for r in made.claim.readings]
            assert any(f.severity != "note" for f in found), (slugs, said)
            assert slugs & {f.identity for f in found}, (slugs, said)
    assert many > SPOILT / 2
    assert failing > many / 3


def disjoint(claim: Claim) -> Iterator[str]:
    """The identities that what is printed contradicts, straight from their declarations."""
    printed = {r.quantity: Interval(r.low, r.high) for r in claim.readings}
    for slug, identity in IDENTITIES.items():
        ways = [identity]
        if "one-sided" in claim.context and slug in ONE_SIDED:
            ways = [*ONE_SIDED[slug], identity]
        if all(fails(way, claim, printed) for way in ways):
            yield slug


def fails(identity: Identity, claim: Claim, printed: Mapping[str, Interval]) -> bool:
    return any(
        confine(form, form.value(*[printed[name] for name in form.takes]), printed[form.gives])
        is None
        for form in identity.forms
        if {form.gives, *form.takes} <= printed.keys() and speaks(identity, form, claim, printed)
    )


def speaks(identity: Identity, form: Form, claim: Claim, printed: Mapping[str, Interval]) -> bool:
    decimal = any(not printed[df].low.is_integer() for df in ("df", "df1", "df2") if df in printed)
    needs = {*identity.needs, *form.needs, *form.assumed} - ({"df-as-used"} if decimal else set())
    return (
        claim.kind in (form.kinds or identity.kinds)
        and printed.keys() >= set(form.beside)
        and printed.keys().isdisjoint(form.unless)
        and not any(ASSUMPTIONS[key].breach(claim.context) for key in needs)
    )


def test_the_same_by_other_means() -> None:
    """Corners of the boxes by SciPy, without any code of the laws."""
    rng = Random(51)
    family = next(family for family in FAMILIES if family.name == "effect")
    failing = 0
    for claim, true in claims(family, max(600, SPOILT // 4), 51):
        made = RULES[rng.choice(list(RULES))](claim, true, rng)
        printed = {r.quantity: (r.low, r.high) for r in made.claim.readings} if made else {}
        if made is None or not {"F", "df1", "df2", "p"} <= printed.keys():
            continue
        df1, df2 = printed["df1"][0], printed["df2"][0]
        low, high = (special.fdtrc(df1, df2, max(F, 0.0)) for F in reversed(printed["F"]))
        if printed["p"][1] < low * (1 - 1e-9) or printed["p"][0] > high * (1 + 1e-9):
            failing += 1
            assert "p-from-f" in {f.identity for f in audit_claim(made.claim, 0.05).findings}
    assert failing > 50
