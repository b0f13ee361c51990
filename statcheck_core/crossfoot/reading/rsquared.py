"""R², adjusted R², ΔR² and their relatives: which one a name means."""

from __future__ import annotations

import re
from collections.abc import Iterator

from crossfoot.expressions import expression
from crossfoot.reading.items import Item, Part, Text
from crossfoot.reading.names import Name
from crossfoot.reading.numerals import NUMERAL
from crossfoot.reading.values import known_number, number_at, value_after
from crossfoot.reading.words import ADJUSTED, CHANGED, PSEUDO

_BEFORE = expression(
    rf"(?:(?P<adjusted>{ADJUSTED})|(?P<pseudo>{PSEUDO})|(?P<changed>{CHANGED})"
    r"|(?P<partial>(?:semi-?)?partial|mean|average|median|averaged))[\s-]?\(?$",
    re.IGNORECASE,
)
_AFTER = expression(
    rf"[\s-]?_?[{{(]?\s?(?:(?P<adjusted>{ADJUSTED})|(?P<changed>change)|(?P<whole>m[úu]ltiple|multiple)|(?P<pseudo>{PSEUDO}))(?![a-z])"
    r"\.?\s?[})]?",
    re.IGNORECASE,
)
_INSIDE = expression(
    rf"_\{{?\s?(?:(?P<adjusted>[aA]dj\.?|a|korr|corr|kor|c|(?i:{ADJUSTED}))(?![A-Za-z])|(?P<changed>change|inc|Δ)"
    r"|(?P<pseudo>[A-Za-z]{1,12}))\s?\}?"
)
#: The same for an index c that stands for "conditional".
_OF_MIXED = expression(r"_\{?\s?(?P<pseudo>[A-Za-z]{1,12})")
_MARGINAL = expression(r"[Rr]\s?(?:²|\^\{?2\}?|2)?\s?_?\{?\s?(?:m|marg)(?![a-z])")
_GREW = expression(
    r"\s(?:significantly\s)?(?:increased|rose|improved|grew)\s(?:significantly\s)?(?=by\s)"
)
#: R² rose from .12 in Model 1 to .20 in Model 2; the variance explained grew from 12% to 20%.
_FROM_TO = expression(
    rf"(?P<raised>(?:rais|increas|improv|lift|boost|brought|lower|reduc)\w*\s(?:the\s)?)?(?P<name>(?P<adjusted>{ADJUSTED}[\s-])?R\s?(?:²|\^\{{?2\}}?|2|-squared?)|varia(?:nce|tion)(?:\sexplained)?)"
    r"(?(raised)|(?:\s\w+ly)?\s(?:increased|rose|improved|grew|went|climbed|changed|dropped|fell|decreased)(?:\s\w+ly)?)"
    rf"\sfrom\s(?P<first>{NUMERAL})(?:\s[^.;()=<>]{{1,40}}?)??\sto\s(?P<second>{NUMERAL})",
    re.IGNORECASE,
)
_OPEN = expression(r"\s?\((?=\s?=)|\)(?=\s(?:was|is|of)\s)")
#: A number in brackets: `an R² (.21)`; a whole one is a footnote or a sample.
_IN_BRACKETS = expression(r"\s?\(\s?(?=(?:\d{0,2}[.,]\d+\s?%?|\d{1,2}\s?%)\s?\))")
#: Both at once: `R²/adjusted R² = .21/.19`, `R² (adj. R²) = .21 (.19)`.
_BOTH = expression(
    rf"\s?(?:/|\(|,|and)\s?{ADJUSTED}[\s-]?(?:[Rr]\s?(?:²|\^\{{?2\}}?|2))?\s?\)?(?=\s?(?:=|:|of|was))",
    re.IGNORECASE,
)
#: The adjusted one without its letter behind the other: `R² = 61.4%, adj. 60.2%`.
_ALSO = expression(rf"\s?[,;]\s?{ADJUSTED}(?![a-z])\.?\s?[:=]?\s?(?=\d?\d?[.,]\d)", re.IGNORECASE)
_SECOND = expression(rf"\s?(?:/|\(|,|and)\s?(?P<number>{NUMERAL})")
#: After one of these and a space no word about the name stands before it.
_APART = frozenset(",;:=")
#: How far before the name a word about it may stand, in characters.
_REACH = 26


#: How far from a conditional R² the marginal one stands, in characters.
_BESIDE = 60
#: Within so many characters behind the name a word about it starts.
_LEAD = 5


def read_r_squared(text: Text, name: Name) -> Item | None:
    """Read an R² of any kind; words and indices around the name say which."""
    folded = text.folded
    start, end = name.match.span()
    if folded[start - 1 : start] == "*" and folded[start - 2 : start - 1].isalnum():
        return None  # "Obs*R-squared", a statistic
    worded = any(map(str.isalpha, folded[end : end + _LEAD]))
    both = _BOTH.match(folded, end) if worded and name.notation.quantity == "R2" else None
    if both is not None and (parts := _two(text, both.end(), name)):
        return Item("R2", parts, start, parts[-1].end)
    before = None
    if folded[start - 1 : start].strip(" \n") or folded[start - 2 : start - 1] not in _APART:
        before = _BEFORE.search(folded, max(0, start - _REACH), start)
    after = _AFTER.match(folded, end) if worded else None
    inside = _INSIDE.search(name.match.group())
    if inside is not None and _is_conditional(inside, folded, start):
        inside = _OF_MIXED.search(name.match.group())
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
    if value is None and (opened := _IN_BRACKETS.match(folded, end)) is not None:
        value = number_at(text, opened.end(), quantity, "=")
    if value is None or _is_count(folded[value.start : value.end], value.low):
        return None
    start = before.start() if before is not None else start
    also = _ALSO.match(folded, value.end) if quantity == "R2" else None
    if also is not None and (second := number_at(text, also.end(), "R2_adj", "=")) is not None:
        return Item("R2", (value, second), start, second.end)
    flags = ("pseudo-r2",) if "pseudo" in said else ()
    return Item(quantity, (value,), start, value.end, flags)


def of_two_models(text: Text, start: int, end: int) -> Iterator[Item]:
    """Yield the R² of a model and of the next: ``R² rose from .12 to .20``."""
    if text.folded.find(" from ", start, end) < 0:
        return
    for match in _FROM_TO.finditer(text.folded, start, end):
        quantity = "R2_adj" if match["adjusted"] else "R2"
        for group in ("first", "second"):
            part = known_number(text, match, group, quantity)
            if part is not None and part.high <= 1.0:
                flags = ("grown",) if group == "second" else ()
                yield Item(quantity, (part,), *match.span(group), flags)


def _is_conditional(inside: re.Match[str], folded: str, start: int) -> bool:
    """Say whether the c of R²_c is that of a conditional R²: a marginal one, R²_m, stands near."""
    if inside["adjusted"] != "c":
        return False
    return _MARGINAL.search(folded, max(0, start - _BESIDE), start + _BESIDE) is not None


def _is_count(literal: str, low: float) -> bool:
    """Say whether a number can't be a share: R2 numbers resistors and roads, too."""
    return low > 1.4 and not re.search(r"[.,·%]", literal)


def _two(text: Text, at: int, name: Name) -> tuple[Part, ...]:
    """Return R² and adjusted R² where one name stands for both, else nothing."""
    first = value_after(text, at, "R2", name)
    match = _SECOND.match(text.folded, first.end) if first is not None else None
    second = known_number(text, match, "number", "R2_adj") if match is not None else None
    return (first, second) if first is not None and second is not None else ()
