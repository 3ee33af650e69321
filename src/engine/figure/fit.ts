import type { ContrastColumn, Design } from "../design/types";
import { covariance } from "../errors/covariance";
import type { Factor } from "../linear/types";
import type { Variance } from "../plan";
import { hasErrors, solveJoint } from "../slopes/fit";
import type { InteractionFit } from "../slopes/types";

/** The fit a figure is drawn from, with the place of everything that is not drawn along. */
export interface FigureFit extends InteractionFit {
  readonly design: Design;
  /** The modifier drawn along; the others of the fit stand in `heldAt`. */
  readonly modifier: string;
  readonly heldAt: ReadonlyMap<string, number | string>;
  /** Means over the common rows of the set's other columns, by frame column. */
  readonly means: ReadonlyMap<number, number>;
  readonly level: number;
}

/** The fit a readout of these modifiers rests on, with the errors of all its coefficients. */
export function fitFigure(
  design: Design,
  factor: Factor,
  set: readonly string[],
  modifiers: readonly string[],
  variance: Variance,
): InteractionFit {
  const fit = solveJoint({ design, factor }, set, modifiers);
  // a line's band needs the errors of every coefficient, the constant's too
  return { fit, cov: hasErrors(design, variance, fit) ? covariance(design.frame, fit, variance) : null, modifiers };
}

/** The values of all the fit's modifiers where the drawn one has a given value. */
export function placeAt({ modifier, heldAt }: FigureFit, value: number | string): ReadonlyMap<string, number | string> {
  return new Map([...heldAt, [modifier, value]]);
}

/**
 * The combination of coefficients that is a group's mean outcome (less the outcome's centre) at a value of the modifier, the set's other columns
 * at their means; null where a coefficient it needs could not be estimated.
 * @param contrast the group's; null for the reference
 */
export function meanAt(figure: FigureFit, contrast: ContrastColumn | null, value: number): Float64Array | null {
  const { design, fit, means, modifiers } = figure;
  const combination = new Float64Array(fit.columns.length);
  let complete = true;
  const place = (column: number, share: number) => {
    const at = fit.columns.indexOf(column);
    if (at >= 0) combination[at] += share;
    else if (share !== 0) complete = false;
  };
  place(0, 1);
  // a column that others determine is in their share already
  for (const [column, mean] of means) if (fit.columns.includes(column)) place(column, mean);
  if (contrast) place(contrast.column, 1);
  const values = placeAt(figure, value);
  for (const name of modifiers) {
    const { basis, columns } = design.covariates.get(name)!;
    const shares = basis.at(values.get(name)!);
    columns.forEach((column, k) => place(column, shares[k]));
    if (!contrast) continue;
    const products = design.interactions.get(name)!.columns[design.exposure.columns.indexOf(contrast.column)];
    products.forEach((column, k) => place(column, shares[k]));
  }
  return complete ? combination : null;
}
