"""Manuscripts of the wildlife team: redshanks, otters, lichen, crabs and samphire."""

from __future__ import annotations

import numpy as np
from numpy.random import RandomState

from making import fits
from making.paper import Paper
from making.words import Slip, digit, expect, swap


def papers() -> list[Paper]:
    """Return the manuscripts of this team."""
    return [
        redshank_flushing(),
        otter_underpass(),
        lichen_cleaning(),
        crab_burrows(),
        samphire_shading(),
    ]


def redshank_flushing() -> Paper:
    """Return an HTML manuscript in which two digits of an F have changed places."""
    draw = RandomState(405)
    n = 72
    walkers = draw.uniform(0, 60, n)
    dog = (draw.uniform(0, 1, n) < 0.35).astype(np.float64)
    vegetation = draw.normal(45, 15, n)
    metres = 48 + 0.28 * walkers + 22 * dog - 0.3 * vegetation + draw.normal(0, 17, n)
    fit = fits.least_squares(metres, {"walkers": walkers, "dog": dog, "vegetation": vegetation})
    expect(fit.vegetation.p > 0.05, "vegetation does not matter")
    slips = {
        "F": Slip(
            "fit.F",
            "2",
            lambda literal: f"{literal[0]}{literal[3]}.{literal[1]}{literal[4]}",
            "F",
            "digits swapped",
            ("f-from-r2", "r2-adjusted", "restatement"),
        )
    }
    return Paper("redshank-flushing.html", {"fit": fit}, REDSHANK_FLUSHING, slips, minus="−")


REDSHANK_FLUSHING = """
<!DOCTYPE html>
<html lang="en">
<head>
<meta charset="utf-8">
<title>Redshanks, walkers and dogs</title>
<style>td { padding: 0 1em } .f2 { line-height: 1.2 } sup { font-size: 60% }</style>
<script>var F = f(1, 2); var p = 0.05; if (p < 0.1) { r2 = 4.31; }</script>
</head>
<body>
<h1>Redshanks, walkers and dogs: how near is too near?</h1>
<p class="by">Wildlife team, Brackwater Institute for Tidal Paths</p>

<h2>Abstract</h2>
<p>We recorded the distance at which 72 redshanks took wing from a person on the boards. Walkers in sight, a dog
and the height of the vegetation accounted for ⟦fit.R2 %0⟧% of the variance, <em>F</em>(3,&nbsp;68)&nbsp;=&nbsp;⟦fit.F 2⟧,
<em>p</em>&nbsp;&lt;&nbsp;.001. A dog adds about ⟦fit.dog.b 0⟧ metres.</p>

<h2>Methods</h2>
<p>One observer walked at an even pace towards a single bird and stopped when it flew; the distance was read
with a rangefinder (<i>F</i><sub>1</sub> = 25 mm, f/2.8). Each bird was used once (<i>n</i> = 72). Redshanks were told
apart by section, sections being named <i>F</i>(1, 2) to <i>F</i>(3, 4) on the map. The threshold was <i>p</i> &lt; .05.</p>
<!-- first run, 41 birds: F(3, 37) = 2.02, p = .500 -->

<h2>Results</h2>
<p>The three predictors together explained a third of the variance, <i>R</i><sup>2</sup> = ⟦fit.R2 .3⟧, adjusted
<i>R</i><sup>2</sup> = ⟦fit.R2_adj .3⟧, <i>F</i>(3, 68) = ⟦!F⟧, <i>p</i> &lt; .001. Details are in Table 1.</p>

<table>
<caption>Table 1. Flushing distance (m), <i>N</i> = 72</caption>
<thead>
<tr><th>Predictor</th><th><i>b</i></th><th><i>SE</i></th><th>&beta;</th><th><i>t</i></th><th><i>p</i></th></tr>
</thead>
<tbody>
<tr><td>Walkers in sight</td><td>⟦fit.walkers.b 2⟧</td><td>⟦fit.walkers.se 2⟧</td><td>⟦fit.walkers.beta .2⟧</td><td>⟦fit.walkers.t 2⟧</td><td>⟦fit.walkers.p .3⟧</td></tr>
<tr><td>Dog</td><td>⟦fit.dog.b 2⟧</td><td>⟦fit.dog.se 2⟧</td><td>⟦fit.dog.beta .2⟧</td><td>⟦fit.dog.t 2⟧</td><td>&lt; .001</td></tr>
<tr><td>Vegetation</td><td>⟦fit.vegetation.b 2⟧</td><td>⟦fit.vegetation.se 2⟧</td><td>⟦fit.vegetation.beta .2⟧</td><td>⟦fit.vegetation.t 2⟧</td><td>⟦fit.vegetation.p .3⟧</td></tr>
</tbody>
</table>

<p>Walkers in sight made birds fly earlier: <i>t</i>(68) = ⟦fit.walkers.t 2⟧, <i>p</i> = ⟦fit.walkers.p .3⟧.
<del>Vegetation mattered, <i>t</i>(68) = 2.90, <i>p</i> = .300.</del> Vegetation did not:
&beta;&nbsp;=&nbsp;⟦fit.vegetation.beta .2⟧, <i>t</i>(68)&nbsp;=&nbsp;⟦fit.vegetation.t 2⟧, <i>p</i>&nbsp;=&nbsp;⟦fit.vegetation.p .3⟧.</p>

<h2>Discussion</h2>
<p>Dogs on leads would keep the flats quiet within sixty metres. The hide at R2 &lt; 40 m is too near.</p>
</body>
</html>
"""


def otter_underpass() -> Paper:
    """Return a Markdown manuscript in which the interval of an odds ratio is misprinted."""
    draw = RandomState(412)
    n = 210
    width, light = draw.normal(1.2, 0.4, n), draw.uniform(0, 10, n)
    fence = (draw.uniform(0, 1, n) < 0.5).astype(np.float64)
    eta = -1.0 + 1.3 * (width - 1.2) - 0.15 * light + 1.2 * fence
    used = (draw.uniform(0, 1, n) < 1 / (1 + np.exp(-eta))).astype(np.float64)
    fit = fits.logistic(used, {"width": width, "light": light, "fence": fence})
    rows = {row.name: row for row in fit}
    counts = np.array(
        [[np.sum((fence == f) & (used == u)) for u in (0, 1)] for f in (0, 1)], dtype=np.float64
    )
    values: dict[str, object] = {**rows, "chi": fits.contingency(counts), "used": float(used.sum())}
    slips = {
        "low": Slip(
            "fence.low",
            "2",
            digit(0, "0"),
            "ci_low",
            "a digit wrong",
            ("odds-ratio", "ci-against-p", "ci-centre"),
            "doubt",
        )
    }
    return Paper("otter-underpass.md", values, OTTER_UNDERPASS, slips, minus="−")


OTTER_UNDERPASS = """
# Do otters use the gaps we leave under the boards?

*Wildlife team, Brackwater Institute for Tidal Paths*

## Abstract

Of 210 gaps left under the boardwalk for otters, ⟦used d⟧ showed spraint or prints within a month. Gaps
behind a fence, wide gaps and dark gaps were used more.

## Methods

Use (yes or no) was modelled by logistic regression on the width of the gap (m), light (lux, logged)
and whether a fence leads to it. Odds ratios are given per unit with 95% Wald intervals. As a check,
use was tabulated against the fence and tested with Pearson's χ² without a correction.

## Results

Table 1. *Logistic regression of use*

| Predictor | *b* | *SE* | *z* | *p* | OR | 95% CI |
|---|---:|---:|---:|---:|---:|---|
| Width | ⟦width.b 2⟧ | ⟦width.se 2⟧ | ⟦width.z 2⟧ | ⟦width.p .3⟧ | ⟦width.odds_ratio 2⟧ | [⟦width.low 2⟧, ⟦width.high 2⟧] |
| Light | ⟦light.b 2⟧ | ⟦light.se 2⟧ | ⟦light.z 2⟧ | ⟦light.p .3⟧ | ⟦light.odds_ratio 2⟧ | [⟦light.low 2⟧, ⟦light.high 2⟧] |
| Fence | ⟦fence.b 2⟧ | ⟦fence.se 2⟧ | ⟦fence.z 2⟧ | < .001 | ⟦fence.odds_ratio 2⟧ | [⟦!low⟧, ⟦fence.high 2⟧] |

A fence multiplied the odds of use by more than three (*b* = ⟦fence.b 2⟧, *SE* = ⟦fence.se 2⟧, *z* = ⟦fence.z 2⟧,
*p* < .001). The plain table says the same, χ²(1, *N* = 210) = ⟦chi.value 2⟧, *p* < .001, φ = ⟦chi.estimate .2⟧.

## Discussion

Fences are cheap. That 54% (95% CI 41–67%) of the fenced gaps near the sluice were used in the pilot
year, 31 of 57, agrees. Camera traps had an F1 = 0.81 for otters; β = 0.9 was their smoothing.
"""


def lichen_cleaning() -> Paper:
    """Return a plain-text report without an error: repeated measures and look-alikes."""
    draw = RandomState(424)
    base = draw.normal(0, 9, 24)[:, None]
    drift = np.cumsum(draw.normal(0, 4.2, (24, 4)), axis=1)
    scores = base + np.array([62, 61, 59.5, 58.8]) + drift
    effect, df2, epsilon = fits.repeated(scores)
    pairs = [fits.paired_t(scores[:, 0], scores[:, j]) for j in (1, 2, 3)]
    values = {
        "time": effect,
        "df2": df2,
        "epsilon": epsilon,
        "first": pairs[0],
        "third": pairs[2],
    }
    return Paper("lichen-cleaning.txt", values, LICHEN_CLEANING)


LICHEN_CLEANING = """
HOW LONG A CLEANED BOARD STAYS CLEAN

Wildlife team, Brackwater Institute for Tidal Paths

Abstract

Twenty-four boards were brushed clean of lichen and swung over with a pendulum after one,
three, six and twelve months. Grip fell with time.

Methods

The same 24 boards were measured four times, so time is a within-board factor. Since
sphericity was violated (Greenhouse-Geisser epsilon = ⟦epsilon .2⟧), the degrees of freedom of F
are corrected. Follow-up tests compare each month with the first by paired t tests.

Results

Grip depended on time, F(⟦time.df 2⟧, ⟦df2 2⟧) = ⟦time.F 2⟧, p ⟦time.p p⟧, partial eta squared =
⟦time.eta2_partial .2⟧ (Greenhouse-Geisser). After three months the loss was small, t(23) = ⟦first.value 2⟧,
p ⟦first.p p⟧; after twelve months it was ⟦third.estimate 1⟧ points, t(23) = ⟦third.value 2⟧, p ⟦third.p p⟧,
95% CI [⟦third.low 1⟧, ⟦third.high 1⟧].

Field notes

The brush turns at f = 12 Hz; step = 0.05, gap = 0.03. Board F(2, 3) was lost to the storm of
t(0) = 14:05 and replaced. Lens f2 = 200 mm. The lichen's R-value against the reference plate
was 1.7, so the two plates may be swapped. Rates: p(rain) = 0.3, F(w) rising.

Conclusion

Brush once a year, before the winter.
"""


def crab_burrows() -> Paper:
    """Return a JATS manuscript with one wrong digit in a t."""
    draw = RandomState(433)
    n = 54
    footprints, moisture = draw.uniform(0, 12, n), draw.normal(60, 9, n)
    burrows = 30 - 1.4 * footprints + 0.25 * moisture + draw.normal(0, 7, n)
    fit = fits.least_squares(burrows, {"footprints": footprints, "moisture": moisture})
    expect(fit.moisture.p > 0.05, "moisture does not matter")
    slips = {"t": Slip("fit.footprints.t", "2", digit(1, "2"), "t", "a digit wrong", ("p-from-t",))}
    return Paper("crab-burrows.xml", {"fit": fit}, CRAB_BURROWS, slips, minus="−")


CRAB_BURROWS = """
<?xml version="1.0" encoding="UTF-8"?>
<article xmlns:xlink="http://www.w3.org/1999/xlink" article-type="research-article" xml:lang="en">
<front>
<article-meta>
<title-group><article-title>Footprints beside the boards and the burrows of shore crabs</article-title></title-group>
<contrib-group><contrib contrib-type="author"><collab>Wildlife team, Brackwater Institute for Tidal Paths</collab></contrib></contrib-group>
<abstract><p>Where people step off the boards there are fewer burrows. Footprints and moisture explained
⟦fit.R2 %1⟧% of the variance in burrows per square metre.</p></abstract>
</article-meta>
</front>
<body>
<sec><title>Methods</title>
<p>Fifty-four squares of one metre were counted at low water (<italic>n</italic> = 54). The significance threshold was
<italic>p</italic> &lt; 0.05. Heterogeneity between shores was judged by the <italic>I</italic><sup>2</sup> statistic. Squares are
labelled F<sub>1</sub> to F<sub>54</sub>.</p>
</sec>
<sec><title>Results</title>
<p>The model was significant (<italic>R</italic><sup>2</sup> = ⟦fit.R2 2⟧, adjusted <italic>R</italic><sup>2</sup> = ⟦fit.R2_adj 2⟧,
<italic>F</italic><sub>2,51</sub> = ⟦fit.F 2⟧, <italic>p</italic> &lt; 0.001; <xref ref-type="fig" rid="fig1">Figure 1</xref>).</p>
<p>Each footprint more went with ⟦fit.footprints.b 2⟧ burrows (SE = ⟦fit.footprints.se 2⟧, 95% CI ⟦fit.footprints.low 2⟧ to ⟦fit.footprints.high 2⟧);
moisture did not matter (<italic>t</italic><sub>51</sub> = ⟦fit.moisture.t 2⟧, <italic>p</italic> = ⟦fit.moisture.p 3⟧).
Footprints did (<italic>t</italic><sub>51</sub> = ⟦!t⟧, <italic>p</italic> &lt; 0.001).</p>
<table-wrap id="tab1"><label>Table 1</label><caption><p>Burrows per square metre</p></caption>
<table>
<thead><tr><th>Source</th><th>SS</th><th>df</th><th>MS</th><th><italic>F</italic></th></tr></thead>
<tbody>
<tr><td>Regression</td><td>⟦fit.ss_model 1⟧</td><td>2</td><td>⟦fit.ms_model 1⟧</td><td>⟦fit.F 2⟧</td></tr>
<tr><td>Residual</td><td>⟦fit.ss_error 1⟧</td><td>51</td><td>⟦fit.ms_error 1⟧</td><td></td></tr>
<tr><td>Total</td><td>⟦fit.ss_total 1⟧</td><td>53</td><td></td><td></td></tr>
</tbody>
</table></table-wrap>
</sec>
<sec><title>Discussion</title>
<p>Keep people on the boards. A rail of <italic>R</italic> = 0.9 m on the seaward side would do.</p>
</sec>
</body>
</article>
"""


def samphire_shading() -> Paper:
    """Return a notebook in which the digits of a p have changed places and sides."""
    draw = RandomState(442)
    plots = {name: draw.normal(m, 4, 15) for name, m in zip("abc", (21, 18, 15), strict=True)}
    table = fits.anova(plots)
    shade = draw.uniform(5, 60, 45)
    height = 20 - 0.12 * shade + draw.normal(0, 3.5, 45)
    values = {
        "gap": table.effects[0],
        "a": table,
        "r": fits.correlation(shade, height),
        "fit": fits.least_squares(height, {"shade": shade}),
    }
    slips = {"p": Slip("r.p", ".3", swap(2), "p", "digits swapped", ("p-from-r",), "reversal")}
    return Paper("samphire-shading.ipynb", values, SAMPHIRE_SHADING, slips, minus="−")


SAMPHIRE_SHADING = """
%% markdown
# Samphire in the shade of the boards

Wildlife team, Brackwater Institute for Tidal Paths. Samphire was cut on 45 plots under boards with
gaps of 5, 10 and 15 mm (15 plots each) and weighed.
%% code
groups = read_plots("samphire.csv")
f, p = f_oneway(*groups)
print(f"F({len(groups) - 1}, {total - len(groups)}) = {f:.2f}, p = {p:.4f}")
%% output
F(2, 42) = ⟦gap.F 2⟧, p = ⟦gap.p 4⟧
%% markdown
The width of the gap made a difference, *F*(2, 42) = ⟦gap.F 2⟧, *p* ⟦gap.p p⟧, η² = ⟦gap.eta2_partial .2⟧.
%% code
lr, beta, p = 0.05, 0.9, 0.5
fit = ols("height ~ shade", plots).fit()
print(f"R2 = {fit.rsquared:.3f}, F = {fit.fvalue:.2f}, n = {int(fit.nobs)}")
%% output
R2 = ⟦fit.R2 3⟧, F = ⟦fit.F 2⟧, n = 45
%% markdown
## Shade and height

Shade (percent of sky hidden) and height went together, *r*(43) = ⟦r.value .2⟧, *p* = ⟦!p⟧, so shade
seemed not to matter to the plants.

The slope was ⟦fit.shade.b 3⟧ cm per percent (*SE* = ⟦fit.shade.se 3⟧).
"""
