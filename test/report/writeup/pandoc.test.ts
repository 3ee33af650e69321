import { execFileSync } from "node:child_process";
import { mkdtempSync, rmSync, writeFileSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { afterAll, beforeAll, describe, expect, test } from "vitest";
import type { Plan } from "../../../src/engine/plan";
import { present } from "../../../src/report/present";
import { openData, sample } from "../outputs";
import { block, hostile, sourceOf } from "./written";

let folder: string;
beforeAll(() => {
  folder = mkdtempSync(join(tmpdir(), "slantwise-pandoc-"));
});
afterAll(() => rmSync(folder, { recursive: true }));

const pandoc = (...args: string[]) => execFileSync("pandoc", args, { cwd: folder, encoding: "utf8" });
/** The tables of an HTML page: their rows' cells as a person reads them. */
const tablesIn = (html: string): string[][][] =>
  [...html.matchAll(/<table[\s\S]*?<\/table>/g)].map(([table]) =>
    [...table.matchAll(/<tr[\s\S]*?<\/tr>/g)].map(([row]) =>
      [...row.matchAll(/<t[hd]\b[^>]*>([\s\S]*?)<\/t[hd]>/g)].map(([, cell]) => read(cell)),
    ),
  );
const read = (html: string): string =>
  html
    .replace(/<[^>]*>/g, "")
    .replace(/&#(\d+);/g, (_, code: string) => String.fromCodePoint(Number(code)))
    .replace(/&lt;/g, "<")
    .replace(/&gt;/g, ">")
    .replace(/&quot;/g, '"')
    .replace(/&amp;/g, "&")
    .trim();

const iris: Plan = {
  outcome: { column: "Sepal.Width" },
  exposure: { column: "Species", reference: "setosa" },
  covariates: [{ column: "Petal.Length" }],
};
const of = ({ table, plan }: ReturnType<typeof sample>) => sourceOf(table, plan);
const CASES: Record<string, ReturnType<typeof sourceOf>> = {
  heating: of(sample("heating")),
  glazing: of(sample("glazing")),
  "several groups": of(openData("iris", iris)),
  ...Object.fromEntries(["a|b", "-->", "*x* $z^2$", "@k [^1]"].map((name) => [`a name such as ${name}`, hostile(name).source])),
};

describe("through pandoc a block's tables are whole, and its markers are not seen", () => {
  for (const [name, source] of Object.entries(CASES))
    test(name, () => {
      const { blocks } = present(source.comparison, source.plan);
      const expected = blocks.map(({ heads, rows }) => [
        [heads.held, heads.rows, heads.difference, heads.shift, heads.word],
        ...rows.map((row) => [row.held + (row.reported ? " (reported)" : ""), row.rows, row.difference, row.shift, row.word]),
      ]);
      writeFileSync(join(folder, "report.md"), `# Heat\n\nBefore.\n\n${block(source)}\n\nAfter.\n`);
      const html = pandoc("report.md", "--to=html", "--wrap=none");
      expect(tablesIn(html)).toEqual(expected);
      pandoc("report.md", "--output=report.docx");
      const back = pandoc("report.docx", "--to=html", "--wrap=none");
      expect(tablesIn(back)).toEqual(expected);
      expect(back).toMatch(/^<h1[^>]*>Heat<\/h1>\s*<p>Before\.<\/p>[\s\S]*<p>After\.<\/p>\s*$/);
      expect(pandoc("report.md", "--to=plain")).not.toMatch(/slantwise:(begin|end)|plan-sha|<!--/);
    });
});
