"""From folded text to items: each name is read by the reader of its quantity."""

from __future__ import annotations

import re
from collections.abc import Callable, Iterator, Sequence

from crossfoot.expressions import expression
from crossfoot.reading import numerals
from crossfoot.reading.brackets import read_degrees
from crossfoot.reading.estimates import (
    behind_coefficient,
    read_estimate_with_error,
    read_interval,
)
from crossfoot.reading.items import Item, Part, Text
from crossfoot.reading.nameless import read_statistic
from crossfoot.reading.names import Name, names
from crossfoot.reading.probabilities import explains_marks, read_p
from crossfoot.reading.rsquared import of_two_models, read_r_squared
from crossfoot.reading.statistics import read_f, read_one_df
from crossfoot.reading.told import told
from crossfoot.reading.unnamed import unnamed
from crossfoot.reading.values import (
    AND,
    is_of_something,
    number_at,
    value_after,
)
from crossfoot.reading.words import ALL, RESPECTIVELY

_NEXT_VALUE = expression(rf"\s?(?:[,;]\s?(?:{AND}\s)?|\s{AND}\s|[和与と및])(?=[-+]?[.,·]?\d)")
#: Words between a name and its number that say that several numbers follow in order.
_IN_ORDER = expression(r"分别|分別|それぞれ|각각")
#: How far behind a list of tests stand the degrees of freedom that they share, in characters.
_NEAR = 24
_P_LIST = expression(rf"\s?[,;]?\s{AND}\s0?[.,]\d{{2,5}}(?![\d%])")
_DEALT = expression(
    rf"[^.]*?(?:[.]\d[^.]*?)*?(?:{RESPECTIVELY}|(?<!\w)p'?s\b"
    r"|(?<!\w)[pP]\s?=\s?0?[.,]\d{1,5},\s(?:and\s)?0?[.,]\d)"
)
#: `OR per 10-year increase = 1.31`
_PER = expression(
    r"\sper\s(?:\d{1,4}[-\s])?[^\W\d]\w{0,20}(?:\s(?:increase|change|rise|higher|lower))?"
)
_PER_UNIT = frozenset({"b", "β", "beta", "odds_ratio"})
#: What may be printed once for all tests of a sentence.
_ONCE_FOR_ALL = frozenset({"df-pair", "df", "n"})
#: What belongs to the test beside it, unless it is said to be of something else.
_OF_A_MODEL = frozenset({"R2", "R2_adj", "R2_change", "eta2", "eta2_partial", "omega2", "f2"})
_FOR_ALL_BEFORE = expression(rf"(?<!\w){ALL}(?:\s[a-z]+){{0,2}}\s$", re.IGNORECASE)
_FOR_ALL_BEHIND = expression(
    r"\)?,?\s(?:(?:for|in|with|on)\s(?:both|all|each)|throughout|each|(?:in\s)?both)\b"
)
#: at t = 0.31; x = -42, y = 18, z = 22
_PLACED = expression(
    r"(?<![A-Za-z])[Aa]t\s$|[yY]\s?=\s?-?\d{1,4}(?:\.\d{1,3})?\s?(?:mm)?,?\s(?:and\s)?$"
)


def items_in(folded: str, zones: Sequence[tuple[int, int]]) -> list[Item]:
    """Return the items of a text in printed order.

    Parameters
    ----------
    folded
        Folded visible text of a block.
    zones
        The stretches to read; names outside them are not looked at.
    """
    comma = any(numerals.writes_decimal_comma(folded, *zone) for zone in zones)
    text = Text(folded, comma)
    found: list[Item] = []
    for start, end in zones:
        found += _named(text, start, end)
        found += told(text, start, end)
        found += unnamed(text, start, end)
        found += of_two_models(text, start, end)
    found.sort(key=lambda item: item.start)
    return found


def _named(text: Text, start: int, end: int) -> Iterator[Item]:
    done, listed_to = start, -_NEAR
    listed = False  # whether several numbers of one test have been read
    for name in names(text.folded, start, end):
        if name.match.start() < done or _is_event(text.folded, name.match.start()):
            continue
        item = _READERS.get(name.notation.quantity, _read_plain)(text, name)
        if item is None or _is_place(text, item):
            continue
        if item.head == "p" and explains_marks(text, item):
            done = item.end
            continue
        if item.head in _OF_A_MODEL and is_of_something(text.folded, name.match.end(), item):
            item = item._replace(flags=(*item.flags, "of-what"))
        if item.head in _ONCE_FOR_ALL and (
            _is_for_all(text, item) or _is_of_list(text, item, listed_to)
        ):
            item = item._replace(flags=(*item.flags, "all"))
        yield item
        done = item.end
        if "plural" in item.flags or (listed and item.head == "p") or _shares_out(text, item):
            for other in _further_values(text, item):
                yield other
                done, listed_to, listed = other.end, other.end, True


def _is_of_list(text: Text, item: Item, listed_to: int) -> bool:
    """Say whether a pair of df stands right behind a list of tests: ``6.20 and 9.85 (df = 1, 58)``.

    A second pair behind it would be the second test's own.
    """
    near = item.head == "df-pair" and item.start - listed_to < _NEAR
    return near and _NEXT_VALUE.match(text.folded, item.end) is None


def _is_place(text: Text, item: Item) -> bool:
    """Say whether a letter is where or when something is, and no test: ``at z = 1.42``."""
    if item.head not in {"t", "z"} or len(item.parts) > 1:
        return False
    before = text.folded[max(0, item.start - 24) : item.start]
    return _PLACED.search(before) is not None


def _is_event(folded: str, start: int) -> bool:
    """Say whether what starts here is an event, whose probability is told: ``P(F > 3.16)``."""
    return (
        folded[start - 1 : start] in {"(", "|"}
        and _PROBABILITY_OF.search(folded, max(0, start - 8), start) is not None
    )


_PROBABILITY_OF = expression(r"(?<![A-Za-z])[pP](?:r|rob)?\s?\(\s?\|?$")


def _is_for_all(text: Text, item: Item) -> bool:
    """Say whether words give a count to all tests: ``both N = 96``, ``df = 1, 96 for each``."""
    return bool(
        text.folded.find("均", item.start, item.end) >= 0
        or _FOR_ALL_BEFORE.search(text.folded, max(0, item.start - 24), item.start)
        or _FOR_ALL_BEHIND.match(text.folded, item.end)
    )


def _shares_out(text: Text, item: Item) -> bool:
    """Say whether the sentence goes on to deal out numbers: ``respectively``, ``ps < .05``."""
    if item.head == "p" and _P_LIST.match(text.folded, item.end) is not None:
        return True
    if (
        item.head not in {"F", "t", "r", "z", "chi2", "p"}
        or _NEXT_VALUE.match(text.folded, item.end) is None
    ):
        return False
    if not text.folded.isascii() and _IN_ORDER.search(text.folded, item.start, item.end):
        return True
    return _DEALT.search(text.folded, item.end, item.end + 160) is not None


def _further_values(text: Text, item: Item) -> Iterator[Item]:
    """Yield an item for each further number of ``Fs(1, 58) = 6.20 and 9.85``."""
    last = max(item.parts, key=lambda part: part.end)
    shared = tuple(part for part in item.parts if part is not last)
    while (match := _NEXT_VALUE.match(text.folded, last.end)) is not None:
        part = number_at(text, match.end(), last.quantity, last.relation)
        if part is None:
            return
        last = part
        yield Item(item.head, (*shared, part), part.start, part.end, (*item.flags, "listed"))


def _read_plain(text: Text, name: Name) -> Item | None:
    """Read a name, a relation and one number; after a coefficient perhaps ``± SE``."""
    quantity = name.notation.quantity
    at = name.match.end()
    per = _PER.match(text.folded, at) if quantity in _PER_UNIT else None
    value = value_after(text, per.end() if per is not None else at, quantity, name)
    if value is None:
        return None
    if quantity == "R" and value.low > 1 and "." not in text.folded[value.start : value.end]:
        return None  # a radius
    parts: tuple[Part, ...] = (value,)
    end = value.end
    flags: tuple[str, ...] = ()
    if quantity in {"b", "β", "beta", "odds_ratio"}:
        more, end, flags = behind_coefficient(text, value)
        parts = (value, *more)
    return Item(quantity, parts, name.match.start(), end, flags)


def _read_error_mean_square(text: Text, name: Name) -> Item | None:
    value = value_after(text, name.match.end(), "ms", name)
    if value is None:
        return None
    return Item("ms", (value._replace(term="error"),), name.match.start(), value.end)


#: Behind the number of predictors: their name, or the next of a list.
_OF_PREDICTORS = expression(
    r"\s(?:[a-z]{2,14}\s){0,2}(?:predictor|regressor|slope|covariate|explanatory|independent)"
    r"|\s?(?:[,;.)\]\n]|$)|\s(?:and|with)\s"
)


def _read_predictors(text: Text, name: Name) -> Item | None:
    """Read the number of predictors, unless what follows says that k counts other things."""
    value = value_after(text, name.match.end(), "k", name)
    if value is None or value.relation != "=" or not _OF_PREDICTORS.match(text.folded, value.end):
        return None
    return Item("k", (value,), name.match.start(), value.end)


_READERS: dict[str, Callable[[Text, Name], Item | None]] = {
    "F": read_f,
    "F_change": read_f,
    "t": read_one_df,
    "r": read_one_df,
    "chi2": read_one_df,
    "chi2-of": read_one_df,
    "df": read_degrees,
    "R2": read_r_squared,
    "R2_change": read_r_squared,
    "p": read_p,
    "ci": read_interval,
    "b-se": read_estimate_with_error,
    "ms-error": _read_error_mean_square,
    "statistic": read_statistic,
    "k": _read_predictors,
}
