import { quantile } from "../design/quantile";
import type { Design, ModifierValues } from "../design/types";
import { sortedValues } from "./sorted";

/** Where a numeric modifier is looked at. */
export interface Range {
  /** Central range C: 10th to 90th percentile, cut to where every group has rows; null where nothing is left. */
  readonly central: readonly [number, number] | null;
  /** The range where every group has rows (an amount: the modifier's own range); null where the groups do not overlap. */
  readonly shared: readonly [number, number] | null;
  /** Values differences are reported at, ascending, without repeats. */
  readonly reporting: readonly number[];
}

const known = new WeakMap<Float64Array, Range>();

/** The ranges of a numeric modifier on the common rows (METHODS 5), found once for a design's column. Weights are ignored. */
export function rangeOf(design: Design, values: Float64Array): Range {
  let range = known.get(values);
  if (!range) known.set(values, (range = findRange(design, values)));
  return range;
}

function findRange(design: Design, values: Float64Array): Range {
  const sorted = sortedValues(values);
  const [first, last] = [sorted[0], sorted[sorted.length - 1]];
  const shared = sharedRange(design, values, first, last);
  const p = [0.1, 0.5, 0.9].map((share) => quantile(sorted, share));
  const two = isTwoValued(sorted);
  const whole = p[0] === p[2];
  const [low, high] = two || whole ? [first, last] : [p[0], p[2]];
  const central: [number, number] | null = shared ? [Math.max(low, shared[0]), Math.min(high, shared[1])] : null;
  const reporting = two ? [first, last] : whole ? [first, p[1], last] : p;
  return { central: central && central[0] < central[1] ? central : null, shared, reporting: [...new Set(reporting)] };
}

function sharedRange(design: Design, values: Float64Array, first: number, last: number): [number, number] | null {
  if (!design.group) return [first, last];
  const { codes, levels } = design.group;
  const low = new Array<number>(levels.length).fill(Infinity);
  const high = new Array<number>(levels.length).fill(-Infinity);
  for (let i = 0; i < values.length; i++) {
    low[codes[i]] = Math.min(low[codes[i]], values[i]);
    high[codes[i]] = Math.max(high[codes[i]], values[i]);
  }
  // Groups without rows have no contrast and do not narrow the range.
  const present = levels.map((_, g) => g).filter((g) => low[g] <= high[g]);
  const range: [number, number] = [Math.max(...present.map((g) => low[g])), Math.min(...present.map((g) => high[g]))];
  return range[0] <= range[1] ? range : null;
}

function isTwoValued(sorted: Float64Array): boolean {
  const [first, last] = [sorted[0], sorted[sorted.length - 1]];
  return first !== last && sorted.every((value) => value === first || value === last);
}

/** Levels of a category modifier that have rows, with those that every exposure group has rows in. */
export function levelsOf(
  design: Design,
  modifier: Extract<ModifierValues, { kind: "category" }>,
): { readonly present: string[]; readonly shared: ReadonlySet<string> } {
  const { codes, levels } = modifier;
  const groups = design.group?.levels.length ?? 1;
  const seen = levels.map(() => new Uint8Array(groups));
  for (let i = 0; i < codes.length; i++) seen[codes[i]][design.group?.codes[i] ?? 0] = 1;
  const groupHasRows = new Uint8Array(groups);
  for (const row of seen) row.forEach((there, g) => (groupHasRows[g] |= there));
  const present = levels.filter((_, i) => seen[i].some((there) => there === 1));
  const shared = levels.filter((_, i) => seen[i].every((there, g) => there === 1 || groupHasRows[g] === 0));
  return { present, shared: new Set(shared) };
}
