import type { Crossing } from "../comparison";
import type { ContrastColumn, Design } from "../design/types";
import { quadratic } from "../errors/quadratic";
import { tCritical } from "../probability";
import { countBelow, sortedValues } from "./sorted";
import type { InteractionFit } from "./types";

/** A straight group difference a + b·f along the (centred, scaled) modifier f, with its covariance and the way back to the modifier's units. */
export interface Straight {
  readonly a: number;
  readonly b: number;
  readonly vaa: number;
  readonly vab: number;
  readonly vbb: number;
  readonly df: number;
  /** From f to the modifier's own units. */
  back(f: number): number;
  forth(value: number): number;
}

/** The difference of one contrast as a straight line in its one modifier; null for a curve, a category, or where it has no errors. */
export function straightOf(design: Design, { fit, cov, modifiers }: InteractionFit, contrast: ContrastColumn): Straight | null {
  if (modifiers.length !== 1) return null;
  const { basis } = design.covariates.get(modifiers[0])!;
  if (basis.size !== 1 || basis.form === "category") return null;
  const g = design.exposure.columns.indexOf(contrast.column);
  const [i, j] = [
    fit.columns.indexOf(contrast.column),
    fit.columns.indexOf(design.interactions.get(modifiers[0])!.columns[g][0]),
  ];
  if (i < 0 || j < 0) return null;
  const unit = (at: number) => Float64Array.from(fit.columns, (_, k) => (k === at ? 1 : 0));
  const [ei, ej] = [unit(i), unit(j)];
  const v = (x: Float64Array, y: Float64Array) => (cov ? quadratic(cov.matrix, x, y) : fit.residualSumOfSquares === 0 ? 0 : NaN);
  const df = cov?.dfOf(ej) ?? (fit.residualDf > 0 && fit.residualSumOfSquares === 0 ? fit.residualDf : null);
  if (df === null) return null;
  const [slope] = basis.raw.map;
  const [start] = basis.raw.intercept;
  const log = basis.form === "log";
  return {
    a: fit.coefficients[i],
    b: fit.coefficients[j],
    vaa: v(ei, ei),
    vab: v(ei, ej),
    vbb: v(ej, ej),
    df,
    back: (f) => (log ? Math.exp((f - start) / slope) : (f - start) / slope),
    forth: (value) => (log ? Math.log(value) : value) * slope + start,
  };
}

/**
 * Where the difference is zero, with Fieller's (1954) interval: the values of the modifier at which a difference of 0 is not contradicted.
 * Null where the line is level.
 */
export function crossingOf(line: Straight, modifier: string, values: Float64Array, level: number): Crossing | null {
  const at = line.back(-line.a / line.b);
  if (!Number.isFinite(at)) return null;
  const share = values.length > 0 ? countBelow(sortedValues(values), at) / values.length : 0;
  return { modifier, value: at, interval: fieller(line, level), below: share, above: 1 - share };
}

function fieller(line: Straight, level: number): Crossing["interval"] {
  const t2 = tCritical(level, line.df) ** 2;
  const roots = quadraticRoots(line, t2);
  const opensUp = line.b * line.b - t2 * line.vbb > 0;
  const end = (f: number) => {
    const value = line.back(f);
    return Number.isFinite(value) ? value : null;
  };
  if (!roots)
    return opensUp
      ? { kind: "between", low: end(-line.a / line.b), high: end(-line.a / line.b) }
      : { kind: "everywhere", low: null, high: null };
  return { kind: opensUp ? "between" : "outside", low: end(roots[0]), high: end(roots[1]) };
}

/** The f, ascending, at which (a + bf)² = c·(variance at f); null where there are none. Computed without cancellation. */
export function quadraticRoots({ a, b, vaa, vab, vbb }: Straight, c: number): [number, number] | null {
  const [A, B, C] = [b * b - c * vbb, 2 * (a * b - c * vab), a * a - c * vaa];
  const discriminant = B * B - 4 * A * C;
  if (A === 0) return null;
  if (discriminant < 0) return null;
  const q = -(B + (B < 0 ? -1 : 1) * Math.sqrt(discriminant)) / 2;
  const roots = q === 0 ? [0, 0] : [q / A, C / q];
  return roots[0] <= roots[1] ? [roots[0], roots[1]] : [roots[1], roots[0]];
}
