"""Generated tables of variance."""

from __future__ import annotations

from collections.abc import Callable

import numpy as np

from tables.drawn import Cell, Drawn, Numbers, Said
from tables.fits import Row, variance
from tables.hand import Hand, hand, is_exact

HEADS = {
    "ss": ("SS", "Sum of Squares", "Sum Sq", "Sum of squares"),
    "df": ("df", "<i>df</i>", "DF", "Df", "d.f."),
    "ms": ("MS", "Mean Square", "Mean Sq", "<i>MS</i>"),
    "F": ("F", "<i>F</i>", "F value", "F-ratio"),
    "p": ("p", "<i>p</i>", "P", "Sig.", "p-value", "Pr(>F)"),
    "eta2": ("η²", "η<sup>2</sup>"),
    "eta2_partial": ("ηp²", "η<sub>p</sub><sup>2</sup>", "partial η²", "Partial eta squared"),
}
ERRORS = ("Error", "Residual", "Residuals", "Within groups", "Within", "Residual error")
TOTALS = ("Total", "Corrected total", "Corrected Total")


def one_way(rng: np.random.Generator) -> Drawn:
    return _table(rng, 1)


def two_way(rng: np.random.Generator) -> Drawn:
    return _table(rng, 2)


def _table(rng: np.random.Generator, factors: int) -> Drawn:
    author = hand(rng)
    effects, error, total = variance(rng, factors)
    single = factors == 1
    columns = ["ss", "df", "ms", "F", "p"]
    if author.chance(0.3):
        columns.append("eta2" if single and author.chance(0.5) else "eta2_partial")
    if author.chance(0.15):
        columns.remove("ms")
    elif author.chance(0.15):
        columns.remove("p")
    if author.chance(0.4):
        rng.shuffle(columns)
    with_total = author.chance(0.75)
    decimals = int(rng.integers(1, 5)) if total.ss < 1000 else int(rng.integers(0, 4))
    numbers = Numbers()
    readings: dict[tuple[str, str | None], int] = {}
    rows = [[Cell(author.pick("Source", "Source of variation", "", "Effect"))]]
    rows[0] += [Cell(author.pick(*HEADS[column])) for column in columns]
    marked = "p" not in columns and author.chance(0.7)
    for row in effects:
        term = None if single else row.label
        share = row.ss / (row.ss + error.ss)
        values: dict[str, Callable[[], str]] = {
            "ss": lambda row=row: author.number(row.ss, decimals),
            "df": lambda row=row: str(row.df),
            "ms": lambda row=row: author.number(row.ms, decimals + 1),
            "F": lambda row=row: author.number(row.F, 2),
            "eta2": lambda share=share: author.share(share, 3),
            "eta2_partial": lambda share=share: author.share(share, 3),
        }
        cells = [Cell("Between groups" if single and author.chance(0.2) else row.label)]
        for column in columns:
            if column == "p":
                sign, literal = author.p(row.p)
                slot, place = numbers.put(literal)
                cells.append(Cell(sign + slot))
            else:
                slot, place = numbers.put(values[column]())
                stars = author.stars(row.p) if marked and column == "F" else ""
                cells.append(Cell(slot + stars))
            quantity = "df1" if column == "df" else column
            own = (term or "model") if column in {"ss", "ms"} else term
            readings[quantity, own] = place
        rows.append(cells)
    rows.append(_other(author, numbers, error, columns, readings, "error", decimals))
    if with_total:
        rows.append(_other(author, numbers, total, columns, readings, "total", decimals))
    kind = "one-way anova" if single else "two-way anova"
    notes = [author.legend()] if marked else []
    said = Said("anova-table", readings, tuple(_checked(readings, columns, with_total)))
    caption = author.pick(
        f"Table {rng.integers(1, 9)}. Analysis of variance", "Analysis of variance of wear"
    )
    return Drawn(kind, caption, rows, 1, notes, numbers.printed, [said])


def _other(
    author: Hand,
    numbers: Numbers,
    row: Row,
    columns: list[str],
    readings: dict[tuple[str, str | None], int],
    term: str,
    decimals: int,
) -> list[Cell]:
    label = author.pick(*(ERRORS if term == "error" else TOTALS))
    if term == "error" and "F" in columns and author.chance(0.04):
        label = ""
    cells = [Cell(label)]
    for column in columns:
        if column == "ss":
            slot, readings["ss", term] = numbers.put(author.number(row.ss, decimals))
        elif column == "df":
            key = ("df2", None) if term == "error" else ("df", "total")
            slot, readings[key] = numbers.put(str(row.df))
        elif column == "ms" and term == "error":
            slot, readings["ms", "error"] = numbers.put(author.number(row.ms, decimals + 1))
        else:
            slot = author.blank
        cells.append(Cell(slot))
    return cells


def _checked(
    readings: dict[tuple[str, str | None], int], columns: list[str], with_total: bool
) -> list[tuple[str, str | None]]:
    """What other printed numbers tie down."""
    tied = {"F", "ms", "eta2", "eta2_partial", "p"}
    if "ms" in columns or with_total:
        tied |= {"ss", "df1", "df2"}
    return [key for key in readings if key[0] in tied or key == ("df", "total")]


def effects_only(rng: np.random.Generator) -> Drawn:
    """Rows of tests: an effect, F, both degrees of freedom, p."""
    author = hand(rng)
    effects, error, _ = variance(rng, 2)
    numbers = Numbers()
    style = author.pick("pair", "columns", "last")
    with_eta = author.chance(0.5)
    heads = [Cell(author.pick("Effect", "Source", ""))]
    if style == "pair":
        heads += [Cell(author.pick("df", "<i>df</i>")), Cell("<i>F</i>")]
    elif style == "columns":
        heads += [Cell(author.pick("df1", "num df")), Cell(author.pick("df2", "den df")), Cell("F")]
        if heads[1].text[0] != heads[2].text[0]:
            heads[1:3] = [Cell("df1"), Cell("df2")]
    else:
        heads += [Cell("F"), Cell("df")]
    heads.append(Cell(author.pick("p", "<i>p</i>", "Sig.")))
    heads += [Cell("ηp²")] if with_eta else []
    rows, said = [heads], []
    for row in effects:
        first, df1 = numbers.put(str(row.df))
        second, df2 = numbers.put(str(error.df))
        F, place = numbers.put(author.number(row.F, 2))
        readings: dict[tuple[str, str | None], int] = {("df1", None): df1, ("F", None): place}
        readings["df2", None] = df2
        cells = [Cell(row.label)]
        if style == "pair":
            cells += [Cell(f"{first}, {second}"), Cell(F)]
        elif style == "columns":
            cells += [Cell(first), Cell(second), Cell(F)]
        else:
            cells += [Cell(F), Cell(f"{first}, {second}")]
        sign, literal = author.p(row.p)
        slot, readings["p", None] = numbers.put(literal)
        cells.append(Cell(sign + slot))
        if with_eta:
            slot, place = numbers.put(author.share(row.ss / (row.ss + error.ss), 2))
            readings["eta2_partial", None] = place
            cells.append(Cell(slot))
        rows.append(cells)
        checked = (("F", None), ("p", None)) if is_exact(sign, literal) else ()
        said.append(Said("effect", readings, checked))
    return Drawn("effects", "Table 2. Tests of effects", rows, 1, [], numbers.printed, said)
