"""Estimates without a name of their own: what is estimated is told in words before the number.

``raises the rate by 0.41 points (s.e. = 0.12)``, ``the mean difference was 31.2 m (95% CI, 8.4 to
54.0; P = .007)``, ``0.63 (SE 0.21, p < .01)``, ``rose by 23.4 ± 4.8 kg (t = 4.88)``.
"""

from __future__ import annotations

import re
from collections.abc import Iterator

from crossfoot.expressions import expression
from crossfoot.reading.items import Item, Part, Text
from crossfoot.reading.numerals import NUMERAL
from crossfoot.reading.values import AND, known_number
from crossfoot.reading.words import CHANGED_BY, INTERVAL

_ERROR = (
    r"(?:(?:[A-Za-z][\w-]{2,14}\s)?(?:S\.?\s?E\.?D?|s\.\s?e\.(?:\s?d\.)?|(?:standard|std\.?)\serr(?:ors?|\.))"
    r"(?:_\{?\w{1,4}\}?)?)"
)
#: A standard error or an interval that opens a bracket or goes on a list.
_SPREAD = expression(
    rf"\s?[,(;\[]\s?(?:with\s(?:an?\s)?)?(?:(?P<error>{_ERROR})(?![A-Za-z])(?:\sof)?\s?[=:]?\s?(?P<se>{NUMERAL})"
    rf"|9\d(?:[.,]\d)?\s?%?[\s-]?{INTERVAL}|{INTERVAL}\s?(?:à\s|al\s|del\s|di\s)?9\d"
    r"|(?<=\()[tz](?:[\s-](?:ratio|value|stat(?:istic|\.)?))?\s?=?\s?-?\d)"
)
#: The number before it, with what it counts in.
_WORD = r"[^\S\n][^\s\d,;:.()\[\]=<>±][^\s,;:()\[\]=<>±]{0,20}"
_NUMBER = expression(
    rf"(?:(?<=[\s(])|^)(?<![=<>≤≥≈±]\s)(?P<b>{NUMERAL})(?P<unit>(?:{_WORD}){{0,7}})$"
)
_SPREAD_SIGNS = (
    "SE",
    "S.E",
    "s.e",
    "s. e",
    "err",
    "CI",
    "CL",
    "onf",
    "KI",
    "IC",
    "BI",
    "信",
    "(t",
    "(z",
)
#: An estimate that is said to be one, or a change by so much.
_ESTIMATED = expression(
    r"(?:\b(?:(?P<strong>coefficient|estimate[sd]?|effect|slope|elasticity|gradient|difference|gap)|change|gain|loss|rise|drop|fall|decline"
    r"|increase|decrease|reduction|improvement|advantage|benefit|premium|penalty)s?\b[^.;:()=\d]{0,60}[\s,(]{1,3}"
    rf"|{CHANGED_BY}\s|\b(?:Differenz|Unterschied|différence|diferencia|differenza|diferença|verschil|skillnad|forskel"
    r"|forskjell)(?:en)?\b[^.;:()=\d]{0,40}\s|\bby\s|\bassociated\swith\s|\b(?:add|cost|sav|gain|lost|los|cut)(?:ed|e?s|t|ing)?\s)(?:an?\s)?(?:(?:average|further|additional|extra)\s(?:of\s)?|about\s|only\s)?$",
    re.IGNORECASE,
)
_GOES_ON = expression(
    rf"[^()\[\]]{{0,40}}[)\]]\s?(?:,\s?)?(?:{AND}\s|,\s)(?:{AND}\s)?(?:[^\W\d_]+\s){{0,4}}"
)
#: A ratio is no coefficient, and the spread of a mean no test of it.
_OTHERWISE = expression(
    r"ratio|factor|\b(?:a?OR|RR|HR|IRR)\b|odds|hazard|\brisk\b|-fold|\btimes\b|\b(?:mean|average|median)\b(?!\s(?:difference|change|effect))"
    r"|\bR\b|\bcorrelat",
    re.IGNORECASE,
)
#: 0.63, SE 0.21, p < .01: in a bracket, before what tests it.
_BRACKETED = expression(
    rf"[(\[]\s?(?P<b>{NUMERAL})\s?(?:[,;]\s?{_ERROR}\s?[=:]?\s?(?P<se>{NUMERAL})|(?:±|\+/-)\s?(?P<error>{NUMERAL})\s?\(?{_ERROR}\)?)"
    r"\s?[,;]\s?(?=[tTzZpP](?![A-Za-z]))"
)
#: 23.4 ± 4.8 kg per kg N (t = 4.88
_WITH_TEST = expression(
    rf"(?<![=<>\w.,±-])(?<![=<>±]\s)(?P<b>{NUMERAL})\s?(?:±|\+/-)\s?(?P<se>{NUMERAL})(?:{_WORD}){{0,5}}\s?[,;(\[]\s?(?=[tz]\s?[(=_\[])"
)


def unnamed(text: Text, start: int, end: int) -> Iterator[Item]:
    """Yield the estimates of a stretch of text that have no name."""
    found = {item.start: item for item in _candidates(text, start, end)}
    yield from found.values()


def _candidates(text: Text, start: int, end: int) -> Iterator[Item]:
    folded = text.folded
    if any(folded.find(sign, start, end) >= 0 for sign in _SPREAD_SIGNS):
        for match in _BRACKETED.finditer(folded, start, end):
            error = known_number(text, match, "se" if match["se"] else "error", "se")
            yield from _item(known_number(text, match, "b", "b"), error)
        earlier = -1  # where the spread of the estimate before ends
        for match in _SPREAD.finditer(folded, start, end):
            for item in _told_before(text, match, start, earlier):
                yield item
                earlier = match.end()
    if folded.find("±", start, end) >= 0 or folded.find("+/-", start, end) >= 0:
        for match in _WITH_TEST.finditer(folded, start, end):
            pair = known_number(text, match, "b", "b"), known_number(text, match, "se", "se")
            yield from _item(*pair, "weakly", "if-ratio")


#: How far back the number, and the words that tell what it is, may begin, in characters.
_REACH, _LEAD = 80, 110


def _told_before(text: Text, spread: re.Match[str], start: int, earlier: int) -> Iterator[Item]:
    """Yield the estimate whose standard error or interval has been met.

    ``earlier`` is where the one before ends: what it is may be told once for several.
    """
    folded, at = text.folded, spread.start()
    match = _NUMBER.search(folded, max(start, at - _REACH), at)
    if match is None:
        return
    first = match.start("b")
    lead = folded[max(0, first - _LEAD) : first]
    told = _ESTIMATED.search(lead)
    additive = "point" in match["unit"]
    if told is not None and not additive and _OTHERWISE.search(told.group() + match["unit"]):
        told = None
    if told is None and not (0 <= earlier <= first and _GOES_ON.fullmatch(folded, earlier, first)):
        return
    error = known_number(text, spread, "se", "se") if spread["se"] else None
    flags = []
    if told is None or not told["strong"]:
        flags.append("weakly")
    if error is None and not folded[spread.end() - 1].isdigit():
        flags.append("if-enclosed")
    yield from _item(known_number(text, match, "b", "b"), error, *flags)


def _item(estimate: Part | None, error: Part | None, *flags: str) -> Iterator[Item]:
    if estimate is None:
        return
    parts = (estimate,) if error is None else (estimate, error)
    yield Item("b", parts, estimate.start, parts[-1].end, ("nameless", *flags))
