import type { Finding } from "../../src/engine/findings";
import type { Column, Table } from "../../src/engine/table";
import type { Read } from "../../src/data/read";

/** A column as a person would list it: its kind and its cells, null where a cell is missing. */
export type ShownColumn = [kind: Column["kind"], ...cells: (number | string | null)[]];

export interface Shown {
  columns: Record<string, ShownColumn>;
  lines: number[];
  findings: Finding[];
}

/** What a reading came to, without identity of the file. Columns keep their order in the record unless a name is a whole number. */
export function shown(read: Read): Shown | { problem: string; line?: number } {
  if (!read.ok) return { problem: read.problem.code, ...(read.problem.line !== undefined && { line: read.problem.line }) };
  const { table } = read;
  return {
    columns: Object.fromEntries(table.columns.map((column) => [column.name, [column.kind, ...cellsOf(column)]])),
    lines: [...table.lines],
    findings: [...table.findings],
  };
}

export function cellsOf(column: Column): (number | string | null)[] {
  if ("values" in column) return Array.from(column.values, (value) => (Number.isNaN(value) ? null : value));
  return Array.from(column.codes, (code) => (code < 0 ? null : column.levels[code]));
}

/** The table or a failing test. */
export function tableOf(read: Read): Table {
  if (!read.ok) throw new Error(`not a table: ${JSON.stringify(read.problem)}`);
  return read.table;
}
