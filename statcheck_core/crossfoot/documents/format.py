"""What a format is: its declaration, and the functions that read it."""

from __future__ import annotations

from collections.abc import Callable
from functools import cache
from importlib import import_module
from typing import NamedTuple

from crossfoot.documents.table import Table
from crossfoot.documents.visible import Visible
from crossfoot.model import Block, Problem, Span

#: Pairs of name and meaning that a document's markup defines (macros, attributes, variables).
Definitions = tuple[tuple[str, str], ...]


class Comment(NamedTuple):
    """A comment of the source: its place with the marks, its words without them."""

    span: Span
    text: str


class Extracted(NamedTuple):
    """The text of a document with what was found out while it was written out.

    Attributes
    ----------
    text
        The whole text.
    blocks
        Where extraction knows the blocks; None leaves them to :attr:`Reader.split`.
    pages
        Offsets at which pages or cells start.
    problems
        What could not be read.
    """

    text: str
    blocks: tuple[Block, ...] | None = None
    pages: tuple[int, ...] = ()
    problems: tuple[Problem, ...] = ()


def no_comments(text: str) -> tuple[Comment, ...]:
    """Return the comments of a format that has none."""
    return ()


def no_definitions(text: str) -> Definitions:
    """Return the definitions of a format that has none."""
    return ()


class Reader(NamedTuple):
    """The functions that read a format; pure, total on any text, linear in its length.

    They may rely on lines that end in a line feed alone: see
    :mod:`crossfoot.documents.newlines`.

    Attributes
    ----------
    split
        Text to blocks, in order, without overlap.
    show
        Kind and source of a block to what a reader sees.
    comments
        Text to its comments, in order.
    define
        Text to its definitions.
    extract
        Bytes to text, for formats that are no text at heart; None means the bytes are text.
    table
        Source of a table block to the table; where it is None, the rows and cells are those that
        ``show`` shows.
    expand
        Source of a block and the document's definitions to the source with what they stand for;
        None where a format defines nothing. What is shown is the expanded source.
    """

    split: Callable[[str], tuple[Block, ...]]
    show: Callable[[str, str], Visible]
    comments: Callable[[str], tuple[Comment, ...]] = no_comments
    define: Callable[[str], Definitions] = no_definitions
    extract: Callable[[bytes], Extracted | Problem] | None = None
    table: Callable[[str], Table] | None = None
    expand: Callable[[str, Definitions], Visible] | None = None


@cache
def _reader(module: str) -> Reader:
    """Import a format's module when it is first needed."""
    reader: Reader = import_module(module).READER
    return reader


class Format(NamedTuple):
    """The declaration of a format.

    Attributes
    ----------
    name
        Its key in :data:`crossfoot.documents.FORMATS`.
    title
        What people call it.
    suffixes
        Of file names, in lower case, with the dot.
    comment_open, comment_close
        What stands before and after a comment on a line of its own; by these a remark is written.
    module
        The module whose ``READER`` reads it; imported when first needed, so that scanning one
        format costs nothing for the others.
    """

    name: str
    title: str
    suffixes: tuple[str, ...]
    comment_open: str
    comment_close: str
    module: str

    @property
    def reader(self) -> Reader:
        """The functions that read the format."""
        return _reader(self.module)

    def remark(self, words: str) -> str:
        """Write ``words`` as a comment of this format, on one line."""
        line = " ".join(words.split())
        if self.comment_close:
            line = line.replace(self.comment_close, "")
        return f"{self.comment_open} {line} {self.comment_close}".strip()
