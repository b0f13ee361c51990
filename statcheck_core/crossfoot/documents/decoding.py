"""Bytes to text: byte order marks, declared and guessed encodings, what is no text at all."""

from __future__ import annotations

import codecs

from crossfoot.documents.format import Extracted
from crossfoot.expressions import expression
from crossfoot.model import Problem

#: Longest document that is read, in bytes; a manuscript is far below it.
MAX_BYTES = 64 * 1024 * 1024

_MARKS = (
    (codecs.BOM_UTF8, "utf-8"),
    (codecs.BOM_UTF32_LE, "utf-32-le"),
    (codecs.BOM_UTF32_BE, "utf-32-be"),
    (codecs.BOM_UTF16_LE, "utf-16-le"),
    (codecs.BOM_UTF16_BE, "utf-16-be"),
)

_DECLARED = expression(rb"(?:charset|encoding|coding)[ \t]*[=:][ \t]*[\"']?([A-Za-z0-9_-]{1,20})")

#: Encodings a document may declare for itself; each extends ASCII.
_KNOWN = expression(
    r"iso-?8859-?\d+|latin-?\d+|windows-?125\d|cp125\d|koi8-[ru]|mac-?roman"
    r"|shift_?jis|euc-?(?:jp|kr)|big5|gbk?|gb2312|gb18030"
)


def decode(data: bytes) -> Extracted | Problem:
    """Turn the bytes of a document into text.

    UTF-8 is expected. A byte order mark decides; else UTF-16 without a mark is recognised, then
    an encoding the document declares, then Windows-1252, the last two with a problem.
    """
    if len(data) > MAX_BYTES:
        return Problem(
            f"The document has {len(data):,} bytes; no more than {MAX_BYTES:,} are read."
        )
    for mark, encoding in _MARKS:
        if data.startswith(mark):
            return _strictly(data[len(mark) :], encoding)
    if b"\0" in data:
        guess = _wide(data)
        return _strictly(data, guess) if guess else Problem("The content is binary, not text.")
    try:
        return Extracted(data.decode("utf-8"))
    except UnicodeDecodeError as error:
        return _otherwise(data, error)


def _strictly(data: bytes, encoding: str) -> Extracted | Problem:
    """Decode after a byte order mark; damage becomes a problem and a replacement character."""
    try:
        text = data.decode(encoding)
    except UnicodeDecodeError as error:
        text = data.decode(encoding, "replace")
        problem = Problem(
            f"The document is not valid {encoding.upper()} from byte {error.start:,} on; "
            "what could not be decoded is left out."
        )
        return _unless_binary(text, (problem,))
    return _unless_binary(text, ())


def _unless_binary(text: str, problems: tuple[Problem, ...]) -> Extracted | Problem:
    if "\0" in text:
        return Problem("The content is binary, not text.")
    return Extracted(text, problems=problems)


def _wide(data: bytes) -> str | None:
    """Recognise UTF-16 without a mark by where its zero bytes stand."""
    sample = data[:4096]
    even, odd = sample[0::2].count(0), sample[1::2].count(0)
    half = len(sample) // 4
    if odd > half and not even:
        return "utf-16-le"
    if even > half and not odd:
        return "utf-16-be"
    return None


def _otherwise(data: bytes, error: UnicodeDecodeError) -> Extracted | Problem:
    """Decode what is not UTF-8."""
    at = f"The document is not valid UTF-8 (byte {error.start:,})"
    declared = _DECLARED.search(data[:2048])
    if declared:
        name = declared.group(1).decode("ascii").lower()
        if _KNOWN.fullmatch(name):
            try:
                return Extracted(
                    data.decode(name), problems=(Problem(f"{at}; it was read as {name}."),)
                )
            except (UnicodeDecodeError, LookupError):
                pass  # the declaration is wrong: go on to the fallback
    control = sum(data.count(byte) for byte in b"\x01\x02\x03\x04\x05\x06\x07\x0e\x0f\x10\x11")
    if control * 50 > len(data):
        return Problem("The content is binary, not text.")
    text = data.decode("cp1252", "replace")
    return Extracted(text, problems=(Problem(f"{at}; it was read as Windows-1252."),))
