import fc from "fast-check";
import { describe, expect, test } from "vitest";
import { checkPlan } from "../../src/plan/check";
import { suggestPlan } from "../../src/plan/suggest";
import type { Stated } from "../../src/plan/suggest";
import type { Table } from "../../src/engine/table";
import { csvOf, flats, tableOf } from "./tables";

/** "outcome by exposure: covariates", or the problem's code. */
function said(table: Table, stated?: Stated): string {
  const suggested = suggestPlan(table, stated);
  if ("problem" in suggested) return suggested.problem.code;
  const { outcome, exposure, covariates = [] } = suggested.plan;
  return `${outcome.column} by ${exposure.column}: ${covariates.map(({ column }) => column).join(" ")}`;
}
const table = (columns: Parameters<typeof csvOf>[1], rows = 12) => tableOf(csvOf(rows, columns));
const amount = (seed: number) => (i: number) => (i * 7 + seed) % 12;

describe("a first question for a bare CSV", () => {
  test("is the first column of two to six groups, the last amount, and at most four others", () => {
    expect(said(flats)).toBe("kwh by retrofit: floor_m2 tenure block");
    const wide = table({
      a: amount(1),
      g: (i) => "xyz"[i % 3],
      b: amount(2),
      c: amount(3),
      d: amount(4),
      e: amount(5),
      y: amount(6),
    });
    expect(said(wide)).toBe("y by g: a b c d");
  });
  test("takes numbers of two values for groups", () => {
    expect(said(table({ treated: (i) => i % 2, age: amount(1), y: amount(5) }))).toBe("y by treated: age");
  });
  test("passes over identifiers, dates, constants, row numbers and words of over 20 levels", () => {
    const columns = {
      "": (i: number) => i + 1,
      site_id: (i: number) => "ab"[i % 2],
      patientId: (i: number) => (i * 37) % 1000,
      g: (i: number) => "uv"[i % 2],
      constant: () => 3,
      day: (i: number) => `2024-01-${10 + (i % 20)}`,
      town: (i: number) => `town ${i % 21}`,
      street: (i: number) => `street ${i % 20}`,
      y: amount(5),
      key: (i: number) => i * i,
    };
    expect(said(table(columns, 84))).toBe("y by g: street");
  });
  test("passes over a column with more than half of its cells missing", () => {
    const columns = {
      g: (i: number) => "uv"[i % 2],
      gaps: (i: number) => (i < 5 ? i : ""),
      half: (i: number) => (i < 6 ? i : ""),
      y: amount(5),
    };
    expect(said(table({ ...columns, z: amount(2), empty: () => "" }))).toBe("z by g: y");
    expect(said(table({ ...columns, half: (i) => (i < 6 ? i * i : "") }))).toBe("y by g: half");
  });
  test("without groups the first amount is the exposure", () => {
    expect(said(table({ dose: amount(1), age: amount(2), y: amount(3) }))).toBe("y by dose: age");
  });
  test("without amounts the last two-valued column is the outcome", () => {
    expect(said(table({ arm: (i) => "uv"[i % 2], site: (i) => "abc"[i % 3], well: (i) => ["no", "yes"][(i >> 1) % 2] }))).toBe(
      "well by arm: site",
    );
  });
  test("says what is missing where no question can be made", () => {
    expect(said(table({ g: (i) => "abc"[i % 3], h: (i) => "abc"[(i >> 1) % 3] }))).toBe("no-outcome");
    expect(said(table({ y: amount(3) }))).toBe("no-exposure");
    expect(said(table({ word: (i) => `w${i}` }))).toBe("no-outcome");
    expect(suggestPlan(table({ y: amount(3) }))).toEqual({ problem: { code: "no-exposure", file: "flats.csv" } });
  });
  test("is made around what a person has said", () => {
    expect(said(flats, { outcome: "floor_m2" })).toBe("floor_m2 by retrofit: tenure kwh block");
    expect(said(flats, { exposure: "tenure" })).toBe("kwh by tenure: retrofit floor_m2 block");
    expect(said(flats, { outcome: "floor_m2", exposure: "kwh" })).toBe("floor_m2 by kwh: retrofit tenure block");
    expect(said(flats, { covariates: ["tenure"] })).toBe("kwh by retrofit: tenure");
    expect(said(flats, { covariates: [] })).toBe("kwh by retrofit: ");
    expect(said(flats, { taken: ["block", "retrofit"] })).toBe("kwh by tenure: floor_m2");
    expect(said(flats, { outcome: "nowhere" })).toBe("nowhere by retrofit: floor_m2 tenure kwh block");
  });
  test("whatever the columns, the question can be compared and no column stands in it twice", () => {
    const kinds = [
      amount(1),
      amount(4),
      (i: number) => "ab"[i % 2],
      (i: number) => "abcdefgh"[i % 8],
      (i: number) => i % 2,
      () => 1,
      () => "",
      (i: number) => i,
      (i: number) => `2024-01-1${i % 9}`,
    ];
    let questions = 0;
    fc.assert(
      fc.property(fc.array(fc.constantFrom(...kinds), { minLength: 2, maxLength: 8 }), (columns) => {
        const made = table(Object.fromEntries(columns.map((column, i) => [`c${i}`, column])));
        const suggested = suggestPlan(made);
        if ("problem" in suggested) return;
        questions++;
        const { outcome, exposure, covariates = [] } = suggested.plan;
        const all = [outcome, exposure, ...covariates].map(({ column }) => column);
        expect(new Set(all).size).toBe(all.length);
        expect(covariates.length).toBeLessThanOrEqual(4);
        expect(checkPlan(made, suggested.plan)).toEqual([]);
      }),
      { seed: 5, numRuns: 200 },
    );
    expect(questions).toBeGreaterThan(100);
  });
});
