"""Notebooks: cells in order, each a page; outputs in their plainest form."""

from __future__ import annotations

import json

import pytest

from crossfoot import documents
from crossfoot.documents import open_document, show_block, unreadable

CELLS = [
    {"cell_type": "markdown", "source": ["# Fit\n", "\n", "*F*(1, 58) = 9.41"]},
    {
        "cell_type": "code",
        "source": "summary(fit)",
        "outputs": [
            {"output_type": "stream", "text": ["\x1b[1mF-statistic: 3\x1b[0m\n", "p: 4\n"]},
            {"output_type": "execute_result", "data": {"text/plain": "a", "text/html": "<b>b</b>"}},
            {
                "output_type": "display_data",
                "data": {"text/html": "<table><tr><td>c</td></tr></table>"},
            },
            {"output_type": "display_data", "data": {"image/png": "abcd"}},
            {"output_type": "error", "traceback": ["F = 3"]},
        ],
    },
    {"cell_type": "raw", "source": "raw"},
    {"cell_type": "markdown", "source": "bad \ud800 text\r\nend"},
]


def shown(document: documents.Document) -> list[tuple[str, str]]:
    return [(block.kind, show_block(document, block).text) for block in document.blocks]


def test_cells_and_outputs() -> None:
    document = open_document("a.ipynb", json.dumps({"cells": CELLS}).encode())
    assert shown(document) == [
        ("heading", "Fit"),
        ("prose", "F(1, 58) = 9.41"),
        ("code", "summary(fit)"),
        ("verbatim", "F-statistic: 3\np: 4"),
        ("verbatim", "a"),
        ("table", "c"),
        ("prose", "raw"),
        ("prose", "bad \ufffd text\nend"),
    ]
    starts = [document.text.index(words) for words in ("# Fit", "summary", "raw", "bad")]
    assert list(document.pages) == starts


def test_the_third_format() -> None:
    old = {
        "worksheets": [
            {
                "cells": [
                    {"cell_type": "heading", "source": "Fit", "level": 1},
                    {
                        "cell_type": "code",
                        "input": ["x\n", "y"],
                        "outputs": [{"output_type": "pyout", "text": ["F = 3"]}],
                    },
                ]
            }
        ]
    }
    document = open_document("a.ipynb", json.dumps(old).encode())
    assert shown(document) == [("heading", "Fit"), ("code", "x\ny"), ("verbatim", "F = 3")]


@pytest.mark.parametrize(
    ("text", "message"),
    [
        ("{", "The notebook is not valid JSON: "),
        ("[1]", "The JSON is no notebook: it has no list of cells."),
        ('{"cells": 3}', "The JSON is no notebook: it has no list of cells."),
        ("[" * 200_000, "The notebook is nested too deeply."),
    ],
)
def test_what_is_no_notebook(text: str, message: str) -> None:
    found = unreadable(open_document("a.ipynb", text.encode()))
    assert found is not None
    assert found.startswith(message)
