"""Findings → text, JSON and so on: one module an output.

To add one, write a module that declares ``OUTPUT`` and name it in ``_MODULES``.
"""

from __future__ import annotations

from collections.abc import Iterator, Mapping
from importlib import import_module

from crossfoot.output.output import Look, Output

__all__ = ["OUTPUTS", "Look", "Output"]

_MODULES = {"text": "text", "json": "json_", "jsonl": "jsonl"}


class _Outputs(Mapping[str, Output]):
    """The outputs by name; a module is imported when its output is asked for."""

    def __getitem__(self, name: str) -> Output:
        output: Output = import_module(f"{__name__}.{_MODULES[name]}").OUTPUT
        return output

    def __iter__(self) -> Iterator[str]:
        return iter(_MODULES)

    def __len__(self) -> int:
        return len(_MODULES)


OUTPUTS: Mapping[str, Output] = _Outputs()
