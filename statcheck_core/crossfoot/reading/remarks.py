"""Remarks: what an author tells Crossfoot in a comment of the document.

``crossfoot: allow p-from-f because …`` settles findings; ``crossfoot: assume one-sided`` states
a context to the end of its section, ``crossfoot: assume alpha .01`` a significance level.
"""

from __future__ import annotations

import re
from typing import NamedTuple

from crossfoot.expressions import expression
from crossfoot.model import Problem, Span

#: What may be assumed, beside ``alpha``: contexts of a claim.
ASSUMABLE = (
    "one-sided",
    "two-sided",
    "no-intercept",
    "robust",
    "weighted",
    "instrumental",
    "mixed",
    "survey",
    "generalised",
    "adjusted-df",
    "adjusted-p",
    "pseudo-r2",
    "repeated-measures",
    "imputed",
    "resampled",
)

_REMARK = expression(r"\s*crossfoot\s*:\s*(?P<verb>\w+)\s*(?P<rest>.*)", re.IGNORECASE | re.DOTALL)
_ALLOW = expression(r"(?P<slugs>[\w\s,-]*?)\s+because\s+(?P<reason>\S.*)", re.DOTALL)
_ALPHA = expression(r"alpha\s*=?\s*(?P<level>0?[.,]\d+)")


class Allow(NamedTuple):
    """Findings to settle: of the identities named, or of ``all`` in the block."""

    span: Span
    slugs: tuple[str, ...]
    reason: str


class Assume(NamedTuple):
    """A context, or a significance level, that holds from here to the end of the section."""

    span: Span
    context: str | None
    alpha: float | None


def parse(comment: str, span: Span) -> Allow | Assume | Problem | None:
    """Return what a comment tells Crossfoot.

    None where it does not speak to Crossfoot; a problem where it does and can't be understood.
    """
    match = _REMARK.match(comment)
    if match is None:
        return None
    verb, rest = match["verb"].lower(), " ".join(match["rest"].split())
    if verb == "allow":
        return _allow(rest, span)
    if verb == "assume":
        return _assume(rest, span)
    return Problem(f"Remark not understood: “{verb}” is neither “allow” nor “assume”.", span)


def _allow(rest: str, span: Span) -> Allow | Problem:
    match = _ALLOW.fullmatch(" " + rest)
    if match is None or not match["slugs"].strip():
        return Problem(
            "Remark without a reason: write “allow IDENTITY because REASON” "
            "or “allow all because REASON”.",
            span,
        )
    slugs = tuple(re.split(r"[,\s]+", match["slugs"].strip(" ,")))
    return Allow(span, slugs, match["reason"].strip())


def _assume(rest: str, span: Span) -> Assume | Problem:
    words = re.split(r"\s+because\s+", rest)[0].strip().lower()
    level = _ALPHA.fullmatch(words)
    if level is not None:
        value = float(level["level"].replace(",", "."))
        if 0 < value < 1:
            return Assume(span, None, value)
    if words in ASSUMABLE:
        return Assume(span, words, None)
    known = ", ".join(ASSUMABLE)
    return Problem(
        f"Remark not understood: “{words}” can't be assumed; known are alpha, {known}.", span
    )
