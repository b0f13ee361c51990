"""Tables: from cells to claims, the same for every format.

:func:`table_claims` tells what kind of table it has before it by headings, labels of rows and
notes, never by position, and leaves to prose what holds whole results in its cells.
"""

from crossfoot.reading.tables.reader import Prose, table_claims

__all__ = ["Prose", "table_claims"]
