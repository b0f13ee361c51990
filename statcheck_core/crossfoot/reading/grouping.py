"""From items to groups: which numbers speak of one test or model.

Tests (F, t, r, χ², z, and coefficients) are anchors. What stands between two anchors is cut where
the text between neighbours separates most, so that an R² may stand before or after its F, and a p
follows its statistic.
"""

from __future__ import annotations

import re
from collections.abc import Sequence
from itertools import pairwise
from typing import NamedTuple

from crossfoot.expressions import expression
from crossfoot.reading.items import Item
from crossfoot.reading.sentences import ABBREVIATION, BULLET, SENTENCE_END

_ANCHORS = frozenset({"F", "F_change", "t", "r", "z", "chi2", "b", "β", "beta", "odds_ratio"})
_COEFFICIENT = frozenset({"b", "β", "beta", "odds_ratio"})
#: What belongs to no claim of its own, so it follows its anchor rather than leads the next.
_FOLLOWS = frozenset(
    {
        "p",
        "d",
        "phi",
        "cramers_v",
        "se",
        "ci",
        "eta2",
        "eta2_partial",
        "omega2",
        "ms",
        "df",
        "df-pair",
        "df1",
        "df2",
    }
)
_MODEL_ONLY = frozenset({"R2", "R2_adj", "R2_change", "R", "f2", "s"})
#: Of those, the ones that lead a test only right before it.
_TRAILS = frozenset({"p", "se", "ci", "ms"})
_NEAR = 3.0
#: A gap this strong never lies inside a claim.
APART = 9.0

#: A gap no stronger than that of a semicolon goes on one list.
_LISTED = 0.6

#: More items than this between two tests are none of either's, but for the nearest.
_CROWD = 40

_WORD = expression(r"[^\W\d_]{2,}")
_LINK = frozenset(
    {
        "at",
        "with",
        "and",
        "adjusted",
        "adj",
        "the",
        "of",
        "multiple",
        "an",
        "overall",
        "total",
        "partial",
        "mit",
        "avec",
        "con",
        "med",
        "met",
        "com",
        "note",
        "whole",
        "model",
    }
)


#: Words that may open a sentence which goes on a list of numbers: `N = 58. Adjusted R² = …`
_OPENING = frozenset({"note", "adjusted", "adj", "multiple", "total", "overall", "partial"})


#: What is said between a number and an F that tests another thing than the number measures.
OTHER_TEST = expression(
    r"\btests?\s(?:for|of|that|against|whether|on)\s(?!(?:the\s)?(?:overall|whole|full|model|fit|regression"
    r"|signific|all\b|R\b|null))"
    r"|\b(?!The|This|Overall|Omnibus|Global|Fisher|Model|Regression|Full)[A-Z][a-z]{2,}(?:[-–][A-Z][a-z]+)?(?:['’]s)?\s(?:F[\s-])?tests?\b"
    r"|\b[Ll]ack[\s-]of[\s-]fit|\b(?!ANC?OVA)[A-Z]{2,6}\stests?\b|\b[Ee]xtra[\s-]sum|\b[Pp]re-?trend|\b[Pp]lacebo"
    r"|\b(?:RESET|Wald|[Jj]oint\sF|[Pp]artial\sF)\b",
)


#: "F(1, 96) = 15.65 in a model with R² = .31": the test is of one of its terms.
_IN_A_MODEL = expression(
    r"\b(?:in|within)\s(?:an?|the|this|that|our)\s(?:\w{1,20}\s){0,2}(?:model|regression)\b"
)


#: What spreads around the estimate before it.
_SPREADS = frozenset({"ci", "se"})
#: A p in a bracket of its own, in a new clause: `(F = 42.7), and another test did not (p = .38)`
_OTHER_CLAUSE = expression(r"\)[^()]{0,80}(?:,\s(?:and|but|while|whereas)\s|;)[^()]{0,80}\($")


class Group(NamedTuple):
    """Items of one claim, in printed order; ``anchor`` is the test's quantity, or None."""

    items: tuple[Item, ...]
    anchor: str | None


def gap(text: str, first: Item, second: Item) -> float:
    """Return how strongly the text between two items separates them.

    0 for a comma or bracket, about 1 a word, :data:`APART` or more between sentences.
    """
    between = text[first.end : second.start]
    if not between.strip(" ,()[]"):
        return 0.25 if between.strip(" ,") else 0.1
    if not between.strip(" ;\n"):
        return 0.6
    apart = {"F": OTHER_TEST}.get(second.head, _IN_A_MODEL if second.head in _MODEL_ONLY else None)
    if apart is not None and apart.search(between) is not None:
        return APART
    words = [word for word in _WORD.findall(between) if word.lower() not in _LINK]
    bullets = len(BULLET.findall(between))
    strength = 0.1 + min(len(words), 6) + 2.5 * between.count(";")
    if bullets:
        return 1.5 * bullets + 0.3 * min(len(words), 8)
    end = SENTENCE_END.search(between)
    if end is not None and not ABBREVIATION.search(between, 0, end.end()):
        opening = {word.lower() for word in _WORD.findall(between, end.end())}
        goes_on = opening <= _OPENING and not words and _is_listed(text, second)
        strength = max(strength, 2.5 if goes_on else APART)
    elif (
        first.head in _SPREADS
        and second.head in _COEFFICIENT
        and _closes(text[first.start : second.start])
    ):
        strength = max(strength, APART)  # `4.2 mg (95% CI 3.1-5.6), slope 1.3`
    elif second.head == "p" and _OTHER_CLAUSE.search(between):
        strength = max(strength, APART)
    elif _closes(between):
        strength += 1.0
    if re.search(r"\b(?:and|und|et|y|e|en|och|og|while|but|whereas)\b", between):
        strength += 1.5
    return strength


def _closes(between: str) -> bool:
    """Say whether a bracket that is open before a text is closed in it."""
    return between.count(")") > between.count("(")


def _is_listed(text: str, item: Item) -> bool:
    """Say whether an item with its sign is followed by a mark, and so goes on a list of numbers."""
    signed = not set("=<>≤≥≈:").isdisjoint(text[item.start : item.end])
    return signed and text[item.end : item.end + 1] in ",;.)]\n"


def group(text: str, items: Sequence[Item]) -> list[Group]:
    """Split items into the groups that each describe one test or model.

    Parameters
    ----------
    text
        Folded visible text that the items were read from.
    items
        In printed order.
    """
    gaps = [gap(text, a, b) for a, b in pairwise(items)]
    anchors = _anchors(items, gaps)
    if not anchors:
        return _runs(items, gaps, 0, len(items))
    groups: list[Group] = []
    cuts = [_first_cut(items, gaps, anchors[0])]
    for left, right in pairwise(anchors):
        cuts.append(_cut(items, gaps, cuts[-1][1], left, right))
    cuts.append((_last_cut(items, gaps, anchors[-1]), len(items)))
    if cuts[0][1] > 0:
        groups += _runs(items, gaps, 0, cuts[0][1])
    for number, anchor in enumerate(anchors):
        start, stop = cuts[number][1], cuts[number + 1][0]
        groups.append(Group(tuple(items[start:stop]), items[anchor.statistic].head))
        after = cuts[number + 1][1]
        if stop < after:
            groups += _runs(items, gaps, stop, after)
    return groups


def _key(item: Item) -> str:
    """Return what a group may have one of; words may repeat an R², and a pseudo R² is another."""
    if item.head in {"R2", "R2_adj", "R2_change"}:
        return item.head + next((f for f in item.flags if f in {"percent", "pseudo-r2"}), "")
    return item.head


class _Anchor(NamedTuple):
    """The items from ``first`` to ``last`` name one test; ``statistic`` is the test itself."""

    first: int
    last: int
    statistic: int


def _anchors(items: Sequence[Item], gaps: Sequence[float]) -> list[_Anchor]:
    found: list[_Anchor] = []
    for index, item in enumerate(items):
        if item.head not in _ANCHORS:
            continue
        if found and _joins(items, gaps, found[-1], index):
            last = found.pop()
            statistic = last.statistic if items[last.statistic].head not in _COEFFICIENT else index
            found.append(_Anchor(last.first, index, statistic))
        else:
            found.append(_Anchor(index, index, index))
    return found


def _joins(items: Sequence[Item], gaps: Sequence[float], anchor: _Anchor, index: int) -> bool:
    """Say whether the item at ``index`` belongs to an anchor that has begun: b with its β and t."""
    heads = {items[i].head for i in range(anchor.first, index)}
    head = items[index].head
    own = {items[i].head for i in range(anchor.first, anchor.last + 1)}
    widest = max(gaps[anchor.last : index], default=0.0)
    if "estimated" in items[index].flags:
        return own == {"t"}
    if head == "odds_ratio" and head not in heads and widest <= _LISTED:
        return not own & {"F", "F_change", "r"}  # b, its test, its p, and the ratio
    if "p" in {items[i].head for i in range(anchor.last, index)}:
        if head in {"t", "z"} and own <= _COEFFICIENT and widest <= 0.5:
            # `β = …, p = …, t(118) = …`, unless a p of its own follows the t.
            return not any(item.head == "p" for item in items[index + 1 : index + 2])
        # `t(96) = …, p = …, β = …` is one test; a β that a t of its own follows is the next.
        return (
            head in _COEFFICIENT and own <= {"t", "z"} and widest < _gap_to_test(items, gaps, index)
        )
    if head in {"t", "z", "chi2"}:
        between = [items[i].head for i in range(anchor.last + 1, index)]
        if between.count("se") > 1:
            return False  # of another estimate, which is not read
        return bool(own & _COEFFICIENT) and not own & {"t", "z", "chi2"} and widest <= 8.0
    if head in _COEFFICIENT:
        return head not in heads and own <= _COEFFICIENT | {"t", "z"} and widest <= 1.5
    return False


def _gap_to_test(items: Sequence[Item], gaps: Sequence[float], index: int) -> float:
    """Return the widest gap up to the t or z that comes before the next coefficient, or 0.7."""
    widest = 0.0
    for number in range(index + 1, len(items)):
        widest = max(widest, gaps[number - 1])
        if items[number].head in {"t", "z"}:
            return min(widest, 0.7)
        if items[number].head in _COEFFICIENT:
            break
    return 0.7


def _first_cut(items: Sequence[Item], gaps: Sequence[float], anchor: _Anchor) -> tuple[int, int]:
    """Return where the group of the first anchor starts, twice."""
    start = anchor.first
    while start > 0 and _may_lead(items, gaps, start, anchor):
        start -= 1
    return start, start


def _may_lead(items: Sequence[Item], gaps: Sequence[float], start: int, anchor: _Anchor) -> bool:
    item = items[start - 1]
    if gaps[start - 1] >= (_NEAR if item.head in _TRAILS else APART):
        return False
    if item.head == "p" and item.parts[0].low > 1.0:
        return False  # the number of a page, a prime, a part
    taken = {_key(items[i]) for i in range(start, anchor.last + 1)}
    return _key(item) not in taken and not _stands_behind(items, gaps, start - 1, anchor)


def _stands_behind(
    items: Sequence[Item], gaps: Sequence[float], leading: int, anchor: _Anchor
) -> bool:
    """Say whether a test has in a list behind it what an item before it tells, with words between.

    ``Rain alone had R² = .12, the model with soil F(3, 96) = 8.51, p < .001, R² = .21``.
    """
    before = min(1.0, max(gaps[leading : anchor.first]))
    if items[leading].head not in _MODEL_ONLY or before < 1.0:
        return False
    for index in range(anchor.last + 1, len(items)):
        if items[index].head in _ANCHORS or gaps[index - 1] >= before:
            return False
        if _key(items[index]) == _key(items[leading]):
            return True
    return False


def _last_cut(items: Sequence[Item], gaps: Sequence[float], anchor: _Anchor) -> int:
    """Return where the group of the last anchor stops."""
    taken = {_key(items[i]) for i in range(anchor.first, anchor.last + 1)}
    stop = anchor.last + 1
    while stop < len(items) and gaps[stop - 1] < APART and _key(items[stop]) not in taken:
        taken.add(_key(items[stop]))
        stop += 1
    return stop


def _cut(
    items: Sequence[Item], gaps: Sequence[float], first: int, left: _Anchor, right: _Anchor
) -> tuple[int, int]:
    """Return where the left anchor's group, begun at ``first``, stops and the right one's starts.

    Of all cuts between the anchors the cheapest is taken: weak gaps cost when cut, as does a
    quantity that its group already has, or a p that would lead.
    """
    low, high = left.last + 1, right.first
    if low == high:
        return low, low
    if high - low > _CROWD:  # no two tests share so many numbers
        return _last_cut(items, gaps, left), _first_cut(items, gaps, right)[0]
    best, place = float("inf"), low
    left_heads = [_key(items[i]) for i in range(first, left.last + 1)]
    for cut in range(low, high + 1):
        cost = -gaps[cut - 1]
        heads = left_heads + [_key(items[i]) for i in range(low, cut)]
        cost += 6.0 * (len(heads) - len(set(heads)))
        ahead = [_key(items[i]) for i in range(cut, right.last + 1)]
        cost += 6.0 * (len(ahead) - len(set(ahead)))
        cost += 3.0 * sum(head in _FOLLOWS for head in ahead[: high - cut])
        if items[left.statistic].head not in {"F", "F_change"}:
            cost += 2.0 * sum(items[i].head in _MODEL_ONLY for i in range(low, cut))
        if cost < best - 1e-9:
            best, place = cost, cut
    stop = start = place
    taken = set(left_heads)
    for index in range(low, place):
        if gaps[index - 1] >= APART or (_key(items[index]) in taken and items[index].head != "n"):
            stop = index
            break
        taken.add(_key(items[index]))
    taken = {_key(items[i]) for i in range(right.first, right.last + 1)}
    for index in range(high - 1, place - 1, -1):
        if (
            gaps[index] >= APART
            or _key(items[index]) in taken
            or _stands_behind(items, gaps, index, right)
        ):
            start = index + 1
            break
        taken.add(_key(items[index]))
    else:
        start = place
    return stop, max(start, stop)


def _runs(items: Sequence[Item], gaps: Sequence[float], start: int, stop: int) -> list[Group]:
    """Group items without a test: neighbours that name different quantities."""
    groups: list[Group] = []
    run: list[Item] = []
    for index in range(start, stop):
        item = items[index]
        if run and (gaps[index - 1] >= APART or _key(item) in {_key(other) for other in run}):
            groups.append(Group(tuple(run), None))
            run = []
        run.append(item)
    return [*groups, Group(tuple(run), None)] if run else groups
