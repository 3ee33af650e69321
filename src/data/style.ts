import { numberIn } from "./number";
import type { NumberStyle } from "./number";

/** How one column's cells are written: cells that only one style can read, and cells like 1,234 that both can. */
interface Votes {
  comma: number;
  point: number;
  either: number;
}

/**
 * The decimal mark of every column of a file with ; between its cells. A column's own cells decide where any of them can be read in one style only;
 * 1,234 or 1.234 alone goes with the other columns, and where these say nothing a comma is a decimal comma and a point a decimal point.
 */
export function decimalStyles(
  rows: readonly (readonly string[])[],
  width: number,
  isMissing: (cell: string) => boolean,
): NumberStyle[] {
  const votes = Array.from({ length: width }, (_, c) => count(rows, c, isMissing));
  const own = votes.map((v): NumberStyle | null => (v.comma > v.point ? "comma" : v.point > 0 ? "point" : null));
  const balance = own.reduce((sum, style) => sum + (style === "comma" ? 1 : style === "point" ? -1 : 0), 0);
  return own.map((style, c) => {
    if (style !== null) return style;
    if (balance !== 0) return balance > 0 ? "comma" : "point";
    return votes[c].either > 0 ? "comma" : "point";
  });
}

function count(rows: readonly (readonly string[])[], column: number, isMissing: (cell: string) => boolean): Votes {
  const votes: Votes = { comma: 0, point: 0, either: 0 };
  for (const row of rows) {
    const cell = row[column];
    const hasComma = cell.includes(",");
    if ((!hasComma && !cell.includes(".")) || isMissing(cell)) continue;
    const comma = numberIn(cell, "comma") !== null;
    const point = numberIn(cell, "point") !== null;
    if (comma && !point) votes.comma++;
    else if (point && !comma) votes.point++;
    else if (comma && hasComma) votes.either++;
  }
  return votes;
}
