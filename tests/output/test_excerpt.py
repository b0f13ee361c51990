"""The words around a reading: the right sentence, the right mark."""

import pytest
from hypothesis import given
from hypothesis import strategies as st

from crossfoot.documents.visible import Builder, place
from crossfoot.model import Span
from crossfoot.output.excerpt import MARK, UNMARK, excerpt, shown


@pytest.fixture
def quoted(builder):
    """Quote the words around the literal that stands between « and » in a text."""

    def quote(text, language="plain"):
        start = text.index("«")
        literal = text[start + 1 : text.index("»")]
        made = builder("a.txt", text.replace("«", "").replace("»", ""), language)
        blocks = made.document.blocks
        number = max(n for n, block in enumerate(blocks) if block.start <= start)
        made.claim(number, [("p", "=", literal, 0, 1)])
        placed = made.report().claims[0]
        span = Span(start - placed.base, start - placed.base + len(literal))
        words = excerpt(made.document, placed, span)
        return words.replace(MARK, "«").replace(UNMARK, "»")

    return quote


@pytest.mark.parametrize(
    ("text", "words"),
    [
        ("Yields rose, p = «.05».", "Yields rose, p = «.05»."),
        ("It rained. Yields rose, p = «.05». Then it froze.", "Yields rose, p = «.05»."),
        ("Yields (see Fig. 2) rose, p = «.05»; so it was.", None),
        (
            "It was so. The fit (R² = .36, adj. R² = «.33») held.",
            "The fit (R² = .36, adj. R² = «.33») held.",
        ),
        ("First block.\n\nYields\nrose, p = «.05».\n\nLast block.", "Yields rose, p = «.05»."),
        ("p = .05 and again\np = «.05», p = .05.", "p = .05 and again p = «.05», p = .05."),
        # A row of a printout is quoted alone.
        ("plan   1.20  .05\nsoil   2.20  «.05»\nrain   3.20  .05", "soil 2.20 «.05»"),
    ],
)
def test_sentences_and_rows(quoted, text, words):
    assert quoted(text) == (words or text)


def test_markup_is_not_quoted(quoted):
    text = "The plans *differed*, *F*~2,57~ = 4.31, *R*^2^ = .13, 10^-4^ or *p* = «.052»."
    assert quoted(text, "markdown") == (
        "The plans differed, F_2,57 = 4.31, R² = .13, 10⁻⁴ or p = «.052»."
    )


def test_an_item_of_a_list_is_quoted_alone(quoted):
    for mark in ("-", "*", "1."):
        text = f"{mark} soil: p = .03\n{mark} wind: p = «.05»\n{mark} rain: p = .07"
        sign = mark if mark == "1." else "•"
        assert quoted(text, "markdown") == f"{sign} wind: p = «.05»"


def test_a_long_sentence_is_cut_between_words(quoted):
    words = quoted("word " * 100 + "p = «.05» " + "word " * 100)
    assert words.startswith("… word ")
    assert words.endswith(" word …")
    assert "p = «.05»" in words
    assert len(words) < 320


def test_a_word_without_end_is_cut_all_the_same(quoted):
    words = quoted("x" * 5000 + "p = «.05»" + "x" * 5000)
    assert "p = «.05»" in words
    assert len(words) < 320


def test_nothing_in_the_words_can_pass_for_the_mark(builder):
    made = builder("a.txt", f"{MARK}9{UNMARK} p = .05").claim(0, [("p", "=", ".05", 0, 1)])
    report = made.report()
    placed = report.claims[0]
    words = excerpt(report.document, placed, placed.audited.claim.readings[0].span)
    assert words == f"\\ufdd09\\ufdd1 p = {MARK}.05{UNMARK}"


def test_a_format_that_is_not_known_is_quoted_as_it_stands(builder):
    report = builder("a.txt", "A *word*, p = .05").claim(0, [("p", "=", ".05", 0, 1)]).report()
    placed = report.claims[0]
    span = placed.audited.claim.readings[0].span
    words = f"A *word*, p = {MARK}.05{UNMARK}"
    assert excerpt(report.document._replace(language="other"), placed, span) == words
    # Nor does it need blocks.
    assert excerpt(report.document._replace(blocks=()), placed, span) == words


RUNS = st.lists(st.tuples(st.sampled_from("ksh"), st.text("ab .", min_size=1, max_size=4)))


@given(RUNS, st.data())
def test_the_way_back_of_the_way_to_the_source(runs, data):
    """Whatever is kept, shown as something else or hidden, a span comes back as it went."""
    source = "".join(text for _, text in runs)
    builder, position = Builder(), 0
    for how, text in runs:
        end = position + len(text)
        if how == "k":
            builder.keep(source, position, end)
        elif how == "s":
            builder.put("↦" * (len(text) + 1), position, end)
        position = end
    visible = builder.build()
    start = data.draw(st.integers(0, len(visible.text)))
    end = data.draw(st.integers(start, len(visible.text)))
    low, high = shown(visible, place(visible, start, end))
    if end > start:  # characters that stand for markup together come back together
        assert low <= start
        assert end <= high
        assert visible.text[start:end].strip("↦") == visible.text[low:high].strip("↦")
