"""From files to reports: what is wrong with a file is told, and the rest go on."""

import io

import pytest

from crossfoot.batch import files
from crossfoot.batch.files import read_bytes, scan_bytes, scan_file, scan_paths, unreadable
from crossfoot.batch.policy import Policy
from crossfoot.batch.progress import watched
from crossfoot.settings import Settings

QUIET = "The weather was fine.\n"


@pytest.fixture
def folder(tmp_path, monkeypatch):
    monkeypatch.chdir(tmp_path)
    (tmp_path / "a.md").write_text(QUIET)
    return tmp_path


def problems(*paths, **settings):
    reports = scan_paths(paths, Policy(Settings(**settings)))
    return {report.document.path: report.problem for report in reports}


def test_each_document_has_a_report(folder):
    (folder / "b.txt").write_text(QUIET)
    assert problems(".") == {"a.md": None, "b.txt": None}


def test_what_cannot_be_read_is_a_report_that_says_so(folder):
    (folder / "empty.md").write_bytes(b"")
    (folder / "binary.md").write_bytes(bytes(range(256)) * 4)
    (folder / "utf16.md").write_bytes(QUIET.encode("utf-16"))
    (folder / "latin.md").write_bytes("Ein Läufer.\n".encode("latin-1"))
    (folder / "cut.md").write_bytes("η²".encode()[:-1])
    found = problems("gone.md", ".")
    assert found["gone.md"] == "There is no such file or folder."
    assert found["binary.md"] == "The content is binary, not text."
    readable = {path for path, problem in found.items() if problem is None}
    assert readable == {"a.md", "empty.md", "utf16.md", "latin.md", "cut.md"}


def test_a_wrong_encoding_is_told_though_the_text_is_read(folder):
    (folder / "latin.md").write_bytes("Ein Läufer.\n".encode("latin-1"))
    report = scan_file("latin.md")
    assert "Läufer" in report.document.text
    assert "not valid UTF-8" in report.document.problems[0].message


def test_a_large_file_is_not_read(folder):
    assert problems("a.md", max_bytes=5) == {
        "a.md": "It is larger than 5 bytes, the most that is read."
    }
    assert problems("a.md", max_bytes=len(QUIET)) == {"a.md": None}


def test_a_folder_or_a_link_to_nowhere_is_no_file(folder):
    assert scan_file(".").problem == "It is a folder."
    assert scan_file("no\0name").problem == "It can't be read: embedded null byte."
    (folder / "link.md").symlink_to("nowhere.md")
    assert problems("link.md") == {"link.md": "It can't be read: no such file or directory."}


def test_a_file_that_may_not_be_read(folder, monkeypatch):
    def refused(path, mode):
        raise PermissionError(13, "Permission denied", path)

    # Tests may run as root, whom no permission stops; so the refusal is made here.
    monkeypatch.setattr(files, "open", refused, raising=False)
    assert read_bytes("a.md", 10) == "It can't be read: permission denied."


def test_an_error_without_words(monkeypatch):
    def refused(path, mode):
        raise OSError

    monkeypatch.setattr(files, "open", refused, raising=False)
    assert read_bytes("a.md", 10) == "It can't be read: oSError."


def test_standard_input(monkeypatch):
    monkeypatch.setattr("sys.stdin", io.TextIOWrapper(io.BytesIO(QUIET.encode())))
    report = scan_file("-", Settings(language="markdown"))
    assert (report.document.path, report.document.text) == ("-", QUIET)


def test_paths_that_lead_to_no_document_are_warned_of(folder):
    (folder / "empty").mkdir()
    warned = []
    reports = scan_paths(["empty", "a.md"], Policy(), warn=lambda *about: warned.append(about))
    assert [report.document.path for report in reports] == ["a.md"]
    assert warned == [("empty", "The folder holds no document that can be read.")]


def test_documents_are_read_as_they_are_asked_for(folder):
    reports = scan_paths(["a.md", "b.md"], Policy())
    next(reports)
    (folder / "b.md").write_text(QUIET)
    assert next(reports).document.path == "b.md"


def test_a_language_holds_for_every_document(folder):
    assert scan_file("a.md").document.language == "markdown"
    assert scan_file("a.md", Settings(language="plain")).document.language == "plain"


def test_a_fault_of_ours_costs_one_report(folder, monkeypatch):
    def broken(document, settings):
        raise ZeroDivisionError("by nought")

    monkeypatch.setattr("crossfoot.scan.scan_document", broken)
    assert scan_bytes("a.md", b"x").problem == (
        "Crossfoot itself failed on it (ZeroDivisionError: by nought)."
    )


class Terminal(io.StringIO):
    def isatty(self):
        return True


class TestProgress:
    @pytest.fixture
    def reports(self):
        return [unreadable(f"{number}.md", "gone") for number in range(5)]

    def test_nobody_watches_a_pipe(self, reports):
        stream = io.StringIO()
        assert list(watched(iter(reports), 5, stream, 0)) == reports
        assert stream.getvalue() == ""

    def test_a_short_run_shows_nothing(self, reports):
        stream = Terminal()
        assert list(watched(iter(reports), 5, stream)) == reports
        assert stream.getvalue() == ""

    def test_a_long_run_shows_a_bar_and_takes_it_away(self, reports):
        stream = Terminal()
        assert list(watched(iter(reports), 5, stream, 0)) == reports
        assert "5/5" in stream.getvalue()
        last = stream.getvalue().rpartition("\n")[2].split("\r")
        assert last[-1].strip() == ""

    def test_the_bar_is_off_the_screen_while_a_report_is_printed(self, reports):
        stream = Terminal()
        for _ in watched(iter(reports), 5, stream, 0):
            assert stream.getvalue().endswith("\r")

    def test_it_is_taken_away_when_the_run_is_cut_short(self, reports):
        stream = Terminal()
        passing = watched(iter(reports), 5, stream, 0)
        next(passing)
        next(passing)
        passing.close()
        assert stream.getvalue().endswith("\r")
