"""The claims of an analysis of variance, from its rows."""

from __future__ import annotations

import re
from collections.abc import Iterable, Sequence

from crossfoot.model import Claim, Reading
from crossfoot.reading.tables.making import MARKS, Column, Sheet, claim, marks_term
from crossfoot.reading.tables.ratios import Line, denominator, number_of, tested_otherwise
from crossfoot.reading.tables.rows import correction_of, is_lack_of_fit, is_pure_error

#: More rows than these are not one analysis: each effect becomes a claim of its own.
MOST = 40
_PARTIAL = re.compile(
    r"type[\s-]?(?:ii|iii|2|3)\b|\bpartial\s(?:ss|sums?)|adj(?:usted)?\s?ss|typ\s(?:ii|iii)\b",
    re.IGNORECASE,
)


def claims_of(sheet: Sheet, lines: list[Line], columns: Sequence[Column]) -> Iterable[Claim]:
    """Return the claim of an analysis, and those of the rows that are no part of its sums."""
    effects = [line for line in lines if line.kind == "effect"]
    model = next((line for line in lines if line.kind == "model"), None)
    error = next((line for line in lines if line.kind == "error"), None)
    total = next((line for line in lines if line.kind == "total"), None)
    if model is not None and not effects:
        effects, model = [model], None
    parts = [line for line in lines if line.kind == "part"]
    pure = next((line for line in parts if is_pure_error(line.label)), None)
    if error is None and pure is not None:
        effects += [line for line in parts if is_lack_of_fit(line.label)]
        error, pure, parts = pure, None, []
    effects, more = _subtotals(effects, error, total)
    parts += more
    if error is None and not any("ss" in line.cells for line in effects):
        return [c for line in (*effects, *parts) if (c := _effect(sheet, line)) is not None]
    if all("df2" in line.cells for line in effects) and error is None:
        return [c for line in (*effects, *parts) if (c := _effect(sheet, line)) is not None]
    if total is not None and _short(effects, error, total):
        total = None
    effects = _of_effects_and_error(effects, error, total)
    apart = [line for line in effects if tested_otherwise(line, effects, error)]
    claims: list[Claim] = []
    if len(effects) <= MOST:
        whole = [
            line._replace(cells=_untested(line)) if line in apart else line for line in effects
        ]
        claims.append(_whole(sheet, whole, model, error, total, columns))
    else:
        parts = [*effects, *parts]
    for line in parts:
        if error is None or "F" not in line.cells:
            continue
        if not is_lack_of_fit(line.label):
            claims.append(_against(sheet, line, error))
        elif pure is not None:
            claims.append(_against(sheet, line, pure, error))
    for line in apart:
        other = denominator(line, effects)
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
    beside = [line.cells["df2"] for line in effects if "df2" in line.cells]
    if len({(found.low, found.high) for found in beside}) == 1:
        readings.append(beside[0])
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
    names = [name for name in (sheet.title, group, effects[0].section if effects else "") if name]
    label = ", ".join(names) or (effects[0].label if single else "") or "Analysis of variance"
    return claim(sheet, "anova-table", label, readings, boxes, contexts=contexts)


def _names(effects: Sequence[Line]) -> list[str]:
    """Return a name of its own for each effect; none of them may pass for another row's."""
    names: list[str] = []
    for line in effects:
        name = line.label or "effect"
        taken = {*names, "model", "error", "total", MARKS}
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
            readings.append(found._replace(term=marks_term(term)))
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


def _row(line: Line) -> str:
    """Return what the table calls a row, under the heading of its section."""
    return ", ".join(part for part in (line.section, line.label) if part)


def _effect(sheet: Sheet, line: Line) -> Claim | None:
    """Return the claim of a row that prints its test with its degrees of freedom."""
    cells = [found for key, found in line.cells.items() if key not in {"ss", "ms"}]
    cells = [f._replace(quantity="df1") if f.quantity == "df" else f for f in cells]
    if not any(found.quantity == "F" for found in cells) or len(cells) < 2:
        return None
    row = _row(line)
    return claim(sheet, "effect", row or "F", cells, line.boxes, row=row, contexts=line.contexts)


def _against(sheet: Sheet, line: Line, other: Line, both: Line | None = None) -> Claim:
    """Return the claim of an effect whose error stands in another row, as may their sum."""
    given = _named(
        other, "error", {"df": ("df2", None), "df1": ("df2", None), "df2": ("df2", None)}
    )
    if both is not None:
        given += _named(both, "total", {})
    readings = _effect_readings(line, None)
    row = _row(line)
    return claim(
        sheet,
        "anova-table",
        row or "effect",
        readings,
        line.boxes,
        row=row,
        contexts=line.contexts,
        given=given,
    )


def _subtotals(
    effects: list[Line], error: Line | None, total: Line | None
) -> tuple[list[Line], list[Line]]:
    """Set rows apart that add up rows below them, where only that makes df add up."""
    whole, rest = number_of(total, "df"), number_of(error, "df")
    df = [number_of(line, "df") for line in effects]
    if whole is None or rest is None or len(effects) < 3 or len(effects) > MOST or None in df:
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
        parts = [_cell(line, quantity) for line in (*effects, error)]
        whole = _cell(total, quantity)
        known = [part for part in parts if part is not None]
        if whole is None or len(known) < len(parts):
            return False
        short.append(whole.low - sum(part.high for part in known))
    return short[0] >= 1 and short[1] > 0


def _cell(line: Line, quantity: str) -> Reading | None:
    """Return what a row prints of a quantity; its degrees of freedom may stand under df1."""
    found = line.cells.get(quantity)
    return line.cells.get("df1") if found is None and quantity == "df" else found


def _of_effects_and_error(
    effects: list[Line], error: Line | None, total: Line | None
) -> list[Line]:
    """Call η² partial where it is so in the rows of several effects, whatever its heading says."""
    if error is None or total is None or len(effects) < 2:
        return effects
    whole, rest = _cell(total, "ss"), _cell(error, "ss")
    told = [(line.cells.get("ss"), line.cells.get("eta2")) for line in effects]
    known = [(ss, eta2) for ss, eta2 in told if ss is not None and eta2 is not None]
    if whole is None or rest is None:
        return effects
    simple = [_is_share(eta2, ss, whole.low, whole.high) for ss, eta2 in known]
    partial = [_is_share(eta2, ss, ss.low + rest.low, ss.high + rest.high) for ss, eta2 in known]
    only = sum(p and not s for s, p in zip(simple, partial, strict=True))
    if only <= sum(not p for p in partial):
        return effects
    return [line._replace(cells=_with_partial(line.cells)) for line in effects]


def _is_share(eta2: Reading, ss: Reading, low: float, high: float) -> bool:
    return eta2.low * low <= ss.high and ss.low <= eta2.high * high


def _with_partial(cells: dict[str, Reading]) -> dict[str, Reading]:
    if "eta2" not in cells or "eta2_partial" in cells:
        return cells
    return {
        ("eta2_partial" if key == "eta2" else key): (
            found._replace(quantity="eta2_partial") if key == "eta2" else found
        )
        for key, found in cells.items()
    }


def _untested(line: Line) -> dict[str, Reading]:
    return {k: v for k, v in line.cells.items() if k in {"ss", "ms", "df", "df1"}}
