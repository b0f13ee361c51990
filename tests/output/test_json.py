"""The JSON contract, to the letter."""

import json
import math

import pytest
from hypothesis import given
from hypothesis import strategies as st

from crossfoot.model import Document, Problem, Report
from crossfoot.output import OUTPUTS, Look
from crossfoot.output.records import SCHEMA, document_record, finite
from crossfoot.version import __version__

#: Every key there is, a level a line; lists are shown by what they hold.
WHERE = {
    "page": None,
    "start": {"line": 3, "column": 66},
    "end": {"line": 3, "column": 70},
}


def written(name, *reports):
    return "".join(OUTPUTS[name].write(reports, Look()))


@pytest.fixture
def scanned(terraces):
    return json.loads(written("json", terraces))


def test_the_whole(scanned):
    assert list(scanned) == ["crossfoot", "schema", "documents"]
    assert (scanned["crossfoot"], scanned["schema"], SCHEMA) == (__version__, 1, 1)


def test_a_document(scanned):
    (document,) = scanned["documents"]
    assert list(document) == ["path", "status", "problem", "claims", "findings"]
    assert document["path"] == "drafts/terraces.txt"
    assert (document["status"], document["problem"]) == ("read", None)


def test_a_claim(scanned):
    claim = scanned["documents"][0]["claims"][0]
    readings = claim.pop("readings")
    assert claim == {
        "id": "c1",
        "kind": "overall-model",
        "label": "F(2, 57)",
        "text": "2, 57) = 4.31, p = .052, R² = .131",
        "where": {
            "page": None,
            "start": {"line": 3, "column": 47},
            "end": {"line": 3, "column": 81},
        },
        "context": [],
        "checks": [
            {"identity": "p-from-f", "outcome": "conflict", "reason": ""},
            {"identity": "f-from-r2", "outcome": "agrees", "reason": ""},
            {
                "identity": "n-from-df",
                "outcome": "not-applicable",
                "reason": "no sample size is printed",
            },
        ],
    }
    assert readings[3] == {
        "quantity": "p",
        "term": None,
        "relation": "=",
        "literal": ".052",
        "low": 0.0515,
        "high": 0.0525,
        "where": WHERE,
    }


def test_a_finding(scanned):
    finding = scanned["documents"][0]["findings"][0]
    related = finding.pop("related")
    assert finding == {
        "identity": "p-from-f",
        "severity": "reversal",
        "claim": "c1",
        "message": "p is printed as .052, but F(2, 57) = 4.31 gives p between .0179 and .0182. "
        "Look at p, F or the degrees of freedom.",
        "where": WHERE,
        "quantity": "p",
        "literal": ".052",
        "recomputed": {"low": 0.017952, "high": 0.018105},
        "remedies": [
            {"quantity": "p", "literal": ".018", "reason": "the p of F(2, 57) = 4.31"},
            {"quantity": "F", "literal": "3.11", "reason": "two digits wrong"},
        ],
        "working": [
            "p = P(F(df1, df2) ≥ F)",
            "F from 4.305 to 4.315 gives p from .017952 to .018105",
            "source: NIST/SEMATECH e-Handbook 1.3.6.6",
        ],
        "settled": None,
    }
    assert [place["start"]["column"] for place in related] == [47, 50, 56]
    assert list(related[0]) == ["page", "start", "end"]


def test_what_is_not_there_is_null_and_an_infinite_bound_too(paged):
    (document,) = json.loads(written("json", paged))["documents"]
    assert document["findings"][0]["recomputed"] == {"low": 0.4, "high": None}
    assert document["claims"][0]["readings"][1]["low"] is None
    assert (finite(math.inf), finite(-math.inf), finite(math.nan), finite(0)) == (
        None,
        None,
        None,
        0,
    )


def test_pages_and_places_in_other_claims(paged):
    (finding,) = document_record(paged)["findings"]
    assert (finding["where"]["page"], finding["where"]["start"]["line"]) == (2, 3)
    assert [place["page"] for place in finding["related"]] == [1]


def test_a_reason_for_settling(settled):
    assert document_record(settled)["findings"][0]["settled"] == (
        "the table prints p of the corrected test"
    )


def test_a_document_that_could_not_be_read():
    report = Report(Document("gone.md", "", "", ()), (), "There is no such file or folder.")
    assert document_record(report) == {
        "path": "gone.md",
        "status": "unreadable",
        "problem": "There is no such file or folder.",
        "claims": [],
        "findings": [],
    }


def test_a_document_of_which_something_could_not_be_read():
    problems = (Problem("A picture has no text."), Problem("A table is cut off."))
    record = document_record(Report(Document("a.md", "plain", "x", (), problems=problems)))
    assert record["status"] == "read"
    assert record["problem"] == "A picture has no text. A table is cut off."


def test_lines_hold_the_same_objects(terraces, settled, paged):
    whole = json.loads(written("json", terraces, settled, paged))["documents"]
    lines = written("jsonl", terraces, settled, paged).splitlines()
    assert [json.loads(line) for line in lines] == whole


@given(st.text(st.characters()), st.text(st.characters()))
def test_any_path_and_any_words_make_one_line_of_ascii(path, words):
    report = Report(Document(path, "", "", ()), (), words or "x")
    (line,) = written("jsonl", report).split("\n")[:-1]
    assert line.isascii()
    assert json.loads(line)["path"] == path
