"""Tables without headings that say what their numbers are: models in columns, bare rows."""

from __future__ import annotations

import re
from bisect import bisect_right
from collections.abc import Sequence
from typing import NamedTuple

from crossfoot.reading.aligned.lines import Line, Word, is_value, values_of, words_of
from crossfoot.reading.tables.fits import is_fit
from crossfoot.reading.tables.rows import kind_of

#: What two spaces or a tab part.
_FIELD = re.compile(r"\S+(?: \S+)*")
#: A relation is a sentence's, but for the one in ``(df = 2; 191)``.
_STATED = re.compile(r"(?<!df)(?<!df )=(?![^()]*\))")
#: How many lines above the first row of fit are looked at for coefficients.
_REACH = 400


class Bare(NamedTuple):
    """Rows of a table without headings: their lines, labels and cells by column."""

    first: int
    last: int
    rows: tuple[tuple[Word | None, ...], ...]


def models_around(
    text: str, lines: Sequence[Line], number: int, free: Sequence[bool]
) -> Bare | None:
    """Return the table of models that the row of fit at ``number`` is part of.

    Parameters
    ----------
    text, lines
        The text and its lines.
    number
        A line whose label may name R², F or the number of cases.
    free
        Which lines no other table has taken.
    """
    label, values = _parted(text, lines[number])
    if not label or not values or not _names_fit(text, label):
        return None
    last = number
    while last + 1 < len(lines) and free[last + 1]:
        below, numbers = _parted(text, lines[last + 1])
        if not (below and numbers and _names_fit(text, below)):
            break
        last += 1
    first = number
    while first > 0 and number - first < _REACH and (free[first - 1] or lines[first - 1].blank):
        line = lines[first - 1]
        if line.rule:
            first -= 1
            continue
        if line.blank and first > 1 and free[first - 2]:
            above, numbers = _parted(text, lines[first - 2])
            if numbers and len(above) <= 8:
                first -= 2  # an empty line between two predictors
                continue
        above, numbers = _parted(text, line)
        if not numbers or len(above) > 8 or _are_titles(line):
            break
        first -= 1
    while first < number and (lines[first].rule or lines[first].blank):
        first += 1
    if first == last:
        return None
    body = first
    first = _with_titles(text, lines, first, free)
    kept = [line for line in lines[first : last + 1] if not line.rule and not line.blank]
    parted = [_parted(text, line) for line in kept]
    if first < body:
        titles = [
            Word(found.group(), kept[0].start + found.start(), kept[0].start + found.end())
            for found in _FIELD.finditer(kept[0].text)
        ]
        parted[0] = ([], titles)
    return Bare(first, last, _columns(text, lines, parted))


def _are_titles(line: Line) -> bool:
    """Say whether a line names columns, though it ends in a number: ``Model 1   Model 2``."""
    fields = _FIELD.findall(line.text)
    return (
        len(fields) > 1
        and line.text[:2].isspace()
        and all(field[0].isalpha() and not is_value(field) for field in fields)
    )


def _with_titles(text: str, lines: Sequence[Line], first: int, free: Sequence[bool]) -> int:
    """Take in the line above that names the columns: words, wide apart, and no numbers."""
    above = first - 1
    while above >= 0 and lines[above].rule:
        above -= 1
    if above < 0 or not free[above] or first - above > 2 or lines[above].blank:
        return first
    fields = _FIELD.findall(lines[above].text)
    indented = lines[above].text[:2].isspace()
    return above if fields and (len(fields) > 1 or indented) else first


def _names_fit(text: str, label: Sequence[Word]) -> bool:
    name = text[label[0].start : label[-1].end]
    return name[-1] not in ":=" and is_fit(name)


def _parted(text: str, line: Line) -> tuple[list[Word], list[Word]]:
    if line.blank or len(line.text) > 300 or _STATED.search(line.text):
        return [], []
    words = values_of(text, words_of(text, line.start, line.end))
    cut = len(words)
    while cut > 0 and is_value(words[cut - 1].text):
        cut -= 1
    if cut == 0 and words and words[0].start - line.start < 2:
        cut = 1
    return words[:cut], words[cut:]


def _columns(
    text: str, lines: Sequence[Line], parted: Sequence[tuple[list[Word], list[Word]]]
) -> tuple[tuple[Word | None, ...], ...]:
    """Assign values to columns by where their middles stand."""
    starts = {line.start: line for line in lines}
    bases = sorted(starts)
    width = max((len(values) for _, values in parted), default=0)
    widest = next((values for _, values in parted if len(values) == width), [])
    centres = [_centre(word, bases) for word in widest]
    rows: list[tuple[Word | None, ...]] = []
    for label, values in parted:
        cells: list[Word | None] = [None] * width
        for word in values:
            middle = _centre(word, bases)
            nearest = min(range(width), key=lambda c: abs(centres[c] - middle))
            if cells[nearest] is None:
                cells[nearest] = word
        name = (
            Word(text[label[0].start : label[-1].end], label[0].start, label[-1].end)
            if label
            else None
        )
        rows.append((name, *cells))
    return tuple(rows)


def _centre(word: Word, bases: Sequence[int]) -> float:
    base = bases[bisect_right(bases, word.start) - 1]
    return (word.start + word.end) / 2 - base


def bare_anova(text: str, lines: Sequence[Line], number: int) -> Bare | None:
    """Return an analysis of variance that was printed without its headings."""
    rows: list[tuple[Word | None, ...]] = []
    kinds: list[str] = []
    last = number
    for index in range(number, min(len(lines), number + 40)):
        label, values = _parted(text, lines[index])
        if not label or not 2 <= len(values) <= 6:
            break
        name = Word(text[label[0].start : label[-1].end], label[0].start, label[-1].end)
        kinds.append(kind_of(name.text))
        padded: list[Word | None] = [*values, *(None,) * (6 - len(values))]
        rows.append((name, *padded))
        last = index
    if len(rows) < 2 or "error" not in kinds[1:] or not {"model", "effect"} & set(kinds[:1]):
        return None
    return Bare(number, last, tuple(rows))
