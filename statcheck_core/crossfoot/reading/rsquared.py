"""R², adjusted R², ΔR² and their relatives: which one a name means."""

from __future__ import annotations

import re

from crossfoot.expressions import expression
from crossfoot.reading.items import Item, Text
from crossfoot.reading.notation import Name
from crossfoot.reading.values import value_after

_ADJUSTED = (
    r"(?:adj(?:usted|\.)?|angepasst\w*|bereinigt\w*|corrected|korrigiert\w*|adjustiert\w*|ajust[ée]\w*|ajustad\w*|corretto"
    r"|corregid\w*|aggiustat\w*|gecorrigeerd\w*|aangepast\w*|juster\w*|adjustad\w*|調整済み?|调整后?的?"
    r"|調整|수정된?|조정된?|düzeltilmiş|skorygowan\w*|upraven\w*|hiệu\schỉnh|скорректированн\w*)"
)
_PSEUDO = (
    r"(?:pseudo|Nagelkerke(?:'s)?|McFadden(?:'s)?|Cox\s(?:&|and)\sSnell|marginal|conditional"
    r"|cross-validated|within|between|predicted|CV|test|generali[sz]ed|Tjur(?:'s)?)"
)
_CHANGED = (
    r"(?:(?:change|increase|increment|gain|rise)\s(?:in|of)|Δ|incremental"
    r"|(?:increas|rais|improv)\w*\s?(?:the)?)"
)
_BEFORE = expression(
    rf"(?:(?P<adjusted>{_ADJUSTED})|(?P<pseudo>{_PSEUDO})|(?P<changed>{_CHANGED})"
    r"|(?P<partial>(?:semi-?)?partial))[\s-]?\(?$",
    re.IGNORECASE,
)
_AFTER = expression(
    rf"[\s-]?_?[{{(]?\s?(?:(?P<adjusted>{_ADJUSTED})|(?P<changed>change)|(?P<pseudo>{_PSEUDO}))(?![a-z])"
    r"\.?\s?[})]?",
    re.IGNORECASE,
)
_INSIDE = expression(
    r"_\{?\s?(?:(?P<adjusted>adj\.?|a|adjusted|korr|corr|c)|(?P<changed>change|inc|Δ)"
    r"|(?P<pseudo>[A-Za-z]{1,12}))\s?\}?"
)
_GREW = expression(
    r"\s(?:significantly\s)?(?:increased|rose|improved|grew)\s(?:significantly\s)?(?=by\s)"
)
_OPEN = expression(r"\s?\((?=\s?=)|\)(?=\s(?:was|is|of)\s)")
#: After one of these and a space no word about the name stands before it.
_APART = frozenset(",;:=")
#: How far before the name a word about it may stand, in characters.
_REACH = 26


def read_r_squared(text: Text, name: Name) -> Item | None:
    """Read an R² of any kind; words and indices around the name say which."""
    folded = text.folded
    start, end = name.match.span()
    before = None
    if folded[start - 1 : start].strip(" \n") or folded[start - 2 : start - 1] not in _APART:
        before = _BEFORE.search(folded, max(0, start - _REACH), start)
    after = _AFTER.match(folded, end)
    inside = _INSIDE.search(name.match.group())
    said = {
        key
        for match in (before, after, inside)
        if match is not None
        for key, words in match.groupdict().items()
        if words
    }
    if "partial" in said:
        return None
    quantity = name.notation.quantity
    if "adjusted" in said or "\u0304" in name.match.group():
        quantity = "R2_adj"
    elif "changed" in said:
        quantity = "R2_change"
    if after is not None:
        end = after.end()
    grew = _GREW.match(folded, end)
    if grew is not None:
        quantity, end = "R2_change", grew.end() - 1
    opened = _OPEN.match(folded, end)
    value = value_after(text, opened.end() if opened is not None else end, quantity, name)
    if value is None or _is_count(folded[value.start : value.end], value.low):
        return None
    start = before.start() if before is not None else start
    flags = ("pseudo-r2",) if "pseudo" in said else ()
    return Item(quantity, (value,), start, value.end, flags)


def _is_count(literal: str, low: float) -> bool:
    """Say whether a number can't be a share: R2 numbers resistors and roads, too."""
    return low > 1.4 and not re.search(r"[.,·%]", literal)
