"""The functions that read a dialect of markup in angle brackets, HTML's or another."""

from __future__ import annotations

from crossfoot.documents.format import Reader
from crossfoot.documents.markup_blocks import split_markup
from crossfoot.documents.markup_tables import read_table
from crossfoot.documents.markup_text import Dialect, show_element
from crossfoot.documents.printout import show_printout
from crossfoot.documents.table import Table
from crossfoot.documents.tags import angle_comments
from crossfoot.documents.visible import Visible, compose
from crossfoot.model import Block


def markup_reader(dialect: Dialect) -> Reader:
    """Return the functions that read a dialect."""

    def split(text: str) -> tuple[Block, ...]:
        return split_markup(text, dialect)

    def show(kind: str, source: str) -> Visible:
        if kind == "table":
            return read_table(source, dialect).visible
        shown = show_element(source, 0, len(source), dialect)
        return compose(shown, show_printout(shown.text)) if kind == "verbatim" else shown

    def table(source: str) -> Table:
        return read_table(source, dialect)

    return Reader(split, show, angle_comments, table=table)
