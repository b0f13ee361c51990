"""Which files a path leads to."""

import os
import subprocess
import sys

import pytest

from crossfoot.batch.policy import Policy
from crossfoot.batch.walk import Found, find
from crossfoot.settings import Settings

SUFFIXES = (".md", ".tex")


@pytest.fixture
def tree(tmp_path, monkeypatch):
    """Make the files named in a test, in a folder that is the current one."""
    monkeypatch.chdir(tmp_path)

    def make(*names, **contents):
        for name in names:
            path = tmp_path / name
            path.parent.mkdir(parents=True, exist_ok=True)
            path.write_text(contents.get(name, ""))
        return tmp_path

    return make


def names(*paths, exclude=()):
    """Return what is found, with forward slashes; problems in brackets."""
    found = find(paths or ["."], SUFFIXES, Policy(Settings(exclude=exclude)).rules)
    return [
        item.path.replace(os.sep, "/") + (f" [{item.problem}]" if item.problem else "")
        for item in found
    ]


def ignore(folder, *patterns):
    (folder / ".gitignore").write_text("\n".join(patterns))


def test_a_folder_gives_its_documents_by_name_then_those_of_its_subfolders(tree):
    tree("b.md", "a.tex", "z/y.md", "c/d/e.md", "c/a.md", "notes.odt", "UPPER.MD")
    assert names() == ["UPPER.MD", "a.tex", "b.md", "c/a.md", "c/d/e.md", "z/y.md"]


def test_a_path_is_shown_as_it_was_given(tree):
    root = tree("c/a.md", "b.md")
    assert names("c") == ["c/a.md"]
    assert names("c/") == ["c/a.md"]
    assert names("./c") == ["./c/a.md"]
    assert names(str(root / "c")) == [f"{root}/c/a.md".replace(os.sep, "/")]
    assert names("./b.md") == ["./b.md"]


@pytest.mark.parametrize(
    "name",
    [".git/a.md", ".hidden/a.md", ".a.md", "node_modules/x/a.md", "__pycache__/a.md", "~$a.md"],
)
def test_hidden_and_foreign_files_are_passed_over(tree, name):
    tree(name, "b.md")
    assert names() == ["b.md"]


def test_a_virtual_environment_is_told_by_what_is_in_it(tree):
    tree("env/pyvenv.cfg", "env/lib/a.md", "b.md")
    assert names() == ["b.md"]


def test_a_file_that_is_named_is_read_whatever_it_is(tree):
    root = tree(".hidden/a.md", "notes.odt", "kept.md")
    ignore(root, "kept.md")
    assert names(".hidden/a.md", "notes.odt", "kept.md") == [
        ".hidden/a.md",
        "notes.odt",
        "kept.md",
    ]
    assert names(".hidden") == [".hidden/a.md"]


def test_each_file_is_read_once(tree):
    root = tree("a.md", "c/b.md")
    assert names("a.md", ".", "c", str(root / "a.md"), "c/../a.md") == ["a.md", "c/b.md"]


def test_standard_input_is_no_file(tree):
    tree("a.md")
    assert names("-", "a.md", "-") == ["-", "a.md"]


def test_a_path_that_leads_nowhere_is_told_and_the_rest_go_on(tree):
    tree("a.md")
    assert names("gone.md", "a.md", "no\0name") == [
        "gone.md [There is no such file or folder.]",
        "a.md",
        "no\ufffdname [There is no such file or folder.]",
    ]


def test_a_folder_without_documents_is_told_but_is_no_document(tree):
    root = tree("empty/notes.odt")
    (item,) = find(["empty"], SUFFIXES)
    assert item == Found("empty", "The folder holds no document that can be read.", scanned=False)
    assert names(str(root / "empty" / "notes.odt"))


class TestGitignore:
    def test_what_it_leaves_out_is_not_read(self, tree):
        root = tree("a.md", "build/b.md", "drafts/old.md", "drafts/new.md")
        ignore(root, "build/", "old.md")
        assert names() == ["a.md", "drafts/new.md"]

    def test_an_inner_file_has_the_last_word(self, tree):
        root = tree("c/a.md", "c/b.md", "a.md")
        ignore(root, "*.md")
        ignore(root / "c", "!a.md")
        assert names() == ["c/a.md"]

    def test_patterns_hold_in_their_folder_only(self, tree):
        root = tree("c/a.md", "a.md")
        ignore(root / "c", "/a.md")
        assert names() == ["a.md"]

    def test_those_above_hold_within_a_repository(self, tree):
        root = tree(".git/info/exclude", "c/a.md", "c/b.md", "c/d.md")
        ignore(root, "/c/b.md")
        (root / ".git/info/exclude").write_text("d.md")
        assert names("c") == ["c/a.md"]

    def test_those_above_say_nothing_outside_a_repository(self, tree):
        root = tree("c/a.md", "c/b.md")
        ignore(root, "b.md")
        assert names("c") == ["c/a.md", "c/b.md"]

    def test_an_ignored_folder_that_is_named_is_searched(self, tree):
        root = tree(".git/HEAD", "build/out/a.md")
        ignore(root, "build/")
        assert names("build/out") == ["build/out/a.md"]

    def test_lines_that_are_no_pattern_are_passed_over(self, tree):
        root = tree("a.md", "b.md")
        (root / ".gitignore").write_bytes(b"!\n\xff\xfe\n/\n\\\n[z-a]\nb.md\n")
        assert names() == ["a.md"]

    def test_it_may_be_unreadable(self, tree):
        root = tree("a.md")
        (root / ".gitignore").mkdir()
        assert names() == ["a.md"]

    def test_the_library_is_imported_only_where_there_is_one(self, tree):
        root = tree("a.md")
        code = (
            "import sys; from crossfoot.batch.walk import find; find(['.'], ['.md']); "
            "print('pathspec' in sys.modules)"
        )
        run = [sys.executable, "-c", code]
        environ = {**os.environ, "PYTHONPATH": os.pathsep.join(sys.path)}
        assert subprocess.check_output(run, env=environ, text=True) == "False\n"
        ignore(root, "b.md")
        assert subprocess.check_output(run, env=environ, text=True) == "True\n"


class TestExclude:
    def test_it_holds_in_folders(self, tree):
        tree("a.md", "old/b.md", "c/old/d.md")
        assert names(exclude=["old/"]) == ["a.md"]

    def test_it_holds_for_paths_that_are_named(self, tree):
        tree("a.md", "old/b.md")
        problem = "[It is excluded by a pattern of the settings.]"
        assert names("old/b.md", "a.md", exclude=["old/"]) == [f"old/b.md {problem}", "a.md"]
        assert names("old", exclude=["old/"]) == [f"old {problem}"]

    def test_it_goes_before_a_gitignore(self, tree):
        root = tree("a.md", "b.md")
        ignore(root, "!a.md")
        assert names(exclude=["a.md"]) == ["b.md"]


@pytest.mark.skipif(sys.platform == "win32", reason="links need a privilege on Windows")
class TestLinks:
    def test_links_to_folders_are_not_followed_so_that_no_circle_is_endless(self, tree):
        root = tree("c/a.md")
        (root / "c" / "up").symlink_to(root, target_is_directory=True)
        (root / "c" / "self").symlink_to(root / "c" / "self")
        (root / "c" / "self.md").symlink_to(root / "c" / "self.md")
        assert names() == ["c/a.md"]

    def test_a_link_to_a_folder_that_is_named_is(self, tree):
        root = tree("c/a.md")
        (root / "link").symlink_to(root / "c", target_is_directory=True)
        assert names("link") == ["link/a.md"]

    def test_links_to_files_are_read_unless_the_file_is_too(self, tree):
        root = tree("c/a.md", "elsewhere/b.md")
        (root / "c" / "b.md").symlink_to(root / "elsewhere" / "b.md")
        (root / "c" / "z.md").symlink_to(root / "c" / "a.md")
        (root / "c" / "gone.md").symlink_to(root / "nowhere.md")
        assert names("c") == ["c/a.md", "c/b.md"]

    def test_a_broken_link_that_is_named_is_left_to_the_reader_of_files(self, tree):
        root = tree("a.md")
        (root / "gone.md").symlink_to(root / "nowhere.md")
        assert names("gone.md") == ["gone.md"]


def test_a_folder_that_cannot_be_listed_is_told(tree, monkeypatch):
    tree("a.md", "shut/b.md")
    real = os.scandir

    def scandir(path):
        if str(path).endswith("shut"):
            raise PermissionError(13, "Permission denied", path)
        return real(path)

    # Tests may run as root, whom no permission stops; so the refusal is made here.
    monkeypatch.setattr("crossfoot.batch.walk.os.scandir", scandir)
    assert names() == ["a.md", "shut [The folder can't be read: permission denied.]"]


def test_deep_folders_need_no_deep_recursion(tree, monkeypatch):
    root = tree("a.md")
    depth = 1200  # beyond the interpreter's recursion limit
    for _ in range(depth):
        os.mkdir("d")
        os.chdir("d")
    try:
        monkeypatch.chdir(root)
        assert names()[0] == "a.md"
    finally:
        os.chdir(root)
        for _ in range(depth):
            os.chdir("d")
        for _ in range(depth):  # shutil.rmtree, which pytest cleans up with, is recursive
            os.chdir("..")
            os.rmdir("d")
