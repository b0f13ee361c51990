"""The macros that an Org text defines."""

from __future__ import annotations

import re

from crossfoot.documents.names import Naming
from crossfoot.expressions import expression


def _meaning(found: re.Match[str]) -> tuple[int, str]:
    """Return the number of arguments of a macro and its body."""
    body = re.sub(r"\$([1-9])", r"#\1", found["body"].strip())
    return max(map(int, re.findall(r"#([1-9])", body)), default=0), body


NAMES = Naming(
    hint="#+",
    definition=expression(
        r"^[ \t]*#\+macro:[ \t]+(?P<name>[A-Za-z][\w-]{0,60})[ \t]+(?P<body>[^\n]+)", re.M | re.I
    ),
    meaning=_meaning,
    sign="{{{",
    call=expression(
        r"\{\{\{(?P<name>[A-Za-z][\w-]{0,60})"
        r"(?:\((?P<arguments>(?:[^()\n]|\([^()\n]{0,100}\)){0,300})\))?\}\}\}"
    ),
)
