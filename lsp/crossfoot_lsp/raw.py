"""JSON that is ready to be sent."""

from __future__ import annotations


class Raw(str):
    """JSON as text; where it is an answer it is sent as it is."""

    __slots__ = ()


#: No diagnostics.
NOTHING = Raw("[]")
