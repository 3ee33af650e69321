import { describe, expect, test } from "vitest";
import type { Plan } from "../../src/engine/plan";
import { checkPlan } from "../../src/plan/check";
import { parsePlan } from "../../src/plan/parse";
import { flats } from "./tables";

const FILE = "heating.slantwise.json";

/** The problems of a plan that is otherwise good, one key a line: `data` 2, `outcome` 3, `exposure` 4, the rest from 5. */
function found(changes: Record<string, unknown>) {
  const plan = { data: "flats.csv", outcome: { column: "kwh" }, exposure: { column: "retrofit" }, ...changes };
  const lines = Object.entries(plan).map(([key, value]) => `  ${JSON.stringify(key)}: ${JSON.stringify(value)}`);
  const parsed = parsePlan(`{\n${lines.join(",\n")}\n}`, FILE);
  if (!parsed.ok) throw new Error(JSON.stringify(parsed.problems));
  return checkPlan(flats, parsed.plan, parsed);
}

describe("a plan against its table", () => {
  test("without a fault there is no problem", () => {
    expect(found({ covariates: [{ column: "floor_m2" }, { column: "tenure" }] })).toEqual([]);
  });
  test("a misspelt column is told with the plan's line and the nearest column", () => {
    expect(found({ outcome: { column: "KWHh" } })).toEqual([
      { code: "unknown-column", column: "KWHh", role: "outcome", nearest: "kwh", file: FILE, line: 3, character: 24 },
    ]);
    expect(found({ cluster: "street" })).toMatchObject([{ code: "unknown-column", role: "cluster", nearest: null, line: 5 }]);
  });
  test("each misspelt column has its own place, also one named over and over", () => {
    const sets = [["floor"], ["tenure", "floor"]];
    const places = found({ covariates: [{ column: "tenure" }, { column: "flor_m2" }], sets }).map(({ line, character }) => [
      line,
      character,
    ]);
    expect(places.length).toBe(3);
    expect(new Set(places.map(String)).size).toBe(3);
    expect(places.map(([line]) => line)).toEqual([5, 6, 6]);
  });
  test("what the plan asks of a column it cannot give is told where it is asked", () => {
    const first = (changes: Record<string, unknown>) => {
      const [{ code, line, file }] = found(changes);
      return [code, file, line];
    };
    expect(first({ exposure: { column: "retrofit", reference: "nonne" } })).toEqual(["unknown-level", FILE, 4]);
    expect(first({ exposure: { column: "tenure", kind: "amount" } })).toEqual(["not-numeric", FILE, 4]);
    expect(first({ outcome: { column: "tenure" } })).toEqual(["not-numeric", FILE, 3]);
    expect(first({ covariates: [{ column: "tenure", form: "log" }] })).toEqual(["not-numeric", FILE, 5]);
    expect(first({ covariates: [{ column: "tenure", reference: "let" }] })).toEqual(["unknown-level", FILE, 5]);
    expect(first({ level: 0.9, variance: "CR2" })).toEqual(["cluster-needed", FILE, 6]);
    expect(first({ weights: "tenure" })).toEqual(["not-numeric", FILE, 5]);
    expect(first({ covariates: [{ column: "floor_m2" }], report: ["tenure"] })).toEqual(["unknown-set", FILE, 6]);
    expect(first({ covariates: [{ column: "floor_m2" }, { column: "retrofit" }] })).toEqual(["named-twice", FILE, 5]);
    expect(first({ exposure: { column: "kwh" } })).toEqual(["named-twice", FILE, 4]);
  });
  test("what options changed is told of the table, not of a line of the plan that says something else", () => {
    const parsed = parsePlan(
      '{ "data": "flats.csv", "outcome": { "column": "kwh" }, "exposure": { "column": "retrofit" } }',
      FILE,
    );
    if (!parsed.ok) throw new Error("the plan is good");
    const plan: Plan = { ...parsed.plan, outcome: { column: "kvh" } };
    const [problem] = checkPlan(flats, plan, parsed);
    expect(problem).toEqual({ code: "unknown-column", column: "kvh", role: "outcome", nearest: "kwh", file: "flats.csv" });
    expect(checkPlan(flats, plan)).toEqual([problem]);
  });
});
