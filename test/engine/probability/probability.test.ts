// Expected values: R's pt, qt, pf, qf (test/reference/make-probability.R).
import { readFileSync } from "node:fs";
import { describe, expect, it } from "vitest";
import { fQuantileUpper, fUpper, tCdfUpper, tCritical, tQuantile, tTwoSided } from "../../../src/engine/probability";
import { relativeError, TOLERANCE } from "../../tolerances";

const file = new URL("../../reference/expected/probability.json", import.meta.url).pathname;
const { values } = JSON.parse(readFileSync(file, "utf8")) as { values: [string, string, string, string, string][] };

describe("tails and quantiles agree with R", () => {
  const functions: Record<string, (x: number, df1: number, df2: number) => number> = {
    t: (x, df) => tTwoSided(x, df),
    tq: (p, df) => tQuantile(p, df),
    f: fUpper,
    fq: fQuantileUpper,
  };
  for (const kind of Object.keys(functions)) {
    it(kind, () => {
      for (const [which, x, df1, df2, expected] of values.filter((v) => v[0] === kind)) {
        const found = functions[which](Number(x), Number(df1), Number(df2));
        expect(relativeError(found, Number(expected)), `${which} ${x} ${df1} ${df2}: ${found} ${expected}`).toBeLessThan(
          TOLERANCE.inference,
        );
      }
    });
  }
});

describe("the far tail", () => {
  it("t = 30 on 100 degrees of freedom leaves 8.4e-52 on both sides together", () => {
    expect(tTwoSided(30, 100).toExponential(1)).toBe("8.4e-52");
    expect(tCdfUpper(30, 100)).toBe(tTwoSided(30, 100) / 2);
  });
  it("does not collapse to 0 where a double can still say it", () => {
    expect(tTwoSided(40, 1000)).toBeGreaterThan(0);
    expect(fUpper(1000, 3, 500)).toBeGreaterThan(0);
  });
  it("an interval's factor inverts the tail", () => {
    for (const df of [0.9, 3, 40, 1e5]) expect(relativeError(tTwoSided(tCritical(0.9, df), df), 0.1)).toBeLessThan(1e-12);
  });
});
