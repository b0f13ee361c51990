"""Documents are other people's: no character of theirs may steer a terminal or a page.

Escape sequences, other control characters, marks that turn the direction of writing round,
invisible characters and halves of surrogate pairs are written out as escapes.
"""

from __future__ import annotations

import re

from crossfoot.expressions import expression

_UNSAFE = expression(
    "["
    "\x00-\x1f\x7f-\x9f"  # controls, escape sequences among them
    "\u061c\u200b-\u200f\u202a-\u202e\u2060-\u206f\ufeff"  # directions, what can't be seen
    "\u2028\u2029"  # line ends to some programs
    "\ud800-\udfff\ufdd0-\ufdef\ufff9-\ufffb\ufffe\uffff"
    "\U000e0000-\U000e0fff"
    "]"
)
_SPACE = expression("[\t\n\x0b\f\r \x85\u2028\u2029]+")


def safe(text: str) -> str:
    r"""Return a text on one line in which every character that could do something is an escape.

    >>> safe("plain\x1b[31m red\u202e")
    'plain\\x1b[31m red\\u202e'
    """
    return _UNSAFE.sub(_escape, text)


def one_line(text: str) -> str:
    """Return a text with its line breaks and runs of blanks as single spaces, and safe."""
    return safe(_SPACE.sub(" ", text)).strip()


def _escape(found: re.Match[str]) -> str:
    code = ord(found[0])
    if code < 0x100:
        return f"\\x{code:02x}"
    return f"\\u{code:04x}" if code < 0x10000 else f"\\U{code:08x}"
