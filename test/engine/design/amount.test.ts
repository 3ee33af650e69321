import { readFileSync } from "node:fs";
import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { readTable } from "../../../src/data/read";
import { compare } from "../../../src/engine/compare";
import { amountBasis, centring } from "../../../src/engine/design/amount";
import { quantile } from "../../../src/engine/design/quantile";
import type { Form } from "../../../src/engine/plan";
import { relativeError } from "../../tolerances";

interface Expected {
  form: Exclude<Form, "category">;
  estimate: string[];
  error: string[];
}
const here = new URL(".", import.meta.url).pathname;
const { forms } = JSON.parse(readFileSync(`${here}../shift/expected.json`, "utf8")) as { forms: Expected[] };

describe("a covariate's form, fitted centred and scaled, is told in raw units as R tells it (shift/make-shift.R)", () => {
  const read = readTable(readFileSync(`${here}../../reference/data/birthwt.csv`), { file: "birthwt.csv" });
  if (!read.ok) throw new Error(read.problem.code);
  for (const wanted of forms) {
    it(`birthwt, lwt as ${JSON.stringify(wanted.form)}`, () => {
      const found = compare(read.table, {
        outcome: { column: "bwt" },
        exposure: { column: "smoke" },
        covariates: [{ column: "lwt", form: wanted.form }],
        modifiers: [],
        variance: "HC3",
      });
      const { model } = found.sets[1];
      expect(model).toHaveLength(wanted.estimate.length);
      model.forEach((row, k) => {
        // R fits raw powers and cubes: its own digits are lost to their collinearity, not ours
        expect(relativeError(row.estimate, Number(wanted.estimate[k]))).toBeLessThan(1e-8);
        expect(relativeError(row.standardError!, Number(wanted.error[k]))).toBeLessThan(1e-8);
      });
    });
  }
});

describe("a basis", () => {
  const some = fc.array(fc.double({ min: -1e6, max: 1e6, noNaN: true }), { minLength: 8, maxLength: 40 });
  const close = (a: number, b: number, scale: number) => Math.abs(a - b) <= 1e-9 * scale;

  it("raw undoes centring and scaling: any coefficients give the same curve in raw powers", () => {
    fc.assert(
      fc.property(some, fc.integer({ min: 1, max: 3 }), fc.double({ min: -1, max: 1, noNaN: true }), (list, degree, b) => {
        const values = Float64Array.from(list);
        const { size, at, raw } = amountBasis("x", degree === 1 ? "as is" : { polynomial: degree }, values);
        const coefficients = Array.from({ length: size }, (_, k) => b + k);
        const x = values[0];
        let designed = 0;
        at(x).forEach((v, k) => (designed += v * coefficients[k]));
        let told = 0;
        let size1 = 1;
        raw.terms.forEach((_, t) => {
          for (let k = 0; k < size; k++) {
            const piece = raw.map[t * size + k] * coefficients[k] * x ** (t + 1);
            told += piece;
            size1 = Math.max(size1, Math.abs(piece));
          }
        });
        for (let k = 0; k < size; k++) {
          told += raw.intercept[k] * coefficients[k];
          size1 = Math.max(size1, Math.abs(raw.intercept[k] * coefficients[k]));
        }
        expect(close(designed, told, size1)).toBe(true);
      }),
      { seed: 5 },
    );
  });

  it("polynomial columns are orthogonal over the rows", () => {
    const values = Float64Array.from({ length: 50 }, (_, i) => 1e6 + i * i);
    const basis = amountBasis("x", { polynomial: 3 }, values);
    const columns = [0, 1, 2].map((k) => Array.from(values, (v) => basis.at(v)[k]));
    for (const [a, b] of [
      [0, 1],
      [0, 2],
      [1, 2],
    ]) {
      const dot = columns[a].reduce((sum, v, i) => sum + v * columns[b][i], 0);
      expect(Math.abs(dot) / (Math.hypot(...columns[a]) * Math.hypot(...columns[b]))).toBeLessThan(1e-12);
    }
  });

  it("a spline is straight beyond its outer knots", () => {
    const values = Float64Array.from({ length: 101 }, (_, i) => i);
    const { at } = amountBasis("x", { spline: 4 }, values);
    for (const [a, b, c] of [
      [96, 98, 100],
      [0, 2, 4],
    ])
      at(b).forEach((v, k) => expect(v).toBeCloseTo((at(a)[k] + at(c)[k]) / 2, 9));
  });

  it("a spline whose knots coincide keeps the columns it can have", () => {
    const values = Float64Array.from({ length: 40 }, (_, i) => (i === 0 ? 1 : 0)); // every knot is 0
    const { size, at } = amountBasis("x", { spline: 5 }, values);
    expect(size).toBe(1);
    expect(at(1).every(Number.isFinite)).toBe(true);
  });

  it("centring divides by a power of two, and survives values at the end of double range", () => {
    fc.assert(
      fc.property(some, (list) => {
        expect(Number.isInteger(Math.log2(centring(Float64Array.from(list)).scale))).toBe(true);
      }),
      { seed: 5 },
    );
    const { centre, scale } = centring(Float64Array.of(1.7e308, -1.7e308, 1.7e308));
    expect(Number.isFinite(centre) && Number.isFinite(scale) && scale > 0).toBe(true);
  });
});

describe("a quantile of type 7", () => {
  it("is R's: quantile(c(1, 2, 4, 8, 16), c(0, .1, .25, .5, .9, 1), type = 7), R 4.2.2", () => {
    const sorted = [1, 2, 4, 8, 16];
    expect([0, 0.1, 0.25, 0.5, 0.9, 1].map((p) => quantile(sorted, p))).toEqual([1, 1.4, 2, 4, 12.8, 16]);
  });
});
