/** Rows of a block, and so the length of a column in the buffer. */
export const BLOCK = 256;

/** Doubles in a result: Σ of the meat, Σ of the shift's squares, the smallest 1 − h (read first, then lowered). */
export const RESULT = 3;

/**
 * The inner loops of a pass over the rows, on one block. All columns are stretches of one buffer, so that the loops stay in the cache;
 * offsets name a column's first row. A target's column is followed by the outcome's and by the leverages'.
 * Heights are even: rows of zeros after the last add nothing.
 */
export interface Kernels {
  /** A buffer of at least so many doubles; an earlier one is no longer good. */
  room(doubles: number): Float64Array;
  /** to = from − share·x. */
  takeOut(to: number, from: number, x: number, share: number, height: number): void;
  /** to = from + inverse·x²: the leverage that a column adds. */
  addLeverage(to: number, from: number, x: number, inverse: number, height: number): void;
  /** A path's last column x and its one target under HC3 in one loop: nothing is written but the result, for nothing follows. */
  leaf(x: number, from: number, last: Last, height: number, result: number): void;
  /** As leaf, with the shift's square. @param base column of the base fit's influences */
  leafShift(x: number, from: number, last: Last, weight: number, base: number, height: number, result: number): void;
  /** As leaf, with what is left of target, outcome and leverage written for the columns that follow. */
  step(x: number, from: number, to: number, last: Last, height: number, result: number): void;
  /** As step, with the shift's square. */
  stepShift(x: number, from: number, to: number, last: Last, weight: number, base: number, height: number, result: number): void;
}

/** Numbers of a path's last column and its one target (see Node and Finish). */
export interface Last {
  readonly inverseX: number;
  readonly shareTarget: number;
  readonly shareOutcome: number;
  readonly share: number;
  readonly inverse: number;
}

/** The loops in plain JavaScript: what the compiled ones are checked against, and what runs where these cannot. */
export function plainKernels(): Kernels {
  let w = new Float64Array(0);
  /** @param to where to write what is left, or −1 @param base the base fit's influences, or −1 */
  const last = (
    x: number,
    from: number,
    to: number,
    { inverseX, shareTarget, shareOutcome, share, inverse }: Last,
    weight: number,
    base: number,
    height: number,
    result: number,
  ) => {
    let meat = 0;
    let shift = 0;
    let gap = w[result + 2];
    for (let i = 0; i < height; i++) {
      const q = w[x + i];
      const d = w[from + i] - shareTarget * q;
      const y = w[from + BLOCK + i] - shareOutcome * q;
      const h = w[from + 2 * BLOCK + i] + q * q * inverseX;
      if (to >= 0) {
        w[to + i] = d;
        w[to + BLOCK + i] = y;
        w[to + 2 * BLOCK + i] = h;
      }
      const left = 1 - h - d * d * inverse;
      const z = (d * (y - share * d)) / left;
      if (left < gap) gap = left;
      meat += z * z;
      if (base >= 0) shift += (weight * z - w[base + i]) ** 2;
    }
    w[result] = meat;
    w[result + 1] = shift;
    w[result + 2] = gap;
  };
  return {
    room: (doubles) => (w.length < doubles ? (w = new Float64Array(doubles)) : w),
    takeOut: (to, from, x, share, height) => {
      for (let i = 0; i < height; i++) w[to + i] = w[from + i] - share * w[x + i];
    },
    addLeverage: (to, from, x, inverse, height) => {
      for (let i = 0; i < height; i++) w[to + i] = w[from + i] + w[x + i] * w[x + i] * inverse;
    },
    leaf: (x, from, numbers, height, result) => last(x, from, -1, numbers, 0, -1, height, result),
    leafShift: (x, from, numbers, weight, base, height, result) => last(x, from, -1, numbers, weight, base, height, result),
    step: (x, from, to, numbers, height, result) => last(x, from, to, numbers, 0, -1, height, result),
    stepShift: (x, from, to, numbers, weight, base, height, result) => last(x, from, to, numbers, weight, base, height, result),
  };
}
