import assert from "node:assert";
import { readFileSync } from "node:fs";
import * as vscode from "vscode";
import { api, closeAll, heating, open, ready, scratch, stateOf, until, write } from "./tools";

export function questionSuite(): void {
  describe("what a panel is about", () => {
    let place: ReturnType<typeof scratch>;
    beforeEach(() => {
      place = scratch();
    });
    afterEach(async () => {
      await closeAll();
      place.remove();
    });

    it("a bare CSV is compared at once under a guessed question", async () => {
      const file = place.path("flats.csv");
      write(file, heating(120, 300));
      await open(file);
      const state = await until(file, ready(1));
      assert.equal(state.question?.guessed, true);
      assert.equal(state.question?.plan.exposure.column, "retrofit");
      assert.equal(state.question?.plan.outcome.column, "kwh");
      assert.ok(state.presentation!.blocks[0].rows.length >= 2);
    });

    it("a CSV with a plan beside it opens the plan, once", async () => {
      const file = place.path("flats.csv");
      const plan = place.path("flats.slantwise.json");
      write(file, heating(120, 300));
      write(
        plan,
        JSON.stringify({ data: "flats.csv", outcome: { column: "kwh" }, exposure: { column: "retrofit", reference: "full" } }),
      );
      await open(file);
      const state = await until(plan, ready(1));
      assert.equal(state.question?.reference, "full");
      await open(plan);
      assert.equal((await api()).states().length, 1);
    });

    it("a changed plan is taken up, a broken one is named with its line, and mending it clears that", async () => {
      const file = place.path("flats.csv");
      const plan = place.path("flats.slantwise.json");
      const text = (reference: string) =>
        `{ "data": "flats.csv",\n  "outcome": { "column": "kwh" },\n  "exposure": { "column": "retrofit", "reference": "${reference}" } }\n`;
      write(file, heating(120, 300));
      write(plan, text("full"));
      await open(plan);
      await until(plan, ready(1));
      write(plan, text("none"));
      await until(plan, (state) => state.status.kind === "ready" && state.question?.reference === "none");
      write(plan, text("none").replace("kwh", "kwhh"));
      const broken = await until(plan, (state) => state.status.kind === "unusable");
      assert.ok(broken.status.kind === "unusable" && broken.status.inPlan);
      assert.equal(broken.status.line, 2);
      assert.match(broken.status.text, /kwhh/);
      assert.ok(broken.presentation, "the last result stays");
      write(plan, text("full"));
      await until(plan, (state) => state.status.kind === "ready" && state.question?.reference === "full");
    });

    it("a plan that points out of its folder is refused", async () => {
      const plan = place.path("far.slantwise.json");
      write(plan, JSON.stringify({ data: "../../etc/secret.csv", outcome: { column: "a" }, exposure: { column: "b" } }));
      await open(plan);
      const state = await until(plan, ({ status }) => status.kind === "unusable");
      assert.ok(state.status.kind === "unusable" && state.status.inPlan);
      assert.equal(state.presentation, null);
    });

    it("Copy as Markdown and as Table put the shown comparison on the clipboard", async () => {
      const file = place.path("flats.csv");
      write(file, heating(120, 300));
      await open(file);
      await until(file, ready(1));
      await vscode.commands.executeCommand("slantwise.copyMarkdown");
      const markdown = await vscode.env.clipboard.readText();
      assert.match(markdown, /flats\.csv/);
      assert.match(markdown, /\|/);
      await vscode.commands.executeCommand("slantwise.copyTable");
      const table = await vscode.env.clipboard.readText();
      const rows = (await stateOf(file))!.presentation!.blocks[0].rows.length;
      assert.ok(table.split("\n").filter((line) => line.includes("\t")).length >= rows + 1);
    });

    it("nothing is written beside the data", async () => {
      const file = place.path("flats.csv");
      const text = heating(60, 300);
      write(file, text);
      await open(file);
      await until(file, ready(1));
      assert.equal(readFileSync(file, "utf8"), text);
      const entries = await vscode.workspace.fs.readDirectory(vscode.Uri.file(place.path("")));
      assert.deepEqual(
        entries.map(([name]) => name),
        ["flats.csv"],
      );
    });

    it("closing the panel ends its watching", async () => {
      const file = place.path("flats.csv");
      write(file, heating(60, 300));
      await open(file);
      await until(file, ready(1));
      await closeAll();
      assert.equal(await stateOf(file), undefined);
    });
  });
}
