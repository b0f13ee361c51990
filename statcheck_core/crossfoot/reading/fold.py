"""Fold the many ways to write a character into one, without moving any place."""

from __future__ import annotations

import re
import unicodedata
from functools import cache

#: Folded spaces between digits may group thousands; plain spaces may not.
HARD_SPACE = "\u00a0"

_MATHEMATICAL = ("\U0001d400", "\U0001d7ff")
_GROUPS = {
    "-": "‐‑‒–−﹣－",
    " ": "\t\u1680\u2000\u2001\u2002\u2003\u2004\u2005\u2006\u2008"
    "\u200a\u205f\u3000\u200b\ufeff\u2060",
    HARD_SPACE: "\u2007\u2009\u202f",
    "=": "＝﹦⩵⫽ϭ",
    "<": "＜﹤≺≪⬍Ͻ",
    ">": "＞﹥≻≫⬎Ͼ",
    "≤": "≦⩽≲⪅",
    "≥": "≧⩾≳⪆",
    "≈": "≅≃≊",
    "(": "（﹙₍",
    ")": "）﹚₎",
    "[": "［【",
    "]": "］】",
    "{": "｛",
    "}": "｝",
    ",": "，、﹐٬،",
    ".": "．٫",
    ":": "：",
    ";": "；",
    "%": "％",
    "+": "＋",
    "'": "’‘ʼ´",
    "Δ": "∆△",
    "β": "ϐ",
    "η": "ŋ𝜂",
    "/": "⁄∕",
    "~": "～〜",
    "|": "｜∣",
}


_PERSIAN = "۰"
_SLASH = re.compile(r"(?<=[۰-۹])/(?=[۰-۹])")

#: Digits below the line as usual ones. Folding keeps them, since they show where degrees of
#: freedom stand.
ON_THE_LINE = str.maketrans("₀₁₂₃₄₅₆₇₈₉", "0123456789")


def _table() -> dict[int, str]:
    table = {ord(char): plain for plain, group in _GROUPS.items() for char in group}
    # Full-width letters and digits, and the letters that mathematics sets in italic or bold.
    for code in (*range(0xFF10, 0xFF5B), *range(ord(_MATHEMATICAL[0]), ord(_MATHEMATICAL[1]) + 1)):
        plain = unicodedata.normalize("NFKC", chr(code))
        if len(plain) == 1 and code not in table:
            table[code] = plain
    for digits in ("٠١٢٣٤٥٦٧٨٩", "۰۱۲۳۴۵۶۷۸۹"):
        table.update({ord(char): str(value) for value, char in enumerate(digits)})
    return table


@cache
def _folding() -> tuple[re.Pattern[str], dict[str, str]]:
    table = {chr(code): plain for code, plain in _table().items()}
    # Mathematical letters as a range: single characters beyond the first plane make a set slow.
    plain = "".join(char for char in table if char < _MATHEMATICAL[0])
    return re.compile(f"[{re.escape(plain)}{_MATHEMATICAL[0]}-{_MATHEMATICAL[1]}]"), table


def fold(text: str) -> str:
    """Return ``text`` with look-alike characters replaced, one for one.

    Minus signs, spaces, full-width forms, mathematical letters and doubled relation signs are
    replaced by their plain forms; the length never changes, so places hold.
    """
    if text.isascii():
        return text.replace("\t", " ")
    if _PERSIAN in text:  # beside digits of its own kind its decimal mark is a slash
        text = _SLASH.sub(".", text)
    if "¼" in text and "ð" in text:  # brackets and signs as one journal font comes out of a PDF
        text = text.replace("ð", "(").replace("Þ", ")")
    pattern, table = _folding()
    # A search for the few that occur is several times faster than str.translate over all.
    return pattern.sub(lambda match: table.get(match.group(), match.group()), text)
