"""Comparisons across a document: a result that is mentioned again, and the sample it rests on.

Neither can be proved, since two results may share most of their numbers by chance, and a sample
may be measured more than once; what is found here is a doubt.
"""

from __future__ import annotations

import re
from collections import defaultdict
from collections.abc import Iterator, Mapping, Sequence
from functools import lru_cache
from itertools import combinations
from typing import NamedTuple

from crossfoot.expressions import expression
from crossfoot.laws.quantities import QUANTITIES
from crossfoot.mentions import single
from crossfoot.model import SEVERITIES, Check, Document, Finding, Placed, Reading, Span
from crossfoot.reading.items import TESTS

#: Quantities that different results often share.
_COMMON = frozenset({"df", "df1", "df2", "n", "k", "ci_level", "alpha"})
#: Digits that two mentions must share, and quantities that have them.
_DIGITS, _SHARED = 5, 2
#: A number that more results than this print tells none from the others.
_CROWD = 8
#: Where a result takes more cases than so many samples, what is counted is another thing.
_MOST = 3
#: Words by which one of two results leaves out some cases.
_WITHOUT = expression(
    r"\b(?:without|exclu\w{1,8}|omit\w{0,5}|dropp\w{1,4}|remov\w{1,4}|subset|restrict\w{1,5}|sensitivity)\b",
    re.IGNORECASE,
)
#: What p is of differs under these.
_OTHER_P = frozenset({"adjusted-p", "one-sided", "resampled", "robust"})
_MANTISSA = expression(r"[\d.,·]+")
_NOT_DIGITS = expression(r"\D+")
_TOTAL = expression(  # it starts with a letter, for which a search is fast
    r"N(?<![A-Za-z]N)[*_$}\s]{0,4}=[\s$]{0,3}(?P<n>\d{1,3}(?:,\d{3})+|\d{2,7})(?![\d.,]*\d)"
)
#: Words that tell of more rows than cases, or of more samples than one; substrings, which are
#: looked for faster than a pattern.
_SEVERAL = (
    "repeated", "within-", "within ", "trial", "session", "wave", "longitudinal", "panel",
    "time point", "time-point", "timepoint", "multilevel", "mixed", "studies", "experiments",
    "study 2", "experiment 2", "sample 2", "subsample", "measured", "measures",
)  # fmt: skip
_COUNTING = frozenset({"overall-model", "effect", "correlation", "coefficient", "mean-comparison"})
_NOT_COUNTS = frozenset(
    {"adjusted-df", "imputed", "mixed", "survey", "repeated-measures", "by-item", "quoted"}
)


class _Mention(NamedTuple):
    """A result with the numbers of which it prints one each."""

    placed: Placed
    numbers: Mapping[str, Reading]
    prose: bool


def compared(document: Document, placed: Sequence[Placed]) -> list[Placed]:
    """Return the claims of a document with what a comparison across it says of each."""
    said: dict[str, list[tuple[Check, Finding | None]]] = defaultdict(list)
    for number, check, finding in (*_restated(document, placed), *_sampled(document, placed)):
        said[placed[number].id].append((check, finding))
    return [_with(item, said[item.id]) if item.id in said else item for item in placed]


def _with(placed: Placed, said: Sequence[tuple[Check, Finding | None]]) -> Placed:
    audited = placed.audited
    found = [*audited.findings, *(finding for _, finding in said if finding is not None)]
    found.sort(key=lambda finding: SEVERITIES.index(finding.severity))
    checks = {check.identity: check for check, _ in said}
    return placed._replace(
        audited=audited._replace(findings=tuple(found), checks=(*audited.checks, *checks.values()))
    )


def _restated(
    document: Document, placed: Sequence[Placed]
) -> Iterator[tuple[int, Check, Finding | None]]:
    """Yield what each mention of a result says of another: that they agree, or where they don't.

    Of two that differ the one that stands alone is in doubt, or else the one that says less.
    """
    prose = {block.start for block in document.blocks if block.kind == "prose"}
    mentions = [_Mention(item, single(item.audited.claim), item.base in prose) for item in placed]
    agreed: set[int] = set()
    differing: list[tuple[int, int, str]] = []
    for one, two in _pairs(mentions):
        here, there = mentions[one].numbers, mentions[two].numbers
        common = here.keys() & there.keys()
        apart = [key for key in common if not _meet(here[key], there[key])]
        alike = [key for key in common if key not in apart and key not in _COMMON]
        if not TESTS.isdisjoint(alike):
            alike = [key for key in alike if key != "p"]  # it follows from what it is the p of
        digits = sum(min(_digits(here[key]), _digits(there[key])) for key in alike)
        if len(alike) < _SHARED or digits < _DIGITS:
            continue
        if not apart:
            agreed |= {one, two}
        elif len(apart) == 1 and here[apart[0]].relation == there[apart[0]].relation == "=":
            differing.append((one, two, apart[0]))
    for number in sorted(agreed):
        yield number, Check("restatement", "agrees"), None
    doubted: set[tuple[int, str]] = set()
    for one, two, key in differing:
        if {one, two} <= agreed or not _comparable(mentions[one], mentions[two], key):
            continue
        if key in _COMMON and any(_leaves_out(document, mentions[i]) for i in (one, two)):
            continue
        odd = min((one, two), key=lambda i: (i in agreed, len(mentions[i].numbers), -i))
        found = _finding(mentions[odd], mentions[one + two - odd], key)
        if found is not None and (odd, key) not in doubted:
            doubted.add((odd, key))
            yield odd, Check("restatement", "doubt", found.message), found


def _leaves_out(document: Document, mention: _Mention) -> bool:
    """Say whether words before a result tell that some cases are left out of it."""
    start = mention.placed.base + mention.placed.audited.claim.span.start
    return _WITHOUT.search(document.text, max(0, start - 160), start) is not None


def _pairs(mentions: Sequence[_Mention]) -> Iterator[tuple[int, int]]:
    """Yield pairs, not both of tables, that print two numbers alike and stand apart."""
    printed: dict[tuple[str, str], list[int]] = defaultdict(list)
    for number, mention in enumerate(mentions):
        for key, reading in mention.numbers.items():
            if key in _COMMON:
                continue
            near = _near(reading.relation, reading.literal, reading.low, reading.high)
            if near is not None:
                printed[key, near].append(number)
    shared: dict[tuple[int, int], int] = defaultdict(int)
    for numbers in printed.values():
        for pair in combinations(numbers, 2) if len(numbers) <= _CROWD else ():
            shared[pair] += 1
    for (one, two), count in shared.items():
        first, second = mentions[one], mentions[two]
        apart = first.placed.base != second.placed.base
        if count >= _SHARED and apart and (first.prose or second.prose):
            yield one, two


def _comparable(first: _Mention, second: _Mention, key: str) -> bool:
    """Say whether a number of two mentions should be the same."""
    contexts = [frozenset(mention.placed.audited.claim.context) for mention in (first, second)]
    if "joint" in contexts[0] | contexts[1] or key == "ci_level":
        return False
    return key not in {"p", "se", "ci_low", "ci_high"} or not (contexts[0] ^ contexts[1]) & _OTHER_P


def _finding(odd: _Mention, other: _Mention, key: str) -> Finding | None:
    """Return the doubt about a number that another mention prints otherwise."""
    claim, symbol = odd.placed.audited.claim, QUANTITIES[key].symbol
    own, its = odd.numbers[key], other.numbers[key]
    index = claim.readings.index(own)
    if _is_found(odd, key) or _is_found(other, key):
        return None  # the result itself says which of the two is wrong
    alike = [k for k in odd.numbers if k in other.numbers and k != key and k not in _COMMON]
    same = ", ".join(f"{QUANTITIES[k].symbol} = {odd.numbers[k].literal}" for k in alike)
    place = Span(other.placed.base + its.span.start, other.placed.base + its.span.end)
    return Finding(
        "restatement",
        "doubt",
        f"{symbol} is printed as {own.literal} here, but as {its.literal} where what seems the "
        f"same result stands again, with {same}. One of the two may not be up to date.",
        index,
        related=tuple(claim.readings.index(odd.numbers[k]) for k in alike),
        working=(
            f"Printed here: {symbol} = {own.literal}, with {same}",
            f"Printed elsewhere: {symbol} = {its.literal}, with the same numbers",
            "One result has one value, however often it is mentioned.",
        ),
        elsewhere=(place,),
    )


def _is_found(mention: _Mention, key: str) -> bool:
    """Say whether something is found about a number already."""
    readings = mention.placed.audited.claim.readings
    return any(
        finding.severity != "note" and readings[finding.reading].quantity == key
        for finding in mention.placed.audited.findings
        if finding.reading < len(readings)
    )


def _sampled(document: Document, placed: Sequence[Placed]) -> Iterator[tuple[int, Check, Finding]]:
    """Yield the results that need more cases than the one sample of a document has."""
    told = [
        (int(m["n"].replace(",", "")), Span(*m.span("n"))) for m in _TOTAL.finditer(document.text)
    ]
    if len({total for total, _ in told}) != 1:
        return
    of_results = {
        item.base + reading.span.start
        for item in placed
        for reading in item.audited.claim.readings
        if reading.quantity == "n"
    }
    # The N in the brackets of a test is of that test, and need not be the whole sample.
    samples = [(total, span) for total, span in told if span.start not in of_results]
    if not samples:
        return
    total, span = samples[0]
    found = [
        (number, Check("sample-flow", "doubt"), _outgrown(item, numbers, key, total, span))
        for number, item in enumerate(placed)
        for key, numbers in _counted(item)
        if total
        < numbers[key].low + (numbers["df1"].low if "df1" in numbers else 1.0)
        < _MOST * total
    ]
    words = document.text.lower() if found else ""
    if not any(word in words for word in _SEVERAL):
        yield from found


def _counted(placed: Placed) -> Iterator[tuple[str, Mapping[str, Reading]]]:
    """Yield the degrees of freedom that count cases, and all numbers with them."""
    claim = placed.audited.claim
    numbers = single(claim)
    key = "df2" if "df2" in numbers else "df"
    counts = claim.kind in _COUNTING and _NOT_COUNTS.isdisjoint(claim.context)
    if counts and key in numbers and "n" not in numbers:
        yield key, numbers


def _outgrown(
    item: Placed, numbers: Mapping[str, Reading], key: str, total: int, span: Span
) -> Finding:
    readings = item.audited.claim.readings
    symbols = "df1 + df2" if "df1" in numbers else "df + 1"
    return Finding(
        "sample-flow",
        "doubt",
        f"{QUANTITIES[key].symbol} is printed as {numbers[key].literal}, which takes more cases "
        f"than the {total} of the sample. This is sure only if each case is one row of the "
        "analysis.",
        readings.index(numbers[key]),
        related=tuple(readings.index(numbers[k]) for k in ("df1",) if k in numbers),
        working=(
            f"Printed elsewhere: N = {total}",
            f"A fit of n cases leaves {symbols} ≤ n.",
        ),
        elsewhere=(span,),
    )


def _meet(first: Reading, second: Reading) -> bool:
    return first.low <= second.high and second.low <= first.high


@lru_cache(2**14)
def _near(relation: str, literal: str, low: float, high: float) -> str | None:
    """Return what numbers that may be alike share; None for one that tells too little."""
    return f"{(low + high) / 2:.2g}" if _significant(relation, literal) > 1 else None


def _digits(reading: Reading) -> int:
    """Return the significant digits of a number; a bound has none."""
    return _significant(reading.relation, reading.literal)


def _significant(relation: str, literal: str) -> int:
    found = _MANTISSA.search(literal)
    if relation != "=" or found is None:
        return 0
    return len(_NOT_DIGITS.sub("", found.group()).lstrip("0"))
