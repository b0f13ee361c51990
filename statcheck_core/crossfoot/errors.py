"""The system's errors in words."""

from __future__ import annotations


def reason(error: OSError) -> str:
    """Return what the system says of an error, without its number and path."""
    words = error.strerror or type(error).__name__
    return words[0].lower() + words[1:]
