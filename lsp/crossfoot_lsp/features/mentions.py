"""References and definition: the other places that print the same result, and the fullest one."""

from __future__ import annotations

from typing import TYPE_CHECKING

from lsprotocol import types

from crossfoot.mentions import fullest, mentions
from crossfoot_lsp.lookup import claim_at, claim_span

if TYPE_CHECKING:
    from crossfoot_lsp.server import Server


async def references(server: Server, params: types.ReferenceParams) -> list[types.Location] | None:
    """Return where else the result at a place is printed."""
    view = await server.view(params.text_document.uri)
    if view is None:
        return None
    placed = claim_at(view.report, view.part.offset(params.position))
    if placed is None:
        return None
    return [
        view.snapshot.location(claim_span(other))
        for other in mentions(view.report, placed)
        if params.context.include_declaration or other.id != placed.id
    ]


async def definition(server: Server, params: types.DefinitionParams) -> types.Location | None:
    """Return where the result at a place is printed most fully."""
    view = await server.view(params.text_document.uri)
    if view is None:
        return None
    placed = claim_at(view.report, view.part.offset(params.position))
    if placed is None:
        return None
    return view.snapshot.location(claim_span(fullest(mentions(view.report, placed))))
