"""The parser, made from the declarations of the commands."""

from __future__ import annotations

from argparse import (
    SUPPRESS,
    Action,
    ArgumentParser,
    Namespace,
    RawDescriptionHelpFormatter,
)
from collections.abc import Mapping, Sequence
from importlib import import_module
from typing import NoReturn

from crossfoot.cli.command import UNUSABLE, Command
from crossfoot.cli.streams import columns
from crossfoot.version import __version__

#: The commands, each a module beside this one, with the line that the list of commands has.
COMMANDS: Mapping[str, str] = {
    "scan": "check the results that documents report",
    "derive": "show all that follows from one result",
    "identities": "show what is checked: formulas, assumptions, sources",
    "settings": "show what is set for a document, and by which file",
    "serve": "run the language server for editors",
}

_DESCRIPTION = """\
Crossfoot reads the regression and test statistics that a manuscript reports,
recomputes each from the others within what rounding allows, and says which of
them cannot all be true. It runs offline, and a disagreement that it finds is a
question to the authors, not a verdict on anyone."""

_EPILOG = """\
commands:
{commands}

examples:
  crossfoot scan paper.md
  crossfoot scan submissions/ --format json --output scan.json
  crossfoot derive "F(2, 57) = 4.31, n = 60"
  crossfoot identities f-from-r2

exit status of scan:
  0  nothing found
  1  something found
  2  wrong usage, or nothing could be read

“crossfoot COMMAND --help” tells all about a command."""


class Parser(ArgumentParser):
    """A parser whose complaints say what may have been meant, and where to read more."""

    def error(self, message: str) -> NoReturn:
        """Print what is wrong, in one line or two, and exit."""
        self.exit(UNUSABLE, f"{self.prog}: {message}\n{self._hint(message)}")

    def _hint(self, message: str) -> str:
        """Return what may have been meant by an option, or by a word in quotes."""
        from difflib import get_close_matches  # only a mistake needs it

        said = message.partition("(choose from")[0].split()
        typed = [
            word.strip("'").partition("=")[0]
            for word in said
            if word[0] in "-'" and word[-1] != ":"
        ]
        known = [word for action in self._actions for word in _words(action)]
        near = dict.fromkeys(name for word in typed for name in get_close_matches(word, known, 1))
        meant = [f"{self.prog}: perhaps {name} is meant\n" for name in near if name not in typed]
        return "".join(meant) + f"{self.prog}: “{self.prog} --help” lists what can be given\n"


def _words(action: Action) -> list[str]:
    """Return what may be typed for an option or an argument."""
    return [*action.option_strings, *(action.choices or ())]


class Formatter(RawDescriptionHelpFormatter):
    """Help that names an option's value once, as later versions of Python do by themselves.

    Told its width, argparse need not import ``shutil`` to find it.
    """

    def __init__(self, prog: str) -> None:
        super().__init__(prog, max_help_position=24, width=columns())

    def _format_action_invocation(self, action: Action) -> str:
        if not action.option_strings or action.nargs == 0:
            return super()._format_action_invocation(action)
        return f"{', '.join(action.option_strings)} {action.metavar}"


def command(name: str) -> Command:
    """Return the declaration of a command; its module is imported only here."""
    declared: Command = import_module(f"crossfoot.cli.{name}").COMMAND
    return declared


def build(argv: Sequence[str]) -> Parser:
    """Return the parser for a command line.

    It knows the command that the line starts with, with its options: what one command needs is
    not imported, nor made ready, for another. On any other line it knows all of them by name.
    """
    listed = "\n".join(f"  {name:12}{title}" for name, title in COMMANDS.items())
    parser = Parser(
        "crossfoot",
        usage="crossfoot [-h] [--version] COMMAND ...",
        description=_DESCRIPTION,
        epilog=_EPILOG.format(commands=listed),
        formatter_class=Formatter,
        allow_abbrev=False,
    )
    parser.add_argument("--version", action="version", version=f"crossfoot {__version__}")
    # With the name given, argparse need not format a usage line to find it.
    group = parser.add_subparsers(
        dest="command", metavar="COMMAND", required=True, prog="crossfoot", help=SUPPRESS
    )
    for name in argv[:1] if argv and argv[0] in COMMANDS else COMMANDS:
        inner = group.add_parser(name, formatter_class=Formatter, allow_abbrev=False)
        if name in argv:
            chosen = command(name)
            inner.description, inner.epilog = chosen.description, chosen.epilog
            chosen.configure(inner)
            inner.set_defaults(run=chosen.run, parser=inner)
    return parser


def parse(argv: Sequence[str]) -> Namespace:
    """Return what a command line asks for; exit with a message where it is not understood."""
    options, rest = build(argv).parse_known_args(argv)
    if rest:
        parser: Parser = options.parser
        parser.error(f"there is no such option or argument: {' '.join(rest)}")
    return options
