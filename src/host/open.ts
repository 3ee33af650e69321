import { basename } from "node:path";
import * as vscode from "vscode";
import type { Panels } from "./panels";
import { isData, isPlan } from "./target";
import { words } from "./words";

const FOUND = "**/*.{csv,CSV,tsv,TSV,slantwise.json}";
const FOUND_LIMIT = 500;

/** The command: from a menu with the clicked file and the selection, from the palette with nothing. */
export async function openComparison(panels: Panels, clicked?: unknown, selection?: unknown): Promise<void> {
  const chosen = files(clicked, selection) ?? (await tabOrPick());
  const usable = chosen.filter((uri) => isData(uri.path) || isPlan(uri.path));
  for (const uri of usable) {
    if (uri.scheme === "file") await panels.open(uri);
    else void vscode.window.showWarningMessage(words.notAFile(basename(uri.path)));
  }
  if (!usable.length && chosen.length) void vscode.window.showWarningMessage(words.notOurs(basename(chosen[0].path)));
}

function files(clicked: unknown, selection: unknown): readonly vscode.Uri[] | null {
  if (!(clicked instanceof vscode.Uri)) return null;
  const all = Array.isArray(selection) ? selection.filter((item) => item instanceof vscode.Uri) : [];
  // a menu on a tab hands over other things behind the file
  return all.some((uri) => uri.toString() === clicked.toString()) ? all : [clicked];
}

async function tabOrPick(): Promise<readonly vscode.Uri[]> {
  const input = vscode.window.tabGroups.activeTabGroup.activeTab?.input;
  if (input instanceof vscode.TabInputText || input instanceof vscode.TabInputCustom) {
    if (isData(input.uri.path) || isPlan(input.uri.path)) return [input.uri];
  }
  const found = await vscode.workspace.findFiles(FOUND, "**/node_modules/**", FOUND_LIMIT);
  if (!found.length) {
    void vscode.window.showInformationMessage(words.nothingToPick);
    return [];
  }
  const items = found
    .map((uri) => ({ label: basename(uri.path), description: vscode.workspace.asRelativePath(uri), uri }))
    .sort((a, b) => a.description.localeCompare(b.description, "en", { numeric: true }));
  const picked = await vscode.window.showQuickPick(items, { placeHolder: words.pick, matchOnDescription: true });
  return picked ? [picked.uri] : [];
}
