"""What Crossfoot makes of a text, in few words."""

from __future__ import annotations

from typing import Any

from crossfoot import scan_text

ALARMS = ("reversal", "conflict")


def scanned(text: str, language: str = "markdown") -> dict[str, Any]:
    """Return the claims and findings of a text."""
    record: dict[str, Any] = dict(scan_text(text, language).documents[0])
    assert (record["status"], record["problem"]) == ("read", None)
    return record


def alarms(text: str, language: str = "markdown") -> list[tuple[str, str]]:
    """Return identity and literal of each finding at conflict or reversal."""
    return [
        (finding["identity"], finding["literal"])
        for finding in scanned(text, language)["findings"]
        if finding["severity"] in ALARMS
    ]


def findings(text: str, language: str = "markdown") -> list[tuple[str, str]]:
    """Return identity and severity of each finding."""
    found = scanned(text, language)["findings"]
    return [(finding["identity"], finding["severity"]) for finding in found]


def read(text: str, language: str = "markdown") -> dict[str, list[str]]:
    """Return the literals read from a text, by quantity, in order."""
    literals: dict[str, list[str]] = {}
    for claim in scanned(text, language)["claims"]:
        for reading in claim["readings"]:
            literals.setdefault(reading["quantity"], []).append(reading["literal"])
    return literals
