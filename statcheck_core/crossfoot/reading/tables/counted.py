"""What counting tells: predictors by the rows of a model, degrees of freedom by these and cases."""

from __future__ import annotations

from collections.abc import Sequence

from crossfoot.model import Claim, Reading
from crossfoot.reading.tables.families import FITS, Families, is_slope, printed, tells


def with_only(claims: Sequence[Claim], families: Families, *, complete: bool) -> list[Claim]:
    """Give the only predictor of a model its F and R², which are t² and β² there.

    Parameters
    ----------
    claims, families
        Of a table with its notes.
    complete
        Whether nothing says that the table leaves predictors out.
    """
    labels = [families.label_of(claim) if is_slope(claim) else None for claim in claims]
    linked: list[Claim] = []
    for claim, label in zip(claims, labels, strict=True):
        model = families.whole(label)
        if model is not None and labels.count(label) == 1:
            df1 = printed(model, "df1")
            counted = df1 is None and complete and not tells(model, "k")
            if counted:
                df1 = _count("df1", 1, [claim])
            more = [printed(model, "F"), printed(model, "R2") if tells(claim, "beta") else None]
            if df1 is not None and df1.low == df1.high == 1 and any(more):
                added = {"only-predictor"} | ({"counted-rows"} if counted else set())
                claim = claim._replace(
                    given=(*claim.given, *filter(None, (*more, df1))),
                    context=tuple(sorted({*claim.context, *added})),
                )
        linked.append(claim)
    return linked


def with_counts(claims: Sequence[Claim], families: Families, cases: Reading | None) -> list[Claim]:
    """Give results without degrees of freedom the counts that these follow from.

    The number of predictors is that of the model's rows, which is sure only if it lists them all.

    Parameters
    ----------
    claims, families
        Of a table with its notes.
    cases
        The number of cases that caption or notes tell.
    """
    labels = [families.label_of(claim) for claim in claims]
    rows: dict[str | None, list[Claim]] = {}
    for claim, label in zip(claims, labels, strict=True):
        if is_slope(claim):
            rows.setdefault(label, []).append(claim)
    names_of = {label: {families.name_of(c) for c in own} for label, own in rows.items()}
    step: str | None = None
    fewer: set[str] = set()  # the predictors of the step before
    counted: list[Claim] = []
    for claim, label in zip(claims, labels, strict=True):
        own, names = rows.get(label, []), names_of.get(label, set())
        if claim.kind in FITS and label != step:
            step, fewer = label, names_of.get(step, set())
        told = families.told(label, "n")
        n = told or cases
        # Where names come twice, several models share one summary.
        if n is not None and own and len(names) == len(own):
            n = n._replace(term=None)
            if claim.kind == "coefficient" and not tells(claim, "df", "df2", "z", "n"):
                claim = claim._replace(given=(*claim.given, n, _count("k", len(own), own)))
            elif claim.kind == "overall-model" and not tells(claim, "df1", "df2", "k"):
                claim = _with_size(claim, n, own, told is not None)
            elif claim.kind == "model-change":
                claim = _with_step(claim, names, fewer, n, own)
        counted.append(claim)
    return counted


def _with_size(claim: Claim, n: Reading, own: Sequence[Claim], told: bool) -> Claim:
    """Give a model the number of its predictors, and of the cases where it tells none."""
    more = () if tells(claim, "n") else (n,)
    context = claim.context if told else tuple(sorted({*claim.context, "told-cases"}))
    return claim._replace(given=(*claim.given, *more, _count("k", len(own), own)), context=context)


def _with_step(
    claim: Claim, names: set[str], fewer: set[str], n: Reading, own: Sequence[Claim]
) -> Claim:
    """Give a step without degrees of freedom those that its rows and the cases leave."""
    rest = round(n.low) - len(names) - 1
    if tells(claim, "df1", "df2") or not fewer < names or n.low != n.high or rest < 1:
        return claim
    df1 = _count("df1", len(names - fewer), own)
    df2 = n._replace(quantity="df2", literal=str(rest), low=rest, high=rest)
    return claim._replace(
        given=(*claim.given, df1, df2), context=tuple(sorted({*claim.context, "counted-rows"}))
    )


def _count(quantity: str, number: int, rows: Sequence[Claim]) -> Reading:
    """Return how many rows there are, as a reading that stands where they begin."""
    return Reading(quantity, "=", str(number), number, number, rows[0].readings[0].span)
