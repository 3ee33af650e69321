import type { Shift } from "../comparison";
import type { ContrastColumn, Design } from "../design/types";
import { clusterFactor } from "../errors/covariance";
import { influence } from "../errors/influence";
import type { Factor } from "../linear/types";
import { tCritical } from "../probability";
import { shiftParts } from "./parts";
import type { Fitted } from "./parts";

/** What the shift of one set is computed from. */
export interface ShiftInput {
  readonly design: Design;
  readonly factor: Factor;
  readonly base: Fitted;
  readonly full: Fitted;
  readonly contrast: ContrastColumn;
  /** Covariates beyond the base set's; parts are split over these, in this order. */
  readonly names: readonly string[];
  readonly level: number;
  /** Degrees of freedom of the adjusted estimate; null where it has none. */
  readonly df: number | null;
  readonly withParts: boolean;
  /** Σ (influence − base influence)² where it is known already; null: found here, from both fits' rows. */
  readonly squares: number | null;
}

/**
 * Adjusted less base estimate on the same rows, with an interval from the two fits' paired influences (METHODS 4): rows that push both
 * estimates alike do not widen it.
 */
export function shiftOf({ design, factor, base, full, contrast, names, level, df, withParts, squares }: ShiftInput): Shift {
  const value = (fitted: Fitted) => fitted.fit.coefficients[fitted.fit.columns.indexOf(contrast.column)] * contrast.factor;
  const estimate = value(full) - value(base);
  const errorFactor = full.cov.kind === "CR1" ? clusterFactor(design.frame, full.fit) : 1;
  const error = Math.sqrt((squares ?? pairedSquares(design, base, full, contrast)) * errorFactor);
  const standardError = Number.isFinite(error) ? error : null;
  const half = standardError === null || df === null ? null : standardError === 0 ? 0 : tCritical(level, df) * standardError;
  return {
    estimate,
    standardError,
    interval: half === null ? null : [estimate - half, estimate + half],
    parts: withParts ? shiftParts(design, factor, base, full, contrast, names, errorFactor) : [],
  };
}

function pairedSquares(design: Design, base: Fitted, full: Fitted, contrast: ContrastColumn): number {
  const psi = contrastInfluence(design, full, contrast);
  const psiBase = baseInfluence(design, base, contrast);
  let sum = 0;
  for (let i = 0; i < psi.length; i++) sum += (psi[i] - psiBase[i]) ** 2;
  return sum;
}

function contrastInfluence(design: Design, { fit, cov }: Fitted, contrast: ContrastColumn): Float64Array {
  return influence(
    design.frame,
    fit,
    cov,
    Float64Array.from(fit.columns, (c) => (c === contrast.column ? contrast.factor : 0)),
  );
}

const known = new WeakMap<Fitted["cov"], Map<number, Float64Array>>();

/** The base fit's influences, the same for every set: found once. */
function baseInfluence(design: Design, base: Fitted, contrast: ContrastColumn): Float64Array {
  let byColumn = known.get(base.cov);
  if (!byColumn) known.set(base.cov, (byColumn = new Map()));
  let psi = byColumn.get(contrast.column);
  if (!psi) byColumn.set(contrast.column, (psi = contrastInfluence(design, base, contrast)));
  return psi;
}
