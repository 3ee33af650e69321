import type { ContrastColumn, ModifierValues } from "../design/types";
import { distinctValues } from "../question/columns";
import { crossingOf, straightOf } from "../slopes/crossing";
import { levelsOf, rangeOf } from "../slopes/range";
import { regionsOf } from "../slopes/regions";
import { densitiesOf } from "./density";
import { differenceCurve, differencesAt } from "./difference";
import type { FigureFit } from "./fit";
import { evenValues } from "./grid";
import { groupLines, withValues } from "./lines";
import { drawnRows } from "./rows";
import type { AlongFigure, DrawnRows, LevelDifference } from "./types";

/** A modifier of no more values than this is looked at where it has them. */
const FEW_VALUES = 12;

/** Smallest and largest of some values, and whether there are no others. */
export interface Ends {
  readonly low: number;
  readonly high: number;
  readonly twoValued: boolean;
}

/** @param values at least one */
export function endsOfValues(values: Float64Array): Ends {
  let [low, high] = [Infinity, -Infinity];
  for (const value of values) {
    if (value < low) low = value;
    if (value > high) high = value;
  }
  return { low, high, twoValued: values.every((value) => value === low || value === high) };
}

/** Everything that is drawn along a numeric modifier. */
export function alongFigure(
  figure: FigureFit,
  contrast: ContrastColumn,
  values: Float64Array,
  { low, high }: Ends,
  lines: Uint32Array,
): AlongFigure {
  const { design, modifier, level } = figure;
  const { form } = design.covariates.get(modifier)!.basis;
  const log = form === "log";
  const { shared } = rangeOf(design, values);
  const even = evenValues(low, high, log);
  const grid = distinctValues(values, FEW_VALUES) ?? even;
  const x = withValues(even, grid);
  const groups = byGroup(figure, values);
  const line = straightOf(design, figure, contrast);
  const alone = figure.modifiers.length === 1;
  return {
    modifier,
    log,
    range: [low, high],
    shared,
    grid,
    lines: design.group ? groupLines(figure, x, groups.map(endsOfGroup)) : [],
    difference: differenceCurve(figure, contrast, withValues(x, shared ?? [])),
    crossing: alone && line ? crossingOf(line, modifier, values, level) : null,
    regions: regionsOf(design, figure, contrast, level),
    points: design.group ? rowsAlong(figure, values, lines) : { group: [], x: [], y: [], lines: [], of: 0 },
    densities: densitiesOf(groups, [low, high], log),
  };
}

/** The contrast at each level of a category, or at both values of a number that has two. */
export function differencesByLevel(
  figure: FigureFit,
  contrast: ContrastColumn,
  values: ModifierValues,
  ends: Ends | null,
): LevelDifference[] {
  const { design } = figure;
  if (values.kind === "category") {
    const { present, shared } = levelsOf(design, values);
    return differencesAt(figure, contrast, present, (value) => shared.has(String(value)));
  }
  const { shared, reporting } = rangeOf(design, values.values);
  const inShared = (value: number | string) => shared !== null && Number(value) >= shared[0] && Number(value) <= shared[1];
  return ends && ends.low < ends.high ? differencesAt(figure, contrast, reporting, inShared) : [];
}

/** The outcome of each row against the modifier, both in their own units. */
function rowsAlong({ design }: FigureFit, x: Float64Array, lines: Uint32Array): DrawnRows {
  const y = design.frame.outcome.map((value) => value + design.outcomeCentre);
  return drawnRows({ x, y, lines, group: design.group!.codes });
}

/** The modifier's values of each group, the reference first; of all rows for an amount. */
function byGroup({ design }: FigureFit, values: Float64Array): Float64Array[] {
  const { group } = design;
  return group ? group.levels.map((_, g) => values.filter((_value, i) => group.codes[i] === g)) : [values];
}

function endsOfGroup(values: Float64Array): [number, number] | null {
  if (values.length === 0) return null;
  const { low, high } = endsOfValues(values);
  return [low, high];
}
