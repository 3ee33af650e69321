import { describe, expect, it } from "vitest";
import { buildDesign, countGroups } from "../../../src/engine/design/build";
import type { Design } from "../../../src/engine/design/types";
import type { Plan } from "../../../src/engine/plan";
import { resolveQuestion } from "../../../src/engine/question/resolve";
import { findRows } from "../../../src/engine/rows/common";
import { planOf, tableOf } from "../fixtures";

const columns = {
  y: [3, 5, 4, 9, 7, 8],
  g: ["none", "full", "none", "part", "full", "part"],
  x: [10, 20, 30, 40, 50, 90],
  t: ["own", "let", "own", "let", "own", "own"],
};
function designOf(plan: Plan, table = tableOf(columns)): Design {
  const resolved = resolveQuestion(table, plan);
  const { common } = findRows(table, plan, resolved);
  return buildDesign(resolved, common, [...resolved.sources.keys()], resolved.question.modifiers);
}

describe("the design", () => {
  const design = designOf(planOf("y", "g", ["x", "t"]));
  const column = (k: number) => [...design.frame.columns[k]];

  it("starts with the constant, and codes a category against its first level in natural order", () => {
    expect(column(0)).toEqual([1, 1, 1, 1, 1, 1]);
    const { basis, columns: own } = design.covariates.get("t")!;
    expect([basis.reference, basis.levels]).toEqual(["let", ["let", "own"]]);
    expect(own.map(column)).toEqual([[1, 0, 1, 0, 1, 1]]);
  });

  it("has one contrast a group beyond the reference, named with a minus sign", () => {
    expect(design.contrasts.map((c) => c.contrast)).toEqual(["full − none", "part − none"]);
    expect(design.contrasts.map((c) => column(c.column))).toEqual([
      [0, 1, 0, 0, 1, 0],
      [0, 0, 0, 1, 0, 1],
    ]);
    expect(countGroups(design)).toEqual([
      { level: "none", rows: 2 },
      { level: "full", rows: 2 },
      { level: "part", rows: 2 },
    ]);
  });

  it("multiplies every exposure column with every column of a modifier", () => {
    for (const name of ["x", "t"]) {
      const products = design.interactions.get(name)!.columns;
      products.forEach((line, g) =>
        line.forEach((at, k) => {
          const a = column(design.exposure.columns[g]);
          const b = column(design.covariates.get(name)!.columns[k]);
          expect(column(at)).toEqual(a.map((v, i) => v * b[i]));
        }),
      );
    }
  });

  it("columns on the rows are the basis at the rows' values, bit for bit", () => {
    for (const form of ["as is", "log", { polynomial: 2 }, { spline: 3 }] as const) {
      const own = designOf({ ...planOf("y", "g"), covariates: [{ column: "x", form }] });
      const { basis, columns: places } = own.covariates.get("x")!;
      columns.x.forEach((value, i) => expect(places.map((k) => own.frame.columns[k][i])).toEqual([...basis.at(value)]));
    }
  });

  it("gives an amount's slope per stated step, and a group without rows no column", () => {
    const amount = designOf({ ...planOf("y", "x"), exposure: { column: "x", per: 10 } });
    expect(amount.contrasts.map((c) => [c.contrast, c.level])).toEqual([["per 10 x", null]]);
    expect(amount.group).toBeNull();
    const [{ column: at, factor }] = amount.contrasts;
    // ten units of x are this many of the fitted column's
    expect((amount.frame.columns[at][1] - amount.frame.columns[at][0]) / factor).toBeCloseTo(1, 14);
    const empty = designOf(planOf("y", "g"), tableOf({ ...columns, y: [3, null, 4, 9, null, 8] }));
    expect(empty.contrasts.map((c) => c.column >= 0)).toEqual([false, true]);
  });

  it("numbers clusters by their own rows", () => {
    const { frame } = designOf(
      planOf("y", "g", [], { cluster: "c" }),
      tableOf({ ...columns, y: [null, 5, 4, 9, 7, 8], c: ["p", "q", "r", "q", "s", "s"] }),
    );
    expect(frame.clusters).toEqual({ codes: Int32Array.of(0, 1, 0, 2, 2), count: 3 });
  });
});
