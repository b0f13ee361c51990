// The item in the status bar: whether the server runs, and what became of the document's results.

import * as vscode from "vscode";
import { LanguageClient } from "vscode-languageclient/node";

const PAUSE = 300;

export class Status implements vscode.Disposable {
  private readonly item = vscode.window.createStatusBarItem("crossfoot", vscode.StatusBarAlignment.Right, 90);
  private readonly rest: vscode.Disposable[];
  private running = false;
  private waiting: NodeJS.Timeout | undefined;

  constructor(private readonly client: () => LanguageClient | undefined) {
    this.item.name = "Crossfoot";
    this.item.command = "crossfoot.showSummary";
    this.rest = [
      this.item,
      vscode.window.onDidChangeActiveTextEditor(() => this.soon()),
      vscode.languages.onDidChangeDiagnostics(() => this.soon()),
    ];
    this.show("$(sync~spin) Crossfoot", "Crossfoot is starting");
  }

  /** Take note of whether the server runs. */
  changed(running: boolean): void {
    this.running = running;
    this.soon();
  }

  /** Say why the server does not run. */
  failed(reason: string): void {
    this.running = false;
    this.show("$(error) Crossfoot", reason);
  }

  dispose(): void {
    clearTimeout(this.waiting);
    this.rest.forEach((item) => item.dispose());
  }

  private soon(): void {
    clearTimeout(this.waiting);
    this.waiting = setTimeout(() => void this.refresh(), PAUSE);
  }

  private async refresh(): Promise<void> {
    const editor = vscode.window.activeTextEditor;
    if (!this.running || this.client() === undefined || editor === undefined) {
      this.item.hide();
      return;
    }
    const words = await vscode.commands
      .executeCommand<string | null>("crossfoot.summary", editor.document.uri.toString(), true)
      .then((words) => words, () => null);
    if (!words) {
      this.item.hide();
      return;
    }
    const [headline] = words.split("\n");
    const wrong = /(\d+) disagree/.exec(headline)?.[1];
    const count = /(\d+) result/.exec(headline)?.[1] ?? "0";
    this.show(wrong ? `$(warning) Crossfoot ${wrong} of ${count}` : `$(check) Crossfoot ${count}`, headline);
  }

  private show(text: string, tooltip: string): void {
    this.item.text = text;
    this.item.tooltip = tooltip;
    this.item.show();
  }
}
