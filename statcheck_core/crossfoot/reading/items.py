"""What reading finds in a text before anything is grouped: parts and items."""

from __future__ import annotations

from typing import NamedTuple

#: Quantities that are counts: exact when printed without decimals.
WHOLE = frozenset({"n", "k", "df", "df1", "df2"})

#: Quantities that are test statistics.
TESTS = frozenset({"F", "F_change", "t", "r", "z", "chi2"})

#: Heads of items that estimate the coefficient of one predictor.
COEFFICIENTS = frozenset({"b", "β", "beta", "odds_ratio"})


class Text(NamedTuple):
    """Folded visible text of a block, and whether it writes decimals with a comma."""

    folded: str
    decimal_comma: bool = False


class Part(NamedTuple):
    """One number of an item: a reading that has no claim yet, placed in the folded text."""

    quantity: str
    relation: str
    start: int
    end: int
    low: float
    high: float
    term: str | None = None


class Item(NamedTuple):
    """What one name in the text says.

    Attributes
    ----------
    head
        The quantity that the name names, or a scanner's word for several at once (``ci``,
        ``df-pair``) or for what needs its neighbours to be settled (``β``).
    parts
        Its numbers in printed order.
    start, end
        Place of the name and all its numbers.
    flags
        Contexts that the name itself states, or scanner's words: ``plural`` (one name for several
        tests), ``listed`` (one of several numbers of one name), ``percent`` (told as explained
        variance), ``told`` (a sample size in words), ``lower`` (a lower-case f), ``by-name`` (a
        test by a name that means much else), ``labelled`` (a letter with a label of its own),
        ``perhaps-se`` (its last number may be an SE), ``nameless`` (an estimate told in words,
        which may hide its sign), ``weakly`` (in words that may mean else), ``if-ratio`` and
        ``if-enclosed`` (an estimate only if its test or its interval tells so),
        ``all`` (printed once for all tests of the sentence), ``dealt`` (one of several p in
        order), ``grown`` (an R² told beside that of a smaller model), ``estimated`` (what the
        test before it is of), ``wald`` (an F that does not follow from R²), ``letter`` (a p that
        counts predictors), ``of-what`` (words say what it is of).
    """

    head: str
    parts: tuple[Part, ...]
    start: int
    end: int
    flags: tuple[str, ...] = ()


#: Degrees of freedom without end: the reference distribution is the limit of t or F.
INFINITE = frozenset({"Inf", "inf", "∞"})
#: As good as these: tail areas differ from those of the limit by less than they are known.
AS_GOOD_AS = 1e12

#: Flags that speak to the scanner and are no contexts of a claim.
SCANNER_FLAGS = frozenset(
    {
        "plural",
        "listed",
        "percent",
        "told",
        "lower",
        "by-name",
        "labelled",
        "perhaps-se",
        "if-ratio",
        "if-enclosed",
        "nameless",
        "all",
        "dealt",
        "grown",
        "estimated",
        "wald",
        "letter",
        "of-what",
        "weakly",
    }
)
