"""Generated tables of whole models: side by side, in steps, as labels and values; correlations."""

from __future__ import annotations

from typing import Any

import numpy as np
import statsmodels.api as sm
from scipy import stats

from tables.coefficients import INTERCEPTS, Readings, decimals
from tables.drawn import Cell, Drawn, Numbers, Said
from tables.fits import PREDICTORS, names, regression
from tables.hand import Hand, hand

R2 = ("R²", "<i>R</i>²", "R<sup>2</sup>", "R-squared", "R2")
ADJUSTED = ("Adjusted R²", "Adj. R²", "Adjusted <i>R</i>²", "R2 Adj.", "Adj. R-squared")
CASES = ("N", "Observations", "<i>N</i>", "Num.Obs.", "No. Observations", "n")
F_NAMES = ("F", "F Statistic", "<i>F</i>", "F-statistic")


def nested(rng: np.random.Generator) -> tuple[list[Any], list[str], list[int]]:
    """Models that take in more predictors from one to the next."""
    count, n = int(rng.integers(3, 6)), int(rng.integers(30, 250))
    full = regression(rng, count, n)
    y, x = full.model.endog, full.model.exog
    sizes = sorted({int(rng.integers(1, count)), count, int(rng.integers(1, count))})
    return [sm.OLS(y, x[:, : k + 1]).fit() for k in sizes], names(rng, PREDICTORS, count), sizes


def side_by_side(rng: np.random.Generator) -> Drawn:
    author = hand(rng)
    fits, labels, sizes = nested(rng)
    kind = author.pick("se", "se", "t", "p")
    place = author.pick("below", "below", "same", "beside")
    numbers = Numbers()
    wide = 2 if place == "beside" else 1
    titles = author.pick("Model {}", "({})", "Step {}")
    rows = [[Cell("")] + [Cell(titles.format(i + 1), wide) for i in range(len(fits))]]
    said: list[Said] = []
    order = [0, *range(1, max(sizes) + 1)] if author.chance(0.4) else [*range(1, max(sizes) + 1), 0]
    for i in order:
        first = [Cell(author.pick(*INTERCEPTS) if i == 0 else labels[i - 1])]
        second = [Cell("")]
        for fit, size in zip(fits, sizes, strict=True):
            if i > size:
                first += [Cell("")] * wide
                second.append(Cell(""))
                continue
            readings: Readings = {}
            d = max(2, decimals(float(fit.bse[i])))
            b, readings["b", None] = numbers.put(author.number(float(fit.params[i]), d))
            inner, readings[kind, None] = numbers.put(_bracketed(author, fit, i, kind, d))
            text = b + author.stars(float(fit.pvalues[i]))
            if place == "same":
                first.append(Cell(f"{text} ({inner})"))
            else:
                first.append(Cell(text))
                (first if place == "beside" else second).append(Cell(f"({inner})"))
            said.append(Said("coefficient", readings))
        rows.append(first)
        if place == "below":
            rows.append(second)
    rows += _footers(author, numbers, said, fits, wide)
    told = {"se": "Standard errors", "t": "t statistics", "p": "p values"}[kind]
    notes = [f"{told} in parentheses. {author.legend()}"]
    return Drawn("side by side", "Table 5. Models of wear", rows, 1, notes, numbers.printed, said)


def _bracketed(author: Hand, fit: Any, i: int, kind: str, d: int) -> str:
    if kind == "se":
        return author.number(float(fit.bse[i]), d)
    if kind == "t":
        return author.number(float(fit.tvalues[i]), 2)
    return author.share(float(fit.pvalues[i]), 3)


def _footers(
    author: Hand, numbers: Numbers, said: list[Said], fits: list[Any], wide: int
) -> list[list[Cell]]:
    models: list[Readings] = [{} for _ in fits]
    style = author.pick("cell", "label", "none", "rows")
    rows: list[list[Cell]] = []

    def row(label: str, key: str, texts: list[str]) -> list[Cell]:
        cells = [Cell(label)]
        for model, text in zip(models, texts, strict=True):
            slot, model[key, None] = numbers.put(text)
            cells.append(Cell(slot, wide))
        return cells

    rows.append(row(author.pick(*CASES), "n", [str(int(fit.nobs)) for fit in fits]))
    rows.append(row(author.pick(*R2), "R2", [author.share(fit.rsquared, 3) for fit in fits]))
    rows.append(
        row(author.pick(*ADJUSTED), "R2_adj", [author.share(fit.rsquared_adj, 3) for fit in fits])
    )
    if style != "none":
        cells = row(author.pick(*F_NAMES), "F", [author.number(fit.fvalue, 3) for fit in fits])
        for number, fit in enumerate(fits):
            cell = cells[number + 1]
            text = cell.text + author.stars(float(fit.f_pvalue))
            if style == "cell":
                one, models[number]["df1", None] = numbers.put(str(int(fit.df_model)))
                two, models[number]["df2", None] = numbers.put(str(int(fit.df_resid)))
                text += f" (df = {one}; {two})"
            cells[number + 1] = Cell(text, wide)
        if style == "label" and len(fits) == 1:
            one, models[0]["df1", None] = numbers.put(str(int(fits[0].df_model)))
            two, models[0]["df2", None] = numbers.put(str(int(fits[0].df_resid)))
            cells[0] = Cell(f"F Statistic (df = {one}; {two})")
        rows.append(cells)
    for model in models:
        known = {"df1", "df2"} <= {key for key, _ in model}
        checked = (("R2", None), ("R2_adj", None), ("F", None)) if known else ()
        said.append(Said("overall-model", model, checked))
    return rows


def steps(rng: np.random.Generator) -> Drawn:
    """A hierarchical regression, a row a step."""
    author = hand(rng)
    fits, _, _ = nested(rng)
    numbers = Numbers()
    heads = ("R2", "R2_adj", "R2_change", "F_change", "df1", "df2", "p")
    titles = {
        "R2": author.pick(*R2),
        "R2_adj": author.pick(*ADJUSTED),
        "R2_change": author.pick("ΔR²", "Δ<i>R</i>²", "R² change", "R Square Change"),
        "F_change": author.pick("ΔF", "F change", "Δ<i>F</i>"),
        "df1": "df1",
        "df2": "df2",
        "p": author.pick("p", "Sig. F Change", "<i>p</i>"),
    }
    rows = [[Cell(author.pick("Model", "Step", "")), *(Cell(titles[key]) for key in heads)]]
    said = []
    before, k = 0.0, 0
    for number, fit in enumerate(fits, start=1):
        df1, df2 = int(fit.df_model) - k, int(fit.df_resid)
        change = fit.rsquared - before
        F = change / df1 / ((1 - fit.rsquared) / df2)
        sign, p = author.p(float(stats.f.sf(F, df1, df2)))
        literals = {
            "R2": author.share(fit.rsquared, 3),
            "R2_adj": author.share(fit.rsquared_adj, 3),
            "R2_change": author.share(change, 3),
            "F_change": author.number(F, 2),
            "df1": str(df1),
            "df2": str(df2),
            "p": p,
        }
        readings: Readings = {}
        cells = [Cell(author.pick("Step {}", "{}", "Model {}").format(number))]
        for key in heads:
            slot, readings[key, None] = numbers.put(literals[key])
            cells.append(Cell((sign if key == "p" else "") + slot))
        rows.append(cells)
        checked = tuple((key, None) for key in ("R2", "R2_change", "F_change", "p"))
        said.append(Said("model-change", readings, checked))
        before, k = fit.rsquared, int(fit.df_model)
    return Drawn("steps", "Table 6. Steps", rows, 1, [], numbers.printed, said)


def key_values(rng: np.random.Generator) -> Drawn:
    author = hand(rng)
    fit = regression(rng, int(rng.integers(1, 5)), int(rng.integers(15, 200)))
    numbers = Numbers()
    readings: Readings = {}
    pairs = [
        (author.pick(*R2), "R2", author.share(fit.rsquared, 3)),
        (author.pick(*ADJUSTED), "R2_adj", author.share(fit.rsquared_adj, 3)),
        (author.pick(*CASES), "n", str(int(fit.nobs))),
        (author.pick(*F_NAMES), "F", author.number(fit.fvalue, 2)),
        (author.pick("df1", "Df Model"), "df1", str(int(fit.df_model))),
        (author.pick("df2", "Residual df", "Df Residuals"), "df2", str(int(fit.df_resid))),
        (author.pick("p", "p-value", "Significance F", "Prob > F"), "p", ""),
        (author.pick("RMSE", "Std. Error of the Estimate", "Residual standard error"), "s",
         author.number(float(np.sqrt(fit.mse_resid)), 3)),
    ]  # fmt: skip
    if author.chance(0.3):
        pairs.insert(0, ("Multiple R", "R", author.share(float(np.sqrt(fit.rsquared)), 3)))
    cells: list[Cell] = []
    for label, key, literal in pairs:
        sign, text = author.p(float(fit.f_pvalue)) if key == "p" else ("", literal)
        slot, readings[key, None] = numbers.put(text)
        cells += [Cell(label), Cell(sign + slot)]
    if author.chance(0.5):
        rows = [[Cell("Statistic"), Cell("Value")]]
        rows += [cells[i : i + 2] for i in range(0, len(cells), 2)]
    else:
        rows = [[Cell("Statistic"), Cell("Value"), Cell("Statistic"), Cell("Value")]]
        rows += [cells[i : i + 4] for i in range(0, len(cells) - len(cells) % 4, 4)]
        if len(cells) % 4:
            rows.append([*cells[-2:], Cell(""), Cell("")])
    checked = tuple((key, None) for key in ("R2", "R2_adj", "F", "p"))
    said = [Said("overall-model", readings, checked)]
    return Drawn(
        "labels and values", "Table 7. Summary of the model", rows, 1, [], numbers.printed, said
    )


def correlations(rng: np.random.Generator) -> Drawn:
    author = hand(rng)
    k, n = int(rng.integers(3, 8)), int(rng.integers(20, 300))
    mixing = rng.normal(size=(k, k)) * 0.5 + np.eye(k)
    data = rng.normal(size=(n, k)) @ mixing
    numbers = Numbers()
    labels = names(rng, PREDICTORS, k)
    with_means = author.chance(0.4)
    numbered = author.chance(0.7)
    heads = [Cell("Variable")] + ([Cell("M"), Cell("SD")] if with_means else [])
    heads += [Cell(str(i + 1) if numbered else labels[i]) for i in range(k)]
    rows, said = [heads], []
    cases, place = numbers.put(str(n))
    diagonal = author.pick("—", "1", "–", "")
    for i in range(k):
        cells = [Cell(f"{i + 1}. {labels[i]}" if numbered else labels[i])]
        if with_means:
            for value in (float(data[:, i].mean() * 3 + 9), float(data[:, i].std(ddof=1))):
                cells.append(Cell(author.number(value, 2)))
        for j in range(k):
            if j >= i:
                cells.append(Cell(diagonal if i == j else ""))
                continue
            r, p = stats.pearsonr(data[:, i], data[:, j])
            slot, where = numbers.put(author.share(float(r), 2))
            cells.append(Cell(slot + author.stars(float(p))))
            said.append(Said("correlation", {("r", None): where, ("n", None): place}))
        rows.append(cells)
    caption = f"Table 8. Correlations (<i>N</i> = {cases})"
    return Drawn("correlations", caption, rows, 1, [author.legend()], numbers.printed, said)
