"""Paragraphs of correct results, drawn: kinds, order, connecting words and an author's habits."""

from __future__ import annotations

from collections.abc import Callable, Iterator
from typing import NamedTuple

import numpy as np
from scipy import stats

Draw = Callable[["Hand"], str]

_SUBJECTS = (
    "shade", "slope", "rainfall", "tide height", "path width", "noise level", "bank type",
    "the number of visits", "the season",
)  # fmt: skip
_JOINTS = (", ", "; ", ", and ", ", but ", " and ", ", whereas ", "; in contrast, ")
_BRACKETS = ("({})", ", {}", ": {}", "[{}]")


class Hand:
    """How one author writes: drawn once for each sentence."""

    def __init__(self, rng: np.random.Generator) -> None:
        self.rng = rng
        self.zero = bool(rng.random() < 0.5)
        self.mark = self.pick("", "*")
        self.space = self.pick(" ", "", " ")
        self.comma = self.pick(", ", "; ", ", ")
        self.minus = self.pick("-", "−")
        self.between = self.pick(", ", ",")
        self.p_decimals = int(rng.choice([2, 3, 3, 4]))

    def pick(self, *choices: str) -> str:
        return choices[int(self.rng.integers(len(choices)))]

    def chance(self, share: float) -> bool:
        return bool(self.rng.random() < share)

    def number(self, value: float, decimals: int) -> str:
        text = f"{value:.{decimals}f}"
        if float(text) == 0:
            text = text.removeprefix("-")
        return text.replace("-", self.minus)

    def share(self, value: float, decimals: int) -> str:
        text = self.number(value, decimals)
        return text if self.zero else text.replace("0.", ".", 1) if abs(value) < 1 else text

    def name(self, symbol: str) -> str:
        return f"{self.mark}{symbol}{self.mark}"

    def told(self, name: str, literal: str, relation: str = "=") -> str:
        return f"{name}{self.space}{relation}{self.space}{literal}"

    def p(self, value: float) -> str:
        decimals = self.p_decimals
        floor = 10.0**-decimals
        if value < floor:
            return self.told(self.name("p"), self.share(floor, decimals), "<")
        if value < 0.05 and self.chance(0.1):
            return self.told(self.name("p"), self.share(0.05, 2), "<")
        if float(f"{value:.{decimals}f}") >= 1:
            return self.told(self.name("p"), self.share(0.99, 2), ">")
        return self.told(self.name("p"), self.share(value, decimals))

    def list(self, *parts: str) -> str:
        return self.comma.join(filter(None, parts))


def _effect(hand: Hand) -> str:
    df1, df2 = int(hand.rng.integers(1, 5)), int(hand.rng.integers(12, 300))
    F = 0.05 + abs(hand.rng.normal()) ** 2 * float(hand.rng.choice([0.5, 2, 5]))
    size = hand.told("ηp²", hand.share(df1 * F / (df1 * F + df2), 2)) if hand.chance(0.3) else ""
    test = hand.told(f"{hand.name('F')}({df1}{hand.between}{df2})", hand.number(F, 2))
    return hand.list(test, hand.p(stats.f.sf(F, df1, df2)), size)


def _means(hand: Hand) -> str:
    df, t = int(hand.rng.integers(10, 200)), hand.rng.normal(0, 2)
    size = hand.told(hand.name("d"), hand.number(abs(t) * 2 / df**0.5, 2))
    return hand.list(_t(hand, t, df), _p_of_t(hand, t, df), size if hand.chance(0.2) else "")


def _t(hand: Hand, t: float, df: int) -> str:
    return hand.told(f"{hand.name('t')}({df})", hand.number(t, 2))


def _p_of_t(hand: Hand, t: float, df: int) -> str:
    return hand.p(2 * stats.t.sf(abs(t), df))


def _correlation(hand: Hand) -> str:
    df, r = int(hand.rng.integers(10, 200)), float(np.tanh(hand.rng.normal(0, 0.4)))
    test = hand.told(f"{hand.name('r')}({df})", hand.share(r, 2))
    return hand.list(test, _p_of_t(hand, r * (df / (1 - r * r)) ** 0.5, df))


def _frequencies(hand: Hand) -> str:
    df, n = int(hand.rng.integers(1, 6)), int(hand.rng.integers(40, 500))
    chi2 = hand.rng.chisquare(df) * float(hand.rng.choice([1, 2, 3]))
    inside = f"{df}, {hand.name('N')} = {n}" if hand.chance(0.5) else f"{df}"
    return hand.list(
        hand.told(f"χ²({inside})", hand.number(chi2, 2)), hand.p(stats.chi2.sf(chi2, df))
    )


def _coefficient(hand: Hand) -> str:
    df, t = int(hand.rng.integers(20, 300)), hand.rng.normal(0, 2.5)
    se = 10 ** hand.rng.uniform(-1.5, 1)
    b, reach = t * se, stats.t.isf(0.025, df) * se
    decimals = max(0, 2 - int(np.floor(np.log10(se))) - int(hand.chance(0.5)))
    low, high = hand.number(b - reach, decimals), hand.number(b + reach, decimals)
    interval = f"95% CI [{low}{hand.pick(', ', '; ')}{high}]"
    rest = {
        "test": (_t(hand, t, df), _p_of_t(hand, t, df)),
        "interval": (interval, _p_of_t(hand, t, df)),
        "both": (_t(hand, t, df), _p_of_t(hand, t, df), interval),
        "p": (_p_of_t(hand, t, df),),
    }
    error = hand.told("SE", hand.number(se, decimals)) if hand.chance(0.7) else ""
    estimate = hand.told(hand.name(hand.pick("b", "B")), hand.number(b, decimals))
    return hand.list(estimate, error, *rest[hand.pick(*rest)])


def _model(hand: Hand) -> str:
    k, df2 = int(hand.rng.integers(1, 7)), int(hand.rng.integers(20, 300))
    R2, n = hand.rng.uniform(0.03, 0.7), k + df2 + 1
    F = (R2 / k) / ((1 - R2) / df2)
    fit = [hand.told("R²", hand.share(R2, 2))]
    if hand.chance(0.4):
        adjusted = hand.share(1 - (1 - R2) * (n - 1) / df2, 2)
        fit.append(hand.told(hand.pick("adjusted R²", "adj. R²", "R²adj"), adjusted))
    test = [
        hand.told(f"{hand.name('F')}({k}{hand.between}{df2})", hand.number(F, 2)),
        hand.p(stats.f.sf(F, k, df2)),
    ]
    cases = f"{hand.name('n')} = {n}" if hand.chance(0.2) else ""
    return hand.list(*((*fit, *test) if hand.chance(0.6) else (*test, *fit)), cases)


class _Kind(NamedTuple):
    draw: Draw
    clauses: tuple[str, ...]


_KINDS = (
    _Kind(
        _effect,
        ("an effect of {}", "{} mattered", "the groups differed in {}", "no interaction with {}"),
    ),
    _Kind(_means, ("the two crews differed in {}", "{} was higher in the north")),
    _Kind(_correlation, ("{} was correlated with yield", "yield and {} were related")),
    _Kind(_frequencies, ("{} depended on site", "the share of {} differed")),
    _Kind(_coefficient, ("{} predicted yield", "for {}", "the slope of {} was steep")),
    _Kind(_model, ("the model with {} fitted well", "{} and two others explained yield")),
)


def paragraphs(many: int, seed: int) -> Iterator[tuple[str, int]]:
    """Yield paragraphs with the number of results that each holds."""
    rng = np.random.default_rng(seed)
    for _ in range(many):
        sentences = [_sentence(Hand(rng)) for _ in range(int(rng.integers(1, 4)))]
        yield " ".join(text for text, _ in sentences), sum(count for _, count in sentences)


def _sentence(hand: Hand) -> tuple[str, int]:
    count = int(hand.rng.choice([1, 1, 2, 2, 3, 4]))
    kinds = hand.rng.integers(len(_KINDS), size=1 if hand.chance(0.6) else count)
    text = _clause(hand, _KINDS[kinds[0]])
    for number in range(1, count):
        text += hand.pick(*_JOINTS) + _clause(hand, _KINDS[kinds[number % len(kinds)]])
    return f"{text[0].upper()}{text[1:]}.", count


def _clause(hand: Hand, kind: _Kind) -> str:
    words = hand.pick(*kind.clauses).format(hand.pick(*_SUBJECTS))
    result = hand.pick(*_BRACKETS).format(kind.draw(hand))
    return f"{words}{result}" if result.startswith((",", ":")) else f"{words} {result}"
