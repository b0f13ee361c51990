"""The page that says what each identity is: the name of each in a diagnostic leads to it.

It is made from the declarations, and lies among what the user's programs keep for themselves, so
that an editor can open it like any file.
"""

from __future__ import annotations

import os
import sys
from collections.abc import Iterable
from functools import cache
from hashlib import sha256
from pathlib import Path
from typing import NamedTuple

from pygls.uris import from_fs_path

from crossfoot.laws import IDENTITIES
from crossfoot.laws.identity import Identity


class Page(NamedTuple):
    """A page in Markdown; ``lines`` has the line, from 1, on which each identity begins."""

    text: str
    lines: dict[str, int]


def page(identities: Iterable[Identity]) -> Page:
    """Return the page about identities."""
    lines = ["# What Crossfoot checks", ""]
    starts = {}
    for identity in identities:
        starts[identity.slug] = len(lines) + 1
        lines += [f"## {identity.slug}: {identity.title}", "", f"    {identity.formula}", ""]
        lines += [identity.explanation, ""]
        if identity.assumption:
            lines += [f"Holds when: {identity.assumption}", ""]
        if identity.source:
            lines += [f"Source: {identity.source}", ""]
        if identity.forms:
            lines += ["Computed as:", "", *(f"    {form.formula}" for form in identity.forms), ""]
    return Page("\n".join(lines), starts)


def link(slug: str) -> str | None:
    """Return the address of what is said about an identity; None where it can't be kept."""
    address, lines = _kept()
    return f"{address}#L{lines[slug]}" if address and slug in lines else None


@cache
def _kept() -> tuple[str | None, dict[str, int]]:
    """Return the address of the page, once it is written, and where each identity begins."""
    text, lines = page(IDENTITIES.values())
    data = text.encode()
    path = _folder() / f"identities-{sha256(data).hexdigest()[:12]}.md"
    try:
        if not path.exists():
            path.parent.mkdir(parents=True, exist_ok=True)
            path.write_bytes(data)
    except OSError:
        return None, lines
    return from_fs_path(str(path)), lines


def _folder() -> Path:
    """Return the folder for what can be made again."""
    if sys.platform == "win32":
        base = os.environ.get("LOCALAPPDATA") or "~/AppData/Local"
    elif sys.platform == "darwin":
        base = "~/Library/Caches"
    else:
        base = os.environ.get("XDG_CACHE_HOME") or "~/.cache"
    return Path(base).expanduser() / "crossfoot"
