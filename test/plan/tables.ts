import { readTable } from "../../src/data/read";
import type { Table } from "../../src/engine/table";

/** A table from CSV text, read as a file would be. */
export function tableOf(csv: string, file = "flats.csv"): Table {
  const read = readTable(new TextEncoder().encode(csv), { file });
  if (!read.ok) throw new Error(read.problem.code);
  return read.table;
}

/** A CSV of `rows` rows; each column a function of the row's number. */
export function csvOf(rows: number, columns: Readonly<Record<string, (row: number) => string | number>>): string {
  const names = Object.keys(columns);
  const lines = Array.from({ length: rows }, (_, i) => names.map((name) => columns[name](i)).join(","));
  return [names.join(","), ...lines].join("\n") + "\n";
}

/** Twelve flats with a bit of everything. */
export const flats = tableOf(
  csvOf(12, {
    flat_id: (i) => `F${i}`,
    retrofit: (i) => ["none", "full"][i % 2],
    floor_m2: (i) => 50 + ((i * 7) % 12),
    tenure: (i) => ["owned", "rented", "shared"][i % 3],
    built: (i) => `19${50 + i}-03-01`,
    kwh: (i) => 4000 + ((i * 5) % 12) * 100,
    block: (i) => `B${i % 4}`,
  }),
);
