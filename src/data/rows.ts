import Papa from "papaparse";
import type { Finding, Problem } from "../engine/findings";
import type { Separator } from "./separator";

/** The cells of every row that can be trusted, each row with its line, and what was found on the way. */
export interface Rows {
  /** Trimmed. */
  readonly header: readonly string[];
  /** Trimmed cells, as many a row as the header has. */
  readonly rows: readonly (readonly string[])[];
  /** 1-based line on which each row starts. */
  readonly lines: Uint32Array;
  readonly findings: readonly Finding[];
}

/** Splits nothing: stands for the separator of a file of one column. */
const NO_SEPARATOR = "\u001f";

/**
 * Splits the text into rows. Short rows are kept, the rest of them empty; long rows are set aside; blank lines are passed over: each with its
 * line, except for blank lines after the last row. Where every row is longer than the header by as many empty cells, the rows just end in separators.
 * @param text with line feeds and whole quotes (checkQuotes); @param separator null for one column
 */
export function splitRows(
  text: string,
  separator: Separator | null,
): { readonly ok: true; readonly rows: Rows } | { readonly ok: false; readonly problem: Problem } {
  const { found, starts } = parse(text, separator ?? NO_SEPARATOR);
  const isBlank = (row: readonly string[]) => row.length === 1 && row[0] === "";
  const head = found.findIndex((row) => !isBlank(row));
  if (head < 0) return { ok: false, problem: { code: "file-empty" } };
  const header = found[head];
  const width = header.length;
  const last = found.findLastIndex((row) => !isBlank(row));
  const spare = spareCells(found, head, last, width);
  const short: number[] = [];
  const long: number[] = [];
  const blanks: number[] = starts.slice(0, head);
  const rows: string[][] = [];
  const lines: number[] = [];
  for (let i = head + 1; i <= last; i++) {
    const row = found[i];
    if (isBlank(row) && width > 1) {
      blanks.push(starts[i]);
      continue;
    }
    if (row.length > width + spare) {
      long.push(starts[i]);
      continue;
    }
    if (row.length < width) short.push(starts[i]);
    while (row.length < width) row.push("");
    row.length = width;
    rows.push(row);
    lines.push(starts[i]);
  }
  if (rows.length === 0)
    return { ok: false, problem: { code: "no-data-rows", ...(long.length > 0 && { setAside: long.length }) } };
  const findings: Finding[] = [];
  if (short.length > 0) findings.push({ code: "short-rows", lines: short });
  if (long.length > 0) findings.push({ code: "long-rows", lines: long });
  if (blanks.length > 0) findings.push({ code: "blank-lines", lines: blanks });
  return { ok: true, rows: { header, rows, lines: Uint32Array.from(lines), findings } };
}

/** Every row's trimmed cells and the line on which it starts. */
function parse(text: string, delimiter: string): { found: string[][]; starts: number[] } {
  const found: string[][] = [];
  const starts: number[] = [];
  let line = 1;
  let at = 0;
  Papa.parse<string[]>(text, {
    delimiter,
    newline: "\n",
    step: ({ data, meta }) => {
      for (let c = 0; c < data.length; c++) data[c] = data[c].trim();
      found.push(data);
      starts.push(line);
      for (let end = text.indexOf("\n", at); end >= 0 && end < meta.cursor; end = text.indexOf("\n", end + 1)) line++;
      at = meta.cursor;
    },
  });
  return { found, starts };
}

/** Empty cells by which every row exceeds the header alike, else 0. */
function spareCells(found: readonly (readonly string[])[], head: number, last: number, width: number): number {
  if (last === head || width === 1) return 0;
  const spare = found[last].length - width;
  if (spare <= 0) return 0;
  for (let i = head + 1; i <= last; i++) {
    const row = found[i];
    if (row.length === 1 && row[0] === "") continue;
    if (row.length !== width + spare || row.slice(width).some((cell) => cell !== "")) return 0;
  }
  return spare;
}
