export const [LF, CR, QUOTE, COMMA, SEMICOLON] = [10, 13, 34, 44, 59];

/** Where a cell is: its trimmed bytes [from, to), and the separator or line end after it, or the end of the bytes. */
export interface Span {
  from: number;
  to: number;
  end: number;
}

const decoder = new TextDecoder("utf-8", { fatal: true, ignoreBOM: true });

/**
 * Finds the cell that starts at `at`; false where it is not plain: a quote inside it, or a quoted cell with a quote or a line end inside or
 * something other than a separator or line end after it.
 */
export function findCell(bytes: Uint8Array, at: number, separator: number, into: Span): boolean {
  const size = bytes.length;
  let i = at;
  let from = at;
  let to = at;
  if (i < size && bytes[i] === QUOTE) {
    from = ++i;
    while (i < size && bytes[i] !== QUOTE && bytes[i] !== LF && bytes[i] !== CR) i++;
    if (i >= size || bytes[i] !== QUOTE) return false;
    to = i++;
    if (i < size && bytes[i] !== separator && bytes[i] !== LF && bytes[i] !== CR) return false;
  } else {
    while (i < size && bytes[i] !== separator && bytes[i] !== LF && bytes[i] !== CR) if (bytes[i++] === QUOTE) return false;
    to = i;
  }
  while (from < to && isSpace(bytes[from])) from++;
  while (to > from && isSpace(bytes[to - 1])) to--;
  into.from = from;
  into.to = to;
  into.end = i;
  return true;
}

/** The trimmed cells of the line at `at` as pairs [from, to), and where the next line starts; null where the line is not plain. */
export function splitLine(bytes: Uint8Array, at: number, separator: number): { cells: number[]; next: number } | null {
  const cells: number[] = [];
  const span: Span = { from: 0, to: 0, end: 0 };
  for (let i = at; ; i = span.end + 1) {
    if (!findCell(bytes, i, separator, span)) return null;
    cells.push(span.from, span.to);
    if (span.end >= bytes.length) return { cells, next: bytes.length };
    if (bytes[span.end] === separator) continue;
    if (bytes[span.end] === LF) return { cells, next: span.end + 1 };
    return bytes[span.end + 1] === LF ? { cells, next: span.end + 2 } : null;
  }
}

/** Text of bytes [from, to) as it stands, null where they are not UTF-8 or hold a zero character. */
export function textIn(bytes: Uint8Array, from: number, to: number): string | null {
  try {
    const text = decoder.decode(bytes.subarray(from, to));
    return text.includes("\0") ? null : text;
  } catch {
    return null;
  }
}

/** Blanks of one byte. Wider ones are found when the text is decoded. */
export const isSpace = (byte: number): boolean => byte === 32 || (byte >= 9 && byte <= 13);
