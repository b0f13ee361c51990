"""A printed numeral taken apart, so that another value can be written in the same hand.

The reading says what its literal is worth; here the literal is only split so that the product of
its digits and a power of ten is that value. So no rule about decimal commas, thousands marks or
exponents is written a second time.
"""

from __future__ import annotations

import math
import re
from collections.abc import Sequence
from typing import NamedTuple

from crossfoot.expressions import expression
from crossfoot.laws.interval import Interval
from crossfoot.laws.quantities import domain
from crossfoot.model import Reading
from crossfoot.reading.fold import ON_THE_LINE

_SHAPE = expression(
    r"([-−–+]?)\s?"  # a sign
    r"([0-9.,·'’\s]*)"  # digits and marks
    r"(.*)",  # percent sign, exponent
    re.DOTALL,
)
_EXPONENT = expression(r"([eE]|\s?[×x·]\s?10\^?\{?)([-−–+]?)(\d{1,3})(\}?)")
_MARKS = ".,·"
_MINUS = "-−–"

_BELOW = str.maketrans("0123456789", "₀₁₂₃₄₅₆₇₈₉")

#: Longer literals are no numerals that anybody has typed.
_LONGEST = 40

#: A reading's interval may be this much off its literal, in units of the last place.
_NEAR = 1e-6


class Numeral(NamedTuple):
    """The parts of a printed numeral.

    Attributes
    ----------
    sign
        As printed; empty where there is none.
    whole, mark, fraction
        Digits before the decimal mark (may be empty: ``.05``), the mark, digits after it.
    tail
        What follows the digits: a percent sign, an exponent.
    power
        The power of ten that the digits are multiplied by.
    group
        The thousands separator, empty where none is used.
    half
        Half the width of the interval it stands for, in units of its last place: 0 for an exact
        count.
    bare
        Whether its neighbours write numbers below one without a zero before the mark, where the
        numeral itself does not show.
    lowered
        Whether the digits are printed below the line, as in ``F₂,₅₇``.
    """

    sign: str
    whole: str
    mark: str
    fraction: str
    tail: str
    power: int
    group: str
    half: float
    bare: bool = False
    lowered: bool = False

    @property
    def size(self) -> float:
        """The number that is printed, without its sign."""
        return float(f"{self.whole or '0'}.{self.fraction or '0'}e{self.power}")

    @property
    def zeroless(self) -> bool:
        """Whether its author writes numbers below one without a zero before the mark."""
        return self.bare or not self.whole

    @property
    def value(self) -> float:
        """The number that is printed."""
        return -self.size if self.sign and self.sign in _MINUS else self.size

    @property
    def unit(self) -> float:
        """The worth of one unit in the last place."""
        return float(f"1e{self.power - len(self.fraction)}")

    @property
    def text(self) -> str:
        """The numeral as it is printed."""
        whole = self.whole
        if self.group and len(whole) > 3:
            head = len(whole) % 3 or 3
            parts = [whole[:head], *(whole[i : i + 3] for i in range(head, len(whole), 3))]
            whole = self.group.join(parts)
        fraction = f"{self.mark or '.'}{self.fraction}" if self.fraction else ""
        text = f"{self.sign}{whole}{fraction}{self.tail}"
        return text.translate(_BELOW) if self.lowered else text

    def interval(self, relation: str, least: float = -math.inf) -> Interval:
        """Return the values that it stands for after ``relation``, none below ``least``."""
        at = self.value
        if relation in "<≤":
            return Interval(least, at)
        if relation in ">≥":
            return Interval(at, math.inf)
        margin = self.half * self.unit * (1 + 1e-9)
        return Interval(max(least, at - margin), at + margin)


def on_the_line(literal: str) -> str:
    """Return a literal with digits that are printed below the line as usual ones."""
    return literal.translate(ON_THE_LINE)


def numeral(reading: Reading) -> Numeral | None:
    """Take the literal of a reading apart; None where it is not a plain numeral."""
    printed = reading.literal.strip()
    literal = on_the_line(printed)
    match = _SHAPE.match(literal)
    if match is None or len(literal) > _LONGEST:
        return None
    sign, body, tail = match.groups()
    stripped = body.rstrip()
    tail = body[len(stripped) :] + tail
    for whole, mark, fraction, group in _splits(stripped):
        found = _powered(Numeral(sign, whole, mark, fraction, tail, 0, group, 0.5), reading)
        if found is not None:
            return found._replace(lowered=literal != printed)
    return None


def _splits(body: str) -> list[tuple[str, str, str, str]]:
    """Return the ways to take digits and marks apart: whole, mark, fraction, thousands mark."""
    others = [character for character in body if not character.isdigit()]
    digits = "".join(character for character in body if character.isdigit())
    if not digits:
        return []
    if not others:
        return [(body, "", "", "")]
    ways = []
    last = others[-1]
    if last in _MARKS:
        whole, _, fraction = body.rpartition(last)
        ways.append((whole, fraction, set(others[:-1])))
    if len(set(others)) == 1:
        ways.append((body, "", {last}))
    return [
        (whole.replace(group, "") if group else whole, last if fraction else "", fraction, group)
        for whole, fraction, marks in ways
        if len(marks) <= 1
        for group in ["".join(marks)]
    ]


def _powered(numeral: Numeral, reading: Reading) -> Numeral | None:
    """Return the numeral with the power of ten and the width that the reading's interval shows.

    Where it has neither percent sign nor exponent the digits are taken as they stand, or as
    hundredths if the text says so elsewhere (``6.8 percent``).
    """
    exponent = _EXPONENT.fullmatch(numeral.tail)
    if exponent is not None:
        powers = [int(exponent[3]) * (-1 if exponent[2] and exponent[2] in _MINUS else 1)]
    elif numeral.tail:
        powers = [-2]
    else:
        powers = [0, -2]
    for power in powers:
        candidate = numeral._replace(power=power)
        at, unit = candidate.value, candidate.unit
        if not 0 < unit < math.inf or math.isinf(at):  # beyond what a float can hold
            continue
        if reading.relation in "<≤>≥":
            edge = reading.high if reading.relation in "<≤" else reading.low
            if abs(edge - at) <= unit * _NEAR:
                return candidate
        elif reading.low - unit * _NEAR <= at <= reading.high + unit * _NEAR:
            half = max(reading.high - at, at - reading.low) / unit
            if half <= 1 + _NEAR:
                return candidate._replace(half=round(half, 6))
    return None


_GREATEST_POWER = 300


def written(number: float, like: Numeral, decimals: int | None = None, minus: str = "-") -> Numeral:
    """Return ``number`` rounded and written in the hand of ``like``.

    Parameters
    ----------
    number
        What to write; finite.
    like
        The numeral whose style (leading zero, mark, percent sign, minus, exponent) is kept.
    decimals
        Digits after the mark; as many as ``like`` has where it is None.
    minus
        The sign of negative numbers, where ``like`` has none.
    """
    places = len(like.fraction) if decimals is None else decimals
    power, tail = like.power, like.tail
    exponent = _EXPONENT.fullmatch(tail)
    if exponent is not None and number:
        power = math.floor(math.log10(abs(number)))
        sign = (exponent[2] or "-") if power < 0 else ""
        tail = f"{exponent[1]}{sign}{abs(power):0{len(exponent[3])}d}{exponent[4]}"
    # In two steps, since a power of the smallest numbers has no float.
    first = min(-power, _GREATEST_POWER)
    mantissa = abs(number) * 10.0**first * 10.0 ** (-power - first)
    whole, _, fraction = f"{mantissa:.{places}f}".partition(".")
    if whole == "0" and fraction and like.zeroless:
        whole = ""
    negative = number < 0 and (whole + fraction).strip("0")
    sign = (like.sign if like.sign and like.sign in _MINUS else minus) if negative else ""
    return like._replace(sign=sign, whole=whole, fraction=fraction, tail=tail, power=power)


def numerals(readings: Sequence[Reading]) -> tuple[Numeral | None, ...]:
    """Take the literals of a claim apart.

    A literal of a share that shows no zero, because it is not below one, follows the others.
    """
    found = tuple(numeral(reading) for reading in readings)
    shares = [_is_share(reading.quantity) for reading in readings]
    bare = any(
        n is not None and n.zeroless for n, share in zip(found, shares, strict=True) if share
    )
    return tuple(
        n._replace(bare=True)
        if n is not None and bare and share and n.whole.strip("0") and n.power == 0
        else n
        for n, share in zip(found, shares, strict=True)
    )


def _is_share(quantity: str) -> bool:
    low, high = domain(quantity)
    return high <= 1 and (low >= -1 or quantity == "R2_adj")
