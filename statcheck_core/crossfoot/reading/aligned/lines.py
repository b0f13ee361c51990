"""Lines of aligned text: where they stand and which words they hold."""

from __future__ import annotations

import re
from collections.abc import Iterator, Sequence
from typing import NamedTuple

from crossfoot.reading.numerals import NUMERAL
from crossfoot.reading.tables import headings
from crossfoot.reading.tables.headings import Heading

#: A word, or a test written out that wide gaps part from its neighbours: ``F (2, 57) = 4.312``.
_INK = re.compile(
    r"(?<=\s\s)[Ft]\s?\(\d[\d.]{0,9}(?:,\s?\d[\d.]{0,9})?\)\s?=\s?\d[\d.]{0,12}(?=\s\s|$)|\S+"
)
_WRITTEN_OUT = re.compile(r"[Ft]\s?\(.{1,24}\)\s?=\s?[\d.]+|P\s?[=<>]\s?0?\.\d+")
#: Words that a line of headings has; two of them make it worth a closer look.
_HEADISH = re.compile(
    r"(?i:\bdf\d?\b|\bdof\b|ddof|\bsum|\bmean[\s_]?sq|\bsq(?:uares?)?\b|\bcoeff?(?:icient)?s?\b|\bestimates?\b|std|standard|\berr(?:or)?\b|r-?sq"
    r"|value|\bsig\b|\bprob\b|pr\s?\(?>|p>|p-unc|\bbeta\b|\bss\b|\bms\b|\bse\b|conf\.|\bci\b|chi|\bfg\b|\bgl\b|ddl|\bexp\(|stat(?:istic)?\b|\bobservations)"
    r"|\b[FtTzZpPbBRr]\b|β|η|R\^?2|R²|[%\]]"
)
RULE = re.compile(r"[-=_+*~─━═|:. ]*(?:[-=_*~─━═]{3}|-\+-)[-=_+*~─━═|:. ]*")
_ATOM = re.compile(rf"(?:[<>≤≥=]\s?)?{NUMERAL}[a-e]?(?: ?(?:\*{{1,4}}|†|\+))?|\*{{1,4}}")
_DF_TAIL = re.compile(r" ?\(df\s?=\s?\d+(?:[;,]\s?\d+)?\)$")
#: A long number may end with its decimal point.
_POINT = re.compile(r"(?<=\d{3})\.$")
#: What stands between the numbers of one value.
_BETWEEN = re.compile(r"[()\[\];]|(?<=\d),| (?:to|–) |(?<=\d) (?=[-.\d])")
#: An estimate with both its limits, parted at decimal commas too.
_MOST_PARTS = 6
#: Words that stand in columns of numbers.
_EMPTY = frozenset(
    [
        "NA",
        "NaN",
        "nan",
        "N/A",
        "Inf",
        "-",
        "--",
        "—",
        "–",
        ".",
        "*",
        "**",
        "***",
        "****",
        "ns",
        "two-sided",
        "one-sided",
        "less",
        "greater",
        "True",
        "False",
        "parametric",
    ]
)
#: Lines after a table that explain it.
NOTE = re.compile(
    r"\s*(?:signif|note|anm|source:|legend|\*{1,3}\s?p?\s?[<=]|†|[a-e]\.\s(?!total)"
    r"|.{0,40}in parenthes|.{0,40}in brackets|(?:robust )?standard errors)",
    re.IGNORECASE,
)
_STARS = re.compile(r"\*{1,4}|†|\+")
MARKS = re.compile(r"\*{1,4}|†|\.")


class Word(NamedTuple):
    """A run of text without space, in places of the whole text."""

    text: str
    start: int
    end: int


#: The label of a row: what stands before the first wide gap.
_FIRST = re.compile(r"\s*(\S+(?: \S+){0,8}?)(?=  | [-<]?\d)")


class Line(NamedTuple):
    """A line: its place without the line feed."""

    start: int
    end: int
    text: str

    @property
    def blank(self) -> bool:
        """Whether nothing stands on it."""
        return not self.text.strip(" |\t")

    @property
    def rule(self) -> bool:
        """Whether it only rules off."""
        return RULE.fullmatch(self.text) is not None and not self.blank


class Token(NamedTuple):
    """A heading in a line of headings, with what it says."""

    text: str
    start: int
    end: int
    heading: Heading


def lines_of(text: str) -> list[Line]:
    """Return the lines of a text."""
    lines: list[Line] = []
    start = 0
    for line in text.split("\n"):
        lines.append(Line(start, start + len(line), line))
        start += len(line) + 1
    return lines


def words_of(text: str, start: int, end: int) -> list[Word]:
    """Return the words of a stretch; bars between columns are none."""
    return [
        Word(found.group(), *found.span())
        for found in _INK.finditer(text, start, end)
        if found.group() not in {"|", "│", "||"}
    ]


#: What two spaces or a tab part.
_FIELD = re.compile(r"\S+(?: \S+)*")
#: A bar between columns.
_BAR = re.compile(r"(?:^|(?<=\s))[|│](?=\s|$)")


def fields_in(line: str) -> Iterator[re.Match[str]]:
    """Yield what wide gaps or bars part."""
    return _FIELD.finditer(_BAR.sub(" ", line))


def headish(line: str) -> bool:
    """Say whether a line may hold headings."""
    if len(line) > 400 or not line.strip():
        return False
    found = _HEADISH.findall(line, 0)
    return len(found) >= 2


def tokens_of(text: str, words: Sequence[Word]) -> list[Token]:
    """Return the headings of a line: known names, as long as can be, and other words."""
    tokens: list[Token] = []
    number = 0
    while number < len(words):
        first = words[number]
        best = number
        heading = headings.NOTHING
        for last in range(min(number + 5, len(words)) - 1, number - 1, -1):
            if last > number and (_wide(words, number, last) or _apart(words, last)):
                continue
            phrase = " ".join(word.text for word in words[number : last + 1])
            found = headings.parse(phrase)
            if found.roles:
                best, heading = last, found
                break
        end = words[best].end
        tokens.append(Token(text[first.start : end], first.start, end, heading))
        number = best + 1
    return tokens


#: Roles beside which a column called ``statistic`` may stand: it is no statistic of theirs.
_OWN = frozenset({"r", "s", "se", "b", "R2", "R2_adj"})


def _apart(words: Sequence[Word], last: int) -> bool:
    """Say whether a last word heads a column of its own: ``cor statistic``."""
    before = headings.parse(words[last - 1].text).roles
    return words[last].text == "statistic" and bool(before) and before[0] in _OWN


def _wide(words: Sequence[Word], first: int, last: int) -> bool:
    """Say whether words stand too far apart to be one name."""
    return any(
        b.start - a.end > 1
        for a, b in zip(words[first:last], words[first + 1 : last + 1], strict=False)
    )


def is_value(word: str) -> bool:
    """Say whether a word can stand in a column of numbers."""
    if word in _EMPTY:
        return True
    if word[:1] in "FtP" and _WRITTEN_OUT.fullmatch(word):
        return True
    if len(word) > 40 or not any(char.isdigit() for char in word):
        return False
    bare = _POINT.sub("", _DF_TAIL.sub("", word).lstrip("<>≤≥= "))
    parts = [part.strip() for part in _BETWEEN.split(bare)]
    numbers = [part for part in parts if part]
    return 0 < len(numbers) <= _MOST_PARTS and all(_ATOM.fullmatch(part) for part in numbers)


def values_of(text: str, words: Sequence[Word]) -> list[Word]:
    """Join what belongs to one value: a relation and its number, a number in brackets, limits."""
    joined: list[Word] = []
    for word in words:
        if joined and _belongs(joined[-1].text, word.text, word.start - joined[-1].end):
            last = joined[-1]
            joined[-1] = Word(text[last.start : word.end], last.start, word.end)
        else:
            joined.append(word)
    return joined


def _belongs(last: str, word: str, gap: int) -> bool:
    """Say whether a word goes on with the value that ``last`` has begun."""
    if last in _RELATIONS or ("(df" in last and ")" not in last) or word.startswith("(df"):
        return True
    opened = max(last.rfind("("), last.rfind("[")) > max(last.rfind(")"), last.rfind("]"))
    if last[0] == "[" and opened and word[-1] == "]":
        return True
    if last[-1] in ",;" and (
        (opened and word[-1] in ")]") or last[:-1].replace(".", "", 1).isdigit()
    ):
        return True
    if gap > 1 or not _ENDS.search(last):
        return last.endswith((" to", " –", " -")) and gap == 1 and word[0] in "-.0123456789"
    if word in {"to", "–"}:
        return True
    return (
        _STARS.fullmatch(word) is not None
        or _ENCLOSED.fullmatch(word) is not None
        or (word[0] in "([" and word[-1] in ",;")
    )


_RELATIONS = frozenset({"<", ">", "<=", ">=", "≤", "≥", "="})
#: What a number ends with.
_ENDS = re.compile(r"\d[a-e]?\*{0,4}$")
_ENCLOSED = re.compile(rf"[(\[]{NUMERAL}[)\]]\*{{0,3}}|[(\[]{NUMERAL}[,;–-]{NUMERAL}[)\]]")


def parted(text: str, line: Line) -> tuple[list[Word], list[Word]]:
    """Return the words of a row's label and its values, told from the right."""
    words = values_of(text, words_of(text, line.start, line.end))
    cut = len(words)
    while cut > 0 and is_value(words[cut - 1].text):
        cut -= 1
    return words[:cut], words[cut:]


def label_in(line: Line) -> str | None:
    """Return what stands before the first wide gap, or number, of a line."""
    found = _FIRST.match(line.text)
    return found.group(1) if found is not None else None


def _margin(line: Line) -> int:
    return len(line.text) - len(line.text.lstrip())


def starts_panel(lines: Sequence[Line], number: int, first: Line) -> bool:
    """Say whether a line without numbers heads further columns of the rows above.

    Parameters
    ----------
    lines
        The lines.
    number
        The line that may.
    first
        The line of the first row above.
    """
    if number + 1 >= len(lines) or _margin(lines[number]) < _margin(first) + 2:
        return False
    label = label_in(first)
    return (
        label is not None
        and label == label_in(lines[number + 1])
        and not any(is_value(word) for word in lines[number].text.split())
    )
