"""What a person may set, each declared once: its default, what it may be, how it is read.

The command, the library and whatever reads a settings file all go through :func:`read`, so that
a value is understood, and refused, in the same words everywhere.
"""

from __future__ import annotations

from collections.abc import Callable, Iterable, Mapping
from typing import Any, NamedTuple

from crossfoot.model import SEVERITIES

#: What ``fail_on`` may be, the most lenient first.
FAIL_ON = ("never", *SEVERITIES)


class Settings(NamedTuple):
    """The settings of one scan.

    Attributes
    ----------
    alpha
        Significance level of a text that states none; between 0 and 1, both excluded.
    fail_on
        The weakest severity that makes the command fail, or ``never``.
    language
        Name of the format to read every document as, or None to tell it from the file's name.
    exclude
        Patterns, in the syntax of ``.gitignore``, of files and folders that are never read.
    max_bytes
        A larger file is reported and not read.
    """

    alpha: float = 0.05
    fail_on: str = "conflict"
    language: str | None = None
    exclude: tuple[str, ...] = ()
    max_bytes: int = 256 * 2**20


DEFAULTS = Settings()


class Setting(NamedTuple):
    """One setting.

    Attributes
    ----------
    parse
        Returns what a value stands for, or None where the setting may not have it.
    expected
        What it may be, to go on after “is not”.
    choices
        The names it may have, if it has names.
    """

    parse: Callable[[Any], object]
    expected: str
    choices: Callable[[], tuple[str, ...]] = tuple


def languages() -> tuple[str, ...]:
    """Return the names of the formats that can be read, sorted."""
    from crossfoot.documents import FORMATS  # only a language that is named needs them

    return tuple(sorted(FORMATS))


def _alpha(value: object) -> float | None:
    try:
        number = float(value) if isinstance(value, (str, int, float)) else 0.0
    except (ValueError, OverflowError):
        return None
    return number if 0 < number < 1 and not isinstance(value, bool) else None


def _severity(value: object) -> str | None:
    return value if isinstance(value, str) and value in FAIL_ON else None


def _language(value: object) -> str | None:
    return value if isinstance(value, str) and value in languages() else None


def _patterns(value: object) -> tuple[str, ...] | None:
    if isinstance(value, str) or not isinstance(value, Iterable):
        return None
    from crossfoot.patterns import is_pattern  # it is slow to import

    patterns = tuple(value)
    good = all(isinstance(pattern, str) and is_pattern(pattern) for pattern in patterns)
    return patterns if good else None


def _size(value: object) -> int | None:
    return value if isinstance(value, int) and value is not True and value > 0 else None


SETTINGS: Mapping[str, Setting] = {
    "alpha": Setting(_alpha, "a number between 0 and 1, such as .05"),
    "fail_on": Setting(_severity, "a severity", lambda: FAIL_ON),
    "language": Setting(_language, "a format that can be read", languages),
    "exclude": Setting(_patterns, "a list of patterns as in .gitignore"),
    "max_bytes": Setting(_size, "a positive number of bytes"),
}


def read(values: Mapping[str, object]) -> tuple[Settings, tuple[str, ...]]:
    """Return the settings that these values make, and what is wrong with them.

    Parameters
    ----------
    values
        Values by name, as text or as what they stand for; None stands for the default.

    Returns
    -------
    tuple of Settings and tuple of str
        The settings, in which a value that is refused has its default, and a sentence for each
        value that is.
    """
    accepted: dict[str, Any] = {}
    problems = []
    for name, value in values.items():
        setting = SETTINGS.get(name)
        if setting is None:
            problems.append(f"there is no setting {name!r}{_near(name, tuple(SETTINGS))}")
        elif value is not None:
            parsed = setting.parse(value)
            if parsed is None:
                problems.append(f"{name}: {_refusal(value, setting)}")
            else:
                accepted[name] = parsed
    return Settings(**accepted), tuple(problems)


def _refusal(value: object, setting: Setting) -> str:
    choices = setting.choices()
    listed = f" ({', '.join(choices)})" if choices else ""
    return f"{value!r} is not {setting.expected}{listed}{_near(str(value), choices)}"


def _near(value: str, names: tuple[str, ...]) -> str:
    """Return the nearest of the names as a hint to end a sentence with, or nothing."""
    from difflib import get_close_matches  # only a mistake needs it

    near = get_close_matches(value, names, 1)
    return f"; perhaps {near[0]!r} is meant" if near else ""
