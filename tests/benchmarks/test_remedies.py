"""How often the likeliest remedy is the true one, slip by slip.

Correctly printed results are spoilt by one slip each, by the rules of ``simulation.errors``; where
that is provable, the remedies of the strongest finding are compared with what was printed before.

    python -m pytest tests/benchmarks/test_remedies.py -s

prints the table. ``CROSSFOOT_REMEDIES=500`` spoils so many results by each slip instead of 60.

``first`` and ``three`` count the very literal. What limits them is that a slip can destroy what
would identify it: how many decimals stood there before another number was copied over it, which
of several fitting digits is the lost one, which of two readings that imply each other is wrong.
So ``value`` counts the same number with other decimals too, within three, and ``reading`` how
often the first remedy changes the reading that is wrong.
"""

from __future__ import annotations

import os
from collections.abc import Iterator
from random import Random
from typing import NamedTuple

import pytest

from audit.notation import reading
from crossfoot.audit import audit_claim
from crossfoot.audit.literals import numeral
from crossfoot.model import Finding
from simulation.errors import RULES, Spoilt
from simulation.results import FAMILIES, claims

MANY = int(os.environ.get("CROSSFOOT_REMEDIES", "60"))

#: Percentages that are reached, less what chance takes with 60 results a slip.
FIRST, IN_THREE = 76, 88


class Score(NamedTuple):
    """Counts of one slip."""

    slip: str
    made: int
    provable: int
    first: int
    in_three: int
    value: int
    reading: int

    def line(self) -> str:
        shares = [100 * hits / max(1, self.provable) for hits in self[3:]]
        columns = "".join(f"{share:9.0f}" for share in shares)
        return f"{self.slip:20}{self.made:7}{self.provable:10}{columns}"


def spoilt(slip: str) -> Iterator[Spoilt]:
    """Results with this slip in them, of all families that leave no assumption unsaid."""
    rng = Random(slip)
    families = [family for family in FAMILIES if not family.doubtful and family.name != "robust"]
    pool = [pair for f in families for pair in claims(f, int(f.share * (8 + MANY)), 20)]
    rng.shuffle(pool)
    made = 0
    for claim, true in pool:
        found = RULES[slip](claim, true, rng)
        if found is not None and made < MANY:
            made += 1
            yield found


def plain(text: str) -> str:
    """A literal but for habits: its minus sign, and the zero before its point."""
    return text.replace("−", "-").replace(" 0.", " .").replace("-0.", "-.")


def rank(finding: Finding, result: Spoilt) -> int | None:
    """The place of the true remedy among those listed."""
    true = plain(f"{result.relation} {result.literal}")
    for place, remedy in enumerate(finding.remedies):
        relation = result.claim.readings[remedy.reading].relation
        words = remedy.literal if remedy.literal[0] in "<>=" else f"{relation} {remedy.literal}"
        if remedy.reading == result.place and plain(words) == true:
            return place
    return None


def near(finding: Finding, result: Spoilt) -> bool:
    """Whether a remedy among three gives the true number, printed with other decimals or not."""
    quantity = result.claim.readings[result.place].quantity
    true = numeral(reading(quantity, "=", result.literal))
    for remedy in finding.remedies[:3]:
        made = numeral(reading(quantity, "=", remedy.literal.split()[-1]))
        if remedy.reading == result.place and true is not None and made is not None:
            apart = abs(true.value - made.value)
            if apart <= (true.half * true.unit + made.half * made.unit) * (1 + 1e-9):
                return True
    return False


def score(slip: str) -> Score:
    made = provable = first = in_three = value = right = 0
    for result in spoilt(slip):
        made += 1
        findings = audit_claim(result.claim).findings
        if findings and findings[0].severity != "note":
            provable += 1
            remedies = findings[0].remedies
            place = rank(findings[0], result)
            first += place == 0
            in_three += place is not None and place < 3
            value += near(findings[0], result)
            right += bool(remedies) and remedies[0].reading == result.place
    return Score(slip, made, provable, first, in_three, value, right)


@pytest.fixture(scope="module")
def scores() -> list[Score]:
    return [score(slip) for slip in RULES]


def test_the_true_remedy_is_among_the_first(scores: list[Score]) -> None:
    counts = [sum(column) for column in zip(*(row[1:] for row in scores), strict=True)]
    total = Score("all", *counts)
    names = "".join(f"{name:>9}" for name in ("first %", "three %", "value %", "reading %"))
    print(f"\n{'slip':20}{'made':>7}{'provable':>10}{names}")
    for row in (*scores, total):
        print(row.line())
    assert 100 * total.first / total.provable >= FIRST
    assert 100 * total.in_three / total.provable >= IN_THREE


def test_most_slips_are_provable(scores: list[Score]) -> None:
    assert all(row.made >= 30 for row in scores)
    assert sum(row.provable for row in scores) > 0.6 * sum(row.made for row in scores)
