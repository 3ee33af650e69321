import { describe, expect, it } from "vitest";
import { compare } from "../../../src/engine/compare";
import type { Plan } from "../../../src/engine/plan";
import { chosenOf } from "../../../src/report/slopes/choice";
import { planOf, seeded, tableOf } from "../../engine/fixtures";
import { CASES, sectionOf } from "./cases";
import { expectWhole, numbersIn } from "./whole";

describe("every section", () => {
  for (const [name, wanted] of Object.entries(CASES)) {
    it(`${name}: is whole, with nothing that is no number`, () => {
      const section = sectionOf(wanted);
      expect(numbersIn(section).filter(([, value]) => !Number.isFinite(value))).toEqual([]);
      expect(JSON.stringify(section)).not.toMatch(/NaN|Infinity|undefined/);
      section.plots.forEach(expectWhole);
      expect(section.sentences.length).toBeGreaterThan(0);
    });
  }
  it("draws the same rows, thinned, of many", () => {
    const { uniform, normal } = seeded(4);
    const x = Array.from({ length: 5000 }, normal);
    const table = tableOf({ x, g: x.map(() => (uniform() < 0.5 ? "a" : "b")), y: x.map((v) => 2 * v + normal()) });
    const [lines] = sectionOf({ table, plan: planOf("y", "g", ["x"]) }).plots;
    expect(lines.points.reduce((sum, { x: drawn }) => sum + drawn.length, 0)).toBe(2000);
    expect(lines.points.map(({ note }) => note)).toEqual(["2,000 of 5,000 rows drawn", null]);
  });
  it("says of places where some group has no rows that it has none, in a sentence without a comma too many", () => {
    const { normal } = seeded(8);
    const x = Array.from({ length: 300 }, (_, i) => (i % 2 ? 40 : 0) + (60 * i) / 300);
    const g = x.map((_, i) => (i % 2 ? "b" : "a"));
    const y = x.map((v, i) => v + (i % 2 ? 3 * (v - 50) : 0) + normal());
    const plan = planOf("y", "g", ["x"], { exposure: { column: "g", reference: "a" }, rowsAre: "flats" });
    const said = sectionOf({ table: tableOf({ x, g, y }), plan }).sentences.find((text) => text.startsWith("Holding x fixed"));
    expect(said).toMatch(
      / at x [\d.]+, where some group has no flats, [\d.]+ .* at x [\d.]+ and [\d.]+ .* at x [\d.]+, where some group has no flats\.$/,
    );
    expect(said).not.toContain(",,");
  });
  it("says the lowest and the highest of many levels, and draws all", () => {
    const { uniform, normal } = seeded(6);
    const z = Array.from({ length: 600 }, (_, i) => `z${i % 6}`);
    const g = z.map(() => (uniform() < 0.5 ? "a" : "b"));
    const y = z.map((level, i) => (g[i] === "b" ? Number(level.slice(1)) : 0) + 0.3 * normal());
    const plan = planOf("y", "g", ["z"], { exposure: { column: "g", reference: "a" } });
    const [levels] = sectionOf({ table: tableOf({ z, g, y }), plan }).plots;
    expect(levels.intervals.map((mark) => mark.name)).toEqual(["z0", "z1", "z2", "z3", "z4", "z5"]);
    expect(levels.summary).toBe(`${levels.stops[0].text} ${levels.stops[5].text}`);
  });
  it("of values near the end of double range holds no infinity", () => {
    const { normal } = seeded(9);
    const x = Array.from({ length: 40 }, normal);
    const table = tableOf({ x, g: x.map((_, i) => (i % 2 ? "a" : "b")), y: x.map((v) => 1e307 * v + 1e306 * normal()) });
    const section = sectionOf({ table, plan: planOf("y", "g", ["x"]) });
    expect(numbersIn(section).filter(([, value]) => !Number.isFinite(value))).toEqual([]);
  });
});

describe("what is looked at first", () => {
  const comparison = compare(CASES["groups whose slopes differ"].table, CASES["groups whose slopes differ"].plan);
  const asked = { set: null, modifier: null, contrast: null };
  it("is the reported set and the modifier whose slopes differ", () =>
    expect(chosenOf(comparison, asked)).toEqual({ set: comparison.reported, modifier: "wind_ms", contrast: 0 }));
  it("is what was asked for, where the comparison still has it", () => {
    expect(chosenOf(comparison, { set: 1, modifier: "floor_m2", contrast: 0 })).toEqual({
      set: 1,
      modifier: "floor_m2",
      contrast: 0,
    });
    expect(chosenOf(comparison, { set: 99, modifier: "gone", contrast: 7 })).toEqual(chosenOf(comparison, asked));
  });
  it("is the modifier with the smallest p where none differs", () => {
    const { table, plan } = CASES["a category"];
    const found = compare(table, plan);
    const { slopes } = found.sets[found.reported];
    const least = Math.min(...slopes.map((test) => test.p!));
    expect(slopes.find((test) => test.modifier === chosenOf(found, asked).modifier)!.p).toBe(least);
  });
});

describe("where slopes differ the section holds the common slope nowhere", () => {
  /** Where a section says or draws one of the refused numbers, to so many digits. */
  function placesOf(wanted: Plan, seed: number, digits: number): Set<string> {
    const { uniform, normal } = seeded(seed);
    const x = Array.from({ length: 400 }, () => 50 + 10 * normal());
    const g = x.map((v) => (uniform() < 1 / (1 + Math.exp(-(v - 50) / 8)) ? "b" : "a"));
    const dose = x.map((v) => 3 + v / 20 + normal());
    const y = x.map((v, i) => 100 + 4 * v - (g[i] === "b" ? 30 + 4 * (v - 50) : 0) + dose[i] * (v - 40) + 12 * normal());
    const table = tableOf({ y, g, x, dose });
    const comparison = compare(table, wanted);
    const { readout } = comparison.sets[1].contrasts[0];
    expect(readout.kind).toBe("varies");
    const one = compare(table, { ...wanted, slopesAlpha: 1e-300 }).sets[1].contrasts[0].readout;
    if (one.kind !== "single" && one.kind !== "undecided") throw new Error(one.kind);
    const section = sectionOf({ table, plan: wanted, choice: { set: 1 } }, comparison);
    expect(section.plots.map((plot) => plot.kind)).not.toContain("added");
    const hidden = [one.estimate, one.standardError!].map((value) => Number(Math.abs(value).toPrecision(digits)));
    const places = new Set<string>();
    const textsIn = (value: unknown, path: string): void => {
      if (typeof value === "string") {
        for (const token of value.replaceAll(",", "").match(/\d+(?:\.\d+)?/g) ?? [])
          if (hidden.includes(Number(token))) places.add(path);
      } else if (value !== null && typeof value === "object")
        for (const [key, inner] of Object.entries(value)) textsIn(inner, `${path}.${key}`);
    };
    textsIn(section, "");
    for (const [path, value] of numbersIn(section))
      if (hidden.includes(Number(Math.abs(value).toPrecision(digits)))) places.add(path);
    return places;
  }
  const cases: [string, Plan][] = [
    ["groups", planOf("y", "g", ["x"], { exposure: { column: "g", reference: "a" } })],
    ["an amount", planOf("y", "dose", ["x"])],
  ];
  for (const [name, wanted] of cases) {
    it(`${name}: not to six digits, and no place to three or four whatever the data`, () => {
      for (const seed of [41, 42, 43, 44]) expect([...placesOf(wanted, seed, 6)]).toEqual([]);
      for (const digits of [3, 4]) {
        const [first, ...others] = [41, 42, 43, 44].map((seed) => placesOf(wanted, seed, digits));
        expect([...first].filter((path) => others.every((places) => places.has(path)))).toEqual([]);
      }
    });
  }
  it("and the search does find it where it is drawn", () => {
    const { table, plan } = CASES["an amount with one slope"];
    const comparison = compare(table, plan);
    const { readout } = comparison.sets[1].contrasts[0];
    if (readout.kind !== "undecided") throw new Error(readout.kind);
    const [, added] = sectionOf({ table, plan }, comparison).plots;
    const { x, y } = added.curves[0];
    expect((y[20] - y[0]) / (x[20] - x[0])).toBeCloseTo(readout.estimate / comparison.question.per, 10);
  });
});
