"""What belongs together: a table's rows and what its notes tell of the same model."""

from __future__ import annotations

from collections.abc import Sequence

from crossfoot.model import Claim, Reading
from crossfoot.reading.tables.counted import with_counts, with_only
from crossfoot.reading.tables.families import Families, printed, tells

_WITH_ANOVA = frozenset(
    {"R", "R2", "R2_adj", "s", "n", "df1", "df2", "F", "p", "eta2", "omega2", "f2"}
)
_ROWS = frozenset({"model", "error", "total"})
#: What a note tells of the whole model, which no row prints where there are several effects.
_OF_MODEL = frozenset({"F", "p", "df1"})


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
    families = Families([*claims, *rest])
    analyses = [c for c in claims if c.kind == "anova-table"]
    claims = [_with_df(claim, families, analyses, df) for claim in claims]
    claims = [_with_cases(claim, cases) for claim in claims]
    claims = with_only(claims, families, complete=complete)
    if complete:
        claims = with_counts(claims, families, cases)
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
    table = claims[tables[0]]
    found = {(r.quantity, r.term): r for r in table.readings}
    if _is_of_several(table) and any(key in _OF_MODEL for key, _ in own):
        return tables[0] if _is_whole(table, note) else None
    for key in own.keys() & found.keys():
        if (own[key].low, own[key].high) != (found[key].low, found[key].high):
            return None
    return tables[0]


def _is_of_several(table: Claim) -> bool:
    """Say whether an analysis has several effects, whose rows print no F of the whole model."""
    return any(r.quantity in {"ss", "ms"} and r.term not in _ROWS for r in table.readings)


def _is_whole(table: Claim, note: Claim) -> bool:
    """Say whether a note tells of the model that has all effects of an analysis: by its df."""
    whole, rest = printed(table, "df", "total"), printed(table, "df2")
    df1, df2 = printed(note, "df1"), printed(note, "df2")
    known = [found for found in (whole, rest, df1, df2) if found is not None]
    if len(known) < 4 or any(r.quantity in _OF_MODEL and r.term == "model" for r in table.readings):
        return False
    total, error, effects, same = (found.low for found in known)
    return all(r.low == r.high for r in known) and error == same and effects == total - error


def _merged(claim: Claim, note: Claim) -> Claim:
    own = note.readings
    if _is_of_several(claim):
        own = tuple(r._replace(term="model") if r.quantity in _OF_MODEL else r for r in own)
    unique = {(r.quantity, r.term): r for r in (*own, *claim.readings)}
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
    if claim.kind != "anova-table" or cases is None or tells(claim, "n"):
        return claim
    total = printed(claim, "df", "total")
    if total is not None and total.low + 1 > cases.low and (total.low + 1) % cases.low == 0:
        return claim  # each case has several rows: it was measured again, or is a replicate
    return claim._replace(
        given=(*claim.given, cases._replace(term=None)),
        context=tuple(sorted({*claim.context, "told-cases"})),
    )


def _with_df(
    claim: Claim, families: Families, analyses: Sequence[Claim], told: Reading | None
) -> Claim:
    """Give a coefficient the error degrees of freedom of its model."""
    quantities = {r.quantity for r in (*claim.readings, *claim.given)}
    if claim.kind != "coefficient" or quantities & {"df", "df2", "z"}:
        return claim
    df = families.error_of(claim)
    if df is None and len(analyses) == 1 and not families:
        df = printed(analyses[0], "df2")
    df = df or told
    if df is None:
        return claim
    return claim._replace(given=(*claim.given, df._replace(quantity="df", term=None)))
