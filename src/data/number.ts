/**
 * What counts as a number in a cell. Read: an optional sign (+, -, or the minus sign U+2212), digits 0 to 9 with an optional decimal mark before,
 * between or after them (`.5`, `5.`), an optional exponent (`1e5`), or thousands marks in groups of three after a first digit that is no 0.
 * Not read, and so unreadable in a numeric column: `Infinity`, hexadecimal and binary (`0x1f`), digits of other scripts (full-width ones, say),
 * `1_000`, `1 000`, percent signs, currency signs, and brackets for a minus: each means different things to different people.
 */
const SIGN = "[+\\-\u2212]?";
const EXPONENT = "(?:[eE][+\\-\u2212]?\\d+)?";
const PLAIN = new RegExp(`^${SIGN}(?:\\d+\\.?\\d*|\\.\\d+)${EXPONENT}$`);
const THOUSANDS = new RegExp(`^${SIGN}[1-9]\\d{0,2}(?:,\\d{3})+(?:\\.\\d*)?$`);
const COMMA = new RegExp(`^${SIGN}(?:\\d+,?\\d*|,\\d+)${EXPONENT}$`);
const COMMA_THOUSANDS = new RegExp(`^${SIGN}[1-9]\\d{0,2}(?:\\.\\d{3})+(?:,\\d*)?$`);

/** Which mark stands before the decimals. */
export type NumberStyle = "point" | "comma";

export interface NumberRead {
  /** Correctly rounded; infinite beyond double range. */
  readonly value: number;
  /** Whether it has thousands marks. */
  readonly thousands: boolean;
}

/** A cell as a number, or null where it is none. @param cell trimmed */
export function numberIn(cell: string, style: NumberStyle): NumberRead | null {
  if (style === "point") {
    if (PLAIN.test(cell)) return { value: toNumber(cell), thousands: false };
    return THOUSANDS.test(cell) ? { value: toNumber(cell.replaceAll(",", "")), thousands: true } : null;
  }
  if (COMMA.test(cell)) return { value: toNumber(cell.replace(",", ".")), thousands: false };
  return COMMA_THOUSANDS.test(cell) ? { value: toNumber(cell.replaceAll(".", "").replace(",", ".")), thousands: true } : null;
}

/** A cell without thousands marks and with a decimal point as a number, NaN where it is none. @param cell trimmed */
export function plainNumber(cell: string): number {
  return PLAIN.test(cell) ? toNumber(cell) : NaN;
}

const toNumber = (text: string): number => Number(text.includes("\u2212") ? text.replaceAll("\u2212", "-") : text);
