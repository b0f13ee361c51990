"""Bytes to text: byte order marks, guesses, and what is refused."""

from __future__ import annotations

import codecs

import pytest

from crossfoot.documents import decoding, open_document, unreadable

TEXT = "η² = .14, p < .001 – “so”\n"


@pytest.mark.parametrize(
    ("mark", "encoding"),
    [
        (b"", "utf-8"),
        (codecs.BOM_UTF8, "utf-8"),
        (codecs.BOM_UTF16_LE, "utf-16-le"),
        (codecs.BOM_UTF16_BE, "utf-16-be"),
        (codecs.BOM_UTF32_LE, "utf-32-le"),
        (codecs.BOM_UTF32_BE, "utf-32-be"),
    ],
)
def test_a_byte_order_mark_decides_and_is_no_text(mark: bytes, encoding: str) -> None:
    document = open_document("x.md", mark + TEXT.encode(encoding))
    assert document.text == TEXT
    assert document.problems == ()


@pytest.mark.parametrize("encoding", ["utf-16-le", "utf-16-be"])
def test_wide_text_without_a_mark_is_recognised(encoding: str) -> None:
    plain = "The model fitted, F(1, 58) = 9.41.\n"
    assert open_document("x.txt", plain.encode(encoding)).text == plain


def test_what_is_not_utf_8_is_read_as_windows_1252_and_said_so() -> None:
    document = open_document("x.txt", "R² = .3 – “so”".encode("cp1252"))
    assert document.text == "R² = .3 – “so”"
    assert [problem.message for problem in document.problems] == [
        "The document is not valid UTF-8 (byte 1); it was read as Windows-1252."
    ]


@pytest.mark.parametrize(
    ("head", "encoding", "word"),
    [
        ('<?xml version="1.0" encoding="iso-8859-2"?>', "iso-8859-2", "dopasowanie łączne"),
        ('<meta charset="windows-1251">', "windows-1251", "модель"),
        ("% -*- coding: koi8-r -*-", "koi8-r", "модель"),
    ],
)
def test_a_declared_encoding_is_believed(head: str, encoding: str, word: str) -> None:
    document = open_document("x.txt", (head + word).encode(encoding))
    assert document.text == head + word
    assert len(document.problems) == 1


def test_a_declaration_that_is_wrong_is_not() -> None:
    data = b"coding: shift_jis \x81"
    assert open_document("x.txt", data).problems[0].message.endswith("read as Windows-1252.")


@pytest.mark.parametrize(
    ("data", "message"),
    [
        (b"PK\x03\x04\x00\x00\x00", "The content is binary, not text."),
        (bytes(range(256)) * 4, "The content is binary, not text."),
        (b"\xff\xfea\x00\x00\x00", "The content is binary, not text."),
        (b"\x80\x01\x02\x03\x04\x05\x06" * 9, "The content is binary, not text."),
    ],
)
def test_binary_content_is_refused(data: bytes, message: str) -> None:
    document = open_document("x.md", data)
    assert unreadable(document) == message
    assert document.blocks == ()


def test_a_truncated_wide_text_is_read_as_far_as_it_goes() -> None:
    document = open_document("x.md", (codecs.BOM_UTF16_LE + "p = .03".encode("utf-16-le"))[:-1])
    assert document.text.startswith("p = .0")
    assert "UTF-16-LE from byte 12 on" in document.problems[0].message
    assert unreadable(document) is None


def test_a_document_too_large_is_refused(monkeypatch: pytest.MonkeyPatch) -> None:
    monkeypatch.setattr(decoding, "MAX_BYTES", 10)
    assert unreadable(open_document("x.md", b"12345678901")) == (
        "The document has 11 bytes; no more than 10 are read."
    )


def test_nothing_is_a_document_too() -> None:
    document = open_document("x.md", b"")
    assert (document.text, document.blocks, unreadable(document)) == ("", (), None)


def test_an_unknown_language_is_a_problem() -> None:
    assert unreadable(open_document("x.md", b"a", "klingon")) == "Unknown format: klingon."
