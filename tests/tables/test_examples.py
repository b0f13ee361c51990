"""Hand-written tables in the manner of published ones, with their quirks."""

from __future__ import annotations

import pytest

from crossfoot import scan_text
from tables.examples_io import Example, examples, read_line, said_line

EXAMPLES = examples()


@pytest.mark.parametrize("example", EXAMPLES, ids=lambda example: example.name)
def test_a_table_is_read_and_checked(example: Example) -> None:
    claims = [p.audited for p in scan_text(example.text, example.language).reports[0].claims]
    assert tuple(read_line(one.claim) for one in claims) == example.read
    findings = [(one.claim, finding) for one in claims for finding in one.findings]
    assert tuple(said_line(*each) for each in findings) == example.said


@pytest.mark.parametrize(
    "example", [example for example in EXAMPLES if example.said], ids=lambda example: example.name
)
def test_a_finding_points_at_its_cell_and_names_its_row(example: Example) -> None:
    for placed in scan_text(example.text, example.language).reports[0].claims:
        claim = placed.audited.claim
        for finding in placed.audited.findings:
            reading = claim.readings[finding.reading]
            start, end = (placed.base + place for place in reading.span)
            marks = (reading.term or "").endswith("stars")
            assert example.text[start:end].strip("*") == ("" if marks else reading.literal)
            assert finding.message.startswith(f"{claim.row}: ") or not claim.row
            assert finding.related or finding.severity == "note" or finding.identity == "bounds"


def test_tables_of_every_format_are_tried() -> None:
    languages = {example.language for example in EXAMPLES}
    assert languages >= {
        "markdown", "latex", "html", "jats", "rst", "org", "asciidoc", "typst", "plain",
    }  # fmt: skip
    assert sum(not example.read for example in EXAMPLES) >= 15  # what is no statistical table
