"""Numbers in brackets under or beside a coefficient: standard errors, t or p, as far as told.

Where no note says which, each is considered for all coefficients of the table. One is taken only
if the others can't be: a t has the sign of its coefficient, a p is a probability, and stars go
with the size of each.
"""

from __future__ import annotations

import math
from collections.abc import Sequence
from typing import NamedTuple

KINDS = ("se", "t", "p")


class Sample(NamedTuple):
    """A coefficient with the number in brackets, and the p values that its marks stand for.

    ``p`` is None where no coefficient of the table has marks.
    """

    estimate: float
    number: float
    p: tuple[float, float] | None


def told_apart(samples: Sequence[Sample]) -> str | None:
    """Return what the numbers in brackets must be, or None if that is not sure."""
    misfits = {kind: sum(not _possible(kind, s) for s in samples) for kind in KINDS}
    best = min(misfits, key=lambda kind: misfits[kind])
    others = [misfits[kind] for kind in KINDS if kind != best]
    least = misfits[best]
    if len(samples) <= 2 and not least:
        return best if min(others) >= 1 else None
    return best if min(others) >= max(least + 2, 3 * least) else None


def may_be_error(samples: Sequence[Sample]) -> bool:
    """Say whether the numbers could be standard errors, for all that is known."""
    return all(_possible("se", sample) for sample in samples)


def _possible(kind: str, sample: Sample) -> bool:
    """Say whether a number can be what ``kind`` says."""
    estimate, number, p = sample
    if kind == "p":
        low, high = p or (0.0, 1.0)
        # Rounded to two decimals at least.
        return 0 <= number <= 1 and low - 0.0051 <= number <= high + 0.0051
    if kind == "se":
        if number <= 0:
            return False
        t = abs(estimate) / number
    else:
        if number * estimate < 0:
            return False
        t = abs(number)
    if p is None:
        return True
    # A t has at least the tail of the normal distribution, at most that of t with 4 df.
    return _normal_tail(t * 1.02) <= p[1] and _wide_tail(t * 0.98) >= p[0]


def _normal_tail(t: float) -> float:
    return math.erfc(t / math.sqrt(2))


def _wide_tail(t: float) -> float:
    """Both tails of Student's t with 4 degrees of freedom (Abramowitz & Stegun 26.7.4)."""
    s = t / math.sqrt(4 + t * t)
    return max(0.0, 1 - s * (1 + (1 - s * s) / 2))
