"""Real fits to drawn data, by statsmodels, and the sums that its tables of variance give."""

from __future__ import annotations

from typing import Any, NamedTuple

import numpy as np
import pandas as pd
import statsmodels.api as sm
from statsmodels.formula.api import ols
from statsmodels.stats.anova import anova_lm

PREDICTORS = (
    "Rainfall", "Tread depth", "Route length (km)", "Age", "Load", "Gradient", "Wetting, winter",
    "Shade", "Noise × light", "Crew size", "Salt", "Hours open", "Distance²", "Sex (1 = female)",
)  # fmt: skip
FACTORS = ("Mulch", "Surface", "Wax type", "Site", "Shift", "Crate", "Region", "Lamp", "Treatment")


class Row(NamedTuple):
    """A row of a table of variance."""

    label: str
    ss: float
    df: int
    F: float
    p: float

    @property
    def ms(self) -> float:
        return self.ss / self.df


def names(rng: np.random.Generator, pool: tuple[str, ...], count: int) -> list[str]:
    return [str(name) for name in rng.choice(pool, count, replace=False)]


def regression(rng: np.random.Generator, count: int, n: int) -> Any:
    """A least-squares fit with some strong, some weak predictors on very different scales."""
    scales = 10.0 ** rng.integers(-2, 4, count)
    x = rng.normal(size=(n, count)) * scales
    slopes = rng.normal(size=count) * rng.choice([0.0, 0.2, 0.5, 1.0], count) / scales
    y = 3 + x @ slopes + rng.normal(size=n)
    return sm.OLS(y * 10.0 ** rng.integers(-1, 3), sm.add_constant(x)).fit()


def logistic(rng: np.random.Generator, count: int, n: int) -> Any:
    """A logistic fit."""
    while True:
        x = rng.normal(size=(n, count))
        odds = 1 / (1 + np.exp(-(x @ rng.normal(size=count) * 0.5)))
        y = (rng.random(n) < odds).astype(float)
        if 5 < y.sum() < n - 5:
            return sm.Logit(y, sm.add_constant(x)).fit(disp=0)


def variance(rng: np.random.Generator, factors: int) -> tuple[list[Row], Row, Row]:
    """The effects, the error and the total of a balanced design."""
    levels = [int(rng.integers(2, 5)) for _ in range(factors)]
    each = int(rng.integers(3, 15))
    grid = np.array(np.meshgrid(*[np.arange(k) for k in levels])).reshape(factors, -1)
    data = {f"f{i}": np.repeat(grid[i], each).astype(str) for i in range(factors)}
    n = grid.shape[1] * each
    scale = 10.0 ** rng.integers(-1, 3)
    y = rng.normal(size=n)
    for i in range(factors):
        effects = rng.normal(size=levels[i]) * rng.choice([0.0, 0.4, 0.9])
        y = y + effects[data[f"f{i}"].astype(int)]
    frame = pd.DataFrame({**data, "y": y * scale})
    formula = "y ~ " + " * ".join(f"C(f{i})" for i in range(factors))
    table = anova_lm(ols(formula, frame).fit())
    labels = names(rng, FACTORS, factors)
    titles = [labels[0]] if factors == 1 else [*labels, f"{labels[0]} × {labels[1]}"]
    effects = [
        Row(title, float(r.sum_sq), int(r.df), float(r.F), float(r["PR(>F)"]))
        for title, (_, r) in zip(titles, table.iloc[:-1].iterrows(), strict=True)
    ]
    last = table.iloc[-1]
    error = Row("error", float(last.sum_sq), int(last.df), np.nan, np.nan)
    total = sum(row.ss for row in effects) + error.ss
    return effects, error, Row("total", total, n - 1, np.nan, np.nan)
