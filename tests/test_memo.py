"""Remembering by content: all that is in use is kept, and nothing else for long."""

from __future__ import annotations

from crossfoot import memo
from crossfoot.memo import remembered


@remembered
def double(text: str, times: int = 2) -> str:
    """Return a text several times."""
    return text * times


def test_a_result_is_computed_once_for_the_same_arguments() -> None:
    double.cache_clear()
    assert [double("a"), double("a"), double("a", times=2), double("a", 2)] == ["aa"] * 4
    assert double.cache_info()[:2] == (1, 3)  # told apart by how they are given
    assert double.__wrapped__("b") == "bb"
    assert double.cache_info().misses == 3
    assert double.__doc__ == "Return a text several times."


def test_what_every_scan_uses_stays_and_what_was_seen_once_goes() -> None:
    double.cache_clear()
    document = [f"paragraph {number}" for number in range(3000)]
    for version in range(4 * memo.FRESH):
        document[0] = f"version {version}"
        for paragraph in document if version % 100 == 0 else document[:1]:
            double(paragraph)
    for paragraph in document:
        double(paragraph)
    before = double.cache_info()
    for paragraph in document:
        double(paragraph)
    assert double.cache_info().misses == before.misses
    assert before.misses == 2999 + 4 * memo.FRESH
    for version in range(20 * memo.FRESH):
        double(f"later {version}")
        for paragraph in document[: 3000 if version % 50 == 0 else 1]:
            double(paragraph)
    assert double.cache_info().currsize <= 2 * 3000 + 4 * memo.FRESH


def test_a_document_of_any_length_is_remembered_whole() -> None:
    double.cache_clear()
    document = [f"paragraph {number}" for number in range(20_000)]
    for _ in range(3):
        for paragraph in document:
            double(paragraph)
    assert double.cache_info().misses == 20_000


def test_many_documents_that_are_read_once_do_not_pile_up() -> None:
    double.cache_clear()
    for number in range(3 * memo.MOST):
        double(f"paragraph {number}")
    assert double.cache_info().currsize <= 2 * memo.MOST
