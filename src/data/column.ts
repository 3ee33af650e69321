import type { Finding } from "../engine/findings";
import { naturalCompare } from "../engine/question/natural";
import type { Column } from "../engine/table";
import { isoDay, numberIn } from "./cell";
import type { NumberStyle } from "./cell";

/** Share of filled cells that must be numbers (or dates) for a column to be numeric. */
const NUMERIC_SHARE = 0.95;
/** A word column with more than this share of distinct cells is text, if it has more than a handful. */
const TEXT_SHARE = 0.8;
const TEXT_LEVELS = 30;
/** Cells quoted in a finding. */
const EXAMPLES = 3;
const YES_NO = [
  ["no", "yes"],
  ["false", "true"],
  ["n", "y"],
  ["f", "t"],
];

/**
 * One column's trimmed cells as a typed column. Cells of a numeric column that are no numbers count as missing and are listed by line.
 * @param cells one a row, trimmed; @param lines the rows' lines
 */
export function typeColumn(
  name: string,
  cells: readonly string[],
  lines: Uint32Array,
  isMissing: (cell: string) => boolean,
  style: NumberStyle,
): { readonly column: Column; readonly findings: Finding[] } {
  const missing = cells.map(isMissing);
  const filled = missing.reduce((sum, gone) => sum + (gone ? 0 : 1), 0);
  const share = (test: (cell: string) => boolean) => {
    let failed = 0;
    for (let i = 0; i < cells.length; i++) {
      // A column of words shows it early.
      if (!missing[i] && !test(cells[i]) && !isMostly(++failed, filled)) return false;
    }
    return true;
  };
  if (filled === 0) return { column: { kind: "number", name, values: new Float64Array(cells.length).fill(NaN) }, findings: [] };
  if (share((cell) => numberIn(cell, style) !== null)) return numberColumn(name, cells, lines, missing, style);
  if (share((cell) => isoDay(cell) !== null)) return dateColumn(name, cells, lines, missing);
  return { column: wordColumn(name, cells, missing, filled), findings: [] };
}

function numberColumn(
  name: string,
  cells: readonly string[],
  lines: Uint32Array,
  missing: readonly boolean[],
  style: NumberStyle,
) {
  const values = new Float64Array(cells.length).fill(NaN);
  const bad: number[] = [];
  const beyond: number[] = [];
  const marked: number[] = [];
  let plainLarge = 0;
  cells.forEach((cell, i) => {
    if (missing[i]) return;
    const found = numberIn(cell, style);
    if (!found) bad.push(i);
    else if (!Number.isFinite(found.value)) beyond.push(i);
    else {
      values[i] = found.value;
      if (found.thousands) marked.push(i);
      else if (Math.abs(found.value) >= 1000) plainLarge++;
    }
  });
  const findings: Finding[] = [];
  if (marked.length > 0 && plainLarge > 0) {
    // Not alike in them: 1,234 beside 1234 may be two different habits, so neither reading is safe for the marked cells.
    for (const i of marked) values[i] = NaN;
    bad.push(...marked);
    bad.sort((a, b) => a - b);
  } else if (marked.length > 0) findings.push({ code: "thousands-marks", column: name });
  if (bad.length > 0) findings.push(unreadable(name, bad, cells, lines));
  if (beyond.length > 0) findings.push({ code: "beyond-double-range", column: name, lines: beyond.map((i) => lines[i]) });
  return { column: { kind: "number", name, values } as const, findings };
}

function dateColumn(name: string, cells: readonly string[], lines: Uint32Array, missing: readonly boolean[]) {
  const values = new Float64Array(cells.length).fill(NaN);
  const bad: number[] = [];
  cells.forEach((cell, i) => {
    if (missing[i]) return;
    const day = isoDay(cell);
    if (day === null) bad.push(i);
    else values[i] = day;
  });
  return {
    column: { kind: "date", name, values } as const,
    findings: bad.length > 0 ? [unreadable(name, bad, cells, lines)] : [],
  };
}

/** The finding for cells of a numeric or date column that are neither. @param bad rows; @param cells text of a row */
export function unreadable(
  column: string,
  bad: readonly number[],
  cells: { readonly [row: number]: string },
  lines: Uint32Array,
): Finding {
  const examples = [...new Set(bad.map((i) => cells[i]))].slice(0, EXAMPLES);
  return { code: "unreadable-cells", column, lines: bad.map((i) => lines[i]), examples };
}

function wordColumn(name: string, cells: readonly string[], missing: readonly boolean[], filled: number): Column {
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
 * @param codes changed in place to the arranged levels
 */
export function arrangeWords(name: string, found: readonly string[], codes: Int32Array, filled: number): Column {
  const isText = found.length > TEXT_LEVELS && found.length > TEXT_SHARE * filled;
  if (isText) return { kind: "text", name, levels: found, codes };
  const order = found.map((_, i) => i).sort((a, b) => naturalCompare(found[a], found[b]));
  const levels = order.map((i) => found[i]);
  const place = new Int32Array(found.length);
  order.forEach((i, at) => (place[i] = at));
  for (let i = 0; i < codes.length; i++) if (codes[i] >= 0) codes[i] = place[codes[i]];
  const lower = levels.map((level) => level.toLowerCase());
  const yesNo =
    levels.length === 2 && YES_NO.some((pair) => pair.includes(lower[0]) && pair.includes(lower[1]) && lower[0] !== lower[1]);
  return { kind: yesNo ? "yes/no" : "category", name, levels, codes };
}

/** Whether few enough of the filled cells fail for the column to be of a kind. */
export function isMostly(failed: number, filled: number): boolean {
  return filled > 0 && failed <= filled - Math.ceil(NUMERIC_SHARE * filled);
}
