"""Manuscripts of the timber team: planks, handrails, bolts and lantern posts."""

from __future__ import annotations

from numpy.random import RandomState

from making import fits
from making.paper import Paper
from making.words import Slip, digit, expect, put


def papers() -> list[Paper]:
    """Return the manuscripts of this team."""
    return [plank_wear(), handrail_corrosion(), bolt_torque(), lantern_posts()]


def plank_wear() -> Paper:
    """Return a Markdown manuscript without an error: one regression told three times."""
    draw = RandomState(101)
    n = 96
    footfall, wetting = draw.uniform(20, 180, n), draw.normal(14, 4, n)
    shade = draw.uniform(0, 80, n)
    wear = 0.4 + 0.009 * footfall + 0.055 * wetting - 0.003 * shade + draw.normal(0, 0.62, n)
    fit = fits.least_squares(wear, {"footfall": footfall, "wetting": wetting, "shade": shade})
    expect(fit.wetting.p > 0.05, "wetting does not matter")
    expect(fit.footfall.p < 0.001 and 0.01 < fit.shade.p < 0.05, "footfall and shade matter")
    return Paper("plank-wear.md", {"fit": fit}, PLANK_WEAR, minus="−")


PLANK_WEAR = """
---
title: Footfall, tides and the wear of boardwalk planks
author: Timber team, Brackwater Institute for Tidal Paths
---

# Abstract

Planks of the Long Reach boardwalk were measured after five winters. Footfall, wetting by the tide
and shade together explained ⟦fit.R2 %1⟧% of the variance in wear, *F*(3, 92) = ⟦fit.F 2⟧,
*p* < .001. Walkers wear planks down; the tide, against our expectation, does not.

# Introduction

A plank is replaced when it has lost 6 mm. The yard orders larch two years ahead, so it must know
which stretches will go first. The older yard book says that "wet planks go first" (Section F, 2);
the walkers' committee says that feet do it. We set both against each other.

# Methods

We drew 96 planks by lot from the three thousand or so of Long Reach, stratified by the sections
A(1) to F(2) of the yard's map. Wear was read with a depth gauge at five points and averaged
(repeatability 0.1 mm). Footfall came from the gate counters (thousand passes a year), wetting from
the tide model (hours a week), and shade from a canopy photograph (percent of sky hidden). Wear was
regressed on all three by ordinary least squares with an intercept. Tests were two-sided and
*p* < .05 was considered significant.

# Results

The model fitted well, *R*² = ⟦fit.R2 .2⟧ (adjusted *R*² = ⟦fit.R2_adj .2⟧),
*F*(3, 92) = ⟦fit.F 2⟧, *p* < .001. Wear grew with footfall, *b* = ⟦fit.footfall.b 4⟧,
*SE* = ⟦fit.footfall.se 4⟧, *t*(92) = ⟦fit.footfall.t 2⟧, *p* < .001, and was less under trees,
*b* = ⟦fit.shade.b 4⟧, *SE* = ⟦fit.shade.se 4⟧, *t*(92) = ⟦fit.shade.t 2⟧, *p* ⟦fit.shade.p p⟧.
Wetting added nothing, *t*(92) = ⟦fit.wetting.t 2⟧, *p* ⟦fit.wetting.p p⟧.

Table 1. *Wear of planks (mm in five winters)*

| Predictor | *B* | *SE* | β | *t* | *p* | 95% CI |
|:--|--:|--:|--:|--:|--:|:-:|
| Intercept | ⟦fit.Intercept.b 3⟧ | ⟦fit.Intercept.se 3⟧ | | ⟦fit.Intercept.t 2⟧ | < .001 | [⟦fit.Intercept.low 3⟧, ⟦fit.Intercept.high 3⟧] |
| Footfall | ⟦fit.footfall.b 4⟧ | ⟦fit.footfall.se 4⟧ | ⟦fit.footfall.beta .2⟧ | ⟦fit.footfall.t 2⟧ | < .001 | [⟦fit.footfall.low 4⟧, ⟦fit.footfall.high 4⟧] |
| Wetting | ⟦fit.wetting.b 4⟧ | ⟦fit.wetting.se 4⟧ | ⟦fit.wetting.beta .2⟧ | ⟦fit.wetting.t 2⟧ | ⟦fit.wetting.p .3⟧ | [⟦fit.wetting.low 4⟧, ⟦fit.wetting.high 4⟧] |
| Shade | ⟦fit.shade.b 4⟧ | ⟦fit.shade.se 4⟧ | ⟦fit.shade.beta .2⟧ | ⟦fit.shade.t 2⟧ | ⟦fit.shade.p .3⟧ | [⟦fit.shade.low 4⟧, ⟦fit.shade.high 4⟧] |

*Note.* *N* = 96. *R*² = ⟦fit.R2 .3⟧, adjusted *R*² = ⟦fit.R2_adj .3⟧, *F*(3, 92) = ⟦fit.F 2⟧, *p* < .001.

# Discussion

At 100,000 passes a year a plank loses about 0.8 mm in five winters more than an untrodden one. The
yard can order by the counters. Shade protects, perhaps because shaded wood dries slowly and checks
less; the gate at R2, where the path leaves the alders, would be the place to look.
"""


def handrail_corrosion() -> Paper:
    """Return a LaTeX manuscript in which the F of a step has one wrong digit."""
    draw = RandomState(102)
    n = 84
    age, distance = draw.uniform(2, 25, n), draw.uniform(5, 400, n)
    chloride, zinc = draw.normal(40, 12, n), draw.normal(70, 15, n)
    pits = 12 + 0.9 * age - 0.02 * distance + 0.28 * chloride - 0.22 * zinc + draw.normal(0, 9, n)
    first = fits.least_squares(pits, {"age": age, "distance": distance})
    second = fits.least_squares(
        pits, {"age": age, "distance": distance, "chloride": chloride, "zinc": zinc}
    )
    expect(0.05 < second.zinc.p < 0.06, "zinc just misses the line")
    values = {"first": first, "second": second, "step": fits.change(first, second)}
    slips = {
        "step": Slip(
            "step.F_change", "2", digit(1, "9"), "F_change", "a digit wrong", ("f-change",)
        )
    }
    return Paper("handrail-corrosion.tex", values, HANDRAIL_CORROSION, slips)


HANDRAIL_CORROSION = r"""
\documentclass[11pt]{article}
\usepackage{amsmath,booktabs}
\newcommand{\Rsq}{R^2}
\title{Chloride at the handrail: what pits galvanised steel above a salt marsh}
\author{Timber team, Brackwater Institute for Tidal Paths}
\begin{document}
\maketitle

\begin{abstract}
Pits on 84 handrail brackets were counted under a hand lens. Age and distance from the creek
explained ⟦first.R2 %1⟧\,\% of the variance; chloride on the bracket and the thickness of the zinc
raised this to ⟦second.R2 %1⟧\,\%.
\end{abstract}

\section{Introduction}
Brackets are changed when the zinc is through. Under the working model of the yard,
$y_i = \beta_0 + \beta_1 x_{1i} + \varepsilon_i$, only age matters. We ask whether chloride, which can be wiped
from a bracket in a minute, tells more. As usual $\Rsq$ grows with each predictor, so the steps are compared by
\begin{equation}
  F = \frac{(\Rsq_{\mathrm{full}} - \Rsq_{\mathrm{base}})/m}{(1 - \Rsq_{\mathrm{full}})/(n - k - 1)} .
\end{equation}

\section{Methods}
Eighty-four brackets were chosen along the four creeks ($n = 84$). Predictors entered in two steps: age (years) and
distance from the creek (metres); then chloride (mg a bracket) and zinc (\textmu m). For $\alpha = 0.05$ the cut-off for
the second step is $F_{0.05,2,79} \approx 3.11$.

% An earlier draft, before the two doubtful brackets were measured again, do not use:
% Step 2: $\Delta R^2 = .19$, $\Delta F(2, 79) = 9.02$, $p = .004$

\section{Results}
Step 1 explained a fifth of the variance, $\Rsq = ⟦first.R2 .3⟧$, $F(2, 81) = ⟦first.F 2⟧$, $p < .001$.
Step 2 added to it, $\Delta R^2 = ⟦step.R2_change .3⟧$, $\Delta F(2, 79) = ⟦!step⟧$, $p < .001$, total
$\Rsq = ⟦second.R2 .3⟧$. With all four predictors the fit was good (adjusted $\Rsq = ⟦second.R2_adj .3⟧$,
$F(4, 79) = ⟦second.F 2⟧$, $p < .001$).
The coefficients of step 2 are in Table~\ref{tab:rail}. Chloride was the stronger of the two newcomers
($\beta = ⟦second.chloride.beta .2⟧$, $t(79) = ⟦second.chloride.t 2⟧$, $p < .001$); zinc just missed our line
($\beta = ⟦second.zinc.beta .2⟧$, $t(79) = ⟦second.zinc.t 2⟧$, $p ⟦second.zinc.p p⟧$).

\begin{table}
\caption{Pits per bracket, step 2}\label{tab:rail}
\begin{tabular}{lrrrrr}
\toprule
Predictor & $b$ & SE & $\beta$ & $t$ & $p$ \\
\midrule
Age & $⟦second.age.b 2⟧$ & ⟦second.age.se 2⟧ & $⟦second.age.beta .2⟧$ & $⟦second.age.t 2⟧$ & $< .001$ \\
Distance & $⟦second.distance.b 4⟧$ & ⟦second.distance.se 4⟧ & $⟦second.distance.beta .2⟧$ & $⟦second.distance.t 2⟧$ & ⟦second.distance.p .3⟧ \\
Chloride & $⟦second.chloride.b 2⟧$ & ⟦second.chloride.se 2⟧ & $⟦second.chloride.beta .2⟧$ & $⟦second.chloride.t 2⟧$ & $< .001$ \\
Zinc & $⟦second.zinc.b 3⟧$ & ⟦second.zinc.se 3⟧ & $⟦second.zinc.beta .2⟧$ & $⟦second.zinc.t 2⟧$ & ⟦second.zinc.p .3⟧ \\
\bottomrule
\end{tabular}
\end{table}

\section{Discussion}
Wiping is worth the minute. That distance only matters once chloride is known suggests that some far
brackets are salted by the road (the B2, $R1 = 12$ m from the rail), not by the creek.
\end{document}
"""


def bolt_torque() -> Paper:
    """Return a reStructuredText report without an error."""
    draw = RandomState(103)
    n = 42
    autumn = draw.normal(48, 6, n)
    spring = autumn - draw.normal(4.1, 4.4, n)
    months = draw.uniform(3, 60, n)
    loss = 2 + 0.09 * months + draw.normal(0, 2.2, n)
    values = {
        "paired": fits.paired_t(autumn, spring),
        "autumn": float(autumn.mean()),
        "spring": float(spring.mean()),
        "fit": fits.least_squares(loss, {"months": months}),
        "r": fits.correlation(months, loss),
    }
    return Paper("bolt-torque.rst", values, BOLT_TORQUE)


BOLT_TORQUE = """
Bolts that loosen in winter
===========================

:Authors: Timber team, Brackwater Institute for Tidal Paths
:Status: report to the yard

Summary
-------

Forty-two coach bolts lost torque over the winter, and the older ones lost more.

Methods
-------

The same 42 bolts were checked with a torque wrench in October and in April. Change was tested with
a paired *t* test. The yearly loss was then regressed on the months since the bolt was last
tightened, :math:`y_i = \\beta_0 + \\beta_1 x_i + e_i`. With one predictor the standardised slope is
the correlation. The script prints with ``"t(%d) = %.2f, p = %.3f"``.

.. math::

   t = r \\sqrt{\\frac{n - 2}{1 - r^2}}

Results
-------

Torque fell from ⟦autumn 1⟧ to ⟦spring 1⟧ newton metres, a difference of ⟦paired.estimate 1⟧ Nm,
*t*\\ (41) = ⟦paired.value 2⟧, *p*\\ < .001.

Months since tightening predicted the loss, :math:`R^2 = ⟦fit.R2 .3⟧`, :math:`F(1, 40) = ⟦fit.F 2⟧`,
*p* < .001: a month costs ⟦fit.months.b 3⟧ Nm (SE = ⟦fit.months.se 3⟧, t(40) = ⟦fit.months.t 2⟧, p < .001,
95% CI [⟦fit.months.low 3⟧, ⟦fit.months.high 3⟧]). In other words, the two were correlated,
*r*\\ (40) = ⟦r.value .2⟧, *p* < .001.

=========  ======  =====  =====  ======
Term       b       SE     t      p
=========  ======  =====  =====  ======
Intercept  ⟦fit.Intercept.b 3⟧   ⟦fit.Intercept.se 3⟧  ⟦fit.Intercept.t 2⟧   ⟦fit.Intercept.p .3⟧
Months     ⟦fit.months.b 3⟧   ⟦fit.months.se 3⟧  ⟦fit.months.t 2⟧   < .001
=========  ======  =====  =====  ======

What we ask of the yard
-----------------------

Go round once a year, in September. Bolts of class F(2) need a 19 mm socket; the torque is
p = 48 Nm on the old wrench, t = 5 s a bolt.
"""


def lantern_posts() -> Paper:
    """Return an Org report whose one-way F has its degrees of freedom the wrong way round."""
    draw = RandomState(104)
    groups = {
        "larch": draw.normal(3.1, 1.0, 20),
        "oak": draw.normal(2.6, 1.0, 20),
        "robinia": draw.normal(2.1, 1.0, 20),
    }
    table = fits.anova(groups)
    pair = fits.pooled_t(groups["larch"], groups["robinia"])
    means = {name: float(group.mean()) for name, group in groups.items()}
    sds = {name: float(group.std(ddof=1)) for name, group in groups.items()}
    values: dict[str, object] = {"df": "2, 57", "a": table, "wood": table.effects[0], "pair": pair}
    for name in groups:
        values |= {f"m_{name}": means[name], f"s_{name}": sds[name]}
    slips = {"df": Slip("df", "s", put("57, 2"), "df1", "df swapped", ("p-from-f",), "reversal")}
    return Paper("lantern-posts.org", values, LANTERN_POSTS, slips)


LANTERN_POSTS = """
#+TITLE: Which wood for lantern posts?
#+AUTHOR: Timber team, Brackwater Institute for Tidal Paths
#+OPTIONS: toc:nil

* Question
The ferry steps need sixty new posts. Larch is cheap, oak is not, robinia is hard to get. We compared how deep
rot had gone at the water line after eight years.

* Methods
Twenty posts of each wood stood in the same row (/N/ = 60). Depth was read with a bradawl, in millimetres. We used a
one-way analysis of variance; the pair of interest, larch against robinia, was tested alone.
# old result, before the posts of the second row came in: F(2, 41) = 3.10, p = .600

* Results
Rot was deepest in larch (/M/ = ⟦m_larch 2⟧, /SD/ = ⟦s_larch 2⟧), then oak (/M/ = ⟦m_oak 2⟧, /SD/ = ⟦s_oak 2⟧), then robinia
(/M/ = ⟦m_robinia 2⟧, /SD/ = ⟦s_robinia 2⟧). The woods differed, /F/(⟦!df⟧) = ⟦wood.F 2⟧, /p/ = ⟦wood.p .4⟧, with \\eta^2 = ⟦wood.eta2_partial .2⟧.
Larch rotted further in than robinia, /t/(38) = ⟦pair.value 2⟧, /p/ < .001, /d/ = ⟦pair.estimate 2⟧.

| Source    |  SS   | df |  MS  |  F   |
|-----------+-------+----+------+------|
| Wood      | ⟦wood.ss 2⟧ |  2 | ⟦wood.ms 2⟧ | ⟦wood.F 2⟧ |
| Residual  | ⟦a.ss_error 2⟧ | 57 | ⟦a.ms_error 2⟧ |      |
| Total     | ⟦a.ss_total 2⟧ | 59 |      |      |

* Verdict
Robinia where it can be had; =R^2= and the rest of the printout are in the yard's folder F (2, 3).
"""
