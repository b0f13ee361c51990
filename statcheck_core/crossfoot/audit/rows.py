"""Which cells the names in an identity stand for in a table, row by row.

An analysis of variance binds most identities once for each effect, its sums once over all rows.
Everywhere else two things come with tables: marks of significance are a reading of p, of the term
``stars``, and the only one where p itself is not printed; and the R² of the smaller model has the
term ``reduced``.
"""

from __future__ import annotations

from collections.abc import Iterator, Mapping, Sequence
from functools import lru_cache

from crossfoot.audit.binding import Binder, Bound, Cell, bind_prose, names_of
from crossfoot.audit.wording import ADJUSTED, MARKS, REDUCED, are_marks
from crossfoot.laws import sum_of_parts
from crossfoot.laws.identity import Form, Identity

ANOVA = "anova-table"

_ROWS = frozenset({"error", "total"})
#: Quantities that each effect of an analysis has for itself.
_OF_EFFECT = ("F", "p", "df1", "eta2", "eta2_partial", "omega2")
#: What may follow from a row though it is not printed there.
_BETWEEN = frozenset({"ms"})
#: Terms of readings that only an identity made for them may take.
_OF_OTHERS = frozenset({REDUCED, ADJUSTED})
#: The degrees of freedom of all effects together, where a row of their own is not printed.
_ALL_EFFECTS = Cell("df1", "model")
#: Identities of a whole model; they hold in an analysis of one effect, if its total is printed.
_OF_MODEL = frozenset({"f-from-r2", "r2-adjusted", "n-from-df", "r2-from-multiple-r", "f2-from-r2"})
#: Identities that speak of an analysis as a whole and not of each effect.
_ONCE = frozenset({"r2-from-ss", "s-from-ms"}) | _OF_MODEL


def bind_rows(identity: Identity, cells: Sequence[Cell], unprinted: frozenset[str]) -> Bound:
    """Bind an identity to the rows of an analysis of variance."""
    printed = frozenset(cells)
    effects = _effects(cells)
    if identity.slug in {"anova-sums", "anova-df"}:
        return list(_sums(identity.slug, effects, printed))
    if identity.slug == "ms-from-ss":
        return [(identity, row) for row in _mean_squares(effects, printed)]
    if identity.slug == "stars":
        return [(identity, pair) for pair in _pairs(cells)]
    if identity.slug in _ONCE:
        return _once(identity, effects, printed, unprinted)
    if identity.slug == "bounds":
        return [(identity, row) for row in _single_cells(cells)]
    if len(effects) > 1:
        identity = _of_several(identity)
    bound = []
    for effect in effects:
        names = _named(identity, effect, printed)
        if len(names) > 1:
            bound.append((identity, names))
    return bound


@lru_cache(maxsize=64)
def _of_several(identity: Identity) -> Identity:
    """Return an identity without what holds for the only effect of a design."""
    return identity._replace(forms=tuple(f for f in identity.forms if "one-way" not in f.assumed))


def _effects(cells: Sequence[Cell]) -> list[str | None]:
    """Return the terms of the effects: their names, or None for the only one."""
    named = [
        cell.term
        for cell in cells
        if cell.term is not None
        and cell.term not in _ROWS
        and not are_marks(*cell)
        and cell.quantity in {*_OF_EFFECT, "ss", "ms"}
    ]
    if any(cell.quantity == "F" and cell.term is None for cell in cells) or set(named) <= {"model"}:
        return [None]
    return list(dict.fromkeys(named))


def _row(quantity: str, effect: str | None) -> Cell:
    """Return the cell of an effect; the only one has its sums in the row of the model."""
    if quantity in {"ss", "ms"}:
        return Cell(quantity, effect or "model")
    return Cell(quantity, effect)


def _named(identity: Identity, effect: str | None, printed: frozenset[Cell]) -> dict[str, Cell]:
    """Return the cells that the names of an identity stand for beside one effect."""
    possible = {name: _row(name, effect) for name in _OF_EFFECT}
    if possible["p"] not in printed:
        possible["p"] = _marks(effect)
    possible |= {"ss_effect": _row("ss", effect), "ms_effect": _row("ms", effect)}
    possible |= _shared(effect)
    return {
        name: possible[name]
        for name in names_of(identity)
        if name in possible and (possible[name] in printed or possible[name].quantity in _BETWEEN)
    }


def _shared(effect: str | None) -> dict[str, Cell]:
    """Return what all effects share: the rows of error and total, and the whole fit."""
    cells = {name: Cell(name) for name in ("R", "R2", "R2_adj", "s", "n", "df2", "k", "f2")}
    cells |= {
        "ss_error": Cell("ss", "error"),
        "ms_error": Cell("ms", "error"),
        "ss_total": Cell("ss", "total"),
    }
    if effect is None:
        cells["ss_model"] = Cell("ss", "model")
    return cells


def _once(
    identity: Identity,
    effects: Sequence[str | None],
    printed: frozenset[Cell],
    unprinted: frozenset[str],
) -> Bound:
    """Bind what speaks of the whole fit: to the model's row, or to the only effect."""
    whole: str | None = None if effects == [None] else "model"
    totals = {Cell("ss", "total"), Cell("df", "total")}
    between = _BETWEEN
    if {Cell("F", "model"), *totals} <= printed and Cell("ss", "model") not in printed:
        between |= {"R2"}  # through which the sums of squares tell the F that a note gives
    if whole and whole not in effects:
        names = {n: c for n, c in _shared("").items() if c in printed or c.quantity in between}
        if _counts(printed):
            names["df1"] = _ALL_EFFECTS
    else:
        names = _named(identity, whole, printed) | {
            n: c for n, c in _shared(None).items() if c in printed or c.quantity in between
        }
    names = {name: names[name] for name in names_of(identity) if name in names}
    if identity.slug not in _OF_MODEL:
        return [(identity, names)]
    if printed.isdisjoint(totals) or not ({"F", "df1"} & names.keys()):
        return []
    return [(_of_analysis(identity), names)]


@lru_cache(maxsize=64)
def _of_analysis(identity: Identity) -> Identity:
    """Return an identity of models so that it speaks of an analysis of variance too."""
    forms = tuple(_form_of_analysis(form) for form in identity.forms)
    return identity._replace(kinds=(*identity.kinds, ANOVA), forms=forms)


def _form_of_analysis(form: Form) -> Form:
    return form._replace(kinds=(*form.kinds, ANOVA)) if "overall-model" in form.kinds else form


def _counts(printed: frozenset[Cell]) -> bool:
    """Say whether n can be held against the total of several effects, whose sum no row prints."""
    return {Cell("n"), Cell("df", "total"), Cell("df2")} <= printed


def _degrees(effect: str | None) -> Cell:
    return Cell("df1", effect)


def _mean_squares(
    effects: Sequence[str | None], printed: frozenset[Cell]
) -> Iterator[Mapping[str, Cell]]:
    """Yield the mean square, sum and degrees of freedom of each row that prints two of them."""
    rows = [(_row("ms", e), _row("ss", e), _degrees(e)) for e in effects]
    rows.append((Cell("ms", "error"), Cell("ss", "error"), Cell("df2")))
    rows.append((Cell("ms", "total"), Cell("ss", "total"), Cell("df", "total")))
    for ms, ss, df in rows:
        if len({ms, ss, df} & printed) >= 2 and df in printed:
            yield {"ms": ms, "ss": ss, "df": df}


def _sums(slug: str, effects: Sequence[str | None], printed: frozenset[Cell]) -> Bound:
    """Yield the sums that a table's rows must make.

    Model and error make the total; so do all effects and the error, and all effects the model.
    """
    squares = slug == "anova-sums"
    total = Cell("ss" if squares else "df", "total")
    error = Cell("ss", "error") if squares else Cell("df2")
    cells = [_row("ss", e) if squares else _degrees(e) for e in effects]
    model = Cell("ss" if squares else "df1", "model")
    parts = [cell for cell in cells if cell != model or effects == [None]]
    sums: list[tuple[Cell, list[Cell]]] = []
    if "model" in effects:
        sums.append((total, [model, error]))
        if len(parts) > 1:
            sums.append((model, parts))
    else:
        sums.append((total, [*parts, error]))
        if not squares and effects != [None] and _counts(printed):
            yield sum_of_parts(slug, 2), {"total": total, "part1": _ALL_EFFECTS, "part2": error}
    for whole, summands in sums:
        if whole in printed and printed.issuperset(summands) and len(summands) > 1:
            names = {f"part{i}": cell for i, cell in enumerate(summands, start=1)}
            identity = sum_of_parts(slug, len(summands))
            if squares and whole == model:
                # However many they are, the effects' own sums may overlap.
                identity = _overlapping(identity)
            yield identity, {"total": whole, **names}


@lru_cache(maxsize=64)
def _overlapping(identity: Identity) -> Identity:
    assumed = ("orthogonal-effects",)
    return identity._replace(forms=tuple(form._replace(assumed=assumed) for form in identity.forms))


def _pairs(cells: Sequence[Cell]) -> Iterator[Mapping[str, Cell]]:
    """Yield each p with the marks that stand beside it."""
    printed = set(cells)
    for cell in cells:
        if cell.quantity == "p" and not are_marks(*cell) and _marks(cell.term) in printed:
            yield {"p": cell, "p_stars": _marks(cell.term)}


def _single_cells(cells: Sequence[Cell]) -> Iterator[Mapping[str, Cell]]:
    """Yield the cells of each term, by quantity."""
    terms: dict[str | None, dict[str, Cell]] = {}
    for cell in cells:
        if not are_marks(*cell) and cell.term != REDUCED:
            terms.setdefault(cell.term, {})[cell.quantity] = cell
    yield from terms.values()


def _marks(term: str | None) -> Cell:
    """Return the p that marks stand for, in the only row or in a row of several."""
    return Cell("p", MARKS if term is None else f"{term}: {MARKS}")


def bind_beside_marks(
    identity: Identity, cells: Sequence[Cell], unprinted: frozenset[str]
) -> Bound:
    """Bind as in prose, but for marks beside p and for the step before."""
    if identity.slug == "stars":
        return [(identity, pair) for pair in _pairs(cells)]
    if identity.slug == "adjusted-p":
        pair = {"p": Cell("p"), "p_adjusted": Cell("p", ADJUSTED)}
        return [(identity, pair)] if set(pair.values()) <= set(cells) else []
    both = Cell("p") in cells
    own = [c for c in cells if c.term not in _OF_OTHERS and not (both and are_marks(*c))]
    if Cell("chi2") in own and "chi2" not in names_of(identity):
        # The df beside a Wald test are those of χ², not those of the error.
        own = [cell for cell in own if cell.quantity != "df"]
        unprinted -= {"df"}
    if Cell("F") in own:
        unprinted -= {"F_change"}  # F may be that of the whole model, as may p be
    bound = list(bind_prose(identity, own, unprinted))
    reduced = Cell("R2", REDUCED)
    if identity.slug != "r2-change" or reduced not in cells:
        return bound
    return [
        (each, {**names, "R2_full": Cell("R2"), "R2_reduced": reduced}) for each, names in bound
    ]


#: How names are bound in each kind of claim.
BINDERS: Mapping[str, Binder] = {
    ANOVA: bind_rows,
    **dict.fromkeys(
        (
            "coefficient",
            "coefficient-table",
            "correlation",
            "effect",
            "frequency",
            "mean-comparison",
            "model-change",
            "model-summary",
            "overall-model",
        ),
        bind_beside_marks,
    ),
}
