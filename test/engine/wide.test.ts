import { describe, expect, it } from "vitest";
import { compare } from "../../src/engine/compare";
import { relativeError, TOLERANCE } from "../tolerances";
import { planOf, seeded, tableOf } from "./fixtures";

const ROWS = 60;
const COLUMNS = 1500;

function wide(columnOf: (j: number, own: () => number[]) => number[]) {
  const { normal } = seeded(17);
  const own = () => Array.from({ length: ROWS }, normal);
  const names = Array.from({ length: COLUMNS }, (_, j) => `x${j}`);
  const g = own().map((v) => (v > 0 ? "new" : "old"));
  const y = own().map((v, i) => v + (g[i] === "new" ? 1 : 0));
  const columns = Object.fromEntries(names.map((name, j) => [name, columnOf(j, own)]));
  return { table: tableOf({ y, g, ...columns }), names };
}

describe("far more columns than rows", () => {
  it("is too few rows, in words, and the base set still has its number", () => {
    const { table, names } = wide((_, own) => own());
    const { sets } = compare(table, planOf("y", "g", names, { sets: [names], modifiers: ["x3"] }));
    expect(sets[0].contrasts[0].readout).toHaveProperty("estimate");
    expect(sets[1].contrasts[0].readout).toEqual({
      kind: "none",
      reason: { code: "too-few-rows", rows: ROWS, coefficients: COLUMNS + 2 },
    });
  });

  it("is no matter where they all say the same: copies are set aside", () => {
    const first: number[][] = [];
    const { table, names } = wide((j, own) => {
      if (j < 3) first[j] = own();
      return first[j % 3].map((v) => v * (1 + (j >> 2)) + j);
    });
    const { sets } = compare(table, planOf("y", "g", names, { sets: [names, ["x0", "x1", "x2"]], modifiers: [] }));
    const [, all, three] = sets.map(({ contrasts }) => contrasts[0].readout);
    if (!("estimate" in all) || !("estimate" in three)) throw new Error(`${all.kind}, ${three.kind}`);
    expect(relativeError(all.estimate, three.estimate)).toBeLessThan(TOLERANCE.coefficient);
    expect(relativeError(all.standardError!, three.standardError!)).toBeLessThan(TOLERANCE.coefficient);
    expect(sets[1].setAside.length).toBe(COLUMNS - 3);
  });
});
