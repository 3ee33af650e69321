import * as vscode from "vscode";
import type { PanelState } from "../protocol";
import { ComparisonPanel, VIEW_TYPE } from "./panel";
import type { House } from "./panel";
import { pageRoot } from "./html";
import { targetOf } from "./target";
import { words } from "./words";

/** Set while at least one panel is open; menus and the palette ask for it. */
const OPEN_KEY = "slantwise.panelOpen";

/** All panels, one per plan or per CSV without one. */
export class Panels implements vscode.WebviewPanelSerializer {
  private readonly panels = new Map<string, ComparisonPanel>();
  private latest: string | null = null;

  constructor(private readonly house: House) {}

  /** Opens the comparison of a CSV or plan beside the editor, or shows the one that is open. */
  async open(file: vscode.Uri): Promise<void> {
    const target = vscode.Uri.file(await targetOf(file.fsPath));
    const open = this.panels.get(target.toString());
    if (open) {
      this.latest = target.toString();
      open.reveal();
      return;
    }
    const { extension } = this.house;
    // a further comparison lies over the others, instead of splitting the window once more
    const place = { viewColumn: this.current()?.viewColumn ?? vscode.ViewColumn.Beside, preserveFocus: true };
    const options = { enableScripts: true, enableFindWidget: true, localResourceRoots: [pageRoot(extension)] };
    this.adopt(target, vscode.window.createWebviewPanel(VIEW_TYPE, words.panelTitle(""), place, options));
  }

  /** A panel of an earlier window: its page kept the target, and the workspace knows it by its title. */
  deserializeWebviewPanel(panel: vscode.WebviewPanel, state: unknown): Promise<void> {
    const kept = (state as { target?: unknown } | null)?.target;
    const target = typeof kept === "string" ? kept : this.house.memory.byTitle(panel.title);
    if (target === null || this.panels.has(target)) panel.dispose();
    else this.adopt(vscode.Uri.parse(target), panel);
    return Promise.resolve();
  }

  states(): readonly PanelState[] {
    return [...this.panels.values()].map((panel) => panel.state());
  }

  /** The panel a command means: the active one, else the one opened or used last. */
  current(): ComparisonPanel | null {
    const active = [...this.panels.values()].find((panel) => panel.active);
    return active ?? (this.latest === null ? null : (this.panels.get(this.latest) ?? null));
  }

  private adopt(target: vscode.Uri, panel: vscode.WebviewPanel): void {
    let key = target.toString();
    const opened: ComparisonPanel = new ComparisonPanel(this.house, target, panel, {
      closed: () => {
        if (this.panels.get(key) === opened) this.panels.delete(key);
        if (this.latest === key) this.latest = [...this.panels.keys()].at(-1) ?? null;
        this.tell();
      },
      moved: (to) => {
        // one panel a plan: one whose file was written over gives way
        this.panels.get(to)?.close();
        this.panels.delete(key);
        if (this.latest === key) this.latest = to;
        key = to;
        this.panels.set(key, opened);
      },
    });
    this.panels.set(key, opened);
    panel.onDidChangeViewState(() => {
      if (panel.active) this.latest = key;
    });
    this.latest = key;
    this.tell();
  }

  private tell(): void {
    void vscode.commands.executeCommand("setContext", OPEN_KEY, this.panels.size > 0);
  }
}
