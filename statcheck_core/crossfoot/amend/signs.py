"""Relation signs in the source: where one stands before a number, and how another is written."""

from __future__ import annotations

from typing import NamedTuple

from crossfoot.expressions import expression
from crossfoot.model import Span

_SIGN = expression(
    r"(?P<sign>&(?:lt|gt|le|ge|equals|#6[0-2]|#x3[C-Ec-e]);"
    r"|\\(?:leq?|geq?|leqslant|geqslant|lt|gt|approx|textless|textgreater)(?![A-Za-z])(?:\{\})?"
    r"|[=<>≤≥≈])"
    r"(?P<gap>(?:[\s~${}]|\\[,;: ]|&nbsp;|&#160;|&thinsp;){0,12})$"
)

#: How far before a number its sign may stand.
_REACH = 60

_ENTITIES = {"<": "&lt;", ">": "&gt;"}
_COMMANDS = {"<": "<", ">": ">", "≤": r"\le ", "≥": r"\ge ", "≈": r"\approx ", "=": "="}


class Sign(NamedTuple):
    """A sign in a source: where it stands, and what is written there."""

    span: Span
    printed: str


def sign_before(source: str, at: int) -> Sign | None:
    """Return the relation sign that stands before the number at ``at``."""
    start = max(0, at - _REACH)
    found = _SIGN.search(source[start:at])
    if found is None:
        return None
    span = Span(start + found.start("sign"), start + found.end("sign"))
    return Sign(span, found["sign"])


def written_sign(relation: str, language: str, source: str, at: int) -> str:
    """Return how a relation is written at a place in a source."""
    if language in ("html", "jats"):
        return _ENTITIES.get(relation, relation)
    if language == "latex":
        sign = _COMMANDS[relation]
        return (
            sign.rstrip()
            if relation == "=" or (in_mathematics(source, at) and sign in "<>")
            else (sign if in_mathematics(source, at) else f"${sign.strip()}$")
        )
    return relation


def in_mathematics(source: str, at: int) -> bool:
    r"""Say whether a place lies between dollars or ``\(`` and ``\)``."""
    before = source[:at].replace("\\\\", "").replace(r"\$", "")
    if before.count("$") % 2:
        return True
    return before.rfind(r"\(") > before.rfind(r"\)") or before.rfind(r"\[") > before.rfind(r"\]")
