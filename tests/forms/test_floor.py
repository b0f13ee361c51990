"""Floors under what is read of the labelled forms: a regression fails, and so does a stale miss."""

from __future__ import annotations

import json

import pytest

from forms.corpus import FILES, FOLDER, Entry, entries
from forms.scoring import outcome, outcomes, tally

#: Id of a form that is not read as a human reader would, and why.
KNOWN: dict[str, str] = json.loads((FOLDER / "known.json").read_text(encoding="utf-8"))


@pytest.mark.parametrize("file", FILES)
def test_claims_read_whole_and_planted_errors_found(file: str) -> None:
    sums = tally(o for o in outcomes() if o.entry.file == file)
    assert sums.wholes >= 0.99
    assert sums.catches >= 0.98


def test_no_false_alarm_on_what_can_be_true() -> None:
    assert {o.entry.id: o.alarms for o in outcomes() if o.alarms} == {}


def test_look_alikes_hold_no_result() -> None:
    sums = tally(o for o in outcomes() if o.entry.holds_nothing)
    assert sums.phantoms <= sums.lookalikes / 100


@pytest.mark.parametrize("entry", entries(), ids=lambda entry: entry.id)
def test_form(entry: Entry) -> None:
    """A form is read as labelled, or is a known miss; a known miss is one still."""
    assert outcome(entry).missed == (entry.id in KNOWN), KNOWN.get(entry.id)


def test_known_misses_name_forms() -> None:
    assert set(KNOWN) <= {entry.id for entry in entries()}


def test_the_corpus_is_as_broad_as_it_says() -> None:
    ids = [entry.id for entry in entries()]
    assert len(ids) == len(set(ids))
    assert len(entries()) >= 5_000
    assert sum(entry.holds_nothing for entry in entries()) >= 900
    assert sum(not entry.consistent for entry in entries()) >= 800
