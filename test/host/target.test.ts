import { mkdtempSync, rmSync, writeFileSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { afterEach, beforeEach, describe, expect, test } from "vitest";
import { dataPath, isData, isPlan, targetOf } from "../../src/host/target";

let folder: string;
beforeEach(() => {
  folder = mkdtempSync(join(tmpdir(), "target-"));
});
afterEach(() => rmSync(folder, { recursive: true }));

const write = (name: string, value: unknown) => {
  writeFileSync(join(folder, name), typeof value === "string" ? value : JSON.stringify(value));
  return join(folder, name);
};
const plan = (data: string) => ({ data, outcome: { column: "a" }, exposure: { column: "b" } });

describe("what a panel is about", () => {
  test("files are known by their ending, in any case", () => {
    expect(["a.csv", "A.CSV", "a.tsv", "a.txt", "a.csv.gz"].map(isData)).toEqual([true, true, true, false, false]);
    expect(["a.slantwise.json", "A.Slantwise.JSON", "a.json"].map(isPlan)).toEqual([true, true, false]);
  });
  test("a CSV without a plan is its own target, and so is a plan", async () => {
    const csv = write("a.csv", "a,b\n");
    expect(await targetOf(csv)).toBe(csv);
    write("other.slantwise.json", plan("b.csv"));
    write("broken.slantwise.json", "{");
    expect(await targetOf(csv)).toBe(csv);
    expect(await targetOf(join(folder, "other.slantwise.json"))).toBe(join(folder, "other.slantwise.json"));
  });
  test("the plan of the same name comes first, then the first in the alphabet that is about the CSV", async () => {
    const csv = write("m.csv", "a,b\n");
    write("z.slantwise.json", plan("m.csv"));
    const second = write("k.slantwise.json", plan("./m.csv"));
    expect(await targetOf(csv)).toBe(second);
    const own = write("m.slantwise.json", plan("m.csv"));
    expect(await targetOf(csv)).toBe(own);
  });
  test("a plan's data lies in its own folder or in a workspace folder, nowhere else", () => {
    const at = (data: string, folders: string[] = []) => dataPath("/w/plans/p.slantwise.json", data, folders);
    expect(at("a.csv")).toBe("/w/plans/a.csv");
    expect(at("deep/a.csv")).toBe("/w/plans/deep/a.csv");
    expect(at("../a.csv")).toBeNull();
    expect(at("../a.csv", ["/w"])).toBe("/w/a.csv");
    expect(at("../../etc/a.csv", ["/w"])).toBeNull();
    expect(at("/etc/a.csv", ["/w"])).toBeNull();
    expect(at("..data/a.csv")).toBe("/w/plans/..data/a.csv");
    expect(at(".")).toBeNull();
  });
});
