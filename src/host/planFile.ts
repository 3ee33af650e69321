import { readFile, stat, writeFile } from "node:fs/promises";
import { basename, dirname, join, relative, sep } from "node:path";
import * as vscode from "vscode";
import type { Plan } from "../engine/plan";
import { planText } from "../plan/edit";
import type { Rewritten } from "./keeping";
import { stretchOf } from "./stretch";
import { dataPath, isPlan, PLAN_SUFFIX } from "./target";
import { words } from "./words";

const refused = (note: string): Rewritten => ({ ok: false, note });

/**
 * Changes a plan file by what it holds: in the editor where it is open (and saved at once, unless there were unsaved changes, which are the
 * person's to save), else on disk. Writes nothing in a workspace that is not trusted, and nothing into a file marked read-only.
 */
export async function rewritePlan(path: string, edit: (text: string) => string | null): Promise<Rewritten> {
  const file = basename(path);
  if (!vscode.workspace.isTrusted) return refused(words.untrusted);
  try {
    // whoever may write anything may write into such a file too; the mark says not to
    if (((await stat(path)).mode & 0o222) === 0) return refused(words.readOnly(file));
    const uri = vscode.Uri.file(path);
    const document = vscode.workspace.textDocuments.find((open) => open.uri.toString() === uri.toString());
    if (document) return await rewriteDocument(document, edit);
    const before = await readFile(path, "utf8");
    const text = edit(before);
    if (text === null) return refused(words.planBroken(file));
    if (text !== before) await vscode.workspace.fs.writeFile(uri, Buffer.from(text, "utf8"));
    return { ok: true, text };
  } catch {
    return refused(words.planNotWritten(file));
  }
}

async function rewriteDocument(document: vscode.TextDocument, edit: (text: string) => string | null): Promise<Rewritten> {
  const file = basename(document.uri.path);
  const unsaved = document.isDirty;
  const before = document.getText();
  const text = edit(before);
  if (text === null) return refused(words.planBroken(file));
  if (text === before) return unsaved ? refused(words.planUnsaved(file)) : { ok: true, text };
  const change = new vscode.WorkspaceEdit();
  const { from, to, content } = stretchOf(before, text);
  change.replace(document.uri, new vscode.Range(document.positionAt(from), document.positionAt(to)), content);
  if (!(await vscode.workspace.applyEdit(change))) return refused(words.planNotWritten(file));
  if (unsaved) return refused(words.planUnsaved(file));
  return (await document.save()) ? { ok: true, text: document.getText() } : refused(words.planNotWritten(file));
}

export interface CreatedPlan {
  readonly path: string;
  readonly text: string;
}

/**
 * Saves a bare CSV's question as a plan: NAME.slantwise.json beside it, or, where that exists, where a person says.
 * @param folders workspace folders a plan may point into
 * @returns the new file, a sentence why there is none, or null where the dialog was left
 */
export async function createPlan(
  csv: string,
  plan: Plan,
  folders: readonly string[],
): Promise<CreatedPlan | { readonly note: string } | null> {
  if (!vscode.workspace.isTrusted) return { note: words.untrusted };
  const own = join(dirname(csv), basename(csv).replace(/\.[^.]+$/, "") + PLAN_SUFFIX);
  const text = planText(plan, basename(csv));
  try {
    await writeFile(own, text, { flag: "wx" });
    return { path: own, text };
  } catch (error) {
    if ((error as NodeJS.ErrnoException).code !== "EEXIST") return { note: words.notSaved(basename(own)) };
  }
  return createElsewhere(csv, plan, folders, await freeName(own));
}

async function createElsewhere(
  csv: string,
  plan: Plan,
  folders: readonly string[],
  suggested: string,
): Promise<CreatedPlan | { readonly note: string } | null> {
  const filters = { [words.planKind]: [PLAN_SUFFIX.slice(1)] };
  const defaultUri = vscode.Uri.file(suggested);
  const uri = await vscode.window.showSaveDialog({ defaultUri, filters, title: words.savePlan });
  if (!uri) return null;
  const path = isPlan(uri.fsPath) ? uri.fsPath : uri.fsPath.replace(/(\.json)?$/i, PLAN_SUFFIX);
  const file = basename(path);
  const data = relative(dirname(path), csv).split(sep).join("/");
  if (uri.scheme !== "file" || dataPath(path, data, folders) === null) return { note: words.tooFar(basename(csv)) };
  const text = planText(plan, data);
  try {
    // the dialog has asked about the name it gave, not about one with our ending
    await writeFile(path, text, { flag: path === uri.fsPath ? "w" : "wx" });
    return { path, text };
  } catch (error) {
    return { note: (error as NodeJS.ErrnoException).code === "EEXIST" ? words.exists(file) : words.notSaved(file) };
  }
}

/** "flats 2.slantwise.json": a name beside the taken one that is free. */
async function freeName(taken: string): Promise<string> {
  for (let number = 2; ; number++) {
    const path = taken.slice(0, -PLAN_SUFFIX.length) + ` ${number}` + PLAN_SUFFIX;
    if (!(await stat(path).catch(() => null))) return path;
  }
}
