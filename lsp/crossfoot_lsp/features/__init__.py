"""The features, one a module, each imported when it is first needed.

An editor waits for the answer to its first message before it shows anything; so nothing is
imported for that but what the answer itself needs.
"""

from __future__ import annotations

from collections.abc import Callable
from importlib import import_module
from inspect import isawaitable
from typing import TYPE_CHECKING, Any, NamedTuple

from lsprotocol import types

if TYPE_CHECKING:
    from crossfoot_lsp.server import Server


class Feature(NamedTuple):
    """What answers a message.

    Attributes
    ----------
    method
        The message.
    module, function
        A function of a module beside this one: it takes the server and the parameters.
    pulled
        Whether only an editor that asks for diagnostics sends it.
    """

    method: str
    module: str
    function: str = "answer"
    pulled: bool = False


FEATURES = (
    Feature(types.INITIALIZED, "lifecycle", "initialized"),
    Feature(types.WORKSPACE_DID_CHANGE_CONFIGURATION, "lifecycle", "settings_changed"),
    Feature(types.TEXT_DOCUMENT_DIAGNOSTIC, "diagnostics", pulled=True),
    Feature(types.WORKSPACE_DIAGNOSTIC, "workspace_diagnostics", pulled=True),
    Feature(types.TEXT_DOCUMENT_HOVER, "hover"),
    Feature(types.TEXT_DOCUMENT_CODE_ACTION, "code_actions"),
    Feature(types.CODE_ACTION_RESOLVE, "code_actions", "resolve"),
    Feature(types.TEXT_DOCUMENT_COMPLETION, "completion"),
    Feature(types.TEXT_DOCUMENT_INLAY_HINT, "inlay_hints"),
    Feature(types.TEXT_DOCUMENT_DOCUMENT_SYMBOL, "symbols"),
    Feature(types.WORKSPACE_SYMBOL, "workspace_symbols"),
    Feature(types.TEXT_DOCUMENT_DOCUMENT_HIGHLIGHT, "highlight"),
    Feature(types.TEXT_DOCUMENT_REFERENCES, "mentions", "references"),
    Feature(types.TEXT_DOCUMENT_DEFINITION, "mentions", "definition"),
    Feature(types.TEXT_DOCUMENT_CODE_LENS, "code_lens"),
    Feature(types.TEXT_DOCUMENT_DID_SAVE, "files", "saved"),
    Feature(types.WORKSPACE_DID_CHANGE_WATCHED_FILES, "files", "changed"),
    Feature(types.WORKSPACE_DID_CREATE_FILES, "files", "created"),
    Feature(types.WORKSPACE_DID_RENAME_FILES, "files", "renamed"),
    Feature(types.WORKSPACE_DID_DELETE_FILES, "files", "deleted"),
)


def register(server: Server) -> None:
    """Register the features that an editor can use."""
    for feature in FEATURES:
        if server.client.pulls or not feature.pulled:
            server.feature(feature.method)(_handler(server, feature))


def _handler(server: Server, feature: Feature) -> Callable[[Any], Any]:
    async def handle(params: Any) -> Any:
        result = function_of(feature)(server, params)
        return await result if isawaitable(result) else result

    return handle


def function_of(feature: Feature) -> Callable[[Server, Any], Any]:
    """Return the function of a feature."""
    function: Callable[[Server, Any], Any] = getattr(
        import_module(f"{__name__}.{feature.module}"), feature.function
    )
    return function


def warm() -> None:
    """Import what the first document and the first request would wait for."""
    for feature in FEATURES:
        function_of(feature)
    from crossfoot import scan  # noqa: F401 – the import is the point
    from crossfoot.laws import warm as warm_laws

    warm_laws()
