import { describe, expect, it } from "vitest";
import { compare } from "../../../src/engine/compare";
import { planOf, seeded, tableOf } from "../fixtures";

const { uniform, normal } = seeded(9);
const n = 60;
const y = Array.from({ length: n }, () => normal());
const g = y.map(() => "ab"[Math.floor(2 * uniform())]);

describe("a covariate's columns that others determine", () => {
  const aside = (covariates: { column: string; form?: { polynomial: number } }[], columns: Record<string, (number | string)[]>) =>
    compare(tableOf({ y, g, ...columns }), {
      ...planOf("y", "g", [], { modifiers: [] }),
      covariates,
      sets: [covariates.map((c) => c.column)],
    });

  it("a constant goes, a combination of nothing", () => {
    const found = aside([{ column: "x" }], { x: y.map(() => 0.1) });
    expect(found.sets[1].setAside).toEqual([{ column: "x", combinationOf: [] }]);
  });

  it("a power beyond the number of values goes, and the rest of the covariate is told to stay", () => {
    const found = aside([{ column: "x", form: { polynomial: 3 } }], {
      x: y.map(() => [0.1, 0.7, 0.3][Math.floor(3 * uniform())]),
    });
    expect(found.sets[1].setAside).toEqual([{ column: "x", combinationOf: [], part: true }]);
    expect(found.sets[1].residualDf).toBe(n - 4); // the constant, two powers, the group
    expect(found.findings).toContainEqual({ code: "set-aside", set: 1, column: "x", combinationOf: [], part: true });
  });

  it("a level that another category tells goes, and the other levels stay", () => {
    const k = y.map(() => "pqr"[Math.floor(3 * uniform())]);
    // s is r exactly where k is, and free elsewhere
    const s = k.map((v) => (v === "r" ? "r" : "st"[Math.floor(2 * uniform())]));
    const found = aside([{ column: "k" }, { column: "s" }], { k, s });
    expect(found.sets[1].setAside).toMatchObject([{ column: "s", part: true }]);
    expect(found.sets[1].setAside[0].combinationOf).toContain("k");
  });
});

describe("a group whose contrast has no number", () => {
  it("has no row in the fitted table, where its coefficient would be against another group", () => {
    const arm = y.map((_, i) => "abc"[i % 3]);
    const x = arm.map((v) => (v === "a" ? 0 : 1)); // tells a from the others
    const found = compare(tableOf({ y, arm, x }), {
      ...planOf("y", "arm", ["x"], { modifiers: [] }),
      exposure: { column: "arm", reference: "a" },
    });
    expect(found.sets[1].contrasts.map((c) => c.readout.kind)).toEqual(["none", "none"]);
    expect(found.sets[1].model.map((row) => row.term)).toEqual([{ role: "intercept" }, { column: "x" }]);
    expect(found.sets[0].model.map((row) => row.term)).toEqual([
      { role: "intercept" },
      { column: "arm", level: "b" },
      { column: "arm", level: "c" },
    ]);
  });
});
