"""What belongs together: a table's rows and what its notes tell of the same model."""

from __future__ import annotations

from collections.abc import Sequence

from crossfoot.model import Claim, Reading

_WITH_ANOVA = frozenset(
    {"R", "R2", "R2_adj", "s", "n", "df1", "df2", "F", "p", "eta2", "omega2", "f2"}
)

_ROWS = frozenset({"model", "error", "total"})


def joined(found: Sequence[Claim], notes: Sequence[Claim]) -> list[Claim]:
    """Return the claims of a table and its notes, each model's numbers together.

    Parameters
    ----------
    found
        What the rows say.
    notes
        What caption and notes say in words.
    """
    claims = list(found)
    rest: list[Claim] = []
    for note in notes:
        target = _analysis(claims, note)
        if target is None:
            rest.append(note)
        else:
            claims[target] = _merged(claims[target], note)
    models = [c for c in (*claims, *rest) if c.kind in {"overall-model", "model-change"}]
    analyses = [c for c in claims if c.kind == "anova-table"]
    claims = [_with_df(claim, models, analyses) for claim in claims]
    claims += rest
    return sorted(claims, key=lambda claim: claim.span)


def _analysis(claims: Sequence[Claim], note: Claim) -> int | None:
    """Return the one analysis of variance whose R² and s a note gives."""
    if note.kind != "overall-model":
        return None
    tables = [
        number
        for number, claim in enumerate(claims)
        if claim.kind == "anova-table" and not claim.given
    ]
    own = {(r.quantity, r.term): r for r in note.readings}
    if len(tables) != 1 or not {key for key, _ in own} <= _WITH_ANOVA:
        return None
    printed = {(r.quantity, r.term): r for r in claims[tables[0]].readings}
    several = any(r.quantity in {"ss", "ms"} and r.term not in _ROWS for r in printed.values())
    if several and any(key in {"F", "p", "df1"} for key, _ in own):
        return None  # the F of the whole model, which no row prints
    for key in own.keys() & printed.keys():
        if (own[key].low, own[key].high) != (printed[key].low, printed[key].high):
            return None
    return tables[0]


def _merged(claim: Claim, note: Claim) -> Claim:
    unique = {(r.quantity, r.term): r for r in (*note.readings, *claim.readings)}
    readings = tuple(sorted(unique.values(), key=lambda found: found.span))
    start = min(claim.span.start, note.span.start)
    end = max(claim.span.end, note.span.end)
    return claim._replace(
        readings=readings,
        span=claim.span._replace(start=start, end=end),
        context=tuple(sorted({*claim.context, *note.context})),
    )


def _with_df(claim: Claim, models: Sequence[Claim], analyses: Sequence[Claim]) -> Claim:
    """Give a coefficient the error degrees of freedom of its model."""
    quantities = {r.quantity for r in (*claim.readings, *claim.given)}
    if claim.kind != "coefficient" or quantities & {"df", "df2", "z"}:
        return claim
    df = _df_of(claim, models, analyses)
    if df is None:
        return claim
    return claim._replace(given=(*claim.given, df._replace(quantity="df", term=None)))


def _df_of(claim: Claim, models: Sequence[Claim], analyses: Sequence[Claim]) -> Reading | None:
    """Return the error df of the model that a coefficient is of, if there is no doubt which."""
    own = [model for model in models if model.label and claim.label.endswith(f", {model.label}")]
    for model in own if len(models) > 1 else models:
        if model.kind == "overall-model" or len(models) == 1:
            found = next((r for r in model.readings if r.quantity == "df2"), None)
            if found is not None:
                return found
    if len(analyses) == 1 and not models:
        return next((r for r in analyses[0].readings if r.quantity == "df2"), None)
    return None
