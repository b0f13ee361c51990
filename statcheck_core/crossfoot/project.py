"""The settings of a project: the nearest file upwards that holds any.

They stand in ``crossfoot.toml``, or in the table ``[tool.crossfoot]`` of ``pyproject.toml``, by
the names of :data:`crossfoot.settings.SETTINGS`; ``fail-on`` and ``fail_on`` are the same name.
The command and the language server both read them here, and both can say where they stand.
"""

from __future__ import annotations

import os
from collections.abc import Iterator, Mapping
from typing import NamedTuple

from crossfoot.errors import reason
from crossfoot.settings import DEFAULTS, Settings, read

#: Names of the files, the one that counts first; with the tables that lead to the settings.
FILES: Mapping[str, tuple[str, ...]] = {
    "crossfoot.toml": (),
    "pyproject.toml": ("tool", "crossfoot"),
}

#: No one writes longer ones by hand.
_MAX_BYTES = 2**20


class Project(NamedTuple):
    """What a project sets.

    Attributes
    ----------
    path
        The file, or None where no file sets anything.
    values
        What it sets, by name, as it stands there; also what is refused.
    settings
        The settings that these make; a value that is refused has its default.
    problems
        What is wrong with it, a sentence each, without the file's name.
    """

    path: str | None = None
    values: Mapping[str, object] = {}
    settings: Settings = DEFAULTS
    problems: tuple[str, ...] = ()

    @property
    def folder(self) -> str | None:
        """The folder that its patterns start from, or None where no file sets anything."""
        return None if self.path is None else os.path.dirname(self.path)


NO_PROJECT = Project()


def project_of(path: str) -> Project:
    """Return what is set for a file or a folder, by the nearest file upwards that sets anything.

    Parameters
    ----------
    path
        A document, which need not exist, or a folder.
    """
    start = os.path.abspath(path)
    folder = start if os.path.isdir(start) else os.path.dirname(start)
    for candidate in candidates(folder):
        project = project_in(candidate)
        if project is not None:
            return project
    return NO_PROJECT


def candidates(folder: str) -> Iterator[str]:
    """Yield the places where settings for a folder may stand, the nearest first."""
    while True:
        for name in FILES:
            yield os.path.join(folder, name)
        parent = os.path.dirname(folder)
        if parent == folder:
            return
        folder = parent


def project_in(path: str) -> Project | None:
    """Return what a file sets, or None where there is no such file or nothing of ours in it."""
    if not os.path.isfile(path):
        return None
    try:
        with open(path, "rb") as file:
            data = file.read(_MAX_BYTES)
    except OSError as error:
        return Project(path, problems=(f"it can't be read: {reason(error)}",))
    return parse(path, data)


def parse(path: str, data: bytes) -> Project | None:
    """Return what the content of a file sets; ``path`` tells which of :data:`FILES` it is."""
    tables = FILES.get(os.path.basename(path), ())
    if tables and ".".join(tables).encode() not in data:
        return None  # most files of other tools end here, and cost nothing more
    import tomllib  # only a project that sets something needs it

    try:
        values: object = tomllib.loads(data.decode("utf-8"))
    except (ValueError, RecursionError) as error:  # of the encoding too
        return Project(path, problems=(f"it is not valid TOML: {_words(error)}",))
    for table in tables:
        values = values.get(table) if isinstance(values, dict) else None
    if values is None:
        return None
    if not isinstance(values, dict):
        return Project(path, problems=(f"{'.'.join(tables)} is not a table",))
    named = {name.replace("-", "_"): value for name, value in values.items()}
    settings, problems = read(named)
    return Project(path, named, settings, problems)


def _words(error: Exception) -> str:
    if isinstance(error, UnicodeDecodeError):
        return f"byte {error.start} is not UTF-8"
    return str(error) or "it is nested too deeply"
