import type { Stamp } from "./worker/messages";

/** Time between two looks at a file that may be changing, ms. */
export const LOOK_MS = 120;
/** A file that may be incomplete (gone, empty, unusable, without its last line break) must stand still this long to be believed. */
export const GRACE_MS = 1300;
const GROWING_MS = 400;
const SHRUNK_MS = 900;
const LONGEST_MS = 3000;

/** What has been seen of a file since it began to change. */
export interface Stir {
  /** Present state; null while there is no such file. */
  readonly stamp: Stamp | null;
  /** State last taken for whole; null before the first. */
  readonly accepted: Stamp | null;
  /** Changes seen after the first. */
  readonly changes: number;
  /** Longest time between two of them, ms. */
  readonly longestGap: number;
}

/**
 * How long a file must have stood still before it is taken for whole, ms. A program that writes in pieces shows itself by growing
 * under our eyes, by a file much shorter than the last, or by one that is empty or gone: then the wait is longer.
 */
export function quietNeeded({ stamp, accepted, changes, longestGap }: Stir): number {
  if (stamp === null || stamp.size === 0) return GRACE_MS;
  let need = LOOK_MS;
  if (changes > 0) need = Math.max(GROWING_MS, Math.min(3 * longestGap, LONGEST_MS));
  if (accepted && stamp.size < 0.9 * accepted.size) need = Math.max(need, SHRUNK_MS);
  return need;
}
