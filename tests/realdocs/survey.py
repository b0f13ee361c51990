"""Scan documents that other people wrote and show what Crossfoot makes of them.

    python tests/realdocs/survey.py [--sample N] [--seed S] [--all] [FOLDER]

FOLDER is what ``fetch.sh`` filled (``realdocs/`` by default); each folder in it is a package. The
survey prints what was read in each package, then every finding, to be judged by eye: there is no
answer key, so nothing here passes or fails. N claims drawn at random show how well results are
read; the draw is the same for the same seed. Documents with the same content count once.
"""

from __future__ import annotations

import argparse
import gzip
import hashlib
import random
import time
from collections import Counter
from collections.abc import Iterator
from pathlib import Path
from typing import Any, NamedTuple

from crossfoot import scan_file, scan_text
from crossfoot.documents import FORMATS, language_of
from crossfoot.model import SEVERITIES

ROOT = Path(__file__).resolve().parents[2]
SUFFIXES = {suffix for declared in FORMATS.values() for suffix in declared.suffixes}


class Scanned(NamedTuple):
    """A document of a package with what was found, and the seconds it took."""

    package: str
    path: Path
    record: dict[str, Any]
    seconds: float


def documents(folder: Path) -> Iterator[tuple[str, Path, bytes | None]]:
    """Yield package, path and, where it is packed, content of each document once."""
    seen = set()
    for path in sorted(folder.rglob("*")):
        if path.is_symlink() or not path.is_file():
            continue
        packed = path.suffix == ".gz"
        suffix = Path(path.stem).suffix if packed else path.suffix
        if suffix.lower() not in SUFFIXES:
            continue
        data = path.read_bytes()
        digest = hashlib.sha256(data).digest()
        if digest not in seen:
            seen.add(digest)
            unpacked = gzip.decompress(data) if packed else None
            yield path.relative_to(folder).parts[0], path, unpacked


def scanned(folder: Path) -> Iterator[Scanned]:
    """Scan the documents of a folder."""
    for package, path, data in documents(folder):
        start = time.perf_counter()
        if data is None:
            scan = scan_file(path)
        else:
            text = data.decode(errors="replace")
            scan = scan_text(text, language_of(path.stem), path=str(path))
        seconds = time.perf_counter() - start
        yield Scanned(package, path.relative_to(folder), dict(scan.documents[0]), seconds)


def table(results: list[Scanned]) -> Iterator[str]:
    """Yield a line a package: documents, claims, findings by severity, seconds."""
    counts: dict[str, Counter[str]] = {}
    for result in results:
        count = counts.setdefault(result.package, Counter())
        count["documents"] += 1
        count["claims"] += len(result.record["claims"])
        count["seconds"] += result.seconds
        count.update(finding["severity"] for finding in result.record["findings"])
        count.update(["unreadable"] if result.record["status"] != "read" else [])
    columns = ["documents", "unreadable", "claims", *SEVERITIES]
    yield "".join([f"{'package':28}", *(f"{name:>11}" for name in columns), f"{'seconds':>9}"])
    for package, count in counts.items():
        cells = "".join(f"{count[name]:>11}" for name in columns)
        yield f"{package:28}{cells}{count['seconds']:>9.1f}"


def findings(results: list[Scanned], severities: set[str]) -> Iterator[str]:
    """Yield each finding with its claim and its working, the strongest first.

    Where several documents print the same result, the first stands for all.
    """
    same: dict[tuple[str, str, str, str], list[str]] = {}
    working: dict[tuple[str, str, str, str], list[str]] = {}
    for result in results:
        claims = {claim["id"]: claim for claim in result.record["claims"]}
        for finding in result.record["findings"]:
            text = claims[finding["claim"]]["text"]
            key = (finding["severity"], finding["identity"], text, finding["message"])
            same.setdefault(key, []).append(f"{result.path}:{finding['where']['start']['line']}")
            working.setdefault(key, finding["working"])
    for severity, identity, text, message in sorted(
        (key for key in same if key[0] in severities), key=lambda key: SEVERITIES.index(key[0])
    ):
        places = same[severity, identity, text, message]
        more = f" and {len(places) - 1} more" if len(places) > 1 else ""
        yield f"\n{severity}: {identity}: {places[0]}{more}"
        yield f"    {text}"
        yield f"    {message}"
        yield from (f"        {line}" for line in working[severity, identity, text, message])


def sample(results: list[Scanned], size: int, seed: int) -> Iterator[str]:
    """Yield claims drawn at random: the words, and what was read from them."""
    claims = [(result.path, claim) for result in results for claim in result.record["claims"]]
    for path, claim in random.Random(seed).sample(claims, min(size, len(claims))):
        yield f"\n{claim['kind']}: {path}:{claim['where']['start']['line']}"
        yield f"    {claim['text']}"
        readings = ", ".join(
            f"{reading['term'] or ''} {reading['quantity']} {reading['relation']} "
            f"{reading['literal']}".strip()
            for reading in claim["readings"]
        )
        context = f" ({', '.join(claim['context'])})" if claim["context"] else ""
        yield f"    → {readings}{context}"


def main() -> None:
    """Print the survey."""
    parser = argparse.ArgumentParser(description="Survey documents that other people wrote.")
    parser.add_argument("folder", nargs="?", type=Path, default=ROOT / "realdocs")
    parser.add_argument("--sample", type=int, default=40, metavar="N", help="claims to show")
    parser.add_argument("--seed", type=int, default=1)
    parser.add_argument("--all", action="store_true", help="list doubts and notes as well")
    options = parser.parse_args()
    if not options.folder.is_dir():
        parser.error(f"{options.folder} is not there: run tests/realdocs/fetch.sh first")
    results = list(scanned(options.folder))
    severities = set(SEVERITIES) if options.all else {"reversal", "conflict"}
    print("\n".join(table(results)))
    print(f"\nFindings\n{'=' * 8}")
    print("\n".join(findings(results, severities)))
    print(f"\nClaims drawn at random (seed {options.seed})\n{'=' * 20}")
    print("\n".join(sample(results, options.sample, options.seed)))


if __name__ == "__main__":
    main()
