import fc from "fast-check";
import { expect, it } from "vitest";
import { compare } from "../../../src/engine/compare";
import type { Plan } from "../../../src/engine/plan";
import { findProblems } from "../../../src/engine/question/problems";
import { planOf, tableOf } from "../../engine/fixtures";
import { sectionOf } from "./cases";
import { expectWhole, numbersIn } from "./whole";

const size = { minLength: 16, maxLength: 16 };
const cell = fc.oneof(
  { weight: 8, arbitrary: fc.double({ min: -50, max: 50, noNaN: true }) },
  { weight: 3, arbitrary: fc.constantFrom(0, 1, 2) },
  { weight: 1, arbitrary: fc.constantFrom(null, 1e12, -1e-9) },
);
const column = fc.array(cell, size);
const fewValues = fc.array(fc.constantFrom(0, 1, 2, 3), size);
const groups = fc.array(fc.constantFrom("a", "b", "c", null), size);

it("whatever the data, every figure of every set is whole and holds nothing that is no number", () => {
  let drawn = 0;
  fc.assert(
    fc.property(
      column,
      fc.oneof(groups, column),
      fc.oneof(column, fewValues),
      groups,
      fc.constantFrom<Partial<Plan>>(
        {},
        { variance: "classical", margin: 3 },
        { variance: "HC2", slopesAlpha: 0.9 },
        { slopesAlpha: 0.999, sets: "every" },
        { outcome: { column: "y", form: "log" } },
        { covariates: [{ column: "x", form: { polynomial: 2 } }, { column: "z" }] },
        { covariates: [{ column: "x", form: "log" }, { column: "z" }], slopesAlpha: 0.9 },
        { covariates: [{ column: "x", form: { spline: 3 } }], modifiers: ["x", "z"] },
        { covariates: [{ column: "x" }], cluster: "z", variance: "CR2" },
      ),
      (y, g, x, z, more) => {
        const table = tableOf({ y, g, x, z });
        const plan = planOf("y", "g", ["x", "z"], more);
        fc.pre(findProblems(table, plan).length === 0);
        const comparison = compare(table, plan);
        comparison.sets.forEach((found, set) => {
          for (const modifier of comparison.question.modifiers) {
            found.contrasts.forEach((_, contrast) => {
              const section = sectionOf({ table, plan, choice: { set, modifier, contrast } }, comparison);
              expect(numbersIn(section).filter(([, value]) => !Number.isFinite(value))).toEqual([]);
              expect(JSON.stringify(section)).not.toMatch(/NaN|Infinity|undefined/);
              section.plots.forEach(expectWhole);
              drawn += section.plots.length;
            });
          }
        });
      },
    ),
    { numRuns: 60 },
  );
  expect(drawn).toBeGreaterThan(100);
});
