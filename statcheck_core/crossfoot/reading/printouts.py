"""Printouts: the tables of aligned text, and what the other lines tell of the same models."""

from __future__ import annotations

from crossfoot.documents.table import Table
from crossfoot.documents.visible import Visible
from crossfoot.model import Claim
from crossfoot.reading.aligned.layout import layout
from crossfoot.reading.tables.reader import Prose, table_claims
from crossfoot.reading.tables.together import joined

#: Longest printout whose words speak for all its tables; in a longer one those near a table do.
_LONGEST = 20_000
_NEAR = 800
#: More rows are no names of tests.
_MOST = 60


def printout_claims(visible: Visible, prose: Prose) -> tuple[Claim, ...]:
    """Return the claims of aligned text, in places of the visible text.

    Parameters
    ----------
    visible
        The text.
    prose
        Reads a stretch of it as prose.
    """
    found = layout(visible)
    if not found.tables:
        return tuple(prose(0, len(visible.text)))
    claims: list[Claim] = []
    for table in found.tables:
        claims += table_claims(table, prose, lead=_around(visible.text, table))
    words = [claim for start, end in found.rest for claim in prose(start, end)]
    models = [claim for claim in claims if claim.kind == "overall-model"]
    if len(models) == 1:  # it may be of the analysis of variance beside it
        claims = [claim for claim in claims if claim.kind != "overall-model"]
        words += models
    return tuple(joined(claims, words))


def _around(text: str, table: Table) -> str:
    """Return the words that speak of a table; those of its rows speak of themselves alone."""
    if len(text) <= _LONGEST:
        labels = [c for c in table.cells if c.column == 0 and not c.head and c.end > c.start]
        for cell in labels if len(labels) <= _MOST else ():
            text = text[: cell.start] + " " * (cell.end - cell.start) + text[cell.end :]
        return text
    places = [cell.start for cell in table.cells if cell.end > cell.start]
    return text[max(0, min(places) - _NEAR) : max(places) + _NEAR] if places else ""
