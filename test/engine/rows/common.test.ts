import fc from "fast-check";
import { describe, expect, it } from "vitest";
import type { Keep, Plan } from "../../../src/engine/plan";
import { resolveQuestion } from "../../../src/engine/question/resolve";
import { findRows } from "../../../src/engine/rows/common";
import { planOf, tableOf } from "../fixtures";

type Cells = Record<string, (number | string | null)[]>;
const columns: Cells = {
  y: [1, 2, null, 4, 5, 6, 7, 8],
  g: ["a", "b", "a", "b", "a", null, "a", "b"],
  x: [null, 2, null, 4, 5, 6, 7, 0],
  z: ["p", "q", "p", "q", null, "q", "p", "q"],
  w: [1, 0, 1, 2, 1, 1, null, 1],
};
const rowsOf = (plan: Plan, cells = columns) => {
  const table = tableOf(cells);
  return findRows(table, plan, resolveQuestion(table, plan));
};
const dropped = (plan: Plan, cells = columns) =>
  Object.fromEntries(rowsOf(plan, cells).count.droppedBy.map(({ column, rows }) => [column, rows]));

describe("the rows of a comparison", () => {
  it("are complete in outcome, exposure, every covariate and every modifier, of whatever set", () => {
    const rows = rowsOf(planOf("y", "g", ["x"], { modifiers: ["z"] }));
    expect([...rows.common]).toEqual([1, 3, 6, 7]);
    expect(rows.count).toMatchObject({ read: 8, common: 4 });
  });

  it("are counted as lost under each column they are missing in", () => {
    expect(dropped(planOf("y", "g", ["x", "z"]))).toEqual({ y: 1, g: 1, x: 2, z: 1 });
  });

  it("a set's own rows lack nothing of its own columns", () => {
    const rows = rowsOf(planOf("y", "g", ["x", "z"]));
    expect([0, 1, 2, 3].map((set) => [...rows.own(set)])).toEqual([
      [0, 1, 3, 4, 6, 7],
      [1, 3, 4, 6, 7],
      [0, 1, 3, 6, 7],
      [1, 3, 6, 7],
    ]);
  });

  it("of weight 0, or without a weight, are lost to the weights", () => {
    const plan = planOf("y", "g", [], { weights: "w" });
    expect(dropped(plan)).toEqual({ y: 1, g: 1, w: 2 });
    expect([...rowsOf(plan).common]).toEqual([0, 3, 4, 7]);
  });

  it("with no logarithm are lost to that column", () => {
    expect(dropped({ ...planOf("y", "g"), covariates: [{ column: "x", form: "log" }] })).toEqual({ y: 1, g: 1, x: 3 });
  });

  it("a row is lost to a column once, however many places name it", () => {
    const keep: Keep[] = [
      { column: "x", from: 1 },
      { column: "x", to: 6 },
    ];
    expect(dropped(planOf("y", "g", ["x"], { keep })).x).toBe(4);
    expect(dropped(planOf("y", "g", ["z"], { cluster: "z" })).z).toBe(1);
  });

  it("are restricted by ranges with both ends, by levels wanted and levels not wanted", () => {
    const kept = (keep: Keep) => [...rowsOf(planOf("y", "g", [], { keep: [keep] })).common];
    expect(kept({ column: "x", from: 2, to: 6 })).toEqual([1, 3, 4]);
    expect(kept({ column: "z", only: ["p"] })).toEqual([0, 6]);
    expect(kept({ column: "z", not: ["p"] })).toEqual([1, 3, 7]);
    expect(kept({ column: "x", only: [7, "0"] })).toEqual([6, 7]);
    const rows = rowsOf(planOf("y", "g", [], { keep: [{ column: "z", only: ["p"] }] }));
    expect(rows.findings).toEqual([{ code: "kept-rows", rows: 3, columns: ["z"] }]);
  });

  it("no column ever costs more rows than were lost, and the columns together cost at least those", () => {
    const cell = <T>(arbitrary: fc.Arbitrary<T>) => fc.option(arbitrary, { freq: 3 });
    const row = fc.tuple(cell(fc.integer()), cell(fc.constantFrom("a", "b")), cell(fc.integer({ min: -2, max: 2 })));
    fc.assert(
      fc.property(fc.array(row, { minLength: 1, maxLength: 30 }), fc.integer({ min: -2, max: 2 }), (list, from) => {
        const cells = { y: list.map((r) => r[0]), g: list.map((r) => r[1]), x: list.map((r) => r[2]) };
        const { count } = rowsOf(planOf("y", "g", ["x"], { keep: [{ column: "x", from }] }), cells);
        const lost = count.read - count.common;
        for (const { rows } of count.droppedBy) expect(rows).toBeLessThanOrEqual(lost);
        expect(count.droppedBy.reduce((sum, { rows }) => sum + rows, 0)).toBeGreaterThanOrEqual(lost);
      }),
      { seed: 5 },
    );
  });
});
