"""HTML."""

from __future__ import annotations

from crossfoot.documents.format import Definitions, Reader
from crossfoot.documents.markup_blocks import split_markup
from crossfoot.documents.markup_tables import read_table
from crossfoot.documents.markup_text import Dialect, show_element
from crossfoot.documents.printout import show_printout
from crossfoot.documents.table import Table
from crossfoot.documents.tags import angle_comments
from crossfoot.documents.visible import Visible, compose
from crossfoot.documents.words import words
from crossfoot.model import Block

DIALECT = Dialect(
    blocks=words(
        "address article aside blockquote body caption center dd details dialog div dl dt fieldset "
        "figcaption figure footer form h1 h2 h3 h4 h5 h6 header hgroup hr html legend main nav p "
        "section summary tbody td tfoot th thead tr table li"
    ),
    headings={f"h{level}": level for level in range(1, 7)},
    hidden=words(
        "head script style template svg iframe textarea select button canvas audio video "
        "object noscript datalist"
    ),
    lists=frozenset(("ul", "ol", "dl", "menu")),
    items=frozenset(("li", "dt", "dd")),
    within_items=frozenset(("li", "dt", "dd")),
)


def split(text: str) -> tuple[Block, ...]:
    """Split into blocks."""
    return split_markup(text, DIALECT)


def show(kind: str, source: str, definitions: Definitions) -> Visible:
    """Show a block."""
    return show_in(DIALECT, kind, source)


def table(source: str, definitions: Definitions) -> Table:
    """Read a table."""
    return read_table(source, DIALECT)


def show_in(dialect: Dialect, kind: str, source: str) -> Visible:
    """Show a block of a document in ``dialect``."""
    if kind == "table":
        return read_table(source, dialect).visible
    shown = show_element(source, 0, len(source), dialect)
    return compose(shown, show_printout(shown.text)) if kind == "verbatim" else shown


READER = Reader(split, show, angle_comments, table=table)
