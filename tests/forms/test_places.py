"""A reading's place in the source covers its literal, whatever markup stands in and around it."""

from __future__ import annotations

import html
import re
import unicodedata

import pytest

import crossfoot
from forms.corpus import Entry, entries

#: What is counted from, or said by, something else than a numeral of its own.
_DERIVED = frozenset({"ci_level", "k"})
_TAG = re.compile(r"<[^<>]*>|\\(?:num|SI|qty)(?:\[[^\[\]]*\])?")

#: What says a number without a digit: a macro or variable, marks of significance, words.
_WORDLESS = re.compile(r"[\\{}#|*†‡^<∞]|n\.?\s?s|NS|Inf")

MARKED_UP = [entry for entry in entries() if entry.format not in {"md", "txt"} and entry.claims]


def digits(text: str) -> str:
    """Return the digits of a text, those of other scripts and of indices as well."""
    return re.sub(r"[^0-9]", "", unicodedata.normalize("NFKC", text))


@pytest.mark.parametrize("entry", MARKED_UP, ids=lambda entry: entry.id)
def test_place(entry: Entry) -> None:
    report = crossfoot.scan_text(entry.text, entry.language).reports[0]
    text = report.document.text
    for placed in report.claims:
        for reading in placed.audited.claim.readings:
            start, end = (placed.base + offset for offset in reading.span)
            assert 0 <= start < end <= len(text)
            printed = digits(html.unescape(_TAG.sub("", text[start:end])))
            assert printed or _WORDLESS.match(text[start:end].strip()), text[start:end]
            if printed and reading.quantity not in _DERIVED:
                assert digits(reading.literal) in printed, (reading, text[start:end])
