"""From folded text to items: each name is read by the reader of its quantity."""

from __future__ import annotations

import re
from collections.abc import Callable, Iterator, Sequence

from crossfoot.expressions import expression
from crossfoot.reading import numerals
from crossfoot.reading.brackets import BRACKETS, degrees_after, pair_behind, read_degrees
from crossfoot.reading.estimates import (
    behind_coefficient,
    enclosing,
    read_estimate_with_error,
    read_interval,
)
from crossfoot.reading.items import Item, Part, Text
from crossfoot.reading.nameless import read_statistic
from crossfoot.reading.names import Name, names
from crossfoot.reading.numerals import NUMERAL
from crossfoot.reading.rsquared import of_two_models, read_r_squared
from crossfoot.reading.told import told
from crossfoot.reading.unnamed import unnamed
from crossfoot.reading.values import (
    AND,
    count_at,
    is_of_something,
    known_number,
    number_at,
    value_after,
)
from crossfoot.reading.words import ALL, RESPECTIVELY

_RATIO = expression(
    rf"\(?\s?(?P<top>{NUMERAL})\s?\)?\s?/\s?\(?\s?(?P<bottom>{NUMERAL})\s?\)?\s?=\s?$"
)
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
_OR_LESS = expression(r"\sor\s(?:less|lower|smaller|below|better)\b")
#: "p = 0.04 of default": the probability of something else than a test's result
_OF_SOMETHING = expression(
    r"\sof\s(?!(?:the|this|that|an?|all|both|each|F|t|r|z)\b|interact|effect|slope|differ|trend|test)[a-z]{3}"
)
_EXACT_BEHIND = expression(r"\s?[(\[,]\s?[pP]\s?=\s?(?=0?[.,]\d)")
_COUNTED = expression(r"\s(?:[a-z]{2,14}\s){0,2}(?:predictor|regressor|covariate|variable|feature)")
_ALL = expression(rf"(?<![^\W\d_]){ALL}\s$|[均都もて]\s?$", re.IGNORECASE)
_SIDED = expression(r"\s?\(?(?P<one>one|two|1|2)-?\s?(?:sided|tailed)\)?", re.IGNORECASE)
_ADJUSTED_NAME = expression(r"adj|corr|bonf|holm|tukey|fdr", re.IGNORECASE)
_ADJUSTED_BEFORE = expression(
    r"(?:adj\.?|adjusted|corrected|Bonferroni|Holm|Tukey)\s?-?$", re.IGNORECASE
)
_ADJUSTED_LABEL = expression(r"Bonf|Holm|Tukey|adj|corr|FDR", re.IGNORECASE)
# χ with its df beneath and its square above: χ_{1}^{2}
_INDEX = expression(r"χ_\{?(?P<df>\d{1,3})\}?\s?\^")
_CRITICAL_BEFORE = expression(
    r"[ck]r[ií]t\w*\.?\s(?:(?:values?|de|del?|valore|di):?\s)?(?:(?:of|for)\s)?(?:the\s)?$",
    re.IGNORECASE,
)
_CRITICAL_BEHIND = expression(r"(?:\s?\([^()]{1,20}\))?[\s_({-]{0,3}crit", re.IGNORECASE)
_RANK = expression(r"ρ|rho|Spearman|_\{?s|rs$")


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
        if item.head == "p" and _explains_marks(text, item):
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
#: A mark that starts a sentence or a list, before a p; emphasis of p has a mark behind it too.
_MARKED = expression(r"(?:^|[.;:(\n]\s?|(?P<comma>,\s?))[*†‡]{1,4} ?$")
_MARKED_ALSO = expression(r"[*†‡] ?[pP]\s?[<≤][^a-zA-Z]{1,12}$")
_MARKED_NEXT = expression(r"[,;.]?\s?[*†‡]{1,4} ?[pP]\s?[<≤]")


def _explains_marks(text: Text, item: Item) -> bool:
    """Say whether a p is what marks of significance stand for: ``* p < .05, ** p < .01``."""
    folded, start = text.folded, item.start
    emphasis = "*" in {folded[start + 1], folded[item.end : item.end + 1]}
    if emphasis or folded[max(0, start - 1) : start] not in {"*", "†", "‡", " "}:
        return False
    marked = _MARKED.search(folded, max(0, start - 8), start)
    if marked is None:
        return False
    return (
        marked["comma"] is None
        or _MARKED_NEXT.match(folded, item.end) is not None
        or _MARKED_ALSO.search(folded, max(0, marked.start() - 24), marked.start()) is not None
    )


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


def _is_critical(text: Text, start: int, end: int) -> bool:
    """Say whether a statistic is a critical value: ``F_crit``, ``the critical F(2, 57)``."""
    return (
        _CRITICAL_BEHIND.match(text.folded, end) is not None
        or _CRITICAL_BEFORE.search(text.folded, max(0, start - 30), start) is not None
    )


def _read_f(text: Text, name: Name) -> Item | None:
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


def _read_one_df(text: Text, name: Name) -> Item | None:
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


def _read_p(text: Text, name: Name) -> Item | None:
    """p, with what its name or a bracket says of sides and of correction."""
    start, end = name.match.span()
    printed = name.match.group()
    flags: tuple[str, ...] = ()
    before = _ADJUSTED_BEFORE.search(text.folded, max(0, start - 14), start)
    if _ADJUSTED_NAME.search(printed) or before:
        flags = ("adjusted-p",)
    elif "perm" in printed:
        flags = ("resampled",)
    bracket = BRACKETS.match(text.folded, end)
    if bracket is not None and (inner := bracket["round"] or bracket["lowered"]):
        sided = _SIDED.match(inner)
        if sided is not None:
            flags = (*flags, "one-sided" if sided["one"].lower() in {"one", "1"} else "two-sided")
        elif inner.strip().isdigit():
            return None
        elif bracket["lowered"] or _ADJUSTED_LABEL.search(inner):
            flags = _index_of_p(inner)
        else:
            return None
        end = bracket.end()
    if "tailed" in printed:
        flags = (*flags, "one-sided" if "one" in printed else "two-sided")
    if text.folded[end : end + 1] == "均":  # P均<0.05
        flags, end = (*flags, "plural"), end + 1
    area = _AREA.match(text.folded, end)
    if area is not None:
        return _read_area(text, area, start)
    value = value_after(text, end, "p", name, bare=text.folded[start - 1 : start] in " (,;")
    if value is None or _OF_SOMETHING.match(text.folded, value.end):
        return None
    if value.low > 1 and _COUNTED.match(text.folded, value.end):
        counted = value._replace(quantity="k")  # p = 3 predictors
        return Item("k", (counted,), start, value.end, ("letter",))
    end = value.end
    sided = _SIDED.match(text.folded, end)
    if sided is not None:
        end = sided.end()
        flags = (*flags, "one-sided" if sided["one"].lower() in {"one", "1"} else "two-sided")
    if value.relation == "=" and _OR_LESS.match(text.folded, value.end):
        value = value._replace(relation="≤", low=-float("inf"))
    exact = _EXACT_BEHIND.match(text.folded, end) if value.relation != "=" else None
    value = (exact and number_at(text, exact.end(), "p", "=")) or value  # p < .05 (p = .026)
    if printed.lower() in {"ps", "p's"} or _is_of_all(text.folded, start):
        flags = (*flags, "plural")
    return Item("p", (value,), start, max(end, value.end), flags)


#: The tail area that p is, written out: ``P(F(2, 57) > 4.21) = 0.0197``.
_AREA = expression(
    r"\s?=\s?P\((?P<test>F|t|Chi-square|z)(?:\((?P<a>\d{1,7})(?:,\s?(?P<b>\d{1,9}))?\))?\s?>\s?[-\d.]{1,20}\)"
    rf"\s?=\s?(?P<p>{NUMERAL})"
)


def _read_area(text: Text, match: re.Match[str], start: int) -> Item | None:
    """Read a p that stands behind its tail area, with the degrees of freedom of the latter."""
    names = ("df1", "df2") if match["test"] == "F" else ("df",)
    degrees = [
        count_at(text, match[group], match.start(group), name)
        for name, group in zip(names, ("a", "b"), strict=False)
        if match[group]
    ]
    value = known_number(text, match, "p", "p")
    if value is None:
        return None
    return Item("p", (value, *filter(None, degrees)), start, match.end())


def _is_of_all(folded: str, start: int) -> bool:
    """Say whether a word before p gives it to all tests: ``both p < .05``."""
    lead = folded[max(0, start - 2) : start].rstrip()
    return lead[-1:].isalpha() and _ALL.search(folded, max(0, start - 24), start) is not None


def _index_of_p(index: str) -> tuple[str, ...]:
    """Return what an index of p says: an unknown one may name a correction."""
    for pattern, flags in _INDICES_OF_P:
        if pattern.search(index):
            return flags
    return ("adjusted-p",)


#: What indices of p say, the first that fits.
_INDICES_OF_P = (
    (expression(r"^(?:GG|HF|[Gg]reenhouse|[Hh]uynh)"), ("adjusted-df",)),
    (expression(r"perm|boot|rand|exact|mc\b|sim", re.IGNORECASE), ("resampled",)),
    (
        expression(
            r"^(?:trend|inter(?:action)?|value|overall|diff|model|group|time|val|obs|[a-z]?)$"
        ),
        (),
    ),
)


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
    "F": _read_f,
    "F_change": _read_f,
    "t": _read_one_df,
    "r": _read_one_df,
    "chi2": _read_one_df,
    "chi2-of": _read_one_df,
    "df": read_degrees,
    "R2": read_r_squared,
    "R2_change": read_r_squared,
    "p": _read_p,
    "ci": read_interval,
    "b-se": read_estimate_with_error,
    "ms-error": _read_error_mean_square,
    "statistic": read_statistic,
    "k": _read_predictors,
}
