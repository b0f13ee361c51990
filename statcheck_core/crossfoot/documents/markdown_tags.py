"""HTML tags within Markdown."""

from __future__ import annotations

from crossfoot.documents.markdown_math import formula
from crossfoot.documents.tags import Tag, attribute_span
from crossfoot.documents.visible import OPAQUE, Builder, Visible
from crossfoot.documents.words import words

#: Tags that Markdown passes on to HTML; others are text that looks like one (``p<b and c>3``).
TAGS = words(
    "a abbr b bdi big blockquote br caption center cite code col colgroup dd del details dfn div "
    "dl dt em figcaption figure font h1 h2 h3 h4 h5 h6 hr i img ins kbd li mark math nobr ol p pre "
    "q s samp section small span strike strong sub summary sup table tbody td tfoot th thead tr tt "
    "u ul var wbr"
)
#: Of those, the ones that part what stands before from what follows.
APART = words(
    "blockquote br caption center dd details div dl dt figcaption figure h1 h2 h3 h4 h5 h6 hr li "
    "ol p pre section summary table td th tr ul"
)


def image(source: str, tag: Tag) -> Visible | str:
    """Show an image: the formula in its alternative text, or what is said of it there."""
    span = attribute_span(tag, "alt")
    if span is None or span.end <= span.start:
        return OPAQUE
    if source[span.start] == source[span.end - 1] == "$" and span.end - span.start > 2:
        return formula(source, span.start + 1, span.end - 1)
    out = Builder()
    out.put(OPAQUE, tag.start, span.start)
    out.keep(source, *span)
    out.put(OPAQUE, span.end, tag.end)
    return out.build()
