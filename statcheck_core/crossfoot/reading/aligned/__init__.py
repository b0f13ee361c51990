"""Aligned text: the tables in what a program printed, or in what was pasted as plain text.

:func:`layout` finds them by the names in their first lines or columns, and leaves the other
lines to prose. It places cells in the text it was given and copies nothing.
"""

from crossfoot.reading.aligned.layout import Layout, layout

__all__ = ["Layout", "layout"]
