"""Reading, as prose: each example's text gives exactly the claims beside it."""

from __future__ import annotations

import pytest

from crossfoot.scan import claims_of
from reading.examples_io import Example, examples, told


@pytest.mark.parametrize("example", examples(), ids=lambda example: example.name)
def test_what_is_read(example: Example) -> None:
    claims = [told(claim) for claim in claims_of(example.text, example.language)]
    assert claims == [line for line in example.claims if line != "nothing"]


@pytest.mark.parametrize("example", examples(), ids=lambda example: example.name)
def test_an_example_says_what_it_expects(example: Example) -> None:
    assert example.claims
