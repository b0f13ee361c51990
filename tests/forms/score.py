"""Print how far the forms are read: ``python tests/forms/score.py [--misses] [WORD …]``.

Words choose the entries whose id, format or name holds one of them.
"""

from __future__ import annotations

import argparse
import sys
from collections.abc import Iterable, Sequence
from pathlib import Path
from typing import TYPE_CHECKING

if TYPE_CHECKING:
    from forms.scoring import Outcome, Tally

_COLUMNS = (
    ("", 13),
    ("entries", 7),
    ("claims whole", 17),
    ("readings", 17),
    ("phantoms", 8),
    ("extra", 5),
    ("alarms", 6),
    ("planted caught", 16),
    ("loud", 4),
)


def main(arguments: Sequence[str] | None = None) -> None:
    sys.path.insert(0, str(Path(__file__).parents[1]))
    from forms.corpus import FILES
    from forms.scoring import outcomes, tally

    parser = argparse.ArgumentParser(description="Score the reading of the labelled forms.")
    parser.add_argument("words", nargs="*", help="only entries whose id, format or name holds one")
    parser.add_argument("--misses", action="store_true", help="print every miss")
    parser.add_argument("--classes", action="store_true", help="a row a class of forms as well")
    options = parser.parse_args(arguments)
    chosen = [o for o in outcomes() if _chosen(o, options.words)]
    print("  ".join(title.ljust(width) for title, width in _COLUMNS).rstrip())
    for name in FILES:
        print(_row(name, tally(o for o in chosen if o.entry.file == name)))
    for suffix in sorted({o.entry.format for o in chosen}):
        print(_row(suffix, tally(o for o in chosen if o.entry.format == suffix)))
    print(_row("all", tally(chosen)))
    unseen = sum(len(o.unseen) for o in chosen)
    stated = sum(len(o.entry.context) for o in chosen)
    print(f"contexts recognised: {stated - unseen} of {stated}")
    if options.classes:
        print("\n".join(_classes(chosen)))
    if options.misses:
        print("\n".join(line for o in chosen if o.missed or o.unseen for line in describe(o)))


def _chosen(outcome: Outcome, words: Sequence[str]) -> bool:
    entry = outcome.entry
    return not words or any(
        word == entry.id or word == entry.format or word in entry.name for word in words
    )


def _row(name: str, sums: Tally) -> str:
    cells = (
        name,
        str(sums.entries),
        _share(sums.whole, sums.claims),
        _share(sums.read, sums.readings),
        f"{sums.phantoms}/{sums.lookalikes}",
        str(sums.extra),
        str(sums.alarms),
        _share(sums.caught, sums.planted),
        str(sums.loud),
    )
    widths = [width for _, width in _COLUMNS]
    return "  ".join(cell.ljust(width) for cell, width in zip(cells, widths, strict=True)).rstrip()


def _share(part: int, whole: int) -> str:
    return f"{part}/{whole} {part / whole:.1%}" if whole else "–"


def _classes(chosen: Iterable[Outcome]) -> Iterable[str]:
    """Name the classes of forms with a miss, the most missed first."""
    missed: dict[str, list[str]] = {}
    for outcome in chosen:
        if outcome.missed:
            missed.setdefault(outcome.entry.name, []).append(outcome.entry.id)
    for name, ids in sorted(missed.items(), key=lambda item: -len(item[1])):
        yield f"{len(ids):3}  {name}: {' '.join(ids)}"


def describe(outcome: Outcome) -> Iterable[str]:
    """Say what is missed of one entry, a line a thing."""
    entry = outcome.entry
    text = entry.text if len(entry.text) < 600 else entry.text[:600] + " …"
    yield f"\n{entry.id} [{entry.format}] {entry.name}"
    yield "    | " + text.replace("\n", "\n    | ")
    for number, match in enumerate(outcome.matches):
        if match.claim is None:
            yield f"    claim {number}: not read"
        elif not match.whole:
            missed = ", ".join(
                " ".join((w.quantity, w.relation, w.literal, w.term or "")).strip()
                for w in match.missed
            )
            odd = ", ".join(f"{r.quantity} {r.relation} {r.literal}" for r in match.odd)
            yield f"    claim {number}: lacks [{missed}] has instead [{odd}]"
    for line in outcome.extra:
        yield f"    extra claim: {line[:160]}"
    for line in outcome.alarms:
        yield f"    FALSE ALARM {line}"
    if entry.wrong is not None and not outcome.caught:
        yield "    planted error not found"
    if outcome.unseen:
        yield f"    context not seen: {', '.join(sorted(outcome.unseen))}"


if __name__ == "__main__":
    main()
