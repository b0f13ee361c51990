"""Tables of labels and values that tell of tests: a statistic, its df and its p."""

from __future__ import annotations

from collections.abc import Sequence
from typing import NamedTuple

from crossfoot.model import Reading
from crossfoot.reading.nameless import named_test
from crossfoot.reading.tables import headings
from crossfoot.reading.tables.contents import NONE, Number, content_of
from crossfoot.reading.tables.grid import Box
from crossfoot.reading.tables.headings import Heading
from crossfoot.reading.tables.keyvalue import pairs_in
from crossfoot.reading.tables.making import Found, Sheet, claim, reading

_KINDS = {"t": "mean-comparison", "z": "mean-comparison", "F": "effect", "chi2": "frequency"}
_DEGREES = {"F": ("df1", "df2"), "z": ()}
_ROLES = frozenset({*_KINDS, "df", "df1", "df2", "p", "statistic"})
#: No test is told in more rows.
_MOST = 40


class _Pair(NamedTuple):
    """A label with its value, and what the label says."""

    head: Box
    box: Box
    heading: Heading


def test_values(sheet: Sheet) -> Found | None:
    """Return the claims of tests in labels and values, or None where there is none."""
    panel = sheet.panel
    if panel.width > 6 or not panel.rows or len(panel.rows) > _MOST:
        return None
    rows: list[tuple[int, list[_Pair]]] = [
        (number, [_Pair(a, b, headings.parse_label(a.text)) for a, b in pairs_in(row)])
        for number, row in enumerate((*panel.heads, *panel.rows), start=-len(panel.heads))
    ]
    beside = [(number, pairs) for number, pairs in rows if _is_test(pairs)]
    if beside:
        tests = [(_beside(sheet, pairs), {number}) for number, pairs in beside]
    else:
        known = [(number, pairs) for number, pairs in rows if any(map(_known, pairs))]
        tests = [(_told(sheet, [p for _, pairs in known for p in pairs]), {n for n, _ in known})]
    claims = [made for found, _ in tests if found is not None for made in found.claims]
    read = {row for found, own in tests if found is not None for row in own}
    return Found(tuple(claims), frozenset(read)) if claims else None


def _known(pair: _Pair) -> bool:
    return bool(pair.heading.roles) and set(pair.heading.roles) <= _ROLES


def _is_test(pairs: Sequence[_Pair]) -> bool:
    """Say whether a row holds a statistic and a p that names its test and its df."""
    return len(pairs) == 2 and pairs[1].heading.roles == ("p",) and bool(pairs[1].heading.df)


def _beside(sheet: Sheet, pairs: Sequence[_Pair]) -> Found | None:
    """Return the test of ``F-statistic 2.11  Prob. F(2,43) 0.1331``."""
    (statistic, p) = pairs
    test = "F" if len(p.heading.df) == 2 else named_test(p.head.text) or "t"
    if test not in _KINDS:
        return None
    names = _DEGREES.get(test, ("df",))
    at = p.head.start
    degrees = [n._replace(start=n.start + at, end=n.end + at) for n in p.heading.df]
    found = [reading(sheet, number, name) for name, number in zip(names, degrees, strict=False)]
    for quantity, box in ((test, statistic.box), ("p", p.box)):
        numbers = _numbers(box)
        found.append(reading(sheet, numbers[0], quantity) if len(numbers) == 1 else None)
    return _made(sheet, test, {r.quantity: r for r in found if r is not None}, (statistic, p))


def _told(sheet: Sheet, pairs: Sequence[_Pair]) -> Found | None:
    """Return the one test that several rows tell of."""
    cells: dict[str, Reading] = {}
    sides: dict[str, Reading] = {}
    for pair in pairs:
        side = next((c for c in pair.heading.contexts if c.endswith("-sided")), "")
        for role, found in _readings(sheet, pair):
            told, key = (sides, side) if side and role == "p" else (cells, role)
            if key in told:
                return None  # more than one test
            told[key] = found
    contexts = []
    if sides and "p" not in cells:
        contexts = ["two-sided" if "two-sided" in sides else "one-sided"]
        cells["p"] = sides[contexts[0]]
    if "statistic" in cells:
        p = next((pair.head.text for pair in pairs if "p" in pair.heading.roles), "")
        kind = named_test(p) or named_test(sheet.words) or ""
        statistic = cells.pop("statistic")
        if kind not in _KINDS or kind in cells:
            return None
        cells[kind] = statistic._replace(quantity=kind)
    tests = [key for key in _KINDS if key in cells]
    return _made(sheet, tests[0], cells, pairs, contexts) if len(tests) == 1 else None


def _made(
    sheet: Sheet,
    test: str,
    cells: dict[str, Reading],
    pairs: Sequence[_Pair],
    contexts: Sequence[str] = (),
) -> Found | None:
    if not {test, "p", *_DEGREES.get(test, ("df",))} <= cells.keys():
        return None
    boxes = [box for pair in pairs for box in pair[:2]]
    made = claim(sheet, _KINDS[test], test, cells.values(), boxes, contexts=contexts)
    return Found((made,))


def _readings(sheet: Sheet, pair: _Pair) -> list[tuple[str, Reading]]:
    """Return what a label names in the cell beside it."""
    if not _known(pair):
        return []
    return [
        (role, found)
        for role, number in zip(pair.heading.roles, _numbers(pair.box), strict=False)
        if (found := reading(sheet, number, "t" if role == "statistic" else role)) is not None
    ]


def _numbers(box: Box) -> tuple[Number, ...]:
    content = content_of(box.text, box.start) or NONE
    return (*content.numbers, *content.df)
