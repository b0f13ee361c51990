"""``crossfoot scan``: check the results that documents report."""

from __future__ import annotations

import sys
from argparse import ArgumentParser, Namespace
from collections.abc import Iterator

from crossfoot.batch.files import scan_paths
from crossfoot.batch.policy import ProjectPolicy
from crossfoot.cli.command import FINE, FOUND, UNUSABLE, Command
from crossfoot.cli.streams import Destination, complain
from crossfoot.errors import reason
from crossfoot.model import Report
from crossfoot.output import OUTPUTS
from crossfoot.output.tally import fails
from crossfoot.settings import read

_DESCRIPTION = """\
Recompute every reported statistic that other printed numbers determine, and
say which of them cannot all be true as printed, why, and which slip would
explain it.

A folder is searched with its subfolders for every format that can be read.
Hidden folders, virtual environments, node_modules, links to folders and
whatever a .gitignore leaves out are passed over; a file that is named is
always read. Nothing is sent anywhere.

Options go before what a crossfoot.toml sets (see “crossfoot settings --help”);
patterns of --exclude are added to those that it sets."""

_EPILOG = """\
examples:
  crossfoot scan paper.md                      one document
  crossfoot scan submissions/ --explain        a folder, with the working
  crossfoot scan . --format json -o scan.json  for a program
  crossfoot scan report.qmd --fail-on doubt    be stricter in CI
  pandoc paper.odt -t markdown | crossfoot scan - --language markdown

severities, strongest first:
  reversal   p as recomputed is on the other side of the significance level
  conflict   the printed numbers cannot all be true
  doubt      they can, but only under an assumption that the text does not state
  note       nothing disagrees, yet it can't be so as printed or says too little

exit status:
  0  nothing at or above --fail-on
  1  at least one finding at or above --fail-on
  2  wrong usage, or nothing could be read"""


def configure(parser: ArgumentParser) -> None:
    """Declare the options."""
    parser.add_argument(
        "paths", nargs="+", metavar="PATH", help="a document, a folder, or - for standard input"
    )
    parser.add_argument(
        "-f",
        "--format",
        choices=tuple(OUTPUTS),
        default="text",
        help="how to write findings: %(choices)s (default: %(default)s)",
        metavar="FORMAT",
    )
    parser.add_argument(
        "-o",
        "--output",
        metavar="FILE",
        help="write findings to this file, which appears only when it is complete; - for standard "
        "output",
    )
    parser.add_argument(
        "--explain",
        action="store_true",
        help="write out the working of each finding, and list settled findings too",
    )
    parser.add_argument(
        "--fail-on",
        metavar="SEVERITY",
        help="weakest severity that gives exit status 1: reversal, conflict, doubt, note or "
        "never (default: conflict)",
    )
    parser.add_argument(
        "--alpha",
        metavar="LEVEL",
        help="significance level where a text states none (default: .05)",
    )
    parser.add_argument(
        "--language",
        metavar="NAME",
        help="read every document as this format, such as markdown or latex, whatever its name",
    )
    parser.add_argument(
        "--exclude",
        metavar="PATTERN",
        action="append",
        help="never read what matches, in the syntax of .gitignore; may be repeated",
    )


def run(options: Namespace) -> int:
    """Scan, write, and return the exit status."""
    chosen = {name: getattr(options, name) for name in ("alpha", "fail_on", "language", "exclude")}
    problems = read(chosen)[1]
    for problem in problems:
        name, _, words = problem.partition(": ")
        complain(None, f"--{name.replace('_', '-')}: {words}")
    if problems:
        return UNUSABLE
    outcome = _Outcome(ProjectPolicy(chosen, complain))
    destination = Destination(options.output)
    try:
        with destination as stream:
            reports = outcome.observe(options.paths)
            for piece in OUTPUTS[options.format].write(reports, destination.look(options.explain)):
                stream.write(piece)
    except BrokenPipeError:
        raise
    except OSError as error:
        complain(options.output, f"The output can't be written: {reason(error)}.")
        return UNUSABLE
    return outcome.status()


class _Outcome:
    """What the exit status depends on, gathered while reports pass by on their way out."""

    def __init__(self, policy: ProjectPolicy) -> None:
        self._policy = policy
        self._read = 0
        self._failed = False

    def observe(self, paths: list[str]) -> Iterator[Report]:
        """Scan, pass the reports on, and tell the person what could not be read."""
        for report in scan_paths(paths, self._policy, complain, _watch):
            if report.problem is None:
                self._read += 1
                fail_on = self._policy.settings(report.document.path).fail_on
                self._failed = self._failed or fails(report, fail_on)
            _warn(report)
            yield report

    def status(self) -> int:
        """Return the exit status."""
        if not self._read:
            complain(None, "Nothing was scanned.")
        if not self._read or not self._policy.sound:
            return UNUSABLE
        return FOUND if self._failed else FINE


def _watch(reports: Iterator[Report], total: int) -> Iterator[Report]:
    """Show how far the scan is, if somebody can see it."""
    if not sys.stderr.isatty():
        return reports
    from crossfoot.batch.progress import watched

    return watched(reports, total, sys.stderr)


def _warn(report: Report) -> None:
    """Tell the person what of a document could not be read."""
    if report.problem is not None:
        complain(report.document.path, report.problem)
        return
    for problem in report.document.problems:
        if problem.span is None:
            complain(report.document.path, problem.message)
        else:
            from crossfoot.places import where  # documents seldom have a problem with a place

            start = where(report.document, problem.span).start
            complain(f"{report.document.path}:{start.line}:{start.column}", problem.message)


COMMAND = Command("scan", _DESCRIPTION, _EPILOG, configure, run)
