import assert from "node:assert";
import { mkdtempSync, rmSync, writeFileSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import * as vscode from "vscode";
import type { Api } from "../../../src/extension";
import type { PanelState } from "../../../src/protocol";

export const EXTENSION = "slantwise.slantwise";

export async function api(): Promise<Api> {
  const extension = vscode.extensions.getExtension<Api>(EXTENSION);
  assert.ok(extension, "the extension is installed");
  return extension.activate();
}

/** A folder of its own for each test, outside the workspace. */
export function scratch(): { readonly path: (name: string) => string; readonly remove: () => void } {
  const folder = mkdtempSync(join(tmpdir(), "slantwise-host-"));
  return { path: (name) => join(folder, name), remove: () => rmSync(folder, { recursive: true, force: true }) };
}

/** Two groups whose difference depends on `shift`, a covariate, and an id; the same bytes for the same arguments. */
export function heating(rows: number, shift: number): string {
  let state = 11;
  const next = () => (state = (state * 16807) % 2147483647) / 2147483647;
  const lines = ["flat_id,retrofit,floor_m2,kwh"];
  for (let i = 0; i < rows; i++) {
    const floor = 40 + 25 * (i % 2) + Math.round(next() * 300) / 10;
    const kwh = 900 + 45 * floor - shift * (i % 2) + 250 * next();
    lines.push(`F${i},${i % 2 ? "full" : "none"},${floor},${kwh.toFixed(1)}`);
  }
  return lines.join("\n") + "\n";
}

export function write(path: string, text: string): void {
  writeFileSync(path, text);
}

export async function open(path: string): Promise<void> {
  await vscode.commands.executeCommand("slantwise.open", vscode.Uri.file(path));
}

export async function stateOf(path: string): Promise<PanelState | undefined> {
  const target = vscode.Uri.file(path).toString();
  return (await api()).states().find((state) => state.target === target);
}

/** Waits until a panel's state is as asked, and gives it; says the last state where it never is. */
export async function until(path: string, holds: (state: PanelState) => boolean, timeout = 20_000): Promise<PanelState> {
  const end = Date.now() + timeout;
  for (;;) {
    const state = await stateOf(path);
    if (state && holds(state)) return state;
    if (Date.now() > end) {
      assert.fail(`never so: ${String(holds)}; last ${JSON.stringify({ ...state, presentation: state?.presentation?.summary })}`);
    }
    await wait(30);
  }
}

export const ready = (number: number) => (state: PanelState) =>
  state.status.kind === "ready" && !state.checking && state.reading?.number === number;

export function wait(ms: number): Promise<void> {
  return new Promise((done) => setTimeout(done, ms));
}

/** Every status a panel goes through until the returned function is called. */
export async function record(path: string): Promise<() => readonly string[]> {
  const { states } = await api();
  const target = vscode.Uri.file(path).toString();
  const seen = new Set<string>();
  const timer = setInterval(() => {
    const state = states().find((candidate) => candidate.target === target);
    if (state) seen.add(state.status.kind);
  }, 10);
  return () => {
    clearInterval(timer);
    return [...seen];
  };
}

export async function closeAll(): Promise<void> {
  await vscode.commands.executeCommand("workbench.action.closeAllEditors");
}
