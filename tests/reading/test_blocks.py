"""Properties of reading: total, placed, linear in what it is given."""

from __future__ import annotations

from pathlib import Path

import pytest
from hypothesis import given
from hypothesis import strategies as st

from crossfoot.documents import FORMATS, open_document
from crossfoot.reading import read_block
from crossfoot.reading.fold import fold
from crossfoot.scan import claims_of

FRAGMENTS = st.sampled_from(
    (Path(__file__).parent / "fragments.txt").read_text("utf-8").rstrip("\n").split("¦")
)
TEXTS = st.lists(FRAGMENTS, max_size=30).map("".join)


@pytest.mark.parametrize("language", FORMATS)
@given(text=st.one_of(TEXTS, st.text(max_size=300)))
def test_every_literal_stands_where_it_is_said_to_stand(language: str, text: str) -> None:
    document = open_document("x", text.encode("utf-8", "replace"), language)
    for block in document.blocks:
        for claim in read_block(language, block.kind, block.source, document.definitions).claims:
            assert claim.readings
            for reading in claim.readings:
                start, end = reading.span
                assert 0 <= start <= end <= len(block.source)
                assert reading.low <= reading.high
                if language == "plain":
                    printed = "".join(block.source[start:end].split())  # spaced-out mathematics
                    assert printed == "".join(reading.literal.split())


@given(TEXTS)
def test_reading_a_text_twice_gives_the_same(text: str) -> None:
    first = claims_of(text, "markdown")
    read_block.cache_clear()
    assert claims_of(text, "markdown") == first


@given(st.text(max_size=200))
def test_a_trailing_paragraph_changes_nothing_before_it(text: str) -> None:
    result = "The model fit, F(2, 57) = 3.90, p = .026."
    assert claims_of(f"{result}\n\nPlain words follow here.\n") == claims_of(result)
    assert len(fold(text)) == len(text)
