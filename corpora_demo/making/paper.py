"""A manuscript before it is written out."""

from __future__ import annotations

import json
from collections.abc import Mapping
from types import MappingProxyType
from typing import NamedTuple

from making.words import Error, Slip, fill, resolve

_NONE: Mapping[str, Slip] = MappingProxyType({})


class Paper(NamedTuple):
    """A manuscript: where it goes, its numbers, its words and what is wrong in it.

    ``minus`` is the sign it prints before negative numbers.
    """

    path: str
    values: Mapping[str, object]
    template: str
    slips: Mapping[str, Slip] = _NONE
    minus: str = "-"


def write_out(paper: Paper) -> tuple[str, tuple[Error, ...]]:
    """Return the text of the file, and the errors in it by line."""
    marked = fill(paper.template.lstrip("\n"), paper.values, paper.slips, paper.minus)
    text, errors = resolve(marked, paper.values, paper.slips, paper.minus)
    return (_notebook(text) if paper.path.endswith(".ipynb") else text), errors


def _notebook(text: str) -> str:
    """Turn text cut by ``%% markdown``, ``%% code`` and ``%% output`` into a notebook."""
    cells: list[dict[str, object]] = []
    for part in text.split("%% ")[1:]:
        kind, _, body = part.partition("\n")
        lines = body.strip("\n").splitlines(keepends=True)
        if kind == "output":
            output = {"name": "stdout", "output_type": "stream", "text": lines}
            cells[-1]["outputs"] = [output]
            continue
        number = len(cells) + 1
        cell: dict[str, object] = {"cell_type": kind, "id": f"cell-{number:02}", "metadata": {}}
        if kind == "code":
            cell |= {"execution_count": number, "outputs": []}
        cells.append(cell | {"source": lines})
    kernel = {"display_name": "Python 3", "language": "python", "name": "python3"}
    whole = {
        "cells": cells,
        "metadata": {"kernelspec": kernel, "language_info": {"name": "python"}},
        "nbformat": 4,
        "nbformat_minor": 5,
    }
    return json.dumps(whole, ensure_ascii=False, indent=1) + "\n"
