"""How long documents take to split and show; figures, no verdicts."""

from __future__ import annotations

import pytest
from pytest_benchmark.fixture import BenchmarkFixture

from crossfoot import documents

PARAGRAPH = (
    "Riders who saw live positions waited less, *F*(1, 58) = 9.41, *p* = .003, R^2^ = .14, and\n"
    "those who did not waited longer, $t(57) = 2.41$, **as before**, in all of the {} depots.\n\n"
)
MANUSCRIPT = "".join(PARAGRAPH.format(number) for number in range(5500))
SIZE = 1_000_000

LATEX = MANUSCRIPT.replace("*", "").replace("^2^", "$^2$")
HTML = "".join(f"<p>{part}</p>\n" for part in MANUSCRIPT.split("\n\n"))


def whole(language: str, text: str) -> int:
    """Read a document and show all of it; return how much was shown."""
    document = documents.open_document("x", text.encode(), language)
    return sum(len(documents.show_block(document, block).text) for block in document.blocks)


@pytest.mark.parametrize("language", ["markdown", "latex", "html"])
def test_a_manuscript(benchmark: BenchmarkFixture, language: str) -> None:
    text = {"markdown": MANUSCRIPT, "latex": LATEX, "html": HTML}[language][:SIZE]
    shown = benchmark.pedantic(whole, (language, text), rounds=1)
    assert shown > SIZE / 2


def test_splitting_again_after_an_edit(benchmark: BenchmarkFixture) -> None:
    text = MANUSCRIPT[:SIZE]
    documents.split("markdown", text)
    middle = len(text) // 2
    edited = text[:middle] + "x" + text[middle:]
    blocks = benchmark(documents.split, "markdown", edited)
    assert len(blocks) > 5000
