"""The command: what it prints where, and the status it ends with."""

import contextlib
import io
import json
import os
import signal
import subprocess
import sys
import time

import pytest

from crossfoot.cli import main
from crossfoot.cli.parser import COMMANDS, command
from crossfoot.cli.streams import Destination, colours, columns
from crossfoot.version import __version__

QUIET = "The weather was fine.\n"
REVERSED = "The plans differed, *F*(2, 57) = 4.31, *p* = .052.\n"
FINE = "The plans differed, *F*(2, 57) = 4.31, *p* = .018.\n"

#: The code as a user runs it, whether it is installed or not.
ENVIRON = {**os.environ, "PYTHONPATH": os.pathsep.join(filter(None, sys.path))}
COMMAND = [sys.executable, "-m", "crossfoot"]


@pytest.fixture(autouse=True)
def _plain_terminal(monkeypatch):
    monkeypatch.setenv("COLUMNS", "80")
    for name in ("NO_COLOR", "FORCE_COLOR"):
        monkeypatch.delenv(name, raising=False)


@pytest.fixture
def folder(tmp_path, monkeypatch):
    """A folder, the current one, with a manuscript of each sort."""
    monkeypatch.chdir(tmp_path)
    for name, text in {"quiet.md": QUIET, "reversed.md": REVERSED, "fine.md": FINE}.items():
        (tmp_path / name).write_text(text)
    return tmp_path


@pytest.fixture
def run(capsys):
    """Run the command; return its status, output and errors."""

    def typed(*argv):
        status = main(argv)
        out, err = capsys.readouterr()
        return status, out, err

    return typed


def process(*argv, **more):
    more = {"env": ENVIRON, "capture_output": True, "text": True, "timeout": 60, **more}
    return subprocess.run([*COMMAND, *argv], check=False, **more)


class TestScan:
    def test_a_document_without_results(self, folder, run):
        assert run("scan", "quiet.md") == (0, "1 document read, no reported result found.\n", "")

    def test_a_document_in_which_all_agrees(self, folder, run):
        assert run("scan", "fine.md") == (0, "1 document read, 1 result found: 1 agrees.\n", "")

    def test_a_disagreement(self, folder, run, snapshot):
        status, out, err = run("scan", "reversed.md")
        assert (status, err) == (1, "")
        assert out == snapshot

    def test_the_working(self, folder, run, snapshot):
        assert run("scan", "reversed.md", "--explain")[1] == snapshot

    def test_a_folder(self, folder, run):
        status, out, _ = run("scan", ".")
        assert status == 1
        assert "1. reversed.md:1:46: reversal (p-from-f)\n" in out
        assert "3 documents read, 2 results found: 1 agrees, 1 disagrees." in out

    @pytest.mark.parametrize(
        ("fail_on", "status"),
        [("reversal", 1), ("conflict", 1), ("doubt", 1), ("note", 1), ("never", 0)],
    )
    def test_what_fails(self, folder, run, fail_on, status):
        assert run("scan", "reversed.md", "--fail-on", fail_on)[0] == status

    def test_another_level_makes_it_a_conflict(self, folder, run):
        assert "conflict (p-from-f)" in run("scan", "reversed.md", "--alpha", ".2")[1]
        assert run("scan", "reversed.md", "--alpha", ".2", "--fail-on", "reversal")[0] == 0

    def test_json(self, folder, run):
        status, out, _ = run("scan", ".", "-f", "json")
        documents = json.loads(out)["documents"]
        assert status == 1
        assert [document["path"] for document in documents] == [
            "fine.md",
            "quiet.md",
            "reversed.md",
        ]
        assert documents[2]["findings"][0]["identity"] == "p-from-f"

    def test_json_lines(self, folder, run):
        lines = run("scan", ".", "--format", "jsonl")[1].splitlines()
        assert [json.loads(line)["path"] for line in lines] == [
            "fine.md",
            "quiet.md",
            "reversed.md",
        ]

    def test_standard_input(self, folder, run, monkeypatch):
        monkeypatch.setattr("sys.stdin", io.TextIOWrapper(io.BytesIO(REVERSED.encode())))
        status, out, _ = run("scan", "-", "--language", "markdown")
        assert status == 1
        assert out.startswith("1. -:1:46: reversal (p-from-f)\n")

    def test_what_is_excluded(self, folder, run):
        status, out, _ = run("scan", ".", "--exclude", "rev*", "--exclude", "quiet.md")
        assert (status, out) == (0, "1 document read, 1 result found: 1 agrees.\n")


class TestWhatCannotBeRead:
    def test_a_file_that_is_not_there(self, folder, run):
        status, out, err = run("scan", "gone.md", "fine.md")
        assert status == 0
        assert err == "crossfoot: gone.md: There is no such file or folder.\n"
        assert out == "1 document read, 1 could not be read, 1 result found: 1 agrees.\n"

    def test_in_json_it_is_a_document_with_a_problem(self, folder, run):
        _, out, _ = run("scan", "gone.md", "fine.md", "-f", "json")
        gone, fine = json.loads(out)["documents"]
        assert (gone["path"], gone["status"]) == ("gone.md", "unreadable")
        assert gone["problem"] == "There is no such file or folder."
        assert (fine["status"], fine["problem"]) == ("read", None)

    def test_if_nothing_could_be_read_that_is_a_failure(self, folder, run):
        status, _, err = run("scan", "gone.md")
        assert status == 2
        assert err == (
            "crossfoot: gone.md: There is no such file or folder.\n"
            "crossfoot: Nothing was scanned.\n"
        )

    def test_a_folder_without_documents(self, folder, run):
        (folder / "empty").mkdir()
        status, out, err = run("scan", "empty")
        assert (status, out) == (2, "0 documents read, no reported result found.\n")
        assert err == (
            "crossfoot: empty: The folder holds no document that can be read.\n"
            "crossfoot: Nothing was scanned.\n"
        )
        assert run("scan", "empty", "fine.md")[0] == 0

    def test_binary_and_empty_and_cut_off(self, folder, run):
        (folder / "binary.md").write_bytes(bytes(range(256)) * 4)
        (folder / "empty.md").write_bytes(b"")
        (folder / "cut.md").write_bytes((FINE + "η²").encode()[:-1])
        status, out, err = run("scan", "binary.md", "empty.md", "cut.md")
        assert status == 0
        assert "crossfoot: binary.md: The content is binary, not text.\n" in err
        assert "crossfoot: cut.md: The document is not valid UTF-8" in err
        assert "empty.md" not in err
        assert out == "2 documents read, 1 could not be read, 1 result found: 1 agrees.\n"

    def test_a_wrong_encoding_is_told_and_read(self, folder, run):
        (folder / "latin.md").write_bytes(("Größe. " + REVERSED).encode("latin-1"))
        status, out, err = run("scan", "latin.md")
        assert status == 1
        assert "latin.md:1:53" in out
        assert "latin.md: The document is not valid UTF-8" in err

    def test_a_remark_that_cannot_be_understood_is_told_with_its_place(self, folder, run):
        (folder / "odd.md").write_text(f"{FINE}\n<!-- crossfoot: allow p-from-f -->\n")
        _, _, err = run("scan", "odd.md")
        assert err.startswith("crossfoot: odd.md:3:1: ")

    def test_a_path_cannot_steer_the_terminal(self, folder, run):
        _, _, err = run("scan", "\x1b[2J.md", "fine.md")
        assert err == "crossfoot: \\x1b[2J.md: There is no such file or folder.\n"


class TestUsage:
    @pytest.mark.parametrize(
        ("argv", "words"),
        [
            ((), "required: COMMAND"),
            (("scna",), "invalid choice: 'scna'"),
            (("scan",), "required: PATH"),
            (("scan", "a.md", "--fromat", "json"), "there is no such option or argument: --fromat"),
            (("scan", "a.md", "--format", "jsno"), "invalid choice: 'jsno'"),
            (("scan", "a.md", "--alpha"), "expected one argument"),
            (("scan", "a.md", "--alpha", "5"), "--alpha: '5' is not a number between 0 and 1"),
            (("scan", "a.md", "--alpha", "x"), "--alpha: 'x' is not a number between 0 and 1"),
            (("scan", "a.md", "--fail-on", "warning"), "--fail-on: 'warning' is not a severity"),
            (("scan", "a.md", "--language", "mrkdwn"), "--language: 'mrkdwn' is not a format"),
            (("scan", "a.md", "--exclude", "!"), "--exclude: ['!'] is not a list of patterns"),
            (("identities", "a", "b"), "there is no such option or argument: b"),
        ],
    )
    def test_what_is_wrong_is_said_and_the_status_is_two(self, run, argv, words):
        status, out, err = run(*argv)
        assert (status, out) == (2, "")
        assert words in err
        assert err.startswith("crossfoot")

    def test_a_mistyped_option_gets_a_hint(self, run):
        err = run("scan", "a.md", "--fromat", "json")[2]
        assert "perhaps --format is meant" in err
        assert "“crossfoot scan --help” lists what can be given" in err

    def test_a_mistyped_command_gets_a_hint(self, run):
        assert "perhaps scan is meant" in run("scna", "a.md")[2]

    def test_no_option_is_guessed_from_its_beginning(self, run):
        assert run("scan", "a.md", "--form", "json")[0] == 2

    def test_every_bad_setting_is_told(self, run):
        err = run("scan", "a.md", "--alpha", "9", "--fail-on", "all")[2]
        assert [line.partition(": ")[2][:9] for line in err.splitlines()] == [
            "--alpha: ",
            "--fail-on",
        ]

    def test_the_version(self, run):
        assert run("--version") == (0, f"crossfoot {__version__}\n", "")

    @pytest.mark.parametrize("name", ["", *COMMANDS])
    def test_the_help(self, run, name, snapshot):
        status, out, err = run(*filter(None, [name]), "--help")
        assert (status, err) == (0, "")
        # How argparse heads and spaces its lists differs between versions of Python.
        assert out.replace("optional arguments:", "options:") == snapshot
        assert all(len(line) <= 80 for line in out.splitlines())

    def test_every_option_of_a_command_is_explained(self, run):
        for name in COMMANDS:
            out = run(name, "--help")[1]
            assert "exit status:" in out
            assert command(name).description.split("\n")[0] in out
            assert command(name).name == name


class TestOutputFile:
    def test_it_holds_what_would_be_printed(self, folder, run):
        printed = run("scan", ".", "-f", "json")[1]
        assert run("scan", ".", "-f", "json", "-o", "out.json") == (1, "", "")
        assert (folder / "out.json").read_text() == printed

    def test_no_part_of_it_is_left(self, folder, run):
        run("scan", ".", "-f", "json", "-o", "out.json")
        assert sorted(os.listdir()) == ["fine.md", "out.json", "quiet.md", "reversed.md"]

    def test_an_old_one_survives_a_failure(self, folder):
        (folder / "out.txt").write_text("old")
        with contextlib.suppress(ZeroDivisionError), Destination("out.txt") as stream:
            stream.write("new")
            raise ZeroDivisionError
        assert (folder / "out.txt").read_text() == "old"
        assert not [name for name in os.listdir() if "part" in name]

    def test_a_link_stays_a_link(self, folder, run):
        (folder / "real.txt").write_text("old")
        (folder / "link.txt").symlink_to("real.txt")
        run("scan", "fine.md", "-o", "link.txt")
        assert (folder / "link.txt").is_symlink()
        assert (folder / "real.txt").read_text().startswith("1 document")

    @pytest.mark.parametrize("target", ["nowhere/out.txt", "."])
    def test_a_place_that_cannot_be_written(self, folder, run, target):
        status, out, err = run("scan", "fine.md", "-o", target)
        assert (status, out) == (2, "")
        assert err.startswith(f"crossfoot: {target}: The output can't be written: ")

    def test_a_dash_is_standard_output(self, folder, run):
        assert run("scan", "fine.md", "-o", "-") == run("scan", "fine.md")
        assert not os.path.exists("-")

    def test_an_empty_name_is_shown(self, folder, run):
        assert run("scan", "fine.md", "-o", "")[2].startswith("crossfoot: '': The output can't be ")
        assert "'': There is no such file" in run("scan", "")[2]

    def test_a_device_is_written_to(self, folder, run):
        assert run("scan", "fine.md", "-o", os.devnull) == (0, "", "")
        assert not os.path.isfile(os.devnull)

    def test_it_has_no_colours(self, folder, run, monkeypatch):
        monkeypatch.setenv("FORCE_COLOR", "1")
        run("scan", "reversed.md", "-o", "out.txt")
        assert "\x1b" not in (folder / "out.txt").read_text()
        assert "\x1b" in run("scan", "reversed.md")[1]

    def test_words_outside_ascii_are_utf_8(self, folder, run):
        (folder / "greek.md").write_text("Größe: " + REVERSED, encoding="utf-8")
        run("scan", "greek.md", "-o", "out.txt")
        assert "Größe" in (folder / "out.txt").read_bytes().decode("utf-8")


class TestTerminal:
    class Stream(io.StringIO):
        def isatty(self):
            return True

    @pytest.mark.parametrize(
        ("environ", "terminal", "pipe"),
        [
            ({}, True, False),
            ({"TERM": "dumb"}, False, False),
            ({"NO_COLOR": "1"}, False, False),
            ({"NO_COLOR": ""}, True, False),
            ({"FORCE_COLOR": "1"}, True, True),
            ({"FORCE_COLOR": "0"}, True, False),
            ({"FORCE_COLOR": "1", "TERM": "dumb"}, True, True),
            ({"NO_COLOR": "1", "FORCE_COLOR": "1"}, False, False),
        ],
    )
    def test_colours(self, environ, terminal, pipe):
        assert colours(self.Stream(), environ) == terminal
        assert colours(io.StringIO(), environ) == pipe

    @pytest.mark.parametrize(
        ("given", "width"),
        [("60", 60), ("10", 40), ("500", 110), ("0", 80), ("", 80), ("wide", 80), ("-1", 80)],
    )
    def test_width(self, given, width):
        assert columns(io.StringIO(), {"COLUMNS": given}) == width

    def test_the_width_of_a_real_terminal(self, monkeypatch):
        monkeypatch.setattr(os, "get_terminal_size", lambda _: os.terminal_size((72, 20)))
        with open(os.devnull) as stream:
            assert columns(stream, {}) == 72

    def test_a_bar_where_somebody_watches(self, folder, run, monkeypatch):
        watched = self.Stream()
        monkeypatch.setattr("sys.stderr", watched)
        monkeypatch.setattr("crossfoot.batch.progress.watched.__defaults__", (0,))
        assert main(["scan", ".", "--format", "json"]) == 1
        assert "3/3" in watched.getvalue()


class TestIdentities:
    def test_the_table_names_each(self, run):
        from crossfoot.laws import IDENTITIES

        status, out, _ = run("identities")
        assert status == 0
        assert [slug for slug in IDENTITIES if f"\n{slug} " not in f"\n{out}"] == []

    def test_a_page_tells_all(self, run):
        from crossfoot.laws import IDENTITIES

        for slug, identity in IDENTITIES.items():
            status, out, _ = run("identities", slug)
            said = " ".join(out.split())
            assert status == 0
            assert said.startswith(f"{slug}: ")
            parts = [identity.formula, identity.assumption, identity.source, identity.explanation]
            parts += [form.formula for form in identity.forms]
            assert [part for part in parts if " ".join(part.split()) not in said] == []

    def test_a_page(self, run, snapshot):
        assert run("identities", "f-from-r2")[1] == snapshot

    @pytest.mark.parametrize(
        ("slug", "near"),
        [("p-form-f", "p-from-f"), ("vif", "tolerance-vif"), ("f-r2", "f-from-r2")],
    )
    def test_a_name_that_is_none_gets_those_that_are_near(self, run, slug, near):
        status, out, err = run("identities", slug)
        assert (status, out) == (2, "")
        assert near in err
        assert "“crossfoot identities” lists them all" in err

    def test_a_name_that_is_near_none(self, run):
        assert run("identities", "zzz")[2] == (
            "crossfoot: There is no identity 'zzz'. “crossfoot identities” lists them all.\n"
        )


class TestDerive:
    def test_what_follows_with_the_working(self, run, snapshot):
        status, out, err = run("derive", "R2 = .131, F(2, 57) = 4.31")
        assert (status, err) == (0, "")
        assert out == snapshot

    def test_a_contradiction(self, run, snapshot):
        status, out, err = run("derive", "F(2, 57) = 4.31, p = .052")
        assert (status, err) == (1, "")
        assert out == snapshot

    def test_a_result_from_which_nothing_follows(self, run):
        text = "χ²(2, N = 90) = 4.3, p = .116"
        assert run("derive", text) == (0, f"From {text}\n  nothing else follows.\n", "")

    def test_json(self, run):
        status, out, _ = run("derive", "t(38) = 2.31", "-f", "json")
        (result,) = json.loads(out)["results"]
        assert status == 0
        assert [item["quantity"] for item in result["derived"]] == ["p"]
        assert list(result["derived"][0]) == ["quantity", "low", "high", "working", "assumed"]

    def test_standard_input(self, run, monkeypatch):
        monkeypatch.setattr("sys.stdin", io.TextIOWrapper(io.BytesIO(b"t(38) = 2.31")))
        assert run("derive", "-")[1].startswith("From t(38) = 2.31\n")

    def test_a_language(self, run):
        assert run("derive", "$t(38) = 2.31$", "--language", "latex")[0] == 0
        status, _, err = run("derive", "t(38) = 2.31", "--language", "morse")
        assert status == 2
        assert err.startswith("crossfoot: --language: 'morse' is not a format that can be read")

    def test_no_result(self, run):
        status, out, err = run("derive", "The weather was fine.")
        assert (status, out) == (2, "")
        assert err.startswith("crossfoot: No result was recognised.")


class TestProjects:
    """A settings file holds for the documents below it, in the command as in an editor."""

    @pytest.fixture
    def projects(self, folder):
        for name, text in {"strict": 'fail-on = "note"', "lax": 'fail-on = "never"'}.items():
            (folder / name / "old").mkdir(parents=True)
            (folder / name / "crossfoot.toml").write_text(f'{text}\nexclude = ["/old/"]\n')
            (folder / name / "a.md").write_text(REVERSED)
            (folder / name / "old" / "b.md").write_text(REVERSED)
        return folder

    def test_each_document_goes_by_its_own(self, projects, run):
        assert run("scan", "strict")[0] == 1
        assert run("scan", "lax")[0] == 0
        assert run("scan", "lax", "strict")[0] == 1

    def test_options_go_before(self, projects, run):
        assert run("scan", "lax", "--fail-on", "reversal")[0] == 1
        assert run("scan", "strict", "--fail-on", "never")[0] == 0

    def test_patterns_start_from_its_folder_and_hold_for_what_is_named(self, projects, run):
        assert "1 document read" in run("scan", "lax")[1]
        assert "excluded by a pattern" in run("scan", "lax/old/b.md")[2]

    def test_patterns_of_both_hold(self, projects, run):
        status, _, err = run("scan", "lax", "--exclude", "a.md")
        assert status == 2
        assert "Nothing was scanned" in err

    def test_what_is_wrong_with_it_is_told_once_and_the_scan_goes_on(self, projects, run):
        (projects / "lax" / "crossfoot.toml").write_text('alpha = 7\nfail-on = "never"\n')
        status, out, err = run("scan", "lax")
        assert status == 2
        assert err.count("alpha: 7 is not a number between 0 and 1") == 1
        assert "2 documents read" in out

    def test_what_is_set_is_shown_with_the_file_that_sets_it(self, projects, run):
        status, out, _ = run("settings", "lax/a.md")
        rows = {line.split()[0]: line.split()[1:] for line in out.splitlines()}
        assert status == 0
        assert rows["fail-on"] == ["never", str(projects / "lax" / "crossfoot.toml")]
        assert rows["exclude"][0] == "/old/"
        assert rows["alpha"] == ["0.05", "default"]
        assert rows["language"] == ["-", "default"]

    def test_where_nothing_is_set_that_is_shown(self, folder, run):
        status, out, _ = run("settings")
        assert status == 0
        assert out.endswith("\nNo crossfoot.toml or pyproject.toml upwards sets anything.\n")

    def test_what_is_wrong_is_shown_too(self, projects, run):
        (projects / "lax" / "crossfoot.toml").write_text("alpha = 7\n")
        status, out, err = run("settings", "lax")
        assert status == 2
        assert "alpha: 7 is not a number" in err
        assert out.startswith("alpha      0.05")


class TestServe:
    def test_without_the_server_a_sentence_says_what_is_missing(self, run, monkeypatch):
        monkeypatch.setitem(sys.modules, "crossfoot_lsp", None)
        status, _, err = run("serve")
        assert status == 2
        assert err == (
            "crossfoot: The language server needs the package crossfoot_lsp, which is missing.\n"
        )

    def test_with_it_its_status_is_ours(self, run, monkeypatch):
        class Server:
            @staticmethod
            def serve():
                return 0

        monkeypatch.setitem(sys.modules, "crossfoot_lsp", Server)
        assert run("serve", "--stdio") == (0, "", "")


class TestEnds:
    def test_as_a_module(self, folder):
        done = process("scan", "reversed.md")
        assert done.returncode == 1
        assert done.stdout.startswith("1. reversed.md:1:46: reversal (p-from-f)\n")
        assert done.stderr == ""

    def test_a_reader_who_has_seen_enough(self, folder):
        (folder / "long.md").write_text("\n".join(REVERSED for _ in range(3000)))
        running = subprocess.Popen(
            [*COMMAND, "scan", "long.md"],
            env=ENVIRON,
            stdout=subprocess.PIPE,
            stderr=subprocess.PIPE,
        )
        with running:
            running.stdout.read(10)
            running.stdout.close()
            assert running.stderr.read() == b""
        assert running.returncode == 141

    @pytest.mark.skipif(sys.platform == "win32", reason="Windows sends no SIGINT to a process")
    def test_control_c(self, folder):
        os.mkfifo(folder / "pipe.md")  # nobody ever writes to it, so the scan waits
        running = subprocess.Popen(
            [*COMMAND, "scan", "pipe.md"],
            env=ENVIRON,
            stdout=subprocess.PIPE,
            stderr=subprocess.PIPE,
            # What runs the tests in the background may ignore the signal, and pass that on.
            preexec_fn=lambda: signal.signal(signal.SIGINT, signal.SIG_DFL),
        )
        try:
            opened = os.open(folder / "pipe.md", os.O_WRONLY)  # waits until it is being read
            time.sleep(0.1)
            running.send_signal(signal.SIGINT)
            assert running.communicate(timeout=30) == (b"", b"")
            os.close(opened)
        finally:
            running.kill()
            running.communicate()
        assert running.returncode == 130

    def test_an_interrupt_at_any_time(self, folder, run, monkeypatch):
        def interrupted(path, settings):
            raise KeyboardInterrupt

        monkeypatch.setattr("crossfoot.batch.files.scan_file", interrupted)
        assert run("scan", "fine.md") == (130, "", "")

    @pytest.mark.skipif(not os.path.exists("/dev/full"), reason="only Linux has a full device")
    def test_a_full_disk(self, folder):
        with open("/dev/full", "w") as full:
            done = process("scan", "fine.md", capture_output=False, stdout=full, stderr=-1)
        assert done.returncode == 2
        assert done.stderr.startswith("crossfoot: The output can't be written: no space left")

    @pytest.mark.skipif(sys.platform == "win32", reason="the shell is a POSIX shell")
    def test_streams_that_are_closed(self, folder):
        for closed in (">&-", "2>&-", ">&- 2>&- <&-"):
            line = f'"$0" -m crossfoot scan fine.md gone.md {closed}'
            done = subprocess.run(["sh", "-c", line, sys.executable], env=ENVIRON, check=False)
            assert done.returncode == 0

    def test_a_terminal_that_knows_no_greek(self, folder):
        (folder / "greek.md").write_text("Größe: " + REVERSED, encoding="utf-8")
        environ = {**ENVIRON, "PYTHONIOENCODING": "ascii"}
        done = process("scan", "greek.md", env=environ)
        assert done.returncode == 1
        assert "Gr\\xf6\\xdfe" in done.stdout


class TestStartUp:
    #: What a scan that finds no result has no use for.
    HEAVY = frozenset(
        {
            *("crossfoot.audit", "crossfoot.laws", "crossfoot.output.entry", "dataclasses"),
            *("difflib", "inspect", "json", "lzma", "numpy", "pandas", "pathlib", "pathspec"),
            *("pygls", "regex", "scipy", "shutil", "tempfile", "textwrap", "tqdm"),
        }
    )

    @staticmethod
    def loaded(code, *argv):
        """Return the modules that code loads, beyond those of a bare interpreter."""
        code = f"import sys; bare = set(sys.modules); {code}; print(*set(sys.modules) - bare)"
        run = [sys.executable, "-S", "-c", code]
        return subprocess.check_output(run, env=ENVIRON, text=True).splitlines()[-1].split()

    def test_a_scan_without_a_result_imports_nothing_heavy(self, folder):
        loaded = self.loaded("from crossfoot.cli import main; main(['scan', 'quiet.md'])")
        assert self.HEAVY.intersection(loaded) == set()
        assert "crossfoot.scan" in loaded

    def test_importing_the_library_imports_almost_nothing(self):
        ours = [name for name in self.loaded("import crossfoot") if name.startswith("crossfoot")]
        assert sorted(ours) == ["crossfoot", "crossfoot.version"]
