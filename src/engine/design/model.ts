import type { Term } from "../comparison";
import { quadratic } from "../errors/quadratic";
import type { Fit } from "../linear/types";
import type { Basis, Block, Design } from "./types";

/** One row of the fitted table: raw units, `standardError` null where it was not computed. */
export interface ModelRow {
  readonly term: Term;
  readonly estimate: number;
  readonly standardError: number | null;
}

type Named = Exclude<Term, { role: "intercept" }>;

/**
 * A fit's coefficients as those of the raw columns (centring, scaling and orthogonal powers undone), the outcome's centre in the intercept.
 * Columns that were set aside have no row.
 * @param matrix covariance of the coefficients, or null
 * @param modifiers modifiers whose products with the exposure are among the fit's columns
 */
export function modelRows(design: Design, fit: Fit, matrix: Float64Array | null, modifiers: readonly string[]): ModelRow[] {
  const place = new Map(fit.columns.map((column, at) => [column, at]));
  // a basis hands out one object a term, so that terms are known by identity; products are known by their text
  const rows = new Map<Term | string, { term: Term; combination: Float64Array }>();
  const add = (term: Term, at: number, share: number, key: Term | string = term) => {
    if (share === 0) return;
    let row = rows.get(key);
    if (!row) rows.set(key, (row = { term, combination: new Float64Array(fit.columns.length) }));
    row.combination[at] += share;
  };
  const intercept: Term = { role: "intercept" };
  if (place.has(0)) add(intercept, place.get(0)!, 1);
  const main = (block: Block) => {
    block.columns.forEach((column, k) => {
      const at = place.get(column);
      if (at === undefined) return;
      expand(block.basis, k).forEach(({ term, share }) => add(term ?? intercept, at, share));
    });
  };
  for (const block of design.covariates.values()) main(block);
  main(design.exposure);
  for (const name of modifiers) {
    const other = design.covariates.get(name)!.basis;
    design.interactions.get(name)!.columns.forEach((line, g) => {
      line.forEach((column, k) => {
        const at = place.get(column);
        if (at === undefined) return;
        for (const x of expand(design.exposure.basis, g)) {
          for (const z of expand(other, k)) {
            const share = x.share * z.share;
            const product: Term | null = x.term && z.term ? { ...x.term, times: z.term } : null;
            if (product) add(product, at, share, JSON.stringify(product));
            else add(x.term ?? z.term ?? intercept, at, share);
          }
        }
      });
    });
  }
  return [...rows.values()].map(({ term, combination }) => {
    let estimate = "role" in term ? design.outcomeCentre : 0;
    for (let i = 0; i < combination.length; i++) estimate += combination[i] * fit.coefficients[i];
    const variance = matrix ? quadratic(matrix, combination, combination) : NaN;
    return { term, estimate, standardError: variance >= 0 ? Math.sqrt(variance) : null };
  });
}

/** One design column in raw terms: shares of the terms, and of the intercept (term null). */
function expand(basis: Basis, k: number): { term: Named | null; share: number }[] {
  const { terms, map, intercept } = basis.raw;
  const parts: { term: Named | null; share: number }[] = terms.map((term, t) => ({
    term: term as Named,
    share: map[t * basis.size + k],
  }));
  return [...parts, { term: null, share: intercept[k] }].filter((part) => part.share !== 0);
}
