"""Text for people: width, colour, what is listed when."""

import re

import pytest

from crossfoot.model import Remedy
from crossfoot.output.entry import place_words, remedy_words
from crossfoot.output.output import Look
from crossfoot.output.text import CAUTION, write
from crossfoot.output.wrapping import wrapped

ESCAPE = re.compile(r"\x1b\[[\d;]*m")


def written(*reports, **look):
    return "".join(write(reports, Look(**look)))


@pytest.mark.parametrize("width", [40, 60, 80, 110])
def test_no_line_is_wider_than_the_terminal(width, terraces, settled, paged):
    lines = written(terraces, settled, paged, width=width, explain=True).splitlines()
    heads = [line for line in lines if re.match(r"\d+\. ", line)]
    places = [line for line in lines if "See also" in line]
    assert all(len(line) <= width for line in lines if line not in heads + places)


def test_colour_is_never_the_only_sign(terraces, settled, paged):
    plain = written(terraces, settled, paged, explain=True)
    coloured = written(terraces, settled, paged, explain=True, colour=True)
    assert ESCAPE.sub("", coloured) == plain
    assert not ESCAPE.search(plain)
    assert coloured != plain


def test_every_colour_is_switched_off_again(terraces):
    for line in written(terraces, colour=True).splitlines():
        codes = ESCAPE.findall(line)
        assert not codes or codes[-1] in ("\x1b[0m", "\x1b[22m")


def test_settled_findings_are_counted_and_listed_only_with_the_working(settled):
    assert "1 is settled" in written(settled)
    assert "p-from-f" not in written(settled)
    assert "Settled: the table prints p of the corrected test" in written(settled, explain=True)


def test_working_is_written_out_only_when_asked_for(terraces):
    assert "e-Handbook" not in written(terraces)
    assert "e-Handbook" in written(terraces, explain=True)


def test_the_caution_stands_where_something_is_found(terraces):
    assert " ".join(written(terraces).split()).endswith(CAUTION)
    agreeing = terraces._replace(claims=terraces.claims[3:])
    assert "question" not in written(agreeing)


def test_a_remedy_keeps_the_relation_unless_it_brings_its_own(terraces):
    placed = terraces.claims[0]
    assert remedy_words(placed, Remedy(3, "p", ".018", "…")) == "p = .018"
    assert remedy_words(placed, Remedy(3, "p", "< .05", "…")) == "p < .05"
    assert remedy_words(placed, Remedy(4, "R2", ".132", "…")) == "R² = .132"


def test_a_remedy_in_a_table_names_its_row(terraces):
    placed = terraces.claims[0]
    claim = placed.audited.claim
    readings = tuple(reading._replace(term="Rain\x1b") for reading in claim.readings)
    in_table = placed._replace(
        audited=placed.audited._replace(claim=claim._replace(readings=readings))
    )
    assert remedy_words(in_table, Remedy(3, "p", ".018", "…")) == "p (Rain\\x1b) = .018"


def test_places_can_be_clicked_on(paged):
    finding = paged.claims[0].audited.findings[0]
    assert place_words(paged.document, finding.elsewhere[0]) == "scan.pdf:1:3 on page 1"
    notebook = paged.document._replace(language="notebook", path="a.ipynb")
    assert place_words(notebook, finding.elsewhere[0]) == "a.ipynb:1:3 in cell 1"


def test_no_word_is_cut_and_no_equation_parted():
    lines = wrapped(
        "a very long result of p = .05 and t(57) = 2.10 in x" + "y" * 30, 24, "  ", "    "
    )
    assert lines == [
        "  a very long result of",
        "    p = .05 and",
        "    t(57) = 2.10 in",
        "    x" + "y" * 30,
    ]
    assert wrapped("", 40) == []
