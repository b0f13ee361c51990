"""What an identity is: one declaration from which checks, docs, help and rules are made.

An identity is a bundle of *forms*. A form computes the interval of one quantity from the
intervals of others, and the forms of an identity are independent of each other: each may be
evaluated whenever the quantities it takes are known, and each must be met by the quantity it
gives. A form speaks

* of the claims of its own ``kinds`` (of the identity's, where it names none),
* where all quantities in ``beside`` are printed too, and none of those in ``unless``: either
  changes the meaning of the others,
* unless the context of the claim breaks an assumption in the ``needs`` of the identity or of the
  form, or one in ``assumed``.

Where its result misses what is printed, something printed can't be true – but for the
assumptions in ``assumed``: those are seldom stated, so that the failure is a doubt as long as
the text does not state them (see :class:`crossfoot.laws.assumptions.Assumption`).
"""

from __future__ import annotations

from collections.abc import Callable, Mapping
from typing import NamedTuple

from crossfoot.laws.interval import Interval, meet


class Form(NamedTuple):
    """An identity solved for one of its quantities, exactly or as a bound.

    Attributes
    ----------
    gives
        The quantity it is solved for.
    formula
        The solved form as text, as the working prints it; with ``≤`` or ``≥`` where it bounds.
    takes
        The quantities it is computed from, in the order ``value`` takes them. Empty where the
        form says what the quantity can be at all.
    value
        Interval in, interval out: encloses every value that the quantity can have when the
        others lie in their intervals. It never raises, and excludes nothing that it is not sure
        of.
    assumed
        Assumptions that texts seldom state: under one that is not stated a failure is only a
        doubt, and under a broken one the form does not apply. Empty where the form is strict.
    needs
        Assumptions that this form needs beyond those of its identity.
    kinds
        The kinds of claim that this form speaks of; empty for those of its identity.
    beside, unless
        Quantities that must be printed for the form to speak, and those that must not.
    mirrored
        The form gives a magnitude: the quantity lies in ``value(…)`` or in its mirror image at
        the other side of zero.
    """

    gives: str
    formula: str
    takes: tuple[str, ...]
    value: Callable[..., Interval]
    assumed: tuple[str, ...] = ()
    needs: tuple[str, ...] = ()
    kinds: tuple[str, ...] = ()
    beside: tuple[str, ...] = ()
    unless: tuple[str, ...] = ()
    mirrored: bool = False


class Identity(NamedTuple):
    """A published formula that links quantities.

    Attributes
    ----------
    slug
        Its name everywhere: in settings, JSON, SARIF and remarks.
    title
        A few words for a heading.
    formula
        The formula as text.
    quantities
        The quantities it links, its usual subject first: the one a finding points at when no
        remedy says better. In a table, the formal names of
        :data:`crossfoot.laws.quantities.FORMAL`, which are bound to cells.
    forms
        The solved forms; empty where the comparison spans a document rather than a claim.
    needs
        The assumptions under which it holds, keys of
        :data:`crossfoot.laws.assumptions.ASSUMPTIONS`; a claim whose context breaks one of them
        is not checked by it.
    assumption
        The same as a sentence.
    source
        Where the formula is published.
    explanation
        Two or three sentences for a newcomer: what it says and what a disagreement may mean.
    kinds
        The kinds of claim it speaks of.
    """

    slug: str
    title: str
    formula: str
    quantities: tuple[str, ...]
    forms: tuple[Form, ...]
    needs: tuple[str, ...]
    assumption: str
    source: str
    explanation: str
    kinds: tuple[str, ...]


def mirror(interval: Interval) -> Interval:
    """Return the interval at the other side of zero."""
    return Interval(-interval.high, -interval.low)


def narrow(form: Form, values: Mapping[str, Interval], current: Interval) -> Interval | None:
    """Narrow what a quantity can be by one form.

    Parameters
    ----------
    form
        The form that gives the quantity.
    values
        An interval for each quantity that the form takes.
    current
        What the quantity can be so far.

    Returns
    -------
    Interval or None
        The smallest interval that holds all that is left of ``current``; None where nothing is.
    """
    return confine(form, form.value(*[values[name] for name in form.takes]), current)


def confine(form: Form, result: Interval, current: Interval) -> Interval | None:
    """Narrow what a quantity can be by the ``result`` that a form has given."""
    left = meet(current, result)
    if not form.mirrored:
        return left
    other = meet(current, mirror(result))
    if left is None or other is None:
        return other if left is None else left
    return Interval(min(left.low, other.low), max(left.high, other.high))
