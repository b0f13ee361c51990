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
from crossfoot.reading.fold import HARD_SPACE

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
#: "Z" glued between a name and a number, which is "=" behind p and behind two names more.
_GLUED = expression(r"(?<![A-Za-z])(?P<name>[pP](?=Z0?[.,]\d)|[rtFnNbβ]|R2)Z(?=\d{0,4}[.,]?\d)")
_NAMES = r"(?:(?<![A-Za-z])(?:[pPnNrRtFbBdzβχ]|SE|SD|df|R2|CI)|[)\]}²])"
# "¼" is that sign wherever a number follows a name or a bracket.
_QUARTER = expression(r"(?<=[\w)\]}²])\s?¼(?=\s?[-+]?[.,]?\d)")
#: "<" and ">" in the fonts that also map "=".
_BOUND = expression(r"(?<![A-Za-z])[pP](?:\s?[!O]|\s[,.])(?=\s?0?[.,]\d)")
_OPENED = expression(r"(?P<name>[A-Za-zχ])\s?²?\s?_?[(\[{][^()\[\]{}]*$")
#: What may have a minus sign.
_SIGNED = frozenset("trzbBdβ")
#: How far before its closing bracket the degrees of freedom of a test begin, in characters.
_REACH = 20

_BROKEN = expression(
    r"[=<>≤≥≈¼]\s?[-+−–]?\s?(?:0[.,](?P<zero>[ \n]\s{0,3})(?=\d{1,5}(?![\d.]))"
    r"|[1-9]\d{0,2}(?:\.(?P<other>\n\s{0,3})(?=\d{1,4}\s?[,;)])|,(?P<comma>\n\s{0,3})(?=0\d))"
    r"|[1-9]\d{0,2}\.(?P<spaced> )(?=\d{1,4}\s?[,;)]))"
)
_SOFT_HYPHEN = "\u00ad"


def is_damaged(text: str) -> bool:
    """Say, cheaply, whether a text may hold a relation that became another character."""
    if "¼" in text or "pZ" in text or "PZ" in text:
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
    glued = {match["name"].lower() for match in _GLUED.finditer(folded)}
    if "p" in glued and len(glued) > 2:
        signs.add("Z")
    for sign in signs:
        names = r"(?<=\d)[)\]}]" if sign == _LOST else _NAMES
        space = r"\s" if sign == "5" else r"\s?"
        behind = re.compile(f"{names}{space}{re.escape(sign)}{_VALUE}")
        folded = behind.sub(_equals if sign != "5" else _equals_unless_signed, folded)
    if signs - {_LOST}:
        folded = _BOUND.sub(
            lambda match: match.group()[:-1] + ("<" if match.group()[-1] in "!," else ">"), folded
        )
    return folded


def _equals(match: re.Match[str]) -> str:
    return match.group()[:-1] + "="


def _equals_unless_signed(match: re.Match[str]) -> str:
    """Replace a 5, unless the number may begin with the minus sign, which is a 2 in that font."""
    after = match.string[match.end() : match.end() + 4].lstrip()
    name = match.group()[0]
    if name in ")]}":
        opened = _OPENED.search(match.string, max(0, match.start() - _REACH - 6), match.start())
        name = opened["name"] if opened is not None else "t"
    signed = name in _SIGNED and after.startswith("2") and (after[1:2] != "." or name not in "tz")
    return match.group() if signed else _equals(match)


def _behind_several(folded: str) -> set[str]:
    """Return the characters without a meaning that stand behind p and behind other names."""
    names: dict[str, set[str]] = {}
    for match in _NAMED.finditer(folded):
        names.setdefault(match["sign"], set()).add(match["name"].lower())
    return {sign for sign, of in names.items() if len(of) > 1 and sign != _LOST and "p" in of}


# Groups of three digits behind a relation or at the start of an interval: `= 2 212,02`.
_SPACED = expression(r"(?<=[=<>≤≥≈\[;(])\s?[-+]?\s?[1-9]\d{0,2}(?: \d{3})+(?!\d)")
_LAST = expression(r"(?<=\d) (?=\d)")


def grouped(folded: str) -> str:
    """Return folded prose in which the spaces within a number are hard, one for one."""
    return _SPACED.sub(lambda match: _LAST.sub(HARD_SPACE, match.group()), folded)


def rejoined(visible: Visible) -> Visible:
    """Close up numbers that a line's end or a soft hyphen broke: ``p = 0.`` / ``045``."""
    text = visible.text
    broken = list(_BROKEN.finditer(text))
    if all(match.lastgroup == "spaced" for match in broken):
        broken = []  # a sentence may end in a number, and the next begin with one
    gaps = [match.span(match.lastgroup or 0) for match in broken]
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
