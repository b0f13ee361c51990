"""A statistic that a program prints without its symbol: the test's name tells which it is.

``TtestResult(statistic=2.31, pvalue=0.024, df=58.0)``, ``test statistic: 9.3`` below the words
``Kruskal-Wallis``.
"""

from __future__ import annotations

from crossfoot.expressions import expression
from crossfoot.reading.items import Item, Text
from crossfoot.reading.names import Name
from crossfoot.reading.values import value_after

#: Names of tests, by what their statistic is; none of some, whose distribution is their own.
_TESTS = expression(
    r"(?P<t>(?<![A-Za-z])[tT][\s_-]?(?:[tT]est|stat)|(?i:student)|weightstats)"
    r"|(?P<F>(?i:anova)(?!_?rm)|[fF]_oneway|[oO]ne[\s_-]?way|(?i:levene)|(?<![A-Za-z])[fF][\s_-]?(?:[tT]est|stat))"
    r"|(?P<chi2>(?i:kruskal(?:[\s–-]wallis)?(?:\srank[\s-]sum)?|friedman|chi[\s_-]?2|chi[\s_-]?sq|fligner|bartlett|power_diverg|alexandergovern|log[\s_-]?rank"
    r"|hosmer|likelihood[\s_-]ratio|breusch|ljung|linear-by-linear|continuity\scorr)|χ)"
    r"|(?P<z>(?<![A-Za-z])[zZ][\s_-]?(?:[tT]est|stat)|proportions_z)"
    r"|(?P<r>(?i:pearson))|(?P<rank>(?i:spearman|kendall|weightedtau|somers))"
    r"|(?P<other>(?i:wilcoxon|mann[\s_-]?whitney|shapiro|kolmogorov|anderson|jarque|dickey|adfuller|durbin|brunner|ansari|epps"
    r"|cramer|cramér|barnard|boschloo|fisher|mood|normaltest|skewtest|kurtosistest|mcnemar|sign[\s_-]test|ranksum|rank[\s_-]sum|signed"
    r"|tukey|dunnett)|ks_|KS|ks(?=[\s_-]?test))"
)
_DEGREES = expression(r"df_?(?:num|denom)|num_?df")
#: How far around a statistic its test is named, in characters.
_BEFORE, _BEHIND = 240, 160


def read_statistic(text: Text, name: Name) -> Item | None:
    """Read a statistic that only the name of its test tells apart."""
    start, end = name.match.span()
    quantity = _quantity(text.folded, start, end)
    if not quantity:
        return None
    value = value_after(text, end, "r" if quantity == "rank" else quantity, name)
    if value is None:
        return None
    flags = ("rank-correlation",) if quantity == "rank" else ()
    return Item(value.quantity, (value,), start, value.end, flags)


def _quantity(folded: str, start: int, end: int) -> str:
    """Return the quantity that the nearest name of a test before a statistic makes it."""
    named = named_test(folded, max(0, start - _BEFORE), start)
    if named is not None:
        return named
    return "F" if _DEGREES.search(folded, end, end + _BEHIND) else ""


def named_test(text: str, start: int = 0, end: int | None = None) -> str | None:
    """Return what the statistic of the test is that a text names last.

    None where it names no test; empty where the test's statistic has a distribution of its own;
    ``rank`` for a correlation of ranks.
    """
    named = None
    for found in _TESTS.finditer(text, start, len(text) if end is None else end):
        named = found.lastgroup
    return "" if named == "other" else named
