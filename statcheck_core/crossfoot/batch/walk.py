"""From the paths a person gives to the files to read."""

from __future__ import annotations

import os
from collections.abc import Callable, Iterable, Iterator
from typing import TYPE_CHECKING, NamedTuple

from crossfoot.errors import reason

if TYPE_CHECKING:
    from crossfoot.patterns import Rules

#: The path that stands for standard input.
STANDARD_INPUT = "-"

#: Folders that hold other people's files; hidden ones are left out by their first character.
_FOREIGN = frozenset({"node_modules", "__pycache__"})

#: What an office program writes beside a document while it is open.
_LOCKS = ("~$", "~WRL")


class Found(NamedTuple):
    """A file to read, or (with ``problem``) why a path leads to none.

    ``scanned`` is False for a folder in which there is nothing to read: that is worth a warning,
    but it is no document that could not be read.
    """

    path: str
    problem: str | None = None
    scanned: bool = True


def find(
    paths: Iterable[str],
    suffixes: Iterable[str],
    rules_in: Callable[[str], tuple[Rules, ...]] = lambda folder: (),
) -> list[Found]:
    """Return the files that the paths lead to, each once, in a fixed order.

    Parameters
    ----------
    paths
        Files, folders, or ``-`` for standard input. A file is taken whatever its name; a folder
        is searched with its subfolders, without following links to folders.
    suffixes
        Endings, in lower case, of the names to take in folders.
    rules_in
        Returns the rules that leave out what stands in a folder, even where it is named.
    """
    endings = tuple(suffixes)
    seen: set[str] = set()
    found = []
    for path in paths:
        for item in _expand(path, endings, rules_in):
            key = item.path if item.path == STANDARD_INPUT else os.path.realpath(item.path)
            if key not in seen:
                seen.add(key)
                found.append(item)
    return found


def _expand(
    path: str, endings: tuple[str, ...], rules_in: Callable[[str], tuple[Rules, ...]]
) -> Iterator[Found]:
    """Return what one path leads to."""
    if path == STANDARD_INPUT:
        yield Found(path)
        return
    if "\0" in path:
        yield Found(path.replace("\0", "\ufffd"), "There is no such file or folder.")
        return
    is_folder = os.path.isdir(path)
    if _left_out(path, is_folder, rules_in(path if is_folder else os.path.dirname(path))):
        yield Found(path, "It is excluded by a pattern of the settings.", scanned=False)
    elif is_folder:
        inside = list(_walk(path, endings, rules_in))
        yield from inside
        if not inside:
            yield Found(path, "The folder holds no document that can be read.", scanned=False)
    elif os.path.lexists(path):
        yield Found(path)
    else:
        yield Found(path, "There is no such file or folder.")


def _walk(
    root: str, endings: tuple[str, ...], rules_in: Callable[[str], tuple[Rules, ...]]
) -> Iterator[Found]:
    """Return the files of a folder by name, then those of its subfolders."""
    from crossfoot.batch.ignore import rules_above, rules_of  # files by name do without

    here = "" if os.path.normpath(root) == "." else root
    waiting = [(here, rules_above(root))]
    while waiting:
        folder, rules = waiting.pop()
        try:
            with os.scandir(folder or ".") as entries:
                listed = sorted(entries, key=lambda entry: entry.name)
        except OSError as error:
            yield Found(folder or root, f"The folder can't be read: {reason(error)}.")
            continue
        if any(entry.name == ".gitignore" for entry in listed):
            rules += rules_of(folder or ".")
        excluded = rules_in(folder)
        folders = []
        for entry in listed:
            path = os.path.join(folder, entry.name)
            is_folder = entry.is_dir(follow_symlinks=False)
            if not _interesting(entry, is_folder, endings):
                continue
            if _left_out(path, is_folder, rules) or _left_out(path, is_folder, excluded):
                continue
            if is_folder:
                folders.append((path, rules))
            else:
                yield Found(path)
        waiting.extend(reversed(folders))


def _interesting(entry: os.DirEntry[str], is_folder: bool, endings: tuple[str, ...]) -> bool:
    """Tell whether an entry may be a document, or a folder with documents, by its name and kind."""
    name = entry.name
    if name.startswith("."):
        return False
    if is_folder:
        return name not in _FOREIGN and not os.path.lexists(os.path.join(entry.path, "pyvenv.cfg"))
    return name.lower().endswith(endings) and not name.startswith(_LOCKS) and _is_file(entry)


def _is_file(entry: os.DirEntry[str]) -> bool:
    try:
        return entry.is_file()
    except OSError:  # a link that leads round in a circle
        return False


def _left_out(path: str, is_folder: bool, rules: tuple[Rules, ...]) -> bool:
    if not rules:
        return False
    from crossfoot.batch.ignore import is_ignored

    return is_ignored(os.path.abspath(path), is_folder, rules)
