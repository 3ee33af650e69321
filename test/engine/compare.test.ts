import { describe, expect, it } from "vitest";
import { compare } from "../../src/engine/compare";
import { Cancelled } from "../../src/engine/cancelled";
import type { Comparison, Readout, Shift, SingleReadout } from "../../src/engine/comparison";
import { relativeError, TOLERANCE } from "../tolerances";
import { planOf, seeded, tableOf } from "./fixtures";

/** Confounded: larger x goes with g = b and with larger y; slopes parallel. */
function confounded(n = 300, slope = 0) {
  const { uniform, normal } = seeded(11);
  const x = Array.from({ length: n }, () => 50 + 10 * normal());
  const z = Array.from({ length: n }, () => (uniform() < 0.3 ? "p" : uniform() < 0.5 ? "q" : "r"));
  const g = x.map((v) => (uniform() < 1 / (1 + Math.exp(-(v - 50) / 8)) ? "b" : "a"));
  const y = x.map((v, i) => 100 + 4 * v - (g[i] === "b" ? 30 + slope * (v - 50) : 0) + (z[i] === "q" ? 5 : 0) + 12 * normal());
  return { y, g, x, z };
}

const estimateOf = (readout: Readout) => {
  if (readout.kind === "varies" || readout.kind === "none") throw new Error(readout.kind);
  return readout;
};
const first = (c: Comparison, set: number) => estimateOf(c.sets[set].contrasts[0].readout);
const everyNumber = (value: unknown): number[] =>
  typeof value === "number"
    ? [value]
    : value !== null && typeof value === "object"
      ? Object.values(value).flatMap(everyNumber)
      : [];

describe("compare", () => {
  const data = confounded();
  // a tiny alpha: chance must not turn a set of these parallel data into one that varies
  const plan = planOf("y", "g", ["x", "z"], { exposure: { column: "g", reference: "a" }, slopesAlpha: 1e-6 });

  it("fits every set on the same rows, the base set first", () => {
    const found = compare(tableOf({ ...data, x: data.x.map((v, i) => (i % 25 === 0 ? null : v)) }), plan);
    expect(found.sets.map((s) => s.adjustedFor)).toEqual([[], ["x"], ["z"], ["x", "z"]]);
    expect(found.rows).toEqual({ read: 300, common: 288, droppedBy: [{ column: "x", rows: 12 }] });
    expect(found.sets.map((s) => s.ownRows)).toEqual([300, 288, 300, 288]);
    expect(found.sets[0].contrasts[0].fromRows).not.toBeNull();
    expect(found.sets[1].contrasts[0].fromRows).toBeNull();
  });

  it("counts a row under every column it is missing in", () => {
    const holes = { ...data, x: data.x.map((v, i) => (i < 4 ? null : v)), y: data.y.map((v, i) => (i < 2 ? null : v)) };
    const { rows } = compare(tableOf(holes), plan);
    expect(rows.common).toBe(296);
    expect(rows.droppedBy).toEqual([
      { column: "y", rows: 2 },
      { column: "x", rows: 4 },
    ]);
  });

  it("parts of a shift sum to it", () => {
    const found = compare(tableOf(data), plan);
    const { shift } = first(found, 3) as SingleReadout as { shift: Shift };
    const sum = shift.parts.reduce((total, part) => total + part.estimate, 0);
    expect(relativeError(sum, shift.estimate)).toBeLessThan(TOLERANCE.sum);
  });

  it("does not depend on the order of rows or of columns", () => {
    const straight = compare(tableOf(data), plan);
    const order = data.y.map((_, i) => (i * 7919) % data.y.length);
    const turned = compare(
      tableOf({
        z: order.map((i) => data.z[i]),
        x: order.map((i) => data.x[i]),
        g: order.map((i) => data.g[i]),
        y: order.map((i) => data.y[i]),
      }),
      plan,
    );
    straight.sets.forEach((_, i) => {
      expect(relativeError(first(turned, i).estimate, first(straight, i).estimate)).toBeLessThan(TOLERANCE.reordered);
      expect(relativeError(first(turned, i).standardError!, first(straight, i).standardError!)).toBeLessThan(TOLERANCE.reordered);
    });
  });

  it("does not care where a covariate's zero lies or what its unit is", () => {
    const straight = compare(tableOf(data), plan);
    for (const change of [(v: number) => v + 1e8, (v: number) => v * 1e8, (v: number) => v * 1e-8 - 3]) {
      const moved = compare(tableOf({ ...data, x: data.x.map(change) }), plan);
      straight.sets.forEach((set, i) => {
        expect(relativeError(first(moved, i).estimate, first(straight, i).estimate)).toBeLessThan(1e-6); // adding 1e8 rounds the data themselves
        expect(moved.sets[i].slopes.map((s) => s.verdict)).toEqual(set.slopes.map((s) => s.verdict));
      });
    }
  });

  it("turns sign when the groups change places, and names follow the levels", () => {
    const turned = compare(tableOf(data), { ...plan, exposure: { column: "g", reference: "b" } });
    const straight = compare(tableOf(data), plan);
    expect(turned.sets[0].contrasts[0].contrast).toBe("a − b");
    straight.sets.forEach((_, i) =>
      expect(relativeError(-first(turned, i).estimate, first(straight, i).estimate)).toBeLessThan(TOLERANCE.reordered),
    );
  });

  it("never changes its inputs", () => {
    const table = tableOf(data);
    const before = structuredClone(table);
    const planBefore = structuredClone(plan);
    compare(table, plan);
    expect(table).toEqual(before);
    expect(plan).toEqual(planBefore);
  });

  it("stops when told to", () => {
    expect(() => compare(tableOf(data), plan, { cancelled: () => true })).toThrow(Cancelled);
  });

  it("holds always-adjusted columns in every set, the base set too", () => {
    const found = compare(tableOf(data), { ...plan, always: ["z"], sets: "each" });
    expect(found.sets.map((s) => s.adjustedFor)).toEqual([["z"], ["z", "x"]]);
    expect(first(found, 0).kind).toBe("undecided");
  });

  it("scales an amount's slope by its step", () => {
    const one = compare(tableOf(data), planOf("y", "x", []));
    const ten = compare(tableOf(data), { ...planOf("y", "x", []), exposure: { column: "x", per: 10 } });
    expect(ten.sets[0].contrasts[0].contrast).toBe("per 10 x");
    expect(relativeError(first(ten, 0).estimate, 10 * first(one, 0).estimate)).toBeLessThan(1e-14);
  });
});

describe("where slopes differ", () => {
  const data = confounded(400, 4);
  const plan = planOf("y", "g", ["x", "z"], { exposure: { column: "g", reference: "a" }, modifiers: ["x"] });
  const found = compare(tableOf(data), plan);

  it("every set that adjusts for something varies, and the base set is a plain difference in means", () => {
    expect(found.sets.map((s) => s.contrasts[0].readout.kind)).toEqual(["plain", "varies", "varies", "varies"]);
    expect(found.sets.every((s) => s.slopes[0].verdict === "differ")).toBe(true);
  });

  it("the common-slope estimate stands nowhere in the comparison", () => {
    const forced = compare(tableOf(data), { ...plan, slopesAlpha: 1e-300 });
    const hidden = [1, 2, 3].map((i) => first(forced, i).estimate);
    const shown = everyNumber(found).map((v) => v.toPrecision(4));
    for (const value of hidden) expect(shown).not.toContain(value.toPrecision(4));
  });

  it("is said by differences at three values that move as the data were made", () => {
    const { readout } = found.sets[1].contrasts[0];
    if (readout.kind !== "varies") throw new Error(readout.kind);
    expect(readout.profiles).toHaveLength(3);
    const [low, , high] = readout.profiles;
    expect((high.estimate - low.estimate) / ((high.where[0].value as number) - (low.where[0].value as number))).toBeCloseTo(
      -4,
      0,
    );
    expect(readout.regions.filter((r) => r.band === "pointwise").reduce((sum, r) => sum + r.rowsShare, 0)).toBeLessThanOrEqual(
      1 + 1e-12,
    );
  });

  it("a margin above the whole change lets the sets agree", () => {
    const wide = compare(tableOf(data), { ...plan, margin: 500 });
    expect(wide.sets[1].slopes[0].verdict).toBe("agree");
    expect(wide.sets[1].contrasts[0].readout.kind).toBe("single");
  });
});

describe("data that allow no answer give a reason or a finding, never NaN or an exception", () => {
  const numbers = (n: number) =>
    Array.from({ length: n }, (_, i) => Math.sin(i * 12.9898) * 43758.5453 - Math.floor(Math.sin(i * 12.9898) * 43758.5453));
  const groups = (n: number) => Array.from({ length: n }, (_, i) => (i % 2 ? "a" : "b"));
  const check = (columns: Record<string, (number | string | null)[]>, plan = planOf("y", "g", ["x"])): Comparison => {
    const found = compare(tableOf(columns), plan);
    for (const value of everyNumber(found)) expect(Number.isFinite(value)).toBe(true);
    return found;
  };
  const reason = (c: Comparison, set = 0) => {
    const { readout } = c.sets[set].contrasts[0];
    return readout.kind === "none" ? readout.reason.code : readout.kind;
  };
  it("constant outcome", () =>
    expect(reason(check({ y: Array(20).fill(3), g: groups(20), x: numbers(20) }))).toBe("outcome-constant"));
  it("one group", () =>
    expect(reason(check({ y: numbers(20), g: Array(20).fill("a"), x: numbers(20) }))).toBe("exposure-constant"));
  it("no complete row", () => expect(reason(check({ y: numbers(20), g: groups(20), x: Array(20).fill(null) }))).toBe("no-rows"));
  it("a group without complete rows", () => {
    const g = groups(30).map((v, i) => (i < 3 ? "c" : v));
    const found = check(
      { y: numbers(30).map((v, i) => (i < 3 ? null : v)) as (number | null)[], g, x: numbers(30) },
      { ...planOf("y", "g", ["x"]), exposure: { column: "g", reference: "a" } },
    );
    expect(found.sets[0].contrasts.map((c) => c.readout.kind)).toEqual(["undecided", "none"]);
  });
  it("a covariate that tells the group", () => {
    const g = groups(40);
    const found = check({ y: numbers(40), g, x: g.map((v) => (v === "a" ? 1 : 0)) }, planOf("y", "g", ["x"], { modifiers: [] }));
    expect(reason(found, 1)).toBe("told-by-covariates");
    expect(found.sets[1].contrasts[0].readout).toMatchObject({ reason: { columns: ["x"] } });
  });
  it("covariates that tell a combination of several groups", () => {
    const g = Array.from({ length: 60 }, (_, i) => "abc"[i % 3]);
    const found = check(
      { y: numbers(60), g, x: g.map((v) => (v === "a" ? 0 : 1)) },
      { ...planOf("y", "g", ["x"], { modifiers: [] }), exposure: { column: "g", reference: "a" } },
    );
    expect(found.sets[1].contrasts.map((c) => c.readout.kind)).toEqual(["none", "none"]);
  });
  it("a covariate that others determine is set aside by name", () => {
    const x = numbers(50);
    const w = numbers(80).slice(30);
    const found = check(
      { y: numbers(70).slice(20), g: groups(50), x, w, s: x.map((v, i) => 2 * v - 3 * w[i] + 1) },
      planOf("y", "g", ["x", "w", "s"], { sets: [["x", "w", "s"]] }),
    );
    expect(found.sets[1].setAside).toEqual([{ column: "s", combinationOf: ["x", "w"] }]);
    expect(found.findings.some((f) => f.code === "set-aside")).toBe(true);
  });
  it("fewer rows than coefficients", () => {
    const found = check({ y: [1, 2, 4], g: ["a", "b", "b"], x: [1, 5, 2], w: [2, 1, 1] }, planOf("y", "g", ["x", "w"]));
    expect(reason(found, 3)).toBe("too-few-rows");
  });
  it("a group with one row", () => {
    const g = groups(30).map((v, i) => (i === 0 ? "c" : v));
    const found = check({ y: numbers(30), g, x: numbers(60).slice(30) });
    expect(found.findings).toContainEqual({ code: "small-group", level: "c", rows: 1 });
    expect(found.findings.some((f) => f.code === "leverage-one" && f.fallback === "HC1")).toBe(true);
  });
  it("an exact fit has error 0, the point as its interval, and no p", () => {
    const x = numbers(40);
    const g = groups(40);
    const found = check({ y: x.map((v, i) => 3 * v + (g[i] === "b" ? 2 : 0)), g, x });
    expect(found.findings.some((f) => f.code === "exact-fit")).toBe(true);
    expect(first(found, 1)).toMatchObject({ standardError: 0, p: null });
    expect(first(found, 1).estimate).toBeCloseTo(2, 10);
  });
  it("values near 1e300 and near 1e-300", () => {
    check({ y: numbers(40).map((v) => v * 1e300), g: groups(40), x: numbers(40).map((v) => v * -1e300) });
    check({ y: numbers(40).map((v) => v * 1e-300), g: groups(40), x: numbers(40).map((v) => v * 1e-300) });
  });
  it("one cluster, clusters of one row", () => {
    const columns = { y: numbers(30), g: groups(30), x: numbers(60).slice(30) };
    const one = check({ ...columns, c: Array(30).fill("k") }, planOf("y", "g", ["x"], { cluster: "c" }));
    expect(one.findings).toContainEqual({ code: "standard-error-missing", set: 0, why: "one-cluster" });
    expect(first(one, 0).interval).toBeNull();
    check({ ...columns, c: columns.y.map((_, i) => `k${i}`) }, planOf("y", "g", ["x"], { cluster: "c" }));
  });
  it("weights of 0 and missing weights cost rows under their column", () => {
    const w = numbers(40).map((_, i) => (i < 3 ? 0 : i < 5 ? null : 1 + (i % 3)));
    const found = check(
      { y: numbers(40), g: groups(40), x: numbers(80).slice(40), w },
      planOf("y", "g", ["x"], { weights: "w" }),
    );
    expect(found.rows.droppedBy).toEqual([{ column: "w", rows: 5 }]);
  });
  it("groups that share no range of a modifier", () => {
    const g = groups(40);
    const found = check({ y: numbers(40), g, x: g.map((v, i) => (v === "a" ? 100 + i : i)) });
    expect(found.findings.some((f) => f.code === "no-shared-range")).toBe(true);
    expect(found.sets[1].slopes[0].verdict).toBe("cannot tell");
  });
});
