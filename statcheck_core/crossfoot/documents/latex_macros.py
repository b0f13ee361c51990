"""The macros a LaTeX document defines, and their expansion with the way back to the call.

Expansion is bounded: a text may not grow beyond a few times its size, whatever the macros say.
"""

from __future__ import annotations

from functools import lru_cache
from typing import NamedTuple

from crossfoot.documents.format import Definitions
from crossfoot.documents.tex_symbols import COMMANDS
from crossfoot.documents.visible import Builder, Visible, compose, verbatim
from crossfoot.expressions import expression
from crossfoot.model import Span

# Groups are followed four deep; each level is possessive, so that no text is read twice.
_INNER = r"[^{}\\]++|\\[\s\S]"
_GROUP = rf"\{{(?:{_INNER})*+\}}"
for _ in range(4):
    _GROUP = rf"\{{(?:{_INNER}|{_GROUP})*+\}}"

#: A group in braces.
GROUP = expression(_GROUP)

#: A group as the pattern of one.
GROUP_PATTERN = _GROUP

_NAME = r"\s{0,9}(?:\{\s{0,9}\\([A-Za-z@]{1,60})\s{0,9}\}|\\([A-Za-z@]{1,60}))\s{0,9}"
#: A definition, or a comment, in which there is none.
DEFINITION = expression(
    r"(?<!\\)%[^\n]*"
    rf"|\\(?:re|provide)?(?:new)?command\*?{_NAME}((?:\[[^\[\]\n]{{0,100}}\]\s{{0,9}}){{0,2}})({_GROUP})"
    rf"|\\DeclareMathOperator\*?{_NAME}()({_GROUP})"
    rf"|\\[egx]?def{_NAME}((?:#\d){{0,9}})({_GROUP})"
    rf"|\\(?:New|Renew|Provide|Declare)(?:Expandable)?DocumentCommand{_NAME}(\{{[^{{}}\n]{{0,60}}(?:\{{[^{{}}\n]{{0,60}}\}}[^{{}}\n]{{0,40}}){{0,3}}\}})\s{{0,9}}({_GROUP})"
)
_SPECIFIED = expression(r"(?P<kind>[moOsdDrRgG])(?P<default>\{[^{}]*\})?")
_CALL = expression(r"\\([A-Za-z@]+)|(?<!\\)%[^\n]*")
_OPTION = expression(r"\s{0,9}\[([^\[\]\n]{0,200})\]")
_ARGUMENT = expression(rf"\s{{0,9}}(?:({_GROUP})|(\\[A-Za-z@]+|[^\s{{}}\\]))")
_NAMES = expression(r"\\([A-Za-z@]+)")
_PARAMETER = expression(r"#([1-9])")
_MEANING = expression(r"(?:\[(\d)\])?\s{0,9}(?:\[([^\[\]\n]{0,100})\])?\s{0,9}\{([\s\S]*)\}")

#: Most definitions, longest meaning and deepest nesting that are followed.
_MOST = 1000
_LONGEST = 2000
_DEEPEST = 8

#: Most calls that are expanded in one block.
_MOST_CALLS = 2000


class Macro(NamedTuple):
    """A macro: its number of arguments, the default of an optional first one, its body."""

    arguments: int
    default: str | None
    body: str


def define(text: str) -> Definitions:
    """Return the macros that a text defines, each with its arguments and body as written."""
    found: dict[str, str] = {}
    if not any(word in text for word in ("ommand", "def", "\\Declare")):
        return ()
    for match in DEFINITION.finditer(text):
        groups = [group for group in match.groups() if group is not None]
        if len(groups) != 3 or len(groups[2]) > _LONGEST or len(found) >= _MOST:
            continue
        name, arguments, body = groups
        if arguments.startswith("#"):
            arguments = f"[{arguments.count('#')}]"
        elif arguments.startswith("{"):
            arguments = _specified(arguments[1:-1])
        if name not in COMMANDS:
            found[name] = arguments.strip() + body
    return tuple(sorted(found.items()))


def _specified(arguments: str) -> str:
    """Return a document command's arguments in the older way: ``O{57} m m`` is ``[3][57]``."""
    kinds = list(_SPECIFIED.finditer(arguments))
    count = f"[{len(kinds)}]" if kinds else ""
    if kinds and kinds[0]["kind"] in "oO":
        count += f"[{(kinds[0]['default'] or '{}')[1:-1]}]"
    return count


@lru_cache(maxsize=64)
def _macros(definitions: Definitions) -> dict[str, Macro]:
    """Return the macros by name."""
    macros: dict[str, Macro] = {}
    for name, meaning in definitions:
        parsed = _MEANING.fullmatch(meaning)
        if parsed:
            macros[name] = Macro(int(parsed[1] or 0), parsed[2], parsed[3])
    return _ending(macros)


def _ending(macros: dict[str, Macro]) -> dict[str, Macro]:
    """Return the macros whose expansion comes to an end: none that calls itself in the end."""
    calls = {name: set(_NAMES.findall(macro.body)) & set(macros) for name, macro in macros.items()}
    ending: dict[str, Macro] = {}
    for _ in range(_DEEPEST):
        ready = [name for name in calls if name not in ending and calls[name] <= ending.keys()]
        ending.update((name, macros[name]) for name in ready)
    return ending


def expand(source: str, definitions: Definitions) -> Visible:
    """Return the source with its macros expanded.

    What an argument contributes stands where it stands in the call; the rest of an expansion
    stands for the marks of the call between its arguments.
    """
    shown = verbatim(source)
    if not definitions or "\\" not in source:
        return shown
    macros = _macros(definitions)
    limit = 4_000 + 3 * len(source)
    for _ in range(_DEEPEST):
        once = _once(shown.text, macros, limit)
        if once is None:
            break
        shown = compose(shown, once)
    return shown


def _once(text: str, macros: dict[str, Macro], limit: int) -> Visible | None:
    """Expand the calls in ``text`` once; None if there is none, or no room left."""
    out = Builder()
    position = 0
    room = limit - len(text)
    left = _MOST_CALLS
    while call := _CALL.search(text, position):
        end = call.end()
        macro = macros.get(call[1]) if call[1] else None
        if macro is None:
            definition = DEFINITION.match(text, call.start()) if call[1] else None
            out.keep(text, position, definition.end() if definition else end)
            position = definition.end() if definition else end
            continue
        out.keep(text, position, call.start())
        spans, end = _arguments(text, end, macro)
        room -= len(macro.body) + 2 * sum(span.end - span.start for span in spans if span)
        left -= 1
        if room < 0 or left < 0:
            return None
        _substitute(out, text, Span(call.start(), end), macro, spans)
        position = end
    out.keep(text, position, len(text))
    return out.build() if left < _MOST_CALLS else None


def _arguments(text: str, position: int, macro: Macro) -> tuple[list[Span | None], int]:
    """Return the places of a call's arguments and where it ends; None where one is missing."""
    spans: list[Span | None] = []
    for number in range(macro.arguments):
        if number == 0 and macro.default is not None:
            option = _OPTION.match(text, position)
            spans.append(Span(*option.span(1)) if option else None)
            position = option.end() if option else position
            continue
        found = _ARGUMENT.match(text, position)
        if not found:
            spans.append(None)
        elif found[1]:
            spans.append(Span(found.start(1) + 1, found.end(1) - 1))
            position = found.end()
        else:
            spans.append(Span(*found.span(2)))
            position = found.end()
    return spans, position


def _substitute(
    out: Builder, text: str, call: Span, macro: Macro, spans: list[Span | None]
) -> None:
    """Write a macro's body with its arguments in place."""
    parts = _PARAMETER.split(macro.body)  # words, number, words, number … words
    used = [int(number) - 1 for number in parts[1::2]]
    present = [number for number in used if number < len(spans) and spans[number]]
    in_order = present == sorted(set(present))
    at = call.start
    for index, words in enumerate(parts[::2]):
        span = None
        if index < len(used) and used[index] < len(spans):
            span = spans[used[index]]
            if span is None and used[index] == 0:
                words += macro.default or ""
        if not in_order:
            out.put(words, *call)
            if span:
                out.put(text[slice(*span)], *call)
        elif span:
            out.put(words, at, span.start)
            out.keep(text, *span)
            at = span.end
        else:
            following = [spans[number] for number in used[index:] if number in present]
            out.put(words, at, following[0].start if following and following[0] else call.end)
