"""A client that can misbehave: it writes bytes, and reads messages as plain JSON."""

from __future__ import annotations

import asyncio
import json
from collections.abc import AsyncIterator
from contextlib import asynccontextmanager
from typing import Any

from serving.editor import COMMAND, ENVIRONMENT, PATIENCE


class Wire:
    """The two ends of a server."""

    def __init__(self, process: asyncio.subprocess.Process) -> None:
        assert process.stdin is not None
        assert process.stdout is not None
        self.process = process
        self._out = process.stdin
        self._in = process.stdout
        self._number = 0

    async def raw(self, data: bytes) -> None:
        self._out.write(data)
        await self._out.drain()

    async def send(self, message: object) -> None:
        body = message if isinstance(message, bytes) else json.dumps(message).encode()
        await self.raw(b"Content-Length: %d\r\n\r\n%b" % (len(body), body))

    async def notify(self, method: str, params: object = None) -> None:
        await self.send({"jsonrpc": "2.0", "method": method, "params": params})

    async def request(self, method: str, params: object = None) -> int:
        self._number += 1
        message = {"jsonrpc": "2.0", "id": self._number, "method": method, "params": params}
        await self.send(message)
        return self._number

    async def receive(self) -> dict[str, Any]:
        async with asyncio.timeout(PATIENCE):
            length = 0
            while line := (await self._in.readline()).strip():
                name, _, value = line.partition(b":")
                if name.lower() == b"content-length":
                    length = int(value)
            message: dict[str, Any] = json.loads(await self._in.readexactly(length))
            return message

    async def ask(self, method: str, params: object = None) -> Any:
        """Return the answer to a request: its result, or its error."""
        number = await self.request(method, params)
        return await self.answer(number)

    async def answer(self, number: int | None) -> Any:
        """Return the next message, which must be the answer to a request."""
        message = await self.receive()
        assert message.get("id") == number, str(message)[:500]
        return message["result"] if "result" in message else message["error"]

    async def begin(self) -> None:
        """Initialise, as an editor that asks for diagnostics."""
        await self.ask(
            "initialize",
            {
                "processId": None,
                "rootUri": None,
                "capabilities": {
                    "textDocument": {
                        "diagnostic": {},
                        "publishDiagnostics": {"relatedInformation": True},
                    }
                },
            },
        )
        await self.notify("initialized", {})

    async def open(self, uri: str, text: str) -> None:
        item = {"uri": uri, "languageId": "markdown", "version": 1, "text": text}
        await self.notify("textDocument/didOpen", {"textDocument": item})

    async def marks(self, uri: str) -> list[Any]:
        result = await self.ask("textDocument/diagnostic", {"textDocument": {"uri": uri}})
        items: list[Any] = result["items"]
        return items

    async def works(self) -> None:
        """See that the server still does what it is for."""
        await self.open("file:///works.md", "So F(2, 57) = 4.31, p = .052.")
        assert [mark["code"] for mark in await self.marks("file:///works.md")] == ["p-from-f"]
        await self.notify("textDocument/didClose", {"textDocument": {"uri": "file:///works.md"}})

    async def end(self) -> int:
        """End the session, and return the server's exit status."""
        assert await self.ask("shutdown") is None
        await self.notify("exit")
        return await self.status()

    async def status(self) -> int:
        """Return the exit status of a server that has to end now."""
        async with asyncio.timeout(PATIENCE):
            return await self.process.wait()

    def close(self) -> None:
        """Close the server's input."""
        self._out.close()


@asynccontextmanager
async def wire() -> AsyncIterator[Wire]:
    """Start a server; end it, whatever state it is in, when the test is done."""
    process = await asyncio.create_subprocess_exec(
        *COMMAND,
        stdin=asyncio.subprocess.PIPE,
        stdout=asyncio.subprocess.PIPE,
        stderr=asyncio.subprocess.DEVNULL,
        env=ENVIRONMENT,
        limit=2**28,
    )
    try:
        yield Wire(process)
    finally:
        if process.returncode is None:
            process.kill()
        await process.wait()
        # The pipe's end is seen before the loop of the test ends, so that nothing is left open.
        assert process.stdout is not None
        await process.stdout.read()
