"""Critical values and identities against published numbers.

Source: NIST/SEMATECH e-Handbook of Statistical Methods, sections 1.3.6.7.1 (normal), 1.3.6.7.2
(t), 1.3.6.7.3 (F) and 1.3.6.7.4 (χ²). The values are given from memory.
"""

from __future__ import annotations

import pytest

from crossfoot.laws import areas, tails
from crossfoot.laws.interval import Interval

#: Upper tail area, degrees of freedom, critical value, three decimals.
T_TABLE = [
    (0.10, 1, 3.078), (0.05, 1, 6.314), (0.025, 1, 12.706), (0.01, 1, 31.821), (0.005, 1, 63.657),
    (0.10, 5, 1.476), (0.05, 5, 2.015), (0.025, 5, 2.571), (0.01, 5, 3.365), (0.005, 5, 4.032),
    (0.10, 10, 1.372), (0.05, 10, 1.812), (0.025, 10, 2.228), (0.01, 10, 2.764),
    (0.005, 10, 3.169), (0.05, 20, 1.725), (0.025, 20, 2.086), (0.01, 20, 2.528),
    (0.005, 20, 2.845), (0.05, 30, 1.697), (0.025, 30, 2.042), (0.01, 30, 2.457),
    (0.005, 30, 2.750), (0.05, 60, 1.671), (0.025, 60, 2.000), (0.025, 100, 1.984),
]  # fmt: skip

#: Upper tail area, df1, df2, critical value, decimals.
F_TABLE = [
    (0.05, 1, 1, 161.448, 3), (0.05, 1, 5, 6.608, 3), (0.05, 2, 5, 5.786, 3),
    (0.05, 1, 10, 4.965, 3), (0.05, 2, 10, 4.103, 3), (0.05, 3, 10, 3.708, 3),
    (0.05, 4, 10, 3.478, 3), (0.05, 5, 10, 3.326, 3), (0.05, 10, 10, 2.978, 3),
    (0.05, 1, 20, 4.351, 3), (0.05, 2, 20, 3.493, 3), (0.05, 3, 20, 3.098, 3),
    (0.05, 1, 30, 4.171, 3), (0.05, 2, 30, 3.316, 3), (0.05, 3, 30, 2.922, 3),
    (0.05, 1, 60, 4.001, 3), (0.05, 2, 60, 3.150, 3), (0.05, 3, 60, 2.758, 3),
    (0.01, 1, 10, 10.04, 2), (0.01, 2, 10, 7.56, 2), (0.01, 1, 20, 8.10, 2), (0.01, 2, 20, 5.85, 2),
    (0.01, 3, 20, 4.94, 2),
]  # fmt: skip

#: Upper tail area, degrees of freedom, critical value, three decimals.
CHI2_TABLE = [
    (0.10, 1, 2.706), (0.05, 1, 3.841), (0.025, 1, 5.024), (0.01, 1, 6.635), (0.001, 1, 10.828),
    (0.05, 2, 5.991), (0.01, 2, 9.210), (0.001, 2, 13.816), (0.05, 3, 7.815), (0.01, 3, 11.345),
    (0.05, 4, 9.488), (0.05, 5, 11.070), (0.05, 10, 18.307), (0.01, 10, 23.209),
    (0.05, 20, 31.410), (0.05, 30, 43.773),
]  # fmt: skip

Z_TABLE = [(0.10, 1.2816), (0.05, 1.6449), (0.025, 1.9600), (0.01, 2.3263), (0.005, 2.5758)]


def point(value: float) -> Interval:
    return Interval(value, value)


@pytest.mark.parametrize(("area", "df", "value"), T_TABLE)
def test_t(area, df, value):
    assert round(tails.t_at(2 * area, float(df)), 3) == value
    assert value == pytest.approx(areas.to_t(point(2 * area), point(df)).low, abs=5.1e-4)


@pytest.mark.parametrize(("area", "df1", "df2", "value", "decimals"), F_TABLE)
def test_f(area, df1, df2, value, decimals):
    assert round(tails.f_at(area, float(df1), float(df2)), decimals) == value


@pytest.mark.parametrize(("area", "df", "value"), CHI2_TABLE)
def test_chi2(area, df, value):
    assert round(tails.chi2_at(area, float(df)), 3) == value


@pytest.mark.parametrize(("area", "value"), Z_TABLE)
def test_z(area, value):
    assert round(tails.z_at(2 * area), 4) == value
