import { describe, expect, it } from "vitest";
import { compare } from "../../../src/engine/compare";
import { planOf, seeded, tableOf } from "../fixtures";

const RUNS = 400;
const N = 120;

/** Share of seeded runs in which the adjusted set is refused a single number. */
function refused(slope: number): number {
  const { uniform, normal } = seeded(77);
  let count = 0;
  for (let run = 0; run < RUNS; run++) {
    const x = Array.from({ length: N }, normal);
    const g = x.map((v) => (uniform() < 1 / (1 + Math.exp(-v)) ? "b" : "a"));
    const y = x.map((v, i) => 2 * v + (g[i] === "b" ? 1 + slope * v : 0) + normal());
    const found = compare(tableOf({ y, g, x }), planOf("y", "g", ["x"], { exposure: { column: "g", reference: "a" } }));
    if (found.sets[1].contrasts[0].readout.kind === "varies") count++;
  }
  return count / RUNS;
}

describe("the refusal of a single number", () => {
  it("happens at about its stated rate of 5 % where slopes are parallel", () => {
    const rate = refused(0);
    // 400 runs: a true 5 % lies between 2 and 9 % in all but about one of 1,000 repetitions; HC3 is somewhat cautious
    expect(rate).toBeGreaterThan(0.015);
    expect(rate).toBeLessThan(0.09);
  });
  it("happens nearly always where slopes differ by one unit of noise per standard deviation", () => {
    expect(refused(1)).toBeGreaterThan(0.97);
  });
});
