import type { Comparison } from "../engine/comparison";
import type { Plan } from "../engine/plan";
import type { Strip } from "./presentation";
import { lineOf, shiftRows } from "./rows";
import { scaleOf } from "./scale";

/** A long list of sets in order of estimate; those without one come last, in plan order. `columns` are column names as the plan has them. */
export function stripOf(comparison: Comparison, plan: Plan, contrast: number): Strip {
  const scale = scaleOf(comparison.question, plan);
  const columns = [...new Set(comparison.sets.flatMap((set) => set.adjustedFor))];
  const place = new Map(columns.map((column, i) => [column, i]));
  const texts = shiftRows(
    comparison,
    plan,
    contrast,
    comparison.sets.map((_, i) => i),
    false,
  );
  const items = comparison.sets.map((set, i) => ({
    set: i,
    line: lineOf(scale, set.contrasts[contrast]),
    holds: set.adjustedFor.map((column) => place.get(column)!),
    kind: set.contrasts[contrast].readout.kind,
    difference: texts[i].difference,
  }));
  const mid = (line: (typeof items)[number]["line"]) => (line === null || line.kind === "span" ? Infinity : line.mid);
  return { columns, items: [...items].sort((a, b) => compareNumbers(mid(a.line), mid(b.line)) || a.set - b.set) };
}

function compareNumbers(a: number, b: number): number {
  return a === b ? 0 : a < b ? -1 : 1;
}
