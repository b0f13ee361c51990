"""What stands in a cell: numbers with their relations, brackets and marks."""

from __future__ import annotations

import re
from collections.abc import Sequence
from typing import NamedTuple

from crossfoot.reading import numerals
from crossfoot.reading.fold import HARD_SPACE
from crossfoot.reading.items import WHOLE, Part
from crossfoot.reading.numerals import NUMERAL

#: Stands for a cell without content, in any of the ways to write that.
_BLANK = re.compile(
    r"[-–—.…·/\s]*|\(?(?:NA|N/A|n/a|n\.a\.|na|NaN|nan|None|ref\.?|Ref\.?|reference|Reference|base|omitted"
    r"|\(omitted\)|empty)\)?|\[-\]|\(-\)|\(\)|\(\.\)"
)
_TOKEN = re.compile(
    r"(?P<marks>\*+|[†‡]+|\^\{[*†‡+]{1,6}\}|(?<=\d)\s?\+$)"
    r"|(?P<space>\s+|(?<=\d{3})\.$)"
    r"|(?P<note>\^\{[a-zA-Z0-9,]{1,5}\})"
    r"|(?P<relation><\s?=|>\s?=|[<>=≤≥≈])"
    rf"|(?P<number>{NUMERAL})"
    r"|(?P<open>[(\[{])|(?P<close>[)\]}])"
    r"|(?P<between>[,;/|~±]|\+/-|(?:to|bis|and|à|a|-)(?=[\s\d.+-])|[–—…])"
    r"|(?P<insignificant>n\.?s\.?(?![a-z]))"
)
_LETTER = re.compile(r"[a-e](?=[\s)\]]|$)")
_SYMBOL = re.compile(r"[A-Za-zβηχΔ]{1,2}(?:\^\{2\}|²|2)?\s?(?=[=<>≤≥≈])")
_DEGREES = (
    r"(?P<a{0}>\d{{1,7}}(?:\.\d{{1,4}})?)"
    r"(?:\s?(?:[;,&]|and)\s?(?P<b{0}>\d{{1,9}}(?:\.\d{{1,4}})?))?"
)
_DF = re.compile(
    rf"\(\s?d\.?f\.?\s?=?\s?{_DEGREES.format(1)}\s?\)|\bd\.?f\.?\s?=\s?{_DEGREES.format(2)}"
    rf"|\b(?:on|with|at)\s?{_DEGREES.format(3)}\s?(?:d\.?f\.?(?![a-z])|degrees\sof\sfreedom)",
    re.IGNORECASE,
)
_NAMES_DF = re.compile(r"d\.?f|degrees", re.IGNORECASE)
#: A test with its degrees of freedom: ``F (2, 33) = 5.257``.
_TEST = re.compile(
    r"(?P<symbol>[FtrTχHQ](?:\^\{2\}|²)?)\s?\(\s?(?P<a>\d{1,7}(?:\.\d{1,4})?)"
    r"(?:\s?[,;]\s?(?P<b>\d{1,9}(?:\.\d{1,4})?))?\s?\)\s?(?==)"
)
_WITH_P = re.compile(
    r"[,;]?\s?p\s?(?P<relation><\s?=|[<=≤])\s?(?P<number>0?[.,]\d{1,20}(?:[eE]-\d{1,3})?)\Z"
)
#: One number whose digits are grouped by spaces: ``12 041.55``.
_GROUPED = re.compile(r"[-+]?[1-9]\d{0,2}(?: \d{3})+(?:[.,]\d+)?(?![ \d]|[.,;]\d)")
_GROUPED_SPACE = re.compile(r"(?<=\d) (?=\d)")
#: Longest cell that is looked at for numbers.
_LONGEST = 120
_RELATIONS = {"<=": "≤", ">=": "≥"}


class Number(NamedTuple):
    """A numeral in a cell: its place, the sign before it, and whether brackets enclose it."""

    literal: str
    start: int
    end: int
    relation: str = "="
    bracket: bool = False
    insignificant: bool = False


class Content(NamedTuple):
    """The content of a cell.

    Attributes
    ----------
    numbers
        In printed order.
    marks
        Significance marks with their place, if there are any.
    df
        Degrees of freedom that the cell names as such, one or two.
    symbol
        Of the test that it names with them.
    p
        A p value that it names after its other numbers.
    """

    numbers: tuple[Number, ...]
    marks: tuple[str, int, int] | None = None
    df: tuple[Number, ...] = ()
    symbol: str = ""
    p: Number | None = None

    @property
    def plain(self) -> tuple[Number, ...]:
        """The numbers outside brackets."""
        return tuple(number for number in self.numbers if not number.bracket)

    @property
    def enclosed(self) -> tuple[Number, ...]:
        """The numbers inside brackets."""
        return tuple(number for number in self.numbers if number.bracket)


NONE = Content(())


def fitting(roles: Sequence[str], content: Content) -> tuple[Number, ...]:
    """Return the numbers of a cell as far as its heading names them.

    There are none where more stand side by side than it names: which is meant is not known.
    """
    return content.numbers if len(content.plain) <= len(roles) else ()


def is_blank(text: str) -> bool:
    """Say whether a cell's folded text stands for no content."""
    return len(text) < 16 and _BLANK.fullmatch(text.strip()) is not None


def content_of(text: str, at: int = 0) -> Content | None:
    """Return the numbers of a cell, or None where it holds anything else.

    Parameters
    ----------
    text
        Folded text of the cell.
    at
        Where it starts, to which places are counted.
    """
    if len(text) > _LONGEST or is_blank(text):
        return NONE if len(text) <= _LONGEST else None
    if _GROUPED.match(text):
        grouped = _scan(_GROUPED_SPACE.sub(HARD_SPACE, text), 0, len(text), at, ())
        return grouped and grouped._replace(
            numbers=tuple(
                n._replace(literal=text[n.start - at : n.end - at]) for n in grouped.numbers
            )
        )
    df: tuple[Number, ...] = ()
    cut = len(text)
    start = 0
    test = _TEST.match(text)
    if test is not None:
        df = _numbers(test, ("a", "b"), at)
        inner = _scan(text, test.end(), cut, at, df)
        return None if inner is None else inner._replace(symbol=test["symbol"])
    after = _WITH_P.search(text)
    if after is not None and after.start():
        inner = content_of(text[: after.start()].rstrip(" ,;"), at)
        sign = _RELATIONS.get("".join(after["relation"].split()), after["relation"])
        p = Number(after["number"], at + after.start("number"), at + after.end("number"), sign)
        return None if inner is None else inner._replace(p=p)
    if _NAMES_DF.search(text):
        found = _DF.search(text)
        if found is not None:
            df = _numbers(found, ("a1", "b1", "a2", "b2", "a3", "b3"), at)
            cut = found.start()
            if text[found.end() :].strip():
                return None
    symbol = _SYMBOL.match(text)
    if symbol is not None:
        start = symbol.end()
    return _scan(text, start, cut, at, df)


def _numbers(found: re.Match[str], groups: tuple[str, ...], at: int) -> tuple[Number, ...]:
    return tuple(
        Number(found[group], at + found.start(group), at + found.end(group))
        for group in groups
        if found[group]
    )


def _scan(text: str, position: int, end: int, at: int, df: tuple[Number, ...]) -> Content | None:
    numbers: list[Number] = []
    marks: tuple[str, int, int] | None = None
    depth = 0
    relation = "="
    last = "start"
    while position < end:
        token = _TOKEN.match(text, position, end)
        if token is None:
            letter = _LETTER.match(text, position) if last == "number" else None
            if letter is None:
                return None
            position = letter.end()
            continue
        kind = token.lastgroup or ""
        start, stop = token.span()
        position = stop
        if kind == "space":
            last = "space" if last != "start" else last
            continue
        if kind == "number":
            literal = token.group()
            if last == "number" and literal[0] in "+-":
                # "0.20-0.64": the dash stands between two numbers.
                cut = len(literal) - len(literal[1:].lstrip())
                start, literal = start + cut, literal[cut:]
            elif last == "number":
                return None
            numbers.append(Number(literal, at + start, at + stop, relation, depth > 0))
            relation = "="
        elif kind == "relation":
            sign = "".join(token.group().split())
            relation = _RELATIONS.get(sign, sign)
        elif kind == "marks":
            if marks is not None and numbers and marks[1] > numbers[-1].start:
                return None
            mark = token.group().lstrip()
            marks = (mark.strip("^{}"), at + stop - len(mark), at + stop)
        elif kind == "open":
            depth += 1
        elif kind == "close":
            depth -= 1
        elif kind == "insignificant" and last == "number":
            continue  # a mark: nothing is said but that there are no stars
        elif kind == "insignificant":
            numbers.append(Number("n.s.", at + start, at + stop, ">", depth > 0, True))
        last = kind
    if depth or not (numbers or marks or df):
        return None
    return Content(tuple(numbers), marks, df)


def part(
    number: Number,
    quantity: str,
    *,
    comma: bool = False,
    percent: bool = False,
    term: str | None = None,
) -> Part | None:
    """Return a number of a cell as a reading of a quantity.

    Parameters
    ----------
    number
        From :func:`content_of`.
    quantity
        Its key.
    comma
        Whether the table writes decimals with a comma.
    percent
        Whether the heading says that numbers are percentages.
    term
        The row it stands in, where the claim is about several.
    """
    if number.insignificant:
        if quantity != "p":
            return None
        return Part("p", ">", number.start, number.end, 0.05, float("inf"), term)
    literal = number.literal
    if percent and not literal.endswith("%"):
        literal += "%"
    if _GROUPED.match(literal):
        if quantity in WHOLE and quantity != "n":
            return None  # "2 187" may be two degrees of freedom
        literal = _GROUPED_SPACE.sub(HARD_SPACE, literal)
    numeral = numerals.parse(literal, decimal_comma=comma, whole=quantity in WHOLE)
    if numeral is None:
        return None
    low, high = numerals.bounds(number.relation, numeral)
    return Part(quantity, number.relation, number.start, number.end, low, high, term)


def limits(numbers: tuple[Number, ...], comma: bool) -> tuple[Number, ...]:
    """Return the two limits in a cell below a heading of limits alone; nothing where it holds more.

    A number before the brackets is the estimate, of a column whose numbers end close to them.
    """
    enclosed = tuple(number for number in numbers if number.bracket)
    both = enclosed if len(enclosed) == 2 and numbers[-2:] == enclosed else numbers
    return in_order(both, comma) if len(both) == 2 else ()


def in_order(numbers: tuple[Number, ...], comma: bool) -> tuple[Number, ...]:
    """Return two limits so that the first is the lower one.

    A dash between two numbers may have been taken for the sign of the second: ``0.20 –0.64``.
    """
    if len(numbers) == 2 and numbers[1].literal[:1] == "-":
        low, high = (numerals.parse(n.literal, decimal_comma=comma) for n in numbers)
        if low is not None and high is not None and low.value > high.value:
            literal = numbers[1].literal[1:].lstrip()
            second = numbers[1]._replace(literal=literal, start=numbers[1].end - len(literal))
            return numbers[0], second
    return numbers
