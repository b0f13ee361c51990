"""Tags, entities and comments of HTML and XML, with their exact places."""

from __future__ import annotations

from typing import NamedTuple

from crossfoot.documents.format import Comment
from crossfoot.documents.words import words
from crossfoot.expressions import expression
from crossfoot.model import Span

# The numbers of attributes and of characters in a value are bounded, so that a text full of
# tags that never close costs no more than one that closes them.
_TAG = expression(
    r"<(/?)([A-Za-z][A-Za-z0-9:_.-]{0,60})"
    r"((?:[^<>\"'=]++|=\s{0,20}(?:\"[^\"]{0,5000}\"|'[^']{0,5000}')|[\"'=]){0,100}+)>"
)
_ATTRIBUTE = expression(
    r"(?<![\w:.-])([A-Za-z_:][\w:.-]{0,60})\s{0,20}=\s{0,20}"
    r"(?:\"([^\"]*)\"|'([^']*)'|([^\s\"'>]+))"
)
_ENTITY = expression(r"&(?:#(\d{1,7})|#[xX]([0-9A-Fa-f]{1,6})|([A-Za-z][A-Za-z0-9]{1,31}))(;?)")

#: Names that HTML lets stand without a semicolon and that matter here.
_BARE = words("lt gt amp nbsp quot plusmn times minus")


class Tag(NamedTuple):
    """A tag and its place; ``name`` is in lower case without a namespace prefix."""

    start: int
    end: int
    name: str
    closing: bool
    empty: bool
    inside: str


def tag_at(text: str, start: int, end: int) -> Tag | None:
    """Return the tag that starts at ``start``, if one does and closes before ``end``."""
    found = _TAG.match(text, start, end)
    if not found:
        return None
    inside = found[3]
    name = found[2].rpartition(":")[2].lower()
    return Tag(start, found.end(), name, bool(found[1]), inside.endswith("/"), inside)


def attributes(tag: Tag) -> dict[str, str]:
    """Return the attributes of a tag, names in lower case, values as they stand."""
    return {
        found[1].lower(): found[2] or found[3] or found[4] or ""
        for found in _ATTRIBUTE.finditer(tag.inside)
    }


def attribute_span(tag: Tag, name: str) -> Span | None:
    """Return the place of an attribute's value."""
    offset = tag.end - 1 - len(tag.inside)
    for found in _ATTRIBUTE.finditer(tag.inside):
        if found[1].lower() == name:
            group = found.lastindex or 1
            return Span(offset + found.start(group), offset + found.end(group))
    return None


def entity_at(text: str, start: int, end: int) -> tuple[str, int] | None:
    """Return what the character reference at ``start`` shows and where it ends."""
    found = _ENTITY.match(text, start, end)
    if not found:
        return None
    if found[1] or found[2]:
        number = int(found[1]) if found[1] else int(found[2], 16)
        if not 0 < number < 0x110000 or 0xD800 <= number < 0xE000:
            return "\ufffd", found.end()
        return chr(number), found.end()
    shown = named(found[3]) if found[4] or found[3] in _BARE else None
    return (shown, found.end()) if shown else None


def named(name: str) -> str | None:
    """Return what a named character reference shows."""
    from html.entities import html5  # a large table: only for documents that name characters

    return html5.get(name + ";")


def angle_comments(text: str) -> tuple[Comment, ...]:
    """Return the comments between ``<!--`` and ``-->``."""
    found: list[Comment] = []
    start = text.find("<!--")
    while start >= 0:
        stop = text.find("-->", start + 4)
        if stop < 0:
            break
        found.append(Comment(Span(start, stop + 3), text[start + 4 : stop].strip()))
        start = text.find("<!--", stop + 3)
    return tuple(found)
