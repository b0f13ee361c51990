"""Code actions: remedies, completed results, allowances, and all that is safe at once."""

from __future__ import annotations

from collections.abc import Sequence

import pytest
from lsprotocol import types

from serving.editor import Editor, applied, pulling, ranges, session

pytestmark = pytest.mark.asyncio(loop_scope="session")


async def actions(
    editor: Editor,
    uri: str,
    range_: types.Range,
    only: Sequence[str] | None = None,
    marks: Sequence[types.Diagnostic] = (),
) -> list[types.CodeAction]:
    context = types.CodeActionContext(list(marks), list(only) if only else None)
    document = types.TextDocumentIdentifier(uri)
    params = types.CodeActionParams(document, range_, context)
    found = await editor.text_document_code_action_async(params)
    assert all(isinstance(action, types.CodeAction) for action in found or ())
    return list(found or ())  # type: ignore[arg-type]  # looked at just before


def edits_of(action: types.CodeAction, version: int = 1) -> Sequence[types.TextEdit]:
    assert action.edit is not None
    assert action.edit.document_changes is not None
    [change] = action.edit.document_changes
    assert isinstance(change, types.TextDocumentEdit)
    assert change.text_document.version == version
    return change.edits  # type: ignore[return-value]  # no annotated edits are made


async def after(
    editor: Editor, text: str, title: str, language: str = "markdown", kind: str | None = None
) -> str:
    """Return a text after the one action whose title starts so."""
    text, marks = ranges(text)
    uri = editor.open(text, f"draft.{language}", language)
    found = await actions(editor, uri, marks[0], [kind] if kind else None)
    chosen = [a for a in found if f"{a.title} ".startswith((f"{title} ", f"{title}: "))]
    assert len(chosen) == 1, [action.title for action in found]
    action = chosen[0]
    if action.edit is None:
        action = await editor.code_action_resolve_async(action)
    return applied(text, edits_of(action))


@pytest.mark.parametrize(
    ("text", "title", "result"),
    [
        (
            "F(2, 57) = 4.31, *p* = ‹.081›",
            "Change to p = .018",
            "F(2, 57) = 4.31, *p* = .018",
        ),
        (
            "F(2, 57) = 4.31, p = ‹0,081›",
            "Change to p = 0,018",
            "F(2, 57) = 4.31, p = 0,018",
        ),
        (
            "The fit, R² = .13, F(‹57›, 2) = 4.31, p = .018",
            "Change to df1 = 2 and df2 = 57",
            "The fit, R² = .13, F(2, 57) = 4.31, p = .018",
        ),
        (
            "The fit, R² = ‹.31›, F(2, 57) = 4.31, p = .018",
            "Change to R² = .13",
            "The fit, R² = .13, F(2, 57) = 4.31, p = .018",
        ),
        ("t(40) = 9.20, p = ‹.000›", "Change to p < .001", "t(40) = 9.20, p < .001"),
    ],
)
async def test_a_remedy_changes_exactly_its_number(
    editor: Editor, text: str, title: str, result: str
) -> None:
    assert await after(editor, text, title) == result


@pytest.mark.parametrize(
    ("language", "text", "result"),
    [
        ("latex", "$t(40) = 9.20$, $p = ‹.000›$", "$t(40) = 9.20$, $p < .001$"),
        (
            "latex",
            r"\textit{t}(40) = 9.20, \textit{p} = ‹.000›",
            r"\textit{t}(40) = 9.20, \textit{p} $<$ .001",
        ),
        (
            "html",
            "<p><i>t</i>(40) = 9.20, <i>p</i> = ‹.000›</p>",
            "<p><i>t</i>(40) = 9.20, <i>p</i> &lt; .001</p>",
        ),
    ],
)
async def test_a_changed_relation_is_written_as_the_format_wants_it(
    editor: Editor, language: str, text: str, result: str
) -> None:
    assert await after(editor, text, "Change to p < .001", language) == result


async def test_a_fix_names_the_diagnostic_it_is_for(editor: Editor) -> None:
    text, [mark] = ranges("F(2, 57) = 4.31, p = ‹.081›")
    uri = editor.open(text)
    marks = (await editor.diagnostics_of(uri)).items
    [first, *others] = await actions(editor, uri, mark, ["quickfix"], marks)
    assert list(first.diagnostics or ()) == list(marks)
    assert first.is_preferred is True
    assert not any(action.is_preferred for action in others)


@pytest.mark.parametrize(
    ("language", "text", "title", "result"),
    [
        (
            "markdown",
            "It fits, *F*(2, 57) = ‹4.31›.",
            "Add p",
            "It fits, *F*(2, 57) = 4.31, *p* = .018.",
        ),
        (
            "markdown",
            "The regression fits, *F*(2, 57) = ‹4.31›.",
            "Add R²",
            "The regression fits, *F*(2, 57) = 4.31, *R*² = .13.",
        ),
        (
            "markdown",
            "The regression fits, F(2, 57) = ‹4.31›.",
            "Add adjusted R²",
            "The regression fits, F(2, 57) = 4.31, adjusted *R*² = .10.",
        ),
        (
            "markdown",
            "The regression fits, F(2, 57) = ‹4.31›.",
            "Add f²",
            "The regression fits, F(2, 57) = 4.31, *f*² = 0.15.",
        ),
        (
            "markdown",
            "It rose, b = 0.42, SE = 0.11, t(57) = ‹3.82›.",
            "Add 95% CI",
            "It rose, b = 0.42, SE = 0.11, t(57) = 3.82, 95% CI [0.20, 0.64].",
        ),
        (
            "markdown",
            "First F(2, 57) = 5.31, _p_=0.008; now F(2, 57) = ‹4.31›.",
            "Add p",
            "First F(2, 57) = 5.31, _p_=0.008; now F(2, 57) = 4.31, _p_=0.018.",
        ),
        (
            "latex",
            "It fits ($F(2, 57) = ‹4.31›$).",
            "Add p",
            "It fits ($F(2, 57) = 4.31, p = .018$).",
        ),
        (
            "html",
            "<p>It fits, <i>t</i>(57) = ‹9.31›</p>",
            "Add p",
            "<p>It fits, <i>t</i>(57) = 9.31, <i>p</i> &lt; .001</p>",
        ),
        ("plain", "It fits, F(2, 57) = ‹4,31›.", "Add p", "It fits, F(2, 57) = 4,31, p = 0,018."),
    ],
)
async def test_a_result_is_completed_in_the_style_of_the_text(
    editor: Editor, language: str, text: str, title: str, result: str
) -> None:
    suffix = {"plain": "txt"}.get(language, language)
    assert await after(editor, text, title, suffix, "refactor") == result


async def test_what_a_completed_result_adds_agrees(editor: Editor) -> None:
    text = await after(editor, "The regression fits, F(2, 57) = ‹4.31›.", "Add p", kind="refactor")
    assert (await editor.diagnostics_of(editor.open(text))).items == ()


@pytest.mark.parametrize(
    ("language", "text", "result"),
    [
        (
            "markdown",
            "First.\n\nNow t(40) = 2.20, p = ‹.017›. Fine.",
            "First.\n\n<!-- crossfoot: allow p-from-t because the test is one-sided -->\n\n"
            "Now t(40) = 2.20, p = .017. Fine.",
        ),
        (
            "latex",
            "So $t(40) = 2.20$, $p = .034$ and $t(40) = 2.20$, $p = ‹.017›$. Fine.",
            "So $t(40) = 2.20$, $p = .034$ and $t(40) = 2.20$, $p = .017$. Fine. "
            "% crossfoot: allow p-from-t because the test is one-sided",
        ),
        (
            "html",
            "<p>t(40) = 2.20, p = ‹.017›, and t(50) = 2.20, p = .016</p>",
            "<p>t(40) = 2.20, p = .017, <!-- crossfoot: allow p-from-t because the test is "
            "one-sided --> and t(50) = 2.20, p = .016</p>",
        ),
    ],
)
async def test_an_allowance_is_a_remark_in_the_comments_of_the_format(
    editor: Editor, language: str, text: str, result: str
) -> None:
    title = "Allow p-from-t here: the test is one-sided"
    assert await after(editor, text, title, language) == result


async def test_an_allowance_settles_what_it_is_for(editor: Editor) -> None:
    text = await after(
        editor,
        "Now t(40) = 2.20, p = ‹.017›.",
        "Allow p-from-t here: checked against the original output",
    )
    assert (await editor.diagnostics_of(editor.open(text))).items == ()


async def test_an_allowance_for_a_text_that_changed_is_not_made(editor: Editor) -> None:
    text, [mark] = ranges("Now t(40) = 2.20, p = ‹.017›.")
    uri = editor.open(text)
    [action] = [
        a
        for a in await actions(editor, uri, mark)
        if a.title.startswith("Allow") and "one-sided" in a.title
    ]
    editor.edit(uri, 2, "Now t(40) = 2.20, p = .034.")
    assert (await editor.code_action_resolve_async(action)).edit is None


async def test_an_editor_that_can_ask_is_given_the_command_for_it() -> None:
    text, [mark] = ranges("Now t(40) = 2.20, p = ‹.017›.")
    async with session(options={"askReason": True}) as editor:
        uri = editor.open(text)
        found = await actions(editor, uri, mark)
        [asking] = [a for a in found if a.title.startswith("Allow")]
        assert asking.command is not None
        assert asking.command.command == "crossfoot.allowWithReason"
        arguments = [*list(asking.command.arguments or ())[:3], "the hypothesis has a side"]
        done = await editor.workspace_execute_command_async(
            types.ExecuteCommandParams("crossfoot.allow", arguments)
        )
        assert done is True
        await editor.take(types.WORKSPACE_APPLY_EDIT)
        [made] = editor.edits
        [change] = made.edit.document_changes or ()
        assert isinstance(change, types.TextDocumentEdit)
        assert "because the hypothesis has a side -->" in applied(text, change.edits)  # type: ignore[arg-type]  # no annotated edits are made


async def test_all_that_is_safe_is_rewritten_at_once(editor: Editor) -> None:
    text = (
        "‹First›, t(40) = 9.20, p = .000. Then t(40) = 9.20, *p* = 0.00. And t(40) = 2.20, "
        "p = .000. But F(2, 57) = 4.31, p = .081."
    )
    assert await after(editor, text, "Rewrite", kind="source.fixAll") == (
        "First, t(40) = 9.20, p < .001. Then t(40) = 9.20, *p* < 0.01. And t(40) = 2.20, "
        "p = .000. But F(2, 57) = 4.31, p = .081."
    )


async def test_safe_rewrites_are_offered_only_where_they_are_asked_for(editor: Editor) -> None:
    text, [mark] = ranges("t(40) = 9.20, p = ‹.000›.")
    uri = editor.open(text)
    kinds = {action.kind for action in await actions(editor, uri, mark)}
    assert "source.fixAll.crossfoot" not in kinds
    for only in ("source", "source.fixAll", "source.fixAll.crossfoot"):
        assert len(await actions(editor, uri, mark, [only])) == 1
    assert await actions(editor, uri, mark, ["source.organizeImports"]) == []
    assert await actions(editor, uri, mark, ["sourc"]) == []


async def test_an_editor_without_versions_gets_plain_changes() -> None:
    capabilities = pulling()
    assert capabilities.workspace is not None
    capabilities.workspace.workspace_edit = None
    capabilities.text_document.code_action = types.CodeActionClientCapabilities(  # type: ignore[union-attr]  # made just above
        code_action_literal_support=types.ClientCodeActionLiteralOptions(
            types.ClientCodeActionKindOptions(["quickfix"])
        )
    )
    text, [mark] = ranges("t(40) = 2.20, p = ‹.017›.")
    async with session(capabilities) as editor:
        uri = editor.open(text)
        for action in await actions(editor, uri, mark, ["quickfix"]):
            assert action.edit is not None
            assert action.edit.changes is not None
            assert list(action.edit.changes) == [uri]
            assert action.data is None


async def test_where_nothing_is_found_there_is_nothing_to_do(editor: Editor) -> None:
    text, [mark] = ranges("‹Words› and t(40) = 2.20, p = .034.")
    assert await actions(editor, editor.open(text), mark) == []
