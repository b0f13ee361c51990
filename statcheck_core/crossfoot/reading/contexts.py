"""What the words of a block mean for its results: contexts, and the significance level."""

from __future__ import annotations

import re
from collections.abc import Collection, Iterable, Sequence
from functools import lru_cache
from operator import itemgetter
from typing import NamedTuple

from crossfoot.expressions import expression
from crossfoot.model import Claim
from crossfoot.reading.cues import ALL_TESTS, CUES, Cue
from crossfoot.reading.sentences import SENTENCE_END, sentence_around

# Patterns are compiled when first used: most documents need none of them, and start-up counts.
_CITATION = r"[A-Z][\w'’-]{1,30}[^()]{0,60}?\b(?:19|20)\d\d[a-z]?\s?[,;:]"
_REPORTED = (
    r"\b[A-Z][\w'’-]{1,30}(?:\s(?:and|&)\s[A-Z][\w'’-]{1,30}|\set\sal\.)?\s\((?:19|20)\d\d[a-z]?\)"
    r"\s(?:\w+\s)?(?:reported|found|obtained|observed|showed|gave|got)\b[^.;]{0,70}$"
)
_ALPHA = (
    r"(?:(?:α|alpha)(?:\s(?:level|was|set|of|at|is|to))*\s?=?\s?|significance\s(?:level|threshold)(?:\s(?:was|set|of|at|is|to|used))*\s?(?:p\s?[<≤]\s?|=\s?)?)"
    r"(?P<level>0?[.,]\d{1,4}|\d{1,2}(?:\.\d)?\s?%)"
    r"|p\s?[<≤]\s?(?P<below>0?[.,]\d{1,4})\s(?:(?:was|were|is|are)\s)?(?:considered|deemed|taken|regarded|treated|as|defined|indicat)\w*"
    r"[^.]{0,40}signific"
)
#: Contexts that matter to claims of one kind alone.
_CONCERN = {"partialled": "correlation", "partial-sums": "anova-table"}
#: Said of comparisons alone: their p values are adjusted, and not those of other tests.
COMPARISONS = "adjusted-comparisons"
_COMPARED = expression(
    r"pairwise|post[- ]?hoc|comparison|contrast|followed (?:up )?(?:by|with)"
    r"|compared (?:by|with|using)"
    r"|paarvergleich|einzelvergleich|par paires|por pares|a coppie|paarsgewijze"
)
#: Contexts of one kind of model, and words that tell of an ordinary one beside it.
_OF_ONE_MODEL = frozenset({"mixed", "instrumental", "weighted"})
_ORDINARY = expression(
    r"ordinary least squares|\bOLS\b|\b(?:multiple|simple|linear) (?:linear )?regression",
    re.IGNORECASE,
)
_WORD_OF_LEVEL = expression(r"level|\bset\b|signific", re.IGNORECASE)
#: A significance level that no word calls one is smaller than this.
_LARGEST = 0.1001
#: What a heading says for its section, and a paragraph for the table below it.
_OF_MODELS = frozenset({"generalised", "other-null", "resampled", "variance-ratio"})
#: A paragraph no longer than this may be a caption, though nothing marks it as one.
_LONGEST_LINE = 200
_WORD_OF_ALPHA = ("alpha", "α", "significan")
_OF_ALL = (
    ALL_TESTS + r"|adjustment|(?:standard errors|models|estimates|analyses|comparisons|contrasts"
    r"|probabilities|intervals|they) (?:were|are|have been|use)"
)
#: Words of a heading under which a paragraph speaks for the whole document.
_METHODS = (
    "method", "analys", "statist", "approach", "design", "procedure", "material", "model",
    "estimat", "data", "strateg", "specific", "econometr", "méthod", "métod", "metod", "auswert",
)  # fmt: skip


class Cues(NamedTuple):
    """What the words of a block say."""

    contexts: frozenset[str] = frozenset()
    alpha: float | None = None


@lru_cache(maxsize=2048)
def cues_in(text: str) -> Cues:
    """Return the contexts that the words of a folded text mean, and the alpha it states."""
    low = broken = text.lower()
    for mark in _BREAKS:
        broken = broken.replace(mark, " ")
    starts = _STARTS.intersection(map(_FIRST_LETTERS, set(broken.split())))
    found = {number for start in starts for stem, number in _BY_START[start] if stem in low}
    if not text.isascii():
        found.update(number for stem, number in _UNSPACED if stem in low)
    if not found and not starts and "α" not in low:
        return _NO_CUES
    return Cues(_confirmed(found, low), _alpha(text, low))


def _confirmed(found: Iterable[int], low: str) -> frozenset[str]:
    cues = (CUES[number] for number in found)
    return frozenset(cue.context for cue in cues if not cue.confirm or re.search(cue.confirm, low))


def contexts_of(sentence: str, block: str, lead: str) -> frozenset[str]:
    """Return the contexts of a result.

    Parameters
    ----------
    sentence
        The sentence it stands in.
    block
        The whole block.
    lead
        What stands before the result in its sentence; a citation in an open bracket there says
        that the result is quoted.
    """
    found = cues_in(block).contexts
    if found & _NEAR:
        near = found & cues_in(sentence).contexts
        elsewhere = found - near
        found = (found - _NEAR) | near
        if "one-sided" in elsewhere:  # this test may be meant, and may not
            found |= {"either-sided"}
    if ("(19" in lead or "(20" in lead) and re.search(_REPORTED, lead[-120:]):
        found |= {"quoted"}
    opened = lead.rfind("(")
    if opened > lead.rfind(")") and re.search(_CITATION, lead[max(opened, len(lead) - 160) :]):
        found |= {"quoted"}
    return found


def concerning(
    kind: str, contexts: frozenset[str], quantities: Collection[str] = ()
) -> frozenset[str]:
    """Return those of some contexts that matter to a claim of a kind with some quantities."""
    idle = {context for context, of in _CONCERN.items() if context in contexts and kind != of}
    if "rank-test" in contexts and kind != "coefficient" and "ci_low" not in quantities:
        idle.add("rank-test")
    if "missing-cases" in contexts and "n" not in quantities:
        idle.add("missing-cases")
    return contexts - idle


def alpha_of(sentence: str, block: str) -> float | None:
    """Return the significance level that the sentence of a result states, if it does."""
    return cues_in(sentence).alpha if cues_in(block).alpha is not None else None


def is_methods(heading: str) -> bool:
    """Say whether a heading is one under which methods are described."""
    low = heading.lower()
    return any(word in low for word in _METHODS)


def spreading(text: str) -> frozenset[str]:
    """Return the contexts that a paragraph without a result states for those that follow."""
    contexts = cues_in(text).contexts & _SPREADS
    if not contexts:
        return contexts
    low = text.lower()
    found = {
        cue.context
        for cue in CUES
        if cue.spreads and not cue.general and cue.context in contexts and _says(cue, low)
    }
    if found & _OF_ONE_MODEL and _ORDINARY.search(text):
        found -= _OF_ONE_MODEL  # there are models of several kinds
    if contexts - found:
        for sentence in SENTENCE_END.split(text):
            found |= _general(sentence, contexts)
    # A test that is one-sided, if not all: which, the results may not say again.
    return frozenset(found | ({"either-sided"} if "one-sided" in contexts - found else set()))


def _says(cue: Cue, low: str) -> bool:
    """Say whether the words of this cue, and not of another for its context, stand in a text."""
    return any(stem in low for stem in cue.stems) and (
        not cue.confirm or re.search(cue.confirm, low) is not None
    )


def _general(sentence: str, contexts: frozenset[str]) -> set[str]:
    """Return the contexts that a sentence states of all tests, or of all comparisons."""
    own = cues_in(sentence).contexts & contexts
    if not own:
        return set()
    low = sentence.lower()
    found = {
        cue.context
        for cue in CUES
        if cue.context in own and cue.general and _says(cue, low) and re.search(cue.general, low)
    }
    if "adjusted-p" in own and _COMPARED.search(low):
        found = (found - {"adjusted-p"}) | {COMPARISONS}
    return found


def aside(text: str, claims: Sequence[Claim]) -> frozenset[str]:
    """Return the contexts that sentences between the results of a paragraph state for all tests."""
    if not cues_in(text).contexts & _SPREADS:
        return frozenset()
    pieces, done = [], 0
    for claim in claims:
        first, last = sentence_around(text, *claim.span)
        pieces.append(text[done:first])
        done = max(done, last)
    rest = "".join((*pieces, text[done:]))
    return spreading(rest) if re.search(_OF_ALL, rest.lower()) else frozenset()


def titled(text: str) -> frozenset[str]:
    """Return the contexts that a heading states for its section."""
    return spreading(text) | (cues_in(text).contexts & _OF_MODELS)


def above(text: str, *, caption: bool = True) -> frozenset[str]:
    """Return the contexts that a paragraph states for the table or printout right below it.

    ``caption`` says whether it may be the caption of that.
    """
    contexts = cues_in(text).contexts
    if not caption or len(text) > _LONGEST_LINE:
        return contexts & _OF_MODELS
    # A line alone is a caption. Where it speaks of ratios, they are what the table estimates.
    return contexts | {"other-null"} if "ratio-scale" in contexts else contexts


def _alpha(text: str, low: str) -> float | None:
    if not any(word in low for word in _WORD_OF_ALPHA):
        return None
    match = re.search(_ALPHA, text, re.IGNORECASE)
    if match is None:
        return None
    literal = (match["level"] or match["below"]).replace(",", ".").strip()
    level = float(literal.rstrip("% ")) / 100 if literal.endswith("%") else float(literal)
    # Larger ones are reliabilities and parameters, unless words say what they are.
    usual = _LARGEST if _WORD_OF_LEVEL.search(match.group()) is None else 0.5
    return level if 0 < level < usual else None


#: Stems are looked up by the first letters of their first word, since looking for each of them in
#: every paragraph takes longer than the rest of reading it. Those of scripts without spaces are
#: looked for as they are.
_LENGTH = 5
_FIRST_LETTERS = itemgetter(slice(_LENGTH))
_STEMS = tuple((stem, number) for number, cue in enumerate(CUES) for stem in cue.stems)
_UNSPACED = tuple(pair for pair in _STEMS if max(pair[0]) >= "\u3000")
#: What may stand right before or behind a word.
_BREAKS = "-–([/'\"“‘_),.;:="


def _first_letters(stem: str) -> str:
    for mark in _BREAKS:
        stem = stem.replace(mark, " ")
    return stem.split()[0][:_LENGTH]


def _by_start() -> dict[str, tuple[tuple[str, int], ...]]:
    found: dict[str, list[tuple[str, int]]] = {"alpha": [], "signi": []}
    for pair in _STEMS:
        found.setdefault(_first_letters(pair[0]), []).append(pair)
    return {start: tuple(pairs) for start, pairs in found.items()}


_BY_START = _by_start()
_STARTS = frozenset(_BY_START)
_NO_CUES = Cues()
_NEAR = frozenset(cue.context for cue in CUES if cue.near)
_SPREADS = frozenset(cue.context for cue in CUES if cue.spreads)
