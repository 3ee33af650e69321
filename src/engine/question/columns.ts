import type { Column, NumberColumn, Table } from "../table";

/** Groups of rows by a column: levels and each row's level (−1 missing). */
export interface Groups {
  readonly levels: readonly string[];
  readonly codes: Int32Array;
}

export function findColumn(table: Table, name: string): Column | undefined {
  return table.columns.find((column) => column.name === name);
}

export function isAmount(column: Column): column is NumberColumn {
  return column.kind === "number" || column.kind === "date";
}

/** The distinct values of a numeric column, ascending; stops beyond `limit` and returns null. */
export function distinctValues(values: Float64Array, limit: number): number[] | null {
  const seen = new Set<number>();
  let last = NaN;
  let before = NaN;
  for (let i = 0; i < values.length; i++) {
    const value = values[i];
    // the two values seen last need no looking up: groups coded 0 and 1
    if (value === last || value === before || value !== value) continue;
    before = last;
    last = value;
    seen.add(value === 0 ? 0 : value); // −0 is 0
    if (seen.size > limit) return null;
  }
  return [...seen].sort((a, b) => a - b);
}

const known = new WeakMap<NumberColumn, Groups>();

/** Any column as groups: words as they are, numbers by value in ascending order (worked out once a column). */
export function asGroups(column: Column): Groups {
  if (!isAmount(column)) return column;
  let groups = known.get(column);
  if (!groups) known.set(column, (groups = numberGroups(column)));
  return groups;
}

function numberGroups(column: NumberColumn): Groups {
  const distinct = distinctValues(column.values, Infinity)!;
  const place = new Map(distinct.map((value, at) => [value, at]));
  const { values } = column;
  const codes = new Int32Array(values.length);
  const [first, second] = distinct;
  for (let i = 0; i < values.length; i++) {
    const value = values[i];
    codes[i] = value === first ? 0 : value === second ? 1 : value !== value ? -1 : place.get(value === 0 ? 0 : value)!;
  }
  return { levels: distinct.map(String), codes };
}

/** Whether a column is groups by nature: words, or a numeric column with exactly two values (METHODS 2). */
export function isGroupsByNature(column: Column): boolean {
  if (column.kind === "date") return false;
  return column.kind !== "number" || distinctValues(column.values, 2)?.length === 2;
}
