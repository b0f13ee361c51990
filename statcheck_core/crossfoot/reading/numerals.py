"""Numerals as printed, and the interval of true values that would print so."""

from __future__ import annotations

import math
import re
import sys
from functools import lru_cache
from typing import NamedTuple

from crossfoot.expressions import expression
from crossfoot.reading.fold import HARD_SPACE

_GROUP = rf"[,'{HARD_SPACE}]"
_GROUPED_TEXT = (
    rf"(?:[1-9]\d{{0,2}}(?:['{HARD_SPACE}]\d{{3}})+,\d+"  # 1 237,76 and 1'237,76
    r"|[1-9]\d{0,2}(?:[.]\d{3})+,\d+"  # 1.237,76
    rf"|[1-9]\d{{0,2}}(?:{_GROUP}\d{{3}})+(?:[.]\d+)?)"  # 1,237.76
)
_MANTISSA = rf"(?:{_GROUPED_TEXT}(?!\d)|\d+(?:[.,·]\d+)?|[.,·]\d+)"
_RAISED = (
    r"(?:\^?\{[-+]?\d{1,3}\}|\^\(?[-+]?\d{1,3}\)?|\([-+]\d{1,3}\)"
    r"|[⁻⁺]?[⁰¹²³⁴⁵⁶⁷⁸⁹]{1,3}|[-]\d{1,3})"
)
_POWER = rf"\s?[×xX*·⋅]\s?10\s?{_RAISED}"

#: Pattern of a numeral in folded text: sign, digits, exponent or power of ten, percent.
NUMERAL = (
    rf"(?:[-+]\s?)?(?:10{_RAISED}(?!\d|[.]\d)|{_MANTISSA}(?:[eE][-+]?\d{{1,3}}(?!\d)|{_POWER})?)"
    r"(?:\s?%|\s?per\s?cent(?![a-z]))?"
)

_PARTS = expression(
    rf"(?P<sign>[-+])?\s?(?:(?P<ten>10{_RAISED}(?!\d|[.]\d))|(?P<mantissa>{_MANTISSA})"
    rf"(?:[eE](?P<exponent>[-+]?\d{{1,3}})|\s?[×xX*·⋅]\s?10\s?(?P<power>{_RAISED}))?)"
    r"(?P<percent>\s?(?:%|per\s?cent))?"
)
_SUPERSCRIPTS = str.maketrans("⁰¹²³⁴⁵⁶⁷⁸⁹⁻⁺", "0123456789-+")
_GROUPED = expression(_GROUPED_TEXT)
_PADDED = expression(r"0\d")
_POINT_GROUPED = expression(r"[1-9]\d{0,2}(?:[.]\d{3})+")
_COMMA_GROUPED = expression(r"\d{1,3}(?:,\d{3})+")


class Numeral(NamedTuple):
    """A numeral taken apart: ``value`` is ``digits × 10**-decimals``, before percent.

    ``low`` and ``high`` bound the true values that print so; ``decimals`` may be negative where
    an exponent moves the point; ``percent`` says that the bounds were divided by a hundred.
    """

    value: float
    low: float
    high: float
    decimals: int
    percent: bool


@lru_cache(maxsize=4096)
def parse(literal: str, *, decimal_comma: bool = False, whole: bool = False) -> Numeral | None:
    """Return what a folded numeral stands for, or None where it is not one.

    Parameters
    ----------
    literal
        Folded text that matches :data:`NUMERAL`.
    decimal_comma
        Whether a comma before three digits is a decimal mark (the text writes ``0,026``) and not
        a thousands mark.
    whole
        Whether the quantity is a count, exact when printed without decimals.
    """
    match = _PARTS.fullmatch(literal.strip().rstrip("."))
    if match is None:
        return None
    sign, ten, mantissa, exponent, power, percent_sign = match.groups()
    moved = 0
    if ten:
        digits, decimals, moved = "1", 0, _power(ten[2:])
    else:
        digits, decimals = _digits(mantissa, decimal_comma)
        if exponent or power:
            moved = int(exponent or 0) or _power(power or "")
    if len(digits) > 40 or abs(moved) > 400 or _PADDED.match(literal.strip(" -+")):
        return None
    number = -int(digits) if sign == "-" else int(digits)
    percent = bool(percent_sign)
    decimals -= moved
    shift = decimals + (2 if percent else 0)
    value = _scaled(number, 1, shift)
    if whole and decimals <= 0 and not percent:
        return Numeral(value, value, value, decimals, percent)
    low = _scaled(2 * number - 1, 2, shift)
    high = _scaled(2 * number + 1, 2, shift)
    return Numeral(
        value, math.nextafter(low, -math.inf), math.nextafter(high, math.inf), decimals, percent
    )


def bounds(relation: str, numeral: Numeral) -> tuple[float, float]:
    """Return the closed interval of true values that a relation and a numeral leave.

    ``<`` and ``≤`` leave everything up to the printed number, ``>`` and ``≥`` everything from it
    on; ``≈`` allows a whole unit of the last place.
    """
    if relation in "<≤":
        return -math.inf, math.nextafter(numeral.value, math.inf)
    if relation in ">≥":
        return math.nextafter(numeral.value, -math.inf), math.inf
    if relation == "≈":
        reach = numeral.high - numeral.low or 1.0
        return numeral.value - reach, numeral.value + reach
    return numeral.low, numeral.high


def writes_decimal_comma(text: str, start: int = 0, end: int = sys.maxsize) -> bool:
    """Say whether ``text[start:end]``, folded, writes its decimals with a comma.

    A comma between digits with a lone zero before it, or with other than three digits after it,
    can't be a thousands mark; inside a list of degrees of freedom it can be a separator, so
    brackets do not count.
    """
    return _COMMA_EVIDENCE.search(text, start, end) is not None


# "df = 2,57" is a pair.
_COMMA_EVIDENCE = expression(
    r"[=<>≤≥≈](?<!f.)(?<!f[.\s].)(?<!f\.\s.)(?<![dg]l.)(?<![dg]l\s.)"
    r"\s?-?(?:0?,\d|[1-9]\d*,(?:\d{1,2}|\d{4,})(?![\d,]))"
)


#: The length of ``1,237``.
_SHORTEST_GROUPED = 5


def _digits(mantissa: str, decimal_comma: bool) -> tuple[str, int]:
    """Return the digits without marks, and how many of them are decimals."""
    if len(mantissa) < _SHORTEST_GROUPED:
        return _plain_digits(mantissa)
    grouped = _GROUPED.fullmatch(mantissa)
    if decimal_comma and _POINT_GROUPED.fullmatch(mantissa):
        return mantissa.replace(".", ""), 0
    if grouped and decimal_comma and _COMMA_GROUPED.fullmatch(mantissa):
        grouped = None if mantissa.count(",") == 1 else grouped
    if grouped:
        marks = re.sub(r"\d", "", mantissa)
        mark = marks[-1] if marks[-1] != marks[0] else "\n"
        whole, _, fraction = mantissa.partition(mark)
        return re.sub(r"\D", "", whole) + fraction, len(fraction)
    return _plain_digits(mantissa)


def _plain_digits(mantissa: str) -> tuple[str, int]:
    """Return the digits of a mantissa in which a mark can only be the decimal mark."""
    whole, _, fraction = mantissa.replace(",", ".").replace("·", ".").partition(".")
    return (whole + fraction) or "0", len(fraction)


def _power(raised: str) -> int:
    """Return the exponent in a raised number: ``^{-5}``, ``⁻⁵``, ``(-4)``, ``-5``."""
    plain = raised.translate(_SUPERSCRIPTS).strip("^{}()")
    return int(plain) if plain else 0


def _scaled(number: int, divisor: int, decimals: int) -> float:
    """Return ``number / divisor × 10**-decimals``, correctly rounded."""
    scale: int = 10 ** abs(decimals)
    try:
        return number / (divisor * scale) if decimals >= 0 else number * scale / divisor
    except OverflowError:
        return math.inf if number > 0 else -math.inf
