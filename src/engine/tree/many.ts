import { BLOCK } from "../kernels";
import type { Kernels } from "../kernels";
import type { Finish, Meat, Sums } from "./types";

/** A block of rows where a model's path has been taken out: offsets into `w` of the targets, the outcome and the leverages so far. */
export interface Place {
  readonly w: Float64Array;
  readonly kernels: Kernels;
  readonly finish: Finish;
  readonly targets: readonly number[];
  readonly outcome: number;
  readonly leverage: number;
  /** Free room for q + 4 columns. */
  readonly room: number;
  readonly height: number;
}

/** Any number of targets and any kind of error: takes the targets out one after another, then adds the block's sums. */
export function finishMany(
  { w, kernels, finish, targets, outcome, leverage, room, height }: Place,
  kind: Meat,
  base: readonly number[] | null,
  sums: Sums,
): void {
  const q = targets.length;
  const at = (a: number) => room + a * BLOCK;
  const [e, h, scaled] = [at(q), at(q + 1), at(q + 2)];
  for (let a = 0; a < q; a++) w.copyWithin(at(a), targets[a], targets[a] + height);
  w.copyWithin(e, outcome, outcome + height);
  w.copyWithin(h, leverage, leverage + height);
  for (let a = 0; a < q; a++) {
    for (let b = a + 1; b < q; b++) kernels.takeOut(at(b), at(b), at(a), finish.shares[a * (q + 1) + b], height);
    kernels.takeOut(e, e, at(a), finish.shares[a * (q + 1) + q], height);
    kernels.addLeverage(h, h, at(a), finish.inverse[a], height);
  }
  let gap = 1 + sums.gap[finish.model];
  for (let i = 0; i < height; i++) {
    const left = 1 - w[h + i];
    if (left < gap) gap = left;
    const residual = w[e + i];
    const influence = residual / left;
    w[scaled + i] = kind === "HC3" ? influence * influence : kind === "HC2" ? residual * influence : residual * residual;
    w[h + i] = influence;
  }
  sums.gap[finish.model] = gap - 1;
  addMeat(kernels, at, q, scaled, height, sums.meat, finish.model);
  if (base) addShift(w, at, q, { influence: h, height }, finish, base, sums.shift);
}

function addMeat(
  kernels: Kernels,
  at: (a: number) => number,
  q: number,
  scaled: number,
  height: number,
  meat: Float64Array,
  model: number,
): void {
  let place = (model * q * (q + 1)) / 2;
  const product = at(q + 3);
  for (let a = 0; a < q; a++) {
    kernels.multiply(product, at(a), scaled, height);
    for (let b = 0; b <= a; b++) meat[place++] += kernels.dot(product, at(b), height);
  }
}

function addShift(
  w: Float64Array,
  at: (a: number) => number,
  q: number,
  { influence, height }: { influence: number; height: number },
  { weights, model }: Finish,
  base: readonly number[],
  shift: Float64Array,
): void {
  for (let a = 0; a < q; a++) {
    let sum = 0;
    for (let i = 0; i < height; i++) {
      let along = 0;
      for (let c = a; c < q; c++) along += weights[a * q + c] * w[at(c) + i];
      const moved = along * w[influence + i] - w[base[a] + i];
      sum += moved * moved;
    }
    shift[model * q + a] += sum;
  }
}
