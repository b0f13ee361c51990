"""Amendments as the protocol's edits."""

from __future__ import annotations

from collections.abc import Iterable

from lsprotocol import types

from crossfoot.amend import Change
from crossfoot_lsp.snapshot import Part, Snapshot


def workspace_edit(
    snapshot: Snapshot, changes: Iterable[Change], versioned: bool
) -> types.WorkspaceEdit:
    """Return changes as an edit, bound to the versions they are for where the editor can do it."""
    by_part: dict[str, tuple[Part, list[types.TextEdit]]] = {}
    for change in changes:
        part = snapshot.part_at(change.span.start)
        _, edits = by_part.setdefault(part.uri, (part, []))
        edits.append(types.TextEdit(part.range(change.span), change.text))
    if not versioned:
        return types.WorkspaceEdit(changes={uri: edits for uri, (_, edits) in by_part.items()})
    return types.WorkspaceEdit(
        document_changes=[
            types.TextDocumentEdit(
                types.OptionalVersionedTextDocumentIdentifier(part.uri, part.version), edits
            )
            for part, edits in by_part.values()
        ]
    )
