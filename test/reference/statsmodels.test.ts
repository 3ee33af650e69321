// Every combination of covariates on open data, against statsmodels (test/reference/make-statsmodels.py; versions in the file it writes).
import { readFileSync } from "node:fs";
import { describe, expect, it } from "vitest";
import { readTable } from "../../src/data/read";
import { compare } from "../../src/engine/compare";
import type { Plan } from "../../src/engine/plan";
import { relativeError, TOLERANCE } from "../tolerances";

interface Case {
  name: string;
  file: string;
  plan: Plan;
  sets: { adjustedFor: string[]; estimate: string; standardError: string; low: string; high: string; p: string }[];
}

const here = new URL(".", import.meta.url).pathname;
const { cases } = JSON.parse(readFileSync(`${here}expected/statsmodels.json`, "utf8")) as { cases: Case[] };

describe("every set of open data agrees with statsmodels", () => {
  for (const { name, file, plan, sets } of cases) {
    it(name, () => {
      const read = readTable(readFileSync(`${here}data/${file}`), { file });
      if (!read.ok) throw new Error(read.problem.code);
      const found = compare(read.table, { ...plan, slopesAlpha: 1e-300 });
      expect(found.sets.map((s) => s.adjustedFor)).toEqual(sets.map((s) => s.adjustedFor));
      found.sets.forEach((set, i) => {
        const { readout } = set.contrasts[0];
        if (readout.kind !== "single" && readout.kind !== "undecided") throw new Error(readout.kind);
        const wanted = sets[i];
        const scale = Number(wanted.standardError);
        expect(relativeError(readout.estimate, Number(wanted.estimate), scale)).toBeLessThan(TOLERANCE.coefficient);
        expect(relativeError(readout.standardError!, scale)).toBeLessThan(TOLERANCE.coefficient);
        expect(relativeError(readout.interval![0], Number(wanted.low), scale)).toBeLessThan(TOLERANCE.inference);
        expect(relativeError(readout.interval![1], Number(wanted.high), scale)).toBeLessThan(TOLERANCE.inference);
        expect(relativeError(readout.p!, Number(wanted.p))).toBeLessThan(TOLERANCE.inference);
      });
    });
  }
});
