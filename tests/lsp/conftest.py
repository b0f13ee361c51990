"""One server a kind of editor for all tests that only look at documents of their own."""

from __future__ import annotations

from collections.abc import AsyncIterator

import pytest_asyncio

from serving.editor import Editor, pulling, pushing, session


@pytest_asyncio.fixture(loop_scope="session", scope="session")
async def editor() -> AsyncIterator[Editor]:
    """An editor that asks for diagnostics."""
    async with session(pulling()) as found:
        yield found


@pytest_asyncio.fixture(loop_scope="session", scope="session")
async def simple() -> AsyncIterator[Editor]:
    """An editor that is sent diagnostics."""
    async with session(pushing()) as found:
        yield found
