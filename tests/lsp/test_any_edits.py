"""Whatever edits are made, what the server shows is what a fresh scan of the text finds."""

from __future__ import annotations

import asyncio
import re
from collections.abc import Sequence
from typing import Any

from hypothesis import HealthCheck, given, settings
from hypothesis import strategies as st

from crossfoot.laws.quantities import symbol
from crossfoot.model import Span
from crossfoot.places import where
from crossfoot.scan import scan_text
from crossfoot_lsp.lookup import all_readings, span_of
from serving.wire import wire

PIECES = [
    "So F(2, 57) = 4.31, p = .052. ",
    "So *t*(40) = 2.20, *p* = .017. ",
    "Of N = 30 plots, R² = .131, F(2, 57) = 4.31, p = .018. ",
    "Again R² = .131, F(2, 57) = 4.31, p = .052. ",
    "t(40) = 9.20, p = .000",
    "$R^2 = .31$, $F(2, 57) = 4.31$, ",
    "| Term | b | SE | t | p |\n|---|---|---|---|---|\n| x | 0.42 | 0.11 | 9.82 | .367 |\n",
    "\n\n", "\n", "\r\n", "\r", "# Methods\n\nAll tests are one-sided.\n\n", "# Results\n\n",
    "<!-- crossfoot: allow p-from-f because of that -->", "<!-- crossfoot: allow", "-->",
    "```\n", "    ", "🌿", "é", "\u2028", "\x0c", "p", "5", ".", " ", "<", "$", "{", "\\",
]  # fmt: skip

TEXTS = st.lists(st.sampled_from(PIECES), max_size=12).map("".join)
#: Where an edit starts, how far it reaches, both as shares of the text, and what it puts there.
EDITS = st.lists(st.tuples(st.floats(0, 1), st.floats(0, 1), TEXTS), max_size=6)

_LINE = re.compile(r"\r\n|\r|\n")


def position(text: str, offset: int) -> dict[str, int]:
    """Return the position of an offset, worked out the slow way."""
    starts = [0, *(found.end() for found in _LINE.finditer(text))]
    line = max(number for number, start in enumerate(starts) if start <= offset)
    column = len(text[starts[line] : offset].encode("utf-16-le")) // 2
    return {"line": line, "character": column}


def fresh(text: str) -> list[tuple[object, ...]]:
    """Return what a scan finds: place, identity, message, and the places it rests on."""
    report = scan_text(text)
    found: list[tuple[object, ...]] = []

    def take(span: Span, identity: str, message: str, related: list[tuple[Span, str]]) -> None:
        place = where(report.document, span)
        start, end = position(text, span.start), position(text, span.end)
        assert (place.start.line, place.end.line) == (start["line"] + 1, end["line"] + 1)
        places = [(*position(text, s.start).values(), words) for s, words in related]
        found.append((*start.values(), *end.values(), identity, message, places))

    for placed in report.claims:
        readings = all_readings(placed.audited.claim)
        for finding in placed.audited.findings:
            related = [
                (
                    span_of(placed, index),
                    f"{symbol(readings[index].quantity)} {readings[index].relation} "
                    f"{readings[index].literal}",
                )
                for index in finding.related
            ]
            related += [(span, "printed here") for span in finding.elsewhere]
            if finding.settled is None:
                span = span_of(placed, finding.reading)
                take(span, finding.identity, finding.message, related)
    for problem in report.document.problems:
        if problem.span:
            take(problem.span, "remark", problem.message, [])
    return sorted(found, key=repr)


def shown(marks: Sequence[Any]) -> list[tuple[object, ...]]:
    return sorted(
        (
            (
                *mark["range"]["start"].values(),
                *mark["range"]["end"].values(),
                mark["code"],
                mark["message"],
                [
                    (*place["location"]["range"]["start"].values(), place["message"])
                    for place in mark.get("relatedInformation") or ()
                ],
            )
            for mark in marks
        ),
        key=repr,
    )


def test_any_edits_leave_the_diagnostics_of_a_fresh_scan() -> None:
    with asyncio.Runner() as runner:
        manager = wire()
        server = runner.run(manager.__aenter__())
        runner.run(server.begin())
        number = 0

        async def compare(text: str, edits: Sequence[tuple[float, float, str]]) -> None:
            nonlocal number
            number += 1
            uri = f"file:///nowhere/any-{number}.md"
            await server.open(uri, text)
            for version, (start, length, new) in enumerate(edits, 2):
                first = round(start * len(text))
                last = first + round(length * (len(text) - first))
                if "\r\n" in (text[first - 1 : first + 1], text[last - 1 : last + 1]):
                    continue  # no editor has a place between the two
                range_ = {"start": position(text, first), "end": position(text, last)}
                change = {"range": range_, "text": new}
                document = {"uri": uri, "version": version}
                params = {"textDocument": document, "contentChanges": [change]}
                await server.notify("textDocument/didChange", params)
                text = text[:first] + new + text[last:]
            assert shown(await server.marks(uri)) == fresh(text)
            await server.notify("textDocument/didClose", {"textDocument": {"uri": uri}})

        # The server is slow to start and is shared by all examples.
        @settings(max_examples=150, deadline=None, suppress_health_check=[HealthCheck.too_slow])
        @given(TEXTS, EDITS)
        def check(text: str, edits: list[tuple[float, float, str]]) -> None:
            runner.run(compare(text, edits))

        try:
            check()
            assert runner.run(server.end()) == 0
        finally:
            runner.run(manager.__aexit__(None, None, None))
