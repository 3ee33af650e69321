// NIST Statistical Reference Datasets, linear least squares (StRD). Longley's data come from R 4.2.2 (datasets::longley, in thousands as NIST
// has them); Wampler 1–5 are polynomials of 0 … 20 by construction, the errors of 3–5 and the digits of all certified values from memory and
// confirmed here by solving the normal equations exactly, in rational arithmetic on the doubles.
import { describe, expect, it } from "vitest";
import { factorise } from "../../../src/engine/linear/factorise";
import { fitColumns } from "../../../src/engine/linear/fit";
import { refine } from "../../../src/engine/linear/refine";
import type { Frame } from "../../../src/engine/linear/types";
import { exactLeastSquares } from "./exact";
import { FILIP_SHAPE, LONGLEY, wampler } from "./nist";

function fit(columns: readonly Float64Array[], outcome: Float64Array): Float64Array {
  const frame: Frame = { n: outcome.length, columns, outcome, weights: null, clusters: null };
  const factor = factorise(frame);
  const found = refine(
    frame,
    factor,
    fitColumns(
      factor,
      columns.map((_, i) => i),
    ),
  );
  expect(found.setAside).toEqual([]);
  return found.coefficients;
}

/** Correct digits: −log₁₀ of the largest relative error, 16 where there is none. */
function digits(found: Float64Array, exact: readonly number[]): number {
  const worst = Math.max(
    ...exact.map((value, i) => (value === 0 ? Math.abs(found[i]) : Math.abs(found[i] - value) / Math.abs(value))),
  );
  return worst === 0 ? 16 : -Math.log10(worst);
}

describe("the kernel on NIST's sets, against exact rational solutions on the same doubles", () => {
  it("Longley: 12 digits", () => {
    expect(digits(fit(LONGLEY.columns, LONGLEY.outcome), exactLeastSquares(LONGLEY.columns, LONGLEY.outcome))).toBeGreaterThan(
      12,
    );
  });
  it("Longley's exact solution is NIST's certified one", () => {
    // certified values, from memory
    const certified = [
      -3482258.63459582, 15.0618722713733, -0.035819179292591, -2.02022980381683, -1.03322686717359, -0.0511041056535807,
      1829.15146461355,
    ];
    exactLeastSquares(LONGLEY.columns, LONGLEY.outcome).forEach((value, i) =>
      expect(Math.abs(value / certified[i] - 1)).toBeLessThan(1e-13),
    );
  });
  for (const [number, wanted] of [
    [1, 12],
    [2, 12],
    [3, 12],
    [4, 9],
    [5, 9],
  ] as const) {
    it(`Wampler ${number}: ${wanted} digits`, () => {
      const { columns, outcome, certified } = wampler(number);
      const exact = exactLeastSquares(columns, outcome);
      exact.forEach((value, i) => expect(Math.abs(value - certified[i])).toBeLessThan(1e-13)); // 0.1 and its powers are no doubles
      expect(digits(fit(columns, outcome), exact)).toBeGreaterThan(wanted);
    });
  }
  it("a tenth-degree polynomial on Filip's range keeps all its columns: 7 digits", () => {
    const { columns, outcome } = FILIP_SHAPE;
    expect(digits(fit(columns, outcome), exactLeastSquares(columns, outcome))).toBeGreaterThan(7);
  });
});

describe("dependences", () => {
  const x = Float64Array.from({ length: 30 }, (_, i) => Math.sin(i) * 10);
  const w = Float64Array.from({ length: 30 }, (_, i) => Math.cos(3 * i) + i);
  const one = new Float64Array(30).fill(1);
  const y = Float64Array.from({ length: 30 }, (_, i) => i % 7);
  const frame = (columns: Float64Array[]): Frame => ({ n: 30, columns, outcome: y, weights: null, clusters: null });
  it("an exact one is named with the columns it is made of", () => {
    const sum = x.map((v, i) => 3 * v - w[i] / 7 + 2);
    const found = fitColumns(factorise(frame([one, x, w, sum])), [0, 1, 2, 3]);
    expect(found.setAside).toEqual([{ column: 3, combinationOf: [1, 2] }]);
    expect(found.columns).toEqual([0, 1, 2]);
  });
  it("a constant column is set aside with none", () => {
    expect(fitColumns(factorise(frame([one, x.map(() => 5), w])), [0, 1, 2]).setAside).toEqual([
      { column: 1, combinationOf: [] },
    ]);
  });
  it("one that doubles still resolve is kept", () => {
    const near = x.map((v, i) => v + 1e-9 * w[i]);
    expect(fitColumns(factorise(frame([one, x, near])), [0, 1, 2]).setAside).toEqual([]);
  });
  it("block borders do not change what is found: 700 rows against exact arithmetic", () => {
    const n = 700;
    const columns = [
      new Float64Array(n).fill(1),
      Float64Array.from({ length: n }, (_, i) => ((i * 37) % 101) / 8),
      Float64Array.from({ length: n }, (_, i) => ((i * 53) % 97) / 4),
    ];
    const outcome = Float64Array.from({ length: n }, (_, i) => ((i * 71) % 89) / 2);
    expect(digits(fit(columns, outcome), exactLeastSquares(columns, outcome))).toBeGreaterThan(13);
  });
});
