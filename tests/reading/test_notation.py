"""Each notation's own example is read as that quantity."""

from __future__ import annotations

import pytest

from crossfoot.reading.names import names
from crossfoot.reading.notation import NOTATIONS, Notation
from crossfoot.scan import claims_of

#: Scanner's words for what the neighbours settle, and what they become in the examples.
SETTLED = {
    "b-se": "se",
    "ci": "ci_low",
    "β": "beta",
    "ms-error": "ms",
    "chi2-of": "chi2",
    "statistic": "t",
}


@pytest.mark.parametrize("notation", NOTATIONS, ids=lambda n: f"{n.quantity}: {n.example[:40]}")
def test_example(notation: Notation) -> None:
    found = list(names(notation.example, 0, len(notation.example)))
    assert any(name.notation is notation for name in found)
    (claim, *others) = claims_of(notation.example)
    quantities = {reading.quantity for each in (claim, *others) for reading in each.readings}
    wanted = SETTLED.get(notation.quantity, notation.quantity)
    assert wanted in quantities or notation.quantity == "d"


@pytest.mark.parametrize("notation", NOTATIONS, ids=lambda n: n.quantity)
def test_initials_are_enough(notation: Notation) -> None:
    import re

    match = re.search(notation.pattern, notation.example)
    assert match is not None
    assert match.group()[0] in notation.initials
