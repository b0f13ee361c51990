"""What every format declares, and how a document finds its format."""

from __future__ import annotations

import subprocess
import sys

import pytest

from crossfoot import documents
from crossfoot.documents.format import Format


@pytest.mark.parametrize(
    ("path", "language"),
    [
        ("draft.md", "markdown"),
        ("/a.b/DRAFT.QMD", "markdown"),
        ("C:\\papers\\draft.Rmd", "markdown"),
        ("main.tex", "latex"),
        ("fit.Rnw", "latex"),
        ("a.xhtml", "html"),
        ("a.nxml", "jats"),
        ("a.ipynb", "notebook"),
        ("a.rst", "rst"),
        ("a.org", "org"),
        ("a.typ", "typst"),
        ("a.adoc", "asciidoc"),
        ("fit.log", "plain"),
        ("Makefile", "plain"),
        ("script.R", "plain"),
        (".md", "plain"),
        ("-", "plain"),
        ("a.md/notes", "plain"),
    ],
)
def test_the_suffix_tells_the_format(path: str, language: str) -> None:
    assert documents.language_of(path) == language


def test_no_two_formats_share_a_suffix() -> None:
    suffixes = [suffix for found in documents.FORMATS.values() for suffix in found.suffixes]
    assert len(suffixes) == len(set(suffixes))
    assert all(suffix == suffix.lower() and suffix[0] == "." for suffix in suffixes)


@pytest.mark.parametrize("declared", documents.FORMATS.values(), ids=lambda found: found.name)
def test_a_remark_that_is_written_is_found_again(declared: Format) -> None:
    words = "crossfoot: allow p-from-f because the journal rounds up"
    written = declared.remark(words)
    text = f"Before.\n\n{written}\n\nAfter.\n"
    [found] = documents.remarks(declared.name, text)
    assert found.text == words
    assert text[found.span.start : found.span.end].strip() == written
    assert documents.remarks(declared.name, "Before.\n\nAfter.\n") == ()


@pytest.mark.parametrize("declared", documents.FORMATS.values(), ids=lambda found: found.name)
def test_a_remark_stays_in_its_comment(declared: Format) -> None:
    written = declared.remark("crossfoot: allow all because a --> b\nF(1, 2) = 3")
    assert "\n" not in written
    if declared.comment_close:
        assert written.count(declared.comment_close) == 1


@pytest.mark.parametrize("declared", documents.FORMATS.values(), ids=lambda found: found.name)
def test_a_remark_is_no_part_of_what_a_reader_sees(declared: Format) -> None:
    if declared.name in ("plain", "notebook"):
        return  # plain text has no comments; a notebook's are those of its Markdown cells
    remark = declared.remark("crossfoot: allow all because x")
    tag = "<p>" if declared.comment_close and declared.name != "markdown" else ""
    text = f"{tag}Before.\n\n{remark}\n\n{tag}After.\n"
    document = documents.open_document("x", text.encode(), declared.name)
    shown = [documents.show_block(document, block).text.strip() for block in document.blocks]
    assert shown == ["Before.", "After."]


COMMENTS = {
    "markdown": ("a <!-- one --> b\n\n<!--\ntwo\n--> <!-- open", ["one", "two"]),
    "html": ("<p><!-- one --></p>", ["one"]),
    "latex": ("a % one\n5\\% b \\\\% two\n", ["one", "two"]),
    "rst": (".. one\n   two\n\n.. note:: no\n\n.. [1] no\n\n.. _no: x\n", ["one\n   two"]),
    "org": ("# one\n#+title: no\n  # two\n#no\n", ["one", "two"]),
    "typst": ('a // one\n/* two */ "// no" https://no', ["one", "two"]),
    "asciidoc": ("// one\n////\ntwo\n////\n/// no", ["one", "two"]),
    "plain": ("# crossfoot: allow all because x\n# no", ["crossfoot: allow all because x"]),
}


@pytest.mark.parametrize("language", COMMENTS)
def test_comments(language: str) -> None:
    text, expected = COMMENTS[language]
    assert [comment.text for comment in documents.comments(language, text)] == expected
    pairs = text.replace("\n", "\r\n")
    found = documents.comments(language, pairs)
    assert [comment.text for comment in found] == expected
    for comment in found:
        assert comment.text.split("\n")[0] in pairs[comment.span.start : comment.span.end]


def test_only_the_format_that_is_read_is_imported() -> None:
    code = (
        "import sys\n"
        "from crossfoot.documents import open_document, show_block\n"
        "document = open_document('a.md', b'*F*(1, 58) = 9.41, $p$ = .003')\n"
        "show_block(document, document.blocks[0])\n"
        "heavy = ['html.entities', 'json', 'numpy', 'regex', 'crossfoot.documents.latex',\n"
        "         'crossfoot.documents.html', 'crossfoot.documents.rst', 'dataclasses']\n"
        "sys.exit(str([name for name in heavy if name in sys.modules]))\n"
    )
    done = subprocess.run(
        [sys.executable, "-S", "-c", code],
        capture_output=True,
        text=True,
        check=False,
        env={"PYTHONPATH": ":".join(path for path in sys.path if path)},
    )
    assert done.stderr.strip() == "[]"
