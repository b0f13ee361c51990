"""From groups to claims: what kind of result it is, and in which context."""

from __future__ import annotations

import re
from collections.abc import Sequence

from crossfoot.expressions import expression
from crossfoot.model import Claim, Reading, Span
from crossfoot.reading.contexts import alpha_of, concerning, contexts_of, cues_in
from crossfoot.reading.dealing import shared
from crossfoot.reading.grouping import Group
from crossfoot.reading.items import SCANNER_FLAGS, Item, Part
from crossfoot.reading.sentences import same_sentence, sentence_around
from crossfoot.reading.settling import settle

_MODEL = expression(
    r"\bmodel|regress|overall|predict|explain|\bfit\b|fitted|accounted|modell|modèle|modelo|modello"
    r"|Gesamt|回归|회귀",
    re.IGNORECASE,
)
# The words that say, right before an F beside an R², what it tests: one effect, or the model.
_ONE_EFFECT = expression(
    r"\beffects?\s(?:of|for)\b|\bmain\seffect|\binteract(?:ion|ed)|Wechselwirkung|\bcontrast|\bcovariate|\bcontrolling|\badjusting"
    r"|Effekt\s(?:von|der|des)\b|Haupteffekt|effet\s(?:de|du|des|principal)\b|efecto\s(?:de|del|principal)\b"
    r"|effetto\s(?:di|del|principale)\b|efeito\s(?:de|do|da|principal)\b|\beffect\svan\b|\bdiffer",
    re.IGNORECASE,
)
_EFFECT = expression(
    r"effect|interaction|main\b|anova|ancova|difference|differ|group|condition|between|×|:"
    r"|effet|efecto|effetto|effekt",
    re.IGNORECASE,
)


def claims_of(groups: Sequence[Group], folded: str, visible: str) -> list[Claim]:
    """Return the claims that groups make, with places in the visible text.

    Parameters
    ----------
    groups
        In printed order.
    folded, visible
        The text of the block, folded and as shown; equally long.
    """
    kept = [
        settled
        for group in shared(groups, folded)
        if (settled := settle(group, folded)) is not None
    ]
    claims = [_claim(group, folded, visible) for group in kept]
    return _sided(_overall(claims, folded), kept, folded)


def _claim(group: Group, folded: str, visible: str) -> Claim:
    parts = sorted(
        (part for item in group.items for part in item.parts), key=lambda part: part.start
    )
    seen: set[tuple[str, str | None]] = set()
    unique: list[Part] = []
    for part in parts:
        if (part.quantity, part.term) not in seen:
            seen.add((part.quantity, part.term))
            unique.append(part)
    first = min(item.start for item in group.items)
    last = max(item.end for item in group.items)
    start, stop = sentence_around(folded, first, last)
    sentence = folded[start:stop]
    contexts = set(contexts_of(sentence, folded, folded[start:first]))
    stated = {flag for item in group.items for flag in item.flags if flag not in SCANNER_FLAGS}
    contexts |= stated
    if any("plural" in item.flags and _is_bound(item) for item in group.items):
        contexts.add("joint")
    if any(part.quantity in {"df", "df1", "df2"} and part.low != part.high for part in unique):
        contexts.add("adjusted-df")
    if "either-sided" in contexts:  # unless the result itself says on which
        contexts -= {"one-sided"} - stated
    if "adjusted-p" in contexts - stated and _several_df(unique):
        # "…, F(2, 57) = 7.41, p = .001. Tukey's test …": corrections concern what follows.
        contexts -= {"adjusted-p"} - cues_in(sentence).contexts
    quantities = {part.quantity for part in unique}
    kind = _kind(group.anchor, quantities, sentence)
    if kind == "model-change" and _is_of_whole(unique):
        kind = "overall-model"
    if kind == "overall-model" and group.anchor == "F" and _of_one_effect(group, folded, start):
        kind = "effect"
    return Claim(
        kind=kind,
        label=_label(group, unique, visible),
        text=_plain(visible[first:last]),
        span=Span(first, last),
        readings=tuple(_reading(part, visible) for part in unique),
        context=tuple(sorted(concerning(kind, frozenset(contexts), quantities))),
        alpha=alpha_of(sentence, folded),
    )


def _reading(part: Part, visible: str) -> Reading:
    place = Span(part.start, part.end)
    literal = visible[part.start : part.end]
    return Reading(part.quantity, part.relation, literal, part.low, part.high, place, part.term)


def _is_bound(item: Item) -> bool:
    """Say whether an item gives a bound for several tests, and not the value of one."""
    return item.head != "p" and item.parts[-1].relation != "="


def _several_df(parts: Sequence[Part]) -> bool:
    """Say whether a test is of several degrees of freedom at once, so that it is no comparison."""
    return any(part.quantity == "df1" and part.low > 1 for part in parts)


def _kind(anchor: str | None, quantities: set[str], sentence: str) -> str:
    if "F_change" in quantities or "R2_change" in quantities:
        return "model-change"
    if anchor == "F":
        if quantities & {"R2", "R2_adj", "R", "f2", "s"}:
            return "overall-model"
        return (
            "overall-model"
            if _MODEL.search(sentence) and not _EFFECT.search(sentence)
            else "effect"
        )
    if quantities & {"b", "beta", "odds_ratio", "vif"} or (
        anchor in {"t", "z"} and "se" in quantities
    ):
        return "coefficient"
    if anchor == "t" and "r" in quantities:
        return "correlation"
    return {
        "t": "mean-comparison",
        "z": "mean-comparison",
        "r": "correlation",
        "chi2": "frequency",
    }.get(anchor or "", "overall-model")


def _is_of_whole(parts: Sequence[Part]) -> bool:
    """Say whether an F beside both R² and ΔR² can be that of R², so that it need not be of ΔR²."""
    known = {part.quantity: part for part in parts if part.relation == "="}
    if not known.keys() >= {"F", "R2", "R2_change", "df1", "df2"} or known["R2"].high >= 1:
        return False
    ratio = known["df2"].low / known["df1"].low
    least, most = (share / (1 - share) * ratio for share in known["R2"][4:6])
    return least <= known["F"].high and known["F"].low <= most


def _of_one_effect(group: Group, folded: str, start: int) -> bool:
    """Say whether the words of a sentence nearest before its F speak of an effect, not a model."""
    test = next(item for item in group.items if item.head == "F")
    lead = folded[start : test.start]
    effects = [match.start() for match in _ONE_EFFECT.finditer(lead)]
    if not effects:
        return False
    return effects[-1] > max((match.start() for match in _MODEL.finditer(lead)), default=-1)


#: Effects of one fit stand no further apart, in claims.
_SIBLINGS = 12


def _overall(claims: list[Claim], text: str) -> list[Claim]:
    """Take back "overall" from an F with R² that is one of several effects of a model.

    Several F of one sentence with one error df are effects of one fit; the R² then belongs to the
    fit, and only an F with more df than each of the others can be the one it fixes.
    """
    settled = []
    for number, claim in enumerate(claims):
        if claim.kind == "overall-model" and _value(claim, "df2") is not None:
            siblings = [
                other
                for other in claims[max(0, number - _SIBLINGS) : number + _SIBLINGS]
                if other is not claim
                and same_sentence(text, claim.span, other.span)
                and other.kind in {"effect", "overall-model"}
                and _value(other, "df2") == _value(claim, "df2")
                and _value(other, "R2") is None
                and _value(other, "R2_adj") is None
            ]
            if any(
                (_value(other, "df1") or 0) >= (_value(claim, "df1") or 0) for other in siblings
            ):
                claim = claim._replace(kind="effect")
        settled.append(claim)
    return [
        _one_of_several(claim, settled[max(0, number - 1) : number + 2], text)
        for number, claim in enumerate(settled)
    ]


def _one_of_several(claim: Claim, around: Sequence[Claim], text: str) -> Claim:
    """Say of an effect with its share of the variance that another has the same error."""
    error = _value(claim, "df2")
    shared = claim.kind == "effect" and error is not None and _value(claim, "eta2") is not None
    if not shared or not any(
        other is not claim
        and other.kind == "effect"
        and _value(other, "df2") == error
        and same_sentence(text, claim.span, other.span)
        for other in around
    ):
        return claim
    return claim._replace(context=tuple(sorted({*claim.context, "several-effects"})))


def _sided(claims: list[Claim], groups: Sequence[Group], text: str) -> list[Claim]:
    """Leave open which of several tests a sentence calls one-sided, unless a p itself says so."""
    told = [number for number, claim in enumerate(claims) if "one-sided" in claim.context]
    if not told or len(claims) < 2:
        return claims
    settled = list(claims)
    for number in told:
        neighbours = claims[max(0, number - 1) : number] + claims[number + 1 : number + 2]
        stated = any("one-sided" in item.flags for item in groups[number].items)
        if not stated and any(same_sentence(text, claims[number].span, n.span) for n in neighbours):
            context = {*claims[number].context, "either-sided"} - {"one-sided"}
            settled[number] = claims[number]._replace(context=tuple(sorted(context)))
    return settled


def _value(claim: Claim, quantity: str) -> float | None:
    return next((reading.low for reading in claim.readings if reading.quantity == quantity), None)


def _label(group: Group, parts: Sequence[Part], visible: str) -> str:
    printed = {part.quantity: visible[part.start : part.end] for part in parts}
    anchor = group.anchor
    if anchor in {"F", "F_change"}:
        symbol = "F" if "F" in printed else "ΔF"
        inside = ", ".join(printed[key] for key in ("df1", "df2") if key in printed)
        return f"{symbol}({inside})" if inside else symbol
    if anchor in {"t", "r", "chi2"}:
        symbol = {"t": "t", "r": "r", "chi2": "χ²"}[anchor]
        return f"{symbol}({printed['df']})" if "df" in printed else symbol
    first = group.items[0]
    return (
        _plain(visible[first.start : first.parts[0].start]).rstrip(" =<>≤≥≈:(") or parts[0].quantity
    )


def _plain(text: str) -> str:
    """Return visible text on one line, raised and lowered text without its braces."""
    text = text.replace("^{2}", "²")
    return " ".join(re.sub(r"[_^]?\{([^{}]*)\}", r"\1", text).split())
