"""Generated tables of coefficients: one model, several models, logistic models."""

from __future__ import annotations

from typing import Any

import numpy as np

from tables.drawn import Cell, Drawn, Numbers, Said
from tables.fits import PREDICTORS, logistic, names, regression
from tables.hand import Hand, hand, is_exact

HEADS = {
    "b": ("B", "<i>B</i>", "b", "Estimate", "Coef.", "Coefficient", "Unstandardized B"),
    "se": ("SE", "<i>SE</i>", "Std. Error", "S.E.", "SE B", "Std. err."),
    "beta": ("β", "Beta", "Standardized β"),
    "t": ("t", "<i>t</i>", "t value", "t-statistic"),
    "z": ("z", "<i>z</i>", "z value"),
    "p": ("p", "<i>p</i>", "Sig.", "p-value", "Pr(>|t|)"),
    "odds_ratio": ("OR", "Odds ratio", "Exp(B)"),
    "tolerance": ("Tolerance",),
    "vif": ("VIF",),
}
INTERCEPTS = ("(Intercept)", "Constant", "Intercept", "(Constant)")
Readings = dict[tuple[str, str | None], int]


def decimals(value: float) -> int:
    """How many decimals show about three digits of a standard error."""
    return int(np.clip(2 - np.floor(np.log10(abs(value) + 1e-300)), 0, 7))


def one_model(rng: np.random.Generator) -> Drawn:
    author = hand(rng)
    count, n = int(rng.integers(2, 7)), int(rng.integers(25, 300))
    fit = regression(rng, count, n)
    labels = names(rng, PREDICTORS, count)
    columns = ["b", "se", "t", "p"]
    if author.chance(0.35):
        columns.insert(2, "beta")
    interval = author.pick("", "", "one", "two", "two heads")
    if author.chance(0.15):
        columns.remove("t")
    if author.chance(0.15):
        columns.remove("p")
    collinearity = author.chance(0.15)
    joined = "beta" not in columns and author.chance(0.15)
    intercept = author.chance(0.7)
    stars = author.chance(0.3) or "p" not in columns
    numbers = Numbers()
    heads = [Cell(author.pick("Predictor", "Variable", "", "Term"))]
    if joined:
        columns = [column for column in columns if column != "se"]
        heads.append(Cell(author.pick("B (SE)", "b (SE)", "Estimate (SE)")))
        heads += [Cell(author.pick(*HEADS[column])) for column in columns[1:]]
    else:
        heads += [Cell(author.pick(*HEADS[column])) for column in columns]
    heads += _interval_heads(author, interval)
    heads += [Cell("Tolerance"), Cell("VIF")] if collinearity else []
    rows, said = [heads], []
    deviations = np.std(fit.model.exog[:, 1:], axis=0, ddof=1) / np.std(fit.model.endog, ddof=1)
    limits = fit.conf_int()
    order = ([0] if intercept else []) + list(range(1, count + 1))
    if intercept and author.chance(0.3):
        order = [*order[1:], 0]
    for i in order:
        b, se, p = float(fit.params[i]), float(fit.bse[i]), float(fit.pvalues[i])
        d = decimals(se)
        values = {
            "b": author.number(b, d),
            "se": author.number(se, d),
            "t": author.number(float(fit.tvalues[i]), 2),
        }
        readings: Readings = {}
        cells = [Cell(author.pick(*INTERCEPTS) if i == 0 else labels[i - 1])]
        mark = author.stars(p) if stars else ""
        told = False  # whether p tells t
        for column in columns:
            if column == "beta":
                if i == 0:
                    cells.append(Cell(author.blank))
                    continue
                beta = author.share(b * deviations[i - 1], 2)
                slot, readings["beta", None] = numbers.put(beta)
            elif column == "p":
                sign, literal = author.p(p)
                told = is_exact(sign, literal)
                slot, readings["p", None] = numbers.put(literal)
                slot = sign + slot
            else:
                slot, readings[column, None] = numbers.put(values[column])
            text = slot + mark if column == "b" else slot
            if joined and column == "b":
                inner, readings["se", None] = numbers.put(values["se"])
                text += f" ({inner})"
            cells.append(Cell(text))
        cells += _interval(author, numbers, readings, limits[i], d, interval)
        if collinearity:
            cells += _collinearity(author, numbers, readings, rng, i)
        rows.append(cells)
        said.append(Said("coefficient", readings, tuple(_checked(readings, True, told))))
    note, model = _fit_note(author, numbers, fit)
    notes = [note, author.legend()] if stars else [note]
    said.append(model)
    caption = f"Table {rng.integers(1, 9)}. Regression of {author.pick('wear', 'delay', 'yield')}"
    return Drawn("one model", caption, rows, 1, notes, numbers.printed, said)


def _interval_heads(author: Hand, interval: str) -> list[Cell]:
    if interval == "one":
        return [Cell(author.pick("95% CI", "95% CI for B", "95% confidence interval"))]
    if interval == "two":
        return (
            [Cell("LL"), Cell("UL")]
            if author.chance(0.5)
            else [Cell("Lower 95% CI"), Cell("Upper 95% CI")]
        )
    if interval == "two heads":
        return [Cell("2.5 %"), Cell("97.5 %")]
    return []


def _interval(
    author: Hand, numbers: Numbers, readings: Readings, limits: Any, d: int, interval: str
) -> list[Cell]:
    if not interval:
        return []
    low, readings["ci_low", None] = numbers.put(author.number(float(limits[0]), d))
    high, readings["ci_high", None] = numbers.put(author.number(float(limits[1]), d))
    if interval != "one":
        return [Cell(low), Cell(high)]
    between = ("[{}; {}]", "{} to {}") if author.comma else ("[{}, {}]", "{} to {}", "({}, {})")
    return [Cell(author.pick(*between).format(low, high))]


def _collinearity(
    author: Hand, numbers: Numbers, readings: Readings, rng: np.random.Generator, i: int
) -> list[Cell]:
    if i == 0:
        return [Cell(author.blank), Cell(author.blank)]
    tolerance = float(rng.uniform(0.2, 1))
    first, readings["tolerance", None] = numbers.put(author.share(tolerance, 3))
    second, readings["vif", None] = numbers.put(author.number(1 / tolerance, 2))
    return [Cell(first), Cell(second)]


def _checked(readings: Readings, with_df: bool, told: bool) -> list[tuple[str, str | None]]:
    keys = {key for key, _ in readings}
    found: list[tuple[str, str | None]] = []
    if {"b", "se", "t"} <= keys or ({"b", "se", "p"} <= keys and told):
        found += [("b", None), ("se", None)]
    if "t" in keys:
        found.append(("t", None))
    if "p" in keys and with_df and ("t" in keys or {"b", "se"} <= keys):
        found.append(("p", None))
    if "ci_low" in keys and "b" in keys:
        found += [("ci_low", None), ("ci_high", None)]
    if "vif" in keys:
        found += [("vif", None), ("tolerance", None)]
    return found


def _fit_note(author: Hand, numbers: Numbers, fit: Any) -> tuple[str, Said]:
    readings: Readings = {}
    n, readings["n", None] = numbers.put(str(int(fit.nobs)))
    r2, readings["R2", None] = numbers.put(author.share(fit.rsquared, 3))
    adjusted, readings["R2_adj", None] = numbers.put(author.share(fit.rsquared_adj, 3))
    df1, readings["df1", None] = numbers.put(str(int(fit.df_model)))
    df2, readings["df2", None] = numbers.put(str(int(fit.df_resid)))
    F, readings["F", None] = numbers.put(author.number(fit.fvalue, 2))
    sign, literal = author.p(fit.f_pvalue)
    slot, readings["p", None] = numbers.put(literal)
    note = (
        f"<i>N</i> = {n}. <i>R</i>² = {r2}, adjusted <i>R</i>² = {adjusted}, "
        f"<i>F</i>({df1}, {df2}) = {F}, <i>p</i> {sign.strip() or '='} {slot}."
    )
    checked = tuple((key, None) for key in ("R2", "R2_adj", "F", "p", "df1", "df2"))
    return note, Said("overall-model", readings, checked)


def odds(rng: np.random.Generator) -> Drawn:
    author = hand(rng)
    count, n = int(rng.integers(1, 5)), int(rng.integers(80, 400))
    fit = logistic(rng, count, n)
    labels = names(rng, PREDICTORS, count)
    joined = author.chance(0.3)
    numbers = Numbers()
    heads = [Cell("Predictor")]
    heads += [] if joined else [Cell(author.pick("b", "B", "Estimate")), Cell("SE"), Cell("z")]
    heads += [Cell("p")]
    heads += [Cell("OR (95% CI)")] if joined else [Cell("OR"), Cell("95% CI")]
    rows, said = [heads], []
    limits = np.exp(fit.conf_int())
    for i in range(1, count + 1):
        b, se, p = float(fit.params[i]), float(fit.bse[i]), float(fit.pvalues[i])
        readings: Readings = {}
        cells = [Cell(labels[i - 1])]
        if not joined:
            for key, value in (("b", b), ("se", se), ("z", b / se)):
                slot, readings[key, None] = numbers.put(
                    author.number(value, 3 if key != "z" else 2)
                )
                cells.append(Cell(slot))
        sign, literal = author.p(p)
        slot, readings["p", None] = numbers.put(literal)
        cells.append(Cell(sign + slot))
        ratio, readings["odds_ratio", None] = numbers.put(author.number(np.exp(b), 2))
        low, readings["ci_low", None] = numbers.put(author.number(limits[i][0], 2))
        high, readings["ci_high", None] = numbers.put(author.number(limits[i][1], 2))
        mark = "; " if author.comma else ", "
        cells += (
            [Cell(f"{ratio} ({low}{mark}{high})")]
            if joined
            else [Cell(ratio), Cell(f"[{low}{mark}{high}]")]
        )
        rows.append(cells)
        checked = () if joined else (("b", None), ("se", None), ("z", None), ("p", None))
        said.append(Said("coefficient", readings, checked))
    caption = "Table 3. Logistic regression of use"
    return Drawn("logistic", caption, rows, 1, [], numbers.printed, said)


def grouped(rng: np.random.Generator) -> Drawn:
    """Two models under headings of their own."""
    author = hand(rng)
    count, n = int(rng.integers(2, 6)), int(rng.integers(30, 200))
    labels = names(rng, PREDICTORS, count)
    fits = [regression(rng, count, n) for _ in range(2)]
    keys = ["b", "se", "t", "p"] if author.chance(0.5) else ["b", "se", "p"]
    numbers = Numbers()
    titles = [author.pick("Model 1", "Delay", "Wet"), author.pick("Model 2", "Wear", "Dry")]
    rows = [[Cell(""), *(Cell(title, len(keys)) for title in titles)]]
    heads = [author.pick(*HEADS[key]) for key in keys]
    rows.append([Cell("Predictor"), *(Cell(head) for _ in fits for head in heads)])
    said = []
    for i in range(1, count + 1):
        cells = [Cell(labels[i - 1])]
        for fit in fits:
            readings: Readings = {}
            d = decimals(fit.bse[i])
            for key in keys:
                if key == "p":
                    sign, literal = author.p(fit.pvalues[i])
                else:
                    value = {"b": fit.params, "se": fit.bse, "t": fit.tvalues}[key][i]
                    sign, literal = "", author.number(float(value), 2 if key == "t" else d)
                slot, readings[key, None] = numbers.put(literal)
                cells.append(Cell(sign + slot))
            said.append(Said("coefficient", readings, tuple(_checked(readings, False, False))))
        rows.append(cells)
    for key, label in (("R2", author.pick("R²", "<i>R</i>²")), ("R2_adj", "Adjusted R²")):
        cells = [Cell(label)]
        for number, fit in enumerate(fits):
            value = fit.rsquared if key == "R2" else fit.rsquared_adj
            slot, place = numbers.put(author.share(value, 3))
            cells.append(Cell(slot, len(keys)))
            if key == "R2":
                said.append(Said("overall-model", {("R2", None): place}))
            else:
                said[len(said) - 2 + number].readings["R2_adj", None] = place
        rows.append(cells)
    return Drawn("grouped models", "Table 4. Two models", rows, 2, [], numbers.printed, said)
