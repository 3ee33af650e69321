import { spawn } from "node:child_process";
import { cpSync, existsSync, mkdirSync, mkdtempSync, readFileSync, rmSync, writeFileSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { afterAll, beforeAll, describe, expect, test } from "vitest";
import { csvOf } from "../plan/tables";
import { Program, root } from "./program";

let program: Program;
let folder: string;
beforeAll(() => {
  program = new Program();
  folder = mkdtempSync(join(tmpdir(), "slantwise-cli-"));
  cpSync(join(root, "samples"), join(folder, "samples"), { recursive: true });
});
afterAll(() => {
  program.remove();
  rmSync(folder, { recursive: true, force: true });
});

const run = (...args: string[]) => program.run(folder, args);
const put = (name: string, text: string) => writeFileSync(join(folder, name), text);
/** Output of a run that must succeed. */
const out = (...args: string[]) => {
  const ran = run(...args);
  expect([ran.code, ran.err]).toEqual([0, ""]);
  return ran.out;
};
/** The one sentence on stderr of a run that must be refused. */
const refused = (...args: string[]) => {
  const { code, out, err } = run(...args);
  expect([code, out, err.split("\n").length, err.endsWith("\n")]).toEqual([2, "", 2, true]);
  return err.trimEnd();
};

const SAMPLES = ["heating", "glazing", "seals", "valves"].map((name) => `samples/${name}.slantwise.json`);
const TWO_GROUPS = csvOf(40, {
  flat_id: (i) => `F${i}`,
  retrofit: (i) => ["none", "full"][i % 2],
  floor_m2: (i) => 50 + ((i * 17) % 40),
  kwh: (i) => 3000 + ((i * 7919) % 997) - (i % 2) * 200,
});

describe("slantwise compare", () => {
  test("writes every sample in every form, and nothing that is no number or no value", () => {
    for (const sample of SAMPLES)
      for (const format of ["text", "markdown", "json", "csv"]) {
        const written = out("compare", sample, "--as", format);
        expect(written.endsWith("\n"), sample).toBe(true);
        expect(written, `${sample} as ${format}`).not.toMatch(/NaN|Infinity|undefined|\[object/);
        if (format !== "json") expect(written, `${sample} as ${format}`).not.toMatch(/\bnull\b/);
      }
  });
  test("writes text where nothing else is asked for", () => {
    expect(out("compare", SAMPLES[0])).toBe(out("compare", SAMPLES[0], "--as", "text"));
  });
  test("as JSON has a format, the data's fingerprint, and the base set first", () => {
    const json = JSON.parse(out("compare", SAMPLES[1], "--as", "json"));
    expect(json.format).toBe("slantwise.comparison/1");
    expect(json.data).toMatchObject({ file: "glazing.csv", sha256: expect.stringMatching(/^[0-9a-f]{64}$/) });
    expect(json.sets.map((set: { adjustedFor: string[] }) => set.adjustedFor)).toEqual([
      [],
      ["wind_ms"],
      ["floor_m2"],
      ["wind_ms", "floor_m2"],
    ]);
  });
  test("a plan and the same question in options are the same comparison", () => {
    const options = [
      "--outcome",
      "kwh",
      "--exposure",
      "glazing",
      "--reference",
      "old",
      "--covariates",
      "wind_ms,floor_m2",
      "--margin",
      "120",
    ];
    expect(JSON.parse(out("compare", "samples/glazing.csv", ...options, "--as", "json"))).toEqual(
      JSON.parse(out("compare", SAMPLES[1], "--as", "json")),
    );
  });
  test("a bare CSV is compared at once, and the answer says that the columns are guessed", () => {
    put("flats.csv", TWO_GROUPS);
    expect(out("compare", "flats.csv")).toContain("columns guessed: check them");
    const { code, out: half, err } = run("compare", "flats.csv", "--outcome", "kwh");
    expect([code, half.includes("guessed"), err]).toEqual([
      0,
      false,
      "Guessed: exposure retrofit; covariates floor_m2. Name them to be sure.\n",
    ]);
  });
  test("a column name may hold a comma, quotes, spaces and marks of Markdown", () => {
    put("odd.csv", TWO_GROUPS.replace("floor_m2", '"area, ""m2"" | `x`"'));
    const json = JSON.parse(
      out(
        "compare",
        "odd.csv",
        "--exposure",
        "retrofit",
        "--outcome",
        "kwh",
        "--covariates",
        'area\\, "m2" | `x`',
        "--as",
        "json",
      ),
    );
    expect(json.sets.at(-1).adjustedFor).toEqual(['area, "m2" | `x`']);
  });
  test("reads from another folder: a plan's own, or the current one", () => {
    mkdirSync(join(folder, "plans"), { recursive: true });
    put("flats.csv", TWO_GROUPS);
    put(
      "plans/p.slantwise.json",
      JSON.stringify({ data: "../flats.csv", outcome: { column: "kwh" }, exposure: { column: "retrofit" } }),
    );
    expect(out("compare", "plans/p.slantwise.json")).toContain("flats.csv");
    const inside = program.run(join(folder, "plans"), ["compare", "p.slantwise.json"]);
    expect([inside.code, inside.err.startsWith("p.slantwise.json, line 1: ")]).toEqual([2, true]);
  });
  test("with --to writes the same bytes into a file, and nothing to the terminal", () => {
    put("flats.csv", TWO_GROUPS);
    for (const format of ["text", "json", "csv"]) {
      expect(out("compare", "flats.csv", "--as", format, "--to", "answer.txt")).toBe("");
      expect(readFileSync(join(folder, "answer.txt"), "utf8")).toBe(out("compare", "flats.csv", "--as", format));
    }
    expect(refused("compare", "flats.csv", "--to", "./flats.csv")).toContain("would overwrite the file that is being read");
    expect(readFileSync(join(folder, "flats.csv"), "utf8")).toBe(TWO_GROUPS);
  });
  test("is not overwritten into the plan either", () => {
    const before = readFileSync(join(folder, SAMPLES[1]), "utf8");
    expect(refused("compare", SAMPLES[1], "--to", SAMPLES[1])).toContain("would overwrite");
    expect(readFileSync(join(folder, SAMPLES[1]), "utf8")).toBe(before);
    expect(refused("compare", SAMPLES[1], "--to", "samples/glazing.csv")).toContain("would overwrite");
  });
  test("dates Markdown by SOURCE_DATE_EPOCH, so that a report can be made again byte for byte", () => {
    const made = () => program.run(folder, ["compare", SAMPLES[0], "--as", "markdown"], { SOURCE_DATE_EPOCH: "1700000000" });
    expect(made().out).toContain("2023-11-14");
    expect(made()).toEqual(made());
  });
  test("ends quietly when its reader has seen enough", async () => {
    const child = spawn(process.execPath, [program.script, "compare", SAMPLES[3], "--as", "json"], { cwd: folder });
    let err = "";
    child.stderr.on("data", (data: Buffer) => (err += data.toString()));
    child.stdout.destroy();
    const code = await new Promise((done) => child.on("close", done));
    expect([code, err]).toEqual([0, ""]);
  });
});

describe("help and version", () => {
  test("go to stdout with exit code 0", () => {
    const { version } = JSON.parse(readFileSync(join(root, "package.json"), "utf8")) as { version: string };
    expect(out("--version")).toBe(`${version}\n`);
    expect(out("--help")).toContain("slantwise compare FILE.csv|PLAN.slantwise.json [options]");
    expect(out("compare", "--help")).toContain("--covariates A,B");
    expect(out("compare", "nowhere.csv", "-h")).toBe(out("compare", "--help"));
  });
});

describe("a mistake is one sentence on stderr and exit code 2", () => {
  const question = { data: "flats.csv", outcome: { column: "kwh" }, exposure: { column: "retrofit" } };
  const plan = (changes: object) => put("p.slantwise.json", JSON.stringify({ ...question, ...changes }, null, 2));

  test("in the call", () => {
    expect(refused()).toContain("slantwise compare FILE.csv");
    expect(refused("flats.csv")).toContain("slantwise compare flats.csv");
    for (const word of ["verify", "Check", "toString"])
      expect(refused(word, "notes.md")).toContain(`There is no command "${word}"`);
    expect(refused("compare")).toContain("Name a .csv or a .slantwise.json");
    expect(refused("compare", "a.csv", "b.csv")).toContain("One file is compared at a time; these are 2: a.csv, b.csv.");
    expect(refused("compare", "plan.json")).toContain("A plan's name ends in .slantwise.json");
  });
  test("in the files", () => {
    expect(refused("compare", "nowhere/a.csv")).toMatch(/^nowhere\/a\.csv: .*not there/);
    expect(refused("compare", "nowhere.slantwise.json")).toMatch(/^nowhere\.slantwise\.json: /);
    expect(refused("compare", "samples")).toMatch(/^samples: .*it is a folder/);
    put("empty.csv", "");
    expect(refused("compare", "empty.csv")).toMatch(/^empty\.csv: /);
    put("quote.csv", 'a,b\n1,"2\n');
    expect(refused("compare", "./quote.csv")).toMatch(/^\.\/quote\.csv, line 2: /);
    put("words.csv", "a,b\nx,y\nz,w\nq,r\n");
    expect(refused("compare", "words.csv")).toMatch(/^words\.csv: /);
  });
  test("in the columns, with the nearest one", () => {
    put("flats.csv", TWO_GROUPS);
    expect(refused("compare", "flats.csv", "--outcome", "kwhh")).toMatch(/^flats\.csv: .*kwhh.*kwh/);
    expect(refused("compare", "flats.csv", "--reference", "nil")).toMatch(/^flats\.csv: .*nil.*full/);
    expect(refused("compare", "flats.csv", "--exposure", "kwh", "--outcome", "kwh")).toMatch(/^flats\.csv: .*kwh/);
    expect(refused("compare", "flats.csv", "--variance", "CR2")).toMatch(/CR2.*cluster/);
  });
  test("in the plan, with its line", () => {
    put("flats.csv", TWO_GROUPS);
    plan({ marginn: 3 });
    expect(refused("compare", "p.slantwise.json")).toMatch(/^p\.slantwise\.json, line 9: .*marginn.*margin/);
    plan({ covariates: [{ column: "floor" }] });
    expect(refused("compare", "p.slantwise.json")).toMatch(/^p\.slantwise\.json, line 11: .*floor.*floor_m2/);
    plan({ data: "../flats.csv" });
    expect(refused("compare", "p.slantwise.json")).toMatch(/^p\.slantwise\.json, line 2: .*\.\.\/flats\.csv/);
    plan({ data: "gone.csv" });
    expect(refused("compare", "p.slantwise.json")).toMatch(/^gone\.csv: /);
    put("p.slantwise.json", "{ data: 1 }");
    expect(refused("compare", "p.slantwise.json")).toMatch(/^p\.slantwise\.json, line 1: /);
  });
  test("in the place of the answer", () => {
    put("flats.csv", TWO_GROUPS);
    expect(refused("compare", "flats.csv", "--to", "no/such/file.md")).toBe(
      "no/such/file.md could not be written: its folder does not exist.",
    );
    expect(refused("compare", "flats.csv", "--to", "samples")).toContain("is a folder");
    expect(existsSync(join(folder, "no"))).toBe(false);
  });
});
