"""Forms of identities bound to the cells of a claim, before they are made into a plan."""

from __future__ import annotations

from collections.abc import Iterator, Sequence, Set
from typing import NamedTuple

from crossfoot.audit.binding import CUSTOMARY, Cell
from crossfoot.laws.assumptions import ASSUMPTIONS
from crossfoot.laws.identity import Form, Identity


class Shape(NamedTuple):
    """All of a claim that decides which identities speak of it.

    Attributes
    ----------
    kind, context
        As in the claim.
    cells
        What is printed, each cell once, in printed order; plain pairs will do.
    fractional
        Whether degrees of freedom are printed with decimals.
    side
        0 for two-sided tests; 1 or 2 to take tests as one-sided, in the direction found or
        against it.
    """

    kind: str
    cells: tuple[tuple[str, str | None], ...]
    context: tuple[str, ...]
    fractional: bool = False
    side: int = 0


class Draft(NamedTuple):
    """A form with its cells, ``number`` is that of its binding."""

    identity: Identity
    form: Form
    takes: tuple[Cell, ...]
    gives: Cell
    number: int

    @property
    def cells(self) -> tuple[Cell, ...]:
        """All of its cells, the one that it gives first."""
        return (self.gives, *self.takes)


def broken_assumption(identity: Identity, form: Form, shape: Shape) -> tuple[str, str] | None:
    """Return a context that breaks an assumption of a form, and that assumption."""
    for key in (*identity.needs, *form.needs, *form.assumed):
        # Degrees of freedom with decimals are the adjusted ones: those that the test used.
        if key == "df-as-used" and shape.fractional:
            continue
        context = ASSUMPTIONS[key].breach(shape.context)
        if context is not None:
            return context, key
    return None


def speaks(draft: Draft, kind: str, printed: Set[Cell], quantities: Set[str]) -> bool:
    """Say whether a form whose assumptions hold speaks of a claim.

    Parameters
    ----------
    draft
        The form with its cells.
    kind, printed, quantities
        Kind of the claim, what is printed in it, and the quantities of that.
    """
    return (
        kind in (draft.form.kinds or draft.identity.kinds)
        and quantities >= set(draft.form.beside)
        and quantities.isdisjoint(draft.form.unless)
        and (draft.gives in printed or (bool(draft.form.takes) and not bounds(draft.form)))
    )


def bounds(form: Form) -> bool:
    """Say whether a form only bounds what it gives, and so says little of what is not printed."""
    return "≤" in form.formula or "≥" in form.formula


def grounded(drafts: Sequence[Draft], printed: Set[Cell]) -> Iterator[Draft]:
    """Return the forms that rest on no degrees of freedom neither printed nor following."""
    givers: dict[Cell, set[int]] = {}
    for draft in drafts:
        givers.setdefault(draft.gives, set()).add(draft.number)
    for draft in drafts:
        if not any(
            cell not in printed
            and cell.quantity in CUSTOMARY
            and not CUSTOMARY[cell.quantity].assumption
            and not givers.get(cell, set()) - {draft.number}
            for cell in draft.cells
        ):
            yield draft


def connected(drafts: list[Draft], printed: frozenset[Cell], pruned: bool) -> list[Draft]:
    """Keep the forms whose cells are printed, or follow from what is.

    Where the plan is pruned, what is not printed must also matter: two identities must meet there.
    """
    customary = {Cell(name) for name in CUSTOMARY}
    drafts = [
        draft for draft in drafts if draft.gives != Cell("ci_level") or draft.gives in printed
    ]
    while True:
        before = len(drafts)
        drafts = _reachable(drafts, printed | customary)
        if pruned:
            meeting: dict[Cell, set[int]] = {}
            for draft in drafts:
                for cell in draft.cells:
                    meeting.setdefault(cell, set()).add(draft.number)
            matters = printed | customary | {cell for cell, by in meeting.items() if len(by) > 1}
            drafts = [draft for draft in drafts if matters.issuperset(draft.cells)]
        if len(drafts) == before:
            return drafts


def _reachable(drafts: list[Draft], known: Set[Cell]) -> list[Draft]:
    reached = set(known)
    while True:
        found = [draft for draft in drafts if reached.issuperset(draft.takes)]
        gained = {draft.gives for draft in found} - reached
        if not gained:
            return found
        reached |= gained
