import * as vscode from "vscode";
import { copyComparison } from "./host/copy";
import { Memory } from "./host/memory";
import { openComparison } from "./host/open";
import { VIEW_TYPE } from "./host/panel";
import { Panels } from "./host/panels";
import { words } from "./host/words";
import { WorkerClient } from "./host/worker/client";
import type { PanelState } from "./protocol";
import { sayProblem } from "./report/wording/problem";

/** What other extensions and the in-host tests may ask. */
export interface Api {
  /** What each open panel shows, in the order they were opened. */
  readonly states: () => readonly PanelState[];
}

/** Wires commands, panels and the worker thread; nothing is computed or read before a panel asks. */
export function activate(context: vscode.ExtensionContext): Api {
  const log = vscode.window.createOutputChannel("Slantwise", { log: true });
  const lost = (file: string) => sayProblem({ code: "file-unreadable", file, detail: words.threadLost });
  const compute = new WorkerClient(context.asAbsolutePath("dist/worker.js"), lost, (text) => log.warn(text));
  const panels = new Panels({ extension: context.extensionUri, compute, memory: new Memory(context.workspaceState), log });
  context.subscriptions.push(
    log,
    compute,
    vscode.commands.registerCommand("slantwise.open", (uri?: unknown, uris?: unknown) => openComparison(panels, uri, uris)),
    vscode.commands.registerCommand("slantwise.copyMarkdown", () => copyComparison(panels, "markdown")),
    vscode.commands.registerCommand("slantwise.copyTable", () => copyComparison(panels, "table")),
    vscode.window.registerWebviewPanelSerializer(VIEW_TYPE, panels),
  );
  return { states: () => panels.states() };
}
