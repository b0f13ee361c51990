"""Tests: F, t, r, χ² and their like, with their degrees of freedom."""

from __future__ import annotations

import re

from crossfoot.expressions import expression
from crossfoot.reading.brackets import degrees_after, pair_behind
from crossfoot.reading.estimates import (
    enclosing,
)
from crossfoot.reading.items import Item, Part, Text
from crossfoot.reading.names import Name
from crossfoot.reading.numerals import NUMERAL
from crossfoot.reading.values import (
    count_at,
    known_number,
    number_at,
    value_after,
)

_RATIO = expression(
    rf"\(?\s?(?P<top>{NUMERAL})\s?\)?\s?/\s?\(?\s?(?P<bottom>{NUMERAL})\s?\)?\s?=\s?$"
)
# χ with its df beneath and its square above: χ_{1}^{2}
_INDEX = expression(r"χ_\{?(?P<df>\d{1,3})\}?\s?\^")
_CRITICAL_BEFORE = expression(
    r"[ck]r[ií]t\w*\.?\s(?:(?:values?|de|del?|valore|di):?\s)?(?:(?:of|for)\s)?(?:the\s)?$",
    re.IGNORECASE,
)
_CRITICAL_BEHIND = expression(r"(?:\s?\([^()]{1,20}\))?[\s_({-]{0,3}crit", re.IGNORECASE)
_RANK = expression(r"ρ|rho|Spearman|_\{?s|rs$")


def _is_critical(text: Text, start: int, end: int) -> bool:
    """Say whether a statistic is a critical value: ``F_crit``, ``the critical F(2, 57)``."""
    return (
        _CRITICAL_BEHIND.match(text.folded, end) is not None
        or _CRITICAL_BEFORE.search(text.folded, max(0, start - 30), start) is not None
    )


def read_f(text: Text, name: Name) -> Item | None:
    """F with its degrees of freedom before or behind, perhaps worked out as MS/MS."""
    printed, quantity = name.match.group(), name.notation.quantity
    start, end = name.match.span()
    if _is_critical(text, start, end):
        return None
    degrees = degrees_after(text, end, ("df1", "df2"))
    if not degrees.possible:
        return None
    # F1 and F2 by subjects and items, and a lower-case f, are tests only with both df.
    units = _by_unit(printed)
    bare = len(degrees.parts) == 2 or text.folded[max(0, start - 2) : start] in {", ", "; "}
    value = value_after(text, degrees.end, quantity, name, bare=bare)
    if value is None or value.high < 0:
        return None
    if (units or printed == "f") and len(degrees.parts) != 2 and value.relation == "=":
        return None
    parts = (*degrees.parts, *_mean_squares(text, degrees.end, value.start), value)
    end = value.end
    if not degrees.parts:
        behind, end = pair_behind(text, end)
        parts = (*parts, *behind)
    flags = (
        *units,
        *degrees.flags,
        *_F_FLAGS.get(printed, ()),
        *(("lower",) if printed == "f" else ()),
    )
    if printed.startswith("Wald"):
        flags = (*flags, "wald")
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
        _RATIO.search(text.folded, start, end) if text.folded.find("/", start, end) > 0 else None
    )
    if match is None:
        return ()
    top, bottom = (known_number(text, match, group, "ms") for group in ("top", "bottom"))
    if top is None or bottom is None:
        return ()
    return top._replace(term="model"), bottom._replace(term="error")


def read_one_df(text: Text, name: Name) -> Item | None:
    """t, r and χ²: one degree of freedom, for χ² perhaps with N."""
    printed, head = name.match.group(), name.notation.quantity
    quantity = "chi2" if head == "chi2-of" else head
    if printed in _BELOW:
        return _read_below(text, name)
    keys = ("df", "n") if quantity == "chi2" else ("df",)
    degrees = degrees_after(text, name.match.end(), keys)
    if quantity == "chi2" and (inside := _INDEX.search(printed)) is not None:
        one = count_at(text, inside["df"], name.match.start() + inside.start("df"), "df")
        degrees = degrees._replace(parts=(*((one,) if one else ()), *degrees.parts))
    if not degrees.possible or _is_critical(text, name.match.start(), name.match.end()):
        return None
    at = degrees.end
    if text.folded[at : at + 1] == "|" == text.folded[name.match.start() - 1]:
        at += 1  # |t(30)| = 0.62
    value = value_after(text, at, quantity, name, bare=bool(degrees.parts))
    if value is None:
        return None
    flags = ("plural",) if printed in {"ts", "t's", "rs"} else _by_unit(printed)
    if quantity == "r" and _RANK.search(printed):
        flags = ("rank-correlation",)
    if head == "chi2-of":
        flags = ("by-name",)
    flags = (*flags, *degrees.flags)
    limits, end = enclosing(text, value) if quantity == "r" else ((), value.end)
    return Item(quantity, (*degrees.parts, value, *limits), name.match.start(), end, flags)


#: Names of correlations that stand over their number.
_BELOW = frozenset({"cor", "rho", "tau"})
_TO_NEXT_LINE = expression(r"[ \t]*+\n\s*+")


def _read_below(text: Text, name: Name) -> Item | None:
    """Read a correlation that is printed on the line below its name, as an estimate is."""
    start, end = name.match.span()
    gap = _TO_NEXT_LINE.match(text.folded, end)
    value = number_at(text, gap.end(), "r", "=") if gap is not None else None
    if value is None:
        return None
    flags = ("estimated",) if name.match.group() == "cor" else ("estimated", "rank-correlation")
    return Item("r", (value,), start, value.end, flags)
