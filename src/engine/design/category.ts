import type { Groups } from "../question/columns";
import type { Basis } from "./types";

/**
 * Indicator columns of a category against its reference (the plan's, else the first level in natural order that has rows); levels without
 * common rows take no column.
 * @param codes level of each common row, into groups.levels
 */
export function categoryBasis(column: string, { levels }: Groups, codes: Int32Array, wanted: string | null): Basis {
  const present = new Uint8Array(levels.length);
  for (const code of codes) present[code] = 1;
  const used = levels.filter((_, i) => present[i]);
  const reference = wanted !== null && used.includes(wanted) ? wanted : (used[0] ?? null);
  const shown = used.filter((level) => level !== reference);
  const size = shown.length;
  const map = new Float64Array(size * size);
  for (let k = 0; k < size; k++) map[k * size + k] = 1;
  return {
    column,
    form: "category",
    size,
    levels: used,
    reference,
    at: (value) => Float64Array.from(shown, (level) => (level === String(value) ? 1 : 0)),
    raw: { terms: shown.map((level) => ({ column, level })), map, intercept: new Float64Array(size) },
  };
}
