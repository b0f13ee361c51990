"""Names that stand for text: what a document defines, and its calls with the way back to them.

Every format writes its definitions down in one form: the number of arguments and the default of
an optional first one in brackets, the body in braces, ``#1`` for an argument. Expansion is
bounded: a text may not grow beyond a few times its size, whatever the macros say.
"""

from __future__ import annotations

from collections.abc import Callable, Iterator, Mapping
from functools import lru_cache
from typing import NamedTuple

from crossfoot.documents.format import Definitions
from crossfoot.documents.visible import Builder, Visible, compose, verbatim
from crossfoot.expressions import expression
from crossfoot.model import Span

_PARAMETER = expression(r"#([1-9])")
_MEANING = expression(r"(?:\[(\d)\])?\s{0,9}(?:\[([^\[\]\n]{0,100})\])?\s{0,9}\{([\s\S]*)\}")

#: Most definitions, longest meaning and deepest nesting that are followed.
MOST = 1000
LONGEST = 2000
DEEPEST = 8

#: Most calls that are expanded in one block.
_MOST_CALLS = 2000


class Macro(NamedTuple):
    """A macro: its number of arguments, the default of an optional first one, its body."""

    arguments: int
    default: str | None
    body: str


class Call(NamedTuple):
    """A call: the macro's name, where it stands, and its arguments, None where one is missing."""

    name: str
    span: Span
    arguments: tuple[Span | None, ...] = ()


#: Finds the calls in a text, in order.
Calls = Callable[[str, Mapping[str, Macro]], Iterator[Call]]


@lru_cache(maxsize=64)
def macros_of(definitions: Definitions) -> dict[str, Macro]:
    """Return the macros by name."""
    macros: dict[str, Macro] = {}
    for name, meaning in definitions:
        parsed = _MEANING.fullmatch(meaning)
        if parsed:
            macros[name] = Macro(int(parsed[1] or 0), parsed[2], parsed[3])
    return macros


def expanded(source: str, macros: Mapping[str, Macro], calls: Calls) -> Visible:
    """Return the source with its macros expanded.

    What an argument contributes stands where it stands in the call; the rest of an expansion
    stands for the marks of the call between its arguments.
    """
    shown = verbatim(source)
    if not macros:
        return shown
    limit = 4_000 + 3 * len(source)
    for _ in range(DEEPEST):
        once = _once(shown.text, macros, calls, limit)
        if once is None:
            break
        shown = compose(shown, once)
    return shown


def _once(text: str, macros: Mapping[str, Macro], calls: Calls, limit: int) -> Visible | None:
    """Expand the calls in ``text`` once; None if there is none, or no room left."""
    out = Builder()
    position = 0
    room = limit - len(text)
    left = _MOST_CALLS
    for call in calls(text, macros):
        macro = macros[call.name]
        out.keep(text, position, call.span.start)
        room -= len(macro.body) + 2 * sum(span.end - span.start for span in call.arguments if span)
        left -= 1
        if room < 0 or left < 0:
            return None
        _substitute(out, text, call, macro)
        position = call.span.end
    out.keep(text, position, len(text))
    return out.build() if left < _MOST_CALLS else None


def _substitute(out: Builder, text: str, call: Call, macro: Macro) -> None:
    """Write a macro's body with its arguments in place."""
    spans = call.arguments
    parts = _PARAMETER.split(macro.body)  # words, number, words, number … words
    used = [int(number) - 1 for number in parts[1::2]]
    present = [number for number in used if number < len(spans) and spans[number]]
    in_order = present == sorted(set(present))
    at, stop = call.span
    for index, words in enumerate(parts[::2]):
        span = None
        if index < len(used) and used[index] < len(spans):
            span = spans[used[index]]
            if span is None and used[index] == 0:
                words += macro.default or ""
        if not in_order:
            out.put(words, *call.span)
            if span:
                out.put(text[slice(*span)], *call.span)
        elif span:
            out.put(words, at, span.start)
            out.keep(text, *span)
            at = span.end
        else:
            following = [spans[number] for number in used[index:] if number in present]
            out.put(words, at, following[0].start if following and following[0] else stop)


_LISTED = expression(r"[()\[\]{},]|\"[^\"\n]{0,500}\"|\$[^$\n]{0,500}\$")


def listed(text: str, start: int, end: int) -> Iterator[Span]:
    """Yield the places of arguments between commas, without the white space around them."""
    depth = 0
    at = start
    for mark in _LISTED.finditer(text, start, end):
        if mark[0] in "([{":
            depth += 1
        elif mark[0] in ")]}":
            depth -= 1
        elif mark[0] == "," and depth == 0:
            yield _trimmed(text, at, mark.start())
            at = mark.end()
    yield _trimmed(text, at, end)


def _trimmed(text: str, start: int, end: int) -> Span:
    inner = text[start:end]
    start += len(inner) - len(inner.lstrip())
    return Span(start, start + len(inner.strip()))
