import { basename } from "node:path";
import * as vscode from "vscode";
import { words } from "./words";

/** Shows a file at a 1-based line, beside the panel: in an editor that already has it, else in the first column. */
export async function openLine(path: string | null, line: number): Promise<void> {
  if (path === null) return;
  const uri = vscode.Uri.file(path);
  const at = new vscode.Range(line - 1, 0, line - 1, 0);
  const open = vscode.window.visibleTextEditors.find((editor) => editor.document.uri.toString() === uri.toString());
  try {
    await vscode.window.showTextDocument(uri, { selection: at, viewColumn: open?.viewColumn ?? vscode.ViewColumn.One });
  } catch {
    void vscode.window.showWarningMessage(words.noLine(basename(path)));
  }
}
