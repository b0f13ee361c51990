"""Which cells of a claim the names in an identity stand for.

A cell is a quantity and a term. In prose a formal name is the quantity of the same key; for a
kind of claim that has rows see :mod:`crossfoot.audit.rows`.
"""

from __future__ import annotations

from collections.abc import Callable, Iterable, Mapping, Sequence
from typing import NamedTuple

from crossfoot.laws.identity import Identity
from crossfoot.laws.interval import Interval
from crossfoot.laws.quantities import FORMAL, QUANTITIES


class Cell(NamedTuple):
    """One place of a claim where a number stands, or could stand."""

    quantity: str
    term: str | None = None


class Known(NamedTuple):
    """What a quantity is taken to be where it is not printed.

    ``assumption`` says as a sentence what is assumed by that; empty where nothing is.
    """

    interval: Interval
    assumption: str = ""


Bound = Iterable[tuple[Identity, Mapping[str, Cell]]]
Binder = Callable[[Identity, Sequence[Cell], frozenset[str]], Bound]

#: What is known of quantities that are not printed.
CUSTOMARY: Mapping[str, Known] = {
    "ci_level": Known(Interval(0.95, 0.95), "The confidence level is 95%."),
    # Whatever they are, the tail areas of t lie between those of few degrees and the normal ones,
    # and n, R² and adjusted R² together fix those of F.
    **{key: Known(QUANTITIES[key].domain) for key in ("df", "df1", "df2")},
}

#: Contexts in which what is printed of a quantity was read by custom, with that as a sentence.
TAKEN_FOR_GRANTED: Mapping[str, tuple[str, str]] = {
    "default-stars": (
        "p",
        "The marks of significance stand for the usual levels of .05, .01 and .001.",
    ),
    "told-cases": ("n", "Each case is one row of the analysis."),
    "counted-rows": ("df1", "The rows of the table are all the predictors of each step."),
}

_MODEL = "F R2 df1 df2 n"

#: Quantities of each kind of claim that a chain may run through though they are not printed. A
#: statistic is none of them unless it is sure that p, if printed, is of that statistic.
LINKS: Mapping[str, str] = {
    "overall-model": _MODEL,
    "model-summary": _MODEL,
    "effect": "F",
    "model-change": "F_change R2_change R2",
    "coefficient": "t se",
    "coefficient-table": "t se",
}

#: Quantities that follow from a claim of each kind, for a reader who asks what does.
DERIVED: Mapping[str, str] = {
    "overall-model": f"{_MODEL} p k R R2_adj f2",
    "model-summary": f"{_MODEL} p k R R2_adj f2",
    "effect": "F df1 df2 p eta2_partial omega2",
    "model-change": "F_change R2_change R2 df1 df2 p f2",
    "coefficient": "t se b p ci_low ci_high",
    "coefficient-table": "t se b p ci_low ci_high",
    "correlation": "r t p n R2 ci_low ci_high",
    "mean-comparison": "t F p",
    "frequency": "chi2 p",
}

#: Beside one of these, and no t, degrees of freedom are those of χ², and p is of no t.
_WITHOUT_T = frozenset({"chi2", "z", "odds_ratio"})

#: The row of a table that a formal name speaks of.
_ROWS = {
    "ss_model": "model",
    "ss_error": "error",
    "ss_total": "total",
    "df_error": "error",
    "ms_error": "error",
}
_NOT_AN_EFFECT = ("error", "total")


def names_of(identity: Identity) -> tuple[str, ...]:
    """Return every name that the forms of an identity use, in the order of their use."""
    return tuple(dict.fromkeys(n for form in identity.forms for n in (form.gives, *form.takes)))


def bind_prose(identity: Identity, cells: Sequence[Cell], unprinted: frozenset[str]) -> Bound:
    """Bind each name to the one cell of that quantity.

    Parameters
    ----------
    identity
        The identity.
    cells
        What is printed.
    unprinted
        Quantities that may have a cell though they are not printed.
    """
    names = names_of(identity)
    quantities = {cell.quantity for cell in cells}
    if "chi2" not in names and "t" not in quantities and not quantities.isdisjoint(_WITHOUT_T):
        names = tuple(name for name in names if name != "df")
    found: dict[str, Cell] = {}
    for name in names:
        if name in FORMAL:
            cell = _formal_cell(name, cells)
        else:
            cell = _only(name, cells, Cell(name) if name in unprinted else None)
        if cell is not None:
            found[name] = cell
    return [(identity, found)]


def _formal_cell(name: str, cells: Sequence[Cell]) -> Cell | None:
    quantity = FORMAL[name].quantity
    if name in _ROWS:
        cell = Cell(quantity, _ROWS[name])
        return cell if cell in cells else None
    if name in ("ss_effect", "ms_effect"):
        return _only(quantity, [cell for cell in cells if cell.term not in _NOT_AN_EFFECT], None)
    return None


def _only(quantity: str, cells: Sequence[Cell], otherwise: Cell | None) -> Cell | None:
    """Return the one cell of a quantity; None where there are several."""
    found = [cell for cell in cells if cell.quantity == quantity]
    if not found:
        return otherwise
    return found[0] if len(found) == 1 else None


def unprinted(kind: str, derived: bool) -> frozenset[str]:
    """Return the quantities that may have a cell in a claim of a kind though they are not printed.

    ``derived`` asks for all that follow from such a claim and not only for links.
    """
    return frozenset((DERIVED if derived else LINKS).get(kind, "").split()).union(CUSTOMARY)
