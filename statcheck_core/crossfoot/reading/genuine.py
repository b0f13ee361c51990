"""Whether a group of numbers is a reported result, or only looks like one.

Look-alikes are many: functions and their values, labels of figures and roads, thresholds,
parameters of algorithms. A result needs a name with what belongs to it.
"""

from __future__ import annotations

import re
from collections.abc import Sequence
from itertools import pairwise

from crossfoot.expressions import expression
from crossfoot.reading.items import Item, Part
from crossfoot.reading.lookalikes import (
    in_call,
    is_drawn,
    is_function,
    is_logged,
    is_of_classifier,
    is_of_functions,
    is_of_items,
    is_power,
    is_supposed,
    near,
)

_STATISTICAL = expression(
    r"anova|regress|effect|interact|signific|varian|model|test|differ|predict|explain|estimat|associat"
    r"|analys|correlat|coefficient|quadrat",
    re.IGNORECASE,
)
_FIT = expression(
    r"regress|model|varian|\bfit|predict|explain|account|correlat|adjusted|determination|squared?\b|quadrat"
    r"|modell|modèle|varianz|回归|回帰|決定",
    re.IGNORECASE,
)
_EFFECT = expression(r"effect|interact|differ|main|signific", re.IGNORECASE)
_RELATED = expression(
    r"correlat|associat|relat|coefficient|Pearson|Spearman|zusammenh|corrél|korrel|相关|相関|상관|samvar|verband",
    re.IGNORECASE,
)
#: A parameter that goes on where p ends: `t = 0.25, p = 0.001, z = 3.5`.
_OTHER_LETTER = expression(r"[,;]\s?(?![nNdgrRMVW]\b)[a-zA-Z]\s?=\s?[\d.]")
#: A time before F, in the trace of a computation: `t = 0.05  F = 12.11  p = 0.99`.
_TRACED = expression(r"(?<!\w)t\s?=\s?\d{1,8}(?:\.\d{1,8})?[,;]?\s{1,4}$")
_OTHER_TEST = expression(r"\bF(?:[\s-](?:value|ratio|statistic))?\s?(?:[(\[_=₀-₉]|\d)")
_WORD = expression(r"[^\W\d_]{3,}")
#: Words that may stand between a test and its p where nothing tells that they belong together.
_FEW = 2
#: How far such words are looked for.
_BESIDE = 200
_DECIMALS = expression(r"[.,·]\d")
#: Between a coefficient and a p that alone supports it: nothing but list marks.
_LIST_MARKS = expression(r"[\s,;()\[\]]{1,4}|\*{1,4}[\s,;()\[\]]{1,4}")
#: … or a word that says as much, on one line or the next.
_LISTED_NEXT = expression(
    r"(?!\s*\n\s*[\n*•-])[\s,;()\[\]–-]{0,4}(?:(?:at|with)\s(?:an?\s|the\s)?)?[\s,;()\[\]]{0,2}"
)
_SHARES = frozenset({"R2", "R2_adj", "R2_change"})
_SUPPORT = frozenset({"R2", "R2_adj", "R2_change", "eta2", "eta2_partial", "omega2"})
#: Fewer degrees of freedom than this are more often the indices of a matrix.
_FEWEST = 4.0
#: And fewer than this may be the arguments of a function.
_FEW_ENOUGH = 20.0


def is_result(anchor: str | None, items: Sequence[Item], text: str) -> bool:
    """Say whether a group is a reported result.

    Parameters
    ----------
    anchor
        The quantity of its test, or None.
    items
        Its items, settled.
    text
        The folded text of the block.
    """
    quantities = {part.quantity for item in items for part in item.parts}
    heads = _SHARES if anchor is None else {anchor}
    test = next((item for item in items if item.head in heads), None)
    if test is not None and is_supposed(test, text):
        return False
    if any(p.quantity == "df" and p.high < _LEAST_DF for item in items for p in item.parts):
        return False
    if not items or in_call(text, items[0].start):
        return False
    if anchor in {"b", "β", "beta", "t"} and is_of_items(items, text):
        return False
    if anchor in {"F", "F_change"}:
        return _is_f_test(anchor, items, quantities, text)
    if anchor in {"t", "z", "chi2", "r"}:
        return _is_test(anchor, items, quantities, text)
    if anchor in {"b", "β", "beta", "odds_ratio"}:
        return _is_coefficient(items, quantities, text)
    return {"vif", "tolerance"} <= quantities or _is_fit(items, text)


_LEAST_DF = 0.9


def _has_p(items: Sequence[Item]) -> bool:
    p = next((item for item in items if item.head == "p"), None)
    return p is not None and _is_probability(p.parts[0])


#: A p above one is a misprint, as 1.4 may be; 2 is a count.
_MOST = 1.4


def _supports(items: Sequence[Item], test: Item, text: str) -> bool:
    """Say whether a p stands by a test: no further than two words, or where words tell of tests."""
    p = next((item for item in items if item.head == "p"), None)
    if p is None or not _is_probability(p.parts[0]):
        return False
    if "|" in text[p.start : p.end]:
        return True  # Pr(|Z| > |z|) names its test
    first, second = (p, test) if p.start < test.start else (test, p)
    return _side(first, second, text) or near(_STATISTICAL, items, text, _BESIDE)


def _together(items: Sequence[Item], text: str) -> bool:
    """Say whether all items stand side by side, or words tell of tests."""
    return all(_side(first, second, text) for first, second in pairwise(items)) or near(
        _STATISTICAL, items, text, _BESIDE
    )


def _is_told(items: Sequence[Item], text: str) -> bool:
    """Say whether words of statistics stand around a group."""
    return near(_STATISTICAL, items, text, _BESIDE)


def _side(first: Item, second: Item, text: str) -> bool:
    """Say whether no more than a few words stand between two items."""
    return len(_WORD.findall(text, first.end, second.start)) <= _FEW


def _is_probability(part: Part) -> bool:
    """Say whether a number can be meant as a probability, if perhaps misprinted."""
    return part.high <= 1.0 if part.relation in "<≤" else part.high >= 0.0 and part.low <= _MOST


def _spelt(text: str, part: Part) -> bool:
    return _DECIMALS.search(text, part.start, part.end) is not None


def _is_f_test(anchor: str, items: Sequence[Item], quantities: set[str], text: str) -> bool:
    test = next(item for item in items if item.head == anchor)
    value = next(part for part in test.parts if part.quantity in {"F", "F_change"})
    has_p = _supports(items, test, text)
    if {"by-subject", "by-item"} & set(test.flags) and value.relation == "=":
        return has_p
    support = has_p or bool(quantities & _SUPPORT)
    if "df2" not in quantities:
        if value.relation == "=":
            traced = _TRACED.search(text, max(0, test.start - 24), test.start) is not None
            told = quantities & _SUPPORT or _is_told(items, text) or _side_by_side(items, text)
            return support and bool(told) and not traced and not is_of_classifier(items, text)
        # `F < 1` alone says little, and yet what it says of an effect.
        plural = "plural" in test.flags
        bound = plural or near(_EFFECT, items, text) or near(_OTHER_TEST, items, text)
        exact = any(p.quantity == "p" and p.relation == "=" for i in items for p in i.parts)
        return (plural or not exact) and bound and value.relation in "<≤>≥"
    error = next(p for item in items for p in item.parts if p.quantity == "df2")
    if error.high < _FEW_ENOUGH and is_function(items, text):
        return False
    if support or {"lower", "labelled"} & set(test.flags) or error.high < _FEWEST:
        return support
    if not _spelt(text, value) or _is_lowered(test, text):  # an index, if words do not tell
        return (value.relation != "=" and near(_STATISTICAL, items, text)) or (
            _spelt(text, value) and near(_STATISTICAL, items, text)
        )
    return True


def _is_test(anchor: str, items: Sequence[Item], quantities: set[str], text: str) -> bool:
    test = next(item for item in items if item.head == anchor)
    value = next(part for part in test.parts if part.quantity == anchor)
    has_p = _supports(items, test, text)
    if {"by-name", "labelled"} & set(test.flags) and not has_p:
        return False
    if anchor == "r":
        has_p = has_p and _p_isnear(items, test, text)
        counted = bool(quantities & {"df", "n"})
        possible = value.high >= -1.0 and value.low <= 1.0
        if counted and not has_p and "df" not in quantities and not _side_by_side(items, text):
            return False
        sure = has_p and "n" in quantities
        another = is_power(items, text) or (not sure and is_of_classifier(items, text))
        if "df" not in quantities and another:
            return False
        if not (counted or near(_RELATED, items, text) or _is_listed(items, test, text)):
            return False
        if not has_p and (_is_lowered(test, text) or _is_index(items, test, text)):
            return False
        return _spelt(text, value) and (has_p or counted) and (possible or "df" in quantities)
    if anchor == "z":
        of_estimate = quantities & {"b", "beta", "se", "odds_ratio"}
        return has_p or (bool(of_estimate) and _together(items, text))
    flat = any(part.quantity == "df" and text[part.start - 1].isalpha() for part in test.parts)
    by_unit = {"by-subject", "by-item"} & set(test.flags)
    if (flat or by_unit or text[test.start] == "T") and not has_p:
        return False
    if "df" in quantities:
        if has_p or near(_STATISTICAL, items, text):
            return True
        spelt = _spelt(text, value) and not _is_lowered(test, text)
        return spelt and not is_of_functions(items, text)
    if anchor == "t" and quantities & {"b", "beta", "se"}:
        return _together(items, text)
    of_fit = "n" in quantities and bool(quantities & {"R2", "R2_adj"})
    if of_fit and "p" not in quantities and _side_by_side(items, text):
        return True  # (t = 3.9; R² = .17; N = 76)
    return has_p and _follows_or_told(items, test, value, text) and not is_function(items, text)


def _p_isnear(items: Sequence[Item], test: Item, text: str) -> bool:
    """Say whether p follows a test, or stands right before it."""
    p = next(item for item in items if item.head == "p")
    before = text[p.end : test.start]
    return p.start > test.start or _LIST_MARKS.fullmatch(before) is not None


def _follows_or_told(items: Sequence[Item], test: Item, value: Part, text: str) -> bool:
    """Say whether p follows a test that prints no df, or words tell that it is one."""
    told = near(_STATISTICAL, items, text)
    p = next(item for item in items if item.head == "p")
    if _OTHER_LETTER.match(text, p.end):
        return False
    if p.start > test.start:
        alone = "\n" in text[value.end : p.start] and not text[value.end : p.start].strip()
        return told or (_spelt(text, value) and not alone)  # settings have a line each
    return told and _LIST_MARKS.fullmatch(text, p.end, test.start) is not None


def _is_lowered(test: Item, text: str) -> bool:
    """Say whether the df of a test are lowered, as the indices of a sequence are."""
    first = next((part for part in test.parts if part.quantity in {"df", "df1"}), None)
    return first is not None and text[test.start : first.start].rstrip().endswith("_{")


def _is_index(items: Sequence[Item], test: Item, text: str) -> bool:
    """Say whether the df of a correlation may be an argument, a lag, an index.

    They are so few, or another one stands near and no word tells what the letter means.
    """
    if any(part.quantity == "df" and part.high < _FEWEST for part in test.parts):
        return True
    around = _OF_NUMBER.findall(text, max(0, test.start - 160), test.end + 160)
    return len(around) > 1 and not near(_RELATED, items, text)


_OF_NUMBER = expression(r"(?<!\w)r\s?\(\s?\d")


def _is_listed(items: Sequence[Item], test: Item, text: str) -> bool:
    """Say whether marks of a list stand between a test and its p."""
    p = next((item for item in items if item.head == "p"), test)
    between = text[min(p.end, test.end) : max(p.start, test.start)]
    if ";" in between and (words := set(_PLAIN_WORD.findall(between))) and not words & _LINKS:
        return False  # another clause
    return not set(",;()").isdisjoint(between)


_PLAIN_WORD = expression(r"[^\W\d_]{3,}")
_LINKS = frozenset({"tailed", "sided", "with", "and", "adjusted", "corrected", "exact"})


def _side_by_side(items: Sequence[Item], text: str) -> bool:
    """Say whether all items stand in one list, with nothing but marks between."""
    return all(_LIST_MARKS.fullmatch(text, a.end, b.start) for a, b in pairwise(items))


def _is_coefficient(items: Sequence[Item], quantities: set[str], text: str) -> bool:
    if not any(_spelt(text, part) for item in items for part in item.parts):
        return False
    if {"p", "se"} <= quantities:
        return True
    if quantities & {"t", "z"}:
        return _together(items, text)
    if quantities & {"se", "ci_low"}:
        return not is_drawn(items, text)
    if any("dealt" in item.flags for item in items):
        return _has_p(items)
    # With a p alone beside it, the two must stand in one list: `(β = .31, p = .001)`.
    for first, second in pairwise(items):
        if second.head == "p" and first.parts[-1].relation == "=":
            between = text[first.end : second.start]
            if _LISTED_NEXT.fullmatch(between):
                return _has_p(items)
    return False


def _is_fit(items: Sequence[Item], text: str) -> bool:
    """Say whether an R² without a test is one: with another quantity, or where words tell so."""
    shares = [item for item in items if item.head in _SHARES]
    printed = [
        item
        for item in shares
        if "percent" not in item.flags
        and re.search(r"[.,%]\d|%", text[item.parts[-1].start : item.parts[-1].end])
    ]
    if is_logged(items, text):
        return False
    return bool(printed) and (len(items) > 1 or near(_FIT, items, text))
