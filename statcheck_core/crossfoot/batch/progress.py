"""How far a long scan is, for a person who watches; nothing at all for anyone else."""

from __future__ import annotations

from collections.abc import Iterator
from time import monotonic
from typing import TextIO

from crossfoot.model import Report

#: Seconds of silence before a bar is worth its place on the screen.
PATIENCE = 1.5


def watched(
    reports: Iterator[Report], total: int, stream: TextIO, patience: float = PATIENCE
) -> Iterator[Report]:
    """Pass reports on and, on a terminal and after a while, show a bar on ``stream``.

    The bar is taken off the screen while whoever receives a report may be printing it.
    """
    if not stream.isatty():
        yield from reports
        return
    start = monotonic()
    bar = None
    try:
        for done, report in enumerate(reports, 1):
            if bar is None and monotonic() - start >= patience:
                from tqdm import tqdm  # a run this long no longer feels its import

                bar = tqdm(total=total, file=stream, leave=False, unit=" documents")
            if bar is not None:
                bar.n = done
                bar.clear()
            yield report
            if bar is not None:
                bar.refresh()
    finally:
        if bar is not None:
            bar.close()
