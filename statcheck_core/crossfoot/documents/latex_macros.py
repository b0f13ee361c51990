"""The macros a LaTeX document defines, and their expansion with the way back to the call."""

from __future__ import annotations

import re
from collections.abc import Iterator, Mapping
from functools import lru_cache

from crossfoot.documents.format import Definitions
from crossfoot.documents.macros import DEEPEST, LONGEST, MOST, Call, Macro, expanded, macros_of
from crossfoot.documents.tex_symbols import COMMANDS
from crossfoot.documents.visible import Visible, verbatim
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
#: What a definition stands for.
_NOTHING = ""


def define(text: str) -> Definitions:
    """Return the macros that a text defines, each with its arguments and body as written."""
    found: dict[str, str] = {}
    if not any(word in text for word in ("ommand", "def", "\\Declare")):
        return ()
    for match in DEFINITION.finditer(text):
        groups = [group for group in match.groups() if group is not None]
        if len(groups) != 3 or len(groups[2]) > LONGEST or len(found) >= MOST:
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
    """Return the macros whose expansion comes to an end: none that calls itself in the end."""
    macros = macros_of(definitions)
    calls = {name: set(_NAMES.findall(macro.body)) & set(macros) for name, macro in macros.items()}
    ending: dict[str, Macro] = {}
    for _ in range(DEEPEST):
        ready = [name for name in calls if name not in ending and calls[name] <= ending.keys()]
        ending.update((name, macros[name]) for name in ready)
    return {**ending, _NOTHING: Macro(0, None, "")}


def expand(source: str, definitions: Definitions, *, comments: bool = True) -> Visible:
    """Return the source with its macros expanded, and without their definitions.

    ``comments`` says whether a percent sign starts one.
    """
    if not definitions or "\\" not in source:
        return verbatim(source)
    return expanded(source, _macros(definitions), _calls if comments else _calls_in_words)


def _calls(
    text: str, macros: Mapping[str, Macro], pattern: re.Pattern[str] = _CALL
) -> Iterator[Call]:
    """Find the calls and the definitions, which show nothing, outside comments."""
    position = 0
    while found := pattern.search(text, position):
        position = found.end()
        macro = macros.get(found[1]) if found[1] else None
        if macro:
            spans, position = _arguments(text, position, macro)
            yield Call(found[1], Span(found.start(), position), tuple(spans))
        elif found[1] and (definition := DEFINITION.match(text, found.start())):
            position = definition.end()
            yield Call(_NOTHING, Span(*definition.span()))


def _calls_in_words(text: str, macros: Mapping[str, Macro]) -> Iterator[Call]:
    return _calls(text, macros, _NAMES)


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
