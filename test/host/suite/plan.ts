import assert from "node:assert";
import { chmodSync, existsSync, readFileSync } from "node:fs";
import * as vscode from "vscode";
import { createPlan, rewritePlan } from "../../../src/host/planFile";
import { applyChange } from "../../../src/plan/change";
import { editPlan } from "../../../src/plan/edit";
import { parsePlan } from "../../../src/plan/parse";
import type { PlanChange } from "../../../src/protocol";
import { closeAll, heating, open, ready, scratch, until, write } from "./tools";

const TEXT = `// agreed in May
{
  "data": "flats.csv",
  "outcome": { "column": "kwh" },
  "exposure": { "column": "retrofit" }, // by block
  "margin": 150
}
`;
const by = (change: PlanChange) => (text: string) => {
  const parsed = parsePlan(text, "");
  return parsed.ok ? editPlan(text, applyChange(parsed.plan, change)) : null;
};
const MARGIN = by({ key: "margin", value: 200 });

export function planSuite(): void {
  describe("a plan file", () => {
    const ask = vscode.window.showSaveDialog;
    let place: ReturnType<typeof scratch>;
    let plan: string;
    let csv: string;
    beforeEach(() => {
      place = scratch();
      plan = place.path("flats.slantwise.json");
      csv = place.path("flats.csv");
      write(csv, heating(120, 300));
      write(plan, TEXT);
    });
    afterEach(async () => {
      vscode.window.showSaveDialog = ask;
      await vscode.commands.executeCommand("workbench.action.files.revert");
      await closeAll();
      place.remove();
    });
    const show = async () => {
      const document = await vscode.workspace.openTextDocument(plan);
      return { document, editor: await vscode.window.showTextDocument(document) };
    };

    it("that is not open is changed on disk, with its comments", async () => {
      const result = await rewritePlan(plan, MARGIN);
      assert.deepEqual(result, { ok: true, text: TEXT.replace("150", "200") });
      assert.equal(readFileSync(plan, "utf8"), TEXT.replace("150", "200"));
    });

    it("that is open is changed in its editor and saved, as one step to undo, and the cursor stays", async () => {
      const { document, editor } = await show();
      editor.selection = new vscode.Selection(3, 5, 3, 5);
      assert.equal((await rewritePlan(plan, MARGIN)).ok, true);
      assert.equal(document.isDirty, false);
      assert.equal(readFileSync(plan, "utf8"), TEXT.replace("150", "200"));
      assert.deepEqual([editor.selection.active.line, editor.selection.active.character], [3, 5]);
      await vscode.commands.executeCommand("undo");
      assert.equal(document.getText(), TEXT);
    });

    it("with unsaved changes keeps them and stays unsaved, which is said", async () => {
      const { document, editor } = await show();
      await editor.edit((edits) => edits.insert(new vscode.Position(0, 0), "// not done yet\n"));
      assert.deepEqual(await rewritePlan(plan, MARGIN), {
        ok: false,
        note: "The choice stands in flats.slantwise.json in the editor; save that file to keep it.",
      });
      assert.equal(document.getText(), "// not done yet\n" + TEXT.replace("150", "200"));
      assert.equal(readFileSync(plan, "utf8"), TEXT);
    });

    it("that is read-only, or broken, or gone is left as it is, and a sentence says so", async () => {
      chmodSync(plan, 0o444);
      const said = async () => {
        const result = await rewritePlan(plan, MARGIN);
        return result.ok ? "" : result.note;
      };
      assert.match(await said(), /^flats\.slantwise\.json is read-only/);
      assert.equal(readFileSync(plan, "utf8"), TEXT);
      chmodSync(plan, 0o644);
      write(plan, "{");
      assert.match(await said(), /has an error/);
      assert.match(
        ((await rewritePlan(place.path("none.slantwise.json"), MARGIN)) as { note: string }).note,
        /could not be written/,
      );
      assert.equal(existsSync(place.path("none.slantwise.json")), false);
    });

    it("in a panel follows what is done to it in an editor", async () => {
      await open(plan);
      await until(plan, ready(1));
      await rewritePlan(plan, by({ key: "reference", level: "full" }));
      const state = await until(plan, ({ question, status }) => status.kind === "ready" && question?.reference === "full");
      assert.deepEqual(state.keptIn, { plan: "flats.slantwise.json", note: null });
    });

    const question = { outcome: { column: "kwh" }, exposure: { column: "retrofit" }, covariates: [{ column: "floor_m2" }] };

    it("is made beside a CSV, and opens as the panel of that CSV", async () => {
      const other = place.path("more.flats.csv");
      write(other, heating(120, 500));
      const made = await createPlan(other, question, []);
      const file = place.path("more.flats.slantwise.json");
      assert.ok(made && "path" in made && made.path === file);
      assert.equal(
        readFileSync(file, "utf8"),
        '{\n  "data": "more.flats.csv",\n  "outcome": { "column": "kwh" },\n  "exposure": { "column": "retrofit" },\n  "covariates": [\n    { "column": "floor_m2" }\n  ]\n}\n',
      );
      await open(other);
      await until(file, ready(1));
    });

    it("never takes the place of one that is there: a person is asked for another name", async () => {
      let asked: vscode.SaveDialogOptions | undefined;
      const answer = (uri: vscode.Uri | undefined) => {
        vscode.window.showSaveDialog = (options) => {
          asked = options;
          return Promise.resolve(uri);
        };
      };
      answer(undefined);
      assert.equal(await createPlan(csv, question, []), null);
      assert.equal(readFileSync(plan, "utf8"), TEXT);
      assert.equal(asked?.defaultUri?.path, vscode.Uri.file(place.path("flats 2.slantwise.json")).path);
      answer(vscode.Uri.file(place.path("second.json")));
      const made = await createPlan(csv, question, []);
      assert.ok(made && "path" in made && made.path === place.path("second.slantwise.json"));
      assert.deepEqual(await createPlan(csv, question, []), {
        note: "second.slantwise.json exists already and was left as it is.",
      });
      answer(vscode.Uri.file(place.path("deep/inner.slantwise.json")));
      assert.match(((await createPlan(csv, question, [])) as { note: string }).note, /may not read flats\.csv/);
    });
  });
}
