"""The threads that read documents."""

from __future__ import annotations

from collections.abc import Callable
from concurrent.futures import ThreadPoolExecutor
from typing import NamedTuple


class Workers(NamedTuple):
    """Threads for reading.

    Attributes
    ----------
    long
        For what may take seconds.
    short
        One thread, for texts of which all but a little is remembered: it always runs on warm
        caches.
    """

    long: ThreadPoolExecutor
    short: ThreadPoolExecutor

    def submit(self, function: Callable[[], object]) -> None:
        """Have something done some time."""
        self.long.submit(function)

    def give_up(self) -> None:
        """Begin nothing more."""
        for threads in self:
            threads.shutdown(wait=False, cancel_futures=True)


def make_workers() -> Workers:
    """Return threads that start when they are first needed."""
    return Workers(
        ThreadPoolExecutor(2, "crossfoot-long"), ThreadPoolExecutor(1, "crossfoot-short")
    )
