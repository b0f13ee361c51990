"""The invented manuscripts of corpora_demo, scored against their answer key."""

from __future__ import annotations

import json
import subprocess
import sys
from pathlib import Path
from typing import Any

import pytest

from crossfoot import scan_file
from crossfoot.documents import FORMATS
from crossfoot.model import SEVERITIES

DEMO = Path(__file__).resolve().parents[2] / "corpora_demo"
KEY: dict[str, Any] = json.loads((DEMO / "key.json").read_text(encoding="utf-8"))
DOCUMENTS: list[dict[str, Any]] = KEY["documents"]
ALARMS = ("reversal", "conflict")


def scanned(path: str) -> dict[str, Any]:
    found: dict[str, Any] = dict(scan_file(DEMO / path).documents[0])
    assert (found["status"], found["problem"]) == ("read", None)
    return found


def lines(finding: dict[str, Any]) -> set[tuple[int | None, int]]:
    """The pages and lines that a finding points at, first and foremost or besides."""
    places = [finding["where"], *finding["related"]]
    return {
        (place["page"], line)
        for place in places
        for line in range(place["start"]["line"], place["end"]["line"] + 1)
    }


def reports(finding: dict[str, Any], error: dict[str, Any]) -> bool:
    """Whether a finding is about this error: at its line, by one of its identities."""
    place = (error["page"], error["line"])
    return place in lines(finding) and finding["identity"] in error["identities"]


@pytest.mark.parametrize("document", DOCUMENTS, ids=lambda document: document["path"])
def test_every_error_is_found(document: dict[str, Any]) -> None:
    findings = scanned(document["path"])["findings"]
    for error in document["errors"]:
        ranks = [SEVERITIES.index(f["severity"]) for f in findings if reports(f, error)]
        assert ranks, f"not found: {error}"
        assert min(ranks) <= SEVERITIES.index(error["severity"])


@pytest.mark.parametrize("document", DOCUMENTS, ids=lambda document: document["path"])
def test_nothing_else_is_alarming(document: dict[str, Any]) -> None:
    wrong = {(error["page"], error["line"]) for error in document["errors"]}
    others = [
        f"line {finding['where']['start']['line']}: {finding['identity']}: {finding['message']}"
        for finding in scanned(document["path"])["findings"]
        if finding["severity"] in ALARMS and not lines(finding) & wrong
    ]
    assert others == []


@pytest.mark.parametrize("document", DOCUMENTS, ids=lambda document: document["path"])
def test_results_are_read(document: dict[str, Any]) -> None:
    """All but the page of look-alikes report something."""
    assert bool(scanned(document["path"])["claims"]) == (document["path"] != "path-codes.md")


@pytest.mark.parametrize("document", DOCUMENTS, ids=lambda document: document["path"])
def test_the_key_points_at_what_is_printed(document: dict[str, Any]) -> None:
    text = (DEMO / document["path"]).read_text(encoding="utf-8")
    for error in document["errors"]:
        printed = text.split("\n")
        if error["page"] is not None:
            printed = json.loads(text)["cells"][error["page"] - 1]["source"]
        assert error["printed"] in printed[error["line"] - 1]
        assert error["printed"] != error["true"]


def test_the_key_knows_every_manuscript() -> None:
    names = {path.name for path in DEMO.iterdir() if path.is_file()}
    manuscripts = names - {"README.md", "key.json", "make.py"}
    assert manuscripts == {document["path"] for document in DOCUMENTS}


def test_every_format_of_a_manuscript_is_read() -> None:
    read = {suffix for declared in FORMATS.values() for suffix in declared.suffixes}
    assert {Path(document["path"]).suffix.lower() for document in DOCUMENTS} <= read


def test_the_readme_holds_no_result() -> None:
    assert scanned("README.md")["claims"] == []


def test_the_files_are_as_the_script_writes_them() -> None:
    done = subprocess.run(
        [sys.executable, str(DEMO / "make.py"), "--check"],
        capture_output=True,
        text=True,
        check=False,
    )
    assert (done.returncode, done.stderr) == (0, "")
