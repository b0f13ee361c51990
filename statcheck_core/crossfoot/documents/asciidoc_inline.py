"""The inline markup of AsciiDoc to visible text."""

from __future__ import annotations

import re
from collections.abc import Iterable

from crossfoot.documents.edits import Edit, Marks, Walk, show_marked
from crossfoot.documents.mathtext import show_math
from crossfoot.documents.tags import entity_at
from crossfoot.documents.typst_math import show_typst_math
from crossfoot.documents.visible import OPAQUE, Builder
from crossfoot.expressions import expression

_MARK = Marks(
    "\\+slafpkbmixhcn<{[^~*_`#& ",
    r"\\(?P<escape>[^A-Za-z0-9\s])|(?P<pass>\+{3}(?P<plus3>[^+\n]{1,500})\+{3})"
    r"|(?P<macro>(?P<name>stem|latexmath|asciimath|footnote|footnoteref|pass|kbd|btn|menu|image|xref|link"
    r"|https?|indexterm2?|cite|icon|anchor):(?P<target>[^\s\[\]:]{0,500})\[(?P<body>(?:[^\[\]\\]|\\.|\[[^\[\]\n]{0,300}\]){0,2000})\])"
    r"|(?P<ref><<[^<>\n]{1,200}>>)|(?P<attribute>\{[a-zA-Z0-9][\w-]{0,40}(?::[^{}\n]{0,60})?\})"
    r"|(?P<role>\[(?P<roles>[\w.#%, -]{1,60})\](?=\#{1,2}[^\s#]))"
    r"|(?P<script>[\^~])(?P<raised>[^\s^~]{1,40})(?P=script)"
    r"|(?P<pair>\*\*?|__?|``?|\#\#?)|(?P<entity>&(?=[#A-Za-z]))|(?P<break> \+$)",
    re.M,
)

_ATTRIBUTE = expression(r"\{([a-zA-Z0-9][\w-]{0,40})\}")
_KNOWN = {
    "nbsp": " ",
    "lt": "<",
    "gt": ">",
    "amp": "&",
    "plus": "+",
    "startsb": "[",
    "endsb": "]",
    "vbar": "|",
    "caret": "^",
    "asterisk": "*",
    "tilde": "~",
    "backslash": "\\",
    "empty": "",
    "sp": " ",
    "zwsp": "",
    "deg": "°",
}


def show_stem(out: Builder, source: str, start: int, end: int) -> None:
    """Show a formula: in TeX, or in AsciiMath, whose words and brackets are like Typst's."""
    is_tex = any(source.find(mark, start, end) >= 0 for mark in "\\{$")
    (show_math if is_tex else show_typst_math)(out, source, start, end)


def show_inline(
    out: Builder, source: str, start: int, end: int, line_edits: Iterable[Edit] = ()
) -> None:
    """Show ``source[start:end]``, with edits that the lines call for."""
    show_marked(out, (start, end), _MARK, _Walk(source, start, end), line_edits)


class _Walk(Walk):
    """Writes down what each mark does."""

    def __init__(self, source: str, start: int, end: int) -> None:
        super().__init__(source, start, end)
        self.struck = False  # whether the role before says so

    def mark(self, found: re.Match[str]) -> int:
        """Handle a mark and return where to go on."""
        if found["pair"]:
            self.pair(found["pair"], *found.span())
        elif found["macro"]:
            return self.macro(found)
        elif found["script"]:
            self.script(found)
        elif found["entity"]:
            entity = entity_at(self.source, found.start(), self.end)
            if entity:
                self.edits.append(Edit(found.start(), entity[1], entity[0]))
                return entity[1]
        elif found["escape"]:
            self.edits.append(Edit(found.start(), found.start() + 1))
        elif found["role"]:
            self.struck = "line-through" in found["roles"]
            self.replace(found)
        elif found["attribute"]:
            shown = _KNOWN.get(found["attribute"][1:-1], OPAQUE)
            self.replace(found, shown)
        elif found["pass"]:
            self.around(found, "plus3")
        else:
            self.replace(found, OPAQUE if found["ref"] else "")
        return found.end()

    def pair(self, mark: str, at: int, after: int) -> None:
        """Handle a mark of emphasis, code or highlighting; a double one acts within words."""
        if mark[0] == "#" and self.struck:
            self.pairs.struck(mark, at, after)
            self.struck = self.pairs.after(after) != " " and not self.pairs.before(at).isalnum()
        else:
            self.pairs.mark(mark, at, after, tight=len(mark) == 1)

    def script(self, found: re.Match[str]) -> None:
        """Raise or lower; stars alone are marks of significance."""
        if found["script"] == "^" and set(found["raised"]) <= set("*†‡"):
            self.around(found, "raised")
        else:
            self.around(found, "raised", ("^{" if found["script"] == "^" else "_{", "}"))
            base = found.start("raised")
            for name in _ATTRIBUTE.finditer(found["raised"]):
                shown = _KNOWN.get(name[1], OPAQUE)
                self.edits.append(Edit(base + name.start(), base + name.end(), shown))

    def macro(self, found: re.Match[str]) -> int:
        """Handle a macro and return where to go on: within a footnote or the words of a link."""
        name = found["name"]
        if name in ("stem", "latexmath", "asciimath"):
            out = Builder()
            show_stem(out, self.source, *found.span("body"))
            self.replace(found, out.build())
        elif name.startswith("footnote"):
            self.around(found, "body", (" (", ")") if found["body"] else ("", ""))
            return found.start("body")
        elif (
            name in ("link", "xref", "http", "https", "pass", "kbd", "indexterm2") and found["body"]
        ):
            self.around(found, "body")
            return found.start("body")
        else:
            self.replace(found, OPAQUE)
        return found.end()
