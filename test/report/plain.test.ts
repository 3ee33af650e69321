import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { compare } from "../../src/engine/compare";
import { findProblems } from "../../src/engine/question/problems";
import type { Plan } from "../../src/engine/plan";
import { present } from "../../src/report/present";
import { planOf, tableOf } from "../engine/fixtures";
import { outputsOf } from "./outputs";

const NEVER = /\b(NaN|Infinity|undefined|null|\[object)/;
const HOSTILE = [
  "-2+3+cmd|' /C calc'!A0",
  "+1",
  " =cmd()",
  "<img src=x onerror=alert(1)>",
  "a|b",
  "`code`",
  "line\nbreak",
  "=cmd()",
  "*bold*",
  "[x](y)",
  "$x$",
  "~~s~~",
  "# h",
  "- l",
  "&amp;",
  "www.example.com",
  "me@example.com",
  "<!-- x -->",
];

const cell = fc.oneof(
  { weight: 8, arbitrary: fc.double({ min: -50, max: 50, noNaN: true }) },
  { weight: 1, arbitrary: fc.constant(null) },
  { weight: 1, arbitrary: fc.constantFrom(0, 1, 1e12, -1e-9) },
);
const column = fc.array(cell, { minLength: 14, maxLength: 14 });
const groups = fc.array(fc.constantFrom("a", "b", "c", null), { minLength: 14, maxLength: 14 });

describe("whatever the data", () => {
  it("no output shows NaN, Infinity, undefined or null, and every table row has its cells", () => {
    fc.assert(
      fc.property(
        column,
        groups,
        column,
        groups,
        fc.constantFrom<Partial<Plan>>({}, { variance: "classical" }, { margin: 3 }, { design: "randomised" }, { sets: "every" }),
        (y, g, x, z, more) => {
          const table = tableOf({ y, g, x, z });
          const plan = planOf("y", "g", ["x", "z"], more);
          fc.pre(findProblems(table, plan).length === 0);
          const comparison = compare(table, plan);
          const outputs = outputsOf(comparison, plan);
          for (const surface of ["markdown", "text", "table", "csv"]) expect(outputs[surface], surface).not.toMatch(NEVER);
          expect(JSON.stringify(present(comparison, plan)).replace(/:null\b/g, "")).not.toMatch(NEVER);
          for (const line of outputs["markdown"].split("\n").filter((l) => l.startsWith("|")))
            expect(line.split("|")).toHaveLength(7);
          const widths = new Set(
            outputs["table"]
              .trimEnd()
              .split("\n")
              .map((l) => l.split("\t").length),
          );
          expect(widths.size).toBe(1);
        },
      ),
      { numRuns: 150 },
    );
  });
});

it("a ratio beyond double range is said on every surface", () => {
  const g = Array.from({ length: 12 }, (_, i) => (i % 2 ? "a" : "b"));
  const table = tableOf({
    g,
    y: g.map((level, i) => (level === "a" ? 1e-320 : 1e300) * (1 + i / 20)),
    x: g.map((_, i) => (i * 7) % 5),
  });
  const plan = planOf("y", "g", ["x"], { outcome: { column: "y", form: "log" }, exposure: { column: "g", reference: "a" } });
  const comparison = compare(table, plan);
  expect(Math.abs((comparison.sets[1].contrasts[0].readout as { estimate: number }).estimate)).toBeGreaterThan(710);
  const outputs = outputsOf(comparison, plan);
  for (const surface of ["markdown", "text", "table", "csv"]) expect(outputs[surface], surface).not.toMatch(NEVER);
});

/** Character references as a browser reads them. */
const NAMED: Record<string, string> = { amp: "&", lt: "<", gt: ">" };
const decoded = (text: string) =>
  text.replace(/&(?:#(\d+)|(amp|lt|gt));/g, (_, code?: string, name?: string) =>
    code ? String.fromCodePoint(Number(code)) : NAMED[name!],
  );

describe("hostile names show as text", () => {
  for (const name of HOSTILE) {
    it(JSON.stringify(name), () => {
      const n = 40;
      const x = Array.from({ length: n }, (_, i) => Math.sin(7 * i) * 10);
      const table = tableOf({ y: x.map((v, i) => v + (i % 5)), g: x.map((_, i) => (i % 3 ? name : "other")), [name]: x });
      const outputs = outputsOf(compare(table, planOf("y", "g", [name])), planOf("y", "g", [name]));
      const markdown = outputs["markdown"];
      const shown = name.replace(/\n/g, " ").trim();
      expect(decoded(markdown)).toContain(shown);
      // nothing that HTML or Markdown acts on is left of it
      expect(markdown).not.toMatch(/<[a-z!/]|`|\*bold\*|\]\(|~~|\$x\$|www\.|\S@\S/i);
      for (const line of markdown.split("\n").filter((l) => l.startsWith("|"))) expect(line.split("|")).toHaveLength(7);
      expect(outputs["text"]).toContain(shown);
      for (const line of outputs["table"].split("\n").slice(0, -1)) expect(line.split("\t")).toHaveLength(6);
      for (const value of outputs["table"].split(/[\t\n]/)) expect(value).not.toMatch(/^\s*[=@-]/);
      expect(outputs["csv"]).not.toMatch(/(^|[,\n]"?)\s*[=@+]|(^|[,\n]"?)\s*-(?![\d.]+(e[+-]?\d+)?([,\n]|$))/);
    });
  }
});
