"""Code actions: each remedy, what would complete a result, allowances, and all that is safe."""

from __future__ import annotations

from collections.abc import Iterator, Sequence
from typing import TYPE_CHECKING, Any

from lsprotocol import types

from crossfoot.amend.complete import completions
from crossfoot.amend.reasons import reasons
from crossfoot.amend.remarks import allowance
from crossfoot.amend.remedies import mended
from crossfoot.amend.safe import safe_rewrites
from crossfoot.laws.quantities import symbol
from crossfoot.model import Finding, Placed, Remedy
from crossfoot_lsp.capabilities import COMPLETE, FIX_ALL
from crossfoot_lsp.edits import workspace_edit
from crossfoot_lsp.lookup import claims_at, span_of
from crossfoot_lsp.marks import SOURCE

if TYPE_CHECKING:
    from crossfoot_lsp.server import Server
    from crossfoot_lsp.store import View

QUICK_FIX = types.CodeActionKind.QuickFix.value

#: The command of an editor's own that asks a person for a reason; see the READMEs in editors/.
ASK = "crossfoot.allowWithReason"


async def answer(server: Server, params: types.CodeActionParams) -> list[types.CodeAction] | None:
    """Say what can be done at a place."""
    view = await server.view(params.text_document.uri)
    if view is None:
        return None
    return list(_Menu(server, view, params).actions())


async def resolve(server: Server, action: types.CodeAction) -> types.CodeAction:
    """Return an action with its edit, once it is chosen."""
    data: Any = action.data
    keys = ("uri", "claim", "identity", "reason")
    if not isinstance(data, dict) or not all(isinstance(data.get(key), str) for key in keys):
        return action
    view = await server.view(data["uri"])
    # A text that has changed since then may have another result under this number.
    if view is not None and view.part.version == data.get("version"):
        action.edit = allow(server, view, *(data[key] for key in keys[1:]))
    return action


class _Menu:
    """What can be done at one place of one text."""

    def __init__(self, server: Server, view: View, params: types.CodeActionParams) -> None:
        self._server = server
        self._view = view
        self._context = params.context
        start, end = params.range.start, params.range.end
        self._span = (view.part.offset(start), view.part.offset(end))

    def actions(self) -> Iterator[types.CodeAction]:
        """Yield the actions that the editor asked for, the likeliest first."""
        claims = claims_at(self._view.report, *self._span)
        if self._wants(QUICK_FIX):
            for placed in claims:
                yield from self._fixes(placed)
        if self._wants(COMPLETE):
            for placed in claims:
                yield from self._completions(placed)
        if self._wants(FIX_ALL):
            yield from self._all()

    def _wants(self, kind: str) -> bool:
        """Say whether a kind, or one above it, is asked for; for all that is not for saving."""
        if self._context.only is None:
            return kind != FIX_ALL
        return any(f"{kind}.".startswith(f"{_name(only)}.") for only in self._context.only)

    def _edit(self, changes: Sequence[Any]) -> types.WorkspaceEdit:
        return workspace_edit(self._view.snapshot, changes, self._server.client.versioned)

    def _fixes(self, placed: Placed) -> Iterator[types.CodeAction]:
        """Yield the remedies of what is found at this place, each once, then the allowances."""
        findings = [
            f for f in placed.audited.findings if f.settled is None and self._meets(placed, f)
        ]
        offered: set[tuple[object, ...]] = set()
        for finding in findings:
            for number, remedy in enumerate(finding.remedies):
                key = (remedy.reading, remedy.literal, remedy.also)
                changes = (
                    None if key in offered else mended(self._view.report.document, placed, remedy)
                )
                if changes is not None:
                    offered.add(key)
                    yield types.CodeAction(
                        _remedy_title(placed, remedy),
                        QUICK_FIX,
                        self._marks(finding),
                        is_preferred=True if number == 0 and len(findings) == 1 else None,
                        edit=self._edit(changes),
                    )
        for finding in findings:
            yield from self._allowances(placed, finding)

    def _meets(self, placed: Placed, finding: Finding) -> bool:
        """Say whether the place asked about meets a number that a finding speaks of."""
        indices = {finding.reading, *finding.related, *(r.reading for r in finding.remedies)}
        spans = [span_of(placed, index) for index in indices]
        start, end = self._span
        return any(span.start <= end and start <= span.end for span in spans) or start == end

    def _marks(self, finding: Finding) -> list[types.Diagnostic] | None:
        """Return the diagnostics of the editor that a fix is for."""
        found = [
            mark
            for mark in self._context.diagnostics
            if mark.source == SOURCE
            and mark.code == finding.identity
            and mark.message == finding.message
        ]
        return found or None

    def _allowances(self, placed: Placed, finding: Finding) -> Iterator[types.CodeAction]:
        client = self._server.client
        uri, version = self._view.part.uri, self._view.part.version
        if client.asks:
            arguments = [uri, placed.id, finding.identity, version]
            yield types.CodeAction(
                f"Allow {finding.identity} here, with a reason …",
                QUICK_FIX,
                self._marks(finding),
                command=types.Command("Allow with a reason", ASK, arguments=arguments),
            )
            return
        settings = self._view.snapshot.settings
        for reason in reasons(placed, finding, settings):
            action = types.CodeAction(
                f"Allow {finding.identity} here: {reason}",
                QUICK_FIX,
                self._marks(finding),
                data={
                    "uri": uri,
                    "claim": placed.id,
                    "identity": finding.identity,
                    "reason": reason,
                    "version": version,
                },
            )
            if not client.resolves:
                action.edit = allow(self._server, self._view, placed.id, finding.identity, reason)
                action.data = None
                if action.edit is None:
                    continue
            yield action

    def _completions(self, placed: Placed) -> Iterator[types.CodeAction]:
        for amendment in completions(self._view.report, placed):
            yield types.CodeAction(amendment.title, COMPLETE, edit=self._edit(amendment.changes))

    def _all(self) -> Iterator[types.CodeAction]:
        amendment = safe_rewrites(self._view.report)
        if amendment is not None:
            yield types.CodeAction(amendment.title, FIX_ALL, edit=self._edit(amendment.changes))


def _name(kind: types.CodeActionKind | str) -> str:
    return kind.value if isinstance(kind, types.CodeActionKind) else kind


def _remedy_title(placed: Placed, remedy: Remedy) -> str:
    readings = placed.audited.claim.readings
    words = []
    for index, literal in ((remedy.reading, remedy.literal), *remedy.also):
        old = readings[index]
        relation = "" if literal[:1] in tuple("=<>≤≥≈") else f"{old.relation} "
        words.append(f"{symbol(old.quantity)} {relation}{literal}")
    return f"Change to {' and '.join(words)} ({remedy.reason})"


def allow(
    server: Server, view: View, claim: str, identity: str, reason: str
) -> types.WorkspaceEdit | None:
    """Return the edit that allows a finding, or None where there is none such or no place."""
    for placed in view.report.claims:
        for finding in placed.audited.findings if placed.id == claim else ():
            if finding.identity == identity and finding.settled is None:
                change = allowance(view.report, placed, finding, reason, view.snapshot.settings)
                if change is not None:
                    return workspace_edit(view.snapshot, [change], server.client.versioned)
    return None
