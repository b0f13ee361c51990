"""The server: one object that the features share, and its life from start to end."""

from __future__ import annotations

import asyncio
import json
import logging
import os
import sys
from collections.abc import Callable, Coroutine, Mapping
from concurrent.futures import ThreadPoolExecutor
from functools import cached_property
from typing import TYPE_CHECKING, Any

from lsprotocol import types
from pygls.lsp.server import LanguageServer

from crossfoot.version import __version__
from crossfoot_lsp.client import Client
from crossfoot_lsp.features import register
from crossfoot_lsp.names import path_of
from crossfoot_lsp.protocol import Protocol
from crossfoot_lsp.raw import NOTHING, Raw
from crossfoot_lsp.transport import Listener, Sender

if TYPE_CHECKING:
    from crossfoot_lsp.configuration import Configuration
    from crossfoot_lsp.features.diagnostics import Told
    from crossfoot_lsp.features.workspace_diagnostics import Workspace
    from crossfoot_lsp.marks import Marker
    from crossfoot_lsp.store import Store, View

#: Seconds between looks at whether the editor that started the server is still there.
_WATCH = 5.0

#: Seconds after which a thread that computes lets another one in.
_SWITCH = 0.001


class Server(LanguageServer):
    """The language server.

    Attributes
    ----------
    client
        What the editor can do.
    folders
        Paths of the folders that the editor works in, by their URIs.
    workers
        Threads that read documents.
    sent
        Names of the texts for which diagnostics were sent.
    """

    protocol: Protocol

    def __init__(self) -> None:
        self.client = Client()
        self.folders: dict[str, str] = {}
        self.workers = ThreadPoolExecutor(2, "crossfoot")
        self.sent: set[str] = set()
        self._options: object = None
        self._listeners: list[Callable[[str], object]] = []
        self._tasks: set[asyncio.Task[None]] = set()
        self._finished: asyncio.Future[int] | None = None
        self._loop: asyncio.AbstractEventLoop | None = None
        super().__init__(
            "crossfoot", __version__, protocol_cls=Protocol, converter_factory=_no_converter
        )

    # What features share; each is made when it is first needed

    @cached_property
    def configuration(self) -> Configuration:
        """What is set."""
        from crossfoot_lsp.configuration import Configuration

        configuration = Configuration(self.tell)
        configuration.choose(self._options)
        return configuration

    @cached_property
    def store(self) -> Store:
        """What lies open."""
        from crossfoot_lsp.features import diagnostics
        from crossfoot_lsp.store import Store

        store = Store(self.workers, self.configuration, self.client.encoding, self._changed)
        diagnostics.start(self)
        return store

    @cached_property
    def marker(self) -> Marker:
        """What writes diagnostics."""
        from crossfoot_lsp.marks import Marker

        return Marker(self.protocol._converter)

    @cached_property
    def told(self) -> Told:
        """What an editor that asks was told last."""
        from crossfoot_lsp.features.diagnostics import Told

        return Told(self)

    @cached_property
    def workspace_files(self) -> Workspace:
        """The files that are not open."""
        from crossfoot_lsp.features.workspace_diagnostics import Workspace

        return Workspace(self)

    async def view(self, uri: str) -> View | None:
        """Return an open text with the report on its newest version."""
        return await self.store.view(uri)

    def tell(self, sentence: str) -> None:
        """Show a person something that is to be put right."""
        params = types.ShowMessageParams(types.MessageType.Warning, sentence)
        self._soon(self.window_show_message, params)

    def send_diagnostics(self, uri: str, marks: Raw, version: int | None) -> None:
        """Send the diagnostics of a text to an editor that does not ask for them."""
        if marks == NOTHING and uri not in self.sent:
            return  # nothing to show, and nothing to take back
        (self.sent.discard if marks == NOTHING else self.sent.add)(uri)
        about = f'"version":{version},' if version is not None else ""
        params = Raw(f'{{"uri":{json.dumps(uri)},{about}"diagnostics":{marks}}}')
        self.protocol.notify_raw(types.TEXT_DOCUMENT_PUBLISH_DIAGNOSTICS, params)

    def on_change(self, listener: Callable[[str], object]) -> None:
        """Have something called with the name of each text that changed."""
        self._listeners.append(listener)

    def begin(self, work: Coroutine[Any, Any, None]) -> asyncio.Task[None]:
        """Do something beside what the editor waits for."""
        task = asyncio.get_running_loop().create_task(work)
        self._tasks.add(task)
        task.add_done_callback(self._done)
        return task

    def _done(self, task: asyncio.Task[None]) -> None:
        self._tasks.discard(task)
        if not task.cancelled() and task.exception() is not None:
            _LOG.error("Work in the background failed", exc_info=task.exception())

    def _changed(self, uri: str) -> None:
        for listener in self._listeners:
            listener(uri)

    def report_server_error(self, error: Exception, source: Any) -> None:
        """Write a fault of ours to the log; there is nothing that a person could do about it."""
        _LOG.error("A message could not be handled: %s", error, exc_info=error)

    # Life

    def meet(self, client: Client, params: Mapping[str, Any]) -> None:
        """Take in an editor's first message."""
        self.client = client
        process = params.get("processId")
        self.process_id = process if isinstance(process, int) else None
        folders = params.get("workspaceFolders") or [{"uri": params.get("rootUri")}]
        for folder in folders if isinstance(folders, list) else ():
            uri = folder.get("uri") if isinstance(folder, dict) else None
            if isinstance(uri, str):
                self.folders[uri] = path_of(uri) or ""
        options = params.get("initializationOptions")
        if isinstance(options, dict):
            # Some editors send our section of their settings by its name.
            self._options = options.get("settings", options.get("crossfoot"))
        register(self)

    def run(self, source: int, target: int) -> int:
        """Serve on two file descriptors until the editor is done; return the exit status."""
        sys.setswitchinterval(_SWITCH)
        try:
            return asyncio.run(self._serve(source, target))
        finally:
            if "store" in self.__dict__:
                self.store.give_up()
            self.workers.shutdown(wait=False, cancel_futures=True)

    async def _serve(self, source: int, target: int) -> int:
        self._loop = asyncio.get_running_loop()
        self._finished = self._loop.create_future()
        sender = Sender(target, lambda: self._soon(self.finish, 1))
        self.protocol.set_writer(sender)
        Listener(source, lambda body: self._soon(self._take, body)).start()
        self.begin(self._watch())
        status = await self._finished
        sender.close()
        return status

    def _take(self, body: bytes | None) -> None:
        if body is None:
            self.finish(1)
        else:
            self.protocol.receive(body)

    def _soon(self, function: Callable[..., object], *arguments: object) -> None:
        """Have something done on the main loop, from whatever thread."""
        if self._loop is not None and not self._loop.is_closed():
            self._loop.call_soon_threadsafe(function, *arguments)

    def finish(self, status: int) -> None:
        """End with a status."""
        if self._finished is not None and not self._finished.done():
            self._finished.set_result(status)

    async def _watch(self) -> None:
        """End when the editor has died without closing our input."""
        while True:
            await asyncio.sleep(_WATCH)
            if self.process_id is not None and not _alive(self.process_id):
                self.finish(1)


def _no_converter() -> Any:
    """Return none: the protocol makes one when it first needs it."""
    return None


def _alive(process: int) -> bool:
    if os.name == "nt":  # there a signal of 0 would end the process
        return True
    try:
        os.kill(process, 0)
    except ProcessLookupError:
        return False
    except (OSError, OverflowError):
        return True
    return True


_LOG = logging.getLogger("crossfoot_lsp")
