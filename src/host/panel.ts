import { basename, dirname } from "node:path";
import * as vscode from "vscode";
import type { PageMessage, PanelState } from "../protocol";
import { Channel } from "./channel";
import { html, pageRoot } from "./html";
import type { Memory } from "./memory";
import { openLine } from "./openLine";
import { saveFigure } from "./saveFigure";
import { Subject } from "./subject";
import { watchFile } from "./watch";
import { words } from "./words";
import type { Compute } from "./worker/client";

/** A plan's panel goes by the plan's name. */
const PLAN_ENDING = /\.slantwise\.json$/i;

export const VIEW_TYPE = "slantwise.panel";

export interface House {
  readonly extension: vscode.Uri;
  readonly compute: Compute;
  readonly memory: Memory;
  readonly log: vscode.LogOutputChannel;
}

/** One webview panel and what it is about. The truth is in the subject; the page renders one state message. */
export class ComparisonPanel {
  private readonly subject: Subject;
  private readonly channel: Channel;
  private posting = false;
  private readonly targetPath: string;

  constructor(
    house: House,
    target: vscode.Uri,
    private readonly panel: vscode.WebviewPanel,
    closed: () => void,
  ) {
    const { extension, compute, memory, log } = house;
    const key = target.toString();
    this.targetPath = target.fsPath;
    const { webview } = panel;
    webview.options = { enableScripts: true, localResourceRoots: [pageRoot(extension)] };
    const icon = (theme: string) => vscode.Uri.joinPath(extension, "dist", "icons", `panel-${theme}.svg`);
    panel.iconPath = { light: icon("light"), dark: icon("dark") };
    panel.title = words.panelTitle(basename(this.targetPath).replace(PLAN_ENDING, ""));
    memory.opened(key, panel.title);

    this.channel = new Channel(webview, (text) => log.warn(text));
    this.subject = new Subject({
      target: key,
      path: this.targetPath,
      compute,
      folders: () => (vscode.workspace.workspaceFolders ?? []).map((folder) => folder.uri.fsPath),
      watch: watchFile,
      recall: (planText) => memory.chosen(key, planText),
      remember: (chosen, planText) => memory.remember(key, chosen, planText),
      changed: () => this.changed(),
      log: (text) => log.info(text),
    });
    const heard = this.channel.listen((message) => void this.handle(message));
    const shown = panel.onDidChangeViewState(() => {
      if (panel.visible) this.post();
    });
    panel.onDidDispose(() => {
      heard.dispose();
      shown.dispose();
      this.subject.dispose();
      memory.closed(key);
      closed();
    });
    webview.html = html(webview, extension);
  }

  get active(): boolean {
    return this.panel.active;
  }

  get viewColumn(): vscode.ViewColumn | undefined {
    return this.panel.viewColumn;
  }

  state(): PanelState {
    return this.subject.state();
  }

  reveal(): void {
    this.panel.reveal(undefined, true);
  }

  /** Copies what is shown; the panel says so, and so does the answer. */
  async copy(as: "markdown" | "table", id: number): Promise<string> {
    const text = (await this.subject.session?.write(as, today())) ?? null;
    if (text !== null) await vscode.env.clipboard.writeText(text);
    const said = text === null ? words.nothingToCopy : words.copied[as];
    this.channel.post({ type: "copied", id, ok: text !== null, text: said });
    return said;
  }

  private async handle(message: PageMessage): Promise<void> {
    switch (message.type) {
      case "ready":
        return this.post();
      case "choose":
        return this.subject.choose(message.change);
      case "filter":
        return this.subject.session?.setFilter(message.filter);
      case "copy":
        await this.copy(message.as, message.id);
        return;
      case "openLine":
        return openLine(message.inPlan ? this.targetPath : this.subject.csv, message.line);
      case "readAgain":
        return this.subject.readAgain();
      case "slopes":
        return this.subject.showSlopes(message.choice);
      case "saveFigure": {
        const beside = dirname(this.subject.csv ?? this.targetPath);
        this.channel.post({ type: "saved", id: message.id, ...(await saveFigure(message.figure, beside)) });
      }
    }
  }

  /** Several changes of one turn of the loop make one message. */
  private changed(): void {
    if (this.posting) return;
    this.posting = true;
    queueMicrotask(() => {
      this.posting = false;
      this.post();
    });
  }

  private post(): void {
    if (this.panel.visible) this.channel.post({ type: "state", state: this.subject.state() });
  }
}

/** The local date as in the write-up, YYYY-MM-DD. */
function today(): string {
  const now = new Date();
  const two = (value: number) => String(value).padStart(2, "0");
  return `${now.getFullYear()}-${two(now.getMonth() + 1)}-${two(now.getDate())}`;
}
