import type { Fit } from "../linear/types";
import type { Covariance } from "./types";

/**
 * Classical errors from the factor alone, without a pass over the rows: what a first look shows while the plan's errors are computed. No
 * leverages or residuals, so no shift can be computed from it.
 */
export function lightErrors(fit: Fit): Covariance {
  const s2 = fit.residualSumOfSquares / fit.residualDf;
  return {
    kind: "classical",
    used: "classical",
    matrix: fit.inverse.map((v) => v * s2),
    leverageOneRows: [],
    residuals: new Float64Array(0),
    leverages: null,
    dfOf: () => fit.residualDf,
    clustered: null,
  };
}
