"""Every output, as it stands, on the same reports."""

import subprocess
import sys

import pytest

from crossfoot.model import Document, Report
from crossfoot.output import OUTPUTS, Look

UNREADABLE = Report(Document("gone.docx", "", "", ()), (), "There is no such file or folder.")


@pytest.fixture
def reports(terraces, settled, paged, hostile):
    return [terraces, settled, UNREADABLE, paged, hostile]


#: The outputs that people read; all others are the same however they are looked at.
FOR_PEOPLE = {"text"}


@pytest.mark.parametrize("name", OUTPUTS)
def test_it_reads_as_it_did(name, reports, snapshot):
    written = "".join(OUTPUTS[name].write(reports, Look()))
    # An object a line, so that a change of the snapshot can be read.
    assert written.replace('{"', '\n{"') == snapshot


@pytest.mark.parametrize("name", OUTPUTS)
def test_it_reads_as_it_did_with_the_working(name, reports, snapshot):
    brief = "".join(OUTPUTS[name].write(reports, Look()))
    explained = "".join(OUTPUTS[name].write(reports, Look(60, colour=True, explain=True)))
    if name in FOR_PEOPLE:
        assert explained.replace("\x1b", "␛") == snapshot
    else:
        assert explained == brief


@pytest.mark.parametrize("name", OUTPUTS)
def test_nothing_scanned_is_something_to_write_too(name, snapshot):
    assert "".join(OUTPUTS[name].write([], Look())) == snapshot


@pytest.mark.parametrize("name", OUTPUTS)
def test_it_is_registered_under_its_own_name(name):
    assert OUTPUTS[name].name == name
    assert OUTPUTS[name].title


@pytest.mark.parametrize("name", OUTPUTS)
def test_no_character_of_a_document_reaches_the_terminal_as_a_command(name, hostile):
    written = "".join(OUTPUTS[name].write([hostile], Look(explain=True)))
    assert "owned" in written
    assert [sign for sign in written if sign != "\n" and not sign.isprintable()] == []


@pytest.mark.parametrize("name", OUTPUTS)
def test_a_report_is_written_before_the_next_is_asked_for(name, terraces, settled):
    asked = []

    def reports():
        for report in (terraces, settled):
            asked.append(report.document.path)
            yield report

    pieces = OUTPUTS[name].write(reports(), Look())
    while "terraces" not in next(pieces):
        pass
    assert asked == ["drafts/terraces.txt"]


def test_an_output_is_imported_when_it_is_asked_for():
    code = (
        "import sys; from crossfoot.output import OUTPUTS; list(OUTPUTS); len(OUTPUTS); "
        "print('json' in sys.modules); OUTPUTS['json']; print('json' in sys.modules)"
    )
    path = f"import sys; sys.path[:0] = {sys.path!r}; "
    assert subprocess.check_output([sys.executable, "-c", path + code], text=True) == (
        "False\nTrue\n"
    )


def test_an_output_that_is_none_is_a_key_error():
    with pytest.raises(KeyError):
        OUTPUTS["carrier pigeon"]
    assert "carrier pigeon" not in OUTPUTS
