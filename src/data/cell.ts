/** Marks of a missing cell, compared after trimming and in lower case (DESIGN, Data). */
export const MISSING_MARKS = ["", "na", "n/a", "nan", "null", ".", "-", "#n/a"] as const;

/** A test for missing cells: the default marks and a plan's own, or the plan's alone. */
export function missingTest(extra?: readonly string[] | { readonly only: readonly string[] }): (cell: string) => boolean {
  const own = extra === undefined ? [] : "only" in extra ? ["", ...extra.only] : extra;
  const base: readonly string[] = extra !== undefined && "only" in extra ? [] : MISSING_MARKS;
  const marks = new Set([...base, ...own.map((mark) => mark.trim().toLowerCase())]);
  return (cell) => marks.has(cell) || marks.has(cell.toLowerCase());
}

const PLAIN = /^[+\-\u2212]?(\d+\.?\d*|\.\d+)(e[+-]?\d+)?$/i;
const THOUSANDS = /^[+\-\u2212]?\d{1,3}(,\d{3})+(\.\d*)?$/;
const COMMA = /^[+\-\u2212]?(\d+,?\d*|,\d+)(e[+-]?\d+)?$/i;
const COMMA_THOUSANDS = /^[+\-\u2212]?\d{1,3}(\.\d{3})+(,\d*)?$/;

export type NumberStyle = "point" | "comma";

/** A cell as a number: its value, whether it has thousands marks, or null. Values beyond double range come back infinite. */
export function numberIn(cell: string, style: NumberStyle): { readonly value: number; readonly thousands: boolean } | null {
  const text = cell.includes("\u2212") ? cell.replace("\u2212", "-") : cell;
  if (style === "point") {
    if (PLAIN.test(text)) return { value: Number(text), thousands: false };
    return THOUSANDS.test(text) ? { value: Number(text.replaceAll(",", "")), thousands: true } : null;
  }
  if (COMMA.test(text)) return { value: Number(text.replace(",", ".")), thousands: false };
  if (COMMA_THOUSANDS.test(text)) return { value: Number(text.replaceAll(".", "").replace(",", ".")), thousands: true };
  return PLAIN.test(text) ? { value: Number(text), thousands: false } : null;
}

const ISO = /^(\d{4})-(\d{2})-(\d{2})$/;

/** An ISO date (YYYY-MM-DD, a day that exists) as days since 1970-01-01, else null. Times of day are not read as dates. */
export function isoDay(cell: string): number | null {
  const found = ISO.exec(cell);
  if (!found) return null;
  const [year, month, day] = found.slice(1).map(Number);
  const date = new Date(Date.UTC(year, month - 1, day));
  date.setUTCFullYear(year);
  return date.getUTCMonth() === month - 1 && date.getUTCDate() === day ? Math.round(date.getTime() / 86_400_000) : null;
}
