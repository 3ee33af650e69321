import { numberIn } from "../number";
import type { NumberRead } from "../number";
import { COMMA } from "./line";

/** The decimal mark of a plain file. */
export interface Decimals {
  /** Byte of the mark. */
  readonly mark: number;
  /** Whether the other mark could stand for it in some column: the separator is ; and there are commas in the file. */
  readonly open: boolean;
}

/**
 * A cell as a number where it hangs on nothing but the cell; null for none. "unsure" where other cells have a say: thousands marks, which count
 * only where a column is alike in them, and a number with the other decimal mark.
 */
export function readAs(text: string, { mark, open }: Decimals): NumberRead | null | "unsure" {
  const [style, other] = mark === COMMA ? (["comma", "point"] as const) : (["point", "comma"] as const);
  const found = numberIn(text, style);
  if (found?.thousands || (found === null && open && numberIn(text, other) !== null)) return "unsure";
  return found;
}
