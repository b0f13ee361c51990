"""What a table says of itself: its caption and notes, apart from results printed there."""

from __future__ import annotations

import itertools
import math
import re
from typing import NamedTuple

from crossfoot.reading import numerals
from crossfoot.reading.contexts import cues_in
from crossfoot.reading.items import Part
from crossfoot.reading.tables.contents import Number

#: Where marks are explained: ``*p < .05``, ``** p<0.01``, ``'***' 0.001``, ``* significant at 5%``.
_MARK = r"(?P<mark>\*{1,4}|†{1,2}|‡|(?<![\w.])\+(?=\s?p))"
_LEVEL = r"(?P<level>0?[.,]\d{1,4}|\d{1,2}(?:\.\d)?\s?%)"
_SAID = re.compile(
    rf"{_MARK}['\s.]{{0,2}}(?:[Cc]orrelation\sis\s)?(?:=|:|\(|denotes|indicates|means|for)?\s?(?:[pP](?:[\s-]?values?)?\s?(?:[<≤]|less\sthan)=?\s?|[<≤]\s?"
    rf"|(?:statistically\s)?(?:significant|significance|sig\.?)\s(?:at|level:?)\s(?:the\s)?(?:p\s?[<≤]\s?)?)?{_LEVEL}"
)
_SAID_AFTER = re.compile(rf"[pP]\s?[<≤]\s?{_LEVEL}\s?(?:=|:|\()?\s?{_MARK}")
_LISTED = re.compile(
    r"(?P<marks>\*{1,4}(?:\s?(?:,|;|and|/|&|,\sand)\s?\*{1,4}){1,3})(?P<words>[^.*]{0,80}?)"
    r"(?P<levels>(?:0?[.,]\d{1,4}|\d{1,2}(?:\.\d)?\s?%?)(?:\s?(?:,|;|and|/|&|,\sand)\s?(?:0?[.,]\d{1,4}|\d{1,2}(?:\.\d)?\s?%?)){1,3})"
)
_ONE = re.compile(r"0?[.,]\d{1,4}|\d{1,2}(?:\.\d)?\s?%?")
_ENCLOSED = (
    r"(?:parenthes[ei]s|brackets?|square\sbrackets|round\sbrackets"
    r"|parens|Klammern|parenthèses|paréntesis|括号内?)"
)
_KINDS = (
    ("sd", r"standard\sdeviations?|\bSDs?\b|std\.?\sdev"),
    ("ci", r"confidence\sintervals?|\bCIs?\b|confidence\slimits"),
    ("se", r"(?:standard|std\.?)\s?err(?:ors?|\.)?|\bS\.?E\.?s?\b|\bs\.e\."
        r"|Standardfehler|erreurs?[\s-]types?|标准误"
     r"|errores\sestándar"),
    ("p", r"\bp[\s-]?(?:values?|Werte?)|\bp\b(?=\sin\b)|p值"),
    ("t", r"\bt[\s-]?(?:stat(?:istic)?s?|values?|ratios?|Werte?|scores?)"
        r"|\bt\b(?=\sin\b)|t值|\bT-statistics?"),
    ("z", r"\bz[\s-]?(?:stat(?:istic)?s?|values?|ratios?|scores?)"),
)  # fmt: skip
_KIND_WORDS = tuple((kind, re.compile(pattern, re.IGNORECASE)) for kind, pattern in _KINDS)
_WHERE = re.compile(
    rf"\bin\s(?:the\s)?{_ENCLOSED}|\b(?:the\s)?{_ENCLOSED}|\bbelow\b|underneath", re.IGNORECASE
)
_STOP = re.compile(r"[.;](?=\s|$)|\n|[*†]")
_ABSOLUTE = re.compile(r"absolute", re.IGNORECASE)
_CASES = re.compile(
    r"(?<![\w.])(?P<name>[Nn])(?:_\{(?:total|obs)\})?\s?=\s?"
    r"(?P<number>\d{1,3}(?:[,  ]\d{3})+(?!\d)|\d+)(?P<more>\s?[-–—]\s?\d)?"
    r"|(?<![\w.])(?P<told>\d{1,3}(?:,\d{3})+(?!\d)|\d+)\s(?:observations|participants|cases|respondents)\b"
)
_DF = re.compile(
    r"(?<![\w.(])(?:d\.?f\.?|degrees\sof\sfreedom)\s?(?:=|are|is|were|of)?\s?"
    r"\(?(?P<a>\d{1,7})(?:\s?(?:,|and)\s?(?P<b>\d{1,9}))?\)?(?!\d|\.\d)"
)
#: Levels that marks stand for where a table does not say.
DEFAULT = {"*": 0.05, "**": 0.01, "***": 0.001}


class Mark(NamedTuple):
    """What a significance mark stands for: ``p`` below ``level``; with the place of that."""

    level: float
    literal: str
    start: int
    end: int


class Legend(NamedTuple):
    """What a table says of itself.

    Attributes
    ----------
    marks
        What each mark stands for, by the table's own words.
    enclosed
        What a number in brackets is (``se``, ``t``, ``z``, ``p``, ``ci``, ``sd``), if it is told.
    absolute
        Whether t statistics are printed without their sign.
    cases
        The number of cases, if one is told.
    df
        Degrees of freedom told for all tests, one or two.
    contexts
        What the words mean for every result.
    alpha
        The significance level that they state.
    """

    marks: dict[str, Mark] = {}  # noqa: RUF012 - never written to
    enclosed: str | None = None
    absolute: bool = False
    cases: Part | None = None
    contexts: frozenset[str] = frozenset()
    alpha: float | None = None
    df: tuple[Number, ...] = ()


def legend_of(text: str, spans: list[tuple[int, int]]) -> Legend:
    """Return what the stretches ``spans`` of a folded text say of a table."""
    marks: dict[str, Mark] = {}
    enclosed: str | None = None
    cases: Part | None = None
    df: tuple[Number, ...] = ()
    words = []
    for start, end in spans:
        stretch = text[start:end]
        words.append(stretch)
        marks.update(_marks(stretch, start))
        enclosed = enclosed or _enclosed(stretch)
        cases = cases or _cases(stretch, start)
        df = df or _degrees(stretch, start)
    said = "\n".join(words)
    cues = cues_in(said) if said else cues_in("")
    absolute = _ABSOLUTE.search(said) is not None
    # A test of assumptions that a note reports is not the table's subject.
    contexts = cues.contexts - {"assumption-test", "quoted"}
    return Legend(marks, enclosed, absolute, cases, contexts, cues.alpha, df)


def _degrees(text: str, at: int) -> tuple[Number, ...]:
    """Return the degrees of freedom that a text tells apart from any result."""
    found = list(_DF.finditer(text))
    if len(found) != 1:
        return ()
    return tuple(
        Number(found[0][group], at + found[0].start(group), at + found[0].end(group))
        for group in ("a", "b")
        if found[0][group]
    )


def _marks(text: str, at: int) -> dict[str, Mark]:
    if not any(sign in text for sign in "*†‡+"):
        return {}
    marks: dict[str, Mark] = {}
    for found in (*_SAID.finditer(text), *_SAID_AFTER.finditer(text)):
        level = _level(found["level"])
        if level is not None and found["mark"] not in marks:
            marks[found["mark"]] = Mark(
                level, found["level"], at + found.start("level"), at + found.end("level")
            )
    if len(marks) > 1 and _fall(marks):
        return marks
    for found in _LISTED.finditer(text):
        signs = re.findall(r"\*+", found["marks"])
        levels = list(_ONE.finditer(found["levels"]))
        if len(signs) != len(levels):
            continue
        percent = "%" in found["levels"] or "percent" in text[found.end() : found.end() + 12]
        listed: dict[str, Mark] = {}
        for sign, literal in zip(signs, levels, strict=True):
            printed = literal.group().strip()
            printed += "%" if percent and "%" not in printed else ""
            level = _level(printed)
            start = at + found.start("levels")
            if level is not None:
                listed[sign] = Mark(level, printed, start + literal.start(), start + literal.end())
        if len(listed) == len(signs) and _fall(listed):
            return listed
    return marks if _fall(marks) else {}


def _fall(marks: dict[str, Mark]) -> bool:
    """Say whether more stars mean lower levels; else the words were not understood."""
    stars = sorted((mark for mark in marks if mark[0] == "*"), key=len)
    return all(marks[a].level > marks[b].level for a, b in itertools.pairwise(stars))


def _level(literal: str) -> float | None:
    numeral = numerals.parse(literal, decimal_comma=True)
    return numeral.value if numeral is not None and 0 < numeral.value <= 0.25 else None


def band(mark: str, marks: dict[str, Mark]) -> tuple[float, float]:
    """Return the p values that a mark stands for: below its level, not below a stricter one's."""
    level = marks[mark].level
    stricter = [
        other.level for sign, other in marks.items() if other.level < level and sign != mark
    ]
    low = max(stricter, default=-math.inf)
    return (math.nextafter(low, -math.inf) if stricter else low), math.nextafter(level, math.inf)


def _enclosed(text: str) -> str | None:
    """Return what the numbers in brackets are called, if the text says so of one kind."""
    found: set[str] = set()
    for where in _WHERE.finditer(text):
        first = max(0, where.start() - 90)
        for stop in _STOP.finditer(text, first, where.start()):
            first = stop.end()
        last = _STOP.search(text, where.end(), where.end() + 60)
        before = text[first : where.end()]
        after = text[where.end() : last.start() if last else where.end() + 60]
        kinds = [kind for kind, pattern in _KIND_WORDS if pattern.search(before)]
        if not kinds:
            kinds = [kind for kind, pattern in _KIND_WORDS if pattern.search(after)]
        found.update(kinds[:1])
    return found.pop() if len(found) == 1 else None


def _cases(text: str, at: int) -> Part | None:
    """Return the number of cases, if the text tells one."""
    found = list(_CASES.finditer(text))
    named = [match for match in found if match["name"] == "N"] or found
    values = {(match["number"] or match["told"]).replace(",", "") for match in named}
    if len(values) != 1 or any(match["more"] for match in named):
        return None
    match = named[0]
    group = "number" if match["number"] else "told"
    numeral = numerals.parse(match[group], whole=True)
    if numeral is None:
        return None
    return Part("n", "=", at + match.start(group), at + match.end(group), numeral.low, numeral.high)
