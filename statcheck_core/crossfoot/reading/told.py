"""Results told in words, without a name: explained variance, ``n.s.``, the size of a sample."""

from __future__ import annotations

import re
from collections.abc import Iterator

from crossfoot.expressions import expression
from crossfoot.reading import numerals
from crossfoot.reading.items import Item, Part, Text
from crossfoot.reading.lazily import lazily
from crossfoot.reading.values import AND, known_number, not_significant

_SHARE = r"\d+(?:[.,]\d+)?\s?(?:%|per\s?cent)"
_OF = (
    r"(?:of\s|der\s|de\s|da\s|do\s|della\s|des\s|van\s|av\s|af\s|in\s)?(?:the\s|la\s|el\s|l'|de\s)?"
)
_EXPLAINED = lazily(
    rf"(?P<before>{_SHARE})(?:\s\(adj[^()%\d]{{0,12}}(?P<adjusted>{_SHARE})\))?(?:的|\s{_OF}|\s?)(?:total\s|overall\s|observed\s|explained\s|gesamten?\s|totale\s)?"
    r"(?:varian|variânc|variation|variabil|Streuung|wariancj|rozptyl|дисперс|方差|变异|分散)"
    r"|(?:varian|variânc|selitysaste|varyans|wariancj|설명력|方差|变异|分散|дисперс)[^\W\d]*(?:\s[^\W\d]+){0,2}\s?"
    r"(?:of|:|was|von|de|um|zu|oli|=|\()?\s?"
    r"(?P<after>%\d+(?:[.,]\d+)?|\d+(?:[.,]\d+)?\s?(?:%|per\s?cent))",
    re.IGNORECASE,
)
#: One of these stands in whatever the pattern matches; looking for them first is cheaper.
_VARIANCE = (
    "aria",
    "ARIA",
    "aryans",
    "treuung",
    "elitysaste",
    "ariâ",
    "설명력",
    "方差",
    "变异",
    "分散",
    "rozptyl",
    "дисперс",
)
_LISTED_BEFORE = lazily(rf"(?P<share>\d+(?:[.,]\d+)?\s?%)\s(?:{AND}|,)\s$")
_FURTHER = lazily(
    r"(?:additional|further|another|extra|incremental|more|zusätzlich\w*|weitere)\s?(?:an?\s)?$",
    re.IGNORECASE,
)
_REVERSED = expression(
    r"(?<![\w.])(?P<number>0?[.,]\d+)\s?(?P<sign>[<>≤≥])\s?[pP](?!\w|\s?[<>=≤≥])"
)
_TURNED = {"<": ">", ">": "<", "≤": "≥", "≥": "≤"}
_ADJUSTED = expression(r"\(\s?adj(?:usted|\.)?:?\s?=?\s?(?P<number>0?[.,]\d+)\s?\)")
_INSIGNIFICANT = expression(r"(?<=[,;(])\s?(?P<ns>n\.?\s?s\.?)(?![\w.]*\w)")
_SAMPLE = lazily(
    r"(?:[Aa]mong|[Ss]ample\sof|[Tt]otal\sof|[Ii]n\sall)\s(?:the\s)?"
    r"(?P<n>\d{1,3}(?:,\d{3})+|\d{2,7})\s(?!of\b)(?=[a-z]{3})"
)


def told(text: Text, start: int, end: int) -> Iterator[Item]:
    """Yield what a stretch of text tells in words; not in order."""
    folded = text.folded
    for match in _INSIGNIFICANT.finditer(folded, start, end):
        yield Item("p", (not_significant(*match.span("ns")),), *match.span("ns"))
    for match in _REVERSED.finditer(folded, start, end):
        numeral = numerals.parse(match["number"], decimal_comma=text.decimal_comma)
        if numeral is not None:
            sign = _TURNED[match["sign"]]
            low, high = numerals.bounds(sign, numeral)
            yield Item("p", (Part("p", sign, *match.span("number"), low, high),), *match.span())
    for match in _ADJUSTED.finditer(folded, start, end):  # R² = .39 … (adjusted .37)
        part = known_number(text, match, "number", "R2_adj")
        if part is not None:
            yield Item("R2_adj", (part,), *match.span())
    words = any(
        folded.find(stem, start, end) >= 0 for stem in ("mong ", "ample of", "otal of", "n all ")
    )
    for match in _SAMPLE().finditer(folded, start, end) if words else ():
        numeral = numerals.parse(match["n"], whole=True)
        if numeral is not None:
            part = Part("n", "=", *match.span("n"), numeral.low, numeral.high)
            yield Item("n", (part,), *match.span("n"), ("told",))
    if any(folded.find(stem, start, end) >= 0 for stem in _VARIANCE):
        for match in _EXPLAINED().finditer(folded, start, end):
            yield from _shares(text, match, start)


def _shares(text: Text, match: re.Match[str], start: int) -> Iterator[Item]:
    """Yield the explained variance of ``6.8% of the variance`` or ``32% and 40% of …``."""
    group = "before" if match["before"] else "after"
    first, last = match.span(group)
    if text.folded[first] == "%":  # Turkish writes the sign first
        first += 1
    further = _FURTHER().search(text.folded, max(start, first - 24), first) is not None
    quantity = "R2_change" if further else "R2"
    part = _share(text, quantity, first, last)
    if part is None:
        return
    if match["adjusted"]:
        adjusted = _share(text, "R2_adj", *match.span("adjusted"))
        if adjusted is not None:
            yield Item("R2_adj", (adjusted,), adjusted.start, adjusted.end)
    flags: tuple[str, ...] = ("percent",)
    earlier = _LISTED_BEFORE().search(text.folded, max(start, first - 16), first)
    if earlier is not None:
        other = _share(text, quantity, *earlier.span("share"))
        if other is not None:
            flags = ("percent", "listed")
            yield Item(quantity, (other,), other.start, other.end, flags)
    yield Item(quantity, (part,), min(first, match.start()), max(last, match.end()), flags)


def _share(text: Text, quantity: str, first: int, last: int) -> Part | None:
    literal = text.folded[first:last]
    signed = literal if literal[-1] in "%t" else literal + "%"
    numeral = numerals.parse(signed, decimal_comma=text.decimal_comma)
    if numeral is None or not 0 <= numeral.value <= 1:
        return None
    return Part(quantity, "=", first, last, numeral.low, numeral.high)
