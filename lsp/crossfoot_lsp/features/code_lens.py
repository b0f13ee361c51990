"""Code lens: how many results of the document agree, above its first line."""

from __future__ import annotations

from typing import TYPE_CHECKING

from lsprotocol import types

from crossfoot_lsp.capabilities import SUMMARY
from crossfoot_lsp.summary import headline

if TYPE_CHECKING:
    from crossfoot_lsp.server import Server


async def answer(server: Server, params: types.CodeLensParams) -> list[types.CodeLens] | None:
    """Return the summary of a text, if it is wanted."""
    view = await server.view(params.text_document.uri)
    if view is None or not server.configuration.editor(view.snapshot.path).code_lens:
        return None
    if not view.report.claims or view.part is not view.snapshot.parts[0]:
        return []
    top = types.Range(types.Position(0, 0), types.Position(0, 0))
    title = headline(view.report)
    return [types.CodeLens(top, types.Command(title, SUMMARY, arguments=[view.snapshot.uri]))]
