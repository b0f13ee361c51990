"""The settings of a project, and where they are found."""

from pathlib import Path

import pytest

from crossfoot.project import NO_PROJECT, parse, project_in, project_of
from crossfoot.settings import Settings


def test_the_nearest_file_upwards_counts(tmp_path: Path) -> None:
    inner = tmp_path / "thesis" / "chapters"
    inner.mkdir(parents=True)
    (tmp_path / "crossfoot.toml").write_text("alpha = 0.01")
    (tmp_path / "thesis" / "crossfoot.toml").write_text('alpha = ".1"\nfail-on = "doubt"')
    project = project_of(str(inner / "one.md"))
    assert project.path == str(tmp_path / "thesis" / "crossfoot.toml")
    assert project.folder == str(tmp_path / "thesis")
    assert project.settings == Settings(alpha=0.1, fail_on="doubt")
    assert project.problems == ()


def test_a_folder_is_looked_into(tmp_path: Path) -> None:
    (tmp_path / "crossfoot.toml").write_text("alpha = 0.01")
    assert project_of(str(tmp_path)).settings.alpha == 0.01


def test_a_table_of_pyproject_counts_and_its_absence_does_not(tmp_path: Path) -> None:
    inner = tmp_path / "report"
    inner.mkdir()
    (tmp_path / "pyproject.toml").write_text('[tool.crossfoot]\nexclude = ["old/"]')
    (inner / "pyproject.toml").write_text('[project]\nname = "report"')
    project = project_of(str(inner / "one.md"))
    assert project.path == str(tmp_path / "pyproject.toml")
    assert project.settings.exclude == ("old/",)
    assert project_in(str(inner / "pyproject.toml")) is None


def test_in_one_folder_our_own_file_goes_first(tmp_path: Path) -> None:
    (tmp_path / "crossfoot.toml").write_text("alpha = 0.01")
    (tmp_path / "pyproject.toml").write_text("[tool.crossfoot]\nalpha = 0.1")
    assert project_of(str(tmp_path / "one.md")).settings.alpha == 0.01


def test_an_empty_file_of_ours_still_ends_the_search(tmp_path: Path) -> None:
    inner = tmp_path / "report"
    inner.mkdir()
    (tmp_path / "crossfoot.toml").write_text("alpha = 0.01")
    (inner / "crossfoot.toml").write_text("")
    project = project_of(str(inner))
    assert (project.path, project.settings) == (str(inner / "crossfoot.toml"), Settings())


def test_without_a_file_the_defaults_hold() -> None:
    assert project_of("/no such folder/one.md") == NO_PROJECT
    assert NO_PROJECT.folder is None


@pytest.mark.parametrize(
    ("content", "problem"),
    [
        (b"alpha = 2", "alpha: 2 is not a number between 0 and 1, such as .05"),
        (b"alfa = 0.05", "there is no setting 'alfa'; perhaps 'alpha' is meant"),
        (b"alpha = = 2", "it is not valid TOML: Invalid value (at line 1, column 9)"),
        (b"\xff", "it is not valid TOML: byte 0 is not UTF-8"),
    ],
)
def test_what_is_wrong_is_said_and_the_rest_holds(content: bytes, problem: str) -> None:
    project = parse("crossfoot.toml", content)
    assert project is not None
    assert project.problems == (problem,)
    assert project.settings == Settings()


def test_a_good_value_beside_a_bad_one_holds() -> None:
    project = parse("crossfoot.toml", b"alpha = 0.01\nfail_on = 'always'")
    assert project is not None
    assert project.settings.alpha == 0.01
    assert len(project.problems) == 1


def test_a_table_that_is_none_is_a_problem() -> None:
    project = parse("pyproject.toml", b"[tool]\ncrossfoot = 3 # tool.crossfoot")
    assert project is not None
    assert project.problems == ("tool.crossfoot is not a table",)
    assert parse("pyproject.toml", b"tool = 3 # tool.crossfoot") is None


def test_nesting_without_end_is_a_problem() -> None:
    project = parse("crossfoot.toml", b"a = " + b"[" * 100_000)
    assert project is not None
    assert project.problems[0].startswith("it is not valid TOML: ")


def test_a_file_that_cannot_be_read_is_a_problem(
    tmp_path: Path, monkeypatch: pytest.MonkeyPatch
) -> None:
    (tmp_path / "crossfoot.toml").write_text("")

    def refuse(*args: object) -> None:
        raise PermissionError(13, "Permission denied")

    monkeypatch.setattr("builtins.open", refuse)
    project = project_in(str(tmp_path / "crossfoot.toml"))
    assert project is not None
    assert project.problems == ("it can't be read: permission denied",)
