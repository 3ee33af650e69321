import Papa from "papaparse";
import type { Finding, Problem } from "../engine/findings";
import type { Separator } from "./separator";

/** The cells of every row that can be trusted, each row with its line, and what was found on the way. */
export interface Rows {
  readonly header: readonly string[];
  readonly rows: readonly (readonly string[])[];
  readonly lines: Uint32Array;
  readonly findings: readonly Finding[];
}

/** Splits the text into rows. Short rows are kept, the rest of them empty; long rows are set aside; blank lines are noted. */
export function splitRows(text: string, delimiter: Separator): { ok: true; rows: Rows } | { ok: false; problem: Problem } {
  const found: string[][] = [];
  const starts: number[] = [];
  let open = -1;
  let line = 1;
  let at = 0;
  Papa.parse<string[]>(text, {
    delimiter,
    newline: "\n", // carriage returns are taken off below, so that mixed line ends do no harm
    step: ({ data, errors, meta }) => {
      if (errors.some((e) => e.code === "MissingQuotes")) open = line;
      found.push(data);
      starts.push(line);
      line += countLines(text, at, meta.cursor);
      at = meta.cursor;
    },
  });
  if (open > 0) return { ok: false, problem: { code: "open-quote", line: open } };
  const blank = (row: readonly string[]) => row.length === 1 && row[0].trim() === "";
  const head = found.findIndex((row) => !blank(row));
  if (head < 0) return { ok: false, problem: { code: "file-empty" } };
  const header = found[head].map((cell) => cell.trim());
  const width = header.length;
  const short: number[] = [];
  const long: number[] = [];
  const blanks: number[] = [];
  const rows: string[][] = [];
  const lines: number[] = [];
  const lastFilled = found.findLastIndex((row) => !blank(row));
  for (let i = head + 1; i <= lastFilled; i++) {
    const row = found[i];
    if (blank(row) && width > 1) blanks.push(starts[i]);
    else if (row.length > width && row.slice(width).some((cell) => cell.trim() !== "")) long.push(starts[i]);
    else {
      if (row.length < width) short.push(starts[i]);
      rows.push(Array.from({ length: width }, (_, c) => (row[c] ?? "").trim()));
      lines.push(starts[i]);
    }
  }
  const findings: Finding[] = [];
  if (short.length > 0) findings.push({ code: "short-rows", lines: short });
  if (long.length > 0) findings.push({ code: "long-rows", lines: long });
  if (blanks.length > 0) findings.push({ code: "blank-lines", lines: blanks });
  if (rows.length === 0) return { ok: false, problem: { code: "no-data-rows" } };
  return { ok: true, rows: { header, rows, lines: Uint32Array.from(lines), findings } };
}

function countLines(text: string, from: number, to: number): number {
  let count = 0;
  for (let i = text.indexOf("\n", from); i >= 0 && i < to; i = text.indexOf("\n", i + 1)) count++;
  return count;
}
