import type { Finding, Problem } from "../engine/findings";
import type { Plan } from "../engine/plan";
import type { Column, Source, Table } from "../engine/table";
import { typeColumn } from "./column";
import { decode } from "./decode";
import type { ReaderMemory } from "./fast/memory";
import { readFast } from "./fast/read";
import { fingerprint } from "./fingerprint";
import { nameColumns } from "./headers";
import { missingTest } from "./missing";
import { checkQuotes } from "./quotes";
import { splitRows } from "./rows";
import { findSeparator } from "./separator";
import { decimalStyles } from "./style";

export interface ReadOptions {
  /** File name for people. */
  readonly file: string;
  /** A plan's marks of missing cells. */
  readonly missing?: Plan["missing"];
}

export type Read = { readonly ok: true; readonly table: Table } | { readonly ok: false; readonly problem: Problem };

/** A file with more columns than this is taken for no table. */
export const COLUMN_LIMIT = 20_000;

/**
 * A delimited text file as typed columns (DESIGN, Data). Every cell that could not be read, every row that was set aside and every header
 * that was repaired is a finding with its line; nothing else is dropped or changed, but for blanks around cells and line ends inside quotes,
 * which become line feeds. A file that cannot be a table gives a problem with its line, never an exception.
 * @param keep arrays kept from the last reading to write the columns into. The table of that reading is then no longer valid, whatever
 * this reading comes to. A memory serves one file at a time.
 */
export function readTable(bytes: Uint8Array, { file, missing }: ReadOptions, keep?: ReaderMemory): Read {
  const fast = readFast(bytes, missingTest(missing), keep);
  return fast ? { ok: true, table: { ...fast, source: sourceOf(bytes, file) } } : readGeneral(bytes, { file, missing });
}

/** The reader for every file, and the judge of the fast one. */
export function readGeneral(bytes: Uint8Array, { file, missing }: ReadOptions): Read {
  const fail = (problem: Problem): Read => ({ ok: false, problem: { ...problem, file } });
  const decoded = decode(bytes);
  if (!decoded.ok) return fail(decoded.problem);
  const separator = findSeparator(decoded.text);
  const quotes = checkQuotes(decoded.text, separator);
  if (!quotes.ok) return fail(quotes.problem);
  const split = splitRows(quotes.text, separator);
  if (!split.ok) return fail(split.problem);
  const { header, rows, lines, findings: ofRows } = split.rows;
  if (header.length > COLUMN_LIMIT) return fail({ code: "too-many-columns", columns: header.length, limit: COLUMN_LIMIT });
  const { names, findings: renamed } = nameColumns(header);
  const { isMissing } = missingTest(missing);
  const styles = separator === ";" ? decimalStyles(rows, names.length, isMissing) : null;
  const findings: Finding[] = [...renamed, ...ofRows];
  let commas = false;
  const columns = names.map((name, c) => {
    const cells = rows.map((row) => row[c]);
    const style = styles?.[c] ?? "point";
    const typed = typeColumn(name, cells, lines, isMissing, style);
    commas ||= style === "comma" && hasComma(typed.column, cells);
    findings.push(...typed.findings);
    return typed.column;
  });
  if (commas) findings.push({ code: "decimal-comma" });
  return { ok: true, table: { rows: rows.length, columns, lines, source: sourceOf(bytes, file), findings } };
}

/** Whether a number was read from a cell with a comma. */
function hasComma(column: Column, cells: readonly string[]): boolean {
  return column.kind === "number" && cells.some((cell, i) => !Number.isNaN(column.values[i]) && cell.includes(","));
}

const sourceOf = (bytes: Uint8Array, file: string): Source => ({ file, sha256: fingerprint(bytes), bytes: bytes.length });
