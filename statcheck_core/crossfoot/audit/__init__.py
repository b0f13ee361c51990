"""Audit: what became of every identity on a claim, and what follows from it.

The shape of a claim (``drafts``) decides on a plan (``binding``, ``rows``, ``plan``), and its
readings fill the plan's box (``case``), which is narrowed by every identity (``narrow``). If
something is left of every quantity, all agree. Otherwise ``faults`` finds what can't all be true,
``explain`` the conventions that would explain it, ``remedies`` the single changes that mend it
(``slips``), and ``findings`` says so (``working``, ``wording``); ``verdict`` leads through it all.
"""

from __future__ import annotations

from functools import lru_cache

from crossfoot.audit.derive import Derivation, Derived
from crossfoot.audit.derive import derive as _derive
from crossfoot.audit.verdict import judge
from crossfoot.memo import remembered
from crossfoot.model import Audited, Claim, Span


@remembered
def audit_claim(claim: Claim, alpha: float = 0.05) -> Audited:
    """Return what became of every identity that concerns a claim.

    Parameters
    ----------
    claim
        What is printed.
    alpha
        The significance level that a reversal is judged by, unless the claim states its own.

    Notes
    -----
    The result depends on nothing else and is remembered; also for the claim at another place,
    to which it moves with each character that is typed before it.
    """
    return _judged(_nowhere(claim), alpha)._replace(claim=claim)


@remembered
def _judged(claim: Claim, alpha: float) -> Audited:
    return judge(claim, alpha)


def _nowhere(claim: Claim) -> Claim:
    """Return a claim without its place, on which nothing that is found about it depends."""
    return claim._replace(
        span=_NO_PLACE,
        readings=tuple([reading._replace(span=_NO_PLACE) for reading in claim.readings]),
        given=tuple([reading._replace(span=_NO_PLACE) for reading in claim.given]),
    )


_NO_PLACE = Span(0, 0)


@lru_cache(maxsize=4096)
def derive(claim: Claim) -> Derivation:
    """Return every quantity that follows from the readings of a claim, with its working."""
    return _derive(claim)


__all__ = ["Derivation", "Derived", "audit_claim", "derive"]
