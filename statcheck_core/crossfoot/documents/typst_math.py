"""Typst's formulas to visible text, in the same form as TeX's."""

from __future__ import annotations

import re

from crossfoot.documents.tex_symbols import LETTERS, SYMBOLS
from crossfoot.documents.visible import OPAQUE, Builder
from crossfoot.documents.words import words
from crossfoot.expressions import expression

_TOKEN = expression(
    r'"(?P<text>[^"\\]*(?:\\.[^"\\]*)*)"|(?P<name>[A-Za-z]{2,}(?:\.[a-z]{1,20}){0,3})'
    r"|(?P<number>\d+(?:\.\d+)?)|(?P<sign><=|>=|!=|->|=>|~=|\\\s|\.\.\.)|\\(?P<escape>\S)"
    r"|(?P<gap>\#h\([^()]{0,30}\))|(?P<run>\#[A-Za-z][\w.-]*)|(?P<char>[()^_&])|(?P<letter>\S)"
)

_SIGNS = {"<=": "≤", ">=": "≥", "!=": "≠", "->": "→", "=>": "⇒", "~=": "≈", "...": "…"}

#: What names stand for, in formulas and in the module of signs.
NAMES = {
    **{name: SYMBOLS[name] for name in LETTERS},
    "plus.minus": "±",
    "minus.plus": "∓",
    "times": "×",
    "dot": "·",
    "dot.op": "·",
    "dot.c": "·",
    "lt": "<",
    "gt": ">",
    "lt.eq": "≤",
    "gt.eq": "≥",
    "eq": "=",
    "eq.not": "≠",
    "approx": "≈",
    "tilde": "∼",
    "tilde.op": "∼",
    "ast": "*",
    "star": "*",
    "minus": "−",
    "plus": "+",
    "percent": "%",
    "quad": " ",
    "space": " ",
    "thin": " ",
    "med": " ",
    "thick": " ",
    "dots": "…",
    "infinity": "∞",
    "oo": "∞",
    "diff": "∂",
    "chi.alt": "χ",
    "epsilon.alt": "ε",
    "phi.alt": "φ",
}

#: Functions with what is shown before and after their argument, in place of the brackets.
_FUNCTIONS = {
    **dict.fromkeys(
        words(
            "upright italic bold cal bb frak mono sans serif op text lr hat tilde display inline "
            "num qty"
        ),
        ("", ""),
    ),
    "overline": ("", "\u0304"),
    "macron": ("", "\u0304"),
    "frac": ("(", ")"),
    "sqrt": ("√(", ")"),
    "abs": ("|", "|"),
}


def show_typst_math(out: Builder, source: str, start: int, end: int) -> None:
    """Show ``source[start:end]``, the inside of a formula."""
    _Setter(out, source, end).run(start)


class _Setter:
    """Walks over a formula and shows it."""

    def __init__(self, out: Builder, source: str, end: int) -> None:
        self.out = out
        self.source = source
        self.end = end
        self.brackets: list[tuple[str, str]] = []  # what closes each, and the function it is of
        self.script = False  # whether the next thing is raised or lowered

    def run(self, position: int) -> None:
        """Show everything from ``position`` on."""
        while found := _TOKEN.search(self.source, position, self.end):
            self.out.keep(self.source, position, found.start())
            position = self.token(found)
        self.out.keep(self.source, position, self.end)

    def token(self, found: re.Match[str]) -> int:
        """Show a token and return where to go on."""
        at, after = found.span()
        if found["char"]:
            return self.char(found["char"], at, after)
        if found["name"]:
            return self.name(found["name"], at, after)
        if found["text"] is not None:
            self.out.keep(self.source, *found.span("text"))
        elif found["sign"]:
            self.out.put(_SIGNS.get(found["sign"], "\n"), at, after)
        elif found["gap"]:
            self.out.put(" ", at, after)
            return after
        elif found["run"]:
            sign = NAMES.get(found["run"].removeprefix("#sym."))
            self.out.put(sign or OPAQUE, at, after)
        else:
            self.out.keep(self.source, at + bool(found["escape"]), after)
        self.finish(after)
        return after

    def finish(self, at: int) -> None:
        """End a script that is a single thing."""
        if self.script:
            self.out.put("}", at, at)
            self.script = False

    def char(self, char: str, at: int, after: int) -> int:
        """Handle brackets and scripts."""
        if char in "^_":
            if stars := re.compile(r"\^\(?(\*{1,4})\)?").match(self.source, at, self.end):
                self.out.keep(self.source, *stars.span(1))
                return stars.end()
            self.out.put(char + "{", at, after)
            self.script = True
        elif char == "(":
            if self.script:
                self.script = False
                self.brackets.append(("}", ""))
            else:
                self.out.keep(self.source, at, after)
                self.brackets.append((")", ""))
        elif char == ")":
            close, _ = self.brackets.pop() if self.brackets else (")", "")
            self.out.put(close, at, after)
        return after

    def name(self, name: str, at: int, after: int) -> int:
        """Show a name: a letter, a sign, a function, or the word it is."""
        if name in _FUNCTIONS and self.source.startswith("(", after) and after < self.end:
            before, close = _FUNCTIONS[name]
            self.out.put(before, at, after + 1)
            self.brackets.append((close + ("}" if self.script else ""), name))
            self.script = False
            if name == "frac":
                return self.fraction(after + 1)
            return after + 1
        if name in NAMES:
            self.out.put(NAMES[name], at, after)
        else:
            self.out.keep(self.source, at, after)
        self.finish(after)
        after_space = after + (self.source[after : after + 1] == " ")
        following = self.source[after_space : after_space + 1]
        letter = name in LETTERS and (following.isalpha() or following in ("^", "_", "("))
        return after_space if letter else after

    def fraction(self, position: int) -> int:
        """Show the upper part of a fraction up to its comma, if that is simple."""
        comma = re.compile(r"([^(),\"]{0,200}),[ ]?").match(self.source, position, self.end)
        if not comma:
            return position
        self.out.keep(self.source, *comma.span(1))
        self.out.put(")/(", comma.end(1), comma.end())
        return comma.end()
