import {
  existsSync,
  linkSync,
  mkdirSync,
  mkdtempSync,
  readdirSync,
  readFileSync,
  rmSync,
  statSync,
  symlinkSync,
  truncateSync,
  writeFileSync,
} from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { afterEach, beforeEach, describe, expect, test } from "vitest";
import { dateOf } from "../../src/cli/date";
import { readInput } from "../../src/cli/input";
import { readBytes, SIZE_LIMIT } from "../../src/cli/read";
import { writeFile } from "../../src/cli/write";

let folder: string;
beforeEach(() => {
  folder = mkdtempSync(join(tmpdir(), "slantwise-cli-"));
});
afterEach(() => rmSync(folder, { recursive: true }));
const at = (name: string) => join(folder, name);
const put = (name: string, text: string) => {
  writeFileSync(at(name), text);
  return at(name);
};
const plan = (data: string) => JSON.stringify({ data, outcome: { column: "y" }, exposure: { column: "g" } });
const codeOf = (name: string) => {
  const read = readInput(at(name), undefined);
  return read.ok ? read.input.table.source.file : read.problem.code;
};

describe("reading", () => {
  test("gives the bytes, or why there are none", () => {
    expect(readBytes(put("a.csv", "x,y\n"), "a.csv")).toMatchObject({ ok: true });
    expect(readBytes(at("b.csv"), "b.csv")).toEqual({ ok: false, problem: { code: "file-missing", file: "b.csv" } });
    expect(readBytes(folder, "f")).toEqual({
      ok: false,
      problem: { code: "file-unreadable", detail: "it is a folder", file: "f" },
    });
    expect(readBytes(join(at("a.csv"), "b"), "b")).toMatchObject({ problem: { code: "file-missing" } });
  });
  test("refuses a file beyond the limit before reading it", () => {
    truncateSync(put("big.csv", ""), SIZE_LIMIT + 1);
    expect(readBytes(at("big.csv"), "big.csv")).toMatchObject({
      problem: { code: "too-large", bytes: SIZE_LIMIT + 1, limit: SIZE_LIMIT },
    });
  });
  test("follows a plan to its data, in the plan's own folder and not outside of it", () => {
    mkdirSync(at("plans"));
    put("plans/a.csv", "g,y\nu,1\nv,2\n");
    put("b.csv", "g,y\nu,1\nv,2\n");
    put("plans/p.slantwise.json", plan("a.csv"));
    put("plans/q.slantwise.json", plan("../b.csv"));
    put("plans/r.slantwise.json", plan("c.csv"));
    expect(codeOf("plans/p.slantwise.json")).toBe("a.csv");
    expect(codeOf("plans/q.slantwise.json")).toBe("outside-folder");
    expect(codeOf("plans/r.slantwise.json")).toBe("file-missing");
    expect(readInput(at("plans/q.slantwise.json"), undefined)).toMatchObject({
      problem: { line: 1, character: 9, path: "../b.csv" },
    });
  });
  test("does not follow a symbolic link out of the folder", () => {
    mkdirSync(at("plans"));
    put("b.csv", "g,y\nu,1\nv,2\n");
    put("plans/real.csv", "g,y\nu,1\nv,2\n");
    symlinkSync(at("b.csv"), at("plans/out.csv"));
    symlinkSync(at("plans/real.csv"), at("plans/in.csv"));
    put("plans/out.slantwise.json", plan("out.csv"));
    put("plans/in.slantwise.json", plan("in.csv"));
    expect(codeOf("plans/out.slantwise.json")).toBe("outside-folder");
    expect(codeOf("plans/in.slantwise.json")).toBe("in.csv");
  });
  test("takes marks of missing cells from the option, else from the plan", () => {
    put("a.csv", "g,y\nu,1\nv,n/k\nu,-99\n");
    put("p.slantwise.json", JSON.stringify({ ...JSON.parse(plan("a.csv")), missing: ["n/k"] }));
    const missing = (marks?: string[]) => {
      const read = readInput(at("p.slantwise.json"), marks);
      const column = read.ok ? read.input.table.columns[1] : undefined;
      return column && "values" in column
        ? [...column.values].map((value) => (Number.isNaN(value) ? "·" : value)).join(" ")
        : column?.kind;
    };
    expect(missing()).toBe("1 · -99");
    expect(missing(["n/k", "-99"])).toBe("1 · ·");
    expect(missing(["-99"])).toBe("category");
  });
});

describe("writing", () => {
  test("puts the whole text in place and leaves nothing beside it", () => {
    writeFile(at("out.md"), "one\n", []);
    writeFile(at("out.md"), "two\n", []);
    expect([readFileSync(at("out.md"), "utf8"), readdirSync(folder)]).toEqual(["two\n", ["out.md"]]);
  });
  test("never overwrites a file that was read, under whatever name", () => {
    const input = put("a.csv", "x\n");
    linkSync(input, at("hard.csv"));
    symlinkSync(input, at("soft.csv"));
    for (const name of ["a.csv", "./a.csv", "hard.csv", "soft.csv"])
      expect(() => writeFile(`${folder}/${name}`, "gone", [input]), name).toThrow("would overwrite the file that is being read");
    expect(readFileSync(input, "utf8")).toBe("x\n");
  });
  test("follows a link to the file it stands for, and keeps that file's permissions", () => {
    put("real.md", "old\n");
    symlinkSync(at("real.md"), at("link.md"));
    const { mode } = statSync(at("real.md"));
    writeFile(at("link.md"), "new\n", []);
    expect([readFileSync(at("real.md"), "utf8"), statSync(at("real.md")).mode]).toEqual(["new\n", mode]);
  });
  test("says why it could not, and leaves no draft", () => {
    expect(() => writeFile(folder, "x", [])).toThrow("is a folder; name a file in it.");
    expect(() => writeFile(at("no/such/out.md"), "x", [])).toThrow("could not be written: its folder does not exist.");
    expect(existsSync(at("no"))).toBe(false);
    put("a.csv", "x\n");
    expect(() => writeFile(join(at("a.csv"), "out.md"), "x", [])).toThrow("could not be written: its folder does not exist.");
    expect(readdirSync(folder)).toEqual(["a.csv"]);
  });
});

describe("the date of a write-up", () => {
  test("is the local day", () => {
    expect(dateOf(new Date(2026, 0, 5, 23, 59), undefined)).toBe("2026-01-05");
    expect(dateOf(new Date(2026, 11, 31, 0, 1), "")).toBe("2026-12-31");
  });
  test("is the UTC day of SOURCE_DATE_EPOCH where that is set, which must be whole seconds", () => {
    expect(dateOf(new Date(), "0")).toBe("1970-01-01");
    expect(dateOf(new Date(), "1709251199")).toBe("2024-02-29");
    for (const odd of ["today", "1.5", "-1", " 1", "99999999999999"])
      expect(() => dateOf(new Date(), odd), odd).toThrow("SOURCE_DATE_EPOCH");
  });
});
