import fc from "fast-check";
import { visit } from "jsonc-parser";
import { describe, expect, test } from "vitest";
import type { Plan } from "../../src/engine/plan";
import { applyChange } from "../../src/plan/change";
import type { PlanChange } from "../../src/plan/change";
import { editPlan, planText } from "../../src/plan/edit";
import { parsePlan } from "../../src/plan/parse";
import { anyPlan } from "./plans";
import schema from "../../src/plan/plan.schema.json";
import { rankOf } from "../../src/plan/order";

const TEXT = `// what the retrofit did
{
  "$schema": "./plan.schema.json",
  "rowsAre": "flats", // one a row
  "data": "heating.csv",
  "outcome": { "column": "kwh",   "unit": "kWh per winter" },
  "exposure": { "column": "retrofit", "reference": "none" /* before */ },
  /* agreed in May */
  "covariates": [
    // larger flats went first
    { "column": "floor_m2", "form": "log" }, // from the survey
    {
      "column": "tenure",
      "reason": "owners could ask" // see the minutes
    }, // from the register
  ],
  "report": ["floor_m2", "tenure"], // main
  "margin": 150 // agreed
}
`;
const planOf = (text: string): Plan => {
  const parsed = parsePlan(text, "p.slantwise.json");
  if (!parsed.ok) throw new Error(JSON.stringify(parsed.problems));
  return parsed.plan;
};
const after = (change: PlanChange, text = TEXT) => editPlan(text, applyChange(planOf(text), change))!;
/** Lines of one text that are not in the other, and the other way round. */
function moved(before: string, now: string): [string[], string[]] {
  const lines = (text: string) => text.split("\n");
  return [lines(before).filter((line) => !lines(now).includes(line)), lines(now).filter((line) => !lines(before).includes(line))];
}

describe("a plan's text after a change", () => {
  test("another value stands where the old one stood, and nothing else moves", () => {
    expect(moved(TEXT, after({ key: "margin", value: 200 }))).toEqual([
      ['  "margin": 150 // agreed'],
      ['  "margin": 200 // agreed'],
    ]);
    expect(moved(TEXT, after({ key: "reference", level: "full" }))[1]).toEqual([
      '  "exposure": { "column": "retrofit", "reference": "full" /* before */ },',
    ]);
  });

  test("a new key comes where DESIGN's order has it, and the comment beside its neighbour stays there", () => {
    expect(moved(TEXT, after({ key: "sets", sets: "every" }))).toEqual([
      ['  "report": ["floor_m2", "tenure"], // main'],
      ['  "sets": "every",', "  // main"],
    ]);
    expect(moved(TEXT, after({ key: "average", over: "all rows" }))).toEqual([
      ['  "margin": 150 // agreed'],
      ['  "margin": 150, // agreed', '  "average": "all rows"'],
    ]);
    const last = '{\n  "data": "a.csv",\n  "outcome": { "column": "a" },\n  "exposure": { "column": "b" } // b\n}\n';
    expect(after({ key: "margin", value: 2 }, last)).toBe(
      '{\n  "data": "a.csv",\n  "outcome": { "column": "a" },\n  "exposure": { "column": "b" }, // b\n  "margin": 2\n}\n',
    );
    expect(after({ key: "per", value: 10 }, last)).toContain('"exposure": { "column": "b", "per": 10 } // b');
  });

  test("a covariate is added behind the last, and one that leaves takes only its own lines along", () => {
    expect(moved(TEXT, after({ key: "covariates", columns: ["floor_m2", "tenure", "persons"] }))).toEqual([
      ['  "report": ["floor_m2", "tenure"], // main'],
      ['    { "column": "persons" },', "  // main"],
    ]);
    const fewer = after({ key: "covariates", columns: ["floor_m2"] });
    expect(fewer).not.toContain("tenure");
    expect(fewer).toContain("    // larger flats went first\n");
    expect(fewer).toContain('    { "column": "floor_m2", "form": "log" }, // from the survey\n    // from the register\n  ],');
    expect(after({ key: "covariates", columns: [] }, planText(planOf(TEXT), "a.csv"))).toContain('"covariates": [],');
  });

  test("another outcome takes its unit and margin along, on one line as before", () => {
    const cost = after({ key: "outcome", column: "cost" });
    expect(cost).toContain('  "outcome": { "column": "cost" },\n');
    expect(cost).not.toContain("margin");
    expect(cost).toContain("// agreed");
  });

  test("line ends, tabs and a byte-order mark are kept", () => {
    const windows = "\uFEFF" + TEXT.replaceAll("\n", "\r\n").replaceAll("  ", "\t");
    const edited = after({ key: "average", over: "all rows" }, windows);
    expect(edited.startsWith("\uFEFF//")).toBe(true);
    expect(edited).toContain('// agreed\r\n\t"average": "all rows"\r\n');
    expect(edited.replaceAll("\r\n", "")).not.toMatch(/[\r\n]/);
  });

  test("a text that is no plan, or has errors, is not touched", () => {
    for (const text of ["", "{", '{ "data": "a.csv" }', TEXT.replace("margin", "margn")])
      expect(editPlan(text, planOf(TEXT))).toBeNull();
    expect(editPlan(TEXT, planOf(TEXT))).toBe(TEXT);
  });

  test("any plan becomes any other one; comments between the keys stay, in their order", () => {
    const layouts = fc.record({
      step: fc.constantFrom("  ", "\t", "    ", ""),
      end: fc.constantFrom("\n", "\r\n"),
      comma: fc.boolean(),
    });
    fc.assert(
      fc.property(anyPlan, anyPlan, layouts, (one, other, { step, end, comma }) => {
        const entries = Object.entries(one).map(([key, value]) => `${JSON.stringify(key)}: ${JSON.stringify(value, null, step)}`);
        const lines = entries.map(
          (entry, i) => `/*a${i}*/ ${entry} /*b${i}*/${i < entries.length - 1 || comma ? "," : ""} // c${i}\n// d${i}`,
        );
        const text = `// top\n{ // first\n${lines.join("\n")}\n}\n// end\n`.replaceAll("\n", end);
        const edited = editPlan(text, other)!;
        expect(planOf(edited)).toEqual(other);
        expect(comments(edited)).toEqual(comments(text));
      }),
      { seed: 5, numRuns: 400 },
    );
  });

  const column = fc.constantFrom("retrofit", "floor_m2", "tenure", "kwh", "persons");
  const change: fc.Arbitrary<PlanChange> = fc.oneof(
    fc.record({ key: fc.constantFrom("outcome" as const, "exposure" as const), column }),
    fc.record({
      key: fc.constant("covariates" as const),
      columns: fc.uniqueArray(fc.constantFrom("floor_m2", "tenure", "persons")),
    }),
    fc.record({ key: fc.constant("report" as const), columns: fc.uniqueArray(fc.constantFrom("floor_m2", "tenure")) }),
    fc.record({ key: fc.constant("margin" as const), value: fc.option(fc.integer({ min: 1, max: 900 })) }),
    fc.record({ key: fc.constant("average" as const), over: fc.option(fc.constant("all rows")) }),
    fc.record({ key: fc.constant("sets" as const), sets: fc.constantFrom("each" as const, "steps" as const) }),
  );
  test("any row of changes gives the changed plan, and the comments outside of what left it", () => {
    fc.assert(
      fc.property(fc.array(change, { maxLength: 6 }), (changes) => {
        let [text, plan] = [TEXT, planOf(TEXT)];
        for (const next of changes) {
          plan = applyChange(plan, next);
          text = editPlan(text, plan)!;
          expect(planOf(text)).toEqual(JSON.parse(JSON.stringify(plan)));
        }
        const inside = ["/* before */", "// see the minutes"];
        const kept = comments(TEXT).filter((comment) => !inside.includes(comment));
        expect(comments(text).filter((comment) => !inside.includes(comment))).toEqual(kept);
      }),
      { seed: 11, numRuns: 300 },
    );
  });
});

describe("a new plan's text", () => {
  test("is laid out as DESIGN shows it, the file's path first", () => {
    const plan: Plan = {
      margin: 150,
      covariates: [{ reason: "larger flats went first", column: "floor_m2", timing: "before" }, { column: "tenure" }],
      exposure: { reference: "none", column: "retrofit" },
      outcome: { column: "kwh", unit: "kWh per winter" },
      report: ["floor_m2", "tenure"],
    };
    expect(planText(plan, "../data/heating.csv")).toBe(`{
  "data": "../data/heating.csv",
  "outcome": { "column": "kwh", "unit": "kWh per winter" },
  "exposure": { "column": "retrofit", "reference": "none" },
  "covariates": [
    { "column": "floor_m2", "timing": "before", "reason": "larger flats went first" },
    { "column": "tenure" }
  ],
  "report": ["floor_m2", "tenure"],
  "margin": 150
}
`);
  });
  test("says the plan, whatever it holds", () => {
    fc.assert(
      fc.property(anyPlan, (plan) => void expect(planOf(planText(plan, plan.data!))).toEqual(plan)),
      { seed: 3, numRuns: 300 },
    );
  });
  test("every key of the schema has its place in the order", () => {
    const keys = Object.keys(schema.properties).filter((key) => key !== "$schema");
    expect(new Set(keys.map((key) => rankOf(key, 0))).size).toBe(keys.length);
    const columns = Object.values(schema.definitions).flatMap((one) => ("properties" in one ? Object.keys(one.properties) : []));
    const known = rankOf("no key of a plan", 1);
    expect(columns.filter((key) => rankOf(key, 1) === known)).toEqual([]);
  });
});

function comments(text: string): string[] {
  const found: string[] = [];
  visit(text, { onComment: (offset, length) => found.push(text.slice(offset, offset + length)) });
  return found;
}
