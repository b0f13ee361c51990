"""A computed value as the author would print it: as many digits as it has, in their style."""

from __future__ import annotations

from collections.abc import Iterable

from crossfoot.audit.literals import Numeral, numeral, written
from crossfoot.laws.interval import Interval
from crossfoot.laws.quantities import QUANTITIES
from crossfoot.model import Claim, Reading

#: Decimals of a value where the document prints none of its kind (common practice, no source).
_DECIMALS = {"p": 3, "F": 2, "t": 2, "chi2": 2, "z": 2, "F_change": 2}
_USUAL = 2

#: Printed without a zero before the mark, where the document shows no other habit.
_SHARES = frozenset(
    {"p", "R", "r", "R2", "R2_adj", "R2_change", "eta2", "eta2_partial", "omega2", "beta"}
)

_PLAIN = Numeral("", "0", ".", "00", "", 0, "", 0.5)


def hand_of(quantity: str, claim: Claim, others: Iterable[Claim]) -> Numeral:
    """Return a numeral in whose style a quantity of a claim is to be written.

    Parameters
    ----------
    quantity
        What is to be written.
    claim
        Where it is to stand.
    others
        The other claims of the document, the nearest first.
    """
    own = [reading for reading in claim.readings if not QUANTITIES[reading.quantity].whole]
    same: Numeral | None = None
    share: Numeral | None = None
    for reading in [*own, *(reading for other in others for reading in other.readings)]:
        if reading.quantity == quantity and reading.relation == "=" and same is None:
            same = numeral(reading)
        if reading.quantity in _SHARES and share is None and reading.relation == "=":
            share = numeral(reading)
        if same is not None:
            break
    if same is not None and same.power in (0, -2):
        return same._replace(sign="", half=0.5)
    decimals = _decimals(quantity, own)
    like = _PLAIN._replace(fraction="0" * decimals, mark=_mark(own))
    bare = like.mark != "," if share is None else not share.whole
    if quantity in _SHARES and bare:
        like = like._replace(whole="")
    return like


def _decimals(quantity: str, own: Iterable[Reading]) -> int:
    if quantity in ("ci_low", "ci_high"):
        like = [
            numeral(reading)
            for reading in own
            if reading.quantity in ("b", "beta", "r", "odds_ratio")
        ]
        return max((len(found.fraction) for found in like if found is not None), default=_USUAL)
    return _DECIMALS.get(quantity, _USUAL)


def _mark(own: Iterable[Reading]) -> str:
    marks = [
        found.mark for reading in own if (found := numeral(reading)) is not None and found.mark
    ]
    return marks[0] if marks else "."


def value_words(
    quantity: str, interval: Interval, like: Numeral, middle: float
) -> tuple[str, str] | None:
    """Return a relation and a literal for what a quantity can be.

    It is written with the decimals of ``like``; where it is not known to the last of them, the
    value that follows from the numerals as they stand, ``middle``, is, and whoever offers it says
    between what it lies.
    """
    low, high = interval
    if not abs(low) < float("inf") or not abs(high) < float("inf"):
        return None
    if QUANTITIES[quantity].whole:
        if round(low) != round(high) or abs(high - low) > 1e-6:
            return None
        return "=", f"{round(low)}"
    if quantity == "p" and high < like.unit:
        return "<", written(like.unit, like).text
    return "=", written(middle, like).text
