"""p values: what their names say of sides and of correction, and what is no p of a result."""

from __future__ import annotations

import re

from crossfoot.expressions import expression
from crossfoot.reading.brackets import BRACKETS
from crossfoot.reading.items import Item, Text
from crossfoot.reading.names import Name
from crossfoot.reading.numerals import NUMERAL
from crossfoot.reading.values import (
    count_at,
    known_number,
    number_at,
    value_after,
)
from crossfoot.reading.words import ALL

_OR_LESS = expression(r"\sor\s(?:less|lower|smaller|below|better)\b")
#: "p = 0.04 of default": the probability of something else than a test's result
_OF_SOMETHING = expression(
    r"\sof\s(?!(?:the|this|that|an?|all|both|each|F|t|r|z)\b|interact|effect|slope|differ|trend|test)[a-z]{3}"
)
_EXACT_BEHIND = expression(r"\s?[(\[,]\s?[pP]\s?=\s?(?=0?[.,]\d)")
_COUNTED = expression(r"\s(?:[a-z]{2,14}\s){0,2}(?:predictor|regressor|covariate|variable|feature)")
_ALL = expression(rf"(?<![^\W\d_]){ALL}\s$|[均都もて]\s?$", re.IGNORECASE)
_SIDED = expression(r"\s?\(?(?P<one>one|two|1|2)-?\s?(?:sided|tailed)\)?", re.IGNORECASE)
_ADJUSTED_NAME = expression(r"adj|corr|bonf|holm|tukey|fdr", re.IGNORECASE)
_ADJUSTED_BEFORE = expression(
    r"(?:adj\.?|adjusted|corrected|Bonferroni|Holm|Tukey)\s?-?$", re.IGNORECASE
)
_ADJUSTED_LABEL = expression(r"Bonf|Holm|Tukey|adj|corr|FDR", re.IGNORECASE)
#: A mark that starts a sentence or a list, before a p; emphasis of p has a mark behind it too.
_MARKED = expression(r"(?:^|[.;:(\n]\s?|(?P<comma>,\s?))[*†‡]{1,4} ?$")
_MARKED_ALSO = expression(r"[*†‡] ?[pP]\s?[<≤][^a-zA-Z]{1,12}$")
_MARKED_NEXT = expression(r"[,;.]?\s?[*†‡]{1,4} ?[pP]\s?[<≤]")


def explains_marks(text: Text, item: Item) -> bool:
    """Say whether a p is what marks of significance stand for: ``* p < .05, ** p < .01``."""
    folded, start = text.folded, item.start
    emphasis = "*" in {folded[start + 1], folded[item.end : item.end + 1]}
    if emphasis or folded[max(0, start - 1) : start] not in {"*", "†", "‡", " "}:
        return False
    marked = _MARKED.search(folded, max(0, start - 8), start)
    if marked is None:
        return False
    return (
        marked["comma"] is None
        or _MARKED_NEXT.match(folded, item.end) is not None
        or _MARKED_ALSO.search(folded, max(0, marked.start() - 24), marked.start()) is not None
    )


def read_p(text: Text, name: Name) -> Item | None:
    """p, with what its name or a bracket says of sides and of correction."""
    start, end = name.match.span()
    printed = name.match.group()
    flags: tuple[str, ...] = ()
    before = _ADJUSTED_BEFORE.search(text.folded, max(0, start - 14), start)
    if _ADJUSTED_NAME.search(printed) or before:
        flags = ("adjusted-p",)
    elif "perm" in printed:
        flags = ("resampled",)
    bracket = BRACKETS.match(text.folded, end)
    if bracket is not None and (inner := bracket["round"] or bracket["lowered"]):
        sided = _SIDED.match(inner)
        if sided is not None:
            flags = (*flags, "one-sided" if sided["one"].lower() in {"one", "1"} else "two-sided")
        elif inner.strip().isdigit():
            return None
        elif bracket["lowered"] or _ADJUSTED_LABEL.search(inner):
            flags = _index_of_p(inner)
        else:
            return None
        end = bracket.end()
    if "tailed" in printed:
        flags = (*flags, "one-sided" if "one" in printed else "two-sided")
    if text.folded[end : end + 1] == "均":  # P均<0.05
        flags, end = (*flags, "plural"), end + 1
    area = _AREA.match(text.folded, end)
    if area is not None:
        return _read_area(text, area, start)
    value = value_after(text, end, "p", name, bare=text.folded[start - 1 : start] in " (,;")
    if value is None or _OF_SOMETHING.match(text.folded, value.end):
        return None
    if value.low > 1 and _COUNTED.match(text.folded, value.end):
        counted = value._replace(quantity="k")  # p = 3 predictors
        return Item("k", (counted,), start, value.end, ("letter",))
    end = value.end
    sided = _SIDED.match(text.folded, end)
    if sided is not None:
        end = sided.end()
        flags = (*flags, "one-sided" if sided["one"].lower() in {"one", "1"} else "two-sided")
    if value.relation == "=" and _OR_LESS.match(text.folded, value.end):
        value = value._replace(relation="≤", low=-float("inf"))
    exact = _EXACT_BEHIND.match(text.folded, end) if value.relation != "=" else None
    value = (exact and number_at(text, exact.end(), "p", "=")) or value  # p < .05 (p = .026)
    if printed.lower() in {"ps", "p's"} or _is_of_all(text.folded, start):
        flags = (*flags, "plural")
    return Item("p", (value,), start, max(end, value.end), flags)


#: The tail area that p is, written out: ``P(F(2, 57) > 4.21) = 0.0197``.
_AREA = expression(
    r"\s?=\s?P\((?P<test>F|t|Chi-square|z)(?:\((?P<a>\d{1,7})(?:,\s?(?P<b>\d{1,9}))?\))?\s?>\s?[-\d.]{1,20}\)"
    rf"\s?=\s?(?P<p>{NUMERAL})"
)


def _read_area(text: Text, match: re.Match[str], start: int) -> Item | None:
    """Read a p that stands behind its tail area, with the degrees of freedom of the latter."""
    names = ("df1", "df2") if match["test"] == "F" else ("df",)
    degrees = [
        count_at(text, match[group], match.start(group), name)
        for name, group in zip(names, ("a", "b"), strict=False)
        if match[group]
    ]
    value = known_number(text, match, "p", "p")
    if value is None:
        return None
    return Item("p", (value, *filter(None, degrees)), start, match.end())


def _is_of_all(folded: str, start: int) -> bool:
    """Say whether a word before p gives it to all tests: ``both p < .05``."""
    lead = folded[max(0, start - 2) : start].rstrip()
    return lead[-1:].isalpha() and _ALL.search(folded, max(0, start - 24), start) is not None


def _index_of_p(index: str) -> tuple[str, ...]:
    """Return what an index of p says: an unknown one may name a correction."""
    for pattern, flags in _INDICES_OF_P:
        if pattern.search(index):
            return flags
    return ("adjusted-p",)


#: What indices of p say, the first that fits.
_INDICES_OF_P = (
    (expression(r"^(?:GG|HF|[Gg]reenhouse|[Hh]uynh)"), ("adjusted-df",)),
    (expression(r"perm|boot|rand|exact|mc\b|sim", re.IGNORECASE), ("resampled",)),
    (
        expression(
            r"^(?:trend|inter(?:action)?|value|overall|diff|model|group|time|val|obs|[a-z]?)$"
        ),
        (),
    ),
)
