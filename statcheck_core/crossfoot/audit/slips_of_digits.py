"""Slips in the digits of one numeral, undone."""

from __future__ import annotations

import math
from collections.abc import Iterator

from crossfoot.audit.literals import Numeral, written
from crossfoot.audit.proposals import Printed, Proposal
from crossfoot.laws.interval import Interval, meet
from crossfoot.laws.quantities import QUANTITIES, domain


def _remade(numeral: Numeral, digits: str) -> Numeral | None:
    """Return a numeral with as many other digits."""
    cut = len(numeral.whole)
    return _split(numeral, digits[:cut], digits[cut:])


def _split(numeral: Numeral, whole: str, fraction: str) -> Numeral | None:
    """Return a numeral with other digits if it is written as a number is."""
    if numeral.zeroless:
        whole = whole.lstrip("0")
    elif not whole or (len(whole) > 1 and whole.startswith("0")):
        return None
    if not whole + fraction:
        return None
    return numeral._replace(whole=whole, fraction=fraction)


def digits_of(numeral: Numeral) -> str:
    """Return all digits of a numeral."""
    return numeral.whole + numeral.fraction


def _swaps(digits: str) -> list[str]:
    """Return what swapping two neighbours makes of some digits."""
    return [
        digits[:i] + digits[i + 1] + digits[i] + digits[i + 2 :]
        for i in range(len(digits) - 1)
        if digits[i] != digits[i + 1]
    ]


def swapped(printed: Printed) -> Iterator[Proposal]:
    """Undo that two digits beside each other have changed places."""
    numeral = printed.numeral
    for digits in _swaps(digits_of(numeral)):
        remade = _remade(numeral, digits)
        if remade is not None:
            yield Proposal(remade, 1 / len(_swaps(digits)))


def mistyped(printed: Printed) -> Iterator[Proposal]:
    """Undo that one digit stands for another."""
    numeral = printed.numeral
    digits = digits_of(numeral)
    for i, old in enumerate(digits):
        for new in "0123456789":
            if new != old:
                remade = _remade(numeral, digits[:i] + new + digits[i + 1 :])
                if remade is not None:
                    yield Proposal(remade, 1 / (9 * len(digits)))


def dropped(printed: Printed) -> Iterator[Proposal]:
    """Undo that a digit is left out."""
    numeral = printed.numeral
    share = 1 / (len(digits_of(numeral)) + 1)
    for whole in _longer(numeral.whole):
        remade = _split(numeral, whole, numeral.fraction)
        if remade is not None:
            yield Proposal(remade, share)
    for fraction in _longer(numeral.fraction) if numeral.fraction else ():
        yield Proposal(numeral._replace(fraction=fraction), share)


def _longer(digits: str) -> Iterator[str]:
    """Return what a digit more can make of some digits."""
    for place in range(len(digits) + 1):
        for new in "0123456789":
            yield digits[:place] + new + digits[place:]


def doubled(printed: Printed) -> Iterator[Proposal]:
    """Undo that a digit is typed twice."""
    numeral = printed.numeral
    share = 1 / max(1, len(digits_of(numeral)) - 1)
    for whole in _shorter(numeral.whole):
        yield Proposal(numeral._replace(whole=whole), share)
    for fraction in _shorter(numeral.fraction):
        yield Proposal(numeral._replace(fraction=fraction), share)


def _shorter(digits: str) -> Iterator[str]:
    """Return some digits with one of two equal neighbours left out."""
    for place in range(len(digits) - 1):
        if digits[place] == digits[place + 1]:
            yield digits[:place] + digits[place + 1 :]


def moved(printed: Printed) -> Iterator[Proposal]:
    """Undo that the decimal point has moved."""
    numeral = printed.numeral
    if QUANTITIES[printed.reading.quantity].whole:
        return
    for places in (-2, -1, 1, 2):
        number = numeral.value * 10.0**places
        share = 0.25 if abs(places) == 1 else 0.1
        if len(numeral.fraction) >= places:
            yield Proposal(
                written(number, numeral, len(numeral.fraction) - places, printed.minus), share
            )
        # A share keeps its number of decimals: .019 for .190.
        same = written(number, numeral, None, printed.minus)
        if abs(number) < 1 and math.isclose(same.value, number):
            yield Proposal(same, share / 2)


def signed(printed: Printed) -> Iterator[Proposal]:
    """Undo that a sign is lost or added."""
    numeral = printed.numeral
    if numeral.value < 0 or domain(printed.reading.quantity).low < 0 < numeral.value:
        sign = printed.minus if numeral.value > 0 else ""
        # Few adjusted R² are negative, though they can be.
        share = 0.1 if printed.reading.quantity == "R2_adj" else 1.0
        yield Proposal(numeral._replace(sign=sign), share)


def cut(printed: Printed) -> Iterator[Proposal]:
    """Undo that digits were cut off where the number had to be rounded away from zero."""
    yield from _misrounded(printed, 1)


def raised(printed: Printed) -> Iterator[Proposal]:
    """Undo that a number was rounded away from zero where it had to go towards it."""
    yield from _misrounded(printed, -1)


def _misrounded(printed: Printed, away: int) -> Iterator[Proposal]:
    """Return the neighbouring literal if what is implied lies in the half that leads to it."""
    numeral = printed.numeral
    step = away * (numeral.unit if numeral.value >= 0 else -numeral.unit)
    half, whole = sorted((numeral.value + step / 2, numeral.value + step))
    rounded = numeral.half and printed.reading.relation in "=≈"
    possible = rounded and numeral.size + away * numeral.unit >= 0
    if possible and meet(printed.implied, Interval(half, whole)):
        yield Proposal(written(numeral.value + step, numeral, None, printed.minus), 1.0)
