"""``crossfoot settings``: what holds for a document or a folder, and which file says so."""

from __future__ import annotations

import sys
from argparse import ArgumentParser, Namespace

from crossfoot.cli.command import FINE, UNUSABLE, Command
from crossfoot.cli.streams import complain
from crossfoot.output.safe import safe
from crossfoot.project import FILES, Project, project_of
from crossfoot.settings import SETTINGS

_DESCRIPTION = """\
Show the settings that hold for a document or a folder, and the file each comes
from. The nearest crossfoot.toml upwards counts, or the nearest pyproject.toml
with a table [tool.crossfoot]; the command and editors read the same."""

_EPILOG = """\
examples:
  crossfoot settings
  crossfoot settings submissions/draft.md

a crossfoot.toml may say:
  alpha = 0.01
  fail-on = "doubt"
  exclude = ["old/", "*.bak.md"]

exit status:
  0  shown
  2  something is wrong with the file"""


def configure(parser: ArgumentParser) -> None:
    """Declare the options."""
    parser.add_argument(
        "path",
        nargs="?",
        default=".",
        metavar="PATH",
        help="a document or a folder (default: the current one)",
    )


def run(options: Namespace) -> int:
    """Print the settings and where they come from."""
    project = project_of(options.path.replace("\0", "\ufffd"))
    for problem in project.problems:
        complain(project.path, problem)
    sys.stdout.write("\n".join(lines(project)) + "\n")
    return UNUSABLE if project.problems else FINE


def lines(project: Project) -> list[str]:
    """Return a line a setting: its name, its value, its source."""
    rows = [_row(project, name) for name in SETTINGS]
    names, values = (max(len(row[column]) for row in rows) for column in (0, 1))
    table = [f"{name:{names}}  {value:{values}}  {source}" for name, value, source in rows]
    if project.path is None:
        table += ["", f"No {' or '.join(FILES)} upwards sets anything."]
    return table


def _row(project: Project, name: str) -> tuple[str, str, str]:
    value = getattr(project.settings, name)
    words = " ".join(value) if isinstance(value, tuple) else str(value)
    shown = safe(words) if value not in (None, ()) else "-"
    refused = any(problem.startswith(f"{name}:") for problem in project.problems)
    set_there = name in project.values and not refused
    return name.replace("_", "-"), shown, safe(project.path or "") if set_there else "default"


COMMAND = Command("settings", _DESCRIPTION, _EPILOG, configure, run)
