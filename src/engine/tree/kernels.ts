/**
 * The inner loops of a pass over the rows, on one block: every column is a stretch of the same buffer, so that the loops stay in the cache
 * and the compiler sees one array. Offsets name the first row of a column.
 */

/** Where a model with one target stands in the buffer, and its numbers (see Finish). */
export interface One {
  readonly target: number;
  readonly outcome: number;
  readonly leverage: number;
  readonly share: number;
  readonly inverse: number;
}

/** What `finishOne` and its like found in a block: Σ of the meat, Σ of the shift's squares, the smallest 1 − h. */
export interface Found {
  meat: number;
  shift: number;
  gap: number;
}

/** to = from − share·x. */
export function takeOut(w: Float64Array, to: number, from: number, x: number, share: number, height: number): void {
  for (let i = 0; i < height; i++) w[to + i] = w[from + i] - share * w[x + i];
}

/** to = from + inverse·x²: the leverage that a column adds. */
export function addLeverage(w: Float64Array, to: number, from: number, x: number, inverse: number, height: number): void {
  for (let i = 0; i < height; i++) w[to + i] = w[from + i] + w[x + i] * w[x + i] * inverse;
}

/** One target under HC3, without a shift: the loop that most of the time is spent in. */
export function finishOne(
  w: Float64Array,
  { target, outcome, leverage, share, inverse }: One,
  height: number,
  found: Found,
): void {
  let meat = 0;
  let gap = found.gap;
  for (let i = 0; i < height; i++) {
    const d = w[target + i];
    const left = 1 - w[leverage + i] - d * d * inverse;
    const z = (d * (w[outcome + i] - share * d)) / left;
    if (left < gap) gap = left;
    meat += z * z;
  }
  found.meat = meat;
  found.gap = gap;
}

/** One target under HC3, with the shift's square. @param base the base fit's influences; `start` is the block's first row in it */
export function finishOneShift(
  w: Float64Array,
  { target, outcome, leverage, share, inverse }: One,
  height: number,
  found: Found,
  weight: number,
  base: Float64Array,
  start: number,
): void {
  let meat = 0;
  let shift = 0;
  let gap = found.gap;
  for (let i = 0; i < height; i++) {
    const d = w[target + i];
    const left = 1 - w[leverage + i] - d * d * inverse;
    const z = (d * (w[outcome + i] - share * d)) / left;
    const moved = weight * z - base[start + i];
    if (left < gap) gap = left;
    meat += z * z;
    shift += moved * moved;
  }
  found.meat = meat;
  found.shift = shift;
  found.gap = gap;
}

/** The last column x of a path and one target under HC3, in one loop: nothing is written, for nothing follows. */
export function leafOne(
  w: Float64Array,
  x: number,
  inverseX: number,
  shareTarget: number,
  shareOutcome: number,
  { target, outcome, leverage, share, inverse }: One,
  height: number,
  found: Found,
): void {
  let meat = 0;
  let gap = found.gap;
  for (let i = 0; i < height; i++) {
    const q = w[x + i];
    const d = w[target + i] - shareTarget * q;
    const left = 1 - w[leverage + i] - q * q * inverseX - d * d * inverse;
    const z = (d * (w[outcome + i] - shareOutcome * q - share * d)) / left;
    if (left < gap) gap = left;
    meat += z * z;
  }
  found.meat = meat;
  found.gap = gap;
}

/** As leafOne, with the shift's square. */
export function leafOneShift(
  w: Float64Array,
  x: number,
  inverseX: number,
  shareTarget: number,
  shareOutcome: number,
  { target, outcome, leverage, share, inverse }: One,
  height: number,
  found: Found,
  weight: number,
  base: Float64Array,
  start: number,
): void {
  let meat = 0;
  let shift = 0;
  let gap = found.gap;
  for (let i = 0; i < height; i++) {
    const q = w[x + i];
    const d = w[target + i] - shareTarget * q;
    const left = 1 - w[leverage + i] - q * q * inverseX - d * d * inverse;
    const z = (d * (w[outcome + i] - shareOutcome * q - share * d)) / left;
    const moved = weight * z - base[start + i];
    if (left < gap) gap = left;
    meat += z * z;
    shift += moved * moved;
  }
  found.meat = meat;
  found.shift = shift;
  found.gap = gap;
}
