import type { ContrastColumn } from "../design/types";
import { combine, intervalOf } from "../slopes/fit";
import type { Combined } from "../slopes/fit";
import { meanAt } from "./fit";
import type { FigureFit } from "./fit";
import type { GroupLine, Interval } from "./types";

/**
 * Each group's fitted line along the modifier with its interval at the plan's level, each value by itself.
 * @param x ascending
 * @param rows ends of each group's own rows, by group; null for a group without rows
 */
export function groupLines(figure: FigureFit, x: readonly number[], rows: readonly ([number, number] | null)[]): GroupLine[] {
  const { design } = figure;
  return rows.flatMap((ends, group): GroupLine[] => {
    const contrast = group === 0 ? null : design.contrasts[group - 1];
    if (!ends || (contrast && contrast.column < 0)) return [];
    const line = lineOf(figure, contrast, withValues(x, ends));
    return line ? [{ group, rows: ends, ...line }] : [];
  });
}

function lineOf(
  figure: FigureFit,
  contrast: ContrastColumn | null,
  x: readonly number[],
): Pick<GroupLine, "x" | "estimate" | "standardError" | "interval"> | null {
  const { outcomeCentre } = figure.design;
  const combined = x.map((value): Combined | null => {
    const combination = meanAt(figure, contrast, value);
    if (!combination) return null;
    const at = combine(figure, combination);
    return { ...at, estimate: at.estimate + outcomeCentre };
  });
  if (!allKnown(combined)) return null;
  return {
    x,
    estimate: combined.map((c) => c.estimate),
    standardError: combined.map((c) => c.standardError),
    interval: intervalsOf(combined.map((c) => intervalOf(c, figure.level))),
  };
}

/** Ascending values with some more among them. */
export function withValues(values: readonly number[], more: readonly number[]): number[] {
  return [...new Set([...values, ...more])].sort((a, b) => a - b);
}

/** True where everything could be estimated, in numbers that doubles hold. */
export function allKnown(combined: readonly (Combined | null)[]): combined is Combined[] {
  return combined.every((c) => c !== null && Number.isFinite(c.estimate));
}

/** Two sides of a band; null unless all of it can be drawn. */
export function intervalsOf(intervals: readonly (readonly [number, number] | null)[]): Interval | null {
  const known = intervals.filter((i): i is [number, number] => i !== null && i.every(Number.isFinite));
  if (known.length < intervals.length) return null;
  return { low: known.map(([low]) => low), high: known.map(([, high]) => high) };
}
