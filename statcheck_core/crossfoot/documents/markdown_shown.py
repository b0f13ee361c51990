"""Markdown shown: headings and paragraphs without the marks of their lines, and tables."""

from __future__ import annotations

from crossfoot.documents.drawn_tables import read_table
from crossfoot.documents.edits import Edit
from crossfoot.documents.markdown_inline import show_inline
from crossfoot.documents.printout import show_printout
from crossfoot.documents.table import Table
from crossfoot.documents.visible import Builder, Visible
from crossfoot.expressions import expression

_HEADING = expression(r"[ \t]*(?:> ?)*[ \t]*(#{1,6})(?:[ \t]+|$)")
_HEADING_END = expression(r"(?:[ \t]+#+)?(?:[ \t]*\{[^{}\n]{0,200}\})?[ \t]*$")
_UNDERLINE = expression(r"\n[ \t>]*[=-]+[ \t]*$")
_QUOTE = expression(r"(?:[ \t]{0,3}> ?)+")
_BULLET = expression(r"[ \t]*([-+*])[ \t]+(?=(\S))")
#: A dash of two hyphens in the place of a sign.
_MINUS = expression(r"(?:(?<=[=<>≈(\[])|(?<=[=<>≈(\[] ))--(?=\.?\d)")
_LABEL = expression(r"[ \t]*(?:\[\^[^\s\[\]]{1,60}\]:|:(?!:)|Table:)[ \t]*")


def show(kind: str, source: str) -> Visible:
    """Show a block."""
    if kind in ("verbatim", "code"):
        return show_printout(source)
    if kind == "table":
        return table(source).visible
    out = Builder()
    start, end = 0, len(source)
    if kind == "heading":
        mark = _HEADING.match(source)
        if mark:
            start = mark.end()
        elif underline := _UNDERLINE.search(source):
            end = underline.start()
        closing = _HEADING_END.search(source, max(start, end - 260), end)
        end = closing.start() if closing else end
    show_inline(out, source, start, end, _line_edits(source, start, end))
    return out.build()


def table(source: str) -> Table:
    """Read a table, which may be raw HTML or LaTeX."""
    head = source.lstrip()[:2]
    if head[:1] == "<":
        # Only few documents hold such tables.
        from crossfoot.documents.html import DIALECT
        from crossfoot.documents.markup_tables import read_table as read_markup

        return read_markup(source, DIALECT)
    if head[:1] == "\\":
        from crossfoot.documents import latex

        return latex.table(source)
    return read_table(source, show_inline)


def _line_edits(source: str, start: int, end: int) -> list[Edit]:
    """Return what the starts of lines call for: quote marks go, bullets are shown as such."""
    edits: list[Edit] = []
    quoted = start == 0 and _QUOTE.match(source) is not None
    listed = False
    position = start
    while position <= end:
        line = position
        if quoted and (quote := _QUOTE.match(source, position, end)):
            edits.append(Edit(position, quote.end()))
            line = quote.end()
        if position == start and start == 0 and (label := _LABEL.match(source, line, end)):
            edits.append(Edit(line, label.end()))
            line = label.end()
        if bullet := _BULLET.match(source, line, end):
            # In the middle of a paragraph "- 0.57" is a number that was wrapped, not an item.
            listed = listed or position == start
            if listed or not (bullet[2].isdigit() or bullet[2] in ".=<>"):
                edits.append(Edit(bullet.start(1), bullet.end(1), "•"))
        feed = source.find("\n", position, end)
        if feed < 0:
            break
        position = feed + 1
    if "--" in source:
        edits += [Edit(*sign.span(), "−") for sign in _MINUS.finditer(source, start, end)]
        edits.sort(key=lambda edit: edit[:2])
    return edits
