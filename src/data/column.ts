import type { Finding } from "../engine/findings";
import type { Column } from "../engine/table";
import { isoDay } from "./date";
import { numberIn } from "./number";
import type { NumberRead, NumberStyle } from "./number";
import { wordColumn } from "./words";

/** One filled cell in this many may be unreadable in a numeric or date column: at least 95 % must be of the kind (DESIGN, Data). */
const ONE_IN = 20;
/** Cells quoted in a finding. */
const EXAMPLES = 3;

export interface Typed {
  readonly column: Column;
  readonly findings: Finding[];
}

/** Whether few enough of the filled cells fail for the column to be of a kind. */
export function isMostly(failed: number, filled: number): boolean {
  return filled > 0 && failed * ONE_IN <= filled;
}

/**
 * One column's trimmed cells as a typed column. Cells of a numeric column that are no numbers count as missing and are listed by line.
 * A column without a filled cell is numeric.
 * @param cells one a row, trimmed; @param lines the rows' lines
 */
export function typeColumn(
  name: string,
  cells: readonly string[],
  lines: Uint32Array,
  isMissing: (cell: string) => boolean,
  style: NumberStyle,
): Typed {
  const missing = new Uint8Array(cells.length);
  let filled = cells.length;
  cells.forEach((cell, i) => {
    if (isMissing(cell)) {
      missing[i] = 1;
      filled--;
    }
  });
  return (
    numberColumn(name, cells, lines, missing, filled, style) ??
    dateColumn(name, cells, lines, missing, filled) ?? { column: wordColumn(name, cells, missing, filled), findings: [] }
  );
}

function numberColumn(
  name: string,
  cells: readonly string[],
  lines: Uint32Array,
  missing: Uint8Array,
  filled: number,
  style: NumberStyle,
): Typed | null {
  const values = new Float64Array(cells.length).fill(NaN);
  const bad: number[] = [];
  const beyond: number[] = [];
  const marks = new Alike();
  const marked: number[] = [];
  for (let i = 0; i < cells.length; i++) {
    if (missing[i]) continue;
    const found = numberIn(cells[i], style);
    if (found) marks.add(found);
    if (!found) {
      bad.push(i);
      if (!isMostly(bad.length, filled)) return null; // a column of words shows it early
    } else if (!Number.isFinite(found.value)) beyond.push(i);
    else {
      values[i] = found.value;
      if (found.thousands) marked.push(i);
    }
  }
  if (marks.marked && !marks.agree) {
    // 1,234 beside 1234 may be two habits, so neither reading is safe for the marked cells.
    for (const i of marked) {
      values[i] = NaN;
      bad.push(i);
    }
    bad.sort((a, b) => a - b);
    if (!isMostly(bad.length, filled)) return null;
  }
  const findings: Finding[] = [];
  if (marks.marked && marks.agree) findings.push({ code: "thousands-marks", column: name });
  if (bad.length > 0) findings.push(unreadable(name, bad, (i) => cells[i], lines));
  if (beyond.length > 0) findings.push(beyondRange(name, beyond, lines));
  return { column: { kind: "number", name, values }, findings };
}

/** Whether a column is alike in its thousands marks: every number of four digits or more before the decimals has them, or none. */
class Alike {
  marked = false;
  private large = false;

  get agree(): boolean {
    return !(this.marked && this.large);
  }

  add({ value, thousands }: NumberRead): void {
    if (thousands) this.marked = true;
    else if (Math.abs(value) >= 1000) this.large = true;
  }
}

function dateColumn(
  name: string,
  cells: readonly string[],
  lines: Uint32Array,
  missing: Uint8Array,
  filled: number,
): Typed | null {
  const values = new Float64Array(cells.length).fill(NaN);
  const bad: number[] = [];
  for (let i = 0; i < cells.length; i++) {
    if (missing[i]) continue;
    const day = isoDay(cells[i]);
    if (day !== null) values[i] = day;
    else {
      bad.push(i);
      if (!isMostly(bad.length, filled)) return null;
    }
  }
  return {
    column: { kind: "date", name, values },
    findings: bad.length > 0 ? [unreadable(name, bad, (i) => cells[i], lines, true)] : [],
  };
}

/** The finding for cells of a numeric or date column that are neither. @param bad rows in order; @param cell text of a row */
export function unreadable(
  column: string,
  bad: readonly number[],
  cell: (row: number) => string,
  lines: Uint32Array,
  dates = false,
): Finding {
  const examples: string[] = [];
  for (let k = 0; k < bad.length && examples.length < EXAMPLES; k++) {
    if (!examples.includes(cell(bad[k]))) examples.push(cell(bad[k]));
  }
  return { code: "unreadable-cells", column, lines: bad.map((i) => lines[i]), examples, ...(dates && { dates: true }) };
}

/** The finding for numbers that no double can hold. @param rows in order */
export function beyondRange(column: string, rows: readonly number[], lines: Uint32Array): Finding {
  return { code: "beyond-double-range", column, lines: rows.map((i) => lines[i]) };
}
