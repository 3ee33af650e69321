import type { Comparison } from "../../engine/comparison";
import type { Presentation } from "../presentation";

/** What a block printed, kept in its marker so that a later reading can say "was −212". */
export interface Printed {
  /** Rows common to all sets. */
  readonly rows: number;
  /** Sets looked at. */
  readonly sets: number;
  /** What the reported set holds fixed, as the table names it. */
  readonly reported: string;
  /** Contrast by contrast the table's rows: held fixed, difference, shift, in a word. */
  readonly tables: readonly (readonly [contrast: string, rows: readonly PrintedRow[]])[];
}

export type PrintedRow = readonly [held: string, difference: string, shift: string, word: string];

/** What a comparison prints now. */
export function printedOf({ blocks }: Presentation, { rows, sets }: Comparison): Printed {
  const reported = blocks[0]?.rows.find((row) => row.reported)?.held ?? "";
  const tables = blocks.map(
    (block) => [block.contrast, block.rows.map((row) => [row.held, row.difference, row.shift, row.word] as const)] as const,
  );
  return { rows: rows.common, sets: sets.length, reported, tables };
}

/** The JSON of a marker as what was printed; null where it is anything else. */
export function readPrinted(json: string): Printed | null {
  let read: unknown;
  try {
    read = JSON.parse(json);
  } catch {
    return null;
  }
  if (typeof read !== "object" || read === null) return null;
  const { rows, sets, reported, tables } = read as Record<string, unknown>;
  const isTable = (table: unknown) =>
    Array.isArray(table) &&
    table.length === 2 &&
    typeof table[0] === "string" &&
    Array.isArray(table[1]) &&
    table[1].every(isRow);
  if (!Number.isSafeInteger(rows) || !Number.isSafeInteger(sets) || typeof reported !== "string") return null;
  return Array.isArray(tables) && tables.every(isTable) ? (read as Printed) : null;
}

const isRow = (row: unknown): boolean => Array.isArray(row) && row.length === 4 && row.every((cell) => typeof cell === "string");
