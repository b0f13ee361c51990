"""Manuscripts of the footing team: piles, surfaces, mud and floods."""

from __future__ import annotations

import numpy as np
from numpy.random import RandomState

from making import fits
from making.paper import Paper
from making.printouts import aov_summary, commented, lm_summary
from making.words import Slip, digit, swap


def papers() -> list[Paper]:
    """Return the manuscripts of this team."""
    return [pile_settlement(), slip_resistance(), mud_temperature(), causeway_flooding()]


def pile_settlement() -> Paper:
    """Return a LaTeX manuscript with a wrong sum in the table and a slope's t misprinted."""
    draw = RandomState(201)
    groups = {
        "peat": draw.normal(31, 9, 16),
        "clay": draw.normal(24, 9, 16),
        "silt": draw.normal(20, 9, 16),
        "sand": draw.normal(14, 9, 16),
    }
    table = fits.anova(groups)
    depth, load = draw.uniform(2, 9, 64), draw.normal(12, 3, 64)
    settled = 40 - 2.9 * depth + 0.9 * load + draw.normal(0, 8.5, 64)
    fit = fits.least_squares(settled, {"depth": depth, "load": load})
    values = {"a": table, "soil": table.effects[0], "fit": fit}
    slips = {
        "total": Slip(
            "a.ss_total", "2", swap(1), "ss", "digits swapped", ("anova-sums", "r2-from-ss")
        ),
        "t": Slip("fit.load.t", "2", digit(0, "8"), "t", "a digit wrong", ("p-from-t",)),
    }
    return Paper("pile-settlement.tex", values, PILE_SETTLEMENT, slips)


PILE_SETTLEMENT = r"""
\documentclass{article}
\usepackage{booktabs,siunitx}
\title{How far boardwalk piles sink, and where}
\author{Footing team\\Brackwater Institute for Tidal Paths}
\begin{document}
\maketitle
\begin{abstract}
Sixty-four piles were levelled every year for six years. Soil accounted for
⟦soil.eta2_partial %0⟧\,\% of the variance in settlement, $F(3, 60) = ⟦soil.F 2⟧$, $p < .001$.
Deep piles sank less.
\end{abstract}

\section{Design}
Sixteen piles stood in each of four soils. A pile is called settled once it has sunk by less than 1\,mm in a year;
$p = \SI{2.4}{bar}$ was the pump pressure while driving, and the rig has $\mathit{df} = 3$ axes. We compared the soils by a
one-way analysis of variance, and regressed settlement (mm) on depth (m) and load (kN) over all piles ($N = 64$).

\section{Results}
Settlement by soil is in Table~\ref{tab:anova}.

\begin{table}[ht]
\centering
\caption{Analysis of variance of settlement after six years}
\label{tab:anova}
\begin{tabular}{lrrrrr}
\toprule
Source & SS & df & MS & $F$ & $p$ \\
\midrule
Soil & ⟦soil.ss 2⟧ & 3 & ⟦soil.ms 2⟧ & ⟦soil.F 2⟧ & $<.001$ \\
Residual & ⟦a.ss_error 2⟧ & 60 & ⟦a.ms_error 2⟧ & & \\
\midrule
Total & ⟦!total⟧ & 63 & & & \\
\bottomrule
\end{tabular}
\end{table}

Over all piles the two predictors explained about half of the variance
($R^{2} = ⟦fit.R2 2⟧$, $R^{2}_{\mathrm{adj}} = ⟦fit.R2_adj 2⟧$, $F_{2,61} = ⟦fit.F 2⟧$, $p < 0.001$).
Each metre of depth saved about three and a half millimetres ($b = ⟦fit.depth.b 2⟧$, $SE = ⟦fit.depth.se 2⟧$,
$t_{61} = ⟦fit.depth.t 2⟧$, $p < 0.001$), and load cost one millimetre a kilonewton
($t_{61} = ⟦!t⟧$, $p ⟦fit.load.p 0p⟧$).\footnote{Without the two piles hit by a barge:
$F(1, 60) = 1.02$, $p = .317$ for the year of driving.}

\section{What follows}
Peat needs nine metres. Under $H_0$ the ratio would follow $\mathrm{F}(2, n - 3)$; it does not.
\end{document}
"""


def slip_resistance() -> Paper:
    """Return a Markdown manuscript in which the effect size of an interaction is misread."""
    draw = RandomState(202)
    levels = np.array([[62, 44], [58, 49], [66, 61]])
    cells = draw.normal(0, 6, (3, 2, 12)) + levels[:, :, None]
    table = fits.two_way(cells, ("Surface", "Wetness"))
    means, sds = cells.mean(axis=2), cells.std(axis=2, ddof=1)
    pair = fits.pooled_t(cells[2, 1], cells[0, 1])
    surface, wetness, both = table.effects
    values: dict[str, object] = {"a": table, "s": surface, "w": wetness, "sw": both, "pair": pair}
    for i, name in enumerate(("plain", "grooved", "gritted")):
        for j, state in enumerate(("dry", "wet")):
            values |= {f"m_{name}_{state}": means[i, j], f"sd_{name}_{state}": sds[i, j]}
    slips = {
        "eta": Slip(
            "sw.eta2_partial", ".2", swap(1), "eta2_partial", "digits swapped", ("eta2-partial",)
        )
    }
    return Paper("slip-resistance.md", values, SLIP_RESISTANCE, slips, minus="−")


SLIP_RESISTANCE = """
# Grooves or grit? Slip resistance of three deckings, dry and wet

*Footing team, Brackwater Institute for Tidal Paths*

## Abstract

A pendulum was swung over 72 boards of three deckings, half of them wet. Grit kept its grip in the
wet: the interaction of surface and wetness was reliable, *F*(2, 66) = ⟦sw.F 2⟧, *p* ⟦sw.p p⟧.

## Method

Three surfaces (plain, grooved, gritted) were crossed with two states (dry, wet), twelve boards in
each of the 3 × 2 cells. A value below 36 counts as slippery. Surfaces are coded F1 (plain), F2
(grooved) and F3 (gritted) in the yard's list, and boards G(1, 1) to G(3, 24).

> Report as: F(df1, df2) = x.xx, p = .xxx, ηp² = .xx. Never write p = .000; write p < .001.

That is the institute's rule and we keep to it. Variances were alike across cells.

## Results

Table 1. Pendulum values, *M* (*SD*)

| Surface | Dry | Wet |
|---|---:|---:|
| Plain | ⟦m_plain_dry 1⟧ (⟦sd_plain_dry 1⟧) | ⟦m_plain_wet 1⟧ (⟦sd_plain_wet 1⟧) |
| Grooved | ⟦m_grooved_dry 1⟧ (⟦sd_grooved_dry 1⟧) | ⟦m_grooved_wet 1⟧ (⟦sd_grooved_wet 1⟧) |
| Gritted | ⟦m_gritted_dry 1⟧ (⟦sd_gritted_dry 1⟧) | ⟦m_gritted_wet 1⟧ (⟦sd_gritted_wet 1⟧) |

There was a main effect of surface, *F*(2, 66) = ⟦s.F 2⟧, *p* < .001, ηp² = ⟦s.eta2_partial .2⟧,
and of wetness, *F*(1, 66) = ⟦w.F 2⟧, *p* < .001, ηp² = ⟦w.eta2_partial .2⟧, and an interaction,
*F*(2, 66) = ⟦sw.F 2⟧, *p* ⟦sw.p p⟧, ηp² = ⟦!eta⟧.

Table 2. Analysis of variance

| Source | SS | df | MS | F | p |
|---|---:|---:|---:|---:|---:|
| Surface | ⟦s.ss 2⟧ | 2 | ⟦s.ms 2⟧ | ⟦s.F 2⟧ | < .001 |
| Wetness | ⟦w.ss 2⟧ | 1 | ⟦w.ms 2⟧ | ⟦w.F 2⟧ | < .001 |
| Surface × Wetness | ⟦sw.ss 2⟧ | 2 | ⟦sw.ms 2⟧ | ⟦sw.F 2⟧ | ⟦sw.p .3⟧ |
| Residual | ⟦a.ss_error 2⟧ | 66 | ⟦a.ms_error 2⟧ | — | — |
| **Total** | **⟦a.ss_total 2⟧** | **71** | — | — | — |

In the wet, gritted boards beat plain ones by a wide margin, *t*(22) = ⟦pair.value 2⟧, *p* < .001,
*d* = ⟦pair.estimate 2⟧.

## Discussion

Grooves help a little, grit helps much. Grit costs 0.45 a board more and blunts shoes; with
n = 12 boards a cell we cannot tell how long it lasts.
"""


def mud_temperature() -> Paper:
    """Return an R Markdown report without an error, printouts and prose side by side."""
    draw = RandomState(203)
    n = 58
    air, sun = draw.normal(11, 5, n), draw.uniform(0, 9, n)
    mud = 5 + 0.55 * air + 0.3 * sun + draw.normal(0, 2.1, n)
    fit = fits.least_squares(mud, {"air": air, "sun": sun})
    sites = {
        name: draw.normal(level, 2.5, 12) for name, level in zip("ABC", (9, 11, 12.5), strict=True)
    }
    table = fits.anova(sites)
    values = {
        "fit": fit,
        "a": table,
        "site": table.effects[0],
        "lm_print": commented(lm_summary(fit, ("air", "sun"))),
        "aov_print": commented(aov_summary(table, ("site",))),
    }
    return Paper("mud-temperature.Rmd", values, MUD_TEMPERATURE)


MUD_TEMPERATURE = """
---
title: "Mud temperature under the boards"
author: "Footing team, Brackwater Institute for Tidal Paths"
output: html_document
---

```{r setup, include=FALSE}
knitr::opts_chunk$set(comment = "##")
p_line <- function(f, a, b) sprintf("F(%d, %d) = %.2f, p = %.3f", a, b, f, pf(f, a, b, lower = FALSE))
```

## Why

Lugworms stop casting below 8 °C, and the ragged mud they leave carries the piles worse. We ask how well the
temperature of the mud (at 10 cm) follows from the air and the sun of the day before.

## How

Fifty-eight days between March and November, one reading a day at t = 12:00. `r nrow(days)` days are left after the
logger failed twice.

## What we saw

```{r fit}
summary(lm(mud ~ air + sun, data = days))
```

```
⟦lm_print⟧
```

Air and sun explained ⟦fit.R2 %0⟧% of the variance, $F(2, 55) = ⟦fit.F 1⟧$, $p < .001$. A degree of air is worth
⟦fit.air.b 2⟧ of a degree in the mud ($SE = ⟦fit.air.se 2⟧$, $t(55) = ⟦fit.air.t 2⟧$, $p < .001$), an hour of sun
⟦fit.sun.b 2⟧ of a degree ($SE = ⟦fit.sun.se 2⟧$, $t(55) = ⟦fit.sun.t 2⟧$, $p ⟦fit.sun.p p⟧$).

Three sites were then read on twelve days each:

```
⟦aov_print⟧
```

so that sites differ, $F(2, 33) = ⟦site.F 2⟧$, $p ⟦site.p p⟧$; the last model in the appendix had
$F(`r df1`, `r df2`) = `r f`$, p < .05.

## What we would do next

Put one logger per site and leave it. With lr = 0.05 and beta = 0.9 the filter forgets in a week.
"""


def causeway_flooding() -> Paper:
    """Return a Quarto manuscript in which a coefficient has lost its minus sign."""
    draw = RandomState(204)
    n = 120
    height, wind = draw.normal(1.9, 0.35, n), draw.normal(7, 3, n)
    pressure = draw.normal(1008, 9, n)
    noise = draw.normal(0, 9, n)
    minutes = -20 + 22 * height + 1.1 * wind - 0.35 * (pressure - 1008) + noise
    fit = fits.least_squares(minutes, {"height": height, "wind": wind, "pressure": pressure})
    values = {"fit": fit, "r": fits.correlation(wind, minutes)}
    slips = {
        "b": Slip(
            "fit.pressure.b",
            "2",
            lambda literal: literal.lstrip("−"),
            "b",
            "sign lost",
            ("signs", "ci-centre", "t-from-b-se", "ci-from-se"),
        )
    }
    return Paper("causeway-flooding.qmd", values, CAUSEWAY_FLOODING, slips, minus="−")


CAUSEWAY_FLOODING = """
---
title: "When will the causeway be under water?"
author: "Footing team, Brackwater Institute for Tidal Paths"
format: html
---

## Abstract

Minutes under water were predicted for 120 spring tides. Height of the tide, wind and air pressure
together explained more than half of the variance (adjusted *R*^2^ = ⟦fit.R2_adj .3⟧).

## Data

```{python}
#| echo: false
tides = read_tides("gauge.csv")  # 120 rows; p = 0.05 is the step of the gauge in metres
msg = f"F({df1}, {df2}) = {F:.2f}, p = {p:.3f}"
```

The gauge at the ferry steps gave the height (m) and the minutes; wind (m/s) and pressure (hPa) came
from the harbour office. All 120 tides are used: the predictors have no gaps.

## Results

The model fitted well, *R*^2^ = ⟦fit.R2 .3⟧, *F*(3, 116) = ⟦fit.F 2⟧, *p* < .001. Every coefficient mattered:

- height: *b* = ⟦fit.height.b 2⟧, *SE* = ⟦fit.height.se 2⟧, *t*(116) = ⟦fit.height.t 2⟧, *p* < .001, 95% CI [⟦fit.height.low 2⟧, ⟦fit.height.high 2⟧]
- wind: *b* = ⟦fit.wind.b 2⟧, *SE* = ⟦fit.wind.se 2⟧, *t*(116) = ⟦fit.wind.t 2⟧, *p* < .001, 95% CI [⟦fit.wind.low 2⟧, ⟦fit.wind.high 2⟧]
- pressure: *b* = ⟦!b⟧, *SE* = ⟦fit.pressure.se 2⟧, *t*(116) = ⟦fit.pressure.t 2⟧, *p* ⟦fit.pressure.p p⟧, 95% CI [⟦fit.pressure.low 2⟧, ⟦fit.pressure.high 2⟧]

Wind alone went with the minutes, *r*(118) = ⟦r.value .2⟧, *p* < .001, 95% CI [⟦r.low .2⟧, ⟦r.high .2⟧].

The sign at the gate now reads `{python} minutes(height, wind)` minutes, rounded up to five.

## Discussion

High pressure holds the water down, as the old hands say. The wheel route R2 (£2,857 a year) floods
first; F = 1.9% of its length is lower than the gauge's zero.
"""
