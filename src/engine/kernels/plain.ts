import { WHAT } from "./orders";
import { BLOCK, ORDER } from "./types";
import type { Kernels } from "./types";

/** The loops in plain JavaScript: what the compiled ones are checked against, and what runs where these cannot. */
export function plainKernels(): Kernels {
  let w = new Float64Array(0);
  /** @param to where to write what is left, or −1 @param base the base fit's influences, or −1 */
  const last = (
    x: number,
    from: number,
    to: number,
    [inverseX, shareTarget, shareOutcome, share, inverse, weight]: Float64Array,
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
    w[result] += meat;
    w[result + 1] += shift;
    w[result + 2] = gap;
  };
  const loops: Kernels = {
    room: (doubles) => (w.length < doubles ? (w = new Float64Array(doubles)) : w),
    takeOut: (to, from, x, share, height) => {
      for (let i = 0; i < height; i++) w[to + i] = w[from + i] - share * w[x + i];
    },
    times: (to, x, factor, height) => {
      for (let i = 0; i < height; i++) w[to + i] = factor * w[x + i];
    },
    multiply: (to, x, y, height) => {
      for (let i = 0; i < height; i++) w[to + i] = w[x + i] * w[y + i];
    },
    dot: (x, y, height) => {
      let sum = 0;
      for (let i = 0; i < height; i++) sum += w[x + i] * w[y + i];
      return sum;
    },
    addLeverage: (to, from, x, inverse, height) => {
      for (let i = 0; i < height; i++) w[to + i] = w[from + i] + w[x + i] * w[x + i] * inverse;
    },
    run: (at, end, height) => {
      const integers = new Int32Array(w.buffer);
      for (let place = at; place < end; place += ORDER) {
        const [what, to, from, x] = integers.subarray(place * 2, place * 2 + 4);
        const numbers = w.subarray(place + 2, place + 8);
        const [base, result] = integers.subarray((place + 8) * 2, (place + 8) * 2 + 2);
        const kind = WHAT[what];
        if (kind === "takeOut") loops.takeOut(to, from, x, numbers[0], height);
        else if (kind === "addLeverage") loops.addLeverage(to, from, x, numbers[0], height);
        else last(x, from, kind.startsWith("step") ? to : -1, numbers, kind.endsWith("Shift") ? base : -1, height, result);
      }
    },
  };
  return loops;
}
