"""Tables of an analysis of variance."""

from __future__ import annotations

import re
from collections.abc import Iterable, Sequence
from typing import NamedTuple

from crossfoot.model import Claim, Reading
from crossfoot.reading.tables.columns import labels_of, roles_in, side_by_side
from crossfoot.reading.tables.contents import NONE, content_of
from crossfoot.reading.tables.grid import Box
from crossfoot.reading.tables.making import (
    Column,
    Found,
    Sheet,
    claim,
    head_df,
    marked,
    reading,
    stars_term,
    value,
)
from crossfoot.reading.tables.rows import correction_of, kind_of, label_of

#: Roles that a column of such a table may have, and the quantity that each is.
_QUANTITIES = {
    "ss": "ss",
    "ms": "ms",
    "df": "df",
    "df1": "df1",
    "df2": "df2",
    "F": "F",
    "p": "p",
    "eta2": "eta2",
    "eta2_partial": "eta2_partial",
    "omega2": "omega2",
}
_UNLABELLED = frozenset({"ss", "ms", "df"})
#: More rows than these are not one analysis: each effect becomes a claim of its own.
_MOST = 40
_PARTIAL = re.compile(
    r"type[\s-]?(?:ii|iii|2|3)\b|\bpartial\s(?:ss|sums?)|adj(?:usted)?\s?ss|typ\s(?:ii|iii)\b",
    re.IGNORECASE,
)


class Line(NamedTuple):
    """A row of the analysis: ``cells`` holds what is printed for each quantity."""

    number: int
    label: str
    kind: str
    cells: dict[str, Reading]
    boxes: tuple[Box, ...]
    contexts: tuple[str, ...] = ()


def anova(sheet: Sheet) -> Found | None:
    """Return the claims of a table with sums of squares, or None where it is none."""
    roles = roles_in(sheet.columns)
    if roles & {"rss", "df_residual", "b", "odds_ratio", "R2_change"} or not roles & {"ss", "ms"}:
        return None
    if len(roles & {"ss", "ms", "df", "df1", "F"}) < 2 or not roles & {"df", "df1", "F"}:
        return None
    claims: list[Claim] = []
    rows: set[int] = set()
    for columns in side_by_side(sheet.columns, _QUANTITIES):
        lines = _lines(sheet, columns)
        if not any(line.kind in {"effect", "model", "part"} for line in lines):
            continue
        for stratum in _strata(lines):
            claims += _claims(sheet, stratum, columns)
        rows |= {line.number for line in lines}
    return Found(tuple(claims), frozenset(rows)) if claims else None


def _lines(sheet: Sheet, columns: Sequence[Column]) -> list[Line]:
    labels = labels_of(sheet.panel, sheet.columns)
    has_p = any(column.heading.roles == ("p",) for column in columns)
    lines: list[Line] = []
    for index, row in enumerate(sheet.panel.rows):
        words = [row[c.number] for c in labels if row[c.number].text]
        correction = next((c for box in words if (c := correction_of(box.text))), "")
        named = [box for box in words if not correction_of(box.text)] or words
        label = label_of(" ".join(box.text for box in named))
        if correction and not lines and not named:
            continue
        cells: dict[str, Reading] = {}
        contexts: list[str] = [correction] if correction else []
        boxes = [row[c.number] for c in columns]
        for column in columns:
            _read(sheet, column, row[column.number], cells, contexts, has_p=has_p)
        if cells:
            kind = kind_of(label)
            lines.append(Line(index, label, kind, cells, (*words, *boxes), tuple(contexts)))
    return _settled(lines)


def _read(
    sheet: Sheet,
    column: Column,
    box: Box,
    cells: dict[str, Reading],
    contexts: list[str],
    *,
    has_p: bool,
) -> None:
    """Read one cell of a row."""
    content = content_of(box.text, box.start) or NONE
    roles = column.heading.roles
    numbers = content.numbers
    for role, number in zip(roles, numbers, strict=False):
        quantity = _QUANTITIES.get(role)
        if quantity is None:
            continue
        found = reading(sheet, number, quantity, percent=column.heading.percent)
        if found is not None:
            cells.setdefault(quantity, found)
    if content.df or (roles == ("F", "df") and len(numbers) == 3):
        pair = content.df or numbers[1:]
        for quantity, number in zip(("df1", "df2"), pair, strict=False):
            found = reading(sheet, number, quantity)
            if found is not None:
                cells[quantity] = found
        cells.pop("df", None)
    if numbers and roles[:1] == ("F",):
        for found in head_df(sheet, column, ("df1", "df2")):
            cells.setdefault(found.quantity, found)
    mark, default = marked(sheet, content, beside_p=has_p)
    if mark is not None and roles[:1] in {("F",), ("p",)}:
        cells.setdefault("p" if mark.term is None else "stars", mark)
        contexts += ["default-stars"] if default else []
    contexts += column.heading.contexts


def _settled(lines: list[Line]) -> list[Line]:
    """Tell what the labels leave open: a row without a label, several totals."""
    if any(line.kind == "corrected" for line in lines):
        lines = [line for line in lines if line.kind != "total"]
    lines = [
        line._replace(kind="total") if line.kind == "corrected" else line
        for line in lines
        if line.kind not in {"uncorrected", "intercept"}
    ]
    if not any(line.kind == "error" for line in lines):
        for number, line in enumerate(lines):
            tested = any("F" in other.cells for other in lines[:number])
            if line.kind == "blank" and set(line.cells) <= _UNLABELLED and tested:
                lines[number] = line._replace(kind="error")
                break
    return [line._replace(kind="effect") if line.kind == "blank" else line for line in lines]


def _strata(lines: list[Line]) -> list[list[Line]]:
    """Split where effects are followed by the error that they are tested against."""
    errors = [line for line in lines if line.kind == "error"]
    if len(errors) < 2:
        return [lines]
    corrections = [next((c for c in line.contexts if correction_of(c)), "") for line in lines]
    if any(corrections):
        keys = dict.fromkeys(corrections)
        return [
            stratum
            for key in keys
            for stratum in _strata_in_order(
                [line for line, c in zip(lines, corrections, strict=True) if c == key]
            )
        ]
    return _strata_in_order(lines)


def _strata_in_order(lines: list[Line]) -> list[list[Line]]:
    strata: list[list[Line]] = [[]]
    for line in lines:
        if line.kind == "total":
            continue
        strata[-1].append(line)
        if line.kind == "error":
            strata.append([])
    return [
        stratum
        for stratum in strata
        if any(line.kind == "effect" or line.kind == "model" for line in stratum)
    ]


def _claims(sheet: Sheet, lines: list[Line], columns: Sequence[Column]) -> Iterable[Claim]:
    """Return the claim of an analysis, and those of the rows that are no part of its sums."""
    effects = [line for line in lines if line.kind == "effect"]
    model = next((line for line in lines if line.kind == "model"), None)
    error = next((line for line in lines if line.kind == "error"), None)
    total = next((line for line in lines if line.kind == "total"), None)
    if model is not None and not effects:
        effects, model = [model], None
    parts = [line for line in lines if line.kind == "part"]
    effects, more = _subtotals(effects, error, total)
    parts += more
    if error is None and not any("ss" in line.cells for line in effects):
        return [c for line in (*effects, *parts) if (c := _effect(sheet, line)) is not None]
    if all("df2" in line.cells for line in effects) and error is None:
        return [c for line in (*effects, *parts) if (c := _effect(sheet, line)) is not None]
    if total is not None and _short(effects, error, total):
        total = None
    apart = [line for line in effects if _tested_otherwise(line, effects, error)]
    claims: list[Claim] = []
    if len(effects) <= _MOST:
        whole = [
            line._replace(cells=_untested(line)) if line in apart else line for line in effects
        ]
        claims.append(_whole(sheet, whole, model, error, total, columns))
    else:
        parts = [*effects, *parts]
    for line in parts:
        if error is not None and "F" in line.cells:
            claims.append(_against(sheet, line, error))
    for line in apart:
        other = _denominator(line, effects)
        if other is not None and other is not error:
            claims.append(_against(sheet, line, other))
    return claims


def _whole(
    sheet: Sheet,
    effects: list[Line],
    model: Line | None,
    error: Line | None,
    total: Line | None,
    columns: Sequence[Column],
) -> Claim:
    single = len(effects) == 1
    readings: list[Reading] = []
    for line, name in zip(effects, _names(effects), strict=True):
        readings += _effect_readings(line, None if single else name)
    if model is not None:
        readings += _effect_readings(model, "model")
    if error is not None:
        readings += _named(error, "error", {"df": ("df2", None), "df2": ("df2", None)})
    if total is not None:
        readings += _named(total, "total", {})
    lines = [
        *([model] if model else []),
        *effects,
        *([error] if error else []),
        *([total] if total else []),
    ]
    boxes = [box for line in sorted(lines, key=lambda line: line.number) for box in line.boxes]
    contexts = {
        context for line in lines for context in line.contexts if not correction_of(context)
    }
    if any(
        correction_of(context) not in {"", "sphericity assumed"}
        for line in lines
        for context in line.contexts
    ):
        contexts.add("adjusted-df")
    if _PARTIAL.search(sheet.words) and not single:
        contexts.add("partial-sums")
    group = next((c.group for c in columns if c.group), "")
    names = [name for name in (sheet.title, group) if name]
    label = ", ".join(names) or (effects[0].label if single else "") or "Analysis of variance"
    return claim(sheet, "anova-table", label, readings, boxes, contexts=contexts)


def _names(effects: Sequence[Line]) -> list[str]:
    """Return a name of its own for each effect; none of them may pass for another row's."""
    names: list[str] = []
    for line in effects:
        name = line.label or "effect"
        taken = {*names, "model", "error", "total"}
        number = 2
        while name in taken:
            name = f"{line.label or 'effect'} ({number})"
            number += 1
        names.append(name)
    return names


def _effect_readings(line: Line, term: str | None) -> list[Reading]:
    """Return the readings of an effect; the only one of its table has no name of its own."""
    readings: list[Reading] = []
    for quantity, found in line.cells.items():
        if quantity in {"ss", "ms"}:
            readings.append(found._replace(term=term or "model"))
        elif quantity in {"df", "df1"}:
            readings.append(found._replace(quantity="df1", term=term))
        elif quantity == "stars":
            readings.append(found._replace(term=stars_term(term)))
        elif quantity != "df2":
            readings.append(found._replace(term=term))
    return readings


def _named(line: Line, term: str, renamed: dict[str, tuple[str, str | None]]) -> list[Reading]:
    """Return the readings of the error or the total."""
    readings: list[Reading] = []
    for quantity, found in line.cells.items():
        if quantity in {"ss", "ms", "df", "df1", "df2"}:
            name, own = renamed.get(quantity, (quantity, term))
            readings.append(found._replace(quantity="df" if name == "df1" else name, term=own))
    return readings


def _effect(sheet: Sheet, line: Line) -> Claim | None:
    """Return the claim of a row that prints its test with its degrees of freedom."""
    cells = [found for key, found in line.cells.items() if key not in {"ss", "ms"}]
    cells = [f._replace(quantity="df1") if f.quantity == "df" else f for f in cells]
    if not any(found.quantity == "F" for found in cells) or len(cells) < 2:
        return None
    return claim(sheet, "effect", line.label or "F", cells, line.boxes, contexts=line.contexts)


def _against(sheet: Sheet, line: Line, other: Line) -> Claim:
    """Return the claim of an effect whose error stands in another row."""
    given = _named(
        other, "error", {"df": ("df2", None), "df1": ("df2", None), "df2": ("df2", None)}
    )
    readings = _effect_readings(line, None)
    return claim(
        sheet,
        "anova-table",
        line.label or "effect",
        readings,
        line.boxes,
        contexts=line.contexts,
        given=given,
    )


def _number(line: Line | None, quantity: str) -> float | None:
    if line is None:
        return None
    found = line.cells.get(quantity) or (line.cells.get("df1") if quantity == "df" else None)
    return value(found)


def _subtotals(
    effects: list[Line], error: Line | None, total: Line | None
) -> tuple[list[Line], list[Line]]:
    """Set rows apart that add up rows below them, where only that makes df add up."""
    whole, rest = _number(total, "df"), _number(error, "df")
    df = [_number(line, "df") for line in effects]
    if whole is None or rest is None or len(effects) < 3 or len(effects) > _MOST or None in df:
        return effects, []
    numbers = [d or 0.0 for d in df]
    excess = sum(numbers) + rest - whole
    if excess <= 0:
        return effects, []
    for first, own in enumerate(numbers):
        if own != excess:
            continue
        below = 0.0
        for last in range(first + 1, len(numbers)):
            below += numbers[last]
            if below == own and last > first + 1:
                kept = [line for n, line in enumerate(effects) if n != first]
                return kept, [effects[first]]
            if below > own:
                break
    return effects, []


def _short(effects: Sequence[Line], error: Line | None, total: Line) -> bool:
    """Say whether the table leaves a row out: both df and sums of squares fall short."""
    if error is None:
        return False
    short = []
    for quantity in ("df", "ss"):
        parts = [
            line.cells.get(quantity) or line.cells.get(_DF[quantity]) for line in (*effects, error)
        ]
        whole = total.cells.get(quantity) or total.cells.get(_DF[quantity])
        known = [part for part in parts if part is not None]
        if whole is None or len(known) < len(parts):
            return False
        short.append(whole.low - sum(part.high for part in known))
    return short[0] >= 1 and short[1] > 0


#: Under what other name a row may print its degrees of freedom.
_DF = {"df": "df1", "ss": "ss"}


def _untested(line: Line) -> dict[str, Reading]:
    return {k: v for k, v in line.cells.items() if k in {"ss", "ms", "df", "df1"}}


def _tested_otherwise(line: Line, effects: Sequence[Line], error: Line | None) -> bool:
    """Say whether F is not against the error but does fit another row of a nested design."""
    if len(effects) < 2 or error is None or _fits(line, error) is not False:
        return False
    return _denominator(line, effects) is not None


def _denominator(line: Line, effects: Sequence[Line]) -> Line | None:
    """Return the one other row that F is tested against, if its digits leave no doubt."""
    fitting = [other for other in effects if other is not line and _fits(line, other)]
    return fitting[0] if len(fitting) == 1 and _sharp(line) and _sharp(fitting[0]) else None


def _sharp(line: Line) -> bool:
    """Say whether a row prints its mean square to two digits at least."""
    square = _ms(line)
    return square is not None and square[1] - square[0] <= 0.05 * square[1]


def _fits(line: Line, other: Line) -> bool | None:
    """Say whether F is the ratio of two rows' mean squares; None where they aren't printed."""
    f, top, bottom = line.cells.get("F"), _ms(line), _ms(other)
    if f is None or top is None or bottom is None or bottom[0] <= 0 or top[0] <= 0:
        return None
    return f.low <= top[1] / bottom[0] and top[0] / bottom[1] <= f.high


def _ms(line: Line) -> tuple[float, float] | None:
    found = line.cells.get("ms")
    if found is not None:
        return found.low, found.high
    ss, df = line.cells.get("ss"), _number(line, "df")
    return (ss.low / df, ss.high / df) if ss is not None and df else None


def bare(sheet: Sheet) -> Found | None:
    """Return the claim of an analysis printed without headings, told by its arithmetic.

    Of SS/df = MS, for the effect and for the error, and MS/MSE = F, two at least must hold.
    """
    if roles_in(sheet.columns) or not 2 <= len(sheet.panel.rows) <= _MOST or sheet.panel.heads:
        return None
    for order in (("ss", "df", "ms", "F", "p"), ("df", "ss", "ms", "F", "p")):
        columns = tuple(
            c._replace(heading=c.heading._replace(roles=(order[c.number - 1],)))
            if 1 <= c.number <= len(order)
            else c
            for c in sheet.columns
        )
        own = sheet._replace(columns=columns)
        lines = _lines(own, columns[1:6])
        error = next((line for line in lines if line.kind == "error"), None)
        tested = [line for line in lines if line.kind in {"effect", "model"} and "F" in line.cells]
        if error is None or not tested:
            continue
        holds = [_ms_fits(tested[0]), _ms_fits(error), _fits(tested[0], error) is True]
        if sum(holds) >= 2:
            return anova(own)
    return None


def _ms_fits(line: Line) -> bool:
    """Say whether a row's mean square is its sum of squares over its degrees of freedom."""
    ss, ms, df = line.cells.get("ss"), line.cells.get("ms"), _number(line, "df")
    if ss is None or ms is None or not df:
        return False
    return ss.low / df <= ms.high and ms.low <= ss.high / df
