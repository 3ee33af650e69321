import type { Region } from "../comparison";
import type { ContrastColumn, Design } from "../design/types";
import { fQuantileUpper, tCritical } from "../probability";
import { quadraticRoots, straightOf } from "./crossing";
import { combine, contrastAt } from "./fit";
import { rangeOf } from "./range";
import { countBelow, sortedValues } from "./sorted";
import type { InteractionFit } from "./types";

/** Points between which a curve's bands are searched for a crossing of zero; each found one is narrowed by bisection. */
const GRID = 400;

/**
 * The stretches of a numeric modifier where the band of the difference lies above zero, below it, or holds it (Johnson & Neyman 1936; the
 * simultaneous band of Potthoff 1964), over the range where every group has rows, with the share of the common rows in each.
 */
export function regionsOf(design: Design, interaction: InteractionFit, contrast: ContrastColumn, level: number): Region[] {
  const [modifier] = interaction.modifiers;
  const values = design.modifierValues.get(modifier)!;
  if (interaction.modifiers.length !== 1 || values.kind === "category") return [];
  const { shared } = rangeOf(design, values.values);
  const critical = criticalsOf(design, interaction, contrast, modifier, level);
  if (!shared || !critical) return [];
  const sorted = sortedValues(values.values);
  return (["pointwise", "simultaneous"] as const).flatMap((band) => {
    const signAt = (value: number) => bandSign(design, interaction, contrast, modifier, value, critical[band]);
    const cuts = cutsOf(design, interaction, contrast, shared, critical[band], signAt);
    const edges = [shared[0], ...cuts, shared[1]];
    const regions: Region[] = [];
    for (let i = 0; i + 1 < edges.length; i++) {
      const [from, to] = [edges[i], edges[i + 1]];
      const sign = signAt((from + to) / 2);
      if (sign === null) return [];
      const last = regions[regions.length - 1];
      if (last?.sign === sign) regions[regions.length - 1] = { ...last, to };
      else regions.push({ modifier, from, to, sign, band, rowsShare: 0 });
    }
    return regions.map((region, i) => ({
      ...region,
      rowsShare: shareIn(sorted, region.from, region.to, i === regions.length - 1),
    }));
  });
}

/** Squares of the critical values of a contrast's two bands along a modifier; null where there are no errors. */
export function criticalsOf(
  design: Design,
  interaction: InteractionFit,
  contrast: ContrastColumn,
  modifier: string,
  level: number,
): Readonly<Record<Region["band"], number>> | null {
  const df = bandDf(design, interaction, contrast, modifier);
  if (df === null) return null;
  const q = design.covariates.get(modifier)!.basis.size;
  return { pointwise: tCritical(level, df) ** 2, simultaneous: (1 + q) * fQuantileUpper(1 - level, 1 + q, df) };
}

function bandDf(design: Design, { fit, cov }: InteractionFit, contrast: ContrastColumn, modifier: string): number | null {
  if (!cov) return null;
  const g = design.exposure.columns.indexOf(contrast.column);
  const columns = design.interactions.get(modifier)!.columns[g].filter((c) => fit.columns.includes(c));
  const dfs = columns.map((column) => cov.dfOf(Float64Array.from(fit.columns, (c) => (c === column ? 1 : 0))));
  return dfs.length === 0 || dfs.includes(null) ? null : Math.min(...(dfs as number[]));
}

/** 1 or −1 where the band excludes zero at a value, 0 where it holds it, null where there is no band. */
function bandSign(
  design: Design,
  interaction: InteractionFit,
  contrast: ContrastColumn,
  modifier: string,
  value: number,
  critical: number,
): 1 | -1 | 0 | null {
  const combination = contrastAt(design, interaction, contrast, new Map([[modifier, value]]));
  if (!combination) return null;
  const { estimate, standardError } = combine(interaction, combination);
  if (standardError === null) return null;
  if (estimate * estimate <= critical * standardError * standardError) return 0;
  return estimate > 0 ? 1 : -1;
}

function cutsOf(
  design: Design,
  interaction: InteractionFit,
  contrast: ContrastColumn,
  [low, high]: readonly [number, number],
  critical: number,
  signAt: (value: number) => 1 | -1 | 0 | null,
): number[] {
  const line = straightOf(design, interaction, contrast);
  const inside = (value: number) => value > low && value < high;
  if (line) return (quadraticRoots(line, critical) ?? []).map((f) => line.back(f)).filter(inside);
  const cuts: number[] = [];
  let [left, leftSign] = [low, signAt(low)];
  for (let i = 1; i <= GRID; i++) {
    const right = low + ((high - low) * i) / GRID;
    const rightSign = signAt(right);
    if (rightSign !== leftSign) cuts.push(bisect(left, right, leftSign, signAt));
    [left, leftSign] = [right, rightSign];
  }
  return cuts.filter(inside);
}

function bisect(from: number, to: number, sign: 1 | -1 | 0 | null, signAt: (value: number) => 1 | -1 | 0 | null): number {
  let [low, high] = [from, to];
  for (let i = 0; i < 60; i++) {
    const middle = (low + high) / 2;
    if (signAt(middle) === sign) low = middle;
    else high = middle;
  }
  return (low + high) / 2;
}

/** Share of the rows with from ≤ value < to (the last region's end included). */
function shareIn(sorted: Float64Array, from: number, to: number, last: boolean): number {
  const count = countBelow(sorted, to, last) - countBelow(sorted, from);
  return count / sorted.length;
}
