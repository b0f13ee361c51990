"""How a result is called in lists."""

from __future__ import annotations

from crossfoot.model import Placed
from crossfoot.output.tally import fate

#: Longest printed words that are shown beside a name.
_LONGEST = 100

_FATES = {
    "agrees": "agrees",
    "disagrees": "disagrees",
    "doubt": "in doubt",
    "settled": "settled",
    "unchecked": "not checked",
}


def claim_name(placed: Placed) -> str:
    """Return the name of a result: its printed words, or its label where they are long."""
    claim = placed.audited.claim
    return claim.text if 0 < len(claim.text) <= _LONGEST else claim.label


def claim_detail(placed: Placed) -> str:
    """Return what became of a result, with the identities that fail."""
    failing = sorted({f.identity for f in placed.audited.findings if f.settled is None})
    words = _FATES[fate(placed.audited)]
    return f"{words} ({', '.join(failing)})" if failing else words
