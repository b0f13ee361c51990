"""Plain text: paragraphs between blank lines, and the printouts of programs among them."""

from __future__ import annotations

import re

from crossfoot.documents.captions import together
from crossfoot.documents.format import Comment, Reader
from crossfoot.documents.printout import show_printout
from crossfoot.documents.visible import Visible, verbatim
from crossfoot.expressions import expression
from crossfoot.model import Block, Span

_BREAK = expression(r"\n(?:[ \t]*\n)+")

#: A line in columns: a tab, or two spaces that do not follow the end of a sentence.
_COLUMNS = expression(r"[^\s.?!] {2,}\S|\S\t+\S")

#: A line that only rules off or names a part of a printout.
_LABEL = expression(r"[-=_.*+| \t]+|[^\n]{1,60}:[ \t]*|[ \t]*[A-Z][A-Za-z ]{3,50}")

#: A label and its value, as programs print them line by line.
_PAIR = expression(r"[ \t]*[A-Z][\w .()-]{1,40}:[ \t]+\S[^\n]{0,40}")

_RULE = expression(r"[-=_]{6,}")

_SIGNATURE = expression(
    r"[ \t]*(?:#>|##|%)? ?(?:Call:|Coefficients:|Residual standard error:|Signif\. codes:"
    r"|Multiple R-squared:|F-statistic:|Response:|data:  )"
)

#: Longest stretch, in code points, that is read as one printout.
_LONGEST = 40_000


def split(text: str) -> tuple[Block, ...]:
    """Split at blank lines; parts of one printout stay together."""
    blocks: list[Block] = []
    position = 0
    start = end = -1  # of the printout that is being collected
    waiting: list[Block] = []  # what names a part of the printout, if the printout goes on
    for stop, after in _breaks(text):
        part = text[position:stop]
        kind = _kind(part) if len(part) <= _LONGEST else "prose"
        if start >= 0 and (kind == "prose" or stop - start > _LONGEST):
            blocks += [Block("verbatim", start, text[start:end]), *waiting]
            start = -1
            waiting = []
        if kind == "verbatim":
            start, end = (position if start < 0 else start), stop
            waiting = []
        elif kind == "label" and start >= 0:
            waiting.append(Block("prose", position, part))
        elif part.strip():
            blocks.append(Block("prose", position, part))
        position = after
    if start >= 0:
        blocks += [Block("verbatim", start, text[start:end]), *waiting]
    return together(blocks, text, "verbatim")


def _breaks(text: str) -> list[tuple[int, int]]:
    """Return where each paragraph ends and where the next one starts."""
    found = [match.span() for match in _BREAK.finditer(text)]
    found.append((len(text), len(text)))
    return found


def _kind(part: str) -> str:
    """Tell a printout (``verbatim``) or a ``label`` within one from ``prose``."""
    lines = part.split("\n")
    columns = sum(1 for line in lines if _COLUMNS.search(line) or _RULE.search(line))
    if 2 * columns >= len(lines) or any(_SIGNATURE.match(line) for line in lines):
        return "verbatim"
    if len(lines) >= 2 and all(_PAIR.fullmatch(line) for line in lines):
        return "verbatim"
    if len(lines) <= 2 and all(_LABEL.fullmatch(line) for line in lines):
        return "label"
    return "prose"


def show(kind: str, source: str) -> Visible:
    """Show the source as it stands, a printout without comment marks."""
    return show_printout(source) if kind == "verbatim" else verbatim(source)


_COMMENT = expression(r"^[ \t]*#[ \t]*(crossfoot:[^\n]*)", re.M)


def comments(text: str) -> tuple[Comment, ...]:
    """Return the lines that speak to Crossfoot: plain text has no other comments."""
    return tuple(Comment(Span(*found.span()), found.group(1)) for found in _COMMENT.finditer(text))


READER = Reader(split, show, comments)
