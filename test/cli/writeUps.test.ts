import {
  chmodSync,
  cpSync,
  mkdirSync,
  mkdtempSync,
  readdirSync,
  readFileSync,
  rmSync,
  statSync,
  symlinkSync,
  writeFileSync,
} from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { afterAll, afterEach, beforeAll, beforeEach, describe, expect, test } from "vitest";
import { Program, root } from "./program";

let program: Program;
let folder: string;
beforeAll(() => {
  program = new Program();
});
afterAll(() => program.remove());
beforeEach(() => {
  folder = mkdtempSync(join(tmpdir(), "slantwise-writeups-"));
  for (const name of ["heating.csv", "heating.slantwise.json", "glazing.csv", "glazing.slantwise.json"])
    cpSync(join(root, "samples", name), join(folder, name));
});
afterEach(() => rmSync(folder, { recursive: true }));

const DAY = { SOURCE_DATE_EPOCH: "1769817600" }; // 2026-01-31, from date -u -d 2026-01-31 +%s
const run = (...args: string[]) => program.run(folder, args, DAY);
const at = (name: string) => join(folder, name);
const put = (name: string, text: string) => writeFileSync(at(name), text);
const textOf = (name: string) => readFileSync(at(name), "utf8");
/** A new block, from a run that must succeed. */
const block = (...args: string[]): string => {
  const { code, out, err } = run("block", ...args);
  expect([code, err]).toEqual([0, ""]);
  return out;
};
const value = (pairs: string, text = "", plan = "heating.slantwise.json") =>
  `<!-- slantwise:value plan=${plan} ${pairs} -->${text}<!-- /slantwise:value -->`;
/** The cleaning script loses fifty flats. */
const loseRows = () => {
  const [head, ...rows] = textOf("heating.csv").split("\n");
  put("heating.csv", [head, ...rows.slice(50)].join("\n"));
};

describe("a report held to its data", () => {
  test("is fresh, stale when the CSV changes, and fresh again once refreshed: 0, 1, 0", () => {
    put("report.md", `# Heat\n\n${block("heating.slantwise.json")}\nThe difference is ${value("of=estimate")} kWh.\n`);
    expect(run("refresh", "report.md").code).toBe(0);
    expect(run("check", "report.md")).toEqual({
      code: 0,
      out: expect.stringMatching(/^report\.md:3: fresh\nreport\.md:\d+: fresh\n$/),
      err: "",
    });
    loseRows();
    const stale = run("check", "report.md");
    expect([stale.code, stale.err]).toEqual([1, ""]);
    expect(stale.out).toMatch(
      /^report\.md:3: stale: estimate was −\d+, is −\d+; \d\d flats fewer\nreport\.md:\d+: stale: was −\d+, is −\d+\n$/,
    );
    expect(run("refresh", "report.md")).toEqual({ ...stale, code: 0, out: stale.out.replaceAll(": stale:", ": refreshed:") });
    expect(run("check", "report.md").code).toBe(0);
    expect(textOf("report.md")).toMatch(
      /^# Heat\n\n<!-- [\s\S]*The difference is <!-- .* -->−\d+<!-- \/slantwise:value --> kWh\.\n$/,
    );
  });
  test("is unchanged where other bytes say the same", () => {
    put("report.md", block("heating.slantwise.json"));
    put(
      "heating.csv",
      textOf("heating.csv").replace(/\n(.*)\n$/, (_, last: string) => `\n${last.replaceAll(",", " ,")}\n`),
    );
    expect(run("check", "report.md")).toMatchObject({ code: 0, out: "report.md:1: checked again, unchanged\n" });
    expect(run("refresh", "report.md").code).toBe(0);
    expect(run("check", "report.md")).toMatchObject({ code: 0, out: "report.md:1: fresh\n" });
  });
  test("keeps line ends, byte-order mark and permissions, and leaves nothing beside it", () => {
    const text = `\uFEFFBefore\r\n\r\n${block("heating.slantwise.json").replaceAll("\n", "\r\n")}\r\nAfter`;
    put("report.qmd", text);
    chmodSync(at("report.qmd"), 0o640);
    loseRows();
    const before = readdirSync(folder);
    expect(run("refresh", "report.qmd").code).toBe(0);
    const now = textOf("report.qmd");
    expect(now).not.toBe(text);
    expect(now).toMatch(/^\uFEFFBefore\r\n\r\n<!--[^]*-->\r\n\r\nAfter$/);
    expect(now.replaceAll("\r\n", "")).not.toMatch(/[\r\n]/);
    expect([statSync(at("report.qmd")).mode & 0o777, readdirSync(folder)]).toEqual([0o640, before]);
  });
  test("is not written where nothing is to be said anew", () => {
    put("report.Rmd", `${block("heating.slantwise.json")}\n\`\`\`{r}\n1\n\`\`\`\n`);
    const { mtimeMs, ino } = statSync(at("report.Rmd"));
    expect(run("refresh", "report.Rmd").code).toBe(0);
    expect([statSync(at("report.Rmd")).mtimeMs, statSync(at("report.Rmd")).ino]).toEqual([mtimeMs, ino]);
  });
});

describe("a notebook", () => {
  const notebook = (...markdown: string[]) => {
    const source = (text: string) => text.match(/[^\n]*\n|[^\n]+$/g) ?? [];
    const cells = markdown.map((text) => ({ cell_type: "markdown", metadata: {}, source: source(text) }));
    const code = { cell_type: "code", execution_count: 1, metadata: {}, outputs: [], source: [value("of=rows", "1")] };
    return `${JSON.stringify({ cells: [code, ...cells], metadata: {}, nbformat: 4, nbformat_minor: 5 }, null, 1)}\n`;
  };
  test("is held to its data in its Markdown cells", () => {
    const text = block("heating.slantwise.json");
    put("report.ipynb", notebook("# Heat\n", text));
    expect(run("check", "report.ipynb")).toMatchObject({ code: 0, out: "report.ipynb, cell 3:1: fresh\n" });
    loseRows();
    expect(run("check", "report.ipynb").code).toBe(1);
    expect(run("refresh", "report.ipynb").code).toBe(0);
    expect(textOf("report.ipynb")).toBe(notebook("# Heat\n", block("heating.slantwise.json")));
    expect(run("check", "report.ipynb").code).toBe(0);
    put("old.ipynb", "{}");
    expect(run("check", "old.ipynb")).toMatchObject({ code: 2, err: expect.stringContaining("no notebook of format 4") });
  });
});

describe("what was edited by hand", () => {
  test("is refused, unless its overwriting is asked for", () => {
    const text = block("heating.slantwise.json");
    const edited = text.replace("| −185 (", "| −200 (");
    expect(edited).not.toBe(text);
    put("report.md", edited);
    expect(run("check", "report.md")).toMatchObject({ code: 1, out: "report.md:1: edited by hand\n" });
    expect(run("refresh", "report.md")).toMatchObject({ code: 1, out: "report.md:1: edited by hand, left alone\n" });
    expect(textOf("report.md")).toBe(edited);
    expect(run("refresh", "report.md", "--overwrite-edits").code).toBe(0);
    expect(textOf("report.md")).toBe(text);
  });
});

describe("where slopes differ", () => {
  test("an inline number says so, and exits 1 from then on", () => {
    put("report.md", `So ${value("of=estimate", "−212", "glazing.slantwise.json")}.\n`);
    for (const command of ["check", "refresh", "check"]) expect(run(command, "report.md").code, command).toBe(1);
    expect(textOf("report.md")).toMatch(/-->no single difference<!--/);
    expect(run("check", "report.md").out).toBe("report.md:1: no single difference: slopes differ in mean wind\n");
  });
});

describe("where the plan is", () => {
  test("is written relative to the document, with slashes, whatever the folder", () => {
    mkdirSync(at("reports/2026"), { recursive: true });
    const text = block("heating.slantwise.json", "--for", "reports/2026/report.md");
    expect(text).toContain(" plan=../../heating.slantwise.json ");
    put("reports/2026/report.md", text);
    expect(run("check", "reports/2026/report.md")).toMatchObject({ code: 0 });
  });
  test("outside the document's folder and the current one is refused, by whatever way", () => {
    mkdirSync(at("reports"));
    put("reports/report.md", block("heating.slantwise.json", "--for", "reports/report.md"));
    symlinkSync(at("heating.slantwise.json"), at("reports/linked.slantwise.json"));
    put("reports/linked.md", value("of=rows", "", "linked.slantwise.json"));
    for (const name of ["report", "linked"]) {
      const ran = program.run(at("reports"), ["check", `${name}.md`]);
      expect([ran.code, ran.out]).toEqual([2, ""]);
      expect(ran.err).toMatch(/^\w+\.md:1: the plan \S+ lies outside the folders that may be read; .*\n$/);
    }
  });
});

describe("what cannot be used is said on stderr, with exit code 2", () => {
  const unusable = (text: string): string => {
    put("report.md", text);
    const [check, refresh] = [run("check", "report.md"), run("refresh", "report.md")];
    expect([check.code, refresh.code, refresh.err]).toEqual([2, 2, check.err]);
    expect(textOf("report.md")).toBe(text);
    return check.err;
  };
  test("a plan or data that are gone, or that no longer fit", () => {
    const text = block("heating.slantwise.json");
    put("heating.slantwise.json", textOf("heating.slantwise.json").replace('"kwh"', '"kwhs"'));
    expect(unusable(text)).toMatch(
      /^report\.md:1: heating\.slantwise\.json, line \d+: there is no column kwhs .*did you mean kwh\?\n$/,
    );
    rmSync(at("heating.slantwise.json"));
    expect(unusable(text)).toBe("report.md:1: heating.slantwise.json: the file is not there.\n");
    expect(unusable(value("of=p", "", "plan.json"))).toContain("a plan's name ends in .slantwise.json");
  });
  test("a block without its end, while the rest of the document is brought up to date", () => {
    const [begin] = block("heating.slantwise.json").split("\n");
    expect(unusable(`a\n${begin}\n\nb\n`)).toMatch(/^report\.md:2: the block has no closing marker/);
    put("report.md", `${begin}\n\nb ${value("of=rows")}\n`);
    expect(run("refresh", "report.md").code).toBe(2);
    expect(textOf("report.md")).toMatch(/-->1,\d{3}<!--/);
  });
  test("a document that is not there, no Markdown, no UTF-8, or read-only; the others are still looked at", () => {
    put("report.md", `${value("of=rows", "1")}\n`);
    put("notes.txt", "");
    writeFileSync(at("latin.md"), Buffer.from([0x61, 0xe9, 0x0a]));
    const ran = run("check", "gone.md", "notes.txt", "latin.md", "report.md");
    expect([ran.code, ran.out]).toEqual([2, expect.stringMatching(/^report\.md:1: stale: was 1, is 1,\d{3}\n$/)]);
    expect(ran.err.split("\n")).toEqual([
      "gone.md: the file is not there.",
      expect.stringContaining("notes.txt: a document's name ends in .md"),
      expect.stringContaining("latin.md: the text is not UTF-8"),
      "",
    ]);
    chmodSync(at("report.md"), 0o444);
    expect(run("refresh", "report.md")).toMatchObject({ code: 2, err: "report.md could not be written: it is read-only.\n" });
    expect(textOf("report.md")).toBe(`${value("of=rows", "1")}\n`);
  });
  test("a call that is not understood", () => {
    const said = (...args: string[]) => {
      const { code, out, err } = run(...args);
      expect([code, out]).toEqual([2, ""]);
      return err;
    };
    expect(said("check")).toContain("Name a document, as in: slantwise check DOC.md");
    expect(said("block")).toContain("Name the plan");
    expect(said("block", "heating.csv")).toContain("A plan's name ends in .slantwise.json");
    expect(said("check", "a.md", "--overwrite-edits")).toContain("There is no option --overwrite-edits");
    expect(said("check", "a.md", "--margin", "5")).toContain("slantwise check --help lists them.");
    expect(said("block", "heating.slantwise.json", "--for", "notes.txt")).toContain("notes.txt: a document's name ends in");
  });
});

test("a document with nothing to check is said to have nothing", () => {
  put("report.md", `In code: \`${value("of=rows")}\`.\n`);
  expect(run("check", "report.md")).toEqual({ code: 0, out: "report.md: no write-up block and no inline number\n", err: "" });
});
