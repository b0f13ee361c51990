"""The text of HTML and XML elements: character references, scripts, formulas, what is hidden."""

from __future__ import annotations

import re
from typing import NamedTuple

from crossfoot.documents.edits import Closings
from crossfoot.documents.markup import Scanner, Words
from crossfoot.documents.mathml import show_mathml
from crossfoot.documents.mathtext import show_math, show_tex
from crossfoot.documents.tags import Tag, attribute_span, entity_at, tag_at
from crossfoot.documents.visible import OPAQUE, Builder, Visible, compose
from crossfoot.documents.words import words
from crossfoot.expressions import expression
from crossfoot.model import Span


class Dialect(NamedTuple):
    """What the elements of a kind of markup mean.

    Attributes
    ----------
    blocks
        Elements that stand on their own.
    headings
        Headings with their level; 0 stands for the depth of the section.
    hidden
        Elements no reader sees.
    lists, items
        Lists, and what starts an item of one.
    within_items
        Blocks that do not part a list.
    sections
        Elements whose depth is the level of a heading.
    amid
        Hidden elements that may stand amid a line, which they do not part.
    """

    blocks: frozenset[str]
    headings: dict[str, int]
    hidden: frozenset[str]
    lists: frozenset[str]
    items: frozenset[str]
    within_items: frozenset[str] = frozenset()
    sections: frozenset[str] = frozenset()
    amid: frozenset[str] = frozenset()


STRUCK = frozenset(("del", "s", "strike"))

#: Elements that an attribute can hide.
_CAN_HIDE = words(
    "span div p section aside a i b em strong u small font li ul ol td tr table svg sup sub "
    "mjx-math mjx-merror figure header footer details"
)
_HIDING = expression(
    r"katex-html|MathJax(?:_Preview|_SVG|_CHTML|_Display)?[\s\"']|mjx-chtml|aria-hidden=[\"']?true"
    r"|(?:^|\s)hidden(?=[\s/]|=|$)|display:\s{0,9}none|visibility:\s{0,9}hidden|line-through"
    r"|doc-noteref|footnote-ref|footnote-back|visually-hidden|sr-only"
)
_STARS = expression(r"\s{0,9}([*∗†‡]{1,9})\s{0,9}(?=</)")
_ISLAND = expression(r"\\[(\[]|\$\$|\$(?=[^\s\d$])(?P<single>[^$\n]{1,300})(?<![\s\\])\$(?!\d)")
_TEX = expression(r"[=<>^_\\]")
_CLOSING = {"\\(": "\\)", "\\[": "\\]", "$$": "$$"}
_BODY = expression(r"\\begin\{document\}([\s\S]*?)\\end\{document\}")
_REFERENCE = expression(r"\s{0,9}(?:<xref\b[^<>]*>[^<>]*</xref>[\s,;–-]*)+</sup>")


def hides(tag: Tag, dialect: Dialect) -> bool:
    """Tell whether a tag opens what no reader sees, or what counts twice, or is struck out."""
    if tag.name in dialect.hidden or tag.name in STRUCK:
        return not (tag.name == "script" and "math/tex" in tag.inside)
    return bool(tag.inside) and tag.name in _CAN_HIDE and bool(_HIDING.search(tag.inside))


def show_element(
    source: str, start: int, end: int, dialect: Dialect, breaks: str = "\n"
) -> Visible:
    """Show ``source[start:end]``; ``breaks`` stands for forced line breaks."""
    return _Text(source, start, end, dialect, breaks).run()


class _Text:
    """Walks over a stretch of markup and shows it."""

    def __init__(self, source: str, start: int, end: int, dialect: Dialect, breaks: str) -> None:
        self.source = source
        self.scanner = Scanner(source, start, end)
        self.end = end
        self.dialect = dialect
        self.breaks = breaks
        self.out = Builder()
        self.shown = False  # whether anything has been shown yet
        self.formula_end = start
        self.formula_has_mathml = False
        self.islands = False
        self.apart = False  # whether a paragraph has ended

    def run(self) -> Visible:
        """Return what is shown."""
        for token in self.scanner:
            if isinstance(token, Words):
                self.words(token)
            else:
                self.tag(token)
        shown = self.out.build()
        return compose(shown, _islands(shown.text)) if self.islands else shown

    def words(self, words: Words) -> None:
        """Show text."""
        if self.apart and not self.source[words.start : words.end].isspace():
            self.out.put(" ", words.start, words.start)
            self.apart = False
        put_words(self.out, self.source, words)
        self.shown = True
        if not self.islands:
            source = self.source
            self.islands = any(
                source.find(mark, words.start, words.end) >= 0 for mark in ("\\(", "\\[", "$")
            )

    def tag(self, tag: Tag) -> None:
        """Show what a tag stands for."""
        name = tag.name
        if tag.closing:
            if name in ("sup", "sub"):
                self.out.put("}", tag.start, tag.end)
            elif name in ("p", "div"):  # within a cell or an item
                self.apart = True
        elif name in ("sup", "sub"):
            self.script(tag)
        elif hides(tag, self.dialect):
            inside = self.scanner.inside(tag)
            if inside:
                self.scanner.position = self.scanner.after(inside)
        elif name == "br" or name == "break":
            self.out.put(self.breaks, tag.start, tag.end)
        elif name in self.dialect.items:
            self.item(tag)
        elif name in ("math", "tex-math", "script", "inline-formula", "disp-formula"):
            self.formula(tag)
        elif name in ("img", "graphic", "inline-graphic", "object"):
            self.image(tag)

    def item(self, tag: Tag) -> None:
        """Start an item of a list on a line of its own; what a term stands for follows it."""
        self.apart = False
        mark = "• " if tag.name in ("li", "list-item") else ""
        if tag.name == "dd":
            self.out.put(": ", tag.start, tag.end)
        else:
            self.out.put(("\n" if self.shown else "") + mark, tag.start, tag.end)
        self.shown = True

    def script(self, tag: Tag) -> None:
        """Raise or lower; raised stars are significance marks, raised references are dropped."""
        stars = _STARS.match(self.source, tag.end, self.end)
        close = tag_at(self.source, stars.end(), self.end) if stars else None
        if stars and close and close.name == tag.name:
            self.out.keep(self.source, *stars.span(1))
            self.scanner.position = close.end
        elif reference := _REFERENCE.match(self.source, tag.end, self.end):
            self.scanner.position = reference.end()
        else:
            self.out.put("^{" if tag.name == "sup" else "_{", tag.start, tag.end)

    def formula(self, tag: Tag) -> None:
        """Show a formula, once even if it is written in more than one way."""
        inside = self.scanner.inside(tag)
        if inside is None:
            return
        if tag.name in ("inline-formula", "disp-formula"):
            if tag.start >= self.formula_end:
                self.formula_end = inside.end
                found = re.search(r"<(?:\w{1,9}:)?math\b", self.source[inside.start : inside.end])
                self.formula_has_mathml = found is not None
            return
        self.scanner.position = self.scanner.after(inside)
        self.shown = True
        if tag.name == "math":
            self.mathml(tag, inside)
        elif not (self.formula_has_mathml and tag.start < self.formula_end):
            raw = tag.name == "script"
            self.out.add(_tex(self.source, inside, raw))

    def mathml(self, tag: Tag, inside: Span) -> None:
        """Show MathML; if it has no text, its alternative in TeX."""
        out = Builder()
        show_mathml(out, self.source, inside.start, inside.end)
        shown = out.build()
        if shown.text.strip():
            self.out.add(shown)
        elif span := attribute_span(tag, "alttext"):
            self.out.add(_tex(self.source, span, raw=False))

    def image(self, tag: Tag) -> None:
        """Show the formula an image stands for, or what is said of it, apart from the text."""
        span = attribute_span(tag, "alt")
        if span and is_formula(self.source, span):
            self.out.add(_tex(self.source, span, raw=False))
        else:
            self.out.put(OPAQUE, tag.start, tag.end)
            if span and span.start < span.end:
                put_words(self.out, self.source, Words(*span))
                self.out.put(OPAQUE, span.end, tag.end)
        self.shown = True


def is_formula(source: str, span: Span) -> bool:
    """Tell whether the alternative text of an image is a formula in TeX."""
    return source.startswith(("$", "\\(", "\\[", "{\\"), span.start)


def put_words(out: Builder, source: str, words: Words) -> None:
    """Show text with its character references."""
    position = words.start
    search = position
    while not words.raw and (mark := source.find("&", search, words.end)) >= 0:
        entity = entity_at(source, mark, words.end)
        search = mark + 1
        if entity:
            out.keep(source, position, mark)
            out.put(entity[0], mark, entity[1])
            position = search = entity[1]
    out.keep(source, position, words.end)


def _tex(source: str, span: Span, raw: bool) -> Visible:
    """Show TeX that stands in markup."""
    decoded = Builder()
    if raw:
        decoded.keep(source, span.start, span.end)
    else:
        for token in Scanner(source, span.start, span.end):
            if isinstance(token, Words):
                put_words(decoded, source, token)
    tex = decoded.build()
    body = _BODY.search(tex.text)
    start, end = body.span(1) if body else (0, len(tex.text))
    out = Builder()
    if re.search(r"\$|\\[(\[]|\\begin\b", tex.text[start:end]):
        show_tex(out, tex.text, start, end)
    else:
        show_math(out, tex.text, start, end)
    return compose(tex, out.build())


def _islands(text: str) -> Visible:
    """Show text in which formulas stand between TeX's own marks."""
    out = Builder()
    closings = Closings(text, len(text))
    position = 0
    while found := _ISLAND.search(text, position):
        mark = found[0]
        if (inside := found["single"]) is not None:
            if _TEX.search(inside):
                out.keep(text, position, found.start())
                show_math(out, text, *found.span("single"))
                position = found.end()
            else:  # two sums of money
                out.keep(text, position, found.end() - 1)
                position = found.end() - 1
            continue
        stop = closings.after(_CLOSING[mark], found.end())
        if stop < 0:
            break
        out.keep(text, position, found.start())
        show_math(out, text, found.end(), stop)
        position = stop + 2
    out.keep(text, position, len(text))
    return out.build()
