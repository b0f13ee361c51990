"""What lies ready for editors agrees with the server and with each other."""

from __future__ import annotations

import json
import re
import tomllib

import pytest

from crossfoot.laws import IDENTITIES
from crossfoot.scan import scan_text
from crossfoot.settings import SETTINGS
from crossfoot_lsp.capabilities import COMMANDS, capabilities
from crossfoot_lsp.client import Client, client_of
from crossfoot_lsp.configuration import SHARED, EditorSettings, understood
from crossfoot_lsp.languages import LANGUAGE_IDS, format_of, is_text
from crossfoot_lsp.reference import page
from serving.editor import ROOT

EDITORS = ROOT / "lsp" / "editors"
PACKAGE = json.loads((EDITORS / "vscode" / "package.json").read_text())

#: Settings of the extension that never reach the server as such.
OF_THE_EXTENSION = {"interpreter", "command", "trace.server"}


def extension_defaults() -> dict[str, object]:
    properties = PACKAGE["contributes"]["configuration"]["properties"]
    return {
        name.removeprefix("crossfoot."): declared["default"]
        for name, declared in properties.items()
    }


def test_the_extension_has_the_settings_of_the_server_with_their_defaults() -> None:
    defaults = extension_defaults()
    assert set(SHARED.values()) <= set(SETTINGS)
    # The editor sends names with dots as settings inside of others.
    chosen = understood({name.partition(".")[0]: value for name, value in defaults.items()})
    assert chosen.problems == ()
    assert chosen.editor == EditorSettings()
    assert chosen.shared == {}
    names = {re.sub("_(.)", lambda m: m[1].upper(), name) for name in EditorSettings._fields}
    assert set(defaults) - OF_THE_EXTENSION == names | {"alpha", "exclude"}


def test_the_settings_and_commands_are_all_described() -> None:
    text = (EDITORS / "README.md").read_text()
    for name in set(extension_defaults()) - OF_THE_EXTENSION:
        assert f"| `{name}` |" in text
    for command in COMMANDS:
        assert f"| `{command}` |" in text


def test_the_extension_starts_for_every_language_that_it_serves() -> None:
    source = (EDITORS / "vscode" / "src" / "extension.ts").read_text()
    block = source[source.index("const LANGUAGES") : source.index("];")]
    served = set(re.findall(r'"([a-z]+)"', block))
    events = {e.partition(":")[2] for e in PACKAGE["activationEvents"] if "onLanguage" in e}
    assert served == events
    for language in served - {"plaintext"}:
        assert format_of(language, "draft") != "plain"


@pytest.mark.parametrize("name", ["sublime/LSP.sublime-settings", "kate/lspclient.json"])
def test_settings_in_json_are_json(name: str) -> None:
    text = (EDITORS / name).read_text()
    found = json.loads("\n".join(line for line in text.split("\n") if not line.startswith("//")))
    [client] = (found.get("clients") or found.get("servers")).values()
    assert client["command"] == ["crossfoot", "serve"]


def test_settings_in_toml_are_toml() -> None:
    found = tomllib.loads((EDITORS / "helix" / "languages.toml").read_text())
    server = found["language-server"]["crossfoot"]
    assert [server["command"], *server["args"]] == ["crossfoot", "serve"]
    assert understood(server["config"]["crossfoot"]).problems == ()
    assert all("crossfoot" in language["language-servers"] for language in found["language"])


def test_no_file_for_editors_names_where_packages_come_from() -> None:
    for path in EDITORS.rglob("*"):
        written = path.suffix in {".json", ".md", ".ts", ".lua", ".el", ".toml"}
        if written and not {"node_modules", "dist"} & set(path.parts):
            assert "://" not in path.read_text(), path


def test_every_language_of_an_editor_is_read_as_some_format() -> None:
    for language in LANGUAGE_IDS:
        assert is_text(format_of(language, "draft"))
    assert format_of("markdown", "x.tex", "latex") == "latex"
    assert format_of("MARKDOWN", "x") == "markdown"
    assert not is_text("notebook")


def test_an_editor_that_declares_nothing_is_taken_to_be_simple() -> None:
    for odd in ({}, {"capabilities": {}}, {"capabilities": {"general": {"positionEncodings": 3}}}):
        assert client_of(odd) == Client()
    assert "diagnosticProvider" not in capabilities(Client())["capabilities"]
    able = capabilities(Client(pulls=True, notebooks=True))["capabilities"]
    assert {"diagnosticProvider", "notebookDocumentSync"} <= able.keys()
    offered = {"capabilities": {"general": {"positionEncodings": ["utf-7", "utf-8", "utf-16"]}}}
    assert client_of(offered).encoding == "utf-8"


def test_settings_that_are_no_settings_are_nothing() -> None:
    for odd in (None, 3, [], "x"):
        assert understood(odd) == understood({})


def test_the_page_about_identities_tells_of_each_and_nothing_wrong_is_found_in_it() -> None:
    text, lines = page(IDENTITIES.values())
    assert list(lines) == list(IDENTITIES)
    for slug, identity in IDENTITIES.items():
        part = text[text.index(f"## {slug}: ") :]
        for words in (identity.formula, identity.explanation, identity.assumption, identity.source):
            assert words in part
    assert not any(placed.audited.findings for placed in scan_text(text).claims)
