"""What belongs together: a table's rows and what its notes tell of the same model."""

from __future__ import annotations

from collections.abc import Sequence

from crossfoot.model import Claim, Reading
from crossfoot.reading.tables.rows import is_intercept

_WITH_ANOVA = frozenset(
    {"R", "R2", "R2_adj", "s", "n", "df1", "df2", "F", "p", "eta2", "omega2", "f2"}
)

_FITS = frozenset({"overall-model", "model-change"})
_ROWS = frozenset({"model", "error", "total"})


def joined(
    found: Sequence[Claim],
    notes: Sequence[Claim],
    cases: Reading | None = None,
    df: Reading | None = None,
    *,
    complete: bool = True,
) -> list[Claim]:
    """Return the claims of a table and its notes, each model's numbers together.

    Parameters
    ----------
    found
        What the rows say.
    notes
        What caption and notes say in words.
    cases
        The number of cases that caption or notes tell.
    df
        The degrees of freedom that they tell for all coefficients.
    complete
        Whether nothing says that the table leaves predictors out.
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
    claims = [_with_df(claim, models, analyses, df) for claim in claims]
    claims = [_with_cases(claim, cases) for claim in claims]
    claims = _with_only(claims, [model for model in models if model.kind == "overall-model"])
    if complete:
        claims = _with_counts(claims, models, cases)
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


def _with_cases(claim: Claim, cases: Reading | None) -> Claim:
    """Give an analysis of variance the number of cases that caption or notes tell."""
    if claim.kind != "anova-table" or cases is None or _tells(claim, "n"):
        return claim
    return claim._replace(
        given=(*claim.given, cases._replace(term=None)),
        context=tuple(sorted({*claim.context, "told-cases"})),
    )


def _with_df(
    claim: Claim, models: Sequence[Claim], analyses: Sequence[Claim], told: Reading | None
) -> Claim:
    """Give a coefficient the error degrees of freedom of its model."""
    quantities = {r.quantity for r in (*claim.readings, *claim.given)}
    if claim.kind != "coefficient" or quantities & {"df", "df2", "z"}:
        return claim
    df = _df_of(claim, models, analyses) or told
    if df is None:
        return claim
    return claim._replace(given=(*claim.given, df._replace(quantity="df", term=None)))


def _with_only(claims: Sequence[Claim], models: Sequence[Claim]) -> list[Claim]:
    """Give the only predictor of a model its F and R², which are t² and r² there."""
    owners = [_model_of(c, models) if c.kind == "coefficient" else None for c in claims]
    own: dict[int, int] = {}
    for claim, model in zip(claims, owners, strict=True):
        if model is not None and not _is_intercept(claim):
            own[id(model)] = own.get(id(model), 0) + 1
    linked: list[Claim] = []
    for claim, model in zip(claims, owners, strict=True):
        df1 = None if model is None else _printed(model, "df1")
        alone = model is not None and own.get(id(model)) == 1 and not _is_intercept(claim)
        if model is not None and alone and df1 is not None and df1.low == df1.high == 1:
            more = [_printed(model, quantity) for quantity in ("F", "R2", "df1")]
            claim = claim._replace(given=(*claim.given, *filter(None, more)))
        linked.append(claim)
    return linked


def _is_intercept(claim: Claim) -> bool:
    return any(map(is_intercept, claim.label.split(", ")))


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


def _with_counts(
    claims: list[Claim], models: Sequence[Claim], cases: Reading | None
) -> list[Claim]:
    """Give results without degrees of freedom the counts that these follow from.

    The number of predictors is that of the model's rows, which is sure only if it lists them all.
    """
    owners = [claim if claim.kind in _FITS else _model_of(claim, models) for claim in claims]
    rows: dict[int, list[Claim]] = {}
    names_of: dict[int, set[str]] = {}
    for claim, model in zip(claims, owners, strict=True):
        if claim.kind == "coefficient" and not _is_intercept(claim):
            rows.setdefault(id(model), []).append(claim)
            names_of.setdefault(id(model), set()).add(_name(claim, model))
    before: Claim | None = None
    counted: list[Claim] = []
    for claim, model in zip(claims, owners, strict=True):
        own, names = rows.get(id(model), []), names_of.get(id(model), set())
        n = _printed(model, "n") if model else None
        n = n or cases
        # Where names come twice, several models share one summary.
        if n is not None and own and len(names) == len(own):
            n = n._replace(term=None)
            if claim.kind == "coefficient" and not _tells(claim, "df", "df2", "z", "n"):
                claim = claim._replace(given=(*claim.given, n, _count("k", len(own), own)))
            elif claim.kind == "overall-model" and not _tells(claim, "df1", "df2", "k"):
                claim = claim._replace(given=(*claim.given, _count("k", len(own), own)))
            elif claim.kind == "model-change" and before is not None:
                claim = _with_step(claim, names, names_of.get(id(before), set()), n, own)
        if claim.kind in _FITS:
            before = model
        counted.append(claim)
    return counted


def _with_step(
    claim: Claim, names: set[str], fewer: set[str], n: Reading, own: Sequence[Claim]
) -> Claim:
    """Give a step without degrees of freedom those that its rows and the cases leave."""
    rest = round(n.low) - len(names) - 1
    if _tells(claim, "df1", "df2") or not fewer < names or n.low != n.high or rest < 1:
        return claim
    df1 = _count("df1", len(names - fewer), own)
    df2 = n._replace(quantity="df2", literal=str(rest), low=rest, high=rest)
    return claim._replace(
        given=(*claim.given, df1, df2), context=tuple(sorted({*claim.context, "counted-rows"}))
    )


def _name(claim: Claim, model: Claim | None) -> str:
    """Return the name of a predictor without that of its model."""
    if model is None:
        return claim.label.split(", ")[0]  # what follows may name one of several models
    return claim.label.removesuffix(f", {model.label}")


def _tells(claim: Claim, *quantities: str) -> bool:
    return any(r.quantity in quantities for r in (*claim.readings, *claim.given))


def _printed(claim: Claim, quantity: str) -> Reading | None:
    return next((r for r in claim.readings if r.quantity == quantity), None)


def _count(quantity: str, number: int, rows: Sequence[Claim]) -> Reading:
    """Return how many rows there are, as a reading that stands where they begin."""
    return Reading(quantity, "=", str(number), number, number, rows[0].readings[0].span)


def _model_of(claim: Claim, models: Sequence[Claim]) -> Claim | None:
    """Return the model that a coefficient is of, if that is sure."""
    if len(models) == 1:
        return models[0]
    own = [model for model in models if model.label and claim.label.endswith(f", {model.label}")]
    return own[0] if len(own) == 1 else None
