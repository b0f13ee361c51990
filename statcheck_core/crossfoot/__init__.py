"""Crossfoot recomputes the statistics a manuscript prints and says which cannot all be true.

The functions here scan texts, files and folders, or derive what follows from one result. Nothing
else is imported until one of them is used.

Examples
--------
>>> import crossfoot
>>> scan = crossfoot.scan_text("Yield fell with slope, *t*(38) = 2.31, *p* = .206.")
>>> [(finding["identity"], finding["literal"]) for finding in scan.findings]
[('p-from-t', '.206')]
>>> scan.findings[0]["remedies"][0]
{'quantity': 'p', 'literal': '.026', 'reason': 'two digits swapped'}
"""

from __future__ import annotations

from typing import TYPE_CHECKING, Any

from crossfoot.version import __version__

if TYPE_CHECKING:
    from crossfoot.api import derive, scan_file, scan_paths, scan_text
    from crossfoot.results import Derivation, Scan

__all__ = [
    "Derivation",
    "Scan",
    "__version__",
    "derive",
    "scan_file",
    "scan_paths",
    "scan_text",
]

_HOMES = {
    "Derivation": "results",
    "Scan": "results",
    "derive": "api",
    "scan_file": "api",
    "scan_paths": "api",
    "scan_text": "api",
}


def __getattr__(name: str) -> Any:
    """Import a public name when it is first used."""
    if name not in _HOMES:
        raise AttributeError(f"module {__name__!r} has no attribute {name!r}")
    from importlib import import_module

    value = getattr(import_module(f"{__name__}.{_HOMES[name]}"), name)
    globals()[name] = value
    return value


def __dir__() -> list[str]:
    """Return the public names, whether they are imported yet or not."""
    return sorted(__all__)
