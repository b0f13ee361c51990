"""Manuscripts of the visitors team: counters, queues, walking pace and gulls."""

from __future__ import annotations

import numpy as np
from numpy.random import RandomState
from scipy import stats

from making import fits
from making.paper import Paper
from making.printouts import lm_summary, regress_header
from making.words import Slip, expect, put


def papers() -> list[Paper]:
    """Return the manuscripts of this team."""
    return [counter_gates(), ticket_queues(), visitor_pace(), gull_deterrent()]


def counter_gates() -> Paper:
    """Return a plain-text report without an error, mostly printout."""
    draw = RandomState(301)
    n = 75
    manual, rain = draw.uniform(10, 220, n), draw.uniform(0, 6, n)
    gate = 3 + 0.93 * manual - 1.6 * rain + draw.normal(0, 9, n)
    fit = fits.least_squares(gate, {"manual": manual, "rain": rain})
    printed = "\n".join(line.rstrip() for line in lm_summary(fit, ("manual", "rain")))
    values = {"fit": fit, "print": printed, "alone": fits.correlation(manual, gate)}
    return Paper("counter-gates.txt", values, COUNTER_GATES)


COUNTER_GATES = """
DO THE GATE COUNTERS COUNT?

Visitors team, Brackwater Institute for Tidal Paths

1. Summary

The gates miss about eight walkers in a hundred, and more in the rain. For the yearly figures a
factor will do (R2 = ⟦fit.R2 3⟧, F(2, 72) = ⟦fit.F 1⟧, p < 0.001).

2. Method

At 75 gate hours two of us counted by hand (n = 75). The count of the gate was regressed on the
count by hand and on rain (mm/h). Gates are numbered F1 to F9, and gates F(1,2) and F(2,2) share a
mast; the counter's clock has t = 0.5 s and its radio p = 0.02 of lost messages.

3. Results

> summary(lm(gate ~ manual + rain))

⟦print⟧

One more walker by hand is ⟦fit.manual.b 2⟧ more on the gate (SE = ⟦fit.manual.se 3⟧, t(72) = ⟦fit.manual.t 1⟧,
p < 0.001). A millimetre of rain changes the count by ⟦fit.rain.b 2⟧ (SE = ⟦fit.rain.se 2⟧, t(72) = ⟦fit.rain.t 2⟧,
p < 0.001, 95% CI ⟦fit.rain.low 2⟧ to ⟦fit.rain.high 2⟧).

The two counts alone: r = ⟦alone.value 3⟧, n = 75, p < 0.001.

4. To do

Ask the maker why rain matters. Report back as F(df1, df2) = ___, p = ___, R2 = ___.
"""


def ticket_queues() -> Paper:
    """Return a plain-text report that prints R where it says R squared."""
    draw = RandomState(302)
    n = 66
    arrivals = draw.normal(40, 11, n)
    staff = draw.randint(1, 4, n).astype(np.float64)
    queue = 3 + 0.16 * arrivals - 1.4 * staff + draw.normal(0, 2.5, n)
    fit = fits.least_squares(queue, {"arrivals": arrivals, "staff": staff})
    printed = "\n".join(
        line.rstrip() for line in regress_header(fit, "minutes", ("arrivals", "staff"))
    )
    slips = {
        "r2": Slip(
            "fit.R2", ".2", put(f"{fit.R:.2f}"[1:]), "R2", "R for R²", ("f-from-r2", "restatement")
        )
    }
    values = {"fit": fit, "print": printed}
    return Paper("ticket-queues.txt", values, TICKET_QUEUES, slips)


TICKET_QUEUES = """
The queue at the ferry kiosk
Visitors team, Brackwater Institute for Tidal Paths

Abstract. Waiting time at the kiosk was measured in 66 half hours of the summer. More
arrivals lengthen it, more staff shorten it; a second window would pay for itself in July.

Methods. Half hours were drawn by lot between 1 June and 31 August. Waiting is the mean
of all who joined the queue. No half hour was left out. Two-tailed tests, alpha = .05.

Results. Arrivals and staff predicted waiting, R² = ⟦!r2⟧, F(2, 63) = ⟦fit.F 2⟧, p < .001.

⟦print⟧

Ten more arrivals cost about a minute and a half, b = ⟦fit.arrivals.b 3⟧, SE = ⟦fit.arrivals.se 3⟧,
t(63) = ⟦fit.arrivals.t 2⟧, p < .001; one more at the windows changes that by ⟦fit.staff.b 2⟧
minutes (SE = ⟦fit.staff.se 2⟧, t(63) = ⟦fit.staff.t 2⟧, p < .001).

Discussion. A queue of t = 12 min loses walkers to the old path. At F = 2.40 a ticket the
second window (R2 on the plan) earns its keep with nine more tickets an hour.
"""


def visitor_pace() -> Paper:
    """Return a Markdown manuscript without an error, full of what only looks like one."""
    draw = RandomState(320)
    wide, narrow = draw.normal(1.21, 0.18, 34), draw.normal(1.13, 0.27, 30)
    signed, plain = draw.normal(5.4, 2.1, 30), draw.normal(4.5, 2.1, 30)
    age = draw.normal(55, 14, 48)
    speed = 1.6 - 0.008 * age + draw.normal(0, 0.2, 48)
    sections = [draw.normal(level, 0.21, 25) for level in (1.05, 1.15, 1.30, 1.27)]
    table = fits.anova({f"S{i}": group for i, group in enumerate(sections)})
    pairs = [fits.pooled_t(sections[0], sections[j]) for j in (1, 2, 3)]
    spread = fits.anova({f"S{i}": np.abs(g - g.mean()) for i, g in enumerate(sections)})
    welch, one = fits.welch_t(wide, narrow), fits.pooled_t(signed, plain)
    one_sided = float(stats.t.sf(one.value, one.df))
    expect(welch.p < 0.05 < spread.effects[0].p, "width matters, spreads do not differ")
    expect(one_sided < 0.05 < one.p, "only the one-sided test is significant")
    expect(all(3 * pair.p < 0.05 for pair in pairs[1:]), "two pairs survive the correction")
    values: dict[str, object] = {
        "welch": welch,
        "one": one,
        "one_p": one_sided,
        "age": fits.correlation(age, speed),
        "section": table.effects[0],
        "levene": spread.effects[0],
    }
    for name, group in (("wide", wide), ("narrow", narrow), ("signed", signed), ("plain", plain)):
        values |= {f"m_{name}": float(group.mean()), f"s_{name}": float(group.std(ddof=1))}
    for j, pair in enumerate(pairs, start=2):
        values |= {f"pair{j}": pair, f"pair{j}_p": min(1.0, 3 * pair.p)}
    return Paper("visitor-pace.md", values, VISITOR_PACE, minus="−")


VISITOR_PACE = """
# How fast do people walk over the marsh?

*Visitors team, Brackwater Institute for Tidal Paths*

## Abstract

We timed walkers on boards of two widths, with and without distance signs, and on four sections of
the Long Reach. Wide boards, signs and firm sections make people faster; age makes them slower.

## Methods

Walkers were timed over 50 m between two posts. We use Welch's test where spreads differ and
Student's elsewhere. The hypothesis on signs was directed and registered as such (H2: β2 > 0), so it
was tested one-tailed; everything else is two-tailed. Pairs of sections were corrected after
Bonferroni for three comparisons. *p* < .05 was considered significant.

## Results

**Width.** On wide boards walkers were faster (*n* = 34, *M* = ⟦m_wide 2⟧, *SD* = ⟦s_wide 2⟧) than on narrow ones
(*n* = 30, *M* = ⟦m_narrow 2⟧, *SD* = ⟦s_narrow 2⟧), Welch's *t*(⟦welch.df 1⟧) = ⟦welch.value 2⟧, *p* ⟦welch.p p⟧.

**Signs.** As predicted, walkers passed more posts between rests where distances were signed
(*M* = ⟦m_signed 2⟧ against ⟦m_plain 2⟧), *t*(58) = ⟦one.value 2⟧, *p* ⟦one_p p⟧, one-tailed.

**Age.** Older walkers were slower, *r*(46) = ⟦age.value .2⟧, *p* ⟦age.p p⟧.

**Sections.** Variances were alike (Levene's test: *F*(3, 96) = ⟦levene.F 2⟧, *p* ⟦levene.p p⟧). The four sections
differed, *F*(3, 96) = ⟦section.F 2⟧, *p* ⟦section.p p⟧, ηp² = ⟦section.eta2_partial .2⟧. Against the first section, with
Bonferroni-corrected *p* values: the second, *t*(48) = ⟦pair2.value 2⟧, *p* ⟦pair2_p p⟧; the third,
*t*(48) = ⟦pair3.value 2⟧, *p* ⟦pair3_p p⟧; the fourth, *t*(48) = ⟦pair4.value 2⟧, *p* ⟦pair4_p p⟧.

## Discussion

An earlier survey of a river path found the same for age (Ostrander & Quill, 2011, p. 212; *r*(118) = −.31,
*p* < .001). Pace is bounded below: nobody stops for longer than t = 4 min in the wind. What is
F(2, 57)? asked one walker who had read our poster; we had left her the formula alone.
"""


def gull_deterrent() -> Paper:
    """Return a Markdown manuscript with three errors, one of which decides its conclusion."""
    draw = RandomState(332)
    n = 88
    distance, hour = draw.uniform(0, 300, n), np.zeros(n)
    bins = draw.poisson(3, n).astype(np.float64)
    hour = draw.uniform(8, 18, n)
    thefts = 6 - 0.009 * distance + 0.55 * bins + 0.1 * hour + draw.normal(0, 2.1, n)
    fit = fits.least_squares(thefts, {"distance": distance, "bins": bins, "hour": hour})
    off, on = draw.normal(4.2, 1.9, 44), draw.normal(3.4, 1.9, 44)
    kite = fits.pooled_t(off, on)
    expect(fit.hour.p > 0.05 and kite.p > 0.05, "neither the hour nor the kite matters")
    values = {
        "fit": fit,
        "kite": kite,
        "n": "88",
        "m_off": float(off.mean()),
        "m_on": float(on.mean()),
    }
    slips = {
        "abstract": Slip(
            "fit.F",
            "2",
            put(f"{fit.F + 0.9:.2f}"),
            "F",
            "digits from an earlier draft",
            ("restatement", "f-from-r2"),
        ),
        "n": Slip(
            "n", "s", put("78"), "n", "a digit wrong", ("n-from-df", "sample-flow", "r2-adjusted")
        ),
        "p": Slip(
            "kite.p",
            ".3",
            lambda literal: ".0" + literal[1:],
            "p",
            "point moved",
            ("p-from-t",),
            "reversal",
        ),
    }
    return Paper("gull-deterrent.md", values, GULL_DETERRENT, slips, minus="−")


GULL_DETERRENT = """
# Gulls, bins and a kite: thefts of lunch on the ferry steps

*Visitors team, Brackwater Institute for Tidal Paths*

## Abstract

Herring gulls steal lunches on the ferry steps. Distance from the colony, the number of bins and the
hour explained ⟦fit.R2 %1⟧% of the variance in thefts, *F*(3, 84) = ⟦!abstract⟧, *p* < .001. A kite shaped like an
eagle was tried as a deterrent.

## Methods

Thefts were counted in half hours from April to September. In the first study nothing was changed.
In the second a kite flew over the steps in 44 of 88 half hours, in an order drawn by lot. Tests are
two-tailed.

## Results

### Study 1

Thefts depended on the steps' surroundings, *R*² = ⟦fit.R2 .3⟧, adjusted *R*² = ⟦fit.R2_adj .3⟧, *F*(3, 84) = ⟦fit.F 2⟧,
*p* < .001, *N* = ⟦!n⟧. Near the colony there were more (*b* = ⟦fit.distance.b 4⟧, *SE* = ⟦fit.distance.se 4⟧,
*t*(84) = ⟦fit.distance.t 2⟧, *p* ⟦fit.distance.p p⟧), and bins drew gulls (*b* = ⟦fit.bins.b 2⟧, *SE* = ⟦fit.bins.se 2⟧,
*t*(84) = ⟦fit.bins.t 2⟧, *p* < .001). The hour did not matter (*b* = ⟦fit.hour.b 2⟧, *SE* = ⟦fit.hour.se 2⟧,
*t*(84) = ⟦fit.hour.t 2⟧, *p* ⟦fit.hour.p p⟧).

### Study 2

With the kite there were fewer thefts (*M* = ⟦m_on 2⟧) than without (*M* = ⟦m_off 2⟧), *t*(86) = ⟦kite.value 2⟧,
*p* = ⟦!p⟧: the kite works.

## Discussion

Bins should go from the steps to the car park, 400 m away. The kite should fly on all fine days;
it needs r = 2 m of line for each metre of height and someone to hold it.
"""
