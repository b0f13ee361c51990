"""What converters and fonts do to relations and numbers, undone where nothing else can be meant.

A journal's font may map "=" to another character: ``F(2, 57) 5 4.36``, ``t(58)Z2.41``. What stands
between the degrees of freedom of a test and its value can only be that sign, and then the same
character is the same sign behind the other names of the text. The replacement character stands
for any sign that was lost, and so says nothing of another place.
"""

from __future__ import annotations

import re

from crossfoot.documents.visible import Builder, Visible, compose
from crossfoot.expressions import expression

#: Characters without a meaning of their own: control codes, private use, replacement.
_NAMELESS = "[\x01-\x08\x0b\x0e-\x1f\x7f\ue000-\uf8ff\ufffdⴝ]"
_NAMELESS_ONE = expression(_NAMELESS)
_LOST = "\ufffd"
_VALUE = r"(?=\s?[-+]?\d{0,4}[.,]?\d)"
_BEHIND_DF = expression(
    rf"[)\]}}]\s?(?P<sign>{_NAMELESS}|(?<=\s)5(?=\s)|[A-WYZ¬])(?=\s?[-+]?\d{{0,4}}[.,]\d)"
)
_DF = expression(r"(?<![A-Za-z])[FtTrHχ²]\s?_?[(\[{][\d.,;\s]{1,14}$")
_NAMED = expression(rf"(?<![A-Za-z])(?P<name>[A-Za-zβχ]2?)\s?(?P<sign>{_NAMELESS}){_VALUE}")
_NAMES = r"(?:(?<![A-Za-z])(?:[pPnNrRtFbBdzβχ]|SE|SD|df|R2|CI)|[)\]}²])"
# "¼" is that sign wherever a number follows a name or a bracket.
_QUARTER = expression(r"(?<=[\w)\]}²])\s?¼(?=\s?[-+]?[.,]?\d)")
#: "<" and ">" in the fonts that also map "=".
_BOUND = expression(r"(?<![A-Za-z])[pP](?:\s?[!O]|\s[,.])(?=\s?0?[.,]\d)")
#: How far before its closing bracket the degrees of freedom of a test begin, in characters.
_REACH = 20

_BROKEN = expression(
    r"[=<>≤≥≈¼]\s?[-+−–]?\s?(?:0[.,](?P<zero>[ \n]\s{0,3})(?=\d{1,5}(?![\d.]))"
    r"|[1-9]\d{0,2}\.(?P<other>\n\s{0,3})(?=\d{1,4}\s?[,;)]))"
)
_SOFT_HYPHEN = "\u00ad"


def is_damaged(text: str) -> bool:
    """Say, cheaply, whether a text may hold a relation that became another character."""
    if "¼" in text:
        return True
    return _BEHIND_DF.search(text) is not None or _NAMELESS_ONE.search(text) is not None


def mended(folded: str) -> str:
    """Return a folded text with its damaged relations replaced, one character for one."""
    if "¼" in folded:
        folded = _QUARTER.sub(lambda match: match.group()[:-1] + "=", folded)
    signs = {
        match["sign"]
        for match in _BEHIND_DF.finditer(folded)
        if _DF.search(folded, max(0, match.start() - _REACH), match.start()) is not None
    }
    if _NAMELESS_ONE.search(folded) is not None:
        signs |= _behind_several(folded)
    for sign in signs:
        names = r"(?<=\d)[)\]}]" if sign == _LOST else _NAMES
        space = r"\s" if sign == "5" else r"\s?"
        behind = re.compile(f"{names}{space}{re.escape(sign)}{_VALUE}")
        folded = behind.sub(lambda match: match.group()[:-1] + "=", folded)
    if signs - {_LOST}:
        folded = _BOUND.sub(
            lambda match: match.group()[:-1] + ("<" if match.group()[-1] in "!," else ">"), folded
        )
    return folded


def _behind_several(folded: str) -> set[str]:
    """Return the characters without a meaning that stand behind p and behind other names."""
    names: dict[str, set[str]] = {}
    for match in _NAMED.finditer(folded):
        names.setdefault(match["sign"], set()).add(match["name"].lower())
    return {sign for sign, of in names.items() if len(of) > 1 and sign != _LOST and "p" in of}


def rejoined(visible: Visible) -> Visible:
    """Close up numbers that a line's end or a soft hyphen broke: ``p = 0.`` / ``045``."""
    text = visible.text
    gaps = [match.span(match.lastgroup or 0) for match in _BROKEN.finditer(text)]
    at = text.find(_SOFT_HYPHEN)
    while at >= 0:
        gaps.append((at, at + 1))
        at = text.find(_SOFT_HYPHEN, at + 1)
    if not gaps:
        return visible
    out = Builder()
    done = 0
    for start, end in sorted(gaps):
        out.keep(text, done, start)
        done = max(done, end)
    out.keep(text, done, len(text))
    return compose(visible, out.build())
