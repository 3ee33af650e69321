import type { Finding } from "../../engine/findings";
import { beyondRange, isMostly, unreadable } from "../column";
import type { Typed } from "../column";
import { isoDay } from "../date";
import type { NumberRead } from "../number";
import { arrangeWords } from "../words";
import { readAs } from "./decimals";
import type { Decimals } from "./decimals";

/**
 * A scanned column of numbers; null where too many of its cells are none.
 * @param odd rows that hold no number that a double holds; @param decimals how the file's numbers are written
 */
export function finishNumbers(
  name: string,
  values: Float64Array,
  odd: ReadonlyMap<number, string>,
  lines: Uint32Array,
  decimals: Decimals,
): Typed | null {
  const bad: number[] = [];
  const beyond: number[] = [];
  for (const [row, text] of odd) (readAs(text, decimals) === null ? bad : beyond).push(row);
  if (bad.length > 0) {
    let filled = odd.size;
    for (let i = 0; i < values.length; i++) if (values[i] === values[i]) filled++;
    if (!isMostly(bad.length, filled)) return null;
  }
  const findings: Finding[] = [];
  if (bad.length > 0) findings.push(unreadable(name, bad, (row) => odd.get(row)!, lines));
  if (beyond.length > 0) findings.push(beyondRange(name, beyond, lines));
  return { column: { kind: "number", name, values }, findings };
}

/**
 * A scanned column of words: whatever the general reader would make of it. Null where it alone can tell: bytes that are no text, blanks wider
 * than a byte around a cell, cells that `readAs` is unsure of.
 * @param codes one a row, by order of appearance in `texts`; changed in place
 */
export function finishWords(
  name: string,
  codes: Int32Array,
  texts: readonly string[] | null,
  lines: Uint32Array,
  isMissing: (cell: string) => boolean,
  decimals: Decimals,
): (Typed & { readonly marked?: boolean }) | null {
  if (!texts || texts.some((text) => text !== text.trim())) return null;
  const counts = countCodes(codes, texts.length);
  const gone = texts.map(isMissing);
  const numbers: (NumberRead | null)[] = [];
  for (let code = 0; code < texts.length; code++) {
    const found = gone[code] ? null : readAs(texts[code], decimals);
    if (found === "unsure") return null;
    numbers.push(found);
  }
  let filled = 0;
  let noNumbers = 0;
  for (let code = 0; code < texts.length; code++) {
    if (gone[code]) continue;
    filled += counts[code];
    if (numbers[code] === null) noNumbers += counts[code];
  }
  if (filled === 0 || isMostly(noNumbers, filled)) {
    const value = numbers.map((found) => (found && Number.isFinite(found.value) ? found.value : NaN));
    const odd = new Map<number, string>();
    for (const row of rowsOf(codes, (code) => !gone[code] && value[code] !== value[code])) odd.set(row, texts[codes[row]]);
    const typed = finishNumbers(name, translated(codes, value), odd, lines, decimals);
    const sign = String.fromCharCode(decimals.mark);
    return typed && { ...typed, marked: texts.some((text, code) => value[code] === value[code] && text.includes(sign)) };
  }
  const days = texts.map((text, code) => (gone[code] ? NaN : (isoDay(text) ?? NaN)));
  const isNoDay = (code: number) => !gone[code] && days[code] !== days[code];
  if (
    isMostly(
      days.reduce((sum, _, code) => sum + (isNoDay(code) ? counts[code] : 0), 0),
      filled,
    )
  ) {
    const bad = rowsOf(codes, isNoDay);
    const findings = bad.length > 0 ? [unreadable(name, bad, (row) => texts[codes[row]], lines, true)] : [];
    return { column: { kind: "date", name, values: translated(codes, days) }, findings };
  }
  return { column: arrangeWords(name, texts, codes, filled, gone), findings: [] };
}

/** How often each code occurs. */
function countCodes(codes: Int32Array, size: number): Int32Array {
  const counts = new Int32Array(size);
  for (let i = 0; i < codes.length; i++) if (codes[i] >= 0) counts[codes[i]]++;
  return counts;
}

/** Each row's value by its code; NaN without one. */
function translated(codes: Int32Array, values: readonly number[]): Float64Array {
  const out = new Float64Array(codes.length);
  for (let i = 0; i < codes.length; i++) out[i] = codes[i] < 0 ? NaN : values[codes[i]];
  return out;
}

/** Rows with a code that passes, in order. */
function rowsOf(codes: Int32Array, passes: (code: number) => boolean): number[] {
  const rows: number[] = [];
  for (let i = 0; i < codes.length; i++) if (codes[i] >= 0 && passes(codes[i])) rows.push(i);
  return rows;
}
