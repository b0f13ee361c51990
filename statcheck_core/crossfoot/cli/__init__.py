"""The command. Each of its commands is a module that declares ``COMMAND``.

``main`` never raises: whatever is wrong ends as a message and an exit status.
"""

from __future__ import annotations

import gc
import os
import sys
from argparse import Namespace
from collections.abc import Sequence
from typing import TextIO

from crossfoot.cli.command import CUT_OFF, INTERRUPTED, UNUSABLE
from crossfoot.cli.parser import parse
from crossfoot.cli.streams import complain
from crossfoot.errors import reason


def main(argv: Sequence[str] | None = None) -> int:
    """Run the command and return its exit status.

    Parameters
    ----------
    argv
        The arguments, without the name of the program; those of the process by default.
    """
    _prepare()
    words = sys.argv[1:] if argv is None else argv
    try:
        return _run(parse(words))
    except SystemExit as stop:  # argparse has said what it had to say
        return stop.code if isinstance(stop.code, int) else UNUSABLE
    except KeyboardInterrupt:
        return INTERRUPTED
    except BrokenPipeError:
        _silence()
        return CUT_OFF
    finally:
        # What is left ends with the process. Nothing is gained by looking for cycles in all that
        # SciPy and the scan have made, which is a tenth of what a short scan costs.
        gc.freeze()


def _run(options: Namespace) -> int:
    try:
        status: int = options.run(options)
        sys.stdout.flush()
    except BrokenPipeError:
        raise
    except OSError as error:
        complain(None, f"The output can't be written: {reason(error)}.")
        return UNUSABLE
    return status


#: Objects made before the interpreter looks for cycles: there are hardly any in what a scan makes.
_BEFORE_CYCLES = 100_000


def _prepare() -> None:
    """See that there are streams to write to, and that no character fails on them."""
    gc.set_threshold(_BEFORE_CYCLES)
    sys.stdout = sys.stdout or _nowhere()  # None where the caller closed it
    sys.stderr = sys.stderr or _nowhere()
    for stream in (sys.stdout, sys.stderr):
        if hasattr(stream, "reconfigure"):
            stream.reconfigure(errors="backslashreplace")


def _nowhere() -> TextIO:
    return os.fdopen(os.open(os.devnull, os.O_WRONLY), "w", encoding="utf-8")


def _silence() -> None:
    """Give the rest of the output a place to go, so that the interpreter ends without a word."""
    from contextlib import suppress  # a pipe that breaks is rare

    with suppress(OSError, ValueError):
        os.dup2(os.open(os.devnull, os.O_WRONLY), sys.stdout.fileno())
