import type { Plan } from "../engine/plan";
import { plainNumber } from "./number";

/** Marks of a missing cell, compared after trimming and in lower case (DESIGN, Data). */
export const MISSING_MARKS = ["", "na", "n/a", "nan", "null", ".", "-", "#n/a"] as const;

/** What counts as a missing cell. */
export interface MissingTest {
  /** @param cell trimmed */
  readonly isMissing: (cell: string) => boolean;
  /** Values of the marks that are numbers. */
  readonly numbers: ReadonlySet<number>;
}

/**
 * The default marks and a plan's own, or the plan's alone; an empty cell always. Letter case is ignored. A mark that is a number stands for
 * that number however it is written: −99 is also −99.0, since programs write a column of whole numbers with gaps in that way.
 */
export function missingTest(marks?: Plan["missing"]): MissingTest {
  const only = marks !== undefined && "only" in marks;
  const own = (marks === undefined ? [] : only ? marks.only : (marks as readonly string[])).map((mark) =>
    mark.trim().toLowerCase(),
  );
  const texts = new Set<string>(only ? ["", ...own] : [...MISSING_MARKS, ...own]);
  const numbers = new Set(own.map(plainNumber).filter((value) => Number.isFinite(value)));
  // Most cells are no mark by their length or their first character.
  const longest = Math.max(...[...texts].map((text) => text.length));
  const firsts = new Set([...texts].map((text) => text.slice(0, 1)));
  const isText = (cell: string): boolean => {
    if (cell === "") return true;
    if (cell.length > longest || !firsts.has(cell[0].toLowerCase())) return false;
    return texts.has(cell) || texts.has(cell.toLowerCase());
  };
  const isMissing = (cell: string): boolean => isText(cell) || (numbers.size > 0 && numbers.has(plainNumber(cell)));
  return { isMissing, numbers };
}
