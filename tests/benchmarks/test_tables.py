"""What a table of five thousand rows costs beside shorter ones: linear time, in each form.

``pytest tests/benchmarks/test_tables.py -s`` prints a line each. Nothing fails for being slow.
"""

from __future__ import annotations

import time
from collections.abc import Callable, Sequence
from typing import Any

import pytest

from crossfoot.audit import _judged, audit_claim
from crossfoot.reading import read_block
from crossfoot.reading.contexts import cues_in
from crossfoot.scan import scan_text

Rows = Sequence[Sequence[str]]
SIZES = (1250, 2500, 5000)


def pipe(rows: Rows) -> str:
    lines = ["| " + " | ".join(row) + " |" for row in rows]
    return "\n".join([lines[0], "|" + "---|" * len(rows[0]), *lines[1:]]) + "\n"


def html(rows: Rows) -> str:
    cells = ["".join(f"<td>{cell.replace('<', '&lt;')}</td>" for cell in row) for row in rows]
    return "<table>" + "\n".join(f"<tr>{row}</tr>" for row in cells) + "</table>\n"


def latex(rows: Rows) -> str:
    body = "\n".join(" & ".join(row).replace("<", "$<$") + r" \\" for row in rows)
    return f"\\begin{{tabular}}{{{'r' * len(rows[0])}}}\n{body}\n\\end{{tabular}}\n"


def aligned(rows: Rows) -> str:
    return "```\n" + "\n".join("  ".join(f"{cell:>10}" for cell in row) for row in rows) + "\n```\n"


WRITERS: dict[str, tuple[str, Callable[[Rows], str]]] = {
    "pipe": ("markdown", pipe),
    "html": ("html", html),
    "latex": ("latex", latex),
    "aligned": ("markdown", aligned),
}


def effects(count: int) -> Rows:
    """Tests, a row each, of which every second is wrong."""
    rows = [["Measure", "df1", "df2", "F", "p"]]
    return rows + [[f"m{i}", "2", "57", "4.31", ".018" if i % 2 else ".181"] for i in range(count)]


def coefficients(count: int) -> Rows:
    rows = [["Predictor", "b", "SE", "t", "p"]]
    return rows + [[f"x{i}", "0.52", "0.11", "4.73", "<.001"] for i in range(count)]


def variance(count: int) -> Rows:
    rows = [["Source", "SS", "df", "MS", "F", "p"]]
    rows += [[f"x{i}", "12.20", "1", "12.20", "3.56", ".064"] for i in range(count)]
    return [*rows, ["Error", "205.80", "60", "3.43", "", ""]]


def seconds(text: str, language: str, claims: int) -> float:
    for memory in (read_block, cues_in, audit_claim, _judged):
        memory.cache_clear()
    start = time.process_time()
    report = scan_text(text, language)
    taken = time.process_time() - start
    assert len(report.claims) >= claims
    return taken


@pytest.mark.parametrize("kind", [effects, coefficients, variance])
@pytest.mark.parametrize("writer", WRITERS)
def test_growth(benchmark: Any, writer: str, kind: Callable[[int], Rows]) -> None:
    language, write = WRITERS[writer]
    seconds(write(kind(50)), language, 1)  # all is imported by now
    times = [seconds(write(kind(size)), language, size) for size in SIZES]
    benchmark.pedantic(read_block.cache_clear, rounds=1)
    measured = ", ".join(f"{taken:.2f}" for taken in times)
    what = f"{kind.__name__} in {writer}, s at {', '.join(map(str, SIZES))} rows"
    benchmark.extra_info.update(what=what, measured=measured, aim="twice as long each time")
    print(f"\n{what}: {measured} (aim: twice as long each time)")
