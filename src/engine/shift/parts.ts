import type { Shift } from "../comparison";
import type { ContrastColumn, Design } from "../design/types";
import { covariance } from "../errors/covariance";
import { influence } from "../errors/influence";
import type { Covariance } from "../errors/types";
import { fitColumns } from "../linear/fit";
import { residuals } from "../linear/rows";
import type { Factor, Fit } from "../linear/types";

/** One fitted set, as the shift needs it. */
export interface Fitted {
  readonly fit: Fit;
  readonly cov: Covariance;
}

/**
 * The order-free split of a shift over the covariates (Gelbach 2016): part_k = −Γ_k β_k, which sum to it exactly. Γ_k is the contrast's
 * coefficient when covariate k's columns are regressed on the base columns. Errors from ψ(part_k) = −(Γ_k ψ(β_k) + ψ(Γ_k) β_k).
 * @param names covariates of the set that the base set does not hold
 * @param errorFactor CR1's factor of the adjusted fit, else 1
 */
export function shiftParts(
  design: Design,
  factor: Factor,
  base: Fitted,
  full: Fitted,
  contrast: ContrastColumn,
  names: readonly string[],
  errorFactor: number,
): Shift["parts"] {
  const unit = (fit: Fit, column: number) => Float64Array.from(fit.columns, (c) => (c === column ? 1 : 0));
  return names.map((covariate) => {
    let estimate = 0;
    let psi: Float64Array | null = null;
    for (const column of design.covariates.get(covariate)!.columns) {
      const at = full.fit.columns.indexOf(column);
      if (at < 0) continue; // set aside: other covariates carry it
      const beta = full.fit.coefficients[at];
      const aux = fitColumns(factor, base.fit.columns, column);
      const gamma = aux.coefficients[aux.columns.indexOf(contrast.column)];
      estimate -= gamma * beta;
      const ofBeta = influence(design.frame, full.fit, full.cov, unit(full.fit, column));
      const ofGamma = auxiliaryInfluence(design, aux, base, column, unit(aux, contrast.column));
      psi ??= new Float64Array(ofBeta.length);
      for (let i = 0; i < psi.length; i++) psi[i] -= gamma * ofBeta[i] + ofGamma[i] * beta;
    }
    const variance = psi ? psi.reduce((sum, v) => sum + v * v, 0) * errorFactor : 0;
    return {
      covariate,
      estimate: estimate * contrast.factor,
      standardError: finite(Math.sqrt(variance) * Math.abs(contrast.factor)),
    };
  });
}

/** ψ of a coefficient of the regression of one design column on the base columns: leverages are those of the base fit. */
function auxiliaryInfluence(design: Design, aux: Fit, base: Fitted, column: number, combination: Float64Array): Float64Array {
  const frame = { ...design.frame, outcome: design.frame.columns[column] };
  const cov = base.cov.clustered ? covariance(frame, aux, base.cov.kind) : { ...base.cov, residuals: residuals(frame, aux) };
  return influence(frame, aux, cov, combination);
}

function finite(value: number): number | null {
  return Number.isFinite(value) ? value : null;
}
