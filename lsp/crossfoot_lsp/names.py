"""Names of texts: URIs, and the paths that some of them stand for."""

from __future__ import annotations

from pygls.uris import to_fs_path


def path_of(uri: str) -> str | None:
    """Return the path that a URI stands for; None for what is no file."""
    try:
        return to_fs_path(uri)
    except ValueError:  # what urllib takes for a broken address
        return None
