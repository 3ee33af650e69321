import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { compare } from "../../src/engine/compare";
import type { Comparison, SingleReadout } from "../../src/engine/comparison";
import { finiteComparison } from "../../src/engine/finite";
import type { Plan } from "../../src/engine/plan";
import { findProblems } from "../../src/engine/question/problems";
import { planOf, seeded, tableOf } from "./fixtures";

/** Every number inside, with its path. */
function numbersIn(value: unknown, path = ""): [string, number][] {
  if (typeof value === "number") return [[path, value]];
  if (value === null || typeof value !== "object") return [];
  return Object.entries(value).flatMap(([key, inner]) => numbersIn(inner, `${path}.${key}`));
}
const notFinite = (c: Comparison) => numbersIn(c).filter(([, value]) => !Number.isFinite(value));

const { normal } = seeded(3);
const n = 60;
const y = Array.from({ length: n }, () => normal());
const g = y.map((_, i) => "ab"[i % 2]);
const x = y.map((_, i) => [1.7e308, -1.7e308, 0, 9e307][(i * 5 + Math.floor(i / 3)) % 4]);

describe("the last guard", () => {
  const sound = compare(tableOf({ y, g, x: y.map((v) => v * v) }), planOf("y", "g", ["x"]));
  const spoil = (readout: Partial<SingleReadout>): Comparison => ({
    ...sound,
    sets: sound.sets.map((set, i) =>
      i === 0
        ? set
        : {
            ...set,
            contrasts: [{ ...set.contrasts[0], readout: { ...(set.contrasts[0].readout as SingleReadout), ...readout } }],
          },
    ),
  });

  it("hands on a sound comparison as it is", () => expect(finiteComparison(sound)).toBe(sound));

  it("an estimate that is no number becomes no readout, and the set says so", () => {
    const found = finiteComparison(spoil({ estimate: Infinity }));
    expect(notFinite(found)).toEqual([]);
    expect(found.sets[0]).toBe(sound.sets[0]);
    expect(found.sets[1].contrasts[0].readout).toEqual({ kind: "none", reason: { code: "not-finite" } });
    expect(found.findings).toContainEqual({ code: "standard-error-missing", set: 1, why: "not-finite" });
  });

  it("an error that is no number takes interval, p, shift and word with it, and leaves the estimate", () => {
    const found = finiteComparison(spoil({ standardError: NaN }));
    expect(notFinite(found)).toEqual([]);
    const { estimate } = sound.sets[1].contrasts[0].readout as SingleReadout;
    expect(found.sets[1].contrasts[0].readout).toMatchObject({
      estimate,
      standardError: null,
      interval: null,
      p: null,
      change: null,
    });
  });
});

describe("at the ends of double range an error that cannot be computed is missing, with a note", () => {
  const first = (c: Comparison) => c.sets[0].contrasts[0].readout as SingleReadout;
  it("an outcome near 1e308", () => {
    const found = compare(tableOf({ y: x, g, z: y }), planOf("y", "g", ["z"]));
    expect(notFinite(found)).toEqual([]);
    expect(first(found).standardError).toBeNull();
    expect(found.findings).toContainEqual({ code: "standard-error-missing", set: 0, why: "not-finite" });
  });
  it("an exposure near 1e308: an error below double range is not an error of 0", () => {
    const found = compare(tableOf({ y, e: x, z: y.map((v) => v * v) }), planOf("y", "e", ["z"]));
    expect(first(found)).toMatchObject({ standardError: null, interval: null });
    expect(found.findings).toContainEqual({ code: "standard-error-missing", set: 0, why: "not-finite" });
  });
  it("a covariate near 1e308 is no different from the same one near 1", () => {
    const wide = compare(tableOf({ y, g, z: x }), planOf("y", "g", ["z"]));
    const near = compare(tableOf({ y, g, z: x.map((v) => v / 2 ** 1020) }), planOf("y", "g", ["z"]));
    const [a, b] = [wide, near].map((c) => c.sets[1].contrasts[0].readout as SingleReadout);
    expect(a.estimate).toBeCloseTo(b.estimate, 12);
    expect(a.standardError!).toBeCloseTo(b.standardError!, 12);
  });
});

describe("whatever a small table holds", () => {
  const cell = fc.oneof(
    { weight: 5, arbitrary: fc.double({ min: -100, max: 100, noNaN: true }) },
    { weight: 2, arbitrary: fc.integer({ min: -3, max: 3 }) },
    fc.constantFrom(null, 1e300, -1e300, 1.7e308, 5e-324, 1e-300, 1e8),
  );
  const amounts = (rows: number) =>
    fc.oneof(
      fc.array(cell, { minLength: rows, maxLength: rows }),
      fc.array(fc.integer({ min: 0, max: 2 }), { minLength: rows, maxLength: rows }),
      fc.constantFrom(0, 3, 1e300).map((v) => Array<number>(rows).fill(v)),
    );
  const words = (rows: number) => fc.array(fc.constantFrom("a", "b", "c", "none", null), { minLength: rows, maxLength: rows });
  const tables = fc.integer({ min: 1, max: 25 }).chain((rows) =>
    fc.record({
      y: amounts(rows),
      e: fc.oneof(amounts(rows), words(rows)),
      x: amounts(rows),
      z: fc.oneof(words(rows), amounts(rows)),
      w: fc.array(fc.integer({ min: 0, max: 3 }), { minLength: rows, maxLength: rows }),
      k: words(rows),
    }),
  );
  const plans = fc
    .record({
      variance: fc.constantFrom("classical", "HC0", "HC1", "HC2", "HC3", "CR1", "CR2"),
      form: fc.constantFrom("as is", "log", "category", { polynomial: 3 }, { spline: 3 }, { spline: 5 }),
      outcomeForm: fc.constantFrom("as is", "log"),
      weights: fc.constantFrom(null, "w"),
      margin: fc.constantFrom(null, 0.5, 2, 1e300),
      sets: fc.constantFrom("each", "steps", "every"),
      average: fc.constantFrom(null, "all rows"),
      slopesAlpha: fc.constantFrom(0.05, 0.9),
    })
    .map(
      ({ form, outcomeForm, ...rest }) =>
        ({
          outcome: { column: "y", form: outcomeForm },
          exposure: { column: "e" },
          covariates: [{ column: "x", form }, { column: "z" }],
          cluster: rest.variance.startsWith("CR") ? "k" : null,
          ...rest,
        }) as Plan,
    );

  it("compare answers: no exception, no number that is none, errors from 0 up, p in [0, 1], estimates inside their intervals", () => {
    let compared = 0;
    fc.assert(
      fc.property(tables, plans, (columns, plan) => {
        const table = tableOf(columns);
        if (findProblems(table, plan).length > 0) return;
        compared++;
        const found = compare(table, plan);
        expect(notFinite(found)).toEqual([]);
        for (const { rows } of found.rows.droppedBy) expect(rows).toBeLessThanOrEqual(found.rows.read);
        for (const { readout } of found.sets.flatMap((set) => set.contrasts)) {
          if (readout.kind === "varies" || readout.kind === "none") continue;
          const { estimate, standardError, interval, p } = readout;
          if (standardError !== null) expect(standardError).toBeGreaterThanOrEqual(0);
          if (p !== null) expect(p >= 0 && p <= 1).toBe(true);
          if (interval) expect(interval[0] <= estimate && estimate <= interval[1]).toBe(true);
        }
      }),
      { seed: 7, numRuns: 1500 },
    );
    expect(compared).toBeGreaterThan(1000);
  });
});
