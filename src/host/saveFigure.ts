import { basename } from "node:path";
import * as vscode from "vscode";
import type { SavedFigure } from "../protocol";
import { fileNameOf } from "./fileName";
import { words } from "./words";

const KINDS = { svg: { SVG: ["svg"] }, png: { PNG: ["png"] } } as const;

/**
 * Asks where a figure is to go and writes it there.
 * @param folder where the dialog begins
 * @returns what the panel says; nothing where the dialog was left
 */
export async function saveFigure({ as, name, data }: SavedFigure, folder: string): Promise<{ ok: boolean; text: string }> {
  const defaultUri = vscode.Uri.joinPath(vscode.Uri.file(folder), `${fileNameOf(name)}.${as}`);
  const filters = Object.fromEntries(Object.entries(KINDS[as]).map(([kind, endings]) => [kind, [...endings]]));
  const uri = await vscode.window.showSaveDialog({ defaultUri, filters, title: words.saveFigure });
  if (!uri) return { ok: true, text: "" };
  const file = basename(uri.path);
  try {
    await vscode.workspace.fs.writeFile(uri, Buffer.from(data, as === "svg" ? "utf8" : "base64"));
  } catch {
    return { ok: false, text: words.notSaved(file) };
  }
  return { ok: true, text: words.saved(file) };
}
