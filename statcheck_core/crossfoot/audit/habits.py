"""How people print numbers: with how many decimals, and which bounds on p.

A remedy is what somebody may have printed before a slip, so what is seldom printed is a poor
remedy. The shares below are a judgement (common practice, no source); that most statistics have
two decimals and p two or three is what the publication manual of the American Psychological
Association asks for (from memory).
"""

from __future__ import annotations

import math

from crossfoot.audit.literals import Numeral, written
from crossfoot.audit.proposals import Printed, Proposal
from crossfoot.laws.quantities import QUANTITIES

#: Bounds that p values are commonly printed with (common practice, no source).
THRESHOLDS = (0.1, 0.05, 0.01, 0.005, 0.001, 0.0005, 0.0001)

#: How often a number is printed with no decimal, one, two …; with more, as rarely as the last.
_SHARES = (0.03, 0.12, 0.57, 0.22, 0.06)
_SHARES_OF_P = (0.01, 0.03, 0.32, 0.5, 0.14)

#: How often a number has as many decimals as the others of its kind in the claim.
_ALIKE = 0.5

#: Quantities that are printed alike.
_KINDS = (
    {"F", "t", "z", "chi2", "F_change"},
    {"R2", "R2_adj", "R2_change", "R", "r", "eta2", "eta2_partial", "omega2"},
    {"b", "se", "ci_low", "ci_high"},
    {"df1", "df2"},
)

#: Decimals that p values are rarely printed with more of (common practice, no source).
_P_DECIMALS = 4


def usual(printed: Printed, proposal: Proposal) -> float:
    """Return how often the decimals of a proposal are printed, beside those that are.

    A slip that keeps the decimals has nothing to explain; one that changes them is as likely as
    they were to be there before.
    """
    before, after = proposal.numeral, printed.numeral
    quantity = printed.reading.quantity
    counts = QUANTITIES[quantity].whole and not (before.fraction or after.fraction)
    bound = (proposal.relation or printed.reading.relation) in "<>≤≥"
    same = proposal.rounded or decimals_of(before) == decimals_of(after)
    if counts or bound or same:
        return 1.0
    alike = _alike(printed)
    return _share(quantity, before, alike) / _share(quantity, after, alike)


def likely_decimals(printed: Printed) -> set[int]:
    """Return the decimals that a number of a kind is likely to have, whatever is printed."""
    own = {len(printed.numeral.fraction)}
    if QUANTITIES[printed.reading.quantity].whole:
        return own
    power = printed.numeral.power
    shares = _SHARES_OF_P if printed.reading.quantity == "p" else _SHARES
    usual = shares.index(max(shares))
    found = {decimals + power for decimals in _alike(printed) | {usual}}
    return {decimals for decimals in found if decimals >= 0} | own


def decimals_of(numeral: Numeral) -> int:
    """Return the decimals of a number, two more where it is printed in percent."""
    return max(0, len(numeral.fraction) - numeral.power)


def _alike(printed: Printed) -> set[int]:
    """Return the decimals of the other numbers of the same kind."""
    quantity = printed.reading.quantity
    kind = next((kind for kind in _KINDS if quantity in kind), {quantity})
    return {
        decimals_of(numeral)
        for index, numeral in enumerate(printed.numerals)
        if numeral is not None
        and index != printed.place
        and printed.readings[index].quantity in kind
    }


def _share(quantity: str, numeral: Numeral, alike: set[int]) -> float:
    shares = _SHARES_OF_P if quantity == "p" else _SHARES
    decimals = decimals_of(numeral)
    share = shares[min(decimals, len(shares) - 1)]
    return (1 - _ALIKE) * share + _ALIKE * (decimals in alike) if alike else share


def customary(printed: Printed, proposal: Proposal) -> bool:
    """Say whether people print a proposal so.

    They print a bound on p as ``< .01`` but not as ``< .010``, neither zeros nor many decimals of
    p, and no count of less than one.
    """
    relation = proposal.relation or printed.reading.relation
    if printed.reading.quantity != "p":
        return not QUANTITIES[printed.reading.quantity].whole or proposal.numeral.value >= 1
    most = max(_P_DECIMALS, len(printed.numeral.fraction))
    if proposal.numeral.value == 0 or len(proposal.numeral.fraction) > most:
        return False
    if relation not in "<>≤≥" or proposal.numeral.text == printed.numeral.text:
        return True
    return any(
        threshold_like(threshold, proposal.numeral).text == proposal.numeral.text
        for threshold in THRESHOLDS
    )


def threshold_like(threshold: float, like: Numeral) -> Numeral:
    """Return a bound on p in the hand of a numeral, with no more decimals than it needs."""
    decimals = max(0, math.ceil(-math.log10(threshold) - 1e-9) + like.power)
    return written(threshold, like, decimals)
