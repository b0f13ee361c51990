"""Regular expressions that are compiled when they are first used.

A document needs few of the expressions that all formats and notations have together, and
compiling them all would take longer than to scan it.
"""

from __future__ import annotations

import re
from collections.abc import Iterable
from itertools import groupby
from typing import Any, AnyStr, cast

_METHODS = ("findall", "finditer", "fullmatch", "match", "pattern", "search", "split", "sub")


class _Expression:
    """What stands for a compiled expression until it has been compiled, and behind it after."""

    def __init__(self, source: str | bytes, flags: int) -> None:
        self._source = source
        self._flags = flags

    def __getattr__(self, name: str) -> Any:
        """Compile the expression; from then on its methods are found without coming here."""
        if name not in _METHODS:
            raise AttributeError(name)
        compiled = re.compile(self._source, self._flags)
        self.__dict__.update({method: getattr(compiled, method) for method in _METHODS})
        return self.__dict__[name]


def expression(source: AnyStr, flags: int = 0) -> re.Pattern[AnyStr]:
    """Return the expression that :func:`re.compile` would, compiled when it is first used."""
    return cast("re.Pattern[AnyStr]", _Expression(source, flags))


def any_of(words: Iterable[str]) -> re.Pattern[str]:
    """Return an expression for any of some words, which needs no look at each at every place."""
    choices = [
        re.escape(first) + f"(?:{'|'.join(re.escape(word[1:]) for word in group)})"
        for first, group in groupby(sorted(words, reverse=True), key=lambda word: word[:1])
    ]
    return expression("|".join(choices))
