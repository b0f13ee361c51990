"""Printouts: text that stands as a program wrote it, but for the marks a report puts before it."""

from __future__ import annotations

import re
from collections import Counter

from crossfoot.documents.visible import Builder, Visible, verbatim
from crossfoot.expressions import expression

#: What report writers put before each line of a program's output.
_PREFIX = expression(r"^[ \t]*(#>|##|#|%|FALSE|>)(?: |(?=\n|$))", re.M)


def show_printout(source: str) -> Visible:
    """Show a printout without the one prefix that its lines share (``## ``, ``#> ``, ``% ``).

    Lines without the prefix are code between the output and stay; ``>`` is a prompt unless
    every line has it.
    """
    counts = Counter(found.group(1) for found in _PREFIX.finditer(source))
    lines = source.count("\n") + 1 - source.endswith("\n")
    if counts[">"] < lines:
        del counts[">"]
    if not counts:
        return verbatim(source)
    chosen = counts.most_common(1)[0][0]
    out = Builder()
    position = 0
    for found in _PREFIX.finditer(source):
        if found.group(1) == chosen:
            out.keep(source, position, found.start())
            position = found.end()
    out.keep(source, position, len(source))
    return out.build()
