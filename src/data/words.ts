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
 * @param codes changed in place to the arranged levels; @param filled cells that are not missing; @param gone which of `found` are missing cells
 */
export function arrangeWords(
  name: string,
  found: readonly string[],
  codes: Int32Array,
  filled: number,
  gone: readonly boolean[] = [],
): CategoryColumn {
  const kept = found.map((_, code) => code).filter((code) => !gone[code]);
  const isText = kept.length > TEXT_LEVELS && kept.length > TEXT_SHARE * filled;
  const order = isText ? kept : naturalSort(found, kept);
  const levels = order.map((code) => found[code]);
  const place = new Int32Array(found.length).fill(-1);
  order.forEach((code, at) => (place[code] = at));
  recode(codes, place);
  return { kind: isText ? "text" : isYesNo(levels) ? "yes/no" : "category", name, levels, codes };
}

function recode(codes: Int32Array, place: Int32Array): void {
  for (let i = 0; i < codes.length; i++) if (codes[i] >= 0) codes[i] = place[codes[i]];
}

function isYesNo(levels: readonly string[]): boolean {
  if (levels.length !== 2) return false;
  const [a, b] = levels.map((level) => level.toLowerCase());
  return a !== b && YES_NO.some((pair) => pair.includes(a) && pair.includes(b));
}
