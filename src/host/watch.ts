import { realpathSync } from "node:fs";
import { basename, dirname } from "node:path";
import * as vscode from "vscode";

/** The net under the watcher: replaced folders, links and network drives give no event at all. */
const NET_MS = 2000;
/** A deleted file may be back at once, without an event that says so. */
const AFTER_DELETE_MS = [200, 1000, 3000];

/** Calls `poke` whenever a file may have changed. Works outside the workspace folders; never recursive. */
export function watchFile(path: string, poke: () => void): vscode.Disposable {
  const timers = new Set<NodeJS.Timeout>();
  const net = setInterval(poke, NET_MS);
  const gone = () => {
    poke();
    for (const after of AFTER_DELETE_MS) {
      const timer = setTimeout(() => {
        timers.delete(timer);
        poke();
      }, after);
      timers.add(timer);
    }
  };
  const watchers = [...new Set([path, realPath(path)])].map((target) => watchOne(target, poke, gone));
  return new vscode.Disposable(() => {
    clearInterval(net);
    for (const timer of timers) clearTimeout(timer);
    for (const watcher of watchers) watcher.dispose();
  });
}

function watchOne(path: string, changed: () => void, gone: () => void): vscode.Disposable {
  const name = basename(path);
  // a name that would be read as a pattern is matched by hand
  const glob = /[*?[\]{}!\\]/.test(name) ? "*" : name;
  const watcher = vscode.workspace.createFileSystemWatcher(new vscode.RelativePattern(vscode.Uri.file(dirname(path)), glob));
  const ours = (then: () => void) => (uri: vscode.Uri) => {
    if (glob === name || basename(uri.fsPath) === name) then();
  };
  watcher.onDidCreate(ours(changed));
  watcher.onDidChange(ours(changed));
  watcher.onDidDelete(ours(gone));
  return watcher;
}

function realPath(path: string): string {
  try {
    return realpathSync(path);
  } catch {
    return path;
  }
}
