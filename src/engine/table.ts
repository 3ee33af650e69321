import type { Finding } from "./findings";

/** A file as typed columns: what the reader hands to everything behind it. Row i of every column is the same file row. */
export interface Table {
  /** Number of data rows kept (rows set aside as unreadable are not among them). */
  readonly rows: number;
  readonly columns: readonly Column[];
  /** For each row the 1-based line of the file on which it starts (a quoted newline makes rows span lines). */
  readonly lines: Uint32Array;
  /** Where the table came from. */
  readonly source: Source;
  /** What reading found: misread cells, short rows, repaired headers. */
  readonly findings: readonly Finding[];
}

/** Identity of the bytes a table was read from. */
export interface Source {
  /** File name as shown to people (no folder). */
  readonly file: string;
  /** Lower-case hex SHA-256 of the bytes. */
  readonly sha256: string;
  readonly bytes: number;
}

export type Column = NumberColumn | CategoryColumn;

/** Numbers, or ISO dates as days since 1970-01-01. */
export interface NumberColumn {
  readonly kind: "number" | "date";
  readonly name: string;
  /** One value a row; NaN marks a missing cell. Finite otherwise. */
  readonly values: Float64Array;
}

/** Words: a category, a two-valued yes/no, or free text (nearly every cell differs). */
export interface CategoryColumn {
  readonly kind: "category" | "yes/no" | "text";
  readonly name: string;
  /** Distinct cell texts in natural order (see engine/question/natural); of text in order of appearance, since nobody reads it as a list. */
  readonly levels: readonly string[];
  /** Index into `levels`, one a row; -1 marks a missing cell. */
  readonly codes: Int32Array;
}
