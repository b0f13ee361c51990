"""Amendments: changes to a document's text that follow from what was found in it.

An amendment is a set of replacements in the source, as small as it can be, in the author's own
style. Each is tried before it is offered: the block is read again with the change in it, and if
anything but the intended came of that, there is no amendment.
"""

from crossfoot.amend.change import Amendment, Change, applied

__all__ = ["Amendment", "Change", "applied"]
