"""Rows of test results: an effect with F, a comparison with t, and the like."""

from __future__ import annotations

import re
from collections.abc import Sequence

from crossfoot.model import Claim, Reading, Span
from crossfoot.reading.items import AS_GOOD_AS, INFINITE
from crossfoot.reading.tables.columns import labels_of, name_of, roles_in, side_by_side
from crossfoot.reading.tables.contents import NONE, content_of, limits
from crossfoot.reading.tables.making import (
    Column,
    Found,
    Sheet,
    add_adjusted,
    claim,
    head_df,
    level,
    marked,
    reading,
)
from crossfoot.reading.tables.rows import kind_of
from crossfoot.reading.tables.supported import EFFECT_SIZES, supported
from crossfoot.reading.tables.tested import by_statistic, each_test

_KINDS = {
    "F": "effect",
    "t": "mean-comparison",
    "chi2": "frequency",
    "r": "correlation",
    "z": "mean-comparison",
}
_ROLES = frozenset(
    {*_KINDS, "df", "df1", "df2", "p", "n", "phi", "cramers_v", "p_adjusted", *EFFECT_SIZES}
)
_LIMITS = frozenset({"ci_low", "ci_high"})
_NEVER = frozenset({"b", "β", "beta", "odds_ratio", "rss", "df_residual", "R2", "se"})


def results(sheet: Sheet) -> Found | None:
    """Return the claims of a table of tests, a row each, or None where it is none."""
    sheet = sheet._replace(columns=_with_symbols(sheet))
    claims: list[Claim] = []
    rows: set[int] = set()
    for part, own in by_statistic(sheet):
        found = _tests(part._replace(columns=_of_the_test(part.columns)), own)
        claims += found.claims
        rows |= found.rows
    return Found(tuple(claims), frozenset(rows)) if claims else None


def _tests(sheet: Sheet, rows: frozenset[int]) -> Found:
    """Return the claims of those rows of a table of tests that tell of one kind of test."""
    roles = roles_in(sheet.columns)
    refused = roles & _NEVER
    if refused == {"rss"} and {"F", "p"} <= roles:
        refused = set()  # what each term adds, beside what remains without it
    if refused or not roles & set(_KINDS):
        return Found(())
    claims: list[Claim] = []
    read: set[int] = set()
    wanted = _ROLES | _LIMITS if _are_of_differences(sheet) else _ROLES
    several = [] if "r" in roles else each_test(sheet.columns)
    groups = side_by_side(sheet.columns, wanted) if len(several) < 2 else several
    # A multivariate test has df of its own beside those of its effect.
    own_df = {("df1",), ("df2",)} <= {column.heading.roles for column in sheet.columns}
    for group in groups:
        group = [
            column
            for column in group
            if column.heading.roles and not (own_df and column.heading.roles == ("df",))
        ]
        own = {role for column in group for role in column.heading.roles}
        tests = [key for key in _KINDS if key in own and not (key == "t" and "r" in own)]
        if len(tests) == 1 and supported(sheet, tests[0], own, group):
            kept = [
                c for c in group if tests[0] in {"t", "z", "r"} or not _LIMITS & {*c.heading.roles}
            ]
            found = _rows(sheet, kept, tests[0], rows)
            claims += found.claims
            read |= found.rows
    return Found(tuple(claims), frozenset(read))


def _are_of_differences(sheet: Sheet) -> bool:
    """Say whether an interval is that of what is tested: no group's mean, no effect size."""
    places = [c.number for c in sheet.columns if "ci_low" in c.heading.roles]
    if len(places) != 1:
        return False
    before = sheet.columns[places[0] - 1]
    if before.heading.roles != ("r",) and _SIZE.search(before.text):
        return False
    means = [c for c in sheet.columns if c.heading.roles in {("mean",), ("sd",)}]
    return not means or _DIFFERENCE.search(sheet.words) is not None


_SIZE = re.compile(
    r"\b(?:cohen|hedges|glass|effect\ssize|smd|es)\b|\b[dgrVφ]\b|η|ω|ε|\bd_", re.IGNORECASE
)
#: Said of the mean of differences.
_DIFFERENCE = re.compile(r"\bdiff(?:erences?|\.)?\b|\bpair(?:s|ed)?\b", re.IGNORECASE)
#: Headings of what tells how well each of several models fits.
_CRITERIA = re.compile(r"AICc?|BIC|log-?\s?lik(?:elihood)?|-2\s?LL|deviance", re.IGNORECASE)


def _of_the_test(columns: Sequence[Column]) -> tuple[Column, ...]:
    """Take the df of a comparison of models for that of its test, and not that of each model."""
    roles = {column.heading.roles for column in columns}
    tests = sum(1 for column in columns if set(column.heading.roles) & set(_KINDS))
    changes = tests < 2 and ("df_change",) in roles
    criteria = [
        c.number for c in columns if _CRITERIA.fullmatch(c.box.text.strip()) and ("F",) not in roles
    ]
    kept = []
    for column in columns:
        heading = column.heading
        if heading.roles == ("df_change",):
            heading = heading._replace(roles=("df",))
        elif heading.roles == ("wald",):
            heading = heading._replace(roles=("chi2",))
        elif heading.roles == ("df",) and (changes or column.number < max(criteria, default=0)):
            heading = heading._replace(roles=())
        kept.append(column._replace(heading=heading))
    return tuple(kept)


#: What a cell calls the test whose result it holds.
_SYMBOLS = {
    "H": "chi2",
    "Q": "chi2",
    "F": "F",
    "t": "t",
    "T": "t",
    "r": "r",
    "χ²": "chi2",
    "χ^{2}": "chi2",
}


def _with_symbols(sheet: Sheet) -> tuple[Column, ...]:
    """Name columns by their cells, where each holds a test: ``F(2, 57) = 4.47``."""
    columns = list(sheet.columns)
    for place, column in enumerate(columns):
        if column.heading.roles not in {(), ("statistic",)} or not column.box.text:
            continue
        texts = [row[column.number].text for row in sheet.panel.rows[:60]]
        contents = [content_of(text) for text in texts if text]
        symbols = {content.symbol for content in contents if content is not None}
        if len(symbols) == 1 and None not in contents and (symbol := symbols.pop()) in _SYMBOLS:
            heading = column.heading._replace(roles=(_SYMBOLS[symbol],))
            columns[place] = column._replace(heading=heading)
    return tuple(columns)


def _rows(sheet: Sheet, columns: Sequence[Column], test: str, wanted: frozenset[int]) -> Found:
    labels = labels_of(sheet.panel, sheet.columns)
    has_p = any(column.heading.roles == ("p",) for column in columns)
    claims: list[Claim] = []
    rows: set[int] = set()
    waiting: list[int] = []
    for index, row in enumerate(sheet.panel.rows):
        if index not in wanted:
            continue
        words = [row[c.number] for c in labels if row[c.number].text]
        label = name_of(row, labels)
        cells: dict[str, Reading] = {}
        contexts: list[str] = []
        levels: tuple[Reading, ...] = ()
        for column in columns:
            box = row[column.number]
            _read(sheet, column, box.text, box.start, test, cells, contexts, has_p=has_p)
            levels = levels or level(sheet, column)
        if (
            test == "F"
            and "F" not in cells
            and "p" not in cells
            and kind_of(label) in {"error", "blank"}
        ):
            error = cells.get("df1") or cells.get("df2")
            if error is not None:
                df2 = error._replace(quantity="df2")
                for number in waiting:
                    if not any(r.quantity == "df2" for r in claims[number].readings):
                        claims[number] = claims[number]._replace(given=(df2,))
                waiting = []
                rows.add(index)
            continue
        if test not in cells or len(cells) < 2 or not _possible(cells):
            continue
        boxes = (*words, *(row[c.number] for c in columns))
        name = next((column.group for column in columns if column.group), "")
        title = ", ".join(part for part in (label, name) if part)
        told = {"df", "df2"} & cells.keys() or test == "z"
        given = () if told else _told_df(sheet, test)
        given += levels if "ci_low" in cells else ()
        found = claim(
            sheet,
            _KINDS[test],
            title or test,
            cells.values(),
            boxes,
            row=title,
            contexts=contexts,
            given=given,
        )
        waiting.append(len(claims))
        claims.append(found)
        rows.add(index)
    return Found(tuple(claims), frozenset(rows))


def _told_df(sheet: Sheet, test: str) -> tuple[Reading, ...]:
    """Return the degrees of freedom that a note tells for all rows."""
    names = ("df1", "df2") if test == "F" else ("df",)
    return tuple(
        found
        for name, number in zip(names, sheet.legend.df, strict=False)
        if len(sheet.legend.df) == len(names)
        and (found := reading(sheet, number, name)) is not None
    )


def _possible(cells: dict[str, Reading]) -> bool:
    p = cells.get("p")
    return p is None or (p.high >= 0 and p.low <= 1.5 and p.low < p.high)


def _read(
    sheet: Sheet,
    column: Column,
    text: str,
    start: int,
    test: str,
    cells: dict[str, Reading],
    contexts: list[str],
    *,
    has_p: bool,
) -> None:
    if text in INFINITE and column.heading.roles == ("df2" if test == "F" else "df",):
        cells.setdefault(column.heading.roles[0], _infinite(sheet, column.heading.roles[0], start))
        contexts.append("limiting-df")
        return
    content = content_of(text, start) or NONE
    roles = column.heading.roles
    one = "df1" if test == "F" else "df"
    numbers = content.numbers
    if roles == ("df",) and len(numbers) == 2 and test == "F":
        roles = ("df1", "df2")
    elif (
        roles == ("df",)
        and len(numbers) == 1
        and test == "F"
        and (pair := _glued(numbers[0].literal))
    ):
        first = numbers[0]._replace(literal=pair[0], end=numbers[0].start + len(pair[0]))
        numbers = (first, numbers[0]._replace(literal=pair[1], start=numbers[0].end - len(pair[1])))
        roles = ("df1", "df2")
    if len(roles) == 2 and roles[1] == "df" and len(numbers) == 3:
        roles = (roles[0], "df1", "df2")
    if roles == ("ci_low", "ci_high"):
        numbers = limits(numbers, sheet.comma)
    elif sum(not number.bracket for number in numbers) > len(roles):
        numbers = ()  # which of them is meant is not known
    for role, number in zip(roles, numbers, strict=False):
        quantity = one if role == "df" or (role == "df1" and test != "F") else role
        if quantity not in _ROLES | _LIMITS:
            continue
        if quantity == "p_adjusted":
            add_adjusted(sheet, column, number, cells, contexts, has_p=has_p)
            continue
        found = reading(sheet, number, quantity)
        if found is not None:
            cells.setdefault(quantity, found)
    names = ("df1", "df2") if test == "F" else ("df",)
    for name, number in zip(names, content.df, strict=False):
        found = reading(sheet, number, name)
        if found is not None:
            cells.setdefault(name, found)
    if numbers and (roles[:1] == (test,) or roles == ("t",)):
        for found in head_df(sheet, column, names):
            cells.setdefault(found.quantity, found)
    mark, default = marked(sheet, content, beside_p=has_p)
    if mark is not None and roles[:1] in {(test,), ("p",)}:
        cells.setdefault("stars", mark)
        contexts += ["default-stars"] if default else []
    contexts += column.heading.contexts


def _infinite(sheet: Sheet, quantity: str, start: int) -> Reading:
    end = start + len(next(word for word in INFINITE if sheet.folded.startswith(word, start)))
    literal = sheet.shown[start:end]
    return Reading(quantity, "=", literal, AS_GOOD_AS, AS_GOOD_AS, Span(start, end))


def _glued(literal: str) -> tuple[str, str] | None:
    """Return both degrees of freedom of ``2,87``."""
    first, comma, second = literal.partition(",")
    return (first, second) if comma and first.isdigit() and second.isdigit() else None
