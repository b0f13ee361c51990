"""Programs that tests need: where they are, or what to install."""

from __future__ import annotations

import os
import shutil
from typing import NoReturn

import pytest


def program(name: str, install: str) -> str:
    """Return the path of a program; without it the test is not run here, and fails in CI."""
    path = shutil.which(name)
    if path is None:
        missing(f"{name} is not installed: {install}")
    return path


def missing(words: str) -> NoReturn:
    """Leave a test out because something is not installed; in CI that is a failure."""
    if os.environ.get("CI") == "true":
        pytest.fail(words)
    pytest.skip(words)
