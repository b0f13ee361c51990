"""The variables and functions that a Typst text defines."""

from __future__ import annotations

import re

from crossfoot.documents.names import Naming
from crossfoot.expressions import expression
from crossfoot.model import Span


def _meaning(found: re.Match[str]) -> tuple[int, str]:
    """Return the number of parameters of a variable or function, and what it shows."""
    names = [
        part.partition(":")[0].strip() for part in (found["parameters"] or "")[1:-1].split(",")
    ]
    names = [name for name in names if name]
    body = found["body"]
    if body[0] in '["':
        body = body[1:-1]
    for number, name in enumerate(names[:9], 1):
        # Within a formula a name of several letters needs no mark.
        bare = rf"|(?<![\w#]){re.escape(name)}(?![\w(])" if body[0] == "$" and name[1:] else ""
        body = re.sub(rf"#{re.escape(name)}(?![\w(]);?{bare}", f"#{number}", body)
    return len(names), body


def _unwrap(text: str, span: Span) -> Span:
    """Return the place of an argument without its brackets or quotation marks."""
    if text[span.start : span.start + 1] in ("[", '"') and span.end - span.start > 1:
        return Span(span.start + 1, span.end - 1)
    return span


NAMES = Naming(
    hint="#let",
    definition=expression(
        r"^[ \t]*#let[ \t]+(?P<name>[A-Za-z_][\w-]{0,60})(?P<parameters>\([^()\n]{0,200}\))?"
        r"[ \t]*=[ \t]*(?P<body>\[(?:[^\[\]]|\[[^\[\]]{0,300}\]){1,1000}\]|\$[^$]{1,1000}\$"
        r'|"[^"\n]{1,300}"|[-−]?\d[\d.]{0,20}(?:e-?\d{1,3})?)[ \t]*(?:;|//[^\n]*)?$',
        re.M,
    ),
    meaning=_meaning,
    sign="#",
    call=expression(
        r"(?<!\\)#(?P<name>[A-Za-z_](?:[\w-]{0,60}\w)?)(?![\w\[]|-\w|\.[A-Za-z])"
        r"(?:\((?P<arguments>(?:[^()\n]|\([^()\n]{0,100}\)){0,300})\))?;?"
    ),
    unwrap=_unwrap,
)
