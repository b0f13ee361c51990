"""The quantities that Crossfoot knows, and the formal names that identities give to cells."""

from __future__ import annotations

from collections.abc import Mapping
from typing import NamedTuple

from crossfoot.expressions import expression
from crossfoot.laws.interval import EVERYTHING, Interval

_INFINITY = EVERYTHING.high
_POSITIVE = Interval(0.0, _INFINITY)
_SHARE = Interval(0.0, 1.0)
_SIGNED_SHARE = Interval(-1.0, 1.0)
_AT_MOST_ONE = Interval(-_INFINITY, 1.0)


class Quantity(NamedTuple):
    """A quantity that a reading may have.

    Attributes
    ----------
    key
        Its name in code, JSON and settings.
    symbol
        As it is printed to people.
    name
        As it is said in a sentence.
    domain
        The values it can have at all, in some published use of the symbol.
    whole
        It counts something. Degrees of freedom count too, but adjusted ones need not be whole.
    description
        What it measures.
    """

    key: str
    symbol: str
    name: str
    domain: Interval
    whole: bool
    description: str


class Formal(NamedTuple):
    """A name that an identity gives to one cell among several of the same quantity.

    Attributes
    ----------
    name
        The formal name, unique among the quantities' keys too.
    quantity
        Key of the quantity that the cell holds.
    symbol
        As it is printed to people.
    role
        Which cell it is.
    """

    name: str
    quantity: str
    symbol: str
    role: str


_QUANTITIES = (
    Quantity("F", "F", "F ratio", _POSITIVE, False,
             "The ratio of two mean squares, referred to an F distribution."),
    Quantity("df1", "df1", "degrees of freedom of the effect", _POSITIVE, True,
             "The numerator degrees of freedom of an F ratio; of the overall F, the number of "
             "slopes."),
    Quantity("df2", "df2", "degrees of freedom of the error", _POSITIVE, True,
             "The denominator degrees of freedom of an F ratio."),
    Quantity("t", "t", "t ratio", EVERYTHING, False,
             "An estimate divided by its standard error, referred to a t distribution."),
    Quantity("df", "df", "degrees of freedom", _POSITIVE, True,
             "The degrees of freedom of a t ratio, a correlation, χ² or the row of a table."),
    Quantity("r", "r", "correlation", _SIGNED_SHARE, False,
             "Pearson's product-moment correlation."),
    Quantity("z", "z", "z ratio", EVERYTHING, False,
             "An estimate divided by its standard error, referred to the normal distribution."),
    Quantity("chi2", "χ²", "chi-squared", _POSITIVE, False,
             "A statistic referred to a χ² distribution."),
    Quantity("p", "p", "p value", _SHARE, False,
             "The probability, under the null hypothesis, of a statistic at least so extreme."),
    Quantity("n", "n", "number of cases", Interval(1.0, _INFINITY), True,
             "The number of cases that the analysis rests on."),
    Quantity("k", "k", "number of predictors", _POSITIVE, True,
             "The number of predictors of the model, its intercept not counted."),
    Quantity("R", "R", "multiple correlation", _SHARE, False,
             "The correlation of the response with its fitted values."),
    Quantity("R2", "R²", "coefficient of determination", _SHARE, False,
             "The share of the response's sum of squares that the model accounts for."),
    Quantity("R2_adj", "adjusted R²", "adjusted coefficient of determination", _AT_MOST_ONE,
             False, "R² corrected for the number of predictors; it can be negative."),
    Quantity("R2_change", "ΔR²", "change of R²", _SIGNED_SHARE, False,
             "The R² of the larger model less that of the smaller one."),
    Quantity("F_change", "ΔF", "F ratio of the change", _POSITIVE, False,
             "The F ratio of the predictors that the larger model adds."),
    Quantity("b", "b", "coefficient", EVERYTHING, False,
             "A coefficient in the units of the response over those of the predictor."),
    Quantity("beta", "β", "standardised coefficient", EVERYTHING, False,
             "A coefficient in standard deviations of the response over those of the predictor."),
    Quantity("se", "SE", "standard error", _POSITIVE, False,
             "The standard error of the coefficient."),
    Quantity("ci_low", "lower limit", "lower limit of the interval", EVERYTHING, False,
             "The lower limit of the confidence interval."),
    Quantity("ci_high", "upper limit", "upper limit of the interval", EVERYTHING, False,
             "The upper limit of the confidence interval."),
    Quantity("ci_level", "level", "confidence level", _SHARE, False,
             "The level of the confidence interval, as a share."),
    Quantity("ss", "SS", "sum of squares", _POSITIVE, False,
             "A sum of squared deviations."),
    Quantity("ms", "MS", "mean square", _POSITIVE, False,
             "A sum of squares divided by its degrees of freedom."),
    Quantity("s", "s", "residual standard deviation", _POSITIVE, False,
             "The residual standard error, the root of the error's mean square."),
    Quantity("sd", "SD", "standard deviation", _POSITIVE, False,
             "The standard deviation of a variable."),
    Quantity("mean", "M", "mean", EVERYTHING, False, "The mean of a variable."),
    Quantity("f2", "f²", "Cohen's f²", _POSITIVE, False,
             "R² over the share that is left unexplained."),
    Quantity("eta2", "η²", "eta squared", _SHARE, False,
             "The share of the total sum of squares that an effect accounts for."),
    Quantity("eta2_partial", "ηp²", "partial eta squared", _SHARE, False,
             "An effect's sum of squares over the sum of its own and the error's."),
    Quantity("omega2", "ω²", "omega squared", _AT_MOST_ONE, False,
             "An estimate of the share of the variance that an effect accounts for; it can be "
             "negative."),
    Quantity("phi", "φ", "phi coefficient", _SIGNED_SHARE, False,
             "The correlation of two divisions in two, the root of χ² over the number of cases."),
    Quantity("cramers_v", "V", "Cramér's V", _SHARE, False,
             "The root of χ² over the greatest that it can be in a table of its shape."),
    Quantity("vif", "VIF", "variance inflation factor", Interval(1.0, _INFINITY), False,
             "How many times the other predictors inflate the variance of a coefficient."),
    Quantity("tolerance", "tolerance", "tolerance", _SHARE, False,
             "The share of a predictor's variance that the other predictors leave."),
    Quantity("odds_ratio", "OR", "odds ratio", _POSITIVE, False,
             "The factor by which the odds change with a unit of the predictor."),
    Quantity("alpha", "α", "significance level", _SHARE, False,
             "The level below which the text calls a p value significant."),
)  # fmt: skip

#: Every quantity by its key.
QUANTITIES: Mapping[str, Quantity] = {quantity.key: quantity for quantity in _QUANTITIES}

_FORMAL = (
    Formal("ss_effect", "ss", "SS effect", "the sum of squares in an effect's row"),
    Formal("ss_model", "ss", "SS model", "the sum of squares in the model's row"),
    Formal("ss_error", "ss", "SS error", "the sum of squares in the error's row"),
    Formal("ss_total", "ss", "SS total", "the sum of squares in the row of the corrected total"),
    Formal("ss_full", "ss", "SSE full", "the error's sum of squares in the larger model"),
    Formal("ss_reduced", "ss", "SSE reduced", "the error's sum of squares in the smaller model"),
    Formal("df_error", "df", "df error", "the degrees of freedom in the error's row"),
    Formal("df_full", "df", "df full", "the error's degrees of freedom in the larger model"),
    Formal("df_reduced", "df", "df reduced", "the error's degrees of freedom in the smaller model"),
    Formal("ms_effect", "ms", "MS effect", "the mean square in an effect's or the model's row"),
    Formal("ms_error", "ms", "MS error", "the mean square in the error's row"),
    Formal("R2_full", "R2", "R² full", "R² of the larger model"),
    Formal("R2_reduced", "R2", "R² reduced", "R² of the smaller model"),
    Formal("p_stars", "p", "p by its marks", "the p values that the marks stand for by the legend"),
    Formal("p_adjusted", "p", "adjusted p", "p after an adjustment for the number of tests"),
    Formal("total", "ss", "total", "the total of a column, of sums of squares or of df"),
)

#: Every formal name. The parts of a sum, ``part1`` to ``partN``, are not listed.
FORMAL: Mapping[str, Formal] = {formal.name: formal for formal in _FORMAL}

_PART = expression(r"part[1-9]\d{0,3}")


def domain(name: str) -> Interval:
    """Return the values that a quantity, or the cell of a formal name, can have.

    Raises
    ------
    KeyError
        If there is no such name.
    """
    if name in QUANTITIES:
        return QUANTITIES[name].domain
    if name in FORMAL:
        return QUANTITIES[FORMAL[name].quantity].domain
    if _PART.fullmatch(name):
        return _POSITIVE
    raise KeyError(name)


def symbol(name: str) -> str:
    """Return a quantity, or the cell of a formal name, as it is printed to people."""
    if name in QUANTITIES:
        return QUANTITIES[name].symbol
    return FORMAL[name].symbol if name in FORMAL else name.replace("part", "part ")
