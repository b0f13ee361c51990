"""Messages in and out, on two threads, so that neither side ever waits for the other.

What the editor sends is taken in at once, even while something is worked on: a request is then
known to be cancelled, and a text to have changed, before work on it starts. What is sent to an
editor that does not read for a while is kept.
"""

from __future__ import annotations

import os
import re
from collections.abc import Callable, Iterator
from queue import SimpleQueue
from threading import Thread

_LENGTH = re.compile(rb"content-length[ \t]*:[ \t]*(\d{1,15})[ \t]*", re.IGNORECASE)

#: Bytes of the longest message that is taken, and of the longest line of its header.
_LONGEST, _LONGEST_LINE = 2**30, 2**16

_CHUNK = 2**16

#: Seconds that the end waits for the last messages to go out.
_PATIENCE = 2.0


def messages(file: int) -> Iterator[bytes]:
    """Yield the bodies of the messages of a file descriptor until it ends.

    Lines that are no header are passed over; nothing follows a message that is cut off or too
    long. The descriptor is read without a lock, so that a thread may wait in here for ever.
    """
    held = bytearray()
    while True:
        length = _header(file, held)
        if length is None or length > _LONGEST:
            return
        while len(held) < length:
            chunk = _read(file, max(_CHUNK, length - len(held)))
            if not chunk:
                return
            held += chunk
        yield bytes(held[:length])
        del held[:length]


def _header(file: int, held: bytearray) -> int | None:
    """Return the length that a header gives, or None at the end."""
    length = None
    while True:
        end = held.find(b"\n")
        if end < 0:
            chunk = _read(file, _CHUNK)
            if not chunk or len(held) > _LONGEST_LINE:
                return None
            held += chunk
            continue
        line = bytes(held[:end]).rstrip(b"\r")
        del held[: end + 1]
        found = _LENGTH.fullmatch(line)
        if found:
            length = int(found[1])
        elif not line and length is not None:
            return length


def _read(file: int, size: int) -> bytes:
    try:
        return os.read(file, size)
    except OSError:  # the other side has gone
        return b""


class Listener:
    """A thread that hands on each message as it comes in.

    Parameters
    ----------
    file
        Descriptor to read.
    receive
        Called, on that thread, with each message, and with None at the end.
    """

    def __init__(self, file: int, receive: Callable[[bytes | None], object]) -> None:
        self._file = file
        self._receive = receive

    def start(self) -> None:
        """Begin; the thread ends with the messages, or with the process."""
        Thread(target=self._run, name="crossfoot-in", daemon=True).start()

    def _run(self) -> None:
        for body in messages(self._file):
            self._receive(body)
        self._receive(None)


class Sender:
    """A thread that writes messages out in the order in which they were given to it.

    Parameters
    ----------
    file
        Descriptor to write to.
    lost
        Called, on that thread, when the other side has gone.
    """

    def __init__(self, file: int, lost: Callable[[], object]) -> None:
        self._file = file
        self._lost = lost
        self._waiting: SimpleQueue[bytes | None] = SimpleQueue()
        self._thread = Thread(target=self._run, name="crossfoot-out", daemon=True)
        self._thread.start()

    def write(self, data: bytes) -> None:
        """Send bytes; returns at once."""
        self._waiting.put(data)

    def close(self) -> None:
        """Wait, but not long, until all is sent."""
        self._waiting.put(None)
        self._thread.join(_PATIENCE)

    def _run(self) -> None:
        while (data := self._waiting.get()) is not None:
            try:
                view = memoryview(data)
                while view:
                    view = view[os.write(self._file, view) :]
            except OSError:
                self._lost()
                return
