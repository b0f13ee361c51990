"""What ``.gitignore`` files, and patterns in their syntax, leave out."""

from __future__ import annotations

import os

from crossfoot.patterns import Rules, compiled

#: No one writes longer ones by hand.
_MAX_BYTES = 2**20


def rules_of(folder: str, name: str = ".gitignore") -> tuple[Rules, ...]:
    """Return the rules that a file in a folder makes, if it has that file and it can be read."""
    try:
        with open(os.path.join(folder, name), "rb") as file:
            lines = file.read(_MAX_BYTES).decode("utf-8", "replace").splitlines()
    except OSError:
        return ()
    return (compiled(os.path.abspath(folder), lines),)


def rules_above(folder: str) -> tuple[Rules, ...]:
    """Return the rules of the repository that a folder lies in, outermost first.

    Those of the folder itself are not among them. There are none where no repository is found,
    nor where they leave out the folder itself: who names it wants it read.
    """
    start = os.path.abspath(folder)
    parents = []
    root = start
    while not os.path.lexists(os.path.join(root, ".git")):
        parent = os.path.dirname(root)
        if parent == root:
            return ()
        parents.append(parent)
        root = parent
    exclude = rules_of(root, os.path.join(".git", "info", "exclude"))
    rules = [*exclude, *(rule for parent in reversed(parents) for rule in rules_of(parent))]
    return () if is_ignored(start, True, tuple(rules)) else tuple(rules)


def is_ignored(path: str, is_folder: bool, rules: tuple[Rules, ...]) -> bool:
    """Tell whether an absolute path is left out; the innermost rule that speaks of it decides."""
    for base, spec in reversed(rules):
        inside = os.path.relpath(path, base).replace(os.sep, "/")
        if inside != ".":
            verdict = spec.check_file(inside + "/" * is_folder).include
            if verdict is not None:
                return verdict
    return False
