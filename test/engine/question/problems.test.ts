import { describe, expect, it } from "vitest";
import type { Plan } from "../../../src/engine/plan";
import { findProblems, GROUP_LIMIT, LEVEL_LIMIT } from "../../../src/engine/question/problems";
import { planOf, tableOf } from "../fixtures";

const n = 300;
const cells = (make: (i: number) => number | string) => Array.from({ length: n }, (_, i) => make(i));
const table = tableOf({
  y: cells((i) => i / 7),
  g: cells((i) => ["none", "full"][i % 2]),
  x: cells((i) => i),
  z: cells((i) => ["p", "q", "r"][i % 3]),
  id: cells((i) => `h${i}`),
  w: cells((i) => (i === 4 ? -1 : 1)),
});
const problems = (plan: Plan) => findProblems(table, plan);
const codes = (plan: Plan) => problems(plan).map((p) => p.code);

describe("a question that cannot be answered says why", () => {
  it("nothing is wrong with a sound one", () => expect(problems(planOf("y", "g", ["x", "z"]))).toEqual([]));

  it("every unknown column, with the place that names it, before anything else", () => {
    expect(problems(planOf("yy", "g", ["x"], { cluster: "block", report: ["q"] }))).toMatchObject([
      { code: "unknown-column", column: "yy", role: "outcome" },
      { code: "unknown-column", column: "q", role: "report" },
      { code: "unknown-column", column: "block", role: "cluster" },
    ]);
  });

  it("a column in two places", () => {
    expect(problems(planOf("y", "g", ["g"]))).toEqual([{ code: "named-twice", column: "g", roles: ["exposure", "covariate"] }]);
    expect(codes(planOf("y", "y"))).toEqual(["named-twice"]);
    expect(codes(planOf("y", "g", ["x", "x"]))).toEqual(["named-twice"]);
    expect(codes(planOf("y", "g", [], { modifiers: ["y"] }))).toEqual(["named-twice"]);
    expect(codes(planOf("y", "g", ["x"], { cluster: "y" }))).toEqual(["named-twice"]);
    // clusters may be what is held fixed
    expect(codes(planOf("y", "g", ["z"], { cluster: "z" }))).toEqual([]);
  });

  it("an outcome of words, unless there are two and they need no logarithm", () => {
    expect(problems(planOf("z", "g"))).toEqual([{ code: "not-numeric", column: "z", role: "outcome", example: "p" }]);
    expect(codes(planOf("g", "z"))).toEqual([]);
    expect(codes({ ...planOf("g", "z"), outcome: { column: "g", form: "log" } })).toEqual(["not-numeric"]);
    expect(codes({ ...planOf("g", "z"), outcome: { column: "g", kind: "count" } })).toEqual(["not-numeric"]);
  });

  it("an outcome said to be binary that has more than two values", () => {
    expect(problems({ ...planOf("y", "g"), outcome: { column: "y", kind: "binary" } })).toEqual([
      { code: "too-many-levels", column: "y", role: "outcome", levels: n, limit: 2 },
    ]);
  });

  it("an amount of words, an unknown reference or group to average over", () => {
    expect(codes({ ...planOf("y", "z"), exposure: { column: "z", kind: "amount" } })).toEqual(["not-numeric"]);
    expect(codes({ ...planOf("y", "z"), exposure: { column: "z", reference: "s" } })).toEqual(["unknown-level"]);
    expect(codes(planOf("y", "z", [], { average: "s" }))).toEqual(["unknown-level"]);
    expect(codes(planOf("y", "z", [], { average: "all rows" }))).toEqual([]);
    expect(codes({ ...planOf("y", "g"), covariates: [{ column: "z", reference: "s" }] })).toEqual(["unknown-level"]);
  });

  it("more levels than anyone reads", () => {
    expect(problems(planOf("y", "id"))).toMatchObject([{ code: "too-many-levels", role: "exposure", limit: GROUP_LIMIT }]);
    expect(problems(planOf("y", "g", ["id"]))).toMatchObject([
      { code: "too-many-levels", role: "covariate", limit: LEVEL_LIMIT },
    ]);
  });

  it("a numeric form of words", () => {
    for (const form of ["log", "as is", { polynomial: 2 }, { spline: 4 }] as const)
      expect(codes({ ...planOf("y", "g"), covariates: [{ column: "z", form }] })).toEqual(["not-numeric"]);
  });

  it("a negative weight, by its line; weights of words; clustered errors without clusters", () => {
    expect(problems(planOf("y", "g", [], { weights: "w" }))).toEqual([{ code: "negative-weight", column: "w", line: 6 }]);
    expect(codes(planOf("y", "g", [], { weights: "z" }))).toEqual(["not-numeric"]);
    for (const variance of ["CR1", "CR2"] as const)
      expect(problems(planOf("y", "g", [], { variance }))).toEqual([{ code: "cluster-needed", variance }]);
  });

  it("a reported set that is not listed; more sets than can be read", () => {
    expect(codes(planOf("y", "g", ["x", "z"], { sets: [["x"]], report: ["x", "z"] }))).toEqual(["unknown-set"]);
    const names = Array.from({ length: 13 }, (_, i) => `v${i}`);
    const wide = tableOf({ y: [1, 2], g: ["a", "b"], ...Object.fromEntries(names.map((name) => [name, [1, 2]])) });
    expect(findProblems(wide, planOf("y", "g", names, { sets: "every" }))).toEqual([
      { code: "too-many-sets", sets: 8192, limit: 4096 },
    ]);
    expect(findProblems(wide, planOf("y", "g", names.slice(1), { sets: "every" }))).toEqual([]);
  });

  it("rows kept by a range of words, or by a level there is not", () => {
    expect(problems(planOf("y", "g", [], { keep: [{ column: "z", from: 3 }] }))).toEqual([
      { code: "not-numeric", column: "z", role: "keep", example: "p" },
    ]);
    expect(problems(planOf("y", "g", [], { keep: [{ column: "z", only: ["p", "pp"] }] }))).toMatchObject([
      { code: "unknown-level", column: "z", level: "pp" },
    ]);
    // what should be kept out may be gone already
    expect(problems(planOf("y", "g", [], { keep: [{ column: "z", not: ["pilot"] }] }))).toEqual([]);
  });
});
