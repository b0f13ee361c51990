"""Console printouts in the manner of common statistics programs."""

from __future__ import annotations

from making.fits import Anova, Fit


def _mark(p: float) -> str:
    for level, mark in ((0.001, "***"), (0.01, "**"), (0.05, "*"), (0.1, ".")):
        if p < level:
            return mark
    return ""


def _p(p: float) -> str:
    return "< 2e-16" if p < 2e-16 else f"{p:.3g}"


def _significance() -> list[str]:
    return ["---", "Signif. codes:  0 ‘***’ 0.001 ‘**’ 0.01 ‘*’ 0.05 ‘.’ 0.1 ‘ ’ 1"]


def lm_summary(fit: Fit, names: tuple[str, ...]) -> list[str]:
    """Print a least-squares fit as R's summary of a linear model does."""
    rows = [("", "Estimate", "Std. Error", "t value", "Pr(>|t|)", "")]
    for name, row in zip(("(Intercept)", *names), fit.coefficients, strict=True):
        numbers = (f"{row.b:.5f}", f"{row.se:.5f}", f"{row.t:.3f}", _p(row.p))
        rows.append((name, *numbers, _mark(row.p)))
    widths = [max(len(row[j]) for row in rows) for j in range(6)]
    lines = ["Coefficients:"]
    for first, *cells, mark in rows:
        right = " ".join(cell.rjust(width) for cell, width in zip(cells, widths[1:], strict=False))
        lines.append(f"{first.ljust(widths[0])} {right} {mark}".rstrip())
    return [
        *lines,
        *_significance(),
        "",
        f"Residual standard error: {fit.s:.4g} on {fit.df2} degrees of freedom",
        f"Multiple R-squared:  {fit.R2:.4g},\tAdjusted R-squared:  {fit.R2_adj:.4g} ",
        f"F-statistic: {fit.F:.4g} on {fit.df1} and {fit.df2} DF,  p-value: {fit.p:.4g}",
    ]


def aov_summary(table: Anova, names: tuple[str, ...]) -> list[str]:
    """Print an analysis of variance as R's summary of an aov does."""
    rows = [("", "Df", "Sum Sq", "Mean Sq", "F value", "Pr(>F)", "")]
    for name, line in zip(names, table.effects, strict=True):
        numbers = (f"{line.ss:.1f}", f"{line.ms:.1f}", f"{line.F:.3f}", _p(line.p))
        rows.append((name, f"{line.df}", *numbers, _mark(line.p)))
    error = (f"{table.df_error}", f"{table.ss_error:.1f}", f"{table.ms_error:.1f}")
    rows.append(("Residuals", *error, "", "", ""))
    widths = [max(len(row[j]) for row in rows) for j in range(7)]
    lines = []
    for first, *cells, mark in rows:
        right = " ".join(cell.rjust(width) for cell, width in zip(cells, widths[1:], strict=False))
        lines.append(f"{first.ljust(widths[0])} {right} {mark}".rstrip())
    return [*lines, *_significance()]


def regress_header(fit: Fit, dependent: str, names: tuple[str, ...]) -> list[str]:
    """Print a least-squares fit with sums of squares left and statistics right."""
    rule = "-------------+----------------------------------"
    ms_total = fit.ss_total / (fit.n - 1)
    right = [
        f"Number of obs   = {fit.n:>9}",
        f"F({fit.df1}, {fit.df2})        = {fit.F:>9.2f}",
        f"Prob > F        = {fit.p:>9.4f}",
        f"R-squared       = {fit.R2:>9.4f}",
        f"Adj R-squared   = {fit.R2_adj:>9.4f}",
        f"Root MSE        = {fit.s:>9.4f}",
    ]
    left = [
        "      Source |       SS           df       MS    ",
        rule,
        f"       Model | {fit.ss_model:>11.5f} {fit.df1:>9} {fit.ms_model:>11.5f}",
        f"    Residual | {fit.ss_error:>11.5f} {fit.df2:>9} {fit.ms_error:>11.5f}",
        rule,
        f"       Total | {fit.ss_total:>11.5f} {fit.n - 1:>9} {ms_total:>11.5f}",
    ]
    lines = [f"{a.ljust(48)}   {b}" for a, b in zip(left, right, strict=True)]
    wide = "-" * 78
    lines += ["", wide]
    lines += [
        f"{dependent:>12} | Coefficient  Std. err.      t    P>|t|     [95% conf. interval]",
        "-------------+" + "-" * 64,
    ]
    ordered = [*zip(names, fit.coefficients[1:], strict=True), ("_cons", fit.coefficients[0])]
    for name, row in ordered:
        lines.append(
            f"{name:>12} | {row.b:>11.6f} {row.se:>10.6f} {row.t:>8.2f} {row.p:>7.3f}"
            f" {row.low:>13.6f} {row.high:>11.6f}"
        )
    return [*lines, wide]


def commented(lines: list[str], prefix: str = "## ") -> str:
    """Put a prefix before each line, as literate reports do."""
    return "\n".join((prefix + line).rstrip() for line in lines)
