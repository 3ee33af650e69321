import type { Finding } from "../../engine/findings";
import { beyondRange, isMostly, unreadable } from "../column";
import type { Typed } from "../column";
import { isoDay } from "../date";
import { numberIn } from "../number";
import { arrangeWords } from "../words";

/** A scanned column of numbers; null where too many of its cells are none. @param odd rows that hold no number that a double holds */
export function finishNumbers(
  name: string,
  values: Float64Array,
  odd: ReadonlyMap<number, string>,
  lines: Uint32Array,
): Typed | null {
  const bad: number[] = [];
  const beyond: number[] = [];
  for (const [row, text] of odd) (numberIn(text, "point") === null ? bad : beyond).push(row);
  if (bad.length > 0) {
    let filled = odd.size;
    for (const value of values) if (value === value) filled++;
    if (!isMostly(bad.length, filled)) return null;
  }
  const findings: Finding[] = [];
  if (bad.length > 0) findings.push(unreadable(name, bad, (row) => odd.get(row)!, lines));
  if (beyond.length > 0) findings.push(beyondRange(name, beyond, lines));
  return { column: { kind: "number", name, values }, findings };
}

/**
 * A scanned column of words: whatever the general reader would make of it. Null where it alone can tell: bytes that are no text, blanks wider
 * than a byte around a cell, thousands marks.
 * @param codes one a row, by order of appearance in `texts`; changed in place
 */
export function finishWords(
  name: string,
  codes: Int32Array,
  texts: readonly string[] | null,
  lines: Uint32Array,
  isMissing: (cell: string) => boolean,
): Typed | null {
  if (!texts || texts.some((text) => text !== text.trim())) return null;
  const counts = new Int32Array(texts.length);
  for (const code of codes) if (code >= 0) counts[code]++;
  const gone = texts.map(isMissing);
  let filled = 0;
  counts.forEach((count, code) => (filled += gone[code] ? 0 : count));
  const numbers = texts.map((text, code) => (gone[code] ? null : numberIn(text, "point")));
  if (numbers.some((found) => found?.thousands)) return null;
  const failing = (test: (code: number) => boolean) =>
    counts.reduce((sum, count, code) => sum + (gone[code] || test(code) ? 0 : count), 0);
  const valueOf = (values: readonly (number | null)[]) =>
    Float64Array.from(codes, (code) => (code < 0 ? NaN : (values[code] ?? NaN)));

  if (
    filled === 0 ||
    isMostly(
      failing((code) => numbers[code] !== null),
      filled,
    )
  ) {
    const odd = new Map<number, string>();
    codes.forEach((code, row) => {
      if (code >= 0 && !gone[code] && !Number.isFinite(numbers[code]?.value)) odd.set(row, texts[code]);
    });
    const finite = numbers.map((found) => (found && Number.isFinite(found.value) ? found.value : null));
    return finishNumbers(name, valueOf(finite), odd, lines);
  }
  const days = texts.map((text, code) => (gone[code] ? null : isoDay(text)));
  if (
    isMostly(
      failing((code) => days[code] !== null),
      filled,
    )
  ) {
    const bad: number[] = [];
    codes.forEach((code, row) => {
      if (code >= 0 && !gone[code] && days[code] === null) bad.push(row);
    });
    const findings = bad.length > 0 ? [unreadable(name, bad, (row) => texts[codes[row]], lines, true)] : [];
    return { column: { kind: "date", name, values: valueOf(days) }, findings };
  }
  if (!gone.includes(true)) return { column: arrangeWords(name, texts, codes, filled), findings: [] };
  const place = new Int32Array(texts.length).fill(-1);
  const kept = texts.filter((_, code) => !gone[code]);
  for (let code = 0, at = 0; code < texts.length; code++) if (!gone[code]) place[code] = at++;
  for (let i = 0; i < codes.length; i++) if (codes[i] >= 0) codes[i] = place[codes[i]];
  return { column: arrangeWords(name, kept, codes, filled), findings: [] };
}
