"""Correct results, printed with every mix of decimal and thousands marks, never give a conflict."""

from __future__ import annotations

import math
import random

import pytest
from scipy import stats

import crossfoot

#: What groups digits, or nothing.
GROUPS = (None, ",", ".", "'", "\u202f", " ")
LEADS = ("", "Es zeigte sich: ", "In 2,345 farms, ", "Bei 2.345 Betrieben: ")


class Hand:
    """How one author prints numbers; a careless one now and then takes the other mark."""

    def __init__(self, rng: random.Random) -> None:
        self.rng = rng
        self.mark = rng.choice(".,")
        self.group = rng.choice(GROUPS)
        self.careless = rng.random() < 0.35
        self.separator = rng.choice(("; ", ", ", " ; "))

    def number(self, value: float, decimals: int) -> str:
        other = self.careless and self.rng.random() < 0.4
        mark = {".": ",", ",": "."}[self.mark] if other else self.mark
        whole, _, fraction = f"{abs(value):.{decimals}f}".partition(".")
        sign = self.rng.choice("-−") if value < 0 else ""
        return sign + self._grouped(whole, mark) + (mark + fraction if fraction else "")

    def count(self, value: int) -> str:
        return self._grouped(str(value), self.mark)

    def _grouped(self, digits: str, mark: str) -> str:
        if self.group in {None, mark} or len(digits) < 4:
            return digits
        return f"{int(digits):,}".replace(",", self.group or "")

    def p(self, value: float) -> str:
        small = value < 0.001
        return f"p {'<' if small else '='} {self.number(0.001 if small else value, 3)}"


def _of_model(rng: random.Random, hand: Hand) -> list[str]:
    df1, df2 = rng.randint(1, 5), rng.choice((rng.randint(8, 300), rng.randint(1000, 9000)))
    share = rng.random() * rng.choice((0.3, 0.9))
    value = share / (1 - share) * df2 / df1
    name = f"F({df1}{rng.choice((', ', '; '))}{hand.count(df2)})"
    p = float(stats.f.sf(value, df1, df2))
    return [
        f"{name} = {hand.number(value, rng.randint(1, 3))}",
        hand.p(p),
        f"R² = {hand.number(share, rng.randint(2, 3))}",
    ]


def _of_correlation(rng: random.Random, hand: Hand) -> list[str]:
    n, r = rng.choice((rng.randint(8, 300), rng.randint(1000, 9000))), rng.uniform(-0.8, 0.8)
    p = float(2 * stats.t.sf(abs(r) * math.sqrt((n - 2) / (1 - r * r)), n - 2))
    return [f"r = {hand.number(r, rng.randint(2, 3))}", f"n = {hand.count(n)}", hand.p(p)]


def _of_coefficient(rng: random.Random, hand: Hand) -> list[str]:
    scale, df = rng.choice((1, 10, 1000)), rng.randint(10, 2000)
    error, test = rng.uniform(0.2, 1.5) * scale, rng.gauss(0, 2.5)
    estimate, reach = error * test, float(stats.t.ppf(0.975, df)) * error
    decimals = rng.choice((0, 1, 2, 3)) if scale == 1000 else rng.choice((2, 3))
    low, high = (hand.number(estimate + side * reach, decimals) for side in (-1, 1))
    return [
        f"b = {hand.number(estimate, decimals)}",
        f"SE = {hand.number(error, decimals)}",
        f"95% CI [{low}; {high}]",
        f"t({hand.count(df)}) = {hand.number(test, 2)}",
        hand.p(float(2 * stats.t.sf(abs(test), df))),
    ]


@pytest.mark.parametrize("kind", [_of_model, _of_correlation, _of_coefficient])
def test_no_mix_of_marks_gives_a_conflict(kind: object) -> None:
    assert callable(kind)
    rng = random.Random(20)
    loud = {}
    read = 0
    for _ in range(300):
        hand = Hand(rng)
        text = rng.choice(LEADS) + hand.separator.join(kind(rng, hand)) + "."
        scan = crossfoot.scan_text(text, "plain")
        read += len(scan.claims)
        if found := [f for f in scan.findings if f["severity"] in {"conflict", "reversal"}]:
            loud[text] = [f["message"] for f in found]
    assert loud == {}
    assert read >= 295
