"""Patterns that are compiled when first used: most documents need few of them."""

from __future__ import annotations

import re
from collections.abc import Callable
from functools import cache


def lazily(pattern: str, flags: int = 0) -> Callable[[], re.Pattern[str]]:
    """Return a function that returns the compiled pattern."""

    @cache
    def compiled() -> re.Pattern[str]:
        return re.compile(pattern, flags)

    return compiled
