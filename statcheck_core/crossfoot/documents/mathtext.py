"""TeX, as text and as math, to visible text.

One pass over the tokens with an explicit stack, so that neither depth nor damage of the source
can make it fail or slow. What a command shows is declared in
:mod:`crossfoot.documents.tex_symbols`.
"""

from __future__ import annotations

import re

from crossfoot.documents.tex_arguments import Arguments
from crossfoot.documents.tex_symbols import (
    COMMANDS,
    DROPPED,
    ENVIRONMENT_ARGS,
    ESCAPES,
    LETTERS,
    MATH_ENVIRONMENTS,
    SYMBOLS,
    UNITS,
    Arg,
)
from crossfoot.documents.tex_tokens import (
    COMMENT,
    DEF,
    DEFINING,
    DIMENSION,
    HIDE,
    NAME,
    NUMBER,
    OPTION,
    OPTIONS,
    RAW,
    SCRIPTS,
    STARS,
    TOKEN,
)
from crossfoot.documents.visible import OPAQUE, Builder

#: Most tokens that are read in one block: far beyond any text.
_MOST_TOKENS = 40_000


def show_math(out: Builder, source: str, start: int, end: int) -> None:
    """Show ``source[start:end]``, the inside of a formula."""
    _Setter(out, source, end, math=True, comments=False).run(start)


def show_tex(out: Builder, source: str, start: int, end: int) -> None:
    """Show ``source[start:end]``, LaTeX text."""
    _Setter(out, source, end, math=False, comments=True).run(start)


class _Setter(Arguments):
    """Walks over TeX source and shows it."""

    def run(self, position: int) -> None:
        """Show everything from ``position`` on."""
        left = _MOST_TOKENS
        while position < self.end:
            found = TOKEN.search(self.source, position, self.end) if left else None
            left -= 1
            at = found.start() if found else self.end
            if position < at:
                self.words(position, at)
            if not found:
                return
            position = self.token(found)

    def token(self, found: re.Match[str]) -> int:
        """Handle one token and return where to go on."""
        at, after = found.span()
        if (name := found["name"]) is not None:
            return self.command(name, at, after)
        if (sign := found["sign"]) is not None:
            return self.escape(sign, at, after)
        if found["code"] is not None:
            self.args = ()
            self.keep(*found.span("code"))
        elif found["dash"]:
            self.symbol("–" if after - at == 2 else "—", at, after)
        elif found["run"]:
            if self.comments:  # a quotation mark
                self.symbol("`", at, at + 1)
                return at + 1
            self.symbol(OPAQUE, at, after)
        elif (char := found[0]) != "\\":
            return self.special(char, at, after)
        return after

    def special(self, char: str, at: int, after: int) -> int:
        """Handle a character with a meaning of its own."""
        if char == "{":
            self.open_group(after)
        elif char == "}":
            self.close_group(at)
        elif char in "^_":
            return self.script(char, at)
        elif char == "%":
            if self.comments:
                comment = COMMENT.match(self.source, at, self.end)
                return comment.end() if comment else after
            self.symbol("%", at, after)
        elif char == "~" or char == "&":
            self.symbol(" ", at, after)
        elif self.comments:  # a dollar sign; within a formula of another format it has no meaning
            self.args = ()
            self.math = not self.math
        return after

    def script(self, char: str, at: int) -> int:
        """Raise or lower what follows; raised stars are significance marks and stay."""
        if not self.math:
            self.symbol(char, at, at + 1)
            return at + 1
        if char == "^" and (after := self.stars(at + 1)):
            return after
        self.take(SCRIPTS[char], at)
        return at + 1

    def stars(self, at: int) -> int | None:
        """Show raised stars, if that is what stands at ``at``, and return where they end."""
        stars = STARS.match(self.source, at, self.end)
        if stars is None:
            return None
        self.args = ()
        group = 1 if stars[1] is not None else 2
        for star in re.finditer(r"\*|\\[a-z]+", stars[group]):
            base = stars.start(group)
            self.put("*", base + star.start(), base + star.end())
        return stars.end()

    def escape(self, sign: str, at: int, after: int) -> int:
        """Handle a backslash before a character that is no letter."""
        if sign in "([" and self.comments:
            self.math = True
        elif sign in ")]" and self.comments:
            self.math = False
        elif sign == "\\":
            self.symbol("\n", at, after)
            dimension = DIMENSION.match(self.source, after, self.end)
            return dimension.end() if dimension else after
        elif shown := ESCAPES.get(sign, sign):
            self.symbol(shown, at, after)
        return after

    def command(self, name: str, at: int, after: int) -> int:
        """Handle a control word and return where to go on."""
        if self.args and self.args[0].hide:
            self.args = self.args[1:]  # the argument is a bare command: \newcommand\x…
        elif name in SYMBOLS:
            self.symbol(SYMBOLS[name], at, after)
            if name in LETTERS and self.math:
                return self.after_letter(name, after)
        elif name in DROPPED:
            limit = name in ("left", "right") and self.source.startswith(".", after)
            return after + limit
        elif name in ("begin", "end"):
            return self.environment(name, after)
        elif name in ("def", "gdef", "edef"):
            target = DEF.match(self.source, after, self.end)
            self.args = (HIDE,)
            return target.end() if target else after
        else:
            return self.with_arguments(name, at, after)
        return after

    def with_arguments(self, name: str, at: int, after: int) -> int:
        """Handle a command that takes arguments, or one of unknown meaning."""
        args = COMMANDS.get(name) or DEFINING.get(name)
        if name in RAW:
            raw = RAW[name].match(self.source, after, self.end)
            if raw and name != "cmidrule":
                self.symbol(OPAQUE if name != "href" else "", at, raw.end())
                return raw.end()
            after = raw.end() if raw else after
        if args:
            if args[0].before == "^{" and (end := self.stars(after)):
                return end
            self.take(args, at)
            option = OPTIONS.match(self.source, after, self.end)
            return option.end() if option else after
        if name in UNITS:
            self.symbol(UNITS[name], at, after)
        elif not self.source.startswith("{", after):
            self.symbol(OPAQUE, at, after)
        else:
            number = NUMBER.match(self.source, after, self.end)
            self.take((Arg(before=OPAQUE if number else "", opaque=True),), at)
        return after

    def after_letter(self, name: str, after: int) -> int:
        """Pass over the space that only ends the name of a letter."""
        position = after
        while position < self.end and self.source[position] in " \t":
            position += 1
        following = self.source[position : position + 1]
        close = following in "^_(" or following.isalpha() or name in ("Delta", "increment")
        return position if following and close else after

    def environment(self, name: str, after: int) -> int:
        """Handle the start or the end of an environment."""
        named = NAME.match(self.source, after, self.end)
        if not named:
            return after
        after = named.end()
        self.args = ()
        if named[1] in MATH_ENVIRONMENTS:
            self.math = name == "begin"
        if name == "begin":
            option = OPTION.match(self.source, after, self.end)
            after = option.end() if option else after
            self.args = (HIDE,) * ENVIRONMENT_ARGS.get(named[1], 0)
        return after
