"""How fast the server answers: raw figures beside what is aimed at; nothing fails for being slow.

Every figure is the 95th percentile of all runs of a fixed number, none left out and none repeated
until it fits. Nothing is corrected for a slow or busy machine: how long importing pygls takes in
the same run is printed beside the figures, so that a reader can judge the machine.
"""

from __future__ import annotations

import subprocess
import sys
import time
from collections.abc import Awaitable, Callable
from pathlib import Path
from typing import Any, NamedTuple

import pytest

from serving.editor import COMMAND, ENVIRONMENT
from serving.wire import Wire, wire

#: Runs of each kind.
TIMES = 300

WORDS = (
    "The plots that the crew marked in spring were visited again in autumn, and whoever came by "
    "wrote down how high the water stood, which way it ran, and what grew there. "
)


def manuscript(size: int, every: int = 1500) -> str:
    """Return Markdown with a result every so many characters; one in eight is wrong."""
    parts: list[str] = []
    length = number = 0
    while length < size:
        number += 1
        if number % 20 == 0:
            part = f"## Section {number}"
        else:
            df, f = 20 + number % 80, 3 + number % 9 + number % 100 / 100
            p = "= .21" if number % 8 == 0 else "< .05"
            result = f"On plot {number} it rose, *t*({df}) = {f:.2f}, *p* {p}. "
            part = WORDS + result + WORDS * ((every - len(result)) // len(WORDS) - 1)
        parts.append(part)
        length += len(part) + 2
    return "\n\n".join(parts)


LARGE = manuscript(1_000_000)
#: 2,000 lines of some 60 characters, by how many characters lie between two results.
DRAFTS = {every: manuscript(120_000, every).replace(". ", ".\n") for every in (900, 1500)}


class Open:
    """A text that is open in the server, and edited by single characters."""

    def __init__(self, server: Wire, uri: str, text: str) -> None:
        self.server, self.uri, self.text = server, uri, text
        self.version = 1
        self.places = [
            (line, row.index(" "))
            for line, row in enumerate(text.split("\n"))
            if row.startswith(("The plots", "On plot"))
        ]

    async def read(self) -> float:
        """Open it, and return the seconds until its diagnostics were there."""
        start = time.perf_counter()
        await self.server.open(self.uri, self.text)
        assert await self.server.marks(self.uri)
        return time.perf_counter() - start

    async def type(self) -> None:
        """Insert or change one character, in another paragraph each time."""
        self.version += 1
        line, column = self.places[self.version * 37 % len(self.places)]
        start = {"line": line, "character": column}
        # No two versions are alike, so that nothing of the edited paragraph is remembered.
        new = chr(ord("a") + self.version // len(self.places) % 26)
        grows = self.version // len(self.places) < 4
        end = {"line": line, "character": column if grows else column + 1}
        change = {"range": {"start": start, "end": end}, "text": new}
        document = {"uri": self.uri, "version": self.version}
        params = {"textDocument": document, "contentChanges": [change]}
        await self.server.notify("textDocument/didChange", params)

    async def edit(self) -> None:
        """Type, and wait for the diagnostics."""
        await self.type()
        await self.server.marks(self.uri)


class Figure(NamedTuple):
    """Milliseconds in which 95 of 100 runs were done: on the clock, and of the server's work."""

    clock: float
    work: float

    def __str__(self) -> str:
        return f"{self.clock:.2f} ms ({self.work:.2f} ms of work)"


def work_of(process: int) -> float:
    """Return the seconds that all threads of a process have computed; 0 where nobody tells."""
    tasks = Path(f"/proc/{process}/task")
    if not tasks.exists():
        return 0.0
    return sum(int((t / "schedstat").read_text().split()[0]) for t in tasks.iterdir()) / 1e9


async def percentile(
    server: Wire, work: Callable[[], Awaitable[Any]], times: int = TIMES
) -> Figure:
    """Return the 95th percentile of how long something takes."""
    process = server.process.pid
    clocks, works = [], []
    for _ in range(times):
        used, start = work_of(process), time.perf_counter()
        await work()
        clocks.append(time.perf_counter() - start)
        works.append(work_of(process) - used)
    number = int(0.95 * times)
    return Figure(sorted(clocks)[number] * 1000, sorted(works)[number] * 1000)


@pytest.mark.asyncio
async def test_an_edit_is_answered_before_the_next_picture(record_property: Any) -> None:
    async with wire() as server:
        await server.begin()
        await server.works()  # all that is imported once is imported now
        large = Open(server, "file:///large.md", LARGE)
        used = work_of(server.process.pid)
        clock = await large.read() * 1000
        first = Figure(clock, (work_of(server.process.pid) - used) * 1000)
        edit = await percentile(server, large.edit)
        line = next(n for n, row in enumerate(LARGE.split("\n")) if n > 600 and "= .21" in row)
        column = LARGE.split("\n")[line].index("= .21") + 3
        place = {
            "textDocument": {"uri": large.uri},
            "position": {"line": line, "character": column},
        }
        hover = await percentile(server, lambda: server.ask("textDocument/hover", place))
        completion = await percentile(server, lambda: server.ask("textDocument/completion", place))
        drafts = {}
        for every, text in DRAFTS.items():
            draft = Open(server, f"file:///draft-{every}.md", text)
            await draft.read()
            drafts[every] = await percentile(server, draft.edit)
        assert await server.end() == 0
    told = {
        "first reading of 1 MB": str(first),
        "edit of 1 MB (aim: 16 ms)": str(edit),
        "first reading over edit (aim: 30)": f"{first.clock / edit.clock:.0f}",
        "hover (aim: 5 ms)": str(hover),
        "completion (aim: 5 ms)": str(completion),
        **{f"edit of a draft, every {k} (aim: 5 ms)": str(v) for k, v in drafts.items()},
        "importing pygls": f"{min(importing() for _ in range(5)) * 1000:.0f} ms",
    }
    for name, value in told.items():
        record_property(name, value)
        print(f"\n{name}: {value}", end="")


@pytest.mark.asyncio
async def test_a_burst_of_edits_leaves_no_stale_work_behind(record_property: Any) -> None:
    async with wire() as server:
        await server.begin()
        large = Open(server, "file:///large.md", LARGE)
        await large.read()
        single = (await percentile(server, large.edit, 20)).clock / 1000
        start = time.perf_counter()
        asked = []
        for _ in range(200):
            await large.type()
            document = {"textDocument": {"uri": large.uri}}
            asked.append(await server.request("textDocument/diagnostic", document))
        answers = [await server.receive() for _ in asked]
        taken = time.perf_counter() - start
        assert {answer["id"] for answer in answers} == set(asked)
        assert await server.end() == 0
    record_property("burst", f"{taken / single:.1f} times one edit")
    print(f"200 edits in {taken * 1000:.0f} ms, one in {single * 1000:.2f} ms")
    assert taken < 100 * single


IMPORTING = [
    sys.executable,
    "-c",
    "import pygls.lsp.server, sys; print(flush=True); sys.stdin.read()",
]


def until_first_line(command: list[str], said: bytes, start: float) -> float:
    with subprocess.Popen(
        command, stdin=subprocess.PIPE, stdout=subprocess.PIPE, env=ENVIRONMENT
    ) as process:
        assert process.stdin is not None
        assert process.stdout is not None
        process.stdin.write(said)
        process.stdin.flush()
        process.stdout.readline()
        taken = time.perf_counter() - start
        process.kill()
    return taken


def importing() -> float:
    """Return the seconds in which a fresh interpreter imports pygls."""
    return until_first_line(IMPORTING, b"", time.perf_counter())


def resident(process: int) -> float:
    """Return the megabytes that a process holds."""
    pages = int(Path(f"/proc/{process}/statm").read_text().split()[1])
    return pages * 4096 / 2**20


@pytest.mark.skipif(sys.platform != "linux", reason="reads /proc, which only Linux has")
@pytest.mark.asyncio
async def test_memory_stays_flat_over_many_edits(record_property: Any) -> None:
    async with wire() as server:
        await server.begin()
        draft = Open(server, "file:///draft.md", DRAFTS[900])
        await draft.read()
        for _ in range(2000):
            await draft.edit()
        before = resident(server.process.pid)
        for _ in range(8000):
            await draft.edit()
        after = resident(server.process.pid)
        assert await server.end() == 0
    record_property("memory", f"{before:.0f} MB, then {after:.0f} MB")
    print(f"after 2,000 edits {before:.1f} MB, after 10,000 {after:.1f} MB")
    assert after - before < 8


def test_the_start_takes_hardly_longer_than_importing_the_protocol(record_property: Any) -> None:
    body = (
        b'{"jsonrpc":"2.0","id":1,"method":"initialize","params":{"processId":null,'
        b'"rootUri":null,"capabilities":{"textDocument":{"hover":{"contentFormat":["markdown"]}}}}}'
    )
    message = b"Content-Length: %d\r\n\r\n%b" % (len(body), body)

    def starting() -> float:
        return until_first_line(COMMAND, message, time.perf_counter())

    pairs = [(importing(), starting()) for _ in range(12)]
    least, most = min(pair[0] for pair in pairs), min(pair[1] for pair in pairs)
    record_property("start", f"{most / least:.2f} of importing pygls")
    print(f"\nstart over importing pygls (aim: 1.15): {most / least:.2f}")
