"""Slips of the pen, each declared once: how likely it is, and what could have stood there before.

A slip is undone on one printed literal, in the hand of its author. Its proposals carry the chance
that the slip, made on what is proposed, gives just what is printed: swapping two digits of
``7.14`` can give two things, mistyping one of its digits twenty-seven. Weights and chances
together rank the remedies. The weights are a judgement (common practice, no source).
"""

from __future__ import annotations

from collections.abc import Iterator

from crossfoot.audit import slips_of_digits as digits
from crossfoot.audit import slips_of_quantities as quantities
from crossfoot.audit.explain import MOST
from crossfoot.audit.proposals import Printed, Proposal, Slip, fitting


def _other(printed: Printed) -> Iterator[Proposal]:
    """Return what follows from the rest, where no slip explains what is printed."""
    yield from fitting(printed, 1.0)


#: No slip at all: what follows from the rest.
PLAIN = Slip("other", 0.001, "what the other numbers give", _other, crosses=True)

#: One that turns a number into one on the other side of zero, and leaves the rest.
SIGN = Slip("sign lost", 2.0, "the sign lost or added", digits.signed, crosses=True)

#: Every slip.
SLIPS = (
    Slip("digits swapped", 3.0, "two digits swapped", digits.swapped),
    Slip("digit wrong", 4.0, "one digit wrong", digits.mistyped),
    Slip("digit dropped", 1.5, "a digit left out", digits.dropped),
    Slip("digit doubled", 1.0, "a digit typed twice", digits.doubled),
    Slip("point moved", 1.5, "the decimal point moved", digits.moved),
    SIGN,
    Slip("cut off", 0.7, "cut off instead of rounded", digits.cut),
    Slip("rounded up", 0.4, "rounded the wrong way", digits.raised),
    Slip("df swapped", 3.0, "degrees of freedom swapped", quantities.freedom_swapped),
    Slip("n for df", 1.5, "the number of cases for df", quantities.cases_for_freedom),
    Slip("df for n", 1.0, "df for the number of cases", quantities.freedom_for_cases),
    Slip("root for square", 1.0, "R for R²", quantities.root_for_square),
    Slip("square for root", 1.0, "R² for R", quantities.square_for_root, crosses=True),
    Slip("adjusted for plain", 1.0, "adjusted R² for R²", quantities.adjusted_for_plain),
    Slip(
        "plain for adjusted",
        1.0,
        "R² for adjusted R²",
        quantities.plain_for_adjusted,
        crosses=True,
    ),
    Slip("one-sided", 2.0, "a one-sided p", quantities.times(0.5)),
    Slip("doubled p", 0.5, "p doubled", quantities.times(2.0)),
    *(
        Slip(
            f"multiplied by {factor}",
            0.15,
            f"p multiplied by {factor}, as for {factor} comparisons",
            quantities.times(factor),
        )
        for factor in range(3, MOST + 1)
    ),
    Slip("value for bound", 2.0, "= for <", quantities.value_for_bound),
    Slip("bound for value", 1.0, "another relation sign", quantities.bound_for_value),
    Slip("another bound", 1.0, "another threshold", quantities.another_bound),
    Slip("copied", 1.0, "the number beside it copied", quantities.copied, crosses=True),
    PLAIN,
)

#: Those that can turn a number into one on the other side of zero.
CROSSING = tuple(slip for slip in SLIPS if slip.crosses)

#: Those of them that change nothing else.
SIGNS = (SIGN,)
