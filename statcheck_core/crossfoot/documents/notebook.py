"""Jupyter notebooks: the text of their cells and of what these printed, written out in order."""

from __future__ import annotations

import json
from collections.abc import Iterator
from typing import NamedTuple

from crossfoot.documents import markdown
from crossfoot.documents.decoding import decode
from crossfoot.documents.format import Extracted, Reader
from crossfoot.documents.newlines import feeds_only
from crossfoot.documents.tags import angle_comments
from crossfoot.expressions import expression
from crossfoot.model import Block, Problem

_SURROGATE = expression("[\ud800-\udfff]")
_ESCAPE = expression(r"\x1b\[[0-9;]{0,20}[A-Za-z]")

#: Most cells that are read.
_MOST = 20_000


class _Part(NamedTuple):
    """A part of a cell: ``markdown``, ``verbatim`` or ``code`` text."""

    kind: str
    text: str


def extract(data: bytes) -> Extracted | Problem:
    """Write out a notebook's cells; each starts a page."""
    decoded = decode(data)
    if isinstance(decoded, Problem):
        return decoded
    try:
        content = json.loads(decoded.text)
    except ValueError as error:
        return Problem(f"The notebook is not valid JSON: {error}.")
    except RecursionError:
        return Problem("The notebook is nested too deeply.")
    cells = _cells(content)
    if cells is None:
        return Problem("The JSON is no notebook: it has no list of cells.")
    written, blocks, pages = _write(cells)
    return Extracted(written, blocks, pages, decoded.problems)


def _cells(content: object) -> list[object] | None:
    """Return the cells of a notebook of format 4 or 3."""
    if not isinstance(content, dict):
        return None
    cells = content.get("cells")
    sheets = content.get("worksheets")
    if cells is None and isinstance(sheets, list) and sheets and isinstance(sheets[0], dict):
        cells = sheets[0].get("cells")
    return cells[:_MOST] if isinstance(cells, list) else None


def _write(cells: list[object]) -> tuple[str, tuple[Block, ...], tuple[int, ...]]:
    """Return the text of all cells, its blocks, and where each cell starts."""
    parts: list[str] = []
    blocks: list[Block] = []
    pages: list[int] = []
    position = 0
    for cell in cells:
        pages.append(position)
        for kind, text in _parts(cell):
            if kind == "markdown":
                blocks.extend(
                    block._replace(start=position + block.start) for block in markdown.split(text)
                )
            elif text.strip():
                blocks.append(Block(kind, position, text))
            parts.append(text + "\n\n")
            position += len(text) + 2
    return "".join(parts), tuple(blocks), tuple(pages)


def _parts(cell: object) -> Iterator[_Part]:
    """Yield what a cell shows."""
    if not isinstance(cell, dict):
        return
    kind = cell.get("cell_type")
    source = _text(cell.get("source", cell.get("input")))
    if kind == "code":
        yield _Part("code", source)
        outputs = cell.get("outputs")
        for output in outputs if isinstance(outputs, list) else ():
            yield from _output(output)
    elif kind == "heading":  # format 3
        yield _Part("markdown", "# " + source)
    elif kind in ("markdown", "raw"):
        yield _Part("markdown", source)


def _output(output: object) -> Iterator[_Part]:
    """Yield what an output shows: printed text, or the plainest form of a value."""
    if not isinstance(output, dict) or output.get("output_type") in ("error", "pyerr"):
        return
    data = output.get("data")
    forms = data if isinstance(data, dict) else output
    if text := _text(output.get("text")) or _text(forms.get("text/plain")):
        yield _Part("verbatim", text)
    elif text := _text(forms.get("text/markdown")) or _text(forms.get("text/html")):
        yield _Part("markdown", text)


def _text(value: object) -> str:
    """Return a string, or the lines of a list, without terminal colours."""
    if isinstance(value, list):
        value = "".join(line for line in value if isinstance(line, str))
    if not isinstance(value, str):
        return ""
    return _SURROGATE.sub("\ufffd", _ESCAPE.sub("", feeds_only(value))).rstrip("\n")


READER = Reader(
    markdown.split, markdown.show, angle_comments, extract=extract, table=markdown.table
)
