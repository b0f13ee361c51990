"""The inline markup of Typst to visible text."""

from __future__ import annotations

import re
from collections.abc import Iterable

from crossfoot.documents.edits import Edit, Marks, Walk, show_marked
from crossfoot.documents.typst_math import NAMES, show_typst_math
from crossfoot.documents.visible import OPAQUE, Builder
from crossfoot.expressions import expression

_MARK = Marks(
    "\\/`$#[]*_~-<@",
    r"\\(?P<escape>[^A-Za-z0-9\s]|\n)|(?P<comment>(?<!:)//[^\n]*|/\*(?:[^*]|\*(?!/)){0,5000}\*/)"
    r"|`(?P<raw>[^`\n]{1,1000})`|\$(?P<math>(?:[^$\\]|\\[\s\S]){1,5000})\$"
    r"|(?P<function>\#(?P<name>[A-Za-z][\w.-]{0,60})(?P<args>\((?:[^()\"]|\"[^\"\n]{0,500}\""
    r"|\((?:[^()\"]|\"[^\"\n]{0,500}\"){0,500}\)){0,500}\))?(?P<open>\[)?)"
    r"|(?P<hash>\#\()|(?P<bracket>[\[\]])|(?P<pair>[*_])|(?P<space>~)|(?P<dash>-{2,3}(?!-))"
    r"|(?P<label><[A-Za-z][\w:.-]{0,60}>)|(?P<ref>(?<![\w])@[A-Za-z][\w:.-]{0,60}(?:\[[^\[\]\n]{0,60}\])?)",
)

#: Functions with what stands around their content.
_AROUND = {"super": ("^{", "}"), "sub": ("_{", "}"), "footnote": (" (", ")")}

#: Functions that show a number, and the number they show.
_NUMBERS = frozenset(("num", "qty"))
_NUMBER = expression(r"\(\s{0,9}\"?([-−]?[\d.,]{1,30}(?:e[-−]?\d{1,3})?)(?=\"?\s{0,9}[,)])")


def show_inline(
    out: Builder, source: str, start: int, end: int, line_edits: Iterable[Edit] = ()
) -> None:
    """Show ``source[start:end]``, with edits that the lines call for."""
    show_marked(out, (start, end), _MARK, _Walk(source, start, end), line_edits)


class _Walk(Walk):
    """Writes down what each mark does."""

    def __init__(self, source: str, start: int, end: int) -> None:
        super().__init__(source, start, end)
        self.brackets: list[tuple[str | None, int]] = []  # what closes each; where it opened

    def mark(self, found: re.Match[str]) -> int:
        """Handle a mark and return where to go on."""
        if found["pair"]:
            self.pairs.mark(found["pair"], *found.span())
        elif found["math"] is not None:
            out = Builder()
            show_typst_math(out, self.source, *found.span("math"))
            self.replace(found, out.build())
        elif found["function"]:
            self.function(found)
        elif found["bracket"]:
            self.bracket(found["bracket"], *found.span())
        elif found["raw"] is not None:
            self.around(found, "raw")
        elif found["escape"]:
            self.edits.append(Edit(found.start(), found.start() + 1))
        elif found["dash"]:
            self.replace(found, "–" if len(found["dash"]) == 2 else "—")
        elif found["space"]:
            self.replace(found, " ")
        else:
            shown = OPAQUE if found["ref"] or found["hash"] else ""
            self.replace(found, shown)
        return found.end()

    def function(self, found: re.Match[str]) -> None:
        """Handle a function: its content is shown, its value is unknown."""
        name = found["name"]
        number = (
            _NUMBER.match(self.source, found.start("args"))
            if name in _NUMBERS and found["args"]
            else None
        )
        if number:
            self.edits.append(Edit(found.start(), number.start(1)))
            self.edits.append(Edit(number.end(1), found.end()))
            return
        if not found["open"]:
            gap = " " if name in ("h", "v") and found["args"] else None
            sign = NAMES.get(name[4:]) if name.startswith("sym.") else None
            self.replace(found, gap or sign or OPAQUE)
            return
        before, close = _AROUND.get(name, ("", ""))
        stars = re.compile(r"[*†‡\\]{1,9}\]").match(self.source, found.end(), self.end)
        if name == "super" and stars:
            before, close = "", ""
        self.replace(found, before)
        self.brackets.append((None if name == "strike" else close, found.start()))

    def bracket(self, char: str, at: int, after: int) -> None:
        """Follow brackets: those of text stay, those of content go."""
        if char == "[":
            self.brackets.append(("]", at))
        elif self.brackets:
            close, start = self.brackets.pop()
            if close is None:
                self.edits.append(Edit(start, after))
            elif close != "]":
                self.edits.append(Edit(at, after, close))
