import { randomBytes } from "node:crypto";
import * as vscode from "vscode";

/** Where the page's own files are; nothing else may be loaded. */
export function pageRoot(extension: vscode.Uri): vscode.Uri {
  return vscode.Uri.joinPath(extension, "dist");
}

/** The page: addresses and a nonce, no data. Data comes by message and is set as text. */
export function html(webview: vscode.Webview, extension: vscode.Uri): string {
  const nonce = randomBytes(16).toString("base64");
  const address = (name: string) => webview.asWebviewUri(vscode.Uri.joinPath(pageRoot(extension), name)).toString();
  const { cspSource } = webview;
  const policy =
    `default-src 'none'; img-src ${cspSource} data:; style-src ${cspSource}; ` +
    `font-src ${cspSource}; script-src 'nonce-${nonce}'`;
  return `<!DOCTYPE html>
<html lang="en">
<head>
<meta charset="utf-8">
<meta http-equiv="Content-Security-Policy" content="${policy}">
<meta name="viewport" content="width=device-width, initial-scale=1">
<link rel="stylesheet" href="${address("panel.css")}">
<title>Comparison</title>
</head>
<body data-status="reading">
<script nonce="${nonce}" src="${address("panel.js")}"></script>
</body>
</html>`;
}
