"""Columns: the heading of each, from one or several rows of a header."""

from __future__ import annotations

import re
from collections.abc import Collection, Sequence

from crossfoot.reading.tables import headings
from crossfoot.reading.tables.contents import content_of, is_blank
from crossfoot.reading.tables.grid import EMPTY, Box, Panel
from crossfoot.reading.tables.headings import NOTHING, Heading
from crossfoot.reading.tables.making import Column

_CI = ("ci_low", "ci_high")
_COMMA = re.compile(r"\D{0,3}(?:0?,\d+|\d+,(?:\d{1,2}|\d{4,}))\D{0,8}")
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
    return tuple(_split_intervals(panel, columns))


def _column(panel: Panel, index: int) -> Column:
    boxes = [row[index] for row in panel.heads if index < len(row)]
    boxes = [box for n, box in enumerate(boxes) if box.text and (n == 0 or box != boxes[n - 1])]
    heading, box, used = _told(boxes)
    groups = [
        other
        for other in boxes
        if other is not box and (other not in used) and (other.columns > 1 or heading.roles)
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


def side_by_side(columns: Sequence[Column], roles: Collection[str]) -> list[list[Column]]:
    """Split the columns of some roles where several tables stand side by side.

    Where a role comes again the next table starts; columns whose role comes once are shared.
    """
    known = [c for c in columns if c.heading.roles and c.heading.roles[0] in roles]
    seen: set[tuple[str, ...]] = set()
    again: set[tuple[str, ...]] = set()
    for column in known:
        (again if column.heading.roles in seen else seen).add(column.heading.roles)
    if not again:
        return [known] if known else []
    shared = [c for c in known if c.heading.roles not in again]
    groups: list[list[Column]] = []
    for column in (c for c in known if c.heading.roles in again):
        if not groups or any(c.heading.roles == column.heading.roles for c in groups[-1]):
            groups.append([])
        groups[-1].append(column)
    return [[*shared, *group] for group in groups]
