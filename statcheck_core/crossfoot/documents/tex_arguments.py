"""The groups and arguments of TeX: what is shown around them, and what is hidden in them."""

from __future__ import annotations

from typing import NamedTuple

from crossfoot.documents.tex_symbols import Arg, Args
from crossfoot.documents.tex_tokens import OPTION
from crossfoot.documents.visible import OPAQUE, Builder

#: Most arguments that are waited for: far beyond any text.
_MOST_ARGS = 40

#: Deepest nesting of groups that is followed; deeper braces are passed over.
_DEEPEST = 500


class _Frame(NamedTuple):
    """An open group: the arguments it heads, if it is one, and what to go back to."""

    args: Args
    math: bool
    hidden: bool


class Arguments:
    """Shows TeX source piece by piece, and knows which argument of which command a piece is."""

    def __init__(self, out: Builder, source: str, end: int, math: bool, comments: bool) -> None:
        self.out = out
        self.source = source
        self.end = end
        self.math = math
        self.comments = comments
        self.hidden = False
        self.stack: list[_Frame] = []
        self.skipped = 0  # groups deeper than _DEEPEST
        self.args: Args = ()  # those that the next group or character is the first of
        self.mark = 0  # where the command they belong to stands

    # What is shown.

    def keep(self, start: int, end: int) -> None:
        """Show the source as it stands."""
        if not self.hidden:
            self.out.keep(self.source, start, end)

    def put(self, text: str, start: int, end: int) -> None:
        """Show ``text`` for the source from ``start`` to ``end``."""
        if self.hidden:
            return
        if len(text) == end - start and self.source.startswith(text, start):
            self.out.keep(self.source, start, end)
        else:
            self.out.put(text, start, end)

    def words(self, start: int, end: int) -> None:
        """Show plain characters; the first may be an argument."""
        while self.args and start < end:
            if self.source[start].isspace():
                start += 1
                continue
            if self.source[start] == "[" and self.args[0].before not in ("^{", "_{"):
                option = OPTION.match(self.source, start, self.end)
                if option and option.end() <= end:
                    start = option.end()
                    continue
            if self.args[0].hide:
                self.args = ()
            else:
                self.begin(start)
                self.keep(start, start + 1)
                start += 1
                self.finish(start, start)
        self.keep(start, end)

    def symbol(self, text: str, at: int, after: int) -> None:
        """Show a sign, which may be an argument."""
        if self.args:
            self.begin(at)
            self.put(text, at, after)
            self.finish(after, after)
        else:
            self.put(text, at, after)

    # Arguments.

    def begin(self, at: int) -> None:
        """Open the next argument, which starts at ``at``."""
        arg = self.args[0]
        self.put(arg.before, self.mark, at)
        self.stack.append(_Frame(self.args, self.math, self.hidden))
        self.args = ()
        self.hidden = self.hidden or arg.hide
        if arg.math is not None:
            self.math = arg.math

    def finish(self, at: int, after: int) -> None:
        """Close the group or argument that was opened last."""
        frame = self.stack.pop()
        self.math, self.hidden = frame.math, frame.hidden
        self.args = frame.args[1:]
        self.mark = at
        if not frame.args:
            return
        arg = frame.args[0]
        self.put(arg.after, at, after)
        if arg.opaque and self.source.startswith("{", after):
            self.put(OPAQUE, at, after)
            self.args = (Arg(opaque=True), *self.args)

    def take(self, args: Args, at: int) -> None:
        """Expect the arguments of a command, which may itself be an argument."""
        if len(self.args) > _MOST_ARGS:
            self.args = ()
        if self.args:
            outer = self.args[0]
            self.put(outer.before, self.mark, at)
            last = args[-1]
            last = last._replace(after=last.after + outer.after, hide=last.hide or outer.hide)
            args = (*args[:-1], last, *self.args[1:])
        self.args = args
        self.mark = at

    def open_group(self, after: int) -> None:
        """Enter a group."""
        if len(self.stack) >= _DEEPEST:
            self.skipped += 1
            self.args = ()
        elif self.args:
            self.begin(after)
        else:
            self.stack.append(_Frame((), self.math, self.hidden))

    def close_group(self, at: int) -> None:
        """Leave a group; a brace too many shows nothing."""
        self.args = ()
        if self.skipped:
            self.skipped -= 1
        elif self.stack:
            self.finish(at, at + 1)
