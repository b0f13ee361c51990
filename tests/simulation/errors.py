"""Slips made on correctly printed claims, by rules of their own: the audit must undo them.

Each takes a claim with the true values behind it and returns the claim with one reading (or pair
of degrees of freedom) spoilt, and the index of the spoilt reading; None where it can't be made.
"""

from __future__ import annotations

import math
import re
from collections.abc import Callable, Mapping
from itertools import pairwise
from random import Random
from typing import NamedTuple

from audit.notation import reading
from crossfoot.laws.quantities import domain
from crossfoot.model import Claim

_DIGITS = re.compile(r"\d")
_NUMBER = re.compile(r"[-−]?(?:(?:0|[1-9]\d*)(?:\.\d+)?|\.\d+)%?")
_POINT = re.compile(r"^([-−]?)(\d*)\.(\d+)$")


class Spoilt(NamedTuple):
    """A claim with one slip in it, and what was printed before it."""

    claim: Claim
    place: int
    relation: str
    literal: str


Rule = Callable[[Claim, Mapping[str, float], Random], Spoilt | None]


def _with(claim: Claim, place: int, literal: str, relation: str = "") -> Spoilt | None:
    old = claim.readings[place]
    relation = relation or old.relation
    if (relation, literal) == (old.relation, old.literal):
        return None
    if _NUMBER.fullmatch(literal) is None:
        return None
    made = reading(old.quantity, relation, literal)
    if old.quantity in ("df", "df1", "df2", "n", "k") and made.low <= 0:
        return None
    readings = (*claim.readings[:place], made, *claim.readings[place + 1 :])
    return Spoilt(claim._replace(readings=readings), place, old.relation, old.literal)


def _somewhere(edit: Callable[[str, Random], str | None], quantities: str = "") -> Rule:
    """Make a slip in the literal of a reading chosen at random."""

    def rule(claim: Claim, true: Mapping[str, float], rng: Random) -> Spoilt | None:
        among = [
            place
            for place, r in enumerate(claim.readings)
            if r.quantity != "ci_level"
            and r.relation == "="
            and (not quantities or r.quantity in quantities.split())
        ]
        if not among:
            return None
        place = rng.choice(among)
        literal = edit(claim.readings[place].literal, rng)
        return None if literal is None else _with(claim, place, literal)

    return rule


def _places(literal: str) -> list[int]:
    return [match.start() for match in _DIGITS.finditer(literal)]


def swapped(literal: str, rng: Random) -> str | None:
    places = _places(literal)
    pairs = [(i, j) for i, j in pairwise(places) if literal[i] != literal[j]]
    if not pairs:
        return None
    i, j = rng.choice(pairs)
    text = list(literal)
    text[i], text[j] = text[j], text[i]
    return "".join(text)


def mistyped(literal: str, rng: Random) -> str | None:
    i = rng.choice(_places(literal))
    new = rng.choice([digit for digit in "0123456789" if digit != literal[i]])
    return literal[:i] + new + literal[i + 1 :]


def dropped(literal: str, rng: Random) -> str | None:
    i = rng.choice(_places(literal))
    return literal[:i] + literal[i + 1 :]


def doubled(literal: str, rng: Random) -> str | None:
    i = rng.choice(_places(literal))
    return literal[:i] + literal[i] + literal[i:]


def moved(literal: str, rng: Random) -> str | None:
    match = _POINT.match(literal)
    if match is None:
        return None
    sign, whole, fraction = match.groups()
    digits = (whole if whole != "0" else "") + fraction
    decimals = len(fraction) + rng.choice((-1, 1))
    if decimals < 1 or (digits.startswith("0") and decimals < len(fraction) and whole):
        return None
    digits = digits.rjust(decimals, "0")
    head = digits[: len(digits) - decimals].lstrip("0")
    return f"{sign}{head or ('0' if whole else '')}.{digits[len(digits) - decimals :]}"


def unsigned(literal: str, rng: Random) -> str | None:
    return literal[1:] if literal[0] in "-−" else None


def cut(claim: Claim, true: Mapping[str, float], rng: Random) -> Spoilt | None:
    return _rounded(claim, true, rng, math.floor)


def raised(claim: Claim, true: Mapping[str, float], rng: Random) -> Spoilt | None:
    return _rounded(claim, true, rng, math.ceil)


def _rounded(
    claim: Claim, true: Mapping[str, float], rng: Random, way: Callable[[float], int]
) -> Spoilt | None:
    place = rng.randrange(len(claim.readings))
    old = claim.readings[place]
    match = _POINT.match(old.literal)
    if match is None or old.relation != "=":
        return None
    value = abs(true[old.quantity])
    decimals = len(match[3])
    number = way(value * 10**decimals) / 10**decimals
    return _with(claim, place, match[1] + _hand(f"{number:.{decimals}f}", old.literal))


def _hand(number: str, like: str) -> str:
    bare = like.lstrip("-−").startswith(".")
    return number.removeprefix("0") if bare and number.startswith("0.") else number


def _find(claim: Claim, *quantities: str) -> dict[str, int]:
    found = {r.quantity: place for place, r in enumerate(claim.readings)}
    return {name: found[name] for name in quantities if name in found}


def freedom_swapped(claim: Claim, true: Mapping[str, float], rng: Random) -> Spoilt | None:
    found = _find(claim, "df1", "df2")
    if len(found) < 2:
        return None
    one, two = (claim.readings[found[name]] for name in ("df1", "df2"))
    if one.literal == two.literal:
        return None
    readings = list(claim.readings)
    readings[found["df1"]] = reading("df1", "=", two.literal)
    readings[found["df2"]] = reading("df2", "=", one.literal)
    return Spoilt(claim._replace(readings=tuple(readings)), found["df1"], "=", one.literal)


def cases_for_freedom(claim: Claim, true: Mapping[str, float], rng: Random) -> Spoilt | None:
    found = _find(claim, "df2", "df")
    if not found or claim.kind in ("coefficient", "frequency", "model-change"):
        return None
    name, place = next(iter(found.items()))
    if claim.readings[place].low != claim.readings[place].high:
        return None
    more = 1 + true["df1"] if name == "df2" else 2
    return _with(claim, place, f"{true[name] + more:.0f}")


def root_for_square(claim: Claim, true: Mapping[str, float], rng: Random) -> Spoilt | None:
    found = _find(claim, "R2")
    if not found or "R" not in true:
        return None
    return _value(claim, found["R2"], true["R"])


def adjusted_for_plain(claim: Claim, true: Mapping[str, float], rng: Random) -> Spoilt | None:
    found = _find(claim, "R2")
    if not found or true.get("R2_adj", -1.0) <= 0:
        return None
    return _value(claim, found["R2"], true["R2_adj"])


def plain_for_adjusted(claim: Claim, true: Mapping[str, float], rng: Random) -> Spoilt | None:
    found = _find(claim, "R2_adj", "R2")
    return _value(claim, found["R2_adj"], true["R2"]) if len(found) == 2 else None


def _value(claim: Claim, place: int, number: float) -> Spoilt | None:
    old = claim.readings[place]
    match = _POINT.match(old.literal)
    if match is None or old.relation != "=":
        return None
    return _with(claim, place, _hand(f"{number:.{len(match[3])}f}", old.literal))


def times(factor: float) -> Rule:
    def rule(claim: Claim, true: Mapping[str, float], rng: Random) -> Spoilt | None:
        found = _find(claim, "p")
        if not found or true["p"] * factor > 1:
            return None
        return _value(claim, found["p"], true["p"] * factor)

    return rule


def value_for_bound(claim: Claim, true: Mapping[str, float], rng: Random) -> Spoilt | None:
    found = _find(claim, "p")
    if not found or claim.readings[found["p"]].relation != "<":
        return None
    return _with(claim, found["p"], claim.readings[found["p"]].literal, "=")


def copied(claim: Claim, true: Mapping[str, float], rng: Random) -> Spoilt | None:
    """Copy a number that looks alike: a share for a share, something larger for such."""
    alike = [
        i for i, r in enumerate(claim.readings) if r.relation == "=" and _POINT.match(r.literal)
    ]
    if len(alike) < 2:
        return None
    place, other = rng.sample(alike, 2)
    old, new = claim.readings[place], claim.readings[other]
    if (abs(old.low) < 1) != (abs(new.low) < 1) or new.high < domain(old.quantity).low:
        return None
    return _with(claim, place, new.literal)


#: Every rule by the name of the slip that undoes it.
RULES: Mapping[str, Rule] = {
    "digits swapped": _somewhere(swapped),
    "digit wrong": _somewhere(mistyped),
    "digit dropped": _somewhere(dropped),
    "digit doubled": _somewhere(doubled),
    "point moved": _somewhere(moved),
    "sign lost": _somewhere(unsigned, "b t beta r z ci_low ci_high"),
    "df swapped": freedom_swapped,
    "n for df": cases_for_freedom,
    "root for square": root_for_square,
    "adjusted for plain": adjusted_for_plain,
    "plain for adjusted": plain_for_adjusted,
    "one-sided": times(0.5),
    "doubled p": times(2),
    "multiplied by 3": times(3),
    "value for bound": value_for_bound,
    "copied": copied,
    "cut off": cut,
    "rounded up": raised,
}
