import type { Factor } from "../linear/types";
import { invertUpper } from "../linear/triangular";
import type { Branch } from "./trie";
import type { Finish, Node, Program } from "./types";

/** A column of which less than this share is left after those before it loses too many digits in this pass: its models are computed singly. */
const SAFE = 1e-4;

/**
 * The coefficients that a pass over the rows needs, found on R alone by modified Gram–Schmidt along the tree (Björck 1967): R's columns have
 * the inner products of the rows' columns.
 * @param targets frame columns taken out after each path, in this order
 * @returns the program, and by model whether it is in it
 */
export function writeProgram(
  factor: Factor,
  roots: readonly Branch[],
  models: number,
  targets: readonly number[],
): { program: Program; held: boolean[] } {
  const used = new Set<number>();
  collect(roots, used);
  const columns = [...[...used].sort((a, b) => a - b), ...targets];
  const slotOf = new Map(columns.map((column, slot) => [column, slot]));
  const outcome = columns.length;
  const start = [...columns, factor.size].map((column) => columnOf(factor, column));
  const norms = start.map((x) => Math.sqrt(dot(x, x)));
  const scale = Float64Array.from([...columns, factor.size], (column) => factor.scale[column]);
  const nodes: Node[] = [];
  const held = new Array<boolean>(models).fill(false);
  let depthSeen = 0;

  const visit = (branch: Branch, depth: number, above: readonly Float64Array[]): boolean => {
    const take = slotOf.get(branch.column)!;
    const x = above[take];
    const size = dot(x, x);
    if (!(Math.sqrt(size) > SAFE * norms[take])) return false;
    const below = new Set<number>();
    collect(branch.children, below);
    const slots = [
      ...[...below].map((column) => slotOf.get(column)!).sort((a, b) => a - b),
      ...targets.map((_, a) => outcome - targets.length + a),
      outcome,
    ];
    const here: Float64Array[] = [];
    const shares = Float64Array.from(slots, (slot) => {
      const share = dot(x, above[slot]) / size;
      here[slot] = above[slot].map((value, i) => value - share * x[i]);
      return share;
    });
    const finish = branch.model < 0 ? null : finishOf(branch.model, here, norms, outcome, targets.length, scale);
    const at = nodes.length;
    nodes.push({ depth, take, inverse: 1 / size, slots: Int32Array.from(slots), shares, leaf: true, finish });
    let lives = finish !== null;
    if (finish) held[branch.model] = true;
    let children = false;
    for (const child of branch.children) children = visit(child, depth + 1, here) || children;
    nodes[at] = { ...nodes[at], leaf: !children };
    lives ||= children;
    if (!lives) nodes.length = at;
    else depthSeen = Math.max(depthSeen, depth);
    return lives;
  };
  for (const root of roots) visit(root, 1, start);
  return { program: { columns, scale, targets: targets.length, models, depth: depthSeen, nodes }, held };
}

function collect(branches: readonly Branch[], into: Set<number>): void {
  for (const { column, children } of branches) {
    into.add(column);
    collect(children, into);
  }
}

function columnOf({ r, size }: Factor, column: number): Float64Array {
  const q = size + 1;
  return Float64Array.from({ length: q }, (_, i) => (i <= column ? r[i * q + column] : 0));
}

/** Null where too little of a target is left. */
function finishOf(
  model: number,
  columns: readonly Float64Array[],
  norms: readonly number[],
  outcome: number,
  q: number,
  scale: Float64Array,
): Finish | null {
  const left = Array.from({ length: q }, (_, a) => Float64Array.from(columns[outcome - q + a]));
  const inverse = new Float64Array(q);
  const shares = new Float64Array(q * (q + 1));
  const triangle = new Float64Array(q * q);
  for (let a = 0; a < q; a++) {
    const size = dot(left[a], left[a]);
    if (!(Math.sqrt(size) > SAFE * norms[outcome - q + a])) return null;
    inverse[a] = 1 / size;
    triangle[a * q + a] = 1;
    for (let b = a + 1; b < q; b++) {
      const share = dot(left[a], left[b]) / size;
      shares[a * (q + 1) + b] = share;
      triangle[a * q + b] = share;
      for (let i = 0; i < left[b].length; i++) left[b][i] -= share * left[a][i];
    }
    shares[a * (q + 1) + q] = dot(left[a], columns[outcome]) / size;
  }
  // targets = left·triangle, so coefficient a = Σ_c triangle⁻¹[a, c]·(left_c'y)/‖left_c‖²
  const weights = invertUpper(triangle, q);
  for (let a = 0; a < q; a++)
    for (let c = a; c < q; c++) weights[a * q + c] *= inverse[c] * (scale[outcome] / scale[outcome - q + a]);
  return { model, inverse, shares, weights };
}

function dot(a: Float64Array, b: Float64Array): number {
  let sum = 0;
  for (let i = 0; i < a.length; i++) sum += a[i] * b[i];
  return sum;
}
