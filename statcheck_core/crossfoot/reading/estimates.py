"""Estimates: a coefficient with its standard error and its interval."""

from __future__ import annotations

from crossfoot.expressions import expression
from crossfoot.reading.items import Item, Part, Text
from crossfoot.reading.names import Name
from crossfoot.reading.numerals import NUMERAL
from crossfoot.reading.values import known_number, number_at, value_after
from crossfoot.reading.words import TO

_LIMITS = expression(
    r"\s*+(?:(?:[=:,;为は]|of|was|from|for\s(?:the\s)?\w{1,12})\s*+)?(?:[:=]\s*+)?(?:(?:\(|\[|(?:(?:ranging|spanning)\s)?from\s|(?:von|zwischen|between|de|da|entre|van|från|fra|od|от|spanning)\s)\s*+)?(?:(?:LL|lower(?:\slimit)?)\s?[=:]?\s?)?"
    rf"(?P<low>{NUMERAL})\s*+(?:,|;|-|{TO}|\.\.|\|)\s*+(?:(?:UL|upper(?:\slimit)?)\s?[=:]?\s?)?(?P<high>{NUMERAL})"
    r"\s?[\])]?"
)
_LIMITS_BELOW = expression(rf":\s*\n\s*(?P<low>{NUMERAL})\s+(?P<high>{NUMERAL})\s*(?:\n|$)")
_LIMITS_BEFORE = expression(
    rf"[(\[]\s?(?P<low>{NUMERAL})\s?(?:,|;|-|{TO})\s?(?P<high>{NUMERAL})\s?[,;]\s?$"
)
_PLUS_MINUS = expression(
    rf"\s?(?:±|\+/-|\+-)\s?(?P<number>{NUMERAL})\s?\(?(?:SE|s\.e\.|S\.E\.|SEM|standard error)"
)
_AND_ERROR = expression(rf"\s?(?:\(\s?±?|±|\+/-|\+-)\s?(?P<number>{NUMERAL})\s?\)?")
# A number in brackets behind a coefficient, and what tests that coefficient behind it.
_BRACKETED = expression(
    rf"\s?(?:\(|±)\s?(?P<number>{NUMERAL})\s?\)?(?=\s?[,;]\s?(?:[tTzZ](?![A-Za-z])|Wald\s[zt]\b|9\d\s?%))"
)
_ENCLOSING = expression(
    rf"\s?\[\s?(?P<low>{NUMERAL})\s?(?:,|;|-|{TO})\s?(?P<high>{NUMERAL})\s?\](?!\s?(?:HDI|CrI|credible))"
)


def behind_coefficient(text: Text, value: Part) -> tuple[tuple[Part, ...], int, tuple[str, ...]]:
    """Return what stands right behind a coefficient: parts, where they end, and flags.

    ``± 0.11 SE``; ``(0.11)`` before a test, which may be the standard error; ``[0.20, 0.64]``,
    which is an interval where it holds the coefficient.
    """
    end = value.end
    for pattern, flags in ((_PLUS_MINUS, ()), (_BRACKETED, ("perhaps-se",))):
        match = pattern.match(text.folded, end)
        error = known_number(text, match, "number", "se") if match is not None else None
        if match is not None and error is not None:
            return (error,), match.end(), flags
    return *enclosing(text, value), ()


def enclosing(text: Text, value: Part) -> tuple[tuple[Part, ...], int]:
    """Return the limits in square brackets right behind a number that lies between them."""
    match = _ENCLOSING.match(text.folded, value.end)
    if match is None:
        return (), value.end
    low, high = (known_number(text, match, key, f"ci_{key}") for key in ("low", "high"))
    if low is None or high is None or not low.low <= value.low <= value.high <= high.high:
        return (), value.end
    return (low, high), match.end()


def read_interval(text: Text, name: Name) -> Item | None:
    """Read a confidence interval with its level."""
    start, end = name.match.span()
    match = (
        _LIMITS.match(text.folded, end)
        or _LIMITS_BELOW.match(text.folded, end)
        or _LIMITS_BEFORE.search(text.folded, max(0, start - 40), start)
    )
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
    return Item("ci", tuple(parts), min(start, match.start()), max(end, match.end()))


def read_estimate_with_error(text: Text, name: Name) -> Item | None:
    """Read ``B(SE) = 0.81 (0.30)`` or ``estimate ± SE: 0.81 ± 0.30``."""
    value = value_after(text, name.match.end(), "b", name)
    match = _AND_ERROR.match(text.folded, value.end) if value is not None else None
    error = known_number(text, match, "number", "se") if match is not None else None
    if value is None or match is None or error is None:
        return None
    return Item("b", (value, error), name.match.start(), match.end())
