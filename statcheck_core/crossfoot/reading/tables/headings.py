"""Headings: what the numbers under one, or beside one, are."""

from __future__ import annotations

import re
from functools import lru_cache
from typing import NamedTuple

from crossfoot.reading.tables.contents import Number
from crossfoot.reading.tables.roles import plain, role_of
from crossfoot.reading.tables.rows import label_of


class Heading(NamedTuple):
    """What a heading says.

    Attributes
    ----------
    roles
        The roles of the numbers in one of its cells, in order: ``("b", "se")`` for ``B (SE)``.
    level
        A confidence level that it names, placed from the start of the heading.
    df
        Degrees of freedom that it names, placed likewise.
    percent
        Whether its numbers are percentages.
    contexts
        What it says of all its numbers.
    """

    roles: tuple[str, ...]
    level: Number | None = None
    df: tuple[Number, ...] = ()
    percent: bool = False
    contexts: tuple[str, ...] = ()


NOTHING = Heading(())

_CI = re.compile(
    r"(?<![a-z])(?:c\.?\s?i\.?s?|ki|ic|bi|conf(?:idence|\.)?\s?(?:int(?:erval|\.)?s?|limits?)|konfidenzintervall"
    r"|intervalo\sde\sconfianza|intervalle\sde\sconfiance|intervallo\sdi\sconfidenza|intervalo\sde\sconfiança|vertrauensintervall"
    r"|betrouwbaarheidsinterval|konfidensintervall?|luottamusväli|przedział\sufności|güven\saralığı|信頼区間|신뢰구간|置信区间)(?![a-z])",
    re.IGNORECASE,
)
_LEVEL = re.compile(r"(?<![\d.])([5-9]\d(?:[.,]\d)?)(?![\d.])\s?%?")
_OF = re.compile(
    r"\s(?:for|of|von)\s(?:the\s)?(?P<of>[\w]{1,16}(?:\s?\([\w\s]{1,9}\))?)", re.IGNORECASE
)
_LOW = re.compile(
    r"(?<![a-z])(?:lower(?:\s(?:bound|limit))?|low|ll|lb|l|inf(?:[eé]rieure?|erior[ei]?|\.)?|untere?|undre|nedre|onder(?:grens)?|下限|하한)(?![a-z])",
    re.IGNORECASE,
)
_HIGH = re.compile(
    r"(?<![a-z])(?:upper(?:\s(?:bound|limit))?|high|ul|ub|u|sup(?:[eé]rieure?|erior[ei]?|\.)?|obere?|övre|øvre|boven(?:grens)?|上限|상한)(?![a-z])",
    re.IGNORECASE,
)
_QUANTILE = re.compile(r"(?<!\d)(0?\.0?25|2\.5(?=\s?%)|0?\.975|97\.5(?=\s?%))(?!\d)")
_BOTH = re.compile(r"\[(0?\.025)\s{1,9}0?\.975\]")
_ARGUMENTS = re.compile(
    r"(?P<name>[^()\[\]]{1,30})[(\[]\s{0,9}(?:d\.?f\.?\s?=?\s?)?(?P<a>\d{1,7}(?:\.\d{1,4})?)"
    r"(?:\s?[,;]\s{0,9}(?:[Nn]\s?=\s?)?(?P<b>\d{1,9}(?:\.\d{1,4})?))?\s?[)\]]"
)
_LOWERED = re.compile(
    r"(?P<name>Δ?F|[Tt]|χ(?:\^\{2\}|²))\s?(?:_?\{?(?P<a>\d{1,4}(?:\.\d{1,4})?)\s?[,;]\s?"
    r"(?P<b>\d{1,7}(?:\.\d{1,4})?)|_\{?(?P<c>\d{2,7}|(?<=[}²]_\{|.[}²]_)\d))\}?"
)
_COMPOSED = re.compile(
    r"(?P<base>[^()\[\]/]{1,40}?)\s?[(\[]\s?(?P<inner>[^()\[\]]{1,30}(?:\([^()]{1,12}\))?)\s?[)\]]"
)
_PERCENT = re.compile(r"\s?[(\[,]?\s?(?:in\s)?(?:%|per\s?cent)\s?[)\]]?$")
_TYPE = re.compile(r"^type\s(?:i{1,3}v?|[123])\s|\s?\(?type\s(?:i{1,3}v?|[123])\)?$", re.IGNORECASE)
#: What may stand before an estimate whose model it describes.
_OF_MODEL = re.compile(
    r"(?:crude|raw|(?:un|(?:fully|partially|age|sex|mutually)[\s-])?adjusted|(?:uni|bi|multi)vari(?:ate|able)"
    r"|simple|multiple|pooled|unweighted|weighted)\s(?:analysis\s)?(?=\S)",
    re.IGNORECASE,
)
_ESTIMATES = frozenset({"odds_ratio", "ratio", "b", "β", "beta"})
#: An F whose p is found by permutation.
_PSEUDO = re.compile(r"pseudo[\s-]?F|F\.?[\s-]?model", re.IGNORECASE)
_SIDED = re.compile(
    r",?\s?(?:[(\[]|(?<=[\s)]))(?P<side>one|two|1|2)[-\s]?(?:tail|side)d?(?:ed)?[)\]]?$",
    re.IGNORECASE,
)
_SIDED_BEFORE = re.compile(r"(?P<side>one|two|1|2)[-\s]?(?:tailed|sided)\s(?=p)", re.IGNORECASE)

#: Pairs that one cell may hold; the second stands in brackets or after a comma.
_PAIRS = frozenset(
    {
        ("b", "se"), ("b", "t"), ("b", "p"), ("b", "ci"), ("b", "beta"), ("b", "se_robust"),
        ("b", "z"),
        ("β", "se"), ("β", "t"), ("β", "p"), ("β", "ci"), ("β", "z"),
        ("beta", "se"), ("beta", "t"), ("beta", "p"), ("beta", "ci"),
        ("odds_ratio", "ci"), ("odds_ratio", "p"), ("odds_ratio", "se"),
        ("ratio", "ci"), ("ratio", "p"), ("ratio", "se"),
        ("F", "p"), ("F", "df"), ("t", "df"), ("t", "p"), ("z", "p"), ("chi2", "p"), ("chi2", "df"),
        ("wald", "df"), ("R2", "R2_adj"), ("R2", "R2_change"), ("r", "p"),
        ("R2_change", "p_change"),
        ("F_change", "p_change"), ("df1", "df2"),
    }
)  # fmt: skip
_CI_ROLES = ("ci_low", "ci_high")
_TESTS = frozenset({"F", "t", "z", "chi2"})
_WORD = re.compile(r"[A-Za-z]{2}")
#: The tail area that is p, as an expression: "P(T<=t)", "Pr(|T| > |t|)".
_TAIL = re.compile(
    r"P(?:r(?:ob)?)?\s?\(\s?(?:[TFZ]\s?<=\s?[tfz]|\|[TZ]\|\s?>=?\s?\|[tz]\|)\s?\)"
    r"|[pP](?:r(?:ob)?)?\.?\s?\(?\s?>=?\s?\|?(?:[tzFW]|[cC]hi-?[sS]?q?2?)\|?\s?\)?"
)
#: A p that names its test with its degrees of freedom: "Prob. F(2,43)".
_OF_TEST = re.compile(
    r"P(?:r(?:ob)?)?\.?\s(?P<test>F|t|[cC]hi-?[sS]quared?)\s?\((?P<a>\d{1,7})(?:,\s?(?P<b>\d{1,9}))?\)"
)


@lru_cache(maxsize=4096)
def parse(text: str) -> Heading:
    """Return what a folded heading says; no roles where it names none."""
    text = text.strip()
    if not text or len(text) > 90:
        return NOTHING
    if text[0] in "([" and text[-1] in ")]" and not set("()[]") & set(text[1:-1]):
        inner = parse(text[1:-1])
        if inner.roles and inner.roles != ("label",) and not (inner.df or inner.level):
            return inner
    sided = _SIDED.search(text)
    sided = sided or _SIDED_BEFORE.match(text)
    if sided is not None:
        found = parse(text[: sided.start()] or text[sided.end() :])
        side = "one-sided" if sided["side"].lower() in {"one", "1"} else "two-sided"
        return found._replace(contexts=(*found.contexts, side)) if found.roles else NOTHING
    if _TAIL.fullmatch(text):
        return Heading(("p",))
    if (of := _OF_TEST.fullmatch(text)) is not None:
        groups = ("a", "b") if of["b"] else ("a",)
        return Heading(("p",), df=tuple(Number(of[g], *of.span(g)) for g in groups))
    return _named(text) or _interval(text) or _with_df(text) or _composed(text) or _trimmed(text)


def parse_label(text: str) -> Heading:
    """Return what the label of a row says, which may end in a colon or a footnote mark."""
    found = parse(text.rstrip(" :=*"))
    if found.roles:
        return found
    # Without the marks places have moved, so that degrees of freedom can't be placed.
    return parse(label_of(text))._replace(df=(), level=None)


def _named(text: str) -> Heading | None:
    role = role_of(text)
    if role is None:
        return None
    if role == "p_one":
        return Heading(("p",), contexts=("one-sided",))
    if role == "se_robust":
        return Heading(("se",), contexts=("robust",))
    if role in _CI_ROLES:
        return Heading((role,), _level_in(text))
    return Heading((role,))


def _level_in(text: str) -> Number | None:
    """Return the confidence level that a heading of one limit names."""
    found = re.search(r"(?<![\d.])([5-9]\d)\s?%", text)
    if found is not None:
        return Number(found[1], *found.span(1))
    quantile = _QUANTILE.search(text)
    return Number("95", *quantile.span(1)) if quantile else None


def _interval(text: str) -> Heading | None:
    both = _BOTH.fullmatch(text)
    if both is not None:
        return Heading(_CI_ROLES, Number("95", *both.span(1)))
    word = _CI.search(text)
    if word is None:
        return None
    rest = text[: word.start()] + " " * (word.end() - word.start()) + text[word.end() :]
    quantile, others = _cut(_QUANTILE, rest)
    if quantile is not None:  # "CI[2.5%]"
        if others.strip(" ,;:/-–()[]%"):
            return None
        limit = "ci_high" if "97" in quantile[1] else "ci_low"
        return Heading((limit,), Number("95", *quantile.span(1)))
    level, rest = _cut(_LEVEL, rest)
    of, rest = _cut(_OF, rest)
    low, rest = _cut(_LOW, rest)
    high, rest = _cut(_HIGH, rest)
    if rest.strip(" ,;:/-–()[]"):
        return None
    if (low is None) == (high is None):
        roles: tuple[str, ...] = _CI_ROLES
    else:
        roles = ("ci_low",) if low else ("ci_high",)
    printed = Number(level[1], *level.span(1)) if level else None
    ratio = of is not None and role_of(of["of"]) == "odds_ratio"
    return Heading(roles, printed, contexts=("of-ratio",) if ratio else ())


def _cut(pattern: re.Pattern[str], text: str) -> tuple[re.Match[str] | None, str]:
    """Return a match, and the text with space in its place."""
    match = pattern.search(text)
    if match is None:
        return None, text
    return match, text[: match.start()] + " " * len(match.group()) + text[match.end() :]


def _with_df(text: str) -> Heading | None:
    """``F(2, 57)``, ``t(58)``, ``F Statistic (df = 2; 191)``."""
    match = _ARGUMENTS.fullmatch(text) or _LOWERED.fullmatch(text)
    if match is None:
        return None
    role = role_of(match["name"])
    if role not in {"F", "t", "chi2", "F_change", "r", "s", "wald"}:
        return None
    groups = ("a", "b") if match["b"] else ("a",) if match["a"] else ("c",)
    return Heading((role,), df=tuple(Number(match[g], *match.span(g)) for g in groups))


def _composed(text: str) -> Heading | None:
    """``B (SE)``, ``OR (95% CI)``, ``df1, df2``, ``b/SE``."""
    match = _COMPOSED.fullmatch(text)
    if match is not None:
        offset = match.start("inner")
        return _paired(match["base"], match["inner"], offset)
    for mark in ("/", ",", ";", "±"):
        first, found, second = text.partition(mark)
        if mark == "/" and role_of(second.strip()) == "df" and role_of(first.strip()) == "chi2":
            return None  # χ²/df, a ratio that tells how well a model fits
        if found and second.strip():
            offset = len(first) + 1 + len(second) - len(second.lstrip())
            return _paired(first, second.strip(), offset)
    return None


def _paired(first: str, second: str, offset: int) -> Heading | None:
    base = parse(first.strip())
    halves = [role_of(half.strip()) for half in second.split(",")]
    if base.roles == ("F",) and halves == ["df1", "df2"]:
        return base._replace(roles=("F", "df"))
    if base.roles == ("F_change",) and halves == ["df1", "df2"]:
        return base  # a cell has them in brackets
    if len(base.roles) != 1:
        return None
    role = base.roles[0]
    df_pair = re.fullmatch(
        r"(?:df|df1|df_\{?1\}?)\s?[,;]\s?(?:df|df2|df_\{?2\}?)|dfs?", plain(second)
    )
    if role in {"F", "t", "chi2"} and df_pair:
        return base._replace(roles=(role, "df"))
    inner = parse(second.strip())
    if role == "p" and inner.roles and inner.roles[0] in _TESTS:
        return base  # "p-value (F)"
    if role == "n" and not inner.roles and _WORD.search(second):
        return base  # "Observations (or Sum Wgts)"
    if inner.roles == _CI_ROLES:
        level = inner.level
        if level is not None:
            level = level._replace(start=level.start + offset, end=level.end + offset)
        if (role, "ci") in _PAIRS:
            return base._replace(roles=(role, *_CI_ROLES), level=level)
        return None
    if len(inner.roles) != 1:
        return None
    if inner.roles[0] == role or {inner.roles[0], role} <= {"b", "β"}:
        return base
    if {role, inner.roles[0]} <= {"beta", "β"}:
        return base._replace(roles=("beta",))
    if (role, inner.roles[0]) not in _PAIRS:
        return None
    other = "se" if inner.roles[0] == "se_robust" else inner.roles[0]
    return base._replace(roles=(role, other), contexts=(*base.contexts, *inner.contexts))


def _trimmed(text: str) -> Heading:
    """Read a heading that says more: percentages, types of sums, whose estimate it is."""
    if _PSEUDO.fullmatch(text):
        return Heading(("F",), contexts=("resampled",))
    of = _OF_MODEL.match(text)
    if of is not None:
        found = parse(text[of.end() :])
        if found.level is not None:
            at = found.level._replace(
                start=found.level.start + of.end(), end=found.level.end + of.end()
            )
            found = found._replace(level=at)
        return found if found.roles and found.roles[0] in _ESTIMATES else NOTHING
    percent = _PERCENT.search(text)
    if percent is not None and percent.start():
        found = parse(text[: percent.start()])
        return (
            found._replace(percent=True)
            if found.roles in {("R2",), ("R2_adj",), ("R2_change",)}
            else NOTHING
        )
    kind = _TYPE.search(text)
    if kind is not None and len(text) > kind.end() - kind.start():
        found = parse(text[: kind.start()] + text[kind.end() :])
        return found if found.roles else NOTHING
    return NOTHING
