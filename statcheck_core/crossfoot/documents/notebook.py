"""Jupyter notebooks: the text of their cells and of what these printed, written out in order."""

from __future__ import annotations

import json
from collections.abc import Iterator
from typing import NamedTuple

from crossfoot.documents import markdown
from crossfoot.documents.captions import together
from crossfoot.documents.decoding import decode
from crossfoot.documents.format import Extracted, Reader
from crossfoot.documents.newlines import feeds_only
from crossfoot.documents.tags import angle_comments
from crossfoot.expressions import expression
from crossfoot.model import Block, Problem

_SURROGATE = expression("[\ud800-\udfff]")

#: What colours the text that code prints.
TERMINAL = expression(r"\x1b\[[0-9;]{0,20}[A-Za-z]")

#: What stands in place of an object that shows itself in another form.
_OBJECT = expression(r"<[\w.]{1,200}[^<>\n]{0,200}>")

#: Most cells that are read.
_MOST = 20_000

#: Between what two parts write out.
GAP = "\n\n"


class Part(NamedTuple):
    """A part of a cell.

    Attributes
    ----------
    kind
        ``markdown``, ``verbatim`` or ``code``.
    text
        What it shows.
    value
        The string, or list of strings, of the notebook that the text was made from.
    lead
        Characters that the text has before it.
    """

    kind: str
    text: str
    value: object
    lead: int = 0


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
    cells = cells_of(content)
    if cells is None:
        return Problem("The JSON is no notebook: it has no list of cells.")
    written, blocks, pages = _write(cells)
    return Extracted(written, blocks, pages, decoded.problems)


def cells_of(content: object) -> list[object] | None:
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
        for kind, text, _, _ in parts_of(cell):
            if kind == "markdown":
                blocks.extend(
                    block._replace(start=position + block.start)
                    for block in together(markdown.split(text), text)
                )
            elif text.strip():
                blocks.append(Block(kind, position, text))
            parts.append(text + GAP)
            position += len(text) + len(GAP)
    return "".join(parts), tuple(blocks), tuple(pages)


def parts_of(cell: object) -> Iterator[Part]:
    """Yield what a cell shows."""
    if not isinstance(cell, dict):
        return
    kind = cell.get("cell_type")
    value = cell.get("source", cell.get("input"))
    source = _text(value)
    if kind == "code":
        yield Part("code", source, value)
        outputs = cell.get("outputs")
        for output in outputs if isinstance(outputs, list) else ():
            yield from _output(output)
    elif kind == "heading":  # format 3
        yield Part("markdown", "# " + source, value, 2)
    elif kind in ("markdown", "raw"):
        yield Part("markdown", source, value)


def _output(output: object) -> Iterator[Part]:
    """Yield what an output shows: printed text, or the plainest form of a value."""
    if not isinstance(output, dict) or output.get("output_type") in ("error", "pyerr"):
        return
    data = output.get("data")
    forms = data if isinstance(data, dict) else output
    for kind, value in (
        ("verbatim", output.get("text")),
        ("verbatim", forms.get("text/plain")),
        ("markdown", forms.get("text/markdown")),
        ("markdown", forms.get("text/latex")),
        ("markdown", forms.get("text/html")),
    ):
        text = _text(value)
        if text and not _OBJECT.fullmatch(text):
            yield Part(kind, text, value)
            return


def strings_of(value: object) -> Iterator[str]:
    """Yield the strings of which a text is made: one, or those of a list."""
    for item in value if isinstance(value, list) else (value,):
        if isinstance(item, str):
            yield item


def _text(value: object) -> str:
    """Return the text of strings, without terminal colours."""
    text = "".join(strings_of(value))
    return _SURROGATE.sub("\ufffd", TERMINAL.sub("", feeds_only(text))).rstrip("\n")


READER = Reader(
    markdown.split,
    markdown.show,
    angle_comments,
    markdown.define,
    extract=extract,
    table=markdown.table,
    expand=markdown.expand,
)
