import * as vscode from "vscode";
import type { Panels } from "./panels";
import { words } from "./words";

/** A copy that no button of the page asked for. */
const FROM_COMMAND = 0;

/** The copy commands of the palette: the current panel's comparison to the clipboard. */
export async function copyComparison(panels: Panels, as: "markdown" | "table"): Promise<void> {
  const panel = panels.current();
  if (!panel) {
    void vscode.window.showInformationMessage(words.noPanel);
    return;
  }
  vscode.window.setStatusBarMessage(await panel.copy(as, FROM_COMMAND), 4000);
}
