import type { Design } from "../design/types";
import { classicalErrors, withoutRows } from "../errors/classical";
import { covariance } from "../errors/covariance";
import { influence } from "../errors/influence";
import type { Covariance } from "../errors/types";
import type { Factor, Fit } from "../linear/types";
import type { Passing, RowMemory } from "../passes/types";
import type { Variance } from "../plan";
import { treeErrors } from "../tree";
import type { TreeErrors } from "../tree";
import type { Depth, SetFit, SolvedSet } from "./set";

/**
 * Gives each solved set its errors: all coefficients of the sets that are looked at in full, the exposure's alone of the others; these, and the
 * shifts of all, together in one pass over the rows.
 * @param depth by set; the base set, the first, is never "exposure"
 */
export function withErrors(
  design: Design,
  factor: Factor,
  solved: readonly SolvedSet[],
  variance: Variance,
  depth: (set: number) => Depth,
  passing: Passing,
): SetFit[] {
  const targets = design.exposure.columns;
  const [first] = solved;
  const base = first.enough ? ownErrors(design, first.fit, variance, depth(0), passing.memory) : null;
  const others = solved.flatMap((set, i) => (i > 0 && set.enough && depth(i) !== "first look" ? [i] : []));
  const together = new Map<number, TreeErrors | null>();
  if (others.length > 0) {
    const psi = base && baseInfluences(design, first.fit, base, passing.memory);
    const fits = others.map((i) => solved[i].fit);
    const found = treeErrors({ frame: design.frame, factor, targets, kind: variance, base: psi, passing }, fits);
    others.forEach((i, k) => together.set(i, found[k]));
  }
  return solved.map((set, i): SetFit => {
    if (!set.enough) return { ...set, cov: null, shiftSquares: null };
    if (i === 0) return { ...set, cov: base, shiftSquares: null };
    const found = together.get(i);
    const shiftSquares = found?.shift ?? null;
    if (found && depth(i) === "exposure") return { ...set, cov: withoutRows(found.errors), shiftSquares };
    return { ...set, cov: ownErrors(design, set.fit, variance, depth(i), passing.memory), shiftSquares };
  });
}

function ownErrors(design: Design, fit: Fit, variance: Variance, depth: Depth, memory?: RowMemory): Covariance {
  if (depth === "first look") return withoutRows(classicalErrors(fit));
  const { n } = design.frame;
  const from = depth === "exposure" ? firstOf(fit, design.exposure.columns) : 0;
  return covariance(design.frame, fit, variance, from, memory && { e: memory.take(n), h: memory.take(n) });
}

function firstOf(fit: Fit, columns: readonly number[]): number {
  return Math.max(
    0,
    fit.columns.findIndex((column) => columns.includes(column)),
  );
}

/** Of the base fit, on each exposure column's coefficient; null where one of them is set aside there. */
function baseInfluences(design: Design, fit: Fit, cov: Covariance, memory?: RowMemory): Float64Array[] | null {
  if (cov.clustered || !design.exposure.columns.every((column) => fit.columns.includes(column))) return null;
  return design.exposure.columns.map((column) => {
    const unit = Float64Array.from(fit.columns, (c) => (c === column ? 1 : 0));
    return influence(design.frame, fit, cov, unit, memory?.take(design.frame.n));
  });
}
