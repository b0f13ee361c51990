"""What is printed of a step: which numbers are the model's own, and which those of its change."""

from __future__ import annotations

from collections.abc import Sequence
from typing import NamedTuple

from crossfoot.model import Reading
from crossfoot.reading.tables.grid import Box

#: Roles that speak of what a step adds.
CHANGE = frozenset({"R2_change", "F_change", "p_change"})
_TEST = frozenset({"F", "df1", "df2", "p"})


class Entry(NamedTuple):
    """One number of a model, under the role that its heading gives it."""

    role: str
    reading: Reading
    box: Box


class Model(NamedTuple):
    """What is printed of one model, in printed order."""

    label: str
    entries: tuple[Entry, ...]
    boxes: tuple[Box, ...]
    contexts: tuple[str, ...] = ()


def whose_test(models: Sequence[Model]) -> str:
    """Return whose F stands beside ΔR² in a table without ΔF: ``model``, ``change`` or nothing.

    Its rows tell it where their numbers fit one of the two and not the other.
    """
    told = set()
    for model in map(_with_own, models):
        found = {entry.role: entry.reading for entry in model.entries}
        F, df1, df2 = (found.get(role) for role in ("F", "df1", "df2"))
        whole, change = found.get("R2"), found.get("R2_change")
        if F is None or df1 is None or df2 is None or whole is None or change is None:
            continue
        own, added = (_is_test(F, share, whole, df1, df2) for share in (whole, change))
        if own != added:
            told.add("model" if own else "change")
    return told.pop() if len(told) == 1 else ""


def _is_test(F: Reading, share: Reading, whole: Reading, df1: Reading, df2: Reading) -> bool:
    """Say whether F tests a share of the variance, of which a model leaves the rest."""
    if F.relation != "=" or df1.low <= 0 or whole.high >= 1:
        return False
    ratio = df2.low / df1.low
    least, most = share.low / (1 - whole.low), share.high / (1 - whole.high)
    return least * ratio <= F.high and F.low <= most * ratio


def parted(model: Model, whose: str) -> list[Model]:
    """Part what a model prints of itself from what it prints of its change.

    Parameters
    ----------
    model
        The model.
    whose
        From :func:`whose_test`, where F may be either's.
    """
    model = _with_own(model)
    roles = {entry.role for entry in model.entries}
    if "F" not in roles or not roles & CHANGE:
        return [model]
    if "F_change" in roles:
        own, change = _in_order(model.entries)
    elif whose == "change":
        return [model._replace(entries=tuple(map(_of_change, model.entries)))]
    elif whose == "model":
        own = [entry for entry in model.entries if entry.role not in CHANGE]
        change = [entry for entry in model.entries if entry.role in CHANGE]
    else:
        own = [entry for entry in model.entries if entry.role in _TEST]
        change = [entry for entry in model.entries if entry.role not in {*_TEST, "R2"}]
        shared = [entry for entry in model.entries if entry.role == "R2"]
        return [
            model._replace(entries=tuple(own)),
            model._replace(entries=(*shared, *change)),
        ]
    shared = [entry for entry in own if entry.role == "R2"]
    return [model._replace(entries=tuple(own)), model._replace(entries=(*shared, *change))]


def _with_own(model: Model) -> Model:
    """Tell the F of the model by its name; another F beside ΔR² is then that of the change."""
    roles = {entry.role for entry in model.entries}
    if "F_model" not in roles:
        return model
    changed = roles & CHANGE and "F_change" not in roles
    entries = [_of_change(entry) if changed else entry for entry in model.entries]
    return model._replace(
        entries=tuple(e._replace(role="F") if e.role == "F_model" else e for e in entries)
    )


def _of_change(entry: Entry) -> Entry:
    if entry.role != "F":
        return entry
    return entry._replace(role="F_change", reading=entry.reading._replace(quantity="F_change"))


def _in_order(entries: Sequence[Entry]) -> tuple[list[Entry], list[Entry]]:
    """Part entries where both F are printed: degrees of freedom and p follow their F."""
    own: list[Entry] = []
    change: list[Entry] = []
    current = own
    for entry in entries:
        if entry.role in CHANGE:
            current = change
        elif entry.role in {"F", "R2", "R2_adj", "R", "n", "s"}:
            current = own
        current.append(entry)
    return own, change
