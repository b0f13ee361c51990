"""``crossfoot serve``: the language server, on standard input and output."""

from __future__ import annotations

from argparse import ArgumentParser, Namespace
from importlib import import_module

from crossfoot.cli.command import UNUSABLE, Command
from crossfoot.cli.streams import complain

_DESCRIPTION = """\
Speak the Language Server Protocol on standard input and output. An editor
starts this command by itself; there is no need to type it."""

_EPILOG = """\
exit status:
  0  the editor ended the session
  2  the server is not installed"""


def configure(parser: ArgumentParser) -> None:
    """Declare the options."""
    parser.add_argument(
        "--stdio",
        action="store_true",
        help="accepted because many editors pass it; there is no other way to connect",
    )


def run(options: Namespace) -> int:
    """Serve until the editor is done."""
    try:
        server = import_module("crossfoot_lsp")
    except ModuleNotFoundError as error:
        complain(None, f"The language server needs the package {error.name}, which is missing.")
        return UNUSABLE
    status: int = server.serve()
    return status


COMMAND = Command("serve", _DESCRIPTION, _EPILOG, configure, run)
