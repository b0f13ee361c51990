"""Records as rows of a frame."""

import math

import pytest

from crossfoot.output.frames import TABLES, frame_of
from crossfoot.output.records import document_record


def frame(name, *reports):
    return frame_of(TABLES, name, [document_record(report) for report in reports])


def test_a_row_a_finding(terraces, settled):
    rows = frame("findings", terraces, settled)
    assert list(rows["identity"]) == ["p-from-f", "p-from-t", "bounds", "p-from-f"]
    first = rows.iloc[0]
    assert first[["path", "line", "column", "literal"]].tolist() == [
        "drafts/terraces.txt",
        3,
        66,
        ".052",
    ]
    assert (first["low"], first["high"]) == (0.017952, 0.018105)
    assert first["remedy_reason"] == "the p of F(2, 57) = 4.31"
    assert rows["remedy_literal"].isna().tolist() == [False, False, True, True]
    assert math.isnan(rows["low"].iloc[2])
    assert rows["settled"].dropna().tolist() == ["the table prints p of the corrected test"]


def test_a_row_a_reading(terraces, paged):
    rows = frame("readings", terraces, paged)
    assert len(rows) == 5 + 4 + 2 + 1 + 2
    assert rows["quantity"].tolist()[:5] == ["df1", "df2", "F", "p", "R2"]
    assert rows["page"].isna().sum() == 12
    assert rows.iloc[-1]["low"] == -math.inf
    assert rows.iloc[-1]["page"] == 2


def test_a_row_a_check(terraces):
    rows = frame("checks", terraces)
    assert rows["outcome"].value_counts().to_dict() == {
        "not-applicable": 2,
        "agrees": 2,
        "conflict": 1,
        "doubt": 1,
    }


def test_an_interval_that_is_open_to_one_side(paged):
    row = frame("findings", paged).iloc[0]
    assert (row["low"], row["high"]) == (0.4, math.inf)


@pytest.mark.parametrize("name", TABLES)
def test_columns_and_their_types_are_there_without_any_row(name, terraces):
    empty, full = frame(name), frame(name, terraces)
    assert list(empty.columns) == list(full.columns) == list(TABLES[name].columns)
    assert empty.dtypes.tolist() == full.dtypes.tolist()
    assert len(empty) == 0


def test_a_kind_of_row_that_there_is_not():
    with pytest.raises(ValueError, match="rows is 'pages'; it can be one of findings, readings"):
        frame("pages")
