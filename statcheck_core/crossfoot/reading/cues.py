"""Words around a result that change what may be concluded from it."""

from __future__ import annotations

import re
from collections.abc import Iterable
from functools import lru_cache
from typing import NamedTuple


class Cue(NamedTuple):
    """Words that mean a context.

    Attributes
    ----------
    context
        Key of :data:`crossfoot.laws.assumptions.CONTEXTS`.
    stems
        Lower-case substrings, one of which must stand in the text.
    near
        Whether the words must stand in the sentence of the result; otherwise anywhere in its
        block will do.
    spreads
        Whether the words, in a paragraph without a result, speak for the rest of the section
        (or, in a methods section, of the document).
    general
        Pattern that a paragraph must match as well before its cue spreads.
    confirm
        Pattern that the lower-case text must match as well, where the stems say too little.
    """

    context: str
    stems: tuple[str, ...]
    near: bool = False
    spreads: bool = False
    general: str = ""
    confirm: str = ""


def _stems(words: str) -> tuple[str, ...]:
    return tuple(words.split("; "))


_ALL_TESTS = (
    r"\ball\b|throughout|\btests? (?:were|are)\b|p[- ]?values? (?:were|are|have been)"
    r"|\balle\b|\btous\b|\btodos\b|\btutti\b"
)


CUES: tuple[Cue, ...] = (
    Cue(
        "one-sided",
        _stems(
            "one-sided; one-tailed; one sided; one tailed; 1-sided; 1-tailed; one- sided; "
            "one- tailed; directional; einseitig; unilatér; unilateral; eenzijdig; "
            "ensidig; ensidet; 片側; 单侧; 單側"
        ),
        near=True,
        spreads=True,
        general=_ALL_TESTS,
    ),
    Cue(
        "one-sided",
        _stems("alternative hypothesis"),
        near=True,
        confirm=r"alternative hypothesis:[^\n]* is (?:greater|less) than",
    ),
    Cue(
        "two-sided",
        _stems(
            "two-sided; two-tailed; two sided; two tailed; 2-sided; 2-tailed; zweiseitig; "
            "bilatér; bilateral; tweezijdig; tvåsidig; tosidig; 両側; 双侧; 雙側"
        ),
        near=True,
        spreads=True,
        general=_ALL_TESTS,
    ),
    Cue(
        "robust",
        _stems(
            "robust; hc0; hc1; hc2; hc3; hc4; clustered; cluster-; sandwich; huber; newey; "
            "driscoll; heteroskedasticity-consistent; heteroscedasticity-consistent; white-; "
            "white standard; white's; hac; eicker"
        ),
        spreads=True,
        confirm=r"robust (?:standard |std\.? )?(?:errors?|s\.?e|variance|f\b|inference|regression"
        r"|estimat|fit|linear)|(?:sk|sc)edastic\w*[- ](?:robust|consistent)|\bhc[0-4]\b"
        r"|cluster(?:ed|-robust)|cluster\w* (?:at|by|on)\b|sandwich"
        r"|huber|newey|driscoll|eicker|\bhac\b|white(?:'s)?[- ](?:correct|standard|robust|heterosk)"
        r"|\|\s+robust\b|robust\s*\n",
    ),
    Cue(
        "weighted",
        _stems(
            "weighted least; weighted regression; wls; inverse-variance; inverse variance; "
            "probability weight"
        ),
        spreads=True,
    ),
    Cue(
        "instrumental",
        _stems("instrumental; instrumented; 2sls; two-stage least; iv regression; iv estimat"),
        spreads=True,
    ),
    Cue(
        "mixed",
        _stems(
            "mixed effect; mixed-effect; mixed model; mixed-model; mixed linear; "
            "linear mixed; multilevel; hierarchical linear; random intercept; "
            "random-intercept; random slope; random-slope; random effect; random-effect; "
            "lmer; lmert; lmm; generalized estimating; generalised estimating; satterthwaite; "
            "kenward"
        ),
        spreads=True,
        confirm=r"(?<!\w)(?:lmm|lmer\w*"
        r"|(?:mixed|random)[- ](?:effects?|model|linear|intercepts?|slopes?)"
        r"|linear mixed|multilevel|hierarchical linear"
        r"|generali[sz]ed estimating|satterthwaite|kenward)",
    ),
    Cue(
        "survey",
        _stems(
            "survey weight; survey-weight; survey design; survey-adjusted; complex sample; "
            "complex survey; taylor linear; taylor-linear; design-based"
        ),
        spreads=True,
    ),
    Cue(
        "generalised",
        _stems(
            "logistic; logit; probit; poisson; negative binomial; generalized linear; "
            "generalised linear; cox ; hazard; ordinal regression; deviance; "
            "log-likelihood ratio"
        ),
        confirm=r"logistic|logit|probit|poisson|negative binomial|generali[sz]ed linear"
        r"|\bcox (?:regression|model|proportional)|hazards? (?:ratio|model|regression)"
        r"|ordinal regression|deviance|log-likelihood ratio",
    ),
    Cue(
        "no-intercept",
        _stems(
            "through the origin; without an intercept; without intercept; no intercept; "
            "no-intercept; intercept suppressed; intercept was omitted; zero intercept; "
            "without a constant; without constant; no constant; constant suppressed; "
            "not contain a constant; uncentered; uncentred; "
            "durch den ursprung; ohne achsenabschnitt; ohne konstante; sans constante; "
            "sin constante; par l'origine"
        ),
        spreads=True,
    ),
    Cue(
        "adjusted-df",
        _stems(
            "welch; satterthwaite; kenward; greenhouse; huynh; brown-forsythe; "
            "brown–forsythe; unequal varianc; not assuming equal; sphericity; "
            "corrected degrees; corrected df; adjusted degrees; adjusted df"
        ),
    ),
    Cue(
        "scaled-df",
        _stems("greenhouse; huynh; sphericity"),
        near=True,
        confirm=r"^(?![\s\S]*(?:welch|satterthwaite|kenward|brown|unequal|equal varianc))",
    ),
    Cue(
        "adjusted-p",
        _stems(
            "bonferroni; holm; tukey; scheff; šid; sidak; benjamini; fdr; false discovery; "
            "dunnett; games-howell; hochberg; corrected for; adjusted for multiple; "
            "adjusted p; corrected p; multiple comparison; family-wise; familywise; "
            "post hoc; post-hoc; multiplicity"
        ),
        spreads=True,
        general=_ALL_TESTS + r"|adjust\w*\s?[=:]|p\.adjust|p[- ]values? adjust|adjustment",
    ),
    Cue(
        "pseudo-r2",
        _stems(
            "nagelkerke; mcfadden; pseudo; cox & snell; cox and snell; marginal r; "
            "conditional r; cross-validat; within r; tjur"
        ),
        near=True,
    ),
    Cue(
        "assumption-test",
        _stems(
            "levene; bartlett; shapiro; breusch; mauchly; durbin; homogeneity of varianc; "
            "equality of varianc; hausman; ramsey; white test; white's test; ljung; "
            "goldfeld; homogeneity of regression"
        ),
        near=True,
    ),
    Cue(
        "variance-ratio",
        _stems(
            "ratio of variances; variance ratio; variance-ratio; compare two variances; "
            "two variances; equal variances f"
        ),
    ),
    Cue(
        "other-null",
        _stems(
            "test for constraints; linear hypothesis; null value; hypothesised value; "
            "hypothesized value; noninferiority; non-inferiority; equivalence; from one; "
            "from unity; from 1; from chance; against one; against unity; against 1; "
            "against chance; chance level; above chance; isometr; 1:1; slope of 1; slope of one; "
            "slope of unity"
        ),
        confirm=r"constraints|linear hypothesis|(?:null|hypothesi[sz]ed) value|non-?inferiority"
        r"|equivalence|(?:from|against) (?:one|unity|1(?:\.0+)?|chance)(?![\w.,]*\d)|chance level"
        r"|above chance|isometr|1:1|slope of (?:1|one|unity)\b",
    ),
    Cue(
        "ratio-scale",
        _stems(
            "ratio; ratios; relative risk; odds; times; fold; -fold; hr; rr; irr; shr; ahr; arr; "
            "airr; or; aor; auc; auroc; roc; exp("
        ),
        near=True,
        confirm=r"(?:hazards?|risk|rate|odds|incidence|prevalence|response|means)[ -]ratios?\b"
        r"|\bratios? of|relative risk|\bodds\b"
        r"|\btimes (?:as|more|less|higher|lower|greater)"
        r"|fold\b|\ba?(?:hr|rr|irr|shr|or)s?\s?[=:(]|\bau(?:ro)?c\b|\broc\b|exp\(",
    ),
    Cue(
        "repeated-measures",
        _stems(
            "repeated measure; repeated-measure; within-subject; within subject; "
            "within-participant; paired; split-plot; split plot; crossover"
        ),
    ),
    Cue("imputed", ("imputation", "imputed"), spreads=True),
    Cue("rank-correlation", ("spearman", "kendall", "rank correlation", "rank-order"), near=True),
    Cue(
        "resampled",
        _stems(
            "bootstrap; permutation; resampl; monte carlo; randomization test; "
            "randomisation test; fisher's exact; exact test; exact p; exact binomial; bca"
        ),
        spreads=False,
    ),
    Cue(
        "corrected-statistic",
        _stems("yates; continuity correct; rao-scott; rao–scott; satorra"),
    ),
)

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
#: What a heading says for its section, and a paragraph for the table below it.
_OF_MODELS = frozenset({"generalised", "other-null", "resampled", "variance-ratio"})
#: A paragraph no longer than this may be a caption, though nothing marks it as one.
_LONGEST_LINE = 200
_WORD_OF_ALPHA = ("alpha", "α", "significan")
#: Words of a heading under which a paragraph speaks for the whole document.
_METHODS = (
    "method", "analys", "statist", "approach", "design", "procedure", "material", "model",
    "estimat", "data",
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
    starts = _STARTS.intersection({word[:_LENGTH] for word in broken.split()})
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
        found = (found - _NEAR) | (found & cues_in(sentence).contexts)
    if ("(19" in lead or "(20" in lead) and re.search(_REPORTED, lead[-120:]):
        found |= {"quoted"}
    opened = lead.rfind("(")
    if opened > lead.rfind(")") and re.search(_CITATION, lead[max(opened, len(lead) - 160) :]):
        found |= {"quoted"}
    return found


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
    low = text.lower() if contexts else ""
    return frozenset(
        cue.context
        for cue in CUES
        if cue.spreads
        and cue.context in contexts
        and (not cue.general or re.search(cue.general, low))
    )


def titled(text: str) -> frozenset[str]:
    """Return the contexts that a heading states for its section."""
    return spreading(text) | (cues_in(text).contexts & _OF_MODELS)


def above(text: str) -> frozenset[str]:
    """Return the contexts that a paragraph states for the table or printout right below it."""
    contexts = cues_in(text).contexts
    if len(text) > _LONGEST_LINE:
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
    return level if 0 < level < 0.5 else None


#: Stems are looked up by the first letters of their first word, since looking for each of them in
#: every paragraph takes longer than the rest of reading it. Those of scripts without spaces are
#: looked for as they are.
_LENGTH = 5
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
