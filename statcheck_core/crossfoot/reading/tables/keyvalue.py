"""Tables of labels and values that summarise one model."""

from __future__ import annotations

import itertools
from collections.abc import Sequence

from crossfoot.reading.tables import headings
from crossfoot.reading.tables.contents import content_of, is_blank
from crossfoot.reading.tables.fits import FIT, entries_of, model_claims
from crossfoot.reading.tables.grid import Box
from crossfoot.reading.tables.making import Found, Sheet
from crossfoot.reading.tables.steps import Entry, Model

_ROLES = FIT | {"p", "se"}
#: What a summary calls otherwise.
_AS = {("se",): ("s",), ("df_residual",): ("df2",)}
#: F and p alone, or R² alone, may be anything.
_MORE = FIT - {"F", "R2"}
#: A summary has no more rows, so that a list of a thousand numbers is none.
_MOST = 60


def key_values(sheet: Sheet) -> Found | None:
    """Return the claim of a summary in labels and values, or None where it is none."""
    panel = sheet.panel
    if panel.width not in {2, 3, 4, 6} or not panel.rows or len(panel.rows) > _MOST:
        return None
    entries: list[Entry] = []
    contexts: list[str] = []
    read: set[int] = set()
    boxes: list[Box] = []
    for number, row in enumerate((*panel.heads, *panel.rows), start=-len(panel.heads)):
        for head, box in pairs_in(row):
            heading = headings.parse_label(head.text)
            if not heading.roles or heading.roles[0] not in {*_ROLES, "df_residual"}:
                continue
            if heading.roles in _AS:
                heading = heading._replace(roles=_AS[heading.roles])
            found = entries_of(sheet, heading, head, box, contexts)
            entries += found
            if found:
                boxes += [head, box]
                read.add(number)
    if "robust" in sheet.legend.contexts or _is_of_clusters(entries):
        return _apart(sheet, entries, boxes, contexts, read)
    if not {entry.role for entry in entries} & _MORE:
        return None
    model = Model("", tuple(entries), tuple(boxes), tuple(contexts))
    claims = model_claims(sheet, [model])
    return Found(tuple(claims), frozenset(read)) if claims else None


def _is_of_clusters(entries: Sequence[Entry]) -> bool:
    """Say whether F has far fewer degrees of freedom than there are cases, as of clusters."""
    known = {entry.role: entry.reading.low for entry in entries}
    if not {"n", "df1", "df2"} <= known.keys():
        return False
    return known["n"] > 2 * (known["df1"] + known["df2"] + 1)


def _apart(
    sheet: Sheet,
    entries: Sequence[Entry],
    boxes: Sequence[Box],
    contexts: Sequence[str],
    read: set[int],
) -> Found | None:
    """Keep a robust F apart from R², which says nothing of it."""
    test = tuple(entry for entry in entries if entry.role in {"F", "df1", "df2", "p"})
    rest = tuple(entry for entry in entries if entry not in test)
    models = [Model("", part, tuple(boxes), tuple(contexts)) for part in (test, rest)]
    claims = model_claims(sheet, models, with_coefficients=True)
    return Found(tuple(claims), frozenset(read)) if claims else None


def pairs_in(row: Sequence[Box]) -> list[tuple[Box, Box]]:
    """Return the labels of a row, each with the value beside it."""
    pairs: list[tuple[Box, Box]] = []
    for head, box in itertools.pairwise([box for box in row if box.text]):
        valued = not is_blank(box.text) and content_of(box.text) is not None
        if head.text and valued and content_of(head.text) is None:
            pairs.append((head, box))
    return pairs
