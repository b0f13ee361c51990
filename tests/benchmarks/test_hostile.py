"""Texts that are meant to hurt, through the whole scan: what a megabyte costs, and how it grows.

    python -m pytest tests/benchmarks/test_hostile.py -s

Times are of the processor. A text is linear where twice as much of it takes about twice as long.
What takes longer than a second for a megabyte either is full of numbers behind a relation, each
of which is read (some 30 µs, as in any text), or of paragraphs, lines or tags of a few characters,
which take a microsecond or two each.
"""

from __future__ import annotations

import json
import time
from typing import Any

import pytest

from crossfoot.audit import audit_claim
from crossfoot.documents import FORMATS
from crossfoot.documents.markdown import _remembered
from crossfoot.reading import read_block
from crossfoot.reading.contexts import cues_in
from crossfoot.scan import scan_text

MEGABYTE = 1_000_000

#: Of each text; what it costs is told for a megabyte.
SIZE = MEGABYTE // 4

#: Repeated without end: brackets, digits, spaces, unclosed math, tables, tags, entities, emphasis,
#: tiny paragraphs, nesting, code, numbers.
PARTS = [
    *"1 \t\n$\\|<&*_`[(){}^~#=%@-+,é0²:;!'\"",
    *("F(((((", "F(1,", "F ", "t(", "R2 ", "df ", "95% CI [", "p = ", "= 1 ", "1,", "0.", "10^"),
    *("F(1, 58) = ", "p = .05, ", "R2 = .3, F(1, 58) = 4.2; ", "32% and 40% of the variance "),
    *("$a ", "$$\n", "$a=1$ ", "\\(", "\\[", "\\frac{", "\\begin{", "\\begin{table}\n", "\\verb|"),
    *("\\newcommand{\\x}{\\x\\x}\\x", "\\x{1}=", "**a* ", "*a ", "_a ", "*a*=1 ", "^a^ ", "`a "),
    *("<a", "<a ", "<a>", "<p>", "<p>1", "<table>", "<table><tr><td>", "<math>", "<!--", "<sup>"),
    *("<sub>2</sub>", "&a", "&amp;", "&#50;", "[](", "[a](", "![", "[^1] ", "[^1]: a\n\n", "{{"),
    *("| a | b |\n", "|-\n", "| 1 | = 2 |\n", "|===\n", "1\t1\n", "a  b  1\n", "a = 1\n", "1\n"),
    *(
        "a\n\n",
        "1\n\n",
        "x = 1\n\n",
        "# a\n",
        "> ",
        "- ",
        "  - a\n",
        "    a\n\n",
        "---\n",
        "====\n",
    ),
    *("```\n", "'''", "....\n", ".. a::\n", "#+begin_src\n", ":a: b\n", "{cite}`a` ", "\r", "\r\n"),
    *("a" * 50 + " ", "word ", "\u200b", "\ufeff", "\u2028", "\ud800", "\u202f1", "−.3 ", "ð¼Þ"),
]

#: Growth that tells the square of a size from the size itself, on a busy machine too.
MOST = 3.0

#: Seconds below which a time says too little.
LEAST = 0.02


def cost(text: str, language: str) -> float:
    """Return the seconds of the processor that a scan takes of which nothing is remembered."""
    for memory in (read_block, cues_in, audit_claim, _remembered):
        memory.cache_clear()
    start = time.process_time()
    scan_text(text, language)
    return time.process_time() - start


def hostile(part: str, size: int, language: str) -> str:
    """Return a text of a size; of a notebook, one that has it in a cell."""
    text = (part * (size // len(part) + 1))[:size]
    if language != "notebook":
        return text
    cell = {"cell_type": "markdown", "metadata": {}, "source": text}
    return json.dumps({"cells": [cell], "metadata": {}, "nbformat": 4, "nbformat_minor": 5})


def growth(part: str, language: str) -> tuple[float, float]:
    """Return what a megabyte costs, and how many times as much the whole text as its half."""
    half, whole = (hostile(part, size, language) for size in (SIZE // 2, SIZE))
    least, most = cost(half, language), cost(whole, language)
    if most > MOST * max(least, LEAST):  # disturbed, perhaps
        least, most = cost(half, language), min(most, cost(whole, language))
    return most * MEGABYTE / SIZE, most / max(least, LEAST)


@pytest.mark.parametrize("language", [*FORMATS])
def test_hostile_text(benchmark: Any, language: str) -> None:
    cost("F(1, 58) = 4.20, p = .045", language)  # all that is imported once is imported now
    found = {part: growth(part, language) for part in PARTS}
    benchmark.pedantic(lambda: None, rounds=1)
    slowest = sorted(found.items(), key=lambda item: -item[1][0])
    benchmark.extra_info["slow"] = {part: round(whole, 2) for part, (whole, _) in slowest[:10]}
    print(
        f"\n{language}: {sum(whole < 1 for whole, _ in found.values())} of {len(found)} below 1 s"
    )
    for part, (whole, times) in slowest[:10]:
        print(f"  {whole:5.2f} s, {times:.1f} times its half  {part!r}")
    assert not {part: times for part, (_, times) in found.items() if times > MOST}
