import assert from "node:assert";
import * as vscode from "vscode";
import { api, closeAll, EXTENSION, scratch, wait, write } from "./tools";

export function manifestSuite(): void {
  describe("the extension in its host", () => {
    it("activates and registers every command it contributes", async () => {
      await api();
      const registered = await vscode.commands.getCommands(true);
      const { contributes } = vscode.extensions.getExtension(EXTENSION)!.packageJSON as {
        contributes: { commands: { command: string; title: string; category: string }[] };
      };
      assert.deepEqual(
        contributes.commands.map(({ command }) => command).filter((command) => !registered.includes(command)),
        [],
      );
      assert.deepEqual([...new Set(contributes.commands.map(({ category }) => category))], ["Slantwise"]);
    });

    it("checks plan files against its schema while they are typed", async () => {
      const place = scratch();
      write(place.path("p.slantwise.json"), '{ "data": "a.csv", // a remark\n  "outcom": 3 }\n');
      const document = await vscode.workspace.openTextDocument(place.path("p.slantwise.json"));
      await vscode.window.showTextDocument(document);
      assert.equal(document.languageId, "jsonc");
      const end = Date.now() + 20_000;
      while (!vscode.languages.getDiagnostics(document.uri).some(({ message }) => /outcom/.test(message))) {
        assert.ok(Date.now() < end, "the misspelt key is never marked");
        await wait(50);
      }
      await closeAll();
      place.remove();
    });

    it("gives copy commands nothing to do, and no error, without a panel", async () => {
      await vscode.env.clipboard.writeText("untouched");
      await vscode.commands.executeCommand("slantwise.copyMarkdown");
      assert.equal(await vscode.env.clipboard.readText(), "untouched");
    });
  });
}
