"""What a command is: one declaration from which the parser and its help are made."""

from __future__ import annotations

from argparse import ArgumentParser, Namespace
from collections.abc import Callable
from typing import NamedTuple

#: Exit statuses; the first three are a contract.
FINE, FOUND, UNUSABLE, INTERRUPTED, CUT_OFF = 0, 1, 2, 130, 141


class Command(NamedTuple):
    """A command of the program.

    Attributes
    ----------
    name
        What is typed.
    description, epilog
        What its help says before and after the options.
    configure
        Declares its options.
    run
        Does it, and returns the exit status.
    """

    name: str
    description: str
    epilog: str
    configure: Callable[[ArgumentParser], None]
    run: Callable[[Namespace], int]
