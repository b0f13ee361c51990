"""Tables from real fits, of every kind and in every format, are read, accepted and checked.

The whole proof is ``python -m tables.score --tables 20000``; these are the first of its tables.
"""

from __future__ import annotations

import pytest

from tables.printouts import WRITERS as PRINTOUTS
from tables.score import KINDS, Tally, run
from tables.writing import WRITERS

#: As many as a minute allows; each kind comes as often as the others.
TABLES = 75 * len(KINDS)
#: What must be read of the numbers of any one kind and in any one format.
READ = 0.98


@pytest.fixture(scope="module")
def tally() -> Tally:
    return run(range(TABLES))


def test_no_consistent_table_raises_an_alarm(tally: Tally) -> None:
    assert tally.alarms == ()


def test_numbers_are_read_in_every_kind_and_format(tally: Tally) -> None:
    parts = tally.by_kind | tally.by_writer
    assert len(tally.by_kind) == len(KINDS)
    assert len(tally.by_writer) == len(WRITERS) + len(PRINTOUTS)
    assert {name: part for name, part in parts.items() if part[0] < READ * part[1]} == {}
    assert tally.read >= 0.99 * tally.numbers
    assert tally.extra == 0


def test_gross_slips_are_found(tally: Tally) -> None:
    assert tally.slips > TABLES / 2
    assert tally.missed == ()
