// How often a set is refused a single number: 2,000 seeded runs each. Found when this was written (percent of runs, α = 0.05):
// parallel slopes, one modifier: classical 4.7, HC3 4.3; three modifiers under Holm: classical 4.7, HC3 4.4;
// slopes that differ by 0.25 and 0.5: classical 34.6 and 88.5 (noncentral F: 34.7 and 88.0), HC3 32.9 and 87.1.
import { readFileSync } from "node:fs";
import { describe, expect, it } from "vitest";
import { compare } from "../../../src/engine/compare";
import type { Variance } from "../../../src/engine/plan";
import { planOf, seeded, tableOf } from "../fixtures";

interface Expected {
  readonly runs: number;
  /** Range of the rate that holds 99 % of repetitions where the true rate is 5 %. */
  readonly parallel: readonly [number, number];
  readonly differ: readonly { readonly slope: number; readonly power: number; readonly range: readonly [number, number] }[];
}

const expected = JSON.parse(readFileSync(new URL("power.json", import.meta.url), "utf8")) as Expected;
const N = 120;

/** The fixed rows of make-power.R. */
const x = Array.from({ length: N }, (_, i) => (((37 * i) % N) / N) * 4 - 2);
const g = x.map((v, i) => ((53 * i + (v > 0 ? 20 : 0)) % N < 60 ? "b" : "a"));
const others = { u: x.map((_, i) => ((29 * i) % N) / N), v: x.map((_, i) => ((71 * i + 13) % N) / N) };

/** Share of runs in which the set that adjusts for x is refused a single number; noise alone differs between runs. */
function refused(variance: Variance, slope: number, modifiers: readonly string[] = ["x"]): number {
  const { normal } = seeded(77);
  const plan = planOf("y", "g", ["x", "u", "v"], {
    exposure: { column: "g", reference: "a" },
    sets: [["x"]],
    modifiers: [...modifiers],
    variance,
  });
  let count = 0;
  for (let run = 0; run < expected.runs; run++) {
    const y = x.map((v, i) => 2 * v + (g[i] === "b" ? 1 + slope * v : 0) + normal());
    if (compare(tableOf({ y, g, x, ...others }), plan).sets[1].contrasts[0].readout.kind === "varies") count++;
  }
  return count / expected.runs;
}

function expectWithin(rate: number, [low, high]: readonly [number, number]): void {
  expect(rate).toBeGreaterThanOrEqual(low);
  expect(rate).toBeLessThanOrEqual(high);
}

describe("the refusal of a single number", () => {
  it("happens at its stated rate where slopes are parallel", () => {
    expectWithin(refused("classical", 0), expected.parallel);
    expectWithin(refused("HC3", 0), expected.parallel);
  });

  it("happens at no more than its stated rate where three modifiers are tested under Holm", () => {
    for (const variance of ["classical", "HC3"] as const) {
      expect(refused(variance, 0, ["x", "u", "v"])).toBeLessThanOrEqual(expected.parallel[1]);
    }
  });

  it("happens as often as the noncentral F says where slopes differ", () => {
    for (const { slope, range } of expected.differ) expectWithin(refused("classical", slope), range);
  });
});
