"""What a scan costs, beside a baseline of the same run.

``pytest tests/benchmarks/test_scan.py -s`` prints a line each: what was measured, what is aimed at.
Times are of the processor, with that of the processes started: other work on the machine counts
for little.
Nothing here fails for being slow; what is asserted is that the work was done.
"""

from __future__ import annotations

import os
import resource
import subprocess
import sys
import time
from collections.abc import Callable, Sequence
from pathlib import Path
from typing import Any

import pytest

from benchmarks.drafts import draft
from crossfoot.audit import _judged, audit_claim
from crossfoot.reading import read_block
from crossfoot.reading.contexts import cues_in
from crossfoot.scan import claims_of, scan_text

MEGABYTE = 1_000_000
ROUNDS = 5

#: New processes of each kind.
TURNS = 15

#: Results, and what looks like them, without end in one paragraph.
DENSE = [
    "R2 = .3, ",
    "p = .03, ",
    "n = 3, ",
    "β = .3, t(5) = 2.1, ",
    "F(1, 58) = 4.2, R² = .3; ",
    "32% and 40% of the variance F(1, 58) = 4.2, ",
]

#: Prints the most memory, in kilobytes, that scanning a file took. The kernel's count for children
#: would start at what this process holds.
MEMORY = """
import re, sys
from pathlib import Path
from crossfoot.batch.files import scan_file
report = scan_file(sys.argv[1])
assert len(report.claims) > 4000
print(re.search(r"VmHWM:\\s+(\\d+)", Path("/proc/self/status").read_text())[1])
"""


def used() -> float:
    """Return the seconds of the processor that this process and those it has started used."""
    children = resource.getrusage(resource.RUSAGE_CHILDREN)
    return time.process_time() + children.ru_utime + children.ru_stime


def cost(work: Callable[[], object]) -> float:
    """Return the seconds of the processor that something takes."""
    start = used()
    work()
    return used() - start


def best(work: Callable[[], object], rounds: int = ROUNDS) -> float:
    """Return the least of several costs, in seconds."""
    return min(cost(work) for _ in range(rounds))


def run(arguments: Sequence[str]) -> str:
    done = subprocess.run(
        [sys.executable, *arguments],
        capture_output=True,
        text=True,
        check=False,
        # Compiled once and kept, as where it is installed.
        env={**os.environ, "PYTHONIOENCODING": "utf-8", "PYTHONDONTWRITEBYTECODE": ""},
    )
    assert done.returncode in (0, 1), done.stderr
    return done.stdout


def forget() -> None:
    """Forget all that is remembered by content, as for a text never seen."""
    for memory in (read_block, cues_in, audit_claim, _judged):
        memory.cache_clear()


def say(benchmark: Any, what: str, measured: str, aim: str) -> None:
    benchmark.extra_info.update(what=what, measured=measured, aim=aim)
    print(f"\n{what}: {measured} (aim: {aim})")


def cold(benchmark: Any, path: Path, baseline: str) -> float:
    """Return how many times as much as a baseline a scan in a new process costs, turn by turn."""
    scan = ["-m", "crossfoot", "scan", str(path)]
    benchmark.pedantic(lambda: run(scan), rounds=1, warmup_rounds=1)
    pairs = [(cost(lambda: run(["-c", baseline])), cost(lambda: run(scan))) for _ in range(TURNS)]
    return min(pair[1] for pair in pairs) / min(pair[0] for pair in pairs)


def test_a_file_without_a_result(benchmark: Any, tmp_path: Path) -> None:
    path = tmp_path / "plain.md"
    path.write_text("# Notes\n\n" + "Nothing is reported here, only words.\n\n" * 40)
    assert "no reported result" in run(["-m", "crossfoot", "scan", str(path)])
    ratio = cold(benchmark, path, "pass")
    say(benchmark, "cold scan, no result, against a bare interpreter", f"{ratio:.1f}", "6")


def test_a_draft(benchmark: Any, tmp_path: Path) -> None:
    path = tmp_path / "draft.md"
    path.write_text(draft(40_000, 2_000), "utf-8")
    assert "20 results found: 20 agree" in run(["-m", "crossfoot", "scan", str(path)])
    ratio = cold(benchmark, path, "import scipy.special")
    say(benchmark, "cold scan of 40 KB against importing SciPy's special", f"{ratio:.2f}", "1.3")


def test_a_megabyte(benchmark: Any) -> None:
    # Another text in each round, so that nothing of it is remembered.
    texts = iter([draft(MEGABYTE, 2_000, seed=seed) for seed in range(2 * ROUNDS)])
    scan_text(draft(20_000, 2_000))  # SciPy is imported by now
    report = benchmark.pedantic(lambda: scan_text(next(texts)), rounds=ROUNDS)
    assert len(report.claims) > 450
    rate = 1 / best(lambda: scan_text(next(texts)))
    say(benchmark, "1 MB, a result every 2 KB", f"{rate:.1f} MB/s", "5 MB/s")
    again = best(lambda: scan_text(report.document.text)) * 1000
    print(f"the same text again, all of it remembered: {again:.1f} ms")


@pytest.mark.parametrize("break_lines", [True, False], ids=["paragraphs", "one line"])
def test_growth(benchmark: Any, break_lines: bool) -> None:
    times = []
    for size in (MEGABYTE // 10, MEGABYTE, 10 * MEGABYTE):
        text = draft(size, 2_000, break_lines=break_lines)

        def whole(text: str = text) -> None:
            forget()
            scan_text(text)

        times.append(best(whole, 1) / len(text) * MEGABYTE)
    benchmark.pedantic(forget, rounds=1)
    measured = ", ".join(f"{seconds:.2f}" for seconds in times)
    say(benchmark, "seconds a megabyte at 0.1, 1 and 10 MB", measured, "the same")


@pytest.mark.parametrize("unit", DENSE)
def test_growth_of_one_dense_paragraph(benchmark: Any, unit: str) -> None:
    times = []
    for number in (1000, 2000, 4000):
        forget()
        start = time.process_time()
        claims_of(unit * number, "markdown")
        times.append(time.process_time() - start)
    benchmark.pedantic(forget, rounds=1)
    measured = ", ".join(f"{seconds:.2f}" for seconds in times)
    say(benchmark, f"{unit!r} 1,000, 2,000 and 4,000 times", measured, "twice as long each time")


def test_memory(benchmark: Any, tmp_path: Path) -> None:
    path = tmp_path / "long.md"
    path.write_text(draft(10 * MEGABYTE, 2_000), "utf-8")
    used = int(benchmark.pedantic(run, (["-c", MEMORY, str(path)],), rounds=1)) / 1024
    say(benchmark, "memory for a file of 10 MB", f"{used:.0f} MB", "300 MB")
