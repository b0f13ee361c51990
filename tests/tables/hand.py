"""How one author writes numbers and names: drawn once for each table."""

from __future__ import annotations

from typing import NamedTuple

import numpy as np


class Hand(NamedTuple):
    """Habits of an author."""

    rng: np.random.Generator
    zero: bool  # 0.05 rather than .05
    minus: str
    comma: bool
    blank: str
    p_digits: int
    p_floor: str  # "<" for "< .001", "0" for ".000", "e" for exact small numbers
    space: str  # between < and the number
    levels: tuple[float, float, float]

    def pick(self, *choices: str) -> str:
        return str(choices[int(self.rng.integers(len(choices)))])

    def chance(self, share: float) -> bool:
        return bool(self.rng.random() < share)

    def number(self, value: float, decimals: int) -> str:
        """A correctly rounded number with a leading zero."""
        text = f"{value:.{decimals}f}"
        if float(text) == 0:
            text = text.lstrip("-")
        return self.styled(text)

    def share(self, value: float, decimals: int) -> str:
        """A number that can't exceed one, with or without its leading zero."""
        text = f"{value:.{decimals}f}"
        if float(text) == 0:
            text = text.lstrip("-")
        if not self.zero:
            text = text.replace("0.", ".", 1) if text.lstrip("-").startswith("0.") else text
        return self.styled(text)

    def styled(self, text: str) -> str:
        text = text.replace("-", self.minus)
        return text.replace(".", ",") if self.comma else text

    def p(self, value: float) -> tuple[str, str]:
        """The relation (with its space, or nothing) and the number of a p value."""
        if value < 0.5 * 10.0**-self.p_digits:
            if self.p_floor == "e" and value > 1e-300:
                return "", self.styled(f"{value:.3g}") if value < 1e-4 else self.share(value, 6)
            if self.p_floor == "0":
                return "", self.share(0.0, self.p_digits)
            return "<" + self.space, self.share(10.0**-self.p_digits, self.p_digits)
        if value < 10.0**-self.p_digits and self.p_floor == "<":
            return "<" + self.space, self.share(10.0**-self.p_digits, self.p_digits)
        return "", self.share(value, self.p_digits)

    def stars(self, value: float) -> str:
        return "*" * sum(value < level for level in self.levels)

    def legend(self) -> str:
        """What the marks stand for."""
        names = [self.share(level, 3).rstrip("0") for level in self.levels]
        one, two, three = names
        return self.pick(
            f"* <i>p</i> < {one}, ** <i>p</i> < {two}, *** <i>p</i> < {three}",
            f"* <i>p</i> < {one}. ** <i>p</i> < {two}. *** <i>p</i> < {three}.",
            f"*** p<{three}, ** p<{two}, * p<{one}",
            f"*p < {one}; **p < {two}; ***p < {three}",
        )


def is_exact(sign: str, literal: str) -> bool:
    """Whether a p value is printed as a number that is not zero, so that it tells its statistic."""
    return not sign and literal.strip("0,.") != ""


def hand(rng: np.random.Generator) -> Hand:
    """Draw an author."""
    levels = (0.05, 0.01, 0.001) if rng.random() < 0.75 else (0.1, 0.05, 0.01)
    return Hand(
        rng,
        bool(rng.random() < 0.5),
        "−" if rng.random() < 0.4 else "-",
        bool(rng.random() < 0.06),
        str(rng.choice(["", "", "—", "–", "-", "NA"])),
        int(rng.choice([3, 3, 3, 4, 2])),
        str(rng.choice(["<", "<", "<", "0", "e"])),
        " " if rng.random() < 0.5 else "",
        levels,
    )
