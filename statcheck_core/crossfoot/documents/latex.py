"""LaTeX, with Sweave and knitr chunks."""

from __future__ import annotations

import re

from crossfoot.documents.format import Comment, Reader
from crossfoot.documents.latex_macros import DEFINITION, GROUP, GROUP_PATTERN, define, expand
from crossfoot.documents.latex_tables import read_table
from crossfoot.documents.mathtext import show_tex
from crossfoot.documents.printout import show_printout
from crossfoot.documents.table import Table
from crossfoot.documents.tex_symbols import ENVIRONMENT_ARGS, MATH_ENVIRONMENTS
from crossfoot.documents.visible import Builder, Visible
from crossfoot.documents.words import words
from crossfoot.expressions import expression
from crossfoot.model import Block, Span

_TOKEN = expression(
    r"\\(?:(?P<env>begin|end)[ \t]{0,9}\{(?P<name>[A-Za-z@]{1,40}\*?)\}"
    r"|(?P<head>part|chapter|(?:sub){0,2}section|(?:sub)?paragraph)\*?(?=[ \t]{0,9}[\[{])"
    r"|(?P<caption>caption)\*?(?=[ \t]{0,9}[\[{])|(?P<par>par)\b|(?P<iffalse>iffalse)\b"
    r"|verb\*?(?P<quote>[^\w\s*])[^\n]{0,300}?(?P=quote)|[\\%])"
    r"|(?P<blank>\n[ \t]*\n\s*)|%[^\n]*|^(?P<chunk><<[^\n]{0,500}>>=[ \t]*$)",
    re.M,
)

_VERBATIM = words(
    "verbatim verbatim* Verbatim lstlisting Sinput Soutput Schunk minted alltt knitrout "
    "BVerbatim LVerbatim Highlighting Shaded stlog CodeInput CodeOutput CodeChunk Code"
)
_TABLES = words(
    "tabular tabular* tabularx tabulary xltabular longtable longtable* tabu supertabular"
)
_HIDDEN = words(
    "comment tikzpicture pgfpicture thebibliography filecontents filecontents* axis forest "
    "CCSXML references"
)
_FLOWING = MATH_ENVIRONMENTS | words(
    "itemize enumerate description compactitem compactenum inparaenum list cases split aligned "
    "array matrix pmatrix bmatrix small footnotesize spacing"
)
_LEVELS = {
    "part": 1,
    "chapter": 2,
    "section": 3,
    "subsection": 4,
    "subsubsection": 5,
    "paragraph": 6,
    "subparagraph": 7,
}
_TITLE = expression(rf"(?:\[[^\[\]\n]{{0,300}}\])?\s{{0,9}}{GROUP_PATTERN}")
_OPTIONS = expression(r"\s{0,9}\[[^\[\]\n]{0,200}\]")
_FRONT = expression(rf"\\(?:abstract|title)\s{{0,9}}({GROUP_PATTERN})")
_NOTHING = expression(
    rf"(?:\s|%[^\n]*|{DEFINITION.pattern}|\\label\{{[^{{}}\n]*\}}"
    r"|\\(?:centering|small|noindent|maketitle|tableofcontents|newpage|clearpage)(?![A-Za-z]))*+"
)
_COMMENT = expression(r"\\[\s\S]|%([^\n]*)")
_INPUT = expression(r"(?<!\\)%[^\n]*|\\(?:input|include|subfile)\s{0,9}\{([^{}\n]{1,300})\}")


def split(text: str) -> tuple[Block, ...]:
    """Split into paragraphs, headings, captions, verbatim text and tables."""
    return _Splitter(text).run()


class _Splitter:
    """Goes through what structures a text."""

    def __init__(self, text: str) -> None:
        self.text = text
        self.blocks: list[Block] = []
        self.start = 0  # of the current paragraph
        self.unclosed: set[str] = set()  # environments that nothing closes

    def run(self) -> tuple[Block, ...]:
        """Return the blocks."""
        text = self.text
        position = self.preamble()
        self.start = position
        while found := _TOKEN.search(text, position):
            if found["env"] == "end" and found["name"] == "document":
                break
            position = max(self.token(found), found.end())
        self.flush(found.start() if found else len(text))
        return tuple(self.blocks)

    def preamble(self) -> int:
        """Pass over the preamble; some classes keep title and abstract there."""
        begin = self.text.find("\\begin{document}")
        if begin < 0:
            return 0
        for found in _FRONT.finditer(self.text, 0, begin):
            self.block("prose", found.start(1) + 1, found.end(1) - 1)
        return begin + len("\\begin{document}")

    def token(self, found: re.Match[str]) -> int:
        """Handle one token and return where to go on."""
        at, after = found.span()
        if found["blank"] or found["par"]:
            self.flush(at)
            self.start = after
        elif found["env"]:
            return self.environment(found["env"], found["name"], at, after)
        elif found["head"]:
            return self.heading(found["head"], at, after)
        elif found["caption"]:
            self.flush(at)
            title = _TITLE.match(self.text, after)
            if title:
                self.block("prose", at, title.end())
                self.start = title.end()
                return title.end()
            self.start = at
        elif found["iffalse"]:
            return self.passed_over("\\iffalse", re.compile(r"\\fi\b"), at, after)
        elif found["chunk"]:
            return self.verbatim(re.compile(r"^@[ \t]*$", re.M), at, after)
        return after

    def heading(self, name: str, at: int, after: int) -> int:
        """Handle a heading."""
        title = _TITLE.match(self.text, after)
        if not title:
            return after
        self.flush(at)
        self.block("heading", at, title.end(), _LEVELS[name])
        self.start = title.end()
        return title.end()

    def environment(self, which: str, name: str, at: int, after: int) -> int:
        """Handle the start or end of an environment."""
        if which == "begin":
            close = re.compile(rf"\\end[ \t]{{0,9}}\{{{re.escape(name)}\}}")
            if name in _VERBATIM:
                return self.verbatim(close, at, self.after_options(name, after))
            if name in _TABLES:
                return self.table(name, at, after)
            if name in _HIDDEN:
                return self.passed_over(name, close, at, after)
        if name in _FLOWING:
            return after
        self.flush(at)
        self.start = self.after_options(name, after) if which == "begin" else after
        return self.start

    def after_options(self, name: str, after: int) -> int:
        """Pass over the options and arguments of an environment."""
        option = _OPTIONS.match(self.text, after)
        after = option.end() if option else after
        for _ in range(ENVIRONMENT_ARGS.get(name, 0)):
            group = GROUP.match(self.text, after)
            after = group.end() if group else after
        return after

    def verbatim(self, close: re.Pattern[str], at: int, after: int) -> int:
        """Handle text that stands as it is."""
        end = self.closing(close, after)
        if end is None:
            return after
        self.flush(at)
        if self.text.startswith("\n", after):
            after += 1
        self.block("verbatim", after, max(after, end.start()))
        self.start = end.end()
        return end.end()

    def table(self, name: str, at: int, after: int) -> int:
        """Handle a table, which may hold tables of its own."""
        pattern = re.compile(rf"\\(begin|end)[ \t]{{0,9}}\{{{re.escape(name)}\}}")
        depth = 1
        for found in pattern.finditer(self.text, after):
            depth += 1 if found[1] == "begin" else -1
            if depth == 0:
                self.flush(at)
                self.block("table", at, found.end())
                self.start = found.end()
                return found.end()
            if name in self.unclosed:  # one of them lacks its end: none may hold another
                return after
        self.unclosed.add(name)
        return after if depth == 1 else self.table(name, at, after)

    def passed_over(self, name: str, close: re.Pattern[str], at: int, after: int) -> int:
        """Handle what is not shown at all."""
        end = self.closing(close, after)
        if end is None:
            return after
        self.flush(at)
        self.start = end.end()
        return end.end()

    def closing(self, close: re.Pattern[str], after: int) -> re.Match[str] | None:
        """Find what closes an environment; that nothing does is found out but once."""
        found = None if close.pattern in self.unclosed else close.search(self.text, after)
        if found is None:
            self.unclosed.add(close.pattern)
        return found

    def flush(self, end: int) -> None:
        """End the current paragraph."""
        source = self.text[self.start : end]
        if _NOTHING.fullmatch(source):
            return
        fragment = "&" in source and "\\begin" not in source and _has_rows(source)
        self.block("table" if fragment else "prose", self.start, end)

    def block(self, kind: str, start: int, end: int, level: int = 0) -> None:
        """Add a block without the white space around it."""
        source = self.text[start:end]
        if kind != "verbatim":
            start += len(source) - len(source.lstrip())
        source = source.strip() if kind != "verbatim" else source.rstrip()
        if source:
            self.blocks.append(Block(kind, start, source, level))


def _has_rows(source: str) -> bool:
    """Tell rows of a table that stand without their environment, as in files taken in."""
    return any("&" in line and line.rstrip().endswith("\\\\") for line in source.split("\n"))


def show(kind: str, source: str) -> Visible:
    """Show a block."""
    if kind == "verbatim":
        return show_printout(source)
    if kind == "table":
        return table(source).visible
    out = Builder()
    show_tex(out, source, 0, len(source))
    return out.build()


def table(source: str) -> Table:
    """Read a table."""
    return read_table(source)


def comments(text: str) -> tuple[Comment, ...]:
    """Return the comments from ``%`` to the end of the line."""
    return tuple(
        Comment(Span(*found.span()), found[1].strip())
        for found in _COMMENT.finditer(text)
        if found[1] is not None
    )


def inputs(text: str) -> tuple[str, ...]:
    """Return the names of the files that a text takes in, as written; nothing is read here."""
    return tuple(found[1].strip() for found in _INPUT.finditer(text) if found[1])


READER = Reader(split, show, comments, define, table=table, expand=expand)
