"""Patterns in the syntax of ``.gitignore``.

``pathspec`` takes longer to import than a manuscript takes to scan, so it is imported only where
there is a pattern to match.
"""

from __future__ import annotations

import re
import warnings
from typing import TYPE_CHECKING, NamedTuple

if TYPE_CHECKING:
    from collections.abc import Iterable

    from pathspec import GitIgnoreSpec


class Rules(NamedTuple):
    """The patterns that hold from a folder downwards; ``base`` is its absolute path."""

    base: str
    spec: GitIgnoreSpec


def compiled(base: str, lines: Iterable[str]) -> Rules:
    """Return the rules that these lines make; like git, leave out lines that are no pattern."""
    from pathspec import GitIgnoreSpec

    with warnings.catch_warnings():
        warnings.simplefilter("ignore")  # re has opinions on the sets of other people's patterns
        return Rules(base, GitIgnoreSpec.from_lines(line for line in lines if is_pattern(line)))


def is_pattern(line: str) -> bool:
    """Tell whether a line can be understood as a pattern (or as a comment)."""
    from pathspec import GitIgnoreSpec

    try:
        GitIgnoreSpec.from_lines([line])
    except (ValueError, re.error):  # re.error: pathspec hands on sets such as [z-a] as they are
        return False
    return True
