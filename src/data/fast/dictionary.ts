/** Distinct byte strings of one column, numbered in order of appearance; compared in the file's own buffer, decoded once at the end. */
export class Dictionary {
  private table = new Int32Array(64).fill(-1);
  private starts: number[] = [];
  private ends: number[] = [];
  private hashes: number[] = [];

  constructor(private readonly bytes: Uint8Array) {}

  get size(): number {
    return this.starts.length;
  }

  /** The number of the cell in bytes [from, to). */
  code(from: number, to: number): number {
    const { bytes } = this;
    let hash = 0x811c9dc5;
    for (let i = from; i < to; i++) hash = Math.imul(hash ^ bytes[i], 0x01000193); // FNV-1a, public domain
    const mask = this.table.length - 1;
    for (let at = (hash ^ (hash >>> 15)) & mask; ; at = (at + 1) & mask) {
      const code = this.table[at];
      if (code < 0) return this.add(at, hash, from, to);
      if (this.hashes[code] === hash && this.same(code, from, to)) return code;
    }
  }

  /** Every cell decoded, in order of appearance; null where the bytes are not UTF-8. */
  decode(): string[] | null {
    const decoder = new TextDecoder("utf-8", { fatal: true });
    try {
      return this.starts.map((start, i) => decoder.decode(this.bytes.subarray(start, this.ends[i])));
    } catch {
      return null;
    }
  }

  private same(code: number, from: number, to: number): boolean {
    const start = this.starts[code];
    if (this.ends[code] - start !== to - from) return false;
    for (let i = 0; i < to - from; i++) if (this.bytes[start + i] !== this.bytes[from + i]) return false;
    return true;
  }

  private add(at: number, hash: number, from: number, to: number): number {
    const code = this.starts.length;
    this.table[at] = code;
    this.starts.push(from);
    this.ends.push(to);
    this.hashes.push(hash);
    if (code * 2 > this.table.length) this.grow();
    return code;
  }

  private grow(): void {
    const table = new Int32Array(this.table.length * 4).fill(-1);
    const mask = table.length - 1;
    this.hashes.forEach((hash, code) => {
      let at = (hash ^ (hash >>> 15)) & mask;
      while (table[at] >= 0) at = (at + 1) & mask;
      table[at] = code;
    });
    this.table = table;
  }
}
