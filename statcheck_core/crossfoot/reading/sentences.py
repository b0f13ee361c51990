"""Where sentences and the items of lists begin and end."""

from __future__ import annotations

from crossfoot.expressions import expression

SENTENCE_END = expression(r"[.!?][)\]\"”’']?\s+(?=\uFFFC?[^\W\d_]|\(|$)|[.!?]\s*$|。")
_ENDS = ".!?。"
#: How far around a result its sentence is looked for, in characters.
_REACH = 600
ABBREVIATION = expression(
    r"\b(?:adj|approx|bzw|ca|cf|coef|corr|e\.g|Eq|est|et al|Fig|i\.e|korr|max|min|n\.s|No|p|part|pp"
    r"|resp|sq|std|Tab|vs|z\.B)\.\s*$"
)
BULLET = expression(r"\n\s*(?:[•*+-]|\d+[.)])\s")


def sentence_around(text: str, start: int, end: int) -> tuple[int, int]:
    """Return the bounds of the sentence, or bullet, that ``text[start:end]`` stands in."""
    first = _sentence_start(text, max(0, start - _REACH), start)
    bullet = text.rfind("\n", first, start)
    while bullet >= 0:
        if BULLET.match(text, bullet):
            first = bullet + 1
            break
        bullet = text.rfind("\n", first, bullet)
    limit = min(len(text), end + _REACH)
    following = SENTENCE_END.search(text, end, limit)
    last = following.start() + 1 if following else limit
    next_bullet = BULLET.search(text, end, last)
    return first, next_bullet.start() if next_bullet else last


def same_sentence(text: str, first: tuple[int, int], second: tuple[int, int]) -> bool:
    """Say whether two places of a text stand in one sentence."""
    (_, start), (end, _) = sorted((first, second))
    match = SENTENCE_END.search(text, start, max(start, end))
    return match is None or bool(ABBREVIATION.search(text, max(0, match.start() - 12), match.end()))


def _sentence_start(text: str, first: int, start: int) -> int:
    """Return where the last sentence that begins in ``text[first:start]`` does, else ``first``."""
    at = start
    while True:
        at = max(text.rfind(mark, first, at) for mark in _ENDS)
        if at < 0:
            return first
        match = SENTENCE_END.match(text, at, start + 1)
        if match is not None and not ABBREVIATION.search(text, max(0, at - 12), at + 2):
            return min(match.end(), start)
