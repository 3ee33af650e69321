import type { Plan } from "../engine/plan";
import type { Term } from "../engine/comparison";

/** A name that reads as one word in a sentence needs no quotes. */
const PLAIN = /^[\p{L}\p{N}_.%/+-]+$/u;

/** How a column is called in sentences: its label, else its name, in quotes where it would not read as one word. */
export function columnName(column: string, plan: Plan): string {
  const label = labelOf(column, plan);
  return label ? oneLine(label) : word(column);
}

/** A column or level name as it stands in a sentence. */
export function word(name: string): string {
  const line = oneLine(name);
  return PLAIN.test(line) ? line : `“${line}”`;
}

/** Line breaks and other control characters would tear a sentence: they become spaces. */
export function oneLine(name: string): string {
  return name.replace(/[\u0000-\u001f\u007f-\u009f\u2028\u2029]+/g, " ").trim();
}

/** "a", "a and b", "a, b and c". */
export function listed(names: readonly string[], joint: "and" | "or" = "and"): string {
  if (names.length <= 1) return names[0] ?? "";
  return `${names.slice(0, -1).join(", ")} ${joint} ${names[names.length - 1]}`;
}

/** What a set holds fixed, as a table's cell or a list's entry: "nothing", "floor_m2, tenure". */
export function heldName(adjustedFor: readonly string[], plan: Plan): string {
  return adjustedFor.length === 0 ? "nothing" : adjustedFor.map((column) => columnName(column, plan)).join(", ");
}

/** "flats", or "rows". */
export function rowsName(plan: Plan): string {
  return plan.rowsAre ? oneLine(plan.rowsAre) : "rows";
}

function labelOf(column: string, plan: Plan): string | undefined {
  if (plan.outcome.column === column) return plan.outcome.label;
  if (plan.exposure.column === column) return plan.exposure.label;
  return plan.covariates?.find((c) => c.column === column)?.label;
}

/** A term of the fitted table as words: "floor_m2", "tenure = owner", "age, power 2", "retrofit = full × floor_m2". */
export function termName(term: Term): string {
  if ("role" in term) return "constant";
  const { times, ...first } = term;
  return times ? `${part(first)} × ${part(times)}` : part(first);
}

function part({ column, level, power, knot }: { column: string; level?: string; power?: number; knot?: number }): string {
  if (level !== undefined) return `${word(column)} = ${word(level)}`;
  if (power !== undefined && power > 1) return `${word(column)}, power ${power}`;
  return knot === undefined ? word(column) : `${word(column)}, curve ${knot}`;
}
