"""Which settings hold for which document."""

from __future__ import annotations

import os
from collections.abc import Callable, Iterable, Mapping
from typing import TYPE_CHECKING

from crossfoot.settings import DEFAULTS, Settings, read

if TYPE_CHECKING:
    from crossfoot.patterns import Rules
    from crossfoot.project import Project


class Policy:
    """The same settings for every document; its patterns start from the current folder.

    Parameters
    ----------
    settings
        The settings.
    """

    def __init__(self, settings: Settings = DEFAULTS) -> None:
        self._settings = settings
        self._rules = _rules(os.curdir, settings.exclude)

    def settings(self, path: str) -> Settings:
        """Return the settings that a document is scanned with."""
        return self._settings

    def rules(self, folder: str) -> tuple[Rules, ...]:
        """Return the rules that leave out what stands in a folder."""
        return self._rules


class ProjectPolicy(Policy):
    """The settings of each document's own project, but for those that were chosen.

    Parameters
    ----------
    chosen
        Values by name, which go before those of projects; None where nothing was chosen.
        Patterns that are chosen add to those of the project.
    complain
        Told once of each settings file with which something is wrong, and what.
    """

    def __init__(self, chosen: Mapping[str, object], complain: Callable[[str, str], None]) -> None:
        self._chosen = {name: value for name, value in chosen.items() if value is not None}
        super().__init__(read(self._chosen)[0])
        self._complain = complain
        self._told: set[str] = set()
        self._projects: dict[str, Project] = {}
        self._found: dict[str, tuple[Settings, tuple[Rules, ...]]] = {}

    @property
    def sound(self) -> bool:
        """Whether nothing was wrong with any settings file that was read."""
        return not self._told

    def settings(self, path: str) -> Settings:
        """Return the settings that a document is scanned with."""
        return self._resolved(os.path.dirname(path))[0]

    def rules(self, folder: str) -> tuple[Rules, ...]:
        """Return the rules that leave out what stands in a folder."""
        return self._resolved(folder)[1]

    def _resolved(self, folder: str) -> tuple[Settings, tuple[Rules, ...]]:
        """Return the settings and the rules of a folder, with which they are worked out once."""
        folder = folder or os.curdir
        project = self._project(folder)
        key = project.path or ""
        if key not in self._found:
            settings = read({**project.values, **self._chosen})[0]
            own = _rules(project.folder or os.curdir, project.settings.exclude)
            self._found[key] = settings, (*own, *self._rules)
        return self._found[key]

    def _project(self, folder: str) -> Project:
        found = self._projects.get(folder)
        if found is None:
            from crossfoot.project import project_of

            found = self._projects[folder] = project_of(folder)
            if found.path is not None and found.problems and found.path not in self._told:
                self._told.add(found.path)
                for problem in found.problems:
                    self._complain(found.path, problem)
        return found


def _rules(base: str, patterns: Iterable[str]) -> tuple[Rules, ...]:
    patterns = tuple(patterns)
    if not patterns:
        return ()
    from crossfoot.patterns import compiled  # slow to import

    return (compiled(os.path.abspath(base), patterns),)
