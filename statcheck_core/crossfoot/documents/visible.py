"""What a reader sees of a block, with the way back to the source.

Every format turns markup into the same plain text: raised text stands in ``^{…}``, lowered text
in ``_{…}``, Greek letters and relations are Unicode characters, and whatever has no text of its
own (an image, inline code that is run) is :data:`OPAQUE`.
"""

from __future__ import annotations

from bisect import bisect_right
from collections.abc import Iterator, Sequence
from typing import NamedTuple

from crossfoot.expressions import expression
from crossfoot.model import Span

#: Stands for content that has no text here, so that nothing is read across it.
OPAQUE = "\ufffc"


class Piece(NamedTuple):
    """A run of visible text from ``shown`` on, and the source span it stands for.

    A run as long as its source span maps to it character for character; every other run stands
    for the whole of its span.
    """

    shown: int
    start: int
    end: int


class Visible(NamedTuple):
    """Visible text and its sorted pieces, which cover it without gaps."""

    text: str
    pieces: tuple[Piece, ...]


def verbatim(text: str) -> Visible:
    """Show a text that has no markup."""
    return Visible(text, (Piece(0, 0, len(text)),) if text else ())


def place(visible: Visible, start: int, end: int) -> Span:
    """Return the source span of ``visible.text[start:end]``.

    An empty span maps to the point where it stands. Characters that replace markup map to the
    whole of what they replace.
    """
    first, after, stop = _at(visible, start)
    if end <= start:
        return Span(first, first)
    if end <= stop:
        return Span(first, after + (end - start - 1))
    last = _at(visible, end - 1)[1] if end > start + 1 else after
    return Span(first, last if last > first else first)


def _at(visible: Visible, index: int) -> tuple[int, int, int]:
    """Return the source span, as two offsets, of the visible character at ``index``.

    And up to where the text goes on character for character.
    """
    pieces = visible.pieces
    if not pieces:
        return 0, 0, 0
    # A piece that starts at the index sorts before a tuple that goes on behind that.
    number = max(0, bisect_right(pieces, (index, _BEHIND)) - 1)
    shown, start, end = pieces[number]
    stop = pieces[number + 1].shown if number + 1 < len(pieces) else len(visible.text)
    if stop - shown != end - start:
        return start, end, 0
    at = start + index - shown
    return (at, at + 1, stop) if at < end else (end, end, stop)


#: More than any place.
_BEHIND = float("inf")


class Builder:
    """Collects visible text piece by piece; adjoining verbatim runs are joined."""

    def __init__(self) -> None:
        self._parts: list[str] = []
        self._pieces: list[Piece] = []
        self._length = 0
        self._open = -1  # where the source of the last piece ends, if that is verbatim

    def keep(self, source: str, start: int, end: int) -> None:
        """Show ``source[start:end]`` as it stands."""
        if start < end:
            self._run(source[start:end], start, end)

    def put(self, text: str, start: int, end: int) -> None:
        """Show ``text`` in place of the source span from ``start`` to ``end``."""
        if not text:
            return
        if len(text) == end - start > 1:
            # As long as its span by chance: two runs, so that neither passes for the source.
            self._run(text[:1], start, end)
            text = text[1:]
        self._run(text, start, end)

    def add(self, visible: Visible, offset: int = 0) -> None:
        """Show what ``visible`` shows of the source from ``offset`` on."""
        for piece, stop in _with_stops(visible.pieces, len(visible.text)):
            text = visible.text[piece.shown : stop]
            self._run(text, offset + piece.start, offset + piece.end)

    def _run(self, text: str, start: int, end: int) -> None:
        length = len(text)
        if length != end - start:
            self._pieces.append(Piece(self._length, start, end))
            self._open = -1
        elif self._open == start and self._pieces:
            last = self._pieces[-1]
            self._pieces[-1] = Piece(last.shown, last.start, end)
            self._open = end
        else:
            self._pieces.append(Piece(self._length, start, end))
            self._open = end
        self._parts.append(text)
        self._length += length

    def build(self) -> Visible:
        """Return what was collected."""
        return Visible("".join(self._parts), tuple(self._pieces))


def _with_stops(pieces: Sequence[Piece], length: int) -> Iterator[tuple[Piece, int]]:
    """Pair each piece with the visible offset at which it ends."""
    stops = [piece.shown for piece in pieces[1:]]
    stops.append(length)
    return zip(pieces, stops, strict=False)


def compose(first: Visible, second: Visible) -> Visible:
    """Return what ``second`` shows of ``first.text``, placed in the source of ``first``.

    Every step from source to visible text (line ends, macros, markup) is a :class:`Visible` of
    its own; this joins two of them.
    """
    if first.pieces == (Piece(0, 0, len(first.text)),):
        return second
    out = Builder()
    bounds = [piece.shown for piece in first.pieces]
    bounds.append(len(first.text))
    for piece, stop in _with_stops(second.pieces, len(second.text)):
        text = second.text[piece.shown : stop]
        if len(text) == piece.end - piece.start:
            _pass_on(out, first, bounds, piece.start, text)
        else:
            out.put(text, *_span(first, bounds, piece))
    return out.build()


def _span(first: Visible, bounds: list[int], piece: Piece) -> Span:
    """Return the source span of a piece that stands for a stretch, or a point, of ``first.text``.

    A point within a stretch that is shown as a whole stands for all of that stretch, as does one
    between two parts of it.
    """
    if piece.start == piece.end:
        number = bisect_right(bounds, piece.start) - 1
        if 0 <= number < len(first.pieces):
            around = first.pieces[number]
            if bounds[number] == piece.start:
                whole = number > 0 and around.start < first.pieces[number - 1].end
            else:
                whole = bounds[number + 1] - around.shown != around.end - around.start
            if whole:
                return Span(around.start, around.end)
        elif first.pieces:
            return Span(first.pieces[-1].end, first.pieces[-1].end)
    return place(first, piece.start, piece.end)


def _pass_on(out: Builder, first: Visible, bounds: list[int], start: int, text: str) -> None:
    """Place ``text``, which stands for as many characters of ``first.text`` from ``start`` on."""
    end = start + len(text)
    number = max(0, bisect_right(bounds, start) - 1)
    at = start
    while at < end and number < len(first.pieces):
        piece = first.pieces[number]
        upto = min(end, bounds[number + 1])
        part = text[at - start : upto - start]
        if bounds[number + 1] - piece.shown == piece.end - piece.start:
            shift = piece.start - piece.shown
            out.add(Visible(part, (Piece(0, at + shift, upto + shift),)))
        else:
            out.put(part, piece.start, piece.end)
        at = upto
        number += 1


def trimmed(visible: Visible) -> Visible:
    """Leave out white space at either end."""
    text = visible.text
    start, end = len(text) - len(text.lstrip()), len(text.rstrip())
    if end - start == len(text):
        return visible
    out = Builder()
    out.keep(text, start, end)
    return compose(visible, out.build())


#: A space between the digits of one number is kept as it is.
_SPACE = expression(r"(?!(?<=\d)[\u00a0\u2007\u2009\u202f]\d{3}(?!\d))\s+")


def flat(visible: Visible) -> Visible:
    """Put the text on one line: runs of white space become one space, none at either end."""
    text = visible.text
    if text == " ".join(text.split()):
        return visible
    out = Builder()
    position = 0
    end = len(text.rstrip())
    for found in _SPACE.finditer(text, 0, end):
        out.keep(text, position, found.start())
        if found.start():
            if found.group() == " ":
                out.keep(text, *found.span())
            else:
                out.put(" ", *found.span())
        position = found.end()
    out.keep(text, position, end)
    return compose(visible, out.build())
