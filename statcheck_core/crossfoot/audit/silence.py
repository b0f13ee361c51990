"""Why an identity that a reader would expect is not checked on a claim."""

from __future__ import annotations

from collections.abc import Callable, Collection, Mapping

from crossfoot.audit.binding import CUSTOMARY, Cell
from crossfoot.audit.wording import inside, listed
from crossfoot.laws.assumptions import ASSUMPTIONS, CONTEXTS
from crossfoot.laws.identity import Form, Identity
from crossfoot.laws.quantities import FORMAL, QUANTITIES, symbol

_KINDS = {
    "overall-model": "the F of a whole model",
    "effect": "the test of one effect",
    "model-change": "the step from one model to a larger one",
    "coefficient": "a coefficient",
    "correlation": "a correlation",
    "mean-comparison": "a comparison of means",
    "frequency": "a test of frequencies",
    "anova-table": "a table of analysis of variance",
    "coefficient-table": "a table of coefficients",
    "model-summary": "the summary of a model",
}


def why_silent(
    kind: str,
    cells: Collection[Cell],
    identity: Identity,
    names: Mapping[str, Cell],
    breach: Callable[[Identity, Form], tuple[str, str] | None],
) -> str:
    """Return the reason for which an identity is not checked; empty where none is due.

    Parameters
    ----------
    kind, cells
        Kind of the claim and what is printed in it.
    identity, names
        The identity and the cells that its names are bound to.
    breach
        Returns a context that breaks an assumption of a form, and that assumption, or None.

    Notes
    -----
    A reader expects an identity where two of its quantities, counts aside, are printed, and
    nothing but counts is missing.
    """
    for form in identity.forms:
        involved = (form.gives, *form.takes)
        missing = [name for name in involved if names.get(name) not in cells]
        subjects = [name for name in involved if name not in missing and not _count(name)]
        if len(subjects) < 2 or not all(_count(name) for name in missing):
            continue
        kinds = form.kinds or identity.kinds
        if kind not in kinds:
            return f"It speaks of {listed([_KINDS[key] for key in kinds], 'or')} only."
        broken = breach(identity, form)
        if broken is not None:
            needed = inside(ASSUMPTIONS[broken[1]].text)
            return f"{CONTEXTS[broken[0]]} It holds only if {needed}."
        missing = [name for name in missing if name != "ci_level"]
        if missing:
            return f"Not printed: {listed([symbol(name) for name in missing])}."
    return ""


def _count(name: str) -> bool:
    quantity = FORMAL[name].quantity if name in FORMAL else name
    return quantity in CUSTOMARY or (quantity in QUANTITIES and QUANTITIES[quantity].whole)
