"""Whether headings make a table of tests: a letter alone is none."""

from __future__ import annotations

import math
import re
from collections.abc import Sequence

from crossfoot.model import Reading
from crossfoot.reading.tables.contents import content_of, is_blank
from crossfoot.reading.tables.making import Column, Sheet, reading

EFFECT_SIZES = frozenset({"eta2", "eta2_partial", "omega2"})
#: A p value as it is usually printed.
_P = re.compile(r"[01]?[.,]\d{2,}(?:[eE]-\d{1,3})?|\d(?:[.,]\d+)?[eE]-\d{1,3}|0|1")
#: Rows that are looked at.
_SAMPLE = 60


def supported(sheet: Sheet, test: str, roles: set[str], columns: Sequence[Column]) -> bool:
    """Say whether columns hold a test.

    Parameters
    ----------
    sheet
        The panel.
    test
        The role of its statistic.
    roles, columns
        All roles, and the columns that have them.
    """
    degrees = bool(roles & {"df", "df1", "df2"}) or any(
        c.heading.df or _holds_degrees(sheet, c) for c in columns
    )
    if test not in {"r", "n"} and "p" in roles and _are_probabilities(sheet, columns):
        return degrees or _go_together(sheet, test, columns)
    if test in {"z", "r"}:
        return "p" in roles and (test == "z" or degrees or bool(roles & {"n", "t", "statistic"}))
    return degrees and (bool(roles & {"p", *EFFECT_SIZES}) or test == "F")


def _holds_degrees(sheet: Sheet, column: Column) -> bool:
    """Say whether the first cell of a column tells degrees of freedom beside its number."""
    texts = (row[column.number].text for row in sheet.panel.rows)
    content = content_of(next(filter(None, texts), ""))
    return content is not None and bool(content.df)


def _are_probabilities(sheet: Sheet, columns: Sequence[Column]) -> bool:
    """Say whether the numbers under p are printed as p values are: below 1, to two places."""
    places = [c.number for c in columns if c.heading.roles == ("p",)]
    found = [
        content_of(row[place].text)
        for row in sheet.panel.rows[:_SAMPLE]
        for place in places
        if not is_blank(row[place].text)
    ]
    return bool(found) and all(
        content is not None
        and len(content.numbers) == 1
        and (content.numbers[0].insignificant or _P.fullmatch(content.numbers[0].literal))
        for content in found
    )


def _go_together(sheet: Sheet, test: str, columns: Sequence[Column]) -> bool:
    """Say whether numbers without degrees of freedom can be a statistic and its p at all.

    A letter may name anything; then p stands after its statistic, and t and z have its tails in
    half of the rows at least.
    """
    own, other = (
        next((c for c in columns if c.heading.roles == (role,)), None) for role in (test, "p")
    )
    if own is None or other is None or len(own.box.text) > 1:
        return True
    if test == "chi2" or own.number > other.number:
        return False
    if test == "F":
        return True
    tried = fitting = 0
    for row in sheet.panel.rows[:_SAMPLE]:
        statistic = _one(sheet, row[own.number].text, test)
        p = _one(sheet, row[other.number].text, "p")
        if statistic is not None and p is not None:
            low, high = _tails(test, statistic)
            tried += 1
            fitting += low <= p.high and p.low <= high
    return 2 * fitting >= tried


def _one(sheet: Sheet, text: str, quantity: str) -> Reading | None:
    content = content_of(text)
    if content is None or len(content.numbers) != 1:
        return None
    return reading(sheet, content.numbers[0], quantity)


def _tails(test: str, found: Reading) -> tuple[float, float]:
    """Return between which p values both tails lie, whatever the degrees of freedom of t are."""
    near = 0.0 if found.low < 0 < found.high else min(abs(found.low), abs(found.high))
    far = max(abs(found.low), abs(found.high))
    normal = math.erfc(far / math.sqrt(2))
    if test == "z":
        return normal, math.erfc(near / math.sqrt(2))
    return normal, 2 / math.pi * math.atan2(1, near)
