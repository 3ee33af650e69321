// Expected values: R 4.2.2, sandwich 3.0-2: m <- lm(mpg ~ hp + am * wt, mtcars) with am a factor; L = (0, 0, 1, 0, mean of wt over the rows);
// sum(L * coef(m)), sqrt(t(L) %*% vcovHC(m, "HC3") %*% L)
import { readFileSync } from "node:fs";
import { describe, expect, it } from "vitest";
import { readTable } from "../../../src/data/read";
import { compare } from "../../../src/engine/compare";
import type { Plan } from "../../../src/engine/plan";
import { relativeError, TOLERANCE } from "../../tolerances";

const file = new URL("../../reference/data/mtcars.csv", import.meta.url).pathname;
const read = readTable(readFileSync(file), { file: "mtcars.csv" });
if (!read.ok) throw new Error(read.problem.code);
const plan: Plan = {
  outcome: { column: "mpg" },
  exposure: { column: "am", reference: 0 },
  covariates: [{ column: "wt" }, { column: "hp" }],
  modifiers: ["wt"],
};
const varies = (average?: string) => {
  const { readout } = compare(read.table, { ...plan, average }).sets[3].contrasts[0];
  if (readout.kind !== "varies") throw new Error(readout.kind);
  return readout;
};

describe("an average over stated rows", () => {
  it("is given only when asked for", () => {
    expect(varies()).not.toHaveProperty("average");
  });
  it("over all rows, and over one group's, agrees with R", () => {
    for (const [over, rows, estimate, error] of [
      ["all rows", 32, 0.0437826708214963, 1.56295153617162],
      ["1", 13, 2.92847244436727, 1.40734419265271],
    ] as const) {
      const found = varies(over).average!;
      expect(found.rows).toBe(rows);
      expect(relativeError(found.estimate, estimate, error)).toBeLessThan(TOLERANCE.coefficient);
      expect(relativeError(found.standardError!, error)).toBeLessThan(TOLERANCE.coefficient);
    }
  });
});
