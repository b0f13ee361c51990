"""The role that a heading, or the label of a row, names."""

from __future__ import annotations

import re
from collections.abc import Iterable, Mapping

from crossfoot.reading.tables.vocabulary import ROLES

_POINT = re.compile(r"(?<=\d)\.(?=\d)")
_DROPPED = str.maketrans("", "", " \t\u00a0.-_:'’*\\,–—$")
_SCRIPTS = (
    (re.compile(r"\^\{2\}|²|\^2"), "2"),
    (re.compile(r"\^\{[a-z0-9*†‡]{1,3}\}"), ""),
    (re.compile(r"[_^]\{([^{}]*)\}"), r"\1"),
)
_SUBSCRIPTS = str.maketrans("₀₁₂₃₄₅₆₇₈₉ₚ∆δ値", "0123456789pΔΔ值")


def _key(text: str) -> str:
    """Return a name without what may differ between two ways to write it."""
    return _POINT.sub("·", text).translate(_DROPPED)


#: Tests by their symbols, and what may follow a symbol where it is named in words.
_STEMS = {"F": "f", "t": "t", "z": "z", "chi2": "χ2 chi2 chisq chisquare x2", "r": "r", "p": "p"}
_BEHIND = "value values val vals wert"
_BEHIND_TEST = "stat stats statistic statistics ratio test"


def _named_in_words() -> Iterable[tuple[str, str]]:
    """Yield names such as ``t value``, ``F stat`` and ``z ratio`` with their roles."""
    for role, stems in _STEMS.items():
        behind = _BEHIND if role in {"p", "r"} else f"{_BEHIND} {_BEHIND_TEST}"
        yield from ((stem + word, role) for stem in stems.split() for word in behind.split())
        if role not in {"p", "r"}:
            yield from (("teststatistic" + stem, role) for stem in stems.split())


def _keys() -> tuple[Mapping[str, str], Mapping[str, str]]:
    symbols: dict[str, str] = {}
    words: dict[str, str] = dict(_named_in_words())
    for declared in ROLES:
        for symbol in declared.symbols.split():
            symbols.setdefault(_key(symbol), declared.role)
        for word in declared.words.split():
            words.setdefault(_key(word.lower()), declared.role)
    return symbols, words


_SYMBOLS, _WORDS = _keys()
#: What may stand with the symbol of a test that was carried out, unlike a critical value.
_COMPUTED = re.compile(
    r"(?<![a-z])(?:calc(?:ulated|\.)?|cal\.?|comp(?:uted|\.)?|obs(?:erved|\.)?|emp(?:irical|\.)?|value"
    r"|stat(?:istics?|\.)?|ratio|test|score)(?![a-z])",
    re.IGNORECASE,
)
_TESTS = frozenset({"F", "t", "z", "chi2", "r", "F_change", "wald"})
#: No heading is longer, so nothing longer is looked up.
_LONGEST = 60


def plain(text: str) -> str:
    """Return a folded heading without raised and lowered braces and footnote marks."""
    for pattern, replacement in _SCRIPTS:
        text = pattern.sub(replacement, text)
    return text.translate(_SUBSCRIPTS)


def role_of(text: str) -> str | None:
    """Return the role that a heading, or the label of a row, names as a whole."""
    if len(text) > _LONGEST:
        return None
    key = _key(plain(text))
    if key in _SYMBOLS:
        return _SYMBOLS[key]
    if len(key) < 2:
        return None
    role = _WORDS.get(key.lower().replace("δ", "Δ")) or _WORDS.get(key.lower())
    return role or _qualified(text)


def _qualified(text: str) -> str | None:
    """Return the role of the symbol of a test with a word that says that it was computed."""
    word = _COMPUTED.search(text)
    if word is None:
        return None
    rest = text[: word.start()] + text[word.end() :]
    role = role_of(rest) if rest.strip() else None
    return role if role in _TESTS else None
