"""Results told in words, without a name: explained variance, ``n.s.``, the size of a sample."""

from __future__ import annotations

import re
from collections.abc import Iterator

from crossfoot.expressions import expression
from crossfoot.reading import numerals
from crossfoot.reading.items import Item, Part, Text
from crossfoot.reading.numerals import NUMERAL
from crossfoot.reading.values import AND, known_number, not_significant
from crossfoot.reading.words import ADJUSTED, CHANGED_BY, VERB, VERB_UNSPACED

_SHARE = r"\d+(?:[.,]\d+)?\s?(?:%|per\s?cent)"
_OF = (
    r"(?:of\s|der\s|de\s|da\s|do\s|della\s|des\s|van\s|av\s|af\s|in\s)?(?:the\s|la\s|el\s|l'|de\s)?"
)
_ADJUSTED_SHARE = (
    rf"[(—-]\s?(?:{ADJUSTED}[^()%\d]{{0,12}}(?P<adjusted>{_SHARE})"
    rf"|(?P<adjusted_too>{_SHARE})\s?{ADJUSTED})"
)
_VARIANCE_WORD = (
    r"(?:varian|variânc|varia(?:tion|ção|ción|zione|tie|sjon)|variabil|Streuung|wariancj|rozptyl|дисперс"
    r"|vaihtelu|zmiennoś|方差|变异|分散)"
)
_EXPLAINED = expression(
    # 21% of the variance
    rf"(?P<before>{_SHARE})(?:\s?{_ADJUSTED_SHARE}\s?[)—-])?(?:的|\s{_OF}|\s?)(?:total\s|overall\s|observed\s"
    rf"|explained\s|gesamten?\s|totale\s)?{_VARIANCE_WORD}"
    rf"(?:\w{{0,8}}\s?{_ADJUSTED_SHARE.replace('adjusted', 'behind')}\s?[)—-])?"
    # 21% of rut depth variance was accounted for
    rf"|(?P<of>{_SHARE})\sof\s(?:[^\W\d]+\s){{1,4}}varia\w+\s(?:was|is|were|are|could\sbe|can\sbe)\s(?:explain|account)ed"
    # the variance explained was 21%
    r"|(?:varian|variânc|selitysaste|varyans|wariancj|설명력|方差|变异|分散|дисперс)[^\W\d]*(?:\s[^\W\d]+){0,2}\s?"
    rf"(?:{VERB}|{VERB_UNSPACED}|um|zu|bei|=|\()?\s?"
    rf"(?P<after>%\d+(?:[.,]\d+)?|{_SHARE})"
    # … raised this to 24.3%; … and 8% of that in cost
    rf"|(?:rais|increas|brought|lift|improv)\w*\s(?:this|it|that)\sto\s(?P<to>{_SHARE})"
    rf"|(?<=\band\s)(?P<also>{_SHARE})\sof\s(?:that|it)\b"
    # …, and age a further 12%
    rf"|(?:further|additional|extra|another)\s(?P<more>{_SHARE})(?!\s?of|\w)"
    # the proportion of variance explained was .21
    rf"|(?:proportion|share|Anteil|part|proporción|quota)\s(?:of|der|de|della)\s(?:the\s|la\s)?(?:\w+\s)?{_VARIANCE_WORD}\w*"
    rf"(?:\s[^\W\d]+){{0,7}}?\s(?:{VERB}|=)\s(?P<decimal>0?[.,]\d+)",
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
    "aihtelu",
    "miennoś",
    "дисперс",
)
#: What explains variance and is no model: "the first axis explained 42% of the variance"
_AXES = expression(
    r"\b(?:ax[ie]s|(?:principal|variance)\scomponents?|PCs?\s?\d?|dimensions?|[RCN]DA\d?|eigen\w{0,8})\b"
    r"[^.;]{0,40}$"
)
_LISTED_BEFORE = expression(rf"(?P<share>\d+(?:[.,]\d+)?\s?%)(?:\s{AND}|\s?,(?:\s{AND})?)\s$")
_FURTHER = expression(
    r"(?:additional|further|another|extra|incremental|more|zusätzlich\w*|weitere)\s?(?:an?\s)?$",
    re.IGNORECASE,
)
#: Beside what the share is one of: the number of predictors, or other variables already in.
_ADJUSTING = expression(
    r"[^.;(]{0,60}?\b(?:after|when|once|if)\s(?:being\s)?(?:adjust|correct)\w*(?:\sfor\s(?:the\s)?(?:number\sof|degrees\sof|df)|(?!\sfor)\b)"
    r"|[^.;(]{0,60}?\b(?:adjust|correct)ed\sfor\s(?:the\s)?(?:number\sof|degrees\sof|df)",
    re.IGNORECASE,
)
#: 41% of the variation (adjusted R²)
_NAMED_BEHIND = expression(
    rf"\s?[(\[]\s?(?P<adjusted>{ADJUSTED}\s)?R\s?(?:²|\^\{{?2\}}?|2|-squared?)\s?[)\]]",
    re.IGNORECASE,
)
_BEYOND = (
    r"(?:\b(?:controll|adjust|account|correct|partiall?)ing\s(?:for|out)|\bover\sand\sabove|\bbeyond\b"
    r"|\b(?:controlled|adjusted)\sfor\b)"
)
_BEYOND_BEFORE = expression(_BEYOND + r"[^.;()%]{0,90}$", re.IGNORECASE)
_BEYOND_BEHIND = expression(r"[^.;()%]{0,60}?" + _BEYOND, re.IGNORECASE)
# The explained variance rose by 6%.
_GROWN_BY = expression(
    rf"(?:{CHANGED_BY}|\b(?:increas|rose|grew|improv|gain)\w*\b[^.;:()=\d]{{0,40}}\sby)\s$",
    re.IGNORECASE,
)
_REVERSED = expression(
    r"(?<![\w.])(?P<number>0?[.,]\d+)\s?(?P<sign>[=<>≤≥])\s?[pP](?!\w|\s?[<>=≤≥])"
)
_TURNED = {"=": "=", "<": ">", ">": "<", "≤": "≥", "≥": "≤"}
_WORD_IN_BRACKETS = expression(r"\(\s?[^\W\d]")
_ADJUSTED = expression(rf"\(\s?{ADJUSTED}:?\s?=?\s?(?P<number>0?[.,]\d+)(?=\s?[,;)])")
_INSIGNIFICANT = expression(r"(?<=[,;(])\s?(?P<ns>n\.?\s?s\.?|NS|N\.S\.)(?![\w.]*\w)")
# The p-value for F(2, 57) = 3.90 is .026
_P_FOR = expression(
    rf"[pP][\s-]?value\s(?:for|of|associated\swith|corresponding\sto|that\sbelongs\sto)\s[^;!?]{{3,60}}?\s(?:{VERB})\s(?P<p>0?[.,]\d+)(?![\d%])"
)
# RESET = 2.30, df1 = 2, df2 = 55: a test by its name, whose two df make it an F
_BY_NAME = expression(
    r"(?:^|\n)[ \t]{0,20}(?P<name>(?!F)[A-Z][\w'-]{1,20}(?:\s[A-Za-z-]{1,16}){0,2})"
    rf"\s=\s(?P<F>{NUMERAL}),\s(?=df1\s=)"
)
_SAMPLE = expression(
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
    opened = _WORD_IN_BRACKETS.search(folded, start, end) is not None
    for match in _ADJUSTED.finditer(folded, start, end) if opened else ():  # … (adjusted .37)
        part = known_number(text, match, "number", "R2_adj")
        if part is not None:
            yield Item("R2_adj", (part,), *match.span())
    if folded.find("value", start, end) >= 0:
        for match in _P_FOR.finditer(folded, start, end):
            part = known_number(text, match, "p", "p")
            if part is not None:
                yield Item("p", (part,), *match.span("p"))
    if folded.find(", df1 =", start, end) >= 0:
        for match in _BY_NAME.finditer(folded, start, end):
            part = known_number(text, match, "F", "F")
            if part is not None:
                yield Item("F", (part,), match.start("name"), match.end("F"))
    words = any(
        folded.find(stem, start, end) >= 0 for stem in ("mong ", "ample of", "otal of", "n all ")
    )
    for match in _SAMPLE.finditer(folded, start, end) if words else ():
        numeral = numerals.parse(match["n"], whole=True)
        if numeral is not None:
            part = Part("n", "=", *match.span("n"), numeral.low, numeral.high)
            yield Item("n", (part,), *match.span("n"), ("told",))
    if any(folded.find(stem, start, end) >= 0 for stem in _VARIANCE):
        for match in _EXPLAINED.finditer(folded, start, end):
            yield from _shares(text, match, start)


def _shares(text: Text, match: re.Match[str], start: int) -> Iterator[Item]:
    """Yield the explained variance of ``6.8% of the variance`` or ``32% and 40% of …``."""
    group = next(
        key for key in ("before", "after", "of", "to", "also", "more", "decimal") if match[key]
    )
    first, last = match.span(group)
    if text.folded[first] == "%":  # Turkish writes the sign first
        first += 1
    quantity = _kind_of_share(text.folded, start, match)
    part = _share(text, quantity, first, last)
    if part is None or _AXES.search(text.folded, max(start, first - 60), first) is not None:
        return
    for key in ("adjusted", "adjusted_too", "behind", "behind_too"):
        adjusted = _share(text, "R2_adj", *match.span(key)) if match[key] else None
        if adjusted is not None:
            yield Item("R2_adj", (adjusted,), adjusted.start, adjusted.end)
    named = _NAMED_BEHIND.match(text.folded, match.end())
    if named is not None:
        part = part._replace(quantity="R2_adj" if named["adjusted"] else quantity)
        yield Item(part.quantity, (part,), first, named.end())
        return
    flags: tuple[str, ...] = ("percent",)
    at = first
    while (earlier := _LISTED_BEFORE.search(text.folded, max(start, at - 20), at)) is not None:
        other = _share(text, quantity, *earlier.span("share"))
        if other is None:
            break
        flags = ("percent", "listed")
        yield Item(quantity, (other,), other.start, other.end, flags)
        at = other.start
    yield Item(quantity, (part,), min(first, match.start()), max(last, match.end()), flags)


def _kind_of_share(folded: str, start: int, match: re.Match[str]) -> str:
    """Say of which R² a share is, by what stands around it."""
    first, last = match.span()
    number = match.start("after")
    if number >= 0 and _GROWN_BY.search(folded, max(start, number - 80), number):
        return "R2_change"
    if _ADJUSTING.match(folded, last, last + 100):
        return "R2_adj"
    if (
        match["more"]
        or _FURTHER.search(folded, max(start, first - 24), first)
        or _BEYOND_BEFORE.search(folded, max(start, first - 120), first)
        or _BEYOND_BEHIND.match(folded, last, last + 100)
    ):
        return "R2_change"
    return "R2"


def _share(text: Text, quantity: str, first: int, last: int) -> Part | None:
    literal = text.folded[first:last]
    whole = literal[-1] in "%t" or literal.lstrip("0")[0] in ".,"
    signed = literal if whole else literal + "%"
    numeral = numerals.parse(signed, decimal_comma=text.decimal_comma)
    if numeral is None or not 0 <= numeral.value <= 1:
        return None
    return Part(quantity, "=", first, last, numeral.low, numeral.high)
