import type { SlopesTest } from "../comparison";
import type { Design } from "../design/types";
import { combine, contrastAt, intervalOf } from "./fit";
import { levelsOf, rangeOf } from "./range";
import type { InteractionFit } from "./types";

/** Even points at which a curved modifier is looked at. */
const POINTS = 21;

/** D: how far the group difference moves along the modifier (METHODS 5). */
export interface Changes {
  /** The largest, with its 90 % interval; null where none can be computed. */
  readonly largest: SlopesTest["change"];
  /** Whether every contrast's and pair's interval lies inside the bounds. */
  within(bounds: readonly [number, number]): boolean;
  /** Nothing of the modifier's central range is shared by the groups. */
  readonly noSharedRange: boolean;
}

/** Every change of every contrast: between the ends of C, between any two of 21 points for a curve, between any two levels of a category. */
export function changesOf(design: Design, interaction: InteractionFit, modifier: string): Changes {
  const pairs = pairsOf(design, modifier);
  let largest: SlopesTest["change"] = null;
  const intervals: [number, number][] = [];
  let complete = pairs.length > 0;
  for (const contrast of design.contrasts) {
    if (contrast.column < 0) continue;
    for (const [from, to] of pairs) {
      const start = contrastAt(design, interaction, contrast, new Map([[modifier, from]]));
      const end = contrastAt(design, interaction, contrast, new Map([[modifier, to]]));
      const combined =
        start && end
          ? combine(
              interaction,
              end.map((v, i) => v - start[i]),
            )
          : null;
      const interval90 = combined && intervalOf(combined, 0.9);
      if (!combined || !interval90) {
        complete = false;
        continue;
      }
      intervals.push(interval90);
      if (!largest || Math.abs(combined.estimate) > Math.abs(largest.estimate)) {
        largest = { contrast: contrast.contrast, estimate: combined.estimate, interval90, from, to };
      }
    }
  }
  const within = ([low, high]: readonly [number, number]) => complete && intervals.every(([a, b]) => a >= low && b <= high);
  return { largest, within, noSharedRange: pairs.length === 0 };
}

/** The pairs of values between which the difference may change, earlier first. */
function pairsOf(design: Design, modifier: string): [number | string, number | string][] {
  const values = design.modifierValues.get(modifier)!;
  const { basis } = design.covariates.get(modifier)!;
  if (values.kind === "category") {
    const { present } = levelsOf(design, values);
    return everyPair(present);
  }
  const { central } = rangeOf(design, values.values);
  if (!central) return [];
  if (basis.size === 1) return [[central[0], central[1]]];
  const step = (central[1] - central[0]) / (POINTS - 1);
  return everyPair(Array.from({ length: POINTS }, (_, i) => (i === POINTS - 1 ? central[1] : central[0] + i * step)));
}

function everyPair<T>(values: readonly T[]): [T, T][] {
  return values.flatMap((from, i) => values.slice(i + 1).map((to): [T, T] => [from, to]));
}
