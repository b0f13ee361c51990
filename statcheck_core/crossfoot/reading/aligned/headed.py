"""Tables whose columns are named in a line of headings."""

from __future__ import annotations

import re
from collections.abc import Sequence

from crossfoot.reading.aligned.behind import HEAD_BEHIND, with_heading_below, with_words_behind
from crossfoot.reading.aligned.lines import (
    MARKS,
    NOTE,
    Line,
    Token,
    Word,
    fields_in,
    headish,
    is_value,
    parted,
    starts_panel,
    tokens_of,
    words_of,
)
from crossfoot.reading.aligned.placing import Columns, Row, with_marks
from crossfoot.reading.tables.headings import NOTHING, parse

#: The types of columns, as some data frames print them.
_TYPES = re.compile(r"\s*\*?\s*(?:<[a-z]{2,6}>\s*)+")
#: What else tables of tests and models print.
_BESIDE = re.compile(r"(?:npar|AICc?|BIC|logLik|deviance|[nN]\d|group\d|estimate\d)", re.IGNORECASE)
_CATEGORY = re.compile(r"[A-Za-z_][\w.]{0,40}=[\w.]{1,20}")
#: A relation that is not in brackets.
_STATED = re.compile(r"=(?![^()]*\))")
#: Roles that do not make a line one of headings.
_WEAK = frozenset({"label", "n", "mean", "sd", "r", "R"})


def headings_in(text: str, line: Line, below: Sequence[Line] = ()) -> Columns | None:
    """Return the columns that a line names, or None where it is no line of headings.

    Parameters
    ----------
    text, line
        The text, and the line that may name columns.
    below
        The lines after it, which tell how many columns there are.
    """
    if not headish(line.text):
        return None
    words = words_of(text, line.start, line.end)
    if not 2 <= len(words) <= 40:
        return None
    tokens = tokens_of(text, words)
    tokens = _fields(line, tokens, text, below) or tokens
    known = [t for t in tokens if t.heading.roles and t.heading.roles[0] not in _WEAK]
    others = [t for t in tokens if not t.heading.roles and not _BESIDE.fullmatch(t.text)]
    if len({t.heading.roles for t in known}) < 2 or len(others) > len(known) + 1:
        return None
    # The first may say of which category the coefficients are: "grade=2".
    first = tokens[0] if _CATEGORY.fullmatch(tokens[0].text) else None
    if any(is_value(t.text) or not (t is first or set("=;{}").isdisjoint(t.text)) for t in others):
        return None
    named = any(
        label and not is_value(label[0].text)
        for label, _ in (parted(text, row) for row in below[:3] if not row.rule)
    )
    start_of_heads = next(
        i
        for i, t in enumerate(tokens)
        if t.heading.roles not in {(), ("label",)}
        and not (i == 0 and named and t.heading.roles == ("statistic",))
    )
    heads: list[Token] = []
    spans: list[tuple[int, int]] = []
    for token in tokens[start_of_heads:]:
        start, end = token.start - line.start, token.end - line.start
        if token.heading.roles == ("ci_low", "ci_high"):
            # One heading over both limits.
            heads += [token, token]
            spans += [(start, (start + end) // 2), ((start + end) // 2, end)]
        else:
            heads.append(token)
            spans.append((start, end))
    return Columns(tuple(tokens[:start_of_heads]), tuple(heads), tuple(spans))


def _fields(line: Line, tokens: Sequence[Token], text: str, below: Sequence[Line]) -> list[Token]:
    """Return the headings that wide gaps part, if a row below has as many values.

    There are none where names parted at each space fit the words of a row.
    """
    found = list(fields_in(line.text))
    if len(found) == len(tokens) or len(found) < 3:
        return []
    body = [row for row in below[:4] if not (row.rule or row.blank or _TYPES.fullmatch(row.text))]
    counts = [
        len([w for w in words_of(text, row.start, row.end) if not MARKS.fullmatch(w.text)])
        for row in body
    ]
    if any(count - len(tokens) in {0, 1} for count in counts):
        return []
    rows = [parted(text, row) for row in body]
    counts = [len(with_marks(text, values)) + bool(label) for label, values in rows if values]
    named = any(label for label, values in rows if values)  # the labels may have no heading
    if not counts:
        return []
    parsed = [
        Token(
            field.group(),
            line.start + field.start(),
            line.start + field.end(),
            parse(field.group()),
        )
        for field in found
    ]
    # Where the labels have no heading, each other column must have a known one.
    spare = 1 if named and all(token.heading.roles for token in parsed) else 0
    return parsed if 0 <= max(counts) - len(found) <= spare else []


def matrix_in(text: str, lines: Sequence[Line], number: int) -> Columns | None:
    """Return the columns of a matrix whose columns are numbered, or named as its rows are."""
    line = lines[number]
    fields = [
        Token(found.group(), line.start + found.start(), line.start + found.end(), NOTHING)
        for found in fields_in(line.text)
    ]
    if not 2 <= len(fields) <= 40 or _STATED.search(line.text):
        return None
    names: set[str] = set()
    rows = most = 0
    margin = 0  # where the names of rows end
    for below in lines[number + 1 : number + 42]:
        if below.rule:
            continue
        label, values = parted(text, below)
        if below.blank and rows:
            continue
        if (not label and not values) or (not values and rows > 1):
            break
        if not label:
            continue
        if len(values) > len(fields):
            return None
        name = text[label[0].start : label[-1].end].lower()
        names |= {name, name.split("  ")[0]}
        rows += 1
        most = max(most, len(values))
        margin = max(margin, label[-1].end - below.start)
    counts = [field.text.strip("().") for field in fields]
    numbered = [count for count in counts if count.isdigit()]
    named = [field for field in fields if field.text.lower() in names]
    if rows < 2 or not (
        (len(numbered) > 1 and numbered == [str(i + 1) for i in range(len(numbered))])
        or len(named) > 1
    ):
        return None
    headed = fields[0].start - line.start >= margin and most == len(fields)
    known = fields[0].text.lower() in names or counts[0].isdigit() or headed
    first = 0 if known else 1
    spans = tuple((token.start - line.start, token.end - line.start) for token in fields[first:])
    return Columns(tuple(fields[:first]), tuple(fields[first:]), spans)


def rows_below(
    text: str, lines: Sequence[Line], first: int, columns: Columns
) -> tuple[list[Row], Columns, int]:
    """Return the rows under a line of headings, its columns, and the line after the rows.

    Parameters
    ----------
    text, lines
        The text and its lines.
    first
        The line after the headings.
    columns
        From :func:`headings_in`.
    """
    raw: list[tuple[int, list[Word], list[Word]]] = []
    below: tuple[int, Word] | None = None
    number = first
    end = first
    blanks = 0
    while number < len(lines):
        line = lines[number]
        if line.blank or line.rule or _TYPES.fullmatch(line.text):
            blanks += line.blank
            if blanks > 1 and line.blank and lines[number - 1].blank:
                break
            number += 1
            continue
        under = HEAD_BEHIND.search(line.text) if raw and below is None else None
        if under is not None:  # a further heading, at the end of a row
            word = Word(under.group(1), line.start + under.start(1), line.start + under.end(1))
            below = number, word
            line = Line(line.start, word.start, text[line.start : word.start])
        label, values = parted(text, line)
        if not values and columns.heads and not columns.heads[-1].heading.roles:
            label, values = with_words_behind(text, line, columns)
        if NOTE.match(line.text) or _is_sentence(label, values):
            break
        if raw and blanks and len(values) < 2 and _indent(line) > _indent(lines[raw[0][0]]) + 8:
            break  # below the table, in the middle of the page
        if not values:
            if raw and starts_panel(lines, number, lines[raw[0][0]]):
                break
            goes_on = bool(raw) or (
                number + 1 < len(lines) and bool(parted(text, lines[number + 1])[1])
            )
            if not goes_on or not _section(line, number, end):
                break
            raw.append((number, label, []))
            number += 1
            continue
        if headings_in(text, line) is not None:
            break
        raw.append((number, label, values))
        number += 1
        end = number
        blanks = 0
    raw = [item for item in raw if item[0] < end]
    columns = _with_unnamed(
        columns, [len(with_marks(text, values)) for _, _, values in raw if values]
    )
    rows, columns = with_heading_below(text, lines, raw, columns, first, below)
    return rows, columns, end


def _indent(line: Line) -> int:
    return len(line.text) - len(line.text.lstrip())


def _with_unnamed(columns: Columns, counts: Sequence[int]) -> Columns:
    """Take words before the first known heading for headings too, if rows have as many values."""
    if not counts:
        return columns
    usual = max(set(counts), key=lambda count: (counts.count(count), count))
    extra = usual - len(columns.heads)
    if max(counts) < len(columns.heads):
        return _with_whole_intervals(columns)
    if not 0 < extra <= len(columns.labels):
        return columns
    moved = columns.labels[-extra:]
    offset = columns.heads[0].start - columns.spans[0][0]
    spans = tuple((token.start - offset, token.end - offset) for token in moved)
    return Columns(columns.labels[:-extra], (*moved, *columns.heads), (*spans, *columns.spans))


def _with_whole_intervals(columns: Columns) -> Columns:
    """Take both limits for one column where rows have fewer values than there are headings."""
    heads: list[Token] = []
    spans: list[tuple[int, int]] = []
    for token, span in zip(columns.heads, columns.spans, strict=True):
        if heads and token is heads[-1]:
            spans[-1] = (spans[-1][0], span[1])
        else:
            heads.append(token)
            spans.append(span)
    return Columns(columns.labels, tuple(heads), tuple(spans))


def _is_sentence(label: Sequence[Word], values: Sequence[Word]) -> bool:
    """Say whether a line tells numbers one after the other, each under its own name."""
    ends = label[-1].text if label else ""
    if (ends[-1:] in {":", "="} and ends != "==") or (values and values[0].text[0] == "="):
        return True
    return any("." in word.text and is_value(word.text.rstrip(",;")) for word in label)


def _section(line: Line, number: int, end: int) -> bool:
    """Say whether a line without numbers may name a part of the table."""
    return len(line.text.strip()) <= 40 and number - end <= 1 and "=" not in line.text
