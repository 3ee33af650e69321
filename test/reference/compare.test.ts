// Whole comparisons, file to readout, against R: test/reference/make-compare.R says how each figure was made,
// expected/compare.json holds the versions of R, sandwich and clubSandwich.
import { readFileSync } from "node:fs";
import { describe, expect, it } from "vitest";
import { readTable } from "../../src/data/read";
import { compare } from "../../src/engine/compare";
import type { Comparison, SetResult } from "../../src/engine/comparison";
import type { Plan } from "../../src/engine/plan";
import { relativeError, TOLERANCE } from "../tolerances";

interface Wald {
  statistic: string;
  df1: string;
  df2: string;
  p: string;
}
interface ExpectedContrast {
  contrast: string;
  estimate: string;
  standardError: string;
  df: string;
  low: string;
  high: string;
  p: string;
  shift?: string;
  shiftError?: string;
  parts?: { covariate: string; estimate: string }[];
}
interface ExpectedSet {
  adjustedFor: string[] | string;
  rows: number;
  residualDf: number;
  contrasts: ExpectedContrast[];
  joint: Wald | null;
  slopes: (Wald & { modifier: string; pHolm: string })[];
  model: { names: string[]; estimate: string[]; standardError: string[] };
}
interface Case {
  name: string;
  file: string;
  plan: Plan;
  sets: ExpectedSet[];
}

const here = new URL(".", import.meta.url).pathname;
const { cases } = JSON.parse(readFileSync(`${here}expected/compare.json`, "utf8")) as { cases: Case[] };

function run({ file, plan, sets }: Case): Comparison {
  const read = readTable(readFileSync(`${here}data/${file}`), { file });
  if (!read.ok) throw new Error(read.problem.code);
  // A tiny slopesAlpha keeps every set's common-slope number, so that all of them can be held against R.
  const lists = sets.map((set) => [set.adjustedFor].flat());
  return compare(read.table, { ...plan, sets: lists, slopesAlpha: 1e-300 });
}

const close = (found: number | null, expected: string, tolerance: number, what: string, scale = 0): void => {
  expect(found, what).not.toBeNull();
  expect(relativeError(found!, Number(expected), scale), `${what}: ${found} against ${expected}`).toBeLessThan(tolerance);
};

function checkWald(
  found: { statistic: number | null; df: readonly [number, number] | null; p: number | null },
  expected: Wald,
  what: string,
): void {
  close(found.statistic, expected.statistic, TOLERANCE.inference, `${what} statistic`, 1e-6);
  close(found.df![0], expected.df1, TOLERANCE.inference, `${what} df1`);
  close(found.df![1], expected.df2, TOLERANCE.inference, `${what} df2`);
  close(found.p, expected.p, TOLERANCE.inference, `${what} p`);
}

function checkSet(found: SetResult, expected: ExpectedSet): void {
  expect(found.residualDf).toBe(expected.residualDf);
  expected.contrasts.forEach((wanted, i) => {
    const { contrast, readout } = found.contrasts[i];
    expect(contrast).toBe(wanted.contrast);
    if (readout.kind !== "single" && readout.kind !== "undecided") throw new Error(`${contrast} is ${readout.kind}`);
    const scale = Number(wanted.standardError);
    close(readout.estimate, wanted.estimate, TOLERANCE.coefficient, "estimate", scale);
    close(readout.standardError, wanted.standardError, TOLERANCE.coefficient, "standard error");
    close(readout.df, wanted.df, TOLERANCE.inference, "df");
    close(readout.interval![0], wanted.low, TOLERANCE.inference, "low", scale);
    close(readout.interval![1], wanted.high, TOLERANCE.inference, "high", scale);
    close(readout.p, wanted.p, TOLERANCE.inference, "p");
    if (wanted.shift === undefined) return;
    close(readout.shift!.estimate, wanted.shift, TOLERANCE.coefficient, "shift", scale);
    close(readout.shift!.standardError, wanted.shiftError!, TOLERANCE.coefficient, "shift error");
    for (const part of wanted.parts ?? []) {
      const own = readout.shift!.parts.find((p) => p.covariate === part.covariate);
      close(own!.estimate, part.estimate, TOLERANCE.inference, `part of ${part.covariate}`, scale);
    }
  });
  if (expected.joint) checkWald(found.joint!, expected.joint, "joint");
  expected.slopes.forEach((wanted) => {
    const test = found.slopes.find((s) => s.modifier === wanted.modifier)!;
    checkWald(test, wanted, `slopes in ${wanted.modifier}`);
    close(test.pHolm, wanted.pHolm, TOLERANCE.inference, "Holm p");
  });
}

describe("a comparison of open data agrees with R in every set", () => {
  for (const wanted of cases) {
    it(wanted.name, () => {
      const found = run(wanted);
      expect(found.sets.map((s) => s.adjustedFor)).toEqual(wanted.sets.map((s) => [s.adjustedFor].flat()));
      expect(found.rows.common).toBe(wanted.sets[0].rows);
      found.sets.forEach((set, i) => checkSet(set, wanted.sets[i]));
    });
  }
});

describe("the fitted table is R's coefficient table", () => {
  for (const wanted of cases.filter((c) => !c.name.includes("polynomial"))) {
    it(wanted.name, () => {
      const found = run(wanted);
      found.sets.forEach((set, i) => {
        // R orders the terms exposure first; ours may differ: the sets of figures must agree.
        const expected = [...wanted.sets[i].model.estimate].map(Number).sort((a, b) => a - b);
        const own = set.model.map((row) => row.estimate).sort((a, b) => a - b);
        expect(own.length).toBe(expected.length);
        own.forEach((value, k) => expect(relativeError(value, expected[k])).toBeLessThan(1e-9)); // an intercept undone from centred columns
      });
    });
  }
});
