"""Audit: what became of every identity on a claim, and what follows from it.

The shape of a claim (``drafts``) decides on a plan (``binding``, ``rows``, ``plan``), and its
readings fill the plan's box (``case``), which is narrowed by every identity (``narrow``). If
something is left of every quantity, all agree, and ``verdict`` says so. Otherwise ``failing``
leads on: ``faults`` finds what can't all be true, ``explain`` the conventions that would explain
it, ``remedies`` the single changes that mend it (``slips``), and ``findings`` says so
(``working``, ``wording``). ``derivation`` is for those who ask what follows from a claim.
"""

from __future__ import annotations

from typing import TYPE_CHECKING, Any

from crossfoot.audit.verdict import judge
from crossfoot.memo import remembered
from crossfoot.model import Audited, Claim, Span

if TYPE_CHECKING:
    from crossfoot.audit.derivation import Derivation, Derived, derive


@remembered
def audit_claim(
    claim: Claim, alpha: float = 0.05, elsewhere: frozenset[str] = frozenset()
) -> Audited:
    """Return what became of every identity that concerns a claim.

    Parameters
    ----------
    claim
        What is printed.
    alpha
        The significance level that a reversal is judged by, unless the claim states its own.
    elsewhere
        Contexts of which the document speaks, though not for this claim: what one of them would
        explain is no more than a doubt.

    Notes
    -----
    The result depends on nothing else and is remembered; also for the claim at another place,
    to which it moves with each character that is typed before it.
    """
    audited = _judged(_nowhere(claim), alpha, elsewhere)
    return audited._replace(claim=_placed(audited.claim, claim))


@remembered
def _judged(claim: Claim, alpha: float, elsewhere: frozenset[str]) -> Audited:
    return judge(claim, alpha, elsewhere)


def _nowhere(claim: Claim) -> Claim:
    """Return a claim without its place, on which nothing that is found about it depends."""
    return claim._replace(
        span=_NO_PLACE,
        readings=tuple([reading._replace(span=_NO_PLACE) for reading in claim.readings]),
        given=tuple([reading._replace(span=_NO_PLACE) for reading in claim.given]),
    )


_NO_PLACE = Span(0, 0)


def _placed(judged: Claim, claim: Claim) -> Claim:
    """Return a claim as it was judged, which may be by another reading of its numerals."""
    pairs = list(zip(judged.readings, claim.readings, strict=True))
    if all(there.low == here.low and there.high == here.high for there, here in pairs):
        return claim
    return claim._replace(
        readings=tuple([here._replace(low=there.low, high=there.high) for there, here in pairs]),
        context=judged.context,
    )


def __getattr__(name: str) -> Any:
    """Import what derives when it is first used: to audit, nothing is derived."""
    if name not in __all__:
        raise AttributeError(f"module {__name__!r} has no attribute {name!r}")
    from crossfoot.audit import derivation

    return getattr(derivation, name)


__all__ = ["Derivation", "Derived", "audit_claim", "derive"]
