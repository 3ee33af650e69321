import type { MissingTest } from "../missing";
import { Dictionary, HASH_BITS, HASH_FACTOR, HASH_SEED } from "./dictionary";
import { CR, LF, QUOTE, findCell, isSpace, splitLine, textIn } from "./line";
import type { Span } from "./line";
import type { Look } from "./look";
import { takeCodes, takeNumbers } from "./memory";
import type { ReaderMemory } from "./memory";
import { POWERS, parseNumber } from "./number";
import { PlainRows } from "./plain";
import { readAs } from "./decimals";

/** Digits that one 32-bit integer holds. */
const SHORT = 9;
/** Room beyond the rows expected, so that arrays seldom grow. */
const ROOM = 1.1;
/** Rows that the compiled loop leaves to the other, beyond which all are: a few, and a share of those read. */
const [SOME_ODD, ODD] = [64, 0.2];
/** A column guessed to be numbers with more than this share of other cells will not be one. */
const GIVE_UP = 0.2;

/**
 * Reads rows of plain bytes into columns: those of nothing but common cells by compiled code (PlainRows), the others by `scanRows`, which does
 * numbers of up to nine digits and words itself and leaves the rest to methods.
 */
export class Scanner {
  rows = 0;
  /** Numbers of the numeric columns; NaN for a missing cell. */
  readonly numbers: Float64Array[] = [];
  /** Dictionary codes of the other columns; -1 for an empty cell. */
  readonly codes: Int32Array[] = [];
  readonly words: Dictionary[] = [];
  /** For numeric columns the rows whose cell is no number that a double holds, with its text, in row order. */
  readonly odd: Map<number, string>[] = [];
  readonly short: number[] = [];
  readonly long: number[] = [];
  readonly blank: number[] = [];
  lines: Uint32Array;
  /** Whether any number of a numeric column has a decimal mark. */
  marked = false;
  /** Columns that turned out to be no numbers while they were read. */
  readonly wrong = new Set<number>();
  /** Whether `number` read a decimal mark in this row. */
  private slowMarked = false;
  private line = 1;
  private blankSince: number[] = [];
  private capacity: number;
  private readonly span: Span = { from: 0, to: 0, end: 0 };
  private readonly width: number;

  constructor(
    private readonly look: Look,
    private readonly missing: MissingTest,
    keep: ReaderMemory | undefined,
  ) {
    this.width = look.numeric.length;
    this.capacity = Math.ceil(look.rows * ROOM) + 16;
    this.lines = keep && keep.lines.length >= this.capacity ? keep.lines : new Uint32Array(this.capacity);
    look.numeric.forEach((numeric, c) => {
      if (numeric) {
        this.numbers[c] = takeNumbers(keep?.numbers[c], this.capacity);
        this.odd[c] = new Map();
      } else {
        this.codes[c] = takeCodes(keep?.codes[c], this.capacity);
        this.words[c] = new Dictionary();
      }
    });
  }

  /** Reads the lines in bytes [from, to); the last of these bytes is a line feed. False where they are not plain. */
  scan(bytes: Uint8Array, from: number, to: number): boolean {
    // a mark that is a number would have to be looked for among the numbers read
    const plain = this.missing.numbers.size === 0 ? PlainRows.for(this.look) : null;
    let at = from;
    let odd = 0;
    while (plain && at < to && odd <= SOME_ODD + this.rows * ODD) {
      const end = plain.load(bytes, at, to);
      const stop = end > at ? end : bytes.indexOf(LF, at) + 1;
      while (at < stop) {
        const rows = end > at ? plain.read(at, end) : 0;
        if (rows > 0) this.take(plain, bytes, rows);
        at = rows > 0 ? plain.next : at;
        if (at === stop || (rows > 0 && plain.full(rows))) continue;
        // a row for the other loop
        const after = bytes.indexOf(LF, at) + 1;
        if (!this.scanRows(bytes, at, after)) return false;
        at = after;
        odd++;
      }
    }
    return at >= to || this.scanRows(bytes, at, to);
  }

  /** Takes over rows that the compiled loop has read. */
  private take(plain: PlainRows, bytes: Uint8Array, rows: number): void {
    while (this.rows + rows > this.capacity) this.grow();
    this.passBlanks();
    const first = this.rows;
    for (let c = 0; c < this.width; c++) {
      if (this.look.numeric[c] === 1) {
        this.numbers[c].set(plain.numbers(c, rows), first);
        continue;
      }
      const { cells, offset } = plain.words(c, rows);
      const codes = this.codes[c];
      const words = this.words[c];
      for (let i = 0; i < rows; i++) {
        const start = cells[3 * i] - offset;
        const end = cells[3 * i + 1] - offset;
        codes[first + i] = start === end ? -1 : words.code(bytes, start, end, cells[3 * i + 2] & HASH_BITS, first + i);
      }
    }
    for (let i = 0; i < rows; i++) this.lines[first + i] = ++this.line;
    this.rows += rows;
    if (plain.marked) this.marked = true;
  }

  /** As `scan`, a byte at a time. */
  private scanRows(bytes: Uint8Array, from: number, to: number): boolean {
    const { width } = this;
    const { numeric, separator } = this.look;
    const { mark } = this.look.decimals;
    const { numbers: marks } = this.missing;
    const hasMarks = marks.size > 0;
    const { numbers, codes, words } = this;
    // What ends a cell (1) or makes it other than common (2).
    const stops = new Uint8Array(256);
    for (const byte of [separator, LF, CR]) stops[byte] = 1;
    stops[QUOTE] = 2;
    let at = from;
    while (at < to) {
      if (this.rows === this.capacity) this.grow();
      const row = this.rows;
      const start = at;
      this.line++;
      let c = 0;
      let marked = false;
      this.slowMarked = false;
      for (;;) {
        let i = at;
        let byte = bytes[i];
        if (numeric[c] === 1) {
          const negative = byte === 45;
          if (negative) byte = bytes[++i];
          const first = i;
          let whole = 0;
          while ((byte ^ 48) < 10) {
            whole = (Math.imul(whole, 10) + (byte ^ 48)) | 0;
            byte = bytes[++i];
          }
          let digits = i - first;
          let decimals = 0;
          let point = -1;
          if (byte === mark) {
            point = ++i;
            byte = bytes[i];
            while ((byte ^ 48) < 10) {
              whole = (Math.imul(whole, 10) + (byte ^ 48)) | 0;
              byte = bytes[++i];
            }
            decimals = i - point;
            digits += decimals;
          }
          if (stops[byte] === 1 && digits > 0) {
            let value: number;
            if (digits <= SHORT) {
              value = decimals === 0 ? whole : whole / POWERS[decimals];
              if (negative) value = -value;
            } else value = parseNumber(bytes, at, i, mark);
            if (value - value !== 0 || (hasMarks && marks.has(value))) i = this.number(bytes, at, c, row);
            else {
              numbers[c][row] = value;
              if (point >= 0) marked = true;
            }
          } else if (i === at && stops[byte] === 1) numbers[c][row] = NaN;
          else i = this.number(bytes, at, c, row);
        } else {
          let hash = HASH_SEED;
          while (stops[byte] === 0) {
            hash = Math.imul(hash ^ byte, HASH_FACTOR);
            byte = bytes[++i];
          }
          if (byte === QUOTE || (i > at && (isSpace(bytes[at]) || isSpace(bytes[i - 1])))) i = this.word(bytes, at, c, row);
          else codes[c][row] = i === at ? -1 : words[c].code(bytes, at, i, hash & HASH_BITS, row);
        }
        if (i < 0) return false;
        c++;
        byte = bytes[i];
        at = i + 1;
        if (byte === separator) {
          if (c < width) continue;
          at = this.setAside(bytes, start, row);
          if (at < 0) return false;
          break;
        }
        if (byte === CR && bytes[at++] !== LF) return false;
        if (c < width && !this.endShort(bytes, start, i, c, row)) break;
        this.passBlanks();
        if (marked || this.slowMarked) this.marked = true;
        this.lines[row] = this.line;
        this.rows = row + 1;
        break;
      }
    }
    return true;
  }

  /** Any cell of a numeric column. @returns where it ends, or −1 where it is not plain */
  private number(bytes: Uint8Array, at: number, c: number, row: number): number {
    if (!findCell(bytes, at, this.look.separator, this.span)) return -1;
    const { from, to, end } = this.span;
    if (this.wrong.has(c)) return end;
    let value = from === to ? NaN : parseNumber(bytes, from, to, this.look.decimals.mark);
    if (from < to && (value - value !== 0 || this.missing.numbers.has(value))) {
      const text = textIn(bytes, from, to)?.trim();
      if (text === undefined) return -1;
      if (this.missing.isMissing(text)) value = NaN;
      else {
        const found = readAs(text, this.look.decimals);
        if (found === "unsure") return -1;
        value = found && Number.isFinite(found.value) ? found.value : NaN;
        if (value !== value) {
          this.odd[c].set(row, text);
          if (this.odd[c].size > this.look.rows * GIVE_UP + 16) this.wrong.add(c);
        }
      }
    }
    this.numbers[c][row] = value;
    if (value === value && bytes.subarray(from, to).includes(this.look.decimals.mark)) this.slowMarked = true;
    return end;
  }

  /** A quoted or padded cell of a word column. @returns where it ends, or −1 where it is not plain */
  private word(bytes: Uint8Array, at: number, c: number, row: number): number {
    if (!findCell(bytes, at, this.look.separator, this.span)) return -1;
    const { from, to, end } = this.span;
    let hash = HASH_SEED;
    for (let i = from; i < to; i++) hash = Math.imul(hash ^ bytes[i], HASH_FACTOR);
    this.codes[c][row] = from === to ? -1 : this.words[c].code(bytes, from, to, hash & HASH_BITS, row);
    return end;
  }

  /** A row that ended after `cells` cells: false where it is a blank line, else the rest of it is missing. */
  private endShort(bytes: Uint8Array, start: number, end: number, cells: number, row: number): boolean {
    if (cells === 1 && this.isBlank(bytes, start, end)) {
      this.undo(row);
      this.blankSince.push(this.line);
      return false;
    }
    this.short.push(this.line);
    for (let c = cells; c < this.width; c++) {
      if (this.look.numeric[c]) this.numbers[c][row] = NaN;
      else this.codes[c][row] = -1;
    }
    return true;
  }

  private isBlank(bytes: Uint8Array, start: number, end: number): boolean {
    if (start === end) return true;
    const quoted = bytes[start] === QUOTE ? 1 : 0;
    return textIn(bytes, start + quoted, end - quoted)?.trim() === "";
  }

  /** A row with more cells than the header. @returns where the next line starts, or −1 where the row is not plain text */
  private setAside(bytes: Uint8Array, start: number, row: number): number {
    this.undo(row);
    const line = splitLine(bytes, start, this.look.separator);
    if (!line || textIn(bytes, start, line.next) === null) return -1;
    this.passBlanks();
    this.long.push(this.line);
    return line.next;
  }

  /** Forgets what the cells of an unfinished row left behind. */
  private undo(row: number): void {
    for (let c = 0; c < this.width; c++) {
      if (this.look.numeric[c]) this.odd[c].delete(row);
      else this.words[c].undo(row);
    }
  }

  /** Blank lines count once a row follows. */
  private passBlanks(): void {
    if (this.blankSince.length === 0) return;
    for (const line of this.blankSince) this.blank.push(line); // there may be more than one call can take
    this.blankSince = [];
  }

  private grow(): void {
    this.capacity = 2 * this.capacity;
    const copy = <T extends Float64Array | Int32Array | Uint32Array>(from: T, into: T): T => {
      into.set(from);
      return into;
    };
    this.lines = copy(this.lines, new Uint32Array(this.capacity));
    for (let c = 0; c < this.width; c++) {
      if (this.look.numeric[c]) this.numbers[c] = copy(this.numbers[c], new Float64Array(this.capacity));
      else this.codes[c] = copy(this.codes[c], new Int32Array(this.capacity));
    }
  }
}
