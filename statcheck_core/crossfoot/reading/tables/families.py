"""Whole models by their labels, and which coefficients are whose."""

from __future__ import annotations

from collections.abc import Iterable

from crossfoot.model import Claim, Reading
from crossfoot.reading.tables.rows import is_intercept

FITS = frozenset({"overall-model", "model-change"})


class Families:
    """The models of a table: what is printed of each, of itself and of its change."""

    def __init__(self, claims: Iterable[Claim]) -> None:
        self._models: dict[str, list[Claim]] = {}
        for claim in claims:
            if claim.kind in FITS:
                self._models.setdefault(claim.label, []).append(claim)

    def __bool__(self) -> bool:
        return bool(self._models)

    def label_of(self, claim: Claim) -> str | None:
        """Return the label of the model that a claim is of, if that is sure."""
        if claim.kind in FITS:
            found = [claim.label] if claim.label in self._models else []
        elif len(self._models) == 1:
            found = list(self._models)
        else:
            found = [
                label for label in self._models if label and claim.label.endswith(f", {label}")
            ]
        if len(found) != 1:
            return None
        kinds = [model.kind for model in self._models[found[0]]]
        return found[0] if len(kinds) == len(set(kinds)) else None

    def whole(self, label: str | None) -> Claim | None:
        """Return what is printed of a model itself."""
        models = [] if label is None else self._models.get(label, [])
        return next((model for model in models if model.kind == "overall-model"), None)

    def told(self, label: str | None, quantity: str) -> Reading | None:
        """Return what is printed of a model's quantity, of itself or of its change."""
        models = [] if label is None else self._models.get(label, [])
        found = (printed(model, quantity) for model in models)
        return next((reading for reading in found if reading is not None), None)

    def error_of(self, claim: Claim) -> Reading | None:
        """Return the error df of the model that a coefficient is of, if there is no doubt which."""
        label = self.label_of(claim)
        if label is None:
            return None
        if sum(map(len, self._models.values())) == 1:
            return self.told(label, "df2")
        whole = self.whole(label)
        return None if whole is None else printed(whole, "df2")

    def name_of(self, claim: Claim) -> str:
        """Return the name of a predictor without that of its model."""
        label = self.label_of(claim)
        if label is None:
            return claim.label.split(", ")[0]  # what follows may name one of several models
        return claim.label.removesuffix(f", {label}")


def is_slope(claim: Claim) -> bool:
    """Say whether a claim is of a coefficient that is no intercept."""
    return claim.kind == "coefficient" and not any(map(is_intercept, claim.label.split(", ")))


def printed(claim: Claim, quantity: str, term: str | None = None) -> Reading | None:
    """Return a reading of a claim, by default one of no row."""
    return next((r for r in claim.readings if r.quantity == quantity and r.term == term), None)


def tells(claim: Claim, *quantities: str) -> bool:
    """Say whether a claim has one of some quantities, of itself or from elsewhere."""
    return any(r.quantity in quantities for r in (*claim.readings, *claim.given))
