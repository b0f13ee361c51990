"""A chunk of Markdown between blank lines: which blocks it holds, and what it leaves open."""

from __future__ import annotations

import re

from crossfoot.documents.drawn_tables import DASHES, DELIMITER, GRID
from crossfoot.documents.markdown_blocks import Chunk, Opening
from crossfoot.documents.markdown_lines import (
    ATX,
    CAPTIONED,
    DEEP,
    DIV,
    ENVIRONMENT,
    EXECUTED,
    FENCE,
    FULL,
    HTML,
    INDENTED,
    ITEM,
    LINK,
    NOTE,
    OPTION,
    PRINTED,
    QUOTE,
    RAW,
    RULE,
    SETEXT,
    TABLES,
    TICKS,
)


def analyse(chunk: str, listed: bool = False, comment: bool = True) -> Chunk:
    """Tell the blocks of a chunk.

    Parameters
    ----------
    chunk
        Text without an empty line inside, but maybe with lines of white space.
    listed
        Whether a list is open before it, so that indented text belongs to an item.
    comment
        Whether a comment that starts here is closed somewhere.
    """
    return _Analysis(chunk, listed, comment).run()


class _Analysis:
    """Goes through the lines of a chunk."""

    def __init__(self, chunk: str, listed: bool, comment: bool) -> None:
        self.chunk = chunk
        self.listed = listed
        self.comment = comment
        self.lines = chunk.split("\n")
        self.starts: list[int] = []
        start = 0
        for line in self.lines:
            self.starts.append(start)
            start += len(line) + 1
        self.blocks: list[tuple[str, int, str, int]] = []
        self.opening: Opening | None = None
        self.first = -1  # line at which the current paragraph starts
        self.last = -1
        self.quoted = False  # whether that paragraph is quoted
        self.code: tuple[int, int] | None = None
        self.skipped = -1  # the line that ends raw markup

    def run(self) -> Chunk:
        """Return what the chunk holds."""
        number = 0
        while number < len(self.lines):
            number = self.line(number)
        self.flush()
        blocks = tuple(self.blocks)
        if self.code and not self.opening and len(blocks) == 1:
            return Chunk((), None, self.listed, self.code)
        return Chunk(blocks, self.opening, self.listed)

    def line(self, number: int) -> int:
        """Handle a line and return the next one to handle."""
        line = self.lines[number]
        quote = QUOTE.match(line) if ">" in line[:5] else None
        at = quote.end() if quote else 0
        rest = line[at:]
        if not rest or rest.isspace() or number == self.skipped:
            self.flush()
            return number + 1
        if self.first >= 0 and quote and not self.quoted:
            self.flush()
        ruled = number + 1 < len(self.lines) and "--" in self.lines[number + 1][:60]
        if not ruled and _plain(rest):
            return self.words(number, rest, quote is not None)
        return (
            self.fence(number, rest)
            or self.commented(number, rest)
            or self.table(number, rest)
            or self.heading(number, rest)
            or self.passed_over(number, rest)
            or self.raw(number, rest)
            or self.indented(number, rest)
            or self.words(number, rest, quote is not None)
        )

    def add(self, kind: str, first: int, last: int, level: int = 0) -> None:
        """Add the lines from ``first`` up to, not including, ``last`` as a block."""
        start = self.starts[first]
        end = self.starts[last - 1] + len(self.lines[last - 1])
        if start < end:
            self.blocks.append((kind, start, self.chunk[start:end], level))

    def flush(self) -> None:
        """End the current paragraph."""
        if self.first >= 0:
            self.add("prose", self.first, self.last)
            self.first = -1

    def words(self, number: int, rest: str, quoted: bool) -> int:
        """Add a line to the current paragraph."""
        item = ITEM.match(rest) is not None
        if self.first < 0:
            if NOTE.match(rest):
                self.listed = True  # the next paragraphs of a note are indented like an item's
            elif item:
                self.listed = True
            elif rest[0] not in " \t":
                self.listed = False
            self.first = number
            self.quoted = quoted
        elif NOTE.match(rest):
            self.flush()
            self.first = number
        elif item:
            self.listed = True
        self.last = number + 1
        return number + 1

    def fence(self, number: int, rest: str) -> int:
        """Handle fenced code."""
        fence = FENCE.match(rest)
        if not fence:
            return 0
        self.flush()
        kind = "verbatim"
        if EXECUTED.match(rest, fence.end(1)):
            kind = "code"
            number = self.options(number)
        close = rf"[ \t>]*{fence[1][0]}{{{len(fence[1])},}}[ \t]*$"
        closing = re.compile(close)
        for last in range(number + 1, len(self.lines)):
            if closing.match(self.lines[last]):
                if RAW.match(rest, fence.end(1)):
                    self.skipped = last
                    return number + 1
                if last > number + 1:
                    self.add(kind, number + 1, last)
                return last + 1
        after = self.starts[number] + len(self.lines[number]) + 1
        self.opening = Opening(kind, after, after - 1, "^" + close, exclusive=True)
        return len(self.lines)

    def options(self, number: int) -> int:
        """Add the captions among the options of a chunk that is run; return the last option."""
        while True:
            line, start = self.lines[number], self.starts[number]
            for found in CAPTIONED.finditer(line):
                inside = found[found.lastindex or 0].rstrip()
                self.blocks.append(("prose", start + found.start(found.lastindex or 0), inside, 0))
            if number + 1 == len(self.lines) or not OPTION.match(self.lines[number + 1]):
                return number
            number += 1

    def commented(self, number: int, rest: str) -> int:
        """Keep the lines of a comment together; one that is not closed here runs on."""
        at = self.lines[number].find("<!--")
        if at < 0 or not self.comment or TICKS.search(rest):
            return 0
        start = self.starts[number] + at
        stop = self.chunk.find("-->", start + 4)
        if stop < 0:
            if self.lines[number][:at].strip():
                self.first = number if self.first < 0 else self.first
                self.last = number + 1
            end = start
            if self.first >= 0 and self.starts[self.first] < end:
                begin = self.starts[self.first]
                self.blocks.append(("prose", begin, self.chunk[begin:end].rstrip(), 0))
            self.first = -1
            self.opening = Opening("", start, start + 4, "-->")
            return len(self.lines)
        last = number
        while last + 1 < len(self.lines) and self.starts[last + 1] <= stop:
            last += 1
        whole = (
            not self.lines[number][:at].strip()
            and not self.chunk[stop + 3 : self.starts[last] + len(self.lines[last])].strip()
        )
        if whole and self.first < 0:
            return last + 1
        if last == number and not whole:
            return 0
        self.first = number if self.first < 0 else self.first
        self.last = last + 1
        return last + 1

    def heading(self, number: int, rest: str) -> int:
        """Handle headings, rules, and output that stands without a fence."""
        printed = PRINTED.match(rest)
        if printed:
            last = number + 1
            while last < len(self.lines) and self.lines[last].lstrip().startswith(
                printed[1].rstrip()
            ):
                last += 1
            if printed[1] == "#>" or last - number >= 3:
                self.flush()
                self.add("verbatim", number, last)
                return last
        atx = ATX.match(rest)
        if atx:
            self.flush()
            self.listed = False
            self.add("heading", number, number + 1, len(atx[1]))
            return number + 1
        setext = SETEXT.match(rest)
        if setext and self.first >= 0 and not self.listed:
            self.add("heading", self.first, number + 1, 1 if setext[1][0] == "=" else 2)
            self.first = -1
            return number + 1
        if RULE.match(rest):
            self.flush()
            return number + 1
        return 0

    def passed_over(self, number: int, rest: str) -> int:
        """Pass over marks of divisions and targets of links."""
        if DIV.match(rest):
            self.flush()
            return number + 1
        if self.first < 0 and LINK.match(rest):
            return number + 1
        return 0

    def table(self, number: int, rest: str) -> int:
        """Handle tables."""
        following = self.lines[number + 1].lstrip(" >") if number + 1 < len(self.lines) else ""
        if FULL.fullmatch(rest) and any(map(_dashed, self.lines[number + 1 : number + 6])):
            self.flush()
            start = self.starts[number]
            inner = start + len(self.lines[number])
            close = r"(?<=\n)[ \t]{0,3}-{3,}[ \t]*$"
            self.opening = Opening("table", start, inner, close, bounded=True)
            return len(self.lines)
        piped = "|" in rest and "|" in following and DELIMITER.fullmatch(following)
        bare = rest.lstrip()[0] == "|" and rest.rstrip()[-1] == "|" and following[:1] == "|"
        if piped or bare or GRID.fullmatch(rest):
            self.flush()
            last = number + 1
            while last < len(self.lines) and (
                "|" in self.lines[last] or GRID.fullmatch(self.lines[last].lstrip(" >"))
            ):
                last += 1
            self.add("table", number, last)
            return last
        return self.aligned(number, rest, following)

    def aligned(self, number: int, rest: str, following: str) -> int:
        """Handle a table whose columns are aligned under dashes."""
        if not _dashed(rest) and not _dashed(following):
            return 0
        self.flush()
        self.add("table", number, len(self.lines))
        return len(self.lines)

    def raw(self, number: int, rest: str) -> int:
        """Handle raw HTML and LaTeX that is more than a paragraph."""
        html = HTML.match(rest)
        if html:
            name = html[1].lower()
            kind = {"table": "table", "pre": "verbatim"}.get(name, "")
            close = rf"</{name}\s{{0,20}}>"
        else:
            environment = ENVIRONMENT.match(rest)
            if not environment or environment[1] not in TABLES:
                return 0
            kind, close = "table", rf"\\end\{{{re.escape(environment[1])}\}}"
        self.flush()
        start = self.starts[number]
        self.opening = Opening(kind, start, start, close, bounded=True)
        return len(self.lines)

    def indented(self, number: int, rest: str) -> int:
        """Handle indented code."""
        if self.first >= 0 or not (DEEP if self.listed else INDENTED).match(rest):
            return 0
        if self.listed and ITEM.match(rest):
            return 0
        last = number + 1
        while last < len(self.lines) and (
            INDENTED.match(self.lines[last]) or not self.lines[last].strip()
        ):
            last += 1
        self.add("verbatim", number, last)
        if not self.listed and number == 0 and last == len(self.lines):
            self.code = (0, len(self.chunk.rstrip()))
        return last


#: What the lines start with that are more than words, digits aside.
_STRUCTURAL = frozenset(" \t>`~#*-_=+:[<\\")


def _plain(line: str) -> bool:
    """Tell, without a miss, a line that can only be words, or an item of a list."""
    if line[0] in _STRUCTURAL or "|" in line or "<!--" in line:
        return False
    return not line[0].isdigit() or ("```" not in line and "~~~" not in line)


def _dashed(line: str) -> bool:
    """Tell the dashes of a simple table from a rule made of single dashes."""
    return "---" in line and " -" in line and DASHES.fullmatch(line) is not None
