"""Columns: the heading of each, from one or several rows of a header."""

from __future__ import annotations

import re
from collections.abc import Collection, Sequence

from crossfoot.reading.tables import headings
from crossfoot.reading.tables.contents import content_of, is_blank
from crossfoot.reading.tables.grid import EMPTY, Box, Panel
from crossfoot.reading.tables.headings import NOTHING, Heading
from crossfoot.reading.tables.making import Column
from crossfoot.reading.tables.rows import label_of
from crossfoot.reading.tables.tested import named_beside

#: Quantities that may follow the name of what they are of.
_NAMED = frozenset({"F", "t", "p", "df", "b", "β", "beta", "se", "z", "r", "ms", "ss", "chi2"})
_ESTIMATES = frozenset({"b", "β", "beta"})
_MODEL = re.compile(
    r"(?:model|step|block|stage|modell|modèle|modelo)\s?[\dA-Z]{1,3}", re.IGNORECASE
)
_CI = ("ci_low", "ci_high")
_COMMA = re.compile(r"\D{0,3}(?:0?,\d+|\d+,(?:\d{1,2}|\d{4,}))\D{0,8}")
#: Over several columns these say that the model is adjusted, not what stands in each.
_OF_MODEL = re.compile(r"(?:un)?adjusted|crude", re.IGNORECASE)
_POINT = re.compile(r"\d*\.\d")
#: Rows that are looked at to tell how a table writes its numbers.
_SAMPLE = 60


def columns_of(panel: Panel) -> tuple[Column, ...]:
    """Return the columns of a panel."""
    columns = [_column(panel, index) for index in range(panel.width)]
    for index in range(1, len(columns)):
        same = columns[index].box is columns[index - 1].box and columns[index].heading.roles
        if same and all(is_blank(row[index].text) for row in panel.rows[:_SAMPLE]):
            columns[index] = columns[index]._replace(heading=NOTHING)  # spanned, but empty
    letters = {column.text for column in columns}
    for index, column in enumerate(columns):
        if column.text == "B" and letters & {"A", "C"}:
            columns[index] = column._replace(heading=NOTHING)  # groups A and B
        elif column.heading.roles == ("statistic",) and _are_words(panel, index):
            columns[index] = column._replace(heading=NOTHING._replace(roles=("label",)))
        elif index and column.heading.roles == ("label",) and _are_figures(panel, index):
            columns[index] = column._replace(heading=NOTHING)
    columns = named_beside(columns, [not _are_words(panel, c.number) for c in columns])
    return tuple(_split_intervals(panel, _with_names(columns)))


def _are_words(panel: Panel, index: int) -> bool:
    """Say whether a column holds words rather than numbers."""
    filled = [row[index].text for row in panel.rows[:_SAMPLE] if row[index].text]
    return 2 * sum(content_of(text) is None for text in filled) >= len(filled)


def _are_figures(panel: Panel, index: int) -> bool:
    """Say whether a column holds decimals, marked or in brackets, that number no rows."""
    filled = [row[index].text for row in panel.rows[:_SAMPLE] if not is_blank(row[index].text)]
    contents = [content for text in filled if (content := content_of(text)) is not None]
    return 2 * len(contents) > len(filled) and any(
        content.marks or content.enclosed for content in contents
    )


def _with_names(columns: list[Column]) -> list[Column]:
    """Tell columns such as ``Shape F | Shape p | Wind F | Wind p``: a name, then a quantity.

    A name is one only where at least two quantities bear it, one of them p or a standard error,
    or where it names a model, as ``Step 1 β | Step 2 β`` do.
    """
    named: dict[str, list[tuple[int, Heading]]] = {}
    for index, column in enumerate(columns):
        name, _, last = column.box.text.rpartition(" ")
        if not column.heading.roles and name:
            heading = headings.parse(last)
            if heading.roles and heading.roles[0] in _NAMED:
                named.setdefault(name.strip(" ,:-–"), []).append((index, heading))
    for name, found in named.items():
        roles = {heading.roles[0] for _, heading in found}
        several = len(roles) > 1 and roles & {"p", "se"} and len(roles) == len(found)
        if several or (len(found) == 1 and roles <= _ESTIMATES and _MODEL.fullmatch(name)):
            for index, heading in found:
                bare = heading._replace(df=(), level=None)
                columns[index] = columns[index]._replace(heading=bare, group=name)
    return columns


def _column(panel: Panel, index: int) -> Column:
    boxes = [row[index] for row in panel.heads if index < len(row)]
    boxes = [box for n, box in enumerate(boxes) if box.text and (n == 0 or box != boxes[n - 1])]
    heading, box, used = _told(boxes)
    groups = [
        other
        for other in boxes
        if other.text != box.text and other not in used and (other.columns > 1 or heading.roles)
    ]
    group = " ".join(other.text for other in groups)
    if not heading.roles:
        group, box = "", boxes[-1] if boxes else EMPTY
    if heading.roles in {("ci_low",), ("ci_high",)} and heading.level is None:
        box, heading = _with_level(boxes, box, heading)
        group = " ".join(other.text for other in groups if headings.parse(other.text).roles != _CI)
    return Column(index, heading, box, " ".join(other.text for other in boxes), group)


def _told(boxes: Sequence[Box]) -> tuple[Heading, Box, tuple[Box, ...]]:
    """Return what the boxes over a column say together, and which of them say it."""
    if not boxes:
        return NOTHING, EMPTY, ()
    last = boxes[-1]
    for first in range(len(boxes) - 1):
        joined = " ".join(box.text for box in boxes[first:])
        if boxes[first].columns > 1 and _OF_MODEL.fullmatch(boxes[first].text):
            continue
        found = headings.parse(joined)
        if found.roles and found.roles != ("label",):
            return found._replace(level=None), last, tuple(boxes[first:])
    found = headings.parse(last.text)
    upper = headings.parse(boxes[-2].text) if len(boxes) > 1 else NOTHING
    if (found.roles == ("β",) and upper.roles == ("beta",)) or (
        found.roles == ("b",) and upper.roles == ("beta",)
    ):
        return found._replace(roles=("beta",)), last, (last, boxes[-2])
    if found.roles:
        return found, last, (last,)
    if upper.roles and upper.roles != ("label",):
        return upper, boxes[-2], (boxes[-2],)
    return NOTHING, last, ()


def _with_level(boxes: Sequence[Box], box: Box, heading: Heading) -> tuple[Box, Heading]:
    """Take the confidence level of a limit from the heading over it."""
    for other in boxes:
        found = headings.parse(other.text)
        if found.roles == _CI:
            return other, heading._replace(level=found.level, contexts=found.contexts)
    return box, heading


def _split_intervals(panel: Panel, columns: list[Column]) -> list[Column]:
    """Tell the limits of an interval apart whose one heading stands over two columns."""
    for index, column in enumerate(columns[:-1]):
        following = columns[index + 1]
        if column.heading.roles != _CI:
            continue
        same = following.box == column.box and following.heading.roles == _CI
        bare = not following.text and not following.heading.roles
        if (same or bare) and _single(panel, index) and _single(panel, index + 1):
            columns[index] = column._replace(heading=column.heading._replace(roles=("ci_low",)))
            upper = column._replace(number=index + 1)
            columns[index + 1] = upper._replace(heading=column.heading._replace(roles=("ci_high",)))
    return columns


def _single(panel: Panel, index: int) -> bool:
    """Say whether the cells of a column hold one number each."""
    filled = [row[index].text for row in panel.rows[:_SAMPLE] if not is_blank(row[index].text)]
    found = [content for text in filled if (content := content_of(text)) is not None]
    return bool(found) and all(len(content.numbers) == 1 for content in found)


def writes_comma(panel: Panel) -> bool:
    """Say whether the numbers of a panel have a decimal comma."""
    commas = points = 0
    for row in panel.rows[:_SAMPLE]:
        for box in row[1:]:
            commas += _COMMA.fullmatch(box.text) is not None
            points += _POINT.search(box.text) is not None
    return commas > 0 and points == 0


def roles_in(columns: Sequence[Column]) -> set[str]:
    """Return the roles that columns have."""
    return {role for column in columns for role in column.heading.roles}


def is_label(panel: Panel, column: Column) -> bool:
    """Say whether a column names its rows: no quantity, and words rather than numbers."""
    if column.heading.roles and column.heading.roles != ("label",):
        return False
    filled = [row[column.number].text for row in panel.rows[:_SAMPLE] if row[column.number].text]
    words = sum(1 for text in filled if content_of(text) is None)
    return 2 * words >= len(filled) or column.heading.roles == ("label",)


def labels_of(panel: Panel, columns: Sequence[Column]) -> list[Column]:
    """Return the columns that name the rows: those before the first quantity."""
    found: list[Column] = []
    for column in columns:
        if column.heading.roles and column.heading.roles != ("label",):
            break
        if is_label(panel, column):
            found.append(column)
    return found


def name_of(row: Sequence[Box], labels: Sequence[Column]) -> str:
    """Return what a row is called; a mere number counts what its column's heading says."""
    words = [
        f"{column.box.text} {row[column.number].text}"
        if row[column.number].text.isdigit() and column.box.text
        else row[column.number].text
        for column in labels
    ]
    return label_of(", ".join(filter(None, words)))


#: What every table that stands beside others may share with them: counts, told once.
_SHARED = frozenset({"df", "df1", "df2", "n"})
#: What a table is about; a column of these starts one.
_PRIMARY = frozenset({"F", "t", "z", "chi2", "r", "b", "β", "beta", "odds_ratio", "ratio", "wald"})


def side_by_side(columns: Sequence[Column], roles: Collection[str]) -> list[list[Column]]:
    """Split the columns of some roles where several tables stand side by side.

    Where a role comes again the next table starts. Of the columns whose role comes once, counts
    before the first table and after the last are shared; others belong to the table they stand in,
    and an estimate or a test between two tables to the second.
    """
    known = [c for c in columns if c.heading.roles and c.heading.roles[0] in roles]
    seen: set[tuple[str, ...]] = set()
    again: set[tuple[str, ...]] = set()
    for column in known:
        (again if column.heading.roles in seen else seen).add(column.heading.roles)
    if not again:
        return [known] if known else []
    places = [n for n, c in enumerate(known) if c.heading.roles in again]
    shared: list[Column] = []
    waiting: list[Column] = []  # what belongs to the table that starts next
    groups: list[list[Column]] = []
    for place, column in enumerate(known):
        if column.heading.roles in again:
            if not groups or any(c.heading.roles == column.heading.roles for c in groups[-1]):
                groups.append(waiting)
                waiting = []
            groups[-1] += [*waiting, column]
            waiting = []
        elif column.heading.roles[0] in _SHARED and not places[0] < place < places[-1]:
            shared.append(column)
        elif not groups or waiting or (column.heading.roles[0] in _PRIMARY and place < places[-1]):
            waiting.append(column)
        else:
            groups[-1].append(column)
    return [[*shared, *group] for group in groups]
