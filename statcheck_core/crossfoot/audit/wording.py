"""Numbers and readings in words: the one place that decides how they are shown.

Bounds are rounded outwards, so that what is shown never says more than is known, and with enough
digits never to show 0.000 for what is not zero, nor to hide that two intervals are apart.
"""

from __future__ import annotations

import math
import sys
from collections.abc import Sequence

from crossfoot.audit.literals import Numeral, numeral, on_the_line
from crossfoot.laws.interval import Interval
from crossfoot.laws.quantities import symbol
from crossfoot.model import Reading

#: The hand that is followed where there is no numeral to follow.
PLAIN = Numeral("", "0", ".", "", "", 0, "", 0.5)

#: The term of a reading that is no numeral but a mark, such as ``***``.
MARKS = "stars"
#: The term of what is printed of the smaller of two nested models.
REDUCED = "reduced"
#: The term of a p that is adjusted for the number of tests, where p itself is printed too.
ADJUSTED = "adjusted"

_STATISTICS = {
    "F": ("df1", "df2"),
    "F_change": ("df1", "df2"),
    "t": ("df",),
    "r": ("df",),
    "chi2": ("df",),
}
_FREEDOM = ("df1", "df2", "df")
_CLOSE = 1e-9
_MOST_DECIMALS = 14

#: Numbers below this are as good as zero.
_LEAST = 1e-300

#: Numbers below this are written with an exponent; a single bound can be smaller.
_SMALL, _SMALL_ALONE = 1e-4, 1e-5


def between(interval: Interval, like: Numeral = PLAIN, apart: Interval | None = None) -> str:
    """Return an interval in words, to go on after the symbol of its quantity.

    Parameters
    ----------
    interval
        What the quantity can be.
    like
        A numeral whose hand is followed: decimal mark, percent sign, no zero before the mark.
    apart
        An interval to be told apart from.

    Examples
    --------
    >>> between(Interval(0.001382, 0.001394), PLAIN._replace(whole="", fraction="002"))
    'between .0013 and .0014'
    >>> between(Interval(60, 60)), between(Interval(60, math.inf))
    ('= 60', 'at least 60')
    """
    percent = like.power == -2
    low, high = (_sized(bound * 100 if percent else bound) for bound in interval)
    if apart is not None and percent:
        apart = Interval(apart.low * 100, apart.high * 100)
    if low == math.inf or high == -math.inf:
        return "beyond all bounds"
    if high == math.inf and low == -math.inf:
        return "of any value"
    if high == math.inf:
        return f"at least {_styled(_bound(low, False, like, apart), like)}"
    if low > -math.inf and high - low <= _CLOSE * max(abs(low), abs(high)):
        return f"= {_styled(f'{(low + high) / 2:.10g}', like)}"
    if low == -math.inf or _trifling(low, high):
        return f"at most {_styled(_bound(high, True, like, apart), like)}"
    first, last = _pair(low, high, like, apart)
    return f"between {_styled(first, like)} and {_styled(last, like)}"


def _sized(bound: float) -> float:
    """Return zero for a bound that is next to underflow."""
    return bound if abs(bound) >= _LEAST else 0.0


def _trifling(low: float, high: float) -> bool:
    """Say whether a lower bound is next to nothing beside the upper one."""
    return abs(low) < high * 1e-3 and not _whole(low, high)


def _whole(low: float, high: float) -> bool:
    return low == round(low) and high == round(high)


def _pair(low: float, high: float, like: Numeral, apart: Interval | None) -> tuple[str, str]:
    """Return both bounds, rounded away from each other."""
    if _whole(low, high):
        return f"{low:.0f}", f"{high:.0f}"
    size = max(abs(low), abs(high))
    if size < _SMALL:
        return _scientific(low, False), _scientific(high, True)
    decimals = _decimals(like, size, high - low)
    first, last = _rounded(low, decimals, False), _rounded(high, decimals, True)
    while decimals < _MOST_DECIMALS and (
        _zero(first, low) or _zero(last, high) or _touch(first, last, apart)
    ):
        decimals += 1
        first, last = _rounded(low, decimals, False), _rounded(high, decimals, True)
    return first, last


def _decimals(like: Numeral, size: float, width: float) -> int:
    """Return the decimals to start from: one more than are printed, and two digits at least.

    Where nothing is printed, as many as show the width of the interval.
    """
    least = 1 - math.floor(math.log10(size))
    if like is PLAIN:
        return max(least, math.ceil(-math.log10(width / 4)), 0)
    return max(least, len(like.fraction) + 1 if like.power in (0, -2) else 2, 0)


def _bound(bound: float, up: bool, like: Numeral, apart: Interval | None) -> str:
    """Return one bound, rounded away from what it bounds."""
    if abs(bound - round(bound)) <= _CLOSE * abs(bound):
        return f"{round(bound)}"
    if abs(bound) < _SMALL_ALONE:
        return _scientific(bound, up)
    decimals = _decimals(like, abs(bound), abs(bound))
    text = _rounded(bound, decimals, up)
    while decimals < _MOST_DECIMALS and (
        _touch("-inf", text, apart) if up else _touch(text, "inf", apart)
    ):
        decimals += 1
        text = _rounded(bound, decimals, up)
    return text.rstrip("0").rstrip(".") if "." in text else text


def _touch(first: str, last: str, apart: Interval | None) -> bool:
    return apart is not None and float(first) <= apart.high and apart.low <= float(last)


def _zero(text: str, bound: float) -> bool:
    return bound != 0 and float(text) == 0


def _rounded(bound: float, decimals: int, up: bool) -> str:
    """Return a bound rounded up or down; a multiple of the last place is left where it is."""
    text = f"{bound:.{decimals}f}"
    gap = float(text) - bound
    if abs(gap) > _CLOSE * abs(bound) and (gap < 0) == up:
        step = 10.0**-decimals
        text = f"{float(text) + (step if up else -step):.{decimals}f}"
    return text.removeprefix("-") if float(text) == 0 else text


def _scientific(bound: float, up: bool) -> str:
    """Return a small number with two digits and an exponent."""
    if abs(bound) < sys.float_info.min:  # the scale of smaller numbers is no float
        return "0" if bound == 0 or not up else f"{sys.float_info.min:.1e}"
    power = math.floor(math.log10(abs(bound)))
    mantissa = _rounded(bound / 10.0**power, 1, up)
    return f"{mantissa}e{power}"


def _styled(text: str, like: Numeral) -> str:
    """Return a plain numeral in the hand of another."""
    sign, digits = ("−", text[1:]) if text.startswith("-") else ("", text)
    if like.zeroless and digits.startswith("0."):
        digits = digits[1:]
    if like.mark == ",":
        digits = digits.replace(".", ",")
    return f"{sign}{digits}{_percent(like)}"


def _percent(like: Numeral) -> str:
    """Return the percent sign of a numeral that is worth hundredths, by a word in the text even."""
    return (like.tail or "%") if like.power == -2 else ""


def are_marks(quantity: str, term: str | None) -> bool:
    """Say whether a quantity of a row is what marks of significance stand for."""
    return quantity == "p" and term is not None and term.rpartition(": ")[2] == MARKS


def named(reading: Reading) -> str:
    """Return a reading's symbol, with its row in a table; marks of significance are of a p."""
    row = reading.term or ""
    # A row of a table has one column of degrees of freedom.
    name = symbol("df" if row and reading.quantity == "df1" else reading.quantity)
    if row == REDUCED:
        return f"{name} of the step before"
    if not are_marks(reading.quantity, row):
        return f"{name} ({row})" if row else name
    row = row.rpartition(": ")[0]
    return f"{name} ({row}) by its marks" if row else f"{name} by its marks"


def printed(reading: Reading) -> str:
    """Return a reading as it is printed."""
    sign = f"{reading.relation} " if not is_word(reading) else ""
    return f"{named(reading)} {sign}{literal_of(reading)}"


def is_word(reading: Reading) -> bool:
    """Say whether what stands for a bound is a word, such as ``n.s.``."""
    return reading.literal[:1].isalpha()


def literal_of(reading: Reading) -> str:
    """Return a literal on the line, with the percent sign that stands apart from it."""
    found = numeral(reading)
    return on_the_line(reading.literal) + ("" if found is None or found.tail else _percent(found))


def phrase(readings: Sequence[Reading]) -> str:
    """Return readings as one would write them: ``F(2, 57) = 7.41 and n = 60``.

    A statistic takes its degrees of freedom into brackets; where there is no statistic they
    follow at the end: ``p = .002 with 2 and 57 degrees of freedom``.
    """
    by_key = {(reading.quantity, reading.term): reading for reading in readings}
    held: set[tuple[str, str | None]] = set()
    heads: dict[int, str] = {}
    for place, reading in enumerate(readings):
        keys = [(df, reading.term) for df in _STATISTICS.get(reading.quantity, ())]
        if keys and all(key in by_key for key in keys) and held.isdisjoint(keys):
            held.update(keys)
            inside = ", ".join(literal_of(by_key[key]) for key in keys)
            term = f" ({reading.term})" if reading.term else ""
            head = f"{symbol(reading.quantity)}({inside}){term}"
            heads[place] = f"{head} {reading.relation} {literal_of(reading)}"
    rest = [r for r in readings if r.quantity in _FREEDOM and (r.quantity, r.term) not in held]
    rest.sort(key=lambda reading: _FREEDOM.index(reading.quantity))
    kinds = sorted(reading.quantity for reading in rest)
    whole = kinds in (["df"], ["df1", "df2"]) and not _rows(rest)
    words = [
        heads.get(place, printed(reading))
        for place, reading in enumerate(readings)
        if place in heads or reading.quantity not in _FREEDOM or (reading in rest and not whole)
    ]
    if not whole:
        return listed(words)
    freedom = f"{listed([literal_of(reading) for reading in rest])} degrees of freedom"
    return f"{listed(words)} with {freedom}" if words else freedom


def _rows(readings: Sequence[Reading]) -> bool:
    """Say whether degrees of freedom stand in several rows of a table, that of the error aside."""
    return len({reading.term for reading in readings if reading.quantity != "df2"}) > 1


def plural(readings: Sequence[Reading]) -> bool:
    """Say whether :func:`phrase` names more than one thing."""
    text = phrase(readings)
    return " and " in text.partition(" with ")[0]


def subjects(readings: Sequence[Reading]) -> list[str]:
    """Return the symbols of readings, all degrees of freedom together as the last of them.

    Those of several rows of a table are named each.
    """
    freedom = [reading for reading in readings if reading.quantity in _FREEDOM]
    if _rows(freedom):
        return list(dict.fromkeys(named(reading) for reading in readings))
    names = [named(reading) for reading in readings if reading.quantity not in _FREEDOM]
    if freedom:
        names.append("the degrees of freedom")
    return list(dict.fromkeys(names))


def listed(words: Sequence[str], joint: str = "and") -> str:
    """Return words as a list in a sentence.

    Examples
    --------
    >>> listed(["p", "F", "n"], "or")
    'p, F or n'
    """
    if len(words) < 2:
        return "".join(words)
    return f"{', '.join(words[:-1])} {joint} {words[-1]}"


def inside(sentence: str) -> str:
    """Return a sentence as it stands inside another."""
    first = sentence.partition(" ")[0]
    lower = first.isalpha() and first.istitle() and len(first) > 1
    return (sentence[0].lower() + sentence[1:] if lower else sentence).removesuffix(".")
