r"""Captions and notes: paragraphs beside a table that are part of it.

Every format splits into blocks first; then a table takes in the paragraphs around it that are its
caption (``Table 3. …``, ``\\caption{…}``) or notes (``Note. …``, ``* p < .05``, ``Standard errors
in parentheses``). Its source is then the whole stretch, and reading it splits that again.
"""

from __future__ import annotations

import re
from collections.abc import Sequence

from crossfoot.expressions import expression
from crossfoot.model import Block

#: Markup that may stand before the first word; stars stay, they may be marks of significance.
_MARKUP = expression(
    r"<[^<>]{0,200}>|\\(?:[a-zA-Z]+\*?(?:\[[^\[\]]{0,60}\])?|[^*a-zA-Z])|[{}_$`~]|&nbsp;"
)
_WORD = r"(?:Table|Tab\.|Tabelle|Tableau|Tabla|Tabela|Tabell|Tabella|Appendix\sTable|表)"
_NUMBER = r"\s?(?:[A-Z]{0,2}\.?-?\d{1,3}(?:[.-]\d{1,3})?[a-z]?|[IVX]{1,5})"
_CAPTION = expression(
    rf"[*:.\s]{{0,6}}{_WORD}(?:{_NUMBER}\s?\*{{0,3}}(?:\s?[.:|)—–-]|\s*$|\s*\n|\s{{1,3}}(?P<next>\w+))|:)",
    re.IGNORECASE,
)
_TITLE_ONLY = expression(rf"[*:.\s]{{0,6}}{_WORD}{_NUMBER}[\s.:*]{{0,6}}", re.IGNORECASE)
#: After "Table 2" these make a sentence of the text and no caption.
_VERBS = frozenset(
    [
        "shows",
        "show",
        "presents",
        "present",
        "reports",
        "report",
        "gives",
        "give",
        "lists",
        "list",
        "summarizes",
        "summarises",
        "summarize",
        "contains",
        "displays",
        "provides",
        "indicates",
        "and",
        "also",
        "below",
        "above",
        "for",
        "in",
        "is",
        "are",
        "was",
        "were",
        "has",
        "describes",
        "compares",
        "depicts",
        "illustrates",
        "zeigt",
        "montre",
        "muestra",
        "mostra",
    ]
)
_COLON = expression(r":(?![:\w-])\s")
_NOTE = expression(
    r"[*\s]{0,4}(?:notes?\b|anmerkung(?:en)?\b|remarques?\b|notas?\b|legend\b|注|source\s?:)[*\s]{0,4}[.:\s]|[*\s]{0,2}[a-e][.)]?\s{1,3}R[\s-]?sq"
    r"|.{0,60}?(?<!\w)[*†‡+]{1,4}\s?'?\s?(?:[*_]?p[*_]?|=|:|significant|indicates|denotes)?\s?(?:-?values?)?\s?(?:<|≤|&lt;|&le;|=\s?p|significant|sig\.|0?\.\d)"
    r"|.{0,12}p\s?(?:<|≤|&lt;)\s?\.?\d[\d.,]*\s?[*†]|.{0,8}\*{1,3}[,.]?\s.{0,30}(?:significan|level)"
    r"|.{0,40}(?:standard\serrors?|std\.?\serr\w*|t[\s-]?(?:statistics?|stats?|values?|ratios?)|p[\s-]?values?|SEs?|confidence\sintervals?"
    r"|Standardfehler)\b.{0,50}(?:in|between)\s(?:the\s)?(?:parenthes|bracket|square|round|Klammern)"
    r"|.{0,8}(?:values|numbers|figures|entries|cell\sentries)\b.{0,30}(?:parenthes|bracket)"
    r"|[*\s]{0,3}(?:N|n|R\*?\^?(?:2|²|<sup>2)|F|Adj(?:usted|\.)?\sR)\*{0,2}\s?(?:\(|=)",
    re.IGNORECASE | re.DOTALL,
)
_SHORT_NOTE = expression(r"[*\s]{0,3}(?:N|n|R|F|Adj)")
#: What stands before the caption's text in the markup that names it so.
_NAMED = expression(
    r"(?:^|\n)[ \t]*(?:#\+(?:caption|CAPTION)(?:\[[^\[\]\n]{0,80}\])?:|\.\. table::|\.)[ \t]*$"
)
#: Where a float of LaTeX starts or ends, and how far below a table that is looked for.
_FLOAT = expression(r"\\(begin|end)\{(?:sideways|wrap|threepart)?table\*?\}")
_REACH = 2000
_LONGEST_CAPTION = 900
_LONGEST_LEAD = 200
_SENTENCE_ENDS = frozenset(".!?;,。")
#: What a title before a table says that its cells need: how many cases there are, what they hold.
_LEAD = expression(
    r"(?<![\w.])[Nn]\s?=\s?\d|correlation|regression|anova|analys[ie]s\sof\svariance|odds|hazard|mean\ssquares",
    re.IGNORECASE,
)
_LONGEST_NOTE = 1500
_MOST_NOTES = 3


def together(blocks: Sequence[Block], text: str, kind: str = "table") -> tuple[Block, ...]:
    """Return the blocks, each table with its caption and notes.

    Parameters
    ----------
    blocks
        Of ``text``, in order.
    text
        The text of the document.
    kind
        Of the blocks that take others in; tables in plain text are ``verbatim``.
    """
    if not any(block.kind == kind for block in blocks):
        return tuple(blocks)
    joined: list[Block] = []
    number = 0
    while number < len(blocks):
        block = blocks[number]
        number += 1
        if block.kind != kind:
            joined.append(block)
            continue
        start = _caption(joined, text)
        end = block.start + len(block.source)
        following = number
        if start is None and following < len(blocks) and _trails(blocks, following):
            end = _end(blocks[following])
            following += 1
        for _ in range(_MOST_NOTES):
            if following < len(blocks) and (
                _is_note(blocks[following]) or _floats(blocks[following], text)
            ):
                end = _end(blocks[following])
                following += 1
        number = following
        first = block.start if start is None else start
        joined.append(Block(kind, first, text[first:end]))
    return tuple(joined)


def _end(block: Block) -> int:
    return block.start + len(block.source)


def _caption(before: list[Block], text: str) -> int | None:
    """Take the caption from the end of the blocks before a table; return where it starts."""
    if not before or before[-1].kind not in {"prose", "heading"}:
        return None
    last = before[-1]
    if len(last.source) > _LONGEST_CAPTION:
        return None
    if is_caption(last.source) or _named(last, text) is not None or _leads(last):
        before.pop()
        start = _named(last, text)
        return last.start if start is None else start
    if len(before) > 1 and len(last.source) <= 300 and before[-2].kind in {"prose", "heading"}:
        title = before[-2]
        if len(title.source) < 90 and _TITLE_ONLY.fullmatch(_bare(title.source)):
            del before[-2:]
            return title.start
    return None


def _leads(block: Block) -> bool:
    """Say whether a paragraph before a table is its title: one line that is no sentence."""
    words = block.source.strip()
    return (
        block.kind == "prose"
        and len(words) <= _LONGEST_LEAD
        and "\n" not in words
        and words[-1:] not in _SENTENCE_ENDS
        and _LEAD.search(_bare(words)) is not None
    )


def _named(block: Block, text: str) -> int | None:
    """Return where the markup starts that calls a block a caption, if it does."""
    found = _NAMED.search(text, max(0, block.start - 100), block.start)
    if found is None or block.source.startswith("\\"):
        return None
    return found.start() + (found.group()[:1] == "\n")


def _bare(source: str) -> str:
    """Return the start of a source without its markup."""
    return _MARKUP.sub("", source[:400].replace("{asterisk}", "*")).strip()


def is_caption(source: str) -> bool:
    """Say whether a paragraph beside a table is its caption."""
    source = source.lstrip()
    if source.startswith(("\\caption", "<caption")) or _COLON.match(source):
        return True
    found = _CAPTION.match(_bare(source))
    if found is None:
        return False
    word = found["next"]
    return not word or (word.lower() not in _VERBS and word[:1].isupper())


def _trails(blocks: Sequence[Block], number: int) -> bool:
    """Say whether a caption stands below the table, and not above the next one."""
    block = blocks[number]
    if (
        block.kind != "prose"
        or len(block.source) > _LONGEST_CAPTION
        or not is_caption(block.source)
    ):
        return False
    above_next = number + 1 < len(blocks) and blocks[number + 1].kind in {"table", "verbatim"}
    return not above_next


def _floats(block: Block, text: str) -> bool:
    """Say whether a paragraph below a table stands in the same float of LaTeX."""
    if block.kind != "prose" or len(block.source) > _LONGEST_NOTE or is_caption(block.source):
        return False
    found = _FLOAT.search(text, _end(block), _end(block) + _REACH)
    return found is not None and found[1] == "end"


def _is_note(block: Block) -> bool:
    if block.kind != "prose" or len(block.source) > _LONGEST_NOTE:
        return False
    bare = _bare(block.source)
    if _NOTE.match(bare) is None:
        return False
    return (
        _SHORT_NOTE.match(bare) is None
        or len(block.source) <= 240
        or bare.lower().startswith("note")
    )
