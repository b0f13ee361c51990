"""Document symbols: the results as an outline, under the sections that they stand in."""

from __future__ import annotations

from collections.abc import Iterator
from typing import TYPE_CHECKING

from lsprotocol import types

from crossfoot.documents import show_block
from crossfoot.model import Block, Placed, Span
from crossfoot_lsp.lookup import claim_span, moved
from crossfoot_lsp.words import claim_detail, claim_name

if TYPE_CHECKING:
    from crossfoot_lsp.server import Server
    from crossfoot_lsp.store import View

#: Longest name of a section that is shown.
_LONGEST = 120


async def answer(
    server: Server, params: types.DocumentSymbolParams
) -> list[types.DocumentSymbol] | list[types.SymbolInformation] | None:
    """Return the outline of a text."""
    view = await server.view(params.text_document.uri)
    if view is None:
        return None
    outline = _outline(view)
    if server.client.hierarchy:
        return outline
    return list(_flat(view.part.uri, outline, None))


def _outline(view: View) -> list[types.DocumentSymbol]:
    """Return the sections, each with its subsections, tables and results."""
    top: list[types.DocumentSymbol] = []
    open_: list[tuple[int, list[types.DocumentSymbol]]] = [(0, top)]
    claims = _by_block(view)
    part = view.part
    for block in view.report.document.blocks:
        if not part.start <= block.start <= part.end:
            continue
        if block.kind == "heading":
            while open_[-1][0] >= block.level:
                open_.pop()
            section = _section(view, block)
            open_[-1][1].append(section)
            assert isinstance(section.children, list)  # made so just above
            open_.append((block.level, section.children))
            continue
        inside = [_claim(view, placed) for placed in claims.get(block.start, ())]
        if block.kind == "table" and inside:
            open_[-1][1].append(_table(view, block, inside))
        else:
            open_[-1][1].extend(inside)
    _stretch(top)
    return top


def _by_block(view: View) -> dict[int, list[Placed]]:
    found: dict[int, list[Placed]] = {}
    for placed in view.report.claims:
        found.setdefault(placed.base, []).append(placed)
    return found


def _symbol(
    view: View,
    name: str,
    kind: types.SymbolKind,
    span: Span,
    detail: str | None = None,
    children: list[types.DocumentSymbol] | None = None,
) -> types.DocumentSymbol:
    range_ = view.part.range(span)
    return types.DocumentSymbol(name or "…", kind, range_, range_, detail, children=children)


def _section(view: View, block: Block) -> types.DocumentSymbol:
    words = " ".join(show_block(view.report.document, block).text.split())[:_LONGEST]
    return _symbol(view, words, types.SymbolKind.Namespace, _extent(block), children=[])


def _table(view: View, block: Block, inside: list[types.DocumentSymbol]) -> types.DocumentSymbol:
    rows = f"{len(inside)} result{'s' * (len(inside) != 1)}"
    return _symbol(view, "Table", types.SymbolKind.Array, _extent(block), rows, inside)


def _claim(view: View, placed: Placed) -> types.DocumentSymbol:
    span = claim_span(placed)
    return _symbol(view, claim_name(placed), types.SymbolKind.Number, span, claim_detail(placed))


def _extent(block: Block) -> Span:
    return moved(Span(0, len(block.source)), block.start)


def _stretch(symbols: list[types.DocumentSymbol]) -> None:
    """Let each section reach to the end of what stands under it, as the protocol wants it."""
    for symbol in symbols:
        children = list(symbol.children or ())
        _stretch(children)
        ends = [symbol.range.end, *(child.range.end for child in children)]
        symbol.range = types.Range(symbol.range.start, max(ends))


def _flat(
    uri: str, symbols: list[types.DocumentSymbol], container: str | None
) -> Iterator[types.SymbolInformation]:
    for symbol in symbols:
        location = types.Location(uri, symbol.range)
        yield types.SymbolInformation(location, symbol.name, symbol.kind, container_name=container)
        yield from _flat(uri, list(symbol.children or ()), symbol.name)
