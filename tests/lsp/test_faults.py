"""A fault of ours: written to the log, and it costs one document and no more."""

from __future__ import annotations

from pathlib import Path
from typing import NoReturn

import pytest

from crossfoot import scan
from crossfoot.settings import DEFAULTS
from crossfoot_lsp import closed
from crossfoot_lsp.client import Manner
from crossfoot_lsp.marks import Marker
from crossfoot_lsp.snapshot import Part, Snapshot
from crossfoot_lsp.text import Text


def fail(*arguments: object) -> NoReturn:
    raise ZeroDivisionError("as if")


def test_in_an_open_text(monkeypatch: pytest.MonkeyPatch, caplog: pytest.LogCaptureFixture) -> None:
    part = Part("file:///a.md", 1, Text("So F(2, 57) = 4.31, p = .052."))
    snapshot = Snapshot(part.uri, "/a.md", "markdown", [part], DEFAULTS)
    monkeypatch.setattr(scan, "scan_document", fail)
    report = snapshot.read(False)
    assert report is not None
    assert report.claims == ()
    found = Marker(None).written(snapshot, part, report, frozenset({"conflict"}), Manner())
    assert found == "[]"
    assert "/a.md could not be read" in caplog.text
    assert "ZeroDivisionError: as if" in caplog.text


def test_in_a_file(
    tmp_path: Path, monkeypatch: pytest.MonkeyPatch, caplog: pytest.LogCaptureFixture
) -> None:
    file = tmp_path / "a.md"
    file.write_text("So F(2, 57) = 4.31, p = .052.")
    files = closed.ClosedFiles()
    with monkeypatch.context() as patched:
        patched.setattr(closed, "scan_document", fail)
        assert files.read(str(file), DEFAULTS, "utf-16", Manner()) is None
    assert f"{file} could not be read" in caplog.text
    entry = files.read(str(file), DEFAULTS, "utf-16", Manner())
    assert entry is not None
    assert [severity for severity, _ in entry.marks] == ["reversal"]
