"""Whatever a document holds, reading it gives blocks that lie where they say, and never raises."""

from __future__ import annotations

import json

import pytest
from hypothesis import given, settings
from hypothesis import strategies as st

from crossfoot import documents
from documents.support import COMMON, FRAGMENTS, check_comments, check_document

LANGUAGES = sorted(set(documents.FORMATS) & set(FRAGMENTS) - {"notebook"})

#: How long one example takes depends on what else the machine does; speed has its own tests.
UNHURRIED = settings(deadline=None)

#: Line ends of every kind, in texts that are otherwise arbitrary.
ANY_TEXT = st.text(st.characters(exclude_categories=["Cs"], exclude_characters="\0"), max_size=200)


def fragments(language: str) -> st.SearchStrategy[str]:
    return st.lists(st.sampled_from(FRAGMENTS[language] + COMMON), max_size=40).map("".join)


def read(language: str, text: str) -> None:
    check_document(documents.open_document("x", text.encode(), language))
    check_comments(language, text)


@pytest.mark.parametrize("language", LANGUAGES)
@UNHURRIED
@given(data=st.data())
def test_arbitrary_text(language: str, data: st.DataObject) -> None:
    read(language, data.draw(ANY_TEXT))


@pytest.mark.parametrize("language", LANGUAGES)
@UNHURRIED
@given(data=st.data())
def test_text_made_of_markup(language: str, data: st.DataObject) -> None:
    read(language, data.draw(fragments(language)))


@pytest.mark.parametrize("language", LANGUAGES)
@UNHURRIED
@given(data=st.data())
def test_line_ends_make_no_difference(language: str, data: st.DataObject) -> None:
    text = data.draw(fragments(language))
    pairs = text.replace("\n", "\r\n")
    read(language, pairs)
    assert shown(language, text) == shown(language, pairs)
    assert shown(language, text) == shown(language, text.replace("\n", "\r"))


def shown(language: str, text: str) -> list[tuple[str, str]]:
    document = documents.open_document("x", text.encode(), language)
    return [(block.kind, documents.show_block(document, block).text) for block in document.blocks]


CELLS = st.recursive(
    st.none() | st.integers() | st.text(max_size=30),
    lambda inner: (
        st.lists(inner, max_size=4)
        | st.dictionaries(
            st.sampled_from(
                [
                    "cells",
                    "cell_type",
                    "source",
                    "outputs",
                    "data",
                    "text",
                    "text/plain",
                    "text/html",
                    "worksheets",
                    "output_type",
                    "markdown",
                ]
            )
            | st.text(max_size=5),
            inner | st.sampled_from(["markdown", "code", "raw", "stream", "error"]),
            max_size=5,
        )
    ),
    max_leaves=20,
)


@UNHURRIED
@given(CELLS)
def test_arbitrary_json_as_a_notebook(content: object) -> None:
    check_document(documents.open_document("x.ipynb", json.dumps({"cells": content}).encode()))
    check_document(documents.open_document("x.ipynb", json.dumps(content).encode()))


@UNHURRIED
@given(st.lists(st.tuples(st.sampled_from(["markdown", "code", "raw"]), fragments("notebook"))))
def test_notebook_cells_made_of_markup(cells: list[tuple[str, str]]) -> None:
    content = {"cells": [{"cell_type": kind, "source": source} for kind, source in cells]}
    document = documents.open_document("x.ipynb", json.dumps(content).encode())
    check_document(document)
    assert len(document.pages) == len(cells)


@UNHURRIED
@given(st.binary(max_size=300), st.sampled_from([*documents.FORMATS]))
def test_arbitrary_bytes(data: bytes, language: str) -> None:
    check_document(documents.open_document("x", data, language))
