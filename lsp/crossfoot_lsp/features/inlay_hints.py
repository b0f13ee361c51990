"""Inlay hints: the recomputed p behind each printed one, where a person wants that."""

from __future__ import annotations

from collections.abc import Iterator
from typing import TYPE_CHECKING

from lsprotocol import types

from crossfoot.audit.literals import numeral
from crossfoot.audit.wording import PLAIN, between
from crossfoot.laws.interval import Interval, meet
from crossfoot_lsp.cards import implied
from crossfoot_lsp.lookup import Spot, claims_at, readings_of

if TYPE_CHECKING:
    from crossfoot_lsp.server import Server


async def answer(server: Server, params: types.InlayHintParams) -> list[types.InlayHint] | None:
    """Return the hints of a range."""
    view = await server.view(params.text_document.uri)
    if view is None or not server.configuration.editor(view.snapshot.path).inlay_hints:
        return None
    start, end = (view.part.start + at for at in view.part.text.span(params.range))
    return [
        types.InlayHint(
            view.part.text.position(spot.span.end - view.part.start),
            words,
            padding_left=True,
            tooltip="\n".join(working),
        )
        for placed in claims_at(view.report, start, end)
        for spot in readings_of(placed)
        if spot.reading.quantity == "p" and start <= spot.span.end <= end
        for words, working in _hint(spot)
    ]


def _hint(spot: Spot) -> Iterator[tuple[str, tuple[str, ...]]]:
    derived = implied(spot.placed.audited.claim, spot.number)
    if derived is not None:
        printed = Interval(spot.reading.low, spot.reading.high)
        interval = Interval(derived.low, derived.high)
        apart = printed if meet(printed, interval) is None else None
        shown = between(interval, numeral(spot.reading) or PLAIN, apart)
        yield f"recomputed: {shown.removeprefix('= ')}", derived.working
