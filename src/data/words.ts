import { naturalSort } from "../engine/question/natural";
import type { CategoryColumn } from "../engine/table";

/** A word column with more than this share of distinct cells is text, if it has more than a handful. */
const TEXT_SHARE = 0.8;
const TEXT_LEVELS = 30;
const YES_NO = [
  ["no", "yes"],
  ["false", "true"],
  ["n", "y"],
  ["f", "t"],
];

/** Trimmed cells as a word column. @param missing 1 for a missing cell */
export function wordColumn(name: string, cells: readonly string[], missing: Uint8Array, filled: number): CategoryColumn {
  const first = new Map<string, number>();
  const codes = new Int32Array(cells.length).fill(-1);
  cells.forEach((cell, i) => {
    if (missing[i]) return;
    let code = first.get(cell);
    if (code === undefined) first.set(cell, (code = first.size));
    codes[i] = code;
  });
  return arrangeWords(name, [...first.keys()], codes, filled);
}

/**
 * A word column from its distinct cells in order of appearance: levels in natural order (text keeps the order of appearance), the kind by
 * how many there are.
 * @param codes changed in place to the arranged levels; @param filled cells that are not missing
 */
export function arrangeWords(name: string, found: readonly string[], codes: Int32Array, filled: number): CategoryColumn {
  if (found.length > TEXT_LEVELS && found.length > TEXT_SHARE * filled) return { kind: "text", name, levels: found, codes };
  const order = naturalSort(found);
  const place = new Int32Array(found.length);
  order.forEach((code, at) => (place[code] = at));
  for (let i = 0; i < codes.length; i++) if (codes[i] >= 0) codes[i] = place[codes[i]];
  const levels = order.map((code) => found[code]);
  return { kind: isYesNo(levels) ? "yes/no" : "category", name, levels, codes };
}

function isYesNo(levels: readonly string[]): boolean {
  if (levels.length !== 2) return false;
  const [a, b] = levels.map((level) => level.toLowerCase());
  return a !== b && YES_NO.some((pair) => pair.includes(a) && pair.includes(b));
}
