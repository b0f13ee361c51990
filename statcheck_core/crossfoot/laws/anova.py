"""What adds up, and what divides, in a table of analysis of variance."""

from __future__ import annotations

from functools import lru_cache

from crossfoot.laws.arithmetic import (
    add,
    complement,
    divide,
    multiply,
    odds,
    root,
    share,
    square,
    subtract,
)
from crossfoot.laws.declare import MODEL, form, identity
from crossfoot.laws.identity import Form, Identity
from crossfoot.laws.interval import Interval

_TABLE = "anova-table"
_SOURCE = "NIST/SEMATECH e-Handbook of Statistical Methods, section 7.4.3.3"

_SUMS = {
    "anova-sums": (
        "sums of squares add up",
        "SS total = SS model + SS error",
        "The total is the corrected one. Sums of squares of several effects add up where they are "
        "sequential or the design is balanced.",
        "The sums of squares of the parts of an analysis of variance add up to the total. Where "
        "they do not, one of them is misprinted, a row is missing, or the effects overlap, as "
        "those of an unbalanced design do.",
    ),
    "anova-df": (
        "degrees of freedom add up",
        "df total = df model + df error",
        "The total is the corrected one, with n − 1 degrees of freedom.",
        "The degrees of freedom of the parts of an analysis of variance add up to those of the "
        "total. Where they do not, one of them is misprinted or a row is missing.",
    ),
}


@lru_cache(maxsize=256)
def sum_of_parts(slug: str, number: int) -> Identity:
    """Return the identity of a total with so many parts.

    Parameters
    ----------
    slug
        ``anova-sums`` or ``anova-df``.
    number
        How many parts there are, at least one. The quantities are ``total`` and ``part1``,
        ``part2`` and so on, to be bound to the cells that add up.
    """
    title, formula, assumption, explanation = _SUMS[slug]
    parts = [f"part{i}" for i in range(1, number + 1)]
    # Degrees of freedom always add up, and so do two sums of squares.
    assumed = "orthogonal-effects" if slug == "anova-sums" and number > 2 else ""
    if number != 2:
        formula = f"total = {' + '.join(parts)}"
    return identity(
        slug,
        title,
        formula,
        " ".join(["total", *parts]),
        (
            form("total", f"total = {' + '.join(parts)}", " ".join(parts), add, assumed=assumed),
            *[_part(part, [p for p in parts if p != part], assumed) for part in parts],
        ),
        needs="unadjusted-df",
        assumption=assumption,
        source=_SOURCE,
        explanation=explanation,
        kinds=_TABLE,
    )


def _part(part: str, others: list[str], assumed: str) -> Form:
    return form(
        part,
        " − ".join([f"{part} = total", *others]),
        " ".join(["total", *others]),
        _remainder,
        assumed=assumed,
    )


def _remainder(total: Interval, *others: Interval) -> Interval:
    return subtract(total, add(*others))


MS_FROM_SS = identity(
    "ms-from-ss",
    "mean square from sum of squares",
    "MS = SS/df",
    "ms ss df",
    (
        form("ms", "MS = SS/df", "ss df", divide),
        form("ss", "SS = MS·df", "ms df", multiply),
        form("df", "df = SS/MS", "ss ms", divide),
    ),
    needs="unadjusted-df",
    assumption="The three numbers stand in one row.",
    source=_SOURCE,
    explanation="A mean square is a sum of squares divided by its degrees of freedom. Where it is "
    "not, one of the three numbers of the row is misprinted or stands in the wrong row.",
    kinds=_TABLE,
)

F_FROM_MS = identity(
    "f-from-ms",
    "F from mean squares",
    "F = MS effect/MS error",
    "F ms_effect ms_error",
    (
        form("F", "F = MS effect/MS error", "ms_effect ms_error", divide),
        form("ms_effect", "MS effect = F·MS error", "F ms_error", multiply),
        form("ms_error", "MS error = MS effect/F", "F ms_effect", lambda F, ms: divide(ms, F)),
    ),
    needs="fixed-effects",
    assumption="The effect is fixed, so that its mean square is compared with the error's.",
    source=_SOURCE,
    explanation="The F of an effect is its mean square over the error's. Where it is not, one of "
    "the three is misprinted, or F was taken over another error term.",
    kinds=f"{_TABLE} effect {MODEL}",
)


def _effect_of_error(R2: Interval, ss_error: Interval) -> Interval:
    return multiply(odds(R2), ss_error)


def _error_of_effect(R2: Interval, ss_model: Interval) -> Interval:
    return divide(ss_model, odds(R2))


R2_FROM_SS = identity(
    "r2-from-ss",
    "R² from sums of squares",
    "R² = SS model/SS total",
    "R2 ss_model ss_error ss_total",
    (
        form("R2", "R² = SS model/SS total", "ss_model ss_total", divide),
        form(
            "R2",
            "R² = 1 − SS error/SS total",
            "ss_error ss_total",
            lambda error, total: complement(divide(error, total)),
        ),
        form(
            "R2",
            "R² = SS model/(SS model + SS error)",
            "ss_model ss_error",
            lambda model, error: share(divide(model, error)),
        ),
        form("ss_model", "SS model = R²·SS total", "R2 ss_total", multiply),
        form("ss_model", "SS model = SS error·R²/(1 − R²)", "R2 ss_error", _effect_of_error),
        form(
            "ss_error",
            "SS error = (1 − R²)·SS total",
            "R2 ss_total",
            lambda R2, total: multiply(complement(R2), total),
        ),
        form("ss_error", "SS error = SS model·(1 − R²)/R²", "R2 ss_model", _error_of_effect),
        form("ss_total", "SS total = SS model/R²", "ss_model R2", divide),
        form(
            "ss_total",
            "SS total = SS error/(1 − R²)",
            "ss_error R2",
            lambda error, R2: divide(error, complement(R2)),
        ),
    ),
    needs="within-sample",
    assumption="R² is that of the fit that the table is of, and the total is the corrected one.",
    source=_SOURCE,
    explanation="R² is the model's share of the total sum of squares. Where it is not, R² or a "
    "sum of squares is misprinted, or R² is the adjusted one.",
    kinds=f"{_TABLE} {MODEL}",
)

S_FROM_MS = identity(
    "s-from-ms",
    "residual standard deviation from the mean square",
    "s = √(MS error)",
    "s ms_error",
    (
        form("s", "s = √(MS error)", "ms_error", root),
        form("ms_error", "MS error = s²", "s", square),
    ),
    needs="",
    assumption="Both are of the same fit.",
    source=_SOURCE,
    explanation="The residual standard deviation is the root of the error's mean square. Where it "
    "is not, one of the two is misprinted.",
    kinds=f"{_TABLE} {MODEL}",
)

IDENTITIES = (
    sum_of_parts("anova-sums", 2),
    sum_of_parts("anova-df", 2),
    MS_FROM_SS,
    F_FROM_MS,
    R2_FROM_SS,
    S_FROM_MS,
)
