"""Remembering results by content, for as long as they are of use.

While a document is edited, each version of the edited paragraph is seen once and never again,
but all others at every scan. So what is remembered lies in two generations: what is used moves to
the young one, and once enough new results have come in after the whole has been used anew, what
is left in the old one is forgotten. Memory then stays as large as what is in use, however long
one writes.
"""

from __future__ import annotations

from collections.abc import Callable, Hashable
from functools import update_wrapper
from typing import Any, Generic, NamedTuple, ParamSpec, TypeVar, cast

P = ParamSpec("P")
R = TypeVar("R")

#: New results after which what is not used is forgotten.
FRESH = 512

#: Results in one generation at most.
MOST = 2**15

_MISSING: Any = object()


class CacheInfo(NamedTuple):
    """Counts, by the names that :mod:`functools` gives them."""

    hits: int
    misses: int
    maxsize: int
    currsize: int


class Memo(Generic[P, R]):
    """A function that remembers its results; its arguments must be hashable.

    Threads may share it: at worst a result is computed twice.

    Attributes
    ----------
    __wrapped__
        The function itself, for what will not be asked again.
    """

    _young: dict[Hashable, Any]
    _old: dict[Hashable, Any]
    _hits: int
    _misses: int
    _fresh: int
    _seen: int

    def __init__(self, function: Callable[P, R]) -> None:
        self.__wrapped__ = function
        update_wrapper(cast(Any, self), function)
        self.cache_clear()

    def __call__(self, *args: P.args, **kwargs: P.kwargs) -> R:
        """Return what the function returns."""
        key: Hashable = (args, tuple(sorted(kwargs.items()))) if kwargs else args
        found: R = self._young.get(key, _MISSING)
        if found is _MISSING:
            found = self._look(key, args, kwargs)
        else:
            self._hits += 1
        return found

    def _look(self, key: Hashable, args: Any, kwargs: Any) -> R:
        found: R = self._old.pop(key, _MISSING)
        if found is _MISSING:
            found = self.__wrapped__(*args, **kwargs)
            self._misses += 1
            self._fresh += 1
        else:
            self._hits += 1
        young = self._young
        young[key] = found
        used = self._hits - self._seen
        if len(young) >= MOST or (self._fresh >= FRESH and used >= len(young)):
            self._old, self._young = young, {}
            self._fresh, self._seen = 0, self._hits
        return found

    def cache_info(self) -> CacheInfo:
        """Return how often a result was remembered, and how many are."""
        size = len(self._young) + len(self._old)
        return CacheInfo(self._hits, self._misses, 2 * MOST, size)

    def cache_clear(self) -> None:
        """Forget everything."""
        self._young = {}
        self._old = {}
        self._hits = self._misses = 0
        self._fresh = self._seen = 0


def remembered(function: Callable[P, R]) -> Memo[P, R]:
    """Make a function remember its results; see :class:`Memo`."""
    return Memo(function)
