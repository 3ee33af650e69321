// Against R, by other routes than the engine's own formula: make-shift.R stacks the regressions into one and reads sandwich's joint
// covariance, and resamples the rows with boot. Versions and calls stand in expected.json.
import { readFileSync } from "node:fs";
import { describe, expect, it } from "vitest";
import { readTable } from "../../../src/data/read";
import { compare } from "../../../src/engine/compare";
import type { Shift, SingleReadout } from "../../../src/engine/comparison";
import type { Variance } from "../../../src/engine/plan";
import { relativeError, TOLERANCE } from "../../tolerances";

interface Case {
  name: string;
  file: string;
  outcome: string;
  exposure: string;
  covariates: string[];
  cluster: string | null;
  shift: string;
  HC3: string;
  CR1: string;
  parts: { covariate: string; estimate: string; error: string }[];
  cloggAndSampling: string;
  bootstrap: string;
}
const here = new URL(".", import.meta.url).pathname;
const { cases } = JSON.parse(readFileSync(`${here}expected.json`, "utf8")) as { cases: Case[] };

function shiftIn(wanted: Case, variance: Variance): { shift: Shift; base: SingleReadout; full: SingleReadout } {
  const { file, outcome, exposure, covariates, cluster } = wanted;
  const read = readTable(readFileSync(`${here}../../reference/data/${file}`), { file });
  if (!read.ok) throw new Error(read.problem.code);
  const found = compare(read.table, {
    outcome: { column: outcome },
    // 0/1 exposures against 0, so that R's slope and our difference are the same number
    exposure: { column: exposure },
    covariates: covariates.map((column) => ({ column })),
    modifiers: [],
    sets: [covariates],
    variance,
    cluster,
  });
  const [base, full] = found.sets.map((set) => set.contrasts[0].readout as SingleReadout);
  return { shift: full.shift!, base, full };
}

describe("the shift's standard error is that of the two regressions fitted as one", () => {
  for (const wanted of cases) {
    it(wanted.name, () => {
      const kind = wanted.cluster ? "CR1" : "HC3";
      const { shift } = shiftIn(wanted, kind);
      expect(relativeError(shift.estimate, Number(wanted.shift))).toBeLessThan(TOLERANCE.coefficient);
      expect(relativeError(shift.standardError!, Number(wanted[kind]))).toBeLessThan(TOLERANCE.coefficient);
    });
  }
});

describe("rows resampled move the shift as its standard error says", () => {
  for (const wanted of cases.filter((c) => !c.cluster)) {
    it(wanted.name, () => {
      // 8,000 draws: 1 % of sampling; the rest is what is left beyond first order at 47 to 248 rows
      expect(relativeError(shiftIn(wanted, "HC3").shift.standardError!, Number(wanted.bootstrap))).toBeLessThan(0.12);
    });
    it(`${wanted.name}: taking the two estimates as independent would overstate it by far`, () => {
      const { shift, base, full } = shiftIn(wanted, "HC3");
      expect(Math.hypot(base.standardError!, full.standardError!)).toBeGreaterThan(1.4 * shift.standardError!);
    });
  }
});

describe("with equal spread it is Clogg's error together with what sampling the covariates adds", () => {
  for (const wanted of cases.filter((c) => !c.cluster)) {
    it(wanted.name, () => {
      // Clogg, Petkova & Haritou hold the covariates fixed; equal only as rows grow, and these data are not of equal spread
      expect(relativeError(shiftIn(wanted, "classical").shift.standardError!, Number(wanted.cloggAndSampling))).toBeLessThan(
        0.15,
      );
    });
  }
});

describe("parts of a shift", () => {
  for (const wanted of cases.filter((c) => !c.cluster)) {
    it(`${wanted.name}: each with its error, as the delta method on the stacked regressions gives it`, () => {
      const { parts } = shiftIn(wanted, "HC3").shift;
      expect(parts.map((p) => p.covariate)).toEqual(wanted.covariates);
      wanted.parts.forEach((part, k) => {
        expect(relativeError(parts[k].estimate, Number(part.estimate))).toBeLessThan(TOLERANCE.coefficient);
        expect(relativeError(parts[k].standardError!, Number(part.error))).toBeLessThan(TOLERANCE.coefficient);
      });
    });
  }
  for (const wanted of cases) {
    it(`${wanted.name}: they sum to the shift`, () => {
      const { shift } = shiftIn(wanted, wanted.cluster ? "CR2" : "HC3");
      const sum = shift.parts.reduce((total, part) => total + part.estimate, 0);
      expect(relativeError(sum, shift.estimate)).toBeLessThan(TOLERANCE.sum);
    });
  }
});
