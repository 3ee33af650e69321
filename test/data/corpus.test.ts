import { readdirSync, readFileSync } from "node:fs";
import { describe, expect, it } from "vitest";
import { readGeneral, readTable } from "../../src/data/read";
import { CORPUS } from "./corpus";
import { shown, tableOf } from "./shown";

const folder = new URL("corpus/", import.meta.url);
const files = readdirSync(folder).filter((file) => file.endsWith(".csv"));
const bytesOf = (file: string) => readFileSync(new URL(file, folder));

describe("the corpus", () => {
  it("has an expectation for every file and a file for every expectation", () => {
    expect(files.sort()).toEqual(Object.keys(CORPUS).sort());
  });
  it.each(files)("%s is read as stated, by either reader", (file) => {
    const expected = CORPUS[file];
    const read = readTable(bytesOf(file), { file });
    if ("problem" in expected) expect(shown(read)).toEqual(expected);
    else {
      const rows = Object.values(expected.columns)[0].length - 1;
      expect(shown(read)).toEqual({ lines: Array.from({ length: rows }, (_, i) => i + 2), findings: [], ...expected });
      expect(tableOf(read).columns.map((c) => c.name)).toEqual(Object.keys(expected.columns));
    }
    expect(readGeneral(bytesOf(file), { file })).toEqual(read);
  });
  it("lists levels in natural order and text in order of appearance", () => {
    const levels = (file: string, c: number) => {
      const column = tableOf(readTable(bytesOf(file), { file })).columns[c];
      return "levels" in column ? column.levels : null;
    };
    expect(levels("natural.csv", 1)).toEqual([
      ...["9th", "10th", "a", "b", "b1.9", "b1.10", "B9", "b09", "b9", "b10", "z", "\u00c4", "\uffee", "\u{1f600}"],
    ]);
    expect(levels("many-levels.csv", 1)).toEqual(Array.from({ length: 31 }, (_, i) => `n${i}`));
    expect(levels("text.csv", 1)?.slice(0, 3)).toEqual(["n0", "n7", "n14"]);
  });
  it("says when every row was set aside", () => {
    const read = readTable(bytesOf("all-long.csv"), { file: "all-long.csv" });
    expect(read).toMatchObject({ ok: false, problem: { code: "no-data-rows", setAside: 2, file: "all-long.csv" } });
  });
});
