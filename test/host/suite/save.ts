import assert from "node:assert";
import { mkdirSync, readFileSync } from "node:fs";
import { basename, dirname } from "node:path";
import * as vscode from "vscode";
import { saveFigure } from "../../../src/host/saveFigure";
import { scratch } from "./tools";

const SVG = '<svg xmlns="http://www.w3.org/2000/svg"><text>−212 kWh, 温度</text></svg>\n';
const PNG = Buffer.from([0x89, 0x50, 0x4e, 0x47, 0x0d, 0x0a, 0x1a, 0x0a, 0, 255, 7]);

export function saveSuite(): void {
  describe("a figure of the panel", () => {
    const ask = vscode.window.showSaveDialog;
    let place: ReturnType<typeof scratch>;
    let asked: vscode.SaveDialogOptions | undefined;
    /** The dialog of an editor under test cannot be answered by a person. */
    const answer = (uri: vscode.Uri | undefined) => {
      vscode.window.showSaveDialog = (options) => {
        asked = options;
        return Promise.resolve(uri);
      };
    };
    beforeEach(() => {
      place = scratch();
      asked = undefined;
    });
    afterEach(() => {
      vscode.window.showSaveDialog = ask;
      place.remove();
    });

    it("is written where a person says, letter for letter and byte for byte", async () => {
      const file = place.path("difference.svg");
      answer(vscode.Uri.file(file));
      const figure = { as: "svg", name: "Difference in kwh, new − old: a/b", data: SVG } as const;
      assert.deepEqual(await saveFigure(figure, place.path("")), { ok: true, text: "Saved as difference.svg." });
      assert.equal(readFileSync(file, "utf8"), SVG);
      assert.equal(basename(asked!.defaultUri!.path), "Difference in kwh, new − old a b.svg");
      assert.equal(dirname(asked!.defaultUri!.path), vscode.Uri.file(place.path("")).path.replace(/\/$/, ""));
      assert.deepEqual(asked!.filters, { SVG: ["svg"] });
      const picture = place.path("difference.png");
      answer(vscode.Uri.file(picture));
      const sent = await saveFigure({ as: "png", name: "kwh", data: PNG.toString("base64") }, place.path(""));
      assert.equal(sent.ok, true);
      assert.deepEqual(readFileSync(picture), PNG);
    });

    it("is not written where the dialog is left, nor where it cannot be, which is said", async () => {
      answer(undefined);
      const figure = { as: "svg", name: "kwh", data: SVG } as const;
      assert.deepEqual(await saveFigure(figure, place.path("")), { ok: true, text: "" });
      const folder = place.path("folder.svg");
      mkdirSync(folder);
      answer(vscode.Uri.file(folder));
      assert.deepEqual(await saveFigure(figure, place.path("")), { ok: false, text: "folder.svg could not be written." });
    });
  });
}
