"""From a block of a document to its claims: a pure function of its source, so it is remembered."""

from __future__ import annotations

from collections.abc import Callable, Sequence
from functools import lru_cache
from typing import NamedTuple

from crossfoot.documents import show, table
from crossfoot.documents.visible import Builder, Visible, compose, place
from crossfoot.expressions import any_of, expression
from crossfoot.memo import remembered
from crossfoot.model import Claim, Reading, Span
from crossfoot.reading.contexts import Cues, cues_in
from crossfoot.reading.cues import CUES
from crossfoot.reading.damage import grouped, is_damaged, mended, rejoined
from crossfoot.reading.fold import fold

#: Nothing is read in a block without one of these: a relation, or a word or markup that stands
#: for one. Substrings, since a search for each is faster than one pattern for all.
_SIGNS = tuple("=<>≤≥≈＝＜＞≦≧⩽⩾≪≫¼⫽⬍⬎ϭϽϾ")
_WORDS = (
    "alue", "aleur", "alor", "tatistic", "quare", "R-Sq", "reedom", "arian", "aryans", "Streuung",
    "Wert", "waarde", "värde", "verdi", "værdi", "설명력", "方差", "分散", "变异", "MSE", "RSE",
    "bservations", " obs", "95 %", "95%", " SE ", "s.e. ", "dard error", "t-ratio ", "Sig.",
    "mong ", "ample of", " df", "d.f.", "elitysaste", "ariânc", "libert", "liberd", "):", "]:",
    ") of ", " p of ", " equal to ", ") was ", ") is ", "值", "値", "自由度", "p: 0", "p: .",
    "p: ,", "':", '":', "estimates:",
)  # fmt: skip
_ANY_WORD = any_of(_WORDS)
_MARKUP = ("\\l", "\\g", "\\approx", "\\text", "&#", "&eq", "{")
#: A test with its degrees of freedom and no sign before its value: `F(2, 57) 3.90`.
_BARE = expression(r"\((?:(?<=[FtrH²]\s\()|(?<=[FtrH²]\())[\d., ]{1,12}\)\s[-+]?\d{0,4}[.,]\d")
#: A relation that a number follows, with how far before its sign the zone of it is counted from.
#: Each starts with few characters, for which a search is many times as fast as for a choice.
_RELATED = (
    (expression(r"[=<>≤≥≈¼~∼;][\s*]{0,40}[-+]?\s?[.,·]?[\dn]"), 0),
    (expression(r":(?:(?<=[)\]}pPFtr]:)|(?<=[)\]}pPFtr]['\"]:))\s?[.\d]"), 2),
    (expression(r"of(?<=[)pPFtr²]\sof)\s[.\d]"), 2),
    (expression(r"[.](?:(?<=[pP][bo][.])|(?<=[pP][bo]0[.]))\d"), 2),
    (_BARE, 2),
)
_BEFORE, _AFTER = 100, 80
_DIGITS = "0123456789"
_DIGIT = expression("[0-9]+")
_SPACED = expression(r"\d \. \d|[=<>] \. \d|\d \d \d|, \d \d \)")
_SPACED_RUN = expression(r"(?:[\w.,()=<>≤≥+−-] ){5,}[\w.,()=<>≤≥](?!\w)")
_INK = expression(r"\S+")
_NAME = expression(r"[^\W_]+")
_TELLING = expression(r"[=<>≤≥≈]|\\[lg]")
#: Contexts that words must stand near a result to mean.
NEAR = frozenset(cue.context for cue in CUES if cue.near)
#: A heading that a table without any of the words above has.
_HEADS = expression(r"(?i:\b(?:df\d?|ss|ms)\b|ddof|estimate|corrected|std|sum of sq)")


class BlockReading(NamedTuple):
    """What a block says: its claims, in source places from its start, and its cues."""

    claims: tuple[Claim, ...]
    cues: Cues


@remembered
def read_block(
    language: str, kind: str, source: str, definitions: tuple[tuple[str, str], ...] = ()
) -> BlockReading:
    """Return the claims of a block.

    Parameters
    ----------
    language, kind, source, definitions
        As in :class:`~crossfoot.model.Document` and :class:`~crossfoot.model.Block`; the result
        depends on nothing else.
    """
    aligned = kind == "verbatim" or (language == "plain" and _may_be_aligned(source))
    if kind == "code" or not (
        _may_hold(source, kind, aligned) or (definitions and _may_call(source, definitions))
    ):
        return BlockReading((), cues_in(source))
    if kind == "table":
        from crossfoot.reading.tables import table_claims

        found = table(language, source, definitions)
        visible, folded = found.visible, fold(found.visible.text)
        claims = table_claims(found, _prose(folded, visible.text))
    else:
        visible = rejoined(unwrapped(squeezed(show(language, kind, source, definitions))))
        folded = fold(visible.text)
        if is_damaged(folded):
            folded = mended(folded)
        claims = tuple(_printed(visible, folded) if aligned else _claims(folded, visible.text))
    return BlockReading(tuple(_placed(claim, visible) for claim in claims), cues_in(folded))


def _printed(visible: Visible, folded: str) -> Sequence[Claim]:
    """Read text that may be aligned in columns, as what a program prints is."""
    from crossfoot.reading.printouts import printout_claims

    return printout_claims(visible, _prose(folded, visible.text))


def _prose(folded: str, shown: str) -> Callable[[int, int], list[Claim]]:
    """Return what reads a stretch of the text as prose, with the contexts of the whole of it."""
    whole = cues_in(folded).contexts - NEAR

    def read(start: int, end: int) -> list[Claim]:
        found = _claims(folded[start:end], shown[start:end])
        return [_moved(claim, start, whole) for claim in found]

    return read


def _moved(claim: Claim, by: int, contexts: frozenset[str]) -> Claim:
    if any(reading.quantity == "df1" and reading.low > 1 for reading in claim.readings):
        contexts -= {"adjusted-p"}  # corrections concern comparisons of one degree of freedom
    return claim._replace(
        span=Span(claim.span[0] + by, claim.span[1] + by),
        readings=tuple(
            reading._replace(span=Span(reading.span[0] + by, reading.span[1] + by))
            for reading in claim.readings
        ),
        context=tuple(sorted({*claim.context, *contexts})),
    )


def _claims(folded: str, shown: str) -> list[Claim]:
    zones = _zones(folded)
    if not zones:
        return []
    # Imported once something may be read: a document without a result pays for nothing.
    from crossfoot.reading.claims import claims_of
    from crossfoot.reading.grouping import group
    from crossfoot.reading.scanner import items_in

    folded = grouped(folded)
    items = items_in(folded, zones)
    return claims_of(group(folded, items), folded, shown) if items else []


def _may_hold(source: str, kind: str, aligned: bool) -> bool:
    """Say, cheaply and without a miss, whether anything can be read in a block."""
    if source.isascii() and not any(digit in source for digit in _DIGITS):
        return False
    if kind == "table" or (aligned and _may_be_aligned(source)):
        return True
    return (
        any(mark in source for mark in (*_SIGNS, *_WORDS, *_MARKUP))
        or (")" in source and _BARE.search(source) is not None)
        or is_damaged(source)
    )


def _may_call(source: str, definitions: tuple[tuple[str, str], ...]) -> bool:
    """Say whether a block names a definition that tells a number."""
    return not _telling(definitions).isdisjoint(_NAME.findall(source))


@lru_cache(maxsize=16)
def _telling(definitions: tuple[tuple[str, str], ...]) -> frozenset[str]:
    """Return the names, or their first words, of what says more than a word."""
    told = (name for name, meaning in definitions if _TELLING.search(meaning))
    return frozenset(word[0] for name in told if (word := _NAME.search(name)))


def _may_be_aligned(source: str) -> bool:
    """Say whether a text can hold a table: wide gaps, or the headings of one."""
    return (
        "  " in source or "\t" in source or " ...." in source or _HEADS.search(source) is not None
    )


def _zones(text: str) -> list[tuple[int, int]]:
    """Return the stretches of a folded text in which items may stand.

    They lie around each relation that a number follows, and each word that stands for one.
    """
    hits = [match.start() - back for sign, back in _RELATED for match in sign.finditer(text)]
    # A word far from any digit is of no result, and to look for many words takes long.
    for start, end in _around([match.start() for match in _DIGIT.finditer(text)], _AFTER, _BEFORE):
        hits += [match.start() for match in _ANY_WORD.finditer(text, start, end)]
    hits.sort()
    return [(start, min(end, len(text))) for start, end in _around(hits, _BEFORE, _AFTER)]


def _around(places: Sequence[int], before: int, after: int) -> list[tuple[int, int]]:
    """Return the stretches around sorted places, those that meet as one."""
    found: list[tuple[int, int]] = []
    for at in places:
        start, end = max(0, at - before), at + after
        if found and start <= found[-1][1]:
            found[-1] = (found[-1][0], end)
        else:
            found.append((start, end))
    return found


def squeezed(visible: Visible) -> Visible:
    """Close up mathematics that a converter spaced out: ``F ( 1 , 2 8 7 ) = 2 . 7 3``."""
    text = visible.text
    if (" . " not in text and " , " not in text) or _SPACED.search(text) is None:
        return visible
    out = Builder()
    done = 0
    for run in _SPACED_RUN.finditer(text):
        if _SPACED.search(run.group()) is None:
            continue
        out.keep(text, done, run.start())
        for char in _INK.finditer(text, *run.span()):
            out.keep(text, *char.span())
        done = run.end()
    out.keep(text, done, len(text))
    return compose(visible, out.build())


#: A number that a program prints as the call which makes it: `np.float64(2.31)`.
_WRAPPED = expression(
    r"(?:\bnp\.[a-z]{3,7}\d{0,3}|\barray)\(\[{0,2}(-?\d{1,20}(?:\.\d{0,20})?(?:e[-+]\d{1,3})?)\]{0,2}\)"
)


def unwrapped(visible: Visible) -> Visible:
    """Take numbers out of the calls that make them."""
    text = visible.text
    if "np." not in text and "array(" not in text:
        return visible
    out = Builder()
    done = 0
    for call in _WRAPPED.finditer(text):
        out.keep(text, done, call.start())
        out.keep(text, *call.span(1))
        done = call.end()
    if not done:
        return visible
    out.keep(text, done, len(text))
    return compose(visible, out.build())


def _placed(claim: Claim, visible: Visible) -> Claim:
    """Turn places in visible text into places in the source."""
    return claim._replace(
        span=place(visible, *claim.span),
        readings=tuple([_placed_reading(reading, visible) for reading in claim.readings]),
        given=tuple([_placed_reading(reading, visible) for reading in claim.given]),
    )


def _placed_reading(reading: Reading, visible: Visible) -> Reading:
    quantity, relation, literal, low, high, span, term = reading
    return Reading(quantity, relation, literal, low, high, place(visible, *span), term)
