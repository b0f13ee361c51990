"""The tokens of HTML and XML: text, tags, and what is passed over, in one linear pass."""

from __future__ import annotations

import re
from collections.abc import Iterator
from typing import NamedTuple

from crossfoot.documents.tags import Tag, tag_at
from crossfoot.expressions import expression
from crossfoot.model import Span

#: What may start a tag, a comment, a declaration.
_OPENING = expression(r"<(?=[A-Za-z/!?])")


class Words(NamedTuple):
    """Text between tags; ``raw`` text (CDATA) has no character references."""

    start: int
    end: int
    raw: bool = False


class Scanner:
    """Yields the tokens of ``text[start:end]``; setting ``position`` jumps ahead."""

    def __init__(self, text: str, start: int, end: int) -> None:
        self.text = text
        self.position = start
        self.end = end
        self._unclosed: set[str] = set()

    def __iter__(self) -> Iterator[Words | Tag]:
        """Yield every token from the position on."""
        while self.position < self.end:
            start = self.position
            less, token, after = self._next(start)
            if start < less:
                self.position = less
                yield Words(start, less)
                if self.position != less:
                    continue
            if less < self.end:
                self.position = after
                if token:
                    yield token

    def _next(self, start: int) -> tuple[int, Words | Tag | None, int]:
        """Return where the next markup starts, what it is, and where it ends."""
        while opening := _OPENING.search(self.text, start, self.end):
            less = opening.start()
            if tag := tag_at(self.text, less, self.end):
                return less, tag, tag.end
            if self.text.startswith("<![CDATA[", less):
                stop = self._find("]]>", less + 9)
                return less, Words(less + 9, stop, raw=True), min(stop + 3, self.end)
            if self.text.startswith("<!--", less):
                return less, None, min(self._find("-->", less + 4) + 3, self.end)
            if self.text.startswith(("<!", "<?"), less):
                return less, None, min(self._find(">", less) + 1, self.end)
            start = less + 1  # a sign, not a mark
        return self.end, None, self.end

    def _find(self, mark: str, start: int) -> int:
        """Return where ``mark`` stands; what nothing closes runs to the end."""
        stop = self.text.find(mark, start, self.end)
        return self.end if stop < 0 else stop

    def inside(self, tag: Tag) -> Span | None:
        """Return the span between a tag and the one that closes it; None if nothing does."""
        if tag.closing or tag.empty or tag.name in self._unclosed:
            return None
        if tag.name in ("script", "style"):
            pattern = rf"<(/){tag.name}(?=[\s/>])"
        else:
            pattern = rf"<(/?)(?:[A-Za-z][\w.-]{{0,30}}:)?{re.escape(tag.name)}(?=[\s/>])"
        depth = 1
        for found in re.compile(pattern, re.I).finditer(self.text, tag.end, self.end):
            if found[1]:
                depth -= 1
                if depth == 0:
                    return Span(tag.end, found.start())
            elif not self._is_empty(found.start()):
                depth += 1
        self._unclosed.add(tag.name)
        return None

    def _is_empty(self, start: int) -> bool:
        tag = tag_at(self.text, start, self.end)
        return tag is None or tag.empty

    def after(self, inside: Span) -> int:
        """Return where the tag that closes ``inside`` ends."""
        tag = tag_at(self.text, inside.end, self.end)
        return tag.end if tag else self._find(">", inside.end)
