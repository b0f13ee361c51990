"""Gross slips: one number of a table changed as people change them."""

from __future__ import annotations

import re
from typing import NamedTuple

import numpy as np

from tables.drawn import Drawn


class Slip(NamedTuple):
    """A table with a wrong number, and of which quantity it is."""

    drawn: Drawn
    quantity: str
    old: str
    new: str


def slipped(drawn: Drawn, rng: np.random.Generator) -> Slip | None:
    """Change one number that others tie down, so much that no rounding explains it."""
    checked = [
        (key, said.readings[key])
        for said in drawn.said
        if all(_tells(drawn, place) for (q, _), place in said.readings.items() if q != "p")
        for key in said.checked
    ]
    if not checked:
        return None
    for _ in range(20):
        (quantity, _), place = checked[int(rng.integers(len(checked)))]
        if quantity == "p" and _bounded(drawn, place):
            continue
        old = drawn.numbers[place]
        new = _changed(old, rng)
        if new is not None and _gross(quantity, value(old), value(new)):
            numbers = [*drawn.numbers]
            numbers[place] = new
            return Slip(drawn._replace(numbers=numbers), quantity, old, new)
    return None


def _tells(drawn: Drawn, place: int) -> bool:
    """Whether a number is printed to a digit at least: of 0.00 hardly anything follows."""
    return any(char in "123456789" for char in drawn.numbers[place])


def _bounded(drawn: Drawn, place: int) -> bool:
    """Whether a number only bounds what it is of: ``< .001``."""
    slot = re.compile(f"<\\s?\x00{place}\x00")
    texts = [cell.text for row in drawn.rows for cell in row]
    return any(slot.search(text) for text in (*texts, *drawn.notes))


def value(literal: str) -> float:
    return float(literal.replace("−", "-").replace("–", "-").replace(",", "."))


def _gross(quantity: str, old: float, new: float) -> bool:
    if quantity == "p":
        low, high = sorted((old, new))
        return low >= 0.002 and high <= 1 and high > 2 * low + 0.02
    if quantity in {"ci_low", "ci_high"} and abs(new - old) < 0.3 * max(abs(old), abs(new)):
        return False
    if quantity in {"R2", "R2_adj", "R2_change", "eta2", "eta2_partial"}:
        return abs(new - old) > 0.1 and 0 < new < 1
    if quantity in {"df1", "df2", "df"}:
        return new > 0 and abs(new - old) > 0.3 * old + 1
    if quantity == "b":
        old, new = abs(old), abs(new)  # a lost sign shows where t or an interval is printed
    if abs(old) < 0.02 or abs(new) < 0.02:
        return False
    return abs(new - old) > 0.3 * max(abs(old), abs(new))


def _changed(literal: str, rng: np.random.Generator) -> str | None:
    """A digit wrong, two swapped, the point moved or a sign lost."""
    digits = [i for i, char in enumerate(literal) if char.isdigit()]
    if "e" in literal or not digits:
        return None
    way = int(rng.integers(4))
    chars = list(literal)
    if way == 0:
        at = next((i for i in digits if literal[i] != "0"), digits[0])
        chars[at] = str((int(chars[at]) + int(rng.integers(2, 9))) % 10)
    elif way == 1 and len(digits) > 1:
        first = int(rng.integers(len(digits) - 1))
        a, b = digits[first], digits[first + 1]
        chars[a], chars[b] = chars[b], chars[a]
    elif way == 2 and ("." in literal or "," in literal):
        mark = literal.index("." if "." in literal else ",")
        if mark + 2 >= len(chars):
            return None
        chars[mark], chars[mark + 1] = chars[mark + 1], chars[mark]
    elif way == 3 and literal[0] in "-−":
        chars = chars[1:]
    text = "".join(chars)
    size = text.lstrip("-−")
    padded = size[0] == "0" and size[:2].isdigit()
    return None if text == literal or padded else text
