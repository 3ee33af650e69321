import { SEPARATOR_LINES, findSeparator } from "../separator";
import { COMMA, LF, SEMICOLON, splitLine } from "./line";
import { POINT, parseNumber } from "./number";
import type { Decimals } from "./decimals";

/** Places in the file and rows at each that are looked at. */
const PLACES = 8;
const ROWS = 32;

/** What a plain file looks like from its beginning and a few rows further on. */
export interface Look {
  /** Byte of the separator. */
  readonly separator: number;
  readonly decimals: Decimals;
  /** Pairs [from, to) of the header's trimmed cells. */
  readonly header: readonly number[];
  /** Where the rows start. */
  readonly start: number;
  /** For each column 1 where most of the cells looked at are numbers. A wrong guess costs time, never correctness. */
  readonly numeric: Uint8Array;
  /** About how many rows there are. */
  readonly rows: number;
}

/** Null where the file is not plain, has fewer than two columns, or has no rows. */
export function lookAt(bytes: Uint8Array): Look | null {
  const top = bytes[0] === 0xef && bytes[1] === 0xbb && bytes[2] === 0xbf ? 3 : 0;
  const separator = separatorOf(bytes, top);
  if (separator === null) return null;
  const open = separator === SEMICOLON && bytes.indexOf(COMMA) >= 0;
  const header = splitLine(bytes, top, separator);
  if (!header || header.cells.length < 4 || header.next >= bytes.length) return null;
  const width = header.cells.length / 2;
  const good = { point: new Int32Array(width), comma: new Int32Array(width) };
  const filled = new Int32Array(width);
  let seen = 0;
  let size = 0;
  for (let place = 0; place < PLACES; place++) {
    let at = placeOf(bytes, header.next, place);
    for (let k = 0; k < ROWS && at < bytes.length; k++) {
      const line = splitLine(bytes, at, separator);
      if (!line) return null;
      seen++;
      size += line.next - at;
      at = line.next;
      for (let c = 0; c < Math.min(width, line.cells.length / 2); c++) {
        const [from, to] = [line.cells[2 * c], line.cells[2 * c + 1]];
        if (from === to) continue;
        filled[c]++;
        if (!Number.isNaN(parseNumber(bytes, from, to))) good.point[c]++;
        if (open && !Number.isNaN(parseNumber(bytes, from, to, COMMA))) good.comma[c]++;
      }
    }
  }
  const isComma = open && total(good.comma) >= total(good.point);
  const decimals: Decimals = { mark: isComma ? COMMA : POINT, open };
  const numeric = Uint8Array.from(isComma ? good.comma : good.point, (count, c) =>
    2 * count > filled[c] || filled[c] === 0 ? 1 : 0,
  );
  return {
    separator,
    decimals,
    header: header.cells,
    start: header.next,
    numeric,
    rows: ((bytes.length - header.next) * seen) / size,
  };
}

const total = (counts: Int32Array): number => counts.reduce((sum, count) => sum + count, 0);

/** Start of the line after a place in the rows. */
function placeOf(bytes: Uint8Array, start: number, place: number): number {
  if (place === 0) return start;
  const end = bytes.indexOf(LF, start + Math.floor(((bytes.length - start) * place) / PLACES));
  return end < 0 ? bytes.length : end + 1;
}

/** The separator as the general reader finds it, which looks at no more lines than these. */
function separatorOf(bytes: Uint8Array, top: number): number | null {
  let end = top;
  for (let k = 0; k < SEPARATOR_LINES && end < bytes.length; k++) {
    const at = bytes.indexOf(LF, end);
    end = at < 0 ? bytes.length : at + 1;
  }
  let text: string;
  try {
    text = new TextDecoder("utf-8", { fatal: true, ignoreBOM: true }).decode(bytes.subarray(top, end));
  } catch {
    return null;
  }
  return findSeparator(text.replace(/\r\n?/g, "\n"))?.charCodeAt(0) ?? null;
}
