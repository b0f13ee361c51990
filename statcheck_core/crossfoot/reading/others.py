"""What stands among the numbers of a result and is of another: a model, an effect, a mean.

An R² of the whole model stands beside the F of one effect, that of a second model before the F of
the first, and an interval behind a number that no name tells.
"""

from __future__ import annotations

import re
from collections.abc import Iterator, Sequence

from crossfoot.expressions import expression
from crossfoot.reading import numerals
from crossfoot.reading.grouping import OTHER_TEST, Group
from crossfoot.reading.items import Item, Part
from crossfoot.reading.numerals import NUMERAL

_SHARES = frozenset({"R2", "R2_adj"})
#: A number that no reading is of, right before an interval in brackets.
_NUMBER_BEFORE = expression(rf"[A-Za-z]\s(?:=\s)?(?P<number>{NUMERAL})\s?[%×x]?\s?[(\[,]\s?$")
_NUMBERS = expression(rf"(?<![\w.=<>])(?<![=<>]\s)(?P<number>{NUMERAL})(?![\w%]|[.,]\d)")
#: What is said before the mean of one group, and not before that of differences.
_OF_GROUP = expression(
    r"\b(?:means?|averag\w{1,4}|medians?|proportions?|percentages?|M|Mdn)\b(?![^.;]{0,60}\b(?:differ|chang|effect|gain|loss))",
    re.IGNORECASE,
)
#: Words right before or behind an R² that say it is of a model which holds more than one effect.
_WHOLE_BEFORE = expression(
    r"\b(?:total|overall|full|whole|final|entire|complete)\s(?:model\s)?$", re.IGNORECASE
)
_WHOLE_BEHIND = expression(
    r"\s?(?:overall|in\stotal|altogether|for\sthe\s(?:full|whole|overall)\smodel)\b"
)
_ONE_TERM = expression(
    r"\binteract|\bsimple\s|\bcontrast|\bmain\seffect|\beffects?\s(?:of|for)\b|\bmoderat|\btrend\b"
    r"|\bterm\b",
    re.IGNORECASE,
)
#: How far before an F what it tests is told, in characters.
_LEAD = 60
#: How far before an interval the number that it is of stands.
_REACH = 40
#: A ratio for more or less than one unit: ``odds ratio per SD``, ``1.23 per decade``.
_PER = expression(r"\bper\s(?!cent)|\bfor\s(?:each|every|an?)\s")
#: What percentage points are beside shares.
_HUNDRED = 100.0


def parted(groups: Sequence[Group], text: str) -> Sequence[Group]:
    """Part each F of a sentence from the R² that is of another model, or of more than it tests."""
    settled: list[Group] = []
    several = sum(group.anchor == "F" for group in groups) > 1
    for group in groups:
        before = settled[-1] if settled else None
        settled += (
            _of_a_larger_model(group, text, several=several)
            or _of_unknown_model(group, before, text)
            or [group]
        )
    return settled


def _test(group: Group) -> Item | None:
    return next((item for item in group.items if item.head in {"F", "F_change"}), None)


def _of_a_larger_model(group: Group, text: str, *, several: bool) -> list[Group]:
    """Part an F of one effect, or of another test, from the R² of a whole model.

    ``The interaction was significant, F(1, 96) = 5.12, p = .026, total R² = .38``
    """
    test = _test(group)
    shares = [item for item in group.items if item.head in _SHARES]
    if test is None or not shares:
        return []
    lead = text[max(0, test.start - _LEAD) : test.start]
    lead = lead[max(lead.rfind(mark) for mark in (";", "(", "=")) + 1 :]
    one_term = several or _ONE_TERM.search(lead) is not None
    whole = one_term and any(_is_whole(item, text) for item in shares)
    if not whole and OTHER_TEST.search(lead) is None:
        return []
    rest = tuple(item for item in group.items if item not in shares)
    parts = [Group(rest, group.anchor), Group(tuple(shares), None)]
    return parts if shares[0].start > test.start else parts[::-1]


def _is_whole(share: Item, text: str) -> bool:
    before = text[max(0, share.start - 16) : share.start]
    return bool(_WHOLE_BEFORE.search(before) or _WHOLE_BEHIND.match(text, share.end))


def _of_unknown_model(group: Group, before: Group | None, text: str) -> list[Group]:
    """Part an F from the R² in a bracket before it where another model's stands so, too.

    ``Model 2 (R² = .32) beat Model 1 (R² = .19), and its F(3, 116) was …``: which is not said.
    """
    test = _test(group)
    if test is None or group.anchor != "F" or before is None or before.anchor is not None:
        return []
    led = [item for item in group.items if item.head in _SHARES and item.end < test.start]
    if not led:
        return []
    last = led[-1]
    rivals = [i for i in before.items if i.head == last.head and "percent" not in i.flags]
    if not rivals or not all(_is_closed(text, i.end, test.start) for i in (rivals[-1], last)):
        return []
    return [
        Group(tuple(item for item in group.items if item.end <= last.end), None),
        Group(tuple(item for item in group.items if item.end > last.end), "F"),
    ]


def _is_closed(text: str, start: int, end: int) -> bool:
    """Say whether the bracket that a place stands in closes before another."""
    closing, opening = text.find(")", start, end), text.find("(", start, end)
    return closing >= 0 and not 0 <= opening < closing


def of_its_own(items: Sequence[Item], anchor: str | None, text: str) -> list[Item]:
    """Return the items of a result without what is of other numbers, or on another scale."""
    if any(item.head in {"b", "β"} for item in items):
        items = [item for item in items if item.head != "odds_ratio" or not _is_per(item, text)]
    parts = {part.quantity: part for item in items for part in item.parts}
    items = [kept for item in items for kept in _in_words(item, parts)]
    if not any(item.head == "ci" for item in items):
        return items
    return [
        item
        for number, item in enumerate(items)
        if item.head != "ci" or _is_own(item, items[number - 1] if number else None, parts, text)
    ]


def _is_own(interval: Item, before: Item | None, parts: dict[str, Part], text: str) -> bool:
    """Say whether an interval may be that of the estimate of a result, or of what it tests."""
    low, high = (p for p in interval.parts if p.quantity in {"ci_low", "ci_high"})
    behind = before is not None and before.end < interval.start
    start = before.end if before is not None and behind else max(0, interval.start - _REACH)
    found = _NUMBER_BEFORE.search(text, max(start, interval.start - _REACH), interval.start)
    number = numerals.parse(found["number"]) if found is not None else None
    estimate = parts.get("b") or parts.get("beta") or parts.get("odds_ratio")
    if estimate is None:
        # of what t tests, unless it follows the mean of one group
        lead = text[max(0, interval.start - _LEAD) : interval.start]
        return number is None or _OF_GROUP.search(lead) is None
    if "odds_ratio" not in parts and number is not None:
        return number.low in {p.low for key, p in parts.items() if key in {"b", "beta"}}
    if {"b", "beta"} <= parts.keys():
        return not _lies_midway(parts["beta"], low, high) or _lies_midway(parts["b"], low, high)
    if low.low <= estimate.high and estimate.low <= high.high:
        return True
    between = _NUMBERS.finditer(text, start, interval.start)
    others = [numerals.parse(match["number"]) for match in between]
    return not any(other and low.low <= other.value <= high.high for other in others)


def _is_per(ratio: Item, text: str) -> bool:
    """Say whether a ratio beside a coefficient is of another unit of its predictor."""
    return _PER.search(text, ratio.start, ratio.end + 12) is not None


def _lies_midway(estimate: Part, low: Part, high: Part) -> bool:
    return low.low + high.low <= 2 * estimate.high and 2 * estimate.low <= low.high + high.high


def _in_words(item: Item, parts: dict[str, Part]) -> Iterator[Item]:
    """Yield an item, without the estimate that only words name if words tell its scale.

    ``raises attendance by 2.1 percentage points (s.e. 0.008, t = 2.62)``
    """
    if "nameless" not in item.flags:
        yield item
        return
    estimate, rest = item.parts[0], item.parts[1:]
    tests = [part for key, part in parts.items() if key in {"t", "z"}]
    if not any(_is_scaled(estimate, error, tests) for error in rest):
        yield item
    elif rest:
        yield item._replace(parts=rest, head="se", start=rest[0].start)


def _is_scaled(estimate: Part, error: Part, tests: Sequence[Part]) -> bool:
    """Say whether an estimate in percent would be, as a share, what its error and test give."""
    if error.low <= 0:
        return False
    for test in tests:
        for scale in (_HUNDRED, 1 / _HUNDRED):
            least, most = sorted((abs(estimate.low) / scale, abs(estimate.high) / scale))
            low, high = sorted((abs(test.low), abs(test.high)))
            if least / error.high <= high and low <= most / error.low:
                return True
    return False
