import { describe, expect, it } from "vitest";
import { compare } from "../../src/engine/compare";
import type { Comparison } from "../../src/engine/comparison";
import type { Plan } from "../../src/engine/plan";
import type { Table } from "../../src/engine/table";
import { relativeError, TOLERANCE } from "../tolerances";
import { planOf, seeded, tableOf } from "./fixtures";

function table(rows: number, covariates: number): { table: Table; names: string[] } {
  const { normal } = seeded(rows + covariates);
  const draw = () => Array.from({ length: rows }, normal);
  const shared = draw();
  const names = Array.from({ length: covariates }, (_, j) => `x${j}`);
  const x = names.map(() => draw().map((v, i) => v + 0.5 * shared[i]));
  const g = shared.map((v, i) => (v + x[0][i] > 0 ? "new" : "old"));
  const y = draw().map((v, i) => v + x[0][i] - 0.5 * x[covariates - 1][i] + (g[i] === "new" ? 1 : 0));
  return { table: tableOf({ y, g, ...Object.fromEntries(names.map((name, j) => [name, x[j]])) }), names };
}

/** Every number of a set, as a comparison that lists that set alone finds it. */
function expectAlone(whole: Comparison, alone: Comparison, set: number): void {
  const [found, expected] = [whole.sets[set], alone.sets[1] ?? alone.sets[0]];
  expect(found.adjustedFor).toEqual(expected.adjustedFor);
  expect(found.slopes.map((s) => s.verdict)).toEqual(expected.slopes.map((s) => s.verdict));
  found.slopes.forEach((s, i) => {
    expect(relativeError(s.statistic!, expected.slopes[i].statistic!)).toBeLessThan(TOLERANCE.reordered);
    expect(relativeError(s.pHolm!, expected.slopes[i].pHolm!)).toBeLessThan(TOLERANCE.inference);
  });
  const [a, b] = [found.contrasts[0].readout, expected.contrasts[0].readout];
  if (a.kind === "varies" && b.kind === "varies") {
    a.profiles.forEach((profile, i) => {
      const size = b.profiles[i].standardError!;
      expect(relativeError(profile.estimate, b.profiles[i].estimate, size)).toBeLessThan(TOLERANCE.coefficient);
      expect(relativeError(profile.standardError!, size)).toBeLessThan(TOLERANCE.coefficient);
    });
    return;
  }
  if (!("estimate" in a) || !("estimate" in b)) throw new Error(`${a.kind}, ${b.kind}`);
  expect(relativeError(a.estimate, b.estimate)).toBeLessThan(TOLERANCE.coefficient);
  expect(relativeError(a.standardError!, b.standardError!)).toBeLessThan(TOLERANCE.coefficient);
  if (!("shift" in a && "shift" in b) || !b.shift) return;
  expect(relativeError(a.shift!.estimate, b.shift.estimate, b.estimate)).toBeLessThan(TOLERANCE.coefficient);
  expect(relativeError(a.shift!.standardError!, b.shift.standardError!)).toBeLessThan(TOLERANCE.coefficient);
}

describe("a long list of sets", () => {
  it("of every combination of twelve covariates gives each set what it gets alone", () => {
    const { table: data, names } = table(700, 12);
    const plan: Plan = planOf("y", "g", names, { sets: "every", modifiers: ["x1", "x7"] });
    const whole = compare(data, plan);
    expect(whole.sets.length).toBe(4096);
    for (const set of [0, 1, 12, 77, 1500, 3000, 4095]) {
      expectAlone(whole, compare(data, { ...plan, sets: [[...whole.sets[set].adjustedFor]] }), set);
    }
  });

  it("of sixty covariates, as a list of lists, gives each set what it gets alone", () => {
    const { table: data, names } = table(400, 60);
    const lists = names.map((_, j) => names.slice(0, j + 1));
    const plan = planOf("y", "g", names, { sets: lists, modifiers: ["x2"] });
    const whole = compare(data, plan);
    expect(whole.sets.length).toBe(61);
    for (const set of [1, 30, 60]) expectAlone(whole, compare(data, { ...plan, sets: [lists[set - 1]] }), set);
  });
});
