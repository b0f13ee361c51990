"""HTML."""

from __future__ import annotations

from crossfoot.documents.markup_reader import markup_reader
from crossfoot.documents.markup_text import Dialect
from crossfoot.documents.words import words

DIALECT = Dialect(
    blocks=words(
        "address article aside blockquote body caption center dd details dialog div dl dt fieldset "
        "figcaption figure footer form h1 h2 h3 h4 h5 h6 header hgroup hr html legend main p "
        "section summary tbody td tfoot th thead tr table li"
    ),
    headings={f"h{level}": level for level in range(1, 7)},
    hidden=words(
        "head nav script style template svg iframe textarea select button canvas audio video "
        "object noscript datalist"
    ),
    lists=frozenset(("ul", "ol", "dl", "menu")),
    items=frozenset(("li", "dt", "dd")),
    within_items=frozenset(("li", "dt", "dd")),
    amid=words("script svg button select canvas audio video object noscript datalist"),
)

READER = markup_reader(DIALECT)
