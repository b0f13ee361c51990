"""Manuscripts of the access team: gradients, railings, landings, benches and codes."""

from __future__ import annotations

from numpy.random import RandomState

from making import fits
from making.paper import Paper
from making.words import Slip, expect, put, swap


def papers() -> list[Paper]:
    """Return the manuscripts of this team."""
    return [
        wheelchair_gradient(),
        railing_height(),
        ferry_landing(),
        bench_spacing(),
        path_codes(),
    ]


def wheelchair_gradient() -> Paper:
    """Return a LaTeX manuscript whose table marks a slope with two stars too many."""
    draw = RandomState(502)
    n = 132
    gradient, rough = draw.uniform(0, 8, n), draw.normal(3, 1, n)
    age = draw.normal(58, 13, n)
    pulse = 70 + 4.1 * gradient + 3.0 * rough + 0.12 * age + draw.normal(0, 13, n)
    one = fits.least_squares(pulse, {"gradient": gradient, "rough": rough})
    two = fits.least_squares(pulse, {"gradient": gradient, "rough": rough, "age": age})
    expect(0.01 < two.rough.p < 0.05 < two.age.p, "rough boards matter a little, age does not")
    slips = {
        "stars": Slip(
            "two.rough.p", "*", put("***"), "p", "stars of another row", ("stars", "p-from-t")
        )
    }
    return Paper("wheelchair-gradient.tex", {"one": one, "two": two}, WHEELCHAIR_GRADIENT, slips)


WHEELCHAIR_GRADIENT = r"""
\documentclass{article}
\usepackage{booktabs}
\newcommand{\sym}[1]{\ifmmode^{#1}\else\(^{#1}\)\fi}
\title{Uphill on boards: gradient, roughness and the pulse of wheelchair users}
\author{Access team, Brackwater Institute for Tidal Paths}
\begin{document}
\maketitle
\begin{abstract}
The pulse of 132 wheelchair users was read at the top of ramps. Gradient and the roughness of the boards
explained ⟦one.R2 %1⟧\% of the variance. Age added nothing of note.
\end{abstract}

\section{Methods}
Each person took one ramp ($N = 132$), drawn by lot from twelve. Gradient is in percent, roughness in millimetres
between boards. We fitted two models by least squares: $y_i = \beta_0 + \beta_1 x_{1i} + \beta_2 x_{2i} + \varepsilon_i$ and the
same with age. The rig that held the camera had 6 degrees of freedom ($t = 0.4$\,s per move).

\section{Results}
Model 1 was significant ($R^2 = ⟦one.R2 .3⟧$, $F(2, 129) = ⟦one.F 2⟧$, $p < .001$). Age did not improve on it in Model 2
($R^2 = ⟦two.R2 .3⟧$, $F(3, 128) = ⟦two.F 2⟧$, $p < .001$; age: $t(128) = ⟦two.age.t 2⟧$, $p ⟦two.age.p p⟧$).

\begin{table}[ht]
\caption{Pulse at the top of the ramp (beats per minute)}
\begin{tabular}{lcc}
\toprule
 & Model 1 & Model 2 \\
\midrule
Gradient & $⟦one.gradient.b 3⟧^{***}$ & $⟦two.gradient.b 3⟧^{***}$ \\
 & (⟦one.gradient.se 3⟧) & (⟦two.gradient.se 3⟧) \\
Roughness & $⟦one.rough.b 3⟧^{⟦one.rough.p *⟧}$ & $⟦two.rough.b 3⟧^{⟦!stars⟧}$ \\
 & (⟦one.rough.se 3⟧) & (⟦two.rough.se 3⟧) \\
Age & & $⟦two.age.b 3⟧$ \\
 & & (⟦two.age.se 3⟧) \\
Constant & $⟦one.Intercept.b 3⟧^{***}$ & $⟦two.Intercept.b 3⟧^{***}$ \\
 & (⟦one.Intercept.se 3⟧) & (⟦two.Intercept.se 3⟧) \\
\midrule
$N$ & 132 & 132 \\
$R^2$ & ⟦one.R2 3⟧ & ⟦two.R2 3⟧ \\
Adjusted $R^2$ & ⟦one.R2_adj 3⟧ & ⟦two.R2_adj 3⟧ \\
\bottomrule
\multicolumn{3}{l}{\footnotesize Standard errors in parentheses. * $p<0.05$, ** $p<0.01$, *** $p<0.001$}
\end{tabular}
\end{table}

\section{Discussion}
A ramp should rise by no more than four percent. Roughness deserves a plane: the boards at R1 and R2 first.
\end{document}
"""


def railing_height() -> Paper:
    """Return a German Markdown manuscript in which the digits of a p have changed places."""
    draw = RandomState(514)
    n = 58
    height = draw.normal(105, 8, n)
    safe = 2.0 + 0.025 * (height - 105) + draw.normal(0, 0.55, n)
    r = fits.correlation(height, safe)
    groups = {
        name: draw.normal(mean, 1.0, 20) for name, mean in zip("abc", (3.6, 4.2, 4.4), strict=True)
    }
    fit = fits.least_squares(safe, {"height": height, "gap": draw.normal(0, 1, n)})
    values = {"r": r, "form": fits.anova(groups).effects[0], "fit": fit}
    slips = {"p": Slip("form.p", ",3", swap(2), "p", "digits swapped", ("p-from-f",), "reversal")}
    return Paper("gelaenderhoehe.md", values, RAILING_HEIGHT, slips, minus="−")


RAILING_HEIGHT = """
# Wie hoch muss ein Geländer sein?

*Gruppe Zugang, Brackwater Institute for Tidal Paths*

## Zusammenfassung

58 Besucherinnen und Besucher beurteilten, wie sicher sie sich auf dem Steg fühlten. Je höher das Geländer,
desto sicherer das Gefühl; die Form des Handlaufs wurde in einem zweiten Versuch verglichen.

## Methode

Jede Person ging einen Abschnitt von 1,2 km und beantwortete danach fünf Fragen (0 bis 5 Punkte). Höhe und
Abstand der Stäbe wurden vor Ort gemessen. Das Signifikanzniveau lag bei p < 0,05; geprüft wurde zweiseitig.
Im zweiten Versuch gab es drei Formen des Handlaufs mit je 20 Personen.

## Ergebnisse

Höhe und Gefühl der Sicherheit hingen zusammen, r(56) = ⟦r.value ,2⟧, p ⟦r.p ,p⟧. Höhe und Abstand zusammen erklärten
⟦fit.R2 %0⟧ % der Varianz (R² = ⟦fit.R2 ,3⟧, korrigiertes R² = ⟦fit.R2_adj ,3⟧, F(2, 55) = ⟦fit.F ,2⟧, p ⟦fit.p ,p⟧). Der Einfluss
der Höhe war deutlich (b = ⟦fit.height.b ,3⟧, SE = ⟦fit.height.se ,3⟧, t(55) = ⟦fit.height.t ,2⟧, p ⟦fit.height.p ,p⟧).

Die Form des Handlaufs machte einen Unterschied, F(2, 57) = ⟦form.F ,2⟧, p = ⟦!p⟧, η² = ⟦form.eta2_partial ,2⟧.

## Diskussion

Ein Geländer von 110 cm kostet 2.857 Euro je hundert Meter. Die Stäbe im Abschnitt F (1, 2) stehen zu weit
auseinander (13,5 cm); siehe Seite 4, Abb. 2.
"""


def ferry_landing() -> Paper:
    """Return a Markdown manuscript without an error whose F is not a function of its R²."""
    draw = RandomState(523)
    n = 110
    wave, load = draw.gamma(2, 0.25, n), draw.normal(30, 9, n)
    seconds = 20 + 9 * wave + 0.2 * load + draw.normal(0, 1, n) * (2 + 7 * wave)
    fit = fits.least_squares(seconds, {"wave": wave, "load": load})
    F, df1, df2, p = fits.robust_wald(seconds, {"wave": wave, "load": load})
    expect((df1, df2) == (2, 107) and p < 0.01, "df as printed")
    values = {"fit": fit, "F": F, "p": p}
    return Paper("ferry-landing.md", values, FERRY_LANDING)


FERRY_LANDING = """
Landing a ferry in a swell
==========================

*Access team, Brackwater Institute for Tidal Paths*

Abstract
--------

How long the ramp takes to settle depends on the swell and on the load. As the spread grows with the
swell, all tests use heteroskedasticity-robust standard errors.

Methods
-------

We timed 110 landings (n = 110). The time until the ramp lay still (s) was regressed on the height of
the swell (m) and the load (t). A plain fit leaves residuals that fan out, so we report robust
(HC1) standard errors and the robust Wald F test throughout. For planning we also need the share of
the variance explained, which is that of the plain fit.

Results
-------

With robust standard errors the two predictors were jointly significant, F(2, 107) = ⟦F 2⟧,
p ⟦p p⟧, R² = ⟦fit.R2 .3⟧.

The plain fit, printed here for the harbour office only, has the same slopes: ⟦fit.wave.b 2⟧ s per metre
of swell and ⟦fit.load.b 3⟧ s per tonne.

Look-up table for the crew (no tests here):

| swell (m) | t (s) | load (t) | F (kN) | p (bar) |
|---:|---:|---:|---:|---:|
| 0.2 | 24 | 12 | 4.3 | 2.4 |
| 0.6 | 29 | 30 | 5.9 | 2.6 |
| 1.0 | 37 | 42 | 8.8 | 3.1 |

Discussion
----------

Above a swell of a metre the ramp should stay up. Samples of the hull were drawn at t = 5 min, the
pump ran at p = 2.4 bar, and the crew voted 3–1 (2, 1, 0) for a new ramp.
"""


def bench_spacing() -> Paper:
    """Return an HTML manuscript without an error: t statistics in parentheses."""
    draw = RandomState(533)
    n = 68
    spacing, view = draw.uniform(50, 400, n), draw.normal(0, 1, n)
    rests = 9 - 0.012 * spacing + 0.8 * view + draw.normal(0, 2.4, n)
    fit = fits.least_squares(rests, {"spacing": spacing, "view": view})
    return Paper("bench-spacing.html", {"fit": fit}, BENCH_SPACING, minus="−")


BENCH_SPACING = """
<!DOCTYPE html>
<html lang="en">
<head><meta charset="utf-8"><title>How far apart should benches be?</title></head>
<body>
<h1>How far apart should benches be?</h1>
<p>Access team, Brackwater Institute for Tidal Paths</p>
<h2>Abstract</h2>
<p>On 68 stretches of the boardwalk we counted rests per hour. Where benches stand further apart people rest
less often; a view brings them to sit. The model explained ⟦fit.R2 %1⟧% of the variance.</p>
<h2>Results</h2>
<p>Spacing and view predicted rests (<i>R</i>&sup2; = ⟦fit.R2 .2⟧, <i>F</i>(2, 65) = ⟦fit.F 2⟧, <i>p</i> &lt; .001). For spacing
<i>t</i>(65)&nbsp;=&nbsp;⟦fit.spacing.t 2⟧, <i>p</i>&nbsp;&lt;&nbsp;.001; for view <i>t</i>(65)&nbsp;=&nbsp;⟦fit.view.t 2⟧, <i>p</i>&nbsp;=&nbsp;⟦fit.view.p .3⟧.</p>
<table>
<caption>Rests per hour</caption>
<tr><th></th><th>Rests</th></tr>
<tr><td>Spacing (m)</td><td>⟦fit.spacing.b 4⟧⟦fit.spacing.p *⟧</td></tr>
<tr><td></td><td>(⟦fit.spacing.t 2⟧)</td></tr>
<tr><td>View (score)</td><td>⟦fit.view.b 3⟧⟦fit.view.p *⟧</td></tr>
<tr><td></td><td>(⟦fit.view.t 2⟧)</td></tr>
<tr><td>Constant</td><td>⟦fit.Intercept.b 3⟧***</td></tr>
<tr><td></td><td>(⟦fit.Intercept.t 2⟧)</td></tr>
<tr><td><i>N</i></td><td>68</td></tr>
<tr><td><i>R</i><sup>2</sup></td><td>⟦fit.R2 3⟧</td></tr>
</table>
<p><i>t</i> statistics in parentheses. * <i>p</i> &lt; 0.05, ** <i>p</i> &lt; 0.01, *** <i>p</i> &lt; 0.001</p>
<h2>Discussion</h2>
<p>Two hundred metres is far enough. Each bench weighs F<sub>g</sub> = 0.36 kN; the bolts are those of class F(2).</p>
</body>
</html>
"""


def path_codes() -> Paper:
    """Return a Markdown handbook page on which nothing is a result."""
    return Paper("path-codes.md", {}, PATH_CODES)


PATH_CODES = """
# Handbook, chapter 4: codes, symbols and habits

*Brackwater Institute for Tidal Paths, for all teams*

This chapter fixes the codes. It reports nothing.

## Codes on the map

- Ferries call at F(1, 2) and F(2, 2); the crate at the steps has corners A(2, 0, 0) and F(2, 5, 3).
- Wheel routes are R1 and R2; the loop R2 = R1 + 400 m is closed in winter.
- Tide posts are T(1) to T(24). Post t(0) = 0 h is the reference, t(24) = 24 h the next day.
- Lens: f1 = 50 mm and f2 = 200 mm; radio: f = 338 Hz.

## Symbols

With R = 8.314 J/(mol K) and T = 298 K the slope is 59.2 mV. The girder has reliability index
β = 3.2. Pumps run at p = 2.4 bar. Growth is smoothed with β = 0.95. The price is 0.45 pounds per unit.

## Habits of reporting

> Report as: F(df1, df2) = x.xx, p = .xxx, ηp² = .xx.

| Mark | Meaning |
|---|---|
| * | p < .05 |
| ** | p < .01 |
| *** | p < .001 |

All tests are two-tailed and p < .05 is considered significant; trends (p < .10) are not discussed.
For α = .05 the cut-offs are F(0.05; 1, 24) = 4.26 and F(0.05; 2, 24) = 3.40. The adjusted R² is
R²adj = 1 − (1 − R²)(n − 1)/(n − k − 1). H1: β1 > 0. H0: R² = 0; reject if p < α.

```python
print(f"One-way ANOVA: F({dfb}, {dfw}) = {F:.2f}, p = {p:.4f}")
timestep = 0.004
gap = 0.03
```

- [ ] F, df1, df2 and exact p
- [ ] R² and adjusted R²
- [ ] t(df) for each coefficient

R² = ___, F(___, ___) = ___ (p = ___)

What is F(2, 57)? Is p below .05? Work it out before you look at the answer.

See Field book (2013, p. 442), pp. 31–57, and section F (1, 2) of the annex.
"""
