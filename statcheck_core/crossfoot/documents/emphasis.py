"""Emphasis in Markdown: which runs of ``*`` and ``_`` are marks, and which are text.

The rules of CommonMark 0.31, section 6.2; significance stars (``-.57***``) stay, because nothing
before them is left to close.
"""

from __future__ import annotations

from typing import NamedTuple


class Run(NamedTuple):
    """A run of one delimiter."""

    start: int
    end: int
    char: str
    opens: bool
    closes: bool


def run_of(source: str, start: int, end: int, low: int, high: int) -> Run:
    """Return the run at ``start`` as it stands between its neighbours in ``source[low:high]``."""
    before = source[start - 1] if start > low else " "
    after = source[end] if end < high else " "
    space_before, space_after = before.isspace(), after.isspace()
    # A raised digit is no part of a word: `_R_²` is an R in italics.
    word_before = before.isalpha() or before.isdecimal() or space_before
    word_after = after.isalpha() or after.isdecimal() or space_after
    left = not space_after and (word_after or space_before or not word_before)
    right = not space_before and (word_before or space_after or not word_after)
    if source[start] == "_":
        return Run(
            start,
            end,
            "_",
            left and (not right or not word_before),
            right and (not left or not word_after),
        )
    return Run(start, end, "*", left, right)


class _Open(NamedTuple):
    """A run that may still be closed: where its unused characters lie."""

    start: int
    end: int
    run: Run


def emphasis_edits(runs: list[Run]) -> list[tuple[int, int]]:
    """Return the stretches that are marks of emphasis."""
    marks: list[tuple[int, int]] = []
    stack: list[_Open] = []
    floors: dict[tuple[str, bool, int], int] = {}  # below which no opener fits such a closer
    for run in runs:
        start = run.start
        if run.closes:
            start = _close(run, stack, floors, marks)
        if start < run.end and run.opens:
            stack.append(_Open(start, run.end, run))
    return marks


def _close(
    run: Run,
    stack: list[_Open],
    floors: dict[tuple[str, bool, int], int],
    marks: list[tuple[int, int]],
) -> int:
    """Match a closing run with the openers before it; return where its unused rest starts."""
    start = run.start
    key = (run.char, run.opens, (run.end - run.start) % 3)
    while start < run.end:
        index = _opener(run, stack, floors.get(key, 0))
        if index is None:
            floors[key] = len(stack)
            return start
        opener = stack[index]
        width = 2 if min(run.end - start, opener.end - opener.start) >= 2 else 1
        marks.append((opener.end - width, opener.end))
        marks.append((start, start + width))
        start += width
        del stack[index:]
        if opener.start < opener.end - width:
            stack.append(opener._replace(end=opener.end - width))
        for other in floors:
            floors[other] = min(floors[other], len(stack))
    return start


def _opener(run: Run, stack: list[_Open], floor: int) -> int | None:
    """Return the index of the nearest opener that ``run`` may close."""
    length = run.end - run.start
    for index in range(len(stack) - 1, floor - 1, -1):
        opener = stack[index]
        if opener.run.char != run.char:
            continue
        total = length + opener.run.end - opener.run.start
        both = run.opens or opener.run.closes
        if not (both and total % 3 == 0 and length % 3 != 0):
            return index
    return None
