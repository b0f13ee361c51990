"""The names that formats with little markup define for a text, and where they are called."""

from __future__ import annotations

import re
from collections.abc import Callable, Iterator, Mapping
from typing import NamedTuple

from crossfoot.documents.format import Definitions
from crossfoot.documents.macros import LONGEST, MOST, Call, Macro, expanded, listed, macros_of
from crossfoot.documents.visible import Visible, verbatim
from crossfoot.model import Span


class Naming(NamedTuple):
    """How a format defines names and calls them.

    Attributes
    ----------
    hint
        What every definition holds.
    definition
        Pattern of a definition.
    meaning
        A definition to the number of arguments and the body; None where its value is unknown.
    sign
        What every call holds.
    call
        Pattern of a call, with the group ``name`` and perhaps ``arguments``.
    unwrap
        The place of an argument to that of what it shows.
    """

    hint: str
    definition: re.Pattern[str]
    meaning: Callable[[re.Match[str]], tuple[int, str] | None]
    sign: str
    call: re.Pattern[str]
    unwrap: Callable[[str, Span], Span] = lambda text, span: span

    def define(self, text: str) -> Definitions:
        """Return what a text defines."""
        if self.hint not in text:
            return ()
        found: dict[str, str] = {}
        for match in self.definition.finditer(text):
            meaning = self.meaning(match)
            if meaning and len(meaning[1]) <= LONGEST and len(found) < MOST:
                found[match["name"]] = f"[{meaning[0]}]{{{meaning[1]}}}"
        return tuple(sorted(found.items()))

    def expand(self, source: str, definitions: Definitions) -> Visible:
        """Return a source with what its names stand for."""
        if self.sign not in source:
            return verbatim(source)
        return expanded(source, macros_of(definitions), self._calls)

    def _calls(self, text: str, macros: Mapping[str, Macro]) -> Iterator[Call]:
        for found in self.call.finditer(text):
            macro = macros.get(found["name"])
            if macro is None:
                continue
            spans: tuple[Span, ...] = ()
            if macro.arguments:
                if found["arguments"] is None:
                    continue
                places = listed(text, *found.span("arguments"))
                spans = tuple(self.unwrap(text, span) for span in places)
            yield Call(found["name"], Span(*found.span()), spans)


def plain_meaning(found: re.Match[str]) -> tuple[int, str]:
    """Return the body of a definition that takes no arguments, on one line."""
    return 0, " ".join(found["body"].split())
