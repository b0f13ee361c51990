// Which command starts the server: what the settings say, else a Python that has Crossfoot.

import { execFile } from "node:child_process";
import { existsSync } from "node:fs";
import { join } from "node:path";
import * as vscode from "vscode";

const FOLDERS = [".venv", "venv"];

/** Return the command, or nothing where no Python that was found has Crossfoot. */
export async function findCommand(): Promise<[string, ...string[]] | undefined> {
  const settings = vscode.workspace.getConfiguration("crossfoot");
  const told = settings.get<string[]>("command", []);
  if (told.length > 0) {
    return [told[0], ...told.slice(1)];
  }
  for (const python of await interpreters(settings.get<string>("interpreter", ""))) {
    if (await has(python)) {
      return [python, "-m", "crossfoot", "serve"];
    }
  }
  return undefined;
}

/** Return the Pythons to try, the likeliest first; only the one that is told, if one is. */
async function interpreters(told: string): Promise<string[]> {
  if (told) {
    return [told];
  }
  const found: (string | undefined)[] = [await chosen()];
  for (const folder of vscode.workspace.workspaceFolders ?? []) {
    for (const name of FOLDERS) {
      found.push(inside(join(folder.uri.fsPath, name)));
    }
  }
  return [...found.filter((path) => path !== undefined), "python3", "python"];
}

function inside(environment: string): string | undefined {
  const paths = [join(environment, "bin", "python"), join(environment, "Scripts", "python.exe")];
  return paths.find((path) => existsSync(path));
}

/** Return the interpreter that the Python extension has chosen, if it is there. */
async function chosen(): Promise<string | undefined> {
  const extension = vscode.extensions.getExtension("ms-python.python");
  if (extension === undefined) {
    return undefined;
  }
  try {
    const api = await extension.activate();
    const folder = vscode.workspace.workspaceFolders?.[0]?.uri;
    return api?.environments?.getActiveEnvironmentPath?.(folder)?.path;
  } catch {
    return undefined; // another extension's trouble is not ours
  }
}

function has(python: string): Promise<boolean> {
  return new Promise((resolve) => {
    execFile(python, ["-c", "import crossfoot_lsp.server"], { timeout: 20_000 }, (error) => resolve(!error));
  });
}
