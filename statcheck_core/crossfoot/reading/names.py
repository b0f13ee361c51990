"""The names of quantities in a text: where they stand, and which notation they follow."""

from __future__ import annotations

import re
from collections.abc import Iterator
from functools import cache
from typing import NamedTuple

from crossfoot.expressions import expression
from crossfoot.reading.notation import NOTATIONS, Notation

_INITIALS = "".join(sorted(set("".join(n.initials for n in NOTATIONS))))
#: How names begin that have three letters or more in a row: most words of a text are passed over
#: by this alone.
_FIRST_LETTERS = """
adj ame aor ass ave bar bes bet cha chi coe coh cor cra ddl ddo deg del den dev dfd dfn dfs dif
dof err est eta exp fch fin fli fre fri fst fva gdl gen gra hed hel inc int jic kat ken kes khi
kik kji koe kon kor kru lev lik log lrt lut mar mdi mea med min mse msr msw mul nob num obs odd
ome ove pad par pbo pco pea pen pes pfd pho poi pon pow ppe pro ptu ptw pva qui reg res rho rms
rob roo rse rsq rva sam sco seb see sem sig slo spe sta std ste sti sto stu tau tes tol tst tte
tva val vap vif vri wal wsp
"""
_OPENINGS = frozenset(_FIRST_LETTERS.split())
_WORD_START = expression(rf"(?<![A-Za-z0-9_$?&À-ɏΑ-ωА-я²])[{re.escape(_INITIALS)}]")


_COMPILED = tuple((notation, expression(notation.pattern)) for notation in NOTATIONS)


@cache
def _starting(initial: str) -> tuple[tuple[Notation, re.Pattern[str]], ...]:
    """Return the notations whose names can start so."""
    return tuple(pair for pair in _COMPILED if initial in pair[0].initials)


class Name(NamedTuple):
    """A name found in a text."""

    notation: Notation
    match: re.Match[str]


def names(text: str, start: int, end: int) -> Iterator[Name]:
    """Yield the names of quantities in ``text[start:end]``, left to right, without overlap.

    A name starts where no letter of an alphabet stands before it; Chinese, Japanese and Korean
    write no space there, so their characters do not count.
    """
    done = start
    for word in _WORD_START.finditer(text, start, end):
        at = word.start()
        if at < done:
            continue
        letters = text[at : at + 3]
        if (
            len(letters) == 3
            and letters.isalpha()
            and letters.isascii()
            and letters.lower() not in _OPENINGS
        ):
            continue
        for notation, pattern in _starting(text[at]):
            match = pattern.match(text, at)
            if match is not None:
                done = match.end()
                yield Name(notation, match)
                break
