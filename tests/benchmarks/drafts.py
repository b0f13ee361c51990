"""Plain prose with a consistent result every so often, the same in every run."""

from __future__ import annotations

import random

_PLAIN = """
the measured height of each bank along a plot was taken twice in a season by teams who walked every
transect and wrote what they read in field books that were typed up later in the year
"""
_WORDS = _PLAIN.split()


def _sentences(random_: random.Random, length: int) -> str:
    sentences: list[str] = []
    while sum(map(len, sentences)) < length:
        words = " ".join(random_.choice(_WORDS) for _ in range(12))
        sentences.append(words.capitalize() + ".")
    return " ".join(sentences)


def _result(random_: random.Random) -> str:
    df1, df2 = random_.randint(1, 6), random_.randint(40, 300)
    share = round(random_.uniform(0.3, 0.8), 2)
    F = (share / df1) / ((1 - share) / df2)
    return f"The model fit, *R*² = {share:.2f}, *F*({df1}, {df2}) = {F:.2f}, *p* < .001."


def draft(size: int, every: int, *, break_lines: bool = True, seed: int = 7) -> str:
    """Return about ``size`` characters of Markdown with a result every ``every`` characters."""
    random_ = random.Random(seed)
    apart = "\n\n" if break_lines else " "
    parts: list[str] = []
    written = 0
    while written < size:
        part = (
            f"{_sentences(random_, every // 2)} {_result(random_)}{apart}"
            f"{_sentences(random_, every // 2 - 80)}{apart}"
        )
        parts.append(part)
        written += len(part)
    return "".join(parts)
