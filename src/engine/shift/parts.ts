import type { Shift } from "../comparison";
import type { ContrastColumn, Design } from "../design/types";
import { covariance } from "../errors/covariance";
import { influence } from "../errors/influence";
import type { Covariance } from "../errors/types";
import { fitColumns } from "../linear/fit";
import type { Factor, Fit } from "../linear/types";
import { partSquares } from "./rows";
import type { RowPart } from "./rows";

/** One fitted set, as the shift needs it. */
export interface Fitted {
  readonly fit: Fit;
  readonly cov: Covariance;
}

/** A covariate's columns with their coefficients in the full set, and the base columns' regressions on which the contrast's Γ stands. */
interface Share {
  readonly covariate: string;
  readonly columns: readonly { readonly column: number; readonly beta: number; readonly gamma: number; readonly aux: Fit }[];
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
  const shares = names.map((covariate): Share => {
    // a column set aside has no part: other covariates carry it
    const kept = design.covariates.get(covariate)!.columns.filter((column) => full.fit.columns.includes(column));
    const columns = kept.map((column) => {
      const aux = fitColumns(factor, base.fit.columns, column);
      const gamma = aux.coefficients[aux.columns.indexOf(contrast.column)];
      return { column, beta: full.fit.coefficients[full.fit.columns.indexOf(column)], gamma, aux };
    });
    return { covariate, columns };
  });
  const squares = base.cov.clustered
    ? shares.map((share) => clusterSquares(design, base, full, contrast, share))
    : partSquares(
        design.frame,
        base,
        full,
        unit(base.fit, contrast.column),
        shares.map((share) => rowPart(base, full, share)),
      );
  return shares.map(({ covariate, columns }, i) => ({
    covariate,
    estimate: columns.reduce((sum, { gamma, beta }) => sum - gamma * beta, 0) * contrast.factor,
    standardError: finite(Math.sqrt(squares[i] * errorFactor) * Math.abs(contrast.factor)),
  }));
}

/** Σ_c γ_c β̂_c as a combination of the full fit's coefficients, and Σ_c β_c times the residual of column c from the base columns. */
function rowPart(base: Fitted, full: Fitted, { columns }: Share): RowPart {
  const combination = new Float64Array(full.fit.columns.length);
  const residual = new Map<number, number>();
  const add = (column: number, share: number) => residual.set(column, (residual.get(column) ?? 0) + share);
  for (const { column, beta, gamma, aux } of columns) {
    combination[full.fit.columns.indexOf(column)] = gamma;
    add(column, beta);
    base.fit.columns.forEach((baseColumn) => add(baseColumn, -beta * aux.coefficients[aux.columns.indexOf(baseColumn)]));
  }
  return { combination, residual };
}

/** Σ over clusters of the part's influence squared. */
function clusterSquares(design: Design, base: Fitted, full: Fitted, contrast: ContrastColumn, { columns }: Share): number {
  const psi = new Float64Array(design.frame.clusters!.count);
  for (const { column, beta, gamma, aux } of columns) {
    const ofBeta = influence(design.frame, full.fit, full.cov, unit(full.fit, column));
    const frame = { ...design.frame, outcome: design.frame.columns[column] };
    const cov = covariance(frame, aux, base.cov.kind);
    const ofGamma = influence(frame, aux, cov, unit(aux, contrast.column));
    for (let j = 0; j < psi.length; j++) psi[j] -= gamma * ofBeta[j] + ofGamma[j] * beta;
  }
  return psi.reduce((sum, value) => sum + value * value, 0);
}

function unit(fit: Fit, column: number): Float64Array {
  return Float64Array.from(fit.columns, (c) => (c === column ? 1 : 0));
}

function finite(value: number): number | null {
  return Number.isFinite(value) ? value : null;
}
