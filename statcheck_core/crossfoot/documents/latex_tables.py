r"""The tables of LaTeX: rows between ``\\\\``, cells between ``&``."""

from __future__ import annotations

import re

from crossfoot.documents.latex_macros import GROUP
from crossfoot.documents.mathtext import show_tex
from crossfoot.documents.table import Table, TableBuilder
from crossfoot.documents.tex_symbols import ENVIRONMENT_ARGS
from crossfoot.documents.visible import Builder, Visible
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

#: Most columns a cell may span.
_WIDEST = 50

#: A header has no more rows.
_MOST_HEADS = 6


def read_table(source: str) -> Table:
    """Read a tabular environment, or rows without one."""
    start, end = _inside(source)
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
        for visible, cell in zip(shown, row, strict=True):
            wide = _WIDE.match(source, cell.start, cell.end)
            down = _DEEP.search(source, cell.start, cell.end)
            table.cell(
                visible,
                cell.start,
                cell.end,
                rows=int(down[1]) if down else 1,
                overlaid=True,
                columns=min(int(wide[1]), _WIDEST) if wide else 1,
            )
    return table.build()


def _inside(source: str) -> tuple[int, int]:
    """Return where the rows start and end."""
    head = _HEAD.match(source)
    if not head:
        return 0, len(source)
    start = head.end()
    for _ in range(ENVIRONMENT_ARGS.get(head[1], 0)):
        while source[start : start + 1].isspace():
            start += 1
        option = re.compile(r"\[[^\[\]\n]{0,100}\]\s*").match(source, start)
        group = GROUP.match(source, option.end() if option else start)
        start = group.end() if group else start
    tail = _TAIL.search(source, max(start, len(source) - 80))
    return start, tail.start() if tail else len(source)


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
