"""The inline markup of reStructuredText to visible text."""

from __future__ import annotations

import re
from collections.abc import Iterable

from crossfoot.documents.edits import Edit, Marks, Walk, show_marked
from crossfoot.documents.mathtext import show_math
from crossfoot.documents.visible import OPAQUE, Builder
from crossfoot.expressions import expression

_MARK = Marks(
    "\\`:*[|_",
    r"(?P<escape>\\[\s\S])|``(?P<literal>[^`\n](?:[^`]|`(?!`)){0,2000}?)``"
    r"|(?::(?P<role>[a-zA-Z][\w:.+-]{0,40}):)?`(?P<text>(?:[^`\\]|\\[\s\S]){1,2000})`"
    r"(?::(?P<suffix>[a-zA-Z][\w.+-]{0,40}):)?(?P<link>__?(?!\w))?"
    r"|(?P<stars>\*\*?)|(?P<note>\[(?:\#[\w-]{0,40}|\*|\d{1,4}|[A-Za-z][\w-]{0,40})\]_(?!\w))"
    r"|(?P<bar>\|[^|\s](?:[^|\n]{0,60}[^|\s])?\|_{0,2})|(?P<ref>(?<=[A-Za-z0-9])__?(?![\w]))",
)
_ESCAPE = expression(r"\\([\s\S])")
_TARGET = expression(r"\s*<[^<>]*>$")
_RAISED = frozenset(("sup", "superscript"))
_LOWERED = frozenset(("sub", "subscript"))
_UNSEEN = frozenset(("cite", "citep", "citet", "cite:p", "cite:t", "raw"))


def show_inline(
    out: Builder, source: str, start: int, end: int, line_edits: Iterable[Edit] = ()
) -> None:
    """Show ``source[start:end]``, with edits that the lines call for."""
    show_marked(out, (start, end), _MARK, _Walk(source, start, end), line_edits)


class _Walk(Walk):
    """Writes down what each mark does."""

    def mark(self, found: re.Match[str]) -> int:
        """Handle a mark and return where to go on."""
        if found["escape"]:
            space = found["escape"][1].isspace()
            end = found.end() if space else found.start() + 1
            self.edits.append(Edit(found.start(), end))
        elif found["literal"] is not None:
            self.around(found, "literal")
        elif found["text"] is not None:
            self.interpreted(found)
        elif found["stars"]:
            self.pairs.mark(found["stars"], *found.span())
        else:
            self.replace(found, OPAQUE if found["bar"] else "")
        return found.end()

    def interpreted(self, found: re.Match[str]) -> None:
        """Show interpreted text: a formula, raised or lowered text, a link."""
        role = found["role"] or found["suffix"] or ""
        if role == "math":
            out = Builder()
            show_math(out, found.string, *found.span("text"))
            self.replace(found, out.build())
        elif role in _RAISED or role in _LOWERED:
            stars = role in _RAISED and set(found["text"]) <= set("*†‡")
            before = "" if stars else "^{" if role in _RAISED else "_{"
            self.around(found, "text", (before, "" if stars else "}"))
            base = found.start("text")
            for escape in _ESCAPE.finditer(found["text"]):
                end = escape.end() if escape[1].isspace() else escape.start(1)
                self.edits.append(Edit(base + escape.start(), base + end))
        elif role in _UNSEEN:
            self.replace(found, OPAQUE)
        else:
            inner, stop = found.span("text")
            target = _TARGET.search(found["text"]) if found["link"] or role else None
            self.edits.append(Edit(found.start(), inner))
            self.edits.append(Edit(inner + target.start() if target else stop, found.end()))
