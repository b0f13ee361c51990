"""Numbers as manuscripts print them, and slips of the pen.

A template holds places such as ``⟦fit.R2 .2⟧``: a path into the paper's values and a form.

=========  ============================================  ==========
form       meaning                                       example
=========  ============================================  ==========
``d``      a whole number                                ``57``
``2``      two decimals                                  ``0.38``
``.2``     two decimals, without the zero                ``.38``
``,2``     two decimals, with a comma                    ``0,38``
``%1``     a hundredfold, one decimal (sign apart)       ``38.2``
``e2``     two decimals and a power of ten               ``3.82e-05``
``p``      p with its relation                           ``= .026``
``0p``     the same, with the zero                       ``= 0.026``
``0p&lt;`` the same, for HTML and XML                    ``&lt; 0.001``
``,p``     the same, with a comma                        ``= 0,026``
``*``      stars: .05, .01, .001                         ``**``
=========  ============================================  ==========

A form may end in ``>9`` to set the number flush right in nine columns.
"""

from __future__ import annotations

import re
from collections.abc import Callable, Mapping
from typing import NamedTuple

_PLACE = re.compile(r"⟦([^⟦⟧]+)⟧")
#: Around a slip in a filled template, until its line is known.
_MARK = re.compile("\ue000(\\w+)\ue001(.*?)\ue002", re.DOTALL)
#: What starts a cell in the template of a notebook.
_CELL = re.compile(r"^%% (?:markdown|code)\n", re.MULTILINE)


class Slip(NamedTuple):
    """A number that goes into a manuscript wrong.

    Attributes
    ----------
    path, form
        The true value and how it would be printed (``s``: it is text already).
    edit
        From the true literal to the printed one.
    quantity
        Key of the quantity.
    name
        The slip in words.
    identities
        Slugs of the identities any of which may report it.
    severity
        The weakest severity that will do.
    """

    path: str
    form: str
    edit: Callable[[str], str]
    quantity: str
    name: str
    identities: tuple[str, ...]
    severity: str = "conflict"


class Error(NamedTuple):
    """A slip where it stands in the finished manuscript.

    In a notebook ``page`` is the number of the cell and ``line`` counts from the cell's start.
    """

    page: int | None
    line: int
    printed: str
    true: str
    quantity: str
    slip: str
    identities: tuple[str, ...]
    severity: str


def number(value: float, form: str, minus: str = "-") -> str:
    """Print a value in one of the forms above."""
    form, _, width = form.partition(">")
    less = "&lt;" if form.endswith("&lt;") else "<"
    text = _number(float(value), form.removesuffix("&lt;"), less).replace("-", minus)
    return text.rjust(int(width)) if width else text


def _number(value: float, form: str, less: str) -> str:
    if form == "d":
        return str(round(value))
    if form == "*":
        return "*" * sum(value < level for level in (0.05, 0.01, 0.001))
    if form in ("p", "0p", ",p"):
        style = {"p": ".3", "0p": "3", ",p": ",3"}[form]
        if value < 0.001:
            return f"{less} {_number(0.001, style, less)}"
        if value > 0.9995:
            return f"> {_number(0.999, style, less)}"
        return f"= {_number(value, style, less)}"
    if form[0] == "%":
        return f"{100 * value:.{form[1:]}f}"
    if form[0] == "e":
        return f"{value:.{form[1:]}e}"
    if form[0] == ",":
        return f"{value:.{form[1:]}f}".replace(".", ",")
    if form[0] == ".":
        if abs(value) >= 1:
            raise ValueError(f"{value} keeps its leading digit")
        return f"{value:.{form[1:]}f}".replace("0.", ".", 1)
    return f"{value:.{form}f}"


def swap(at: int) -> Callable[[str], str]:
    """Swap the digits that stand at ``at`` and after it."""

    def edit(literal: str) -> str:
        digits = list(literal)
        digits[at], digits[at + 1] = digits[at + 1], digits[at]
        return "".join(digits)

    return edit


def digit(at: int, new: str) -> Callable[[str], str]:
    """Put another digit at ``at``."""

    def edit(literal: str) -> str:
        digits = list(literal)
        digits[at] = new
        return "".join(digits)

    return edit


def put(text: str) -> Callable[[str], str]:
    """Print something else altogether."""
    return lambda literal: text


def look_up(values: Mapping[str, object], path: str) -> float:
    """Follow a dotted path; a whole number is an index."""
    head, *rest = path.split(".")
    found = values[head]
    for name in rest:
        found = found[int(name)] if name.isdigit() else getattr(found, name)  # type: ignore[index]
    return float(found)  # type: ignore[arg-type]  # the path ends at a number


def expect(holds: bool, said: str) -> None:
    """Stop unless the numbers bear out what a manuscript says in words."""
    if not holds:
        raise ValueError(f"the numbers do not bear out: {said}")


def fill(
    template: str, values: Mapping[str, object], slips: Mapping[str, Slip], minus: str = "-"
) -> str:
    """Fill a template; a place ``⟦!name⟧`` takes a slip and leaves a mark around it."""

    def place(found: re.Match[str]) -> str:
        content = found[1]
        if content[0] == "!":
            name = content[1:]
            return f"\ue000{name}\ue001{_literals(slips[name], values, minus)[1]}\ue002"
        path, _, form = content.partition(" ")
        if isinstance(values.get(path), str):
            return str(values[path])
        return number(look_up(values, path), form, minus)

    return _PLACE.sub(place, template)


def resolve(
    marked: str, values: Mapping[str, object], slips: Mapping[str, Slip], minus: str = "-"
) -> tuple[str, tuple[Error, ...]]:
    """Take the marks off a finished manuscript and say where its errors are."""
    errors = []
    notebook = marked.startswith("%% ")
    for found in _MARK.finditer(marked):
        slip = slips[found[1]]
        true, printed = _literals(slip, values, minus)
        page, start = None, 0
        if notebook:
            cells = [*_CELL.finditer(marked, 0, found.start())]
            page, start = len(cells), cells[-1].end()
        line = marked.count("\n", start, found.start()) + 1
        rest = (slip.quantity, slip.name, slip.identities, slip.severity)
        errors.append(Error(page, line, printed, true, *rest))
    if {found[1] for found in _MARK.finditer(marked)} != set(slips):
        raise ValueError("a slip is declared and not placed")
    return _MARK.sub(r"\2", marked), tuple(errors)


def _literals(slip: Slip, values: Mapping[str, object], minus: str) -> tuple[str, str]:
    if slip.form == "s":
        true = str(values[slip.path])
    else:
        true = number(look_up(values, slip.path), slip.form, minus)
    printed = slip.edit(true)
    if printed == true:
        raise ValueError(f"{slip.path}: the slip changes nothing")
    return true, printed
