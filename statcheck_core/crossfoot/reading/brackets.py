"""Degrees of freedom: in brackets, lowered, flattened, or told beside the word."""

from __future__ import annotations

import re
from typing import NamedTuple

from crossfoot.expressions import expression
from crossfoot.reading.fold import ON_THE_LINE
from crossfoot.reading.items import AS_GOOD_AS, INFINITE, Item, Part, Text
from crossfoot.reading.names import Name
from crossfoot.reading.values import AND, COUNT, count_at, value_after
from crossfoot.reading.words import DEGREES, VERB_UNSPACED

BRACKETS = expression(
    r"\s?(?:_?\(\s?(?P<round>[^()\[\]]{1,48}?)\s?\)|\[\s?(?P<square>[^()\[\]\n]{1,48}?)\s?\]"
    r"|_\{\s?[(\[]?(?P<lowered>[^(){}\n]{1,40}?)[)\]]?\s?\}(?P<more>(?:\s?[,;]?\s?_\{[^{}\n]{1,12}\}){1,3})?"
    r"|_\{\(\}\s?(?P<slipped>[^()\[\]{}\n]{1,40})\)"  # the bracket alone was lowered
    r"|\^\{\s?(?P<raised>\d{1,4})\s?\}_\{\s?(?P<beneath>\d{1,6})\s?\}"
    r"|\(?(?P<sub>[₀-₉]+(?:[,.;\s]{1,2}[₀-₉]+)*+)\)?)"
)
#: A label between a name and its degrees of freedom: `F_{group}(2, 48)`, `F^{GG}(1.6, 36)`.
_LABEL = expression(
    r"\s?(?:[_^]\{\s?(?P<label>[^\W\d_][^{}\n=<>]{0,30})\}|_(?P<bare>[A-Za-z]{2,12}))(?=\s?[(\[]\s?\d)"
)
#: A letter between the stars of markup that is shown as it stands: `*F*(2, 57)`.
_STARRED = expression(r"\*[A-Za-z]\*(?=\s?[(\[]\s?\d)")
_ADJUSTED = expression(r"GG|HF|[Gg]reenhouse|[Hh]uynh")
_NO_TEST = expression(r"(?:[ck]rit|tab|max|theor|α|[XYZ](?:,|$))", re.IGNORECASE)
_FLAT_PAIR = expression(
    r"\s?_?(?P<a>\d{1,4}(?:\.\d+)?)\s?[,;/]\s?(?P<b>\d{1,6}(?:\.\d+)?)(?=\s{0,3}[=<>≤≥≈])"
)
_FLAT_ONE = expression(r"_?(?P<a>\d{1,4}(?:\.\d+)?)(?=\s{0,3}[=<>≤≥≈])")
_THOUSANDS = expression(r"\d{1,3}(?:,\d{3})+")
# One df before a decimal comma: `t(38,4)`, after Welch. A 1 before it is the df1 of an F.
_DASHED = expression(r"(\d{1,3})\s?-\s?(\d{1,6})")
_FRACTIONAL = expression(r"(?!1,)\d{1,4},\d{1,3}")
_DF = (
    rf"(?:d\.?f\.?[nd]?|ν|{DEGREES})\s?_?"
    r"\{?(?:\d|num|den|between|within|model|error)?\}?\s?[=:]?\s?"
)
_ARGUMENT = expression(rf"\s?(?:{_DF})?(?P<number>{COUNT})\s?(?:{_DF})?\s?")
_COUNT = expression(r"\d+(?:\.\d+)?")
_TOTAL = expression(rf"\s?[Nn]\s?=\s?(?P<number>{COUNT})\s?")
#: What separates arguments, each with a character without which it can't stand there.
_SEPARATORS = tuple(
    (character, expression(pattern))
    for character, pattern in (
        (";", r"\s?;\s{0,9}"),
        ("/", r"\s?/\s?"),
        ("", rf"\s{AND}\s"),
        (",", r"\s?,\s{1,9}"),
        (",", r","),
    )
)
_PAIR = expression(
    rf"\s*+(?:(?:[=:]|{VERB_UNSPACED}|(?:was|were|are|of)\s)\s*+)?(?:[(\[]\s*+)?(?P<a>{COUNT})\s*+(?:,|;|/|{AND})\s*+(?P<b>{COUNT})(?![\d%]|[.,]\d)"
)
_PAIR_BEFORE = expression(
    rf"(?<![\d.,])(?<![=<>]\s)(?<![=<>+-])(?P<a>\d+(?:[.,]\d+)?)\s?(?:,|;|/|{AND})\s?"
    r"(?P<b>\d+(?:[.,]\d+)?)\s?\)?\s?$"
)
_ONE_BEFORE = expression(r"(?<![\d.,])(?P<a>\d+(?:[.,]\d+)?)\s?$")
_TRAILING_PAIR = expression(rf"\*{{0,4}}\s?(?:_\{{)?\((?P<a>{COUNT})\s?[,;]\s?(?P<b>{COUNT})\)\}}?")
_ONE_DECIMAL = expression(r"\s?[=:]?\s?\d+,\d+(?!\d)")
_TURKISH = expression(r"[ıİşŞğĞ]")
_F_BEFORE = expression(r"(?<![A-Za-z])F(?![A-Za-z])")
#: How far before "degrees of freedom" their numbers may stand, in characters.
_REACH = 24


#: `F(dose) = 5.2` is the test of an effect, `F(x)` a function.
_SHORTEST_EFFECT = 4


class Degrees(NamedTuple):
    """Degrees of freedom after a name.

    ``parts`` is empty where the text prints none there; ``end`` is where they end; ``possible``
    is False where brackets hold something that can't be any, so that the name is no test;
    ``flags`` are those of the item that has them.
    """

    parts: tuple[Part, ...]
    end: int
    possible: bool = True
    flags: tuple[str, ...] = ()


def degrees_after(text: Text, at: int, keys: tuple[str, ...]) -> Degrees:
    """Return the degrees of freedom that stand at ``at``.

    ``keys`` names them: two for F, one for t and r, one and perhaps the sample size for χ².
    """
    if _STARRED.match(text.folded, max(0, at - 2)) is not None:
        at += 1
    label = _LABEL.match(text.folded, at)
    if label is None:
        return _unlabelled(text, at, keys)
    degrees = _unlabelled(text, label.end(), keys)
    words = label["label"] or label["bare"]
    if not degrees.parts or _NO_TEST.match(words):
        return degrees._replace(parts=(), possible=False)
    flags = ("adjusted-df",) if _ADJUSTED.match(words) else ("labelled",)
    return degrees._replace(flags=(*degrees.flags, *flags))


def _unlabelled(text: Text, at: int, keys: tuple[str, ...]) -> Degrees:
    two = "df2" in keys
    match = BRACKETS.match(text.folded, at)
    if match is None:
        return _flattened(text, at, two=two)
    if match["raised"]:
        pair = _both(text, match, "raised", "beneath") if two else ()
        return Degrees(pair, match.end(), possible=bool(pair))
    last = match.lastgroup or ""
    group = "lowered" if last == "more" else last
    inner = match[group].translate(ON_THE_LINE)
    start = match.start(group)
    dashed = _DASHED.fullmatch(inner) if two else None
    pieces = (
        [(dashed[1], 0), (dashed[2], dashed.start(2))]
        if dashed is not None
        else _pieces(inner.rstrip(" ,;"))
    )
    if keys == ("df",) and len(pieces) == 2:
        if _THOUSANDS.fullmatch(inner) or _FRACTIONAL.fullmatch(inner):
            pieces = [(inner, 0)]
        elif pieces[0][0].strip() == "1" and "/" not in inner:  # t(1, 58): the df of its F
            pieces = pieces[1:]
    if match["more"]:  # lowered one by one: `F_{1,}_{56}`
        stop = match.end("more")
        pieces = [(n[0], n.start() - start) for n in _COUNT.finditer(text.folded, start, stop)]
    refused = Degrees((), match.end(), possible=False)
    parts: list[Part] = []
    flags: tuple[str, ...] = ()
    for number, (piece, offset) in enumerate(pieces):
        if piece.strip() in INFINITE and keys[number:] == keys[-1:] and keys[-1] != "n":
            begin = start + offset + len(piece) - len(piece.lstrip())
            stop = begin + len(piece.strip())
            parts.append(Part(keys[number], "=", begin, stop, AS_GOOD_AS, AS_GOOD_AS))
            flags = ("limiting-df",)
            continue
        total = _TOTAL.fullmatch(piece)
        argument = total or _ARGUMENT.fullmatch(piece)
        if argument is None:  # `t(INCOME) = …` names a predictor; `F(x, y)` is a function
            named = piece.isalpha() and len(piece) >= _SHORTEST_EFFECT
            return Degrees((), match.end(), possible=named if two else not piece.isalpha())
        if total is None and number >= len(keys):
            return refused
        quantity = "n" if total else keys[number]
        part = count_at(
            text, argument["number"], start + offset + argument.start("number"), quantity
        )
        if part is None or part.low <= 0 or (quantity == "n" and part.low != part.high):
            return refused
        parts.append(part)
    if two and len(parts) < 2 and group != "round":
        return refused
    return Degrees(tuple(parts), match.end(), flags=flags)


def pair_behind(text: Text, end: int) -> tuple[tuple[Part, ...], int]:
    """Return the bare bracketed pair of ``F = 5.12 (3, 44)``, and where it ends."""
    match = _TRAILING_PAIR.match(text.folded, end)
    parts = _both(text, match) if match is not None else ()
    return (parts, match.end()) if match is not None and parts else ((), end)


def read_degrees(text: Text, name: Name) -> Item | None:
    """Read ``df = 3, 71``, ``3 and 44 degrees of freedom``, ``df = 12`` or ``47 df``."""
    folded, start, end = text.folded, name.match.start(), name.match.end()
    if name.match.group() == "sd" and not _means_degrees(folded, start, end):
        return None
    match = None if _is_decimal(text, start, end) else _PAIR.match(folded, end)
    match = match or _PAIR_BEFORE.search(folded, max(0, start - _REACH), start)
    if match is not None:
        parts = _both(text, match)
        if not parts:
            return None
        return Item("df-pair", parts, min(start, match.start()), max(end, match.end()))
    value = value_after(text, end, "df", name)
    if value is not None:
        return Item("df", (value,), start, value.end)
    match = _ONE_BEFORE.search(folded, max(0, start - _REACH // 2), start)
    part = count_at(text, match["a"], match.start("a"), "df") if match is not None else None
    return Item("df", (part,), part.start, end) if part is not None else None


def _means_degrees(folded: str, start: int, end: int) -> bool:
    """Say whether ``sd`` is Turkish: elsewhere it is a standard deviation, which comes alone."""
    if _PAIR.match(folded, end) is not None:
        return _F_BEFORE.search(folded, max(0, start - 40), start) is not None
    return _TURKISH.search(folded) is not None


def _is_decimal(text: Text, start: int, end: int) -> bool:
    """Say whether ``df = 38,6`` is one number: the comma is decimal, and no F stands before."""
    if not text.decimal_comma or _ONE_DECIMAL.match(text.folded, end) is None:
        return False
    return _F_BEFORE.search(text.folded, max(0, start - 40), start) is None


def _flattened(text: Text, at: int, *, two: bool) -> Degrees:
    """Degrees of freedom that lost their subscript: ``F1,58 =``, ``t28 =``."""
    match = (_FLAT_PAIR if two else _FLAT_ONE).match(text.folded, at)
    if match is None:
        return Degrees((), at)
    if two:
        parts = _both(text, match)
    else:
        # Without its square χ is followed by the 2 that has run into its df.
        square = text.folded[at - 1] == "χ" and match["a"].startswith("2") and len(match["a"]) > 1
        one = count_at(text, match["a"][square:], match.start("a") + square, "df")
        parts = (one,) if one is not None else ()
    if not parts or any(part.low <= 0 for part in parts):
        return Degrees((), match.end(), possible=False)
    return Degrees(parts, match.end())


def _both(text: Text, match: re.Match[str], above: str = "a", below: str = "b") -> tuple[Part, ...]:
    first = count_at(text, match[above], match.start(above), "df1")
    second = count_at(text, match[below], match.start(below), "df2")
    return (first, second) if first is not None and second is not None else ()


def _pieces(inner: str) -> list[tuple[str, int]]:
    """Split the inside of brackets into arguments with their offsets.

    A semicolon or slash, ``and``, or a comma before a space separates; a comma alone does only
    where nothing else does.
    """
    for character, separator in _SEPARATORS:
        cuts = list(separator.finditer(inner)) if character in inner else []
        if cuts:
            starts = [0, *(cut.end() for cut in cuts)]
            stops = [*(cut.start() for cut in cuts), len(inner)]
            return [(inner[a:b], a) for a, b in zip(starts, stops, strict=True)]
    return [(inner, 0)]
