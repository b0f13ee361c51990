"""Figures as they are printed, and what an exact value would print as."""

from __future__ import annotations

from decimal import ROUND_HALF_EVEN, ROUND_HALF_UP, Decimal, localcontext
from fractions import Fraction

from mpmath import mp, mpf

Exact = Fraction | mpf


def decimal(value: Exact | str | int) -> Decimal:
    """Return a value with 50 digits as a decimal."""
    if isinstance(value, Fraction):
        value = mpf(value.numerator) / value.denominator
    return Decimal(value) if isinstance(value, str) else Decimal(mp.nstr(value, 50))


def fixed(value: Exact | str, decimals: int) -> str:
    """Print a value with so many decimals."""
    with localcontext(prec=60):
        return f"{decimal(value).quantize(Decimal(1).scaleb(-decimals), ROUND_HALF_EVEN):f}"


def significant(value: Exact | str, digits: int) -> str:
    """Print a value with so many significant digits, without a power of ten."""
    exact = decimal(value)
    if not exact:
        return "0"
    return fixed(value, max(0, digits - 1 - exact.adjusted()))


def p_clause(p: Exact, decimals: int = 3) -> str:
    """Print p with its relation, as journals ask for it."""
    floor = Decimal(1).scaleb(-decimals)
    return f"< {floor:f}" if decimal(p) < floor else f"= {fixed(p, decimals)}"


def prints_as(value: Exact, literal: str) -> bool:
    """Whether a value would print as this literal, rounded half up or half to even."""
    bound = literal.removeprefix("<").strip()
    if bound != literal:
        return decimal(value) < Decimal(bound)
    with localcontext(prec=60):
        unit = Decimal(1).scaleb(int(Decimal(literal).as_tuple().exponent))
        exact = decimal(value)
        return Decimal(literal) in {
            exact.quantize(unit, mode) for mode in (ROUND_HALF_EVEN, ROUND_HALF_UP)
        }


def bounds(literal: str) -> tuple[Fraction, Fraction]:
    """Return the closed interval of the values that may print as a literal."""
    half = Fraction(Decimal(1).scaleb(int(Decimal(literal).as_tuple().exponent))) / 2
    return Fraction(Decimal(literal)) - half, Fraction(Decimal(literal)) + half
