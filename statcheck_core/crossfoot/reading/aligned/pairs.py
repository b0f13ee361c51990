"""Labels and values in a printout: beside a table, in two columns, or line by line."""

from __future__ import annotations

import re
from collections.abc import Sequence
from typing import NamedTuple

from crossfoot.reading.aligned.lines import Line, is_value
from crossfoot.reading.numerals import NUMERAL
from crossfoot.reading.tables import headings
from crossfoot.reading.tables.fits import FIT

_ROLES = FIT | {"p", "df_residual"}
#: What is told of one test in a few lines.
_OF_TEST = frozenset({"t", "z", "chi2", "F", "df", "df1", "df2", "statistic"})
#: ``R-squared     =  0.3244`` at the end of a line, apart from what stands before it.
_SIDE = re.compile(
    rf"(?:^|(?<=\s\s))(?P<label>F\(\s{{0,9}}\d{{1,7}}(?:\.\d+)?,\s{{0,9}}\d{{1,9}}(?:\.\d+)?\)"
    rf"|[A-Za-z][\w.>()|-]{{0,16}}(?: [\w.>()|-]{{1,16}}){{0,4}})"
    rf"\s{{0,12}}=\s{{0,14}}(?P<value>{NUMERAL})\s*$"
)
#: What two spaces or a tab part.
_FIELD = re.compile(r"\S+(?: \S+)*")
#: Dots that lead the eye from a label to its value.
_LEADERS = re.compile(r"(?<=[\w)]) ?\.{3,}(?= )")
_COLON = re.compile(r"[^:=]{1,40}:")


class Pair(NamedTuple):
    """A label and its value, in places of the whole text."""

    line: int
    label: tuple[int, int]
    value: tuple[int, int]


def beside(line: Line, number: int) -> Pair | None:
    """Return the label and value that stand at the right end of a line, if it is a known one."""
    if "=" not in line.text:
        return None
    found = _SIDE.search(line.text)
    if found is None or not _known(found["label"]):
        return None
    start = line.start
    return Pair(
        number,
        (start + found.start("label"), start + found.end("label")),
        (start + found.start("value"), start + found.end("value")),
    )


def _known(label: str) -> bool:
    roles = headings.parse(label).roles
    return bool(roles) and roles[0] in _ROLES


def tells_test(texts: Sequence[str]) -> bool:
    """Say whether a few labels are those of one test, which prose without colons does not tell."""
    roles = {role for text in texts for role in headings.parse(text.strip(" :")).roles[:1]}
    return (
        ":" not in "".join(texts)
        and "p" in roles
        and bool(roles & (_OF_TEST - {"df", "df1", "df2"}))
    )


def _tells_of_test(label: str) -> bool:
    roles = headings.parse(label).roles
    return bool(roles) and roles[0] in _OF_TEST


def in_fields(line: Line, number: int) -> list[Pair] | None:
    """Return the pairs of a line that holds nothing but labels and values, wide apart.

    ``R-squared:      0.468     Df Model:      1`` and ``Root MSE   6.69   R-Square   0.2111``.
    """
    if line.blank or len(line.text) > 200:
        return None
    text = _LEADERS.sub(lambda dots: " " * len(dots.group()), line.text)
    fields = [part for match in _FIELD.finditer(text) for part in _halves(line.text, match)]
    if not 2 <= len(fields) <= 8 or len(fields) % 2:
        return [] if line.text.count(":") > 1 and len(fields) > 2 else None
    texts = [line.text[a:b] for a, b in fields]
    labels, values = texts[::2], texts[1::2]
    colons = all(_COLON.fullmatch(label) for label in labels)
    if not colons and not all(is_value(value.replace(" ", "")) for value in values):
        return None
    if any(is_value(label) for label in labels) or any(text.endswith(",") for text in texts):
        return None
    known = [
        value
        for label, value in zip(labels, values, strict=True)
        if _known(label.strip(" :")) or (not colons and _tells_of_test(label))
    ]
    if not known:
        return []
    if not all(is_value(value.replace(" ", "")) for value in known):
        return None  # a statement: "F-statistic: 13.7 on 2 and 57 DF"
    start = line.start
    return [
        Pair(number, (start + a[0], start + a[1]), (start + b[0], start + b[1]))
        for a, b in zip(fields[::2], fields[1::2], strict=True)
    ]


def _halves(text: str, field: re.Match[str]) -> list[tuple[int, int]]:
    """Split ``Prob (F-statistic): 1.43e-05`` at its colon."""
    start, end = field.span()
    colon = text.find(": ", start, end)
    return [(start, end)] if colon < 0 else [(start, colon + 1), (colon + 2, end)]
