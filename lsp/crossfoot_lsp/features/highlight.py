"""Document highlight: all numbers of the result under the cursor."""

from __future__ import annotations

from typing import TYPE_CHECKING

from lsprotocol import types

from crossfoot_lsp.lookup import claim_at, readings_of

if TYPE_CHECKING:
    from crossfoot_lsp.server import Server


async def answer(
    server: Server, params: types.DocumentHighlightParams
) -> list[types.DocumentHighlight] | None:
    """Return the numbers of the result at a place."""
    view = await server.view(params.text_document.uri)
    if view is None:
        return None
    placed = claim_at(view.report, view.part.offset(params.position))
    if placed is None:
        return None
    return [
        types.DocumentHighlight(view.part.range(spot.span), types.DocumentHighlightKind.Read)
        for spot in readings_of(placed)
    ]
