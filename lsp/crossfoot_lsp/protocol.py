"""The protocol's own matters: what is well formed, what may be asked when, who gets an answer.

pygls's protocol does the bookkeeping. What is changed here: texts are kept by
:mod:`crossfoot_lsp.store`; every request is answered once, a malformed one too; the first message
is answered without the protocol's types, for speed; and nothing that goes wrong is shown to a
person who can't help it.
"""

from __future__ import annotations

import json
import logging
from collections.abc import Generator
from concurrent.futures import Future
from contextvars import copy_context
from typing import TYPE_CHECKING, Any

from lsprotocol import types
from pygls.exceptions import (
    JsonRpcException,
    JsonRpcInvalidParams,
    JsonRpcInvalidRequest,
    JsonRpcMethodNotFound,
    JsonRpcParseError,
    JsonRpcServerNotInitialized,
)
from pygls.protocol import LanguageServerProtocol, default_converter, lsp_method

from crossfoot_lsp.capabilities import capabilities
from crossfoot_lsp.client import client_of
from crossfoot_lsp.names import path_of
from crossfoot_lsp.raw import Raw

if TYPE_CHECKING:
    from crossfoot_lsp.server import Server

_LOG = logging.getLogger("crossfoot_lsp")


class Protocol(LanguageServerProtocol):
    """The protocol of :class:`crossfoot_lsp.server.Server`."""

    _server: Server

    def __init__(self, server: Server, converter: Any) -> None:
        self._started = False
        self._made: Any = None
        super().__init__(server, converter)

    def _register_builtin_features(self) -> None:
        """Find the methods that answer messages, without looking at any property."""
        for name in dir(type(self)):
            method = getattr(getattr(type(self), name), "method_name", None)
            if method is not None:
                self.fm.add_builtin_feature(method, getattr(self, name))

    # What comes in

    def receive(self, body: bytes) -> None:
        """Take one message; whatever is wrong with it is answered."""
        try:
            data = json.loads(body)
        except (ValueError, RecursionError):
            self._refuse(None, JsonRpcParseError("The message is not JSON."))
            return
        if not isinstance(data, dict) or data.get("jsonrpc") != self.VERSION:
            id_ = data.get("id") if isinstance(data, dict) else None
            self._refuse(id_, JsonRpcInvalidRequest("The message is not of JSON-RPC 2.0."))
        elif "method" in data:
            self._take(data)
        elif "id" in data:
            self._take_answer(data)

    def _take(self, data: dict[str, Any]) -> None:
        """Take a request or a notification."""
        method, id_ = data["method"], data.get("id")
        objection = self._objection(method)
        if objection is not None:
            if id_ is not None:
                self._refuse(id_, objection)
            return
        if method == types.INITIALIZE:
            self._initialize(id_, data.get("params"))
            return
        try:
            message = self.structure_message(data)
        except JsonRpcException:
            if id_ is not None:
                self._refuse(id_, JsonRpcInvalidParams(f"The parameters of {method} are wrong."))
            else:
                _LOG.warning("A notification with wrong parameters was passed over: %s", method)
            return
        # What pygls would find out about the message first, slowly, is known here.
        context = copy_context()
        if "id" in data:
            context.run(self._handle_request, message.id, method, message.params)
        else:
            context.run(self._handle_notification, method, getattr(message, "params", None))

    def _objection(self, method: object) -> JsonRpcException | None:
        """Return what is wrong with a message of this kind, at this time or at all."""
        if not isinstance(method, str):
            return JsonRpcInvalidRequest("The method is no string.")
        if method == types.EXIT:
            return None
        if self._shutdown:
            return JsonRpcInvalidRequest("The server is shutting down.")
        if not self._started and method != types.INITIALIZE:
            return JsonRpcServerNotInitialized("The server is not initialised.")
        if self._started and method == types.INITIALIZE:
            return JsonRpcInvalidRequest("The server is initialised already.")
        if method not in self.fm.features and method not in self.fm.builtin_features:
            return None if method == types.CANCEL_REQUEST else JsonRpcMethodNotFound.of(method)
        return None

    def _initialize(self, id_: Any, params: Any) -> None:
        """Answer the first message."""
        if not isinstance(params, dict) or not isinstance(params.get("capabilities"), dict):
            self._refuse(id_, JsonRpcInvalidParams("The capabilities are missing."))
            return
        client = client_of(params)
        self._server.meet(client, params)
        self._started = True
        self._send_response(id_, Raw(json.dumps(capabilities(client))))

    def _take_answer(self, data: dict[str, Any]) -> None:
        """Take the answer to a request of ours."""
        id_ = data["id"]
        if not isinstance(id_, (str, int)) or id_ not in self._request_futures:
            return
        try:
            self.handle_message(self.structure_message(data))
        except JsonRpcException as error:
            waiting = self._request_futures.pop(id_, None)
            if isinstance(waiting, Future) and not waiting.done():
                waiting.set_exception(error)

    def _refuse(self, id_: Any, error: JsonRpcException) -> None:
        known = isinstance(id_, (str, int)) and not isinstance(id_, bool)
        self._send_response(id_ if known else None, error=error.to_response_error())

    # What goes out

    @property
    def _converter(self) -> Any:
        """What turns JSON into the protocol's types and back; made when it is first needed."""
        if self._made is None:
            self._made = default_converter()  # type: ignore[no-untyped-call]  # pygls leaves it so
        return self._made

    @_converter.setter
    def _converter(self, converter: Any) -> None:
        self._made = converter

    def _send_data(self, data: Any) -> None:
        """Send a message."""
        self._write(json.dumps(data, default=self._serialize_message, separators=(",", ":")))

    def _send_response(self, msg_id: Any, result: Any = None, error: Any = None) -> None:
        """Send an answer; one that is JSON already as it is."""
        if error is None and isinstance(result, Raw):
            self._write(f'{{"jsonrpc":"2.0","id":{json.dumps(msg_id)},"result":{result}}}')
        else:
            super()._send_response(msg_id, result, error)

    def notify_raw(self, method: str, params: Raw) -> None:
        """Send a notification whose parameters are JSON already."""
        self._write(f'{{"jsonrpc":"2.0","method":"{method}","params":{params}}}')

    def _write(self, message: str) -> None:
        if self.writer is not None:
            body = message.encode("ascii")
            self.writer.write(b"Content-Length: %d\r\n\r\n%b" % (len(body), body))

    # Texts, notebooks and folders are kept elsewhere; these take the place of pygls's own

    @lsp_method(types.TEXT_DOCUMENT_DID_OPEN)
    def lsp_text_document__did_open(self, params: types.DidOpenTextDocumentParams) -> None:
        """Take a document in."""
        self._server.store.open(params.text_document)

    @lsp_method(types.TEXT_DOCUMENT_DID_CHANGE)
    def lsp_text_document__did_change(self, params: types.DidChangeTextDocumentParams) -> None:
        """Take an edit in."""
        self._server.store.change(params.text_document, params.content_changes)

    @lsp_method(types.TEXT_DOCUMENT_DID_CLOSE)
    def lsp_text_document__did_close(self, params: types.DidCloseTextDocumentParams) -> None:
        """Forget a document."""
        self._server.store.close(params.text_document.uri)

    @lsp_method(types.NOTEBOOK_DOCUMENT_DID_OPEN)
    def lsp_notebook_document__did_open(self, params: types.DidOpenNotebookDocumentParams) -> None:
        """Take a notebook in."""
        self._server.store.open_notebook(params.notebook_document, params.cell_text_documents)

    @lsp_method(types.NOTEBOOK_DOCUMENT_DID_CHANGE)
    def lsp_notebook_document__did_change(
        self, params: types.DidChangeNotebookDocumentParams
    ) -> None:
        """Take a change of a notebook in."""
        self._server.store.change_notebook(params.notebook_document, params.change)

    @lsp_method(types.NOTEBOOK_DOCUMENT_DID_CLOSE)
    def lsp_notebook_document__did_close(
        self, params: types.DidCloseNotebookDocumentParams
    ) -> None:
        """Forget a notebook."""
        self._server.store.close_notebook(params.notebook_document.uri)

    @lsp_method(types.WORKSPACE_DID_CHANGE_WORKSPACE_FOLDERS)
    def lsp_workspace__did_change_workspace_folders(
        self, params: types.DidChangeWorkspaceFoldersParams
    ) -> Generator[Any, Any, None]:
        """Take note of other folders, and of what is set for them."""
        from crossfoot_lsp.features.lifecycle import read_settings

        for removed in params.event.removed:
            self._server.folders.pop(removed.uri, None)
        for added in params.event.added:
            self._server.folders[added.uri] = path_of(added.uri) or ""
        yield read_settings, (self._server,), None

    @lsp_method(types.WORKSPACE_EXECUTE_COMMAND)
    def lsp_workspace__execute_command(
        self, params: types.ExecuteCommandParams
    ) -> Generator[Any, Any, Any]:
        """Carry out a command."""
        from crossfoot_lsp.features.commands import FUNCTIONS

        function = FUNCTIONS.get(params.command)
        if function is None:
            raise JsonRpcInvalidParams(f"There is no command {params.command!r}.")
        result = yield function, (self._server, tuple(params.arguments or ())), None
        return result

    @lsp_method(types.EXIT)
    def lsp_exit(self, *args: Any) -> Generator[Any, Any, None]:
        """End; the status is 0 only after a shutdown."""
        self._server.finish(0 if self._shutdown else 1)
        yield from ()
