"""Settings: the editor's own, those of the project's file, and what became of each.

What the command knows too (``alpha``, ``exclude`` …) the project's file decides, so that an
author sees what the gate will see; what it leaves open the editor may set. What only an editor
has (hints, lenses …) comes from the editor.
"""

from __future__ import annotations

import os
from collections.abc import Callable, Iterable, Mapping
from typing import Any, NamedTuple

from crossfoot.batch.ignore import is_ignored
from crossfoot.model import SEVERITIES
from crossfoot.patterns import Rules, compiled
from crossfoot.project import NO_PROJECT, Project, project_of
from crossfoot.settings import DEFAULTS, SETTINGS, Settings, read


class EditorSettings(NamedTuple):
    """What only an editor has.

    Attributes
    ----------
    inlay_hints
        Whether to write the recomputed p behind each printed one.
    code_lens
        Whether to write a summary above the document.
    workspace_diagnostics
        Whether to report on files that are not open.
    show
        The weakest severity that is shown.
    """

    inlay_hints: bool = False
    code_lens: bool = True
    workspace_diagnostics: bool = True
    show: str = "note"

    @property
    def shown(self) -> frozenset[str]:
        """The severities that are shown."""
        return frozenset(SEVERITIES[: SEVERITIES.index(self.show) + 1])


#: Of the library's settings, those that an editor may set; by their names there.
SHARED: Mapping[str, str] = {"alpha": "alpha", "exclude": "exclude", "maxBytes": "max_bytes"}

_SWITCHES = {
    "inlayHints": "inlay_hints",
    "codeLens": "code_lens",
    "workspaceDiagnostics": "workspace_diagnostics",
}

#: Settings of an editor's extension that are none of the server's business.
_FOREIGN = frozenset(
    {"interpreter", "trace", "path", "command", "enable", "askReason", "marksInHover"}
)


class Chosen(NamedTuple):
    """What an editor sets, understood; and a sentence for each value that is refused."""

    editor: EditorSettings = EditorSettings()
    shared: Mapping[str, object] = {}
    problems: tuple[str, ...] = ()


def understood(values: object) -> Chosen:
    """Return what the settings of an editor come to."""
    if not isinstance(values, Mapping):
        return Chosen()
    own: dict[str, Any] = {}
    shared: dict[str, object] = {}
    problems: list[str] = []
    for name, value in values.items():
        if value is None or name in _FOREIGN:
            continue
        if name in _SWITCHES:
            if isinstance(value, bool):
                own[_SWITCHES[name]] = value
            else:
                problems.append(f"{name}: {value!r} is neither true nor false")
        elif name == "show":
            if value in SEVERITIES:
                own[name] = value
            else:
                problems.append(f"show: {value!r} is not a severity ({', '.join(SEVERITIES)})")
        elif name in SHARED:
            refused = read({SHARED[name]: value})[1]
            problems += refused
            if not refused:
                shared[SHARED[name]] = value
        else:
            problems.append(f"there is no setting {name!r}")
    return Chosen(EditorSettings(**own), shared, tuple(problems))


class Configuration:
    """All that is set, for any file.

    Parameters
    ----------
    tell
        Shows a person a sentence; called once for each thing that is wrong.
    """

    def __init__(self, tell: Callable[[str], object]) -> None:
        self._tell = tell
        self._told: set[str] = set()
        self._general = Chosen()
        self._folders: dict[str, Chosen] = {}
        self._projects: dict[str, Project] = {}
        self._rules: dict[str, tuple[Rules, ...]] = {}

    # Taking settings in

    def choose(self, general: object, folders: Mapping[str, object] | None = None) -> None:
        """Take in what the editor sets, in general and for each folder, by its path."""
        self._general = self._checked(general)
        self._folders = {path: self._checked(values) for path, values in (folders or {}).items()}
        self._rules.clear()

    def forget_projects(self) -> None:
        """Look for the files of projects anew: one has changed."""
        self._projects.clear()
        self._rules.clear()

    def _checked(self, values: object) -> Chosen:
        chosen = understood(values)
        self._complain("the editor's settings", chosen.problems)
        return chosen

    def _complain(self, source: str, problems: Iterable[str]) -> None:
        for problem in problems:
            sentence = f"Crossfoot, {source}: {problem}."
            if sentence not in self._told:
                self._told.add(sentence)
                self._tell(sentence)

    # What holds

    def project(self, path: str) -> Project:
        """Return what the project of a file sets."""
        if not os.path.isabs(path):
            return NO_PROJECT  # it lies nowhere yet
        folder = os.path.dirname(path)
        found = self._projects.get(folder)
        if found is None:
            found = self._projects[folder] = project_of(path)
            self._complain(found.path or "", found.problems)
        return found

    def settings(self, path: str) -> Settings:
        """Return the settings that a file is scanned with."""
        values = {**self._chosen(path).shared, **self.project(path).values}
        known = {name: value for name, value in values.items() if name in SETTINGS}
        return read(known)[0] if known else DEFAULTS

    def editor(self, path: str) -> EditorSettings:
        """Return what is set for the editor where a file lies."""
        return self._chosen(path).editor

    def excludes(self, path: str) -> bool:
        """Say whether a pattern of the settings leaves a file out."""
        if not os.path.isabs(path):
            return False
        rules = self.rules(os.path.dirname(path))
        return bool(rules) and is_ignored(path, False, rules)

    def rules(self, folder: str) -> tuple[Rules, ...]:
        """Return the rules that leave out what stands in a folder."""
        rules = self._rules.get(folder)
        if rules is None:
            rules = self._rules[folder] = self._rules_for(os.path.join(folder, ""))
        return rules

    def _rules_for(self, path: str) -> tuple[Rules, ...]:
        patterns = self.settings(path).exclude
        if not patterns:
            return ()
        base = self.project(path).folder
        if base is None or "exclude" not in self.project(path).values:
            base = self._folder(path) or os.path.dirname(path)
        return (compiled(base, patterns),)

    def _chosen(self, path: str) -> Chosen:
        folder = self._folder(path)
        return self._general if folder is None else self._folders[folder]

    def _folder(self, path: str) -> str | None:
        """Return the innermost folder with settings of its own that a file lies in."""
        inside = [folder for folder in self._folders if path.startswith(folder + os.sep)]
        return max(inside, key=len, default=None)
