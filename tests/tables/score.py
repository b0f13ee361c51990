"""Scores the reading and checking of generated tables.

``PYTHONPATH=statcheck_core:tests python -m tables.score --tables 20000`` draws as many tables from
real fits, of every kind and in every format, and tells how many of their numbers were read, how
many consistent tables raised an alarm, and how many gross slips were found. One seed, one result.
"""

from __future__ import annotations

import argparse
import sys
from collections import Counter
from collections.abc import Callable, Iterator, Sequence
from typing import NamedTuple

import numpy as np

from crossfoot.audit import audit_claim
from crossfoot.documents import open_document
from crossfoot.model import Claim, Finding
from crossfoot.reading import read_block
from tables import coefficients, models, printouts, variances
from tables.drawn import Drawn
from tables.slips import Slip, slipped
from tables.writing import WRITERS

ALARMS = frozenset({"reversal", "conflict"})

KINDS: tuple[Callable[[np.random.Generator], Drawn], ...] = (
    variances.one_way,
    variances.two_way,
    variances.effects_only,
    coefficients.one_model,
    coefficients.odds,
    coefficients.grouped,
    models.side_by_side,
    models.steps,
    models.key_values,
    models.correlations,
    printouts.least_squares,
    printouts.analysis,
    printouts.summary_block,
    printouts.regress_block,
)


class Case(NamedTuple):
    """One table in one format."""

    seed: int
    writer: str
    drawn: Drawn
    language: str
    text: str


class Outcome(NamedTuple):
    """What became of a table."""

    numbers: int
    read: int
    extra: int
    alarms: tuple[str, ...]
    doubts: tuple[str, ...]


def case(seed: int) -> Case:
    """Draw a table and a format."""
    rng = np.random.default_rng(seed)
    drawn = KINDS[seed % len(KINDS)](rng)
    if drawn.printout:
        writer = str(rng.choice(list(printouts.WRITERS)))
        language, write = printouts.WRITERS[writer]
    else:
        writer = str(rng.choice(list(WRITERS)))
        language, write = WRITERS[writer]
    return Case(seed, writer, drawn, language, write(drawn))


def written(known: Case, drawn: Drawn) -> str:
    """Write a changed table as the original was."""
    writers = printouts.WRITERS if drawn.printout else WRITERS
    return writers[known.writer][1](drawn)


def claims_in(language: str, text: str) -> list[Claim]:
    document = open_document("-", text.encode(), language)
    return [
        claim
        for block in document.blocks
        for claim in read_block(language, block.kind, block.source, document.definitions).claims
    ]


def findings_in(claims: Sequence[Claim]) -> Iterator[tuple[Claim, Finding]]:
    for claim in claims:
        for finding in audit_claim(claim).findings:
            yield claim, finding


def _plain(literal: str) -> str:
    return literal.replace("−", "-").replace("–", "-").replace("$", "")


def compare(drawn: Drawn, claims: Sequence[Claim]) -> tuple[int, int, int]:
    """How many numbers there are to read, how many were read as such, how many beyond that."""
    left = [
        {(r.quantity, r.term): _plain(r.literal) for r in (*c.readings, *c.given)} | {"": c.kind}
        for c in claims
    ]
    total = read = 0
    for said in drawn.said:
        wanted = {key: _plain(drawn.numbers[place]) for key, place in said.readings.items()}
        total += len(wanted)
        best = max(
            left,
            key=lambda found: (
                found[""] == said.kind,
                sum(found.get(k) == v for k, v in wanted.items()),
            ),
            default=None,
        )
        hits = sum(best.get(k) == v for k, v in wanted.items()) if best else 0
        if best is not None and hits and best[""] == said.kind:
            read += hits
            left.remove(best)
    return total, read, len(left)


def outcome(known: Case) -> Outcome:
    """Read and check a consistent table."""
    claims = claims_in(known.language, known.text)
    alarms = [
        f"{finding.identity}: {finding.message}"
        for _, finding in findings_in(claims)
        if finding.severity in ALARMS
    ]
    doubts = [f.identity for _, f in findings_in(claims) if f.severity == "doubt"]
    return Outcome(*compare(known.drawn, claims), tuple(alarms), tuple(doubts))


def caught(known: Case) -> tuple[Slip, bool] | None:
    """Put a gross slip into a table and say what it was, and whether it was found."""
    rng = np.random.default_rng([known.seed, 1])
    slip = slipped(known.drawn, rng)
    if slip is None:
        return None
    text = written(known, slip.drawn)
    found = any(
        finding.severity in ALARMS | {"doubt"}
        for _, finding in findings_in(claims_in(known.language, text))
    )
    return slip, found


class Tally(NamedTuple):
    """Sums over many tables."""

    tables: int
    numbers: int
    read: int
    extra: int
    alarms: tuple[str, ...]
    doubts: int
    slips: int
    missed: tuple[str, ...]
    by_kind: dict[str, tuple[int, int]]
    by_writer: dict[str, tuple[int, int]]
    by_quantity: dict[str, tuple[int, int]]


def run(seeds: Sequence[int]) -> Tally:
    """Score the tables of these seeds."""
    sums: Counter[str] = Counter()
    kinds: dict[str, Counter[str]] = {}
    alarms: list[str] = []
    missed: list[str] = []
    for seed in seeds:
        known = case(seed)
        result = outcome(known)
        sums.update(numbers=result.numbers, read=result.read, extra=result.extra)
        sums["doubts"] += bool(result.doubts)
        name = f"{seed} {known.drawn.kind} in {known.writer}"
        alarms += [f"{name}: {alarm}" for alarm in result.alarms]
        for key in (f"kind {known.drawn.kind}", f"writer {known.writer}"):
            kinds.setdefault(key, Counter()).update(all=result.numbers, good=result.read)
        tried = caught(known)
        if tried is not None:
            slip, found = tried
            sums["slips"] += 1
            kinds.setdefault(f"quantity {slip.quantity}", Counter()).update(all=1, good=found)
            missed += [] if found else [f"{name}: {slip.quantity} {slip.old} → {slip.new}"]

    def table(word: str) -> dict[str, tuple[int, int]]:
        return {
            key.removeprefix(word + " "): (count["good"], count["all"])
            for key, count in sorted(kinds.items())
            if key.startswith(word + " ")
        }

    return Tally(
        len(seeds), sums["numbers"], sums["read"], sums["extra"], tuple(alarms), sums["doubts"],
        sums["slips"], tuple(missed), table("kind"), table("writer"), table("quantity"),
    )  # fmt: skip


def main(arguments: Sequence[str] | None = None) -> int:
    """Print the score."""
    parser = argparse.ArgumentParser(prog="tables.score", description=__doc__)
    parser.add_argument("--tables", type=int, default=500, help="how many (default 500)")
    parser.add_argument("--first", type=int, default=0, help="the first seed (default 0)")
    options = parser.parse_args(arguments)
    tally = run(range(options.first, options.first + options.tables))
    print(f"{tally.tables} tables, {tally.numbers} numbers")
    print(f"read       {tally.read / tally.numbers:8.3%}   beyond that {tally.extra} claims")
    print(f"alarms     {len(tally.alarms):8d}   tables with a doubt {tally.doubts}")
    found = tally.slips - len(tally.missed)
    print(f"slips      {found / max(tally.slips, 1):8.3%}   of {tally.slips}")
    for title, part in (
        ("kind", tally.by_kind),
        ("format", tally.by_writer),
        ("slip in", tally.by_quantity),
    ):
        for name, (good, whole) in part.items():
            print(f"  {title} {name:24} {good:7d} / {whole:7d} {good / max(whole, 1):8.2%}")
    for alarm in tally.alarms[:20]:
        print("ALARM", alarm)
    for miss in tally.missed[:20]:
        print("MISSED", miss)
    return 1 if tally.alarms else 0


if __name__ == "__main__":
    sys.exit(main())
