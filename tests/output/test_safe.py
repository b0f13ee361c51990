"""No character of a document may steer a terminal."""

import unicodedata

from hypothesis import given
from hypothesis import strategies as st

from crossfoot.output.safe import one_line, safe


@given(st.text(st.characters()))
def test_what_is_left_can_do_nothing(text):
    for sign in safe(text):
        assert unicodedata.category(sign) not in ("Cc", "Cs", "Zl", "Zp")
        assert (
            sign not in "\u202a\u202b\u202c\u202d\u202e\u2066\u2067\u2068\u2069\u200e\u200f\u061c"
        )
    assert len(one_line(text).splitlines()) <= 1


@given(st.text(st.characters(categories=["L", "N", "P", "S"])))
def test_words_and_signs_are_left_alone(text):
    assert safe(text) == text


def test_what_is_changed_can_be_seen():
    assert safe("a\x1b[31mb") == "a\\x1b[31mb"
    assert safe("\x9b1A") == "\\x9b1A"
    assert safe("abc\u202e.50") == "abc\\u202e.50"
    assert safe("\U000e0041") == "\\U000e0041"
    assert safe("caf\udce9") == "caf\\udce9"
    assert safe("two\nlines") == "two\\x0alines"


def test_blanks_are_one_space():
    assert one_line(" p \n\t=\r\n.05\u2028") == "p = .05"
    assert one_line("p\xa0=\xa0.05") == "p\xa0=\xa0.05"
