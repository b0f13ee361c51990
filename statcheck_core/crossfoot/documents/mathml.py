"""MathML to visible text, in the same form as TeX's: ``η_{p}^{2}``, ``(a)/(b)``.

The elements are put together without recursion and without copying, so that neither depth nor
size matters.
"""

from __future__ import annotations

import re
from collections.abc import Iterator
from typing import NamedTuple

from crossfoot.documents.markup import Scanner, Words
from crossfoot.documents.tags import Tag, entity_at
from crossfoot.documents.visible import Builder
from crossfoot.expressions import expression


class Leaf(NamedTuple):
    """Text and the source it stands for."""

    text: str
    start: int
    end: int


class Part(NamedTuple):
    """An element: its content, a tree of leaves, and its place."""

    content: object  # a Leaf or a list of such
    start: int
    end: int


_HIDDEN = frozenset(("annotation", "annotation-xml", "mphantom", "none", "mprescripts"))
_TOKENS = frozenset(("mi", "mn", "mo", "mtext", "ms"))
_BARS = frozenset("¯‾ˉ̅_")
_HATS = frozenset("^ˆ~˜.˙")
_INVISIBLE = expression("[\u2061-\u2064\u200b\u200c\u200d\ufeff]")
_STARS = expression(r"[*∗⋆†‡]+")

#: Longest text that is looked at to tell whether it is nothing but stars.
_FEW = 12


class _Frame:
    """An open element."""

    def __init__(self, name: str, start: int, inside: str = "") -> None:
        self.name = name
        self.start = start
        self.inside = inside
        self.parts: list[Part] = []


def show_mathml(out: Builder, source: str, start: int, end: int) -> None:
    """Show ``source[start:end]``, the inside of a ``math`` element."""
    scanner = Scanner(source, start, end)
    frames = [_Frame("math", start)]
    for token in scanner:
        if isinstance(token, Words):
            if frames[-1].name in _TOKENS or len(frames) == 1:
                frames[-1].parts.extend(_words(source, token, frames[-1].name))
        elif token.name in _HIDDEN:
            inside = scanner.inside(token)
            scanner.position = scanner.after(inside) if inside else scanner.position
        elif token.closing:
            _close(frames, token)
        elif token.empty or token.name == "mspace":
            frames[-1].parts.append(Part(Leaf(" ", token.start, token.end), token.start, token.end))
        else:
            frames.append(_Frame(token.name, token.start, token.inside))
    while len(frames) > 1:
        frame = frames.pop()
        frames[-1].parts.append(Part(_content(frame), frame.start, end))
    for leaf in _leaves([part.content for part in frames[0].parts]):
        same = source[leaf.start : leaf.end] == leaf.text
        if same:
            out.keep(source, leaf.start, leaf.end)
        else:
            out.put(leaf.text, leaf.start, leaf.end)


def _close(frames: list[_Frame], tag: Tag) -> None:
    """Close the element that ``tag`` ends; a tag that ends nothing open is passed over."""
    if len(frames) > 1 and frames[-1].name == tag.name:
        frame = frames.pop()
        frames[-1].parts.append(Part(_content(frame), frame.start, tag.end))


def _words(source: str, words: Words, name: str) -> Iterator[Part]:
    """Yield the text of a token element; white space around it means nothing."""
    start, end = words.start, words.end
    if name != "mtext":
        while start < end and source[start] in " \t\n":
            start += 1
        while start < end and source[end - 1] in " \t\n":
            end -= 1
    position = start
    while position < end:
        entity = None
        mark = end if words.raw else source.find("&", position, end)
        mark = end if mark < 0 else mark
        if mark < end:
            entity = entity_at(source, mark, end)
            mark = mark if entity else mark + 1
        if position < mark:
            yield from _plain(source, position, mark)
        position = mark
        if entity:
            text = _INVISIBLE.sub("", entity[0])
            if text:
                yield Part(Leaf(text, mark, entity[1]), mark, entity[1])
            position = entity[1]


def _plain(source: str, start: int, end: int) -> Iterator[Part]:
    """Yield text without the signs that are not seen."""
    for found in _INVISIBLE.finditer(source, start, end):
        if start < found.start():
            yield Part(Leaf(source[start : found.start()], start, found.start()), start, end)
        start = found.end()
    if start < end:
        yield Part(Leaf(source[start:end], start, end), start, end)


def _content(frame: _Frame) -> list[object]:
    """Return what an element shows."""
    parts = frame.parts
    if frame.name == "semantics":
        return [parts[0].content] if parts else []
    if frame.name in ("msup", "mover") and len(parts) == 2:
        return _over(parts) if frame.name == "mover" else [parts[0].content, *_raised(*parts)]
    if frame.name in ("msub", "munder") and len(parts) == 2:
        return [parts[0].content, *_script("_{", *parts)]
    if frame.name in ("msubsup", "munderover") and len(parts) == 3:
        base, low, high = parts
        return [base.content, *_script("_{", base, low), *_raised(low, high)]
    if frame.name == "mfrac" and len(parts) == 2:
        return _fraction(frame, *parts)
    if frame.name == "msqrt" and parts:
        return [Leaf("√(", frame.start, parts[0].start), *_all(parts), _end(")", parts)]
    if frame.name == "mfenced":
        return _fenced(frame)
    if frame.name in ("mtr", "mtd"):
        return [*_all(parts), _end(" ", parts)] if parts else []
    return _all(parts)


def _all(parts: list[Part]) -> list[object]:
    return [part.content for part in parts]


def _end(text: str, parts: list[Part]) -> Leaf:
    return Leaf(text, parts[-1].end, parts[-1].end)


def _script(mark: str, before: Part, script: Part) -> list[object]:
    """Return a raised or lowered part."""
    return [
        Leaf(mark, before.end, max(before.end, script.start)),
        script.content,
        Leaf("}", script.end, script.end),
    ]


def _raised(before: Part, script: Part) -> list[object]:
    """Return a raised part; stars alone are marks of significance."""
    if _STARS.fullmatch(_few(script)):
        return [script.content]
    return _script("^{", before, script)


def _few(part: Part) -> str:
    """Return the text of a part if it is short."""
    text = ""
    for leaf in _leaves([part.content]):
        text += leaf.text
        if len(text) > _FEW:
            return ""
    return text


def _over(parts: list[Part]) -> list[object]:
    """Return a part with an accent over it."""
    base, accent = parts
    sign = _few(accent)
    if sign in _BARS and sign:
        return [base.content, Leaf("\u0304", accent.start, accent.end)]
    return [base.content] if sign in _HATS else [base.content, *_raised(base, accent)]


def _fraction(frame: _Frame, above: Part, below: Part) -> list[object]:
    return [
        Leaf("(", frame.start, above.start),
        above.content,
        Leaf(")/(", above.end, max(above.end, below.start)),
        below.content,
        Leaf(")", below.end, below.end),
    ]


def _fenced(frame: _Frame) -> list[object]:
    """Return the parts of ``mfenced`` with its brackets and commas."""
    brackets = {
        name: found[1]
        for name in ("open", "close")
        if (
            found := re.search(
                rf"\b{name}\s{{0,9}}=\s{{0,9}}[\"']([^\"']{{0,9}})[\"']", frame.inside
            )
        )
    }
    content: list[object] = [Leaf(brackets.get("open", "("), frame.start, frame.start)]
    for number, part in enumerate(frame.parts):
        if number:
            content.append(Leaf(",", part.start, part.start))
        content.append(part.content)
    end = frame.parts[-1].end if frame.parts else frame.start
    content.append(Leaf(brackets.get("close", ")"), end, end))
    return content


def _leaves(content: list[object]) -> Iterator[Leaf]:
    """Yield the leaves of a tree in order."""
    stack: list[Iterator[object]] = [iter(content)]
    while stack:
        for item in stack[-1]:
            if isinstance(item, Leaf):
                yield item
            elif isinstance(item, list):
                stack.append(iter(item))
                break
        else:
            stack.pop()
