"""The laws that reported numbers obey: intervals, tail areas, identities.

Imports nothing of the rest of Crossfoot. Importing it is cheap; SciPy is imported where a form
first needs a tail area (see :func:`warm`).
"""

from __future__ import annotations

from collections.abc import Mapping
from importlib import import_module

from crossfoot.laws import (
    anova,
    association,
    bounds,
    change,
    coefficient,
    document,
    effect_size,
    fit,
    limits,
    limits_against_p,
    limits_of_r,
    probability,
    ratio,
    tables,
)
from crossfoot.laws.anova import sum_of_parts
from crossfoot.laws.identity import Form, Identity, confine, narrow
from crossfoot.laws.probability import ONE_SIDED

#: Every identity by its slug, in the order of the documentation. Sums of any number of parts come
#: from :func:`sum_of_parts`; those here have two.
IDENTITIES: Mapping[str, Identity] = {
    item.slug: item
    for family in (
        probability, fit, effect_size, anova, coefficient, limits, limits_against_p, limits_of_r,
        change, tables, ratio, association, bounds, document,
    )
    for item in family.IDENTITIES
}  # fmt: skip


def warm() -> None:
    """Import what the first tail area would import, some tenths of a second."""
    import_module("crossfoot.laws.areas")


__all__ = [
    "IDENTITIES",
    "ONE_SIDED",
    "Form",
    "Identity",
    "confine",
    "narrow",
    "sum_of_parts",
    "warm",
]
