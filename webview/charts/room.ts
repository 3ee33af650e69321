import type { Plot } from "../../src/protocol";
import { widthOf } from "./palette";
import type { Palette } from "./palette";

/** Part of a page's width that names of groups may take beside their strips. */
const SHARE = 0.22;
const GAP = 10;

/** Levels of a category lie one under another: their names can be long. */
export function isFlipped({ kind }: Plot): boolean {
  return kind === "levels";
}

/** Px left of the plots' areas. Plots on the same axis share it, so that it lies at the same place in each. */
export function roomOf(plots: readonly Plot[], width: number, palette: Palette): number {
  const measure = (texts: readonly string[]) => Math.max(0, ...texts.map((text) => widthOf(text, palette)));
  if (plots.some(isFlipped)) return GAP;
  const values = measure(plots.flatMap((plot) => plot.y.ticks.map(({ text }) => text)));
  const strips = measure(plots.flatMap((plot) => (plot.densities.length > 0 ? plot.groups : [])));
  return Math.ceil(Math.max(values, Math.min(strips, width * SHARE))) + GAP;
}
