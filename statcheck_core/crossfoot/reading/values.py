"""Relations and numbers: what follows a name."""

from __future__ import annotations

import re

from crossfoot.expressions import expression
from crossfoot.reading import numerals
from crossfoot.reading.fold import HARD_SPACE
from crossfoot.reading.items import WHOLE, Item, Part, Text
from crossfoot.reading.names import Name
from crossfoot.reading.numerals import NUMERAL
from crossfoot.reading.words import ABOVE, BELOW, COMPUTED, COPULA, OF, VERB, VERB_UNSPACED

#: Words that join two numbers of a list.
AND = r"(?:and|und|sowie|et|y|e|i|a|en|och|og|ja|és|ve|и|&|和|与|と|및)"
#: A count as printed inside brackets or beside "degrees of freedom".
COUNT = rf"\d{{1,3}}(?:[, '{HARD_SPACE}]\d{{3}})+(?!\d)|\d+(?:[.,]\d+)?"

_SIGN = (
    r"(?:=\s?[<>≤≥](?![<>=])|<\s?=|>\s?=|=\s?<|<{1,3}(?![/<!]|-\s)|>{1,3}|[=≤≥≈¼]"
    rf"|&lt;|&gt;|(?:{VERB}\s?)?(?:(?P<below>{BELOW})|(?P<above>{ABOVE})))"
)
_RELATION = expression(
    rf"[\s*]*+(?:\(\s*+)?(?P<sign>{_SIGN})[\s*]*+(?=[-+]?\s?[.,·]?\d|n\.?\s?s|NS|N\.S)"
)
# "<", ">" and "=" as some journals' fonts come out of a PDF.
_DAMAGED = expression(r"\s?(?P<sign>[boN~∼])\s?(?=0?[.,]\d)")
_DAMAGE = {"b": "<", "o": "<", "N": ">", "~": "≈", "∼": "≈"}
_WORDS = expression(
    rf"\s++{VERB}(?:\s(?:only|about|just|approximately))?\s++(?=[-+]?\s?[.,·]?\d)|['\"]?\s?(?:の?[値值]|값|统计量|統計量)?{VERB_UNSPACED}\s*+(?P<sign>[<>]?)\s*+(?=[-+]?\s?[.,·]?\d)"
)
_BARE = expression(r" (?=[-+]?\d{0,5}[.,]\d++(?![\d.,]?\d|\s?[%=<>]))")
_SPACES = expression(r"[ ]*+(?:\|[ ]*+)?(?P<sign>[<>]?)[ ]*+(?=[-+]?\s?[.,·]?\d)")
# A worked line, `= 1 − (1−.90)(20)/17 = .882`: only the last value counts.
_TERM = r"(?:[\d\s.,/()+×*·^²-]|_?\{[^{}=]{1,14}\}|MS[EBWR]?|SS[EBWRT]?|R|[nk](?![a-z]))"
_IN_TERMS = frozenset("MSEBWRTnk")  # letters of a term without braces
_WORKED = expression(
    rf"\s*+=\s*+(?P<formula>{_TERM}{{3,70}}=\s*+(?:{_TERM}{{3,60}}=\s*+)?)(?P<value>{NUMERAL})"
)
_OPERATION = expression(r"[\d}]\s?[/×*+-]\s?\(?[.\d]|\)\s?[(/]|[-+/]\s?\(|MS\w?\s?/")
_NUMERAL = expression(NUMERAL)
_NOT_SIGNIFICANT = expression(r"(?:n\.?\s?s\.?|NS|N\.S\.)(?![A-Za-z])")
#: What a name is of, before its number, or the bracket that closes behind a name.
#: What is told so is of something else than the test beside it: `p for trend was .03`.
_NEVER_OF = frozenset({"p", "n", "df", "df1", "df2", "se", "s", "ms"})
_WHAT = expression(
    rf"(?:\)(?=\s)|\s(?:global\w?|omnibus|overall|{COMPUTED})|\s{OF}(?:\s[^\s\d.,;:()=<>][^\s.,;:()=<>]{{0,30}}(?:\s\d(?=\s))?){{1,7}}?)"
    rf"(?:(?<!\s[A-Za-zα-ωΔ])(?<![²}}])(?=\s?[=<>≤≥])|(?=\s{COPULA}\s))"
)
_OF_WHAT = expression(rf"\s{OF}\s")
_PREPOSITION = expression(r"\b(?:with|on|to|between|from|by|than|of)\s$")
_UNIT = expression(
    r"\s?(?:[kMGmµnc]?(?:Hz|Pa|V|W|Ω|A|g|m|s|J|N|L|eV|K|C|mol)|bar|min|sec|hours?|h|days?|weeks?"
    r"|years?|°[CF]?|µ|pounds?|euros?|dollars?|feet|inch(?:es)?|miles?|cups?|tsp|tbsp|pints?|folds?|per\s(?:annum|year|month|week|day|hour))(?![\w=('-]|\.(?!\s|$)|\s?[=<>(])"
)
_RATE = expression(r"\s?[A-Za-zµ]{1,4}[23²³]?\s?/\s?[a-zµ]{1,4}[23²³]?(?![\w(])")
_GLUED = expression(r"[A-Za-z°]|_(?!\{\(\d)|[.:]\d|\s?[×x/]\s?\(?\d")
# After a numeral without a point, a comma and a digit are more of it; after one with, a list.
_GOES_ON = expression(r",\d")
_COUNTED = expression(r"\s?d\.?f\b(?!\s?[=:])")
_POINTED = expression(r"-?\d{1,3}[.]\d{3}")
_COUNT_SPACES = {0x20: HARD_SPACE}
_GROUPED = expression(r",\d{3}(?!\d)")

#: Quantities that have no unit: a unit behind the number makes it something else.
_UNITLESS = frozenset(
    {"F", "p", "t", "r", "z", "chi2", "R", "R2", "R2_adj", "R2_change", "F_change", "beta"}
)
#: Of those, the ones that may be printed as a percentage.
_SHARES = frozenset({"R2", "R2_adj", "R2_change", "p"})
#: Quantities for which a worked line is followed to its end.
_MAY_BE_WORKED = frozenset(
    {"F", "R2", "R2_adj", "R2_change", "F_change", "t", "f2", "eta2", "eta2_partial"}
)


#: A word this short before a sign is the name of the number behind it.
_LONGEST_NAME = 2


def value_after(
    text: Text, at: int, quantity: str, name: Name, *, bare: bool = False
) -> Part | None:
    """Return the relation and number that stand at ``at``, after ``name`` and its brackets.

    ``bare`` allows a decimal number with nothing but a space before it.
    """
    folded = text.folded
    if quantity in _MAY_BE_WORKED and _has_second_sign(folded, at):
        worked = _WORKED.match(folded, at)
        if worked is not None and _OPERATION.search(worked["formula"]):
            return number_at(text, worked.start("value"), quantity, "=")
    match = _RELATION.match(folded, at)
    if match is not None:
        return number_at(text, match.end(), quantity, _relation(match))
    damaged = _DAMAGED.match(folded, at) if quantity == "p" else None
    if damaged is not None:
        return number_at(text, damaged.end(), quantity, _DAMAGE[damaged["sign"]])
    match = _WORDS.match(folded, at)
    if match is not None and _is_object(folded, name, match):
        return None
    if match is None and _may_stand_bare(folded, quantity, name):
        match = _SPACES.match(folded, at)
    if match is not None:
        return number_at(text, match.end(), quantity, match["sign"] or "=")
    match = _BARE.match(folded, at) if bare else None
    if match is not None:
        return number_at(text, match.end(), quantity, "=")
    return _after_words(text, at, quantity)


def _is_object(folded: str, name: Name, verb: re.Match[str]) -> bool:
    """Say whether a letter is no subject of the verb behind it: ``that with Z was .42``."""
    start, end = name.match.span()
    if end - start > 1 or verb.start() != end or verb.group().startswith((" of", " equal", ":")):
        return False
    return _PREPOSITION.search(folded, max(0, start - 9), start) is not None


def _after_words(text: Text, at: int, quantity: str) -> Part | None:
    """Return the number that words separate from its name: ``R² for the full model was .34``."""
    folded = text.folded
    if quantity in _NEVER_OF:
        return None
    led = folded[at : at + 1] == ")" or (
        folded[at : at + 1] == " " and folded[at + 1 : at + 2].isalpha()
    )
    match = _WHAT.match(folded, at) if led else None
    if match is None:
        return None
    signed = _RELATION.match(folded, match.end())
    if signed is not None:
        if _ends_in_name(match.group()):
            return None
        return number_at(text, signed.end(), quantity, _relation(signed))
    value = _WORDS.match(folded, match.end())
    return number_at(text, value.end(), quantity, value["sign"] or "=") if value else None


def _ends_in_name(words: str) -> bool:
    """Say whether the last of some words may be the name of what follows: ``… and set p = .05``."""
    last = words.split()[-1]
    return len(last) <= _LONGEST_NAME or last.isupper() or not last.isalpha()


def number_at(text: Text, at: int, quantity: str, relation: str) -> Part | None:
    """Return the numeral at ``at``, unless what follows makes it something else.

    ``n.s.`` is a number of p: above the usual level.
    """
    folded = text.folded
    match = _NUMERAL.match(folded, at)
    if match is None:
        insignificant = _NOT_SIGNIFICANT.match(folded, at)
        if insignificant is None or quantity != "p":
            return None
        return not_significant(*insignificant.span())
    end = match.end()
    if _GOES_ON.match(folded, end) and "." not in match.group():
        return None
    if quantity in _UNITLESS and _COUNTED.match(folded, end):  # χ² 1 df
        return None
    if _GLUED.match(folded, end) or (
        quantity in _UNITLESS and (_UNIT.match(folded, end) or _RATE.match(folded, end))
    ):
        return None
    # A statistic is seldom in the thousands: beside decimal commas 3.756 is a decimal still.
    pointed = quantity in _UNITLESS and _POINTED.fullmatch(match.group()) is not None
    comma = text.decimal_comma and not pointed
    if quantity == "n":  # which has no decimals: its mark groups digits, whichever it is
        comma = "." in match.group()
    numeral = numerals.parse(match.group(), decimal_comma=comma, whole=quantity in WHOLE)
    if numeral is None or (numeral.percent and quantity in _UNITLESS - _SHARES):
        return None
    return Part(quantity, relation, at, end, *numerals.bounds(relation, numeral))


def known_number(text: Text, match: re.Match[str], group: str, quantity: str) -> Part | None:
    """Return a matched numeral whose neighbours are known to be fine."""
    numeral = numerals.parse(match[group], decimal_comma=text.decimal_comma)
    if numeral is None:
        return None
    return Part(quantity, "=", *match.span(group), numeral.low, numeral.high)


def count_at(text: Text, literal: str, at: int, quantity: str) -> Part | None:
    """Return a count that stands at ``at``; decimals make it a rounded number."""
    comma = text.decimal_comma or ("," in literal and _GROUPED.search(literal) is None)
    numeral = numerals.parse(literal.translate(_COUNT_SPACES), decimal_comma=comma, whole=True)
    if numeral is None:
        return None
    return Part(quantity, "=", at, at + len(literal), numeral.low, numeral.high)


def not_significant(start: int, end: int) -> Part:
    """Return what ``n.s.`` at a place says of p, at the usual level."""
    return Part("p", ">", start, end, 0.05, float("inf"))


def _has_second_sign(folded: str, at: int) -> bool:
    """Say, cheaply, whether a worked line can stand at ``at``: two ``=`` with a sum between."""
    first = folded.find("=", at, at + 4)
    second = folded.find("=", first + 1, first + 140) if first >= 0 else -1
    if second < 0:
        return False
    between = folded[first + 1 : second]
    return "{" in between or not any(c.isalpha() and c not in _IN_TERMS for c in between)


def _may_stand_bare(folded: str, quantity: str, name: Name) -> bool:
    """Say whether a number may follow a name with nothing but space between."""
    if name.notation.wordy and len(name.match.group()) > 1:
        return True
    return quantity == "se" and folded[name.match.start() - 1 : name.match.start()] == "("


def _relation(match: re.Match[str]) -> str:
    """Return the canonical relation for what is printed."""
    if match["below"] or match["above"]:
        return "<" if match["below"] else ">"
    plain = "".join(match["sign"].split())
    if plain in {"&lt;", "&gt;"}:
        return "<" if plain == "&lt;" else ">"
    if plain in {"<=", "≤", "=≤"}:
        return "≤"
    if plain in {">=", "≥", "=≥"}:
        return "≥"
    if "<" in plain:
        return "<"
    if ">" in plain:
        return ">"
    return "≈" if plain == "≈" else "="


def is_of_something(folded: str, at: int, item: Item) -> bool:
    """Say whether words between a name that ends at ``at`` and its number say what it is of."""
    if _OF_WHAT.match(folded, at) is None:
        return False
    match = _WHAT.match(folded, at)
    return match is not None and match.end() <= item.parts[0].start
