import { distinctValues } from "../engine/question/columns";
import type { Column, Table } from "../engine/table";

/** What a choice of columns looks at. */
export interface Profile {
  readonly column: Column;
  readonly missing: number;
  /** Distinct filled values; for numbers counted up to `DISTINCT_LIMIT` only, one more standing for "more". */
  readonly distinct: number;
  /** Numbers (a date too). */
  readonly numeric: boolean;
  /** Tells rows apart instead of saying something about them: a name such as `flat_id`, or whole numbers that rise by one. */
  readonly idLike: boolean;
}

const DISTINCT_LIMIT = 6;

export function profileOf(column: Column): Profile {
  const numeric = column.kind === "number" || column.kind === "date";
  const missing = "values" in column ? count(column.values, Number.isNaN) : count(column.codes, (code) => code < 0);
  const distinct =
    "values" in column ? (distinctValues(column.values, DISTINCT_LIMIT)?.length ?? DISTINCT_LIMIT + 1) : column.levels.length;
  return {
    column,
    missing,
    distinct,
    numeric,
    idLike: namedAsId(column.name) || ("values" in column && column.kind === "number" && risesByOne(column.values)),
  };
}

export const profiles = (table: Table): Profile[] => table.columns.map(profileOf);

const ID_WORDS = new Set(["id", "ids", "uuid", "guid", "key", "index", "idx"]);

/** `flat_id`, `patientId`, `ID`, `id no`: the first or the last word of the name is one for an identifier. */
function namedAsId(name: string): boolean {
  const parts = name
    .replace(/([\p{Ll}\d])(\p{Lu})/gu, "$1 $2")
    .toLowerCase()
    .split(/[\s_.-]+/)
    .filter((part) => part !== "");
  return parts.length > 0 && (ID_WORDS.has(parts[0]) || ID_WORDS.has(parts[parts.length - 1]));
}

/** A row number: each filled cell one more than the filled cell before it. */
function risesByOne(values: Float64Array): boolean {
  let before = NaN;
  let filled = 0;
  for (const value of values) {
    if (Number.isNaN(value)) continue;
    if (filled > 0 && value !== before + 1) return false;
    before = value;
    filled++;
  }
  return filled > 2 && Number.isInteger(before);
}

function count(values: Float64Array | Int32Array, holds: (value: number) => boolean): number {
  let found = 0;
  for (const value of values) if (holds(value)) found++;
  return found;
}
