"""Completion: the number that must follow, behind a name that was just typed."""

from __future__ import annotations

from typing import TYPE_CHECKING

from lsprotocol import types

from crossfoot.amend.typed import Proposal, proposals
from crossfoot_lsp.cards import working_card
from crossfoot_lsp.lookup import moved

if TYPE_CHECKING:
    from crossfoot_lsp.server import Server
    from crossfoot_lsp.store import View


async def answer(server: Server, params: types.CompletionParams) -> types.CompletionList | None:
    """Propose how to go on at a place."""
    view = await server.view(params.text_document.uri)
    if view is None:
        return None
    found = proposals(view.report, view.part.offset(params.position))
    items = [_item(server, view, proposal) for proposal in found]
    return types.CompletionList(is_incomplete=True, items=[i for i in items if i is not None])


def _item(server: Server, view: View, proposal: Proposal) -> types.CompletionItem | None:
    range_ = view.part.range(moved(proposal.span, 0))
    if range_.start.line != range_.end.line:
        return None  # the protocol wants it on one line
    card = working_card(proposal.claim, proposal.title, proposal.derived)
    kind = types.MarkupKind.Markdown if server.client.documentation else types.MarkupKind.PlainText
    words = card.markdown if server.client.documentation else card.plain
    return types.CompletionItem(
        proposal.title,
        kind=types.CompletionItemKind.Value,
        detail=f"follows from {proposal.claim.label}",
        documentation=types.MarkupContent(kind, words),
        filter_text=proposal.text,
        preselect=True,
        text_edit=types.TextEdit(range_, proposal.text),
    )
