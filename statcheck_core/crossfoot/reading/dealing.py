"""What was printed once for several tests, dealt out to each."""

from __future__ import annotations

from collections.abc import Iterable, Sequence
from itertools import pairwise

from crossfoot.reading.grouping import Group
from crossfoot.reading.items import COEFFICIENTS, TESTS, Item
from crossfoot.reading.others import parted
from crossfoot.reading.sentences import same_sentence

#: Counts, which may be of the tests in the sentence before.
_LEFT_OVER = frozenset({"n", "df", "df-pair"})


def shared(groups: Sequence[Group], text: str) -> Iterable[Group]:
    """Deal out what is printed once for several tests of a sentence.

    ``32% and 40% … F = …, F = …, respectively; both ps < .001``: listed percentages go to the
    tests in order, listed p values likewise, and one plural p to each test that has none.
    """
    for sentence in _sentences(_given_to_all(groups, text), text):
        yield from _dealt(parted(sentence, text))


def _sentences(groups: Sequence[Group], text: str) -> Iterable[Sequence[Group]]:
    """Yield the groups of each sentence with a test, and with it what belongs to no test."""
    run: list[Group] = []
    for group in groups:
        apart = run and not same_sentence(text, _place(run[-1].items[-1]), _place(group.items[0]))
        if apart and not all(_is_left_over(item) for item in group.items):
            yield run
            run = []
        run.append(group)
    yield run


def _is_left_over(item: Item) -> bool:
    """Say whether an item in a sentence of its own speaks of the tests in the one before."""
    return item.head in _LEFT_OVER or (item.head == "p" and "plural" in item.flags)


def _dealt(groups: Sequence[Group]) -> Iterable[Group]:
    tests = [n for n, group in enumerate(groups) if group.anchor in TESTS | COEFFICIENTS]
    shares = [
        item for group in groups for item in group.items if {"percent", "listed"} <= set(item.flags)
    ]
    given = _p_in_order(groups, tests)
    deal = dict(zip(tests, shares, strict=True)) if len(shares) == len(tests) > 1 else {}
    dealt, handed = set(deal.values()), set(given.values())
    for number, group in enumerate(groups):
        items = [item for item in group.items if item not in dealt]
        if number in given:
            own = given[number]
            items = [item for item in items if item.head != "p"]
            items += [own._replace(flags=(*own.flags, "dealt"))] if own else []
        elif given and group.anchor is None:
            items = [item for item in items if item not in handed]
        if number in deal:
            items.insert(0, deal[number])
        if items:
            yield Group(tuple(items), group.anchor)


def _given_to_all(groups: Sequence[Group], text: str) -> Sequence[Group]:
    """Give each count that is printed once for all to every test of its sentence without one."""
    for item in [item for group in groups for item in _for_all(group.items)]:
        keys = {part.quantity for part in item.parts}
        takers = [
            group
            for group in groups
            if group.anchor in TESTS
            and same_sentence(text, (group.items[0].start, group.items[-1].end), _place(item))
            and keys.isdisjoint(p.quantity for i in group.items for p in i.parts if i != item)
            and (group.anchor in {"F", "F_change"}) >= (item.head == "df-pair")
        ]
        if len(takers) > 1:
            groups = [_with(group, item, group in takers) for group in groups]
    return [group for group in groups if group.items]


def _for_all(items: Sequence[Item]) -> list[Item]:
    """Return what words give to all tests, or a p that is one for all has right behind it."""
    behind = [b for a, b in pairwise(items) if "plural" in a.flags and a.head == "p"]
    return [item for item in items if "all" in item.flags or (item.head == "n" and item in behind)]


def _place(item: Item) -> tuple[int, int]:
    return item.start, item.end


def _with(group: Group, item: Item, given: bool) -> Group:
    """Return a group with an item, or without it."""
    items = tuple(other for other in group.items if other != item)
    return group._replace(items=(*items, item) if given else items)


def _p_in_order(groups: Sequence[Group], tests: Sequence[int]) -> dict[int, Item | None]:
    """Return the p of each test where tests are followed by as many p, or one for all."""
    ps = [
        (number, item)
        for number, group in enumerate(groups)
        for item in group.items
        if item.head == "p"
    ]
    bare = [
        number for number in tests if not any(item.head == "p" for item in groups[number].items)
    ]
    if len(tests) < 2 or not bare or not ps:
        return {}
    if len(ps) == 1 and "plural" in ps[0][1].flags and _leads(ps[0][1], groups[tests[0]]):
        return dict.fromkeys(tests, ps[0][1])
    if ps[0][0] < tests[-1]:
        return {}
    if len(ps) == len(tests):
        return {number: item for number, (_, item) in zip(tests, ps, strict=True)}
    if len(ps) == 1 and "plural" in ps[0][1].flags:
        return dict.fromkeys(tests, ps[0][1])
    # More p than one, and not one for each, or one behind a list: whose they are is not said.
    listed = any("listed" in item.flags for item in groups[tests[-1]].items if item.head != "p")
    return {tests[-1]: None} if len(ps) > 1 or listed else {}


def _leads(p: Item, group: Group) -> bool:
    """Say whether a p stands before a test: ``both p ≤ .01: F(2, 61) = 5.2 and …``."""
    return all(p.start < item.start for item in group.items if item.head == group.anchor)
