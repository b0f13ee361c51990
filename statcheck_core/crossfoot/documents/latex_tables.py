r"""The tables of LaTeX: rows between ``\\\\``, cells between ``&``."""

from __future__ import annotations

import re
from collections.abc import Iterator, Sequence
from typing import NamedTuple

from crossfoot.documents.latex_macros import GROUP
from crossfoot.documents.mathtext import show_tex
from crossfoot.documents.table import Table, TableBuilder
from crossfoot.documents.tex_symbols import ENVIRONMENT_ARGS
from crossfoot.documents.visible import Builder, Visible, trimmed
from crossfoot.expressions import expression
from crossfoot.model import Span

_HEAD = expression(r"\s*\\begin\s{0,9}\{([A-Za-z]{1,40}\*?)\}(?:\s{0,9}\[[^\[\]\n]{0,100}\])?")
_TAIL = expression(r"\\end\s{0,9}\{[A-Za-z]{1,40}\*?\}\s*$")
_TOKEN = expression(
    r"\\\\(?:\*?\s{0,9}\[-?[\d.]{1,9}\s{0,9}[A-Za-z\\]{2,20}\])?|\\tabularnewline\b"
    r"|\\(begin|end)\b|\\[\s\S]|[{}&]|%[^\n]*"
)
_WIDE = expression(
    r"(?:\s|\\[a-z]*(?:rule|line)\b(?:\([lr]{1,4}\))?(?:\{[^{}\n]{0,20}\})?)*"
    r"\\multicolumn\s{0,9}\{\s{0,9}(\d{1,3})\s{0,9}\}"
)
_DEEP = expression(r"\\multirow\s{0,9}(?:\[[a-z]\])?\{\s{0,9}(\d{1,3})\s{0,9}\}")
_RULE = expression(r"\\(?:hline|toprule|midrule|bottomrule|specialrule|Xhline|thickhline)(?![a-z])")
_CAPTION = expression(r"\s*\\caption(?![a-z])")

#: The parts of a declaration of columns: what stands between two, and a column.
_COLUMN = expression(
    r"[@!]\{(?P<between>(?:[^{}]|\{[^{}]{0,100}\}){0,200})\}|[<>]\{(?:[^{}]|\{[^{}]{0,100}\}){0,200}\}"
    r"|(?P<column>[A-Za-z])(?:\[[^\[\]]{0,200}\]|\{[^{}]{0,60}\}){0,3}"
)
_REPEATED = expression(r"\*\s?\{(\d{1,2})\}\s?\{((?:[^{}]|\{[^{}]{0,100}\}){0,200})\}")
_MARK = expression(r"[.,·±/–−()-]{1,3}")

#: Most columns a cell may span.
_WIDEST = 50

#: A header has no more rows.
_MOST_HEADS = 6


def read_table(source: str) -> Table:
    """Read a tabular environment, or rows without one."""
    start, end, columns = _inside(source)
    joints = _joints(columns) if "@" in columns or "!" in columns else {}
    table = TableBuilder()
    ruled = False  # whether the header has ended
    for row in _rows(source, start, end):
        shown = [_cell(source, cell) for cell in row]
        if not ruled and table.height and _RULE.search(source, row[0].start, row[0].end):
            ruled = True
            if table.height <= _MOST_HEADS:
                table.head()
        if not any(visible.text.strip() for visible in shown):
            continue  # rules between rows
        if _CAPTION.match(source, row[0].start):
            table.caption(shown[0], row[0].start, row[0].end)
            continue
        table.row(row[0].start)
        cells = [
            _Drawn(visible, cell, _width(source, cell))
            for visible, cell in zip(shown, row, strict=True)
        ]
        for visible, cell, wide in _joined(cells, joints) if joints else cells:
            down = _DEEP.search(source, cell.start, cell.end)
            table.cell(
                visible,
                cell.start,
                cell.end,
                rows=int(down[1]) if down else 1,
                overlaid=True,
                columns=wide,
            )
    return table.build()


class _Drawn(NamedTuple):
    """A cell: what it shows, its place, and how many columns it spans."""

    visible: Visible
    cell: Span
    wide: int


def _width(source: str, cell: Span) -> int:
    wide = _WIDE.match(source, cell.start, cell.end)
    return min(int(wide[1]), _WIDEST) if wide else 1


def _joints(columns: str) -> dict[int, str]:
    """Return the marks that a table prints between two columns, by the number of the first.

    Numbers are so aligned at their decimal mark: ``r@{.}l``.
    """
    found: dict[int, str] = {}
    number = -1
    columns = _REPEATED.sub(lambda part: part[2] * min(int(part[1]), _WIDEST), columns)
    for token in _COLUMN.finditer(columns):
        if token["between"] is not None:
            out = Builder()
            show_tex(out, token["between"], 0, len(token["between"]))
            mark = out.build().text.strip()
            if number >= 0 and _MARK.fullmatch(mark):
                found[number] = mark
        elif token["column"]:
            number += 1
    found.pop(number, None)  # after the last column
    return found


def _joined(cells: Sequence[_Drawn], joints: dict[int, str]) -> Iterator[_Drawn]:
    """Yield cells, those with a mark between them as one; they then span fewer columns."""
    column = 0
    held: _Drawn | None = None
    for drawn in cells:
        last = column + drawn.wide - 1
        inner = sum(number in joints for number in range(column, last))
        drawn = drawn._replace(wide=drawn.wide - inner)
        if held is not None:
            drawn = _pair(held, drawn, joints[column - 1])
        held = drawn if last in joints and drawn.wide == 1 else None
        column = last + 1
        if held is None:
            yield drawn
    if held is not None:
        yield held


def _pair(first: _Drawn, second: _Drawn, mark: str) -> _Drawn:
    """Join two cells, with the mark between them if either shows anything."""
    out = Builder()
    left, right = trimmed(first.visible), trimmed(second.visible)
    out.add(left)
    if left.text or right.text:
        out.put(mark, first.cell.end, second.cell.start)
    out.add(right)
    return _Drawn(out.build(), Span(first.cell.start, second.cell.end), second.wide)


def _inside(source: str) -> tuple[int, int, str]:
    """Return where the rows start and end, and what declares the columns."""
    head = _HEAD.match(source)
    if not head:
        return 0, len(source), ""
    start = head.end()
    columns = ""
    for _ in range(ENVIRONMENT_ARGS.get(head[1], 0)):
        while source[start : start + 1].isspace():
            start += 1
        option = re.compile(r"\[[^\[\]\n]{0,100}\]\s*").match(source, start)
        group = GROUP.match(source, option.end() if option else start)
        columns = group[0][1:-1] if group else ""
        start = group.end() if group else start
    tail = _TAIL.search(source, max(start, len(source) - 80))
    return start, tail.start() if tail else len(source), columns


def _rows(source: str, start: int, end: int) -> list[list[Span]]:
    """Return the cells of each row; what stands in braces or an inner environment is one cell."""
    rows: list[list[Span]] = []
    row: list[Span] = []
    depth = 0
    at = start
    for found in _TOKEN.finditer(source, start, end):
        token = found[0]
        if token == "{" or found[1] == "begin":
            depth += 1
        elif token == "}" or found[1] == "end":
            depth = max(0, depth - 1)
        elif depth == 0 and token == "&":
            row.append(Span(at, found.start()))
            at = found.end()
        elif depth == 0 and (token.startswith("\\\\") or token == "\\tabularnewline"):
            rows.append([*row, Span(at, found.start())])
            row = []
            at = found.end()
    rows.append([*row, Span(at, end)])
    return rows


def _cell(source: str, cell: Span) -> Visible:
    out = Builder()
    show_tex(out, source, cell.start, cell.end)
    return out.build()
