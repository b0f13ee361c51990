"""Lines of a given width."""

from __future__ import annotations

#: Stands for a space at which no line is broken; documents have none of it (see ``safe``).
_HELD = "\ufdd2"

#: Around a relation, and in a list of numbers.
_HOLD = r" (?=[=<>≤≥≈] \S)|(?<= [=<>≤≥≈]) (?=\S)|(?<=\d,) (?=\d)"


def wrapped(text: str, width: int, first: str = "", rest: str | None = None) -> list[str]:
    """Return text as lines of at most ``width`` columns.

    No word is ever cut, nor ``p = .05`` or ``F(2, 57)`` parted.

    Parameters
    ----------
    text
        The words; runs of blanks count as one.
    width
        Columns to a line, the indents among them.
    first, rest
        What stands before the first line and before the others; ``rest`` is ``first`` unless it
        is given.
    """
    if text and len(first) + len(text) <= width and "\n" not in text and "  " not in text:
        return [first + text]
    import re  # with the pattern, for what does not fit on a line
    from textwrap import wrap

    lines = wrap(
        re.sub(_HOLD, _HELD, text),
        width,
        initial_indent=first,
        subsequent_indent=first if rest is None else rest,
        break_long_words=False,
        break_on_hyphens=False,
    )
    return [line.replace(_HELD, " ") for line in lines]
