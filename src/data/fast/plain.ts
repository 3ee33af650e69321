import { CR, LF, QUOTE } from "./line";
import type { Look } from "./look";
import { POWERS } from "./number";
import { PLAIN_WASM } from "./plain.wasm";

/** Layout of the memory (plain.wat): what ends a cell, powers of ten, the answer, which columns are numbers, where their cells go, the bytes. */
const [ENDS, TENS, ANSWER, NUMERIC, PLACES, INPUT] = [0, 256, 448, 512, 1024, 4096];
/** Columns there is room for. */
const WIDEST = 512;
/** Bytes read at a time. */
const CHUNK = 1 << 18;
/** Rows read at a time. */
const ROWS = 2048;
/** Bytes of a number, and of a word's place and hash. */
const [NUMBER, WORD] = [8, 12];

interface Exports {
  readonly memory: WebAssembly.Memory;
  rows(at: number, end: number, most: number, width: number, separator: number, mark: number): number;
}

let compiled: WebAssembly.Module | null | undefined;

/** Rows of nothing but plain numbers, empty cells and plain words, read by compiled code (plain.wat) a stretch at a time. */
export class PlainRows {
  /** Whether a number had a decimal mark. */
  marked = false;
  /** Place in the file after the rows read last. */
  next = 0;
  private loaded = 0;
  private readonly wasm: Exports;
  private readonly width: number;
  private readonly places: number[] = [];

  private constructor(
    private readonly look: Look,
    module: WebAssembly.Module,
  ) {
    this.wasm = new WebAssembly.Instance(module).exports as unknown as Exports;
    this.width = look.numeric.length;
    let place = INPUT + CHUNK;
    look.numeric.forEach((numeric, c) => {
      this.places[c] = place;
      place += ROWS * (numeric ? NUMBER : WORD + 4); // a multiple of 8
    });
    const { memory } = this.wasm;
    const short = place - memory.buffer.byteLength;
    if (short > 0) memory.grow(Math.ceil(short / 65536));
    const bytes = new Uint8Array(memory.buffer);
    for (const byte of [look.separator, LF, CR]) bytes[ENDS + byte] = 1;
    bytes[ENDS + QUOTE] = 2;
    bytes.set(look.numeric, NUMERIC);
    new Float64Array(memory.buffer, TENS, POWERS.length).set(POWERS);
    new Int32Array(memory.buffer, PLACES, this.width).set(this.places);
  }

  /** Null where there are too many columns, or the machine cannot run it. */
  static for(look: Look): PlainRows | null {
    if (look.numeric.length > WIDEST) return null;
    if (compiled === undefined) compiled = compile();
    return compiled && new PlainRows(look, compiled);
  }

  /** Takes in bytes from `from` up to a line's end at or before `to`. @returns that end; `from` where a line is longer than there is room for */
  load(bytes: Uint8Array, from: number, to: number): number {
    const end = to - from <= CHUNK ? to : bytes.lastIndexOf(LF, from + CHUNK - 1) + 1;
    if (end <= from) return from;
    new Uint8Array(this.wasm.memory.buffer, INPUT, CHUNK).set(bytes.subarray(from, end));
    this.loaded = from;
    return end;
  }

  /** Reads rows of the bytes taken in, from place `from` of the file up to `end`. @returns how many; `next` tells where they end */
  read(from: number, end: number): number {
    const shift = INPUT - this.loaded;
    const { separator, decimals } = this.look;
    const rows = this.wasm.rows(from + shift, end + shift, ROWS, this.width, separator, decimals.mark);
    const [at, marked] = new Int32Array(this.wasm.memory.buffer, ANSWER, 2);
    this.next = at - shift;
    if (marked) this.marked = true;
    return rows;
  }

  /** Whether the last stretch ended for want of room rather than at a row it could not read. */
  full(rows: number): boolean {
    return rows === ROWS;
  }

  /** Column c's numbers in the rows read last. Good until the next `read`. */
  numbers(c: number, rows: number): Float64Array {
    return new Float64Array(this.wasm.memory.buffer, this.places[c], rows);
  }

  /** Column c's words in the rows read last, each a start, an end (both less `offset` are places in the file) and a hash. */
  words(c: number, rows: number): { readonly cells: Int32Array; readonly offset: number } {
    return { cells: new Int32Array(this.wasm.memory.buffer, this.places[c], rows * 3), offset: INPUT - this.loaded };
  }
}

function compile(): WebAssembly.Module | null {
  try {
    return new WebAssembly.Module(Uint8Array.from(atob(PLAIN_WASM), (letter) => letter.charCodeAt(0)));
  } catch {
    return null;
  }
}
