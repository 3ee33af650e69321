import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { compare } from "../../../src/engine/compare";
import { slopesFigure } from "../../../src/engine/figure";
import type { FigureChoice, SlopesFigure } from "../../../src/engine/figure";
import { evenValues } from "../../../src/engine/figure/grid";
import { DRAWN_ROWS, drawnRows } from "../../../src/engine/figure/rows";
import type { Plan } from "../../../src/engine/plan";
import type { Table } from "../../../src/engine/table";
import { relativeError, TOLERANCE } from "../../tolerances";
import { planOf, seeded, tableOf } from "../fixtures";

/** Rows of three groups whose differences change along x by `slope`, and along z by `jump`. */
function rows(n: number, slope: number, { jump = 0, seed = 5, levels = ["a", "b", "c"] } = {}): Table {
  const { uniform, normal } = seeded(seed);
  const x = Array.from({ length: n }, () => 50 + 10 * normal());
  const g = x.map((v) => levels[Math.floor(levels.length * Math.min(0.999, Math.max(0, uniform() + (v - 50) / 100)))]);
  const z = x.map(() => (uniform() < 0.4 ? "p" : "q"));
  const w = x.map((v) => v / 3 + normal());
  const y = x.map(
    (v, i) => 100 + 4 * v + (g[i] === "b" ? slope * (v - 50) + (z[i] === "p" ? jump : 0) : 0) + w[i] + 12 * normal(),
  );
  const dose = x.map((v, i) => 3 + v / 20 + (g[i] === "b" ? 1 : 0) + normal());
  return tableOf({ y, g, x, z, w, dose });
}
const plan: Plan = planOf("y", "g", ["x", "z", "w"], { exposure: { column: "g", reference: "a" }, modifiers: ["x", "z"] });

function figureOf(table: Table, wanted: Plan, choice: Partial<FigureChoice> = {}): SlopesFigure {
  const comparison = compare(table, wanted);
  const figure = slopesFigure(table, wanted, comparison, { set: comparison.reported, modifier: "x", contrast: 0, ...choice });
  if ("reason" in figure) throw new Error(figure.reason.code);
  return figure;
}

describe("the figure and the readout are one calculation", () => {
  for (const variance of ["classical", "HC3", "CR1"] as const) {
    it(`${variance}: the difference at the reported values is the readout's`, () => {
      const table = rows(300, 2);
      const wanted: Plan = { ...plan, variance, cluster: variance === "CR1" ? "w" : null, covariates: [{ column: "x" }] };
      const grid = [35, 50, 61];
      const stated = { ...wanted, modifiers: ["x"], reportAt: { x: grid } };
      const comparison = compare(table, stated);
      comparison.sets[1].contrasts.forEach(({ readout }, contrast) => {
        if (readout.kind !== "varies") throw new Error(readout.kind);
        const { difference, crossing, regions } = figureOf(table, stated, { set: 1, contrast }).along!;
        expect(readout.profiles).toHaveLength(grid.length);
        for (const { where, estimate, standardError, interval } of readout.profiles) {
          const at = difference!.x.indexOf(where[0].value as number);
          const found = [difference!.estimate[at], difference!.standardError[at], difference!.pointwise!.low[at]];
          [estimate, standardError!, interval![0]].forEach((value, i) =>
            expect(relativeError(found[i]!, value, standardError!)).toBeLessThan(TOLERANCE.reordered),
          );
        }
        expect(crossing?.value).toBeCloseTo(readout.crossing!.value, 8);
        expect(regions.map((r) => [r.band, r.sign])).toEqual(readout.regions.map((r) => [r.band, r.sign]));
      });
    });
  }

  it("two groups' lines lie apart by the difference, wherever both are drawn", () => {
    const { lines, difference } = figureOf(rows(300, 2), plan).along!;
    const [a, b] = lines;
    const shared = a.x.filter((value) => b.x.includes(value) && difference!.x.includes(value));
    expect(shared.length).toBeGreaterThan(20);
    for (const value of shared) {
      const apart = b.estimate[b.x.indexOf(value)] - a.estimate[a.x.indexOf(value)];
      expect(apart).toBeCloseTo(difference!.estimate[difference!.x.indexOf(value)], 8);
    }
  });

  it("the simultaneous band holds the pointwise one", () => {
    const { pointwise, simultaneous } = figureOf(rows(300, 2), plan).along!.difference!;
    pointwise!.low.forEach((low, i) => expect(simultaneous!.low[i]).toBeLessThan(low));
    pointwise!.high.forEach((high, i) => expect(simultaneous!.high[i]).toBeGreaterThan(high));
  });
});

describe("what is in the fit", () => {
  it("another modifier whose slopes differ is in it, held where it is commonest, and there is no crossing then", () => {
    const figure = figureOf(rows(600, 3, { jump: 90 }), plan);
    expect(figure.modifiers).toEqual(["x", "z"]);
    expect(figure.heldAt).toEqual([{ column: "z", value: "q" }]);
    expect(figure.averagedOver).toEqual(["w"]);
    expect(figure.along!.crossing).toBeNull();
    expect(figure.along!.regions).toEqual([]);
  });
  it("a modifier outside the set is drawn along too", () => {
    const figure = figureOf(rows(300, 2), plan, { set: 0 });
    expect(figure.along!.lines).toHaveLength(3);
    expect(figure.averagedOver).toEqual([]);
  });
  it("a group without rows has no line, and its contrast a reason", () => {
    const table = rows(300, 2);
    const wanted = { ...plan, keep: [{ column: "g", not: ["c"] }] };
    expect(figureOf(table, wanted).along!.lines.map((l) => l.group)).toEqual([0, 1]);
    const comparison = compare(table, wanted);
    expect(slopesFigure(table, wanted, comparison, { set: 1, modifier: "x", contrast: 1 })).toEqual({
      reason: { code: "group-empty", level: "c" },
    });
  });
  it("a number with two values is looked at where it has rows", () => {
    const { along, levels } = figureOf(
      tableOf(twoValued()),
      planOf("y", "g", ["x"], { exposure: { column: "g", reference: "a" } }),
    );
    expect(along).toBeNull();
    expect(levels.map((l) => l.value)).toEqual([0, 1]);
  });
  it("a modifier that cannot be told from the exposure has nothing to draw, instead of one number everywhere", () => {
    const table = tableOf({
      y: [1, 2, 4, 3, 7, 6],
      g: ["a", "a", "a", "b", "b", "b"],
      x: [1, 1, 1, 2, 2, 2],
      u: [3, 1, 2, 2, 1, 3],
    });
    const wanted = planOf("y", "g", ["u"], { exposure: { column: "g", reference: "a" }, modifiers: ["x"] });
    const figure = figureOf(table, wanted, { set: 1 });
    expect(figure.levels).toEqual([]);
  });
});

function twoValued(): Record<string, (number | string)[]> {
  const { uniform, normal } = seeded(8);
  const x = Array.from({ length: 80 }, () => (uniform() < 0.5 ? 0 : 1));
  const g = x.map(() => (uniform() < 0.5 ? "a" : "b"));
  return { x, g, y: x.map((v, i) => v + (g[i] === "b" ? 2 * v : 0) + normal()) };
}

describe("where slopes differ nothing drawn holds the common slope", () => {
  const numbersIn = (value: unknown, path = ""): [string, number][] =>
    typeof value === "number"
      ? [[path, value]]
      : value !== null && typeof value === "object"
        ? Object.entries(value).flatMap(([key, inner]) => numbersIn(inner, `${path}.${key}`))
        : [];
  /** Places that hold one of the refused numbers, to so many digits. */
  function placesOf(wanted: Plan, seed: number, digits: number): Set<string> {
    const table = rows(300, 4, { seed, levels: ["a", "b"] });
    const forced = compare(table, { ...wanted, slopesAlpha: 1e-300 });
    const found = compare(table, wanted);
    const places = new Set<string>();
    let varying = 0;
    found.sets.forEach((set, i) => {
      if (set.contrasts[0].readout.kind !== "varies") return;
      varying++;
      const { readout } = forced.sets[i].contrasts[0];
      if (readout.kind !== "single" && readout.kind !== "undecided") throw new Error(readout.kind);
      const hidden = [readout.estimate, readout.standardError!].map((v) => Math.abs(v).toPrecision(digits));
      for (const modifier of wanted.modifiers!) {
        const figure = slopesFigure(table, wanted, found, { set: i, modifier, contrast: 0 });
        if ("reason" in figure) throw new Error(figure.reason.code);
        expect(figure.added).toBeNull();
        for (const [path, value] of numbersIn(figure))
          if (hidden.includes(Math.abs(value).toPrecision(digits))) places.add(`${i} ${modifier} ${path}`);
      }
    });
    expect(varying).toBeGreaterThan(0);
    return places;
  }
  const cases: [string, Plan][] = [
    ["groups", { ...plan, sets: [["x"], ["x", "z", "w"]] }],
    [
      "an amount",
      { ...plan, exposure: { column: "dose" }, covariates: [{ column: "x" }, { column: "g" }], modifiers: ["x", "g"] },
    ],
  ];
  for (const [name, wanted] of cases) {
    it(`${name}: not to six digits, and no place to four whatever the data`, () => {
      for (const seed of [31, 32, 33]) expect([...placesOf(wanted, seed, 6)]).toEqual([]);
      const [first, ...others] = [31, 32, 33].map((seed) => placesOf(wanted, seed, 4));
      expect([...first].filter((path) => others.every((places) => places.has(path)))).toEqual([]);
    });
  }
});

describe("grid and rows", () => {
  it("even values rise from end to end, about sixty of them, multiples of one round step between", () => {
    fc.assert(
      fc.property(
        fc.double({ min: -1e6, max: 1e6, noNaN: true }),
        fc.double({ min: 1e-3, max: 1e6, noNaN: true }),
        (low, width) => {
          const values = evenValues(low, low + width, false);
          expect([values[0], values.at(-1)]).toEqual([low, low + width]);
          expect(values.every((value, i) => i === 0 || value > values[i - 1])).toBe(true);
          expect(values.length).toBeGreaterThan(35);
          expect(values.length).toBeLessThan(95);
        },
      ),
    );
  });
  it("values of a logarithm rise too, and stay above zero", () => {
    const values = evenValues(0.02, 4000, true);
    expect(values.length).toBe(61);
    expect(values.every((value, i) => i === 0 || value > values[i - 1])).toBe(true);
  });
  it("many rows are thinned evenly, each group keeping its share, the same rows each time", () => {
    const n = 50_000;
    const group = Int32Array.from({ length: n }, (_, i) => (i % 10 === 0 ? 1 : 0));
    const x = Float64Array.from({ length: n }, (_, i) => i);
    const source = { x, y: x, lines: Uint32Array.from({ length: n }, (_, i) => i + 2), group };
    const drawn = drawnRows(source);
    expect([drawn.of, drawn.x.length]).toEqual([n, DRAWN_ROWS]);
    expect(drawn.group.filter((g) => g === 1).length).toBe(DRAWN_ROWS / 10);
    expect(new Set(drawn.lines).size).toBe(DRAWN_ROWS);
    drawn.x.forEach((value, i) => expect([drawn.lines[i], group[value]]).toEqual([value + 2, drawn.group[i]]));
    expect(drawnRows(source)).toEqual(drawn);
  });
});
