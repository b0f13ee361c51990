"""Clients that misbehave: each request is answered or the server ends, and no later one suffers."""

from __future__ import annotations

import asyncio
import os
import signal
import sys
from collections.abc import AsyncIterator

import pytest
import pytest_asyncio

from serving.editor import COMMAND, ENVIRONMENT
from serving.wire import Wire, wire

pytestmark = pytest.mark.asyncio(loop_scope="session")

PARSE, REQUEST, METHOD, PARAMS, UNREADY = -32700, -32600, -32601, -32602, -32002


@pytest_asyncio.fixture(loop_scope="session", scope="module")
async def server() -> AsyncIterator[Wire]:
    async with wire() as found:
        await found.begin()
        yield found
        assert await found.end() == 0


@pytest.mark.parametrize(
    ("message", "code"),
    [
        (b"", PARSE),
        (b"{", PARSE),
        (b"\xff\xfe", PARSE),
        (b"[" * 100_000, PARSE),
        (b"[]", REQUEST),
        (b"null", REQUEST),
        (b'"text"', REQUEST),
        (b"{}", REQUEST),
        ({"id": 7, "method": "shutdown"}, REQUEST),
        ({"jsonrpc": "1.0", "id": 7, "method": "shutdown"}, REQUEST),
        ({"jsonrpc": "2.0", "id": 7, "method": 8}, REQUEST),
        ({"jsonrpc": "2.0", "id": 7, "method": "no/such"}, METHOD),
        ({"jsonrpc": "2.0", "id": "x", "method": "textDocument/hover"}, PARAMS),
        ({"jsonrpc": "2.0", "id": 7, "method": "textDocument/hover", "params": []}, PARAMS),
        ({"jsonrpc": "2.0", "id": 7, "method": "textDocument/hover", "params": {"a": 1}}, PARAMS),
        (
            {"jsonrpc": "2.0", "id": 7, "method": "initialize", "params": {"capabilities": {}}},
            REQUEST,
        ),
        (
            {
                "jsonrpc": "2.0",
                "id": 7,
                "method": "workspace/executeCommand",
                "params": {"command": "no"},
            },
            PARAMS,
        ),
    ],
)
async def test_a_malformed_request_is_answered_with_an_error(
    server: Wire, message: object, code: int
) -> None:
    await server.send(message)
    answer = await server.receive()
    assert answer["error"]["code"] == code
    given = message.get("id") if isinstance(message, dict) else None
    assert answer.get("id") == given
    await server.works()


@pytest.mark.parametrize(
    "message",
    [
        {"jsonrpc": "2.0", "method": "no/such"},
        {"jsonrpc": "2.0", "method": "$/no/such", "params": {"x": [1]}},
        {"jsonrpc": "2.0", "method": "textDocument/didOpen"},
        {
            "jsonrpc": "2.0",
            "method": "textDocument/didOpen",
            "params": {"textDocument": {"uri": 4}},
        },
        {
            "jsonrpc": "2.0",
            "method": "textDocument/didChange",
            "params": {
                "textDocument": {"uri": "file:///a", "version": 2},
                "contentChanges": [{"range": 3}],
            },
        },
        {
            "jsonrpc": "2.0",
            "method": "textDocument/didChange",
            "params": {
                "textDocument": {"uri": "file:///unknown", "version": 2},
                "contentChanges": [{"text": "x"}],
            },
        },
        {
            "jsonrpc": "2.0",
            "method": "textDocument/didClose",
            "params": {"textDocument": {"uri": "file:///unknown"}},
        },
        {
            "jsonrpc": "2.0",
            "method": "textDocument/didSave",
            "params": {"textDocument": {"uri": "file:///unknown"}},
        },
        {"jsonrpc": "2.0", "method": "$/cancelRequest", "params": {"id": 12345}},
        {"jsonrpc": "2.0", "method": "$/cancelRequest", "params": {}},
        {"jsonrpc": "2.0", "method": "window/workDoneProgress/cancel", "params": {"token": "none"}},
        {"jsonrpc": "2.0", "method": "workspace/didChangeConfiguration", "params": {"settings": 5}},
        {
            "jsonrpc": "2.0",
            "method": "workspace/didChangeWatchedFiles",
            "params": {"changes": [{"uri": "%%%", "type": 1}]},
        },
        {"jsonrpc": "2.0", "id": "never asked", "result": 3},
        {"jsonrpc": "2.0", "id": "never asked", "error": {"code": 1, "message": "x"}},
        {"jsonrpc": "2.0", "id": [], "result": 3},
    ],
)
async def test_a_malformed_notification_is_passed_over(server: Wire, message: object) -> None:
    await server.send(message)
    await server.works()


DOCUMENT = {"textDocument": {"uri": "file:///not/open.md"}}
PLACE = {**DOCUMENT, "position": {"line": 0, "character": 0}}
RANGE = {"start": {"line": 0, "character": 0}, "end": {"line": 0, "character": 0}}


@pytest.mark.parametrize(
    ("method", "params"),
    [
        ("textDocument/hover", PLACE),
        ("textDocument/completion", PLACE),
        ("textDocument/definition", PLACE),
        ("textDocument/references", {**PLACE, "context": {"includeDeclaration": True}}),
        ("textDocument/documentHighlight", PLACE),
        ("textDocument/documentSymbol", DOCUMENT),
        ("textDocument/codeLens", DOCUMENT),
        ("textDocument/codeAction", {**DOCUMENT, "range": RANGE, "context": {"diagnostics": []}}),
        ("textDocument/inlayHint", {**DOCUMENT, "range": RANGE}),
        ("codeAction/resolve", {"title": "x", "data": {"uri": "file:///not/open.md"}}),
        ("codeAction/resolve", {"title": "x", "data": [1]}),
        ("workspace/symbol", {"query": "x"}),
        ("workspace/diagnostic", {"previousResultIds": []}),
        ("workspace/executeCommand", {"command": "crossfoot.summary"}),
        ("workspace/executeCommand", {"command": "crossfoot.summary", "arguments": [4]}),
        ("workspace/executeCommand", {"command": "crossfoot.allow", "arguments": ["file:///x"]}),
        ("workspace/executeCommand", {"command": "crossfoot.settingsOrigin"}),
    ],
)
async def test_a_request_about_what_is_not_open_has_an_empty_answer(
    server: Wire, method: str, params: object
) -> None:
    answer = await server.ask(method, params)
    assert not isinstance(answer, dict) or "code" not in answer
    assert await server.marks("file:///not/open.md") == []


async def test_positions_that_cannot_be_are_moved_or_refused(server: Wire) -> None:
    uri = "file:///odd.md"
    await server.open(uri, "So F(2, 57) = 4.31,\np = .052")
    for line, character in ((2**31 - 1, 2**31 - 1), (1, 2**31 - 1), (-1, 0), (0, -5), (2**40, 0)):
        position = {"line": line, "character": character}
        await server.ask("textDocument/hover", {"textDocument": {"uri": uri}, "position": position})
    await server.works()


async def test_names_that_are_none_are_taken_as_they_are(server: Wire) -> None:
    for uri in ("", "%", "file://", "file:///%00", "http://[", "untitled:x", "\ud800"):
        await server.open(uri, "So F(2, 57) = 4.31, p = .052")
        assert len(await server.marks(uri)) == 1
        await server.notify("textDocument/didClose", {"textDocument": {"uri": uri}})


async def test_half_a_surrogate_pair_in_a_text_is_taken_as_it_is(server: Wire) -> None:
    uri = "file:///halves.md"
    await server.open(uri, "\ud83c So F(2, 57) = 4.31, p = .052 \udf3f")
    [mark] = await server.marks(uri)
    assert mark["range"]["start"] == {"line": 0, "character": 26}


async def test_headers_are_read_as_generously_as_can_be(server: Wire) -> None:
    body = b'{"jsonrpc":"2.0","id":99,"method":"no/such"}'
    await server.raw(
        b"nonsense\r\n\r\nX: y\r\ncontent-length:  %d\r\nContent-Type: a\r\n\r\n" % len(body) + body
    )
    assert (await server.receive())["id"] == 99
    await server.raw(b"Content-Length: %d\n\n" % len(body) + body)
    assert (await server.receive())["id"] == 99


async def test_requests_before_the_first_and_after_the_last_are_refused() -> None:
    async with wire() as server:
        assert (await server.ask("textDocument/hover", PLACE))["code"] == UNREADY
        await server.notify("textDocument/didOpen", {})
        await server.begin()
        await server.works()
        assert await server.ask("shutdown") is None
        assert (await server.ask("textDocument/hover", PLACE))["code"] == REQUEST
        assert (await server.ask("shutdown"))["code"] == REQUEST
        await server.notify("exit")
        assert await server.status() == 0


async def test_a_first_message_that_is_wrong_can_be_said_again() -> None:
    async with wire() as server:
        assert (await server.ask("initialize", {"capabilities": 4}))["code"] == PARAMS
        await server.begin()
        await server.works()
        assert await server.end() == 0


async def test_leaving_without_a_word_ends_the_server() -> None:
    async with wire() as server:
        await server.begin()
        await server.notify("exit")
        assert await server.status() == 1
    async with wire() as server:
        await server.begin()
        await server.open("file:///a.md", "So F(2, 57) = 4.31, p = .052")
        server.close()
        assert await server.status() == 1
    async with wire() as server:
        server.close()
        assert await server.status() == 1


async def test_a_message_that_is_cut_off_ends_the_server() -> None:
    async with wire() as server:
        await server.begin()
        await server.raw(b"Content-Length: 1000\r\n\r\n{")
        server.close()
        assert await server.status() == 1


async def test_a_message_of_an_absurd_length_ends_the_server() -> None:
    async with wire() as server:
        await server.begin()
        await server.raw(b"Content-Length: 99999999999999\r\n\r\n{}")
        assert await server.status() == 1


async def test_a_client_that_dies_takes_the_server_with_it() -> None:
    """Its parent names itself in the first message, then dies while others hold the pipes."""
    script = (
        "import json, os, subprocess, sys, time\n"
        "server = subprocess.Popen(sys.argv[1:], stdin=0, stdout=1)\n"
        "print(server.pid, file=sys.stderr, flush=True)\n"
        "time.sleep(60)\n"
    )
    parent = await asyncio.create_subprocess_exec(
        sys.executable, "-c", script, *COMMAND,
        stdin=asyncio.subprocess.PIPE,
        stdout=asyncio.subprocess.PIPE,
        stderr=asyncio.subprocess.PIPE,
        env=ENVIRONMENT,
    )  # fmt: skip
    assert parent.stderr is not None
    number = int(await parent.stderr.readline())
    ends = Wire(parent)
    answer = await ends.ask("initialize", {"processId": parent.pid, "capabilities": {}})
    assert "capabilities" in answer
    os.kill(parent.pid, signal.SIGKILL)
    async with asyncio.timeout(30):
        while True:
            try:
                os.kill(number, 0)
            except ProcessLookupError:
                break
            await asyncio.sleep(0.1)
    await parent.wait()
    ends.close()


async def test_a_client_that_does_not_read_is_not_waited_for() -> None:
    async with wire() as server:
        await server.begin()
        wrong = "So F(2, 57) = 4.31, p = .052. " * 50
        await server.open("file:///a.md", wrong)
        for _ in range(200):
            await server.request(
                "textDocument/diagnostic", {"textDocument": {"uri": "file:///a.md"}}
            )
        # Much more than any pipe holds has been asked for; the next edit is taken in all the same.
        change = {
            "textDocument": {"uri": "file:///a.md", "version": 2},
            "contentChanges": [{"text": "x"}],
        }
        await server.notify("textDocument/didChange", change)
        for _ in range(200):
            assert "result" in await server.receive()
        assert await server.marks("file:///a.md") == []
        assert await server.end() == 0


async def test_a_text_of_20_megabytes_is_read_while_others_are_answered() -> None:
    paragraph = "Words about the plots, and where they lay, and how the water rose there. " * 20
    result = "So F(2, 57) = 4.31, p = .052.\n\n"
    text = (paragraph + "\n\n") * 13_000 + result * 3
    text += "x" * (20_000_000 - len(text))
    async with wire() as server:
        await server.begin()
        await server.open("file:///large.md", text)
        large = await server.request(
            "textDocument/diagnostic", {"textDocument": {"uri": "file:///large.md"}}
        )
        await server.open("file:///small.md", result)
        small = await server.request(
            "textDocument/diagnostic", {"textDocument": {"uri": "file:///small.md"}}
        )
        answers = [await server.receive(), await server.receive()]
        counts = {answer["id"]: len(answer["result"]["items"]) for answer in answers}
        assert counts == {large: 3, small: 1}
        assert answers[0]["id"] == small
        await server.works()
        assert await server.end() == 0


async def test_the_end_does_not_wait_for_a_large_text() -> None:
    async with wire() as server:
        await server.begin()
        results = "".join(f"So F(2, {n}) = 4.31, p = .052.\n\n" for n in range(10, 100_000))
        await server.open("file:///large.md", results)
        await server.request(
            "textDocument/diagnostic", {"textDocument": {"uri": "file:///large.md"}}
        )
        await server.request("shutdown")
        await server.notify("exit")
        assert await server.status() == 0


async def test_what_the_server_prints_itself_never_mixes_with_messages() -> None:
    assert COMMAND[-1] == "serve"
    async with wire() as server:
        await server.begin()
        for _ in range(3):
            await server.works()
        rest = await server.end()
        assert rest == 0
        assert server.process.stdout is not None
        assert await server.process.stdout.read() == b""
