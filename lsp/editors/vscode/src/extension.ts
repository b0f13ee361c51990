// The Crossfoot extension: starts the language server and gives its results a place in the window.

import * as vscode from "vscode";
import { LanguageClient, LanguageClientOptions, State } from "vscode-languageclient/node";
import { findCommand } from "./command";
import { Status } from "./status";

const LANGUAGES = [
  "markdown", "quarto", "rmd", "latex", "tex", "html", "xml", "restructuredtext", "org", "typst",
  "asciidoc", "plaintext",
];

let client: LanguageClient | undefined;

export async function activate(context: vscode.ExtensionContext): Promise<void> {
  const status = new Status(() => client);
  context.subscriptions.push(
    status,
    vscode.commands.registerCommand("crossfoot.showSummary", () => showSummary()),
    vscode.commands.registerCommand("crossfoot.allowWithReason", allowWithReason),
    vscode.commands.registerCommand("crossfoot.restart", () => restart(status)),
    vscode.workspace.onDidChangeConfiguration((event) => {
      const ours = ["crossfoot.interpreter", "crossfoot.command"];
      if (ours.some((name) => event.affectsConfiguration(name))) {
        void restart(status);
      }
    }),
  );
  await start(status);
}

export async function deactivate(): Promise<void> {
  await client?.stop();
}

async function start(status: Status): Promise<void> {
  const command = await findCommand();
  if (command === undefined) {
    status.failed("Crossfoot is not installed in any Python that was found.");
    const choice = await vscode.window.showErrorMessage(
      "Crossfoot is not installed in any Python that was found. Install it with “pip install " +
        "crossfoot”, or say where it is.",
      "Open the settings",
    );
    if (choice !== undefined) {
      await vscode.commands.executeCommand("workbench.action.openSettings", "crossfoot.interpreter");
    }
    return;
  }
  const options: LanguageClientOptions = {
    documentSelector: LANGUAGES.flatMap((language) => [
      { language, scheme: "file" },
      { language, scheme: "untitled" },
      { language, notebook: "jupyter-notebook" },
    ]),
    initializationOptions: { askReason: true, marksInHover: true },
    synchronize: {
      configurationSection: "crossfoot",
      fileEvents: vscode.workspace.createFileSystemWatcher("**/{crossfoot,pyproject}.toml"),
    },
  };
  const [executable, ...args] = command;
  client = new LanguageClient("crossfoot", "Crossfoot", { command: executable, args }, options);
  client.onDidChangeState(({ newState }) => status.changed(newState === State.Running));
  try {
    await client.start();
  } catch (error) {
    status.failed(String(error));
  }
}

async function restart(status: Status): Promise<void> {
  const old = client;
  client = undefined;
  await old?.stop().catch(() => undefined);
  await start(status);
}

/** Show what became of the results of the document, and go to the finding that is chosen. */
async function showSummary(): Promise<void> {
  const editor = vscode.window.activeTextEditor;
  if (client === undefined || editor === undefined) {
    return;
  }
  const uri = editor.document.uri;
  const words = await vscode.commands.executeCommand<string | null>(
    "crossfoot.summary", uri.toString(), true,
  );
  if (!words) {
    void vscode.window.showInformationMessage("Crossfoot does not read this document.");
    return;
  }
  const [headline, ...findings] = words.split("\n");
  const items = findings.map((words) => {
    const [, line, label, detail] = /^Line (\d+), (.*?): (.*)$/.exec(words) ?? [];
    return { label: `$(arrow-right) ${label}`, description: `line ${line}`, detail, line: Number(line) };
  });
  if (items.length === 0) {
    void vscode.window.showInformationMessage(headline);
    return;
  }
  const chosen = await vscode.window.showQuickPick(items, { title: headline, matchOnDetail: true });
  if (chosen !== undefined) {
    const place = new vscode.Position(chosen.line - 1, 0);
    await vscode.window.showTextDocument(editor.document, { selection: new vscode.Range(place, place) });
  }
}

/** Ask why a finding is right as printed; the server then writes the remark. */
async function allowWithReason(uri: string, claim: string, identity: string): Promise<void> {
  const reason = await vscode.window.showInputBox({
    title: `Allow ${identity}`,
    prompt: "Why is it right as printed? The reason is kept beside it, as a comment.",
    validateInput: (text) => (text.trim() ? undefined : "A reason is required."),
  });
  if (reason !== undefined) {
    const done = await vscode.commands.executeCommand<boolean>(
      "crossfoot.allow", uri, claim, identity, reason,
    );
    if (!done) {
      void vscode.window.showWarningMessage("The remark could not be written here.");
    }
  }
}
