"""Reading: blocks to claims.

:func:`read_block` is the whole of it; everything below is a pure function of a block's text.
"""

from crossfoot.reading.blocks import BlockReading, read_block

__all__ = ["BlockReading", "read_block"]
