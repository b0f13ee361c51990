"""From cells to claims."""

from __future__ import annotations

import re
from collections.abc import Iterable, Sequence
from typing import NamedTuple

from crossfoot.model import Claim, Reading, Span
from crossfoot.reading.contexts import concerning, cues_in
from crossfoot.reading.tables import contents, legend
from crossfoot.reading.tables.contents import Content, Number
from crossfoot.reading.tables.grid import Box, Panel
from crossfoot.reading.tables.headings import Heading
from crossfoot.reading.tables.legend import Legend

#: The term of a p that marks of significance stand for.
MARKS = "stars"
#: The term of a p that is adjusted for the number of tests.
ADJUSTED = "adjusted"
#: Longest text of a claim.
_LONGEST = 300
_COUNTS = frozenset({"df", "df1", "df2"})


class Column(NamedTuple):
    """A column of a panel: what its heading says, and the heading of several that it is under."""

    number: int
    heading: Heading
    box: Box
    text: str
    group: str = ""


class Sheet(NamedTuple):
    """All that a recogniser sees of a panel.

    Attributes
    ----------
    shown, folded
        The visible text of the table, as it is and folded.
    panel
        Header and rows.
    columns
        One for each column.
    legend
        What caption and notes say.
    comma
        Whether decimals are written with a comma.
    title
        What the caption calls the table.
    words
        Caption, notes and headings, for whoever looks for a word.
    """

    shown: str
    folded: str
    panel: Panel
    columns: tuple[Column, ...]
    legend: Legend
    comma: bool
    title: str
    words: str


class Found(NamedTuple):
    """What a recogniser made of a panel: claims, and the rows that it has read."""

    claims: tuple[Claim, ...]
    rows: frozenset[int] = frozenset()


def reading(
    sheet: Sheet,
    number: Number,
    quantity: str,
    *,
    percent: bool = False,
    term: str | None = None,
) -> Reading | None:
    """Return a number of a cell as a reading."""
    part = contents.part(number, quantity, comma=sheet.comma, percent=percent, term=term)
    if part is None:
        return None
    literal = sheet.shown[part.start : part.end]
    return Reading(
        quantity, part.relation, literal, part.low, part.high, Span(part.start, part.end), term
    )


def level(sheet: Sheet, column: Column) -> tuple[Reading, ...]:
    """Return the confidence level that a column's heading names."""
    number = column.heading.level
    if number is None:
        return ()
    share = float(number.literal.replace(",", ".")) / 100
    at = column.box.start
    span = Span(at + number.start, at + number.end)
    return (Reading("ci_level", "=", number.literal, share, share, span),)


def head_df(sheet: Sheet, column: Column, quantities: Sequence[str]) -> tuple[Reading, ...]:
    """Return the degrees of freedom that a column's heading names."""
    return tuple(
        found
        for number, quantity in zip(column.heading.df, quantities, strict=False)
        if (found := reading(sheet, _moved(number, column.box.start), quantity)) is not None
    )


def _moved(number: Number, by: int) -> Number:
    return number._replace(start=number.start + by, end=number.end + by)


def marked(
    sheet: Sheet, content: Content, *, beside_p: bool = False
) -> tuple[Reading | None, bool]:
    """Return what a cell's significance marks say of p, and whether by the default legend.

    Parameters
    ----------
    sheet, content
        The panel and the content of the cell.
    beside_p
        Whether p itself is printed, so that marks without a legend say nothing more.
    """
    if content.marks is None:
        return None, False
    mark, start, end = content.marks
    marks = sheet.legend.marks
    if mark in marks:
        found = marks[mark]
        low, high = legend.band(mark, marks)
        return Reading("p", "<", found.literal, low, high, Span(start, end), MARKS), False
    if marks or mark not in legend.DEFAULT or beside_p:
        return None, False
    value = legend.DEFAULT[mark]
    literal = f"{value:g}"
    return Reading("p", "<", literal, float("-inf"), value, Span(start, end), MARKS), True


#: Adjustments that are made of the p values themselves, and make none smaller.
_ADJUSTMENT = re.compile(r"bonf|holm|hochberg|hommel|benjamini|\bB-?H\b|[sš]id[aá]k", re.IGNORECASE)
#: Where this is said, p may be adjusted for covariates instead.
_COVARIATES = re.compile(
    r"crude|unadjusted|adjust(?:ed|ing)\sfor|covariate|multivari", re.IGNORECASE
)


def add_adjusted(
    sheet: Sheet,
    column: Column,
    number: Number,
    cells: dict[str, Reading],
    contexts: list[str],
    *,
    has_p: bool,
) -> None:
    """Add a p that is adjusted for the number of tests, where p itself stands beside it."""
    named = _ADJUSTMENT.search(column.text) or _ADJUSTMENT.search(sheet.words)
    ratios = any({"odds_ratio", "ratio"} & {*c.heading.roles} for c in sheet.columns)
    if not has_p or (not named and (ratios or _COVARIATES.search(sheet.words))):
        return
    found = reading(sheet, number, "p", term=ADJUSTED)
    if found is not None:
        cells.setdefault("p_adjusted", found)
        contexts += ["named-adjustment"] if named else []


def marks_term(term: str | None) -> str:
    """Return the term of the reading that marks make of p in a row of several."""
    return MARKS if term is None else f"{term}: {MARKS}"


def claim(
    sheet: Sheet,
    kind: str,
    label: str,
    readings: Iterable[Reading],
    boxes: Sequence[Box],
    *,
    row: str = "",
    contexts: Iterable[str] = (),
    given: Sequence[Reading] = (),
) -> Claim:
    """Return a claim in places of the visible text.

    Parameters
    ----------
    sheet
        The panel.
    kind, label, row, given
        As in the claim.
    readings
        Each quantity of a term once: what comes first stays.
    boxes
        The cells it was read from, its label first.
    contexts
        Beyond those that caption, notes and label mean.
    """
    unique: dict[tuple[str, str | None], Reading] = {}
    for found in readings:
        unique.setdefault((found.quantity, found.term), found)
    ordered = sorted(unique.values(), key=lambda found: found.span)
    ordered, given = _counted(ordered, given)
    found_contexts = set(contexts) | sheet.legend.contexts | cues_in(label).contexts
    if any(found.quantity in _COUNTS and found.low != found.high for found in (*ordered, *given)):
        found_contexts.add("adjusted-df")
    if "of-ratio" in found_contexts:
        found_contexts.remove("of-ratio")
        found_contexts.add("ratio-limits")
    if any(found.quantity == "df1" and found.low > 1 for found in ordered):
        found_contexts.discard("adjusted-p")  # corrections are of single contrasts
    own = [found.span for found in ordered]
    quantities = {found.quantity for found in (*ordered, *given)}
    return Claim(
        kind=kind,
        label=label,
        text=_text(sheet, boxes),
        span=Span(own[0].start, max(span.end for span in own)),
        readings=tuple(ordered),
        context=tuple(sorted(concerning(kind, frozenset(found_contexts), quantities))),
        alpha=sheet.legend.alpha,
        given=tuple(given),
        row=row,
    )


def _counted(
    own: Sequence[Reading], given: Sequence[Reading]
) -> tuple[list[Reading], list[Reading]]:
    """Take degrees of freedom such as ``57.0`` as counts, where none of them has a fraction."""
    degrees = [found for found in (*own, *given) if found.quantity in _COUNTS]
    if all(found.low == found.high for found in degrees) or not all(map(_is_whole, degrees)):
        return list(own), list(given)
    whole = [
        found._replace(
            low=round(found.low + found.high) / 2, high=round(found.low + found.high) / 2
        )
        if found.quantity in _COUNTS
        else found
        for found in (*own, *given)
    ]
    return whole[: len(own)], whole[len(own) :]


def _is_whole(found: Reading) -> bool:
    return (
        found.relation == "="
        and abs((found.low + found.high) / 2 - round((found.low + found.high) / 2)) < 1e-9
    )


def _text(sheet: Sheet, boxes: Sequence[Box]) -> str:
    """Return the printed words of some cells, on one line."""
    words: list[str] = []
    length = 0
    seen: set[int] = set()
    for box in boxes:
        if box.start in seen or box.start == box.end:
            continue
        seen.add(box.start)
        words.append(" ".join(sheet.shown[box.start : box.end].replace("^{2}", "²").split()))
        length += len(words[-1])
        if length > _LONGEST:
            words.append("…")
            break
    return " | ".join(words)


def value(found: Reading | None) -> float | None:
    """Return the number that a reading prints, the middle of what it stands for."""
    if found is None or found.relation != "=":
        return None
    return (found.low + found.high) / 2
