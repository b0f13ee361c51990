"""What the README shows is what happens, and its generated part is up to date."""

from __future__ import annotations

import os
import re
import subprocess
import sys
from pathlib import Path
from typing import Any

import pytest

from crossfoot.laws import IDENTITIES
from crossfoot.laws.identity import Identity

ROOT = Path(__file__).parent.parent
README = (ROOT / "README.md").read_text("utf-8")
CONSOLE = re.findall(r"```console\n\$ crossfoot (.*)\n([\s\S]*?)\n```", README)


def row(identity: Identity) -> str:
    cells = (f"`{identity.slug}`", identity.title, identity.formula)
    return "| " + " | ".join(cell.replace("|", "\\|") for cell in cells) + " |"


def test_the_table_of_identities_is_up_to_date() -> None:
    table = "\n".join(
        [
            "| identity | what it says | formula |",
            "|---|---|---|",
            *(row(identity) for identity in IDENTITIES.values()),
        ]
    )
    assert f"-->\n{table}\n<!-- end of identities -->" in README


@pytest.mark.parametrize(("arguments", "output"), CONSOLE, ids=[c[0] for c in CONSOLE])
def test_a_console_example(arguments: str, output: str, tmp_path: Path) -> None:
    draft = re.search(r"```markdown\n([\s\S]*?)```", README)
    assert draft is not None
    (tmp_path / "draft.md").write_text(draft[1], "utf-8")
    words = [part.strip('"') for part in re.findall(r'"[^"]*"|\S+', arguments)]
    done = subprocess.run(
        [sys.executable, "-m", "crossfoot", *words],
        cwd=tmp_path,
        env={**os.environ, "COLUMNS": "80", "NO_COLOR": "1", "PYTHONIOENCODING": "utf-8"},
        capture_output=True,
        text=True,
        encoding="utf-8",
        check=False,
    )
    assert done.stderr == ""
    assert done.stdout.rstrip() == output.rstrip()


def test_the_python_example() -> None:
    code = re.search(r"```python\n([\s\S]*?)```", README)
    assert code is not None
    names: dict[str, Any] = {}
    exec(code[1], names)
    assert "p is printed as .206" in names["scan"].findings[0]["message"]


def test_the_test_command_is_the_one_that_ci_runs() -> None:
    assert README.count("\npython3 -m venv .venv-tests") == 1
    assert "python3 -m venv \\.venv-tests" in (ROOT / ".ci" / "run").read_text("utf-8")


def test_the_first_paragraph_states_the_job() -> None:
    first = README.split("\n\n")[1]
    assert "recomputes every relation" in first
    assert "explain it" in first
