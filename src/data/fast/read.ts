import type { Finding } from "../../engine/findings";
import type { Column } from "../../engine/table";
import { isoDay, numberIn } from "../cell";
import { arrangeWords, isMostly, typeColumn, unreadable } from "../column";
import { nameColumns } from "../headers";
import { Dictionary } from "./dictionary";
import { parseNumber } from "./number";

/** Columns read from plain bytes: what the general reader would have made of them, cell for cell. */
export interface FastTable {
  readonly rows: number;
  readonly columns: readonly Column[];
  readonly lines: Uint32Array;
  readonly findings: readonly Finding[];
}

export interface FastOptions {
  readonly isMissing: (cell: string) => boolean;
  /** Values that a mark of a missing cell would be read as (−99, say). */
  readonly numericMarks: readonly number[];
}

/** Rows looked at to guess whether a column holds numbers; a wrong guess costs time, never correctness. */
const LOOK = 200;
const [LF, CR, QUOTE, SPACE, COMMA, SEMICOLON, TAB, BAR] = [10, 13, 34, 32, 44, 59, 9, 124];

interface Builder {
  readonly numeric: boolean;
  readonly values: Float64Array;
  readonly codes: Int32Array;
  readonly words: Dictionary;
  /** Rows whose cell is no plain number, with its text. */
  readonly odd: Map<number, string>;
}

/**
 * Reads a plain file straight from its bytes: separators , ; tab |, quotes only around a whole cell without a quote or line end inside, LF or
 * CRLF. Null for anything else: the general reader then takes the file. It is also the judge: tests hold the two equal cell for cell.
 */
export function readFast(bytes: Uint8Array, options: FastOptions): FastTable | null {
  const start = bytes[0] === 0xef && bytes[1] === 0xbb && bytes[2] === 0xbf ? 3 : 0;
  if (bytes.includes(0) || (bytes[0] >= 0xfe && bytes[1] >= 0xfe)) return null;
  const lineEnds = countLines(bytes);
  const separator = plainSeparator(bytes, start);
  if (separator === null || (separator === SEMICOLON && bytes.includes(COMMA))) return null;
  const cells = new Int32Array(2 * 4096);
  const head = splitLine(bytes, start, separator, cells);
  if (!head || head.cells < 2 || head.next >= bytes.length) return null;
  const width = head.cells;
  const header = decodeCells(bytes, cells, width);
  if (!header) return null;
  const guesses = guessNumeric(bytes, head.next, separator, width);
  if (!guesses) return null;
  const capacity = lineEnds + 1;
  const builders = guesses.map((numeric): Builder => ({
    numeric,
    values: new Float64Array(numeric ? capacity : 0),
    codes: new Int32Array(numeric ? 0 : capacity),
    words: new Dictionary(bytes),
    odd: new Map(),
  }));
  const lines = new Uint32Array(capacity);
  const short: number[] = [];
  const blanks: number[] = [];
  let pendingBlanks: number[] = [];
  let rows = 0;
  let line = 2;
  for (let at = head.next; at < bytes.length; line++) {
    const found = splitLine(bytes, at, separator, cells);
    if (!found) return null;
    at = found.next;
    if (found.cells === 1 && cells[0] === cells[1]) {
      pendingBlanks.push(line);
      continue;
    }
    if (found.cells > width) return null; // set aside or not: the general reader decides
    blanks.push(...pendingBlanks);
    pendingBlanks = [];
    if (found.cells < width) short.push(line);
    for (let c = 0; c < width; c++) {
      const [from, to] = c < found.cells ? [cells[2 * c], cells[2 * c + 1]] : [0, 0];
      if (!addCell(builders[c], bytes, rows, from, to, options)) return null;
    }
    lines[rows++] = line;
  }
  if (rows === 0) return null;
  const used = lines.subarray(0, rows);
  const { names, findings: renamed } = nameColumns(header);
  const findings: Finding[] = [...renamed];
  if (short.length > 0) findings.push({ code: "short-rows", lines: short });
  if (blanks.length > 0) findings.push({ code: "blank-lines", lines: blanks });
  const columns: Column[] = [];
  for (let c = 0; c < width; c++) {
    const made = builders[c].numeric
      ? numberColumn(names[c], builders[c], rows, used)
      : wordColumn(names[c], builders[c], rows, used, options.isMissing);
    if (!made) return null;
    columns.push(made.column);
    findings.push(...made.findings);
  }
  return { rows, columns, lines: used, findings };
}

function addCell(
  builder: Builder,
  bytes: Uint8Array,
  row: number,
  from: number,
  to: number,
  { isMissing, numericMarks }: FastOptions,
): boolean {
  if (!builder.numeric) {
    builder.codes[row] = from === to ? -1 : builder.words.code(from, to);
    return true;
  }
  if (from === to) {
    builder.values[row] = NaN;
    return true;
  }
  const value = parseNumber(bytes, from, to);
  builder.values[row] = value;
  if (value - value === 0 && !numericMarks.includes(value)) return true;
  const text = decodeCell(bytes, from, to);
  if (text === null) return false;
  if (isMissing(text)) builder.values[row] = NaN;
  else if (!Number.isFinite(value)) {
    builder.values[row] = NaN;
    builder.odd.set(row, text);
    if (numberIn(text, "point") !== null && !isBeyond(text)) return false; // thousands marks: the general reader's business
  }
  return true;
}

const isBeyond = (text: string): boolean => !Number.isFinite(numberIn(text, "point")!.value);

function numberColumn(
  name: string,
  { values, odd }: Builder,
  rows: number,
  lines: Uint32Array,
): { column: Column; findings: Finding[] } | null {
  const own = values.subarray(0, rows);
  let filled = odd.size;
  for (const value of own) if (value === value) filled++;
  const bad: number[] = [];
  const beyond: number[] = [];
  for (const [row, text] of odd) (numberIn(text, "point") === null ? bad : beyond).push(row);
  if (!isMostly(bad.length, filled)) return null;
  const findings: Finding[] = [];
  if (bad.length > 0) findings.push(unreadable(name, bad, Object.fromEntries(odd), lines));
  if (beyond.length > 0) findings.push({ code: "beyond-double-range", column: name, lines: beyond.map((row) => lines[row]) });
  return { column: { kind: "number", name, values: own }, findings };
}

function wordColumn(
  name: string,
  { codes, words }: Builder,
  rows: number,
  lines: Uint32Array,
  isMissing: (cell: string) => boolean,
): { column: Column; findings: Finding[] } | null {
  const texts = words.decode();
  if (!texts || texts.some((text) => text !== text.trim())) return null;
  const own = codes.subarray(0, rows);
  const counts = new Int32Array(texts.length);
  for (const code of own) if (code >= 0) counts[code]++;
  const gone = texts.map(isMissing);
  let filled = 0;
  let notNumbers = 0;
  let notDates = 0;
  texts.forEach((text, code) => {
    if (gone[code]) return;
    filled += counts[code];
    if (numberIn(text, "point") === null) notNumbers += counts[code];
    if (isoDay(text) === null) notDates += counts[code];
  });
  if (filled === 0 || isMostly(notNumbers, filled) || isMostly(notDates, filled)) {
    const cells = Array.from(own, (code) => (code < 0 ? "" : texts[code]));
    return typeColumn(name, cells, lines, isMissing, "point");
  }
  if (!gone.includes(true)) return { column: arrangeWords(name, texts, own, filled), findings: [] };
  const kept = texts.filter((_, code) => !gone[code]);
  const place = new Int32Array(texts.length).fill(-1);
  for (let code = 0, at = 0; code < texts.length; code++) if (!gone[code]) place[code] = at++;
  for (let i = 0; i < own.length; i++) if (own[i] >= 0) own[i] = place[own[i]];
  return { column: arrangeWords(name, kept, own, filled), findings: [] };
}

/** Splits the line at `at` into trimmed cells [from, to) pairs; null where it is not plain. */
function splitLine(bytes: Uint8Array, at: number, separator: number, cells: Int32Array): { cells: number; next: number } | null {
  const end = bytes.length;
  let count = 0;
  let i = at;
  for (;;) {
    if (2 * count + 2 > cells.length) return null;
    if (bytes[i] === QUOTE) {
      const from = ++i;
      while (i < end && bytes[i] !== QUOTE && bytes[i] !== LF) i++;
      if (i >= end || bytes[i] !== QUOTE) return null;
      put(bytes, cells, count++, from, i++);
      if (i < end && bytes[i] !== separator && bytes[i] !== LF && !(bytes[i] === CR && bytes[i + 1] === LF)) return null;
    } else {
      const from = i;
      while (i < end) {
        const byte = bytes[i];
        if (byte === separator || byte === LF || byte === QUOTE || byte === CR) break;
        i++;
      }
      if (i < end && bytes[i] === QUOTE) return null;
      put(bytes, cells, count++, from, i);
    }
    if (i >= end) return { cells: count, next: end };
    if (bytes[i] === separator) {
      i++;
      continue;
    }
    if (bytes[i] === CR && (i + 1 >= end || bytes[++i] !== LF)) return null;
    return { cells: count, next: i + 1 };
  }
}

function put(bytes: Uint8Array, cells: Int32Array, count: number, from: number, to: number): void {
  while (from < to && isSpace(bytes[from])) from++;
  while (to > from && isSpace(bytes[to - 1])) to--;
  cells[2 * count] = from;
  cells[2 * count + 1] = to;
}

const isSpace = (byte: number): boolean => byte === SPACE || (byte >= 9 && byte <= 13);

function guessNumeric(bytes: Uint8Array, at: number, separator: number, width: number): boolean[] | null {
  const cells = new Int32Array(2 * 4096);
  const good = new Int32Array(width);
  const filled = new Int32Array(width);
  for (let k = 0; k < LOOK && at < bytes.length; k++) {
    const found = splitLine(bytes, at, separator, cells);
    if (!found) return null;
    at = found.next;
    for (let c = 0; c < Math.min(width, found.cells); c++) {
      if (cells[2 * c] === cells[2 * c + 1]) continue;
      filled[c]++;
      if (!Number.isNaN(parseNumber(bytes, cells[2 * c], cells[2 * c + 1]))) good[c]++;
    }
  }
  return Array.from(good, (count, c) => count * 2 > filled[c]);
}

/** The separator when the first line leaves no doubt: only one of the four stands in it. */
function plainSeparator(bytes: Uint8Array, start: number): number | null {
  const seen = new Set<number>();
  for (let i = start; i < bytes.length && bytes[i] !== LF; i++) {
    if (bytes[i] === QUOTE) return null;
    if (bytes[i] === COMMA || bytes[i] === SEMICOLON || bytes[i] === TAB || bytes[i] === BAR) seen.add(bytes[i]);
  }
  return seen.size === 1 ? [...seen][0] : null;
}

function countLines(bytes: Uint8Array): number {
  let count = 0;
  for (let i = bytes.indexOf(LF); i >= 0; i = bytes.indexOf(LF, i + 1)) count++;
  return count;
}

function decodeCells(bytes: Uint8Array, cells: Int32Array, width: number): string[] | null {
  const out: string[] = [];
  for (let c = 0; c < width; c++) {
    const text = decodeCell(bytes, cells[2 * c], cells[2 * c + 1]);
    if (text === null) return null;
    out.push(text);
  }
  return out;
}

function decodeCell(bytes: Uint8Array, from: number, to: number): string | null {
  try {
    return new TextDecoder("utf-8", { fatal: true }).decode(bytes.subarray(from, to)).trim();
  } catch {
    return null;
  }
}
