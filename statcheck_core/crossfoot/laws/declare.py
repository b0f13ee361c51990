"""How identities are declared."""

from __future__ import annotations

from collections.abc import Callable

from crossfoot.laws.identity import Form, Identity
from crossfoot.laws.interval import EVERYTHING, Interval
from crossfoot.laws.quantities import domain

Solution = Callable[..., Interval]


def form(
    gives: str,
    formula: str,
    takes: str,
    value: Solution,
    *,
    assumed: str = "",
    needs: str = "",
    kinds: str = "",
    beside: str = "",
    unless: str = "",
    mirrored: bool = False,
) -> Form:
    """Return a form whose arguments are kept to what their quantities can be.

    The names in ``takes`` and in the keywords are separated by spaces; see
    :class:`crossfoot.laws.identity.Form` for what they mean.
    """
    names = tuple(takes.split())
    return Form(
        gives,
        formula,
        names,
        _kept(value, tuple(domain(name) for name in names)),
        tuple(assumed.split()),
        tuple(needs.split()),
        tuple(kinds.split()),
        tuple(beside.split()),
        tuple(unless.split()),
        mirrored,
    )


def _kept(value: Solution, domains: tuple[Interval, ...]) -> Solution:
    """Return ``value`` on the part of its arguments that lies in their domains.

    An argument that has no such part, printed wrongly, says nothing about the others.
    """

    def kept(*arguments: Interval) -> Interval:
        inside = []
        for argument, (least, most) in zip(arguments, domains, strict=True):
            low, high = argument
            if low >= least and high <= most:
                inside.append(argument)
                continue
            low = low if low > least else least
            high = high if high < most else most
            if low > high:
                return EVERYTHING
            inside.append(Interval(low, high))
        return value(*inside)

    return kept


def identity(
    slug: str,
    title: str,
    formula: str,
    quantities: str,
    forms: tuple[Form, ...],
    *,
    needs: str,
    assumption: str,
    source: str,
    explanation: str,
    kinds: str,
) -> Identity:
    """Return an identity; names are separated by spaces.

    Every identity needs its numbers to describe one result.
    """
    return Identity(
        slug,
        title,
        formula,
        tuple(quantities.split()),
        forms,
        ("one-result", *needs.split()),
        assumption,
        source,
        explanation,
        tuple(kinds.split()),
    )


#: Kinds of claim, for identities that speak of many.
MODEL = "overall-model model-summary"
COEFFICIENT = "coefficient coefficient-table"
