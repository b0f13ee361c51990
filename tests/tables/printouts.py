"""Generated printouts in the layouts of common statistics programs."""

from __future__ import annotations

from collections.abc import Callable

import numpy as np

from tables.coefficients import Readings
from tables.drawn import Cell, Drawn, Numbers, Said, filled
from tables.fits import PREDICTORS, names, regression, variance
from tables.hand import hand

_SIGNIF = "Signif. codes:  0 ‘***’ 0.001 ‘**’ 0.01 ‘*’ 0.05 ‘.’ 0.1 ‘ ’ 1"


def _words(rng: np.random.Generator, count: int) -> list[str]:
    return [
        name.lower().split(" ")[0].strip(",").replace("²", "2")
        for name in names(rng, PREDICTORS, count)
    ]


def _significant(value: float, digits: int) -> str:
    return f"{value:.{digits}g}"


def _p(value: float) -> tuple[str, str]:
    return ("< ", "2e-16") if value < 2e-16 else ("", _significant(value, 3))


def _mark(value: float) -> str:
    for level, mark in ((0.001, "***"), (0.01, "**"), (0.05, "*"), (0.1, ".")):
        if value < level:
            return mark
    return ""


def _right(rows: list[list[str]], numbers: list[str], gap: str) -> list[str]:
    """Columns set flush right, the first flush left; slots are as wide as their numbers."""
    full = [[filled(cell, numbers) for cell in row] for row in rows]
    widths = [max(len(row[i]) for row in full) for i in range(len(full[0]))]
    lines = []
    for row, shown in zip(rows, full, strict=True):
        cells = []
        for i, (slot, text) in enumerate(zip(row, shown, strict=True)):
            space = " " * (widths[i] - len(text))
            cells.append(
                slot + space
                if i == 0 or (i == len(row) - 1 and not text.strip("*. "))
                else space + slot
            )
        lines.append(gap.join(cells).rstrip())
    return lines


def least_squares(rng: np.random.Generator) -> Drawn:
    """As R's summary of a linear model."""
    count, n = int(rng.integers(1, 6)), int(rng.integers(15, 200))
    fit = regression(rng, count, n)
    numbers = Numbers()
    rows = [["", "Estimate", "Std. Error", "t value", "Pr(>|t|)", ""]]
    said = []
    for i, name in enumerate(["(Intercept)", *_words(rng, count)]):
        readings: Readings = {}
        b, readings["b", None] = numbers.put(f"{fit.params[i]:.5f}")
        se, readings["se", None] = numbers.put(f"{fit.bse[i]:.5f}")
        t, readings["t", None] = numbers.put(f"{fit.tvalues[i]:.3f}")
        sign, literal = _p(fit.pvalues[i])
        p, readings["p", None] = numbers.put(literal)
        rows.append([name, b, se, t, sign + p, _mark(fit.pvalues[i])])
        said.append(Said("coefficient", readings, (("t", None),)))
    lines = ["Coefficients:", *_right(rows, numbers.printed, " "), "---", _SIGNIF, ""]
    model: Readings = {}
    s, model["s", None] = numbers.put(_significant(np.sqrt(fit.mse_resid), 4))
    df2, model["df2", None] = numbers.put(str(int(fit.df_resid)))
    r2, model["R2", None] = numbers.put(_significant(fit.rsquared, 4))
    adjusted, model["R2_adj", None] = numbers.put(_significant(fit.rsquared_adj, 4))
    F, model["F", None] = numbers.put(_significant(fit.fvalue, 4))
    df1, model["df1", None] = numbers.put(str(int(fit.df_model)))
    p, model["p", None] = numbers.put(_significant(max(fit.f_pvalue, 2.3e-16), 4))
    lines += [
        f"Residual standard error: {s} on {df2} degrees of freedom",
        f"Multiple R-squared:  {r2},\tAdjusted R-squared:  {adjusted} ",
        f"F-statistic: {F} on {df1} and {int(fit.df_resid)} DF,  p-value: {p}",
    ]
    small = fit.f_pvalue < 2.3e-16
    said.append(Said("overall-model", model, (("R2", None), ("F", None), ("R2_adj", None))))
    if small:
        lines[-1] = lines[-1].replace("p-value: ", "p-value: < ")
        numbers.printed[-1] = "2.2e-16"
    return _drawn("R regression", lines, numbers, said)


def analysis(rng: np.random.Generator) -> Drawn:
    """As R's table of variance, or as a data frame prints it."""
    author = hand(rng)
    factors = 1 if author.chance(0.5) else 2
    effects, error, _ = variance(rng, factors)
    numbers = Numbers()
    frame = author.chance(0.4)
    rows = [["", "df", "sum_sq", "mean_sq", "F", "PR(>F)", ""] if frame else
            ["", "Df", "Sum Sq", "Mean Sq", "F value", "Pr(>F)", ""]]  # fmt: skip
    readings: Readings = {}
    for row in effects:
        term = None if factors == 1 else row.label.lower().replace(" ", "")
        ss, readings["ss", term or "model"] = numbers.put(f"{row.ss:.{6 if frame else 2}f}")
        ms, readings["ms", term or "model"] = numbers.put(f"{row.ms:.{6 if frame else 3}f}")
        df, readings["df1", term] = numbers.put(f"{row.df}.0" if frame else str(row.df))
        F, readings["F", term] = numbers.put(f"{row.F:.{6 if frame else 3}f}")
        sign, literal = ("", f"{row.p:.6f}") if frame else _p(row.p)
        p, readings["p", term] = numbers.put(literal)
        name = row.label.lower().replace(" ", "")
        rows.append([name, df, ss, ms, F, sign + p, "" if frame else _mark(row.p)])
    ss, readings["ss", "error"] = numbers.put(f"{error.ss:.{6 if frame else 2}f}")
    ms, readings["ms", "error"] = numbers.put(f"{error.ms:.{6 if frame else 3}f}")
    df, readings["df2", None] = numbers.put(f"{error.df}.0" if frame else str(error.df))
    none = "NaN" if frame else ""
    rows.append(["Residual" if frame else "Residuals", df, ss, ms, none, none, ""])
    lines = _right(rows, numbers.printed, "  " if frame else " ")
    lines += [] if frame else ["---", _SIGNIF]
    said = [Said("anova-table", readings, tuple(k for k in readings if k[0] in {"F", "ms", "ss"}))]
    return _drawn("printed anova", lines, numbers, said)


def summary_block(rng: np.random.Generator) -> Drawn:
    """As the summary of a fit in Python: labels and values in two columns, then coefficients."""
    count, n = int(rng.integers(1, 6)), int(rng.integers(15, 200))
    fit = regression(rng, count, n)
    numbers = Numbers()
    model: Readings = {}

    def put(key: str, literal: str) -> str:
        slot, model[key, None] = numbers.put(literal)
        return slot

    left = [
        ("Dep. Variable:", "wear"),
        ("Model:", "OLS"),
        ("Method:", "Least Squares"),
        ("No. Observations:", put("n", str(n))),
        ("Df Residuals:", put("df2", str(int(fit.df_resid)))),
        ("Df Model:", put("df1", str(int(fit.df_model)))),
    ]
    right = [
        ("R-squared:", put("R2", f"{fit.rsquared:.3f}")),
        ("Adj. R-squared:", put("R2_adj", f"{fit.rsquared_adj:.3f}")),
        ("F-statistic:", put("F", f"{fit.fvalue:#.4g}".rstrip("."))),
        ("Prob (F-statistic):", put("p", f"{fit.f_pvalue:#.3g}")),
        ("Log-Likelihood:", f"{fit.llf:.2f}"),
        ("AIC:", f"{fit.aic:.1f}"),
    ]
    rule = "=" * 78
    lines = [f"{'OLS Regression Results':^78}", rule]
    for (a, b), (c, d) in zip(left, right, strict=True):
        pad = 36 - len(a) - len(filled(b, numbers.printed))
        gap = 36 - len(c) - len(filled(d, numbers.printed))
        lines.append(f"{a}{' ' * pad}{b}   {c}{' ' * gap}{d}")
    lines.append(rule)
    rows = [["", "coef", "std err", "t", "P>|t|", "[0.025", "0.975]"]]
    said = [Said("overall-model", model, (("R2", None), ("F", None), ("R2_adj", None)))]
    limits = fit.conf_int()
    for i, name in enumerate(["const", *_words(rng, count)]):
        readings: Readings = {}
        cells = [name]
        for key, literal in (
            ("b", f"{fit.params[i]:.4f}"),
            ("se", f"{fit.bse[i]:.3f}"),
            ("t", f"{fit.tvalues[i]:.3f}"),
            ("p", f"{fit.pvalues[i]:.3f}"),
            ("ci_low", f"{limits[i][0]:.3f}"),
            ("ci_high", f"{limits[i][1]:.3f}"),
        ):
            slot, readings[key, None] = numbers.put(literal)
            cells.append(slot)
        rows.append(cells)
        said.append(Said("coefficient", readings))
    table = _right(rows, numbers.printed, "      ")
    lines += [table[0], "-" * 78, *table[1:], rule]
    return _drawn("Python summary", lines, numbers, said)


def regress_block(rng: np.random.Generator) -> Drawn:
    """Sums of squares on the left, statistics on the right, then coefficients."""
    count, n = int(rng.integers(1, 6)), int(rng.integers(15, 400))
    fit = regression(rng, count, n)
    numbers = Numbers()
    model: Readings = {}

    def put(quantity: str, literal: str, width: int, term: str | None = None) -> str:
        slot, model[quantity, term] = numbers.put(literal)
        return " " * (width - len(literal)) + slot

    df1, df2 = int(fit.df_model), int(fit.df_resid)
    side = [
        f"Number of obs   = {put('n', str(n), 9)}",
        f"F({put('df1', str(df1), 1)}, {put('df2', str(df2), 1)}){' ' * (10 - len(f'{df1}{df2}'))}"
        f" = {put('F', f'{fit.fvalue:.2f}', 9)}",
        f"Prob > F        = {put('p', f'{fit.f_pvalue:.4f}', 9)}",
        f"R-squared       = {put('R2', f'{fit.rsquared:.4f}', 9)}",
        f"Adj R-squared   = {put('R2_adj', f'{fit.rsquared_adj:.4f}', 9)}",
        f"Root MSE        = {put('s', f'{np.sqrt(fit.mse_resid):.4f}', 9)}",
    ]

    def sums(name: str, ss: float, df: str, ms: str, term: str) -> str:
        return f"{name:>12} | {put('ss', f'{ss:.5f}', 11, term)} {df} {ms}   "

    def mean(ss: float, df: int, term: str) -> str:
        return put("ms", f"{ss / df:.5f}", 11, term)

    whole = fit.ess + fit.ssr
    rule = "-------------+----------------------------------   "
    left = [
        "      Source |       SS           df       MS      ",
        rule,
        sums("Model", fit.ess, f"{df1:>9}", mean(fit.ess, df1, "model"), "model"),
        sums("Residual", fit.ssr, f"{df2:>9}", mean(fit.ssr, df2, "error"), "error"),
        rule,
        sums(
            "Total",
            whole,
            put("df", str(n - 1), 9, "total"),
            f"{whole / (n - 1):>11.5f}",
            "total",
        ),
    ]
    lines = [a + b for a, b in zip(left, side, strict=True)]
    lines += ["", "-" * 78]
    lines.append("        wear | Coefficient  Std. err.      t    P>|t|     [95% conf. interval]")
    lines.append("-------------+" + "-" * 64)
    checked = (("R2", None), ("F", None), ("R2_adj", None), ("ss", "model"), ("ss", "error"))
    said = [Said("anova-table", model, checked)]
    limits = fit.conf_int()
    for i, name in [*enumerate(_words(rng, count), start=1), (0, "_cons")]:
        readings: Readings = {}
        cells = []
        for key, literal, width in (
            ("b", f"{fit.params[i]:.6f}", 12),
            ("se", f"{fit.bse[i]:.6f}", 11),
            ("t", f"{fit.tvalues[i]:.2f}", 9),
            ("p", f"{fit.pvalues[i]:.3f}", 8),
            ("ci_low", f"{limits[i][0]:.6f}", 14),
            ("ci_high", f"{limits[i][1]:.6f}", 12),
        ):
            slot, readings[key, None] = numbers.put(literal)
            cells.append(" " * max(1, width - len(literal)) + slot)
        lines.append(f"{name:>12} |{''.join(cells)}")
        said.append(Said("coefficient", readings))
    return _drawn("regress block", [*lines, "-" * 78], numbers, said)


def _drawn(kind: str, lines: list[str], numbers: Numbers, said: list[Said]) -> Drawn:
    return Drawn(kind, "", [[Cell(line)] for line in lines], 0, [], numbers.printed, said, True)


def _lines(drawn: Drawn) -> list[str]:
    return [filled(row[0].text, drawn.numbers) for row in drawn.rows]


def _fenced(prefix: str) -> Callable[[Drawn], str]:
    def write(drawn: Drawn) -> str:
        return "\n".join(
            [
                "The fit:",
                "",
                "```",
                *((prefix + line).rstrip() for line in _lines(drawn)),
                "```",
                "",
            ]
        )

    return write


def _plain(drawn: Drawn) -> str:
    return "The fit is this.\n\n" + "\n".join(_lines(drawn)) + "\n\nSo it is.\n"


def _pre(drawn: Drawn) -> str:
    text = "\n".join(_lines(drawn)).replace("&", "&amp;").replace("<", "&lt;").replace(">", "&gt;")
    return f"<p>The fit:</p><pre>{text}</pre>\n"


def _latex(drawn: Drawn) -> str:
    return "\\begin{verbatim}\n" + "\n".join(_lines(drawn)) + "\n\\end{verbatim}\n"


def _rst(drawn: Drawn) -> str:
    return "The fit::\n\n" + "\n".join("    " + line for line in _lines(drawn)) + "\n\nSo it is.\n"


WRITERS: dict[str, tuple[str, Callable[[Drawn], str]]] = {
    "plain printout": ("plain", _plain),
    "fenced": ("markdown", _fenced("")),
    "fenced ##": ("markdown", _fenced("## ")),
    "fenced #>": ("markdown", _fenced("#> ")),
    "pre": ("html", _pre),
    "verbatim": ("latex", _latex),
    "literal block": ("rst", _rst),
}
