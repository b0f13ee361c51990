"""The substitutions that a text in reStructuredText defines."""

from __future__ import annotations

import re

from crossfoot.documents.names import Naming, plain_meaning
from crossfoot.expressions import expression

_CODE = expression(r"(?:0x|x|\\x|U\+|u|\\u)([0-9A-Fa-f]{1,6})|&#x([0-9A-Fa-f]{1,6});")


def _meaning(found: re.Match[str]) -> tuple[int, str]:
    """Return what a substitution shows: text, or the characters of some codes."""
    if not found["codes"]:
        return plain_meaning(found)
    parts = []
    for word in found["body"].partition("\n")[0].partition(" .. ")[0].split():
        code = _CODE.fullmatch(word)
        number = int(code[1] or code[2], 16) if code else 0
        parts.append(
            chr(number) if 0 < number < 0x110000 and not 0xD800 <= number < 0xE000 else word
        )
    return 0, "".join(parts)


NAMES = Naming(
    hint="::",
    definition=expression(
        r"^[ \t]*\.\.[ \t]+\|(?P<name>[^|\n]{1,60})\|[ \t]+(?:replace|(?P<codes>unicode))::[ \t]*"
        r"(?P<body>[^\n]*(?:\n[ \t]+\S[^\n]*)*+)",
        re.M,
    ),
    meaning=_meaning,
    sign="|",
    call=expression(r"(?<!\\)\|(?P<name>[^|\s](?:[^|\n]{0,58}[^|\s])?)\|_{0,2}"),
)
