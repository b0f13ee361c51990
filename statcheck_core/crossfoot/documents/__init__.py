"""Documents: bytes to text, text to blocks, blocks to what a reader sees of them.

Nothing here reads a file, and nothing raises on bad input: what cannot be read becomes a
:class:`~crossfoot.model.Problem`. A format is one module and one line in :data:`FORMATS`.
"""

from __future__ import annotations

from collections.abc import Mapping

from crossfoot.documents.captions import is_caption, together
from crossfoot.documents.decoding import decode
from crossfoot.documents.format import Comment, Definitions, Format, Reader
from crossfoot.documents.newlines import Places, feeds_only, joined_lines
from crossfoot.documents.table import Table, shown_table, surrounded
from crossfoot.documents.visible import Visible, compose
from crossfoot.model import Block, Document, Problem

_HERE = "crossfoot.documents."

_DECLARED = (
    Format(
        "markdown",
        "Markdown, Quarto, R Markdown",
        (".md", ".markdown", ".mdown", ".mkd", ".qmd", ".rmd"),
        "<!--",
        "-->",
        _HERE + "markdown",
    ),
    Format("latex", "LaTeX", (".tex", ".ltx", ".latex", ".rnw"), "%", "", _HERE + "latex"),
    Format("html", "HTML", (".html", ".htm", ".xhtml"), "<!--", "-->", _HERE + "html"),
    Format("jats", "JATS XML", (".xml", ".nxml", ".jats"), "<!--", "-->", _HERE + "jats"),
    Format("notebook", "Jupyter notebook", (".ipynb",), "<!--", "-->", _HERE + "notebook"),
    Format("rst", "reStructuredText", (".rst", ".rest"), "..", "", _HERE + "rst"),
    Format("org", "Org", (".org",), "#", "", _HERE + "org"),
    Format("typst", "Typst", (".typ",), "//", "", _HERE + "typst"),
    Format("asciidoc", "AsciiDoc", (".adoc", ".asciidoc", ".asc"), "//", "", _HERE + "asciidoc"),
    Format("plain", "plain text", (".txt", ".text", ".log", ".out"), "#", "", _HERE + "plain"),
)

#: Every format that is read, by its name.
FORMATS: Mapping[str, Format] = {declared.name: declared for declared in _DECLARED}

_BY_SUFFIX = {suffix: declared.name for declared in _DECLARED for suffix in declared.suffixes}


def language_of(path: str) -> str:
    """Return the name of the format that the suffix of ``path`` stands for, else ``plain``."""
    name = path.replace("\\", "/").rpartition("/")[2]
    stem, dot, suffix = name.rpartition(".")
    return _BY_SUFFIX.get(dot + suffix.lower(), "plain") if stem else "plain"


def open_document(path: str, data: bytes, language: str | None = None) -> Document:
    """Read a document from its bytes.

    Parameters
    ----------
    path
        Names the document and, by its suffix, the format; it is not opened.
    data
        The content.
    language
        Name of the format, where the suffix is not to decide.

    Returns
    -------
    Document
        Without blocks where it could not be read; :func:`unreadable` tells why.
    """
    name = language or language_of(path)
    if name not in FORMATS:
        return Document(path, name, "", (), problems=(Problem(f"Unknown format: {name}."),))
    reader = FORMATS[name].reader
    extracted = (reader.extract or decode)(data)
    if isinstance(extracted, Problem):
        return Document(path, name, "", (), problems=(extracted,))
    blocks = extracted.blocks
    return Document(
        path,
        name,
        extracted.text,
        split(name, extracted.text) if blocks is None else blocks,
        extracted.pages,
        reader.define(feeds_only(extracted.text)),
        extracted.problems,
    )


def unreadable(document: Document) -> str | None:
    """Return why nothing of the document could be read, or None if something could."""
    if document.text or not document.problems:
        return None
    return document.problems[0].message


def split(language: str, text: str) -> tuple[Block, ...]:
    """Split the text of a document into its blocks."""
    reader = FORMATS[language].reader
    if "\r" not in text:
        return together(reader.split(text), text)
    places = Places(text)
    plain = feeds_only(text)
    return tuple(places.block(block, text) for block in together(reader.split(plain), plain))


def show(language: str, kind: str, source: str, definitions: Definitions = ()) -> Visible:
    """Return what a reader sees of a block's source."""
    if kind == "table":
        return table(language, source, definitions).visible
    reader = FORMATS[language].reader
    first = _first(reader, source, () if kind == "verbatim" else definitions)
    if first is None:
        return reader.show(kind, source)
    return compose(first, reader.show(kind, first.text))


def table(language: str, source: str, definitions: Definitions = ()) -> Table:
    """Return the table that a block of kind ``table`` holds, with its caption and notes."""
    reader = FORMATS[language].reader
    first = _first(reader, source, definitions)
    if first is None:
        return _table(reader, source)
    found = _table(reader, first.text)
    return found._replace(visible=compose(first, found.visible))


def _first(reader: Reader, source: str, definitions: Definitions) -> Visible | None:
    """Return a source as a format's own functions want it, unless it is so already.

    Its lines end in a line feed alone, and what the document defines is put in.
    """
    lines = joined_lines(source) if "\r" in source else None
    if not definitions or reader.expand is None:
        return lines
    expanded = reader.expand(lines.text if lines else source, definitions)
    return compose(lines, expanded) if lines else expanded


def _table(reader: Reader, source: str) -> Table:
    """Read a table with the caption and the notes that stand around it."""
    parts = reader.split(source)
    tables = [number for number, part in enumerate(parts) if part.kind == "table"]
    if len(tables) != 1 or len(parts) == 1:
        return _plain_table(reader, source)
    number = tables[0]
    inner = parts[number]
    words = [
        (reader.show(part.kind, part.source), part.start) for part in parts if part is not inner
    ]
    found = surrounded(
        words[:number], _plain_table(reader, inner.source), inner.start, words[number:]
    )
    if found.caption is None and is_caption(parts[number + 1].source):
        return found._replace(caption=found.notes[0], notes=found.notes[1:])
    return found


def _plain_table(reader: Reader, source: str) -> Table:
    if reader.table is None:
        return shown_table(reader.show("table", source))
    return reader.table(source)


def show_block(document: Document, block: Block) -> Visible:
    """Return what a reader sees of a block of ``document``."""
    return show(document.language, block.kind, block.source, document.definitions)


def comments(language: str, text: str) -> tuple[Comment, ...]:
    """Return the comments of a text, in order."""
    reader = FORMATS[language].reader
    if "\r" not in text:
        return reader.comments(text)
    places = Places(text)
    return tuple(
        Comment(places.span(comment.span), comment.text)
        for comment in reader.comments(feeds_only(text))
    )


def remarks(language: str, text: str) -> tuple[Comment, ...]:
    """Return the comments that speak to Crossfoot."""
    if "crossfoot:" not in text:
        return ()
    return tuple(comment for comment in comments(language, text) if "crossfoot:" in comment.text)
