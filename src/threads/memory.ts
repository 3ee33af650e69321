import type { RowMemory } from "../engine/passes/types";

/** Columns of a design in memory that two threads see, kept between comparisons of files of about the same length. */
export class SharedRows implements RowMemory {
  private readonly buffers: SharedArrayBuffer[] = [];
  private taken = 0;

  take(n: number): Float64Array {
    const at = this.taken++;
    const kept = this.buffers[at];
    const buffer = kept && kept.byteLength >= n * 8 ? kept : (this.buffers[at] = new SharedArrayBuffer(roomFor(n)));
    // a view of its own for each taking: what is known of an earlier column must not be taken for this one's
    return new Float64Array(buffer, 0, n);
  }

  /** Buffers that the last comparison did not need are let go. */
  reset(): void {
    this.buffers.length = Math.min(this.buffers.length, Math.max(this.taken, 0));
    this.taken = 0;
  }
}

/** A little more than asked for, so that a few rows more need no fresh memory. */
function roomFor(n: number): number {
  return Math.ceil(n * 1.05) * 8;
}
