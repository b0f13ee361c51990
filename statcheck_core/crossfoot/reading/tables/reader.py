"""From a table to its claims: each panel goes to the recogniser that knows it."""

from __future__ import annotations

import re
from collections.abc import Callable, Iterable, Sequence

from crossfoot.documents.table import Table
from crossfoot.model import Claim, Reading, Span
from crossfoot.reading.contexts import cues_in
from crossfoot.reading.cues import CUES
from crossfoot.reading.fold import fold
from crossfoot.reading.tables import legend as legends
from crossfoot.reading.tables.anova import anova, bare
from crossfoot.reading.tables.coefficients import coefficients
from crossfoot.reading.tables.columns import columns_of, roles_in, writes_comma
from crossfoot.reading.tables.comparisons import comparisons
from crossfoot.reading.tables.contents import content_of
from crossfoot.reading.tables.correlations import correlations
from crossfoot.reading.tables.grid import Box, Panel, panels_of, transposed
from crossfoot.reading.tables.keyvalue import key_values
from crossfoot.reading.tables.legend import Legend
from crossfoot.reading.tables.making import Column, Found, Sheet, reading
from crossfoot.reading.tables.results import results
from crossfoot.reading.tables.rows import label_of
from crossfoot.reading.tables.sidebyside import side_by_side
from crossfoot.reading.tables.summaries import summaries
from crossfoot.reading.tables.testvalues import test_values
from crossfoot.reading.tables.together import joined

#: Reads a stretch of the visible text as prose; places count in the whole text.
Prose = Callable[[int, int], Sequence[Claim]]

_RECOGNISERS: tuple[Callable[[Sheet], Found | None], ...] = (
    correlations,
    comparisons,
    anova,
    coefficients,
    summaries,
    side_by_side,
    key_values,
    test_values,
    results,
    bare,
)
_TITLE = re.compile(
    r"\s*((?:Table|Tabelle|Tableau|Tabla|Tabela|Tabell?a?|表)\s?[A-Z]?\d{0,3}(?:[.-]\d{1,3})?)(?![\w])",
    re.IGNORECASE,
)
_STATED = re.compile(r"[=<>≤≥≈]\s?[-+]?\s?[.,]?\d")
#: Contexts that words must stand near a result to mean.
_NEAR = frozenset(cue.context for cue in CUES if cue.near)
#: Words that say that a model has more predictors than its table lists.
_OMITS = re.compile(
    r"\bcontrol(?:s|led|ling)?\b|fixed\seffects?|dumm(?:y|ies)|not\s(?:shown|reported|listed)|omitted"
    r"|adjust(?:ed|ing)\sfor|covariates?|suppressed|all\smodels\sinclude|also\sinclude",
    re.IGNORECASE,
)
#: Where these are spoken of, degrees of freedom may be those of a test of the whole model.
_LIKELIHOOD = re.compile(
    r"χ|chi|likelihood|deviance|logi[ts]|odds|wald|probit|poisson|binomial|hosmer", re.IGNORECASE
)
#: Longest caption or note that is looked at, in code points.
_LONGEST_NOTE = 4000
_NOTE_ROW = re.compile(
    r"\(?(?:notes?|source|anm(?:erkung)?|remarque|nota)\b\.?\s?:?.{0,3}|[*†‡].{0,12}[<=].*|.{0,4}signif\..*",
    re.IGNORECASE,
)


def table_claims(table: Table, prose: Prose, *, lead: str = "") -> tuple[Claim, ...]:
    """Return the claims of a table, in places of its visible text.

    Parameters
    ----------
    table
        The table.
    prose
        Reads what is written out: notes, captions, cells with whole results.
    lead
        Words before the table that speak of it, where they are no part of it.
    """
    folded = fold(table.visible.text)
    panels = tuple(transposed(panel) or panel for panel in panels_of(table, folded))
    stretches = _stretches(table, panels)
    legend = legends.legend_of(folded, stretches)
    words = " ".join([lead, *(folded[start:end] for start, end in stretches)])
    if lead:
        legend = legend._replace(contexts=legend.contexts | cues_in(lead).contexts - _NEAR)
    title = _title(folded, table)
    found: list[Claim] = []
    for panel in panels:
        heads = " ".join(box.text for row in panel.heads for box in row)
        columns = columns_of(panel)
        sheet = Sheet(
            table.visible.text, folded, panel, columns, _scaled(legend, words, heads, columns),
            writes_comma(panel), title, f"{words} {heads}",
        )  # fmt: skip
        known = _recognised(sheet)
        found += known.claims
        found += _written_out(sheet, known.rows, stretches, prose)
    notes = [
        c
        for start, end in stretches
        if _STATED.search(folded, start, end)
        for c in prose(start, end)
    ]
    return tuple(
        joined(
            found,
            notes,
            _cases(table, legend),
            _freedom(table, legend, words),
            complete=_OMITS.search(folded, 0, _LONGEST_NOTE) is None,
        )
    )


#: Said of estimates that are ratios, whatever their column is called.
_RATIOS = re.compile(
    r"(?:odds|hazards?|risk|rate|incidence|prevalence)[\s-]ratios|exponentiated|\bIRRs?\b|\bHRs?\b",
    re.IGNORECASE,
)


def _scaled(legend: Legend, words: str, heads: str, columns: Sequence[Column]) -> Legend:
    """Add what caption and headings say of the scale of estimates and their intervals."""
    if "odds_ratio" in roles_in(columns):
        return legend
    contexts = legend.contexts | (cues_in(heads).contexts & {"ratio-scale"})
    if _RATIOS.search(f"{words[:_LONGEST_NOTE]} {heads}"):
        contexts |= {"ratio-scale", "other-null"}
    return legend._replace(contexts=contexts)


def _cases(table: Table, legend: Legend) -> Reading | None:
    """Return the number of cases that caption or notes tell."""
    part = legend.cases
    if part is None:
        return None
    literal = table.visible.text[part.start : part.end]
    return Reading("n", "=", literal, part.low, part.high, Span(part.start, part.end))


def _freedom(table: Table, legend: Legend, words: str) -> Reading | None:
    """Return the degrees of freedom that caption or notes tell for all t of a regression."""
    if len(legend.df) != 1 or "generalised" in legend.contexts or _LIKELIHOOD.search(words):
        return None
    number = legend.df[0]
    literal = table.visible.text[number.start : number.end]
    degrees = int(number.literal)
    return Reading("df", "=", literal, degrees, degrees, Span(number.start, number.end))


def _recognised(sheet: Sheet) -> Found:
    for recognise in _RECOGNISERS:
        found = recognise(sheet)
        if found is not None:
            return found
    return Found(())


def _stretches(table: Table, panels: Sequence[Panel]) -> list[tuple[int, int]]:
    """Return where caption and notes stand; the last rows may be notes too."""
    spans = [table.caption] if table.caption else []
    spans += table.notes
    found = [(start, min(end, start + _LONGEST_NOTE)) for start, end in spans]
    for panel in panels:
        for row in panel.rows[-6:]:
            filled = [box for box in row if box.text]
            wide = filled and (
                (len(filled) == 1 and len(filled[0].text) > 20)
                or _NOTE_ROW.fullmatch(filled[0].text)
            )
            if wide and not any(box.end - box.start > _LONGEST_NOTE for box in filled):
                found += [(box.start, box.end) for box in filled]
    return sorted(set(found))


def _title(folded: str, table: Table) -> str:
    if table.caption is None:
        return ""
    match = _TITLE.match(folded, table.caption.start, table.caption.end)
    return table.visible.text[match.start(1) : match.end(1)] if match else ""


def _written_out(
    sheet: Sheet, read: frozenset[int], stretches: Iterable[tuple[int, int]], prose: Prose
) -> list[Claim]:
    """Read the rows whose cells hold whole results, as far as nothing else has read them."""
    notes = set(stretches)
    panel, folded = sheet.panel, sheet.folded
    claims: list[Claim] = []
    left = [row for index, row in enumerate(panel.rows) if index not in read]
    for row in (*panel.heads, *left):
        number = max(box.row for box in row)
        filled = [box for box in row if box.text and box.row == number]
        if not filled or any((box.start, box.end) in notes for box in filled):
            continue
        start, end = filled[0].start, filled[-1].end
        if _STATED.search(folded, start, end):
            own = [_in_cell(claim, panel, filled) for claim in prose(start, end)]
            claims += [_completed(own[0], sheet, filled)] if len(own) == 1 else own
    return claims


#: What the row of a test may print in a column of its own.
_BESIDE = ("p", "eta2_partial", "eta2", "omega2")


def _completed(claim: Claim, sheet: Sheet, row: Sequence[Box]) -> Claim:
    """Add to the only result of a row what its other columns print of it."""
    for quantity in _BESIDE:
        columns = [c.number for c in sheet.columns if c.heading.roles == (quantity,)]
        boxes = [box for box in row if [box.column] == columns]
        content = content_of(boxes[0].text, boxes[0].start) if boxes else None
        if (
            content is None
            or len(content.numbers) != 1
            or any(r.quantity == quantity for r in claim.readings)
        ):
            continue
        found = reading(sheet, content.numbers[0], quantity)
        if found is not None and found.low <= 1.0:
            readings = tuple(sorted((*claim.readings, found), key=lambda r: r.span))
            span = claim.span._replace(end=max(claim.span.end, found.span.end))
            claim = claim._replace(readings=readings, span=span)
    return claim


def _in_cell(claim: Claim, panel: Panel, row: Sequence[Box]) -> Claim:
    """Name a result that is written out in a cell by the row and the column it stands in."""
    box = next((box for box in row if box.start <= claim.span.start < box.end), row[0])
    if box is row[0]:
        return claim
    head = panel.heads[-1][box.column].text if panel.heads else ""
    others = any(other.column not in {0, box.column} and "=" in other.text for other in row)
    names = [label_of(row[0].text), label_of(head) if others else ""]
    return claim._replace(row=", ".join(name for name in names if name))
