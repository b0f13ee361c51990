"""Measures of association in a table of counts, from its χ²."""

from __future__ import annotations

import math

from crossfoot.laws.arithmetic import divide, hull, multiply, root, square
from crossfoot.laws.declare import form, identity
from crossfoot.laws.interval import Interval

_PLAIN = "plain-chi2"


def _phi(chi2: Interval, n: Interval) -> Interval:
    return root(divide(chi2, n))


def _chi2_of_phi(phi: Interval, n: Interval) -> Interval:
    return multiply(square(phi), n)


def _n_of_phi(chi2: Interval, phi: Interval) -> Interval:
    return divide(chi2, square(phi))


def _ways(df: Interval) -> Interval:
    """Return what the lesser side of the table can have but one: its square is at most df."""
    most = math.sqrt(df.high) + 1e-9
    return Interval(1.0, max(math.floor(most), 1.0) if most < math.inf else math.inf)


def _v(chi2: Interval, n: Interval, df: Interval) -> Interval:
    most = divide(chi2, n)
    return root(hull(most, divide(most, _ways(df))))


def _chi2_of_v(cramers_v: Interval, n: Interval, df: Interval) -> Interval:
    return multiply(multiply(square(cramers_v), n), _ways(df))


ASSOCIATION = identity(
    "association-from-chi2",
    "φ and Cramér's V from χ²",
    "φ = √(χ²/n), V = √(χ²/(n·min(rows − 1, columns − 1)))",
    "phi cramers_v chi2 n df",
    (
        form("phi", "φ = ±√(χ²/n)", "chi2 n", _phi, assumed=_PLAIN, mirrored=True),
        form("chi2", "χ² = n·φ²", "phi n", _chi2_of_phi, assumed=_PLAIN),
        form("n", "n = χ²/φ²", "chi2 phi", _n_of_phi, assumed=_PLAIN),
        form(
            "cramers_v",
            "V = √(χ²/(n·m)), 1 ≤ m ≤ √df",
            "chi2 n df",
            _v,
            assumed=_PLAIN,
        ),
        form("chi2", "χ² = n·m·V², 1 ≤ m ≤ √df", "cramers_v n df", _chi2_of_v, assumed=_PLAIN),
    ),
    needs="uncorrected-statistic",
    assumption="χ² is Pearson's, without a continuity correction, and of a table of n cases.",
    source="Cohen 1988, Statistical Power Analysis for the Behavioral Sciences, 2nd edition, "
    "chapter 7; Cramér 1946, Mathematical Methods of Statistics, section 21.9",
    explanation="φ and Cramér's V are χ² for each case, rooted and scaled to lie below one, so "
    "that they follow from χ² and the number of cases. Where they do not, a number is misprinted, "
    "or χ² carries a correction that the measure lacks.",
    kinds="frequency",
)

IDENTITIES = (ASSOCIATION,)
