import { basename, dirname } from "node:path";
import * as vscode from "vscode";
import type { PageMessage, PanelState } from "../protocol";
import { Channel } from "./channel";
import { html, pageRoot } from "./html";
import type { Memory } from "./memory";
import { openLine } from "./openLine";
import { createPlan, rewritePlan } from "./planFile";
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

export interface PanelEvents {
  readonly closed: () => void;
  /** It is about another file now. */
  readonly moved: (key: string) => void;
}

/** One webview panel and what it is about. The truth is in the subject; the page renders one state message. */
export class ComparisonPanel {
  private readonly subject: Subject;
  private readonly channel: Channel;
  private readonly memory: Memory;
  private posting = false;
  private saving = false;
  private key: string;
  private targetPath: string;

  constructor(
    house: House,
    target: vscode.Uri,
    private readonly panel: vscode.WebviewPanel,
    private readonly events: PanelEvents,
  ) {
    const { extension, compute, memory, log } = house;
    this.memory = memory;
    this.key = target.toString();
    this.targetPath = target.fsPath;
    const { webview } = panel;
    webview.options = { enableScripts: true, localResourceRoots: [pageRoot(extension)] };
    const icon = (theme: string) => vscode.Uri.joinPath(extension, "dist", "icons", `panel-${theme}.svg`);
    panel.iconPath = { light: icon("light"), dark: icon("dark") };
    this.entitle();

    this.channel = new Channel(webview, (text) => log.warn(text));
    this.subject = new Subject({
      target: this.key,
      path: this.targetPath,
      compute,
      folders,
      watch: watchFile,
      recall: (planText) => memory.chosen(this.key, planText),
      remember: (chosen, planText) => memory.remember(this.key, chosen, planText),
      rewrite: rewritePlan,
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
      memory.closed(this.key);
      events.closed();
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

  close(): void {
    this.panel.dispose();
  }

  private entitle(): void {
    this.panel.title = words.panelTitle(basename(this.targetPath).replace(PLAN_ENDING, ""));
    this.memory.opened(this.key, this.panel.title);
  }

  /** The question of a bare CSV becomes a plan file, which the panel is about from then on. */
  private async savePlan(): Promise<void> {
    const { csv } = this.subject;
    const { question, keptIn } = this.subject.state();
    if (csv === null || !question || keptIn.plan !== null || this.saving) return;
    this.saving = true;
    const saved = await createPlan(csv, question.plan, folders());
    this.saving = false;
    if (saved === null) return;
    if ("note" in saved) return this.subject.say(saved.note);
    this.memory.closed(this.key);
    const target = vscode.Uri.file(saved.path);
    this.events.moved(target.toString());
    this.key = target.toString();
    this.targetPath = saved.path;
    this.entitle();
    this.subject.adopt(this.key, saved.path, saved.text);
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
      case "savePlan":
        return this.savePlan();
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

const folders = () => (vscode.workspace.workspaceFolders ?? []).map((folder) => folder.uri.fsPath);

/** The local date as in the write-up, YYYY-MM-DD. */
function today(): string {
  const now = new Date();
  const two = (value: number) => String(value).padStart(2, "0");
  return `${now.getFullYear()}-${two(now.getMonth() + 1)}-${two(now.getDate())}`;
}
