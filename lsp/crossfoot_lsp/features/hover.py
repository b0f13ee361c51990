"""Hover: what a number is, what it must be given the others, and how that is known."""

from __future__ import annotations

from typing import TYPE_CHECKING

from lsprotocol import types

from crossfoot_lsp.cards import card_of_claim, card_of_reading
from crossfoot_lsp.lookup import claim_at, claim_span, spot_at

if TYPE_CHECKING:
    from crossfoot_lsp.server import Server


async def answer(server: Server, params: types.HoverParams) -> types.Hover | None:
    """Say what stands at a place."""
    view = await server.view(params.text_document.uri)
    if view is None:
        return None
    offset = view.part.offset(params.position)
    spot = spot_at(view.report, offset)
    if spot is not None:
        card, span = card_of_reading(spot, server.client.marked), spot.span
    else:
        placed = claim_at(view.report, offset)
        if placed is None:
            return None
        card, span = card_of_claim(placed), claim_span(placed)
    kind = types.MarkupKind.Markdown if server.client.markdown else types.MarkupKind.PlainText
    words = card.markdown if server.client.markdown else card.plain
    return types.Hover(types.MarkupContent(kind, words), view.part.range(span))
