import { BLOCK, kernels as usualKernels, loadBlock, ORDER, RESULT, writeOrders } from "../kernels";
import type { Kernels, Order } from "../kernels";
import { finishMany } from "./many";
import type { Place } from "./many";
import type { Meat, Program, Sums, WalkTask } from "./types";

/** Blocks between two looks at the cancel flag. */
const BLOCKS_A_LOOK = 8;

/** Lengths of the arrays of a walk's sums: meat, shift, gap. */
export function walkSizes({ program: { models, targets: q } }: WalkTask): number[] {
  return [(models * q * (q + 1)) / 2, models * q, models];
}

/**
 * Adds the sums of every model over a stretch of rows: each block of rows is carried down the tree once, a column at a time, so that a
 * model costs about three multiplications of a column (20 operations a row), however many columns it has.
 * @param into meat, shift and gap of `Sums`, zero at first
 * @param stop looked at between blocks; may throw
 * @param kernels the inner loops; by default the compiled ones where they run
 */
export function walkRows(
  task: WalkTask,
  into: readonly Float64Array[],
  stop: () => void,
  kernels: Kernels = usualKernels(),
): void {
  const { program, source, meat: kind, from, to } = task;
  const layout = layOut(task);
  const { stretches, orders } = listOrders(program, layout, source.base !== null, kind);
  const w = kernels.room(layout.orders + orders.length * ORDER);
  const sums: Sums = { meat: into[0], shift: into[1], gap: into[2] };
  for (let model = 0; model < program.models; model++) w.set([0, 0, 1], layout.results + model * RESULT);
  writeOrders(w, layout.orders, orders);
  const roots = source.weights ? new Float64Array(BLOCK) : null;
  for (let start = from, count = 0; start < to; start += BLOCK, count++) {
    if (count % BLOCKS_A_LOOK === 0) stop();
    const height = Math.min(BLOCK, to - start);
    const even = height + (height % 2);
    if (roots) for (let i = 0; i < height; i++) roots[i] = Math.sqrt(source.weights![start + i]);
    source.columns.forEach((column, slot) => {
      loadBlock(kernels, w, slot * BLOCK, column, start, height, 1 / program.scale[slot]);
      if (roots) for (let i = 0; i < height; i++) w[slot * BLOCK + i] *= roots[i];
    });
    w.fill(0, layout.outcome + BLOCK, layout.outcome + 2 * BLOCK);
    source.base?.forEach((column, a) => loadBlock(kernels, w, layout.base[a], column, start, height));
    for (const { first, last, finish } of stretches) {
      if (last > first) kernels.run(layout.orders + first * ORDER, layout.orders + last * ORDER, even);
      if (finish) finishMany({ w, kernels, room: layout.room, height: even, ...finish }, kind, source.base && layout.base, sums);
    }
  }
  addSingle(w, layout, program, sums);
}

/** Orders to run one after another, then a model with several targets to finish, if one ends there. */
interface Stretch {
  readonly first: number;
  readonly last: number;
  readonly finish: Omit<Place, "w" | "kernels" | "room" | "height"> | null;
}

function listOrders(program: Program, layout: Layout, shift: boolean, kind: Meat): { stretches: Stretch[]; orders: Order[] } {
  const { targets: q } = program;
  const single = q === 1 && kind === "HC3";
  const { level, outcome } = layout;
  const orders: Order[] = [];
  const stretches: Stretch[] = [];
  const close = (finish: Stretch["finish"]) =>
    stretches.push({ first: stretches.at(-1)?.last ?? 0, last: orders.length, finish });
  for (const node of program.nodes) {
    const { slots, shares, finish } = node;
    const [above, here] = [(node.depth - 1) * level, node.depth * level];
    const x = above + node.take * BLOCK;
    const one = single ? finish : null;
    // one target's and the outcome's shares come last
    const apart = one ? slots.length - 2 : slots.length;
    for (let k = 0; k < apart; k++) {
      const slot = slots[k] * BLOCK;
      orders.push({ what: "takeOut", to: here + slot, from: above + slot, x, numbers: [shares[k]], base: 0, result: 0 });
    }
    if (one) {
      const target = outcome - BLOCK;
      const numbers = [node.inverse, ...shares.subarray(apart), one.shares[1], one.inverse[0], one.weights[0]];
      const what = `${node.leaf ? "leaf" : "step"}${shift ? "Shift" : ""}` as const;
      const result = layout.results + one.model * RESULT;
      orders.push({ what, to: here + target, from: above + target, x, numbers, base: layout.base[0] ?? 0, result });
      continue;
    }
    const leverage = outcome + BLOCK;
    const numbers = [node.inverse];
    orders.push({ what: "addLeverage", to: here + leverage, from: above + leverage, x, numbers, base: 0, result: 0 });
    if (!finish) continue;
    const targets = Array.from({ length: q }, (_, a) => here + outcome - (q - a) * BLOCK);
    close({ finish, targets, outcome: here + outcome, leverage: here + leverage });
  }
  close(null);
  return { stretches, orders };
}

/**
 * Places in the buffer: a level for each column taken (its columns, the outcome, the leverages), room to finish in, the base's influences,
 * the sums of models with one target, the orders.
 */
interface Layout {
  readonly level: number;
  /** Where the outcome stands in a level. */
  readonly outcome: number;
  readonly room: number;
  readonly base: readonly number[];
  readonly results: number;
  readonly orders: number;
}

function layOut({ program: { columns, targets: q, depth, models }, source }: WalkTask): Layout {
  const level = (columns.length + 2) * BLOCK;
  const room = (depth + 1) * level;
  const base = (source.base ?? []).map((_, a) => room + (q + 4 + a) * BLOCK);
  const results = room + (q + 4 + base.length) * BLOCK;
  return { level, outcome: columns.length * BLOCK, room, base, results, orders: results + models * RESULT };
}

/** Sums of the models that were finished by an order. */
function addSingle(w: Float64Array, { results }: Layout, { targets, models }: Program, { meat, shift, gap }: Sums): void {
  if (targets !== 1) return;
  for (let model = 0; model < models; model++) {
    const at = results + model * RESULT;
    meat[model] += w[at];
    shift[model] += w[at + 1];
    gap[model] = Math.min(gap[model], w[at + 2] - 1);
  }
}
