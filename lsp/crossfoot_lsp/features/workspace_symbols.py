"""Workspace symbols: results by their words, in every file of the folders."""

from __future__ import annotations

from collections.abc import Iterator
from typing import TYPE_CHECKING

from lsprotocol import types

from crossfoot_lsp.lookup import claim_span
from crossfoot_lsp.words import claim_name

if TYPE_CHECKING:
    from crossfoot_lsp.server import Server

#: Most that are returned; a person narrows the query rather than read more.
_MOST = 500


async def answer(
    server: Server, params: types.WorkspaceSymbolParams
) -> list[types.SymbolInformation]:
    """Return the results whose words match a query."""
    found: list[types.SymbolInformation] = []
    for entry in server.store:
        view = await server.view(entry.snapshot.uri)
        for placed in view.report.claims if view is not None else ():
            name = claim_name(placed)
            if view is not None and matches(params.query, name):
                location = view.snapshot.location(claim_span(placed))
                found.append(_symbol(name, location))
    async for closed in server.workspace_files.entries(params.work_done_token):
        if len(found) >= _MOST:
            break
        found += [
            _symbol(name, types.Location(closed.uri, range_))
            for name, range_ in closed.symbols
            if matches(params.query, name)
        ]
    return found[:_MOST]


def _symbol(name: str, location: types.Location) -> types.SymbolInformation:
    return types.SymbolInformation(location, name, types.SymbolKind.Number)


def matches(query: str, name: str) -> bool:
    """Say whether the characters of a query stand in a name, in order, as editors expect."""
    letters: Iterator[str] = iter(name.lower())
    return all(letter in letters for letter in query.lower() if not letter.isspace())
