import { createHash } from "node:crypto";
import { describe, expect, it } from "vitest";
import { readTable } from "../../src/data/read";
import { compare } from "../../src/engine/compare";
import type { NumberColumn } from "../../src/engine/table";
import { planOf } from "../engine/fixtures";
import { relativeError } from "../tolerances";
import { tableText } from "./generate.mjs";
import { naiveRefit } from "./naive.mjs";

const text = (n: number, k: number, seed = 1) => [...tableText(n, k, seed)].join("");

describe("the benchmark", () => {
  it("makes the same bytes every time, others from another seed", () => {
    const print = (seed: number) =>
      createHash("sha256")
        .update(text(3000, 5, seed))
        .digest("hex");
    expect(print(1)).toBe(print(1));
    expect(print(1)).not.toBe(print(2));
  });

  it("compares with refits that find the same numbers", () => {
    const read = readTable(new TextEncoder().encode(text(2500, 3)), { file: "bench.csv" });
    if (!read.ok) throw new Error(read.problem.code);
    const names = ["x1", "x2", "x3"];
    const comparison = compare(read.table, planOf("y", "d", names, { sets: "every", modifiers: [] }));
    expect(comparison.rows.common).toBeGreaterThan(2350);
    expect(comparison.rows.common).toBeLessThan(2500);
    const values = (name: string) => (read.table.columns.find((column) => column.name === name) as NumberColumn).values;
    const all = ["y", "d", ...names].map(values);
    const complete = [...all[0].keys()].filter((i) => all.every((column) => !Number.isNaN(column[i])));
    const gather = (name: string) => Float64Array.from(complete, (i) => values(name)[i]);
    for (const { adjustedFor, contrasts } of comparison.sets) {
      const found = naiveRefit(gather("y"), ["d", ...adjustedFor].map(gather));
      const [{ readout }] = contrasts;
      if (!("estimate" in readout)) throw new Error(readout.kind);
      expect(relativeError(readout.estimate, found.estimate)).toBeLessThan(1e-9);
      expect(relativeError(readout.standardError!, found.standardError)).toBeLessThan(1e-9);
    }
  });
});
