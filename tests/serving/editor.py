"""An editor for tests: pytest-lsp's client, made strict.

It fails on any message that does not have the shape the protocol gives it, on any that it has
not declared to understand, and on any that a test did not expect; and each of its own requests
must be answered.
"""

from __future__ import annotations

import asyncio
import itertools
import os
import sys
import tempfile
from collections.abc import AsyncIterator, Mapping, Sequence
from contextlib import asynccontextmanager
from pathlib import Path
from typing import Any

from lsprotocol import types
from pygls.protocol import default_converter
from pygls.uris import from_fs_path
from pytest_lsp import LanguageClient
from pytest_lsp.client import register_lsp_features
from pytest_lsp.protocol import LanguageClientProtocol

ROOT = Path(__file__).parents[2]
COMMAND = [sys.executable, "-m", "crossfoot", "serve"]
ENVIRONMENT = {
    **os.environ,
    "PYTHONPATH": os.pathsep.join(
        [str(ROOT / "statcheck_core"), str(ROOT / "lsp"), os.environ.get("PYTHONPATH", "")]
    ),
    "XDG_CACHE_HOME": str(Path(tempfile.gettempdir()) / "crossfoot-tests"),
}
#: Seconds within which anything must have happened.
PATIENCE = 120.0

_numbers = itertools.count(1)


class StrictProtocol(LanguageClientProtocol):
    """Checks each message against the types of the protocol, both ways."""

    _server: Editor  # type: ignore[assignment]  # the base class is written for any client

    def structure_message(self, data: Any) -> Any:
        if "jsonrpc" not in data:
            return data
        raw = _bare(data)
        message = super().structure_message(data)
        written = _bare(self._converter.unstructure(message))
        if written != raw:
            self._server.faults.append(f"not of the protocol's type: {raw} (read as {written})")
        if "method" not in data and data["id"] not in self._request_futures:
            self._server.faults.append(f"an answer that nobody waits for: {raw}")
        return message

    def _handle_request(self, msg_id: Any, method_name: str, params: Any) -> None:
        self._server.arrived(method_name, params)
        super()._handle_request(msg_id, method_name, params)

    def _handle_notification(self, method_name: str, params: Any) -> None:
        self._server.arrived(method_name, params)
        super()._handle_notification(method_name, params)


def _bare(value: Any) -> Any:
    """Return JSON without members that are null, which mean the same as none."""
    if isinstance(value, Mapping):
        return {key: _bare(inner) for key, inner in value.items() if inner is not None}
    if isinstance(value, (list, tuple)):
        return [_bare(inner) for inner in value]
    return value


def _converter() -> Any:
    """Return pygls's converter, which takes a code action with a command for that command."""
    converter = default_converter()

    def structure(data: Any, _: Any) -> Any:
        kind = types.Command if isinstance(data.get("command"), str) else types.CodeAction
        return converter.structure(data, kind)

    converter.register_structure_hook(types.Command | types.CodeAction, structure)
    return converter


class Editor(LanguageClient):
    """An editor with documents open."""

    def __init__(self, settings: Mapping[str, Any] | None = None) -> None:
        super().__init__(
            protocol_cls=StrictProtocol,
            converter_factory=_converter,
            configuration={"": {"crossfoot": dict(settings or {})}},
        )
        self.faults: list[str] = []
        self.waiting: list[tuple[str, Any]] = []
        self.published: dict[str, list[types.PublishDiagnosticsParams]] = {}
        self.edits: list[types.ApplyWorkspaceEditParams] = []
        self.registered: list[types.RegistrationParams] = []
        self.progressed: list[Any] = []
        self._news = asyncio.Event()

    # What comes from the server

    def arrived(self, method: str, params: Any) -> None:
        """Take note of a message; most must be taken by the test that caused it."""
        if method == types.TEXT_DOCUMENT_PUBLISH_DIAGNOSTICS:
            if self.capable.text_document and self.capable.text_document.diagnostic:
                self.faults.append("diagnostics were sent to an editor that asks for them")
            self.published.setdefault(params.uri, []).append(params)
        elif method == types.PROGRESS:
            self.progressed.append(params)
        elif method not in _ROUTINE:
            self.waiting.append((method, params))
        self._news.set()

    @property
    def capable(self) -> types.ClientCapabilities:
        return self.capabilities or types.ClientCapabilities()

    async def take(self, method: str) -> Any:
        """Return the parameters of the next message of a kind, which has to come."""
        async with asyncio.timeout(PATIENCE):
            while True:
                for number, (name, params) in enumerate(self.waiting):
                    if name == method:
                        del self.waiting[number]
                        return params
                self._news.clear()
                await self._news.wait()

    async def shown(self, uri: str, version: int) -> Sequence[types.Diagnostic]:
        """Return the diagnostics sent for a version of a text, which have to come."""
        async with asyncio.timeout(PATIENCE):
            while True:
                for params in self.published.get(uri, ()):
                    if params.version == version:
                        return params.diagnostics
                self._news.clear()
                await self._news.wait()

    async def until(self, condition: Any) -> None:
        """Wait for something to become true of what has arrived."""
        async with asyncio.timeout(PATIENCE):
            while not condition():
                self._news.clear()
                await self._news.wait()

    # What it does with documents

    def open(self, text: str, name: str = "", language: str = "markdown", folder: str = "") -> str:
        """Open a text and return its URI; each is a document of its own."""
        folder = folder or f"/nowhere/{next(_numbers)}"
        uri = from_fs_path(f"{folder}/{name or 'draft.md'}")
        assert uri is not None
        item = types.TextDocumentItem(uri, language, 1, text)
        self.text_document_did_open(types.DidOpenTextDocumentParams(item))
        return uri

    def edit(self, uri: str, version: int, *changes: tuple[types.Range, str] | str) -> None:
        """Edit a text: ranges with what stands there now, or the whole text."""
        events: list[types.TextDocumentContentChangeEvent] = [
            types.TextDocumentContentChangeWholeDocument(change)
            if isinstance(change, str)
            else types.TextDocumentContentChangePartial(change[0], change[1])
            for change in changes
        ]
        document = types.VersionedTextDocumentIdentifier(version, uri)
        self.text_document_did_change(types.DidChangeTextDocumentParams(document, events))

    def shut(self, uri: str) -> None:
        """Close a text."""
        document = types.TextDocumentIdentifier(uri)
        self.text_document_did_close(types.DidCloseTextDocumentParams(document))

    async def diagnostics_of(self, uri: str, told: str | None = None) -> Any:
        """Ask for the diagnostics of a text."""
        document = types.TextDocumentIdentifier(uri)
        params = types.DocumentDiagnosticParams(document, "crossfoot", told)
        return await self.text_document_diagnostic_async(params)

    # Its end

    async def finish(self) -> None:
        """End the session as the protocol wants it, and see that nothing is left over."""
        async with asyncio.timeout(PATIENCE):
            await self.shutdown_session()
            await self.stop()
        left = [key for key, future in self.protocol._request_futures.items() if not future.done()]
        assert not left, f"requests without an answer: {left}"
        assert self.faults == []
        assert self.waiting == []
        assert self._server is not None
        assert self._server.returncode == 0


#: Messages that any session has, each checked by pytest-lsp against what the editor can do.
_ROUTINE = frozenset(
    {
        types.CLIENT_REGISTER_CAPABILITY,
        types.WORKSPACE_CONFIGURATION,
        types.WORKSPACE_DIAGNOSTIC_REFRESH,
        types.WORKSPACE_INLAY_HINT_REFRESH,
        types.WORKSPACE_CODE_LENS_REFRESH,
        types.WINDOW_WORK_DONE_PROGRESS_CREATE,
    }
)


def _register(editor: Editor) -> None:
    register_lsp_features(editor)

    @editor.feature(types.CLIENT_REGISTER_CAPABILITY)
    def register(params: types.RegistrationParams) -> None:
        editor.registered.append(params)

    @editor.feature(types.WORKSPACE_INLAY_HINT_REFRESH)
    def refresh_hints(params: Any) -> None:
        return None

    @editor.feature(types.WORKSPACE_CODE_LENS_REFRESH)
    def refresh_lenses(params: Any) -> None:
        return None

    @editor.feature(types.WORKSPACE_APPLY_EDIT)
    def apply(params: types.ApplyWorkspaceEditParams) -> types.ApplyWorkspaceEditResult:
        editor.edits.append(params)
        return types.ApplyWorkspaceEditResult(applied=True)


def pulling(encoding: str = "utf-16", **changes: Any) -> types.ClientCapabilities:
    """Return what a modern editor can do: it asks for diagnostics, shows Markdown and trees."""
    markdown = [types.MarkupKind.Markdown]
    return types.ClientCapabilities(
        general=types.GeneralClientCapabilities(
            position_encodings=[types.PositionEncodingKind(encoding)]
        ),
        notebook_document=types.NotebookDocumentClientCapabilities(
            types.NotebookDocumentSyncClientCapabilities()
        ),
        window=types.WindowClientCapabilities(work_done_progress=True),
        workspace=types.WorkspaceClientCapabilities(
            apply_edit=True,
            configuration=True,
            workspace_folders=True,
            workspace_edit=types.WorkspaceEditClientCapabilities(document_changes=True),
            diagnostics=types.DiagnosticWorkspaceClientCapabilities(refresh_support=True),
            inlay_hint=types.InlayHintWorkspaceClientCapabilities(refresh_support=True),
            code_lens=types.CodeLensWorkspaceClientCapabilities(refresh_support=True),
            did_change_configuration=types.DidChangeConfigurationClientCapabilities(True),
        ),
        text_document=types.TextDocumentClientCapabilities(
            diagnostic=types.DiagnosticClientCapabilities(),
            publish_diagnostics=types.PublishDiagnosticsClientCapabilities(
                related_information=True, version_support=True, code_description_support=True
            ),
            hover=types.HoverClientCapabilities(content_format=markdown),
            document_symbol=types.DocumentSymbolClientCapabilities(
                hierarchical_document_symbol_support=True
            ),
            code_action=types.CodeActionClientCapabilities(
                code_action_literal_support=types.ClientCodeActionLiteralOptions(
                    types.ClientCodeActionKindOptions(["quickfix", "refactor", "source"])
                ),
                is_preferred_support=True,
                data_support=True,
                resolve_support=types.ClientCodeActionResolveOptions(["edit"]),
            ),
            completion=types.CompletionClientCapabilities(
                completion_item=types.ClientCompletionItemOptions(
                    documentation_format=markdown, preselect_support=True
                )
            ),
            inlay_hint=types.InlayHintClientCapabilities(),
            **changes,
        ),
    )


def pushing() -> types.ClientCapabilities:
    """Return what a simple editor can do: it is sent diagnostics and shows plain text."""
    return types.ClientCapabilities(
        text_document=types.TextDocumentClientCapabilities(
            publish_diagnostics=types.PublishDiagnosticsClientCapabilities(version_support=True),
            completion=types.CompletionClientCapabilities(
                completion_item=types.ClientCompletionItemOptions(preselect_support=True)
            ),
        )
    )


@asynccontextmanager
async def session(
    capabilities: types.ClientCapabilities | None = None,
    *,
    folders: Sequence[Path] = (),
    settings: Mapping[str, Any] | None = None,
    options: Any = None,
    environment: Mapping[str, str] | None = None,
) -> AsyncIterator[Editor]:
    """Run a server and an editor that talks to it, from the first message to the last."""
    editor = Editor(settings)
    _register(editor)
    await editor.start_io(*COMMAND, env={**ENVIRONMENT, **(environment or {})})
    workspace = [
        types.WorkspaceFolder(from_fs_path(str(folder)) or "", folder.name) for folder in folders
    ]
    async with asyncio.timeout(PATIENCE):
        await editor.initialize_session(
            types.InitializeParams(
                capabilities or pulling(),
                workspace_folders=workspace or None,
                initialization_options=options,
            )
        )
    try:
        yield editor
    except BaseException:
        if editor._server is not None and editor._server.returncode is None:
            editor._server.kill()
        raise
    await editor.finish()


def ranges(text: str) -> tuple[str, list[types.Range]]:
    """Take the marks ‹ and › out of a text, and return the ranges between them."""
    plain: list[str] = []
    found: list[types.Range] = []
    begun: list[types.Position] = []
    line = column = 0
    for character in text:
        if character == "‹":
            begun.append(types.Position(line, column))
        elif character == "›":
            found.append(types.Range(begun.pop(), types.Position(line, column)))
        else:
            plain.append(character)
            column += len(character.encode("utf-16-le")) // 2
            if character == "\n":
                line, column = line + 1, 0
    return "".join(plain), found


def at(range_: types.Range, uri: str) -> dict[str, Any]:
    """Return the document and the position of a request about a range."""
    return {"text_document": types.TextDocumentIdentifier(uri), "position": range_.start}


def applied(text: str, edits: Sequence[types.TextEdit]) -> str:
    """Apply edits to a text with plain columns, as an editor does."""
    lines = text.split("\n")
    starts = [0, *itertools.accumulate(len(line) + 1 for line in lines)]

    def offset(position: types.Position) -> int:
        return starts[position.line] + position.character

    for edit in sorted(edits, key=lambda e: offset(e.range.start), reverse=True):
        text = text[: offset(edit.range.start)] + edit.new_text + text[offset(edit.range.end) :]
    return text
