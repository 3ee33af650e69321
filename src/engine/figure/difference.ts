import type { ContrastColumn } from "../design/types";
import { combine, contrastAt, intervalOf } from "../slopes/fit";
import type { Combined } from "../slopes/fit";
import { criticalsOf } from "../slopes/regions";
import { placeAt } from "./fit";
import type { FigureFit } from "./fit";
import { allKnown, intervalsOf } from "./lines";
import type { DifferenceCurve, Interval, LevelDifference } from "./types";

/**
 * One contrast along the modifier with both its bands; their ends are those the regions are cut at. Null where it cannot be estimated.
 * @param x ascending
 */
export function differenceCurve(figure: FigureFit, contrast: ContrastColumn, x: readonly number[]): DifferenceCurve | null {
  const combined = x.map((value) => differenceAt(figure, contrast, value));
  if (!hasProduct(figure, contrast) || !allKnown(combined)) return null;
  const criticals = criticalsOf(figure.design, figure, contrast, figure.modifier, figure.level);
  const band = (square: number | undefined): Interval | null =>
    intervalsOf(combined.map((c) => (square === undefined ? null : around(c, Math.sqrt(square)))));
  return {
    x,
    estimate: combined.map((c) => c.estimate),
    standardError: combined.map((c) => c.standardError),
    pointwise: band(criticals?.pointwise),
    simultaneous: band(criticals?.simultaneous),
  };
}

/** One contrast at some values of the modifier; those that cannot be estimated are left out. */
export function differencesAt(
  figure: FigureFit,
  contrast: ContrastColumn,
  values: readonly (number | string)[],
  supported: (value: number | string) => boolean,
): LevelDifference[] {
  if (!hasProduct(figure, contrast)) return [];
  return values.flatMap((value): LevelDifference[] => {
    const combined = differenceAt(figure, contrast, value);
    if (!combined || !Number.isFinite(combined.estimate)) return [];
    const { estimate, standardError } = combined;
    const interval = intervalOf(combined, figure.level);
    const known = interval?.every(Number.isFinite) ? interval : null;
    return [{ value, estimate, standardError: known && standardError, interval: known, supported: supported(value) }];
  });
}

function differenceAt(figure: FigureFit, contrast: ContrastColumn, value: number | string): Combined | null {
  const combination = contrastAt(figure.design, figure, contrast, placeAt(figure, value));
  return combination && combine(figure, combination);
}

/** Without a product in the fit the contrast would be the same everywhere: one number, which is not what this draws. */
function hasProduct({ design, fit, modifier }: FigureFit, contrast: ContrastColumn): boolean {
  const products = design.interactions.get(modifier)!.columns[design.exposure.columns.indexOf(contrast.column)];
  return products.some((column) => fit.columns.includes(column));
}

function around({ estimate, standardError }: Combined, critical: number): [number, number] | null {
  return standardError === null ? null : [estimate - critical * standardError, estimate + critical * standardError];
}
