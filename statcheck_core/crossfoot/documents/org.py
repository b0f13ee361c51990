"""Org."""

from __future__ import annotations

import re

from crossfoot.documents.drawn_tables import read_table
from crossfoot.documents.edits import MOST_MARKS, Closings, Edit, Marks, Pairs, apply_edits
from crossfoot.documents.format import Comment, Reader
from crossfoot.documents.lines import Lines
from crossfoot.documents.mathtext import show_math
from crossfoot.documents.org_names import NAMES
from crossfoot.documents.printout import show_printout
from crossfoot.documents.table import Table
from crossfoot.documents.tags import named
from crossfoot.documents.tex_symbols import SYMBOLS
from crossfoot.documents.visible import OPAQUE, Builder, Visible
from crossfoot.expressions import expression
from crossfoot.model import Block, Span

_HEADING = expression(r"(\*+)[ \t]+(?:(?:TODO|DONE|COMMENT)[ \t]+)?")
_BEGIN = expression(r"[ \t]*#\+begin_(\w{1,30})", re.I)
_KEYWORD = expression(r"[ \t]*#\+(\w{1,30})(?:\[[^\[\]]{0,100}\])?:[ \t]*", re.I)
_COMMENT = expression(r"[ \t]*#(?:[ \t]+|$)")
_DRAWER = expression(r"[ \t]*:[A-Za-z][\w-]{0,40}:[ \t]*")
_FIXED = expression(r"[ \t]*:(?: |$)")
_RULE = expression(r"[ \t]*\|[-+|]+[ \t]*")
_TAGS = expression(r"[ \t]+:[\w@#%:]{1,100}:[ \t]*$")
_BULLET = expression(r"[ \t]*([-+])[ \t]+(?=\S)")
_END = expression(r"[ \t]*#\+end_", re.I)
_NOTE = expression(r"\[fn:[\w-]{1,40}\][ \t]+")
_VERBATIM = frozenset(("src", "example", "verbatim"))
_UNSEEN = frozenset(("comment", "export", "html", "latex"))


def split(text: str) -> tuple[Block, ...]:
    """Split into paragraphs, headings, code and tables."""
    lines = Lines(text)
    number = 0
    while number < len(lines.lines):
        number = _line(lines, number)
    return tuple(lines.blocks)


def _line(lines: Lines, number: int) -> int:
    """Handle what starts at a line and return the next line to handle."""
    line = lines.lines[number]
    if not line or line.isspace():
        return number + 1
    first = line.lstrip()[0]
    if line[0] == "*" and (heading := _HEADING.match(line)):
        return lines.add("heading", number, number + 1, len(heading[1]))
    if first == "#" and (begin := _BEGIN.match(line)):
        return _environment(lines, number, begin[1].lower())
    if first == "#" and (keyword := _KEYWORD.match(line)):
        if keyword[1].lower() in ("caption", "title", "subtitle"):
            lines.add("prose", number, number + 1, offset=keyword.end())
        return number + 1
    if first == "#" and (_COMMENT.match(line) or _END.match(line)):
        return number + 1
    if first == ":" and _FIXED.match(line):
        return lines.add("verbatim", number, _while(lines, number, _FIXED))
    if first == ":" and _DRAWER.fullmatch(line):
        return _drawer(lines, number)
    if first == "|":
        return lines.add("table", number, _while(lines, number, re.compile(r"[ \t]*\|")))
    return lines.add("prose", number, _paragraph(lines, number))


def _while(lines: Lines, number: int, pattern: re.Pattern[str]) -> int:
    """Return the line after those that start like ``pattern``."""
    while number < len(lines.lines) and pattern.match(lines.lines[number]):
        number += 1
    return number


def _paragraph(lines: Lines, number: int) -> int:
    """Return the line after the paragraph that starts at a line."""
    number += 1
    while number < len(lines.lines) and not lines.blank(number):
        line = lines.lines[number]
        if line[0] == "*" and _HEADING.match(line):
            break
        if line.lstrip()[0] in "#|:" and (
            _KEYWORD.match(line)
            or _BEGIN.match(line)
            or _END.match(line)
            or _COMMENT.match(line)
            or _FIXED.match(line)
            or _RULE.fullmatch(line)
        ):
            break
        if _NOTE.match(line):
            break
        number += 1
    return number


def _environment(lines: Lines, number: int, name: str) -> int:
    """Handle ``#+begin_…`` to ``#+end_…``."""
    end = re.compile(rf"[ \t]*#\+end_{name}\b", re.I)
    if name not in _VERBATIM and name not in _UNSEEN:
        return number + 1  # a quotation and the like: its lines are paragraphs
    last = number + 1
    while last < len(lines.lines) and not end.match(lines.lines[last]):
        last += 1
    if name in _VERBATIM:
        lines.add("verbatim", number + 1, last)
    return last + 1


def _drawer(lines: Lines, number: int) -> int:
    """Pass over a drawer, if it is closed within a few lines."""
    for last in range(number + 1, min(number + 60, len(lines.lines))):
        if lines.lines[last].strip().upper() == ":END:":
            return last + 1
    return number + 1


_MARK = Marks(
    "[]$\\^_{=~*/+sc",
    r"(?P<link>\[\[(?P<url>[^\[\]\n]{1,2000})\](?:\[(?P<name>[^\[\]]{1,2000})\])?\])"
    r"|(?P<inline>\[fn:[\w-]{0,40}:)|(?P<note>\[fn:[\w-]{1,40}\])|(?P<close>\])"
    r"|(?P<math>\$\$[^$]{1,5000}\$\$|\$[^\s$](?:[^$\n]{0,1000}?[^\s$])?\$(?![0-9])"
    r"|\\[(\[])"
    r"|\\(?P<entity>[A-Za-z]{1,30})(?:\{\})?|(?P<script>[\^_]\{(?P<braced>[^{}\n]{1,60})\})"
    r"|\^(?P<raised>[-+]?[A-Za-z0-9]{1,12}|\*{1,3})|(?P<run>(?:src|call)_[^\s{(\[]{1,40}"
    r"(?:\[[^\]\n]{0,200}\])?(?:\{[^{}\n]{0,500}\}|\([^()\n]{0,500}\)))|(?P<macro>\{\{\{(?:results\([=~]?(?P<result>[^{}()\n]{0,200}?)[=~]?\)|[^{}\n]{1,200})\}\}\})"
    r"|(?P<code>(?<![\w=~])(?P<tick>[=~])(?=\S)[^\n]{1,120}?(?<=\S)(?P=tick)(?![\w=~]))|(?P<mark>[*/_+])",
)

#: Entities that neither TeX nor HTML calls so.
_ENTITIES = {"vert": "|", "slash": "/", "under": "_", "EUR": "€"}


def show(kind: str, source: str) -> Visible:
    """Show a block."""
    if kind == "verbatim":
        return _show_verbatim(source)
    if kind == "table":
        return table(source).visible
    out = Builder()
    start, end = 0, len(source)
    edits: list[Edit] = []
    if kind == "heading":
        heading = _HEADING.match(source)
        start = heading.end() if heading else 0
        tags = _TAGS.search(source, max(start, end - 120))
        end = tags.start() if tags else end
    else:
        note = _NOTE.match(source)
        start = note.end() if note else 0
        edits = [
            Edit(*bullet.span(1), "•")
            for bullet in re.finditer(_BULLET.pattern, source, re.M)
            if bullet.start() == 0 or source[bullet.start() - 1] == "\n"
        ]
        if not (edits and edits[0].start == len(source) - len(source.lstrip())):
            edits = []
    show_inline(out, source, start, end, edits)
    return out.build()


def _show_verbatim(source: str) -> Visible:
    """Show fixed-width text without the colons before its lines."""
    if not all(_FIXED.match(line) for line in source.split("\n")):
        return show_printout(source)
    out = Builder()
    position = 0
    for line in source.split("\n"):
        mark = _FIXED.match(line)
        out.keep(
            source,
            position + (mark.end() if mark else 0),
            min(position + len(line) + 1, len(source)),
        )
        position += len(line) + 1
    return out.build()


def table(source: str) -> Table:
    """Read a table; its first rule ends the header, the others say nothing."""
    lines = source.split("\n")
    rules = [number for number, line in enumerate(lines) if _RULE.fullmatch(line)]
    for number in rules:
        # Blank, or drawn as in Markdown: every place is kept.
        inner = number == next((n for n in rules if n), 0)
        lines[number] = lines[number].replace("+", "|") if inner else " " * len(lines[number])
    return read_table("\n".join(lines), show_inline)


def show_inline(
    out: Builder, source: str, start: int, end: int, line_edits: list[Edit] | None = None
) -> None:
    """Show ``source[start:end]``."""
    pairs = Pairs(source, start, end)
    pairs.edits.extend(line_edits or ())
    notes: list[int] = []
    closings = Closings(source, end)
    position = start
    left = MOST_MARKS
    while left and (found := _MARK.next(source, position, end)):
        left -= 1
        position = found.end()
        if found["math"] and found["math"][0] == "\\":
            stop = closings.after("\\)" if found["math"][1] == "(" else "\\]", position)
            if stop >= 0:
                position = stop + 2
                pairs.edits.append(
                    Edit(found.start(), position, _formula(source, found.start(), position))
                )
        else:
            _handle(pairs, found, notes)
    apply_edits(out, source, start, end, pairs.edits)


def _handle(pairs: Pairs, found: re.Match[str], notes: list[int]) -> None:
    """Write down what a mark does."""
    edits = pairs.edits
    kind = found.lastgroup
    if found["mark"]:
        if found["mark"] in (pairs.before(found.start()), pairs.after(found.end())):
            return  # stars in a row are marks of significance
        if found["mark"] == "+":
            pairs.struck("+", *found.span())
        else:
            pairs.mark(found["mark"], *found.span())
    elif found["link"]:
        _link(edits, found)
    elif found["math"]:
        edits.append(Edit(*found.span(), _formula(found.string, *found.span())))
    elif found["entity"]:
        # Org's names are TeX's, or else those of HTML.
        name = found["entity"]
        if shown := SYMBOLS.get(name) or _ENTITIES.get(name) or named(name):
            edits.append(Edit(*found.span(), shown))
    elif found["result"] is not None:
        edits.append(Edit(found.start(), found.start("result")))
        edits.append(Edit(found.end("result"), found.end()))
    elif found["script"]:
        _script(edits, found, "braced", found["script"][0])
    elif found["raised"]:
        if found.start() > pairs.start and not pairs.before(found.start()).isspace():
            _script(edits, found, "raised", "^")
    elif found["inline"]:
        notes.append(found.start())
        edits.append(Edit(*found.span(), " ("))
    elif found["close"]:
        if notes:
            notes.pop()
            edits.append(Edit(*found.span(), ")"))
    elif found["code"]:
        edits.append(Edit(found.start(), found.start() + 1))
        edits.append(Edit(found.end() - 1, found.end()))
    else:
        edits.append(Edit(*found.span(), "" if kind == "note" else OPAQUE))


def _link(edits: list[Edit], found: re.Match[str]) -> None:
    """Show a link by its description; an image has no text."""
    if found["name"] is None:
        edits.append(Edit(*found.span(), OPAQUE))
    else:
        edits.append(Edit(found.start(), found.start("name")))
        edits.append(Edit(found.end("name"), found.end()))


def _formula(source: str, start: int, end: int) -> Visible:
    """Show a formula with its marks."""
    out = Builder()
    width = 1 if source[start] == "$" != source[start + 1] else 2
    show_math(out, source, start + width, end - width)
    return out.build()


def _script(edits: list[Edit], found: re.Match[str], group: str, mark: str) -> None:
    """Raise or lower; stars alone are marks of significance."""
    stars = mark == "^" and set(found[group]) <= {"*"}
    edits.append(Edit(found.start(), found.start(group), "" if stars else mark + "{"))
    edits.append(Edit(found.end(group), found.end(), "" if stars else "}"))


_COMMENTS = expression(r"^[ \t]*#(?:[ \t]+([^\n]*))?$", re.M)


def comments(text: str) -> tuple[Comment, ...]:
    """Return the lines that start with ``#`` and a space."""
    return tuple(
        Comment(Span(*found.span()), (found[1] or "").strip()) for found in _COMMENTS.finditer(text)
    )


READER = Reader(split, show, comments, NAMES.define, table=table, expand=NAMES.expand)
