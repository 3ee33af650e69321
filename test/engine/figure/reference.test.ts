// Lines, bands, levels, residuals and densities against R (test/reference/make-figure.R).
import { readFileSync } from "node:fs";
import { describe, expect, it } from "vitest";
import { readTable } from "../../../src/data/read";
import { compare } from "../../../src/engine/compare";
import { slopesFigure } from "../../../src/engine/figure";
import type { SlopesFigure } from "../../../src/engine/figure";
import type { Interval } from "../../../src/engine/figure/types";
import type { Plan } from "../../../src/engine/plan";
import { relativeError, TOLERANCE } from "../../tolerances";

interface Said {
  estimate: string;
  standardError: string;
  low: string;
  high: string;
}
interface Both {
  pointwise: Said;
  simultaneous: Pick<Said, "low" | "high">;
}
interface Expected {
  cases: {
    name: string;
    file: string;
    plan: Plan;
    at: string[];
    lines: { group: string; at: Said[] }[];
    differences: { level: string; at: Both[] }[];
  }[];
  amount: { at: string[]; differences: Both[] };
  added: { x: string[]; y: string[]; slope: string };
  byLevel: (Said & { level: string })[];
  density: { x: string[]; heights: string[][] };
}

const folder = new URL("../../reference/", import.meta.url).pathname;
const wanted = JSON.parse(readFileSync(`${folder}expected/figure.json`, "utf8")) as Expected;

function figureOf(file: string, plan: Plan, set: number, modifier: string | null, contrast = 0): SlopesFigure {
  const read = readTable(readFileSync(`${folder}data/${file}`), { file });
  if (!read.ok) throw new Error(read.problem.code);
  const figure = slopesFigure(read.table, plan, compare(read.table, plan), { set, modifier, contrast });
  if ("reason" in figure) throw new Error(figure.reason.code);
  return figure;
}
const close = (found: number | null | undefined, expected: string, what: string, scale = 0) =>
  expect(relativeError(found ?? NaN, Number(expected), scale), `${what}: ${found} against ${expected}`).toBeLessThan(
    TOLERANCE.inference,
  );
function closeAt(
  at: number,
  curve: { estimate: readonly number[]; standardError: readonly (number | null)[] },
  band: Interval,
  said: Said,
  what: string,
) {
  const scale = Number(said.standardError);
  close(curve.estimate[at], said.estimate, `${what} estimate`, scale);
  close(curve.standardError[at], said.standardError, `${what} standard error`);
  close(band.low[at], said.low, `${what} low`, scale);
  close(band.high[at], said.high, `${what} high`, scale);
}
function placeOf(x: readonly number[], value: string): number {
  const at = x.indexOf(Number(value));
  expect(at, `${value} is one of the values drawn`).toBeGreaterThanOrEqual(0);
  return at;
}

describe("what is drawn along a modifier agrees with R", () => {
  for (const { name, file, plan, at, lines, differences } of wanted.cases) {
    const modifier = plan.modifiers![0];
    it(`${name}: each group's line and interval`, () => {
      const found = figureOf(file, plan, 1, modifier).along!.lines;
      expect(found.length).toBe(lines.length);
      lines.forEach((line, g) => {
        at.forEach((value, k) =>
          closeAt(placeOf(found[g].x, value), found[g], found[g].interval!, line.at[k], `${line.group} at ${value}`),
        );
      });
    });
    it(`${name}: each difference with both bands`, () => {
      differences.forEach((wantedCurve, contrast) => {
        const found = figureOf(file, plan, 1, modifier, contrast).along!.difference!;
        at.forEach((value, k) => {
          const place = placeOf(found.x, value);
          const { pointwise, simultaneous } = wantedCurve.at[k];
          const scale = Number(pointwise.standardError);
          closeAt(place, found, found.pointwise!, pointwise, `${wantedCurve.level} at ${value}`);
          close(found.simultaneous!.low[place], simultaneous.low, "simultaneous low", scale);
          close(found.simultaneous!.high[place], simultaneous.high, "simultaneous high", scale);
        });
      });
    });
  }
});

const swiss: Plan = {
  outcome: { column: "Fertility" },
  exposure: { column: "Education", per: 10 },
  covariates: [{ column: "Catholic" }, { column: "Examination" }],
  modifiers: ["Catholic"],
};

describe("an amount", () => {
  it("its slope along the modifier, per the stated step, with both bands", () => {
    const found = figureOf("swiss.csv", swiss, 3, "Catholic").along!;
    expect(found.lines).toEqual([]);
    const { difference } = found;
    wanted.amount.at.forEach((value, k) => {
      const place = placeOf(difference!.x, value);
      const { pointwise, simultaneous } = wanted.amount.differences[k];
      closeAt(place, difference!, difference!.pointwise!, pointwise, `at ${value}`);
      close(difference!.simultaneous!.low[place], simultaneous.low, "low", Number(pointwise.standardError));
      close(difference!.simultaneous!.high[place], simultaneous.high, "high", Number(pointwise.standardError));
    });
  });
  it("residuals of outcome and amount after the other columns, with the slope of the set", () => {
    // a threshold nothing passes: the set has one slope to print
    const { points, slope } = figureOf("swiss.csv", { ...swiss, slopesAlpha: 1e-300 }, 3, "Catholic").added!;
    expect(points.of).toBe(wanted.added.x.length);
    close(slope, wanted.added.slope, "slope");
    points.x.forEach((value, i) => close(value, wanted.added.x[i], `x of row ${i}`, 1));
    points.y.forEach((value, i) => close(value, wanted.added.y[i], `y of row ${i}`, 1));
    expect(points.lines.slice(0, 3)).toEqual([2, 3, 4]);
  });
});

describe("levels and densities", () => {
  const births = (covariates: Plan["covariates"]): Plan => ({
    outcome: { column: "bwt" },
    exposure: { column: "smoke", reference: 0 },
    covariates,
  });
  it("the difference at each level of a category", () => {
    const plan = births([{ column: "lwt" }, { column: "race", form: "category" }]);
    const { levels, along } = figureOf("birthwt.csv", plan, 3, "race");
    expect(along).toBeNull();
    expect(levels.map((l) => l.value)).toEqual(wanted.byLevel.map((l) => l.level));
    levels.forEach(({ estimate, standardError, interval, supported }, i) => {
      const scale = Number(wanted.byLevel[i].standardError);
      close(estimate, wanted.byLevel[i].estimate, "estimate", scale);
      close(standardError, wanted.byLevel[i].standardError, "standard error");
      close(interval![0], wanted.byLevel[i].low, "low", scale);
      close(interval![1], wanted.byLevel[i].high, "high", scale);
      expect(supported).toBe(true);
    });
  });
  it("the density of each group, to what rows shared between 1,024 places allow", () => {
    const { densities } = figureOf("birthwt.csv", births([{ column: "age" }]), 1, "age").along!;
    expect(densities.map((d) => d.group)).toEqual([0, 1]);
    densities.forEach(({ x, height }, g) => {
      x.forEach((value, i) => close(value, wanted.density.x[i], "x"));
      height.forEach((value, i) => expect(Math.abs(value - Number(wanted.density.heights[g][i]))).toBeLessThan(5e-4));
    });
    expect(Math.max(...densities.flatMap((d) => d.height))).toBe(1);
  });
});
