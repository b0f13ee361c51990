"""``crossfoot derive``: all that follows from a result, with intervals and working."""

from __future__ import annotations

import sys
from argparse import ArgumentParser, Namespace

from crossfoot.cli.command import FINE, FOUND, UNUSABLE, Command
from crossfoot.cli.streams import Destination, complain
from crossfoot.settings import read

_DESCRIPTION = """\
Take a result as it is printed, and show every number that follows from it
within what rounding allows, with the working. Where its own numbers cannot all
be true, say which."""

_EPILOG = """\
examples:
  crossfoot derive "F(2, 57) = 4.31, n = 60"
  crossfoot derive "t(38) = 2.31" --format json
  crossfoot derive - < results.txt

exit status:
  0  shown
  1  the numbers of the result cannot all be true
  2  wrong usage, or no result was recognised"""


def configure(parser: ArgumentParser) -> None:
    """Declare the options."""
    parser.add_argument(
        "text", metavar="RESULT", help="a result as it is printed, or - for standard input"
    )
    parser.add_argument(
        "-f",
        "--format",
        choices=("text", "json"),
        default="text",
        help="how to write what follows: %(choices)s (default: %(default)s)",
        metavar="FORMAT",
    )
    parser.add_argument(
        "--language",
        metavar="NAME",
        default="plain",
        help="the format the result is written in, such as markdown or latex (default: plain)",
    )


def run(options: Namespace) -> int:
    """Derive, print, and return the exit status."""
    settings, problems = read({"language": options.language})
    for problem in problems:
        complain(None, f"--{problem}")
    if problems:
        return UNUSABLE
    from crossfoot.batch.files import scan_bytes, scan_file
    from crossfoot.output import derivation

    if options.text == "-":
        report = scan_file("-", settings)
    else:
        report = scan_bytes("-", options.text.encode("utf-8", "replace"), settings)
    if report.problem is not None or not report.claims:
        complain(None, report.problem or derivation.NOTHING)
        return UNUSABLE
    if options.format == "json":
        import json

        sys.stdout.write(json.dumps(derivation.derivation_record(report), allow_nan=False) + "\n")
    else:
        for piece in derivation.write(report, Destination(None).look(explain=True)):
            sys.stdout.write(piece)
    wrong = any(
        finding.severity in ("reversal", "conflict")
        for placed in report.claims
        for finding in placed.audited.findings
    )
    return FOUND if wrong else FINE


COMMAND = Command("derive", _DESCRIPTION, _EPILOG, configure, run)
