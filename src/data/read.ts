import type { Finding, Problem } from "../engine/findings";
import type { Plan } from "../engine/plan";
import type { Source, Table } from "../engine/table";
import { missingTest, numberIn } from "./cell";
import type { NumberStyle } from "./cell";
import { typeColumn } from "./column";
import { decode } from "./decode";
import { readFast } from "./fast/read";
import { fingerprint } from "./fingerprint";
import { nameColumns } from "./headers";
import { splitRows } from "./rows";
import { findSeparator } from "./separator";

export interface ReadOptions {
  /** File name for people. */
  readonly file: string;
  /** A plan's marks of missing cells. */
  readonly missing?: Plan["missing"];
}

export type Read = { readonly ok: true; readonly table: Table } | { readonly ok: false; readonly problem: Problem };

/** More columns than this are taken for a file that is no table. */
export const COLUMN_LIMIT = 20_000;

/**
 * A delimited text file as typed columns (DESIGN, Data). Every cell that could not be read, every row that was set aside and every header
 * that was repaired is a finding with its line; nothing else is dropped or changed.
 * A file that cannot be a table gives a problem with its line, never an exception.
 */
export function readTable(bytes: Uint8Array, options: ReadOptions): Read {
  const { file, missing } = options;
  const fast = readFast(bytes, { isMissing: missingTest(missing), numericMarks: numericMarks(missing) });
  return fast ? { ok: true, table: { ...fast, source: sourceOf(bytes, file) } } : readGeneral(bytes, options);
}

/** The reader for every file, and the judge of the fast one. */
export function readGeneral(bytes: Uint8Array, { file, missing }: ReadOptions): Read {
  const fail = (problem: Problem): Read => ({ ok: false, problem: { ...problem, file } });
  if (bytes.length === 0) return fail({ code: "file-empty" });
  const decoded = decode(bytes);
  if (!decoded.ok) return fail({ code: "bad-encoding", line: decoded.line });
  const text = decoded.text.includes("\r") ? decoded.text.replace(/\r\n?/g, "\n") : decoded.text;
  if (text.includes("\0")) return fail({ code: "bad-encoding", line: text.slice(0, text.indexOf("\0")).split("\n").length });
  const separator = findSeparator(text);
  const split = splitRows(text, separator);
  if (!split.ok) return fail(split.problem);
  const { header, rows, lines } = split.rows;
  if (header.length > COLUMN_LIMIT) return fail({ code: "too-many-columns", columns: header.length, limit: COLUMN_LIMIT });
  const { names, findings: renamed } = nameColumns(header);
  const findings: Finding[] = [...renamed, ...split.rows.findings];
  const isMissing = missingTest(missing);
  const style: NumberStyle = separator === ";" && usesComma(rows, isMissing) ? "comma" : "point";
  if (style === "comma") findings.push({ code: "decimal-comma" });
  const columns = names.map((name, c) => {
    const cells = rows.map((row) => row[c]);
    const typed = typeColumn(name, cells, lines, isMissing, style);
    findings.push(...typed.findings);
    return typed.column;
  });
  return { ok: true, table: { rows: rows.length, columns, lines, source: sourceOf(bytes, file), findings } };
}

const sourceOf = (bytes: Uint8Array, file: string): Source => ({ file, sha256: fingerprint(bytes), bytes: bytes.length });

/** A plan's marks that look like numbers, as the numbers they look like. */
function numericMarks(missing: Plan["missing"]): number[] {
  const marks = missing === undefined ? [] : "only" in missing ? missing.only : missing;
  return marks.flatMap((mark) => numberIn(mark.trim(), "point")?.value ?? []);
}

/** Whether the number-like cells agree on a decimal comma: some have one, and none has a decimal point that is no thousands mark. */
function usesComma(rows: readonly (readonly string[])[], isMissing: (cell: string) => boolean): boolean {
  let comma = 0;
  for (const row of rows) {
    for (const cell of row) {
      if (isMissing(cell)) continue;
      if (/^[+-]?\d*,\d+$/.test(cell)) comma++;
      else if (
        cell.includes(".") &&
        numberIn(cell, "point") !== null &&
        numberIn(cell, "comma") !== null &&
        !/^[+-]?\d{1,3}(\.\d{3})+$/.test(cell)
      )
        return false;
    }
  }
  return comma > 0;
}
