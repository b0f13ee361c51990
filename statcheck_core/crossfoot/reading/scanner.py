"""From folded text to items: each name is read by the reader of its quantity."""

from __future__ import annotations

import re
from collections.abc import Callable, Iterator, Sequence

from crossfoot.expressions import expression
from crossfoot.reading import numerals
from crossfoot.reading.brackets import BRACKETS, degrees_after, pair_behind, read_degrees
from crossfoot.reading.items import Item, Part, Text
from crossfoot.reading.lazily import lazily
from crossfoot.reading.notation import Name, names
from crossfoot.reading.numerals import NUMERAL
from crossfoot.reading.rsquared import read_r_squared
from crossfoot.reading.told import told
from crossfoot.reading.values import AND, known_number, number_at, value_after

_RATIO = lazily(rf"\(?\s?(?P<top>{NUMERAL})\s?\)?\s?/\s?\(?\s?(?P<bottom>{NUMERAL})\s?\)?\s?=\s?$")
_LIMITS = lazily(
    r"\s*+(?:(?:[=:,]|of|was|from|for\s(?:the\s)?\w{1,12})\s*+)?(?:[:=]\s*+)?(?:(?:\(|\[|from\s)\s*+)?"
    rf"(?P<low>{NUMERAL})\s*+(?:,|;|to|and|-|bis|à|a|tot|til|till|y|\.\.|\|)\s*+(?P<high>{NUMERAL})"
    r"\s?[\])]?"
)
_FOR_WHAT = lazily(
    r"\s(?:for|of|on)\s(?:the\s)?[^\W\d][\w-]{0,30}(?:\s[^\W\d][\w-]{0,30})?(?=\s(?:was|is|=))"
)
_PLUS_MINUS = lazily(
    rf"\s?(?:±|\+/-|\+-)\s?(?P<error>{NUMERAL})\s?\(?(?:SE|s\.e\.|S\.E\.|SEM|standard error)"
)
_BRACKETED = lazily(rf"\s?\(\s?(?P<number>{NUMERAL})\s?\)")
_NEXT_VALUE = expression(rf"\s?(?:,\s?(?:{AND}\s)?|\s{AND}\s)(?=[-+]?[.,·]?\d)")
_DEALT = lazily(
    r"[^.]*?(?:[.]\d[^.]*?)*?(?:respectively|beziehungsweise|bzw|respectivement|(?<!\w)p'?s\b)"
)
_ALL = expression(r"(?:both|all|each)\s$")
_SIDED = lazily(r"\s?\(?(?P<one>one|two|1|2)-?\s?(?:sided|tailed)\)?", re.IGNORECASE)
_ADJUSTED_NAME = expression(r"adj|corr|bonf|holm|tukey|fdr", re.IGNORECASE)
_ADJUSTED_BEFORE = expression(
    r"(?:adj\.?|adjusted|corrected|Bonferroni|Holm|Tukey)\s?-?$", re.IGNORECASE
)
_ADJUSTED_LABEL = lazily(r"Bonf|Holm|Tukey|adj|corr|FDR", re.IGNORECASE)
_CRITICAL = expression(r"crit", re.IGNORECASE)
_RANK = lazily(r"ρ|rho|Spearman|_\{?s|rs$")


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
    found.sort(key=lambda item: item.start)
    return found


def _named(text: Text, start: int, end: int) -> Iterator[Item]:
    done = start
    for name in names(text.folded, start, end):
        if name.match.start() < done:
            continue
        item = _READERS.get(name.notation.quantity, _read_plain)(text, name)
        if item is None:
            continue
        yield item
        done = item.end
        if "plural" in item.flags or _shares_out(text, item):
            for other in _further_values(text, item):
                yield other
                done = other.end


def _shares_out(text: Text, item: Item) -> bool:
    """Say whether the sentence goes on to deal out numbers: ``respectively``, ``ps < .05``."""
    if (
        item.head not in {"F", "t", "r", "z", "chi2", "p"}
        or _NEXT_VALUE.match(text.folded, item.end) is None
    ):
        return False
    return _DEALT().search(text.folded, item.end, item.end + 160) is not None


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
    if quantity == "b" and (told_what := _FOR_WHAT().match(text.folded, at)) is not None:
        at = told_what.end()
    value = value_after(text, at, quantity, name)
    if value is None:
        return None
    parts: tuple[Part, ...] = (value,)
    end = value.end
    if quantity in {"b", "β", "beta"}:
        match = _PLUS_MINUS().match(text.folded, end)
        error = known_number(text, match, "error", "se") if match is not None else None
        if match is not None and error is not None:
            parts, end = (value, error), match.end()
    return Item(quantity, parts, name.match.start(), end)


def _read_f(text: Text, name: Name) -> Item | None:
    """F with its degrees of freedom before or behind, perhaps worked out as MS/MS."""
    printed, quantity = name.match.group(), name.notation.quantity
    start, end = name.match.span()
    if _CRITICAL.search(text.folded, max(0, start - 22), end + 8):
        return None
    degrees = degrees_after(text, end, ("df1", "df2"))
    if not degrees.possible:
        return None
    # F1 and F2 by subjects and items, and a lower-case f, are tests only with both df.
    units = _by_unit(printed)
    if (units or printed == "f") and len(degrees.parts) != 2:
        return None
    value = value_after(text, degrees.end, quantity, name)
    if value is None or value.high < 0:
        return None
    parts = (*degrees.parts, *_mean_squares(text, degrees.end, value.start), value)
    end = value.end
    if not degrees.parts:
        behind, end = pair_behind(text, end)
        parts = (*parts, *behind)
    flags = (*units, *_F_FLAGS.get(printed, ()), *(("lower",) if printed == "f" else ()))
    return Item(quantity, parts, start, end, flags)


_F_FLAGS = {"Fs": ("plural",), "F's": ("plural",)}
_BY_UNIT = expression(r"[Ft]_?\{?(?P<unit>[12₁₂])\}?$")


def _by_unit(printed: str) -> tuple[str, ...]:
    """Return what F1 and F2, t1 and t2 say: tests by subjects and by items."""
    match = _BY_UNIT.match(printed)
    if match is None:
        return ()
    return ("by-subject",) if match["unit"] in "1₁" else ("by-item",)


def _mean_squares(text: Text, start: int, end: int) -> tuple[Part, ...]:
    """Return the mean squares of ``F = 227.4/48.7 = 4.667``."""
    match = (
        _RATIO().search(text.folded, start, end) if text.folded.find("/", start, end) > 0 else None
    )
    if match is None:
        return ()
    top, bottom = (known_number(text, match, group, "ms") for group in ("top", "bottom"))
    if top is None or bottom is None:
        return ()
    return top._replace(term="model"), bottom._replace(term="error")


def _read_one_df(text: Text, name: Name) -> Item | None:
    """t, r and χ²: one degree of freedom, for χ² perhaps with N."""
    printed, quantity = name.match.group(), name.notation.quantity
    keys = ("df", "n") if quantity == "chi2" else ("df",)
    degrees = degrees_after(text, name.match.end(), keys)
    if not degrees.possible or _CRITICAL.search(text.folded, name.match.end(), degrees.end + 5):
        return None
    value = value_after(text, degrees.end, quantity, name)
    if value is None:
        return None
    flags = ("plural",) if printed in {"ts", "t's", "rs"} else _by_unit(printed)
    if quantity == "r" and _RANK().search(printed):
        flags = ("rank-correlation",)
    return Item(quantity, (*degrees.parts, value), name.match.start(), value.end, flags)


def _read_p(text: Text, name: Name) -> Item | None:
    """p, with what its name or a bracket says of sides and of correction."""
    start, end = name.match.span()
    printed = name.match.group()
    flags: tuple[str, ...] = ()
    before = _ADJUSTED_BEFORE.search(text.folded, max(0, start - 14), start)
    if _ADJUSTED_NAME.search(printed) or before:
        flags = ("adjusted-p",)
    bracket = BRACKETS.match(text.folded, end)
    if bracket is not None and (inner := bracket["round"] or bracket["lowered"]):
        sided = _SIDED().match(inner)
        if sided is not None:
            flags = (*flags, "one-sided" if sided["one"].lower() in {"one", "1"} else "two-sided")
        elif _ADJUSTED_LABEL().search(inner):
            flags = ("adjusted-p",)
        else:
            return None
        end = bracket.end()
    if "tailed" in printed:
        flags = (*flags, "one-sided" if "one" in printed else "two-sided")
    value = value_after(text, end, "p", name)
    if value is None:
        return None
    if printed.lower() in {"ps", "p's"} or _ALL.search(text.folded, max(0, start - 7), start):
        flags = (*flags, "plural")
    return Item("p", (value,), start, value.end, flags)


def _read_interval(text: Text, name: Name) -> Item | None:
    """Read a confidence interval with its level."""
    match = _LIMITS().match(text.folded, name.match.end())
    if match is None:
        return None
    low = known_number(text, match, "low", "ci_low")
    high = number_at(text, match.start("high"), "ci_high", "=")
    if low is None or high is None:
        return None
    parts = [low, high]
    for group in ("level_before", "level_after"):
        if name.match[group]:
            level = float(name.match[group].replace(",", ".")) / 100
            parts.insert(0, Part("ci_level", "=", *name.match.span(group), level, level))
    return Item("ci", tuple(parts), name.match.start(), match.end())


def _read_estimate_with_error(text: Text, name: Name) -> Item | None:
    """Read ``B(SE) = 0.81 (0.30)``."""
    value = value_after(text, name.match.end(), "b", name)
    match = _BRACKETED().match(text.folded, value.end) if value is not None else None
    error = known_number(text, match, "number", "se") if match is not None else None
    if value is None or match is None or error is None:
        return None
    return Item("b", (value, error), name.match.start(), match.end())


def _read_error_mean_square(text: Text, name: Name) -> Item | None:
    value = value_after(text, name.match.end(), "ms", name)
    if value is None:
        return None
    return Item("ms", (value._replace(term="error"),), name.match.start(), value.end)


_READERS: dict[str, Callable[[Text, Name], Item | None]] = {
    "F": _read_f,
    "F_change": _read_f,
    "t": _read_one_df,
    "r": _read_one_df,
    "chi2": _read_one_df,
    "df": read_degrees,
    "R2": read_r_squared,
    "R2_change": read_r_squared,
    "p": _read_p,
    "ci": _read_interval,
    "b-se": _read_estimate_with_error,
    "ms-error": _read_error_mean_square,
}
