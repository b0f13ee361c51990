"""Slips that put one quantity, convention or relation for another, undone."""

from __future__ import annotations

import math
from collections.abc import Callable, Iterator

from crossfoot.audit.habits import THRESHOLDS, likely_decimals, threshold_like
from crossfoot.audit.literals import written
from crossfoot.audit.proposals import Printed, Proposal, fitting, fitting_with, span
from crossfoot.audit.slips_of_digits import digits_of
from crossfoot.laws import IDENTITIES
from crossfoot.laws.interval import Interval, meet


def freedom_swapped(printed: Printed) -> Iterator[Proposal]:
    """Undo that the degrees of freedom of F have changed places."""
    if printed.reading.quantity == "df1":
        for index in printed.find("df2"):
            other = printed.numerals[index]
            assert other is not None  # find() leaves the others out
            # An error with fewer degrees of freedom than the effect is rare.
            share = 1.0 if other.value < printed.numeral.value else 0.1
            yield Proposal(other, share, also=((index, printed.numeral),))


def cases_for_freedom(printed: Printed) -> Iterator[Proposal]:
    """Undo that the number of cases stands for degrees of freedom."""
    numeral = printed.numeral
    if printed.reading.quantity == "df2":
        slopes = [int(n.value) for i in printed.find("df1") if (n := printed.numerals[i])]
        lost = [1 + df1 for df1 in slopes] + [1, 2]
    elif printed.reading.quantity == "df":
        lost = [2, 1]
    else:
        return
    # The first is what the usual test of that many cases has.
    for order, fewer in enumerate(dict.fromkeys(lost)):
        if numeral.value > fewer:
            yield Proposal(written(numeral.value - fewer, numeral), 0.1 if order else 0.8)


def freedom_for_cases(printed: Printed) -> Iterator[Proposal]:
    """Undo that degrees of freedom stand for the number of cases."""
    numeral = printed.numeral
    if printed.reading.quantity == "n":
        for index in printed.find("df2", "df"):
            other = printed.numerals[index]
            assert other is not None  # find() leaves the others out
            if other.value == numeral.value:
                yield from fitting(printed, 1.0)


def root_for_square(printed: Printed) -> Iterator[Proposal]:
    """Undo that R stands for R², adjusted or not."""
    low, high = span(printed.reading)
    if printed.reading.quantity in ("R2", "R2_adj") and low > 0:
        yield from fitting(printed, 1.0, Interval(low * low, high * high))


def square_for_root(printed: Printed) -> Iterator[Proposal]:
    """Undo that R² stands for R, or r² for r."""
    low, high = span(printed.reading)
    if printed.reading.quantity in ("R", "r") and low > 0:
        least, most = math.sqrt(low), math.sqrt(high)
        yield from fitting(printed, 1.0, Interval(least, most))
        yield from fitting(printed, 1.0, Interval(-most, -least))


def adjusted_for_plain(printed: Printed) -> Iterator[Proposal]:
    """Undo that adjusted R² stands for R²: it is the R² of which what is printed is adjusted."""
    if printed.reading.quantity != "R2" or printed.reading.high > 1:
        return
    for one in printed.find("df1"):
        for two in printed.find("df2"):
            freedom = span(printed.readings[one]), span(printed.readings[two])
            yield from fitting(printed, 1.0, _UNADJUSTED.value(span(printed.reading), *freedom))
    for index in printed.find("R2_adj"):
        if meet(span(printed.readings[index]), span(printed.reading)):
            yield from fitting(printed, 0.5)


def plain_for_adjusted(printed: Printed) -> Iterator[Proposal]:
    """Undo that R² stands for adjusted R²."""
    if printed.reading.quantity == "R2_adj":
        for index in printed.find("R2"):
            if meet(span(printed.readings[index]), span(printed.reading)):
                yield from fitting(printed, 0.5)


def times(factor: float) -> Callable[[Printed], Iterator[Proposal]]:
    """Undo that p was multiplied by a factor."""

    def undo(printed: Printed) -> Iterator[Proposal]:
        possible = printed.reading.quantity == "p" and printed.reading.low <= 1
        if possible and printed.reading.relation in "=≈":
            low, high = (bound / factor for bound in span(printed.reading))
            yield from fitting(printed, 1.0, Interval(low, high))

    return undo


_UNADJUSTED = next(
    form
    for form in IDENTITIES["r2-adjusted"].forms
    if form.gives == "R2" and form.takes == ("R2_adj", "df1", "df2")
)


def value_for_bound(printed: Printed) -> Iterator[Proposal]:
    """Undo that ``=`` stands for ``<``: the number is a threshold and p lies below it."""
    numeral = printed.numeral
    threshold = any(math.isclose(numeral.value, threshold) for threshold in THRESHOLDS)
    stated = printed.reading.quantity == "p" and printed.reading.relation in "=≈"
    if stated and threshold and printed.implied.high <= numeral.value:
        yield Proposal(numeral, 1.0, "<")


def bound_for_value(printed: Printed) -> Iterator[Proposal]:
    """Undo that a relation sign stands for another."""
    numeral, relation = printed.numeral, printed.reading.relation
    if relation in "<>≤≥":
        yield Proposal(numeral, 1.0, "=")
        # Nobody prints that p is above a very small number.
        if printed.reading.quantity != "p" or numeral.value >= 0.05:
            yield Proposal(numeral, 0.5, {"<": ">", ">": "<", "≤": "≥", "≥": "≤"}[relation])


def another_bound(printed: Printed) -> Iterator[Proposal]:
    """Undo that a threshold stands where p meets another one."""
    if printed.reading.quantity != "p" or printed.reading.relation not in "<≤":
        return
    for threshold in THRESHOLDS:
        number = threshold_like(threshold, printed.numeral)
        lower = max((t for t in THRESHOLDS if t < threshold), default=0.0)
        if lower < printed.implied.high <= threshold:
            yield Proposal(number, 0.25)


def copied(printed: Printed) -> Iterator[Proposal]:
    """Undo that a neighbour's number was written twice: nothing is left of what stood there."""
    digits = digits_of(printed.numeral)
    alike = [
        index
        for index, other in enumerate(printed.numerals)
        if index != printed.place and other is not None and digits_of(other) == digits
    ]
    if not alike or len(digits.strip("0")) < 2:
        return
    # What it took the place of had decimals of its own.
    share = len(alike) / (len(printed.numerals) - 1)
    for decimals in sorted(likely_decimals(printed)):
        yield from fitting_with(printed, share, decimals)
