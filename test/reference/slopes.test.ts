// Where slopes differ: differences at stated values, crossing, Fieller's interval, region ends and D against R (test/reference/make-slopes.R).
// The plans set slopesAlpha close to 1, so that each case is read as one whose slopes differ.
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
  contrasts: {
    level: string;
    profiles: { at: string; estimate: string; standardError: string }[];
    crossing: string;
    kind: "between" | "outside" | "everywhere";
    fieller: string[];
    simultaneous: string[];
    shared: [string, string];
  }[];
  change: { from: string; to: string; estimate: string; low: string; high: string };
}

const here = new URL(".", import.meta.url).pathname;
const { cases } = JSON.parse(readFileSync(`${here}expected/slopes.json`, "utf8")) as { cases: Case[] };
const close = (found: number | null, expected: string, what: string, scale = 0) =>
  expect(relativeError(found ?? NaN, Number(expected), scale), `${what}: ${found} against ${expected}`).toBeLessThan(
    TOLERANCE.inference,
  );

describe("what stands in place of a number agrees with R", () => {
  for (const { name, file, plan, contrasts, change } of cases) {
    it(name, () => {
      const read = readTable(readFileSync(`${here}data/${file}`), { file });
      if (!read.ok) throw new Error(read.problem.code);
      const set = compare(read.table, plan).sets[1];
      contrasts.forEach((wanted, i) => {
        const { level, readout } = set.contrasts[i];
        expect(level).toBe(wanted.level);
        if (readout.kind !== "varies") throw new Error(readout.kind);
        readout.profiles.forEach((profile, k) => {
          const scale = Number(wanted.profiles[k].standardError);
          close(profile.where[0].value as number, wanted.profiles[k].at, "place");
          close(profile.estimate, wanted.profiles[k].estimate, "estimate", scale);
          close(profile.standardError, wanted.profiles[k].standardError, "standard error");
        });
        close(readout.crossing!.value, wanted.crossing, "crossing");
        expect(readout.crossing!.interval.kind).toBe(wanted.kind);
        if (wanted.fieller.length > 0) {
          close(readout.crossing!.interval.low, wanted.fieller[0], "Fieller low");
          close(readout.crossing!.interval.high, wanted.fieller[1], "Fieller high");
        }
        const [low, high] = wanted.shared.map(Number);
        for (const [band, ends] of [
          ["pointwise", wanted.fieller],
          ["simultaneous", wanted.simultaneous],
        ] as const) {
          const regions = readout.regions.filter((r) => r.band === band);
          const inside = ends.filter((end) => Number(end) > low && Number(end) < high);
          const cuts = regions.slice(1).map((r) => r.from);
          expect(cuts.length, band).toBe(inside.length);
          cuts.forEach((cut, k) => close(cut, inside[k], `${band} end`));
          close(regions[0].from, wanted.shared[0], "start of the shared range");
          close(regions[regions.length - 1].to, wanted.shared[1], "end of the shared range");
          expect(regions.reduce((sum, r) => sum + r.rowsShare, 0)).toBeLessThanOrEqual(1 + 1e-12);
        }
      });
      const d = set.slopes[0].change!;
      const scale = Math.abs(Number(change.high) - Number(change.low));
      close(d.from as number, change.from, "from");
      close(d.to as number, change.to, "to");
      close(d.estimate, change.estimate, "D", scale);
      close(d.interval90[0], change.low, "D low", scale);
      close(d.interval90[1], change.high, "D high", scale);
    });
  }
});
