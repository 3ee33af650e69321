import { textIn } from "./line";

/** Seed and factor of the hash (FNV-1a, public domain), and the bits of it that are used: more would not be small integers everywhere. */
export const [HASH_SEED, HASH_FACTOR, HASH_BITS] = [0x811c9dc5 | 0, 0x01000193, 0x3fffffff];

/** Distinct byte strings of one column, numbered in order of appearance, with their bytes; decoded once at the end. */
export class Dictionary {
  private table = new Int32Array(64).fill(-1);
  private pool = new Uint8Array(256);
  /** Entry k is pool bytes [starts[k], starts[k + 1]). */
  private starts = new Int32Array(33);
  private hashes = new Int32Array(32);
  private count = 0;
  /** Row that brought the newest entry. */
  private newest = -1;

  /** The number of the cell in bytes [from, to), which stands in `row`. @param hash FNV-1a of the bytes, HASH_BITS of it */
  code(bytes: Uint8Array, from: number, to: number, hash: number, row: number): number {
    const mask = this.table.length - 1;
    for (let at = (hash ^ (hash >>> 15)) & mask; ; at = (at + 1) & mask) {
      const code = this.table[at];
      if (code < 0) return this.add(at, bytes, from, to, hash, row);
      if (this.hashes[code] === hash && this.same(code, bytes, from, to)) return code;
    }
  }

  /** Takes back what `row` brought, where it brought anything. */
  undo(row: number): void {
    if (this.newest !== row) return;
    this.newest = -1;
    const code = --this.count;
    const mask = this.table.length - 1;
    // The newest entry is the last of its run, so nothing is looked up past it.
    let at = (this.hashes[code] ^ (this.hashes[code] >>> 15)) & mask;
    while (this.table[at] !== code) at = (at + 1) & mask;
    this.table[at] = -1;
  }

  /** Every entry's text, in order of appearance; null where the bytes are not UTF-8. */
  texts(): string[] | null {
    const texts: string[] = [];
    for (let code = 0; code < this.count; code++) {
      const text = textIn(this.pool, this.starts[code], this.starts[code + 1]);
      if (text === null) return null;
      texts.push(text);
    }
    return texts;
  }

  private same(code: number, bytes: Uint8Array, from: number, to: number): boolean {
    const start = this.starts[code];
    if (this.starts[code + 1] - start !== to - from) return false;
    for (let i = from, k = start; i < to; i++, k++) if (this.pool[k] !== bytes[i]) return false;
    return true;
  }

  private add(at: number, bytes: Uint8Array, from: number, to: number, hash: number, row: number): number {
    if (this.count === this.hashes.length) {
      this.hashes = enlarged(this.hashes, 2 * this.count);
      this.starts = enlarged(this.starts, 2 * this.count + 1);
    }
    const code = this.count++;
    const start = this.starts[code];
    const end = start + to - from;
    if (end > this.pool.length) {
      const pool = new Uint8Array(2 * end);
      pool.set(this.pool);
      this.pool = pool;
    }
    for (let i = from, k = start; i < to; i++, k++) this.pool[k] = bytes[i];
    this.table[at] = code;
    this.starts[code + 1] = end;
    this.hashes[code] = hash;
    this.newest = row;
    if (2 * this.count > this.table.length) this.widen();
    return code;
  }

  private widen(): void {
    const table = new Int32Array(this.table.length * 4).fill(-1);
    const mask = table.length - 1;
    for (let code = 0; code < this.count; code++) {
      let at = (this.hashes[code] ^ (this.hashes[code] >>> 15)) & mask;
      while (table[at] >= 0) at = (at + 1) & mask;
      table[at] = code;
    }
    this.table = table;
  }
}

function enlarged(array: Int32Array, length: number): Int32Array<ArrayBuffer> {
  const larger = new Int32Array(length);
  larger.set(array);
  return larger;
}
