"""The inline markup of Markdown, Pandoc's and MyST's included, to visible text.

The marks are found in one pass; what each of them does is written down as an edit of the source,
and the edits are carried out in order at the end. What closes a mark is looked up, never searched
for again, so that the cost is linear whatever the text.
"""

from __future__ import annotations

import re
from collections.abc import Iterator, Sequence
from itertools import islice

from crossfoot.documents.edits import Edit, apply_edits
from crossfoot.documents.emphasis import Run, emphasis_edits, run_of
from crossfoot.documents.markdown_math import Formulas, Mark, first_after, formula
from crossfoot.documents.markdown_tags import APART, TAGS, image
from crossfoot.documents.tags import Tag, entity_at, tag_at
from crossfoot.documents.visible import OPAQUE, Builder, Visible
from crossfoot.expressions import expression

# Every alternative starts with a plain character: so the search skips text at full speed.
# A short word in italics is one mark: it stands where nothing else could be opened or closed.
_MARK = expression(
    r"\\[\s\S]|``*|\$\$*|\*(?<![^\s(,;]\*)[A-Za-z]{1,3}\*(?!\*)|\*\**|__*|~~*|\^|!\[|\[|\]|\{"
    r"|<(?=[A-Za-z/!])|&(?=[#A-Za-z])"
)

#: Most marks that are followed in one stretch: far beyond any prose.
_MOST = 20_000

_RAISED = expression(r"\^((?:\\.|[^\s^\\=<>~|`$]){1,30})\^")
_LOWERED = expression(r"~((?:\\.|[^\s^\\=<>~|`$]){1,30})~(?!~)")
_STARS = expression(r"(?:\\?[*†‡])+")
_TARGET = expression(r"\((?:[^()\\\n]|\\.|\([^()\n]*\))*+\)|\[[^\[\]\n]{0,200}\]")
_ATTRIBUTES = expression(r"\{[^{}\n]{0,200}\}")
_TARGET_ATTRIBUTES = expression(r"\{(?:[#.][A-Za-z_]|[a-z-]{1,20}=)[^{}\n]{0,200}\}")
_BRACES = expression(r"\{\{[^{}\n]{0,200}\}\}|\{[#.][A-Za-z_][^{}\n]{0,200}\}")
#: Changes as an editor marks them: what is put in, or is highlighted, stays.
_CRITIC = expression(
    r"\{(?:\+\+(?P<added>[^{}]{1,500})\+\+|==(?P<marked>[^{}]{1,500})==|--[^{}]{1,500}--"
    r"|>>[^{}]{1,500}<<|~~(?:[^{}~]|~(?!>)){0,500}+~>(?P<new>(?:[^{}~]|~(?!~\})){0,500}+)~~)\}"
)
_NOTE = expression(r"\[\^[^\s\[\]]{1,60}\]")
_RUN = expression(r"\{?[A-Za-z]{1,12}\}? ")
_ROLE = expression(r"\{([a-z:]{1,20})\}$")
_AUTOLINK = expression(r"<([A-Za-z][A-Za-z0-9+.-]{1,20}:[^\s<>]{0,500})>")

_STRUCK = frozenset(("del", "s", "strike"))


def show_inline(
    out: Builder, source: str, start: int, end: int, line_edits: Sequence[Edit] = ()
) -> None:
    """Show ``source[start:end]``, with edits that the lines call for (quote marks, bullets)."""
    marks = list(islice(_marks(source, start, end, line_edits), _MOST + 1))
    if not marks or len(marks) > _MOST:
        apply_edits(out, source, start, end, line_edits)
    else:
        inline = _Inline(source, start, end, line_edits, marks)
        apply_edits(out, source, start, end, inline.edits())


class _Inline:
    """Collects the edits of one stretch of source."""

    def __init__(
        self, source: str, start: int, end: int, edits: Sequence[Edit], marks: list[Mark]
    ) -> None:
        self.source = source
        self.start = start
        self.end = end
        self.found = list(edits)
        self.marks = marks
        self.ticks: dict[int, list[int]] = {}  # length of a run of backticks to their places
        for mark in self.marks:
            if mark.text[0] == "`":
                self.ticks.setdefault(len(mark.text), []).append(mark.start)
        self.formulas = Formulas(source, start, end, marks)
        self.brackets: list[tuple[int, int, str]] = []
        self.runs: list[Run] = []
        self.struck: int | None = None
        self.struck_tag: tuple[str, int] | None = None
        self.no_comment = False  # no comment closes from here on

    def edits(self) -> list[Edit]:
        """Return all edits, in no order."""
        position = self.start
        for mark in self.marks:
            if mark.start >= position:
                position = max(mark.end, self._handle(mark))
            elif mark.end > position:
                # The rest of a run that something else began.
                position = max(position, self._handle(Mark(position, mark.end, mark.text[0])))
        self.found.extend(Edit(start, end) for start, end in emphasis_edits(self.runs))
        return self.found

    def _edit(self, start: int, end: int, shown: str | Visible = "") -> int:
        self.found.append(Edit(start, end, shown))
        return end

    def _handle(self, mark: Mark) -> int:
        """Handle a mark and return where to go on."""
        first = mark.text[0]
        if first == "*" and mark.text[1:2].isalpha():
            self._edit(mark.start, mark.start + 1)
            return self._edit(mark.end - 1, mark.end)
        if first in "*_":
            self.runs.append(run_of(self.source, mark.start, mark.end, self.start, self.end))
            return mark.end
        if first == "\\":
            return self._escape(mark)
        if first == "`":
            return self._code(mark)
        if first == "$":
            edit = self.formulas.in_dollars(mark, self.ticks.get(1, []))
            return self._edit(*edit) if edit else mark.end
        if first == "~":
            return self._tilde(mark)
        if first == "^":
            return self._raised(mark)
        if first in "[]!":
            return self._bracket(mark)
        if first == "<":
            return self._angle(mark)
        if first == "&":
            return self._entity(mark)
        if first == "{":
            return self._braces(mark)
        return mark.end

    def _escape(self, mark: Mark) -> int:
        char = mark.text[1]
        if char in "([" and (edit := self.formulas.in_brackets(mark)):
            return self._edit(*edit)
        if char in " \t":
            return self._edit(mark.start, mark.end, " ")
        if char == "\n":
            return self._edit(mark.start, mark.start + 1)
        if char.isascii() and not char.isalnum():
            return self._edit(mark.start, mark.start + 1)
        return mark.end

    def _code(self, mark: Mark) -> int:
        length = mark.end - mark.start
        stop = first_after(self.ticks.get(length, []), mark.end)
        if stop is None:
            return mark.end
        end = stop + length
        role = _ROLE.search(self.source, max(self.start, mark.start - 24), mark.start)
        if role:
            return self._role(role[1], role.start(), mark.end, stop, end)
        if _RUN.match(self.source, mark.end, stop) and length == 1 and self._runs(mark.end):
            return self._edit(mark.start, end, OPAQUE)
        self._edit(mark.start, mark.end)
        self._edit(stop, end)
        return end

    def _runs(self, inner: int) -> bool:
        """Tell inline code that is run from code that is shown."""
        return self.source.startswith(("r ", "{", "python ", "julia "), inner)

    def _role(self, name: str, start: int, inner: int, stop: int, end: int) -> int:
        if name == "math":
            return self._edit(start, end, formula(self.source, inner, stop))
        around = {"sup": ("^{", "}"), "sub": ("_{", "}")}.get(name.rpartition(":")[2])
        if around is None:
            return self._edit(start, end, OPAQUE)
        self._edit(start, inner, around[0])
        self._edit(stop, end, around[1])
        return end

    def _tilde(self, mark: Mark) -> int:
        if mark.end - mark.start == 2:
            if self.struck is None:
                if not self.source[mark.end : mark.end + 1].isspace():
                    self.struck = mark.start
            elif not self.source[mark.start - 1].isspace():
                self._edit(self.struck, mark.end)
                self.struck = None
        elif mark.end - mark.start == 1:
            lowered = _LOWERED.match(self.source, mark.start, self.end)
            if lowered:
                self._edit(mark.start, mark.end, "_{")
                self._edit(lowered.end() - 1, lowered.end(), "}")
                # Marks inside are handled; the closing one is passed over.
                self._inner(lowered.start(1), lowered.end(1))
                return lowered.end()
        return mark.end

    def _raised(self, mark: Mark) -> int:
        if self.source.startswith("[", mark.end) and mark.end < self.end:
            self.brackets.append((mark.start, mark.end + 1, "^["))
            return mark.end + 1
        raised = _RAISED.match(self.source, mark.start, self.end)
        if not raised:
            return mark.end
        stars = _STARS.fullmatch(raised[1])
        self._edit(mark.start, mark.end, "" if stars else "^{")
        self._edit(raised.end() - 1, raised.end(), "" if stars else "}")
        self._inner(raised.start(1), raised.end(1), bool(stars))
        return raised.end()

    def _inner(self, start: int, end: int, stars: bool = False) -> None:
        """Handle escapes and emphasis inside a short raised or lowered text."""
        for found in re.finditer(r"\\(.)|[*_]+", self.source[start:end]):
            if found[1] is not None:
                shown = " " if found[1] == " " else found[1]
                self._edit(start + found.start(), start + found.end(), shown)
            elif not stars:
                at = start + found.start()
                self.runs.append(run_of(self.source, at, start + found.end(), start, end))

    def _bracket(self, mark: Mark) -> int:
        source = self.source
        if mark.text != "]":
            note = _NOTE.match(source, mark.start, self.end)
            if note:
                return self._edit(mark.start, note.end())
            self.brackets.append((mark.start, mark.end, mark.text))
            return mark.end
        if not self.brackets:
            return mark.end
        start, inner, kind = self.brackets.pop()
        if kind == "^[":
            self._edit(start, inner, " (")
            return self._edit(mark.start, mark.end, ")")
        target = _TARGET.match(source, mark.end, self.end)
        if target is None and source.startswith("{", mark.end):
            target = _ATTRIBUTES.match(source, mark.end, self.end)
        if target is None:
            return mark.end
        # The alternative text of an image often is its caption.
        shown = OPAQUE if kind == "![" else ""
        attributes = _TARGET_ATTRIBUTES.match(source, target.end(), self.end)
        self._edit(start, inner, shown)
        return self._edit(mark.start, (attributes or target).end(), shown)

    def _angle(self, mark: Mark) -> int:
        source = self.source
        if source.startswith("<!--", mark.start):
            stop = -1 if self.no_comment else source.find("-->", mark.end, self.end)
            if stop >= 0:
                return self._edit(mark.start, stop + 3)
            self.no_comment = True
        tag = tag_at(source, mark.start, self.end)
        if tag and tag.name in TAGS:
            return self._tag(tag)
        link = _AUTOLINK.match(source, mark.start, self.end)
        if link:
            return self._edit(mark.start, link.end(), OPAQUE)
        return mark.end

    def _tag(self, tag: Tag) -> int:
        if tag.name in _STRUCK:
            if not tag.closing:
                self.struck_tag = (tag.name, tag.start)
            elif self.struck_tag and self.struck_tag[0] == tag.name:
                self._edit(self.struck_tag[1], tag.end)
                self.struck_tag = None
        elif tag.name in ("sup", "sub"):
            return self._script_tag(tag)
        elif tag.name in APART:
            return self._edit(tag.start, tag.end, "\n")
        elif tag.name == "img":
            return self._edit(tag.start, tag.end, image(self.source, tag))
        return self._edit(tag.start, tag.end)

    def _script_tag(self, tag: Tag) -> int:
        if tag.closing:
            return self._edit(tag.start, tag.end, "}")
        stars = _STARS.match(self.source, tag.end, self.end)
        if stars and self.source.startswith("</", stars.end()):
            close = tag_at(self.source, stars.end(), self.end)
            if close and close.name == tag.name:
                self._edit(tag.start, tag.end)
                self._inner(tag.end, stars.end(), stars=True)
                return self._edit(close.start, close.end)
        return self._edit(tag.start, tag.end, "^{" if tag.name == "sup" else "_{")

    def _entity(self, mark: Mark) -> int:
        entity = entity_at(self.source, mark.start, self.end)
        return self._edit(mark.start, entity[1], entity[0]) if entity else mark.end

    def _braces(self, mark: Mark) -> int:
        critic = _CRITIC.match(self.source, mark.start, self.end)
        if critic:
            return self._edit(mark.start, critic.end(), self._shown(critic))
        braces = _BRACES.match(self.source, mark.start, self.end)
        if braces is None:
            return mark.end
        return self._edit(mark.start, braces.end(), OPAQUE if braces[0][1] == "{" else "")

    def _shown(self, found: re.Match[str]) -> str | Visible:
        """Show the part of a mark that is shown at all."""
        if found.lastgroup is None:
            return ""
        out = Builder()
        show_inline(out, self.source, *found.span(found.lastgroup))
        return out.build()


def _marks(source: str, start: int, end: int, edits: Sequence[Edit]) -> Iterator[Mark]:
    """Find the marks outside the edits that are there already."""
    for edit in (*edits, Edit(end, end)):
        for found in _MARK.finditer(source, start, edit.start):
            yield Mark(found.start(), found.end(), found[0])
        start = edit.end
