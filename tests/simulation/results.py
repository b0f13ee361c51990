"""Correctly computed results, correctly rounded: what a careful author prints.

Each family draws true values with NumPy, by the definitions of the quantities (not by the forms
that the audit uses), and prints some of them with as many digits as authors do. ``doubtful``
says which of its claims leave unsaid what an identity assumes, so that a doubt is justified.
"""

from __future__ import annotations

from collections.abc import Callable, Iterator, Mapping
from typing import NamedTuple

import numpy as np
from numpy.random import Generator
from numpy.typing import NDArray
from scipy import special

from audit.notation import reading
from crossfoot.model import Claim, Reading, Span

Floats = NDArray[np.float64]
Values = Mapping[str, Floats]

#: Decimals that authors print, by quantity.
DECIMALS = {
    "F": (1, 2, 2, 2, 3), "F_change": (2, 2, 3), "t": (1, 2, 2, 3), "z": (2, 2, 3),
    "chi2": (1, 2, 2, 3), "r": (2, 2, 3), "beta": (2, 2, 3), "b": (1, 2, 3), "se": (2, 3),
    "ci_low": (2, 3), "ci_high": (2, 3), "odds_ratio": (2, 2, 3), "R2": (2, 2, 3, 4),
    "R2_adj": (2, 2, 3, 4), "R2_change": (2, 3), "R": (2, 3), "f2": (2, 3), "eta2": (2, 3),
    "eta2_partial": (2, 2, 3), "omega2": (2, 3), "p": (2, 3, 3, 3, 4), "df": (1, 2),
    "df1": (2,), "df2": (1, 2),
}  # fmt: skip
SHARES = frozenset({"r", "beta", "R2", "R2_adj", "R2_change", "R", "eta2", "eta2_partial",
                    "omega2", "p"})  # fmt: skip
PERCENT = frozenset({"R2", "R2_adj", "R2_change", "eta2", "eta2_partial"})
THRESHOLDS = (0.0001, 0.001, 0.01, 0.05, 0.1)


class Family(NamedTuple):
    """A kind of result that is drawn and printed.

    Attributes
    ----------
    name, kind
        For the test, and of the claim.
    draw
        Returns true values, an array a quantity.
    printed
        Sets of quantities that a claim may print, one of which is chosen; those joined by ``+``
        are not printed without each other.
    context
        What the text says of the test.
    doubtful
        Whether it leaves an assumption unsaid that does not hold.
    share
        How many of all claims are of this family, beside the others.
    """

    name: str
    kind: str
    draw: Callable[[Generator, int], Values]
    printed: tuple[str, ...]
    context: tuple[str, ...] = ()
    doubtful: bool = False
    share: float = 4


def f_area(F: Floats, df1: Floats, df2: Floats) -> Floats:
    return special.fdtrc(df1, df2, F)


def t_area(t: Floats, df: Floats) -> Floats:
    return 2 * special.stdtr(df, -np.abs(t))


def _model(rng: Generator, size: int) -> Values:
    k = rng.integers(1, 9, size).astype(float)
    n = k + 2 + np.floor(10 ** rng.uniform(0.3, 3.3, size))
    df2 = n - k - 1
    R2 = np.clip(rng.beta(1.2, 3, size), 1e-4, 1 - 1e-4)
    # Many models sit near significance, where rounding and thresholds bite.
    near = rng.random(size) < 0.4
    F_near = special.fdtri(k, df2, 1 - 10 ** rng.uniform(-4, -0.5, size))
    R2 = np.where(near, k * F_near / (k * F_near + df2), R2)
    F = (R2 / k) / ((1 - R2) / df2)
    return {
        "df1": k, "df2": df2, "n": n, "k": k, "R2": R2, "F": F, "R": np.sqrt(R2),
        "R2_adj": 1 - (1 - R2) * (n - 1) / df2, "f2": R2 / (1 - R2), "p": f_area(F, k, df2),
    }  # fmt: skip


def _slope(rng: Generator, size: int) -> Values:
    """One predictor, so that its β is the correlation."""
    values = dict(_model(rng, size))
    n = values["n"]
    r = rng.uniform(-0.95, 0.95, size)
    df2 = n - 2
    F = r * r / (1 - r * r) * df2
    ones = np.ones(size)
    return {
        "df1": ones, "df2": df2, "n": n, "k": ones, "R2": r * r, "F": F, "R": abs(r), "r": r,
        "beta": r, "R2_adj": 1 - (1 - r * r) * (n - 1) / df2, "p": f_area(F, ones, df2),
        "t": np.sign(r) * np.sqrt(F),
    }  # fmt: skip


def _missing(rng: Generator, size: int) -> Values:
    values = dict(_model(rng, size))
    values["n"] = values["n"] + rng.integers(0, 12, size)
    return values


def _effect(rng: Generator, size: int) -> Values:
    df1 = rng.integers(1, 7, size).astype(float)
    df2 = np.floor(4 + 10 ** rng.uniform(0.3, 3, size))
    F = rng.f(df1, df2) * 10 ** rng.uniform(-0.3, 1.2, size)
    return _effects(F, df1, df2, np.zeros(size))


def _effects(F: Floats, df1: Floats, df2: Floats, others: Floats) -> Values:
    """Return effect sizes by sums of squares, the error's mean square being one."""
    ss, error = F * df1, df2
    total = ss + error + others
    return {
        "F": F, "df1": df1, "df2": df2, "p": f_area(F, df1, df2),
        "eta2_partial": ss / (ss + error), "eta2": ss / total,
        "omega2": (ss - df1) / (total + 1),
    }  # fmt: skip


def _factorial(rng: Generator, size: int) -> Values:
    df1 = rng.integers(1, 5, size).astype(float)
    df2 = np.floor(6 + 10 ** rng.uniform(0.5, 2.5, size))
    F = rng.f(df1, df2) * 10 ** rng.uniform(-0.3, 1.2, size)
    return _effects(F, df1, df2, df2 * rng.uniform(0, 2, size))


def _geisser(rng: Generator, size: int) -> Values:
    values = dict(_effect(rng, size))
    df1 = values["df1"] + 1
    epsilon = rng.uniform(1 / df1, 1)
    one, two = df1 * epsilon, values["df2"] * epsilon
    # What is printed is rounded, and p is of the unrounded degrees of freedom.
    values |= {"df1": one, "df2": two, "p": f_area(values["F"], one, two)}
    return values


def _t(rng: Generator, size: int) -> Values:
    df = np.floor(2 + 10 ** rng.uniform(0.3, 3, size))
    t = rng.standard_t(df) * 10 ** rng.uniform(-0.3, 0.6, size)
    return {"t": t, "df": df, "p": t_area(t, df), "F": t * t, "df1": np.ones(size), "df2": df}


def _welch(rng: Generator, size: int) -> Values:
    df = 2 + 10 ** rng.uniform(0.3, 2.5, size)
    t = rng.standard_t(df) * 2
    return {"t": t, "df": df, "p": t_area(t, df)}


def _one_sided(rng: Generator, size: int) -> Values:
    values = dict(_t(rng, size))
    half = values["p"] / 2
    values["p"] = np.where(rng.random(size) < 0.85, half, 1 - half)
    return values


def _correlation(rng: Generator, size: int) -> Values:
    n = np.floor(6 + 10 ** rng.uniform(0.3, 3, size))
    r = np.tanh(rng.normal(0, 0.5, size))
    t = r * np.sqrt((n - 2) / (1 - r * r))
    reach = special.ndtri(0.975) / np.sqrt(n - 3)
    return {
        "r": r, "n": n, "df": n - 2, "t": t, "p": t_area(t, n - 2), "R2": r * r,
        "ci_low": np.tanh(np.arctanh(r) - reach), "ci_high": np.tanh(np.arctanh(r) + reach),
        "ci_level": np.full(size, 0.95),
    }  # fmt: skip


def _frequencies(rng: Generator, size: int) -> Values:
    df = rng.integers(1, 15, size).astype(float)
    chi2 = rng.chisquare(df) * 10 ** rng.uniform(-0.2, 0.8, size)
    n = np.floor(20 + 10 ** rng.uniform(1, 3, size))
    return {"chi2": chi2, "df": df, "n": n, "p": special.chdtrc(df, chi2)}


def _z(rng: Generator, size: int) -> Values:
    z = rng.normal(0, 2, size)
    return {"z": z, "p": 2 * special.ndtr(-abs(z))}


def _coefficient(rng: Generator, size: int) -> Values:
    df = np.floor(4 + 10 ** rng.uniform(0.5, 3, size))
    se = 10 ** rng.uniform(-1.5, 1.2, size)
    t = rng.standard_t(df) * 10 ** rng.uniform(-0.3, 0.8, size)
    level = rng.choice([0.9, 0.95, 0.95, 0.99], size)
    return _limits(t, se, df, level, special.stdtrit(df, 0.5 + level / 2))


def _default_level(rng: Generator, size: int) -> Values:
    df = np.floor(4 + 10 ** rng.uniform(0.5, 3, size))
    se = 10 ** rng.uniform(-1.5, 1.2, size)
    t = rng.standard_t(df) * 10 ** rng.uniform(-0.3, 0.8, size)
    return _limits(t, se, df, np.full(size, 0.95), special.stdtrit(df, 0.975))


def _normal_limits(rng: Generator, size: int) -> Values:
    """Limits with the normal critical value beside a t test."""
    df = np.floor(30 + 10 ** rng.uniform(0.5, 3, size))
    se = 10 ** rng.uniform(-1.5, 1.2, size)
    t = rng.standard_t(df) * 10 ** rng.uniform(-0.3, 0.8, size)
    return _limits(t, se, df, np.full(size, 0.95), np.full(size, special.ndtri(0.975)))


def _limits(t: Floats, se: Floats, df: Floats, level: Floats, critical: Floats) -> Values:
    b = t * se
    return {
        "b": b, "se": se, "t": t, "df": df, "p": t_area(t, df), "beta": np.tanh(t / 10),
        "ci_low": b - critical * se, "ci_high": b + critical * se, "ci_level": level,
    }  # fmt: skip


def _logistic(rng: Generator, size: int) -> Values:
    se = 10 ** rng.uniform(-1.3, 0, size)
    z = rng.normal(0, 2, size)
    b = z * se
    reach = special.ndtri(0.975) * se
    return {
        "b": b, "se": se, "z": z, "p": 2 * special.ndtr(-abs(z)), "odds_ratio": np.exp(b),
        "ci_low": np.exp(b - reach), "ci_high": np.exp(b + reach), "ci_level": np.full(size, 0.95),
        "chi2": z**2, "df": np.ones(size),
    }  # fmt: skip


def _ratio(rng: Generator, size: int) -> Values:
    """An odds ratio with its own standard error, by the delta method, or the coefficient's."""
    values = dict(_logistic(rng, size))
    own = values["se"] * values["odds_ratio"]
    values["se"] = np.where(rng.random(size) < 0.5, own, values["se"])
    return values


def _change(rng: Generator, size: int) -> Values:
    df1 = rng.integers(1, 5, size).astype(float)
    df2 = np.floor(8 + 10 ** rng.uniform(0.8, 2.8, size))
    full = rng.uniform(0.02, 0.9, size)
    change = full * rng.uniform(0.001, 1, size) ** 2
    F = (change / df1) / ((1 - full) / df2)
    return {
        "R2": full, "R2_change": change, "F_change": F, "df1": df1, "df2": df2,
        "p": f_area(F, df1, df2), "f2": change / (1 - full),
    }  # fmt: skip


FAMILIES = (
    Family("model", "overall-model", _model,
           ("R2 F df1 df2 p", "R2 R2_adj F df1 df2 p", "R2 R2_adj F df1 df2 p n", "F df1 df2 p",
            "R2_adj F df1 df2 p", "R2 df1 df2 p", "R R2 R2_adj F df1 df2 p", "n k R2 F df1 df2",
            "R2 R2_adj n df1 F", "R2 R2_adj n F p", "R2 f2 F df1 df2", "R2_adj df1 df2 p n",
            "R2 R2_adj n", "R2_adj n F"), share=12),
    Family("slope", "overall-model", _slope,
           ("r R2 F df1 df2 p", "beta R2 F df1 df2 p", "r beta df1 R2_adj", "F t df1 df2 p R2")),
    Family("missing", "overall-model", _missing,
           ("R2 F df1 df2 p n", "R2 R2_adj F df1 df2 n", "R2_adj n F df1"), doubtful=True,
           share=0.25),
    Family("robust", "overall-model",
           lambda rng, size: {**_model(rng, size), "R2": rng.uniform(0.01, 0.9, size)},
           ("R2 F df1 df2 p",), ("robust",), share=1),
    Family("effect", "effect", _effect,
           ("F df1 df2 p", "F df1 df2 p eta2_partial", "F df1 df2 eta2_partial",
            "F df1 df2 p eta2", "F df1 df2 p omega2", "df1 df2 p eta2_partial"), share=10),
    Family("factorial", "effect", _factorial,
           ("F df1 df2 p eta2", "F df1 df2 p omega2", "F df1 df2 p eta2 eta2_partial"),
           doubtful=True, share=0.25),
    Family("geisser", "effect", _geisser,
           ("F df1 df2 p", "F df1 df2 p eta2_partial"), ("adjusted-df",), share=3),
    Family("t", "mean-comparison", _t, ("t df p", "t p", "t df p F df1 df2"), share=8),
    Family("welch", "mean-comparison", _welch, ("t df p",), ("adjusted-df",)),
    Family("one-sided", "mean-comparison", _one_sided, ("t df p", "t p"), ("one-sided",)),
    Family("unmarked one-sided", "mean-comparison", _one_sided, ("t df p",), doubtful=True,
           share=0.25),
    Family("correlation", "correlation", _correlation,
           ("r df p", "r n p", "r df n p", "r df p ci_low ci_high", "r df ci_low ci_high ci_level",
            "r R2 df p", "r t df p"), share=6),
    Family("frequencies", "frequency", _frequencies, ("chi2 df p", "chi2 df n p")),
    Family("z", "mean-comparison", _z, ("z p",), share=2),
    Family("coefficient", "coefficient", _coefficient,
           ("b se t p", "b se t df p", "b se df p", "b se t df p ci_low ci_high ci_level",
            "b se df ci_low ci_high ci_level", "b t df p", "b se beta t p", "beta t df p",
            "b ci_low ci_high ci_level p"), share=10),
    Family("default level", "coefficient", _default_level,
           ("b se t df p ci_low ci_high", "b ci_low ci_high p", "b se ci_low ci_high",
            "b t ci_low ci_high df")),
    Family("normal limits", "coefficient", _normal_limits,
           ("b se t ci_low ci_high ci_level df", "b se ci_low ci_high ci_level"), doubtful=True,
           share=0.25),
    Family("logistic", "coefficient", _logistic,
           ("b se z p", "odds_ratio ci_low ci_high ci_level p", "b se z p odds_ratio",
            "b se p odds_ratio ci_low ci_high", "b se chi2+df p", "b chi2+df p odds_ratio",
            "b se z p ci_low ci_high"), ("generalised",)),
    Family("Wald", "coefficient", _logistic,
           ("b se chi2+df p", "b se chi2+df p odds_ratio", "b se z+df p", "chi2+df p"), share=2),
    Family("ratio", "coefficient", _ratio,
           ("odds_ratio se z p", "odds_ratio se z p ci_low ci_high ci_level", "odds_ratio se p"),
           ("generalised",), share=2),
    Family("change", "model-change", _change,
           ("R2 R2_change F_change df1 df2 p", "R2_change F_change df1 df2 p",
            "R2 R2_change df1 df2 p", "R2 R2_change f2"), share=4),
)  # fmt: skip


def claims(
    family: Family, size: int, seed: int, *, any_of_it: bool = False
) -> Iterator[tuple[Claim, dict[str, float]]]:
    """Return claims of a family with the true values behind them.

    ``any_of_it`` prints any of its quantities in any order, and not only the customary sets.
    """
    rng = np.random.default_rng([seed, *family.name.encode()])
    values = family.draw(rng, size)
    sets = [quantities.split() for quantities in family.printed]
    if any_of_it:
        every = list(dict.fromkeys(quantity for some in sets for quantity in some))
        sets = [
            rng.permutation(every).tolist()[: rng.integers(2, len(every) + 1)] for _ in range(size)
        ]
    choice = rng.integers(0, len(sets), size)
    hand = rng.random((size, 3))
    digits = rng.random((size, len(values)))
    names = list(values)
    for i in range(size):
        true = {name: float(values[name][i]) for name in names}
        if not all(np.isfinite(list(true.values()))):
            continue
        precision = dict(zip(names, digits[i], strict=True))
        quantities = tuple("+".join(sets[choice[i]]).split("+"))
        yield printed(family, quantities, true, precision, hand[i]), true


def printed(
    family: Family,
    quantities: tuple[str, ...],
    true: Mapping[str, float],
    precision: Mapping[str, float],
    hand: Floats,
) -> Claim:
    """Return a claim that prints some true values, correctly rounded."""
    readings = []
    for quantity in quantities:
        relation, literal = literal_of(quantity, true[quantity], precision[quantity], hand)
        readings.append(reading(quantity, relation, literal))
    return Claim(family.kind, family.name, "", Span(0, 0), tuple(readings), family.context)


def literal_of(quantity: str, value: float, draw: float, hand: Floats) -> tuple[str, str]:
    """Return the relation and the numeral by which a value is printed.

    ``draw`` decides on the digits and ``hand`` on the author's habits, all from 0 to 1.
    """
    if quantity in ("df", "df1", "df2", "n", "k", "ci_level") and value == round(value):
        return "=", str(round(value))
    if quantity == "ci_level":
        return "=", f"{value * 100:.0f}%"
    decimals = DECIMALS[quantity][int(draw * len(DECIMALS[quantity]))]
    if quantity == "p":
        above = [threshold for threshold in THRESHOLDS if value < threshold]
        if above and (round(value, decimals) == 0 or hand[0] < 0.25):
            return "<", styled(f"{above[0]}", quantity, hand)
        if value > 0.05 and hand[0] > 0.95:
            return ">", styled("0.05", quantity, hand)
    if quantity in PERCENT and hand[1] < 0.1:
        return "=", f"{value * 100:.{max(0, decimals - 2)}f}%"
    return "=", styled(f"{value:.{decimals}f}", quantity, hand)


def styled(literal: str, quantity: str, hand: Floats) -> str:
    """Return a numeral without the zero before its point, or with a typographic minus."""
    if quantity in SHARES and hand[1] > 0.4:
        literal = literal.replace("0.", ".", 1) if literal.lstrip("-").startswith("0.") else literal
    return literal.replace("-", "−") if hand[2] < 0.3 else literal


__all__ = ["FAMILIES", "Family", "Reading", "claims"]
