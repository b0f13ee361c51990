"""Words around a group of numbers that make it something else than a reported result."""

from __future__ import annotations

import re
from collections.abc import Sequence

from crossfoot.expressions import expression
from crossfoot.reading.items import Item

#: A name, its bracket, and arguments written without spaces.
_CALL = expression(r"(?<![A-Za-z])[a-z_][\w.]{2,}\([^()\s=,]+,\s?(?:\w+=[^\s,]+,\s?)*$")
#: "If t(28) = 2.05 were found …", "would need r = .41 to …", "beyond the cut-off χ²(4) = 18.47"
_SUPPOSED = expression(
    r"(?:\b(?:[Ll]et|[Ss]ei(?:en)?|[Ss]oient|[Ss]ejam?|[Ss]iano|[Ll]åt|[Ll]aat|[Nn]iech|[Oo]lkoon)"
    r"|\b[Ii]f|\b[Ss]uppose|\b[Ww]hen|\b[Ff]or\s(?:which|what)"
    r"|\b(?:would|must|should|to)\s(?:need|reach|exceed|detect|have|be|obtain|find)"
    r"|\b(?:point|percentile|quantile|distribution)(?:\s(?:of|is|was))?|\bwould\sbe\s\w+\s(?:for|at|with|if)"
    r"|\b[Aa]ssum(?:e|ing)|\b[Hh]ypothetical(?:ly)?,?|\b[Ee]\.g\.,?"
    r"|\b(?:above|beyond|below|over|under|exceeds|exceeding|than)"
    r"|(?<![FtT]-)\b(?:cut-?off|threshold|criterion|critical)\w*(?:\s\w+){0,2})"
    r"\s(?:an?\s|the\s)?(?:cut-?off\s)?\|?$"
)
#: "Suppose a referee is told that F(2, 30) = 3.32 …": a sentence that makes its numbers up.
_MADE_UP = expression(
    r"(?:^|[.!?:;(\n]\s{0,4})(?:[Ss]uppose|[Ii]magine|[Hh]ypothetically|[Cc]onsider\sa(?:n|\shypothetical)?\s|[Ss]ay,)"
    r"[^.!?]{0,140}$"
    r"|(?:^|\n\s{0,4})(?:Exercise|Problem|Question|Quiz|Task)\s\d{1,3}\b[^\n]{0,120}$"
)
#: Quotation marks right before a test, and words that say what is shown is a form to follow.
_QUOTED = expression(r"[\"“„«‘']\s?$")
_FORM = expression(
    r"\b(?:[Ww]rite|[Rr]eport(?:ed\sas)?|[Ff]ormat|[Ss]tyle|[Gg]uideline|for\sexample|e\.g\.|such\sas"
    r"|[Ss]tring|[Pp]attern|[Tt]emplate|look\slike|looks\slike|as\sfollows)\b"
)
#: "t = 2.228 leaves .025 in each tail"
_OF_DISTRIBUTION = expression(
    r"\b(?:each|either|upper|lower|one|right|left)\stail\b|tail\sarea|\bleaves\s(?:p\s?=|0?\.0|\d%)"
    r"|(?<![Ft][\s-])\btabulated\b|\btables?\sof\s(?:the\s)?[tF]\b"
)
_ITEMS = expression(
    r"\binfit\b|\boutfit\b|\bRasch\b|\bitem\s(?:difficulty|response|discrimin)", re.IGNORECASE
)
#: "a(n) = 2n, t(4) = 7.5": values of functions
_FUNCTIONS = expression(r"\b[abcghkvxyABC]\((?:\d{1,2}|[a-z])\)\s?=")
#: "A value of t = 2.0 was used as cut-off."
_USED = expression(
    r"[^.;(]{0,30}\b(?:cut-?off|threshold|criterion|(?:is|are|was|were|be)\s(?:needed|required|necessary))\b"
)
#: F as a function of two numbers: `F(x, y)`, "the value of the function".
_FUNCTION = expression(
    r"(?<![A-Za-z])F\(\s?[a-z]\s?,\s?[a-z]\s?\)|\b(?:of|der|de|della|da|av)\s(?:the\s|la\s)?"
    r"(?:[Ff]unction|Funktion|fonction|función|funzione|função)\s(?:at|an|en|nel|no|i)\b|函数值|関数値"
)
_CLASSIFIER = expression(
    r"precision|recall|F-?(?:measure|score)|classif|accuracy|\bf1\b(?!\s?\()|epoch|\bloss\b",
    re.IGNORECASE,
)
_LOG = expression(r"\bloss\b|\bepoch|\bstep\s\d")
_DRAWN = expression(r"\b(?:[Ss]imulated|[Gg]enerated|drew|drawn|set)\b")
_POWER = expression(r"\bpower\b")
#: How far around a group words are looked for, in characters: so that the cost of a long
#: paragraph grows with its length and not with its square.
REACH = 400


def near(words: re.Pattern[str], items: Sequence[Item], text: str, reach: int = REACH) -> bool:
    """Say whether words stand around a group of items."""
    first = max(0, min(item.start for item in items) - reach)
    return words.search(text, first, max(item.end for item in items) + reach) is not None


def in_call(text: str, start: int) -> bool:
    """Say whether a place stands among the arguments of a call: ``plot(x, t=2.5, p=.03)``."""
    opened = text.rfind("(", max(0, start - 60), start)
    if opened < 1 or text.find(")", opened, start) >= 0 or opened + 1 == start:
        return False
    return _CALL.search(text, max(0, opened - 30), start) is not None


def is_supposed(item: Item, text: str) -> bool:
    """Say whether a test is supposed, asked for, or a bound that others are held to."""
    before = _SUPPOSED.search(text, max(0, item.start - 36), item.start)
    if before is not None or _USED.match(text, item.end) is not None:
        return True
    first = max(0, item.start - 160)
    if _MADE_UP.search(text, first, item.start) is not None:
        return True
    if _QUOTED.search(text, max(0, item.start - 2), item.start) is not None:
        return _FORM.search(text, first, item.start) is not None
    return _OF_DISTRIBUTION.search(text, item.end, item.end + 60) is not None


def is_of_classifier(items: Sequence[Item], text: str) -> bool:
    """Say whether words speak of a classifier, whose F, p and r are other things."""
    return near(_CLASSIFIER, items, text)


def is_of_items(items: Sequence[Item], text: str) -> bool:
    """Say whether the difficulty of test items is told, whose b and t are no coefficient's."""
    return near(_ITEMS, items, text, 80)


def is_of_functions(items: Sequence[Item], text: str) -> bool:
    """Say whether values of functions are told."""
    return near(_FUNCTIONS, items, text, 60)


def is_function(items: Sequence[Item], text: str) -> bool:
    """Say whether F is a function of two numbers."""
    return near(_FUNCTION, items, text)


def is_logged(items: Sequence[Item], text: str) -> bool:
    """Say whether a program tells of its progress."""
    return near(_LOG, items, text, 60)


def is_drawn(items: Sequence[Item], text: str) -> bool:
    """Say whether numbers are chosen for data that are made up."""
    return near(_DRAWN, items, text, 40)


def is_power(items: Sequence[Item], text: str) -> bool:
    """Say whether numbers belong to a reckoning of power."""
    return near(_POWER, items, text, 40)
