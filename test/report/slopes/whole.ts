import { expect } from "vitest";
import type { Plot } from "../../../src/report/slopes/presentation";

/** Every number inside, with its path. */
export const numbersIn = (value: unknown, path = ""): [string, number][] =>
  typeof value === "number"
    ? [[path, value]]
    : value !== null && typeof value === "object"
      ? Object.entries(value).flatMap(([key, inner]) => numbersIn(inner, `${path}.${key}`))
      : [];
const rising = (values: readonly number[]) => values.every((value, i) => i === 0 || value >= values[i - 1]);

/** Lists alike in length, values in order, and everything drawn inside the axes. */
export function expectWhole(plot: Plot): void {
  for (const { x, y } of plot.curves) expect([x.length, rising(x)]).toEqual([y.length, true]);
  for (const { x, low, high } of plot.bands) {
    expect([low.length, high.length]).toEqual([x.length, x.length]);
    low.forEach((value, i) => expect(value).toBeLessThanOrEqual(high[i]));
  }
  for (const { x, y, lines } of plot.points) expect([x.length, x.length]).toEqual([y.length, lines.length]);
  expect(rising(plot.stops.map((stop) => stop.x))).toBe(true);
  expect(plot.stops.length).toBeGreaterThan(0);
  for (const row of plot.twin.rows) expect(row.length).toBe(plot.twin.head.length);
  const drawn = [...plot.bands.flatMap((b) => [...b.low, ...b.high]), ...plot.points.flatMap((p) => p.y)];
  // an end within a billionth of a tick's step counts as on it
  const slack = 1e-8 * (plot.y.to - plot.y.from);
  expect(Math.min(...drawn, plot.y.to)).toBeGreaterThanOrEqual(plot.y.from - slack);
  expect(Math.max(...drawn, plot.y.from)).toBeLessThanOrEqual(plot.y.to + slack);
  for (const { at } of [...plot.x.ticks]) expect(at >= plot.x.from && at <= plot.x.to).toBe(true);
}
