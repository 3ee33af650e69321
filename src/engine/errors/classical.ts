import type { Fit } from "../linear/types";
import type { CoefficientErrors, Covariance } from "./types";

/** Classical errors of all coefficients, from the fit alone: they need no pass over the rows. */
export function classicalErrors(fit: Fit): CoefficientErrors {
  const s2 = fit.residualSumOfSquares / fit.residualDf;
  const matrix = fit.inverse.map((value) => value * s2);
  return { kind: "classical", used: "classical", matrix, dfOf: () => fit.residualDf, clustered: null };
}

/** As a whole covariance without rows: no leverages or residuals, so no shift can be computed from it. */
export function withoutRows(errors: CoefficientErrors): Covariance {
  return { ...errors, leverageOneRows: [], residuals: new Float64Array(0), leverages: null };
}
