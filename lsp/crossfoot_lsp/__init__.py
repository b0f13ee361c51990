"""The language server of Crossfoot, for any editor that speaks the Language Server Protocol.

Thin over the library: a module a feature, and no thinking of its own about statistics.
"""

from __future__ import annotations

from importlib.util import find_spec

for _needed in ("pygls", "lsprotocol"):
    if find_spec(_needed) is None:  # said here, where it costs nothing, and not in mid-start
        raise ModuleNotFoundError(f"No module named {_needed!r}", name=_needed)

#: Objects that are made, and collections of the young, before the collector looks again.
_COLLECTIONS = (100_000, 20, 50)


def serve() -> int:
    """Serve on standard input and output until the editor is done; return the exit status."""
    import gc

    # Some thousands of classes are made, all of them kept: looking for garbage only costs time.
    gc.disable()
    import logging
    import os
    import sys

    from crossfoot_lsp.server import Server

    gc.freeze()
    gc.enable()
    # Records go when nothing refers to them; what is left for the collector is next to nothing.
    gc.set_threshold(*_COLLECTIONS)
    logging.getLogger("pygls").setLevel(logging.CRITICAL)
    # Nothing else may write between our messages: what is printed goes to the error stream.
    target = os.dup(1)
    os.dup2(2, 1)
    sys.stdout = sys.stderr
    return Server().run(0, target)
