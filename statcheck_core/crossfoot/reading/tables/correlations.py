"""Matrices of correlations."""

from __future__ import annotations

import re

from crossfoot.model import Claim, Reading, Span
from crossfoot.reading.contexts import cues_in
from crossfoot.reading.tables import headings
from crossfoot.reading.tables.columns import labels_of
from crossfoot.reading.tables.contents import Content, content_of, is_blank
from crossfoot.reading.tables.grid import Box
from crossfoot.reading.tables.making import Column, Found, Sheet, claim, marked, reading
from crossfoot.reading.tables.rows import label_of

_NUMBERED = re.compile(r"\(?(?P<number>\d{1,3})[.):]?\s*(?P<name>.*)")
_CORRELATION = re.compile(
    r"correlat|intercorrel|korrelation|corrélation|correlaci|correlaz|相关|상관", re.IGNORECASE
)
_REGRESSION = re.compile(
    r"regress|random\seffects?|loadings|reliabilit|intra-?class|auto-?correl|serial\scorrel|covarianc",
    re.IGNORECASE,
)
_OTHERWISE = re.compile(
    r"partial|controlling|above\sthe\sdiagonal|below\sthe\sdiagonal|upper\striangle|covarianc|disattenuat|loadings",
    re.IGNORECASE,
)
_DESCRIPTION = re.compile(
    r"(?:cronbach'?s?\s)?(?:α|alpha)|range|min(?:imum)?|max(?:imum)?|skew(?:ness)?|kurtosis|median"
    r"|variance|AVE|CR|reliability",
    re.IGNORECASE,
)
_ONE = re.compile(r"1(?:[.,]0{2,})?")
_COEFFICIENT = re.compile(
    r"(?:pearson|spearman|kendall)\b.{0,30}|.{0,20}\bcorrelation(?:\scoefficient)?|r|r_\{?s\}?|rho|ρ|τ",
    re.IGNORECASE,
)
_MATRIX_END = re.compile(r"\D{0,3}[-+]?0?[.,]\d+|[-+]?1(?:[.,]0+)?")


def correlations(sheet: Sheet) -> Found | None:
    """Return the claims of a matrix of correlations, or None where it is none."""
    said = _CORRELATION.search(sheet.words) is not None
    labels = labels_of(sheet.panel, sheet.columns)
    if not labels or len(sheet.panel.rows) < 2:
        return None
    kinds, contexts = _kinds(sheet, labels)
    names = _names(sheet, labels, kinds)
    columns = _matched(sheet, names)
    if said or _counts_from_two(names):
        columns = _with_first(sheet, columns, names)
    if len(columns) < 2 or not _is_matrix(sheet, columns, names, kinds, said):
        columns = _crossed(sheet, labels, names, kinds) if said else []
        if not columns:
            return None
    cases = None if _OTHERWISE.search(sheet.words) else sheet.legend.cases
    n = None if cases is None else _n(sheet, cases.start, cases.end, cases.low, cases.high)
    claims: list[Claim] = []
    for index, row in enumerate(sheet.panel.rows):
        if not names[index]:
            continue
        below = (
            _below(sheet, index, kinds, columns)
            if kinds
            else _p_below(sheet, index, names, columns)
        )
        for column, name in columns:
            content = content_of(row[column.number].text, row[column.number].start)
            if content is None or len(content.plain) != 1 or names[index] == name:
                continue
            own = {r.quantity: r for r in below.get(column.number, ())}
            boxes = (*(row[c.number] for c in labels), row[column.number])
            found = _correlation(
                sheet,
                boxes,
                content,
                f"{names[index]} × {name}",
                own.get("n", n),
                own.get("p"),
                contexts,
            )
            claims += [found] if found is not None else []
    return Found(tuple(claims), frozenset(range(len(sheet.panel.rows)))) if claims else None


def _crossed(
    sheet: Sheet, labels: list[Column], names: list[str], kinds: list[str]
) -> list[tuple[Column, str]]:
    """Return the columns of a table that correlates some variables with others."""
    if _REGRESSION.search(sheet.words):
        return []
    columns = [
        (column, label_of(column.box.text))
        for column in sheet.columns
        if column not in labels and not column.heading.roles and column.box.text
    ]
    others = [c for c in sheet.columns if c not in labels and c.heading.roles not in {(), ("n",)}]
    fitting = not others and _is_matrix(sheet, columns, names, kinds, said=True)
    return columns if fitting else []


def _kinds(sheet: Sheet, labels: list[Column]) -> tuple[list[str], frozenset[str]]:
    """Return what the rows print where a column says so: ``r``, ``p`` or ``n``; else nothing."""
    for column in labels:
        texts = [row[column.number].text for row in sheet.panel.rows]
        kinds = [
            "r" if _COEFFICIENT.fullmatch(text) else "".join(headings.parse_label(text).roles[:1])
            for text in texts
        ]
        if {"r", "p"} <= set(kinds) <= {"r", "p", "n"}:
            return kinds, cues_in(" ".join(texts[:3])).contexts
    return [], frozenset()


def _below(
    sheet: Sheet, index: int, kinds: list[str], columns: list[tuple[Column, str]]
) -> dict[int, list[Reading]]:
    """Return p and n of a row of correlations from the rows that follow it."""
    found: dict[int, list[Reading]] = {}
    for under in range(index + 1, len(kinds)):
        if kinds[under] == "r":
            break
        row = sheet.panel.rows[under]
        for column, _ in columns:
            content = content_of(row[column.number].text, row[column.number].start)
            if content is None or len(content.numbers) != 1:
                continue
            own = reading(sheet, content.numbers[0], kinds[under])
            if own is not None:
                found.setdefault(column.number, []).append(own)
    return found


def _p_below(
    sheet: Sheet, index: int, names: list[str], columns: list[tuple[Column, str]]
) -> dict[int, list[Reading]]:
    """Return the p values of a row, where a row without a name under it prints them.

    They are probabilities, and none where the row has none; what falls out of line is no p.
    """
    if index + 1 >= len(names) or names[index + 1]:
        return {}
    found: dict[int, list[Reading]] = {}
    for column, _ in columns:
        over, under = (sheet.panel.rows[i][column.number] for i in (index, index + 1))
        content = content_of(under.text, under.start)
        if content is None or len(content.numbers) > 1:
            return {}
        if not content.numbers:
            continue
        p = reading(sheet, content.numbers[0], "p")
        decimals = "." in content.numbers[0].literal or "," in content.numbers[0].literal
        if p is None or p.low > 1 or p.high < 0 or not decimals or is_blank(over.text):
            return {}
        found[column.number] = [p]
    return found


def _describes(label: str) -> bool:
    """Say whether a row describes the variables instead of correlating one."""
    roles = headings.parse_label(label).roles
    return roles[:1] in {("mean",), ("sd",), ("n",), ("se",)} or (
        _DESCRIPTION.fullmatch(label) is not None
    )


def _names(sheet: Sheet, labels: list[Column], kinds: list[str]) -> list[str]:
    """Return the names of the rows; none for those of p and n."""
    names: list[str] = []
    for index, row in enumerate(sheet.panel.rows):
        words = [row[c.number].text for c in labels if row[c.number].text]
        if kinds:
            own = kinds[index] == "r"
            words = [word for word in words if not _COEFFICIENT.fullmatch(word)] if own else []
        elif index and words and _describes(" ".join(words)):
            words = []
        names.append(label_of(" ".join(words)))
    return names


def _matched(sheet: Sheet, names: list[str]) -> list[tuple[Column, str]]:
    """Return the columns that stand for rows, by number or by name, with the rows' names."""
    matches = [_NUMBERED.fullmatch(name) for name in names]
    counted = {m["number"]: name for m, name in zip(matches, names, strict=True) if m}
    # Rows without numbers of their own are counted, but models in brackets are no variables.
    numbered = counted or {str(order): name for order, name in enumerate(names, start=1)}
    exact = {name.lower(): name for name in names if name}
    exact |= {
        m["name"].lower(): name for name in names if (m := _NUMBERED.fullmatch(name)) and m["name"]
    }
    found: list[tuple[Column, str]] = []
    for column in sheet.columns:
        text = label_of(column.box.text)
        number = text.strip("().")
        if number in numbered and number.isdigit() and (counted or number == text):
            found.append((column, numbered[number]))
        elif text.lower() in exact:
            found.append((column, exact[text.lower()]))
    return found


def _counts_from_two(names: list[str]) -> bool:
    """Say whether rows are numbered from 2, so that the first variable has none of its own."""
    numbers = [m["number"] for name in names if (m := _NUMBERED.fullmatch(name)) and m["name"]]
    return len(numbers) > 1 and numbers == [str(n) for n in range(2, len(numbers) + 2)]


def _with_first(
    sheet: Sheet, columns: list[tuple[Column, str]], names: list[str]
) -> list[tuple[Column, str]]:
    """Take in the column of the first variable, which has no row of its own in a triangle."""
    if not columns or len(columns) != len([name for name in names if name]) - 1:
        return columns
    first = columns[0][0].number
    before = [c for c in sheet.columns if c.number == first - 1]
    if not before or before[0].heading.roles or not before[0].box.text or first < 2:
        return columns
    filled = [row[first - 1].text for row in sheet.panel.rows if row[first - 1].text]
    if len(filled) != len([name for name in names if name]):
        return columns
    return [(before[0], label_of(before[0].box.text)), *columns]


def _has_ones(sheet: Sheet, columns: list[tuple[Column, str]], names: list[str]) -> bool:
    """Say whether each variable is printed to correlate perfectly with itself."""
    own = [
        row[column.number].text
        for row, name in zip(sheet.panel.rows, names, strict=True)
        for column, other in columns
        if name == other
    ]
    return len(own) == len(columns) and all(_ONE.fullmatch(text) for text in own)


def _is_matrix(
    sheet: Sheet,
    columns: list[tuple[Column, str]],
    names: list[str],
    kinds: list[str],
    said: bool,
) -> bool:
    """Say whether the cells of the columns can be correlations, with a triangle left empty."""
    rows = [
        row
        for n, row in enumerate(sheet.panel.rows)
        if (kinds[n] == "r" if kinds else names[n] or not row[0].text)
    ]
    cells = [row[c.number].text for row in rows for c, _ in columns]
    numbers = [
        text for text in cells if (content := content_of(text)) is not None and content.numbers
    ]
    fitting = [text for text in numbers if _MATRIX_END.match(text)]
    if not numbers or len(fitting) < 0.9 * len(numbers):
        return False
    if _has_ones(sheet, columns, names):
        return True
    triangle = len(numbers) <= 0.75 * len(cells) or said
    return triangle and (said or any("*" in text for text in numbers))


def _n(sheet: Sheet, start: int, end: int, low: float, high: float) -> Reading:
    return Reading("n", "=", sheet.shown[start:end], low, high, Span(start, end))


def _correlation(
    sheet: Sheet,
    boxes: tuple[Box, ...],
    content: Content,
    label: str,
    n: Reading | None,
    below: Reading | None,
    contexts: frozenset[str],
) -> Claim | None:
    r = reading(sheet, content.plain[0], "r")
    if r is None or not (r.low >= -1.5 and r.high <= 1.5) or r.relation != "=":
        return None
    readings = [r]
    mark, default = marked(sheet, content)
    if len(content.enclosed) == 1 and sheet.legend.enclosed == "p":
        p = reading(sheet, content.enclosed[0], "p")
        readings += [p] if p is not None else []
    if below is not None and len(readings) == 1:
        readings.append(below)
    readings += [mark] if mark is not None else []
    if n is None and mark is None and len(readings) < 2:
        return None
    context = ["default-stars"] if default else []
    found = claim(
        sheet, "correlation", label, readings, boxes, row=label, contexts=(*context, *contexts)
    )
    if n is None:
        return found
    ordered = tuple(sorted((*found.readings, n), key=lambda other: other.span))
    return found._replace(readings=ordered)
