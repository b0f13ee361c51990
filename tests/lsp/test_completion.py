"""Completion: the number that must follow, behind the name that was just typed."""

from __future__ import annotations

import pytest
from lsprotocol import types

from serving.editor import Editor, applied, at, ranges

pytestmark = pytest.mark.asyncio(loop_scope="session")


async def complete(editor: Editor, text: str, language: str = "markdown") -> list[str]:
    """Return a text, typed up to the mark, after each of the proposals."""
    text, [mark] = ranges(text)
    uri = editor.open(text, f"draft.{language}", language)
    params = types.CompletionParams(**at(mark, uri))
    found = await editor.text_document_completion_async(params)
    assert isinstance(found, types.CompletionList)
    texts = []
    for item in found.items:
        assert isinstance(item.text_edit, types.TextEdit)
        assert item.text_edit.range.end == mark.start
        assert item.filter_text == item.text_edit.new_text
        texts.append(applied(text, [item.text_edit]))
    return texts


@pytest.mark.parametrize(
    ("typed", "completed"),
    [
        ("F(2, 57) = 4.31, p", "F(2, 57) = 4.31, p = .018"),
        ("F(2, 57) = 4.31, p =", "F(2, 57) = 4.31, p = .018"),
        ("F(2, 57) = 4.31, *p* = .0", "F(2, 57) = 4.31, *p* = .018"),
        ("$F(2, 57) = 4.31$, $p = ", "$F(2, 57) = 4.31$, $p = .018"),
        ("F(2, 57) = 40.31, p ", "F(2, 57) = 40.31, p < .001"),
        (
            "The regression fits, F(2, 57) = 4.31, R²",
            "The regression fits, F(2, 57) = 4.31, R² = .13",
        ),
        (
            "The regression fits, F(2, 57) = 4.31, *R*^2^ =",
            "The regression fits, F(2, 57) = 4.31, *R*^2^ = .13",
        ),
        (
            "The regression fits, F(2, 57) = 4.31, adjusted R² ",
            "The regression fits, F(2, 57) = 4.31, adjusted R² = .10",
        ),
        (
            "The regression fits, F(2, 57) = 4.31, n = ",
            "The regression fits, F(2, 57) = 4.31, n = 60",
        ),
        ("b = 0.42, SE = 0.11, t(57)", "b = 0.42, SE = 0.11, t(57) = 3.82"),
        (
            "b = 0.42, SE = 0.11, t(57) = 3.82, 95% CI [",
            "b = 0.42, SE = 0.11, t(57) = 3.82, 95% CI [0.20, 0.64",
        ),
    ],
)
async def test_the_value_that_must_follow_is_proposed(
    editor: Editor, typed: str, completed: str
) -> None:
    assert await complete(editor, f"{typed}‹› and more.") == [f"{completed} and more."]


@pytest.mark.parametrize(
    "typed",
    [
        "The p",
        "It is F(2, 57) = 4.31, ex",
        "Earlier, F(2, 57) = 4.31. The p",
        "F(2, 57) = 4.31, q =",
    ],
)
async def test_elsewhere_nothing_is_proposed(editor: Editor, typed: str) -> None:
    assert await complete(editor, f"{typed}‹› and more.") == []


async def test_it_works_in_latex_and_html(editor: Editor) -> None:
    assert await complete(editor, "So $F(2, 57) = 4.31$, $p = ‹›", "latex") == [
        "So $F(2, 57) = 4.31$, $p = .018"
    ]
    assert await complete(editor, "<p>So t(57) = 9.31, <i>p</i> ‹›</p>", "html") == [
        "<p>So t(57) = 9.31, <i>p</i> &lt; .001</p>"
    ]


async def test_a_proposal_comes_with_its_working(editor: Editor) -> None:
    text, [mark] = ranges("F(2, 57) = 4.31, p‹›")
    params = types.CompletionParams(**at(mark, editor.open(text)))
    found = await editor.text_document_completion_async(params)
    assert isinstance(found, types.CompletionList)
    [item] = found.items
    assert item.label == "p = .018"
    assert isinstance(item.documentation, types.MarkupContent)
    assert "Follows from F(2, 57)" in item.documentation.value.replace("\\", "")
    assert "with F between 4.305 and 4.315" in item.documentation.value
