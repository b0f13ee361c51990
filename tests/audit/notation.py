"""Claims in a line of text, for tests that read as examples.

``overall-model: R2=.21 F(3,96)=8.74 p<.001 n=100 [robust] alpha=.01 | df=57`` is a claim of that
kind with these readings, in that context, at that significance level; what follows the bar is
given elsewhere. Numerals stand for what the reading layer says they stand for.
"""

from __future__ import annotations

import re

from crossfoot.laws.quantities import QUANTITIES
from crossfoot.model import Claim, Reading, Span
from crossfoot.reading.fold import ON_THE_LINE
from crossfoot.reading.numerals import bounds, parse

_KIND = re.compile(r"\s*([a-z-]+):\s*")
_READING = re.compile(r"([A-Za-z]\w*)(?::(\w+))?(?:\(([^)]*)\))?([=<>≤≥≈])(\S+)")
_CONTEXT = re.compile(r"\[([^\]]*)\]")
_FREEDOM = {"F": ("df1", "df2"), "F_change": ("df1", "df2")}


def claim(text: str) -> Claim:
    """Return the claim that a line of text describes."""
    kind = _KIND.match(text)
    assert kind is not None
    context = _CONTEXT.search(text)
    body = _CONTEXT.sub(lambda match: " " * len(match.group()), text)
    bar = body.find("|") if "|" in body else len(body)
    own, given = _readings(body, kind.end(), bar), _readings(body, bar, len(body))
    alpha = [reading for reading in own if reading.quantity == "alpha"]
    own = [reading for reading in own if reading.quantity != "alpha"]
    return Claim(
        kind[1],
        own[0].quantity,
        text[kind.end() :].strip(),
        Span(kind.end(), len(text)),
        tuple(own),
        tuple(sorted(context[1].split())) if context else (),
        float(alpha[0].literal) if alpha else None,
        tuple(given),
    )


def _readings(text: str, start: int, end: int) -> list[Reading]:
    found = []
    for match in _READING.finditer(text, start, end):
        name, term, inside, relation, literal = match.groups()
        freedom = [part.strip() for part in inside.split(",")] if inside else []
        for df, number in zip(_FREEDOM.get(name, ("df",)), freedom, strict=False):
            place = text.index(number, match.start(3))
            found.append(reading(df, "=", number, term, place))
        found.append(reading(name, relation, literal, term, match.start(5)))
    return found


def reading(
    quantity: str, relation: str, literal: str, term: str | None = None, place: int = 0
) -> Reading:
    """Return a reading as the reading layer makes it."""
    folded = literal.replace("−", "-").translate(ON_THE_LINE)
    numeral = parse(folded, decimal_comma="," in literal, whole=QUANTITIES[quantity].whole)
    assert numeral is not None, literal
    low, high = bounds(relation, numeral)
    if quantity == "ci_level":
        low = high = numeral.value
    span = Span(place, place + len(literal))
    return Reading(quantity, relation, literal, low, high, span, term)
