"""What a quantity can be at all."""

from __future__ import annotations

import math

from crossfoot.laws.arithmetic import at_least, at_most
from crossfoot.laws.declare import form, identity
from crossfoot.laws.identity import Form
from crossfoot.laws.interval import EVERYTHING, Interval
from crossfoot.laws.quantities import QUANTITIES

_PROSE = (
    "overall-model effect model-change coefficient correlation mean-comparison frequency "
    "model-summary"
)
#: A test has degrees of freedom above zero; the error's row of a table may have none.
_COUNTED = ("df1", "df2", "df")
_ABOVE_ZERO = Interval(math.ulp(0.0), math.inf)


def _words(symbol: str, domain: Interval) -> str:
    if domain.low == -math.inf:
        return f"{symbol} ≤ {domain.high:g}"
    if domain.high == math.inf:
        return f"{symbol} ≥ {domain.low:g}"
    return f"{domain.low:g} ≤ {symbol} ≤ {domain.high:g}".replace("-", "−")


def _within(key: str, domain: Interval, needs: str = "") -> Form:
    words = _words(QUANTITIES[key].symbol, domain)
    return form(key, words, "", lambda: domain, needs=needs)


def _above_zero(key: str) -> Form:
    words = f"{QUANTITIES[key].symbol} > 0"
    return form(key, words, "", lambda: _ABOVE_ZERO, kinds=_PROSE)


_DOMAINS = {
    key: quantity.domain
    for key, quantity in QUANTITIES.items()
    if quantity.domain != EVERYTHING and key not in ("R2", "alpha")
}

BOUNDS = identity(
    "bounds",
    "possible values",
    "0 ≤ R² ≤ 1, adjusted R² ≤ R², 0 ≤ p ≤ 1, F ≥ 0, −1 ≤ r ≤ 1, df > 0, lower ≤ upper limit",
    " ".join(["R2", *_DOMAINS, "ci_low", "ci_high"]),
    (
        _within("R2", Interval(-math.inf, 1.0)),
        _within("R2", Interval(0.0, 1.0), "within-sample"),
        *[_within(key, domain) for key, domain in _DOMAINS.items()],
        *[_above_zero(key) for key in _COUNTED],
        form("R2_adj", "adjusted R² ≤ R²", "R2", at_most),
        form("R2", "R² ≥ adjusted R²", "R2_adj", at_least),
        form("ci_low", "lower limit ≤ upper limit", "ci_high", at_most),
        form("ci_high", "upper limit ≥ lower limit", "ci_low", at_least),
    ),
    needs="",
    assumption="None, but that R² may fall below zero without an intercept, with instruments or "
    "outside the sample of the fit.",
    source="by definition of each quantity",
    explanation="Shares and probabilities lie between 0 and 1, squares are not negative, and a "
    "lower limit is below its upper one. A number outside is misprinted or stands under another "
    "quantity's name; a decimal point may be lost.",
    kinds=f"{_PROSE} anova-table coefficient-table",
)

IDENTITIES = (BOUNDS,)
