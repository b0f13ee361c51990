"""The library: what its functions return, and that its examples are true."""

import doctest
import importlib
import io
import json
import os

import pytest

import crossfoot
from crossfoot.cli import main

REVERSED = "The plans differed, *F*(2, 57) = 4.31, *p* = .052.\n"
FINE = "The plans differed, *F*(2, 57) = 4.31, *p* = .018.\n"

#: Modules with examples in their documentation.
DOCUMENTED = (
    "crossfoot",
    "crossfoot.api",
    "crossfoot.output.safe",
    "crossfoot.output.tally",
    "crossfoot.results",
)


@pytest.fixture
def folder(tmp_path, monkeypatch):
    monkeypatch.chdir(tmp_path)
    (tmp_path / "fine.md").write_text(FINE)
    (tmp_path / "reversed.md").write_text(REVERSED)
    (tmp_path / "empty").mkdir()
    return tmp_path


@pytest.mark.parametrize("name", DOCUMENTED)
def test_the_examples_are_true(name):
    result = doctest.testmod(importlib.import_module(name), optionflags=doctest.REPORT_NDIFF)
    assert result.failed == 0


def test_there_are_examples_for_every_function():
    for name in ("scan_text", "scan_file", "scan_paths", "derive"):
        assert ">>> " in getattr(crossfoot, name).__doc__


class TestNames:
    def test_what_is_public_is_there(self):
        for name in crossfoot.__all__:
            assert getattr(crossfoot, name) is not None
        assert dir(crossfoot) == sorted(crossfoot.__all__)

    def test_what_is_not_there_is_an_attribute_error(self):
        with pytest.raises(AttributeError, match="module 'crossfoot' has no attribute 'check'"):
            crossfoot.check  # noqa: B018 – that it raises is the point

    def test_every_public_object_is_documented(self):
        for name in crossfoot.__all__:
            if not name.startswith("__"):
                public = getattr(crossfoot, name)
                assert public.__doc__.strip()
                methods = [value for key, value in vars(public).items() if key[0] != "_"]
                assert all(method.__doc__ for method in methods if callable(method))


class TestScan:
    def test_a_text(self):
        scan = crossfoot.scan_text(REVERSED)
        assert [finding["literal"] for finding in scan.findings] == [".052"]
        assert scan.claims[0]["label"] == "F(2, 57)"
        assert scan.claims[0]["path"] == scan.findings[0]["path"] == "-"
        assert scan.reports[0].claims[0].audited.findings[0].severity == "reversal"

    def test_a_text_may_have_a_name_and_a_level(self):
        scan = crossfoot.scan_text(REVERSED, alpha=0.2, path="draft")
        assert scan.documents[0]["path"] == "draft"
        assert scan.findings[0]["severity"] == "conflict"

    def test_a_text_that_no_encoding_can_hold(self):
        scan = crossfoot.scan_text("\ud800 " + REVERSED)
        assert scan.findings[0]["where"]["start"] == {"line": 1, "column": 48}

    def test_a_language(self):
        latex = r"The plans differed, $F(2, 57) = 4.31$, $p = .052$."
        assert len(crossfoot.scan_text(latex, "latex").findings) == 1

    def test_a_file(self, folder):
        assert len(crossfoot.scan_file("reversed.md").findings) == 1
        assert len(crossfoot.scan_file(folder / "reversed.md").findings) == 1
        assert crossfoot.scan_file("fine.md", "plain").reports[0].document.language == "plain"

    def test_a_file_that_is_not_there_is_told_not_raised(self):
        (document,) = crossfoot.scan_file("gone.md").documents
        assert document["status"] == "unreadable"

    def test_paths(self, folder):
        scan = crossfoot.scan_paths([".", "gone.md", "empty"])
        assert [document["path"] for document in scan.documents] == [
            "fine.md",
            "reversed.md",
            "gone.md",
        ]
        assert [finding["path"] for finding in scan.findings] == ["reversed.md"]
        assert scan.warnings == ("empty: The folder holds no document that can be read.",)

    def test_one_path_needs_no_list(self, folder):
        assert len(crossfoot.scan_paths("fine.md").documents) == 1
        assert len(crossfoot.scan_paths(folder).documents) == 2

    def test_what_is_excluded(self, folder):
        assert len(crossfoot.scan_paths(folder, exclude=["rev*"]).documents) == 1

    def test_the_dictionary_is_what_the_command_writes(self, folder, monkeypatch):
        printed = io.StringIO()
        monkeypatch.setattr("sys.stdout", printed)
        main(["scan", ".", "--format", "json"])
        assert json.loads(printed.getvalue()) == crossfoot.scan_paths(".").to_dict()

    def test_printed_it_is_what_the_command_prints(self, folder, monkeypatch):
        monkeypatch.setenv("COLUMNS", "80")
        printed = io.StringIO()
        monkeypatch.setattr("sys.stdout", printed)
        main(["scan", ".", "--explain"])
        assert f"{crossfoot.scan_paths('.')}\n" == printed.getvalue()

    def test_it_shows_itself_by_its_counts(self, folder):
        assert repr(crossfoot.scan_paths([".", "gone.md"])) == (
            "<crossfoot.Scan: 2 documents read, 1 could not be read, 2 results found: "
            "1 agrees, 1 disagrees.>"
        )

    @pytest.mark.parametrize("level", [0, 1, -1, 7, "x"])
    def test_a_level_that_is_none(self, level):
        with pytest.raises(ValueError, match=r"alpha: .* is not a number between 0 and 1"):
            crossfoot.scan_text("", alpha=level)

    def test_a_format_that_is_none(self):
        for scan in (crossfoot.scan_text, crossfoot.scan_file, crossfoot.derive):
            with pytest.raises(ValueError, match="language: 'morse' is not a format"):
                scan("", "morse")

    def test_a_pattern_that_is_none(self):
        with pytest.raises(ValueError, match="exclude: "):
            crossfoot.scan_paths(os.curdir, exclude=["!"])


class TestFrames:
    def test_of_a_scan(self, folder):
        scan = crossfoot.scan_paths(".")
        assert scan.frame()["path"].tolist() == ["reversed.md"]
        assert scan.frame("readings").groupby("path").size().tolist() == [4, 4]
        assert set(scan.frame("checks")["outcome"]) >= {"agrees", "conflict"}
        with pytest.raises(ValueError, match="it can be one of findings, readings, checks"):
            scan.frame("pages")

    def test_of_a_derivation(self):
        derivation = crossfoot.derive("F(2, 57) = 4.31, n = 60")
        assert "p" in derivation.frame()["quantity"].tolist()
        assert derivation.frame("readings")["literal"].tolist() == ["2", "57", "4.31", "60"]
        assert len(derivation.frame("findings")) == 0
        with pytest.raises(ValueError, match="it can be one of derived, findings"):
            derivation.frame("pages")


class TestDerive:
    def test_what_follows(self):
        (result,) = crossfoot.derive("F(2, 57) = 4.31").results
        assert result["label"] == "F(2, 57)"
        (p,) = (item for item in result["derived"] if item["quantity"] == "p")
        # P(F(2, 57) > 4.31) = .018067… from memory of no table: (1 + 2·4.31/57)^(−57/2), which is
        # exact for df1 = 2 (Abramowitz and Stegun 1964, 26.6.4).
        assert p["low"] < (1 + 2 * 4.31 / 57) ** (-57 / 2) < p["high"]

    def test_what_contradicts_itself_is_a_finding_and_nothing_follows(self):
        derivation = crossfoot.derive("F(2, 57) = 4.31, p = .052")
        assert derivation.findings[0]["identity"] == "p-from-f"
        assert derivation.results[0]["derived"] == []
        assert repr(derivation) == "<crossfoot.Derivation: 0 quantities follow from 1 result>"

    def test_of_no_result_nothing_follows(self):
        derivation = crossfoot.derive("The weather was fine.")
        assert derivation.results == []
        assert derivation.to_dict()["results"] == []
        assert str(derivation).startswith("No result was recognised.")

    def test_printed_it_is_what_the_command_prints(self, monkeypatch, snapshot):
        monkeypatch.setenv("COLUMNS", "80")
        printed = io.StringIO()
        monkeypatch.setattr("sys.stdout", printed)
        main(["derive", "F(2, 57) = 4.31, n = 60; t(38) = 2.31"])
        derivation = crossfoot.derive("F(2, 57) = 4.31, n = 60; t(38) = 2.31")
        assert f"{derivation}\n" == printed.getvalue()
        assert str(derivation) == snapshot

    def test_the_dictionary_is_what_the_command_writes(self, monkeypatch):
        printed = io.StringIO()
        monkeypatch.setattr("sys.stdout", printed)
        main(["derive", "F(2, 57) = 4.31", "--format", "json"])
        assert json.loads(printed.getvalue()) == crossfoot.derive("F(2, 57) = 4.31").to_dict()
