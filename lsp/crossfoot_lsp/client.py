"""What the editor at the other end can do, looked up once when it connects."""

from __future__ import annotations

from collections.abc import Mapping
from typing import Any, NamedTuple

from crossfoot_lsp.columns import ENCODINGS, UTF16


class Manner(NamedTuple):
    """How an editor shows a diagnostic.

    Attributes
    ----------
    related
        With the places that it refers to.
    linked
        With a link to what its code means.
    """

    related: bool = False
    linked: bool = False


class Client(NamedTuple):
    """An editor's abilities.

    Attributes
    ----------
    encoding
        What it counts columns in.
    pulls
        It asks for diagnostics, so that none are pushed.
    manner
        How it shows a diagnostic.
    markdown
        It shows Markdown in hovers; :attr:`documentation` the same of completions.
    hierarchy
        It shows symbols as a tree.
    versioned
        It takes edits that name the version they are for.
    resolves
        It asks for the edit of a code action once it is chosen.
    configuration
        It can be asked for its settings, and :attr:`announces` registers for their changes.
    watches
        It reports changes of files on request.
    progress
        It shows the progress of work that we begin.
    notebooks
        It sends notebooks as such.
    marked
        It shows what is found at a place together with a hover.
    asks
        It asks the person for the reason of an allowance itself.
    """

    encoding: str = UTF16
    pulls: bool = False
    manner: Manner = Manner()
    markdown: bool = False
    documentation: bool = False
    hierarchy: bool = False
    versioned: bool = False
    resolves: bool = False
    configuration: bool = False
    announces: bool = False
    watches: bool = False
    progress: bool = False
    notebooks: bool = False
    refreshes_diagnostics: bool = False
    refreshes_hints: bool = False
    refreshes_lenses: bool = False
    marked: bool = False
    asks: bool = False


def client_of(params: Mapping[str, Any]) -> Client:
    """Return the abilities that an editor declares in its first message.

    The message is looked at as it came: turning all that an editor may declare into the
    protocol's types takes longer than the rest of the start together.
    """
    given = params.get("capabilities")

    def value(path: str) -> Any:
        found: Any = given
        for name in path.split("."):
            found = found.get(name) if isinstance(found, Mapping) else None
        return found

    def lists(path: str, item: str) -> bool:
        found = value(path)
        return isinstance(found, list) and item in found

    def told(name: str) -> bool:
        options = params.get("initializationOptions")
        return isinstance(options, Mapping) and options.get(name) is True

    return Client(
        encoding=_encoding(value("general.positionEncodings")),
        pulls=isinstance(value("textDocument.diagnostic"), Mapping),
        manner=Manner(
            related=value("textDocument.publishDiagnostics.relatedInformation") is True,
            linked=value("textDocument.publishDiagnostics.codeDescriptionSupport") is True,
        ),
        markdown=lists("textDocument.hover.contentFormat", "markdown"),
        documentation=lists(
            "textDocument.completion.completionItem.documentationFormat", "markdown"
        ),
        hierarchy=value("textDocument.documentSymbol.hierarchicalDocumentSymbolSupport") is True,
        versioned=value("workspace.workspaceEdit.documentChanges") is True,
        resolves=lists("textDocument.codeAction.resolveSupport.properties", "edit"),
        configuration=value("workspace.configuration") is True,
        announces=value("workspace.didChangeConfiguration.dynamicRegistration") is True,
        watches=value("workspace.didChangeWatchedFiles.dynamicRegistration") is True,
        progress=value("window.workDoneProgress") is True,
        notebooks=isinstance(value("notebookDocument"), Mapping),
        refreshes_diagnostics=value("workspace.diagnostics.refreshSupport") is True,
        refreshes_hints=value("workspace.inlayHint.refreshSupport") is True,
        refreshes_lenses=value("workspace.codeLens.refreshSupport") is True,
        marked=told("marksInHover"),
        asks=told("askReason"),
    )


def _encoding(offered: Any) -> str:
    """Return the first encoding that an editor offers and we know; UTF-16 is always known."""
    known = [name for name in offered if name in ENCODINGS] if isinstance(offered, list) else []
    return known[0] if known else UTF16
