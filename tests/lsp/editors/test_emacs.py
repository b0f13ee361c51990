"""Emacs in batch, with eglot and with lsp-mode."""

from __future__ import annotations

import json
import subprocess
from pathlib import Path
from typing import Any

import pytest

from serving.editor import COMMAND, ENVIRONMENT, ROOT
from serving.needs import missing, program

DRAFT = "# Results\n\nThe plots differed, F(2, 57) = 4.31, p = .081.\n"

#: Where Debian keeps the packages of Emacs.
PACKAGES = Path("/usr/share/emacs/site-lisp/elpa")


def seen_by(client: str, folder: Path) -> tuple[dict[str, Any], str]:
    """Return what a script saw in Emacs with one of its clients, and what Emacs said."""
    emacs = program("emacs", "apt-get install emacs-nox elpa-eglot elpa-lsp-mode")
    if not list(PACKAGES.glob(f"{client}-*")):
        missing(f"{client} is not installed: apt-get install elpa-{client}")
    draft, out = folder / "draft.qmd", folder / "out.json"
    draft.write_text(DRAFT)
    environment = {
        **ENVIRONMENT,
        "CROSSFOOT_COMMAND": json.dumps(COMMAND),
        "CROSSFOOT_DRAFT": str(draft),
        "CROSSFOOT_OUT": str(out),
        "HOME": str(folder),
    }
    folders = [*PACKAGES.iterdir(), ROOT / "lsp" / "editors" / "emacs"]
    paths = [argument for folder in folders for argument in ("-L", str(folder))]
    script = str(Path(__file__).with_name(f"{client}.el"))
    done = subprocess.run(
        [emacs, "-Q", "--batch", *paths, "-l", script],
        env=environment,
        capture_output=True,
        text=True,
        timeout=400,
        check=False,
    )
    assert out.exists(), done.stderr
    seen = json.loads(out.read_text())
    assert "problem" not in seen, (seen["problem"], done.stderr)
    return seen, done.stderr


@pytest.mark.parametrize("client", ["eglot", "lsp-mode"])
def test_a_draft_is_checked_mended_and_checked_again(client: str, tmp_path: Path) -> None:
    seen, said = seen_by(client, tmp_path)
    # lsp-mode brings a mode for Markdown with it.
    assert seen["mode"] == {"eglot": "text-mode", "lsp-mode": "markdown-mode"}[client]
    assert seen["server"] == "crossfoot"
    assert seen["text"] == ".081"
    assert "p is printed as .081, but F(2, 57) = 4.31 gives p between" in seen["message"]
    assert "p = .081" in seen["hover"]
    assert seen["actions"][0] == "Change to p = .018 (two digits swapped)"
    assert seen["line"] == DRAFT.split("\n")[2].replace(".081", ".018")
    assert "t(40) = 2.20" in seen["typed"]
    assert "1 agrees, 1 disagrees" in said
    assert seen["outline"] == {"eglot": "Namespace", "lsp-mode": "Results"}[client]
