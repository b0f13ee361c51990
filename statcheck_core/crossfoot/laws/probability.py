"""p from a statistic: the tail areas of its reference distribution."""

from __future__ import annotations

import math
from collections.abc import Callable

from crossfoot.laws.arithmetic import divide, multiply, rising, root, square
from crossfoot.laws.declare import form, identity
from crossfoot.laws.identity import Form, Identity
from crossfoot.laws.interval import EVERYTHING, Interval
from crossfoot.laws.sides import AGAINST, FOUND, TWO, Side

_KINDS = (
    "overall-model effect model-change coefficient correlation mean-comparison frequency "
    "anova-table coefficient-table model-summary"
)
_SOURCE = "NIST/SEMATECH e-Handbook of Statistical Methods, section 1.3.6.6"
_SINGLE = Interval(1.0, 1.0)


def _area(name: str, *arguments: Interval) -> Interval:
    """Call a function of :mod:`crossfoot.laws.areas`, whose import is slow, by its name."""
    from crossfoot.laws import areas

    function: Callable[..., Interval] = getattr(areas, name)
    return function(*arguments)


def _tail(
    side: Side,
    law: str,
    statistic: str,
    symbol: str,
    words: str,
    df: str = "",
    *,
    unsigned: bool = False,
    needs: str = "",
    kinds: str = "",
) -> tuple[Form, Form]:
    """Return p from a statistic and the statistic from p.

    A direction makes sense for an unsigned statistic with a single degree of freedom only.
    """
    directed = unsigned and side is not TWO

    def p_of(value: Interval, *dfs: Interval) -> Interval:
        if directed and dfs[0] != _SINGLE:
            return EVERYTHING
        return side.area(_area(f"of_{law}", value, *dfs))

    def of_p(p: Interval, *dfs: Interval) -> Interval:
        both = side.both(p)
        if both is None or (directed and dfs[0] != _SINGLE):
            return EVERYTHING
        return _area(f"to_{law}", both, *dfs)

    words = side.words.format(words)
    return (
        form("p", f"p = {words}", f"{statistic} {df}", p_of, needs=needs, kinds=kinds),
        form(
            statistic,
            f"{symbol} such that p = {words}",
            f"p {df}",
            of_p,
            needs=needs,
            kinds=kinds,
            mirrored=not unsigned,
        ),
    )


def _slope(r: float) -> float:
    """Return r/√(1 − r²), which √df turns into t."""
    rest = (1 - r) * (1 + r)
    return r / math.sqrt(rest) if rest > 0 else math.copysign(math.inf, r)


def _slopes(r: Interval) -> Interval:
    # The distance of r from ±1 is as uncertain as r itself, not relatively so.
    return rising(_slope, Interval(max(r.low - 1e-15, -1.0), min(r.high + 1e-15, 1.0)))


def _correlation(slope: float) -> float:
    return slope / math.hypot(1.0, slope) if abs(slope) < math.inf else math.copysign(1.0, slope)


_R_AND_T = (
    form("t", "t = r√(df/(1 − r²))", "r df", lambda r, df: multiply(_slopes(r), root(df))),
    form("r", "r = t/√(t² + df)", "t df", lambda t, df: rising(_correlation, divide(t, root(df)))),
    form("df", "df = t²(1 − r²)/r²", "r t", lambda r, t: square(divide(t, _slopes(r)))),
)


def _p_from_f(side: Side, needs: str) -> Identity:
    return identity(
        "p-from-f",
        "p from F",
        "p = " + side.words.format("P(F(df1, df2) > F)"),
        "p F df1 df2 F_change",
        (
            *_tail(side, "f", "F", "F", "P(F(df1, df2) > F)", "df1 df2", unsigned=True),
            *_tail(
                side,
                "f",
                "F_change",
                "ΔF",
                "P(F(df1, df2) > ΔF)",
                "df1 df2",
                unsigned=True,
                kinds="model-change",
            ),
        ),
        needs=f"reference-distribution unadjusted-p df-as-used uncorrected-statistic upper-tail "
        f"{needs}",
        assumption="p is the upper tail area of the F distribution with the printed degrees of "
        "freedom, neither adjusted for several comparisons nor taken from resampling.",
        source=_SOURCE,
        explanation="The p value of an F test is the area of the F distribution beyond the F "
        "found. Where they disagree, one of F, p and the two degrees of freedom is misprinted or "
        "comes from another test; df1 and df2 may be swapped.",
        kinds=_KINDS,
    )


def _p_from_t(side: Side, needs: str) -> Identity:
    return identity(
        "p-from-t",
        "p from t",
        "p = " + side.words.format("P(abs(T(df)) > abs(t))"),
        "p t df",
        _tail(side, "t", "t", "t", "P(abs(T(df)) > abs(t))", "df"),
        needs=f"reference-distribution unadjusted-p df-as-used {needs}",
        assumption="p is the tail area of the t distribution with the printed degrees of freedom, "
        "on both sides unless the text says one, and not adjusted for several comparisons.",
        source=_SOURCE,
        explanation="The p value of a t test is the area of the t distribution beyond ±t. A p "
        "half as large comes from a one-sided test; otherwise one of t, df and p is misprinted.",
        kinds=_KINDS,
    )


def _p_from_r(side: Side, needs: str) -> Identity:
    words = "P(abs(T(df)) > abs(t)), t = r√(df/(1 − r²))"
    tail_needs = f"reference-distribution unadjusted-p df-as-used {needs}"
    return identity(
        "p-from-r",
        "p from a correlation",
        "p = " + side.words.format(words),
        "p r df t",
        (*_tail(side, "r", "r", "r", words, "df", needs=tail_needs), *_R_AND_T),
        needs="product-moment",
        assumption="r is a product-moment correlation and p the tail area of its t, on both sides "
        "unless the text says one, and not adjusted for several comparisons.",
        source=f"{_SOURCE}; Fisher 1915, Biometrika 10, 507–521",
        explanation="A correlation is tested by t = r√(df/(1 − r²)), with df = n − 2. Where p "
        "does not follow, one of r, df and p is misprinted, n may stand for df, or the test was "
        "one-sided.",
        kinds="correlation",
    )


def _p_from_chi2(side: Side, needs: str) -> Identity:
    return identity(
        "p-from-chi2",
        "p from χ²",
        "p = " + side.words.format("P(χ²(df) > χ²)"),
        "p chi2 df",
        _tail(side, "chi2", "chi2", "χ²", "P(χ²(df) > χ²)", "df", unsigned=True),
        needs=f"reference-distribution unadjusted-p df-as-used uncorrected-statistic {needs}",
        assumption="p is the upper tail area of the χ² distribution with the printed degrees of "
        "freedom, without a correction that the printed χ² lacks.",
        source=_SOURCE,
        explanation="The p value of a χ² test is the area of the χ² distribution beyond the χ² "
        "found. Where they disagree, one of χ², df and p is misprinted, or only one of χ² and p "
        "carries a continuity correction.",
        kinds=_KINDS,
    )


def _p_from_z(side: Side, needs: str) -> Identity:
    return identity(
        "p-from-z",
        "p from z",
        "p = " + side.words.format("P(abs(Z) > abs(z))"),
        "p z",
        _tail(side, "z", "z", "z", "P(abs(Z) > abs(z))"),
        needs=f"reference-distribution unadjusted-p uncorrected-statistic {needs}",
        assumption="p is the tail area of the standard normal distribution, on both sides unless "
        "the text says one, and not adjusted for several comparisons.",
        source="NIST/SEMATECH e-Handbook of Statistical Methods, section 1.3.6.6.1",
        explanation="The p value of a z ratio is the area of the normal distribution beyond ±z. "
        "A p half as large comes from a one-sided test; otherwise z or p is misprinted.",
        kinds=_KINDS,
    )


_MAKERS = (
    (_p_from_f, ""),
    (_p_from_t, "two-sided"),
    (_p_from_r, "two-sided"),
    (_p_from_chi2, ""),
    (_p_from_z, "two-sided"),
)

IDENTITIES = tuple(make(TWO, needs) for make, needs in _MAKERS)

#: The same for one-sided tests: of the side found, and of the side against it. Those of F and χ²
#: say nothing unless they have a single degree of freedom.
ONE_SIDED = {
    found.slug: (found, against)
    for found, against in (
        (make(FOUND, "directed"), make(AGAINST, "directed")) for make, _ in _MAKERS
    )
}
