"""Which format a text of the editor is in: by the editor's name for it, else by the file's."""

from __future__ import annotations

from collections.abc import Mapping

from crossfoot.documents import FORMATS, language_of

#: The format of notebooks, which an editor sends as their cells.
NOTEBOOK = "notebook"

#: The editors' names of languages, beside those that the formats have themselves.
LANGUAGE_IDS: Mapping[str, str] = {
    "quarto": "markdown",
    "rmd": "markdown",
    "rmarkdown": "markdown",
    "r-markdown": "markdown",
    "mdx": "markdown",
    "myst": "markdown",
    "pandoc": "markdown",
    "tex": "latex",
    "plaintex": "latex",
    "context": "latex",
    "rnoweb": "latex",
    "sweave": "latex",
    "xhtml": "html",
    "htm": "html",
    "xml": "jats",
    "restructuredtext": "rst",
    "text": "plain",
    "plaintext": "plain",
    "txt": "plain",
}


def format_of(language_id: str, path: str, told: str | None = None) -> str:
    """Return the name of a format.

    Parameters
    ----------
    language_id
        The editor's name for the language; it may have none.
    path
        The file's path.
    told
        The format that the settings want for every document.
    """
    name = language_id.lower()
    if told is not None:
        return told
    if name in FORMATS and name not in ("plain", NOTEBOOK):
        return name
    found = LANGUAGE_IDS.get(name, "plain")
    # An editor calls plain text what it does not know; then the file's name says more.
    return language_of(path) if found == "plain" else found


def is_text(language: str) -> bool:
    """Say whether a format is read from the text itself, so that places in it can be shown."""
    return FORMATS[language].reader.extract is None
