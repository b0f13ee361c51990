"""Diagnostics: asked for or sent, never both; versioned; never stale."""

from __future__ import annotations

import asyncio
from pathlib import Path

import pytest
from lsprotocol import types
from pygls.uris import to_fs_path

from serving.editor import Editor, pushing, ranges, session

pytestmark = pytest.mark.asyncio(loop_scope="session")

WRONG = "The plots differed, F(‹2›, ‹57›) = ‹4.31›, p = ‹.052›."


async def test_a_finding_stands_at_its_number_with_the_others_as_related_places(
    editor: Editor,
) -> None:
    text, marks = ranges(WRONG)
    uri = editor.open(text)
    report = await editor.diagnostics_of(uri)
    [found] = report.items
    assert found.range == marks[3]
    assert found.severity == types.DiagnosticSeverity.Error
    assert (found.source, found.code) == ("crossfoot", "p-from-f")
    assert found.message.startswith("p is printed as .052, but F(2, 57) = 4.31 gives p")
    assert [related.location.range for related in found.related_information] == marks[:3]
    assert found.related_information[2].message == "F = 4.31"


async def test_the_name_of_an_identity_leads_to_what_is_said_about_it(editor: Editor) -> None:
    [found] = (await editor.diagnostics_of(editor.open("So t(40) = 2.20, p = .533."))).items
    address, _, line = found.code_description.href.partition("#L")
    file = Path(to_fs_path(address) or "")
    assert file.read_text(encoding="utf-8").split("\n")[int(line) - 1] == "## p-from-t: p from t"


async def test_without_a_place_to_keep_the_page_there_is_no_link(tmp_path: Path) -> None:
    (tmp_path / "file").touch()
    async with session(environment={"XDG_CACHE_HOME": str(tmp_path / "file")}) as editor:
        [found] = (await editor.diagnostics_of(editor.open("So t(40) = 2.20, p = .533."))).items
        assert found.code_description is None


@pytest.mark.parametrize(
    ("text", "severity"),
    [
        ("t(40) = 2.20, p = .533", types.DiagnosticSeverity.Error),
        ("t(40) = 2.20, p = .017", types.DiagnosticSeverity.Warning),  # fits a one-sided test
        ("t(40) = 9.20, p = .000", types.DiagnosticSeverity.Information),
    ],
)
async def test_severities_are_mapped(
    editor: Editor, text: str, severity: types.DiagnosticSeverity
) -> None:
    report = await editor.diagnostics_of(editor.open(f"The groups differed, {text}."))
    assert [item.severity for item in report.items] == [severity]


async def test_what_agrees_and_what_is_settled_is_not_shown(editor: Editor) -> None:
    fine = editor.open("The plots differed, F(2, 57) = 4.31, p = .018.")
    assert (await editor.diagnostics_of(fine)).items == ()
    settled = editor.open(
        "<!-- crossfoot: allow p-from-f because p is from resampling -->\n\n"
        "The plots differed, F(2, 57) = 4.31, p = .052."
    )
    assert (await editor.diagnostics_of(settled)).items == ()


async def test_a_remark_that_is_not_understood_is_shown_where_it_stands(editor: Editor) -> None:
    text, [mark] = ranges("‹<!-- crossfoot: allow p-from-f -->›\n\nt(40) = 2.20, p = .034")
    [found] = (await editor.diagnostics_of(editor.open(text))).items
    assert (found.range, found.code) == (mark, "remark")
    assert "reason" in found.message


async def test_the_same_diagnostics_are_not_sent_twice(editor: Editor) -> None:
    text, _ = ranges(WRONG)
    uri = editor.open(text)
    first = await editor.diagnostics_of(uri)
    assert first.kind == "full"
    again = await editor.diagnostics_of(uri, first.result_id)
    assert (again.kind, again.result_id) == ("unchanged", first.result_id)
    editor.edit(uri, 2, (_end(0, len(text)), " More words."))
    still = await editor.diagnostics_of(uri, first.result_id)
    assert still.kind == "unchanged"
    editor.edit(uri, 3, (_end(0, 0), "Here: "))
    moved = await editor.diagnostics_of(uri, first.result_id)
    assert moved.kind == "full"
    assert moved.items[0].range.start.character == first.items[0].range.start.character + 6


async def test_an_answer_is_on_the_newest_text(editor: Editor) -> None:
    uri = editor.open("The plots differed, F(2, 57) = 4.31, p = .052.")
    waiting = []
    for version, digit in enumerate("1234567890" * 10, 2):
        change = f"The plots differed, F(2, 57) = 4.31, p = .05{digit}."
        editor.edit(uri, version, change)
        waiting.append(asyncio.ensure_future(editor.diagnostics_of(uri)))
    editor.edit(uri, 1000, "The plots differed, F(2, 57) = 4.31, p = .018.")
    assert (await editor.diagnostics_of(uri)).items == ()
    reports = await asyncio.gather(*waiting)
    # Each is on the text at its request or on a newer one; one ahead of all others is complete.
    assert len(reports) == 100


async def test_a_question_can_be_cancelled_and_the_next_is_answered(editor: Editor) -> None:
    uri = editor.open("Words. " * 40_000 + WRONG.replace("‹", "").replace("›", ""))
    document = types.TextDocumentIdentifier(uri)
    future = editor.protocol.send_request_async(
        types.TEXT_DOCUMENT_DIAGNOSTIC, types.DocumentDiagnosticParams(document), msg_id="given-up"
    )
    task = asyncio.ensure_future(future)
    await asyncio.sleep(0)
    editor.cancel_request(types.CancelParams("given-up"))
    with pytest.raises(Exception, match="cancel"):
        await task
    assert len((await editor.diagnostics_of(uri)).items) == 1


async def test_a_simple_editor_is_sent_them_with_their_version(simple: Editor) -> None:
    text, marks = ranges(WRONG)
    uri = simple.open(text)
    [found] = await simple.shown(uri, 1)
    assert found.range == marks[3]
    assert found.related_information is None  # it has not said that it shows them
    simple.edit(uri, 2, text.replace(".052", ".018"))
    assert await simple.shown(uri, 2) == ()
    simple.edit(uri, 3, text)
    assert len(await simple.shown(uri, 3)) == 1
    simple.shut(uri)
    await simple.until(lambda: simple.published[uri][-1].version is None)
    assert simple.published[uri][-1].diagnostics == ()


async def test_what_is_sent_never_goes_back_to_an_older_version(simple: Editor) -> None:
    uri = simple.open("Nothing yet.")
    for version in range(2, 200):
        simple.edit(uri, version, f"The plots differed, F(2, 57) = 4.31, p = .{version:03d}.")
    simple.edit(uri, 200, "The plots differed, F(2, 57) = 4.31, p = .052.")
    await simple.shown(uri, 200)
    versions = [params.version for params in simple.published[uri]]
    assert versions == sorted(versions)
    assert len(versions) < 100  # most were never worth sending


async def test_a_weakest_severity_can_be_chosen() -> None:
    text = "t(40) = 9.20, p = .000. Then t(40) = 2.20, p = .017. And t(40) = 2.20, p = .533."
    async with session(settings={"show": "doubt"}) as editor:
        report = await editor.diagnostics_of(editor.open(text))
    assert [item.severity for item in report.items] == [
        types.DiagnosticSeverity.Warning,
        types.DiagnosticSeverity.Error,
    ]


async def test_an_editor_that_is_sent_diagnostics_is_not_told_that_it_could_ask() -> None:
    async with session(pushing()) as editor:
        assert editor._server is not None
        with pytest.raises(Exception, match="Method Not Found"):
            await editor.diagnostics_of(editor.open("Words."))


def _end(line: int, column: int) -> types.Range:
    return types.Range(types.Position(line, column), types.Position(line, column))
