"""Summaries of models: a row a model or a step, with R², F and their changes."""

from __future__ import annotations

from crossfoot.reading.tables.columns import roles_in
from crossfoot.reading.tables.fits import fit_columns
from crossfoot.reading.tables.making import Found, Sheet


def summaries(sheet: Sheet) -> Found | None:
    """Return the claims of a table of models, or None where it is none."""
    roles = roles_in(sheet.columns)
    if not roles & {"R2", "R2_adj", "R2_change", "F_change"}:
        return None
    found = fit_columns(sheet)
    return found if found.claims else None
