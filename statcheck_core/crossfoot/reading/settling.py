"""Settling groups: what belongs together, what a name meant, what is no result."""

from __future__ import annotations

import re
from collections.abc import Sequence

from crossfoot.expressions import expression
from crossfoot.reading.genuine import is_result
from crossfoot.reading.grouping import Group
from crossfoot.reading.items import COEFFICIENTS, Item, Part
from crossfoot.reading.others import of_its_own

#: An interval right behind one of these is the interval of that effect size.
_OWN_INTERVAL = frozenset(
    {"d", "phi", "cramers_v", "eta2", "eta2_partial", "omega2", "R2", "R2_adj", "R2_change", "f2"}
)
#: Effect sizes that belong to χ² alone.
_OF_COUNTS = frozenset({"phi", "cramers_v"})
#: A residual standard deviation is read beside one of these.
_WITH_S = frozenset({"F", "F_change", "R2", "R2_adj", "R"})
#: Beside one of these k counts predictors.
_WITH_K = frozenset({"R2", "R2_adj"})
#: What a Wald F says nothing of.
_OF_FIT = frozenset({"R2", "R2_adj", "R", "s"})


def settle(group: Group, text: str) -> Group | None:
    """Drop what does not belong, settle names that need the others, or refuse the group."""
    group = _without_nameless(group)
    group = _without_earlier_share(group)
    items = [_renamed(item, group) for item in group.items]
    items = [_without_doubtful_error(item, items) for item in items if _is_borne_out(item, items)]
    items = _p_of_interval(items)
    items = _of_this_test(items, group.anchor)
    items = _own_interval(items, group.anchor)
    items = of_its_own(items, group.anchor, text)
    items = _one_sample_size(items, text)
    if not {item.head for item in items} & _WITH_S:
        items = [item for item in items if item.head != "s"]
    if not {item.head for item in items} & _WITH_K:
        if any("letter" in item.flags for item in items):
            return None  # the sizes of what is simulated
        items = [item for item in items if item.head != "k"]
    items = [item for item in items if not _doubled(item, items)]
    items = _own_p(items, group.anchor)
    if group.anchor in {"F", "F_change"}:
        items = _df_of_f(items)
        if any("wald" in item.flags for item in items):
            items = [item for item in items if item.head not in _OF_FIT]
    if group.anchor in COEFFICIENTS:
        items = [item for item in items if not _of_a_single_slope(item)]
        items = _on_one_scale(items, text)
    return Group(tuple(items), group.anchor) if is_result(group.anchor, items, text) else None


def _without_nameless(group: Group) -> Group:
    """Drop a test by a name that names much else, unless its df are printed."""
    if any(part.quantity == "df" for item in group.items for part in item.parts):
        return group
    items = tuple(item for item in group.items if "by-name" not in item.flags)
    if len(items) == len(group.items):
        return group
    anchor = next((item.head for item in items if item.head in {"b", "β", "beta"}), None)
    return Group(items, anchor)


def _without_earlier_share(group: Group) -> Group:
    """Drop a share of the variance that a further one follows: its test is the test behind it.

    ``Age explained 23% of the variance and the scales a further 12%, F(2, 95) = 8.8``
    """
    told = [item for item in group.items if "percent" in item.flags]
    if len(told) > 1 and told[-1].head == "R2_change":
        earlier = [item for item in told[:-1] if item.head == "R2"]
        return group._replace(items=tuple(i for i in group.items if i not in earlier))
    return group


def _p_of_interval(items: list[Item]) -> list[Item]:
    """Drop a p that is not that of a change within a group, whose interval stands beside it.

    ``A reduction of 4.2 (95% CI 1.1 to 7.3; p = .89 against placebo)``
    """
    if not any({"weakly", "if-enclosed"} <= set(item.flags) for item in items):
        return items
    parts = {part.quantity: part for item in items for part in item.parts}
    low, high, p, level = (parts.get(key) for key in ("ci_low", "ci_high", "p", "ci_level"))
    if low is None or high is None or p is None:
        return items
    least = 1.0 - (level.low if level is not None else 0.95)
    apart = low.low > 0 or high.high < 0
    around = low.high < 0 < high.low
    if (apart and p.low >= least - 1e-9) or (around and p.high <= least + 1e-9):
        return [item for item in items if item.head != "p"]
    return items


def _renamed(item: Item, group: Group) -> Item:
    heads = {other.head for other in group.items}
    if item.head == "β":
        plain = "b" in heads or "odds_ratio" in heads
        known = (not plain and heads & {"se", "ci"}) or any(p.quantity == "se" for p in item.parts)
        quantity = "b" if known and not plain else "beta"
        parts = tuple(p._replace(quantity=quantity) if p.quantity == "β" else p for p in item.parts)
        return item._replace(head=quantity, parts=parts)
    grown = any("grown" in other.flags for other in group.items)
    added = grown or ("R2_change" in heads and "R2" not in heads)
    if item.head == "F" and added and "F_change" not in heads:
        parts = tuple(
            p._replace(quantity="F_change") if p.quantity == "F" else p for p in item.parts
        )
        return item._replace(parts=parts)
    return item


def _without_doubtful_error(item: Item, items: Sequence[Item]) -> Item:
    """Drop the bracketed number of ``b = -1.27 (0.44), t = -2.89`` unless it makes that t."""
    if "perhaps-se" not in item.flags:
        return item
    estimate, error = item.parts
    tests = [part for other in items for part in other.parts if part.quantity in {"t", "z"}]
    if error.low > 0 and any(_is_ratio(test, estimate, error) for test in tests):
        return item
    return item._replace(parts=(estimate,))


def _is_borne_out(item: Item, items: Sequence[Item]) -> bool:
    """Say whether a number without a name is the estimate that its test and interval are of.

    Words may say which way it goes: a speed that fell by 3.2 has a negative t. A number that is
    said to be an estimate may still have the wrong size; one that only may be one has not.
    """
    if "nameless" not in item.flags:
        return True
    parts = {part.quantity: part for other in items if other is not item for part in other.parts}
    estimate = item.parts[0]
    low, high = parts.get("ci_low"), parts.get("ci_high")
    enclosed = low is not None and high is not None and low.low <= estimate.low <= high.high
    if (low and not enclosed) or ("if-enclosed" in item.flags and not enclosed):
        return False
    tests = [parts[key] for key in ("t", "z") if key in parts]
    if any(test.low * estimate.low < 0 for test in tests):
        return False
    error = item.parts[1] if len(item.parts) > 1 else None
    if error is not None and "weakly" in item.flags and (tests or "if-ratio" in item.flags):
        return error.low > 0 and any(_is_ratio(test, estimate, error) for test in tests)
    return True


def _is_ratio(test: Part, estimate: Part, error: Part) -> bool:
    """Say whether a test can be an estimate over its error, as printed."""
    least, most = sorted((abs(estimate.low), abs(estimate.high)))
    low, high = sorted((abs(test.low), abs(test.high)))
    return least / error.high <= high and low <= most / error.low


def _own_interval(items: Sequence[Item], anchor: str | None) -> list[Item]:
    """Drop an interval that belongs to an effect size, and the effect sizes that are not read."""
    kept = []
    for number, item in enumerate(items):
        before = items[number - 1].head if number else None
        other_test = anchor in {"F", "F_change", "chi2"} and before not in COEFFICIENTS
        if item.head == "ci" and (before in _OWN_INTERVAL or other_test):
            continue
        kept.append(item)
    unread = {"d"} if anchor == "chi2" else {"d", *_OF_COUNTS}
    return [item for item in kept if item.head not in unread]


def _doubled(item: Item, items: Sequence[Item]) -> bool:
    """Say whether another item of the group already tells what this one does."""
    if "pseudo-r2" in item.flags:
        return any(other.head == "R2" and "pseudo-r2" not in other.flags for other in items)
    if "adjusted-p" in item.flags:
        return any(other.head == "p" and "adjusted-p" not in other.flags for other in items)
    if "percent" in item.flags:
        own = item.parts[0]
        return any(
            other is not item
            and other.parts
            and other.parts[0].quantity in {"R2", "R2_adj"}
            and (other.parts[0].quantity == own.quantity or _same(other.parts[0], own))
            for other in items
        )
    return False


def _of_this_test(items: list[Item], anchor: str | None) -> list[Item]:
    """Drop what is told behind a test and of something else: ``η² for the interaction was .02``."""
    start = next((item.start for item in items if item.head == anchor), None)
    if start is None:
        return items
    return [item for item in items if "of-what" not in item.flags or item.start < start]


def _own_p(items: list[Item], anchor: str | None) -> list[Item]:
    """Drop a p before a test that has one behind it: it is of something that is not read."""
    test = next((item for item in items if item.head == anchor), None)
    if test is None or not any(i.head == "p" and i.start > test.start for i in items):
        return items
    return [item for item in items if item.head != "p" or item.start > test.start]


def _same(first: Part, second: Part) -> bool:
    """Say whether two numbers are one number at different precision."""
    return (
        first.low <= (second.low + second.high) / 2 <= first.high
        or second.low <= (first.low + first.high) / 2 <= second.high
    )


def _one_sample_size(items: list[Item], text: str) -> list[Item]:
    """Drop group sizes: a small n that another n accompanies, or that is less than its df."""
    most = max((p.low for i in items for p in i.parts if p.quantity in {"df2", "df"}), default=0.0)
    kept = []
    for item in items:
        if item.head == "n" and (text[item.start] == "n" or "told" in item.flags):
            around = text[max(0, item.start - 160) : item.end + 160]
            several = len(re.findall(r"(?<![A-Za-z])n\s?=\s?\d", around)) > 1
            if (several and not _is_beside(item, items, text)) or item.parts[0].high <= most:
                continue
        kept.append(item)
    return kept


#: What has a sample of its own: `(R² = .93, n = 56, p < .001)`.
_SAMPLED = frozenset({"R2", "R2_adj", "r", "chi2"})
_MARKS = expression(r"\*{0,4}[\s,;(]{1,3}")
_NO_SECOND = expression(r"(?![^=<>()]{0,40}n\s?=)")


def _is_beside(item: Item, items: Sequence[Item], text: str) -> bool:
    """Say whether an n stands right behind what it is the sample of, and no other n with it.

    The p of that may stand between: `(r = .36, p = .002, n = 72)`.
    """
    if _NO_SECOND.match(text, item.end) is None:
        return False
    at = item.start
    for other in sorted(items, key=lambda found: -found.end):
        if other.end > at:
            continue
        if _MARKS.fullmatch(text, other.end, at) is None:
            return False
        if other.head in _SAMPLED or other.head != "p":
            return other.head in _SAMPLED
        at = other.start
    return False


def _of_a_single_slope(item: Item) -> bool:
    """Say whether a df counts the one slope that is tested, and not the cases left to judge it."""
    return item.head == "df" and item.parts[0].high == 1.0


def _on_one_scale(items: list[Item], text: str) -> list[Item]:
    """Drop an interval in percent beside an estimate that is not: it is of what that comes to."""
    percent = {
        part.quantity: text[part.start : part.end].endswith("%")
        for item in items
        for part in item.parts
    }
    if percent.get("ci_low") and False in {percent.get("b"), percent.get("beta")}:
        return [item for item in items if item.head != "ci"]
    return items


def _df_of_f(items: list[Item]) -> list[Item]:
    """Give an F the degrees of freedom that stand apart from it, each once."""
    have = {p.quantity for i in items if i.head != "df" for p in i.parts}
    kept = []
    for number, item in enumerate(items):
        if item.head == "df":
            after_s = number > 0 and items[number - 1].head == "s"
            quantity = "df2" if after_s or "df1" in have else "df1"
            if quantity in have:
                continue
            have.add(quantity)
            item = item._replace(parts=(item.parts[0]._replace(quantity=quantity),))
        kept.append(item)
    return kept
