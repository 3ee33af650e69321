import { residuals as residualsOf } from "../linear/rows";
import type { Fit, Frame } from "../linear/types";
import type { Variance } from "../plan";
import { biasReduced, clusterScores } from "./cluster";
import { sandwich, transposedTimes } from "./quadratic";
import { LEVERAGE_GAP, robustMeat } from "./robust";
import { satterthwaite } from "./satterthwaite";
import type { Clustered, Covariance } from "./types";

/** Two buffers of length n. */
export interface Scratch {
  readonly e: Float64Array;
  readonly h: Float64Array;
}

/**
 * Covariance of a fit's coefficients, of one of the seven kinds of METHODS 3. HC2 and HC3 fall back to HC1 where a row has leverage 1.
 * @param from first coefficient whose covariance is wanted: with robust kinds only the block from there on is filled, at less cost
 * @param scratch buffers of length n to work in, for callers that use the matrix alone: residuals and leverages of the result are then
 *   only good until the next call (fresh memory is dear where thousands of models are fitted)
 * @throws Error (a bug) when CR1 or CR2 is asked of a frame without clusters, or a fit has no residual degrees of freedom
 */
export function covariance(frame: Frame, fit: Fit, kind: Variance, from = 0, scratch?: Scratch): Covariance {
  if (fit.residualDf <= 0) throw new Error("covariance of a fit without residual degrees of freedom");
  const e = residualsOf(frame, fit, scratch?.e);
  if (kind === "CR1" || kind === "CR2") return clusteredCovariance(frame, fit, e, kind);
  const p = fit.columns.length;
  const h = scratch?.h ?? new Float64Array(frame.n);
  const dfOf = () => fit.residualDf;
  // Classical errors need the leverages too: the shift's influences rest on them.
  const meat = robustMeat(frame, fit, e, h, kind, kind === "classical" ? p : from);
  const leverageOneRows: number[] = [];
  for (let i = 0; i < h.length; i++) if (1 - h[i] < LEVERAGE_GAP) leverageOneRows.push(i);
  const used = leverageOneRows.length > 0 && (kind === "HC2" || kind === "HC3") ? "HC1" : kind;
  const shared = { kind, used, leverageOneRows, residuals: e, leverages: h, dfOf, clustered: null } as const;
  if (used === "classical") {
    const s2 = fit.residualSumOfSquares / fit.residualDf;
    return { ...shared, matrix: fit.inverse.map((v) => v * s2) };
  }
  const settled = used === kind ? meat : robustMeat(frame, fit, e, h, used, from);
  const factor = used === "HC1" ? frame.n / fit.residualDf : 1;
  return { ...shared, matrix: sandwich(fit.rInverse, settled, p).map((v) => v * factor) };
}

function clusteredCovariance(frame: Frame, fit: Fit, e: Float64Array, kind: "CR1" | "CR2"): Covariance {
  if (!frame.clusters) throw new Error(`${kind} without clusters`);
  const p = fit.columns.length;
  const clustered = kind === "CR1" ? clusterScores(frame, fit, e) : biasReduced(frame, fit, e);
  const factor = kind === "CR1" ? clusterFactor(frame, fit) : 1;
  const matrix = sandwich(fit.rInverse, scoreProducts(clustered, p), p).map((v) => v * factor);
  const { count } = frame.clusters;
  const dfOf = (combination: Float64Array) => {
    if (kind === "CR1") return count > 1 ? count - 1 : null;
    return satterthwaite(clustered, transposedTimes(fit.rInverse, combination));
  };
  return { kind, used: kind, matrix, leverageOneRows: [], residuals: e, leverages: null, dfOf, clustered };
}

/** CR1's small-sample factor J/(J−1)·(n−1)/(n−p); 1 for other uses of the sums. */
export function clusterFactor(frame: Frame, fit: Fit): number {
  const j = frame.clusters!.count;
  return (j / (j - 1)) * ((frame.n - 1) / fit.residualDf);
}

function scoreProducts({ scores, count }: Clustered, p: number): Float64Array {
  const out = new Float64Array(p * p);
  for (let c = 0; c < count; c++) {
    for (let a = 0; a < p; a++) for (let b = 0; b < p; b++) out[a * p + b] += scores[c * p + a] * scores[c * p + b];
  }
  return out;
}
