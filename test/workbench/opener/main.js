// Opens the file named in the environment, once, when `npm start` brought this window up.
const vscode = require("vscode");

exports.activate = async () => {
  const file = process.env.SLANTWISE_SAMPLE;
  if (!file) return;
  const uri = vscode.Uri.file(file);
  await vscode.window.showTextDocument(vscode.Uri.joinPath(uri, "../clean.mjs"), { viewColumn: vscode.ViewColumn.One });
  await vscode.commands.executeCommand("slantwise.open", uri);
};
